"""One beam on one sheet: the views of its cage, its schedule and its notes, composed on paper."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass, replace
from functools import lru_cache

from detailer.cage.bar import Cage
from detailer.drawing.primitives import XY, Drawing, Placed, Primitive, Sheet, View
from detailer.findings import Finding
from detailer.model import Assumption, Beam, Project
from detailer.schedule.rows import Row as ScheduleRow
from detailer.statics import Envelope
from detailer.strength.slices import Steel, steel_of
from detailer.views.content import Content, size_of, stack_size
from detailer.views.cuts import Cut, cuts_of
from detailer.views.demand import curves_of
from detailer.views.elevation import stage_of
from detailer.views.frame import frame_items, status_item
from detailer.views.notes import note_items, notes_of
from detailer.views.outline import clear_spans
from detailer.views.pack import GAP, Room, Row, pack, set_rows
from detailer.views.paper import PAPERS, Paper, space_of, title_room
from detailer.views.table import table_items, table_of

SECTION_SCALES = (10.0, 15.0, 20.0)
"""Scales of sections, the largest picture first."""

MOST_HALVES = 5
"""Two groups of sections are tried with so many sizes of the first."""

MOST_GROUPS = 3
"""Sections may stand in so many groups on a sheet."""

AROUND = 10.0
"""A stack of views is at least so much wider than the beam. [mm on paper]"""

LEAST_STACK = 120.0
"""A stack of views is at least so much higher than the beam is deep. [mm on paper]"""

BESIDE = (40.0, 25.0)
"""A section takes at least so much more than its web. [mm on paper]"""


def beam_drawing(
    project: Project,
    beam: Beam,
    envelope: Envelope | None,
    cage: Cage,
    findings: tuple[Finding, ...],
    rows: tuple[ScheduleRow, ...],
    *,
    assumptions: tuple[Assumption, ...],
    steel: Steel | None = None,
) -> Drawing:
    """Return the drawing of a beam: one sheet, on the smallest paper that holds it.

    Parameters
    ----------
    project, beam : Project, Beam
        What was asked.
    envelope : Envelope or None
        What the design asks for; None draws no moments.
    cage : Cage
        What was placed, its bars marked.
    findings : tuple of Finding
        Sorted, of any members.
    rows : tuple of Row
        The schedule, of any members.
    assumptions : tuple of Assumption
        Of the project and any members.
    steel : Steel, optional
        The steel of the cage, where it has been looked at already.
    """
    clear = clear_spans(cage)
    cuts = cuts_of(cage, clear)
    strands = stage_of(cage, PAPERS[0].scale, cuts).strands
    content = Content(
        beam=beam,
        cage=cage,
        cuts=cuts,
        curves=curves_of(beam, envelope, steel or steel_of(project, beam, cage)),
        notes=notes_of(project, beam, cage, strands, findings, assumptions),
        table=table_of(cage, rows),
    )
    title = f"Beam {beam.mark}: elevation, sections, bars, moments, schedule"
    sheet = _sheet(project, content, title)
    return Drawing(
        name=beam.mark,
        title=title,
        description=_description(beam, cage, cuts),
        sheets=(sheet,),
    )


def _description(beam: Beam, cage: Cage, cuts: tuple[Cut, ...]) -> str:
    names = ", ".join(s.name for s in cage.supports)
    sections = len({cut.letter for cut in cuts})
    return (
        f"Reinforcement of beam {beam.mark} over supports {names}: elevation, {sections} sections, "
        "bars pulled out, moments with resistance, schedule and notes."
    )


def _sheet(project: Project, content: Content, title: str) -> Sheet:
    """Return the first paper on which everything has a place."""
    for paper in PAPERS:
        for scale in SECTION_SCALES:
            found = _composed(project, content, paper, scale, title)
            if found is not None:
                return found
    return _unbounded(project, content, title)


def _unbounded(project: Project, content: Content, title: str) -> Sheet:
    """Return a sheet of the last paper's scale, made as large as the content asks."""
    last = PAPERS[-1]
    for grown in range(1, 40):
        size = (last.size[0] * (1 + 0.25 * grown), last.size[1] * (1 + 0.25 * grown))
        paper = replace(last, size=size, name=f"{size[0]:.0f} × {size[1]:.0f}")
        found = _composed(project, content, paper, SECTION_SCALES[-1], title)
        if found is not None:
            return found
    raise ValueError(f"beam {content.beam.mark} is too long for any sheet")


def _composed(
    project: Project, content: Content, paper: Paper, scale: float, title: str
) -> Sheet | None:
    """Return the sheet where everything has a place; sizes are judged before views are made."""
    space = space_of(paper)
    if not _hopeful(content, paper, scale):
        return None
    about = content.about_stack(paper.scale), content.about_sections(scale)
    if _arranged(content, space, paper, *about) is None:
        return None
    stack, sections = content.stack(paper.scale), content.sections(scale)
    real = stack_size(stack), tuple(size_of(v) for v in sections)
    found = _arranged(content, space, paper, *real)
    if found is None:
        return None
    x0 = min(v.box[0] for v in stack)
    blocks, items = _blocks(content, sections, found)
    views = (*_aligned(stack, space, x0, paper.scale), *blocks)
    elevation = next(p for p in views if p.view.name.endswith(" elevation"))
    return Sheet(
        name=content.beam.mark,
        title=title,
        size=paper.size,
        views=tuple(_in_model(p, elevation) for p in views),
        items=(
            *frame_items(project, content.beam, paper, title, _scales(views)),
            status_item(paper, content.beam.mark),
            *items,
        ),
    )


@dataclass(frozen=True, slots=True, kw_only=True)
class Arranged:
    """Where schedule, notes and groups of sections lie, and how each group is set in rows."""

    groups: tuple[tuple[int, int], ...]  # first section and the one after the last
    rows: tuple[tuple[Row, ...], ...]  # each group's choices
    places: tuple[tuple[int, XY], ...]  # choice and corner of schedule, notes, groups


def _arranged(
    content: Content, space: Room, paper: Paper, stack: XY, sections: tuple[XY, ...]
) -> Arranged | None:
    """Return places for everything of these sizes, None where there are none."""
    (wide, tall), room = stack, (space.x1 - space.x0, space.y1 - space.y0)
    need = wide * tall + sum(w * h for w, h in sections) + _others(content, paper)
    if wide > room[0] or tall > room[1] or need > room[0] * room[1]:
        return None
    taken = Room(space.x0, space.y1 - tall, space.x0 + wide + GAP, space.y1)
    for groups in _groupings(len(sections)):
        rows = tuple(_rows_of(sections[a:b], room[0]) for a, b in groups)
        choices = (
            (content.table_size,),
            content.note_sizes,
            *(tuple(row.size for row in row_choices) for row_choices in rows),
        )
        found = pack(space, (taken, title_room(paper)), choices)
        if found is not None:
            return Arranged(groups=groups, rows=rows, places=found)
    return None


def _hopeful(content: Content, paper: Paper, scale: float) -> bool:
    """Return whether the least area everything needs is there, before any view is made."""
    space, deep = space_of(paper), content.depth
    wide = content.length / paper.scale + AROUND
    sections = len({cut.letter for cut in content.cuts})
    one = (content.breadth / scale + BESIDE[0]) * (deep / scale + BESIDE[1])
    need = wide * (LEAST_STACK + deep / paper.scale) + sections * one
    room = space.x1 - space.x0, space.y1 - space.y0
    return wide <= room[0] and need + _others(content, paper) <= room[0] * room[1]


def _others(content: Content, paper: Paper) -> float:
    """Return the least area that schedule, notes and title block need. [mm² on paper]"""
    table, title = content.table_size, title_room(paper)
    notes = min(w * h for w, h in content.note_sizes)
    return table[0] * table[1] + notes + (title.x1 - title.x0) * (title.y1 - title.y0)


def _scales(views: tuple[Placed, ...]) -> str:
    return ", ".join(f"1:{scale:.0f}" for scale in sorted({p.view.scale for p in views}))


def _aligned(stack: tuple[View, ...], space: Room, x0: float, scale: float) -> Iterator[Placed]:
    y = space.y1
    for view in stack:
        y -= size_of(view)[1]
        at = space.x0 + (view.box[0] - x0) / scale, y
        yield Placed(view=view, at=at, model=(0.0, 0.0))
        y -= GAP


def _in_model(placed: Placed, elevation: Placed) -> Placed:
    """Return a view with its place in model space: as on paper, the elevation where it is true."""
    k, base = elevation.view.scale, elevation.view.box
    shift = tuple(
        round((placed.at[i] - elevation.at[i]) * k + base[i] - placed.view.box[i], 3)
        for i in (0, 1)
    )
    return replace(placed, model=(shift[0], shift[1]))


def _blocks(
    content: Content, views: tuple[View, ...], found: Arranged
) -> tuple[tuple[Placed, ...], tuple[Primitive, ...]]:
    """Return sections at their places, and what schedule and notes draw on the sheet."""
    (_, table_at), (text, notes_at), *spots = found.places
    member = content.beam.mark
    items = (
        *table_items(content.table, table_at, member),
        *note_items(content.texts[text], notes_at, member),
    )
    placed = (
        each
        for (a, b), row, (i, at) in zip(found.groups, found.rows, spots, strict=True)
        for each in _in_rows(views[a:b], row[i], at)
    )
    return tuple(placed), items


def _groupings(count: int) -> Iterator[tuple[tuple[int, int], ...]]:
    """Yield sections in one group, in two of nearly equal sizes, in more of equal ones."""
    yield ((0, count),)
    halves = sorted(range(1, count), key=lambda k: (abs(2 * k - count), -k))
    yield from (((0, k), (k, count)) for k in halves[:MOST_HALVES])
    for parts in range(3, MOST_GROUPS + 1):
        size = -(-count // parts)
        yield tuple((i, min(i + size, count)) for i in range(0, count, size))


@lru_cache(maxsize=256)
def _rows_of(sizes: tuple[XY, ...], wide: float) -> tuple[Row, ...]:
    each = max(w for w, _ in sizes)
    found: dict[XY, Row] = {}
    for count in range(len(sizes), 0, -1):
        row = set_rows(sizes, min(wide, count * (each + GAP) - GAP))
        if row is not None:
            found.setdefault(row.size, row)
    return tuple(found.values())


def _in_rows(views: tuple[View, ...], row: Row, corner: XY) -> Iterator[Placed]:
    for view, (x, y) in zip(views, row.places, strict=True):
        yield Placed(view=view, at=(corner[0] + x, corner[1] + y), model=(0.0, 0.0))
