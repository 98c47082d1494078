"""Helpers of analysis: IS 456:2000, 22.2, 22.5, 23.1.2."""

from __future__ import annotations

from detailer.values import Required

TABLE_12 = {
    "dead": (1 / 12, 1 / 16, -1 / 10, -1 / 12),
    "imposed": (1 / 10, 1 / 12, -1 / 9, -1 / 9),
}
"""Moment coefficients × load × span: end span, interior span, first interior support, others."""

TABLE_13 = {"dead": (0.40, 0.60, 0.55, 0.50), "imposed": (0.45, 0.60, 0.60, 0.60)}
"""Shear coefficients × total load: end, first interior outer and inner side, other interior."""

TABLE_12_SPAN_TOLERANCE = 0.15
"""Tables 12 and 13 hold for three spans or more within this share of the longest, 22.5.1."""


def effective_span(clear: float, centres: float, d: float) -> Required:
    """Return the effective span of a simply supported beam. [mm]

    Parameters
    ----------
    clear : float
        Clear span. [mm]
    centres : float
        Centre to centre of supports. [mm]
    d : float
        Effective depth. [mm]

    References
    ----------
    .. [1] IS 456:2000, 22.2 a (confirmed on the page).
    """
    because = "clear span + d" if clear + d < centres else "centre to centre"
    return Required(min(clear + d, centres), "IS 456:2000, 22.2 a", because)


def effective_flange(
    l0: float, bw: float, df: float, *, both_sides: bool, actual: float
) -> Required:
    """Return the effective width of the flange of a T or L beam. [mm]

    Parameters
    ----------
    l0 : float
        Distance between points of zero moment; 0.7 × effective span of continuous beams. [mm]
    bw : float
        Width of the web. [mm]
    df : float
        Thickness of the flange. [mm]
    both_sides : bool
        T (both sides) or L (one side).
    actual : float
        Actual width, half way to the next beams. [mm]

    References
    ----------
    .. [1] IS 456:2000, 23.1.2 (confirmed on the page).
    """
    formula = l0 / 6 + bw + 6 * df if both_sides else l0 / 12 + bw + 3 * df
    because = "the formula" if formula < actual else "the actual width"
    return Required(min(formula, actual), "IS 456:2000, 23.1.2", because)


def critical_shear_distance(d: float) -> Required:
    """Return how far from the face shear is taken where the reaction compresses the end. [mm]

    Parameters
    ----------
    d : float
        Effective depth. [mm]

    References
    ----------
    .. [1] IS 456:2000, 22.6.2.1 (confirmed on the page).
    """
    return Required(d, "IS 456:2000, 22.6.2.1", "d from the face")
