"""Do bar ends fit their supports, turn the right way, and leave the fixer a tolerance?"""

from __future__ import annotations

from collections.abc import Iterator

from detailer.checks.case import Case
from detailer.findings import Finding
from detailer.model import Span, Support
from detailer.strength.development import Rod
from detailer.values import Face, Role, Severity, SupportKind

ASSUMED = 64.0
"""Cover, tie and bar taken for a column of which only the size is given. [mm]"""

GEOMETRY = "geometry of the placed bars"


def check(case: Case) -> Iterator[Finding]:
    """Yield ends that do not fit, support by support, and gaps between extras.

    Parameters
    ----------
    case : Case
        The member.
    """
    for index, support in enumerate(case.beam.supports):
        left, right = case.beam.spans_of(index)
        if left is None and right is not None:
            yield from _end_support(case, support, right, -1)
        elif right is None and left is not None:
            yield from _end_support(case, support, left, 1)
    yield from _closing(case)
    yield from _butts(case)
    yield from _silly_gaps(case)


def _finding(
    case: Case,
    x: float,
    bars: tuple[str, ...],
    found: float,
    required: float,
    rule: str,
    severity: Severity,
    words: str,
    remedy: str,
    site: str = "",
    clause: str = GEOMETRY,
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
        unit="mm",
        clause=clause,
        message=f"{place.name}: {words}",
        remedy=remedy,
        site=site,
    )


def _reserve(case: Case, support: Support) -> float:
    """Return what belongs to the far face of an end support: cover, tie and bar of a column."""
    if support.kind is not SupportKind.COLUMN:
        return min(case.beam.cover.left, case.beam.cover.right)
    column = support.column
    return ASSUMED if column is None else column.cover + column.link_dia + column.bars.dia


def _end_support(case: Case, support: Support, span: Span, side: int) -> Iterator[Finding]:
    outer = support.left if side < 0 else support.right
    limit = outer - side * _reserve(case, support)
    for bar in _distinct(case, support):
        tip = bar.tips[0 if side < 0 else 1]
        past = (tip - limit) * side
        if past > 1.0:
            yield _finding(
                case,
                support.x,
                (bar.mark,),
                _reserve(case, support) - past,
                _reserve(case, support),
                "end-in-core",
                Severity.UNBUILDABLE,
                f"bar {bar.mark} ends {_reserve(case, support) - past:.0f} mm from the far face, "
                f"{_reserve(case, support):.0f} keep it inside the support's own bars",
                "Shorten it and bend it up or down",
                "cut the bar or burn it off",
            )
        yield from _leg(case, support, span, bar, side)


def _distinct(case: Case, support: Support) -> list[Rod]:
    """Return one bar a mark that ends in a support."""
    found: dict[str, Rod] = {}
    for bar in case.steel.bars:
        if bar.role is Role.SIDE:
            continue
        if bar.covers(support.x) or any(support.left <= t <= support.right for t in bar.tips):
            found.setdefault(bar.mark, bar)
    return [found[mark] for mark in sorted(found)]


def _leg(case: Case, support: Support, span: Span, bar: Rod, side: int) -> Iterator[Finding]:
    """Yield legs longer than the beam is deep, or turned out of the joint."""
    if bar.worth[0 if side < 0 else 1] <= 0:
        return
    placed = next(b for b in case.cage.bars if b.id == bar.id)
    ends = [p for p in placed.corners if abs(p[0] - bar.tips[0 if side < 0 else 1]) < bar.dia + 1]
    if len(ends) < 2:
        return
    zs = [p[2] + placed.placings[bar.placing][2] for p in ends]
    level = bar.at(bar.line[0][0] if side < 0 else bar.line[-1][0])[1]
    tip = min(zs) if level - min(zs) > max(zs) - level else max(zs)
    down = tip < level
    wrong = down is (bar.face is Face.BOTTOM)
    if wrong:
        yield _finding(
            case,
            support.x,
            (bar.mark,),
            abs(tip - level),
            0.0,
            "leg-turned-out",
            Severity.UNSAFE,
            f"the leg of {bar.face.value} bar {bar.mark} turns out of the joint",
            "Turn it into the joint",
            clause="IS 456:2000, 26.2.2.1 (reading)",
        )
        return
    cover = case.beam.cover
    room = level - (span.soffit + cover.bottom) if down else (span.top - cover.top) - level
    if abs(tip - level) > room + 1:
        yield _finding(
            case,
            support.x,
            (bar.mark,),
            abs(tip - level),
            room,
            "leg-too-long",
            Severity.UNBUILDABLE,
            f"the leg of bar {bar.mark} is {abs(tip - level):.0f} mm long, the beam leaves "
            f"{room:.0f}",
            "Use smaller bars, a wider support, or a hook",
            "leave the leg short, or bend it up out of the concrete already cast",
        )


def _closing(case: Case) -> Iterator[Finding]:
    """Yield bars bent at both ends between two faces: their length has no tolerance."""
    seen: set[str] = set()
    for bar in case.steel.bars:
        if min(bar.worth) <= 0 or bar.mark in seen:
            continue
        seen.add(bar.mark)
        first, last = case.beam.supports[0], case.beam.supports[-1]
        x = (bar.tips[0] + bar.tips[1]) / 2
        slack = max(
            bar.tips[0] - first.left - _reserve(case, first),
            last.right - _reserve(case, last) - bar.tips[1],
        )
        if slack >= 10.0 or bar.tips[0] > first.right or bar.tips[1] < last.left:
            continue
        yield _finding(
            case,
            x,
            (bar.mark,),
            max(slack, 0.0),
            10.0,
            "closing-length",
            Severity.COSTLY,
            f"bar {bar.mark} is bent at both ends between two faces and has no length to spare",
            "Lap two bars with one bend each, or shorten it by 10 to 20 mm",
            clause="common practice, no source",
        )


def _butts(case: Case) -> Iterator[Finding]:
    """Yield bars in one line that end against each other in a span without a lap."""
    bars = [b for b in case.steel.bars if b.face in (Face.TOP, Face.BOTTOM)]
    seen: set[tuple[str, ...]] = set()
    for a in bars:
        end = a.tips[1]
        if any(s.left - 1 <= end <= s.right + 1 for s in case.beam.supports) or a.worth[1] > 0:
            continue
        ya, za = a.at(end)
        for b in bars:
            gap = b.tips[0] - end
            if b is a or b.face is not a.face or b.layer != a.layer or not -300 < gap < 300:
                continue
            yb, zb = b.at(b.tips[0])
            if max(abs(yb - ya), abs(zb - za)) > 1.1 * max(a.dia, b.dia):
                continue
            key = tuple(sorted({a.mark, b.mark}))
            need = max(15 * min(a.dia, b.dia), 200.0)
            if -gap >= need or key in seen:
                continue
            seen.add(key)
            yield _finding(
                case,
                end,
                key,
                max(-gap, 0.0),
                need,
                "no-lap",
                Severity.UNBUILDABLE,
                f"bars {' and '.join(key)} end against each other without a lap",
                f"Lap them by at least {need:.0f} mm",
                "leave the corner of the links without a bar",
                "IS 456:2000, 26.2.5.1 c",
            )


def _silly_gaps(case: Case) -> Iterator[Finding]:
    """Yield short gaps between top extras of two supports: one bar through is cheaper."""
    for span in case.beam.spans:
        x0, x1 = case.beam.clear(span)
        top = [b for b in case.steel.bars if b.face is Face.TOP and b.role is not Role.SIDE]
        left = [b for b in top if b.tips[0] < x0 < b.tips[1] < x1]
        right = [b for b in top if x0 < b.tips[0] < x1 < b.tips[1]]
        if not left or not right:
            continue
        a = max(left, key=lambda b: (b.tips[1], b.id))
        b = min(right, key=lambda b: (b.tips[0], b.id))
        gap = b.tips[0] - a.tips[1]
        if a.dia != b.dia or not 0 < gap < 500:
            continue
        yield _finding(
            case,
            (a.tips[1] + b.tips[0]) / 2,
            tuple(sorted({a.mark, b.mark})),
            gap,
            500.0,
            "silly-gap",
            Severity.COSTLY,
            f"top bars {a.mark} and {b.mark} stop {gap:.0f} mm from each other",
            "Run them through as one",
            clause="common practice, no source",
        )
