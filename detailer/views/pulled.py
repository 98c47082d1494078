"""Bars pulled out of the beam: each as its real shape, at its own x and the elevation's scale."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass

from detailer.drawing.dimensioning import BESIDE as BESIDE_TEXT
from detailer.drawing.primitives import Align, Path, Pen, Primitive
from detailer.values import Face
from detailer.views.cutoffs import chain
from detailer.views.elevation import Stage
from detailer.views.kit import TEXT, Kit, call_out
from detailer.views.lanes import Strand
from detailer.views.trace import Trace

TEXT_ABOVE = 1.0
"""From a bar to the text above it. [mm on paper]"""

DIMS_BELOW = 4.5
"""From a bar to the dimensions below it. [mm on paper]"""

APART = 2.5
"""Between one row and the next. [mm on paper]"""

BESIDE = 12.0
"""Free paper beside a bar that another bar of its row must leave. [mm on paper]"""


@dataclass(frozen=True, slots=True, kw_only=True)
class Pulled:
    """Equal bars at one place along the beam."""

    strand: Strand
    count: int

    @property
    def ends(self) -> tuple[float, float]:
        """Return the outermost steel at both ends, in whole millimetres. [mm]"""
        left, right = self.strand.bent
        half = self.strand.bar.dia / 2
        x0 = self.strand.x0 - (half if left else 0.0)
        x1 = self.strand.x1 + (half if right else 0.0)
        return float(round(x0)), float(round(x1))

    @property
    def text(self) -> str:
        """Return the call-out with the scheduled length of one bar."""
        bar = self.strand.bar
        length = f"  L = {bar.length:.0f}" if bar.length is not None else ""
        return call_out(self.count, bar) + length

    def rise(self) -> tuple[float, float]:
        """Return how far the shape goes below and above its body. [mm]"""
        low, high = self.strand.true.low[1], self.strand.true.high[1]
        return self.strand.level - low, high - self.strand.level


def pulled_bars(stage: Stage, faces: tuple[Face, ...]) -> tuple[Pulled, ...]:
    """Return the bars of some faces, equal ones at one place once, the outer layer first.

    Counts of one mark add up to what the member has of it at these faces.

    Parameters
    ----------
    stage : Stage
        The elevation.
    faces : tuple of Face
        Which faces.
    """
    groups: dict[tuple[object, ...], list[Strand]] = {}
    for s in stage.strands:
        if s.bar.face in faces:
            side = s.bar.face in (Face.LEFT, Face.RIGHT)
            key = (side, s.bar.layer, s.bar.name, round(s.x0), round(s.x1))
            groups.setdefault(key, []).append(s)
    found = [Pulled(strand=g[0], count=sum(s.count for s in g)) for g in groups.values()]
    order = sorted(found, key=lambda p: (_side(p), p.strand.bar.layer, p.ends, p.strand.bar.name))
    return tuple(order)


def _side(pulled: Pulled) -> bool:
    return pulled.strand.bar.face in (Face.LEFT, Face.RIGHT)


def pulled_items(stage: Stage, faces: tuple[Face, ...]) -> tuple[Primitive, ...]:
    """Return the bars of some faces pulled out, row under row from y = 0 downwards.

    Parameters
    ----------
    stage : Stage
        The elevation.
    faces : tuple of Face
        Which faces.
    """
    kit = stage.kit
    items: list[Primitive] = []
    y = 0.0
    for row in _rows(stage, pulled_bars(stage, faces)):
        hung = any(_hangs(stage, p) for p in row)
        dims = DIMS_BELOW + (1.5 + TEXT if hung else 0.5)
        below = max(max(p.rise()[0] for p in row), kit.mm(dims))
        above = max(max(p.rise()[1] for p in row), kit.mm(TEXT_ABOVE + TEXT))
        level = y - above
        for p in row:
            items += _one(stage, p, level)
        y = level - below - kit.mm(APART)
    return tuple(items)


def _rows(stage: Stage, bars: tuple[Pulled, ...]) -> list[list[Pulled]]:
    """Return bars packed into rows in which they stand clear of each other."""
    rows: list[list[Pulled]] = []
    for p in bars:
        a, b = _stretch(stage, p)
        for row in rows:
            if _side(row[0]) == _side(p) and all(_apart(stage, (a, b), q) for q in row):
                row.append(p)
                break
        else:
            rows.append([p])
    return rows


def _stretch(stage: Stage, p: Pulled) -> tuple[float, float]:
    """Return the paper a pulled-out bar takes along x, its text and dimensions included."""
    kit = stage.kit
    x0, x1 = p.ends
    marks = [x for end, way in ((x0, -1), (x1, 1)) for x in (end, _face_of(stage, end, way))]
    half = kit.width(p.text) / 2
    middle = (x0 + x1) / 2
    return min(*marks, middle - half), max(*marks, middle + half)


def _apart(stage: Stage, mine: tuple[float, float], other: Pulled) -> bool:
    a, b = _stretch(stage, other)
    room = stage.kit.mm(BESIDE)
    return mine[0] > b + room or mine[1] < a - room


def _face_of(stage: Stage, x: float, way: int) -> float:
    """Return the support face from which a fixer measures the end of a bar.

    Inside a support it is the face the bar enters by, in a span the nearer one.

    Parameters
    ----------
    stage : Stage
        The elevation.
    x : float
        The end. [mm]
    way : int
        +1 for a right end, −1 for a left one.
    """
    for x0, x1 in stage.supports:
        if x0 - 1.0 <= x <= x1 + 1.0:
            return x0 if way > 0 else x1
    return min((edge for pair in stage.supports for edge in pair), key=lambda e: (abs(e - x), e))


def _hangs(stage: Stage, p: Pulled) -> bool:
    """Return whether a number is too wide for its dimension and stands below the line."""
    room = stage.kit.mm(BESIDE_TEXT)
    far = (abs(x - _face_of(stage, x, way)) for x, way in zip(p.ends, (-1, 1), strict=True))
    return any(1.0 <= size < stage.kit.width(f"{size:.0f}") + room for size in far)


def _one(stage: Stage, p: Pulled, level: float) -> Iterator[Primitive]:
    """Yield one bar with its call-out, legs, and the distances of its ends from faces."""
    kit, s = stage.kit, p.strand
    tag = kit.tag(s.bar)
    shape: Trace = s.true.moved(0.0, level - s.level)
    yield Path(points=shape.points, bulges=shape.bulges, pen=Pen.BAR, tag=tag)
    x0, x1 = p.ends
    yield kit.text(((x0 + x1) / 2, level + kit.mm(TEXT_ABOVE)), p.text, tag=tag)
    line = level - kit.mm(DIMS_BELOW)
    start = level - kit.mm(0.8)
    for x, way in ((x0, -1), (x1, 1)):
        face = _face_of(stage, x, way)
        yield from chain(tuple(sorted((x, face))), line, kit, starts=(start, start))
    yield from _legs(kit, s, shape, level)


def _legs(kit: Kit, s: Strand, shape: Trace, level: float) -> Iterator[Primitive]:
    """Yield the outside length of each bent end, beside it."""
    left, right = s.bent
    low, high = shape.low[0], shape.high[0]
    for is_bent, tip, edge, way in (
        (left, shape.points[0], low, -1),
        (right, shape.points[-1], high, 1),
    ):
        if is_bent:
            leg = abs(tip[1] - level) + s.bar.dia / 2
            base = tip[1] if tip[1] < level else tip[1] - kit.mm(TEXT)
            at = (edge + way * kit.mm(1.2), base)
            align = Align.LEFT if way > 0 else Align.RIGHT
            yield kit.text(at, f"{leg:.0f}", align=align, tag=kit.tag(s.bar))
