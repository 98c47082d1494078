"""From a view's true millimetres to the paper and to model space; numbers are proven finite."""

from __future__ import annotations

from collections.abc import Iterator
from itertools import chain
from math import isfinite

from detailer.drawing.primitives import (
    Dimension,
    Disc,
    Drawing,
    Label,
    Path,
    Placed,
    Primitive,
    Sheet,
)


def require_finite(drawing: Drawing) -> None:
    """Refuse a drawing with a number that is none.

    Parameters
    ----------
    drawing : Drawing
        The drawing about to be written.

    Raises
    ------
    ValueError
        Naming the sheet, the view and the primitive.
    """
    for sheet in drawing.sheets:
        if not all(isfinite(n) and n > 0 for n in sheet.size):
            raise ValueError(f"{drawing.name}: sheet {sheet.name}: size {sheet.size} is no paper")
        for where, item in _items(sheet):
            if not all(isfinite(n) for n in _numbers(item)):
                raise ValueError(f"{drawing.name}: {where}: not finite: {item}")
        for placed in sheet.views:
            scale = placed.view.scale
            if not (isfinite(scale) and scale > 0):
                raise ValueError(f"{drawing.name}: {placed.view.name}: scale {scale}")
            if not all(isfinite(n) for n in (*placed.at, *placed.model, *placed.view.box)):
                raise ValueError(f"{drawing.name}: {placed.view.name}: its place is not finite")


def paper_box(placed: Placed) -> tuple[float, float, float, float]:
    """Return x0, y0, x1, y1 a view takes on paper. [mm]

    Parameters
    ----------
    placed : Placed
        The view on its sheet.
    """
    x0, y0, x1, y1 = placed.view.box
    (x, y), scale = placed.at, placed.view.scale
    return x, y, x + (x1 - x0) / scale, y + (y1 - y0) / scale


def model_box(placed: Placed) -> tuple[float, float, float, float]:
    """Return x0, y0, x1, y1 a view takes in model space. [mm]

    Parameters
    ----------
    placed : Placed
        The view on its sheet.
    """
    x0, y0, x1, y1 = placed.view.box
    dx, dy = placed.model
    return x0 + dx, y0 + dy, x1 + dx, y1 + dy


def model_extents(drawing: Drawing) -> tuple[float, float, float, float]:
    """Return x0, y0, x1, y1 of everything in model space; of the paper if there is none. [mm]

    Parameters
    ----------
    drawing : Drawing
        The drawing.
    """
    boxes = [model_box(placed) for sheet in drawing.sheets for placed in sheet.views]
    if not boxes:
        boxes = [(0.0, 0.0, *sheet.size) for sheet in drawing.sheets] or [(0.0, 0.0, 1.0, 1.0)]
    x0, y0, x1, y1 = zip(*boxes, strict=True)
    return min(x0), min(y0), max(x1), max(y1)


def _items(sheet: Sheet) -> Iterator[tuple[str, Primitive]]:
    for item in sheet.items:
        yield f"sheet {sheet.name}", item
    for placed in sheet.views:
        for item in placed.view.items:
            yield placed.view.name, item


def _numbers(item: Primitive) -> Iterator[float]:
    match item:
        case Path():
            yield from chain.from_iterable(item.points)
            yield from item.bulges
            yield item.width or 0.0
        case Disc():
            yield from (*item.centre, item.radius)
        case Label():
            yield from (*item.at, item.height, item.angle)
        case Dimension():
            yield from (*item.start, *item.end, item.line, item.height)
