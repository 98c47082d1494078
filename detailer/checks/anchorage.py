"""Are bars anchored at supports? IS 456:2000, 26.2.3.3, 26.2.3.4; a built-in end without moment."""

from __future__ import annotations

from collections.abc import Iterator

import numpy as np

from detailer.checks.case import Case
from detailer.findings import Finding
from detailer.model import Span, Support
from detailer.rules import is456
from detailer.statics import Envelope
from detailer.strength.development import Rod, full_development
from detailer.strength.slices import area
from detailer.values import Face, Severity

SLACK = 1.0
"""Lengths that lack no more than this are kept. [mm]"""


def check(case: Case) -> Iterator[Finding]:
    """Yield what is not anchored as the standard asks, support by support.

    Parameters
    ----------
    case : Case
        The member.
    """
    for span in case.beam.spans:
        for side, index in ((-1, span.left), (1, span.right)):
            if index is None or span.overhang:
                continue
            support = case.beam.supports[index]
            yield from _bottom_into_support(case, span, side, index)
            if case.envelope is not None:
                yield from _bar_size(case, span, side, index, case.envelope)
                yield from _past_inflection(case, span, side, index, case.envelope)
            if not case.beam.continuous(index) and support.monolithic:
                yield from _top_at_end(case, span, side, support)
                if case.envelope is not None:
                    yield from _no_moment(case, span, side, support, case.envelope)
    if case.envelope is not None:
        for span in case.beam.spans:
            if span.overhang:
                yield from _back_span(case, span, case.envelope)


def _face_x(case: Case, span: Span, side: int) -> float:
    return case.beam.clear(span)[0 if side < 0 else 1]


def _past(bar: Rod, face: float, side: int) -> float:
    """Return the anchorage of a bar past a face, bends included; negative if it stops short."""
    straight = (bar.x1 - face) if side > 0 else (face - bar.x0)
    return straight + bar.worth[1 if side > 0 else 0]


def _middle(case: Case, span: Span) -> float:
    if case.envelope is not None:
        return case.envelope.peak_sagging(span)[0]
    x0, x1 = case.beam.clear(span)
    return (x0 + x1) / 2


def _marks(bars: tuple[Rod, ...] | list[Rod]) -> tuple[str, ...]:
    return tuple(sorted({bar.mark for bar in bars}))


def _bottom_into_support(case: Case, span: Span, side: int, index: int) -> Iterator[Finding]:
    """Yield a support that too little bottom steel enters (26.2.3.3 a and b)."""
    middle = _middle(case, span)
    if case.envelope is not None and case.envelope.moment(middle)[1] <= 0:
        return
    inside = case.steel.at(middle, Face.BOTTOM)
    total = sum(area(bar.dia) for bar in inside)
    if total == 0:
        return
    face = _face_x(case, span, side)
    share = is456.positive_share(case.beam.continuous(index))
    full = {bar.dia: full_development(case.project, bar.dia) for bar in inside}
    lateral = case.project.lateral

    def need(bar: Rod) -> float:
        ld = full[bar.dia]
        return ld if lateral else is456.positive_embedment(ld).value

    ranked = sorted(inside, key=lambda bar: _past(bar, face, side) - need(bar), reverse=True)
    kept = [bar for bar in ranked if _past(bar, face, side) >= need(bar) - SLACK]
    if sum(area(bar.dia) for bar in kept) >= share.value * total * 0.999:
        return
    critical, entered = ranked[0], 0.0
    for bar in ranked:
        critical = bar
        entered += area(bar.dia)
        if entered >= share.value * total * 0.999:
            break
    place = case.place(case.beam.supports[index].x)
    clause = "IS 456:2000, 26.2.3.3 b" if lateral else share.clause
    found = _past(critical, face, side)
    yield Finding(
        rule="bottom-into-support",
        severity=Severity.UNSAFE,
        member=case.beam.mark,
        place=place,
        x=face,
        bars=_marks([bar for bar in inside if bar not in kept]),
        found=round(found),
        required=round(need(critical)),
        unit="mm",
        clause=clause,
        message=f"{place.name}: bottom bars of span {span.number} enter the support by "
        f"{found:.0f} mm, {need(critical):.0f} needed for "
        + ("the design stress at the face" if lateral else share.because),
        remedy="Run them further in, bend them up, or widen the bearing",
        site="push the cage to one side so that one end looks long enough",
    )


def _bar_size(
    case: Case, span: Span, side: int, index: int, envelope: Envelope
) -> Iterator[Finding]:
    """Yield bottom bars too large for the bond near a support (26.2.3.3 c)."""
    support = case.beam.supports[index]
    simple = not case.beam.continuous(index)
    x = support.x if simple else _inflection(envelope, span, side)
    if x is None:
        return
    there = _face_x(case, span, side) if simple else x
    bars = list(case.steel.at(there - side, Face.BOTTOM))
    if not bars:
        return
    m1 = case.steel.profile(np.array([there - side]), sagging=True, full=True, span=span)[0]
    inner = support.x - side * 1.0 if simple else x
    least, most = envelope.shear(inner)
    shear = max(-least, most)
    if shear <= 0 or m1.moment <= 0:
        return
    for bar in _one_a_mark(bars):
        ld = full_development(case.project, bar.dia)
        l0 = _past(bar, support.x if simple else x, side)
        if not simple:
            l0 = min(l0, is456.inflection_anchorage(m1.d, bar.dia).value)
        limit = is456.support_bond_length(m1.moment, shear, l0, confined=simple)
        if ld <= limit.value + SLACK:
            continue
        place = case.place(support.x)
        yield Finding(
            rule="bar-size",
            severity=Severity.UNSAFE,
            member=case.beam.mark,
            place=place,
            x=x,
            bars=(bar.mark,),
            found=round(ld),
            required=round(limit.value),
            unit="mm",
            clause=limit.clause,
            message=f"{place.name}: Ld {ld:.0f} of T{bar.dia:.0f} exceeds {limit.because} "
            f"= {limit.value:.0f} mm",
            remedy="Use smaller bars, or more anchorage beyond the support's centre",
        )


def _one_a_mark(bars: list[Rod]) -> list[Rod]:
    seen: dict[str, Rod] = {}
    for bar in bars:
        seen.setdefault(bar.mark, bar)
    return [seen[mark] for mark in sorted(seen)]


def _inflection(envelope: Envelope, span: Span, side: int) -> float | None:
    """Return the point of inflection of the sagging moment next to a support."""
    points = envelope.inflections(span, hogging=False)
    if not points:
        return None
    return min(points) if side < 0 else max(points)


def _past_inflection(
    case: Case, span: Span, side: int, index: int, envelope: Envelope
) -> Iterator[Finding]:
    """Yield a support whose top steel has no third past the inflection (26.2.3.4)."""
    face = _face_x(case, span, side)
    if envelope.moment(face)[0] >= -1e6:
        return
    at_face = case.steel.at(face, Face.TOP)
    total = sum(area(bar.dia) for bar in at_face)
    if total == 0:
        return
    xs = envelope.sample(span, 10.0)
    xs = xs if side < 0 else xs[::-1]
    hogging = -envelope.moments(xs)[0] > 0
    gone = np.nonzero(~hogging)[0]
    x0, x1 = case.beam.clear(span)
    if len(gone) == 0:
        beyond = _face_x(case, span, -side)
    else:
        zero = float(xs[gone[0]])
        d = case.steel.depth(face, Face.TOP, span)
        ext = is456.negative_extension(d, max(bar.dia for bar in at_face), x1 - x0)
        beyond = zero - side * ext.value
    beyond = min(max(beyond, x0), x1)

    def runs(bar: Rod) -> bool:
        reach = bar.tips[1] >= beyond - 6 if side < 0 else bar.tips[0] <= beyond + 6
        return reach or _goes_on(case, bar, side)

    third = sum(area(bar.dia) for bar in at_face if runs(bar))
    share = is456.negative_share()
    if third >= share.value * total * 0.999:
        return
    support = case.beam.supports[index]
    place = case.place(support.x)
    yield Finding(
        rule="third-past-inflection",
        severity=Severity.UNSAFE,
        member=case.beam.mark,
        place=place,
        x=beyond,
        bars=_marks([bar for bar in at_face if not runs(bar)]),
        found=round(third),
        required=round(share.value * total),
        unit="mm2",
        clause=share.clause,
        message=f"{place.name}: {third:.0f} mm² of the top steel goes past the inflection in "
        f"span {span.number}, {share.value * total:.0f} needed (a third)",
        remedy=f"Run a third of it {abs(beyond - face):.0f} mm past the face",
    )


def _goes_on(case: Case, bar: Rod, side: int) -> bool:
    """Return whether another bar laps this one where it ends within the span."""
    tip = bar.tips[1] if side < 0 else bar.tips[0]
    return any(
        c.kind.value == "lap" and bar.id in (c.a, c.b) and c.x0 - 5 <= tip <= c.x1 + 5
        for c in case.cage.contacts
    )


def _top_at_end(case: Case, span: Span, side: int, support: Support) -> Iterator[Finding]:
    """Yield top bars that stop in an end column without being anchored."""
    face = _face_x(case, span, side)
    bars = case.steel.at(face, Face.TOP)
    for bar in _one_a_mark(list(bars)):
        ld = full_development(case.project, bar.dia)
        past = _past(bar, face, side)
        if past >= ld / 3 - SLACK or bar.worth[1 if side > 0 else 0] > 0:
            continue
        place = case.place(support.x)
        yield Finding(
            rule="top-anchorage",
            severity=Severity.COSTLY if case.envelope is not None else Severity.UNSAFE,
            member=case.beam.mark,
            place=place,
            x=face,
            bars=(bar.mark,),
            found=round(past),
            required=round(ld),
            unit="mm",
            clause="IS 456:2000, 26.2.1",
            message=f"{place.name}: top bar {bar.mark} stops straight {past:.0f} mm into the "
            f"column, {ld:.0f} mm develop it",
            remedy="Bend it down behind the column bars",
            site="leave the bars straight because they came short",
        )


def _no_moment(
    case: Case, span: Span, side: int, support: Support, envelope: Envelope
) -> Iterator[Finding]:
    """Yield an end cast with its column for which no hogging moment is given."""
    face = _face_x(case, span, side)
    given = -envelope.moment(face)[0]
    _, peak = envelope.peak_sagging(span)
    expected = peak / 3
    if given >= 0.1 * expected or expected <= 0:
        return
    place = case.place(support.x)
    yield Finding(
        rule="end-moment",
        severity=Severity.UNCLEAR,
        member=case.beam.mark,
        place=place,
        x=support.x,
        bars=_marks(case.steel.at(face, Face.TOP)),
        found=round(max(given, 0.0) / 1e6, 1),
        required=round(expected / 1e6, 1),
        unit="kN m",
        clause="IS 456:2000, 22.5.2 (w l/24, for comparison)",
        message=f"{place.name}: beam and column are cast as one, but no end moment is given; "
        f"about {expected / 1e6:.0f} kN m is usual",
        remedy="Ask for the end moment, or confirm that the top bars drawn are enough",
    )


def _back_span(case: Case, span: Span, envelope: Envelope) -> Iterator[Finding]:
    """Yield an overhang whose main steel lies on the wrong face (fault 33)."""
    x0, x1 = case.beam.clear(span)
    root = x1 - 0.4 * (x1 - x0) if span.left is None else x0 + 0.4 * (x1 - x0)
    least, most = envelope.moment(root)
    if -least <= 1e6 or most > 0:
        return
    top = sum(area(b.dia) for b in case.steel.at(root, Face.TOP))
    bottom = sum(area(b.dia) for b in case.steel.at(root, Face.BOTTOM))
    if top >= bottom:
        return
    place = case.place(root)
    yield Finding(
        rule="tension-face",
        severity=Severity.UNSAFE,
        member=case.beam.mark,
        place=place,
        x=root,
        bars=_marks(case.steel.at(root, Face.BOTTOM)),
        found=round(top),
        required=round(bottom),
        unit="mm2",
        clause="IS 456:2000, 38.1",
        message=f"{place.name}: the overhang hogs all along, but its main bars are at the bottom "
        f"({bottom:.0f} mm² against {top:.0f} at the top)",
        remedy="Put the main bars in the top",
    )
