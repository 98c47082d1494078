"""Distances between bars: IS 456:2000, 26.3."""

from __future__ import annotations

from collections.abc import Mapping

from detailer.values import Required

TABLE_15: Mapping[int, tuple[float, ...]] = {
    250: (215.0, 260.0, 300.0, 300.0, 300.0),
    415: (125.0, 155.0, 180.0, 210.0, 235.0),
    500: (105.0, 130.0, 150.0, 175.0, 195.0),
    550: (95.0, 115.0, 135.0, 155.0, 175.0),
}
"""Clear distance between tension bars at −30, −15, 0, +15, +30 % redistribution. [mm]

The row of Fe 550 is not in the standard: derived from 75 000/fy, rounded down.
"""


def min_clear_gap(dia_a: float, dia_b: float, aggregate: float) -> Required:
    """Return the least horizontal clear distance of two bars. [mm]

    Parameters
    ----------
    dia_a, dia_b : float
        Nominal diameters. [mm]
    aggregate : float
        Nominal maximum size of the aggregate. [mm]

    References
    ----------
    .. [1] IS 456:2000, 26.3.2 a (confirmed on the page).
    """
    dia = max(dia_a, dia_b)
    because = "the larger bar" if dia >= aggregate + 5 else "aggregate + 5"
    return Required(max(dia, aggregate + 5), "IS 456:2000, 26.3.2", because)


def min_layer_gap(dia: float, aggregate: float) -> Required:
    """Return the least vertical clear distance of two layers. [mm]

    Parameters
    ----------
    dia : float
        Largest nominal diameter. [mm]
    aggregate : float
        Nominal maximum size of the aggregate. [mm]

    References
    ----------
    .. [1] IS 456:2000, 26.3.2 c (confirmed on the page).
    """
    terms = ((15.0, "15 mm"), (2 / 3 * aggregate, "2/3 aggregate"), (dia, "the largest bar"))
    value, because = max(terms)
    return Required(value, "IS 456:2000, 26.3.2", because)


def max_clear_gap(fy: float, redistribution: float = 0.0) -> Required:
    """Return the greatest clear distance of bars near a tension face. [mm]

    Parameters
    ----------
    fy : float
        Characteristic strength, up to 550; between rows the stronger row serves. [N/mm²]
    redistribution : float
        To (+) or from (−) the section, −30 to 30; linear between columns. [%]

    Raises
    ------
    ValueError
        Outside the table.

    References
    ----------
    .. [1] IS 456:2000, 26.3.3 and Table 15 (confirmed on the page); Fe 550 derived.
    """
    grade = next((g for g in sorted(TABLE_15) if fy <= g), None)
    if grade is None or not -30 <= redistribution <= 30:
        raise ValueError(f"Table 15 has no fy {fy:g} at {redistribution:g} % redistribution")
    row = TABLE_15[grade]
    at = (redistribution + 30) / 15
    low = min(3, int(at))
    value = row[low] + (row[low + 1] - row[low]) * (at - low)
    derived = ", by analogy: the table ends at Fe 500" if grade > 500 else ""
    return Required(value, "IS 456:2000, Table 15", f"Fe {grade}{derived}")


def min_group_gap(aggregate: float) -> Required:
    """Return the least clear distance within a group where needle vibrators reach beside it. [mm]

    Parameters
    ----------
    aggregate : float
        Nominal maximum size of the aggregate. [mm]

    References
    ----------
    .. [1] IS 456:2000, 26.3.2 b (confirmed on the page).
    """
    return Required(2 / 3 * aggregate, "IS 456:2000, 26.3.2 b", "2/3 aggregate within a group")
