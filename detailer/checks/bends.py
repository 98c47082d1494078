"""Can every bar be bent as drawn, and is the bend kind to the concrete?"""

from __future__ import annotations

from collections.abc import Iterator
from math import dist, pi, radians, tan

from detailer.cage.bar import Bar
from detailer.cage.line import problems
from detailer.checks.case import Case
from detailer.findings import Finding
from detailer.rules import is456, is2502
from detailer.values import Role, Severity

SLACK = 1.0
LINKS = (Role.LINK, Role.TIE)


def check(case: Case) -> Iterator[Finding]:
    """Yield bends too sharp, too close together, or with too little straight beyond.

    Parameters
    ----------
    case : Case
        The member.
    """
    seen: set[tuple[str, str]] = set()
    for bar in case.cage.bars:
        for finding in (*_sharp(case, bar), *_close(case, bar), *_short_end(case, bar)):
            if (finding.rule, bar.name) not in seen:
                seen.add((finding.rule, bar.name))
                yield finding


def _x(bar: Bar) -> float:
    return bar.corners[0][0] + bar.placings[0][0]


def _finding(
    case: Case, bar: Bar, rule: str, found: float, required: float, clause: str, words: str
) -> Finding:
    severity = Severity.UNSAFE if rule == "bend-radius" else Severity.UNBUILDABLE
    x = _x(bar)
    place = case.place(x)
    return Finding(
        rule=rule,
        severity=severity,
        member=case.beam.mark,
        place=place,
        x=x,
        bars=(bar.name,),
        found=round(found, 1),
        required=round(required, 1),
        unit="mm",
        clause=clause,
        message=f"{place.name}: bar {bar.name}, {words}: {found:.0f} mm, {required:.0f} required",
        remedy="Lengthen the leg, or use the standard bend",
        site="bend it to whatever the machine makes" if severity.blocks else "",
    )


def _sharp(case: Case, bar: Bar) -> Iterator[Finding]:
    """Yield bends tighter than the standard's: they crush the concrete inside (26.2.2.5)."""
    need = is2502.mandrel(bar.dia, link=bar.role in LINKS)
    if not bar.mandrels or min(bar.mandrels) >= need - SLACK:
        return
    yield _finding(
        case,
        bar,
        "bend-radius",
        min(bar.mandrels) / 2,
        need / 2,
        "IS 2502:1963 and IS 456:2000, 26.2.2.5",
        "inner radius of a bend",
    )


def _close(case: Case, bar: Bar) -> Iterator[Finding]:
    """Yield bends whose arcs leave no straight between them."""
    for what in problems(bar)[:1]:
        spans = [dist(a, b) for a, b in zip(bar.corners[1:-2], bar.corners[2:-1], strict=True)]
        found = min(spans, default=0.0)
        need = max(bar.mandrels, default=0.0) + bar.dia
        yield _finding(case, bar, "bends-close", found, max(need, found + 1), "IS 2502:1963", what)


def _short_end(case: Case, bar: Bar) -> Iterator[Finding]:
    """Yield legs with less straight beyond the bend than a bender can hold."""
    if not bar.mandrels:
        return
    for tip, corner, nxt, mandrel in (
        (bar.corners[0], bar.corners[1], bar.corners[2], bar.mandrels[0]),
        (bar.corners[-1], bar.corners[-2], bar.corners[-3], bar.mandrels[-1]),
    ):
        turn = _turn(tip, corner, nxt)
        if turn < radians(60):
            continue
        tail = dist(tip, corner) - (mandrel + bar.dia) / 2 * tan(turn / 2)
        if bar.role in LINKS:
            need = max(is456.link_tail(bar.dia, turn * 180 / pi).value, is2502.link_tail(bar.dia))
            clause = "IS 2502:1963, 3.8 and IS 456:2000, 26.2.2.4 b"
        else:
            need = is2502.min_straight_end(bar.dia).value
            clause = "IS 2502:1963"
        if tail < need - SLACK:
            yield _finding(case, bar, "short-leg", tail, need, clause, "straight beyond a bend")


def _turn(
    a: tuple[float, float, float], b: tuple[float, float, float], c: tuple[float, float, float]
) -> float:
    """Return the angle through which the bar is bent at b. [radians]"""
    from math import acos

    u = [q - p for p, q in zip(a, b, strict=True)]
    v = [q - p for p, q in zip(b, c, strict=True)]
    along = sum(p * q for p, q in zip(u, v, strict=True)) / (dist(a, b) * dist(b, c))
    return acos(max(-1.0, min(1.0, along)))
