"""Zones of links read off a cage: where sets stand, and stretches of equal sets at equal spaces."""

from __future__ import annotations

from collections import Counter
from collections.abc import Iterator
from dataclasses import dataclass
from functools import lru_cache
from itertools import pairwise

from detailer.cage.bar import Bar, Cage
from detailer.cage.measure import outer_box
from detailer.values import Role

EVEN = 0.6
"""Spaces are equal when they differ by no more than this. [mm]"""


@dataclass(frozen=True, slots=True)
class LinkSet:
    """Links and ties that stand together at one place."""

    x: float
    bars: tuple[tuple[str, float, int, int], ...]  # name, diameter, legs of one, how many; sorted


@dataclass(frozen=True, slots=True, kw_only=True)
class Zone:
    """A stretch of equal link sets at equal spaces; the sets on its ends included in x0, x1.

    A set on the boundary of two zones belongs to the closer one, so `count` may be less than
    what stands between x0 and x1.
    """

    x0: float
    x1: float
    count: int  # sets that belong to it
    spacing: float  # [mm]; 0 for a single set
    kind: LinkSet

    @property
    def texts(self) -> tuple[str, ...]:
        """Return one call-out for each mark of the set."""
        pitch = f" @ {self.spacing:.0f}" if self.spacing else ""
        return tuple(
            f"{self.count * many}-{link_size(dia, legs)}-{name}{pitch}"
            for name, dia, legs, many in self.kind.bars
        )


def legs_of(bar: Bar) -> int:
    """Return how many legs of a link or tie stand up across the depth.

    Parameters
    ----------
    bar : Bar
        The bar.
    """
    upright = 0
    inner = bar.corners[1:-1]
    for (_, y0, z0), (_, y1, z1) in pairwise(inner):
        upright += abs(z1 - z0) > abs(y1 - y0)
    return upright


def link_size(dia: float, legs: int) -> str:
    """Return legs and size as printed; a level tie has no legs to count.

    Parameters
    ----------
    dia : float
        Diameter. [mm]
    legs : int
        Upright legs.
    """
    return f"{legs}L-T{dia:.0f}" if legs else f"T{dia:.0f}"


@lru_cache(maxsize=1)
def link_sets(cage: Cage) -> tuple[LinkSet, ...]:
    """Return the link sets of a cage from left to right.

    Parameters
    ----------
    cage : Cage
        The cage.
    """
    rows: list[tuple[float, Bar]] = []
    for bar in cage.bars:
        if bar.role in (Role.LINK, Role.TIE):
            box = outer_box(bar)
            rows += [((box.x0 + box.x1) / 2 + dx, bar) for dx, _, _ in bar.placings]
    rows.sort(key=lambda row: (row[0], row[1].id))
    groups: list[list[tuple[float, Bar]]] = []
    for x, bar in rows:
        if groups and x - groups[-1][0][0] <= 1.5 * bar.dia + EVEN:
            groups[-1].append((x, bar))
        else:
            groups.append([(x, bar)])
    return tuple(_set(group) for group in groups)


def _set(group: list[tuple[float, Bar]]) -> LinkSet:
    links = [x for x, bar in group if bar.role is Role.LINK] or [x for x, _ in group]
    count = Counter((bar.name, bar.dia, legs_of(bar)) for _, bar in group)
    kinds = tuple((name, dia, legs, n) for (name, dia, legs), n in sorted(count.items()))
    return LinkSet(sum(links) / len(links), kinds)


def zones_between(sets: tuple[LinkSet, ...], x0: float, x1: float) -> tuple[Zone, ...]:
    """Return the zones of the link sets between two planes.

    Parameters
    ----------
    sets : tuple of LinkSet
        Left to right.
    x0, x1 : float
        The planes: the faces of a span's supports. [mm]
    """
    inside = [s for s in sets if x0 <= s.x <= x1]
    runs = tuple(_runs(inside))
    zones: list[Zone] = []
    for i, (first, last, kind) in enumerate(runs):
        spacing = _spacing(inside, first, last)
        count = last - first + 1
        for j in (i - 1, i + 1):
            shared = 0 <= j < len(runs) and (runs[j][1] == first or runs[j][0] == last)
            if shared and _yields(spacing, _spacing(inside, *runs[j][:2]), i > j):
                count -= 1
        zones.append(
            Zone(x0=inside[first].x, x1=inside[last].x, count=count, spacing=spacing, kind=kind)
        )
    return tuple(zones)


def _yields(mine: float, other: float, later: bool) -> bool:
    """Return whether a shared set belongs to the other zone: the closer one, else the earlier."""
    if abs(mine - other) <= EVEN:
        return later
    return mine > other


def _spacing(sets: list[LinkSet], first: int, last: int) -> float:
    return (sets[last].x - sets[first].x) / (last - first) if last > first else 0.0


def _runs(sets: list[LinkSet]) -> Iterator[tuple[int, int, LinkSet]]:
    """Yield first and last set and kind of each run; runs of one kind share their boundary."""
    first = 0
    while first < len(sets):
        last = first
        while last + 1 < len(sets) and sets[last + 1].bars == sets[first].bars:
            if last > first and abs(_step(sets, last) - _step(sets, first)) > EVEN:
                break
            last += 1
        yield first, last, sets[first]
        more = last + 1 < len(sets)
        goes_on = more and last > first and sets[last + 1].bars == sets[last].bars
        first = last if goes_on else last + 1


def _step(sets: list[LinkSet], i: int) -> float:
    return sets[i + 1].x - sets[i].x
