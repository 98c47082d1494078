"""Can every bar be cut from the stock delivered?"""

from __future__ import annotations

from collections.abc import Iterator

from detailer.cage.measure import exact_length
from detailer.checks.case import Case
from detailer.findings import Finding
from detailer.values import Severity


def check(case: Case) -> Iterator[Finding]:
    """Yield bars longer than the stock.

    Parameters
    ----------
    case : Case
        The member.
    """
    stock = case.project.steel.stock
    seen: set[str] = set()
    for bar in sorted(case.cage.bars, key=lambda item: (item.name, item.id)):
        length = max(exact_length(bar), bar.length or 0.0)
        if length <= stock or bar.name in seen:
            continue
        seen.add(bar.name)
        x = bar.placings[0][0] + (bar.corners[0][0] + bar.corners[-1][0]) / 2
        place = case.place(x)
        yield Finding(
            rule="stock",
            severity=Severity.UNBUILDABLE,
            member=case.beam.mark,
            place=place,
            x=x,
            bars=(bar.name,),
            found=round(length),
            required=stock,
            unit="mm",
            clause="stock length of the project",
            message=f"{place.name}: bar {bar.name} is {length:.0f} mm long, stock is {stock:g} mm",
            remedy="Lap the bar",
            site="lap it where the bar happens to end",
        )
