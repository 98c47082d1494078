"""IS 2502:1963: how bars are bent and scheduled."""

from __future__ import annotations

from collections.abc import Mapping
from math import ceil, pi, radians, tan

from detailer.values import Required

HOOK_ALLOWANCE: Mapping[int, float] = {2: 9.0, 3: 11.0, 4: 13.0, 6: 17.0}
"""Allowance of a U hook in diameters, by radius over diameter.

Derived: π(k + ½) + 4 − (k + 1), to the nearest half diameter.
"""

BEND_ALLOWANCE: Mapping[int, float] = {2: 5.0, 3: 5.5, 4: 6.0, 6: 7.0}
"""Allowance of a 90° bend in diameters, by radius over diameter.

6 d for IS 1786 bars seen second-hand, the others derived.
"""

LINK_ADDITION: Mapping[int, float] = {90: 20.0, 135: 24.0, 180: 28.0}
"""What two hooked ends add to 2(A + E) of a closed link on inside dimensions, in diameters.

24 confirmed on quoting pages, 20 through the diamond link, 28 derived.
"""

ALLOWANCE_STEP = 5.0
"""Allowances are rounded up to this; FROM MEMORY (page_seen=False). [mm]"""

ALLOWANCE_LEAST = 75.0
"""Least allowance; FROM MEMORY (page_seen=False). [mm]"""

LENGTH_TOLERANCE = ((750.0, 3.0, 5.0), (1500.0, 5.0, 10.0), (2500.0, 6.0, 15.0))
"""Bent dimension up to, plus, minus; beyond: +7 −25. FROM MEMORY (page_seen=False). [mm]"""

STRAIGHT_TOLERANCE = 25.0
"""Straight bars, plus and minus. FROM MEMORY (page_seen=False). [mm]"""


def radius_factor(dia: float, *, link: bool = False) -> int:
    """Return k, the inner radius of a bend in diameters. [-]

    Parameters
    ----------
    dia : float
        Nominal diameter of a deformed bar. [mm]
    link : bool
        Links, ties and stirrups bend at two diameters.

    References
    ----------
    .. [1] IS 2502:1963, k = 4 for deformed bars, 6 above 25 mm (seen second-hand); links by
       Table VIII, whose lengths are built on k = 2 (derived).
    """
    if link:
        return 2
    return 6 if dia > 25 else 4


def bend_radius(dia: float, *, link: bool = False) -> float:
    """Return the inner radius of a bend. [mm]

    Parameters
    ----------
    dia : float
        Nominal diameter. [mm]
    link : bool
        Whether the bar is a link.

    References
    ----------
    .. [1] IS 2502:1963; see :func:`radius_factor`.
    """
    return radius_factor(dia, link=link) * dia


def mandrel(dia: float, *, link: bool = False) -> float:
    """Return the inner diameter of a bend. [mm]

    Parameters
    ----------
    dia : float
        Nominal diameter. [mm]
    link : bool
        Whether the bar is a link.

    References
    ----------
    .. [1] IS 2502:1963; see :func:`radius_factor`.
    """
    return 2 * bend_radius(dia, link=link)


def _allowance(value: float) -> float:
    return max(ALLOWANCE_LEAST, ceil(value / ALLOWANCE_STEP - 1e-9) * ALLOWANCE_STEP)


def hook_allowance(dia: float, k: int) -> float:
    """Return what a U hook adds beyond its outer face. [mm]

    Parameters
    ----------
    dia : float
        Nominal diameter. [mm]
    k : int
        Inner radius over diameter: 2, 3, 4 or 6. [-]

    References
    ----------
    .. [1] IS 2502:1963, Table II, rebuilt from geometry (derived; rounding and least value
       FROM MEMORY, page_seen=False).
    """
    return _allowance(HOOK_ALLOWANCE[k] * dia)


def bend_allowance(dia: float, k: int) -> float:
    """Return what a standard 90° bend adds beyond its outer face. [mm]

    Parameters
    ----------
    dia : float
        Nominal diameter. [mm]
    k : int
        Inner radius over diameter: 2, 3, 4 or 6. [-]

    References
    ----------
    .. [1] IS 2502:1963, Table II, rebuilt from geometry (derived; rounding and least value
       FROM MEMORY, page_seen=False).
    """
    return _allowance(BEND_ALLOWANCE[k] * dia)


def link_tail(dia: float) -> float:
    """Return the straight end of a link beyond its bend. [mm]

    Parameters
    ----------
    dia : float
        Diameter of the link. [mm]

    References
    ----------
    .. [1] IS 2502:1963, 3.8 (confirmed on a quoting page).
    """
    return 8 * dia


def min_straight_end(dia: float) -> Required:
    """Return the least straight end beyond a bend of a main bar. [mm]

    Parameters
    ----------
    dia : float
        Nominal diameter. [mm]

    References
    ----------
    .. [1] IS 2502:1963; FROM MEMORY (page_seen=False).
    """
    return Required(4 * dia, "IS 2502:1963", "4 φ straight beyond a bend")


def stirrup_length(a: float, e: float, dia: float, hook_angle: int = 135) -> float:
    """Return the cutting length of a closed link by its inside dimensions. [mm]

    Parameters
    ----------
    a, e : float
        Inside dimensions. [mm]
    dia : float
        Diameter of the link. [mm]
    hook_angle : int
        Bend of its two ends: 90, 135 or 180. [degrees]

    References
    ----------
    .. [1] IS 2502:1963, Table VIII (inside dimensions confirmed, 24 d confirmed; see
       LINK_ADDITION).
    """
    return 2 * (a + e) + LINK_ADDITION[hook_angle] * dia


def straight_length(overall: float, dia: float, *, hooks: int = 0, bends: int = 0) -> float:
    """Return the length of a straight bar with standard hooks or bends at its ends. [mm]

    Parameters
    ----------
    overall : float
        Overall length, outer face to outer face. [mm]
    dia : float
        Nominal diameter. [mm]
    hooks, bends : int
        How many ends carry one. [-]

    References
    ----------
    .. [1] IS 2502:1963, L + H, L + 2H (FROM MEMORY, page_seen=False), L + B, L + 2B (seen
       second-hand).
    """
    k = radius_factor(dia)
    return overall + hooks * hook_allowance(dia, k) + bends * bend_allowance(dia, k)


def bent_length(legs: tuple[float, ...], dia: float, radius: float) -> float:
    """Return the length of a bar bent by 90° between legs measured outside to outside. [mm]

    Parameters
    ----------
    legs : tuple of float
        Outside dimensions in order. [mm]
    dia : float
        Nominal diameter. [mm]
    radius : float
        Inner radius of the bends. [mm]

    References
    ----------
    .. [1] IS 2502:1963, A + E − R/2 − d for one bend (confirmed on a quoting page), the same
       deduction for each further one (derived).
    """
    return sum(legs) - (len(legs) - 1) * (radius / 2 + dia)


def crank_extra(rise: float, angle: float) -> float:
    """Return what a crank adds to the length along the bar. [mm]

    Parameters
    ----------
    rise : float
        Offset of the axes. [mm]
    angle : float
        Slope of the crank. [degrees]

    References
    ----------
    .. [1] Geometry, h tan(θ/2) (derived).
    """
    return rise * tan(radians(angle) / 2)


def round_up(length: float, step: float) -> float:
    """Return a scheduled length rounded up. [mm]

    Parameters
    ----------
    length : float
        Length by the standard's formula. [mm]
    step : float
        Rounding step. [mm]

    References
    ----------
    .. [1] IS 2502:1963 rounds up to 5, 10 or 25 mm; which, FROM MEMORY (page_seen=False).
    """
    return ceil(length / step - 1e-9) * step


def bending_tolerance(dimension: float) -> tuple[float, float]:
    """Return what a bent dimension may be over and under. [mm]

    Parameters
    ----------
    dimension : float
        The dimension. [mm]

    References
    ----------
    .. [1] IS 2502:1963; FROM MEMORY (page_seen=False).
    """
    for upto, plus, minus in LENGTH_TOLERANCE:
        if dimension <= upto:
            return plus, minus
    return 7.0, 25.0


def bend_deduction(dia: float, radius: float) -> float:
    """Return by how much a 90° bend shortens the sum of its outside legs, exactly. [mm]

    Parameters
    ----------
    dia : float
        Nominal diameter. [mm]
    radius : float
        Inner radius. [mm]

    References
    ----------
    .. [1] Geometry, 2(R + d) − (π/2)(R + d/2) (derived); the standard's R/2 + d lies within 0.21 d.
    """
    return 2 * (radius + dia) - pi / 2 * (radius + dia / 2)


def exact_link_length(a: float, e: float, dia: float, hook_angle: int = 135) -> float:
    """Return the centre line of a closed link with bends of 2 d and ends of 8 d. [mm]

    Parameters
    ----------
    a, e : float
        Inside dimensions. [mm]
    dia : float
        Diameter of the link. [mm]
    hook_angle : int
        Bend of its two ends: 90, 135 or 180. [degrees]

    References
    ----------
    .. [1] Geometry (derived): what Table VIII of IS 2502:1963 is built on.
    """
    radius = bend_radius(dia, link=True)
    straights = 2 * (a + e) - 8 * radius
    bends = (3 * pi / 2 + 2 * radians(hook_angle)) * (radius + dia / 2)
    return straights + bends + 2 * link_tail(dia)
