"""Dimension chains of an elevation: cut-offs and laps, link zones, clear spans, supports."""

from __future__ import annotations

from collections.abc import Iterator

from detailer.drawing.primitives import Align, Disc, Path, Pen, Primitive
from detailer.model import Beam
from detailer.values import Face, SupportKind
from detailer.views.cutoffs import ROW, at_face, chain, cut_items, cut_lines
from detailer.views.elevation import SIDES, Stage, call_outs
from detailer.views.kit import TEXT, Kit
from detailer.views.labels import Wish, set_row
from detailer.views.zones import Zone, link_sets, zones_between

BUBBLE = 3.5
"""Radius of a support's name. [mm on paper]"""


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
        lines = cut_lines(stage, faces)
        stops = {x for rows in lines for row in rows for x, _ in row}
        crossing = tuple(sorted(x for x in stops if not at_face(stage, x)))
        texts, reach = call_outs(stage, above=above, blocked=crossing)
        yield from texts
        dimensions, line = cut_items(stage, lines, reach, above=above)
        yield from dimensions
    yield from _below(stage, beam, line)


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
