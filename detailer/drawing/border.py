"""The border of a sheet after ISO 5457: frame, centring marks, fields to point at.

Sizes are FROM MEMORY (page_seen=False): margins of 20 mm at the binding edge and 10 mm elsewhere,
fields of 50 mm counted from the axes of the sheet, a strip of 5 mm, letters without I and O.
"""

from __future__ import annotations

from collections.abc import Iterator
from itertools import pairwise

from detailer.drawing.primitives import XY, Align, Label, Path, Pen, Primitive

BINDING = 20.0
"""From the left edge to the frame. [mm]"""

EDGE = 10.0
"""From every other edge to the frame. [mm]"""

FIELD = 50.0
"""Of the reference fields. [mm]"""

STRIP = 5.0
"""Width of what the fields are named in. [mm]"""

LETTERS = "ABCDEFGHJKLMNPQRSTUVWXYZ"
HEIGHT = 2.5


def border_items(size: XY) -> tuple[Primitive, ...]:
    """Return the border of a sheet: fields are numbered above and lettered at the right.

    Parameters
    ----------
    size : (float, float)
        Of the sheet. [mm]
    """
    w, h = size
    x0, y0, x1, y1 = BINDING, EDGE, w - EDGE, h - EDGE
    strip = ((x0, y1), (x0, y1 + STRIP), (x1 + STRIP, y1 + STRIP), (x1 + STRIP, y0), (x1, y0))
    return (
        Path(points=((x0, y0), (x1, y0), (x1, y1), (x0, y1)), pen=Pen.FRAME, closed=True),
        Path(points=strip, pen=Pen.FINE),
        *_above(size),
        *_beside(size),
        *_centring(size),
    )


def _above(size: XY) -> Iterator[Primitive]:
    low = size[1] - EDGE
    bounds = _bounds(size[0], BINDING, size[0] - EDGE)
    for number, (a, b) in enumerate(pairwise(bounds), 1):
        yield _name((a + b) / 2, low + STRIP / 2, str(number))
        if number > 1:
            yield Path(points=((a, low), (a, low + STRIP)), pen=Pen.FINE)


def _beside(size: XY) -> Iterator[Primitive]:
    left = size[0] - EDGE
    bounds = _bounds(size[1], EDGE, size[1] - EDGE)[::-1]
    for number, (a, b) in enumerate(pairwise(bounds)):
        yield _name(left + STRIP / 2, (a + b) / 2, _letter(number))
        if number:
            yield Path(points=((left, a), (left + STRIP, a)), pen=Pen.FINE)


def _centring(size: XY) -> Iterator[Primitive]:
    (w, h), half = size, (size[0] / 2, size[1] / 2)
    for a, b in (
        ((half[0], 0.0), (half[0], EDGE)),
        ((half[0], h), (half[0], h - EDGE)),
        ((0.0, half[1]), (BINDING, half[1])),
        ((w, half[1]), (w - EDGE, half[1])),
    ):
        yield Path(points=(a, b), pen=Pen.FRAME)


def _bounds(length: float, start: float, end: float) -> tuple[float, ...]:
    """Return the bounds of an even number of fields about the middle of a side."""
    each = max(1, round(length / 2 / FIELD))
    inner = (length / 2 + FIELD * i for i in range(1 - each, each))
    return (start, *(x for x in inner if start < x < end), end)


def _letter(number: int) -> str:
    """Return A, B, … Z, AA, BB, … of a field."""
    again, at = divmod(number, len(LETTERS))
    return LETTERS[at] * (again + 1)


def _name(x: float, y: float, text: str) -> Label:
    return Label(at=(x, y - HEIGHT / 2), text=text, height=HEIGHT, align=Align.CENTRE)
