"""Texts in one free row: in the order of what they name, clear of each other and of lines."""

from __future__ import annotations

from dataclasses import dataclass
from itertools import accumulate, pairwise
from math import ceil
from typing import TypeAlias

import numpy as np
from numpy.typing import NDArray

Line: TypeAlias = NDArray[np.float64]

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
    """Return the cheapest places on the grid, None where there are none."""
    step = (right - left) / STEPS
    grid: Line = left + step * np.arange(STEPS + 1, dtype=np.float64)
    apart = [ceil(((a.width + b.width) / 2 + gap) / step - 1e-9) for a, b in pairwise(wishes)]
    costs: list[Line] = []  # of the texts up to this one, this one at a place
    for k, wish in enumerate(wishes):
        cost = _costs(wish, grid, left, right, blocked, closed)
        if k:
            reached = np.full_like(cost, np.inf)
            if apart[k - 1] <= STEPS:
                least = np.minimum.accumulate(costs[-1])
                reached[apart[k - 1] :] = least[: STEPS + 1 - apart[k - 1]]
            cost = cost + reached
        costs.append(cost)
    if not np.isfinite(costs[-1].min()):
        return None
    places: list[float] = []
    end = STEPS
    for k in range(len(wishes) - 1, -1, -1):
        at = int(np.argmin(costs[k][: end + 1]))
        places.append(float(grid[at]))
        end = at - apart[k - 1] if k else 0
    return tuple(reversed(places))


def _costs(
    wish: Wish,
    grid: Line,
    left: float,
    right: float,
    blocked: tuple[tuple[float, float], ...],
    closed: tuple[tuple[float, float], ...],
) -> Line:
    """Return how bad each place is for one text; infinite where it may not be."""
    anchor = np.clip(grid, wish.low, wish.high)
    cost = np.abs(grid - wish.middle) + OUTSIDE * np.abs(grid - anchor)
    low, high = grid - wish.width / 2, grid + wish.width / 2
    barred = (low < left) | (high > right)
    for a, b in blocked:
        barred |= (low < b) & (high > a)
    for a, b in closed:
        barred |= (anchor > a) & (anchor < b)
    return np.where(barred, np.inf, cost)
