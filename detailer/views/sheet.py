"""One beam on one sheet: the views of its cage, its schedule and its notes, composed on paper."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass, replace
from functools import cached_property, lru_cache

from detailer.cage.bar import Cage
from detailer.drawing.primitives import XY, Drawing, Placed, Primitive, Sheet, View
from detailer.findings import Finding
from detailer.model import Assumption, Beam, Project
from detailer.schedule.rows import Row as ScheduleRow
from detailer.statics import Envelope
from detailer.values import Face, Role
from detailer.views.bent import bent_items
from detailer.views.chains import elevation_items
from detailer.views.cuts import Cut, cuts_of
from detailer.views.demand import curves_of
from detailer.views.diagram import Curves, diagram_items
from detailer.views.elevation import picture, stage_of
from detailer.views.frame import frame_items, status_item
from detailer.views.notes import Note, Text, note_items, notes_of, set_notes
from detailer.views.outline import beam_depth, clear_spans
from detailer.views.pack import GAP, Room, Row, pack, set_rows
from detailer.views.paper import PAPERS, Paper, space_of, title_room
from detailer.views.pulled import pulled_items
from detailer.views.section import section_items
from detailer.views.sizes import web_of
from detailer.views.table import Table, table_items, table_of
from detailer.views.viewing import make_view

SECTION_SCALES = (10.0, 15.0, 20.0)
"""Scales of sections, the largest picture first."""

MOST_GROUPS = 3
"""Sections may stand in so many groups on a sheet."""

NOTE_WIDTHS = (185.0, 150.0, 120.0, 95.0)
"""Widths notes may be set in. [mm on paper]"""

AROUND = 10.0
"""A stack of views is at least so much wider than the beam. [mm on paper]"""

LEAST_STACK = 90.0
"""A stack of views is at least so much higher than the beam is deep. [mm on paper]"""

BESIDE = (40.0, 25.0)
"""A section takes at least so much more than its web. [mm on paper]"""

LOWER = (Face.BOTTOM, Face.LEFT, Face.RIGHT)


@dataclass(frozen=True)
class Content:
    """Everything a beam's sheet shows, views made once a scale."""

    beam: Beam
    cage: Cage
    cuts: tuple[Cut, ...]
    curves: Curves | None
    notes: tuple[Note, ...]
    table: Table

    @cached_property
    def texts(self) -> tuple[Text, ...]:
        """Return the notes set in each of the widths they may have."""
        return tuple(set_notes(self.notes, width) for width in NOTE_WIDTHS)

    @cached_property
    def table_size(self) -> XY:
        """Return width and height of the schedule. [mm on paper]"""
        return self.table.size

    @cached_property
    def note_sizes(self) -> tuple[XY, ...]:
        """Return the sizes the notes may have. [mm on paper]"""
        return tuple((w, t.height) for w, t in zip(NOTE_WIDTHS, self.texts, strict=True))

    @cached_property
    def _made(self) -> dict[tuple[str, float], tuple[View, ...]]:
        return {}

    def stack(self, scale: float) -> tuple[View, ...]:
        """Return the views that share an x axis, from the top down."""
        key = ("stack", scale)
        if key not in self._made:
            self._made[key] = tuple(_stack(self, scale))
        return self._made[key]

    def sections(self, scale: float) -> tuple[View, ...]:
        """Return the sections by letter, then links, ties and spacers."""
        key = ("sections", scale)
        if key not in self._made:
            self._made[key] = tuple(_sections(self, scale))
        return self._made[key]


def beam_drawing(
    project: Project,
    beam: Beam,
    envelope: Envelope | None,
    cage: Cage,
    findings: tuple[Finding, ...],
    rows: tuple[ScheduleRow, ...],
    *,
    assumptions: tuple[Assumption, ...],
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
    """
    clear = clear_spans(cage)
    cuts = cuts_of(cage, clear)
    strands = stage_of(cage, PAPERS[0].scale, cuts).strands
    content = Content(
        beam=beam,
        cage=cage,
        cuts=cuts,
        curves=curves_of(project, beam, envelope, cage),
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


def _stack(content: Content, scale: float) -> Iterator[View]:
    cage = content.cage
    stage = stage_of(cage, scale, content.cuts)
    text = f"1:{scale:.0f}"
    middle = (stage.x0 + stage.x1) / 2
    top = pulled_items(stage, (Face.TOP,))
    if top:
        name, title = f"{cage.member} top bars", f"Top bars {text}"
        yield make_view(name, title, scale, top, middle=middle)
    items = (*picture(stage), *elevation_items(stage, content.beam))
    name, title = f"{cage.member} elevation", f"Elevation of {cage.member} {text}"
    yield make_view(name, title, scale, items, middle=middle)
    low = pulled_items(stage, LOWER)
    if low:
        sides = any(s.bar.face in LOWER[1:] for s in stage.strands)
        words = "Bottom and side bars" if sides else "Bottom bars"
        name, title = f"{cage.member} bottom bars", f"{words} {text}"
        yield make_view(name, title, scale, low, middle=middle)
    if content.curves is not None:
        moments = diagram_items(stage, content.curves)
        name = f"{cage.member} moments"
        yield make_view(name, "Moments, kN·m", scale, moments, middle=middle)


def _sections(content: Content, scale: float) -> Iterator[View]:
    cage = content.cage
    firsts: dict[str, Cut] = {}
    for cut in content.cuts:
        firsts.setdefault(cut.letter, cut)
    for letter in sorted(firsts, key=lambda n: (len(n), n)):
        name, title = f"{letter}-{letter}", f"{letter}-{letter} 1:{scale:.0f}"
        x = firsts[letter].x
        items = section_items(cage, x, scale, full=letter == content.cuts[0].letter)
        web = web_of(cage, x)
        middle = (web.x0 + web.x1) / 2
        yield make_view(f"{cage.member} {name}", title, scale, items, middle=middle)
    bent = bent_items(cage, scale)
    if bent:
        spaced = any(bar.role is Role.SPACER for bar in cage.bars)
        title = f"{'Links and spacers' if spaced else 'Links'} 1:{scale:.0f}"
        yield make_view(f"{cage.member} links", title, scale, bent)


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


def size_of(view: View) -> XY:
    """Return what a view takes on paper, its title included. [mm]

    Parameters
    ----------
    view : View
        The view.
    """
    x0, y0, x1, y1 = view.box
    return (x1 - x0) / view.scale, (y1 - y0) / view.scale


def _composed(
    project: Project, content: Content, paper: Paper, scale: float, title: str
) -> Sheet | None:
    space = space_of(paper)
    if not _hopeful(content, paper, scale):
        return None
    stack = content.stack(paper.scale)
    shared = min(v.box[0] for v in stack), max(v.box[2] for v in stack)
    wide = (shared[1] - shared[0]) / paper.scale
    tall = sum(size_of(v)[1] + GAP for v in stack)
    if wide > space.x1 - space.x0 or tall > space.y1 - space.y0:
        return None
    taken = Room(space.x0, space.y1 - tall, space.x0 + wide + GAP, space.y1)
    room = (space.x1 - space.x0) * (space.y1 - space.y0)
    areas = (w * h for w, h in map(size_of, content.sections(scale)))
    if wide * tall + sum(areas) + _others(content, paper) > room:
        return None
    placed = _blocks(content, space, (taken, title_room(paper)), scale)
    if placed is None:
        return None
    views = (*_aligned(stack, space, shared[0], paper.scale), *placed[0])
    elevation = next(p for p in views if p.view.name.endswith(" elevation"))
    return Sheet(
        name=content.beam.mark,
        title=title,
        size=paper.size,
        views=tuple(_in_model(p, elevation) for p in views),
        items=(
            *frame_items(project, content.beam, paper, title, _scales(views)),
            status_item(paper, content.beam.mark),
            *placed[1],
        ),
    )


def _hopeful(content: Content, paper: Paper, scale: float) -> bool:
    """Return whether the least area everything needs is there, before any view is made."""
    cage, space = content.cage, space_of(paper)
    beams = [p for p in cage.prisms if p.name.startswith("span ")]
    wide = (max(p.x1 for p in beams) - min(p.x0 for p in beams)) / paper.scale + AROUND
    low, high = beam_depth(cage)
    sections = len({cut.letter for cut in content.cuts})
    across = max(y for p in beams if p.name.endswith(" web") for y, _ in p.outline) * 2
    one = (across / scale + BESIDE[0]) * ((high - low) / scale + BESIDE[1])
    need = wide * (LEAST_STACK + (high - low) / paper.scale) + sections * one
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
    content: Content, space: Room, fixed: tuple[Room, ...], scale: float
) -> tuple[tuple[Placed, ...], tuple[Primitive, ...]] | None:
    """Return sections, schedule and notes where they have a place beside what is fixed."""
    views = content.sections(scale)
    member = content.beam.mark
    for groups in _groupings(views):
        rows = [_row_choices(group, space) for group in groups]
        choices = (
            (content.table_size,),
            content.note_sizes,
            *(tuple(row.size for row in row_choices) for row_choices in rows),
        )
        found = pack(space, fixed, choices)
        if found is None:
            continue
        (_, table_at), (text, notes_at), *spots = found
        items = (
            *table_items(content.table, table_at, member),
            *note_items(content.texts[text], notes_at, member),
        )
        placed = (
            each
            for group, row, (i, at) in zip(groups, rows, spots, strict=True)
            for each in _in_rows(group, row[i], at)
        )
        return tuple(placed), items
    return None


def _groupings(views: tuple[View, ...]) -> Iterator[list[tuple[View, ...]]]:
    """Yield sections in one group, in two of any sizes, in more of equal ones."""
    count = len(views)
    yield [views]
    halves = sorted(range(1, count), key=lambda k: (abs(2 * k - count), -k))
    yield from ([views[:k], views[k:]] for k in halves)
    for parts in range(3, MOST_GROUPS + 1):
        size = -(-count // parts)
        yield [views[i : i + size] for i in range(0, count, size)]


def _row_choices(views: tuple[View, ...], space: Room) -> tuple[Row, ...]:
    """Return sections in rows as long as the paper, then in shorter and shorter ones."""
    return _rows_of(tuple(size_of(v) for v in views), space.x1 - space.x0)


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
