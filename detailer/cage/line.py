"""The true centre line of a bar: straights and arcs, derived from corners and mandrels."""

from __future__ import annotations

from bisect import bisect_right
from dataclasses import dataclass
from functools import lru_cache
from itertools import accumulate, pairwise
from math import acos, asin, atan2, ceil, cos, degrees, hypot, pi, radians, sin, tan
from typing import NamedTuple, TypeAlias

from detailer.cage.bar import Bar, Point
from detailer.cage.vec import add, distance, dot, norm, sub, times, unit

NEAR = 1e-6
"""Points closer than this are one point. [mm]"""

FOLD = 179.0
"""A corner that turns by more than this cannot be bent round one pin. [degrees]"""


@dataclass(frozen=True, slots=True)
class Straight:
    """A straight piece of a centre line."""

    start: Point
    end: Point

    @property
    def length(self) -> float:
        """Return its length. [mm]"""
        return distance(self.start, self.end)

    def at(self, s: float) -> tuple[Point, Point]:
        """Return the point and the direction at a distance from its start. [mm]"""
        along = unit(sub(self.end, self.start))
        return add(self.start, along, s), along

    def crossings(self, x: float) -> tuple[float, ...]:
        """Return the distances from its start at which it crosses the plane x. [mm]"""
        dx = self.end[0] - self.start[0]
        if abs(dx) < NEAR:
            return ()
        t = (x - self.start[0]) / dx
        return (min(1.0, max(0.0, t)) * self.length,) if -1e-9 <= t <= 1 + 1e-9 else ()


@dataclass(frozen=True, slots=True)
class Arc:
    """A bend of a centre line: from centre + radius·out, first along `along`, through `sweep`."""

    centre: Point
    out: Point  # unit vector from the centre to the start
    along: Point  # unit vector, direction at the start
    radius: float  # of the centre line [mm]
    sweep: float  # [degrees]

    @property
    def length(self) -> float:
        """Return its length along the arc. [mm]"""
        return self.radius * radians(self.sweep)

    @property
    def start(self) -> Point:
        """Return the point where the bend begins."""
        return self.at(0.0)[0]

    @property
    def end(self) -> Point:
        """Return the point where the bend ends."""
        return self.at(self.length)[0]

    def at(self, s: float) -> tuple[Point, Point]:
        """Return the point and the direction at a distance from its start. [mm]"""
        turn = s / self.radius
        c, n = cos(turn), sin(turn)
        where = add(add(self.centre, self.out, self.radius * c), self.along, self.radius * n)
        return where, add(times(self.along, c), self.out, -n)

    def crossings(self, x: float) -> tuple[float, ...]:
        """Return the distances from its start at which it crosses the plane x. [mm]"""
        size = self.radius * hypot(self.out[0], self.along[0])
        if size < NEAR:
            return ()
        ratio = (x - self.centre[0]) / size
        if abs(ratio) > 1 + 1e-9:
            return ()
        first = atan2(self.along[0], self.out[0])
        half = acos(min(1.0, max(-1.0, ratio)))
        whole, slack = radians(self.sweep), NEAR / self.radius
        found: set[float] = set()
        for turn in (first - half, first + half):
            turn = (turn + slack) % (2 * pi) - slack
            if turn <= whole + slack:
                found.add(min(whole, max(0.0, turn)) * self.radius)
        return tuple(sorted(found))


Piece: TypeAlias = Straight | Arc


class Crossing(NamedTuple):
    """Where a centre line crosses a plane x, and its direction there."""

    y: float
    z: float
    direction: Point


@dataclass(frozen=True, slots=True)
class CentreLine:
    """The centre line of a bar, from its first corner to its last."""

    segments: tuple[Piece, ...]
    starts: tuple[float, ...]  # arc length at the start of each segment, then at the end [mm]

    @property
    def length(self) -> float:
        """Return the length of the centre line. [mm]"""
        return self.starts[-1]

    def at(self, s: float) -> tuple[Point, Point]:
        """Return the point and the direction at an arc length, clamped to the bar's ends.

        Parameters
        ----------
        s : float
            Arc length from the bar's first end. [mm]
        """
        i = min(max(bisect_right(self.starts, s) - 1, 0), len(self.segments) - 1)
        piece = self.segments[i]
        return piece.at(min(max(s - self.starts[i], 0.0), piece.length))

    def arc_lengths_at(self, x: float) -> tuple[float, ...]:
        """Return the arc lengths at which the line crosses a plane x, ascending. [mm]

        Parameters
        ----------
        x : float
            Position of the plane, without the bar's placing. [mm]
        """
        found: list[float] = []
        for start, piece in zip(self.starts, self.segments, strict=False):
            for s in piece.crossings(x):
                if not found or start + s - found[-1] > 10 * NEAR:
                    found.append(start + s)
        return tuple(found)

    def at_x(self, x: float) -> tuple[Crossing, ...]:
        """Return every crossing of a plane x in the order of the bar.

        Parameters
        ----------
        x : float
            Position of the plane, without the bar's placing. [mm]
        """
        hits = (self.at(s) for s in self.arc_lengths_at(x))
        return tuple(Crossing(p[1], p[2], along) for p, along in hits)

    def points(self, step: float) -> tuple[Point, ...]:
        """Return points along the line, no further apart than a step, every joint among them.

        Parameters
        ----------
        step : float
            Greatest distance along the line. [mm]
        """
        found = [self.at(0.0)[0]]
        for piece in self.segments:
            count = max(1, ceil(piece.length / step))
            found += [piece.at(piece.length * i / count)[0] for i in range(1, count + 1)]
        return tuple(found)

    def polyline(self, sagitta: float = 0.25) -> tuple[Point, ...]:
        """Return chords that stay within a sagitta of the line, for drawing.

        Parameters
        ----------
        sagitta : float
            Greatest distance between chord and arc. [mm]
        """
        found = [self.at(0.0)[0]]
        for piece in self.segments:
            count = 1
            if isinstance(piece, Arc):
                widest = 2 * acos(max(0.0, 1 - sagitta / piece.radius))
                count = max(1, ceil(radians(piece.sweep) / widest))
            found += [piece.at(piece.length * i / count)[0] for i in range(1, count + 1)]
        return tuple(found)


@dataclass(frozen=True, slots=True)
class _Corner:
    at: Point
    turn: float  # [degrees]
    wanted: float  # radius of the centre line [mm]
    tangent: float  # for the radius wanted [mm]
    share: float = 1.0  # of the tangent that fits

    @property
    def sharp(self) -> bool:
        return self.tangent <= NEAR


def centre_line(bar: Bar) -> CentreLine:
    """Return the true centre line of a bar, without its placing.

    A bend that finds no room between its neighbours is drawn with the radius that fits;
    :func:`problems` names it.

    Parameters
    ----------
    bar : Bar
        The bar.
    """
    return line_through(bar.corners, bar.mandrels, bar.dia)


@lru_cache(maxsize=1024)
def line_through(corners: tuple[Point, ...], mandrels: tuple[float, ...], dia: float) -> CentreLine:
    """Return the centre line of a bar given by its corners, as :func:`centre_line` does.

    Parameters
    ----------
    corners : tuple of Point
        Meeting points of the straight axes. [mm]
    mandrels : tuple of float
        Inner diameter of the bend at each inner corner. [mm]
    dia : float
        Diameter. [mm]
    """
    nodes = _nodes(corners, mandrels, dia)
    pieces: list[Piece] = []
    here = nodes[0].at
    for i in range(1, len(nodes) - 1):
        node = nodes[i]
        if node.sharp:
            _straight(pieces, here, node.at)
            here = node.at
            continue
        into = unit(sub(node.at, nodes[i - 1].at))
        away = unit(sub(nodes[i + 1].at, node.at))
        arc = _arc(node, into, away)
        _straight(pieces, here, arc.start)
        pieces.append(arc)
        here = add(node.at, away, node.tangent * node.share)
    _straight(pieces, here, nodes[-1].at)
    if not pieces:
        pieces.append(Straight(here, nodes[-1].at))
    lengths = (piece.length for piece in pieces)
    return CentreLine(tuple(pieces), tuple(accumulate(lengths, initial=0.0)))


def _straight(pieces: list[Piece], start: Point, end: Point) -> None:
    if distance(start, end) > NEAR:
        pieces.append(Straight(start, end))


def _arc(node: _Corner, into: Point, away: Point) -> Arc:
    radius = node.wanted * node.share
    out = unit(sub(times(into, dot(into, away)), away))
    start = add(node.at, into, -node.tangent * node.share)
    return Arc(add(start, out, -radius), out, into, radius, node.turn)


def _nodes(
    corners: tuple[Point, ...], mandrels: tuple[float, ...], dia: float
) -> tuple[_Corner, ...]:
    kept: list[tuple[Point, float]] = [(corners[0], 0.0)]
    for point, mandrel in zip(corners[1:], (*mandrels, 0.0), strict=True):
        if distance(point, kept[-1][0]) > NEAR:
            kept.append((point, mandrel))
        else:
            kept[-1] = (kept[-1][0], max(kept[-1][1], mandrel))
    nodes = [_Corner(kept[0][0], 0.0, 0.0, 0.0)]
    for i in range(1, len(kept) - 1):
        nodes.append(_corner(kept[i - 1][0], *kept[i], kept[i + 1][0], dia))
    if len(kept) > 1:
        nodes.append(_Corner(kept[-1][0], 0.0, 0.0, 0.0))
    else:
        nodes.append(_Corner(kept[0][0], 0.0, 0.0, 0.0))
    return _shared(nodes)


def _corner(before: Point, at: Point, mandrel: float, after: Point, dia: float) -> _Corner:
    into, away = unit(sub(at, before)), unit(sub(after, at))
    turn = 2 * degrees(asin(min(1.0, norm(sub(away, into)) / 2)))
    radius = (mandrel + dia) / 2
    if turn < 1e-7 or turn > FOLD:
        return _Corner(at, turn, radius, 0.0)
    return _Corner(at, turn, radius, radius * tan(radians(turn) / 2))


def _shared(nodes: list[_Corner]) -> tuple[_Corner, ...]:
    """Give each bend the share of its tangents that fits beside its neighbours' tangents."""
    shares = [1.0] * len(nodes)
    for i in range(len(nodes) - 1):
        need = nodes[i].tangent + nodes[i + 1].tangent
        room = distance(nodes[i].at, nodes[i + 1].at)
        if need > room:
            shares[i] = min(shares[i], room / need)
            shares[i + 1] = min(shares[i + 1], room / need)
    return tuple(
        _Corner(n.at, n.turn, n.wanted, n.tangent, s) for n, s in zip(nodes, shares, strict=True)
    )


def problems(bar: Bar) -> tuple[str, ...]:
    """Return what stands in the way of bending a bar as its corners and mandrels say.

    Parameters
    ----------
    bar : Bar
        The bar.
    """
    found: list[str] = []
    for i in range(len(bar.corners) - 1):
        if distance(bar.corners[i], bar.corners[i + 1]) <= NEAR:
            found.append(f"bar {bar.name}: corners {i + 1} and {i + 2} are one point")
    nodes = _nodes(bar.corners, bar.mandrels, bar.dia)
    for node in nodes[1:-1]:
        if node.turn > FOLD:
            found.append(f"bar {bar.name}: a corner folds the bar back by {node.turn:.0f}°")
    for a, b in pairwise(nodes):
        need, room = a.tangent + b.tangent, distance(a.at, b.at)
        if need > room + 1e-3:
            found.append(
                f"bar {bar.name}: bends need {need:.1f} mm between corners {room:.1f} mm apart"
            )
    return tuple(found)


def require_bendable(bar: Bar) -> None:
    """Raise ValueError, naming the bar, if it cannot be bent as its corners and mandrels say.

    Parameters
    ----------
    bar : Bar
        The bar.
    """
    found = problems(bar)
    if found:
        raise ValueError("; ".join(found))
