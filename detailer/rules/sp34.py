"""SP 34:1987: simplified curtailment of beams that carry no results.

They hold for uniform load and nearly equal spans, and for nothing else: on a simple span 0.08 l
keeps the d of IS 456:2000, 26.2.3.1 only where l/d is 15.05 or more, and a fifth of the top steel
running through is less than the third of 26.2.3.4. With an envelope, use the envelope.
"""

from __future__ import annotations

TOP_ALL_REACH = 0.15
"""All top steel reaches this share of the span; FROM MEMORY (page_seen=False)."""

TOP_EXTRA_REACH = 0.25
"""Top extras reach this share of the span past the support; FROM MEMORY (page_seen=False)."""

TOP_EXTRA_SHARE = 0.60
"""Share of the top steel that reaches so far; FROM MEMORY (page_seen=False)."""

TOP_THROUGH_SHARE = 0.20
"""Share of the top steel that runs through; FROM MEMORY (page_seen=False)."""

BOTTOM_STOP_END = 0.10
"""Half of the bottom bars may stop this share of the span from an end support.

FROM MEMORY (page_seen=False).
"""

BOTTOM_STOP_INTERIOR = 0.15
"""Bottom bars that stop do so this share of the span from an interior support.

FROM MEMORY (page_seen=False).
"""

BOTTOM_SHARE_END = 0.50
"""Share of the bottom steel that reaches an end support; FROM MEMORY (page_seen=False)."""

BOTTOM_SHARE_INTERIOR = 0.30
"""Share of the bottom steel that reaches an interior support; FROM MEMORY (page_seen=False)."""

SIMPLE_STOP = 0.08
"""Half of the bottom bars of a simple span may stop this share of it from the support.

FROM MEMORY (page_seen=False).
"""

CANTILEVER_ALL_REACH = 0.50
"""All top steel of a cantilever reaches this share of it, half goes to the end.

FROM MEMORY (page_seen=False).
"""

SPAN_RATIO_LIMIT = 1.5
"""Spans differing by more than this want an envelope (judgement, no source)."""


def simple_stop(span: float) -> float:
    """Return how far from a simple support half of the bottom bars may stop. [mm]

    Parameters
    ----------
    span : float
        Effective span. [mm]

    References
    ----------
    .. [1] SP 34:1987, section 8; FROM MEMORY (page_seen=False).
    """
    return SIMPLE_STOP * span


def top_reaches(span: float) -> tuple[float, float]:
    """Return how far from a support all and 60 % of the top steel reach. [mm]

    Parameters
    ----------
    span : float
        Effective span, the longer of the two beside the support. [mm]

    References
    ----------
    .. [1] SP 34:1987, section 8; FROM MEMORY (page_seen=False).
    """
    return TOP_ALL_REACH * span, TOP_EXTRA_REACH * span


def bottom_stop(span: float, *, end_support: bool) -> tuple[float, float]:
    """Return where bottom bars may stop from a support, and the share that goes on. [mm, -]

    Parameters
    ----------
    span : float
        Effective span. [mm]
    end_support : bool
        End support of a continuous beam, or an interior one.

    References
    ----------
    .. [1] SP 34:1987, section 8; FROM MEMORY (page_seen=False).
    """
    if end_support:
        return BOTTOM_STOP_END * span, BOTTOM_SHARE_END
    return BOTTOM_STOP_INTERIOR * span, BOTTOM_SHARE_INTERIOR
