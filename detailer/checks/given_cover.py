"""Is the cover that was given enough for exposure, fire, bar and aggregate?"""

from __future__ import annotations

from collections.abc import Iterator

from detailer.checks.case import Case
from detailer.findings import Finding, Place
from detailer.rules import is456
from detailer.values import Required, Role, Severity


def check(case: Case) -> Iterator[Finding]:
    """Yield what the nominal cover or the width falls short of.

    Parameters
    ----------
    case : Case
        The member.
    """
    concrete, cover = case.project.concrete, case.beam.cover
    given = min(cover.top, cover.bottom, cover.left, cover.right)
    mains = [bar.dia for bar in case.cage.bars if bar.role is Role.MAIN]
    largest = max(mains, default=0.0)
    yield from _short(
        case, "given-cover", given, is456.nominal_cover(concrete.exposure, concrete.fck, largest)
    )
    continuous = len(case.beam.spans) > 1
    if concrete.fire_hours > 0:
        yield from _short(
            case, "fire-cover", given, is456.fire_cover(concrete.fire_hours, continuous=continuous)
        )
        width = min(span.section.width for span in case.beam.spans)
        yield from _short(case, "fire-width", width, is456.fire_width(concrete.fire_hours), "wide")
    link = min((s.dia for s in case.shear.sets), default=0.0)
    if given + link < largest:
        yield from _short(case, "cover-for-bar", given + link, is456.cover_for_bar(largest))
    if concrete.aggregate > given - 5 + 0.1:
        need = Required(concrete.aggregate + 5, "IS 456:2000, 5.3.3", "aggregate + 5")
        yield from _short(case, "aggregate-size", given, need, severity=Severity.COSTLY)


def _short(
    case: Case,
    rule: str,
    given: float,
    need: Required,
    what: str = "of cover",
    *,
    severity: Severity = Severity.UNSAFE,
) -> Iterator[Finding]:
    if given >= need.value - 0.1:
        return
    mark = case.beam.mark
    yield Finding(
        rule=rule,
        severity=severity,
        member=mark,
        place=Place(-1, mark),
        x=case.beam.start,
        bars=(),
        found=given,
        required=need.value,
        unit="mm",
        clause=need.clause,
        message=f"{mark}: {given:g} mm {what} given, {need.value:g} required ({need.because})",
        remedy=f"Give {need.value:g} mm"
        + (" or a smaller aggregate" if rule == "aggregate-size" else ""),
    )
