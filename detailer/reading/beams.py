"""Beam lines."""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from dataclasses import dataclass, replace
from pathlib import Path

from detailer.model import Beam, Column, Grid, Span, Support
from detailer.reading.geometry import (
    LEAST_CLEAR,
    SECTION_KEYS,
    SPAN_KEYS,
    SUPPORT_KEYS,
    fits,
    lay_out,
    read_cover,
    read_reach,
    read_section,
    read_support,
)
from detailer.reading.results import read_results, with_results
from detailer.reading.steelwork import Line, read_bars, read_links, refuse_absent
from detailer.reading.table import Table
from detailer.reading.traps import ask

KEYS = (
    "mark", "copies", "mirrored", "batch", "direction", "section", "cover", "level", "support",
    "span", "results", "d_assumed", "bars", "links",
)  # fmt: skip


@dataclass(frozen=True, slots=True, kw_only=True)
class Around:
    """What a beam refers to outside its own table."""

    folder: Path
    columns: dict[str, Column]
    grid: Grid
    bars: Iterator[int]  # lines of the [[beam.bars]] tables, in the order of the file
    links: Iterator[int]


def read_beams(root: Table, around: Around) -> tuple[Beam, ...]:
    """Read every `[[beam]]`; those that are refused are left out."""
    found = root.items("beam", "[[beam]]")
    if not found:
        root.missing("beam", "[[beam]] tables")
    beams = []
    seen: dict[str, str] = {}
    for path, item in found:
        table = Table(root.log, path, item, KEYS)
        mark = table.mark("mark", "FB1")
        key = mark.lower().replace("/", "-")
        if mark and key in seen:
            table.refuse("mark", f"{mark} is the mark {seen[key]} again", "Write another mark")
        seen[key] = mark
        beam = _beam(table, mark, around)
        if beam is not None:
            beams.append(beam)
    return tuple(beams)


def _beam(table: Table, mark: str, around: Around) -> Beam | None:
    direction = _direction(table)
    cover = read_cover(table)
    copies = table.whole("copies", 1, low=1, high=9999)
    if "copies" not in table:
        table.log.assume(mark, "One member of this mark.")
    mirrored = table.whole("mirrored", 0, low=0, high=9999)
    batch = table.text("batch", "")
    level = table.number("level", low=-1e6, high=1e6) if "level" in table else around.grid.level
    supports, spans = _geometry(table, mark, direction, around)
    assumed = _d_assumed(table, spans)
    line = Line(supports, spans)
    bars = read_bars(table, line, _take(table, "bars", around.bars))
    links = read_links(table, line, _take(table, "links", around.links))
    refuse_absent(table, line, bars, links)
    if not table.clean() or not spans:
        return None
    beam = Beam(
        mark=mark,
        copies=copies,
        mirrored=mirrored,
        batch=batch,
        direction=direction,
        cover=cover,
        level=level,
        supports=supports,
        spans=spans,
        bars=bars,
        links=links,
        d_assumed=assumed,
    )
    _room(table, beam)
    _nodes(table, beam, around.grid)
    if table.clean() and not table.log.elsewhere:
        ask(table, beam)
    return beam


def _take(table: Table, key: str, lines: Iterator[int]) -> list[int]:
    value = table.data.get(key, [])
    return [next(lines, 0) for _ in value] if isinstance(value, list) else []


def _direction(table: Table) -> float:
    words = {"x": 0.0, "y": 90.0}
    value = table.data.get("direction", "x")
    if isinstance(value, str):
        if value not in words:
            table.refuse("direction", "not a direction", 'Write "x", "y" or degrees from x')
        return words.get(value, 0.0)
    return table.number("direction", low=-360, high=360, unit="degrees")


def _geometry(
    table: Table, mark: str, direction: float, around: Around
) -> tuple[tuple[Support, ...], tuple[Span, ...]]:
    """Return supports and spans with their results; none where they do not belong together."""
    if "section" not in table:
        table.missing("section", "{ width = …, depth = … }")
    base = read_section(table.table("section", SECTION_KEYS), None, mark)
    supports = [
        read_support(
            Table(table.log, path, item, SUPPORT_KEYS),
            around.columns, direction=direction, across=base.width, member=mark,
        )
        for path, item in table.items("support", "support = [{ at = …, column = … }]")
    ]  # fmt: skip
    reaches = []
    for path, item in table.items("span", "span = [{ length = … }]"):
        span = Table(table.log, path, item, SPAN_KEYS)
        reaches.append(replace(read_reach(span, base, mark), results=read_results(span)))
    for key, rows in (("support", supports), ("span", reaches)):
        if not rows and table.clean(key):
            table.missing(key, f"[{{ … }}], one for each {key}")
    names = [support.name for support in supports]
    for n, name in enumerate(names):
        if name and name in names[:n]:
            table.log.refuse(table.at("support", n, "at"), f"{name} twice", "Name each node once")
    if not fits(table, supports, reaches):
        return (), ()
    placed, spans = lay_out(supports, reaches)
    _clear(table, Line(placed, spans))
    return placed, with_results(table, spans, around.folder, mark)


def _clear(table: Table, line: Line) -> None:
    for span in line.spans:
        left, right = line.clear(span)
        if right - left < (LEAST_CLEAR if not span.overhang else 50):
            table.log.refuse(
                table.at("span", span.number - 1),
                f"{right - left:g} mm between the faces",
                "Compare the span with the widths of its supports",
            )


def _d_assumed(table: Table, spans: Sequence[Span]) -> tuple[float | None, float | None]:
    own = table.table("d_assumed", ("bottom", "top"))
    values = [
        own.number(key, low=50, high=3000) if key in own else None for key in ("bottom", "top")
    ]
    deepest = max((span.section.depth for span in spans), default=None)
    for key, value in zip(("bottom", "top"), values, strict=True):
        if value is not None and deepest is not None and value >= deepest:
            own.refuse(
                key, f"d = {value:g} is not less than the depth", "Write the effective depth"
            )
    return values[0], values[1]


def _room(table: Table, beam: Beam) -> None:
    """Refuse cover that leaves no room for two bars inside the links."""
    cover = beam.cover
    link = max((zone.dia for links in beam.links for zone in links.zones), default=8)
    for span in beam.spans:
        wide = span.section.width - cover.left - cover.right - 2 * link
        deep = span.section.depth - cover.top - cover.bottom - 2 * link
        if min(wide, deep) < 50:
            table.refuse("cover", f"no room inside the links of span {span.number}",
                         "Compare cover and section, both in mm")  # fmt: skip
            return


def _nodes(table: Table, beam: Beam, grid: Grid) -> None:
    """Doubt supports that the grid puts elsewhere."""
    nodes = {a + b: (x, y) for a, x in grid.x for b, y in grid.y}
    first = nodes.get(beam.supports[0].name)
    for n, support in enumerate(beam.supports if nodes else ()):
        node = nodes.get(support.name)
        if node is None:
            table.log.doubt(table.at("support", n, "at"), f"{support.name} is no node of the grid")
        elif first is not None:
            along = ((node[0] - first[0]) ** 2 + (node[1] - first[1]) ** 2) ** 0.5
            if abs(along - support.x) > 1:
                table.log.doubt(
                    table.at("support", n, "at"),
                    f"the grid puts {support.name} at {along:g} mm, the spans at {support.x:g}",
                )
