"""Deflection by span to depth: IS 456:2000, 23.2; slenderness 23.3."""

from __future__ import annotations

from collections.abc import Mapping
from math import log10

from detailer.values import Required

BASIC_RATIO: Mapping[str, float] = {"cantilever": 7.0, "simple": 20.0, "continuous": 26.0}
"""Span over effective depth up to 10 m, 23.2.1 a."""


def span_depth_basic(kind: str, span: float) -> float:
    """Return the basic ratio of span to effective depth. [-]

    Parameters
    ----------
    kind : str
        "cantilever", "simple" or "continuous".
    span : float
        Effective span; beyond 10 m the ratio falls, cantilevers excepted. [mm]

    Raises
    ------
    KeyError
        For another kind.

    References
    ----------
    .. [1] IS 456:2000, 23.2.1 a and b (confirmed on the page).
    """
    ratio = BASIC_RATIO[kind]
    if kind != "cantilever" and span > 10_000:
        return ratio * 10_000 / span
    return ratio


def tension_factor(fs: float, pt: float) -> float:
    """Return the factor for tension steel. [-]

    Parameters
    ----------
    fs : float
        Stress of steel under service loads. [N/mm²]
    pt : float
        100 As/(b d) provided. [%]

    References
    ----------
    .. [1] IS 456:2000, Fig. 4, through the formula of SP 24 (seen second-hand, agrees with the
       plotted curves).
    """
    if pt <= 0:
        return 2.0
    lower = 0.225 + 0.00322 * fs + 0.625 * log10(pt)
    return 2.0 if lower <= 0.5 else 1 / lower


def compression_factor(pc: float) -> float:
    """Return the factor for compression steel. [-]

    Parameters
    ----------
    pc : float
        100 Asc/(b d). [%]

    References
    ----------
    .. [1] IS 456:2000, Fig. 5, formula derived from its plotted points.
    """
    return min(1 + pc / (3 + pc), 1.5)


def flange_factor(width_ratio: float) -> float:
    """Return the factor for flanged beams. [-]

    Parameters
    ----------
    width_ratio : float
        Web width over flange width. [-]

    References
    ----------
    .. [1] IS 456:2000, Fig. 6, from its plotted line (derived).
    """
    if width_ratio <= 0.3:
        return 0.8
    return 0.8 + (2 / 7) * (width_ratio - 0.3)


def service_stress(fy: float, required: float, provided: float) -> float:
    """Return the stress of steel under service loads. [N/mm²]

    Parameters
    ----------
    fy : float
        Characteristic strength. [N/mm²]
    required : float
        Area required. [mm²]
    provided : float
        Area provided. [mm²]

    References
    ----------
    .. [1] IS 456:2000, Fig. 4 (confirmed on the page).
    """
    return 0.58 * fy * required / provided


def lateral_limit(b: float, d: float, *, cantilever: bool) -> Required:
    """Return the greatest clear distance between lateral restraints. [mm]

    Parameters
    ----------
    b : float
        Width of the compression face. [mm]
    d : float
        Effective depth. [mm]
    cantilever : bool
        Whether only one end is restrained.

    References
    ----------
    .. [1] IS 456:2000, 23.3 (confirmed on the page).
    """
    short, slim = (25, 100) if cantilever else (60, 250)
    value = min(short * b, slim * b * b / d)
    because = f"{short} b" if short * b <= slim * b * b / d else f"{slim} b²/d"
    return Required(value, "IS 456:2000, 23.3", because)
