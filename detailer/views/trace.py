"""A bar's centre line as seen along y or along x: straights and arcs in a plane, arcs exact."""

from __future__ import annotations

from dataclasses import dataclass
from functools import cached_property
from math import hypot, radians, tan

from detailer.cage.bar import Bar, Point
from detailer.cage.line import Arc, centre_line
from detailer.drawing.primitives import XY

FLAT = 1e-6
"""An arc lies in the plane of the picture when it leaves it by no more than this."""

CHORDS = 8
"""An arc seen askew is drawn in so many chords."""


@dataclass(frozen=True)
class Trace:
    """A bar in the plane of a picture; `bulges` as in :class:`Path`, one a point."""

    points: tuple[XY, ...]
    bulges: tuple[float, ...]

    @cached_property
    def low(self) -> XY:
        """Return the lower left corner of the points' box."""
        return min(p[0] for p in self.points), min(p[1] for p in self.points)

    @cached_property
    def high(self) -> XY:
        """Return the upper right corner of the points' box."""
        return max(p[0] for p in self.points), max(p[1] for p in self.points)

    def moved(self, dx: float, dy: float) -> Trace:
        """Return the same trace elsewhere."""
        return Trace(tuple((x + dx, y + dy) for x, y in self.points), self.bulges)


def elevation_trace(bar: Bar) -> Trace:
    """Return a bar as seen along +y: x to the right, z up; without its placing.

    Parameters
    ----------
    bar : Bar
        The bar.
    """
    return _trace(bar, 0, 2)


def section_trace(bar: Bar) -> Trace:
    """Return a bar as seen along +x: −y to the right, z up; without its placing.

    Parameters
    ----------
    bar : Bar
        The bar.
    """
    seen = _trace(bar, 1, 2)
    return Trace(tuple((-y, z) for y, z in seen.points), tuple(-b for b in seen.bulges))


def _trace(bar: Bar, across: int, up: int) -> Trace:
    hidden = 3 - across - up
    points: list[XY] = []
    bulges: list[float] = []
    for piece in centre_line(bar).segments:
        if isinstance(piece, Arc) and abs(piece.out[hidden]) + abs(piece.along[hidden]) > FLAT:
            stops = [piece.at(piece.length * i / CHORDS)[0] for i in range(CHORDS + 1)]
            bends = [0.0] * CHORDS
        else:
            stops = [piece.at(0.0)[0], piece.at(piece.length)[0]]
            bends = [_bulge(piece, across, up) if isinstance(piece, Arc) else 0.0]
        for start, bend in zip(stops, bends, strict=False):
            _put(points, bulges, (start[across], start[up]), bend)
        last = stops[-1]
    _put(points, bulges, (last[across], last[up]), 0.0)
    return Trace(tuple(points), tuple(bulges))


def _put(points: list[XY], bulges: list[float], at: XY, bend: float) -> None:
    """Add a vertex; one that lies on the vertex before only passes its bulge on."""
    if points and hypot(at[0] - points[-1][0], at[1] - points[-1][1]) < FLAT:
        bulges[-1] = bend
        return
    points.append(at)
    bulges.append(bend)


def _bulge(arc: Arc, across: int, up: int) -> float:
    turn = arc.out[across] * arc.along[up] - arc.out[up] * arc.along[across]
    return (1 if turn > 0 else -1) * tan(radians(arc.sweep) / 4)


def across_view(bar: Bar) -> bool:
    """Return whether a bar runs along y only, so that an elevation shows it as a point.

    Parameters
    ----------
    bar : Bar
        The bar.
    """
    (x0, _, z0), *rest = bar.corners
    return all(abs(x - x0) < FLAT and abs(z - z0) < FLAT for x, _, z in rest)


def placed_at(bar: Bar, placing: int) -> Point:
    """Return the first corner of one real bar.

    Parameters
    ----------
    bar : Bar
        The bar.
    placing : int
        Which of its placings.
    """
    (x, y, z), (dx, dy, dz) = bar.corners[0], bar.placings[placing]
    return x + dx, y + dy, z + dz
