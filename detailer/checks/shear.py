"""Do links and concrete carry shear and torsion along every span?"""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass

import numpy as np

from detailer.checks.case import Case
from detailer.findings import Finding
from detailer.model import Span
from detailer.rules import is456
from detailer.statics import Envelope
from detailer.strength.shear import ShearCapacity
from detailer.values import Face, Required, Severity

SLACK = 1.002
"""Shear counts as carried when it is greater by no more than this factor."""


@dataclass(frozen=True, slots=True, kw_only=True)
class Station:
    """What is asked of one place of a span, and what it carries."""

    span: Span
    x: float
    shear: float  # at x itself [N]
    critical: float  # at x, or at d from the face where x is closer [N]
    twist: float  # [N·mm]
    face: Face
    carried: ShearCapacity

    @property
    def asked(self) -> float:
        """Return the shear asked of links and concrete, torsion included. [N]"""
        return is456.torsion_shear(self.critical, self.twist, self.span.section.width)

    @property
    def crushing(self) -> float:
        """Return the shear asked of the web, torsion included. [N]"""
        return is456.torsion_shear(self.shear, self.twist, self.span.section.width)


def check(case: Case) -> Iterator[Finding]:
    """Yield the worst lack of shear strength of each stretch of a span.

    Parameters
    ----------
    case : Case
        The member.

    References
    ----------
    .. [1] IS 456:2000, 22.6.2.1: within d of a support's face the shear at d counts.
    """
    if case.envelope is None:
        return
    for span in case.beam.spans:
        along = _stations(case, span, case.envelope)
        yield from _stretches(case, along)
        worst = max(along, key=lambda s: s.crushing / s.carried.limit)
        if worst.crushing > SLACK * worst.carried.limit:
            yield _crushed(case, worst)


def _stations(case: Case, span: Span, envelope: Envelope) -> list[Station]:
    """Return places no more than 50 mm apart."""
    xs = envelope.sample(span, 50.0)
    x0, x1 = case.beam.clear(span)
    middle = (x0 + x1) / 2
    least, most = envelope.moments(xs)
    faces = [
        Face.BOTTOM if high >= -low else Face.TOP for low, high in zip(least, most, strict=True)
    ]
    d = {f: case.steel.depth(middle, f, span) or span.section.depth - 50 for f in set(faces)}
    at = xs.copy()
    for k, face in enumerate(faces):
        if span.left is not None:
            at[k] = max(at[k], min(x0 + d[face], middle))
        if span.right is not None:
            at[k] = min(at[k], max(x1 - d[face], middle))
    here, there = (np.maximum(-low, high) for low, high in map(envelope.shears, (xs, at)))
    twist = envelope.torsions(xs)
    return [
        Station(
            span=span,
            x=float(x),
            shear=float(here[k]),
            critical=float(there[k]),
            twist=float(twist[k]),
            face=faces[k],
            carried=case.shear.capacity(float(x), span, faces[k]),
        )
        for k, x in enumerate(xs)
    ]


def _stretches(case: Case, along: list[Station]) -> Iterator[Finding]:
    """Yield the worst station of each run of stations that lack strength."""
    worst: tuple[float, Finding] | None = None
    for station in along:
        ratio, finding = _carried(case, station)
        if finding is None:
            if worst is not None:
                yield worst[1]
            worst = None
        elif worst is None or ratio > worst[0]:
            worst = ratio, finding
    if worst is not None:
        yield worst[1]


def _carried(case: Case, at: Station) -> tuple[float, Finding | None]:
    """Return asked over carried, and the finding where that is too much."""
    carried = at.carried
    if at.twist > 0 and at.asked > carried.concrete:
        have, need = _torsion_links(case, at)
        found, required, unit = have, need.value, "mm2"
        rule, clause = "torsion-links", need.clause
        said = f"links of {found:.0f} mm² at {carried.spacing:.0f} mm, {required:.0f} needed"
    else:
        found, required, unit = carried.total / 1e3, at.asked / 1e3, "kN"
        rule, clause = "shear", "IS 456:2000, 40.4"
        said = (
            f"links at {carried.spacing:.0f} mm and concrete carry {found:.0f} kN, "
            f"{required:.0f} needed"
        )
    ratio = required / max(found, 1e-9)
    if ratio <= SLACK:
        return ratio, None
    place = case.place(at.x)
    marks = sorted({m for s in case.shear.sets if abs(s.x - at.x) < 400 for m in s.marks})
    return ratio, Finding(
        rule=rule,
        severity=Severity.UNSAFE,
        member=case.beam.mark,
        place=place,
        x=at.x,
        bars=tuple(marks),
        found=round(found, 1),
        required=round(required, 1),
        unit=unit,
        clause=clause,
        message=f"{place.name}: at {at.x:.0f} {said}",
        remedy="Set the links closer or lengthen their zone",
    )


def _torsion_links(case: Case, at: Station) -> tuple[float, Required]:
    """Return the area of links there is and is needed, for torsion and shear together.

    What the formula asks stands in the two legs of the outer, closed link; its floor may stand in
    all legs.
    """
    section, carried = at.span.section, at.carried
    corner = max((bar.dia for bar in case.steel.bars if bar.covers(at.x)), default=16.0)
    cover, link = case.beam.cover, max((s.dia for s in case.shear.sets), default=8.0)
    b1 = section.width - cover.left - cover.right - 2 * link - corner
    d1 = section.depth - cover.top - cover.bottom - 2 * link - corner
    fy = case.project.steel.links.fy
    floor = (at.asked - carried.concrete) / carried.d
    closed = is456.torsion_link_area(at.twist, at.shear, carried.spacing, b1, d1, fy, floor=0.0)
    all_legs = is456.torsion_link_area(0.0, 0.0, carried.spacing, b1, d1, fy, floor=floor)
    pairs = (carried.hoop, closed), (carried.asv, all_legs)
    return max(pairs, key=lambda pair: pair[1].value / max(pair[0], 1e-9))


def _crushed(case: Case, at: Station) -> Finding:
    """Return the finding of a web that no links can help."""
    place = case.place(at.x)
    return Finding(
        rule="shear-limit",
        severity=Severity.UNSAFE,
        member=case.beam.mark,
        place=place,
        x=at.x,
        bars=(),
        found=round(at.crushing / 1e3, 1),
        required=round(at.carried.limit / 1e3, 1),
        unit="kN",
        clause="IS 456:2000, 40.2.3",
        message=f"{place.name}: shear {at.crushing / 1e3:.0f} kN exceeds what any links allow, "
        f"{at.carried.limit / 1e3:.0f}",
        remedy="Enlarge the section or raise the grade of concrete",
    )
