"""Do links and concrete carry shear and torsion along every span?"""

from __future__ import annotations

from collections.abc import Iterator

from detailer.checks.case import Case
from detailer.findings import Finding
from detailer.model import Span
from detailer.rules import is456
from detailer.statics import Envelope
from detailer.values import Face, Required, Severity

SLACK = 1.002


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
        worst: tuple[float, Finding] | None = None
        limit: tuple[float, Finding] | None = None
        for x in case.envelope.sample(span, 50.0):
            at = float(x)
            ratio, finding = _carried(case, span, at, case.envelope)
            if ratio > SLACK and (worst is None or ratio > worst[0]):
                worst = (ratio, finding)
            elif ratio <= SLACK and worst is not None:
                yield worst[1]
                worst = None
            ratio, finding = _crushed(case, span, at, case.envelope)
            if ratio > SLACK and (limit is None or ratio > limit[0]):
                limit = (ratio, finding)
        yield from (item[1] for item in (worst, limit) if item is not None)


def _face(envelope: Envelope, x: float) -> Face:
    """Return the face more in tension."""
    least, most = envelope.moment(x)
    return Face.BOTTOM if most >= -least else Face.TOP


def _demand(case: Case, span: Span, x: float, envelope: Envelope) -> float:
    """Return the shear that counts at x, torsion included. [N]"""
    x0, x1 = case.beam.clear(span)
    d = case.steel.depth((x0 + x1) / 2, _face(envelope, x), span) or span.section.depth - 50
    at = x
    if span.left is not None:
        at = max(at, min(x0 + d, (x0 + x1) / 2))
    if span.right is not None:
        at = min(at, max(x1 - d, (x0 + x1) / 2))
    least, most = envelope.shear(at)
    return is456.torsion_shear(max(-least, most), envelope.torsion(x), span.section.width)


def _carried(case: Case, span: Span, x: float, envelope: Envelope) -> tuple[float, Finding]:
    asked = _demand(case, span, x, envelope)
    capacity = case.shear.capacity(x, span, _face(envelope, x))
    twist = envelope.torsion(x)
    if twist > 0 and asked > capacity.concrete:
        need = _torsion_links(case, span, x, envelope, asked - capacity.concrete, capacity.spacing)
        found, required, unit = capacity.asv, need.value, "mm2"
        rule, clause = "torsion-links", need.clause
        said = f"links of {found:.0f} mm² at {capacity.spacing:.0f} mm, {required:.0f} needed"
    else:
        found, required, unit = capacity.total / 1e3, asked / 1e3, "kN"
        rule, clause = "shear", "IS 456:2000, 40.4"
        said = (
            f"links at {capacity.spacing:.0f} mm and concrete carry {found:.0f} kN, "
            f"{required:.0f} needed"
        )
    place = case.place(x)
    marks = sorted({m for s in case.shear.sets if abs(s.x - x) < 400 for m in s.marks})
    return required / max(found, 1e-9), Finding(
        rule=rule,
        severity=Severity.UNSAFE,
        member=case.beam.mark,
        place=place,
        x=x,
        bars=tuple(marks),
        found=round(found, 1),
        required=round(required, 1),
        unit=unit,
        clause=clause,
        message=f"{place.name}: at {x:.0f} {said}",
        remedy="Set the links closer or lengthen their zone",
    )


def _torsion_links(
    case: Case, span: Span, x: float, envelope: Envelope, excess: float, spacing: float
) -> Required:
    """Return the area two legs need for torsion and shear together."""
    d = case.steel.depth(x, _face(envelope, x), span) or span.section.depth - 50
    corner = max((bar.dia for bar in case.steel.bars if bar.covers(x)), default=16.0)
    cover, link = case.beam.cover, max(s.dia for s in case.shear.sets)
    b1 = span.section.width - cover.left - cover.right - 2 * link - corner
    d1 = span.section.depth - cover.top - cover.bottom - 2 * link - corner
    least, most = envelope.shear(x)
    return is456.torsion_link_area(
        envelope.torsion(x),
        max(-least, most),
        spacing,
        b1,
        d1,
        case.project.steel.links.fy,
        floor=excess / d,
    )


def _crushed(case: Case, span: Span, x: float, envelope: Envelope) -> tuple[float, Finding]:
    least, most = envelope.shear(x)
    asked = is456.torsion_shear(max(-least, most), envelope.torsion(x), span.section.width)
    capacity = case.shear.capacity(x, span, _face(envelope, x))
    place = case.place(x)
    return asked / capacity.limit, Finding(
        rule="shear-limit",
        severity=Severity.UNSAFE,
        member=case.beam.mark,
        place=place,
        x=x,
        bars=(),
        found=round(asked / 1e3, 1),
        required=round(capacity.limit / 1e3, 1),
        unit="kN",
        clause="IS 456:2000, 40.2.3",
        message=f"{place.name}: shear {asked / 1e3:.0f} kN exceeds what any links allow, "
        f"{capacity.limit / 1e3:.0f}",
        remedy="Enlarge the section or raise the grade of concrete",
    )
