"""Real bars as arrays of straight and bent pieces, and the distances between those pieces."""

from __future__ import annotations

from dataclasses import dataclass
from math import ceil, radians
from typing import TypeAlias

import numpy as np
from numpy.typing import NDArray

from detailer.cage.bar import Point
from detailer.cage.line import Arc, line_through

Array: TypeAlias = NDArray[np.float64]
Whole: TypeAlias = NDArray[np.intp]
Flags: TypeAlias = NDArray[np.bool_]

Form: TypeAlias = tuple[tuple[Point, ...], tuple[float, ...], float, tuple[Point, ...]]
"""A bar as geometry alone: corners, mandrels, diameter, placings."""

WIDEST = radians(45.0)
"""A bend is first looked at in parts that turn no further than this."""

SURE = 1e-3
"""Distances are exact to this. [mm]"""


@dataclass(frozen=True, slots=True)
class Pieces:
    """Pieces of real bars, one row each; a straight has radius 0."""

    bar: Whole  # number of the real bar
    thick: Array  # radius of the steel [mm]
    base: Array  # start of a straight, centre of an arc
    u: Array  # a straight's whole vector; an arc's unit vector to its start
    v: Array  # an arc's unit tangent at its start
    radius: Array  # of the centre line of an arc; 0 for a straight
    t0: Array  # 0 to 1 along a straight, angle along an arc [radians]
    t1: Array
    first: Flags  # begins at a free end of the bar
    last: Flags

    def take(self, rows: Whole) -> Pieces:
        """Return some of the rows."""
        return Pieces(*(getattr(self, name)[rows] for name in self.__slots__))

    def at(self, t: Array) -> Array:
        """Return the point of each row at its parameter."""
        points = self.base + t[:, None] * self.u
        bent = np.flatnonzero(self.radius)
        if len(bent):
            turn, radius = t[bent, None], self.radius[bent, None]
            sway = radius * (np.cos(turn) * self.u[bent] + np.sin(turn) * self.v[bent])
            points[bent] = self.base[bent] + sway
        return np.asarray(points)

    def sagitta(self) -> Array:
        """Return how far each row strays from its chord. [mm]"""
        return np.asarray(self.radius * (1 - np.cos((self.t1 - self.t0) / 2)))


def pieces_of(bars: tuple[tuple[Form, float], ...]) -> Pieces:
    """Return the pieces of all real bars, numbered bar by bar, placing by placing.

    Parameters
    ----------
    bars : tuple of (Form, radius)
        The forms of bars, each with the radius of its steel. [mm]
    """
    tables, owner, shift, thick, number = [], [], [], [], 0
    for (corners, mandrels, dia, placings), radius in bars:
        table = _template(corners, mandrels, dia)
        count = len(placings)
        tables.append(np.tile(table, (count, 1)))
        owner.append(np.repeat(np.arange(number, number + count), len(table)))
        shift.append(np.repeat(np.array(placings, dtype=float), len(table), axis=0))
        thick.append(np.full(count * len(table), radius))
        number += count
    rows = np.concatenate(tables) if tables else np.zeros((0, 14))
    moved = rows[:, 0:3] + (np.concatenate(shift) if shift else 0.0)
    return Pieces(
        np.concatenate(owner) if owner else np.zeros(0, dtype=np.intp),
        np.concatenate(thick) if thick else np.zeros(0),
        moved, rows[:, 3:6], rows[:, 6:9], rows[:, 9], rows[:, 10], rows[:, 11],
        rows[:, 12] > 0, rows[:, 13] > 0,
    )  # fmt: skip


def _template(corners: tuple[Point, ...], mandrels: tuple[float, ...], dia: float) -> Array:
    rows: list[tuple[float, ...]] = []
    segments = line_through(corners, mandrels, dia).segments
    for i, piece in enumerate(segments):
        first, last = i == 0, i == len(segments) - 1
        if not isinstance(piece, Arc):
            u = tuple(b - a for a, b in zip(piece.start, piece.end, strict=True))
            rows.append((*piece.start, *u, 0.0, 0.0, 0.0, 0.0, 0.0, 1.0, first, last))
            continue
        whole = radians(piece.sweep)
        count = max(1, ceil(whole / WIDEST - 1e-9))
        for k in range(count):
            ends = (whole * k / count, whole * (k + 1) / count)
            free = (first and k == 0, last and k == count - 1)
            rows.append((*piece.centre, *piece.out, *piece.along, piece.radius, *ends, *free))
    return np.array(rows, dtype=float)


@dataclass(frozen=True, slots=True)
class Reach:
    """Distances of pairs of pieces: least possible, found, and where they were found."""

    least: Array  # the clear distance is not below this [mm]
    found: Array  # nor above this [mm]
    here: Array
    there: Array


def reach(a: Pieces, b: Pieces) -> Reach:
    """Return the clear distances of pairs of pieces, row by row; ends of bars are flat.

    Parameters
    ----------
    a, b : Pieces
        As many rows each.
    """
    a0, b0 = a.at(a.t0), b.at(b.t0)
    da, db = a.at(a.t1) - a0, b.at(b.t1) - b0
    s, t = _closest(a0, da, b0, db)
    p, q = a0 + s[:, None] * da, b0 + t[:, None] * db
    least = np.linalg.norm(p - q, axis=1) - a.thick - b.thick - a.sagitta() - b.sagitta()
    here = a.at(a.t0 + s * (a.t1 - a.t0))
    there = b.at(b.t0 + t * (b.t1 - b.t0))
    found = np.linalg.norm(here - there, axis=1) - a.thick - b.thick
    found = _flat(found, here, there, (a, s, da), (b, t, db))
    return Reach(np.asarray(least), found, here, there)


def _closest(a0: Array, da: Array, b0: Array, db: Array) -> tuple[Array, Array]:
    """Return the parameters of the closest points of pairs of segments."""
    r = a0 - b0
    aa = np.maximum(np.einsum("ij,ij->i", da, da), 1e-18)
    bb = np.maximum(np.einsum("ij,ij->i", db, db), 1e-18)
    ab = np.einsum("ij,ij->i", da, db)
    c, f = np.einsum("ij,ij->i", da, r), np.einsum("ij,ij->i", db, r)
    det = aa * bb - ab * ab
    slanted = det > 1e-14 * aa * bb
    s = np.where(slanted, (ab * f - c * bb) / np.where(slanted, det, 1.0), 0.0)
    s = np.clip(s, 0.0, 1.0)
    t = (ab * s + f) / bb
    held = np.clip(t, 0.0, 1.0)
    s = np.where(t == held, s, np.clip((ab * held - c) / aa, 0.0, 1.0))
    return s, held


def _flat(
    found: Array, here: Array, there: Array,
    one: tuple[Pieces, Array, Array], other: tuple[Pieces, Array, Array],
) -> Array:  # fmt: skip
    """Correct distances that were found past a free end: a bar ends flat, not round."""
    ahead_a, axis_a = _ahead(there - here, *one)
    ahead_b, axis_b = _ahead(here - there, *other)
    span = np.linalg.norm(there - here, axis=1)
    ra, rb = one[0].thick, other[0].thick
    both = (ahead_a > 0) & (ahead_b > 0)
    side_a = np.sqrt(np.maximum(span**2 - ahead_a**2, 0.0))
    side_b = np.sqrt(np.maximum(span**2 - ahead_b**2, 0.0))
    only_a = np.hypot(ahead_a, np.maximum(side_a - ra, 0.0)) - rb
    only_b = np.hypot(ahead_b, np.maximum(side_b - rb, 0.0)) - ra
    facing = both & (np.einsum("ij,ij->i", axis_a, axis_b) < -0.9)
    butted = np.hypot(ahead_a, np.maximum(side_a - ra - rb, 0.0))
    result = np.where(ahead_a > 0, only_a, np.where(ahead_b > 0, only_b, found))
    result = np.where(both, np.minimum(only_a, only_b), result)
    return np.where(facing, butted, result)


def _ahead(way: Array, pieces: Pieces, t: Array, along: Array) -> tuple[Array, Array]:
    """Return how far a point lies past a free end, 0 where it does not, and the end's direction."""
    at_first = pieces.first & (t <= 0.0)
    at_last = pieces.last & (t >= 1.0)
    sign = np.where(at_first, -1.0, np.where(at_last, 1.0, 0.0))
    size = np.maximum(np.linalg.norm(along, axis=1), 1e-9)
    axis = along * (sign / size)[:, None]
    past = np.einsum("ij,ij->i", way, axis)
    return np.where(past > 1e-6, past, 0.0), axis


def near_pairs(pieces: Pieces, within: float) -> tuple[Whole, Whole]:
    """Return the rows of pieces of different bars whose boxes come within a distance.

    Parameters
    ----------
    pieces : Pieces
        All pieces.
    within : float
        Clear distance. [mm]
    """
    a, b = pieces.at(pieces.t0), pieces.at(pieces.t1)
    grow = (pieces.thick + pieces.sagitta() + within / 2)[:, None]
    low, high = np.minimum(a, b) - grow, np.maximum(a, b) + grow
    order = np.argsort(low[:, 0], kind="stable")
    low, high, bar = low[order], high[order], pieces.bar[order]
    stop = np.searchsorted(low[:, 0], high[:, 0], side="right")
    counts = np.maximum(stop - np.arange(len(order)) - 1, 0)
    left, right = [], []
    for rows in _chunks(counts):
        one = np.repeat(rows, counts[rows])
        offset = np.arange(len(one)) - np.repeat(
            np.cumsum(counts[rows]) - counts[rows], counts[rows]
        )
        two = one + 1 + offset
        keep = bar[one] != bar[two]
        for axis in (1, 2):
            one, two = one[keep], two[keep]
            keep = (low[one, axis] <= high[two, axis]) & (low[two, axis] <= high[one, axis])
        left.append(order[one[keep]])
        right.append(order[two[keep]])
    if not left:
        return np.zeros(0, dtype=np.intp), np.zeros(0, dtype=np.intp)
    return np.concatenate(left), np.concatenate(right)


def _chunks(counts: Whole, most: int = 500_000) -> list[Whole]:
    edges = np.searchsorted(np.cumsum(counts), np.arange(most, counts.sum() + 1, most))
    return [c for c in np.split(np.arange(len(counts)), edges) if len(c)]


def quarters(pieces: Pieces) -> tuple[Pieces, ...]:
    """Return the pieces cut in four at equal steps of their parameters."""
    step = (pieces.t1 - pieces.t0) / 4
    none = np.zeros_like(pieces.first)
    same = (pieces.bar, pieces.thick, pieces.base, pieces.u, pieces.v, pieces.radius)
    return tuple(
        Pieces(
            *same,
            pieces.t0 + k * step,
            pieces.t0 + (k + 1) * step,
            pieces.first if k == 0 else none,
            pieces.last if k == 3 else none,
        )
        for k in range(4)
    )


def joined(parts: tuple[Pieces, ...]) -> Pieces:
    """Return the rows of several sets of pieces as one."""
    return Pieces(*(np.concatenate([getattr(p, name) for p in parts]) for name in Pieces.__slots__))
