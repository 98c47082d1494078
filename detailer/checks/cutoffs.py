"""May each bar stop where it stops? IS 456:2000, 26.2.3.1, 26.2.3.2."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass

import numpy as np

from detailer.checks.case import Case
from detailer.checks.demand import tension_asked
from detailer.findings import Finding
from detailer.model import Span, Support
from detailer.rules import is456
from detailer.statics import Envelope
from detailer.strength.development import Rod
from detailer.strength.slices import area
from detailer.values import ContactKind, Face, Severity

TOGETHER = 30.0
"""Ends closer than this stop together. [mm]"""

NO_TENSION = 2e5
"""A moment below this puts no bar in tension. [N·mm]"""


@dataclass(frozen=True, slots=True)
class Cut:
    """Bars of a face that stop together within a span."""

    x: float
    into: int  # +1 where the bars lie to the right of x, −1 to the left
    face: Face
    span: Span
    bars: tuple[Rod, ...]

    @property
    def ids(self) -> tuple[tuple[str, int], ...]:
        """Return the real bars that stop."""
        return tuple((bar.id, bar.placing) for bar in self.bars)

    @property
    def marks(self) -> tuple[str, ...]:
        """Return their marks."""
        return tuple(sorted({bar.mark for bar in self.bars}))


def cuts(case: Case) -> tuple[Cut, ...]:
    """Return the places within spans where bars stop, laps and free ends left out.

    Parameters
    ----------
    case : Case
        The member.
    """
    beam = case.beam
    ends: list[tuple[float, int, Rod]] = []
    for bar in case.steel.bars:
        if bar.face not in (Face.TOP, Face.BOTTOM):
            continue
        for tip, into in ((bar.tips[0], 1), (bar.tips[1], -1)):
            held = any(s.left <= tip <= s.right for s in beam.supports)
            free = tip < beam.start + 100 or tip > beam.end - 100
            if not held and not free and not _lapped(case, bar, tip):
                ends.append((tip, into, bar))
    found: list[Cut] = []
    for tip, into, bar in sorted(ends, key=lambda e: (e[2].face.value, e[1], e[0], e[2].id)):
        last = found[-1] if found else None
        if last and last.face is bar.face and last.into == into and abs(last.x - tip) < TOGETHER:
            found[-1] = Cut(last.x, into, bar.face, last.span, (*last.bars, bar))
        else:
            found.append(Cut(tip, into, bar.face, beam.span_at(tip), (bar,)))
    return tuple(found)


def _lapped(case: Case, bar: Rod, tip: float) -> bool:
    """Return whether a bar's end lies in a declared lap."""
    return any(
        c.kind is ContactKind.LAP and bar.id in (c.a, c.b) and c.x0 - 5 <= tip <= c.x1 + 5
        for c in case.cage.contacts
    )


def check(case: Case) -> Iterator[Finding]:
    """Yield bars that stop too early, or in tension without what that asks.

    Parameters
    ----------
    case : Case
        The member.
    """
    if case.envelope is None:
        return
    for cut in cuts(case):
        yield from _extension(case, cut, case.envelope)
        yield from _in_tension(case, cut, case.envelope)


def _extension(case: Case, cut: Cut, envelope: Envelope) -> Iterator[Finding]:
    """Yield where bars end closer than max(d, 12 φ) to where they are no longer needed."""
    far = max(abs(end - cut.x) for bar in cut.bars for end in bar.tips)
    x0, x1 = case.beam.clear(cut.span)
    xs = cut.x + cut.into * np.arange(0.0, far, 5.0)
    xs = xs[(xs >= x0) & (xs <= x1)]
    if len(xs) == 0:
        return
    rest = case.steel.profile(
        xs, sagging=cut.face is Face.BOTTOM, full=True, without=cut.ids, span=cut.span
    )
    asked = tension_asked(case, envelope, cut.span, cut.face, xs)
    over = np.nonzero(asked > np.maximum([r.moment * 1.001 for r in rest], NO_TENSION))[0]
    if len(over) == 0:
        return
    k = int(over[0])
    theory = float(xs[k])
    d = rest[k].d or case.steel.depth(theory, cut.face, cut.span)
    need = is456.cutoff_extension(d, max(bar.dia for bar in cut.bars))
    kept = abs(theory - cut.x) if k else 0.0
    if kept >= need.value - 6.0:
        return
    support = _behind(case, cut)
    past = 0.0
    if support is not None:
        face = support.left if cut.into > 0 else support.right
        past = abs(face - theory)
    found, asked_for = past + kept, past + need.value
    place = case.place(cut.x) if support is None else case.place(support.x)
    where = "past the face" if support is not None else "past the point where they may stop"
    yield Finding(
        rule="cut-off-extension",
        severity=Severity.UNSAFE,
        member=case.beam.mark,
        place=place,
        x=cut.x,
        bars=cut.marks,
        found=round(found),
        required=round(asked_for),
        unit="mm",
        clause=need.clause,
        message=f"{place.name}: {cut.face.value} bars {', '.join(cut.marks)} stop {found:.0f} mm "
        f"{where}, {asked_for:.0f} needed ({need.because} past the theoretical cut-off)",
        remedy=f"Extend them by {asked_for - found:.0f} mm",
    )


def _behind(case: Case, cut: Cut) -> Support | None:
    """Return the support next to the cut that the stopped bars pass."""
    tips = [tip for bar in cut.bars for tip in bar.tips]
    passed = [
        s
        for s in case.beam.supports
        if (s.x - cut.x) * cut.into > 0 and min(tips) < s.x < max(tips)
    ]
    return min(passed, key=lambda s: abs(s.x - cut.x), default=None)


def _in_tension(case: Case, cut: Cut, envelope: Envelope) -> Iterator[Finding]:
    """Yield bars that stop in a tension zone by none of the three ways of 26.2.3.2."""
    at = np.array([cut.x])
    asked = float(tension_asked(case, envelope, cut.span, cut.face, at)[0])
    if asked <= NO_TENSION:
        return
    capacity = case.shear.capacity(cut.x, cut.span, cut.face)
    least, most = envelope.shears(at)
    shear = float(max(-least[0], most[0]))
    plain = is456.cutoff_shear_limit(capacity.total)
    if shear <= plain.value * 1.001 or _doubled(case, cut, asked, shear, capacity.total):
        return
    if _extra_links(case, cut, shear, capacity.concrete):
        return
    place = case.place(cut.x)
    support = _behind(case, cut)
    if support is not None:
        place = case.place(support.x)
    yield Finding(
        rule="cut-off-in-tension",
        severity=Severity.UNSAFE,
        member=case.beam.mark,
        place=place,
        x=cut.x,
        bars=cut.marks,
        found=round(shear / 1e3, 1),
        required=round(plain.value / 1e3, 1),
        unit="kN",
        clause="IS 456:2000, 26.2.3.2",
        message=f"{place.name}: {cut.face.value} bars {', '.join(cut.marks)} stop in tension "
        f"where shear is {shear / 1e3:.0f} kN, {plain.value / 1e3:.0f} allowed "
        f"({plain.because}); neither extra links nor double area serve",
        remedy="Extend them until shear or tension is less, or add links over 3/4 d",
    )


def _doubled(case: Case, cut: Cut, asked: float, shear: float, permitted: float) -> bool:
    """Return whether what goes on is twice what is needed (26.2.3.2 c)."""
    if max(bar.dia for bar in cut.bars) > is456.CUTOFF_DOUBLE_MAX_DIA:
        return False
    rest = case.steel.profile(
        np.array([cut.x]),
        sagging=cut.face is Face.BOTTOM,
        full=True,
        without=cut.ids,
        span=cut.span,
    )[0]
    enough = rest.moment >= 2 * asked
    return enough and shear <= is456.cutoff_double_area_limit(permitted).value * 1.001


def _extra_links(case: Case, cut: Cut, shear: float, concrete: float) -> bool:
    """Return whether links over 3/4 d along the stopped bars exceed need enough (26.2.3.2 b)."""
    d = case.steel.depth(cut.x, cut.face, cut.span) or cut.span.section.depth
    stopped = sum(area(bar.dia) for bar in cut.bars)
    here = case.steel.at(cut.x + cut.into, cut.face)
    beta = stopped / max(sum(area(bar.dia) for bar in here), stopped)
    fy = case.project.steel.links.fy
    b = cut.span.section.width
    for share in (0.0, 0.25, 0.5, 0.75):
        asv, s = case.shear.around(cut.x + cut.into * share * d, cut.span)
        if asv == 0 or s > is456.cutoff_link_spacing(d, beta).value:
            return False
        needed = max(0.0, shear - concrete) * s / (0.87 * min(fy, is456.LINK_FY_LIMIT) * d)
        if asv - needed < is456.cutoff_extra_links(b, s, fy).value:
            return False
    return True
