"""Laps: IS 456:2000, 26.2.5 with Amendment 3."""

from __future__ import annotations

from detailer.rules.is456.bond import development_length
from detailer.values import Required

LAP_MAX_DIA = 32.0
"""Larger bars are not lapped: 26.2.5.1 a, Amendment 3 (the 2000 text said 36). [mm]"""

LAP_USE_LIMIT = 0.5
"""Laps are recommended where the moment is no more than this share of the resistance, 26.2.5."""

WELD_SHARE_TENSION = 0.8
"""Share of the bar's strength that a weld in tension counts for, 26.2.5.2; in compression 1."""


def lap_length(dia: float, stress: float, bond: float, factor: float = 1.0) -> Required:
    """Return the lap of bars in flexural tension. [mm]

    Parameters
    ----------
    dia : float
        Diameter of the smaller bar. [mm]
    stress : float
        Stress to be passed on. [N/mm²]
    bond : float
        Design bond stress in tension. [N/mm²]
    factor : float
        1.4 or 2.0 by :func:`lap_factor`. [-]

    References
    ----------
    .. [1] IS 456:2000, 26.2.5.1 c and e (confirmed on the page).
    """
    ld = development_length(dia, stress, bond).value
    value = max(ld, 30 * dia) * factor
    because = ("Ld" if ld >= 30 * dia else "30 φ") + (f" × {factor:g}" if factor != 1 else "")
    return Required(value, "IS 456:2000, 26.2.5.1 c", because)


def lap_length_compression(dia: float, stress: float, bond: float) -> Required:
    """Return the lap of bars in compression. [mm]

    Parameters
    ----------
    dia : float
        Diameter of the smaller bar. [mm]
    stress : float
        Stress to be passed on. [N/mm²]
    bond : float
        Design bond stress in compression. [N/mm²]

    References
    ----------
    .. [1] IS 456:2000, 26.2.5.1 d (confirmed on the page).
    """
    ld = development_length(dia, stress, bond).value
    because = "Ld in compression" if ld >= 24 * dia else "24 φ"
    return Required(max(ld, 24 * dia), "IS 456:2000, 26.2.5.1 d", because)


def lap_factor(
    *, top_cast: bool, cover_least: float, corner: bool, gap_adjacent: float, dia: float
) -> Required:
    """Return by how much a lap in tension grows for its place in the section. [-]

    Parameters
    ----------
    top_cast : bool
        Whether the bars lie at the top of the section as cast.
    cover_least : float
        Least cover to the lapped bars. [mm]
    corner : bool
        Whether the bars lie in a corner.
    gap_adjacent : float
        Clear distance between adjacent laps. [mm]
    dia : float
        Diameter of the lapped bars. [mm]

    References
    ----------
    .. [1] IS 456:2000, 26.2.5.1 c (confirmed on the page).
    """
    thin = cover_least < 2 * dia
    top = top_cast and thin
    close = (corner and thin) or gap_adjacent < max(75.0, 6 * dia)
    clause = "IS 456:2000, 26.2.5.1 c"
    if top and close:
        return Required(2.0, clause, "at the top with thin cover, in a corner or close to another")
    if top:
        return Required(1.4, clause, "at the top as cast, cover under 2 φ")
    if close:
        return Required(1.4, clause, "in a corner with cover under 2 φ, or close to another lap")
    return Required(1.0, clause, "well covered and spaced")


def lap_straight(dia: float) -> Required:
    """Return the least straight length of a lap. [mm]

    Parameters
    ----------
    dia : float
        Diameter of the smaller bar. [mm]

    References
    ----------
    .. [1] IS 456:2000, 26.2.5.1 c (confirmed on the page).
    """
    because = "15 φ" if 15 * dia >= 200 else "200 mm"
    return Required(max(15 * dia, 200.0), "IS 456:2000, 26.2.5.1 c", because)


def lap_stagger(lap: float) -> Required:
    """Return the centre distance from which laps count as staggered. [mm]

    Parameters
    ----------
    lap : float
        Lap length. [mm]

    References
    ----------
    .. [1] IS 456:2000, 26.2.5.1 b (confirmed on the page).
    """
    return Required(1.3 * lap, "IS 456:2000, 26.2.5.1 b", "1.3 lap lengths")


def lap_share() -> Required:
    """Return the share of bars that should be lapped at a section, at most. [-]

    References
    ----------
    .. [1] IS 456:2000, 26.2.5 (confirmed on the page; a recommendation).
    """
    return Required(0.5, "IS 456:2000, 26.2.5", "not more than half the bars at a section")


def lap_length_direct(dia: float, stress: float, bond: float) -> Required:
    """Return the lap of bars in direct tension. [mm]

    Parameters
    ----------
    dia : float
        Diameter of the smaller bar. [mm]
    stress : float
        Stress to be passed on. [N/mm²]
    bond : float
        Design bond stress in tension. [N/mm²]

    References
    ----------
    .. [1] IS 456:2000, 26.2.5.1 c (confirmed on the page).
    """
    ld = development_length(dia, stress, bond).value
    because = "2 Ld" if 2 * ld >= 30 * dia else "30 φ"
    return Required(max(2 * ld, 30 * dia), "IS 456:2000, 26.2.5.1 c", because)
