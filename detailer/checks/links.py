"""Do links start, repeat and close as they should? IS 456:2000, 26.5.1.5 to 26.5.1.7."""

from __future__ import annotations

from collections.abc import Iterator
from itertools import pairwise

import numpy as np

from detailer.checks.case import Case
from detailer.findings import Finding
from detailer.model import Span
from detailer.rules import is456
from detailer.strength.shear import LinkSet
from detailer.values import Face, Required, Role, Severity

FINGERS = 60.0
"""Less clear space between links of four legs stops hand and needle (common practice). [mm]"""

LEGS_APART = 450.0
"""Legs of links across a wide beam stand no further apart (common practice). [mm]"""


def check(case: Case) -> Iterator[Finding]:
    """Yield what is wrong with the links of each span.

    Parameters
    ----------
    case : Case
        The member.
    """
    for span in case.beam.spans:
        x0, x1 = case.beam.clear(span)
        sets = [s for s in case.shear.sets if x0 - 1 <= s.x <= x1 + 1]
        if not sets:
            yield _finding(
                case,
                (x0 + x1) / 2,
                (),
                x1 - x0,
                300.0,
                "mm",
                "link-spacing",
                Severity.UNSAFE,
                "IS 456:2000, 26.5.1.5",
                "no links in the span",
            )
            continue
        yield from _first(case, span, sets)
        yield from _spacing(case, span, sets)
        yield from _closed(case, span, sets)
        yield from _legs(case, span, sets)
        yield from _holding(case, span, sets)
        yield from _count(case, span, sets)


def _finding(
    case: Case,
    x: float,
    bars: tuple[str, ...],
    found: float,
    required: float,
    unit: str,
    rule: str,
    severity: Severity,
    clause: str,
    words: str,
    remedy: str = "Set the links closer",
) -> Finding:
    place = case.place(x)
    return Finding(
        rule=rule,
        severity=severity,
        member=case.beam.mark,
        place=place,
        x=x,
        bars=bars,
        found=round(found, 1),
        required=round(required, 1),
        unit=unit,
        clause=clause,
        message=f"{place.name}: {words}",
        remedy=remedy,
        site="tie the links where there is room" if severity is Severity.UNBUILDABLE else "",
    )


def _first(case: Case, span: Span, sets: list[LinkSet]) -> Iterator[Finding]:
    """Yield a first link too far from the face of its support, or within the support."""
    limit = max(50.0, case.project.practice.first_link)
    x0, x1 = case.beam.clear(span)
    for support, face, link in ((span.left, x0, sets[0]), (span.right, x1, sets[-1])):
        away = abs(link.x - face)
        if support is None or away <= limit + link.dia:
            continue
        at = case.beam.supports[support]
        yield _finding(
            case,
            at.x,
            link.marks,
            away,
            limit,
            "mm",
            "first-link",
            Severity.COSTLY,
            "common practice, no source",
            f"the first link of span {span.number} stands {away:.0f} mm from the face, "
            f"{limit:.0f} at most",
            "Start the links at 50 mm from the face",
        )


def _spacing(case: Case, span: Span, sets: list[LinkSet]) -> Iterator[Finding]:
    """Yield the widest space of each run of links too far apart, or too light for it."""
    fy = case.project.steel.links.fy
    wide: tuple[float, float, Required, LinkSet] | None = None
    light: tuple[float, float, Required, LinkSet] | None = None
    for a, b in pairwise(sets):
        x, s = (a.x + b.x) / 2, b.x - a.x
        depths = [d for f in (Face.TOP, Face.BOTTOM) if (d := case.steel.depth(x, f, span)) > 0]
        d = min(depths, default=span.section.depth - 50)
        most = is456.max_link_spacing(d)
        if s > most.value + 1 and (wide is None or s - most.value > wide[0]):
            wide = s - most.value, x, most, a
        least = is456.min_link_area(span.section.width, s, fy)
        lack = least.value - min(a.asv, b.asv)
        if lack > 0.002 * least.value and (light is None or lack > light[0]):
            light = lack, x, least, a
    if wide is not None:
        over, x, most, link = wide
        yield _finding(
            case,
            x,
            link.marks,
            most.value + over,
            most.value,
            "mm",
            "link-spacing",
            Severity.UNSAFE,
            most.clause,
            f"links stand {most.value + over:.0f} mm apart at {x:.0f}, {most.value:.0f} allowed "
            f"({most.because})",
        )
    if light is not None:
        lack, x, least, link = light
        yield _finding(
            case,
            x,
            link.marks,
            least.value - lack,
            least.value,
            "mm2",
            "link-area",
            Severity.UNSAFE,
            least.clause,
            f"links have {least.value - lack:.0f} mm² at {x:.0f}, {least.value:.0f} required "
            f"({least.because})",
            "Set the links closer or use larger ones",
        )


def _closed(case: Case, span: Span, sets: list[LinkSet]) -> Iterator[Finding]:
    """Yield links that must resist torsion and are open or too far apart (26.5.1.7 a)."""
    envelope = case.envelope
    if envelope is None:
        return
    cover, width, depth = case.beam.cover, span.section.width, span.section.depth
    for a, b in pairwise(sets):
        x = (a.x + b.x) / 2
        if envelope.torsion(x) <= 0:
            continue
        if not _is_closed(case, a):
            yield _finding(
                case,
                x,
                a.marks,
                0.0,
                1.0,
                "",
                "link-open",
                Severity.UNSAFE,
                "IS 456:2000, 26.5.1.7 a",
                "an open link stands where the beam is twisted",
                "Close the links with 135° hooks",
            )
            return
        need = is456.torsion_link_spacing(
            width - cover.left - cover.right - a.dia, depth - cover.top - cover.bottom - a.dia
        )
        if b.x - a.x > need.value + 1:
            yield _finding(
                case,
                x,
                a.marks,
                b.x - a.x,
                need.value,
                "mm",
                "torsion-spacing",
                Severity.UNSAFE,
                need.clause,
                f"links that resist torsion stand {b.x - a.x:.0f} mm apart, {need.value:.0f} "
                f"allowed ({need.because})",
            )
            return


def _is_closed(case: Case, link: LinkSet) -> bool:
    """Return whether the outer link of a set goes all round with both ends hooked."""
    bars = [b for b in case.cage.bars if b.role is Role.LINK and b.name in link.marks]
    return any(len(bar.corners) >= 7 for bar in bars)


def _legs(case: Case, span: Span, sets: list[LinkSet]) -> Iterator[Finding]:
    """Yield legs too far apart across, and links of four legs too close along the beam."""
    cover = case.beam.cover
    x0, x1 = case.beam.clear(span)
    middle = min(sets, key=lambda s: abs(s.x - (x0 + x1) / 2))
    inside = span.section.width - cover.left - cover.right - middle.dia
    apart = inside / max(middle.legs - 1, 1)
    if apart > LEGS_APART:
        yield _finding(
            case,
            middle.x,
            middle.marks,
            apart,
            LEGS_APART,
            "mm",
            "leg-spacing",
            Severity.COSTLY,
            "common practice, no source",
            f"legs of the links stand {apart:.0f} mm apart across the beam, {LEGS_APART:.0f} usual",
            "Use links of four legs",
        )
    tight = [(b.x - a.x - a.dia, a) for a, b in pairwise(sets) if min(a.legs, b.legs) >= 4]
    if tight:
        clear, link = min(tight, key=lambda t: (t[0], t[1].x))
        if clear < FINGERS:
            yield _finding(
                case,
                link.x,
                link.marks,
                clear,
                FINGERS,
                "mm",
                "link-clear",
                Severity.COSTLY,
                "common practice, no source",
                f"links of {link.legs} legs leave {clear:.0f} mm between them, {FINGERS:.0f} lets "
                "fingers and a needle in",
                "Use larger links further apart",
            )


def _holding(case: Case, span: Span, sets: list[LinkSet]) -> Iterator[Finding]:
    """Yield links too far apart to hold compression bars that the resistance counts (26.5.1.2)."""
    if case.envelope is None:
        return
    xs = case.envelope.sample(span, 100.0)
    least, most = case.envelope.moments(xs)
    for sagging, asked in ((True, np.maximum(most, 0)), (False, np.maximum(-least, 0))):
        face = Face.TOP if sagging else Face.BOTTOM
        others = tuple((b.id, b.placing) for b in case.steel.bars if b.face is face)
        alone = case.steel.profile(xs, sagging=sagging, span=span, without=others)
        for x, moment, resists in zip(xs, asked, alone, strict=True):
            if moment <= resists.moment * 1.002:
                continue
            pressed = case.steel.at(float(x), face)
            if not pressed:
                continue
            _, s = case.shear.around(float(x), span)
            need = is456.compression_link_spacing(
                span.section.width, min(bar.dia for bar in pressed)
            )
            if s > need.value + 1:
                marks = tuple(sorted({bar.mark for bar in pressed}))
                yield _finding(
                    case,
                    float(x),
                    marks,
                    s,
                    need.value,
                    "mm",
                    "compression-held",
                    Severity.UNSAFE,
                    need.clause,
                    f"compression bars {', '.join(marks)} are counted, but links stand {s:.0f} mm "
                    f"apart, {need.value:.0f} allowed ({need.because})",
                )
                return


def _count(case: Case, span: Span, sets: list[LinkSet]) -> Iterator[Finding]:
    """Yield zones with fewer links than their spacing asks, boundary links counted once."""
    chosen = next((c for c in case.beam.links if c.span == span.number), None)
    if chosen is None:
        return
    x0, x1 = case.beam.clear(span)
    rest = (x1 - x0) - sum(zone.length or 0.0 for zone in chosen.zones)
    at = x0
    for zone in chosen.zones:
        end = at + (zone.length if zone.length is not None else rest)
        inside = [s.x for s in sets if at - 1 <= s.x <= end + 1]
        spaces = [b - a for a, b in pairwise(inside)]
        wide = max(spaces, default=end - at)
        if wide > zone.spacing + 1.5:
            yield _finding(
                case,
                (at + end) / 2,
                sets[0].marks,
                wide,
                zone.spacing,
                "mm",
                "link-count",
                Severity.COSTLY,
                "the project file",
                f"links of span {span.number} stand {wide:.0f} mm apart where {zone.spacing:g} "
                "was chosen",
                "Add a link",
            )
        at = end
