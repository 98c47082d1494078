"""Cover: IS 456:2000, 26.4, Tables 16 and 16A, Fig. 1."""

from __future__ import annotations

from bisect import bisect_left
from collections.abc import Mapping

from detailer.values import Exposure, Required

TABLE_16: Mapping[Exposure, float] = {
    Exposure.MILD: 20.0,
    Exposure.MODERATE: 30.0,
    Exposure.SEVERE: 45.0,
    Exposure.VERY_SEVERE: 50.0,
    Exposure.EXTREME: 75.0,
}
"""Nominal cover by exposure. [mm]"""

FIRE_HOURS = (0.5, 1.0, 1.5, 2.0, 3.0, 4.0)
"""Rows of Table 16A. [h]"""

TABLE_16A_SIMPLE = (20.0, 20.0, 20.0, 40.0, 60.0, 70.0)
"""Nominal cover of simply supported beams by hours of fire. [mm]"""

TABLE_16A_CONTINUOUS = (20.0, 20.0, 20.0, 30.0, 40.0, 50.0)
"""Nominal cover of continuous beams by hours of fire. [mm]"""

FIG_1_BEAM_WIDTH = (200.0, 200.0, 200.0, 200.0, 240.0, 280.0)
"""Least width of beams by hours of fire. [mm]"""

COVER_TOLERANCE = (10.0, 0.0)
"""What cover as built may be over and under the nominal one, 12.3.2. [mm]"""

SPACER_PITCH = 1000.0
"""Cover blocks and chairs stand no further apart, 12.3.2. [mm]"""

ANTI_SPALLING_COVER = 40.0
"""Thicker cover of beams wants measures against spalling in a fire, 21.3.1. [mm]"""


def nominal_cover(exposure: Exposure, fck: float, main_dia: float) -> Required:
    """Return the nominal cover that durability asks. [mm]

    Parameters
    ----------
    exposure : Exposure
        Condition of Table 3.
    fck : float
        Characteristic strength. [N/mm²]
    main_dia : float
        Largest main bar. [mm]

    References
    ----------
    .. [1] IS 456:2000, Table 16 with its notes (confirmed on the page).
    """
    value = TABLE_16[exposure]
    because = f"{exposure.value} exposure"
    if exposure is Exposure.MILD and main_dia <= 12:
        return Required(value - 5, "IS 456:2000, Table 16", because + ", bars up to 12")
    if exposure in (Exposure.SEVERE, Exposure.VERY_SEVERE) and fck >= 35:
        return Required(value - 5, "IS 456:2000, Table 16", because + ", M35 and above")
    return Required(value, "IS 456:2000, Table 16", because)


def _fire_row(hours: float) -> int:
    row = bisect_left(FIRE_HOURS, hours - 1e-9)
    if row == len(FIRE_HOURS):
        raise ValueError(f"Table 16A ends at 4 h, asked for {hours}")
    return row


def fire_cover(hours: float, *, continuous: bool) -> Required:
    """Return the nominal cover that fire asks of a beam. [mm]

    Parameters
    ----------
    hours : float
        Fire resistance; between rows the longer one serves. [h]
    continuous : bool
        Whether the beam is continuous.

    Raises
    ------
    ValueError
        Beyond 4 h.

    References
    ----------
    .. [1] IS 456:2000, Table 16A (confirmed on the page).
    """
    table = TABLE_16A_CONTINUOUS if continuous else TABLE_16A_SIMPLE
    kind = "continuous" if continuous else "simply supported"
    return Required(
        table[_fire_row(hours)], "IS 456:2000, Table 16A", f"{hours:g} h of fire, {kind}"
    )


def fire_width(hours: float) -> Required:
    """Return the least width of a beam for fire. [mm]

    Parameters
    ----------
    hours : float
        Fire resistance. [h]

    Raises
    ------
    ValueError
        Beyond 4 h.

    References
    ----------
    .. [1] IS 456:2000, Fig. 1 (confirmed on the page).
    """
    return Required(
        FIG_1_BEAM_WIDTH[_fire_row(hours)], "IS 456:2000, Fig. 1", f"{hours:g} h of fire"
    )


def cover_for_bar(dia: float) -> Required:
    """Return the cover a bar asks for its own size. [mm]

    Parameters
    ----------
    dia : float
        Nominal diameter. [mm]

    References
    ----------
    .. [1] IS 456:2000, 26.4.1 (confirmed on the page).
    """
    return Required(dia, "IS 456:2000, 26.4.1", "not less than the bar")


def placing_tolerance(d: float) -> float:
    """Return by how much placed steel may miss its place, plus and minus. [mm]

    Parameters
    ----------
    d : float
        Effective depth. [mm]

    References
    ----------
    .. [1] IS 456:2000, 12.3.1 (confirmed on the page).
    """
    return 10.0 if d <= 200 else 15.0
