"""Bars that meet end over end lie side by side, or one above the other."""

from __future__ import annotations

from collections.abc import Callable, Iterable, Iterator
from dataclasses import dataclass, replace
from itertools import pairwise
from math import hypot, sqrt
from typing import NamedTuple

from detailer.cage.ribs import Spot, groups_of, taken
from detailer.model import over_ribs
from detailer.placing.frame import Frame, gap_needed
from detailer.placing.strand import Strand
from detailer.values import EndForm, Face

LEG_CLEAR = 2.0
"""A leg passes another bar by at least this. [mm]"""

NEAR = 25.0
"""Ends in one line closer than this count as meeting. [mm]"""

OVERLAP = 50.0
"""Bars whose ends just meet are made to pass each other by this. [mm]"""

TOUCH = 0.2
"""Bars this close lie against each other. [mm]"""

BEND = 22.0
"""A crank starts so far past the end it passes, so that its bend spares the lap. [mm]"""

CLASH = 100.0
"""What bars that penetrate lack at least: worse than any want of space. [mm]"""

TAIL = 400.0
"""A bar must go on this far past those it passes before it can crank back. [mm]"""


@dataclass(frozen=True, slots=True, kw_only=True)
class Settling:
    """What decides whether bars may lie where they lie."""

    aggregate: float
    room: Callable[[float, float], Frame]  # inside the links between two places
    together: frozenset[tuple[int, int]]  # runs whose places were chosen together

    def need(self, a: Strand, b: Strand) -> float:
        """Return the clear distance two bars of a layer need, with what ribs take. [mm]"""
        larger = max(a.dia, b.dia)
        return gap_needed(a.dia, b.dia, self.aggregate) + 0.18 * larger + 1.0

    def lack(self, a: Strand, b: Strand) -> float:
        """Return how much two bars lack to the distance they need; 0 where they touch."""
        crossed = max(_leg_across(a, b), _leg_across(b, a))
        if crossed > 0:
            return CLASH + crossed
        if _share(a, b) <= -NEAR:
            return 0.0
        clear = _clear(a, b)
        if abs(clear) < TOUCH:
            if _parts(a, b):
                return self.need(a, b)
            return 0.0 if _share(a, b) > NEAR else 5.0
        if clear < 0:
            return CLASH - clear
        if a.layer != b.layer:
            return max(0.0, max(15.0, self.aggregate * 2 / 3, a.dia, b.dia) - clear)
        return max(0.0, self.need(a, b) - clear)

    def sat_together(self, a: Strand, b: Strand) -> bool:
        """Return whether two strands were given their places together."""
        if a.run == b.run:
            return hypot(a.y - b.y, a.z - b.z) > 1.0
        return (a.run, b.run) in self.together or (b.run, a.run) in self.together


class Way(NamedTuple):
    """One way out, and what it leaves undone; the least is the best."""

    clashes: int
    conflicts: int
    lack: float
    moved: float
    order: int
    strand: Strand


def settle(strands: Iterable[Strand], settling: Settling) -> tuple[Strand, ...]:
    """Move strands aside until bars that overlap touch or keep their distance.

    Parameters
    ----------
    strands : iterable of Strand
        All bars of the beam, pieces of lapped bars included.
    settling : Settling
        Distances, room, and which runs were placed together.

    Notes
    -----
    From left to right; the bar that starts later gives way. A bar that only meets the end of
    others cranks its own end; any other bar moves as a whole. Of all places against the bars
    in its way (beside or above them) it takes the one that leaves the fewest conflicts, and
    of those the nearest.
    """
    done: list[Strand] = []
    queue = sorted(strands, key=lambda s: (s.face.value, s.x0, s.layer, s.y, s.run))
    for n, strand in enumerate(queue, start=1):
        rivals = [o for o in done if o.face is strand.face and _share(o, strand) > -2 * NEAR]
        clashing = _clashing(strand, rivals, settling)
        if clashing:
            meet = max(o.x1 for o in clashing)
            ahead = [
                o
                for o in queue[n:]
                if o.face is strand.face
                and o.x0 < meet + NEAR
                and _share(o, strand) > NEAR
                and not _clashing(o, rivals, settling)
            ]
            done.append(_give_way(strand, rivals, ahead, clashing, settling))
        else:
            done.append(_plain(strand))
    return tuple(done)


def _plain(strand: Strand) -> Strand:
    """Return a strand that need not give way."""
    return strand if strand.aside != (0.0, 0.0) else replace(strand, aside_to=0.0)


def _clashing(strand: Strand, rivals: list[Strand], settling: Settling) -> list[Strand]:
    """Return the bars that a strand would meet where it lies."""
    plain = _plain(strand)
    return [
        o for o in rivals if not settling.sat_together(plain, o) and settling.lack(plain, o) > 1e-6
    ]


def _share(a: Strand, b: Strand) -> float:
    """Return the length over which two strands overlap along x."""
    return min(a.x1, b.x1) - max(a.x0, b.x0)


def _clear(a: Strand, b: Strand) -> float:
    """Return the least clear distance of two strands where both are."""
    if a.aside == b.aside == (0.0, 0.0):
        return hypot(a.y - b.y, a.z - b.z) - (a.dia + b.dia) / 2
    x0, x1 = max(a.x0, b.x0), min(a.x1, b.x1)
    xs = {x0, x1}
    for s in (a, b):
        length = s.crank
        if length:
            steps = (s.aside_to + k * length / 4 for k in range(5))
            xs |= {x for x in steps if x0 <= x <= x1}
    least = float("inf")
    for x in xs:
        (ya, za), (yb, zb) = a.at(x), b.at(x)
        least = min(least, hypot(ya - yb, za - zb))
    return least - (a.dia + b.dia) / 2


def _parts(a: Strand, b: Strand) -> bool:
    """Return whether two strands that touch somewhere part where both go on."""
    touch = (a.dia + b.dia) / 2 + TOUCH
    for x in (max(a.x0, b.x0), min(a.x1, b.x1)):
        (ya, za), (yb, zb) = a.at(x), b.at(x)
        if hypot(ya - yb, za - zb) > touch:
            return True
    return False


def _rib_lack(way: Strand, rivals: list[Strand], settling: Settling) -> float:
    """Return how much a layer packed over ribs lacks where a bar starts. [mm]

    What ribs of bars and links take is shared by the gaps between groups of touching bars.
    """
    x = way.x0 + 1.0
    row = [o for o in rivals if o.layer == way.layer and o.covers(x)]
    groups = groups_of(Spot(*o.at(x), o.dia) for o in (*row, way))
    gaps = [min(a.clear(b) for a in left for b in right) for left, right in pairwise(groups)]
    if not gaps:
        return 0.0
    link = settling.room(x, x).link
    grown = taken(groups) + (2 * (over_ribs(link) - link) if way.layer == 1 else 0.0)
    return max(0.0, settling.aggregate + 5 - (min(gaps) - grown / len(gaps)))


def _leg_across(bent: Strand, other: Strand) -> float:
    """Return how deep a leg of one bar cuts into another bar that passes it. [mm]"""
    into = -1.0 if bent.face is Face.TOP else 1.0
    worst = 0.0
    for end, axis in ((bent.left, bent.x0 + bent.dia / 2), (bent.right, bent.x1 - bent.dia / 2)):
        if end.form is EndForm.STRAIGHT or not other.x0 - bent.dia < axis < other.x1 + bent.dia:
            continue
        (y, z), (oy, oz) = bent.at(axis), other.at(axis)
        touch = (bent.dia + other.dia) / 2
        along = (oz - z) * into
        if touch < along < max(end.leg, 10 * bent.dia) + other.dia / 2:
            worst = max(worst, touch + LEG_CLEAR - abs(oy - y))
    return worst


def _give_way(
    strand: Strand,
    rivals: list[Strand],
    ahead: list[Strand],
    clashing: list[Strand],
    settling: Settling,
) -> Strand:
    """Return the strand, moved where it would meet another; bars ahead of it will stay."""
    plain = _plain(strand)
    met = min(_share(strand, o) for o in clashing)
    if met < OVERLAP and min(o.x0 for o in clashing) < strand.x0:
        strand = replace(strand, x0=strand.x0 - (OVERLAP - met))
    ways = sorted(
        (
            (_moved(strand, way), n, way)
            for n, way in enumerate(_ways(strand, rivals, clashing, settling))
        ),
        key=lambda item: item[:2],
    )
    best: Way | None = None
    for moved, order, way in ways:
        lacks = [settling.lack(way, o) for o in _counted(way, [*rivals, *ahead], settling)]
        lacks.append(_rib_lack(way, [*rivals, *ahead], settling))
        clashes = sum(1 for lack in lacks if lack >= CLASH)
        conflicts = sum(1 for lack in lacks if lack > 1e-6)
        found = Way(clashes, conflicts, round(sum(lacks), 2), moved, order, way)
        if best is None or found[:5] < best[:5]:
            best = found
        if found.conflicts == 0:
            break
    return best.strand if best is not None else plain


def _moved(strand: Strand, way: Strand) -> float:
    """Return how far a way moves a strand."""
    return round(max(hypot(*way.aside), hypot(way.y - strand.y, way.z - strand.z)), 2)


def _counted(way: Strand, rivals: list[Strand], settling: Settling) -> Iterator[Strand]:
    """Yield the bars a strand must keep its distance from.

    Left out are bars of its own seating while both are where it put them, and bars beyond one
    that it touches and that they touch too, if it goes on as long: these make one group.
    """
    apart = [_clear(way, o) for o in rivals]
    touched = [o for o, clear in zip(rivals, apart, strict=True) if abs(clear) < TOUCH]
    for other, clear in zip(rivals, apart, strict=True):
        at_home = way.seated and other.seated
        if at_home and settling.sat_together(way, other) and clear > 1.0:
            continue
        grouped = clear > TOUCH and any(
            o is not other
            and _share(o, other) > 0
            and abs(_clear(o, other)) < TOUCH
            and o.x1 >= min(way.x1, other.x1)
            for o in touched
        )
        if not grouped:
            yield other


def _ways(
    strand: Strand, rivals: list[Strand], clashing: list[Strand], settling: Settling
) -> Iterator[Strand]:
    """Yield ways out: beside or above each bar that is there, in the window they share."""
    meet = max(o.x1 for o in clashing)
    start = strand.x0
    tail_only = meet < strand.x1 - TAIL and strand.left.leg == 0
    window = [o for o in rivals if o.x0 <= meet and o.x1 >= start]
    near = settling.room(start, min(meet, strand.x1))
    whole_room = settling.room(strand.x0, strand.x1)
    for y, z in _places(strand, window, start, settling):
        offset = (y - strand.y, z - strand.z)
        if tail_only and _inside(near, y, z, strand.dia):
            yield replace(strand, aside=offset, aside_to=meet + BEND, seated=False)
        if not strand.corner and _inside(whole_room, y, z, strand.dia):
            yield _whole(strand, *offset)
    if strand.corner and not tail_only:
        for y, z in _places(strand, window, start, settling):
            if _inside(whole_room, y, z, strand.dia):
                yield _whole(strand, y - strand.y, z - strand.z)


def _whole(strand: Strand, dy: float, dz: float) -> Strand:
    """Return the whole bar elsewhere."""
    moved = strand.moved(dy, dz)
    return replace(moved, aside=(0.0, 0.0), aside_to=0.0, seated=False)


def _places(
    strand: Strand, window: list[Strand], x: float, settling: Settling
) -> Iterator[tuple[float, float]]:
    """Yield (y, z) by each bar of a window: against it or clear of it, beside it or above it."""
    core = 1.0 if strand.face is Face.BOTTOM else -1.0
    for other in window:
        oy, oz = other.at(max(x, other.x0))
        touch = (strand.dia + other.dia) / 2
        flat = touch**2 - (strand.z - oz) ** 2
        side = -1.0 if oy > 0 else 1.0
        clear = touch + settling.need(strand, other) + 0.1
        for reach in (sqrt(flat) if flat > 0 else touch + LEG_CLEAR, clear):
            if reach > 0:
                yield oy + side * reach, strand.z
                yield oy - side * reach, strand.z
        upright = touch**2 - (strand.y - oy) ** 2
        if upright > 0:
            yield strand.y, oz + core * sqrt(upright)
        yield oy, oz + core * touch
        yield oy, oz + core * clear
        yield strand.y, oz + core * clear


def _inside(room: Frame, y: float, z: float, dia: float) -> bool:
    """Return whether a bar lies inside the links."""
    r = dia / 2 - 0.01
    return room.right + r <= y <= room.left - r and room.bottom + r <= z <= room.top - r
