"""Has a deep or twisted web the bars along its side faces? IS 456:2000, 26.5.1.3, 26.5.1.7 b."""

from __future__ import annotations

from collections.abc import Iterator
from itertools import pairwise

from detailer.checks.case import Case
from detailer.findings import Finding
from detailer.model import Span
from detailer.rules import is456
from detailer.strength.slices import area
from detailer.values import Face, Required, Role, Severity


def check(case: Case) -> Iterator[Finding]:
    """Yield spans whose webs lack side-face steel, or have it too widely spaced.

    Parameters
    ----------
    case : Case
        The member.
    """
    for span in case.beam.spans:
        x0, x1 = case.beam.clear(span)
        x = (x0 + x1) / 2
        web = span.section.depth - (span.section.slab if span.section.flange else 0.0)
        twisted = case.envelope is not None and any(
            case.envelope.torsion(x0 + k * (x1 - x0) / 8) > 0 for k in range(9)
        )
        if is456.needs_side_steel(web, torsion=False):
            yield from _amount(case, span, x, web)
        if is456.needs_side_steel(web) or (twisted and is456.needs_side_steel(web, torsion=True)):
            yield from _spacing(case, span, x)


def _amount(case: Case, span: Span, x: float, web: float) -> Iterator[Finding]:
    bars = [b for b in case.steel.bars if b.role is Role.SIDE and b.covers(x)]
    have = sum(area(bar.dia) for bar in bars)
    need = is456.side_steel(span.section.width, web)
    if have < need.value * 0.999:
        yield _finding(case, x, have, need, "mm2", "side-steel", "side-face steel")


def _spacing(case: Case, span: Span, x: float) -> Iterator[Finding]:
    need = is456.side_steel_spacing(span.section.width)
    for face in (Face.LEFT, Face.RIGHT):
        mine = [b.at(x)[1] for b in case.steel.bars if b.face is face and b.covers(x)]
        low = [b.at(x)[1] for b in case.steel.at(x, Face.BOTTOM)]
        high = [b.at(x)[1] for b in case.steel.at(x, Face.TOP)]
        if not low or not high:
            continue
        levels = sorted([max(low), *mine, min(high)])
        wide = max(b - a for a, b in pairwise(levels))
        if wide > need.value + 1:
            yield _finding(
                case, x, wide, need, "mm", "side-spacing", f"side-face bars at the {face.value}"
            )
            return


def _finding(
    case: Case, x: float, found: float, need: Required, unit: str, rule: str, what: str
) -> Finding:
    place = case.place(x)
    shown = "mm²" if unit == "mm2" else unit
    return Finding(
        rule=rule,
        severity=Severity.UNSAFE,
        member=case.beam.mark,
        place=place,
        x=x,
        bars=tuple(sorted({b.mark for b in case.steel.bars if b.role is Role.SIDE})),
        found=round(found),
        required=round(need.value),
        unit=unit,
        clause=need.clause,
        message=f"{place.name}: {what} {found:.0f} {shown}, {need.value:.0f} required "
        f"({need.because})",
        remedy="Add bars along the side faces",
    )
