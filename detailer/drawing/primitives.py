"""The closed set of things a sheet is made of. It knows paper and true millimetres, no concrete.

A view holds primitives in true millimetres and a scale; a sheet places views on paper. Text
heights, pen widths, arrow sizes are millimetres on paper always.
"""

from __future__ import annotations

from dataclasses import dataclass, field
from enum import Enum
from typing import TypeAlias

XY: TypeAlias = tuple[float, float]


class Pen(Enum):
    """What a line is; the value is its width on paper. The ladder is 1:2:4 after ISO 128."""

    FINE = ("fine", 0.13)  # hatching of nothing, grid of tables
    DIMENSION = ("dimension", 0.18)
    LEADER = ("leader", 0.18)
    OUTLINE = ("outline", 0.25)  # concrete
    HIDDEN = ("hidden", 0.18)  # concrete behind, dashed
    AXIS = ("axis", 0.18)  # chain line
    LINK = ("link", 0.35)
    BAR = ("bar", 0.50)
    BAR_EXTRA = ("bar extra", 0.50)  # heavy too, told apart by its end ticks
    FRAME = ("frame", 0.70)
    TEXT = ("text", 0.25)
    ENVELOPE = ("envelope", 0.35)
    RESISTANCE = ("resistance", 0.50)

    @property
    def label(self) -> str:
        """Return the pen's name."""
        return self.value[0]

    @property
    def width(self) -> float:
        """Return the width. [mm on paper]"""
        return self.value[1]


class Align(Enum):
    """Where along a text its insertion point lies."""

    LEFT = "left"
    CENTRE = "centre"
    RIGHT = "right"


@dataclass(frozen=True, slots=True)
class Tag:
    """What a primitive shows: carried into ids, classes and extended data."""

    member: str = ""
    mark: str = ""


NO_TAG = Tag()


@dataclass(frozen=True, slots=True, kw_only=True)
class Path:
    """Straights and arcs. `bulges` has one entry a vertex, tan(angle/4) to the next, as in DXF."""

    points: tuple[XY, ...]
    pen: Pen
    bulges: tuple[float, ...] = ()  # empty: all straight
    closed: bool = False
    filled: bool = False
    width: float | None = None  # true width in model mm (a bar drawn at its size); None: the pen's
    tag: Tag = NO_TAG


@dataclass(frozen=True, slots=True, kw_only=True)
class Disc:
    """A circle: a bar cut across is a filled one of its true radius."""

    centre: XY
    radius: float  # [true mm]
    pen: Pen
    filled: bool = False
    tag: Tag = NO_TAG


@dataclass(frozen=True, slots=True, kw_only=True)
class Label:
    """One line of text; `at` is on the base line."""

    at: XY
    text: str
    height: float  # of capitals [mm on paper]
    align: Align = Align.LEFT
    angle: float = 0.0  # degrees
    bold: bool = False
    tag: Tag = NO_TAG


@dataclass(frozen=True, slots=True, kw_only=True)
class Dimension:
    """A linear dimension between two points, its line `offset` from the first one.

    Along x the line lies at `line` (a y coordinate), along y at `line` (an x coordinate). The
    text is the distance in whole mm unless `text` says more (it then contains that number).
    """

    start: XY
    end: XY
    line: float  # [true mm] y of a horizontal, x of a vertical dimension line
    vertical: bool = False
    text: str = ""  # "" prints the distance; "<>" within it stands for the distance
    height: float = 2.5  # [mm on paper]
    tag: Tag = NO_TAG

    @property
    def distance(self) -> float:
        """Return the distance it measures. [true mm]"""
        return (
            abs(self.end[1] - self.start[1]) if self.vertical else abs(self.end[0] - self.start[0])
        )

    @property
    def printed(self) -> str:
        """Return the text as printed."""
        number = f"{self.distance:.0f}"
        return self.text.replace("<>", number) if self.text else number


Primitive: TypeAlias = Path | Disc | Label | Dimension


@dataclass(frozen=True, slots=True, kw_only=True)
class View:
    """Primitives in true millimetres at a scale; `box` bounds all of them, texts included."""

    name: str  # unique on the drawing: "FB1 elevation", "FB1 A-A"
    title: str  # printed under the view; "" prints none
    scale: float  # 25 means 1:25
    items: tuple[Primitive, ...]
    box: tuple[float, float, float, float]  # x0, y0, x1, y1 [true mm]


@dataclass(frozen=True, slots=True, kw_only=True)
class Placed:
    """A view on a sheet: where its box's lower left corner lies on paper and in model space."""

    view: View
    at: XY  # [mm on paper]
    model: XY  # shift of the view in the DXF's model space; (0, 0) leaves true coordinates


@dataclass(frozen=True, slots=True, kw_only=True)
class Sheet:
    """One sheet of paper. `items` lie on paper itself: frame, title block, tables, notes."""

    name: str  # "FB1"
    title: str
    size: XY  # [mm]
    views: tuple[Placed, ...]
    items: tuple[Primitive, ...] = field(default=())  # scale 1


@dataclass(frozen=True, slots=True, kw_only=True)
class Drawing:
    """The sheets of one member; one DXF file, one layout a sheet."""

    name: str
    title: str
    description: str  # one sentence for screen readers
    sheets: tuple[Sheet, ...]
