"""Invented sheets for the tests of the formats."""

from __future__ import annotations

from dataclasses import replace

from detailer.drawing.primitives import (
    Align,
    Dimension,
    Disc,
    Drawing,
    Label,
    Path,
    Pen,
    Placed,
    Primitive,
    Sheet,
    Tag,
    View,
)

HOSTILE = (
    "a\nb",
    "nul\x00 bell\x07",
    "%%c20 %%%d %%u",
    "\\U+0041 \\M+1ABC",
    "<script>alert('1')</script> & \"q\" ]]>",
    "caret ^J ^",
    "\u202eturned\u2066",
    "lone \ud800 half \uffff",
    "{\\H3;big}",
    "Ø20 ⌀ φ ± ≥ ² – ’",
    "",
    " ",
)
"""Texts that break files written without care."""

BAR = Tag("FB1", "03")

ITEMS: tuple[Primitive, ...] = (
    Path(points=((0, 0), (6000, 0), (6000, 500), (0, 500)), pen=Pen.OUTLINE, closed=True),
    Path(points=((0, 250), (6000, 250)), pen=Pen.AXIS),
    Path(points=((0, 200), (6000, 200)), pen=Pen.HIDDEN),
    Path(
        points=((100, 400), (100, 140), (164, 76), (5900, 76)),
        bulges=(0, 0.41421356, 0),
        pen=Pen.BAR,
        tag=BAR,
    ),
    Path(points=((200, 50), (200, 450)), pen=Pen.LINK, width=8, tag=Tag("FB1", "09")),
    Path(points=((0, 0), (80, 0), (40, 60)), pen=Pen.LEADER, closed=True, filled=True),
    Disc(centre=(3000, 100), radius=10, pen=Pen.BAR, filled=True, tag=BAR),
    Disc(centre=(3000, 600), radius=100, pen=Pen.TEXT),
    Label(at=(3000, 600), text="03", height=2.5, align=Align.CENTRE, tag=BAR),
    Label(at=(10, 600), text="up", height=2.5, angle=90, bold=True, align=Align.RIGHT),
    Dimension(start=(0, 0), end=(6000, 0), line=-200),
    Dimension(start=(6000, 0), end=(6000, 500), line=6200, vertical=True, text="<> deep"),
    Dimension(start=(100, 76), end=(60, 0), line=-100, height=3.5),
)


def view(name: str, items: tuple[Primitive, ...] = ITEMS, scale: float = 25.0) -> View:
    """Return a view with a box of its own."""
    return View(name=name, title="", scale=scale, items=items, box=(-100, -400, 6500, 900))


def drawing(*texts: str) -> Drawing:
    """Return a drawing of two sheets: one with two views, the other with the texts given."""
    first = Sheet(
        name="FB1/1: a*b?",
        title="t",
        size=(420, 297),
        views=(
            Placed(view=view("FB1 elevation"), at=(30, 150), model=(0, 0)),
            Placed(view=view("FB1 A-A", ITEMS[:8], 50), at=(30, 60), model=(0, -3000)),
        ),
        items=(
            Path(points=((20, 10), (410, 10), (410, 287), (20, 287)), pen=Pen.FRAME, closed=True),
            Dimension(start=(300, 50), end=(340, 50), line=40),
        ),
    )
    labels = tuple(Label(at=(20, 270 - 8 * i), text=t, height=3.5) for i, t in enumerate(texts))
    second = replace(first, name="FB1/1: A*B?", views=(), items=labels)
    return Drawing(
        name=texts[0] if texts else "FB1",
        title=texts[0] if texts else "Beam FB1",
        description=" ".join(texts) or "A beam.",
        sheets=(first, second),
    )
