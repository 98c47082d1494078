"""Does every link corner hold a bar, and does the bar sit in it?"""

from __future__ import annotations

from collections.abc import Iterator
from math import hypot, sqrt

from detailer.cage.bar import Bar
from detailer.checks.case import Case
from detailer.findings import Finding
from detailer.strength.development import Rod
from detailer.values import Role, Severity

NEAR = 3.0
"""A corner bar may sit this far off the legs. [mm] (geometry, common practice)"""

FAR = 45.0
"""A bar further from the corner than this does not belong to it. [mm]"""


def check(case: Case) -> Iterator[Finding]:
    """Yield the worst corner of a place where the bar sits off, lies on its bend, or is missing.

    Parameters
    ----------
    case : Case
        The member.
    """
    worst: dict[tuple[str, str], Finding] = {}
    for link in case.cage.bars:
        if link.role is not Role.LINK or len(link.corners) < 6:
            continue
        for dx, dy, dz in link.placings:
            x = link.corners[0][0] + dx
            for y, z in _inner_corners(link, dy, dz):
                for finding in _corner(case, link, x, y, z):
                    key = (finding.rule, finding.place.name)
                    if key not in worst or finding.found > worst[key].found + 1e-9:
                        worst[key] = finding
    yield from worst.values()


def _inner_corners(link: Bar, dy: float, dz: float) -> tuple[tuple[float, float], ...]:
    """Return the meeting points of the inner faces of a link's legs."""
    r = link.dia / 2
    body = link.corners[2:-2]
    ys, zs = [p[1] + dy for p in body], [p[2] + dz for p in body]
    y0, y1, z0, z1 = min(ys) + r, max(ys) - r, min(zs) + r, max(zs) - r
    return ((y0, z0), (y1, z0), (y0, z1), (y1, z1))


def _corner(case: Case, link: Bar, x: float, y: float, z: float) -> Iterator[Finding]:
    bars = [bar for bar in case.steel.bars if bar.covers(x) and bar.role is not Role.SIDE]
    if not bars:
        return

    def apart(bar: Rod) -> float:
        by, bz = bar.at(x)
        return hypot(by - y, bz - z)

    near = min(bars, key=lambda b: (apart(b), b.id))
    away = apart(near)
    radius, bend = near.dia / 2, link.mandrels[0] / 2
    seat = max(0.0, (1 - 1 / sqrt(2)) * (bend - radius))
    if away > max(FAR, sqrt(2) * (radius + seat) + 2 * near.dia):
        yield _finding(
            case,
            link,
            x,
            (link.name,),
            away,
            FAR,
            "corner-empty",
            Severity.UNBUILDABLE,
            f"link {link.name} holds no bar in a corner",
        )
        return
    off = away / sqrt(2) - radius
    if NEAR < off <= seat + 0.5:
        words = f"corner bar {near.mark} sits {off:.1f} mm off the legs of link {link.name}"
        yield _finding(
            case, link, x, (near.mark, link.name), off, NEAR, "corner-seat", Severity.COSTLY, words
        )
    ends = (near.x0, near.x1)
    for end, side in zip(ends, (-1, 1), strict=True):
        bent = near.worth[0 if side < 0 else 1] > 0
        if bent and (x - end) * side > 0:
            yield _finding(
                case,
                link,
                x,
                (near.mark, link.name),
                abs(x - end),
                0.0,
                "link-on-bend",
                Severity.COSTLY,
                f"link {link.name} stands on the bend of corner bar {near.mark}",
            )


def _finding(
    case: Case,
    link: Bar,
    x: float,
    bars: tuple[str, ...],
    found: float,
    required: float,
    rule: str,
    severity: Severity,
    words: str,
) -> Finding:
    place = case.place(x)
    return Finding(
        rule=rule,
        severity=severity,
        member=case.beam.mark,
        place=place,
        x=x,
        bars=tuple(sorted(bars)),
        found=round(found, 1),
        required=required,
        unit="mm",
        clause="geometry of the placed bars",
        message=f"{place.name}: {words}",
        remedy="Shift the link off the bend"
        if rule == "link-on-bend"
        else "Use smaller links or a larger corner bar, or add a hanger bar",
        site="hang the link on whatever bar is near" if severity.blocks else "",
    )
