"""Bars as an elevation shows them: equal ones as one line, overlapping ones told apart.

A bar that would cover another is drawn a little further inside the beam, and a bent end that
would cover another end a little further from it; only the picture moves, never a dimension.
"""

from __future__ import annotations

from dataclasses import dataclass, replace
from functools import lru_cache

from detailer.cage.bar import Bar, Cage
from detailer.values import Face, Role
from detailer.views.trace import Trace, elevation_trace

APART = 1.2
"""Least distance of the axes of two bars that overlap. [mm on paper]"""

ALIKE = 1.0
"""Bars whose ends agree within this may be one line. [mm]"""

SEATED = 8.0
"""A corner bar that sits no further in than this is one line with its neighbours. [mm]"""


@dataclass(frozen=True, slots=True, kw_only=True)
class Strand:
    """Equal bars that an elevation shows as one line."""

    bar: Bar
    count: int  # real bars behind this line
    true: Trace  # where they are
    drawn: Trace  # where the picture has them

    @property
    def x0(self) -> float:
        """Return the left end. [mm]"""
        return self.true.low[0]

    @property
    def x1(self) -> float:
        """Return the right end. [mm]"""
        return self.true.high[0]

    @property
    def bent(self) -> tuple[bool, bool]:
        """Return whether the left and the right end are bent up or down."""
        first, last = self.true.points[0], self.true.points[-1]
        level = self.level
        reach = 2.0 * self.bar.dia
        return abs(first[1] - level) > reach, abs(last[1] - level) > reach

    @property
    def level(self) -> float:
        """Return z of the body: of the longest level piece. [mm]"""
        return _level(self.true)

    @property
    def body(self) -> tuple[float, float, float]:
        """Return x0, x1 and z of the longest level piece as drawn. [mm]"""
        pairs = zip(self.drawn.points, self.drawn.points[1:], strict=False)
        (xa, za), (xb, _) = max(pairs, key=lambda p: abs(p[1][0] - p[0][0]))
        return min(xa, xb), max(xa, xb), za


def _level(trace: Trace) -> float:
    pairs = zip(trace.points, trace.points[1:], strict=False)
    (_, z), _ = max(pairs, key=lambda p: abs(p[1][0] - p[0][0]))
    return z


def strands_of(cage: Cage, scale: float) -> tuple[Strand, ...]:
    """Return the long bars of a cage as lines of an elevation: top, bottom, then sides.

    Parameters
    ----------
    cage : Cage
        The cage, its bars marked.
    scale : float
        Of the elevation.
    """
    step = APART * scale
    found: list[Strand] = []
    legs: list[tuple[float, float, float]] = []
    alike = _lines(cage)
    for inward, faces in ((-1, (Face.TOP,)), (1, (Face.BOTTOM,)), (0, (Face.LEFT, Face.RIGHT))):
        mine = sorted((s for s in alike if s.bar.face in faces), key=_outer_first)
        taken: list[tuple[float, float, float]] = []
        for strand in mine:
            lane = _lane(strand, taken, inward, step) if inward else 0.0
            taken.append((strand.x0 - step, strand.x1 + step, strand.level + lane))
            found.append(_clear_of(replace(strand, drawn=strand.true.moved(0, lane)), legs, step))
    return tuple(found)


def _outer_first(strand: Strand) -> tuple[object, ...]:
    bar = strand.bar
    return bar.layer, -(strand.x1 - strand.x0), strand.x0, bar.id


@lru_cache(maxsize=1)
def _lines(cage: Cage) -> tuple[Strand, ...]:
    """Return one strand for all real bars of one mark that an elevation shows on one line."""
    lines: dict[tuple[object, ...], list[Strand]] = {}
    for bar in cage.bars:
        if bar.role in (Role.LINK, Role.TIE, Role.SPACER):
            continue
        trace = elevation_trace(bar)
        face = Face.LEFT if bar.face is Face.RIGHT else bar.face
        for dx, _, dz in bar.placings:
            here = trace.moved(dx, dz)
            ends = round(here.low[0] / ALIKE), round(here.high[0] / ALIKE)
            alike = lines.setdefault((bar.name, face, bar.layer, *ends), [])
            for i, known in enumerate(alike):
                if abs(known.level - _level(here)) <= SEATED:
                    alike[i] = replace(known, count=known.count + 1)
                    break
            else:
                alike.append(Strand(bar=bar, count=1, true=here, drawn=here))
    return tuple(strand for alike in lines.values() for strand in alike)


def _lane(
    strand: Strand, taken: list[tuple[float, float, float]], inward: int, step: float
) -> float:
    """Return how far inwards a line must move to be clear of those that are drawn."""
    level = strand.level
    near = sorted(
        (z for x0, x1, z in taken if x0 < strand.x1 and strand.x0 < x1),
        reverse=inward < 0,
    )
    at = level
    for z in near:
        if abs(z - at) < step - 1e-6:
            at = z + inward * step
    return at - level


def _clear_of(strand: Strand, legs: list[tuple[float, float, float]], step: float) -> Strand:
    """Move bent ends inwards until their legs cover no leg that is drawn."""
    points = list(strand.drawn.points)
    left, right = strand.bent
    reach = 12.0 * strand.bar.dia
    for is_bent, outward in ((left, -1), (right, 1)):
        if not is_bent:
            continue
        end = strand.drawn.high[0] if outward > 0 else strand.drawn.low[0]
        mine = [i for i, (x, _) in enumerate(points) if abs(x - end) < reach]
        if len(mine) == len(points):
            continue
        zs = [points[i][1] for i in mine]
        at = end
        for x, z0, z1 in sorted(legs, reverse=outward > 0):
            if abs(x - at) < step - 1e-6 and z0 < max(zs) + step and min(zs) < z1 + step:
                at = x - outward * step
        legs.append((at, min(zs), max(zs)))
        for i in mine:
            points[i] = (points[i][0] + at - end, points[i][1])
    return replace(strand, drawn=Trace(tuple(points), strand.drawn.bulges))
