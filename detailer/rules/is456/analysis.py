"""Helpers of analysis: IS 456:2000, 22.2, 22.5, 23.1.2."""

from __future__ import annotations

from collections.abc import Mapping

from detailer.values import Required

TABLE_12: Mapping[str, tuple[float, ...]] = {
    "dead": (1 / 12, 1 / 16, -1 / 10, -1 / 12),
    "imposed": (1 / 10, 1 / 12, -1 / 9, -1 / 9),
}
"""Moment coefficients × load × span: end span, interior span, first interior support, others.

"dead" stands for dead and fixed imposed load.
"""

TABLE_13: Mapping[str, tuple[float, ...]] = {
    "dead": (0.40, 0.60, 0.55, 0.50),
    "imposed": (0.45, 0.60, 0.60, 0.60),
}
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


def effective_span_continuous(
    clear: float, centres: float, d: float, *, support: float, end_free: float | None = None
) -> Required:
    """Return the effective span of a continuous beam. [mm]

    Parameters
    ----------
    clear : float
        Clear span. [mm]
    centres : float
        Centre to centre of supports. [mm]
    d : float
        Effective depth. [mm]
    support : float
        Width of the wider support. [mm]
    end_free : float or None
        Width of the discontinuous support where one end is free to turn; None where both ends
        are fixed or continuous. [mm]

    References
    ----------
    .. [1] IS 456:2000, 22.2 b (confirmed on the page).
    """
    clause = "IS 456:2000, 22.2 b"
    if support < min(clear / 12, 600.0):
        simple = effective_span(clear, centres, d)
        return Required(simple.value, clause, f"narrow supports: {simple.because}")
    if end_free is None:
        return Required(clear, clause, "wide supports: clear span")
    terms = ((d / 2, "d/2"), (end_free / 2, "half the discontinuous support"))
    value, because = min(terms)
    return Required(clear + value, clause, f"wide supports: clear span + {because}")


def effective_span_cantilever(length: float, d: float) -> Required:
    """Return the effective length of a cantilever. [mm]

    Parameters
    ----------
    length : float
        From the face of the support to the free end. [mm]
    d : float
        Effective depth. [mm]

    References
    ----------
    .. [1] IS 456:2000, 22.2 c (confirmed on the page).
    """
    return Required(length + d / 2, "IS 456:2000, 22.2 c", "to the face + d/2")


def masonry_fixity_moment(load: float, span: float) -> Required:
    """Return the hogging moment at an end built into masonry, assumed free in analysis. [N·mm]

    Parameters
    ----------
    load : float
        Total design load of the span. [N]
    span : float
        Effective span. [mm]

    References
    ----------
    .. [1] IS 456:2000, 22.5.2 (confirmed on the page): −W l/24, and 0.05 W more shear there.
    """
    return Required(-load * span / 24, "IS 456:2000, 22.5.2", "partial fixity, W l/24")


def isolated_flange(l0: float, bw: float, b: float, *, both_sides: bool) -> Required:
    """Return the effective width of the flange of an isolated T or L beam. [mm]

    Parameters
    ----------
    l0 : float
        Distance between points of zero moment. [mm]
    bw : float
        Width of the web. [mm]
    b : float
        Actual width of the flange. [mm]
    both_sides : bool
        T (both sides) or L (one side).

    References
    ----------
    .. [1] IS 456:2000, 23.1.2 c (confirmed on the page).
    """
    formula = (1.0 if both_sides else 0.5) * l0 / (l0 / b + 4) + bw
    because = "the formula" if formula < b else "the actual width"
    return Required(min(formula, b), "IS 456:2000, 23.1.2 c", because)
