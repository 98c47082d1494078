"""Builders of bar forms: corner points and mandrels of links, ties, and bars with bent ends."""

from __future__ import annotations

from dataclasses import dataclass
from enum import Enum
from math import hypot, radians, sqrt, tan
from typing import NamedTuple

from detailer.cage.bar import Point
from detailer.values import EndForm

HOOK_TURN = 135.0
"""Angle through which the ends of links and ties are bent. [degrees]"""

CRANK_SLOPE = 6.0
"""A crank runs so many units along the bar for one across."""


class Path(NamedTuple):
    """What a `Bar` needs for its form: corners of the centre line, inner diameters of bends."""

    corners: tuple[Point, ...]
    mandrels: tuple[float, ...]


class HookCorner(Enum):
    """The corner of a link at which its two hooks meet; left is +y, seen along +x."""

    TOP_LEFT = (1, 1)
    TOP_RIGHT = (-1, 1)
    BOTTOM_LEFT = (1, -1)
    BOTTOM_RIGHT = (-1, -1)

    @property
    def sides(self) -> tuple[int, int]:
        """Return the sides (y, z) on which the corner lies, each +1 or −1."""
        return self.value


class Faces(NamedTuple):
    """Four faces of a rectangle in y-z. [mm]"""

    y0: float
    y1: float
    z0: float
    z1: float


@dataclass(frozen=True, slots=True, kw_only=True)
class EndShape:
    """How one end of a bar is bent.

    `leg` of a bend runs from the outside of the bar to the tip; `leg` of a hook is the
    straight tail beyond its half circle.
    """

    form: EndForm
    leg: float = 0.0  # [mm]
    up: bool = True  # the leg, or the hook, lies above the bar


@dataclass(frozen=True, slots=True, kw_only=True)
class Crank:
    """A sideways or upward step of a bar; `x` is where the slope begins, seen along +x."""

    x: float
    dy: float = 0.0
    dz: float = 0.0
    slope: float = CRANK_SLOPE

    @property
    def run(self) -> float:
        """Return the length of the slope along x. [mm]"""
        return self.slope * hypot(self.dy, self.dz)

    @property
    def end(self) -> float:
        """Return x where the slope ends. [mm]"""
        return self.x + self.run


def link_inside(y0: float, y1: float, z0: float, z1: float, dia: float) -> Faces:
    """Return the inside faces of a link.

    Parameters
    ----------
    y0, y1, z0, z1 : float
        Outside faces of the link. [mm]
    dia : float
        Diameter of the link. [mm]
    """
    return Faces(y0 + dia, y1 - dia, z0 + dia, z1 - dia)


def corner_seat(bend: float, dia: float) -> float:
    """Return how far a bar sits off both legs when pushed into the corner of a link. [mm]

    Parameters
    ----------
    bend : float
        Inner radius of the link's bend. [mm]
    dia : float
        Diameter of the bar in the corner. [mm]

    References
    ----------
    .. [1] Geometry: a circle of radius R in a bend of inner radius r > R.
    """
    return max(0.0, (1 - 1 / sqrt(2)) * (bend - dia / 2))


def closed_link(
    *,
    y0: float,
    y1: float,
    z0: float,
    z1: float,
    dia: float,
    corner: HookCorner,
    x: float = 0.0,
    bend: float | None = None,
    tail: float | None = None,
    skew: float | None = None,
) -> Path:
    """Return the form of a closed link whose two ends are hooked by 135° at one corner.

    The end that hooks out of the upright leg lies at x − skew/2, the one that hooks out of the
    level leg at x + skew/2, and the two legs away from the hook corner take the skew: with a
    skew of one diameter the ends touch and do not penetrate.

    Parameters
    ----------
    y0, y1, z0, z1 : float
        Outside faces of the link. [mm]
    dia : float
        Diameter of the link. [mm]
    corner : HookCorner
        Where the hooks are.
    x : float
        Middle of the link along the member. [mm]
    bend : float, optional
        Inner radius of all bends; two diameters if absent. [mm]
    tail : float, optional
        Straight length beyond each hook's bend; eight diameters if absent. [mm]
    skew : float, optional
        Distance along x of the two ends; one diameter if absent. [mm]
    """
    inner = 2 * dia if bend is None else bend
    straight = 8 * dia if tail is None else tail
    half = (dia if skew is None else skew) / 2
    radius = inner + dia / 2
    sy, sz = corner.sides
    ya, yb = (y1 - dia / 2, y0 + dia / 2) if sy > 0 else (y0 + dia / 2, y1 - dia / 2)
    za, zb = (z1 - dia / 2, z0 + dia / 2) if sz > 0 else (z0 + dia / 2, z1 - dia / 2)
    out = sqrt(2) * radius  # the hook's corner lies so far outside the outline
    back = (_hook_tangent(radius) + straight) / sqrt(2)
    one, other = x - half, x + half
    corners = (
        (one, ya - sy * back, za + sz * (out - back)),
        (one, ya, za + sz * out),
        (one, ya, zb),
        (x, yb, zb),
        (other, yb, za),
        (other, ya + sy * out, za),
        (other, ya + sy * (out - back), za - sz * back),
    )
    return Path(corners, (2 * inner,) * 5)


def _hook_tangent(radius: float) -> float:
    return radius * tan(radians(HOOK_TURN / 2))


def link_corners(
    y0: float,
    y1: float,
    z0: float,
    z1: float,
    dia: float,
    hook_corner: HookCorner,
    tail: float,
    x: float,
    skew: float,
) -> Path:
    """Return :func:`closed_link` with bends of two diameters, all arguments by position.

    Parameters
    ----------
    y0, y1, z0, z1 : float
        Outside faces of the link. [mm]
    dia : float
        Diameter of the link. [mm]
    hook_corner : HookCorner
        Where the hooks are.
    tail : float
        Straight length beyond each hook's bend. [mm]
    x : float
        Middle of the link along the member. [mm]
    skew : float
        Distance along x of the two ends. [mm]
    """
    return closed_link(
        y0=y0, y1=y1, z0=z0, z1=z1, dia=dia, corner=hook_corner, tail=tail, x=x, skew=skew
    )


def cross_tie(
    *,
    at: float,
    low: float,
    high: float,
    dia: float,
    upright: bool = True,
    side: int = 1,
    x: float = 0.0,
    bend: float | None = None,
    tail: float | None = None,
) -> Path:
    """Return the form of a single leg with a 135° hook at each end, both to the same side.

    Parameters
    ----------
    at : float
        Position of the leg's axis: y of an upright tie, z of a level one. [mm]
    low, high : float
        Outside faces of the two hooks, along the leg. [mm]
    dia : float
        Diameter of the tie. [mm]
    upright : bool
        Whether the leg runs along z; otherwise along y.
    side : int
        +1 if the hooks turn towards +y (upright) or +z (level), otherwise −1.
    x : float
        Position along the member. [mm]
    bend : float, optional
        Inner radius of the bends; two diameters if absent. [mm]
    tail : float, optional
        Straight length beyond each bend; eight diameters if absent. [mm]
    """
    inner = 2 * dia if bend is None else bend
    radius = inner + dia / 2
    out = sqrt(2) * radius
    back = (_hook_tangent(radius) + (8 * dia if tail is None else tail)) / sqrt(2)
    bottom, top = low + dia / 2 - out, high - dia / 2 + out
    flat = (
        (at + side * back, bottom + back),
        (at, bottom),
        (at, top),
        (at + side * back, top - back),
    )
    corners = tuple((x, a, b) if upright else (x, b, a) for a, b in flat)
    return Path(corners, (2 * inner,) * 2)


tie_corners = cross_tie


def bar_path(
    x0: float,
    x1: float,
    y: float,
    z: float,
    *,
    left: EndShape | None = None,
    right: EndShape | None = None,
    cranks: tuple[Crank, ...] = (),
    dia: float,
    mandrel: float,
) -> Path:
    """Return the form of a bar along x with bent ends and cranks.

    Parameters
    ----------
    x0, x1 : float
        Where the steel ends along x: the tip of a straight end, the outside of a bend. [mm]
    y, z : float
        Axis of the bar at its left end, before any crank. [mm]
    left, right : EndShape, optional
        How the ends are bent; straight if absent.
    cranks : tuple of Crank
        Steps along the bar; from the first one on the axis is moved by each in turn.
    dia : float
        Diameter of the bar. [mm]
    mandrel : float
        Inner diameter of every bend. [mm]
    """
    middle: list[Point] = []
    ya, za = y, z
    for crank in sorted(cranks, key=lambda c: c.x):
        middle.append((crank.x, ya, za))
        ya, za = ya + crank.dy, za + crank.dz
        middle.append((crank.end, ya, za))
    start = bent_end(x0, y, z, -1, left, dia=dia, mandrel=mandrel)
    end = bent_end(x1, ya, za, 1, right, dia=dia, mandrel=mandrel)
    corners = (*reversed(start), *middle, *end)
    return Path(corners, (mandrel,) * (len(corners) - 2))


def bent_end(
    x: float,
    y: float,
    z: float,
    outward: int,
    shape: EndShape | None,
    *,
    dia: float,
    mandrel: float,
) -> tuple[Point, ...]:
    """Return the corners of one end of a bar along x, from the body to the tip.

    Parameters
    ----------
    x : float
        Where the steel ends along x: the tip, or the outside of the bend. [mm]
    y, z : float
        Axis of the bar. [mm]
    outward : int
        +1 at the right end, −1 at the left.
    shape : EndShape, optional
        How the end is bent; straight if absent.
    dia : float
        Diameter of the bar. [mm]
    mandrel : float
        Inner diameter of the bends. [mm]
    """
    if shape is None or shape.form is EndForm.STRAIGHT:
        return ((x, y, z),)
    turn = 1 if shape.up else -1
    axis = x - outward * dia / 2
    if shape.form is EndForm.BEND:
        return (axis, y, z), (axis, y, z + turn * (shape.leg - dia / 2))
    across = mandrel + dia
    tip = axis - outward * (across / 2 + shape.leg)
    return (axis, y, z), (axis, y, z + turn * across), (tip, y, z + turn * across)


def across_path(y0: float, y1: float, x: float, z: float) -> Path:
    """Return the form of a straight bar across the member, such as a spacer between layers.

    Parameters
    ----------
    y0, y1 : float
        Its ends. [mm]
    x, z : float
        Its axis. [mm]
    """
    return Path(((x, y0, z), (x, y1, z)), ())
