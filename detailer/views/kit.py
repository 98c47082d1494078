"""Small pieces every view is made of; sizes on paper become true millimetres by the scale."""

from __future__ import annotations

from dataclasses import dataclass

from detailer.cage.bar import Bar
from detailer.drawing.metrics import width as text_width
from detailer.drawing.primitives import XY, Align, Disc, Label, Path, Pen, Primitive, Tag

TEXT = 2.5
"""Height of ordinary text. [mm on paper]"""

TITLE = 3.5
"""Height of titles, section letters and support names. [mm on paper]"""

DOT = 0.45
"""Radius of the dot at the end of a leader. [mm on paper]"""


@dataclass(frozen=True, slots=True)
class Kit:
    """Makes primitives of one member at one scale."""

    member: str
    scale: float

    def mm(self, paper: float) -> float:
        """Return millimetres on paper as true millimetres."""
        return paper * self.scale

    def width(self, text: str, height: float = TEXT) -> float:
        """Return the width of a text. [true mm]"""
        return text_width(text, height) * self.scale

    def tag(self, bar: Bar) -> Tag:
        """Return the tag of a bar."""
        return Tag(self.member, bar.name)

    def named(self, mark: str) -> Tag:
        """Return the tag of a mark."""
        return Tag(self.member, mark)

    def line(self, *points: XY, pen: Pen, tag: Tag | None = None) -> Path:
        """Return straights through points."""
        return Path(points=points, pen=pen, tag=tag or Tag(self.member))

    def text(
        self,
        at: XY,
        text: str,
        *,
        height: float = TEXT,
        align: Align = Align.CENTRE,
        bold: bool = False,
        tag: Tag | None = None,
    ) -> Label:
        """Return one line of text."""
        return Label(
            at=at, text=text, height=height, align=align, bold=bold, tag=tag or Tag(self.member)
        )

    def leader(self, *points: XY, tag: Tag) -> tuple[Primitive, ...]:
        """Return a leader from a text to a dot at what it names."""
        dot = Disc(centre=points[-1], radius=self.mm(DOT), pen=Pen.LEADER, filled=True, tag=tag)
        return Path(points=points, pen=Pen.LEADER, tag=tag), dot


def call_out(count: int, bar: Bar) -> str:
    """Return number, size and mark of bars in the one grammar of the drawing.

    Parameters
    ----------
    count : int
        Real bars.
    bar : Bar
        One of them.
    """
    return f"{count}-T{bar.dia:.0f}-{bar.name}"
