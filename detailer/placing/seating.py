"""Every run gets its places across the section and its extent along the beam: runs to strands."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass, replace
from math import sqrt

from detailer.model import Beam, Project
from detailer.placing.demand import Demand, area
from detailer.placing.extents import Around, Extent, span_extent, support_extent
from detailer.placing.frame import Frame, common, frame_of
from detailer.placing.lanes import Seat, Spacing, seat_extras, seat_primary
from detailer.placing.links import hooks_meet
from detailer.placing.runs import Run, runs_of
from detailer.placing.strand import Strand
from detailer.rules import is456, is2502
from detailer.values import EndForm, Face, Role


@dataclass(frozen=True, slots=True)
class Seated:
    """A run with its places, its extents by layer, and the runs it was seated among."""

    run: Run
    index: int
    frame: Frame
    seats: tuple[Seat, ...]
    among: tuple[int, ...]
    extents: tuple[tuple[int, Extent], ...] = ()

    def rows(self) -> tuple[tuple[float, float], ...]:
        """Return (diameter, z) of its bars."""
        face = self.run.face
        return tuple((float(s.dia), self.frame.level(face, s.depth)) for s in self.seats)


def spacer_dia(project: Project, beam: Beam, *, past_hooks: bool = False) -> int:
    """Return the diameter of spacer bars between layers, which is the gap they hold. [mm]

    Parameters
    ----------
    project : Project
        Its sizes and practice.
    beam : Beam
        Its largest bar decides the code's gap.
    past_hooks : bool
        Whether the tails of hooks must pass between a corner bar and the layer above it:
        where both faces have a second layer no corner is free of them.
    """
    largest = max((g.dia for bars in beam.bars for g in bars.groups), default=0)
    code = is456.min_layer_gap(largest, project.concrete.aggregate).value
    given = project.practice.layer_gap
    need = given if given is not None else max(code, float(project.practice.spacer_size))
    if past_hooks and given is None:
        need = max(need, _gap_for_tails(beam))
    held = sorted(project.steel.sizes)
    return next((d for d in held if d >= need - 1e-6), held[-1])


def _gap_for_tails(beam: Beam) -> float:
    """Return the gap between layers that lets the 45° tail of a hook pass. [mm]"""
    sizes = [group.dia for bars in beam.bars for group in bars.groups]
    link = max(zone.dia for links in beam.links for zone in links.zones)
    bend = max(is2502.bend_radius(link, link=True), max(sizes) / 2)
    return sqrt(2) * (bend + link + max(sizes) / 2) - min(sizes) + 0.1


def seat_all(project: Project, beam: Beam, demand: Demand | None) -> tuple[tuple[Seated, ...], int]:
    """Seat every run of a beam and find where it starts and stops.

    Parameters
    ----------
    project, beam : Project, Beam
        What is to be placed.
    demand : Demand or None
        None where the beam carries no results.

    Returns
    -------
    seated, spacer
        The runs, and the diameter of the bars that hold layers apart. [mm]
    """
    spacer = spacer_dia(project, beam)
    seated = _seated(project, beam, demand, spacer)
    if len({s.run.face for s in seated for seat in s.seats if seat.layer > 1}) < 2:
        return seated, spacer
    wider = spacer_dia(project, beam, past_hooks=True)
    tries = [(seated, spacer)]
    for size in sorted({spacer, wider}):
        for last in (Face.TOP, Face.BOTTOM, None):
            if _hooks_meet(project, beam, tries[-1][0]) <= 0:
                return tries[-1]
            tries.append((_seated(project, beam, demand, size, corners_last=last), size))
    return min(tries, key=lambda t: _hooks_meet(project, beam, t[0]))


def _hooks_meet(project: Project, beam: Beam, seated: tuple[Seated, ...]) -> float:
    """Return how deep the tails of links cut into the seated bars, at the worst place. [mm]"""
    worst = 0.0
    for links in beam.links:
        span = next(s for s in beam.spans if s.number == links.span)
        n = beam.spans.index(span)
        frame = frame_of(beam, span)
        through = [s for s in seated if s.run.spans is not None and n in _spans_of(beam, s.run)]
        for support in (span.left, span.right):
            extras = [s for s in seated if s.run.spans is None and s.run.support == support]
            bars = tuple(
                (seat.y, s.frame.level(s.run.face, seat.depth), float(seat.dia))
                for s in (*through, *extras)
                for seat in s.seats
            )
            zone = max(links.zones, key=lambda z: z.dia)
            worst = max(worst, hooks_meet(frame, zone, bars))
    return worst


def _seated(
    project: Project,
    beam: Beam,
    demand: Demand | None,
    spacer: int,
    *,
    corners_last: Face | None = None,
) -> tuple[Seated, ...]:
    """Return the runs with their places and extents, layers held apart by a spacer."""
    runs = [run for run in runs_of(beam) if run.face in (Face.TOP, Face.BOTTOM)]
    done: list[Seated] = []
    order = sorted(
        range(len(runs)), key=lambda i: (runs[i].face is Face.BOTTOM, not runs[i].primary, i)
    )
    for index in order:
        run = runs[index]
        frame = common([frame_of(beam, beam.spans[n]) for n in _spans_of(beam, run)])
        spacing = Spacing(
            aggregate=project.concrete.aggregate,
            layer_gap=float(spacer),
            corners_last=run.face is corners_last,
        )
        among = [s for s in done if s.run.face is run.face and _meet(beam, s.run, run)]
        if run.primary:
            seats = seat_primary(frame, run.dias, run.chosen.layer, spacing)
            among = []
        else:
            among = _one_primary(among)
            taken = tuple(seat for s in among for seat in s.seats)
            seats = seat_extras(frame, taken, run.dias, run.chosen.layer, spacing)
        seated = Seated(run, index, frame, seats, tuple(s.index for s in among))
        around = _around(project, beam, demand, seated, among)
        layers = sorted({seat.layer for seat in seats})
        extents = tuple(
            (
                layer,
                _extent(
                    run,
                    replace(
                        _of_layer(around, seated, layer),
                        setback=_setback(beam, done, run, layer),
                    ),
                ),
            )
            for layer in layers
        )
        done.append(replace(seated, extents=extents))
    return tuple(sorted(done, key=lambda s: s.index))


def _of_layer(around: Around, seated: Seated, layer: int) -> Around:
    """Return what decides the extent of one layer: the layers before it go on.

    Bars of a second layer at the bottom may stop short of an inner support where the first
    layer is what must enter it; so they do not crowd the joint.
    """
    if layer == 1 or not seated.run.primary or seated.run.face is not Face.BOTTOM:
        return around
    rows = seated.rows()
    before = tuple(row for row, seat in zip(rows, seated.seats, strict=True) if seat.layer < layer)
    own = tuple(row for row, seat in zip(rows, seated.seats, strict=True) if seat.layer >= layer)
    return replace(around, going_on=before, own=own, upper=True)


def _extent(run: Run, around: Around) -> Extent:
    return span_extent(run, around) if run.spans is not None else support_extent(run, around)


def _spans_of(beam: Beam, run: Run) -> list[int]:
    """Return indices of the spans a run lies in."""
    if run.spans is not None:
        return list(range(run.spans[0], run.spans[1] + 1))
    return [n for n, span in enumerate(beam.spans) if run.support in (span.left, span.right)]


def _meet(beam: Beam, a: Run, b: Run) -> bool:
    """Return whether two runs share a span, as written."""
    if a.support is not None and b.support is not None:
        return a.support == b.support
    return bool(set(_spans_of(beam, a)) & set(_spans_of(beam, b)))


def _one_primary(among: list[Seated]) -> list[Seated]:
    """Keep, of primaries that meet over a support, the one with the most bars."""
    primaries = [s for s in among if s.run.primary]
    if len(primaries) < 2:
        return among
    most = max(primaries, key=lambda s: (len(s.seats), -s.index))
    return [s for s in among if not s.run.primary or s is most]


def _around(
    project: Project, beam: Beam, demand: Demand | None, seated: Seated, among: list[Seated]
) -> Around:
    """Return what decides the extents of a run."""
    run = seated.run
    going = tuple(row for s in among for row in s.rows())
    rows = going or seated.rows()
    steel = sum(area(d) for d, _ in rows)
    level = sum(area(d) * z for d, z in rows) / steel
    spans = [beam.spans[n] for n in _spans_of(beam, run)]
    if run.face is Face.BOTTOM:
        depth = min(span.top for span in spans) - level
    else:
        depth = level - max(span.soffit for span in spans)
    return Around(
        project=project,
        beam=beam,
        demand=demand,
        depth=depth,
        going_on=going,
        own=seated.rows(),
    )


def _setback(beam: Beam, done: list[Seated], run: Run, layer: int) -> tuple[float, float]:
    """Return how far inside bends must stay at the two ends of the line. [mm]

    Bends of a second layer lie inside those of the first; bends of bottom bars inside
    those of top bars.
    """
    clear = 25.0
    own = (layer - 1) * (max(run.dias) + clear)
    others = [0.0, 0.0]
    for seated in done:
        if seated.run.face is run.face:
            continue
        for at, extent in seated.extents:
            dia = max(seated.run.dias)
            for side, end in enumerate((extent.left, extent.right)):
                outer = (
                    extent.x0 <= beam.supports[0].right
                    if side == 0
                    else (extent.x1 >= beam.supports[-1].left)
                )
                if end.form is not EndForm.STRAIGHT and outer:
                    others[side] = max(others[side], at * (dia + clear))
    return own + others[0], own + others[1]


def strands_of(project: Project, seated: tuple[Seated, ...]) -> Iterator[Strand]:
    """Yield one strand a real bar."""
    for item in seated:
        extents = dict(item.extents)
        for seat in item.seats:
            extent = extents[seat.layer]
            yield Strand(
                run=item.index,
                role=Role.MAIN,
                face=item.run.face,
                layer=seat.layer,
                dia=float(seat.dia),
                y=seat.y,
                z=item.frame.level(item.run.face, seat.depth),
                x0=extent.x0,
                x1=extent.x1,
                left=extent.left,
                right=extent.right,
                corner=seat.corner,
            )
