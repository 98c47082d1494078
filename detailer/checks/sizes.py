"""Are sizes and grades made, held, and told apart on site?"""

from __future__ import annotations

from collections.abc import Iterator
from itertools import pairwise

from detailer.cage.bar import Bar
from detailer.checks.case import Case
from detailer.findings import Finding
from detailer.rules import is1786
from detailer.values import Role, Severity


def check(case: Case) -> Iterator[Finding]:
    """Yield sizes that are not rolled or not held, and neighbours a fixer will mix up.

    Parameters
    ----------
    case : Case
        The member.
    """
    yield from _held(case)
    yield from _neighbours(case)


def _held(case: Case) -> Iterator[Finding]:
    sizes = case.project.steel.sizes
    seen: set[str] = set()
    for bar in case.cage.bars:
        rolled = round(bar.dia) in is1786.SIZES and abs(bar.dia - round(bar.dia)) < 1e-6
        if (rolled and round(bar.dia) in sizes) or bar.name in seen:
            continue
        seen.add(bar.name)
        x = bar.corners[0][0] + bar.placings[0][0]
        place = case.place(x)
        near = min(sizes, key=lambda s: (abs(s - bar.dia), s))
        yield Finding(
            rule="size-held",
            severity=Severity.UNBUILDABLE,
            member=case.beam.mark,
            place=place,
            x=x,
            bars=(bar.name,),
            found=bar.dia,
            required=float(near),
            unit="mm",
            clause="sizes of the project" if rolled else "IS 1786:2008",
            message=f"{place.name}: bar {bar.name} is {bar.dia:g} mm, which is "
            + ("not held" if rolled else "not rolled")
            + f"; the nearest size is {near}",
            remedy=f"Use {near} mm, or the next larger size",
            site="take the nearest size in the yard",
        )


def _neighbours(case: Case) -> Iterator[Finding]:
    """Yield faces that mix two sizes next to each other in the range."""
    ladder = sorted(case.project.steel.sizes)
    steps = {(a, b) for a, b in pairwise(ladder)}
    for span in case.beam.spans:
        x0, x1 = case.beam.clear(span)
        x = (x0 + x1) / 2
        here = [b for b in case.cage.bars if b.role is Role.MAIN]
        for face in sorted({b.face for b in here}, key=lambda f: f.value):
            inside = [b for b in here if b.face is face and _over(b, x)]
            sizes = {round(b.dia) for b in inside}
            pairs = [(a, b) for a, b in steps if a in sizes and b in sizes and a >= 16]
            if not pairs:
                continue
            small, large = min(pairs)
            place = case.place(x)
            yield Finding(
                rule="sizes-alike",
                severity=Severity.COSTLY,
                member=case.beam.mark,
                place=place,
                x=x,
                bars=tuple(sorted({b.name for b in inside if round(b.dia) in (small, large)})),
                found=float(large - small),
                required=float(large - small + 1),
                unit="mm",
                clause="common practice, no source",
                message=f"{place.name}: T{small} and T{large} lie side by side in the "
                f"{face.value} face and are easily mixed up",
                remedy="Use one size",
            )


def _over(bar: Bar, x: float) -> bool:
    xs = [p[0] for p in bar.corners]
    return min(xs) <= x <= max(xs)
