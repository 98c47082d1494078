"""A section: a slice of the cage, seen along +x, so that left is +y as on site.

Its points are (−y, z): the picture's x runs to the right, the member's y to the left.
"""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass, replace
from itertools import pairwise
from typing import Any

from detailer.cage.bar import Bar, Cage
from detailer.cage.cut import CutBar, Slice, cut
from detailer.cage.measure import outer_box
from detailer.drawing.primitives import XY, Align, Disc, Path, Pen, Primitive
from detailer.values import Face, Role
from detailer.views.kit import TEXT, Kit, call_out
from detailer.views.sizes import FAR, WING, Web, beside, size_items, web_of
from detailer.views.trace import section_trace
from detailer.views.zones import legs_of, link_size

LEVEL = 6.0
"""Bars whose centres agree in height within this are one row. [mm]"""

SHELF = 4.2
"""Least distance of two call-outs above each other. [mm on paper]"""


@dataclass(frozen=True, slots=True, kw_only=True)
class Group:
    """Bars of one mark in one row: one call-out."""

    bars: tuple[CutBar, ...]  # from left to right
    text: str
    place: str  # "B1", "T2", "" for side bars

    @property
    def points(self) -> tuple[XY, ...]:
        """Return the centres in the picture."""
        return tuple((-c.y, c.z) for c in self.bars)


def section_items(
    cage: Cage, x: float, scale: float, *, full: bool = False
) -> tuple[Primitive, ...]:
    """Return a section with its call-outs and dimensions.

    Parameters
    ----------
    cage : Cage
        The cage, its bars marked.
    x : float
        Where it is cut. [mm]
    scale : float
        Of the section.
    full : bool
        Whether cover and slab are dimensioned here; once on a drawing is enough.
    """
    kit = Kit(cage.member, scale)
    seen = cut(cage, x)
    seen = replace(seen, bars=tuple(c for c in seen.bars if c.square))
    web = web_of(cage, x)
    return (
        *_concrete(seen.outline, web, kit),
        *_links(seen, kit),
        *_spacers(cage, seen, kit),
        *_discs(seen, kit),
        *_call_outs(cage, seen, web, kit),
        *size_items(seen, web, kit, _words_left(cage, seen, kit), full=full),
    )


def _concrete(outline: Any, web: Web, kit: Kit) -> Iterator[Path]:
    """Yield the outline; a slab wider than shown is broken off."""
    import shapely
    from shapely import affinity

    geo: Any = shapely
    turn: Any = affinity
    wing = kit.mm(WING)
    flipped = turn.scale(outline, xfact=-1.0, yfact=1.0, origin=(0, 0))
    x0, z0, x1, z1 = flipped.bounds
    window = geo.box(web.x0 - wing, z0 - 1, web.x1 + wing, z1 + 1)
    shown = flipped.intersection(window)
    sides = [x for x, far in ((web.x0 - wing, x0), (web.x1 + wing, x1)) if abs(far - x) > 1e-6]
    sides = [x for x in sides if x0 < x < x1]
    edge = shown.boundary
    for x in sides:
        edge = edge.difference(geo.LineString([(x, z0 - 1), (x, z1 + 1)]).buffer(1e-3))
        ends = [z for px, z in shown.exterior.coords if abs(px - x) < 1e-3]
        yield _broken(x, min(ends), max(ends), kit)
    yield from _pieces(edge, kit)


def _pieces(edge: Any, kit: Kit) -> Iterator[Path]:
    import shapely

    geo: Any = shapely
    merged = geo.line_merge(edge) if edge.geom_type == "MultiLineString" else edge
    for part in sorted(getattr(merged, "geoms", [merged]), key=lambda p: p.bounds):
        points = tuple((round(x, 3), round(z, 3)) for x, z in part.coords)
        if points[0] == points[-1]:
            yield Path(points=points[:-1], pen=Pen.OUTLINE, closed=True, tag=kit.named(""))
        else:
            yield Path(points=points, pen=Pen.OUTLINE, tag=kit.named(""))


def _broken(x: float, z0: float, z1: float, kit: Kit) -> Path:
    middle, size, over = (z0 + z1) / 2, kit.mm(0.9), kit.mm(0.8)
    points = (
        (x, z0 - over),
        (x, middle - size / 2),
        (x - size, middle - size / 4),
        (x + size, middle + size / 4),
        (x, middle + size / 2),
        (x, z1 + over),
    )
    return Path(points=points, pen=Pen.DIMENSION, tag=kit.named(""))


def _links(seen: Slice, kit: Kit) -> Iterator[Path]:
    for bar, k in seen.links:
        _, dy, dz = bar.placings[k]
        trace = section_trace(bar).moved(-dy, dz)
        yield Path(
            points=trace.points,
            bulges=trace.bulges,
            pen=Pen.LINK,
            width=bar.dia,
            tag=kit.tag(bar),
        )


def _discs(seen: Slice, kit: Kit) -> Iterator[Disc]:
    for c in seen.bars:
        yield Disc(
            centre=(-c.y, c.z), radius=c.bar.dia / 2, pen=Pen.BAR, filled=True, tag=kit.tag(c.bar)
        )


def spacers_at(cage: Cage, x: float) -> tuple[Bar, ...]:
    """Return the spacer bars that hold layers where a section is cut.

    A spacer is shown where one stands on either side of the plane, or within half a metre.

    Parameters
    ----------
    cage : Cage
        The cage.
    x : float
        Where it is cut. [mm]
    """
    found: list[Bar] = []
    for bar in cage.bars:
        if bar.role is Role.SPACER:
            xs = [bar.corners[0][0] + dx for dx, _, _ in bar.placings]
            if min(xs) - 500.0 <= x <= max(xs) + 500.0:
                found.append(bar)
    return tuple(found)


def _spacers(cage: Cage, seen: Slice, kit: Kit) -> Iterator[Path]:
    for bar in spacers_at(cage, seen.x):
        _, dy, dz = bar.placings[0]
        trace = section_trace(bar).moved(-dy, dz)
        yield Path(points=trace.points, pen=Pen.LINK, tag=kit.tag(bar))


def groups_of(seen: Slice) -> tuple[tuple[Group, ...], ...]:
    """Return the bars of a slice by row from the top down, each row by mark from the left.

    Parameters
    ----------
    seen : Slice
        The slice.
    """
    rows: list[list[CutBar]] = []
    for c in sorted(seen.bars, key=lambda c: (-c.z, -c.y)):
        same = next((r for r in rows if _same_row(r[0], c)), None)
        if same is None:
            rows.append([c])
        else:
            same.append(c)
    return tuple(tuple(_groups(row)) for row in rows)


def _same_row(a: CutBar, b: CutBar) -> bool:
    return _kind(a) == _kind(b) and abs(a.z - b.z) <= LEVEL


def _kind(c: CutBar) -> tuple[object, int]:
    face = Face.LEFT if c.bar.face is Face.RIGHT else c.bar.face
    return face, c.bar.layer


def _groups(row: list[CutBar]) -> Iterator[Group]:
    marks: dict[str, list[CutBar]] = {}
    for c in sorted(row, key=lambda c: -c.y):
        marks.setdefault(c.bar.name, []).append(c)
    for bars in marks.values():
        first = bars[0].bar
        side = first.face in (Face.LEFT, Face.RIGHT, Face.NONE)
        place = "" if side else f"{first.face.value[0].upper()}{first.layer}"
        text = call_out(len(bars), first)
        yield Group(bars=tuple(bars), text=f"{text} {place}".strip(), place=place)


def _call_outs(cage: Cage, seen: Slice, web: Web, kit: Kit) -> Iterator[Primitive]:
    """Yield call-outs in clock order: outermost rows above and below, the others at the sides."""
    rows = groups_of(seen)
    shelves: list[tuple[Group, float, float]] = []  # group, wanted height, step of its shelf
    tops = [row for row in rows if row[0].bars[0].bar.face is Face.TOP]
    lows = [row for row in rows if row[0].bars[0].bar.face is Face.BOTTOM]
    ends = (*tops[:1], *lows[-1:])
    for row in rows:
        top = row[0].bars[0].bar.face is Face.TOP
        level = sum(c.z for g in row for c in g.bars) / sum(len(g.bars) for g in row)
        outside = _outside(row) if row in ends else ()
        for group, side in outside:
            yield from _fan(group, web, kit, side, above=top)
        way = -1 if top else 1
        named = [group for group, _ in outside]
        mixed = len(row) > 1
        for i, group in enumerate(g for g in row if g not in named):
            shelves.append((group, level, way * kit.mm(2.6) * (1 + i) if mixed else 0.0))
    yield from _shelves(tuple(shelves), cage, seen, web, kit)


def _outside(row: tuple[Group, ...]) -> tuple[tuple[Group, int], ...]:
    """Return the groups named above or below the concrete, and on which side of its middle.

    One that holds both outer bars stands in the middle; otherwise those of the left and of
    the right outer bar stand side by side, if all bars of one lie left of the other's.
    """
    spread = [(min(x for x, _ in g.points), max(x for x, _ in g.points)) for g in row]
    left = min(range(len(row)), key=lambda i: spread[i][0])
    right = max(range(len(row)), key=lambda i: spread[i][1])
    if left == right:
        return ((row[left], 0),)
    if spread[left][1] < spread[right][0]:
        return (row[left], -1), (row[right], 1)
    return ((row[left], -1),) if len(row[left].bars) <= len(row[right].bars) else ((row[right], 1),)


def _fan(group: Group, web: Web, kit: Kit, side: int, *, above: bool) -> Iterator[Primitive]:
    """Yield a call-out above or below the concrete, with a leader to each of its bars."""
    tag = kit.tag(group.bars[0].bar)
    edge = web.z1 + kit.mm(FAR) if above else web.z0 - kit.mm(FAR + TEXT)
    half = kit.width(group.text) / 2
    middle = (web.x0 + web.x1) / 2 + side * (half + kit.mm(1.0))
    nearest = (web.x0 if side < 0 else web.x1) if side else middle
    start_x = min(max(nearest, middle - half), middle + half)
    start = (start_x, edge - kit.mm(0.7) if above else edge + kit.mm(TEXT + 0.7))
    yield kit.text((middle, edge), group.text, tag=tag)
    for point in group.points:
        yield from kit.leader(start, point, tag=tag)


def _shelves(
    shelves: tuple[tuple[Group, float, float], ...], cage: Cage, seen: Slice, web: Web, kit: Kit
) -> Iterator[Primitive]:
    """Yield the call-outs at the right, then links and spacers at the left."""
    wishes = sorted(shelves, key=lambda s: -(s[1] + s[2]))
    levels = _spread(tuple(level + step for _, level, step in wishes), kit.mm(SHELF), web)
    edge = web.x1 + kit.mm(beside(seen, web, 1))
    for (group, level, step), at in zip(wishes, levels, strict=True):
        tag = kit.tag(group.bars[0].bar)
        yield kit.text((edge, at - kit.mm(TEXT / 2)), group.text, align=Align.LEFT, tag=tag)
        start = (edge - kit.mm(0.7), at)
        if step == 0.0:
            knee = (web.x1 + kit.mm(1.2), level)
            yield from kit.leader(start, knee, group.points[0], tag=tag)
            continue
        for x, z in group.points:
            knee = (x + abs(level + step - z), level + step)
            bend = (web.x1 + kit.mm(1.2), level + step)
            yield from kit.leader(start, bend, knee, (x, z), tag=tag)
    yield from _left_side(cage, seen, web, kit)


def _spread(levels: tuple[float, ...], step: float, web: Web) -> tuple[float, ...]:
    """Return descending heights at least a step apart, near the wanted ones, beside the web."""
    found: list[float] = []
    for level in levels:
        found.append(min(level, found[-1] - step) if found else level)
    if not found:
        return ()
    over = (levels[-1] - found[-1]) / 2
    over = min(max(over, web.z0 - found[-1]), max(web.z1 - found[0], 0.0))
    return tuple(level + over for level in found)


def _left_side(cage: Cage, seen: Slice, web: Web, kit: Kit) -> Iterator[Primitive]:
    """Yield the call-outs of links and spacers at the left of the web."""
    edge = web.x0 - kit.mm(beside(seen, web, -1))
    named = _named_left(cage, seen, kit)
    levels = _spread(tuple(n[0] for n in named), kit.mm(SHELF), web)
    for (z, x, text, bar), at in zip(named, levels, strict=True):
        tag = kit.tag(bar)
        yield kit.text((edge, at - kit.mm(TEXT / 2)), text, align=Align.RIGHT, tag=tag)
        yield from kit.leader((edge + kit.mm(0.7), at), (x, z), tag=tag)


def _words_left(cage: Cage, seen: Slice, kit: Kit) -> float:
    return max((kit.width(text) for _, _, text, _ in _named_left(cage, seen, kit)), default=0.0)


def _free_level(seen: Slice, low: float, high: float) -> float:
    """Return the middle of the highest stretch between rows of bars that is one of the widest."""
    levels = sorted({low, high, *(c.z for c in seen.bars if low < c.z < high)})
    widest = max(b - a for a, b in pairwise(levels))
    return max((a + b) / 2 for a, b in pairwise(levels) if b - a > 0.9 * widest)


def _named_left(cage: Cage, seen: Slice, kit: Kit) -> list[tuple[float, float, str, Bar]]:
    """Return links and spacers from the top down: z and x of a point on each, its text."""
    named: list[tuple[float, float, str, Bar]] = []
    done: set[str] = set()
    for bar, k in seen.links:
        if bar.name in done:
            continue
        done.add(bar.name)
        box, (_, dy, dz) = outer_box(bar), bar.placings[k]
        z = _free_level(seen, box.z0 + dz, box.z1 + dz) + kit.mm(SHELF) * len(named)
        x = -(box.y1 - bar.dia / 2 + dy)
        named.append((z, x, f"{link_size(bar.dia, legs_of(bar))}-{bar.name}", bar))
    for bar in spacers_at(cage, seen.x):
        _, y, z = bar.corners[-1]
        _, dy, dz = bar.placings[0]
        ends = sorted((-(y + dy), -(bar.corners[0][1] + dy)))
        named.append((z + dz, ends[0], f"T{bar.dia:.0f}-{bar.name}", bar))
    return sorted(named, key=lambda n: -n[0])
