"""Every run gets its places across the section and its extent along the beam: runs to strands."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass, replace

from detailer.model import Beam, Project
from detailer.placing.demand import Demand, area
from detailer.placing.extents import Around, Extent, span_extent, support_extent
from detailer.placing.frame import Frame, common, frame_of
from detailer.placing.lanes import Seat, Spacing, seat_extras, seat_primary
from detailer.placing.runs import Run, runs_of
from detailer.placing.strand import Strand
from detailer.rules import is456
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


def spacing_of(project: Project, beam: Beam) -> Spacing:
    """Return what decides how close the bars of a beam may lie.

    Layers are held apart by spacer bars, so the gap between them is the spacer's size: the
    smallest size held that is at least the code's gap and the office's spacer.
    """
    return Spacing(aggregate=project.concrete.aggregate, layer_gap=float(spacer_dia(project, beam)))


def spacer_dia(project: Project, beam: Beam) -> int:
    """Return the diameter of spacer bars between layers. [mm]

    Parameters
    ----------
    project : Project
        Its sizes and practice.
    beam : Beam
        Its largest bar decides the code's gap.
    """
    largest = max((g.dia for bars in beam.bars for g in bars.groups), default=0)
    code = is456.min_layer_gap(largest, project.concrete.aggregate).value
    given = project.practice.layer_gap
    need = given if given is not None else max(code, float(project.practice.spacer_size))
    return next((d for d in sorted(project.steel.sizes) if d >= need - 1e-6), round(need))


def seat_all(project: Project, beam: Beam, demand: Demand | None) -> tuple[Seated, ...]:
    """Seat every run of a beam and find where it starts and stops.

    Parameters
    ----------
    project, beam : Project, Beam
        What is to be placed.
    demand : Demand or None
        None where the beam carries no results.
    """
    runs = [run for run in runs_of(beam) if run.face in (Face.TOP, Face.BOTTOM)]
    done: list[Seated] = []
    spacing = spacing_of(project, beam)
    order = sorted(
        range(len(runs)), key=lambda i: (runs[i].face is Face.BOTTOM, not runs[i].primary, i)
    )
    for index in order:
        run = runs[index]
        frame = common([frame_of(beam, beam.spans[n]) for n in _spans_of(beam, run)])
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
            (layer, _extent(run, replace(around, setback=_setback(beam, done, run, layer))))
            for layer in layers
        )
        done.append(replace(seated, extents=extents))
    return tuple(sorted(done, key=lambda s: s.index))


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
