"""Do bars meet that should not, and do contacts that are meant hold?"""

from __future__ import annotations

from collections.abc import Iterator

from detailer.cage.clearance import undeclared
from detailer.cage.contacts import contact_problems
from detailer.checks.case import Case
from detailer.findings import Finding
from detailer.values import Severity

CLAUSE = "geometry of the placed bars"


def check(case: Case) -> Iterator[Finding]:
    """Yield bars that touch or penetrate undeclared, and contacts that do not hold.

    Parameters
    ----------
    case : Case
        The member.
    """
    seen: set[tuple[tuple[str, ...], str]] = set()
    for gap in undeclared(case.cage):
        place, marks = case.place(gap.at[0]), case.names(gap.a, gap.b)
        if (marks, place.name) in seen:
            continue
        seen.add((marks, place.name))
        how = "penetrate" if gap.gap < -0.05 else "touch"
        yield Finding(
            rule="clash",
            severity=Severity.UNBUILDABLE,
            member=case.beam.mark,
            place=place,
            x=gap.at[0],
            bars=marks,
            found=round(gap.gap, 1),
            required=0.0,
            unit="mm",
            clause=CLAUSE,
            message=f"{place.name}: bars {' and '.join(marks)} {how} by {abs(gap.gap):.1f} mm "
            "where no contact is meant",
            remedy="Move one of them aside or into another layer",
            site="push one bar aside, into the cover or out of its place",
        )
    for contact, why in contact_problems(case.cage):
        x = (contact.x0 + contact.x1) / 2
        place, marks = case.place(x), case.names(contact.a, contact.b)
        yield Finding(
            rule="contact",
            severity=Severity.UNCLEAR,
            member=case.beam.mark,
            place=place,
            x=x,
            bars=marks,
            found=0.0,
            required=0.0,
            unit="mm",
            clause=CLAUSE,
            message=f"{place.name}: {contact.kind.value} of {' and '.join(marks)}: {why}",
            remedy="Show how these bars lie against each other",
        )
