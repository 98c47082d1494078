"""Cover as placed: distances from the surfaces of bars to the faces of the concrete."""

from __future__ import annotations

from bisect import bisect_right
from dataclasses import dataclass
from enum import Enum
from itertools import pairwise
from math import ceil
from typing import Any, TypeAlias

import numpy as np
import shapely

from detailer.cage.bar import Bar, Cage
from detailer.cage.clearance import steel_radius
from detailer.cage.cut import outline_at
from detailer.cage.line import Arc, Straight, centre_line
from detailer.cage.pieces import Array, Whole

_SHAPELY: Any = shapely  # its functions carry no types

_Sides: TypeAlias = tuple[tuple[float, float], ...]
"""Least distance to each side, and where it is. [mm]"""

STEP = 25.0
"""Straights are looked at in steps of this. [mm]"""

BEND_STEPS = 24
"""A bend is looked at in so many steps; its outermost point is then right to 0.1 %."""


class Side(Enum):
    """A face of the concrete, by the direction it looks in; left is +y, start is −x."""

    TOP = "top"
    BOTTOM = "bottom"
    LEFT = "left"
    RIGHT = "right"
    START = "start"
    END = "end"


SIDES = tuple(Side)


@dataclass(frozen=True, slots=True)
class BarCover:
    """Least distances of one real bar to each face; infinite where it meets no such face."""

    bar: str
    placing: int
    distances: tuple[float, ...]  # [mm] in the order of SIDES
    xs: tuple[float, ...]  # where each least distance is [mm]

    def to(self, side: Side) -> float:
        """Return the cover to one face; negative outside the concrete. [mm]"""
        return self.distances[SIDES.index(side)]

    def where(self, side: Side) -> float:
        """Return x of the least cover to one face. [mm]"""
        return self.xs[SIDES.index(side)]


def covers(cage: Cage, *, ribs: bool = False) -> tuple[BarCover, ...]:
    """Return the cover of every real bar to every face of the concrete.

    At each x the faces are those of the union of the prisms there: inside a wider column the
    beam's sides are no faces. The first and last plane of the concrete are its ends.

    Parameters
    ----------
    cage : Cage
        The cage.
    ribs : bool
        Whether bars have their size over ribs.
    """
    if not cage.prisms:
        return ()
    edges = sorted({x for p in cage.prisms for x in (p.x0, p.x1)})
    faces = [_faces(outline_at(cage.prisms, (a + b) / 2)) for a, b in pairwise(edges)]
    found = []
    for bar in cage.bars:
        points, along = _samples(bar, edges)
        body = _Body(points, along, steel_radius(bar, ribs=ribs))
        found += [_cover(bar, k, body, edges, faces) for k in range(len(bar.placings))]
    return tuple(found)


def _samples(bar: Bar, edges: list[float]) -> tuple[Array, Array]:
    """Return points of a centre line and the directions there; steps across, breaks along x."""
    points, ways = [], []
    for piece in centre_line(bar).segments:
        if isinstance(piece, Arc):
            places = [piece.length * i / BEND_STEPS for i in range(BEND_STEPS + 1)]
        else:
            whole = piece.length
            level = abs(piece.end[0] - piece.start[0]) > 0.999 * whole
            count = max(1, ceil(whole / (250.0 if level else STEP)))
            places = [whole * i / count for i in range(count + 1)]
            if len(bar.placings) == 1:
                dx = bar.placings[0][0]
                for x in edges:
                    for s in piece.crossings(x - dx):
                        places += [max(0.0, s - 0.01), min(whole, s + 0.01)]
        at, way = _along(piece, np.array(places)[:, None])
        points.append(at)
        ways.append(way)
    return np.concatenate(points), np.concatenate(ways)


def _along(piece: Straight | Arc, s: Array) -> tuple[Array, Array]:
    """Return points and directions of a piece at a column of arc lengths."""
    if isinstance(piece, Arc):
        out, along = np.array(piece.out), np.array(piece.along)
        turn = s / piece.radius
        at = np.array(piece.centre) + piece.radius * (np.cos(turn) * out + np.sin(turn) * along)
        return at, np.cos(turn) * along - np.sin(turn) * out
    start, end = np.array(piece.start), np.array(piece.end)
    way = (end - start) / max(piece.length, 1e-12)
    return start + s * way, np.repeat(way[None], len(s), axis=0)


class _Body:
    """A bar's points without its placing, and what was found of its cover so far."""

    def __init__(self, points: Array, along: Array, radius: float) -> None:
        self.points, self.along, self.radius = points, along, radius
        xs = points[:, 0]
        reach = radius * np.sqrt(np.maximum(1 - along[:, 0] ** 2, 0.0))
        self.span = float(xs.min()), float(xs.max())
        self.start, self.end = _least(xs - reach, xs), _least(-xs - reach, xs)
        self.known: dict[tuple[int, float, float], _Sides] = {}


@dataclass(frozen=True, slots=True)
class _Faces:
    outline: Any
    start: Array  # of each edge, y and z
    end: Array
    normal: Array  # outward, unit
    side: Array  # index into SIDES


def _faces(outline: Any) -> _Faces:
    """Return the edges of an outline with their outward normals and the sides they belong to."""
    starts, ends = [], []
    for part in _SHAPELY.get_parts(_SHAPELY.orient_polygons(outline)):
        for ring in (part.exterior, *part.interiors):
            xy = _SHAPELY.get_coordinates(ring)
            starts.append(xy[:-1])
            ends.append(xy[1:])
    start = np.concatenate(starts) if starts else np.zeros((0, 2))
    end = np.concatenate(ends) if ends else np.zeros((0, 2))
    way = end - start
    normal = np.stack([way[:, 1], -way[:, 0]], axis=1)
    normal /= np.maximum(np.linalg.norm(way, axis=1), 1e-9)[:, None]
    upright = np.abs(normal[:, 1]) >= np.abs(normal[:, 0])
    side = np.where(
        upright, np.where(normal[:, 1] > 0, 0, 1), np.where(normal[:, 0] > 0, 2, 3)
    ).astype(float)
    return _Faces(outline, start, end, normal, side)


def _cover(
    bar: Bar, placing: int, body: _Body, edges: list[float], faces: list[_Faces]
) -> BarCover:
    dx, dy, dz = bar.placings[placing]
    first, last = (min(max(bisect_right(edges, x + dx) - 1, 0), len(faces) - 1) for x in body.span)
    if first == last:
        key = (first, dy, dz)
        if key not in body.known:
            rows = np.arange(len(body.points))
            moved = body.points + np.array((0.0, dy, dz))
            body.known[key] = _sides(moved, body.along, body.radius, [(rows, faces[first])])
        sides = tuple((far, x + dx) for far, x in body.known[key])
    else:
        moved = body.points + np.array((dx, dy, dz))
        interval = np.searchsorted(edges, moved[:, 0], side="right") - 1
        interval = np.clip(interval, 0, len(faces) - 1)
        parts = [(np.flatnonzero(interval == n), faces[n]) for n in np.unique(interval)]
        sides = _sides(moved, body.along, body.radius, parts)
    (near, start), (far, end) = body.start, body.end
    least = (*sides, (near + dx - edges[0], start + dx), (far - dx + edges[-1], end + dx))
    return BarCover(bar.id, placing, tuple(d for d, _ in least), tuple(x for _, x in least))


def _least(distances: Array, at: Array) -> tuple[float, float]:
    """Return the least distance and where it is."""
    i = int(np.argmin(distances))
    return float(distances[i]), float(at[i])


def _sides(points: Array, along: Array, radius: float, parts: list[tuple[Whole, _Faces]]) -> _Sides:
    """Return the least distance to top, bottom, left and right, and where each is."""
    found = [(float("inf"), float(points[0, 0]))] * 4
    for rows, faces in parts:
        distances = _to_faces(points[rows, 1:], along[rows, 1:], radius, faces)
        for side in range(4):
            mine = distances[:, faces.side == side]
            if mine.size:
                here = _least(mine.min(axis=1), points[rows, 0])
                found[side] = min(found[side], here, key=lambda item: item[0])
    return tuple(found)


def _to_faces(at: Array, along: Array, radius: float, faces: _Faces) -> Array:
    """Return the distance of steel at each point to each face it looks at, else infinity."""
    way = faces.end - faces.start
    size2 = np.maximum((way**2).sum(axis=1), 1e-12)
    rel = at[:, None, :] - faces.start[None]
    foot = (rel * way[None]).sum(axis=2) / size2[None]
    depth = -(rel * faces.normal[None]).sum(axis=2)
    lean = np.clip((along[:, None, :] * faces.normal[None]).sum(axis=2), -1.0, 1.0)
    reach = radius * np.sqrt(1 - lean**2)
    inside = _SHAPELY.contains_xy(faces.outline, at[:, 0], at[:, 1])
    faced = (foot >= -1e-9) & (foot <= 1 + 1e-9)
    seen = faced & (depth >= 0)
    result = np.where(seen, depth - reach, np.inf)
    if not inside.all() and len(faces.start):
        held = np.clip(foot, 0.0, 1.0)[:, :, None]
        gone = np.linalg.norm(rel - held * way[None], axis=2)
        nearest = gone == gone.min(axis=1, keepdims=True)
        result = np.where(inside[:, None], result, np.where(nearest, -gone - radius, np.inf))
    return np.asarray(result)
