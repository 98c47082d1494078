"""Links, ties and spacers pulled out: one sketch a mark, true to scale, seen along the beam."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass

from detailer.cage.bar import Bar, Cage
from detailer.cage.measure import outer_box
from detailer.drawing.primitives import Dimension, Path, Pen, Primitive
from detailer.values import Role
from detailer.views.kit import TEXT, Kit
from detailer.views.trace import section_trace
from detailer.views.zones import legs_of, link_size

CROSS = (Role.LINK, Role.TIE, Role.SPACER)


@dataclass(frozen=True, slots=True)
class Bent:
    """Bars of one mark that lie across the beam."""

    bar: Bar
    count: int

    @property
    def texts(self) -> tuple[str, str]:
        """Return the call-out and the scheduled length."""
        bar = self.bar
        what = f"{link_size(bar.dia, 0 if bar.role is Role.SPACER else legs_of(bar))}-{bar.name}"
        length = f"L = {bar.length:.0f}" if bar.length is not None else ""
        return f"{self.count}-{what}", length


def bent_bars(cage: Cage) -> tuple[Bent, ...]:
    """Return links, ties and spacers by mark, with the number of each in the member.

    Parameters
    ----------
    cage : Cage
        The cage, its bars marked.
    """
    firsts: dict[str, Bar] = {}
    counts: dict[str, int] = {}
    for bar in cage.bars:
        if bar.role in CROSS:
            firsts.setdefault(bar.name, bar)
            counts[bar.name] = counts.get(bar.name, 0) + len(bar.placings)
    return tuple(Bent(firsts[name], counts[name]) for name in sorted(firsts))


def bent_items(cage: Cage, scale: float) -> tuple[Primitive, ...]:
    """Return a row of sketches from x = 0 to the right, their tops at y = 0.

    Parameters
    ----------
    cage : Cage
        The cage, its bars marked.
    scale : float
        Of the sketches.
    """
    kit = Kit(cage.member, scale)
    items: list[Primitive] = []
    x = 0.0
    for bent in bent_bars(cage):
        box = outer_box(bent.bar)
        width = max(box.y1 - box.y0, *(kit.width(t) for t in bent.texts))
        middle = x + kit.mm(6.0) + width / 2
        items += _one(bent, middle, kit)
        x = middle + width / 2 + kit.mm(4.0)
    return tuple(items)


def _one(bent: Bent, middle: float, kit: Kit) -> Iterator[Primitive]:
    bar, tag = bent.bar, kit.tag(bent.bar)
    box = outer_box(bar)
    shift = middle + (box.y0 + box.y1) / 2
    shape = section_trace(bar).moved(shift, -box.z1)
    yield Path(points=shape.points, bulges=shape.bulges, pen=Pen.LINK, width=bar.dia, tag=tag)
    low = box.z0 - box.z1
    x0, x1 = shift - box.y1, shift - box.y0
    line = low - kit.mm(5.0)
    if bar.role is Role.LINK:
        d = bar.dia
        ends = (x0 + d, low), (x1 - d, low)
        yield Dimension(start=ends[0], end=ends[1], line=line, tag=tag)
        sides = (x0 + d, low + d), (x0 + d, -d)
        yield Dimension(start=sides[0], end=sides[1], line=x0 - kit.mm(3.0), vertical=True, tag=tag)
    elif x1 - x0 >= box.z1 - box.z0:
        yield Dimension(start=(x0, low), end=(x1, low), line=line, tag=tag)
    else:
        at = x0 - kit.mm(3.0)
        yield Dimension(start=(x0, low), end=(x0, 0.0), line=at, vertical=True, tag=tag)
    for i, text in enumerate(t for t in bent.texts if t):
        yield kit.text((middle, line - kit.mm(2.0 + TEXT + 4.0 * i)), text, tag=tag)
