"""The border of a sheet: on the paper, fields even about the axes, each named once."""

from __future__ import annotations

import pytest

from detailer.drawing.border import border_items
from detailer.drawing.primitives import Label, Path, Pen

SHEETS = [
    ((297.0, 210.0), 6, 4),
    ((420.0, 297.0), 8, 6),
    ((594.0, 420.0), 12, 8),
    ((841.0, 594.0), 16, 12),
    ((1189.0, 841.0), 24, 16),
]


@pytest.mark.source("ISO 5457:1999, table 2 and clause 4.4: fields of 50 mm", page_seen=False)
@pytest.mark.parametrize(("size", "across", "down"), SHEETS)
def test_fields_are_as_many_as_the_sheet_asks(
    size: tuple[float, float], across: int, down: int
) -> None:
    names = [i.text for i in border_items(size) if isinstance(i, Label)]
    assert names[:across] == [str(n) for n in range(1, across + 1)]
    assert names[across:] == list("ABCDEFGHJKLMNPQR"[:down])


@pytest.mark.parametrize("size", [(297.0, 210.0), (1486.25, 1051.25), (6000.0, 4000.0)])
def test_everything_lies_on_the_paper(size: tuple[float, float]) -> None:
    items = border_items(size)
    points = [p for i in items if isinstance(i, Path) for p in i.points]
    assert all(0 <= x <= size[0] and 0 <= y <= size[1] for x, y in points)
    names = [i.text for i in items if isinstance(i, Label)]
    assert len(names) == len(set(names))


def test_marks_stand_on_the_axes() -> None:
    frames = [
        i.points for i in border_items((420.0, 297.0)) if getattr(i, "pen", None) is Pen.FRAME
    ]
    assert frames[0] == ((20.0, 10.0), (410.0, 10.0), (410.0, 287.0), (20.0, 287.0))
    ends = {course[0] for course in frames[1:]}
    assert ends == {(210.0, 0.0), (210.0, 297.0), (0.0, 148.5), (420.0, 148.5)}
