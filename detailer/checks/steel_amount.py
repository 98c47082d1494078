"""Is there enough steel in tension, not too much anywhere, and close enough to hold cracks?"""

from __future__ import annotations

from collections.abc import Iterator
from itertools import pairwise

import numpy as np
from numpy.typing import NDArray

from detailer.checks.case import Case
from detailer.checks.stations import Station, stations
from detailer.findings import Finding
from detailer.model import Span
from detailer.rules import is456
from detailer.strength.development import Rod
from detailer.strength.slices import area
from detailer.values import Face, Required, Severity

Floats = NDArray[np.float64]
Flags = NDArray[np.bool_]

FACES = (Face.BOTTOM, Face.TOP)

NO_TENSION = 1e6
"""A moment below this asks for no steel. [N·mm]"""


def check(case: Case) -> Iterator[Finding]:
    """Yield too little, too much, or too widely spaced steel.

    Parameters
    ----------
    case : Case
        The member.
    """
    for span in case.beam.spans:
        yield from _least(case, span)
    seen: set[tuple[object, ...]] = set()
    for station in stations(case):
        for finding in (*_most(case, station), *_widest(case, station)):
            key = (finding.rule, finding.place, finding.bars)
            if key not in seen:
                seen.add(key)
                yield finding


def _tense(case: Case, face: Face, xs: Floats, span: Span) -> Flags:
    """Return where the envelope puts a face in tension; without one, by what is usual."""
    if case.envelope is None:
        x0, x1 = case.beam.clear(span)
        inner = (x0 + 0.25 * (x1 - x0) < xs) & (xs < x1 - 0.25 * (x1 - x0))
        return inner if face is Face.BOTTOM else ~inner
    least, most = case.envelope.moments(xs)
    return np.asarray((most if face is Face.BOTTOM else -least) > NO_TENSION)


def _least(case: Case, span: Span) -> Iterator[Finding]:
    """Yield the place of least steel of each face where it is in tension (26.5.1.1 a)."""
    x0, x1 = case.beam.clear(span)
    fy = case.project.steel.main.fy
    for face in FACES:
        worst: tuple[float, float, float, Required] | None = None
        xs = np.linspace(x0 + 1, x1 - 1, max(3, int((x1 - x0) / 100)))
        for at in xs[_tense(case, face, xs, span)].tolist():
            have = sum(area(bar.dia) for bar in case.steel.at(at, face))
            d = case.steel.depth(at, face, span) or span.section.depth - 50
            need = is456.min_tension_steel(span.section.width, d, fy)
            if have < need.value * 0.999 and (worst is None or have - need.value < worst[0]):
                worst = have - need.value, at, have, need
        if worst is None:
            continue
        _, at, have, need = worst
        place = case.place(at)
        yield Finding(
            rule="minimum-steel",
            severity=Severity.UNSAFE,
            member=case.beam.mark,
            place=place,
            x=at,
            bars=tuple(sorted({bar.mark for bar in case.steel.at(at, face)})),
            found=round(have),
            required=round(need.value),
            unit="mm2",
            clause=need.clause,
            message=f"{place.name}: {face.value} steel {have:.0f} mm², {need.value:.0f} required "
            f"({need.because})",
            remedy="Run more bars through, or larger ones",
        )


def _most(case: Case, station: Station) -> Iterator[Finding]:
    """Yield a face with more steel than 4 % of the section, laps included (26.5.1.1 b)."""
    span = case.beam.span_at(station.x)
    need = is456.max_steel(span.section.width, span.section.depth)
    for face in FACES:
        bars = [bar for bar in station.bars if bar.face is face]
        have = sum(area(bar.dia) for bar in bars)
        if have <= need.value:
            continue
        place = case.place(station.x)
        yield Finding(
            rule="maximum-steel",
            severity=Severity.UNSAFE,
            member=case.beam.mark,
            place=place,
            x=station.x,
            bars=tuple(sorted({bar.mark for bar in bars})),
            found=round(have),
            required=round(need.value),
            unit="mm2",
            clause=need.clause,
            message=f"{place.name}: {face.value} steel {have:.0f} mm², {need.value:.0f} allowed "
            f"({need.because}, laps included)",
            remedy="Stagger the laps or enlarge the section",
        )


def _widest(case: Case, station: Station) -> Iterator[Finding]:
    """Yield tension bars further apart than Table 15 allows."""
    span = case.beam.span_at(station.x)
    x0, x1 = case.beam.clear(span)
    if not x0 <= station.x <= x1:
        return
    need = is456.max_clear_gap(case.project.steel.main.fy)
    for face in FACES:
        row = station.layer(face, 1)
        if len(row) < 2 or not _tense(case, face, np.array([station.x]), span)[0]:
            continue
        gap, a, b = _largest(station, row)
        if gap <= need.value + 0.1:
            continue
        place = case.place(station.x)
        yield Finding(
            rule="maximum-spacing",
            severity=Severity.UNSAFE,
            member=case.beam.mark,
            place=place,
            x=station.x,
            bars=tuple(sorted({a.mark, b.mark})),
            found=round(gap, 1),
            required=need.value,
            unit="mm",
            clause=need.clause,
            message=f"{place.name}: {face.value} bars in tension are {gap:.0f} mm apart, "
            f"{need.value:.0f} allowed ({need.because})",
            remedy="Use more, smaller bars",
        )


def _largest(station: Station, row: tuple[Rod, ...]) -> tuple[float, Rod, Rod]:
    """Return the widest clear gap of a layer and the bars beside it."""
    gaps = [
        (b.at(station.x)[0] - a.at(station.x)[0] - (a.dia + b.dia) / 2, a, b)
        for a, b in pairwise(row)
    ]
    return max(gaps, key=lambda item: item[0])
