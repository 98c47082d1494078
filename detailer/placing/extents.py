"""Where bars start and stop: what the engineer fixed, else what the envelope and rules ask."""

from __future__ import annotations

from dataclasses import dataclass
from math import ceil, isinf

import numpy as np

from detailer.model import Beam, LinkZone, Project, Span
from detailer.placing.demand import Demand, area
from detailer.placing.ends import Room, bend_leg, development, end_for, far_clear
from detailer.placing.runs import Run, in_line
from detailer.placing.strand import STRAIGHT, End
from detailer.rules import is456, sp34
from detailer.values import EndForm, Face


@dataclass(frozen=True, slots=True, kw_only=True)
class Extent:
    """From where to where a run goes, and how it ends. [mm]"""

    x0: float
    x1: float
    left: End = STRAIGHT
    right: End = STRAIGHT


@dataclass(frozen=True, slots=True, kw_only=True)
class Around:
    """What the extents of one run are decided by."""

    project: Project
    beam: Beam
    demand: Demand | None  # None where the beam carries no results
    depth: float  # effective depth of the run's face [mm]
    going_on: tuple[tuple[float, float], ...]  # (diameter, z) of the bars that go on
    own: tuple[tuple[float, float], ...]  # of the run itself
    setback: tuple[float, float] = (0.0, 0.0)  # of bends at the line's two ends [mm]
    upper: bool = False  # a layer above the first of bars that run through


OTHER_FACE = 70.0
"""What a leg keeps from the cover line of the other face, for its links and bars. [mm]"""


def rounded_out(value: float, step: float) -> float:
    """Return a length rounded up to a step. [mm]"""
    return ceil(value / step - 1e-9) * step


def free_end(beam: Beam, face: Face) -> float:
    """Return the cover kept at a free end. [mm]"""
    return beam.cover.top if face is Face.TOP else beam.cover.bottom


def span_extent(run: Run, around: Around) -> Extent:
    """Return the extent of bars written for spans.

    Parameters
    ----------
    run : Run
        A run with `spans`.
    around : Around
        Grades, envelope and the bars that go on.
    """
    if run.spans is None:
        raise ValueError("a run over a support has no spans")
    beam = around.beam
    first, last = beam.spans[run.spans[0]], beam.spans[run.spans[1]]
    left_given, right_given = _given(run)
    named = run.chosen.spans or (0, 0)
    x0, left = _span_end(run, around, first, -1, left_given if first.number == named[0] else None)
    x1, right = _span_end(run, around, last, 1, right_given if last.number == named[1] else None)
    return Extent(x0=x0, x1=x1, left=left, right=right)


def _given(run: Run) -> tuple[float | None, float | None]:
    """Return signed distances past the faces that the engineer gave; None where open."""
    pairs = zip(run.chosen.stop, run.chosen.reach, strict=True)
    left, right = (
        reach if reach is not None else None if stop is None else -stop for stop, reach in pairs
    )
    return left, right


def _span_end(
    run: Run, around: Around, span: Span, side: int, given: float | None
) -> tuple[float, End]:
    """Return where and how one end of a span's bars stops; side −1 is the left end."""
    beam = around.beam
    support = span.left if side < 0 else span.right
    want = run.chosen.ends[0 if side < 0 else 1]
    if support is None:
        return _tip(run, around, side, given, want)
    face = beam.clear(span)[0 if side < 0 else 1]
    if given is not None and not isinf(given):
        return face + side * given, _fixed_form(run, around, want)
    last = not beam.continuous(support)
    if given is not None:
        x = beam.start if side < 0 else beam.end
        if not last:
            return x - side * free_end(beam, run.face), _fixed_form(run, around, want)
    may_stop = not run.primary or (around.upper and not last)
    if may_stop and around.demand is not None and run.face is Face.BOTTOM:
        cut = _bottom_cut(run, around, span, side)
        if cut is not None:
            return cut, _fixed_form(run, around, want)
    if last:
        reach, end = _anchored(run, around, span, side, support, want)
        return face + side * reach, end
    return _interior(run, around, span, side, support, want)


def _fixed_form(run: Run, around: Around, want: EndForm | None) -> End:
    """Return the end the engineer asked for where the place is fixed."""
    dia = max(run.dias)
    step = around.project.practice.length_step
    match want:
        case EndForm.BEND:
            return End(EndForm.BEND, bend_leg(dia, 4 * dia, step))
        case EndForm.HOOK:
            return End(EndForm.HOOK, 4.0 * dia)
        case _:
            return End()


def _tip(
    run: Run, around: Around, side: int, given: float | None, want: EndForm | None
) -> tuple[float, End]:
    """Return how a bar ends at a free end: top bars turn down behind the last link."""
    beam = around.beam
    tip = beam.start if side < 0 else beam.end
    if given is not None and not isinf(given):
        return tip + side * given, _fixed_form(run, around, want)
    x = tip - side * free_end(beam, run.face)
    if want is None and run.face is Face.TOP and run.primary:
        want = EndForm.BEND
    return x, _fixed_form(run, around, want)


def _anchored(
    run: Run, around: Around, span: Span, side: int, support: int, want: EndForm | None
) -> tuple[float, End]:
    """Return reach past the inner face and form at the last support of the line."""
    beam, project = around.beam, around.project
    dia = max(run.dias)
    full = development(project, dia)
    at = beam.supports[support]
    must = _stress_share(run, around, span, side) * full
    if run.face is Face.TOP:
        need = full if at.monolithic else max(must, at.width - far_clear(beam, support))
        if around.demand is None and not at.monolithic:
            need = at.width - far_clear(beam, support)
    else:
        need = max(must, bottom_need(run, around, span, side, support))
    return end_for(
        dia,
        need,
        end_room(run, around, span, side, support),
        want=want,
        step=project.practice.length_step,
        least=must,
    )


def end_room(run: Run, around: Around, span: Span, side: int, support: int) -> Room:
    """Return what an end support offers the bars of a run."""
    beam = around.beam
    at = beam.supports[support]
    level = [z for _, z in around.own]
    dia = max(run.dias)
    z = level[0] if level else 0.0
    if run.face is Face.TOP:
        drop = z + dia / 2 - (span.soffit + beam.cover.bottom) - OTHER_FACE
    else:
        drop = (span.top - beam.cover.top) - (z - dia / 2) - OTHER_FACE
    past = at.width - far_clear(beam, support) - around.setback[0 if side < 0 else 1]
    return Room(past_face=past, drop=drop, capped=run.face is not Face.TOP)


def _stress_share(run: Run, around: Around, span: Span, side: int) -> float:
    """Return which share of the design stress the bars carry at the support's face."""
    if around.demand is None:
        return 0.0
    face = around.beam.clear(span)[0 if side < 0 else 1]
    moment = around.demand.tension_at(run.face, face)
    resists = around.demand.resists(span, run.face, around.own + around.going_on)
    return min(1.0, moment / resists) if resists > 0 else 0.0


def bottom_need(run: Run, around: Around, span: Span, side: int, support: int) -> float:
    """Return the embedment of bottom bars past the inner face of an end support. [mm]

    26.2.3.3 a (or b where the beams resist lateral load), and M1/V + L0 of 26.2.3.3 c.
    """
    project, at = around.project, around.beam.supports[support]
    dia = max(run.dias)
    full = development(project, dia)
    if project.lateral:
        return full
    need = is456.positive_embedment(full).value
    if around.demand is not None:
        shear = around.demand.shear_at(at.x)
        m1 = around.demand.resists(span, Face.BOTTOM, around.own + around.going_on)
        if shear > 0:
            carried = is456.support_bond_length(m1, shear, 0.0, confined=True).value
            need = max(need, full - carried + at.width / 2)
    return need


def _interior(
    run: Run, around: Around, span: Span, side: int, support: int, want: EndForm | None
) -> tuple[float, End]:
    """Return where bars of a span stop in or past an interior support."""
    beam, project = around.beam, around.project
    dia = max(run.dias)
    step = project.practice.cut_step
    at = beam.supports[support]
    near = beam.clear(span)[0 if side < 0 else 1]
    full = development(project, dia)
    if run.face is Face.BOTTOM:
        need = full if project.lateral else is456.positive_embedment(full).value
        need = max(need, _stress_share(run, around, span, side) * full)
    else:
        need = max(at.width / 2 + full, at.width)
    if _goes_past(run, around, support, side):
        return near + side * rounded_out(need, step), _fixed_form(run, around, want)
    room = end_room(run, around, span, side, support)
    if want is None and rounded_out(need, step) <= room.past_face:
        return near + side * rounded_out(need, step), End()
    reach, end = end_for(
        dia,
        need,
        room,
        want=want,
        step=project.practice.length_step,
        least=_stress_share(run, around, span, side) * full,
    )
    return near + side * reach, end


def _goes_past(run: Run, around: Around, support: int, side: int) -> bool:
    """Return whether bars of a span can run straight on into the next one's concrete."""
    beam = around.beam
    left, right = beam.spans_of(support)
    other = right if side > 0 else left
    if other is None:
        return False
    if in_line(beam, run.face, support):
        return True
    half = other.section.width / 2
    for _, z in around.own:
        if not other.soffit + beam.cover.bottom + 10 < z < other.top - beam.cover.top - 10:
            return False
    mine = left if side > 0 else right
    return mine is not None and half >= mine.section.width / 2


# -- extras --------------------------------------------------------------------------------


def _zone_at(beam: Beam, span: Span, x: float) -> LinkZone | None:
    """Return the link zone of a span at x, as chosen."""
    links = next((links for links in beam.links if links.span == span.number), None)
    if links is None:
        return None
    x0, x1 = beam.clear(span)
    free = (x1 - x0) - sum(zone.length or 0.0 for zone in links.zones)
    at = x0
    for zone in links.zones:
        at += zone.length if zone.length is not None else free
        if x <= at:
            return zone
    return links.zones[-1]


def _holds_developing(
    around: Around, span: Span, face: Face, end: float, towards: int, full: float
) -> bool:
    """Return whether the bars resist all along while those that stop still develop."""
    demand = around.demand
    if demand is None:
        return True
    least = demand.resists(span, face, around.going_on)
    most = demand.resists(span, face, around.going_on + around.own)
    xs = end + towards * np.linspace(0.0, full, 25)
    x0, x1 = around.beam.clear(span)
    xs = xs[(xs >= x0) & (xs <= x1)]
    if len(xs) == 0:
        return True
    share = np.minimum(1.0, np.abs(xs - end) / full)
    return bool(np.all(demand.tension(face, xs) <= least + share * (most - least) + 1e3))


def _pushed_out(
    run: Run, around: Around, span: Span, need: float, origin: float, side: int, limit: float
) -> float:
    """Return the reach from `origin`, rounded out and pushed on until a bar may stop there."""
    step = around.project.practice.cut_step
    full = development(around.project, max(run.dias))
    reach = rounded_out(need, step)
    first = reach
    while reach < limit:
        x = origin + side * reach
        demand = around.demand
        stops = demand is None or demand.cut_allowed(
            span,
            run.face,
            x,
            around.going_on,
            around.depth,
            max(run.dias),
            _zone_at(around.beam, span, x),
        )
        if stops and _holds_developing(around, span, run.face, x, -side, full):
            return reach
        reach += step
    return first if reach >= limit and around.demand is None else min(reach, max(limit, first))


def _bottom_cut(run: Run, around: Around, span: Span, side: int) -> float | None:
    """Return where bottom extras may stop short of a support; None where they must run in."""
    demand, beam = around.demand, around.beam
    if demand is None or not around.going_on:
        return None
    x0, x1 = beam.clear(span)
    support = span.left if side < 0 else span.right
    if support is None:
        return None
    share = is456.positive_share(beam.continuous(support)).value
    going = sum(area(d) for d, _ in around.going_on)
    if going < share * (going + sum(area(d) for d, _ in around.own)):
        return None
    peak, _ = demand.peak(Face.BOTTOM, x0, x1)
    face = x0 if side < 0 else x1
    capacity = demand.resists(span, Face.BOTTOM, around.going_on)
    theory = demand.falls_to(Face.BOTTOM, peak, face, capacity)
    dia = max(run.dias)
    past = is456.cutoff_extension(around.depth, dia).value
    need = max(abs(theory - peak) + past, development(around.project, dia))
    limit = abs(face - peak)
    reach = _pushed_out(run, around, span, need, peak, side, limit)
    inside = limit - reach
    return None if inside < 300 else face - side * inside // 1


def support_extent(run: Run, around: Around) -> Extent:
    """Return the extent of extras over a support.

    Parameters
    ----------
    run : Run
        A run with a support.
    around : Around
        Grades, envelope and the bars that go on.
    """
    if run.support is None:
        raise ValueError("a run over spans has no support")
    (x0, left), (x1, right) = (_extra_end(run, around, side) for side in (-1, 1))
    return Extent(x0=x0, x1=x1, left=left, right=right)


def _extra_end(run: Run, around: Around, side: int) -> tuple[float, End]:
    """Return where and how extras over a support stop on one side of it."""
    beam = around.beam
    support = run.support
    if support is None:
        raise ValueError("a run over spans has no support")
    at = beam.supports[support]
    span = beam.spans_of(support)[0 if side < 0 else 1]
    want = run.chosen.ends[0 if side < 0 else 1]
    given = run.chosen.reach[0 if side < 0 else 1]
    face = at.left if side < 0 else at.right
    if span is None:
        inner = beam.spans_of(support)[1 if side < 0 else 0]
        if inner is None:
            raise ValueError(f"support {at.name} carries no span")
        if given is not None and not isinf(given):
            return face + side * given, _fixed_form(run, around, want)
        reach, end = _anchored(run, around, inner, side, support, want)
        near = at.right if side < 0 else at.left
        return near + side * reach, end
    if given is not None and isinf(given):
        tip = beam.start if side < 0 else beam.end
        return tip - side * free_end(beam, run.face), _fixed_form(run, around, want)
    if given is not None:
        return face + side * given, _fixed_form(run, around, want)
    need = support_need(run, around, span, side, support)
    x0, x1 = beam.clear(span)
    limit = x1 - x0 + (at.width if not span.overhang else -free_end(beam, run.face))
    if need >= limit and span.overhang:
        tip = beam.start if side < 0 else beam.end
        return tip - side * free_end(beam, run.face), _fixed_form(run, around, want)
    if not span.overhang and _never_falls(run, around, span, face, side):
        reach = _meeting(run, around, span, face, side)
    else:
        reach = _pushed_out(run, around, span, need, face, side, (x1 - x0) / 2)
    far = span.right if side > 0 else span.left
    if far is not None and not beam.continuous(far) and reach > x1 - x0:
        past, end = _anchored(run, around, span, side, far, want)
        return (x1 if side > 0 else x0) + side * past, end
    return face + side * max(reach, 0.0), _fixed_form(run, around, want)


def _never_falls(run: Run, around: Around, span: Span, face: float, side: int) -> bool:
    """Return whether the bars that go on alone resist nowhere in a span."""
    if around.demand is None:
        return False
    x0, x1 = around.beam.clear(span)
    far = x1 if side > 0 else x0
    capacity = around.demand.resists(span, run.face, around.going_on)
    return around.demand.falls_to(run.face, face, far, capacity) == far


def _meeting(run: Run, around: Around, span: Span, face: float, side: int) -> float:
    """Return the reach of extras that are needed all across a span.

    Where the next support has extras too, both lap where the tension is least; else they
    run over that support and are developed beyond it.
    """
    beam, project, demand = around.beam, around.project, around.demand
    step = project.practice.cut_step
    full = development(project, max(run.dias))
    other = span.right if side > 0 else span.left
    x0, x1 = beam.clear(span)
    met = any(b.face is run.face and b.support == other for b in beam.bars)
    if demand is None or not met or other is None:
        past = beam.supports[other].width if other is not None else 0.0
        return rounded_out(x1 - x0 + past + full, step)
    xs = np.linspace(x0, x1, 101)
    calm = float(xs[int(np.argmin(demand.tension(run.face, xs)))])
    calm = min(max(calm, x0 + full), x1 - full) if x1 - x0 > 2 * full else (x0 + x1) / 2
    return rounded_out(abs(calm - face) + 0.7 * full, step)


def support_need(run: Run, around: Around, span: Span, side: int, support: int) -> float:
    """Return how far past the support's face extras must reach. [mm]

    Theoretical cut-off of the bars that go on, plus max(d, 12 φ); the development length
    past the face (past the centre of a wall); the third of 26.2.3.4.
    """
    beam, project = around.beam, around.project
    at = beam.supports[support]
    dia = max(run.dias)
    face = at.left if side < 0 else at.right
    peak = 0.0 if at.monolithic else at.width / 2
    need = development(project, dia) - peak
    x0, x1 = beam.clear(span)
    clear = x1 - x0
    if around.demand is None:
        return max(need, sp34.TOP_EXTRA_REACH * clear)
    far = x1 if side > 0 else x0
    start = face if at.monolithic else at.x
    capacity = around.demand.resists(span, run.face, around.going_on)
    theory = around.demand.falls_to(run.face, start, far, capacity)
    past = is456.cutoff_extension(around.depth, dia).value
    if abs(theory - start) > 0 or around.demand.tension_at(run.face, start) > capacity:
        reach = abs(theory - face)
        need = max(need, reach if span.overhang and theory == far else reach + past)
    going = sum(area(d) for d, _ in around.going_on)
    own = sum(area(d) for d, _ in around.own)
    if run.face is Face.TOP and going < is456.negative_share().value * (going + own):
        zero = around.demand.falls_to(run.face, start, far, 0.0)
        beyond = is456.negative_extension(around.depth, dia, clear).value
        need = max(need, abs(zero - face) + beyond)
    return need
