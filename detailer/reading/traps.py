"""Slips of unit, sign and order that a number alone does not show."""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from dataclasses import dataclass
from itertools import pairwise

from detailer.model import Beam, HandResults, Loads, Span, Station, Stations
from detailer.reading.table import Table
from detailer.values import Face

LEAST, MOST, BEYOND = 0.2, 8.0, 1000.0
"""M/(b d²) of a beam is asked about outside the first two, refused beyond the third. [N/mm²]"""

LEAST_STEEL, MOST_STEEL = 0.1, 4.0
"""As/(b d) of a face is asked about outside these. [%]"""

TOLERANCE = 0.05
"""How well ΔM and V·Δx must agree."""

UNEVEN = 1.5
"""Ratio of neighbouring spans above which the simplified rules are asked about."""


@dataclass(frozen=True, slots=True)
class Place:
    """Greatest and least moment somewhere along the line. [N·mm]"""

    most: float
    least: float


def ask(table: Table, beam: Beam) -> None:
    """Doubt or refuse what cannot be meant, of a beam that is otherwise read."""
    _deep(table, beam)
    _steel(table, beam)
    if all(span.results is None for span in beam.spans):
        _simplified(table, beam)
        return
    _size(table, beam)
    _signs(table, beam)
    for span in beam.spans:
        _slope(table, span)
    if any(isinstance(span.results, Stations) for span in beam.spans):
        _faces(table, beam)


def _deep(table: Table, beam: Beam) -> None:
    """Refuse deep beams (IS 456, 29.1)."""
    for span in beam.spans:
        if span.left is None or span.right is None:
            continue
        left, right = beam.clear(span)
        effective = min(span.length, 1.15 * (right - left))
        goes_on = beam.continuous(span.left) or beam.continuous(span.right)
        limit = 2.5 if goes_on else 2.0
        ratio = effective / span.section.depth
        if ratio < limit:
            table.log.refuse(
                table.at("span", span.number - 1),
                f"l/D = {ratio:.2f} is below {limit:g}: deep beams are not built yet",
                "Detail this beam by hand (IS 456, 29)",
            )


def _steel(table: Table, beam: Beam) -> None:
    """Doubt areas of steel that no section has."""
    for span in beam.spans:
        d = 0.9 * span.section.depth
        for face, word in ((Face.BOTTOM, "bottom"), (Face.TOP, "top")):
            area = sum(
                group.count * 0.7854 * group.dia**2
                for bars in beam.bars
                if bars.face is face
                and bars.spans
                and bars.spans[0] <= span.number <= bars.spans[1]
                for group in bars.groups
            )
            share = 100 * area / (span.section.width * d)
            if not LEAST_STEEL <= share <= MOST_STEEL:
                table.log.doubt(
                    table.at("span", span.number - 1),
                    f"{word} bars of span {span.number} are {share:.2f} % of b d: "
                    "are sizes and section in mm?",
                )


def _simplified(table: Table, beam: Beam) -> None:
    lengths = [s.length for s in beam.spans if not s.overhang]
    uneven = any(max(a, b) > UNEVEN * min(a, b) for a, b in pairwise(lengths))
    if uneven or len(lengths) < len(beam.spans):
        table.log.doubt(
            table.at("span"),
            "no results, and spans too uneven (or an overhang) for the simplified rules",
        )


def at(span: Span, share: float) -> Place | None:
    """Return the moments at a share of a span; None where only loads are known."""
    results = span.results
    if isinstance(results, HandResults):
        value = results.moment[{0.0: 0, 0.5: 1, 1.0: 2}[share]]
        return Place(value, value)
    if isinstance(results, Stations):
        x = share * span.length
        near = min(results.rows, key=lambda row: abs(row.x - x))
        return Place(near.m_max, near.m_min)
    return None


def peak(span: Span) -> float:
    """Return the largest moment of a span, roughly where only loads are known. [N·mm]"""
    results = span.results
    if isinstance(results, HandResults):
        return max(abs(m) for m in results.moment)
    if isinstance(results, Stations):
        return max((max(abs(r.m_max), abs(r.m_min)) for r in results.rows), default=0.0)
    if isinstance(results, Loads):
        share = 2 if span.overhang else 8
        points = sum((p.dead + p.imposed) * span.length / 4 for p in results.points)
        return 1.5 * ((results.dead + results.imposed) * span.length**2 / share + points)
    return 0.0


def _where(table: Table, span: Span) -> tuple[str | int, ...]:
    if isinstance(span.results, Stations):
        return table.at("results")
    key = "moment" if isinstance(span.results, HandResults) else "dead"
    return table.at("span", span.number - 1, key)


def _size(table: Table, beam: Beam) -> None:
    """Doubt moments that the section cannot be meant for: units."""
    ratios = [(peak(s) / (s.section.width * (0.9 * s.section.depth) ** 2), s) for s in beam.spans]
    ratio, span = max(ratios, key=lambda pair: pair[0])
    moment = f"{peak(span) / 1e6:.4g} kN m in span {span.number}: M/(b d²) = {ratio:.3g} N/mm²"
    if ratio >= BEYOND:
        table.log.refuse(_where(table, span), moment, "Compare the unit: kN m are read")
    elif not LEAST <= ratio <= MOST:
        table.log.doubt(_where(table, span), f"{moment} is outside {LEAST} to {MOST:g}: units?")


def _signs(table: Table, beam: Beam) -> None:
    """Ask when signs are lost or turned over; sagging is positive."""
    over = list(_over(beam))
    mid = [p for s in beam.spans if not s.overhang and (p := at(s, 0.5)) is not None]
    if not mid:
        return
    path = _where(table, beam.spans[0])
    if over and all(p.least >= 0 for p in over + mid) and any(p.most > 0 for p in over):
        table.log.refuse(
            path,
            "no moment is hogging, not even over the inner supports: signs are lost",
            "Write sagging positive and hogging negative",
        )
    elif sum(p.most + p.least for p in mid) < 0 and all(p.least >= 0 for p in over):
        table.log.doubt(
            path, "supports sag and midspans hog: are all signs turned over? Sagging is positive"
        )


def _over(beam: Beam) -> Iterator[Place]:
    """Yield the moments over supports that the beam goes on past."""
    for n in range(len(beam.supports)):
        left, right = beam.spans_of(n)
        if left is not None and right is not None:
            yield from (p for p in (at(left, 1.0), at(right, 0.0)) if p is not None)


def _slope(table: Table, span: Span) -> None:
    """Doubt shears that are not the slope of the moments."""
    results = span.results
    if isinstance(results, HandResults):
        a, m, b = results.moment
        slopes = (4 * m - 3 * a - b) / span.length, (3 * b + a - 4 * m) / span.length
        room = TOLERANCE * max(abs(v) for v in (*slopes, *results.shear))
        if any(abs(s - v) > room for s, v in zip(slopes, results.shear, strict=True)):
            table.log.doubt(
                table.at("span", span.number - 1, "shear"),
                f"shears {results.shear[0] / 1e3:.4g}, {results.shear[1] / 1e3:.4g} kN are not the "
                f"slopes {slopes[0] / 1e3:.4g}, {slopes[1] / 1e3:.4g} of the moments",
            )
    elif isinstance(results, Stations):
        broken = _broken(results.rows)
        if broken > 0.25 * len(results.rows):
            table.log.doubt(
                table.at("results"),
                f"span {span.number}: V is not the slope of M at {broken} of "
                f"{len(results.rows)} stations: sign or unit?",
            )


def _broken(rows: Sequence[Station]) -> int:
    """Count steps whose change of the enveloped moment no shear within its envelope makes."""
    room = TOLERANCE * max(max(abs(r.v_max), abs(r.v_min)) for r in rows)
    count = 0
    for a, b in pairwise(rows):
        step = b.x - a.x
        low, high = (a.v_min + b.v_min) / 2 - room, (a.v_max + b.v_max) / 2 + room
        slopes = ((b.m_max - a.m_max) / step, (b.m_min - a.m_min) / step)
        count += not all(low <= slope <= high for slope in slopes)
    return count


def _faces(table: Table, beam: Beam) -> None:
    """Say that results at support faces are interpolated where no station stands there."""
    for span in beam.spans:
        if not isinstance(span.results, Stations):
            continue
        for face in beam.clear(span):
            x = face - span.x0
            if min(abs(row.x - x) for row in span.results.rows) > 1:
                table.log.assume(
                    beam.mark, "Results at support faces interpolated between stations."
                )
                return
