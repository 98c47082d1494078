"""From primitives to a view: the box that holds all of them, texts included, and the title."""

from __future__ import annotations

from collections.abc import Iterable, Iterator
from itertools import pairwise
from math import cos, radians, sin

from detailer.drawing.metrics import width
from detailer.drawing.primitives import (
    XY,
    Align,
    Dimension,
    Disc,
    Label,
    Path,
    Primitive,
    Tag,
    View,
)

TITLE = 3.5
"""Height of a view's title. [mm on paper]"""

UNDER = 2.0
"""From what is drawn to the title. [mm on paper]"""

BELOW_LINE = 0.3
"""Letters reach so far below their line, as a share of their height."""

SHARE = {Align.LEFT: 0.0, Align.CENTRE: 0.5, Align.RIGHT: 1.0}


def make_view(
    name: str,
    title: str,
    scale: float,
    items: Iterable[Primitive],
    *,
    middle: float | None = None,
) -> View:
    """Return a view of primitives, its title set beneath them.

    Parameters
    ----------
    name : str
        Unique on the drawing.
    title : str
        Printed under the view; none if empty.
    scale : float
        25 means 1:25.
    items : iterable of Primitive
        In true millimetres.
    middle : float, optional
        x of the title's middle; that of what is drawn if absent. [mm]
    """
    drawn = tuple(items)
    x0, y0, x1, y1 = box_of(drawn, scale)
    if title:
        base = y0 - (UNDER + TITLE) * scale
        label = Label(
            at=((x0 + x1) / 2 if middle is None else middle, base),
            text=title,
            height=TITLE,
            align=Align.CENTRE,
            bold=True,
            tag=Tag(name.split(" ", 1)[0]),
        )
        drawn = (*drawn, label)
        a0, b0, a1, b1 = box_of((label,), scale)
        x0, y0, x1, y1 = min(x0, a0), min(y0, b0), max(x1, a1), max(y1, b1)
    return View(name=name, title=title, scale=scale, items=drawn, box=(x0, y0, x1, y1))


def box_of(items: Iterable[Primitive], scale: float) -> tuple[float, float, float, float]:
    """Return x0, y0, x1, y1 of the box that holds primitives. [true mm]

    Parameters
    ----------
    items : iterable of Primitive
        In true millimetres.
    scale : float
        Of the view, for what has its size on paper.
    """
    points = [point for item in items for point in _corners(item, scale)]
    xs, ys = [p[0] for p in points], [p[1] for p in points]
    return min(xs), min(ys), max(xs), max(ys)


def label_box(label: Label, scale: float) -> tuple[float, float, float, float]:
    """Return the box of a level label. [true mm]

    Parameters
    ----------
    label : Label
        The label.
    scale : float
        Of its view.
    """
    wide = width(label.text, label.height, bold=label.bold) * scale
    x0 = label.at[0] - SHARE[label.align] * wide
    return x0, label.at[1], x0 + wide, label.at[1] + label.height * scale


def _corners(item: Primitive, scale: float) -> Iterator[XY]:
    match item:
        case Path():
            if item.width is None:
                yield from item.points
                if item.bulges:
                    yield from _bows(item)
                return
            half = item.width / 2
            for x, y in (*item.points, *_bows(item)):
                yield x - half, y - half
                yield x + half, y + half
        case Disc(centre=(x, y), radius=r):
            yield x - r, y - r
            yield x + r, y + r
        case Label():
            yield from _turned(item, scale)
        case Dimension():
            yield from _dimension(item, scale)


def _bows(path: Path) -> Iterator[XY]:
    """Yield the middles of the arcs of a path."""
    for (a, b), bulge in zip(pairwise(path.points), path.bulges, strict=False):
        if bulge:
            half = bulge / 2
            yield (
                (a[0] + b[0]) / 2 + half * (b[1] - a[1]),
                (a[1] + b[1]) / 2 - half * (b[0] - a[0]),
            )


def _turned(label: Label, scale: float) -> Iterator[XY]:
    x0, y0, x1, y1 = label_box(label, scale)
    y0 -= BELOW_LINE * label.height * scale
    c, s = cos(radians(label.angle)), sin(radians(label.angle))
    ax, ay = label.at
    for x, y in ((x0, y0), (x1, y0), (x1, y1), (x0, y1)):
        yield ax + (x - ax) * c - (y - ay) * s, ay + (x - ax) * s + (y - ay) * c


def _dimension(item: Dimension, scale: float) -> Iterator[XY]:
    """Yield the points, the ends of the line, and the room of the text on either side of it."""
    yield item.start
    yield item.end
    wide = width(item.printed, item.height) * scale / 2
    tall = (item.height + 1.5) * scale
    along = 1 if item.vertical else 0
    middle = (item.start[along] + item.end[along]) / 2
    reach = max(wide, item.distance / 2 + scale)
    lower = wide + scale > item.distance / 2
    for a in (middle - reach, middle + reach):
        for b in (item.line - (tall if item.vertical or lower else scale), item.line + tall):
            yield (b, a) if item.vertical else (a, b)
