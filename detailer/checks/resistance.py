"""Do the bars, at the stress their embedment develops, resist the envelope everywhere?"""

from __future__ import annotations

from collections.abc import Iterator

import numpy as np
from numpy.typing import NDArray

from detailer.checks.case import Case
from detailer.checks.demand import moments_asked
from detailer.findings import Finding
from detailer.model import Span
from detailer.strength.bending import Resistance
from detailer.values import Face, Severity

SLACK = 1.002
"""A moment counts as resisted when it is greater by no more than this factor."""


def check(case: Case) -> Iterator[Finding]:
    """Yield one finding for each stretch where the moment exceeds the resistance.

    Parameters
    ----------
    case : Case
        The member.

    References
    ----------
    .. [1] IS 456:2000, 38.1, 26.2.1 and, for what torsion adds, 41.4.2.
    """
    if case.envelope is None:
        return
    for span in case.beam.spans:
        xs = case.envelope.sample(span, 50.0)
        bottom, top = moments_asked(case, case.envelope, span, xs)
        for sagging, asked in ((True, bottom), (False, top)):
            carried = case.steel.profile(xs, sagging=sagging, span=span)
            have = np.array([r.moment for r in carried])
            short = asked > np.maximum(have * SLACK, 1e5)
            for k in _worst_of_stretches(short, asked - have):
                yield _finding(case, span, float(xs[k]), float(asked[k]), carried[k], sagging)


def _worst_of_stretches(short: NDArray[np.bool_], lack: NDArray[np.float64]) -> Iterator[int]:
    """Yield the index of the greatest lack in each run of True."""
    start = 0
    while start < len(short):
        if not short[start]:
            start += 1
            continue
        stop = start
        while stop < len(short) and short[stop]:
            stop += 1
        yield start + int(np.argmax(lack[start:stop]))
        start = stop


def _finding(
    case: Case, span: Span, x: float, asked: float, carried: Resistance, sagging: bool
) -> Finding:
    face = Face.BOTTOM if sagging else Face.TOP
    here = case.steel.at(x, face)
    full = case.steel.profile(np.array([x]), sagging=sagging, full=True, span=span)[0]
    place = case.place(x)
    twisted = case.envelope is not None and case.envelope.torsion(x) > 0
    if carried.over_reinforced:
        why, remedy = "the neutral axis is at its limit", "Add compression steel or depth"
    elif full.moment * SLACK >= asked:
        why, remedy = "the bars are not developed there", "Extend or anchor the bars further"
    else:
        why, remedy = f"d {carried.d:.0f} mm as placed", f"Add {face.value} steel"
    return Finding(
        rule="bending",
        severity=Severity.UNSAFE,
        member=case.beam.mark,
        place=place,
        x=x,
        bars=tuple(sorted({bar.mark for bar in here})),
        found=round(carried.moment / 1e6, 1),
        required=round(asked / 1e6, 1),
        unit="kN m",
        clause="IS 456:2000, 38.1, 26.2.1" + (", 41.4.2" if twisted else ""),
        message=f"{place.name}: {face.value} steel resists {carried.moment / 1e6:.1f} kN m, "
        f"{asked / 1e6:.1f} needed{', torsion included' if twisted else ''} ({why})",
        remedy=remedy,
    )
