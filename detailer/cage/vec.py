"""Three-dimensional vectors as plain tuples."""

from __future__ import annotations

from math import hypot

from detailer.cage.bar import Point


def add(a: Point, b: Point, scale: float = 1.0) -> Point:
    """Return a + scale · b."""
    return (a[0] + scale * b[0], a[1] + scale * b[1], a[2] + scale * b[2])


def sub(a: Point, b: Point) -> Point:
    """Return a − b."""
    return (a[0] - b[0], a[1] - b[1], a[2] - b[2])


def times(a: Point, scale: float) -> Point:
    """Return scale · a."""
    return (a[0] * scale, a[1] * scale, a[2] * scale)


def dot(a: Point, b: Point) -> float:
    """Return the scalar product."""
    return a[0] * b[0] + a[1] * b[1] + a[2] * b[2]


def norm(a: Point) -> float:
    """Return the length of a vector."""
    return hypot(*a)


def distance(a: Point, b: Point) -> float:
    """Return the distance of two points. [mm]"""
    return norm(sub(a, b))


def unit(a: Point) -> Point:
    """Return the vector of length 1; the zero vector stays as it is."""
    size = norm(a)
    return times(a, 1 / size) if size > 0 else a
