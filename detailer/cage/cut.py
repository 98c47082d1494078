"""A slice of a cage at a plane x: the concrete, the bars that cross it, the links beside it."""

from __future__ import annotations

from dataclasses import dataclass
from functools import lru_cache
from typing import Any

from detailer.cage.bar import Bar, Cage, Point, Prism
from detailer.cage.line import centre_line
from detailer.cage.measure import outer_box
from detailer.values import Role

LONGITUDINAL = 0.5
"""A bar crosses a plane as a longitudinal bar where its direction has this share of x."""


@dataclass(frozen=True, slots=True)
class CutBar:
    """One real bar where it crosses the plane."""

    bar: Bar
    placing: int
    y: float
    z: float
    along: Point  # direction of the centre line

    @property
    def square(self) -> bool:
        """Return whether the bar runs mostly along x here, rather than through a bend."""
        return abs(self.along[0]) >= LONGITUDINAL


@dataclass(frozen=True, slots=True)
class Slice:
    """What a plane x meets."""

    x: float
    outline: Any  # shapely Polygon or MultiPolygon in y, z; empty outside the concrete
    bars: tuple[CutBar, ...]  # sorted by z, then y
    links: tuple[tuple[Bar, int], ...]  # links and ties of the nearest set


@lru_cache(maxsize=256)
def _union(outlines: tuple[tuple[tuple[float, float], ...], ...]) -> Any:
    from shapely import union_all
    from shapely.geometry import Polygon

    polygon: Any = Polygon
    return union_all([polygon(outline) for outline in outlines])


def outline_at(prisms: tuple[Prism, ...], x: float) -> Any:
    """Return the union of the prisms' outlines at a plane x, as a shapely geometry in y, z.

    Where x is the common end of two prisms both count.

    Parameters
    ----------
    prisms : tuple of Prism
        The concrete.
    x : float
        Position of the plane. [mm]
    """
    return _union(tuple(sorted({p.outline for p in prisms if p.x0 <= x <= p.x1})))


def cut(cage: Cage, x: float) -> Slice:
    """Return the slice of a cage at a plane x.

    Bars are main, hanger, side and spacer bars: everything but links and ties, which are
    given as the set nearest to the plane.

    Parameters
    ----------
    cage : Cage
        The cage.
    x : float
        Position of the plane. [mm]
    """
    return Slice(x, outline_at(cage.prisms, x), bars_at(cage, x), links_at(cage, x))


def bars_at(cage: Cage, x: float) -> tuple[CutBar, ...]:
    """Return every crossing of a plane x by bars other than links and ties, sorted by z, y.

    Parameters
    ----------
    cage : Cage
        The cage.
    x : float
        Position of the plane. [mm]
    """
    found: list[CutBar] = []
    for bar in cage.bars:
        if bar.role in (Role.LINK, Role.TIE):
            continue
        low, high = _reach(bar.corners)
        for k, (dx, dy, dz) in enumerate(bar.placings):
            if not low <= x - dx <= high:
                continue
            for y, z, along in centre_line(bar).at_x(x - dx):
                found.append(CutBar(bar, k, y + dy, z + dz, along))
    return tuple(sorted(found, key=lambda c: (round(c.z, 3), round(c.y, 3), c.bar.id, c.placing)))


def _reach(corners: tuple[Point, ...]) -> tuple[float, float]:
    """Return between which planes x a centre line lies, a hair more. [mm]"""
    xs = [corner[0] for corner in corners]
    return min(xs) - 1e-6, max(xs) + 1e-6


def links_at(cage: Cage, x: float) -> tuple[tuple[Bar, int], ...]:
    """Return the links and ties of the set nearest to a plane x.

    A set is what lies within one and a half diameters along x of the nearest link or tie;
    of two sets equally near, the one with the smaller x.

    Parameters
    ----------
    cage : Cage
        The cage.
    x : float
        Position of the plane. [mm]
    """
    rows: list[tuple[float, Bar, int]] = []
    for bar in cage.bars:
        if bar.role in (Role.LINK, Role.TIE):
            box = outer_box(bar)
            middle = (box.x0 + box.x1) / 2
            rows += [(middle + p[0], bar, k) for k, p in enumerate(bar.placings)]
    if not rows:
        return ()
    nearest = min(rows, key=lambda r: (round(abs(r[0] - x), 3), r[0], r[1].id))
    reach = 1.5 * nearest[1].dia + 1e-6
    return tuple((bar, k) for at, bar, k in rows if abs(at - nearest[0]) <= reach)
