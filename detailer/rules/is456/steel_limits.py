"""Least and most steel of beams: IS 456:2000, 26.5.1."""

from __future__ import annotations

from detailer.values import Required


def min_tension_steel(b: float, d: float, fy: float) -> Required:
    """Return the least area of tension steel. [mm²]

    Parameters
    ----------
    b : float
        Width of the web. [mm]
    d : float
        Effective depth. [mm]
    fy : float
        Characteristic strength. [N/mm²]

    References
    ----------
    .. [1] IS 456:2000, 26.5.1.1 a (confirmed on the page).
    """
    return Required(0.85 * b * d / fy, "IS 456:2000, 26.5.1.1 a", "0.85 b d / fy")


def max_steel(b: float, depth: float) -> Required:
    """Return the most area of tension steel, and of compression steel. [mm²]

    Parameters
    ----------
    b : float
        Width of the web. [mm]
    depth : float
        Overall depth. [mm]

    References
    ----------
    .. [1] IS 456:2000, 26.5.1.1 b and 26.5.1.2 (confirmed on the page).
    """
    return Required(0.04 * b * depth, "IS 456:2000, 26.5.1.1 b", "4 % of b D")


def needs_side_steel(web_depth: float, *, torsion: bool = False) -> bool:
    """Return whether a web needs bars along its side faces.

    Parameters
    ----------
    web_depth : float
        Depth of the web. [mm]
    torsion : bool
        Whether the beam resists torsion.

    References
    ----------
    .. [1] IS 456:2000, 26.5.1.3 and 26.5.1.7 b (confirmed on the page).
    """
    return web_depth > (450 if torsion else 750)


def side_steel(b: float, web_depth: float) -> Required:
    """Return the area of side-face steel, both faces together. [mm²]

    Parameters
    ----------
    b : float
        Width of the web. [mm]
    web_depth : float
        Depth of the web. [mm]

    References
    ----------
    .. [1] IS 456:2000, 26.5.1.3 (confirmed on the page).
    """
    return Required(0.001 * b * web_depth, "IS 456:2000, 26.5.1.3", "0.1 % of the web")


def side_steel_spacing(b: float) -> Required:
    """Return the greatest spacing of side-face bars. [mm]

    Parameters
    ----------
    b : float
        Width of the web. [mm]

    References
    ----------
    .. [1] IS 456:2000, 26.5.1.3 (confirmed on the page).
    """
    because = "300 mm" if b >= 300 else "the width of the web"
    return Required(min(300.0, b), "IS 456:2000, 26.5.1.3", because)


def max_link_spacing(d: float, *, inclined: bool = False) -> Required:
    """Return the greatest spacing of links. [mm]

    Parameters
    ----------
    d : float
        Effective depth. [mm]
    inclined : bool
        Links at 45° may stand d apart, upright ones 0.75 d.

    References
    ----------
    .. [1] IS 456:2000, 26.5.1.5 (confirmed on the page).
    """
    share = 1.0 if inclined else 0.75
    because = ("d" if inclined else "0.75 d") if share * d < 300 else "300 mm"
    return Required(min(share * d, 300.0), "IS 456:2000, 26.5.1.5", because)


def min_link_area(b: float, s: float, fy: float) -> Required:
    """Return the least area of links at a spacing, all legs. [mm²]

    Parameters
    ----------
    b : float
        Width of the web. [mm]
    s : float
        Spacing. [mm]
    fy : float
        Of the links; no more than 415 counts. [N/mm²]

    References
    ----------
    .. [1] IS 456:2000, 26.5.1.6 (confirmed on the page).
    """
    value = 0.4 * b * s / (0.87 * min(fy, 415.0))
    return Required(value, "IS 456:2000, 26.5.1.6", "0.4 b s / 0.87 fy")


def torsion_link_spacing(x1: float, y1: float) -> Required:
    """Return the greatest spacing of links that resist torsion. [mm]

    Parameters
    ----------
    x1, y1 : float
        Short and long dimension of the link. [mm]

    References
    ----------
    .. [1] IS 456:2000, 26.5.1.7 a (confirmed on the page).
    """
    terms = ((x1, "x1"), ((x1 + y1) / 4, "(x1 + y1)/4"), (300.0, "300 mm"))
    value, because = min(terms)
    return Required(value, "IS 456:2000, 26.5.1.7 a", because)


def compression_link_spacing(b: float, dia_bar: float) -> Required:
    """Return the greatest spacing of links that hold compression bars. [mm]

    Parameters
    ----------
    b : float
        Width of the web. [mm]
    dia_bar : float
        Smallest compression bar. [mm]

    References
    ----------
    .. [1] IS 456:2000, 26.5.1.2 with 26.5.3.2 c (confirmed on the page).
    """
    terms = ((b, "the width"), (16 * dia_bar, "16 φ"), (300.0, "300 mm"))
    value, because = min(terms)
    return Required(value, "IS 456:2000, 26.5.1.2", because)


def compression_link_dia(dia_bar: float) -> Required:
    """Return the least diameter of links that hold compression bars. [mm]

    Parameters
    ----------
    dia_bar : float
        Largest compression bar. [mm]

    References
    ----------
    .. [1] IS 456:2000, 26.5.3.2 c 2, Amendment 1 (confirmed on the page).
    """
    because = "φ/4" if dia_bar / 4 > 6 else "6 mm"
    return Required(max(dia_bar / 4, 6.0), "IS 456:2000, 26.5.3.2 c", because)


def flange_tension_width(bf: float, span: float) -> Required:
    """Return the width over which part of the main steel of a flange in tension lies. [mm]

    Parameters
    ----------
    bf : float
        Effective width of the flange. [mm]
    span : float
        Span. [mm]

    References
    ----------
    .. [1] IS 456:2000, 26.5.1.8 (confirmed on the page).
    """
    because = "the effective flange" if bf <= span / 10 else "span/10"
    return Required(min(bf, span / 10), "IS 456:2000, 26.5.1.8", because)


def min_links_waived(tau_v: float, tau_c: float) -> bool:
    """Return whether the stress is so low that the least area of links may be left out.

    Parameters
    ----------
    tau_v : float
        Nominal shear stress. [N/mm²]
    tau_c : float
        Shear strength of concrete. [N/mm²]

    References
    ----------
    .. [1] IS 456:2000, 26.5.1.6 (confirmed on the page; the clause says "may").
    """
    return tau_v < tau_c / 2
