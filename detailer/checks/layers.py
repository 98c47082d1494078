"""Are second layers held, and is their steel listed?"""

from __future__ import annotations

from collections.abc import Iterator
from itertools import pairwise

from detailer.checks.case import Case
from detailer.findings import Finding
from detailer.values import Face, Role, Severity


def check(case: Case) -> Iterator[Finding]:
    """Yield layers above the first without spacer bars each `spacer_pitch`.

    Parameters
    ----------
    case : Case
        The member.
    """
    pitch = case.project.practice.spacer_pitch
    for face in (Face.BOTTOM, Face.TOP):
        spots = sorted(
            bar.corners[0][0] + shift[0]
            for bar in case.cage.bars
            if bar.role is Role.SPACER and bar.face is face
            for shift in bar.placings
        )
        seen: set[str] = set()
        for bar in case.steel.bars:
            if bar.face is not face or bar.layer < 2 or bar.role is Role.SIDE:
                continue
            marks = [bar.tips[0], *(x for x in spots if bar.covers(x)), bar.tips[1]]
            free = max(b - a for a, b in pairwise(marks))
            x = (bar.tips[0] + bar.tips[1]) / 2
            place = case.place(x)
            if free <= 1.5 * pitch or (bar.mark + place.name) in seen:
                continue
            seen.add(bar.mark + place.name)
            yield Finding(
                rule="layer-held",
                severity=Severity.COSTLY,
                member=case.beam.mark,
                place=place,
                x=x,
                bars=(bar.mark,),
                found=round(free),
                required=pitch,
                unit="mm",
                clause="IS 456:2000, 26.3.2; spacing of spacers common practice, no source",
                message=f"{place.name}: bar {bar.mark} of layer {bar.layer} has no spacer bar over "
                f"{free:.0f} mm, one each {pitch:.0f} needed",
                remedy="Schedule spacer bars between the layers",
            )
