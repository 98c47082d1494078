"""Texts in one free row: in the order of what they name, clear of each other and of lines."""

from __future__ import annotations

from dataclasses import dataclass
from itertools import accumulate

STEPS = 400
"""Places tried along a row."""

OUTSIDE = 12.0
"""A place away from what the text names counts so many times its distance."""


@dataclass(frozen=True, slots=True, kw_only=True)
class Wish:
    """A text that wants a place: `low` to `high` is where its leader may end. [mm]"""

    low: float
    high: float
    width: float

    @property
    def middle(self) -> float:
        """Return the middle of what it names."""
        return (self.low + self.high) / 2

    def cost(self, x: float) -> float:
        """Return how bad a place is."""
        away = max(self.low - x, x - self.high, 0.0)
        return abs(x - self.middle) + OUTSIDE * away

    def anchor(self, x: float) -> float:
        """Return where the leader of a text at x ends."""
        return min(max(x, self.low), self.high)


def set_row(
    wishes: tuple[Wish, ...],
    *,
    left: float,
    right: float,
    gap: float,
    blocked: tuple[tuple[float, float], ...] = (),
    closed: tuple[tuple[float, float], ...] = (),
) -> tuple[float, ...]:
    """Return the middles of texts set in one row, in the order of the middles they name.

    The least total distance from what the texts name, found exactly on a grid of places. A
    row too short for its texts grows beyond its ends; lines that cannot be kept clear of are
    crossed.

    Parameters
    ----------
    wishes : tuple of Wish
        In ascending order of middle.
    left, right : float
        Ends of the row. [mm]
    gap : float
        Least distance of two texts. [mm]
    blocked : tuple of (float, float)
        Stretches no text may touch. [mm]
    closed : tuple of (float, float)
        Stretches no leader may start in. [mm]
    """
    if not wishes:
        return ()
    need = sum(w.width + gap for w in wishes)
    for barred, shut in ((blocked, closed), (blocked, ()), ((), ())):
        found = _best(wishes, left, right, gap, barred, shut)
        if found is not None:
            return found
    spare = max(0.0, need * 1.2 - (right - left)) / 2 + gap
    wider = _best(wishes, left - spare, right + spare, gap, (), ())
    if wider is not None:
        return wider
    ends = accumulate((w.width + gap for w in wishes), initial=left - spare)
    return tuple(start + w.width / 2 for start, w in zip(ends, wishes, strict=False))


def _best(
    wishes: tuple[Wish, ...],
    left: float,
    right: float,
    gap: float,
    blocked: tuple[tuple[float, float], ...],
    closed: tuple[tuple[float, float], ...],
) -> tuple[float, ...] | None:
    step = (right - left) / STEPS
    grid = [left + step * i for i in range(STEPS + 1)]
    far = float("inf")
    tables: list[list[tuple[float, int]]] = []  # least cost with this text at or before a place
    before: Wish | None = None
    for wish in wishes:
        table: list[tuple[float, int]] = []
        best = (far, -1)
        apart = 0.0 if before is None else (before.width + wish.width) / 2 + gap
        back = -(-apart // step)
        for i, x in enumerate(grid):
            cost = far
            if _free(wish, x, left, right, blocked, closed):
                if before is None:
                    cost = wish.cost(x)
                elif i - back >= 0:
                    cost = wish.cost(x) + tables[-1][int(i - back)][0]
            if cost < best[0]:
                best = (cost, i)
            table.append(best)
        tables.append(table)
        before = wish
    if tables[-1][-1][0] == far:
        return None
    return _walk_back(wishes, tables, grid, gap, step)


def _walk_back(
    wishes: tuple[Wish, ...],
    tables: list[list[tuple[float, int]]],
    grid: list[float],
    gap: float,
    step: float,
) -> tuple[float, ...]:
    places: list[float] = []
    i = len(grid) - 1
    for k in range(len(wishes) - 1, -1, -1):
        i = tables[k][i][1]
        places.append(grid[i])
        if k:
            i -= int(-(-((wishes[k - 1].width + wishes[k].width) / 2 + gap) // step))
    return tuple(reversed(places))


def _free(
    wish: Wish,
    x: float,
    left: float,
    right: float,
    blocked: tuple[tuple[float, float], ...],
    closed: tuple[tuple[float, float], ...],
) -> bool:
    low, high = x - wish.width / 2, x + wish.width / 2
    if low < left or high > right:
        return False
    if any(low < b and high > a for a, b in blocked):
        return False
    at = wish.anchor(x)
    return not any(a < at < b for a, b in closed)
