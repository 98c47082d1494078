"""Bars that meet end over end lie side by side, or one above the other."""

from __future__ import annotations

from collections.abc import Iterable
from dataclasses import dataclass, replace
from math import hypot, sqrt

from detailer.model import Project
from detailer.placing.frame import gap_needed
from detailer.placing.strand import Strand
from detailer.values import Face

NEAR = 20.0
"""Ends in one line closer than this count as meeting. [mm]"""


@dataclass(frozen=True, slots=True)
class Move:
    """One way for a strand to get out of another's way, and what it leaves undone."""

    strand: Strand
    conflicts: int
    lack: float


def settle(
    project: Project, strands: Iterable[Strand], seated_together: frozenset[tuple[int, int]]
) -> tuple[Strand, ...]:
    """Move strands aside until bars that overlap touch or keep their distance.

    Parameters
    ----------
    project : Project
        Its aggregate decides the distance.
    strands : iterable of Strand
        All bars of the beam, pieces of lapped bars included.
    seated_together : frozenset of (int, int)
        Pairs of runs whose places across the section were chosen together.

    Notes
    -----
    From left to right; the bar that starts later gives way: a bar that only meets the end of
    another cranks its own end, towards the core first sideways, then in height; any other
    bar moves as a whole.
    """
    done: list[Strand] = []
    for strand in sorted(strands, key=lambda s: (s.face.value, s.x0, s.layer, s.y, s.run)):
        rivals = [o for o in done if o.face is strand.face and _share(o, strand) > -NEAR]
        done.append(_give_way(project, strand, rivals, seated_together))
    return tuple(done)


def _share(a: Strand, b: Strand) -> float:
    """Return the length over which two strands overlap along x."""
    return min(a.x1, b.x1) - max(a.x0, b.x0)


def _together(a: Strand, b: Strand, pairs: frozenset[tuple[int, int]]) -> bool:
    """Return whether two strands were given their places together."""
    if a.run == b.run:
        return hypot(a.y - b.y, a.z - b.z) > 1.0
    return (a.run, b.run) in pairs or (b.run, a.run) in pairs


def _clear(a: Strand, b: Strand) -> float:
    """Return the least clear distance of two strands where both are."""
    x0, x1 = max(a.x0, b.x0), min(a.x1, b.x1)
    xs = {x0, x1, (x0 + x1) / 2}
    for s in (a, b):
        if s.crank:
            xs |= {x for x in (s.aside_to, s.aside_to + s.crank) if x0 <= x <= x1}
    touch = (a.dia + b.dia) / 2
    least = float("inf")
    for x in xs:
        (ya, za), (yb, zb) = a.at(x), b.at(x)
        least = min(least, hypot(ya - yb, za - zb) - touch)
    return least


def _lack(project: Project, a: Strand, b: Strand) -> float:
    """Return how much two strands lack to the distance they need; 0 where they touch."""
    clear = _clear(a, b)
    if abs(clear) < 0.2:
        return 0.0
    if clear < 0:
        return 100.0 - clear
    if a.layer != b.layer and abs(a.z - b.z) > (a.dia + b.dia) / 2:
        return 0.0
    return max(0.0, gap_needed(a.dia, b.dia, project.concrete.aggregate) - clear)


def _give_way(
    project: Project,
    strand: Strand,
    rivals: list[Strand],
    pairs: frozenset[tuple[int, int]],
) -> Strand:
    """Return the strand, moved where it would meet another."""
    clashing = [
        o for o in rivals if not _together(strand, o, pairs) and _lack(project, strand, o) > 1e-6
    ]
    if not clashing:
        return strand if strand.aside != (0.0, 0.0) else replace(strand, aside_to=0.0)
    first = min(clashing, key=lambda o: (_clear(strand, o), o.y))
    best: Move | None = None
    for candidate in _moves(strand, first, clashing):
        lacks = [_lack(project, candidate, o) for o in rivals]
        move = Move(candidate, sum(1 for v in lacks if v > 1e-6), round(sum(lacks), 3))
        if best is None or (move.conflicts, move.lack) < (best.conflicts, best.lack):
            best = move
        if move.conflicts == 0:
            break
    return best.strand if best else strand


def _moves(strand: Strand, other: Strand, clashing: list[Strand]) -> Iterable[Strand]:
    """Yield ways out, best liked first."""
    touch = (strand.dia + other.dia) / 2
    meet = max(o.x1 for o in clashing)
    tail_only = strand.x0 >= other.x0 and meet < strand.x1 - 500
    start = max(strand.x0, other.x0)
    oy, oz = other.at(start)
    flat = sqrt(max(0.0, touch**2 - (strand.z - oz) ** 2))
    core = 1.0 if strand.face is Face.BOTTOM else -1.0
    side = -1.0 if oy > 0 else 1.0
    upright = core * sqrt(max(0.0, touch**2 - (strand.y - oy) ** 2))
    sideways = [(oy + side * flat - strand.y, 0.0), (oy - side * flat - strand.y, 0.0)]
    above = (0.0, oz + upright - strand.z)
    cranked = [
        replace(strand, aside=offset, aside_to=max(meet, strand.x0) + 10)
        for offset in ((sideways[0], above) if strand.corner else (*sideways, above))
        if tail_only
    ]
    whole = [
        replace(strand.moved(*offset), aside=(0.0, 0.0), aside_to=0.0)
        for offset in (*sideways, above)
    ]
    yield from (*cranked, *whole) if strand.corner else (*whole, *cranked)
