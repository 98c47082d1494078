"""What stress a placed bar can develop at a place, from what is embedded on either side."""

from __future__ import annotations

from dataclasses import dataclass
from itertools import pairwise
from math import hypot

import numpy as np
from numpy.typing import NDArray

from detailer.cage.bar import Bar, Cage, Point
from detailer.model import Project
from detailer.rules import is456, is2502
from detailer.values import ContactKind, Face, Role

Floats = NDArray[np.float64]


@dataclass(frozen=True, slots=True, kw_only=True)
class Rod:
    """One real bar along the member, as anchorage sees it. [mm]

    `x0` and `x1` bound its straight body; what bends and tails beyond are worth in anchorage
    stands in `worth`, left and right.
    """

    id: str
    mark: str
    placing: int
    role: Role
    face: Face
    layer: int
    dia: float
    x0: float
    x1: float
    worth: tuple[float, float]
    tips: tuple[float, float]  # outermost x of the steel
    line: tuple[Point, ...]  # the body's corners, left to right

    def at(self, x: float) -> tuple[float, float]:
        """Return (y, z) of the body at x.

        Parameters
        ----------
        x : float
            Along the member. [mm]
        """
        line = self.line
        if len(line) == 2 or x <= line[0][0]:
            return line[0][1], line[0][2]
        for (xa, ya, za), (xb, yb, zb) in pairwise(line):
            if x < xb:
                share = (x - xa) / (xb - xa)
                return ya + share * (yb - ya), za + share * (zb - za)
        return line[-1][1], line[-1][2]

    def levels(self, xs: Floats) -> Floats:
        """Return z of the body at places. [mm]

        Parameters
        ----------
        xs : ndarray
            Along the member. [mm]
        """
        return np.interp(xs, [p[0] for p in self.line], [p[2] for p in self.line])

    def covers(self, x: float) -> bool:
        """Return whether the steel is there at x.

        Parameters
        ----------
        x : float
            Along the member. [mm]
        """
        return self.tips[0] <= x <= self.tips[1]

    def embedded(self, xs: Floats) -> Floats:
        """Return the lesser of the anchorage lengths left and right of places. [mm]

        Parameters
        ----------
        xs : ndarray
            Along the member. [mm]
        """
        left = xs - self.x0 + self.worth[0]
        right = self.x1 - xs + self.worth[1]
        inside = (xs >= self.tips[0]) & (xs <= self.tips[1])
        return np.where(inside, np.maximum(np.minimum(left, right), 0.0), 0.0)


def rods(cage: Cage) -> tuple[Rod, ...]:
    """Return the real bars along the member.

    Parameters
    ----------
    cage : Cage
        The placed steel.
    """
    roles = (Role.MAIN, Role.HANGER, Role.SIDE)
    return tuple(
        _rod(bar, n) for bar in cage.bars if bar.role in roles for n in range(len(bar.placings))
    )


def _rod(bar: Bar, placing: int) -> Rod:
    dx, dy, dz = bar.placings[placing]
    points = [(x + dx, y + dy, z + dz) for x, y, z in bar.corners]
    if points[0][0] > points[-1][0]:
        points = points[::-1]
    body = max(range(len(points) - 1), key=lambda i: abs(points[i + 1][0] - points[i][0]))
    left, used_left, worth_left = _end(points[: body + 2], bar)
    right, used_right, worth_right = _end(points[body:][::-1], bar)
    outer = [p[0] for p in points]
    half = bar.dia / 2
    tips = (
        min(outer) - (half if used_left else 0.0),
        max(outer) + (half if used_right else 0.0),
    )
    return Rod(
        id=bar.id,
        mark=bar.name,
        placing=placing,
        role=bar.role,
        face=bar.face,
        layer=bar.layer,
        dia=bar.dia,
        x0=left,
        x1=right,
        worth=(worth_left, worth_right),
        tips=tips,
        line=tuple(points[used_left : len(points) - used_right]),
    )


def _end(points: list[Point], bar: Bar) -> tuple[float, int, float]:
    """Return x where the body starts, how many corners the end takes, and its worth.

    A bend counts 8 φ for itself and the first 4 φ of its tail, a U hook 16 φ; what is longer
    counts in full.
    """
    (x0, _, z0), (x1, _, z1) = points[0], points[1]
    if len(points) < 3 or bar.mandrels == ():
        return x0, 0, 0.0
    radius = (bar.mandrels[0] + bar.dia) / 2
    standard = is2502.min_straight_end(bar.dia).value
    inward = 1.0 if points[-1][0] > x1 else -1.0
    if abs(x1 - x0) < 1.0 and abs(z1 - z0) > 1.0:
        tail = abs(z1 - z0) - radius
        worth = is456.anchorage_value(bar.dia, 90) + tail - standard
        return x1 + inward * radius, 1, max(worth, 0.0)
    x2, z2 = points[2][0], points[2][2]
    if len(points) > 3 and abs(x2 - x1) < 1.0 and abs(z2 - z1) > 1.0 and (x0 - x1) * inward > 0:
        tail = abs(x0 - x1) - radius
        worth = is456.anchorage_value(bar.dia, 180) + tail - standard
        return x2 + inward * radius, 2, max(worth, 0.0)
    return x0, 0, 0.0


def full_development(project: Project, dia: float) -> float:
    """Return the development length of a main bar at 0.87 fy in tension. [mm]

    Parameters
    ----------
    project : Project
        Its grades.
    dia : float
        Nominal diameter. [mm]
    """
    steel = project.steel.main
    bond = is456.bond_stress(project.concrete.fck, deformed=steel.deformed)
    return is456.development_length(dia, 0.87 * steel.fy, bond).value


def shares(project: Project, cage: Cage, bars: tuple[Rod, ...], xs: Floats) -> Floats:
    """Return which share of 0.87 fy each bar develops at places, one row a bar. [-]

    Two bars that lap count together for no more than one of them over the lap.

    Parameters
    ----------
    project : Project
        Its grades.
    cage : Cage
        The placed steel, for its declared laps.
    bars : tuple of Rod
        Bars of that cage.
    xs : ndarray
        Along the member. [mm]
    """
    table = np.array(
        [np.minimum(1.0, bar.embedded(xs) / full_development(project, bar.dia)) for bar in bars]
    ).reshape(len(bars), len(xs))
    for contact in cage.contacts:
        if contact.kind is not ContactKind.LAP:
            continue
        for i, a in enumerate(bars):
            if a.id != contact.a:
                continue
            for j, b in enumerate(bars):
                if b.id == contact.b and _beside(a, b, (contact.x0 + contact.x1) / 2):
                    _cap(table, i, j, (xs >= contact.x0) & (xs <= contact.x1))
    return table


def _beside(a: Rod, b: Rod, x: float) -> bool:
    (ya, za), (yb, zb) = a.at(x), b.at(x)
    return hypot(ya - yb, za - zb) < (a.dia + b.dia) / 2 + 1.0


def _cap(table: Floats, i: int, j: int, window: NDArray[np.bool_]) -> None:
    """Scale two rows of the table down to one bar's worth within a window."""
    total = table[i] + table[j]
    scale = np.where(window & (total > 1.0), 1.0 / np.maximum(total, 1e-9), 1.0)
    table[i] *= scale
    table[j] *= scale
