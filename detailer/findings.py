"""A finding: what a checker would write in red, with the two numbers behind it."""

from __future__ import annotations

from collections.abc import Iterable
from dataclasses import dataclass

from detailer.values import Severity


@dataclass(frozen=True, slots=True, order=True)
class Place:
    """Where along a member: at a support, in a span, or the member as a whole.

    `order` sorts places from left to right: 2k for support k, 2k + 1 for the span to its
    right, -1 for the member as a whole.
    """

    order: int
    name: str  # "support B1", "span 2", "FB1"


@dataclass(frozen=True, slots=True, kw_only=True)
class Finding:
    """One thing that does not comply, cannot be built, costs, or misleads."""

    rule: str  # stable, greppable: "clear-spacing"
    severity: Severity
    member: str
    place: Place
    x: float  # [mm] along the member's own axis
    bars: tuple[str, ...]  # marks, sorted; ids where a bar has no mark yet
    found: float
    required: float
    unit: str
    clause: str
    message: str  # place → seen → required, one sentence
    remedy: str  # what to change
    site: str = ""  # what site will do if nobody acts; for what cannot be built


def ordered(findings: Iterable[Finding]) -> tuple[Finding, ...]:
    """Sort by member, then by place with the worst place first, then worst first; never by mark."""
    rows = list(findings)
    worst: dict[tuple[str, Place], int] = {}
    for row in rows:
        key = (row.member, row.place)
        worst[key] = min(worst.get(key, 9), row.severity.rank)

    def sort_key(row: Finding) -> tuple[object, ...]:
        return (
            row.member,
            worst[row.member, row.place],
            row.place,
            row.severity.rank,
            row.rule,
            round(row.x, 1),
            row.message,
        )

    return tuple(sorted(rows, key=sort_key))
