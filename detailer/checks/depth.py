"""Is the effective depth as placed the one the calculation used?"""

from __future__ import annotations

from collections.abc import Iterator

from detailer.checks.case import Case
from detailer.findings import Finding
from detailer.values import Face, Severity

NEAR = 1.5
"""Depths that differ by no more than this are the same. [mm]"""


def check(case: Case) -> Iterator[Finding]:
    """Yield where the bars lie deeper in the section than the calculation assumed.

    Parameters
    ----------
    case : Case
        The member.
    """
    bottom, top = case.beam.d_assumed
    if bottom is not None:
        for span in case.beam.spans:
            x0, x1 = case.beam.clear(span)
            yield from _compare(case, (x0 + x1) / 2, Face.BOTTOM, bottom)
    if top is not None:
        for support in case.beam.supports:
            yield from _compare(case, support.x, Face.TOP, top)


def _compare(case: Case, x: float, face: Face, assumed: float) -> Iterator[Finding]:
    placed = case.steel.depth(x, face)
    if placed == 0 or placed >= assumed - NEAR:
        return
    links = {round(s.dia) for s in case.shear.sets}
    lack = assumed - placed
    cover = any(abs(lack - dia) < 2.0 for dia in links)
    place = case.place(x)
    yield Finding(
        rule="depth-assumed",
        severity=Severity.COSTLY,
        member=case.beam.mark,
        place=place,
        x=x,
        bars=tuple(sorted({bar.mark for bar in case.steel.at(x, face)})),
        found=round(placed, 1),
        required=assumed,
        unit="mm",
        clause="IS 456:2000, 23.0",
        message=f"{place.name}: {face.value} bars lie at d {placed:.0f} mm, the calculation "
        f"used {assumed:.0f}" + (" (its cover is to the main bar?)" if cover else ""),
        remedy=f"Recalculate with d {placed:.0f}, or choose bars that need fewer layers",
    )
