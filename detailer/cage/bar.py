"""Placed steel and concrete: plain values in a member's own axes (x along, y left, z up). [mm]"""

from __future__ import annotations

from dataclasses import dataclass, field
from typing import TypeAlias

from detailer.values import ContactKind, Face, Role, SupportKind

Point: TypeAlias = tuple[float, float, float]


@dataclass(frozen=True, slots=True)
class Shape:
    """A bar's shape by a bending standard: the code and the dimensions that make it."""

    standard: str  # "IS 2502"
    code: str
    dimensions: tuple[tuple[str, float], ...]  # letter, whole mm


@dataclass(frozen=True, slots=True, kw_only=True)
class Bar:
    """Bars of one shape, one real bar per placing.

    The corners are the meeting points of the straight axes; the true centre line (straights
    and arcs) follows from them and the mandrels and is the only geometry anyone measures.
    """

    id: str  # unique in the cage
    role: Role
    face: Face
    layer: int  # 1 is the outermost; 0 where layers mean nothing
    grade: str
    dia: float  # nominal
    corners: tuple[Point, ...]
    mandrels: tuple[float, ...]  # inner diameter of the bend at each inner corner
    placings: tuple[Point, ...] = ((0.0, 0.0, 0.0),)
    mark: str = ""  # given by the schedule's numbering
    shape: Shape | None = None  # likewise
    length: float | None = None  # scheduled; likewise

    def __post_init__(self) -> None:
        if len(self.corners) != len(self.mandrels) + 2:
            raise ValueError(
                f"bar {self.id}: {len(self.mandrels)} mandrels for "
                f"{len(self.corners) - 2} inner corners"
            )

    @property
    def name(self) -> str:
        """Return the mark, or the id while there is none."""
        return self.mark or self.id


@dataclass(frozen=True, slots=True, order=True)
class Contact:
    """A contact that the placer meant; each kind has its own geometric test."""

    kind: ContactKind
    a: str  # bar ids; any placing of one with any of the other
    b: str
    x0: float
    x1: float


@dataclass(frozen=True, slots=True, kw_only=True)
class Prism:
    """Concrete of one outline in y-z from x0 to x1; the concrete is the union of the prisms."""

    name: str  # "span 1 web", "span 1 flange", "column B1", "wall E2"
    x0: float
    x1: float
    outline: tuple[tuple[float, float], ...]  # [[y, z], …], not closed


@dataclass(frozen=True, slots=True, kw_only=True)
class Rest:
    """A support as the cage knows it."""

    name: str
    kind: SupportKind
    x: float
    width: float  # along the member
    across: float


@dataclass(frozen=True, slots=True, kw_only=True)
class Cage:
    """The placed steel of one member, with the concrete it lies in."""

    member: str
    copies: int
    mirrored: int
    supports: tuple[Rest, ...]
    prisms: tuple[Prism, ...]
    cover: tuple[float, float, float, float]  # top, bottom, left, right
    aggregate: float
    bars: tuple[Bar, ...]
    contacts: tuple[Contact, ...] = field(default=())
    origin: tuple[float, float, float] = (0.0, 0.0, 0.0)  # in plan, of the member's axes
    direction: float = 0.0  # degrees from the grid's x

    def bar(self, id_: str) -> Bar:
        """Return the bar of an id."""
        return next(bar for bar in self.bars if bar.id == id_)
