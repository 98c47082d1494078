"""Is the cover kept by every bar as placed?"""

from __future__ import annotations

from collections.abc import Iterator

from detailer.cage.cover import Side, covers
from detailer.checks.case import Case
from detailer.findings import Finding
from detailer.values import COVER_SLACK, Severity

FACES = (Side.TOP, Side.BOTTOM, Side.LEFT, Side.RIGHT)


def check(case: Case) -> Iterator[Finding]:
    """Yield the least cover of each mark to each face that it falls short of, place by place.

    Parameters
    ----------
    case : Case
        The member.
    """
    worst: dict[tuple[str, Side, str], tuple[float, float, float]] = {}
    for bar in covers(case.cage):
        for side, need in zip(FACES, case.cage.cover, strict=True):
            found, x = bar.to(side), bar.where(side)
            if found < need - COVER_SLACK:
                key = (bar.bar, side, case.place(x).name)
                worst[key] = min(worst.get(key, (found, x, need)), (found, x, need))
    for (id_, side, _), (found, x, need) in sorted(
        worst.items(), key=lambda item: (item[1][1], item[0][0], item[0][1].value)
    ):
        place, marks = case.place(x), case.names(id_)
        yield Finding(
            rule="cover-placed",
            severity=Severity.UNSAFE,
            member=case.beam.mark,
            place=place,
            x=x,
            bars=marks,
            found=round(found, 1),
            required=need,
            unit="mm",
            clause="IS 456:2000, 26.4.1",
            message=f"{place.name}: bar {marks[0]} has {found:.1f} mm of cover at the "
            f"{side.value} face, {need:g} required",
            remedy="Move the bar into the core or shorten it",
        )
