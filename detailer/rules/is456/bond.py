"""Bond, development length, anchorage: IS 456:2000, 26.2.1 and 26.2.2."""

from __future__ import annotations

from bisect import bisect_right
from math import floor, sqrt

from detailer.values import Required

BOND_STRESS = ((15.0, 1.0), (20.0, 1.2), (25.0, 1.4), (30.0, 1.5), (35.0, 1.7), (40.0, 1.9))
"""Plain bars in tension by fck, 26.2.1.1. [N/mm²]

The row of M15 is Note 3 of Amendment 4, written for plain concrete with nominal reinforcement;
older books use it with the 60 % for deformed bars.
"""

COATED_SHARE = 0.8
"""Share of the bond stress that fusion-bonded epoxy leaves, 26.2.1.1, Amendment 4."""

BUNDLE_MAX_DIA = 32.0
"""Larger bars are not bundled in beams, 26.1.1. [mm]"""


def bond_stress(fck: float, *, deformed: bool = True, compression: bool = False) -> float:
    """Return the design bond stress. [N/mm²]

    Parameters
    ----------
    fck : float
        Characteristic strength; grades between rows take the lower row. [N/mm²]
    deformed : bool
        Bars to IS 1786: 60 % more.
    compression : bool
        Bars in compression: 25 % more.

    Raises
    ------
    ValueError
        Below M15 the standard has no value.

    References
    ----------
    .. [1] IS 456:2000, 26.2.1.1 (confirmed on the page).
    """
    row = bisect_right([grade for grade, _ in BOND_STRESS], fck) - 1
    if row < 0:
        raise ValueError(f"no bond stress below M15 (fck {fck})")
    stress = BOND_STRESS[row][1]
    return stress * (1.6 if deformed else 1.0) * (1.25 if compression else 1.0)


def development_length(dia: float, stress: float, bond: float) -> Required:
    """Return the embedment a bar needs to develop a stress by bond alone. [mm]

    It holds on each side of the section, and what bends and hooks count for is part of it.

    Parameters
    ----------
    dia : float
        Nominal diameter. [mm]
    stress : float
        Stress in the bar at the section considered. [N/mm²]
    bond : float
        Design bond stress. [N/mm²]

    References
    ----------
    .. [1] IS 456:2000, 26.2.1 (confirmed on the page).
    """
    return Required(dia * stress / (4 * bond), "IS 456:2000, 26.2.1", "bond")


def bundle_factor(count: int) -> float:
    """Return by how much the development length of bars in contact grows. [-]

    Parameters
    ----------
    count : int
        Bars in the bundle, 1 to 4. [-]

    Raises
    ------
    ValueError
        More than four bars are not a bundle.

    References
    ----------
    .. [1] IS 456:2000, 26.2.1.2 (confirmed on the page).
    """
    factors = {1: 1.0, 2: 1.10, 3: 1.20, 4: 1.33}
    if count not in factors:
        raise ValueError(f"a bundle has 1 to 4 bars, not {count}")
    return factors[count]


def anchorage_value(dia: float, angle: float) -> float:
    """Return the anchorage value of a bend or hook: 4 φ for each 45°, 16 φ at most. [mm]

    A part of 45° counts for nothing: the safe reading. In compression only the projected length
    of a bend counts (26.2.2.2), not this value.

    Parameters
    ----------
    dia : float
        Nominal diameter. [mm]
    angle : float
        Angle through which the bar is bent; 180 for a U hook. [degrees]

    References
    ----------
    .. [1] IS 456:2000, 26.2.2.1 b (confirmed on the page).
    """
    return min(4 * dia * floor(angle / 45 + 1e-6), 16 * dia)


def link_tail(dia: float, angle: float) -> Required:
    """Return the straight length beyond the bend that anchors a link. [mm]

    Parameters
    ----------
    dia : float
        Diameter of the link. [mm]
    angle : float
        Angle of the bend, round a bar of at least its own size; between 90, 135 and 180 the
        smaller one serves. [degrees]

    Raises
    ------
    ValueError
        A bend of less than 90° anchors no link.

    References
    ----------
    .. [1] IS 456:2000, 26.2.2.4 b (confirmed on the page).
    """
    if angle < 90 - 1e-6:
        raise ValueError(f"a link bent through {angle:g}° is not anchored; 90° is the least")
    times = 4 if angle >= 180 - 1e-6 else 6 if angle >= 135 - 1e-6 else 8
    return Required(times * dia, "IS 456:2000, 26.2.2.4 b", f"{times} φ beyond a {angle:.0f}° bend")


def bearing_in_bend(fck: float, dia: float, spacing: float) -> Required:
    """Return the bearing stress allowed inside a bend; bends to IS 2502 are exempt. [N/mm²]

    Parameters
    ----------
    fck : float
        Characteristic strength. [N/mm²]
    dia : float
        Nominal diameter. [mm]
    spacing : float
        Centre distance of bars normal to the bend; cover + φ next to a face. [mm]

    References
    ----------
    .. [1] IS 456:2000, 26.2.2.5 (confirmed on the page).
    """
    value = 1.5 * fck / (1 + 2 * dia / spacing)
    return Required(value, "IS 456:2000, 26.2.2.5", "bearing stress in the bend")


def bundle_diameter(dia: float, count: int) -> float:
    """Return the diameter of the one bar that a bundle counts as. [mm]

    Parameters
    ----------
    dia : float
        Nominal diameter of its bars. [mm]
    count : int
        Bars in the bundle. [-]

    References
    ----------
    .. [1] IS 456:2000, 26.3.1 (confirmed on the page): equal total area, for spacing and cover.
    """
    return dia * sqrt(count)
