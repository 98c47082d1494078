"""Where bars stop inside the spans, and where they are lapped: what a drawing must dimension."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass

from detailer.cage.bar import Cage
from detailer.values import ContactKind, Face
from detailer.views.lanes import Strand

NEAR = 1.0
"""Ends closer than this are one end. [mm]"""

AT_TIP = 60.0
"""A bar that stops this close to the end of all steel goes to the end of the beam. [mm]"""


@dataclass(frozen=True, slots=True, order=True)
class Lap:
    """A stretch in which one bar takes over from another."""

    x0: float
    x1: float


def laps_of(cage: Cage, strands: tuple[Strand, ...], faces: tuple[Face, ...]) -> tuple[Lap, ...]:
    """Return the laps of bars at some faces, from left to right, equal ones once.

    Bars of neighbouring spans that pass each other over a support are no lap.

    Parameters
    ----------
    cage : Cage
        The cage.
    strands : tuple of Strand
        Its long bars as lines.
    faces : tuple of Face
        Which faces.
    """
    found: set[Lap] = set()
    for contact in cage.contacts:
        if contact.kind is not ContactKind.LAP:
            continue
        a, b = cage.bar(contact.a), cage.bar(contact.b)
        if a.face not in faces:
            continue
        first, second = _extent(strands, a.name, contact.x0), _extent(strands, b.name, contact.x0)
        if first is None or second is None:
            continue
        if first[0] > second[0]:
            first, second = second, first
        middle = (contact.x0 + contact.x1) / 2
        over = any(abs(middle - s.x) <= s.width / 2 for s in cage.supports)
        if not over and first[1] < second[1] - NEAR and second[0] > first[0] + NEAR:
            found.add(Lap(float(round(contact.x0)), float(round(contact.x1))))
    return tuple(sorted(found))


def _extent(strands: tuple[Strand, ...], mark: str, x: float) -> tuple[float, float] | None:
    for s in strands:
        if s.bar.name == mark and s.x0 - NEAR <= x <= s.x1 + NEAR:
            return s.x0, s.x1
    return None


def stops_between(
    strands: tuple[Strand, ...],
    laps: tuple[Lap, ...],
    faces: tuple[Face, ...],
    x0: float,
    x1: float,
) -> tuple[tuple[float, ...], tuple[float, ...]]:
    """Return where bars that come from the left, and from the right, stop between two faces.

    A bar that lies wholly inside has its left end in the first group, its right end in the
    second, as a fixer measures both from the nearer face. Ends of laps are left out. Whole
    millimetres.

    Parameters
    ----------
    strands : tuple of Strand
        The lines of the elevation.
    laps : tuple of Lap
        Laps, dimensioned on their own.
    faces : tuple of Face
        Which faces of the beam.
    x0, x1 : float
        Faces of the supports. [mm]
    """
    left: set[float] = set()
    right: set[float] = set()
    start, end = min(s.x0 for s in strands), max(s.x1 for s in strands)
    for s in strands:
        if s.bar.face not in faces:
            continue
        for x in _ends(s, laps):
            if x0 + NEAR < x < x1 - NEAR and start + AT_TIP < x < end - AT_TIP:
                (left if x - x0 <= x1 - x else right).add(float(round(x)))
    return tuple(sorted(left)), tuple(sorted(right, reverse=True))


def _ends(strand: Strand, laps: tuple[Lap, ...]) -> Iterator[float]:
    left, right = strand.bent
    for is_bent, x in ((left, strand.x0), (right, strand.x1)):
        if is_bent or any(lap.x0 - NEAR <= x <= lap.x1 + NEAR for lap in laps):
            continue
        yield x


def rows_of(
    span: tuple[float, float],
    stops: tuple[tuple[float, ...], tuple[float, ...]],
    laps: tuple[Lap, ...],
) -> tuple[tuple[tuple[float, str], ...], ...]:
    """Return dimension chains from face to face, each closing on the clear span.

    Each chain is a row of points with the text that follows them ("" or "lap").

    Parameters
    ----------
    span : tuple of (float, float)
        The faces. [mm]
    stops : tuple
        As :func:`stops_between` gives them.
    laps : tuple of Lap
        Laps that touch the span.
    """
    left, right = stops
    low, high = float(round(span[0])), float(round(span[1]))
    rows: list[tuple[tuple[float, str], ...]] = []
    for k in range(max(len(left), len(right))):
        a, b = left[k] if k < len(left) else None, right[k] if k < len(right) else None
        inner = sorted(x for x in (a, b) if x is not None)
        rows.append(((low, ""), *((x, "") for x in inner), (high, "")))
    for lap in laps:
        if lap.x0 > low + NEAR and lap.x1 < high - NEAR:
            rows.append(((low, ""), (lap.x0, "lap"), (lap.x1, ""), (high, "")))
        elif lap.x0 < high and lap.x1 > low and not _within(lap, span):
            rows.append(((lap.x0, "lap"), (lap.x1, "")))
    return tuple(rows)


def _within(lap: Lap, span: tuple[float, float]) -> bool:
    return span[0] <= lap.x0 and lap.x1 <= span[1]
