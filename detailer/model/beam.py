"""A beam line to be detailed: supports, spans, sections, results, and the bars chosen."""

from __future__ import annotations

from dataclasses import dataclass

from detailer.model.results import Results
from detailer.model.steelwork import BarGroup, ChosenBars, ChosenLinks
from detailer.values import FlangeSide, SupportKind


@dataclass(frozen=True, slots=True, kw_only=True)
class Column:
    """A column a beam meets; sizes along the grid's x and y."""

    mark: str
    size: tuple[float, float]  # [mm]
    bars: BarGroup
    link_dia: int
    link_spacing: float
    cover: float  # to the ties [mm]
    above: bool = True


@dataclass(frozen=True, slots=True, kw_only=True)
class Section:
    """The concrete section of a span; a rectangle where `flange` is None."""

    width: float  # of the web [mm]
    depth: float  # overall [mm]
    slab: float = 0.0  # [mm]
    flange: float | None = None  # actual width [mm]
    flange_side: FlangeSide = FlangeSide.BOTH
    drop: float = 0.0  # step of the top, positive downwards [mm]


@dataclass(frozen=True, slots=True, kw_only=True)
class Cover:
    """Nominal cover to all steel, by face; left is +y. [mm]"""

    top: float
    bottom: float
    left: float
    right: float


@dataclass(frozen=True, slots=True, kw_only=True)
class Support:
    """A support of the line."""

    name: str  # the node
    kind: SupportKind
    x: float  # centre, along the line from the first support's centre [mm]
    width: float  # along the beam [mm]
    across: float  # across the beam; a wall's is the beam's width [mm]
    offset: float = 0.0  # of the beam's axis from the node, + to the left [mm]
    column: Column | None = None

    @property
    def left(self) -> float:
        """Return x of the left face. [mm]"""
        return self.x - self.width / 2

    @property
    def right(self) -> float:
        """Return x of the right face. [mm]"""
        return self.x + self.width / 2

    @property
    def monolithic(self) -> bool:
        """Return whether beam and support are cast as one."""
        return self.kind is not SupportKind.WALL


@dataclass(frozen=True, slots=True, kw_only=True)
class Span:
    """A span between support centres, or an overhang from a support centre to its tip."""

    number: int  # 1-based, left to right
    x0: float  # left end along the line [mm]
    x1: float  # right end [mm]
    left: int | None  # index of the support at its left end; None at a free tip
    right: int | None
    section: Section
    top: float  # z of the top of the concrete [mm]
    results: Results | None

    @property
    def length(self) -> float:
        """Return the length between support centres, or from centre to tip. [mm]"""
        return self.x1 - self.x0

    @property
    def overhang(self) -> bool:
        """Return whether one end is free."""
        return self.left is None or self.right is None

    @property
    def soffit(self) -> float:
        """Return z of the soffit. [mm]"""
        return self.top - self.section.depth


@dataclass(frozen=True, slots=True, kw_only=True)
class Beam:
    """One beam line."""

    mark: str
    copies: int
    mirrored: int
    batch: str
    direction: float  # degrees from the grid's x
    cover: Cover
    level: float | None
    supports: tuple[Support, ...]
    spans: tuple[Span, ...]
    bars: tuple[ChosenBars, ...]
    links: tuple[ChosenLinks, ...]
    d_assumed: tuple[float | None, float | None] = (None, None)  # bottom, top [mm]

    @property
    def start(self) -> float:
        """Return x of the beam's left end: a tip, or the outer face of the first support."""
        first = self.spans[0]
        return first.x0 if first.left is None else self.supports[0].left

    @property
    def end(self) -> float:
        """Return x of the beam's right end."""
        last = self.spans[-1]
        return last.x1 if last.right is None else self.supports[-1].right

    def clear(self, span: Span) -> tuple[float, float]:
        """Return x of the two faces (or the tip) a span is clear between. [mm]"""
        x0 = span.x0 if span.left is None else self.supports[span.left].right
        x1 = span.x1 if span.right is None else self.supports[span.right].left
        return x0, x1

    def span_at(self, x: float) -> Span:
        """Return the span that holds x; the left one at a support centre."""
        for span in self.spans:
            if x <= span.x1:
                return span
        return self.spans[-1]

    def spans_of(self, support: int) -> tuple[Span | None, Span | None]:
        """Return the spans left and right of a support; None where there is none."""
        left = next((s for s in self.spans if s.right == support), None)
        right = next((s for s in self.spans if s.left == support), None)
        return left, right

    def continuous(self, support: int) -> bool:
        """Return whether the beam goes on past a support (an overhang counts)."""
        left, right = self.spans_of(support)
        return left is not None and right is not None
