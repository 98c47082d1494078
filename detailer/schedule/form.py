"""A bar's form free of its place: what two bars must share to be one mark."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass, replace
from itertools import pairwise
from math import asin, atan2, degrees

import numpy as np

from detailer.cage.bar import Bar, Point
from detailer.cage.vec import add, distance, dot, norm, sub, times, unit
from detailer.values import Role

SAME = 0.5
"""Corners and mandrels of equal bars agree within this. [mm]"""

STRAIGHT_ON = 0.05
"""A corner that turns by less than this is no corner. [degrees]"""

FLAT = 1.5
"""A link or tie out of its plane by less than this many diameters is bent flat and sprung."""


@dataclass(frozen=True, slots=True)
class Form:
    """A bar in axes of its own: first leg along +x, first bend towards +y. [mm]"""

    corners: tuple[Point, ...]
    mandrels: tuple[float, ...]

    @property
    def legs(self) -> tuple[float, ...]:
        """Return the distances from corner to corner. [mm]"""
        return tuple(distance(a, b) for a, b in zip(self.corners, self.corners[1:], strict=False))

    @property
    def turns(self) -> tuple[float, ...]:
        """Return the angle the bar turns by at each inner corner. [degrees]"""
        return tuple(_turn(a, b) for a, b in _pairs(self._ways()))

    @property
    def twists(self) -> tuple[float, ...]:
        """Return the angle from each bend's plane to the next one's, -180 < twist <= 180.

        0: both bends turn the same way; 180: the opposite way. [degrees]
        """
        ways = self._ways()
        return tuple(_twist(a, b, c) for a, b, c in zip(ways, ways[1:], ways[2:], strict=False))

    def _ways(self) -> list[Point]:
        return [unit(sub(b, a)) for a, b in _pairs(list(self.corners))]

    def turned(self) -> Form:
        """Return the same bar read from its other end."""
        return Form(_own_axes(self.corners[::-1]), self.mandrels[::-1])

    def mirrored(self) -> Form:
        """Return the bar of the opposite hand."""
        return replace(self, corners=tuple((x, y, -z) for x, y, z in self.corners))

    def equals(self, other: Form) -> bool:
        """Return whether two bars are the same bar, however each of them is turned."""
        return _match(self, other) or _match(self, other.turned())

    @property
    def handed(self) -> bool:
        """Return whether the mirror image is another bar."""
        return not self.equals(self.mirrored())


def form_of(bar: Bar) -> Form:
    """Return the form of a bar: collinear corners left out, links and ties laid flat.

    Parameters
    ----------
    bar : Bar
        The bar.
    """
    corners, mandrels = _without_collinear(bar.corners, bar.mandrels)
    if bar.role in (Role.LINK, Role.TIE) and len(corners) > 3:
        corners = _flat(corners, FLAT * bar.dia)
    return Form(_own_axes(corners), mandrels)


def _pairs(points: list[Point]) -> Iterator[tuple[Point, Point]]:
    return pairwise(points)


def _turn(into: Point, away: Point) -> float:
    return 2 * degrees(asin(min(1.0, norm(sub(away, into)) / 2)))


def cross(a: Point, b: Point) -> Point:
    """Return the vector product."""
    return (a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0])


def _twist(a: Point, b: Point, c: Point) -> float:
    """Return the angle about b from the plane of (a, b) to the plane of (b, c)."""
    n1, n2 = cross(a, b), cross(b, c)
    angle = degrees(atan2(dot(cross(n1, n2), b), dot(n1, n2)))
    return 180.0 if angle < -179.999 else angle


def _without_collinear(
    corners: tuple[Point, ...], mandrels: tuple[float, ...]
) -> tuple[tuple[Point, ...], tuple[float, ...]]:
    kept, bends = [corners[0]], []
    for i, mandrel in enumerate(mandrels, start=1):
        into, away = unit(sub(corners[i], kept[-1])), unit(sub(corners[i + 1], corners[i]))
        if _turn(into, away) > STRAIGHT_ON:
            kept.append(corners[i])
            bends.append(mandrel)
    return (*kept, corners[-1]), tuple(bends)


def _flat(corners: tuple[Point, ...], most: float) -> tuple[Point, ...]:
    """Return corners laid into their best plane, if they lie within `most` of it."""
    points = np.asarray(corners)
    centre = points.mean(axis=0)
    normal = np.linalg.svd(points - centre)[2][2]
    off = (points - centre) @ normal
    if float(off.max() - off.min()) > most:
        return corners
    laid = points - np.outer(off, normal)
    return tuple((float(p[0]), float(p[1]), float(p[2])) for p in laid)


def _own_axes(corners: tuple[Point, ...]) -> tuple[Point, ...]:
    """Return corners with the first leg along +x and the first bend in the half-plane y > 0."""
    start = corners[0]
    e1 = unit(sub(corners[1], start))
    if len(corners) == 2:
        return (0.0, 0.0, 0.0), (distance(start, corners[1]), 0.0, 0.0)
    away = sub(corners[2], corners[1])
    e2 = unit(add(away, times(e1, dot(away, e1)), -1.0))
    e3 = cross(e1, e2)
    local = (sub(corner, start) for corner in corners)
    return tuple((dot(v, e1), dot(v, e2), dot(v, e3)) for v in local)


def _match(a: Form, b: Form) -> bool:
    if len(a.corners) != len(b.corners):
        return False
    if any(abs(m - n) > SAME for m, n in zip(a.mandrels, b.mandrels, strict=True)):
        return False
    return all(distance(p, q) <= SAME for p, q in zip(a.corners, b.corners, strict=True))
