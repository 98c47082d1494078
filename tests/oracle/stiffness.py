"""A beam line by the stiffness method, one loading at a time; shares no code with the program.

Nodes stand only at supports, tips and point loads, with the fixed-end forces of a uniform load, so
moments and shears are exact; between nodes they follow from the forces at an element's left end.
"""

from __future__ import annotations

import itertools
from collections.abc import Iterator, Sequence
from dataclasses import dataclass

import numpy as np

Array = np.ndarray


@dataclass(frozen=True)
class Bay:
    """One span or overhang: its load, and its points (x from its left end, force)."""

    x0: float
    x1: float
    inertia: float
    udl: float = 0.0
    points: tuple[tuple[float, float], ...] = ()


@dataclass(frozen=True)
class Solved:
    """Elements of one loading: left node, length, load, shear and moment at the left end."""

    nodes: Array
    udl: Array
    shear: Array
    moment: Array

    def at(self, x: float, side: int = 1) -> tuple[float, float]:
        """Return (moment, shear) just right or left of x."""
        e = int(np.searchsorted(self.nodes, x + 1e-5 * side)) - 1
        e = min(max(e, 0), len(self.udl) - 1)
        s, w = x - self.nodes[e], self.udl[e]
        return self.moment[e] + self.shear[e] * s - w * s * s / 2, self.shear[e] - w * s


def element(inertia: float, length: float) -> Array:
    """Return the stiffness of a beam element (v, θ at each end), E taken as 1."""
    k, s = inertia / length**3, length
    return k * np.array(
        [
            [12, 6 * s, -12, 6 * s],
            [6 * s, 4 * s * s, -6 * s, 2 * s * s],
            [-12, -6 * s, 12, -6 * s],
            [6 * s, 2 * s * s, -6 * s, 4 * s * s],
        ]
    )


def solve(bays: Sequence[Bay], supports: Sequence[float]) -> Solved:
    """Solve one loading of a line."""
    marks = {round(x, 6) for bay in bays for x in (bay.x0, bay.x1)}
    marks |= {round(bay.x0 + a, 6) for bay in bays for a, _ in bay.points}
    nodes = np.array(sorted(marks))
    lengths = np.diff(nodes)
    of = [next(b for b in bays if x < b.x1 - 1e-6) for x in nodes[:-1]]
    udl = np.array([b.udl for b in of])
    # one unit of stiffness keeps the matrix well scaled
    unit = max(b.inertia for b in bays)
    count = 2 * len(nodes)
    matrix, force = np.zeros((count, count)), np.zeros(count)
    for e, s in enumerate(lengths):
        matrix[2 * e : 2 * e + 4, 2 * e : 2 * e + 4] += element(of[e].inertia / unit, s)
        force[2 * e : 2 * e + 4] -= udl[e] * np.array([s / 2, s * s / 12, s / 2, -s * s / 12])
    for bay in bays:
        for a, p in bay.points:
            force[2 * int(np.argmin(abs(nodes - bay.x0 - a)))] -= p
    held = {2 * int(np.argmin(abs(nodes - x))) for x in supports}
    free = [k for k in range(count) if k not in held]
    moved = np.zeros(count)
    moved[free] = np.linalg.solve(matrix[np.ix_(free, free)], force[free])
    shear, moment = np.zeros(len(lengths)), np.zeros(len(lengths))
    for e, s in enumerate(lengths):
        ends = element(of[e].inertia / unit, s) @ moved[2 * e : 2 * e + 4]
        shear[e] = ends[0] + udl[e] * s / 2
        moment[e] = -(ends[1] + udl[e] * s * s / 12)
    return Solved(nodes, udl, shear, moment)


@dataclass(frozen=True)
class Given:
    """What one bay carries, characteristic: dead and imposed, uniform and at points."""

    x0: float
    x1: float
    inertia: float
    dead: float
    imposed: float
    points: tuple[tuple[float, float, float], ...] = ()  # x from its left end, dead, imposed

    def loaded(self, factor: float, imposed: bool) -> Bay:
        """Return it factored, with its imposed load or without."""
        w = self.dead + (self.imposed if imposed else 0.0)
        points = tuple((x, factor * (d + (i if imposed else 0.0))) for x, d, i in self.points)
        return Bay(self.x0, self.x1, self.inertia, factor * w, points)


def patterns(
    given: Sequence[Given], supports: Sequence[float], factor: float = 1.5
) -> Iterator[Solved]:
    """Solve every one of the 2ⁿ patterns of imposed load."""
    for chosen in itertools.product((False, True), repeat=len(given)):
        yield solve([g.loaded(factor, on) for g, on in zip(given, chosen, strict=True)], supports)
