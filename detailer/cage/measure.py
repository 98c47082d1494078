"""Lengths, volumes and outer sizes of bars, measured on their true centre lines."""

from __future__ import annotations

from functools import lru_cache
from math import atan2, pi, radians, sqrt
from typing import NamedTuple

from detailer.cage.bar import Bar, Cage, Point
from detailer.cage.line import Arc, centre_line, line_through


class Box(NamedTuple):
    """The box that just holds something. [mm]"""

    x0: float
    x1: float
    y0: float
    y1: float
    z0: float
    z1: float


def exact_length(bar: Bar) -> float:
    """Return the length of a bar's centre line. [mm]

    Parameters
    ----------
    bar : Bar
        The bar.
    """
    return centre_line(bar).length


def volume(bar: Bar) -> float:
    """Return the volume of one real bar at its nominal diameter. [mm³]

    Parameters
    ----------
    bar : Bar
        The bar.
    """
    return pi * bar.dia**2 / 4 * exact_length(bar)


def steel_volume(cage: Cage) -> float:
    """Return the volume of all real bars of a cage, one copy of the member. [mm³]

    Parameters
    ----------
    cage : Cage
        The cage.
    """
    return sum(volume(bar) * len(bar.placings) for bar in cage.bars)


def outer_box(bar: Bar) -> Box:
    """Return the box that just holds the steel of a bar, without its placing; ends are flat.

    Parameters
    ----------
    bar : Bar
        The bar.
    """
    return _outer_box(bar.corners, bar.mandrels, bar.dia)


@lru_cache(maxsize=1024)
def _outer_box(corners: tuple[Point, ...], mandrels: tuple[float, ...], dia: float) -> Box:
    low, high = [float("inf")] * 3, [float("-inf")] * 3
    line, radius = line_through(corners, mandrels, dia), dia / 2
    for piece in line.segments:
        for s, k in ((0.0, None), (piece.length, None), *_extremes(piece)):
            where, along = piece.at(s)
            for axis in range(3):
                if k is not None and k != axis:
                    continue
                reach = radius * sqrt(max(0.0, 1 - along[axis] ** 2))
                low[axis] = min(low[axis], where[axis] - reach)
                high[axis] = max(high[axis], where[axis] + reach)
    return Box(low[0], high[0], low[1], high[1], low[2], high[2])


def _extremes(piece: object) -> list[tuple[float, int | None]]:
    """Return arc lengths at which an arc is furthest along an axis."""
    if not isinstance(piece, Arc):
        return []
    found: list[tuple[float, int | None]] = []
    for axis in range(3):
        first = atan2(piece.along[axis], piece.out[axis])
        for turn in (first % (2 * pi), (first + pi) % (2 * pi)):
            if turn <= radians(piece.sweep):
                found.append((turn * piece.radius, axis))
    return found
