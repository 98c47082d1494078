"""Laps where the stock runs out: away from peaks, out of joints, staggered."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass, replace
from math import ceil

import numpy as np

from detailer.model import Beam, Project
from detailer.placing.demand import Demand
from detailer.placing.ends import development
from detailer.placing.seating import Seated
from detailer.placing.strand import End, Strand
from detailer.rules import is456
from detailer.values import Face

GRID = 100.0
"""Laps are tried at this step. [mm]"""


@dataclass(frozen=True, slots=True, kw_only=True)
class Lapping:
    """What decides the laps of one run."""

    project: Project
    beam: Beam
    demand: Demand | None
    seated: Seated
    others: tuple[Strand, ...]  # strands of other runs on the same face


def lap_length(project: Project, beam: Beam, strand: Strand) -> float:
    """Return the lap of a bar with its like, rounded up. [mm]

    Parameters
    ----------
    project, beam : Project, Beam
        Grades and cover.
    strand : Strand
        The bar that is lapped.
    """
    steel = project.steel.main
    bond = is456.bond_stress(project.concrete.fck, deformed=steel.deformed)
    face_cover = beam.cover.top if strand.face is Face.TOP else beam.cover.bottom
    link = min(z.dia for links in beam.links for z in links.zones)
    least = min(face_cover, beam.cover.left, beam.cover.right) + link
    factor = is456.lap_factor(
        top_cast=strand.face is Face.TOP,
        cover_least=least,
        corner=strand.corner,
        gap_adjacent=float("inf"),
        dia=strand.dia,
    )
    need = is456.lap_length(strand.dia, 0.87 * steel.fy, bond, factor.value)
    step = project.practice.length_step
    return ceil(need.value / step - 1e-9) * step


def lapped(strands: tuple[Strand, ...], lapping: Lapping) -> Iterator[tuple[Strand, ...]]:
    """Yield the pieces of each strand of a run, left to right; whole where it fits the stock.

    No more than half of the strands lap at one set of places, the others at least 1.3 lap
    lengths off. Places that the engineer
    gave are kept as given.
    """
    chosen = lapping.seated.run.chosen.laps
    patterns: list[tuple[float, ...]] = []
    sets = ceil(len(strands) / max(1, len(strands) // 2))
    for number, strand in enumerate(strands):
        lap = lap_length(lapping.project, lapping.beam, strand)
        if chosen is not None:
            centres = tuple(x for x in chosen if strand.x0 + lap < x < strand.x1 - lap)
        elif _cut_length(strand) <= lapping.project.steel.stock:
            centres = ()
        else:
            at = number % sets
            if len(patterns) <= at:
                taken = tuple(x for p in patterns for x in p)
                patterns.append(_choose(strand, lap, lapping, taken))
            centres = patterns[at]
        yield _pieces(strand, centres, lap)


def _leg(end: End) -> float:
    return end.leg


def _cut_length(strand: Strand) -> float:
    return strand.x1 - strand.x0 + _leg(strand.left) + _leg(strand.right)


def _pieces(strand: Strand, centres: tuple[float, ...], lap: float) -> tuple[Strand, ...]:
    """Cut a strand at laps; each later piece lies aside of the one before it (set later)."""
    pieces: list[Strand] = []
    rest = strand
    for centre in centres:
        pieces.append(replace(rest, x1=centre + lap / 2, right=End()))
        rest = replace(rest, x0=centre - lap / 2, left=End(), aside_to=centre + lap / 2)
    pieces.append(rest)
    return tuple(pieces)


def _choose(
    strand: Strand, lap: float, lapping: Lapping, taken: tuple[float, ...]
) -> tuple[float, ...]:
    """Choose lap centres by the cheapest path: fewest laps, least use, no joints, staggered."""
    stock = lapping.project.steel.stock
    xs = np.arange(ceil((strand.x0 + lap) / GRID) * GRID, strand.x1 - lap, GRID, dtype=np.float64)
    if len(xs) == 0:
        return ()
    cost = _place_cost(xs, strand, lap, lapping)
    for x in taken:
        cost += np.where(np.abs(xs - x) < is456.lap_stagger(lap).value - 1e-6, 20 * lap, 0.0)
    first = xs + lap / 2 - strand.x0 + _leg(strand.left) <= stock
    best = np.where(first, cost, np.inf)
    back = np.full(len(xs), -1)
    for i in range(len(xs)):
        reach = np.nonzero(
            (xs[i] - xs[:i] + lap <= stock) & (xs[i] - xs[:i] >= 2 * lap) & np.isfinite(best[:i])
        )[0]
        if len(reach):
            j = int(reach[np.argmin(best[reach])])
            if best[j] + cost[i] < best[i]:
                best[i], back[i] = best[j] + cost[i], j
    last = strand.x1 - xs + lap / 2 + _leg(strand.right) <= stock
    total = np.where(last, best, np.inf)
    at = int(np.argmin(total))
    if not np.isfinite(total[at]):
        return ()
    centres: list[float] = []
    while at >= 0:
        centres.append(float(xs[at]))
        at = int(back[at])
    return tuple(reversed(centres))


def _place_cost(
    xs: np.ndarray[tuple[int], np.dtype[np.float64]],
    strand: Strand,
    lap: float,
    lapping: Lapping,
) -> np.ndarray[tuple[int], np.dtype[np.float64]]:
    """Return the cost of a lap centred at each place, in mm of bar."""
    beam = lapping.beam
    cost = np.full(len(xs), float(lap))
    half = lap / 2
    for support in beam.supports:
        inside = (xs + half > support.left) & (xs - half < support.right)
        cost += np.where(inside, 10 * lap, 0.0)
    for other in lapping.others:
        beside = (xs + half > other.x0) & (xs - half < other.x1)
        cost += np.where(beside & (not _through(other, strand)), 0.4 * lap, 0.0)
    if lapping.demand is not None:
        used = np.zeros(len(xs))
        for offset in (-half, 0.0, half):
            used = np.maximum(used, _use(xs + offset, lapping))
        cost += 4 * lap * np.maximum(used - 0.45, 0.0) + 2 * lap * (used > 0.5)
    return cost


def _through(other: Strand, strand: Strand) -> bool:
    return other.x0 <= strand.x0 + 1 and other.x1 >= strand.x1 - 1


def _use(
    xs: np.ndarray[tuple[int], np.dtype[np.float64]], lapping: Lapping
) -> np.ndarray[tuple[int], np.dtype[np.float64]]:
    """Return the share of the resistance that the design uses at each place."""
    demand, seated = lapping.demand, lapping.seated
    if demand is None:
        return np.zeros(len(xs))
    face = seated.run.face
    values = demand.tension(face, xs)
    cache: dict[tuple[int, tuple[int, ...]], float] = {}
    used = np.zeros(len(xs))
    starts = np.array([other.x0 for other in lapping.others])[:, None]
    stops = np.array([other.x1 for other in lapping.others])[:, None]
    present = ((starts <= xs) & (xs <= stops)).T
    for i in np.flatnonzero(values > 0).tolist():
        span = lapping.beam.span_at(float(xs[i]))
        there = tuple(np.flatnonzero(present[i]).tolist())
        key = (span.number, there)
        if key not in cache:
            extra = tuple((lapping.others[n].dia, lapping.others[n].z) for n in there)
            cache[key] = demand.resists(span, face, seated.rows() + extra)
        used[i] = values[i] / cache[key] if cache[key] else 9.0
    return used


def full_length(project: Project, dia: float) -> float:
    """Return the development length of a fully stressed bar. [mm]"""
    return development(project, dia)
