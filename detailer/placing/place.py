"""From the chosen bars of a beam to its cage."""

from __future__ import annotations

from dataclasses import replace
from math import pi

import numpy as np

from detailer.cage.bar import Bar, Cage
from detailer.cage.contacts import corner_contacts
from detailer.model import Beam, Project
from detailer.placing import contacts
from detailer.placing.asides import Settling, settle
from detailer.placing.concrete import prisms_of, rests_of
from detailer.placing.demand import Demand
from detailer.placing.ends import development
from detailer.placing.frame import Frame, common, frame_of
from detailer.placing.laps import Lapping, lapped
from detailer.placing.links import LinkRow, link_bars, stations
from detailer.placing.others import SIDE_INTO_SUPPORT, side_strands, spacer_bars
from detailer.placing.seating import Seated, seat_all, strands_of
from detailer.placing.strand import Strand, path
from detailer.statics import Envelope
from detailer.values import Face


def place(project: Project, beam: Beam, envelope: Envelope | None) -> Cage:
    """Place the chosen bars and links of a beam.

    Parameters
    ----------
    project : Project
        Grades, practice, rules.
    beam : Beam
        One beam line with its bars chosen.
    envelope : Envelope or None
        What the design asks; None lets bars stop by simplified rules.

    Returns
    -------
    Cage
        Every bar really bent and really placed; marks are still to be given. What could
        not be placed well is placed as written: the checks find it.
    """
    demand = Demand(project, beam, envelope) if envelope is not None else None
    frames = {span.number: frame_of(beam, span) for span in beam.spans}
    seated, spacer = seat_all(project, beam, demand)
    strands = _strands(project, beam, demand, seated)
    sides = tuple(
        side_strands(project, beam, frames, strands, _side_anchorage(project, beam, demand))
    )
    strands = (*strands, *settle(sides, _settling(project, beam, frozenset())))
    rows = _link_rows(project, beam)
    links = tuple(
        bar
        for number, frame in frames.items()
        for bar in link_bars(frame, rows[number], strands, project.steel.links.name)
    )
    xs = tuple(sorted(x for group in rows.values() for row in group for x in row.xs))
    spacers = tuple(spacer_bars(project, beam, frames, strands, xs, spacer))
    pairs, bars = _bars(project, strands)
    cover = beam.cover
    cage = Cage(
        member=beam.mark,
        copies=beam.copies,
        mirrored=beam.mirrored,
        supports=rests_of(beam),
        prisms=prisms_of(beam),
        cover=(cover.top, cover.bottom, cover.left, cover.right),
        aggregate=project.concrete.aggregate,
        bars=(*bars, *links, *spacers),
        origin=_origin(project, beam),
        direction=beam.direction,
    )
    declared = {
        *contacts.laps(pairs),
        *contacts.crossings(spacers, pairs),
        *corner_contacts(cage),
    }
    order = sorted(declared, key=lambda c: (c.kind.value, c.a, c.b, c.x0))
    return replace(cage, contacts=tuple(order))


def _strands(
    project: Project, beam: Beam, demand: Demand | None, seated: tuple[Seated, ...]
) -> tuple[Strand, ...]:
    """Return the bars of top and bottom, lapped where needed, out of each other's way."""
    raw = tuple(strands_of(project, seated))
    pieces: list[Strand] = []
    for item in seated:
        mine = tuple(s for s in raw if s.run == item.index)
        others = tuple(s for s in raw if s.run != item.index and s.face is item.run.face)
        lapping = Lapping(project=project, beam=beam, demand=demand, seated=item, others=others)
        pieces += [piece for line in lapped(mine, lapping) for piece in line]
    return settle(pieces, _settling(project, beam, _seated_together(seated)))


def _settling(project: Project, beam: Beam, together: frozenset[tuple[int, int]]) -> Settling:
    """Return what decides whether bars may lie where they lie."""

    def room(x0: float, x1: float) -> Frame:
        frames = [frame_of(beam, span) for span in beam.spans if span.x0 <= x1 and span.x1 >= x0]
        return common(frames or [frame_of(beam, beam.span_at(x0))])

    return Settling(aggregate=project.concrete.aggregate, room=room, together=together)


def _seated_together(seated: tuple[Seated, ...]) -> frozenset[tuple[int, int]]:
    """Return pairs of runs whose places were chosen together."""
    pairs = {(item.index, other) for item in seated for other in item.among}
    for item in seated:
        pairs |= {(a, b) for a in item.among for b in item.among}
    return frozenset(pairs)


def _side_anchorage(project: Project, beam: Beam, demand: Demand | None) -> float:
    """Return how far side bars run past the faces: developed where they resist torsion."""
    sizes = [g.dia for b in beam.bars if b.face is Face.NONE for g in b.groups]
    if demand is None or not sizes:
        return SIDE_INTO_SUPPORT
    xs = np.linspace(beam.start, beam.end, 50)
    twisted = any(demand.envelope.torsion(float(x)) > 0 for x in xs)
    return development(project, max(sizes)) if twisted else SIDE_INTO_SUPPORT


def _link_rows(project: Project, beam: Beam) -> dict[int, tuple[LinkRow, ...]]:
    """Return where links stand, by span number."""
    return {
        span.number: tuple(
            row
            for chosen in beam.links
            if chosen.span == span.number
            for row in stations(project, beam, span, chosen.zones)
        )
        for span in beam.spans
    }


PREFIX = {Face.TOP: "T", Face.BOTTOM: "B", Face.LEFT: "S", Face.RIGHT: "S"}


def _bars(
    project: Project, strands: tuple[Strand, ...]
) -> tuple[tuple[tuple[str, Strand], ...], tuple[Bar, ...]]:
    """Return strands under the id of their bar, and the bars: like strands share one entry."""
    groups: dict[tuple[object, ...], list[Strand]] = {}
    for s in sorted(strands, key=lambda s: (s.face.value, s.layer, s.x0, s.run, s.y)):
        key = (
            s.face,
            s.layer,
            s.role,
            s.dia,
            s.z,
            s.x0,
            s.x1,
            s.left,
            s.right,
            s.aside,
            s.aside_to,
        )
        groups.setdefault(key, []).append(s)
    numbers: dict[str, int] = {}
    pairs: list[tuple[str, Strand]] = []
    bars: list[Bar] = []
    for alike in groups.values():
        first = alike[0]
        prefix = PREFIX[first.face]
        numbers[prefix] = numbers.get(prefix, 0) + 1
        id_ = f"{prefix}{numbers[prefix]}"
        corners, mandrels = path(first)
        pairs += [(id_, s) for s in alike]
        bars.append(
            Bar(
                id=id_,
                role=first.role,
                face=first.face,
                layer=first.layer,
                grade=project.steel.main.name,
                dia=first.dia,
                corners=corners,
                mandrels=mandrels,
                placings=tuple((0.0, s.y - first.y, 0.0) for s in alike),
            )
        )
    return tuple(pairs), tuple(bars)


def _origin(project: Project, beam: Beam) -> tuple[float, float, float]:
    """Return the plan position of the member's axes; zero where the grid does not name its node."""
    first = beam.supports[0]
    for x_name, x in project.grid.x:
        for y_name, y in project.grid.y:
            if first.name == f"{x_name}{y_name}":
                angle = beam.direction * pi / 180
                level = beam.level if beam.level is not None else project.grid.level or 0.0
                return (
                    x - first.offset * float(np.sin(angle)),
                    y + first.offset * float(np.cos(angle)),
                    level,
                )
    return (0.0, 0.0, beam.level or 0.0)
