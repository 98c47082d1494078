"""Are laps long enough, few enough at a section, and in the right place? IS 456:2000, 26.2.5."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass
from math import hypot

import numpy as np

from detailer.checks.case import Case
from detailer.findings import Finding, Place
from detailer.rules import is456
from detailer.strength.development import Rod
from detailer.strength.slices import Floats, area
from detailer.values import ContactKind, Face, Severity

SLACK = 1.0


@dataclass(frozen=True, slots=True)
class Lap:
    """Two real bars that pass force to each other from x0 to x1."""

    a: Rod
    b: Rod
    x0: float
    x1: float

    @property
    def middle(self) -> float:
        """Return the middle. [mm]"""
        return (self.x0 + self.x1) / 2

    @property
    def length(self) -> float:
        """Return the length. [mm]"""
        return self.x1 - self.x0

    @property
    def marks(self) -> tuple[str, ...]:
        """Return the marks of both bars."""
        return tuple(sorted({self.a.mark, self.b.mark}))


def laps(case: Case) -> tuple[Lap, ...]:
    """Return the laps that splice bars; bars that only pass in a support are left out.

    Parameters
    ----------
    case : Case
        The member.
    """
    found = []
    for contact in case.cage.contacts:
        if contact.kind is not ContactKind.LAP:
            continue
        window = contact.x0, contact.x1
        if _anchored_apart(case, *window, contact.a):
            continue
        x = (contact.x0 + contact.x1) / 2
        for a in case.steel.bars:
            for b in case.steel.bars:
                if a.id == contact.a and b.id == contact.b and _beside(a, b, x):
                    found.append(Lap(a, b, *window))
    return tuple(sorted(found, key=lambda p: (p.x0, p.a.id, p.a.placing, p.b.id)))


def _beside(a: Rod, b: Rod, x: float) -> bool:
    (ya, za), (yb, zb) = a.at(x), b.at(x)
    return hypot(ya - yb, za - zb) < (a.dia + b.dia) / 2 + 1


PASSING_USE = 0.3
"""Bars that overlap over a support pass each other, and are no splice, up to this use."""


def _anchored_apart(case: Case, x0: float, x1: float, bar: str) -> bool:
    """Return whether bars only pass each other over a support, each anchored by itself.

    Where their face is hardly in tension nothing is handed from one to the other; what they
    must resist there is the bending check's question.
    """
    if not any(x0 < s.right + 50 and x1 > s.left - 50 for s in case.beam.supports):
        return False
    face = case.cage.bar(bar).face
    if case.envelope is None:
        return face is Face.BOTTOM
    return _use(case, face, np.linspace(x0, x1, 5)) <= PASSING_USE


def _use(case: Case, face: Face, xs: Floats) -> float:
    """Return the greatest share of the resistance that the envelope uses over places."""
    if case.envelope is None:
        return 0.0
    sagging = face is Face.BOTTOM
    least, most = case.envelope.moments(xs)
    asked = np.maximum(most if sagging else -least, 0.0)
    full = np.array([r.moment for r in case.steel.profile(xs, sagging=sagging, full=True)])
    return float(np.max(asked / np.maximum(full, 1.0)))


def check(case: Case) -> Iterator[Finding]:
    """Yield what is wrong with laps.

    Parameters
    ----------
    case : Case
        The member.
    """
    found = laps(case)
    for lap in found:
        yield from _size(case, lap)
        yield from _length(case, lap, found)
        yield from _where(case, lap)
    yield from _share(case, found)


def _base(case: Case, lap: Lap) -> Place:
    return case.place(lap.middle)


def _size(case: Case, lap: Lap) -> Iterator[Finding]:
    dia = max(lap.a.dia, lap.b.dia)
    if dia <= is456.LAP_MAX_DIA:
        return
    place = _base(case, lap)
    yield Finding(
        rule="lap-size",
        severity=Severity.UNSAFE,
        member=case.beam.mark,
        place=place,
        x=lap.middle,
        bars=lap.marks,
        found=dia,
        required=is456.LAP_MAX_DIA,
        unit="mm",
        clause="IS 456:2000, 26.2.5.1 a, Amendment 3",
        message=f"{place.name}: T{dia:.0f} is lapped, {is456.LAP_MAX_DIA:.0f} is the limit",
        remedy="Couple or weld the bars, or use smaller ones",
    )


def _length(case: Case, lap: Lap, others: tuple[Lap, ...]) -> Iterator[Finding]:
    steel = case.project.steel.main
    bond = is456.bond_stress(case.project.concrete.fck, deformed=steel.deformed)
    dia = min(lap.a.dia, lap.b.dia)
    cover = case.beam.cover
    link = min((s.dia for s in case.shear.sets), default=0.0)
    face_cover = cover.top if lap.a.face is Face.TOP else cover.bottom
    y, _ = lap.a.at(lap.middle)
    half = case.beam.span_at(lap.middle).section.width / 2
    side = min(half - abs(y) - dia / 2, max(cover.left, cover.right) + link + half)
    corner = half - abs(y) - dia / 2 < max(cover.left, cover.right) + link + dia
    gap = min(
        (
            abs(o.a.at(lap.middle)[0] - y) - 2 * dia
            for o in others
            if o is not lap and o.a.face is lap.a.face and min(o.x1, lap.x1) > max(o.x0, lap.x0)
        ),
        default=float("inf"),
    )
    factor = is456.lap_factor(
        top_cast=lap.a.face is Face.TOP,
        cover_least=min(face_cover + link, side) if corner else face_cover + link,
        corner=corner,
        gap_adjacent=gap,
        dia=dia,
    )
    need = is456.lap_length(dia, 0.87 * steel.fy, bond, factor.value)
    if lap.length >= need.value - SLACK:
        return
    place = _base(case, lap)
    yield Finding(
        rule="lap-length",
        severity=Severity.UNSAFE,
        member=case.beam.mark,
        place=place,
        x=lap.middle,
        bars=lap.marks,
        found=round(lap.length),
        required=round(need.value),
        unit="mm",
        clause=need.clause,
        message=f"{place.name}: {' and '.join(lap.marks)} lap by {lap.length:.0f} mm, "
        f"{need.value:.0f} needed ({need.because}, {factor.because})",
        remedy=f"Lengthen the lap by {need.value - lap.length:.0f} mm",
    )


def _where(case: Case, lap: Lap) -> Iterator[Finding]:
    """Yield laps in a joint, or where more than half the resistance is used."""
    place = _base(case, lap)
    joint = next(
        (s for s in case.beam.supports if lap.x0 < s.right - 1 and lap.x1 > s.left + 1), None
    )
    if joint is not None:
        yield Finding(
            rule="lap-in-joint",
            severity=Severity.UNSAFE,
            member=case.beam.mark,
            place=case.place(joint.x),
            x=lap.middle,
            bars=lap.marks,
            found=round(min(lap.x1, joint.right) - max(lap.x0, joint.left)),
            required=0,
            unit="mm",
            clause="IS 456:2000, 26.2.5",
            message=f"support {joint.name}: {' and '.join(lap.marks)} lap within the support",
            remedy="Move the lap to where the moment is small",
        )
        return
    if case.envelope is None:
        return
    use = _use(case, lap.a.face, np.linspace(lap.x0, lap.x1, 9))
    if use <= is456.LAP_USE_LIMIT + 0.005:
        return
    yield Finding(
        rule="lap-place",
        severity=Severity.COSTLY if use < 0.8 else Severity.UNSAFE,
        member=case.beam.mark,
        place=place,
        x=lap.middle,
        bars=lap.marks,
        found=round(100 * use),
        required=50,
        unit="%",
        clause="IS 456:2000, 26.2.5",
        message=f"{place.name}: {' and '.join(lap.marks)} lap where {100 * use:.0f} % of the "
        "resistance is used, 50 recommended",
        remedy="Move the lap to where the moment is small, or lengthen it",
    )


def _share(case: Case, found: tuple[Lap, ...]) -> Iterator[Finding]:
    """Yield sections where more than half the steel of a face is lapped."""
    done: set[tuple[str, int]] = set()
    for lap in found:
        reach = is456.lap_stagger(lap.length).value
        group = [
            o
            for o in found
            if o.a.face is lap.a.face and abs(o.middle - lap.middle) < reach - SLACK
        ]
        total = sum(area(bar.dia) for bar in case.steel.at(lap.middle, lap.a.face))
        total -= sum(
            area(o.b.dia) for o in group if o.b.covers(lap.middle) and o.a.covers(lap.middle)
        )
        lapped = sum(min(area(o.a.dia), area(o.b.dia)) for o in group)
        key = (lap.a.face.value, round(lap.middle // 500))
        if total <= 0 or lapped <= is456.lap_share().value * total * 1.01 or key in done:
            continue
        done.add(key)
        place = _base(case, lap)
        yield Finding(
            rule="lap-share",
            severity=Severity.UNSAFE,
            member=case.beam.mark,
            place=place,
            x=lap.middle,
            bars=tuple(sorted({mark for o in group for mark in o.marks})),
            found=round(100 * lapped / total),
            required=50,
            unit="%",
            clause="IS 456:2000, 26.2.5 and 26.2.5.1 b",
            message=f"{place.name}: {100 * lapped / total:.0f} % of the {lap.a.face.value} steel "
            f"is lapped within 1.3 lap lengths, 50 allowed",
            remedy=f"Stagger the laps by {reach:.0f} mm",
        )
