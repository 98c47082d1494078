"""Blocks on paper: fixed ones in corners, the others in what is left, rows of small ones."""

from __future__ import annotations

from dataclasses import dataclass

from detailer.drawing.primitives import XY

GAP = 5.0
"""Between two blocks. [mm on paper]"""


@dataclass(frozen=True, slots=True)
class Room:
    """A free rectangle. [mm on paper]"""

    x0: float
    y0: float
    x1: float
    y1: float

    def holds(self, size: XY) -> bool:
        """Return whether a block fits."""
        return size[0] <= self.x1 - self.x0 + 1e-6 and size[1] <= self.y1 - self.y0 + 1e-6

    def meets(self, other: Room) -> bool:
        """Return whether two rectangles share area."""
        return (
            self.x0 < other.x1 - 1e-6
            and other.x0 < self.x1 - 1e-6
            and self.y0 < other.y1 - 1e-6
            and other.y0 < self.y1 - 1e-6
        )

    def within(self, other: Room) -> bool:
        """Return whether this rectangle is a part of another one."""
        return (
            other.x0 <= self.x0
            and other.y0 <= self.y0
            and self.x1 <= other.x1
            and self.y1 <= other.y1
            and self is not other
        )

    def without(self, taken: Room) -> tuple[Room, ...]:
        """Return the largest rectangles left beside a taken one."""
        if not self.meets(taken):
            return (self,)
        sides = (
            Room(self.x0, self.y0, taken.x0, self.y1),
            Room(taken.x1, self.y0, self.x1, self.y1),
            Room(self.x0, self.y0, self.x1, taken.y0),
            Room(self.x0, taken.y1, self.x1, self.y1),
        )
        return tuple(s for s in sides if s.x1 - s.x0 > 1.0 and s.y1 - s.y0 > 1.0)


@dataclass(frozen=True, slots=True)
class Row:
    """Small blocks set in rows: sizes in order, where each lies from the upper left, the whole."""

    places: tuple[XY, ...]  # lower left corners, y downwards negative
    size: XY


def set_rows(sizes: tuple[XY, ...], width: float) -> Row | None:
    """Return blocks set from left to right in rows of a width, tops level in each row.

    Parameters
    ----------
    sizes : tuple of (float, float)
        The blocks in order. [mm on paper]
    width : float
        Of a row. [mm on paper]

    Returns
    -------
    Row or None
        None where a block is wider than a row.
    """
    if any(w > width + 1e-6 for w, _ in sizes):
        return None
    rows: list[list[int]] = []
    x = 0.0
    for i, (w, _) in enumerate(sizes):
        if not rows or x + w > width + 1e-6:
            rows.append([])
            x = 0.0
        rows[-1].append(i)
        x += w + GAP
    places: dict[int, XY] = {}
    top = widest = 0.0
    for row in rows:
        x = 0.0
        for i in row:
            places[i] = (x, top - sizes[i][1])
            x += sizes[i][0] + GAP
        widest = max(widest, x - GAP)
        top -= max(sizes[i][1] for i in row) + GAP
    return Row(tuple(places[i] for i in range(len(sizes))), (widest, -top - GAP))


def pack(
    space: Room, fixed: tuple[Room, ...], choices: tuple[tuple[XY, ...], ...]
) -> tuple[tuple[int, XY], ...] | None:
    """Return for each block which of its sizes serves and where its upper left corner lies.

    Every order of the blocks is tried; each takes the highest, then leftmost free rectangle.

    Parameters
    ----------
    space : Room
        The paper within its margins.
    fixed : tuple of Room
        What is taken.
    choices : tuple of tuple of (float, float)
        The sizes each block may have, the preferred one first.
    """
    free = [space]
    for taken in fixed:
        free = _left(free, taken)
    if any(_first(free, sizes) is None for sizes in choices):
        return None
    found = _rest(free, choices, tuple(range(len(choices))))
    return None if found is None else tuple(found[i] for i in range(len(choices)))


def _rest(
    free: list[Room], choices: tuple[tuple[XY, ...], ...], blocks: tuple[int, ...]
) -> dict[int, tuple[int, XY]] | None:
    """Return places of blocks in what is free, the first order of them that fits."""
    if not blocks:
        return {}
    places = {block: _first(free, choices[block]) for block in blocks}
    if None in places.values():
        return None  # what does not fit now fits no better later
    for block, place in places.items():
        if place is None:
            continue
        size = choices[block][place[0]]
        x, y = place[1]
        taken = Room(x - GAP, y - size[1] - GAP, x + size[0] + GAP, y + GAP)
        rest = _rest(_left(free, taken), choices, tuple(b for b in blocks if b != block))
        if rest is not None:
            return {block: place, **rest}
    return None


def _left(free: list[Room], taken: Room) -> list[Room]:
    """Return the largest rectangles left, none within another."""
    whole = [room for room in free if not room.meets(taken)]
    parts = [part for room in free if room.meets(taken) for part in room.without(taken)]
    if not parts:
        return whole
    rest = list(dict.fromkeys((*whole, *parts)))
    return [room for room in rest if not any(room.within(other) for other in rest)]


def _first(free: list[Room], sizes: tuple[XY, ...]) -> tuple[int, XY] | None:
    for i, size in enumerate(sizes):
        rooms = [room for room in free if room.holds(size)]
        if rooms:
            best = min(rooms, key=lambda r: (-r.y1, r.x0, r.x1, r.y0))
            return i, (best.x0, best.y1)
    return None
