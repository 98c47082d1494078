"""Dimension chains of an elevation: cut-offs and laps, link zones, clear spans, supports."""

from __future__ import annotations

from collections.abc import Iterator
from itertools import pairwise
from typing import TypeAlias

from detailer.drawing.primitives import Align, Dimension, Disc, Path, Pen, Primitive
from detailer.model import Beam
from detailer.values import Face, SupportKind
from detailer.views.elevation import SIDES, Stage, call_outs
from detailer.views.kit import TEXT, Kit
from detailer.views.labels import Wish, set_row
from detailer.views.stops import laps_of, rows_of, stops_between
from detailer.views.zones import Zone, link_sets, zones_between

ROW = 6.0
"""From one dimension line to the next. [mm on paper]"""

EXTENSION = 2.0
"""Length of an extension line that does not reach the beam. [mm on paper]"""

BUBBLE = 3.5
"""Radius of a support's name. [mm on paper]"""

Row: TypeAlias = tuple[tuple[float, str], ...]
"""Stops of a chain, each with what lies to its right."""


def chain(
    stops: tuple[float, ...],
    line: float,
    kit: Kit,
    *,
    starts: tuple[float, ...] | None = None,
    texts: tuple[str, ...] = (),
) -> Iterator[Dimension]:
    """Yield dimensions from stop to stop, at whole millimetres so that they close.

    Parameters
    ----------
    stops : tuple of float
        x, ascending; those within a millimetre of the one before are left out. [mm]
    line : float
        y of the dimension line. [mm]
    kit : Kit
        Member and scale.
    starts : tuple of float, optional
        y where the extension line of each stop begins; just above the line if absent. [mm]
    texts : tuple of str, optional
        Text of each dimension; its distance if absent or empty.
    """
    lead = line + kit.mm(EXTENSION)
    ends = starts if starts is not None else (lead,) * len(stops)
    points = [(float(round(x)), y) for x, y in zip(stops, ends, strict=True)]
    for i, (a, b) in enumerate(pairwise(points)):
        if b[0] - a[0] >= 1.0:
            text = texts[i] if i < len(texts) else ""
            yield Dimension(start=a, end=b, line=line, text=text, height=TEXT)


def elevation_items(stage: Stage, beam: Beam) -> Iterator[Primitive]:
    """Yield call-outs and chains above and below the picture of a beam.

    Parameters
    ----------
    stage : Stage
        The elevation.
    beam : Beam
        What its supports are.
    """
    for above, faces in ((True, (Face.TOP,)), (False, (Face.BOTTOM, *SIDES))):
        lines = _cut_lines(stage, faces)
        stops = {x for rows in lines for row in rows for x, _ in row}
        crossing = tuple(sorted(x for x in stops if not _at_face(stage, x)))
        texts, reach = call_outs(stage, above=above, blocked=crossing)
        yield from texts
        way = 1 if above else -1
        line = reach + way * stage.kit.mm(ROW - 1.5 if above else ROW)
        for rows in lines:
            for row in rows:
                yield from _cut_row(stage, row, line, above=above)
            line += way * stage.kit.mm(ROW)
    yield from _below(stage, beam, line)


def _at_face(stage: Stage, x: float) -> bool:
    return any(abs(x - edge) < 1.0 for pair in (*stage.clear, *stage.supports) for edge in pair)


def _cut_lines(stage: Stage, faces: tuple[Face, ...]) -> tuple[tuple[Row, ...], ...]:
    """Return the chains of cut-offs and laps, those that share no stretch on one line."""
    laps = laps_of(stage.cage, stage.strands, faces)
    rows: list[Row] = []
    for x0, x1 in stage.clear:
        stops = stops_between(stage.strands, laps, faces, x0, x1)
        rows += [row for row in rows_of((x0, x1), stops, laps) if row not in rows]
    lines: list[list[Row]] = []
    for row in rows:
        for line in lines:
            if all(row[0][0] >= r[-1][0] - 1.0 or row[-1][0] <= r[0][0] + 1.0 for r in line):
                line.append(row)
                break
        else:
            lines.append([row])
    return tuple(tuple(line) for line in lines)


def _cut_row(stage: Stage, row: Row, line: float, *, above: bool) -> Iterator[Dimension]:
    """Yield one chain; the extension lines of stops reach the beam, those of faces do not."""
    kit = stage.kit
    short = line + (-1 if above else 1) * kit.mm(EXTENSION)
    near = stage.high + kit.mm(1.0) if above else stage.low - kit.mm(1.0)
    starts = tuple(short if _at_face(stage, x) else near for x, _ in row)
    texts = tuple("<> lap" if kind == "lap" else "" for _, kind in row)
    yield from chain(tuple(x for x, _ in row), line, kit, starts=starts, texts=texts)


def _below(stage: Stage, beam: Beam, line: float) -> Iterator[Primitive]:
    """Yield link zones, clear spans with supports, centres, and the supports' names."""
    kit = stage.kit
    zones, depth = _zones(stage, line)
    yield from zones
    line -= kit.mm(depth)
    edges = sorted({stage.x0, stage.x1, *(x for pair in stage.supports for x in pair)})
    yield from chain(tuple(edges), line, kit)
    line -= kit.mm(ROW)
    yield from chain(_centres(stage), line, kit)
    yield from _names(stage, beam, line)


def _centres(stage: Stage) -> tuple[float, ...]:
    """Return support centres, with free tips."""
    found = [rest.x for rest in stage.cage.supports]
    if stage.x0 < stage.supports[0][0] - 1.0:
        found.insert(0, stage.x0)
    if stage.x1 > stage.supports[-1][1] + 1.0:
        found.append(stage.x1)
    return tuple(found)


def _names(stage: Stage, beam: Beam, line: float) -> Iterator[Primitive]:
    kit = stage.kit
    centre = line - kit.mm(2.5 + BUBBLE)
    for rest, support in zip(stage.cage.supports, beam.supports, strict=True):
        yield kit.line((rest.x, line), (rest.x, centre + kit.mm(BUBBLE)), pen=Pen.AXIS)
        yield Disc(centre=(rest.x, centre), radius=kit.mm(BUBBLE), pen=Pen.DIMENSION)
        yield kit.text((rest.x, centre - kit.mm(TEXT / 2)), rest.name, bold=True)
        size = f"{rest.width:.0f} × {rest.across:.0f}"
        if rest.kind is SupportKind.COLUMN:
            words = f"{support.column.mark}  {size}" if support.column else f"column {size}"
        elif rest.kind is SupportKind.WALL:
            words = f"wall {rest.width:.0f}"
        else:
            words = f"beam {rest.width:.0f}"
        at = (rest.x + kit.mm(BUBBLE + 1.0), centre - kit.mm(TEXT / 2))
        yield kit.text(at, words, align=Align.LEFT)


def _zones(stage: Stage, line: float) -> tuple[tuple[Primitive, ...], float]:
    """Return the zone line of every span with its call-outs, and the paper it takes."""
    kit = stage.kit
    sets = link_sets(stage.cage)
    items: list[Primitive] = []
    zones: list[Zone] = []
    for x0, x1 in stage.clear:
        found = zones_between(sets, x0, x1)
        zones += found
        stops = sorted({round(x) for z in found for x in (z.x0, z.x1)} | {round(x0), round(x1)})
        items += chain(tuple(float(x) for x in stops), line, kit)
    for x0, x1 in stage.supports:
        zones += zones_between(sets, x0, x1)
    zones.sort(key=lambda z: z.x0 + z.x1)
    words = [_words(zone, kit) for zone in zones]
    wishes = tuple(
        Wish(low=(z.x0 + z.x1) / 2, high=(z.x0 + z.x1) / 2, width=max(kit.width(t) for t in text))
        for z, text in zip(zones, words, strict=True)
    )
    left, right = stage.x0 - kit.mm(8), stage.x1 + kit.mm(8)
    places = set_row(wishes, left=left, right=right, gap=kit.mm(1.5))
    for zone, text, x, wish in zip(zones, words, places, wishes, strict=True):
        items += _zone_text(zone, text, x, wish, line, kit)
    most = max((len(text) for text in words), default=0)
    return tuple(items), ROW + 2.0 + 3.8 * most


def _words(zone: Zone, kit: Kit) -> tuple[str, ...]:
    """Return a zone's call-outs on one line each where they fit, else on two."""
    room = zone.x1 - zone.x0 + kit.mm(4.0)
    if all(kit.width(text) <= room for text in zone.texts):
        return zone.texts
    return tuple(part for text in zone.texts for part in _split(text))


def _split(text: str) -> tuple[str, ...]:
    first, at, last = text.partition(" @ ")
    return (first, f"@ {last}") if at else (first,)


def _zone_text(
    zone: Zone, text: tuple[str, ...], x: float, wish: Wish, line: float, kit: Kit
) -> Iterator[Primitive]:
    tag = kit.named(zone.kind.bars[0][0])
    top = line - kit.mm(2.2)
    room = max(kit.mm(3.0), (zone.x1 - zone.x0) / 4) if zone.spacing else kit.mm(1.0)
    if abs(x - wish.middle) > room:
        yield Path(points=((x, top), (wish.middle, line)), pen=Pen.LEADER, tag=tag)
    for i, words in enumerate(text):
        yield kit.text((x, top - kit.mm(TEXT + 0.3 + 3.8 * i)), words, tag=tag)
