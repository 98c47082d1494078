"""Where bars may stop: IS 456:2000, 26.2.3."""

from __future__ import annotations

from detailer.values import Required

CUTOFF_DOUBLE_MAX_DIA = 36.0
"""Largest bar that 26.2.3.2 c lets stop in tension. [mm]"""

CUTOFF_DOUBLE_SHARE = 2.0
"""What the continuing bars give over what is needed, 26.2.3.2 c."""

CUTOFF_LINK_REACH = 0.75
"""Extra links stand over this share of d from the end of the stopped bar, 26.2.3.2 b."""


def cutoff_extension(d: float, dia: float) -> Required:
    """Return how far a bar goes on past the point where it is no longer needed. [mm]

    Not at simple supports nor at the free end of a cantilever.

    Parameters
    ----------
    d : float
        Effective depth. [mm]
    dia : float
        Nominal diameter. [mm]

    References
    ----------
    .. [1] IS 456:2000, 26.2.3.1 (confirmed on the page).
    """
    because = "effective depth" if d >= 12 * dia else "12 φ"
    return Required(max(d, 12 * dia), "IS 456:2000, 26.2.3.1", because)


def cutoff_shear_limit(permitted: float) -> Required:
    """Return the shear up to which bars may stop in tension. [N]

    Parameters
    ----------
    permitted : float
        Shear permitted at the cut, links included. [N]

    References
    ----------
    .. [1] IS 456:2000, 26.2.3.2 a (confirmed on the page).
    """
    return Required(2 / 3 * permitted, "IS 456:2000, 26.2.3.2 a", "2/3 of the permitted shear")


def cutoff_double_area_limit(permitted: float) -> Required:
    """Return the shear up to which bars may stop where the rest is twice what is needed. [N]

    Parameters
    ----------
    permitted : float
        Shear permitted at the cut, links included. [N]

    References
    ----------
    .. [1] IS 456:2000, 26.2.3.2 c (confirmed on the page).
    """
    return Required(0.75 * permitted, "IS 456:2000, 26.2.3.2 c", "3/4 of the permitted shear")


def cutoff_extra_links(b: float, s: float, fy: float) -> Required:
    """Return the extra area of links along a stopped bar, over 3/4 d from its end. [mm²]

    Parameters
    ----------
    b : float
        Width of the web. [mm]
    s : float
        Spacing of the links there. [mm]
    fy : float
        Of the links. [N/mm²]

    References
    ----------
    .. [1] IS 456:2000, 26.2.3.2 b (confirmed on the page; no 0.87 there).
    """
    return Required(0.4 * b * s / fy, "IS 456:2000, 26.2.3.2 b", "0.4 b s / fy")


def cutoff_link_spacing(d: float, beta: float) -> Required:
    """Return the greatest spacing of links along a stopped bar. [mm]

    Parameters
    ----------
    d : float
        Effective depth. [mm]
    beta : float
        Area stopped over total area at the section. [-]

    References
    ----------
    .. [1] IS 456:2000, 26.2.3.2 b (confirmed on the page).
    """
    return Required(d / (8 * beta), "IS 456:2000, 26.2.3.2 b", "d / 8β")


def positive_share(continuous: bool) -> Required:
    """Return the share of bottom steel that goes into a support. [-]

    Parameters
    ----------
    continuous : bool
        Whether the member goes on past the support.

    References
    ----------
    .. [1] IS 456:2000, 26.2.3.3 a (confirmed on the page).
    """
    if continuous:
        return Required(1 / 4, "IS 456:2000, 26.2.3.3 a", "a quarter at a continuous support")
    return Required(1 / 3, "IS 456:2000, 26.2.3.3 a", "a third at a simple support")


def positive_embedment(ld: float) -> Required:
    """Return how far bottom bars go into a support, from its face. [mm]

    Parameters
    ----------
    ld : float
        Development length. [mm]

    References
    ----------
    .. [1] IS 456:2000, 26.2.3.3 a (confirmed on the page).
    """
    return Required(ld / 3, "IS 456:2000, 26.2.3.3 a", "Ld/3 into the support")


def support_bond_length(m1: float, v: float, l0: float, *, confined: bool) -> Required:
    """Return the greatest development length bottom bars may have at a simple support. [mm]

    Parameters
    ----------
    m1 : float
        Moment of resistance of the bars that reach the support, at 0.87 fy. [N·mm]
    v : float
        Shear at the support. [N]
    l0 : float
        Anchorage beyond the support's centre, bends included; at an inflection no more than
        :func:`inflection_anchorage`. [mm]
    confined : bool
        Whether a compressive reaction confines the ends: M1/V counts 1.3 times. Not at a
        point of inflection.

    References
    ----------
    .. [1] IS 456:2000, 26.2.3.3 c (confirmed on the page).
    """
    value = (1.3 if confined else 1.0) * m1 / v + l0
    because = "1.3 M1/V + L0" if confined else "M1/V + L0"
    return Required(value, "IS 456:2000, 26.2.3.3 c", because)


def inflection_anchorage(d: float, dia: float) -> Required:
    """Return the most L0 may count at a point of inflection. [mm]

    Parameters
    ----------
    d : float
        Effective depth. [mm]
    dia : float
        Nominal diameter. [mm]

    References
    ----------
    .. [1] IS 456:2000, 26.2.3.3 c (confirmed on the page).
    """
    return Required(max(d, 12 * dia), "IS 456:2000, 26.2.3.3 c", "L0 ≤ max(d, 12 φ)")


def negative_share() -> Required:
    """Return the share of top steel at a support that goes past the inflection. [-]

    References
    ----------
    .. [1] IS 456:2000, 26.2.3.4 (confirmed on the page).
    """
    return Required(1 / 3, "IS 456:2000, 26.2.3.4", "a third past the point of inflection")


def negative_extension(d: float, dia: float, clear_span: float) -> Required:
    """Return how far that third goes past the point of inflection. [mm]

    Parameters
    ----------
    d : float
        Effective depth. [mm]
    dia : float
        Nominal diameter. [mm]
    clear_span : float
        Clear span. [mm]

    References
    ----------
    .. [1] IS 456:2000, 26.2.3.4, read "d or 12 φ or clear span/16" (confirmed on the page).
    """
    terms = ((d, "d"), (12 * dia, "12 φ"), (clear_span / 16, "clear span/16"))
    value, because = max(terms)
    return Required(value, "IS 456:2000, 26.2.3.4", because)


def bundle_cutoff_stagger(dia: float) -> Required:
    """Return how far apart the bars of a bundle stop, unless all stop in a support. [mm]

    Parameters
    ----------
    dia : float
        Nominal diameter. [mm]

    References
    ----------
    .. [1] IS 456:2000, 26.2.3.5 (confirmed on the page).
    """
    return Required(40 * dia, "IS 456:2000, 26.2.3.5", "40 φ between ends of bundled bars")
