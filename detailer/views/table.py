"""The schedule of a beam as a table on paper, a small sketch of each shape within it."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass
from itertools import pairwise

from detailer.cage.bar import Bar, Cage
from detailer.cage.measure import outer_box
from detailer.drawing.metrics import width as text_width
from detailer.drawing.primitives import XY, Align, Label, Path, Pen, Primitive, Tag
from detailer.schedule.rows import Row
from detailer.values import Role
from detailer.views.kit import TEXT
from detailer.views.trace import section_trace

ROW = 6.0
"""Height of a row. [mm on paper]"""

HEAD = 9.0
"""Height of the heading, two lines. [mm on paper]"""

PAD = 1.2
"""From a line to the text beside it. [mm on paper]"""

SKETCH = 24.0
"""Width of the column of sketches. [mm on paper]"""

TITLE = 3.5


@dataclass(frozen=True, slots=True)
class Column:
    """One column: heading in two lines, and its cells."""

    head: tuple[str, str]
    cells: tuple[str, ...]
    align: Align = Align.RIGHT

    @property
    def width(self) -> float:
        """Return the width that holds everything. [mm on paper]"""
        texts = (*self.head, *self.cells)
        return max(text_width(t, TEXT) for t in texts) + 2 * PAD + 0.4


@dataclass(frozen=True, slots=True, kw_only=True)
class Table:
    """A schedule ready to be set on paper; its upper left corner is where it is put."""

    title: str
    columns: tuple[Column, ...]  # before the sketch
    after: tuple[Column, ...]
    marks: tuple[str, ...]
    bars: tuple[Bar, ...]
    footer: str

    @property
    def size(self) -> XY:
        """Return width and height. [mm on paper]"""
        width = sum(c.width for c in (*self.columns, *self.after)) + SKETCH
        return width, 6.0 + HEAD + ROW * len(self.marks) + ROW


def table_of(cage: Cage, rows: tuple[Row, ...]) -> Table:
    """Return the schedule of one member.

    Parameters
    ----------
    cage : Cage
        The cage, its bars marked.
    rows : tuple of Row
        Schedule rows of any members.
    """
    mine = tuple(row for row in rows if row.member == cage.member)
    firsts: dict[str, Bar] = {}
    for bar in cage.bars:
        firsts.setdefault(bar.mark, bar)
    bars = tuple(firsts.get(row.mark, firsts.get(row.mark.removesuffix("M"))) for row in mine)
    if any(bar is None for bar in bars):
        raise ValueError(f"schedule of {cage.member} has a mark that its cage has not")
    mass, built = sum(row.mass for row in mine), cage.copies + cage.mirrored
    return Table(
        title=f"Schedule of {cage.member}",
        columns=(
            Column(("mark", ""), tuple(row.mark for row in mine), Align.CENTRE),
            Column(("size", ""), tuple(f"T{row.dia:.0f}" for row in mine), Align.CENTRE),
            Column(("per", "member"), tuple(f"{row.per_member}" for row in mine)),
            Column(("mem-", "bers"), tuple(f"{row.members}" for row in mine)),
            Column(("total", "no."), tuple(f"{row.total}" for row in mine)),
            Column(("length", "mm"), tuple(f"{row.length:.0f}" for row in mine)),
        ),
        after=(
            Column(
                ("dimensions", "mm"),
                tuple(_dimensions(row) for row in mine),
                Align.LEFT,
            ),
            Column(("mass", "kg"), tuple(f"{row.mass:.1f}" for row in mine)),
        ),
        marks=tuple(row.mark for row in mine),
        bars=tuple(bar for bar in bars if bar is not None),
        footer=f"total {mass:.1f} kg in {built} member{'s' if built > 1 else ''}",
    )


def _dimensions(row: Row) -> str:
    hand = "  opposite hand" if row.mirrored else ""
    return "  ".join(f"{name} {value:.0f}" for name, value in row.shape.dimensions) + hand


def table_items(table: Table, at: XY, member: str) -> tuple[Primitive, ...]:
    """Return the table with its upper left corner at a place on paper.

    Parameters
    ----------
    table : Table
        The table.
    at : tuple of (float, float)
        Its upper left corner. [mm on paper]
    member : str
        Whose schedule it is.
    """
    x, y = at
    width, height = table.size
    low = y - height
    tag = Tag(member)
    title = Label(at=(x, y - 3.6), text=table.title, height=TITLE, bold=True, tag=tag)
    edges = _edges(table, x)
    top = y - 6.0
    items: list[Primitive] = [title]
    levels = [top, *(top - HEAD - ROW * i for i in range(len(table.marks) + 2))]
    items += [_rule((x, z), (x + width, z), Pen.FINE) for z in levels[1:-2]]
    items += [_rule((x, z), (x + width, z), Pen.OUTLINE) for z in (levels[0], *levels[-2:])]
    items += [_rule((e, top), (e, levels[-2]), Pen.FINE) for e in edges[1:-1]]
    items += [_rule((e, top), (e, low), Pen.OUTLINE) for e in (edges[0], edges[-1])]
    items += _cells(table, edges, top, tag)
    items.append(
        Label(
            at=(x + width - PAD, low + (ROW - TEXT) / 2),
            text=table.footer,
            height=TEXT,
            align=Align.RIGHT,
            tag=tag,
        )
    )
    return tuple(items)


def _edges(table: Table, x: float) -> list[float]:
    widths = [c.width for c in table.columns] + [SKETCH] + [c.width for c in table.after]
    edges = [x]
    for width in widths:
        edges.append(edges[-1] + width)
    return edges


def _cells(table: Table, edges: list[float], top: float, tag: Tag) -> Iterator[Primitive]:
    n = len(table.columns)
    pairs = list(pairwise(edges))
    columns = (
        *zip(table.columns, pairs[:n], strict=True),
        *zip(table.after, pairs[n + 1 :], strict=True),
    )
    for column, (x0, x1) in columns:
        for i, head in enumerate(column.head):
            base = top - 1.2 - TEXT - i * (TEXT + 1.2)
            yield _cell(head, x0, x1, base, column.align, tag)
        for i, cell in enumerate(column.cells):
            base = top - HEAD - ROW * i - (ROW + TEXT) / 2
            yield _cell(cell, x0, x1, base, column.align, Tag(tag.member, table.marks[i]))
    x0, x1 = pairs[n]
    yield _cell("shape", x0, x1, top - 1.2 - TEXT, Align.CENTRE, tag)
    for i, bar in enumerate(table.bars):
        middle = ((x0 + x1) / 2, top - HEAD - ROW * (i + 0.5))
        room = (SKETCH - 2 * PAD, ROW - 1.6)
        yield sketch(bar, middle, room, Tag(tag.member, table.marks[i]))


def _cell(text: str, x0: float, x1: float, base: float, align: Align, tag: Tag) -> Label:
    x = {Align.LEFT: x0 + PAD, Align.CENTRE: (x0 + x1) / 2, Align.RIGHT: x1 - PAD}[align]
    return Label(at=(x, base), text=text, height=TEXT, align=align, tag=tag)


def _rule(start: XY, end: XY, pen: Pen) -> Path:
    return Path(points=(start, end), pen=pen)


def sketch(bar: Bar, middle: XY, room: XY, tag: Tag) -> Path:
    """Return a small picture of a bar: links in proportion, others with legs made legible.

    Parameters
    ----------
    bar : Bar
        The bar.
    middle : tuple of (float, float)
        Middle of the picture. [mm on paper]
    room : tuple of (float, float)
        Width and height it may take. [mm on paper]
    tag : Tag
        Its tag.
    """
    if bar.role in (Role.LINK, Role.TIE):
        return _in_proportion(bar, middle, room, tag)
    points = _even(bar)
    wide = max(p[0] for p in points)
    tall = max(p[1] for p in points)
    rise = min(room[1], 3.0 * tall)
    placed = tuple(
        (
            middle[0] + (x / wide - 0.5) * room[0] if wide else middle[0],
            middle[1] + (z / tall - 0.5) * rise if tall else middle[1],
        )
        for x, z in points
    )
    return Path(points=placed, pen=Pen.LINK, tag=tag)


def _in_proportion(bar: Bar, middle: XY, room: XY, tag: Tag) -> Path:
    box = outer_box(bar)
    trace = section_trace(bar)
    factor = min(room[0] / (box.y1 - box.y0), room[1] / (box.z1 - box.z0))
    y, z = -(box.y0 + box.y1) / 2, (box.z0 + box.z1) / 2
    points = tuple(
        (middle[0] + (a - y) * factor, middle[1] + (b - z) * factor) for a, b in trace.points
    )
    return Path(points=points, bulges=trace.bulges, pen=Pen.DIMENSION, tag=tag)


def _even(bar: Bar) -> tuple[XY, ...]:
    """Return the corners on a grid with one step from each level to the next."""
    flat = max(bar.corners, key=lambda c: c[2])[2] - min(bar.corners, key=lambda c: c[2])[2] < 1.0
    across = all(abs(x - bar.corners[0][0]) < 1.0 for x, _, _ in bar.corners)
    u = [c[1] if across else c[0] for c in bar.corners]
    v = [c[1] if flat and not across else c[2] for c in bar.corners]
    us, vs = _steps(u), _steps(v)
    wide = [_step_of(us, value) for value in u]
    return tuple(zip(wide, (_step_of(vs, value) for value in v), strict=True))


def _steps(values: list[float]) -> list[float]:
    found: list[float] = []
    for value in sorted(values):
        if not found or value - found[-1] > 1.0:
            found.append(value)
    return found


def _step_of(steps: list[float], value: float) -> float:
    return float(sum(1 for s in steps if s < value - 1.0))
