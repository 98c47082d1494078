"""Is every span stiff enough by its ratio of span to depth? IS 456:2000, 23.2."""

from __future__ import annotations

from collections.abc import Iterator

from detailer.checks.case import Case
from detailer.findings import Finding
from detailer.model import Span
from detailer.rules import is456
from detailer.statics import Envelope
from detailer.strength.slices import area
from detailer.values import Face, Severity


def check(case: Case) -> Iterator[Finding]:
    """Yield spans too slender for the steel they have.

    Parameters
    ----------
    case : Case
        The member.
    """
    if case.envelope is None:
        return
    for span in case.beam.spans:
        yield from _span(case, span, case.envelope)


def _span(case: Case, span: Span, envelope: Envelope) -> Iterator[Finding]:
    kind = _kind(case, span)
    x0, x1 = case.beam.clear(span)
    if kind == "cantilever":
        x, face = (x1 if span.left is None else x0), Face.TOP
        asked = -envelope.moment(x)[0]
    else:
        (x, asked), face = envelope.peak_sagging(span), Face.BOTTOM
    if asked <= 0:
        return
    d = case.steel.depth(x, face, span)
    carried = case.steel.moment(x, sagging=face is Face.BOTTOM, full=True).moment
    if d <= 0 or carried <= 0:
        return
    shape = case.steel.shapes[span.number]
    width = shape.flange_width if face is Face.BOTTOM else shape.width
    tension = sum(area(b.dia) for b in case.steel.at(x, face))
    other = Face.TOP if face is Face.BOTTOM else Face.BOTTOM
    pressed = sum(area(b.dia) for b in case.steel.at(x, other))
    fs = is456.service_stress(case.project.steel.main.fy, min(asked / carried, 1.0), 1.0)
    limit = (
        is456.span_depth_basic(kind, span.length)
        * is456.tension_factor(fs, 100 * tension / (width * d))
        * is456.compression_factor(100 * pressed / (width * d))
        * is456.flange_factor(shape.width / width)
    )
    ratio = span.length / d
    if ratio <= limit * 1.005:
        return
    place = case.place(x if kind != "cantilever" else (x0 + x1) / 2)
    yield Finding(
        rule="deflection",
        severity=Severity.UNSAFE,
        member=case.beam.mark,
        place=place,
        x=x,
        bars=tuple(sorted({b.mark for b in case.steel.at(x, face)})),
        found=round(ratio, 1),
        required=round(limit, 1),
        unit="",
        clause="IS 456:2000, 23.2.1",
        message=f"{place.name}: span over d is {ratio:.1f}, {limit:.1f} allowed ({kind})",
        remedy="Deepen the beam or add tension steel",
    )


def _kind(case: Case, span: Span) -> str:
    """Return how the span is held, as 23.2.1 names it."""
    if span.overhang:
        return "cantilever"
    ends = [n is not None and case.beam.continuous(n) for n in (span.left, span.right)]
    return "continuous" if any(ends) else "simple"
