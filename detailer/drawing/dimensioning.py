"""What a dimension looks like: two extension lines, the line, two ticks, the text.

Every format draws these same parts, so a dimension looks alike in all of them.
"""

from __future__ import annotations

from typing import NamedTuple

from detailer.drawing.metrics import width
from detailer.drawing.primitives import XY, Align, Dimension, Label
from detailer.drawing.text import plain

GAP = 1.0
"""From the point measured to its extension line. [mm on paper]"""

OVER = 1.25
"""Extension lines reach so far over the dimension line. [mm on paper]"""

TICK = 1.0
"""Half the reach of a tick along each axis. [mm on paper]"""

AIR = 0.7
"""Between the line and its text. [mm on paper]"""

LIFT = 1.3
"""The same where the text is too wide to stand between the ticks. [mm on paper]"""

BESIDE = 0.8
"""Least sum of what is free beside a text between two extension lines. [mm on paper]"""

Segment = tuple[XY, XY]


class Parts(NamedTuple):
    """The lines in the order extension, extension, line, tick, tick; the text. [true mm]"""

    lines: tuple[Segment, Segment, Segment, Segment, Segment]
    label: Label


def parts(item: Dimension, scale: float) -> Parts:
    """Return the lines and the text of a dimension.

    Parameters
    ----------
    item : Dimension
        The dimension.
    scale : float
        Of its view; 1 on paper.
    """
    first, last = sorted((_along(item, item.start), _along(item, item.end)))
    line, tick = item.line, TICK * scale
    ends = (first[0], last[0])
    extensions = tuple(_extension(at, foot, line, scale) for at, foot in (first, last))
    ticks = tuple(((at - tick, line - tick), (at + tick, line + tick)) for at in ends)
    dimension = ((ends[0], line), (ends[1], line))
    flat = (extensions[0], extensions[1], dimension, ticks[0], ticks[1])
    middle = (ends[0] + ends[1]) / 2
    up = _base(item, scale)
    if not item.vertical:
        return Parts(flat, _label(item, (middle, line + up), 0.0))
    a, b, c, d, e = (((p[1], p[0]), (q[1], q[0])) for p, q in flat)
    return Parts((a, b, c, d, e), _label(item, (line - up, middle), 90.0))


def narrow(item: Dimension, scale: float) -> bool:
    """Return whether the text of a dimension is too wide to stand between its ticks.

    Parameters
    ----------
    item : Dimension
        The dimension.
    scale : float
        Of its view; 1 on paper.
    """
    return _wide(item) + 2 * TICK > item.distance / scale


def _wide(item: Dimension) -> float:
    return width(plain(item.printed), item.height)


def _base(item: Dimension, scale: float) -> float:
    """Return how far the base line of the text lies over the dimension line. [true mm]

    A text too wide stands clear of the ticks; where it would touch extension lines that come
    from its own side it stands on the other one, below the line or to the right of it.
    """
    if not narrow(item, scale):
        return AIR * scale
    if _wide(item) + BESIDE <= item.distance / scale:
        return LIFT * scale
    way = -1.0 if item.vertical else 1.0
    across = [_along(item, p)[1] for p in (item.start, item.end)]
    if max(way * (foot - item.line) for foot in across) - GAP * scale <= LIFT * scale:
        return LIFT * scale
    return -(LIFT + item.height) * scale


def _label(item: Dimension, at: XY, angle: float) -> Label:
    return Label(
        at=at,
        text=plain(item.printed),
        height=item.height,
        align=Align.CENTRE,
        angle=angle,
        tag=item.tag,
    )


def _along(item: Dimension, point: XY) -> XY:
    """Return where a point lies along the line, and across it."""
    return (point[1], point[0]) if item.vertical else point


def _extension(at: float, foot: float, line: float, scale: float) -> Segment:
    """Return an extension line in axes along and across; a point on the line has a mere stub."""
    way = 1.0 if line >= foot else -1.0
    start = foot + way * min(GAP * scale, abs(line - foot))
    return (at, start), (at, line + way * OVER * scale)
