"""Runs: each table of chosen bars, cut where one straight bar cannot go on."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass

from detailer.model import Beam, ChosenBars
from detailer.values import Face

LEVEL = 1.0
"""Faces of neighbouring spans are in line when they differ by no more than this. [mm]"""


@dataclass(frozen=True, slots=True, kw_only=True)
class Run:
    """Bars of one table over spans without a step, or over one support."""

    table: int  # index in Beam.bars
    chosen: ChosenBars
    spans: tuple[int, int] | None  # indices into Beam.spans
    support: int | None
    primary: bool  # the bars that run through; all others are extras

    @property
    def face(self) -> Face:
        """Return the face the bars belong to."""
        return self.chosen.face

    @property
    def dias(self) -> tuple[int, ...]:
        """Return one diameter a bar, as written."""
        return tuple(group.dia for group in self.chosen.groups for _ in range(group.count))


def in_line(beam: Beam, face: Face, support: int) -> bool:
    """Return whether a straight bar of a face can pass a support.

    Parameters
    ----------
    beam : Beam
        The beam line.
    face : Face
        TOP or BOTTOM; side bars pass where the whole section is the same.
    support : int
        Index of the support.
    """
    left, right = beam.spans_of(support)
    if left is None or right is None:
        return False
    if abs(left.section.width - right.section.width) > LEVEL:
        return False
    tops = abs(left.top - right.top) <= LEVEL
    soffits = abs(left.soffit - right.soffit) <= LEVEL
    return {Face.TOP: tops, Face.BOTTOM: soffits}.get(face, tops and soffits)


def runs_of(beam: Beam) -> tuple[Run, ...]:
    """Return all runs of a beam in the order of its tables.

    The first table of a face in a span without a given `stop` holds the bars that run
    through there; what else is written for that face is extra.
    """
    led: set[tuple[Face, int]] = set()
    runs: list[Run] = []
    for table, chosen in enumerate(beam.bars):
        if chosen.spans is None:
            runs.append(
                Run(table=table, chosen=chosen, spans=None, support=chosen.support, primary=False)
            )
            continue
        free = chosen.stop == (None, None)
        for first, last in _pieces(beam, chosen):
            spans = range(first, last + 1)
            primary = free and not any((chosen.face, n) in led for n in spans)
            if primary:
                led.update((chosen.face, n) for n in spans)
            runs.append(
                Run(table=table, chosen=chosen, spans=(first, last), support=None, primary=primary)
            )
    return tuple(runs)


def _pieces(beam: Beam, chosen: ChosenBars) -> Iterator[tuple[int, int]]:
    """Yield (first, last) span indices between steps."""
    if chosen.spans is None:
        return
    first, last = chosen.spans[0] - 1, chosen.spans[1] - 1
    start = first
    for n in range(first, last):
        support = beam.spans[n].right
        if support is None or not in_line(beam, chosen.face, support):
            yield start, n
            start = n + 1
    yield start, last
