"""The elevation of a beam line: concrete, every bar, link zones, section marks, chains."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass
from math import sqrt

from detailer.cage.bar import Bar, Cage
from detailer.cage.measure import outer_box
from detailer.drawing.primitives import XY, Align, Disc, Path, Pen, Primitive, Tag
from detailer.values import Face, Role
from detailer.views.cuts import Cut
from detailer.views.kit import TEXT, TITLE, Kit, call_out
from detailer.views.labels import Wish, set_row
from detailer.views.lanes import Strand, strands_of
from detailer.views.outline import (
    STUB_ABOVE,
    STUB_BELOW,
    beam_depth,
    clear_spans,
    concrete_outline,
    support_faces,
)
from detailer.views.trace import across_view

TICK = 1.3
"""Size of the tick that ends a straight bar. [mm on paper]"""

LEGIBLE = 1.2
"""Links closer than this are drawn only at the ends of a zone. [mm on paper]"""

SIDES = (Face.LEFT, Face.RIGHT)


@dataclass(frozen=True, slots=True, kw_only=True)
class Named:
    """Bars that one call-out of the elevation names."""

    bar: Bar
    count: int
    text: str
    above: bool  # the call-out stands above the beam
    low: float  # where its leader may end, along x
    high: float
    z: float


@dataclass(frozen=True, slots=True, kw_only=True)
class Stage:
    """What all parts of one elevation share."""

    cage: Cage
    kit: Kit
    strands: tuple[Strand, ...]
    cuts: tuple[Cut, ...]
    clear: tuple[tuple[float, float], ...]
    supports: tuple[tuple[float, float], ...]
    low: float  # z of the lowest soffit
    high: float  # z of the highest top
    x0: float  # ends of the beam
    x1: float


def stage_of(cage: Cage, scale: float, cuts: tuple[Cut, ...]) -> Stage:
    """Return what all parts of an elevation share.

    Parameters
    ----------
    cage : Cage
        The cage, its bars marked.
    scale : float
        Of the elevation.
    cuts : tuple of Cut
        Where sections are cut.
    """
    low, high = beam_depth(cage)
    webs = [p for p in cage.prisms if p.name.startswith("span ")]
    return Stage(
        cage=cage,
        kit=Kit(cage.member, scale),
        strands=strands_of(cage, scale),
        cuts=cuts,
        clear=clear_spans(cage),
        supports=support_faces(cage),
        low=low,
        high=high,
        x0=min(p.x0 for p in webs),
        x1=max(p.x1 for p in webs),
    )


def picture(stage: Stage) -> Iterator[Primitive]:
    """Yield concrete, links, bars with their ticks, spacers and section marks.

    Parameters
    ----------
    stage : Stage
        The elevation.
    """
    yield from concrete_outline(stage.cage, stage.kit)
    yield from _axes(stage)
    yield from _links(stage)
    yield from _bars(stage)
    yield from _spacers(stage)
    yield from _cut_marks(stage)


def _axes(stage: Stage) -> Iterator[Path]:
    kit = stage.kit
    for rest in stage.cage.supports:
        ends = stage.low - kit.mm(STUB_BELOW + 1.5), stage.high + kit.mm(STUB_ABOVE + 1.5)
        yield kit.line((rest.x, ends[0]), (rest.x, ends[1]), pen=Pen.AXIS)


def _links(stage: Stage) -> Iterator[Path]:
    """Yield links: the first and last of each stretch strong, all others thin if legible."""
    kit = stage.kit
    rows: list[tuple[float, float, float, Bar]] = []
    for bar in stage.cage.bars:
        if bar.role in (Role.LINK, Role.TIE):
            box = outer_box(bar)
            middle, half = (box.x0 + box.x1) / 2, bar.dia / 2
            rows += [
                (middle + dx, box.z0 + half + dz, box.z1 - half + dz, bar)
                for dx, _, dz in bar.placings
            ]
    rows.sort(key=lambda r: (r[0], r[3].id))
    strong = {x for zone in _zone_ends(stage) for x in zone}
    last = float("-inf")
    for x, z0, z1, bar in rows:
        if round(x, 1) in strong:
            yield kit.line((x, z0), (x, z1), pen=Pen.LINK, tag=kit.tag(bar))
        elif x - last >= kit.mm(LEGIBLE):
            yield kit.line((x, z0), (x, z1), pen=Pen.FINE, tag=kit.tag(bar))
        last = x


def _zone_ends(stage: Stage) -> Iterator[tuple[float, float]]:
    from detailer.views.zones import link_sets, zones_between

    sets = link_sets(stage.cage)
    for x0, x1 in (*stage.clear, *stage.supports):
        for zone in zones_between(sets, x0, x1):
            yield round(zone.x0, 1), round(zone.x1, 1)


def _bars(stage: Stage) -> Iterator[Path]:
    kit = stage.kit
    for s in stage.strands:
        tag = kit.tag(s.bar)
        yield Path(points=s.drawn.points, bulges=s.drawn.bulges, pen=Pen.BAR, tag=tag)
        inward = {Face.TOP: -1.0, Face.BOTTOM: 1.0}.get(s.bar.face, 1.0)
        left, right = s.bent
        for is_bent, end, outward in (
            (left, s.drawn.points[0], -1),
            (right, s.drawn.points[-1], 1),
        ):
            if not is_bent:
                yield _tick(end, outward, inward, kit, tag)


def _tick(end: XY, outward: int, inward: float, kit: Kit, tag: Tag) -> Path:
    """Return the 45° tick that shows where a straight bar stops."""
    size = kit.mm(TICK) / sqrt(2)
    tip = (end[0] - outward * size, end[1] + inward * size)
    return Path(points=(end, tip), pen=Pen.BAR_EXTRA, tag=tag)


def _spacers(stage: Stage) -> Iterator[Primitive]:
    for bar in stage.cage.bars:
        if bar.role is Role.SPACER and across_view(bar):
            (x, _, z), tag = bar.corners[0], stage.kit.tag(bar)
            for dx, _, dz in bar.placings:
                at = (x + dx, z + dz)
                yield Disc(centre=at, radius=bar.dia / 2, pen=Pen.BAR, filled=True, tag=tag)


def _cut_marks(stage: Stage) -> Iterator[Primitive]:
    kit = stage.kit
    for cut in stage.cuts:
        for edge, way in ((stage.high, 1), (stage.low, -1)):
            near, far = edge + way * kit.mm(0.8), edge + way * kit.mm(5.2)
            yield kit.line((cut.x, near), (cut.x, far), pen=Pen.FRAME)
            side = letter_side(stage, cut)
            foot = (cut.x + kit.mm(1.8), far)
            yield kit.line((cut.x, far), foot, pen=Pen.BAR)
            base = near if way > 0 else near - kit.mm(TITLE)
            align = Align.LEFT if side > 0 else Align.RIGHT
            at = (cut.x + side * kit.mm(1.4), base)
            yield kit.text(at, cut.letter, height=TITLE, align=align, bold=True)


def letter_side(stage: Stage, cut: Cut) -> int:
    """Return +1 if a section's letter stands right of its mark, −1 if left.

    Parameters
    ----------
    stage : Stage
        The elevation.
    cut : Cut
        The section.
    """
    room, both = stage.kit.mm(5.0), stage.kit.mm(9.0)
    near_right = any(0 < x0 - cut.x < room for x0, _ in stage.supports)
    after = min((o.x - cut.x for o in stage.cuts if o.x > cut.x), default=both)
    before = min((cut.x - o.x for o in stage.cuts if o.x < cut.x), default=both)
    if after < room or before < room:
        return -1 if after < before else 1
    return -1 if near_right or (after < both and before >= both) else 1


def named_bars(stage: Stage) -> tuple[Named, ...]:
    """Return the call-outs of long bars and spacers: one for each mark at each place.

    Counts of one mark add up to what the member has of it.

    Parameters
    ----------
    stage : Stage
        The elevation.
    """
    groups: dict[tuple[object, ...], list[Strand]] = {}
    for s in stage.strands:
        face = Face.LEFT if s.bar.face in SIDES else s.bar.face
        key = (s.bar.name, face, s.bar.layer, round(s.x0), round(s.x1))
        groups.setdefault(key, []).append(s)
    edge = stage.kit.mm(2.0)
    found: list[Named] = []
    for alike in groups.values():
        first, count = alike[0], sum(s.count for s in alike)
        x0, x1, z = first.body
        spare = min(edge, (x1 - x0) / 3)
        found.append(
            Named(
                bar=first.bar,
                count=count,
                text=call_out(count, first.bar),
                above=first.bar.face is Face.TOP,
                low=x0 + spare,
                high=x1 - spare,
                z=z,
            )
        )
    return (*found, *_named_spacers(stage))


def _named_spacers(stage: Stage) -> Iterator[Named]:
    groups: dict[tuple[str, bool], list[tuple[float, float, Bar]]] = {}
    for bar in stage.cage.bars:
        if bar.role is Role.SPACER:
            x, _, z = bar.corners[0]
            above = z + bar.placings[0][2] > (stage.low + stage.high) / 2
            rows = [(x + dx, z + dz, bar) for dx, _, dz in bar.placings]
            groups.setdefault((bar.name, above), []).extend(rows)
    for (_, above), rows in sorted(groups.items()):
        x, z, bar = sorted(rows, key=lambda r: r[0])[len(rows) // 2]
        text = f"{call_out(len(rows), bar)} spacers"
        yield Named(bar=bar, count=len(rows), text=text, above=above, low=x, high=x, z=z)


def call_outs(
    stage: Stage, *, above: bool, blocked: tuple[float, ...]
) -> tuple[tuple[Primitive, ...], float]:
    """Return the call-outs above or below the beam, and how far from it they reach.

    Parameters
    ----------
    stage : Stage
        The elevation.
    above : bool
        Which side.
    blocked : tuple of float
        x of the extension lines that pass. [mm]
    """
    kit = stage.kit
    named = sorted(
        (n for n in named_bars(stage) if n.above is above),
        key=lambda n: (n.low + n.high, -n.z if above else n.z),
    )
    wishes = tuple(Wish(low=n.low, high=n.high, width=kit.width(n.text)) for n in named)
    half = kit.mm(0.8)
    places = set_row(
        wishes,
        left=stage.x0 - kit.mm(8),
        right=stage.x1 + kit.mm(8),
        gap=kit.mm(2.0),
        blocked=tuple((x - half, x + half) for x in blocked),
        closed=_closed(stage),
    )
    edge = stage.high + kit.mm(STUB_ABOVE + 3.0) if above else stage.low - kit.mm(STUB_BELOW + 3.0)
    base = edge if above else edge - kit.mm(TEXT)
    items: list[Primitive] = []
    for n, wish, x in zip(named, wishes, places, strict=True):
        tag = kit.tag(n.bar)
        start = (x, edge - kit.mm(0.7)) if above else (x, edge + kit.mm(0.7))
        items += [
            kit.text((x, base), n.text, tag=tag),
            *kit.leader(start, (wish.anchor(x), n.z), tag=tag),
        ]
    return tuple(items), edge + (1 if above else -1) * kit.mm(TEXT if named else 0.0)


def _closed(stage: Stage) -> tuple[tuple[float, float], ...]:
    """Return stretches where a leader would run through a section mark or along a face."""
    kit = stage.kit
    found = [(x - kit.mm(0.7), x + kit.mm(0.7)) for pair in stage.supports for x in pair]
    for cut in stage.cuts:
        side = letter_side(stage, cut)
        reach = kit.mm(2.0) + kit.width(cut.letter, TITLE)
        a, b = cut.x - side * kit.mm(1.6), cut.x + side * reach
        found.append((min(a, b), max(a, b)))
    return tuple(sorted(found))
