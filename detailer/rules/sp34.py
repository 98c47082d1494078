"""SP 34:1987: simplified curtailment of beams that carry no results; all FROM MEMORY.

They hold for uniform load and nearly equal spans (page_seen=False).
"""

from __future__ import annotations

TOP_EXTRA_REACH = 0.25
"""Top extras reach this share of the clear span past the support's face."""

BOTTOM_STOP_END = 0.10
"""Half of the bottom bars may stop this share of the span from an end support."""

BOTTOM_STOP_INTERIOR = 0.15
"""Bottom bars that stop do so this share of the span from an interior support."""

SIMPLE_STOP = 0.08
"""Half of the bottom bars of a simple span may stop this share of it from the support."""

SPAN_RATIO_LIMIT = 1.5
"""Spans differing by more than this want an envelope (judgement, no source)."""
