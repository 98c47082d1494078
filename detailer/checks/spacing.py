"""Are bars of a layer far enough apart for concrete to pass?"""

from __future__ import annotations

from collections.abc import Iterator

from detailer.cage.bar import Bar
from detailer.cage.clearance import Gap, gaps
from detailer.checks.case import Case
from detailer.findings import Finding
from detailer.rules import is456
from detailer.values import GAP_SLACK, ContactKind, Face, Role, Severity

ALONG = (Role.MAIN, Role.HANGER)
MEANT = (ContactKind.LAP, ContactKind.BUNDLE)


def check(case: Case) -> Iterator[Finding]:
    """Yield pairs of bars of one layer closer than 26.3.2 allows, once a place.

    Parameters
    ----------
    case : Case
        The member.
    """
    aggregate = case.cage.aggregate
    largest = max((bar.dia for bar in case.cage.bars if bar.role in ALONG), default=0.0)
    most = is456.min_clear_gap(largest, largest, aggregate).value
    bars = {bar.id: bar for bar in case.cage.bars}
    seen: set[tuple[tuple[str, ...], str]] = set()
    for gap in sorted(gaps(case.cage, within=most), key=lambda g: (g.gap, g.a, g.b)):
        a, b = bars[gap.a], bars[gap.b]
        if not _counts(a, b, gap):
            continue
        need = is456.min_clear_gap(a.dia, b.dia, aggregate)
        place, marks = case.place(gap.at[0]), case.names(gap.a, gap.b)
        if gap.gap >= need.value - GAP_SLACK or (marks, place.name) in seen:
            continue
        seen.add((marks, place.name))
        yield Finding(
            rule="clear-spacing",
            severity=Severity.UNSAFE,
            member=case.beam.mark,
            place=place,
            x=gap.at[0],
            bars=marks,
            found=round(gap.gap, 1),
            required=need.value,
            unit="mm",
            clause=need.clause,
            message=f"{place.name}: bars {' and '.join(marks)} of the {a.face.value} face are "
            f"{gap.gap:.1f} mm apart, {need.value:g} required ({need.because})",
            remedy="Use fewer or smaller bars, or a second layer",
            site="pour with a honeycomb behind the bars, or push them into another layer",
        )


def _counts(a: Bar, b: Bar, gap: Gap) -> bool:
    """Return whether two bars lie side by side in one layer and are not meant to touch."""
    along = a.role in ALONG and b.role in ALONG
    together = a.face is b.face and a.face is not Face.NONE and a.layer == b.layer
    return along and together and gap.declared not in MEANT
