"""Clear distances between real bars, exact with bends and flat ends."""

from __future__ import annotations

from dataclasses import dataclass, replace
from functools import lru_cache

import numpy as np

from detailer.cage.bar import Bar, Cage, Contact, Point
from detailer.cage.line import line_through
from detailer.cage.pieces import (
    SURE,
    Array,
    Form,
    Pieces,
    Whole,
    joined,
    near_pairs,
    pieces_of,
    quarters,
    reach,
)
from detailer.model.materials import over_ribs
from detailer.values import TOUCH, ContactKind, Role

ROUGH = 0.01
"""The depth of a penetration needs no more than this share of exactness."""

FINE = 0.001
"""A clear distance is right to this share of it, or to 0.001 mm where that is more."""

USUAL = 40.0
"""Pairs are looked for at least within this. [mm]"""

MEETING = 0.05
"""Bars this close touch. [mm]"""


@dataclass(frozen=True, slots=True)
class Gap:
    """The least clear distance of two real bars; negative where they penetrate."""

    a: str  # bar id
    ai: int  # index of its placing
    b: str
    bi: int
    gap: float  # [mm]
    at: Point  # half way between the two centre lines, where they are closest
    declared: ContactKind | None


def steel_radius(bar: Bar, *, ribs: bool) -> float:
    """Return the radius of a bar, nominal or over its ribs. [mm]

    Parameters
    ----------
    bar : Bar
        The bar.
    ribs : bool
        Whether ribs count.
    """
    return (over_ribs(bar.dia) if ribs else bar.dia) / 2


def gaps(cage: Cage, *, ribs: bool = False, within: float) -> tuple[Gap, ...]:
    """Return every pair of real bars whose clear distance is at most `within`.

    Bars stay where they are placed: over ribs only their radii grow.

    Parameters
    ----------
    cage : Cage
        The cage.
    ribs : bool
        Whether bars have their size over ribs rather than their nominal diameter.
    within : float
        Greatest clear distance of interest. [mm]
    """
    names = [(bar, k) for bar in cage.bars for k in range(len(bar.placings))]
    forms = tuple((bar.corners, bar.mandrels, bar.dia, bar.placings) for bar in cage.bars)
    key, gap, at = _measured(forms, ribs, max(within, USUAL))
    declared = _Declared(cage)
    found = []
    for k in np.flatnonzero(gap <= within):
        (a, ai), (b, bi) = sorted(
            (names[n] for n in divmod(int(key[k]), len(names))), key=lambda n: (n[0].id, n[1])
        )
        where = (float(at[k, 0]), float(at[k, 1]), float(at[k, 2]))
        kind = declared.kind(a, b, where[0])
        found.append(Gap(a.id, ai, b.id, bi, float(gap[k]), where, kind))
    return tuple(sorted(found, key=lambda g: (g.a, g.ai, g.b, g.bi)))


@lru_cache(maxsize=2)
def _measured(forms: tuple[Form, ...], ribs: bool, within: float) -> tuple[Whole, Array, Array]:
    """Return pairs of real bars by number, their least clear distances, and where they are.

    The checks of one cage ask for the same pairs again and again, so the last ones are kept.
    """
    radii = (over_ribs(form[2]) / 2 if ribs else form[2] / 2 for form in forms)
    pieces = pieces_of(tuple(zip(forms, radii, strict=True)))
    one, two = near_pairs(pieces, within)
    if not len(one):
        return np.zeros(0, dtype=np.intp), np.zeros(0), np.zeros((0, 3))
    count = sum(len(form[3]) for form in forms)
    return _least(pieces.take(one), pieces.take(two), within, count)


def _least(a: Pieces, b: Pieces, within: float, count: int) -> tuple[Whole, Array, Array]:
    """Return for each pair of bars its number, least clear distance, and where that is."""
    low, high = np.minimum(a.bar, b.bar), np.maximum(a.bar, b.bar)
    keys, group = np.unique(low * count + high, return_inverse=True)
    best = np.full(len(keys), np.inf)
    where = np.zeros((len(keys), 3))
    while len(group):
        seen = reach(a, b)
        order = np.lexsort((seen.found, group))
        firsts = order[np.unique(group[order], return_index=True)[1]]
        better = firsts[seen.found[firsts] < best[group[firsts]]]
        best[group[better]] = seen.found[better]
        where[group[better]] = (seen.here[better] + seen.there[better]) / 2
        sure = np.maximum(SURE, np.where(best < 0, -ROUGH, FINE) * best)[group]
        loose = a.sagitta() + b.sagitta() > sure
        open_ = loose & (seen.least < np.minimum(best[group] - sure, within))
        rows = np.flatnonzero(open_)
        a, b, group = _split(a.take(rows), b.take(rows), group[rows])
    return keys, best, where


def _split(a: Pieces, b: Pieces, group: Whole) -> tuple[Pieces, Pieces, Whole]:
    """Cut the one of each pair that strays further from its chord in four."""
    wide = a.sagitta() >= b.sagitta()
    left, right = np.flatnonzero(wide), np.flatnonzero(~wide)
    return (
        joined((*quarters(a.take(left)), *(a.take(right),) * 4)),
        joined((*(b.take(left),) * 4, *quarters(b.take(right)))),
        np.concatenate((group[left],) * 4 + (group[right],) * 4),
    )


class _Declared:
    """Looks up the kind of contact that was declared for two bars near a place."""

    def __init__(self, cage: Cage) -> None:
        self._by_ids: dict[tuple[str, str], list[Contact]] = {}
        for contact in cage.contacts:
            ids = (min(contact.a, contact.b), max(contact.a, contact.b))
            self._by_ids.setdefault(ids, []).append(contact)

    def kind(self, a: Bar, b: Bar, x: float) -> ContactKind | None:
        """Return the kind declared; a lap holds wherever its bars touch."""
        slack = 2 * (a.dia + b.dia)
        for contact in self._by_ids.get((min(a.id, b.id), max(a.id, b.id)), ()):
            inside = contact.x0 - slack <= x <= contact.x1 + slack
            if inside or contact.kind in (ContactKind.LAP, ContactKind.BUNDLE):
                return contact.kind
        return None


def self_gap(bar: Bar) -> float:
    """Return the clear distance between the two ends of a bar, infinite if it has no bends. [mm]

    The first third of its line against the last: in a closed link, hook against hook.

    Parameters
    ----------
    bar : Bar
        The bar.
    """
    if len(bar.corners) < 4:
        return float("inf")
    return _self_gap(_turned(bar.corners), bar.mandrels, bar.dia)


def _turned(corners: tuple[Point, ...]) -> tuple[Point, ...]:
    """Return corners from the first one, mirrored so that each axis is first left forwards.

    A bar's ends are as far apart wherever it lies and whichever hand it has.
    """
    first = np.array(corners) - np.array(corners[0])
    ways = [next((v for v in axis if abs(v) > SURE), 1.0) for axis in first.T.tolist()]
    rows = np.round(first * np.sign(ways), 6) + 0.0
    return tuple((float(x), float(y), float(z)) for x, y, z in rows)


@lru_cache(maxsize=1024)
def _self_gap(corners: tuple[Point, ...], mandrels: tuple[float, ...], dia: float) -> float:
    pieces = pieces_of((((corners, mandrels, dia, ((0.0, 0.0, 0.0),)), dia / 2),))
    third = line_through(corners, mandrels, dia).length / 3
    length = np.where(
        pieces.radius > 0,
        pieces.radius * (pieces.t1 - pieces.t0),
        np.linalg.norm(pieces.u, axis=1),
    )
    start = np.cumsum(length) - length
    left = np.flatnonzero(start + length <= third + SURE)
    right = np.flatnonzero(start >= 2 * third - SURE)
    left_part, right_part = _part(pieces, start, length, third)
    a = joined((pieces.take(left), left_part))
    b = joined((pieces.take(right), right_part))
    one = np.repeat(np.arange(len(a.bar)), len(b.bar))
    two = np.tile(np.arange(len(b.bar)), len(a.bar))
    _, gap, _ = _least(a.take(one), b.take(two), float("inf"), 1)
    return float(gap[0])


def _part(pieces: Pieces, start: Array, length: Array, third: float) -> tuple[Pieces, Pieces]:
    """Return what the first and the last third hold of the pieces they cut through."""
    cut = (start < third) & (start + length > third + SURE)
    one = pieces.take(np.flatnonzero(cut))
    share = (third - start[cut]) / length[cut]
    none = np.zeros_like(one.last)
    head = replace(one, t1=one.t0 + share * (one.t1 - one.t0), last=none)
    cut = (start < 2 * third - SURE) & (start + length > 2 * third)
    two = pieces.take(np.flatnonzero(cut))
    share = (2 * third - start[cut]) / length[cut]
    none = np.zeros_like(two.first)
    return head, replace(two, t0=two.t0 + share * (two.t1 - two.t0), first=none)


def undeclared(cage: Cage) -> tuple[Gap, ...]:
    """Return contacts that nobody declared, and every penetration deeper than `TOUCH`.

    The two ends of a closed link touch by their form; only their penetration is reported.

    Parameters
    ----------
    cage : Cage
        The cage.
    """
    found = [
        g
        for g in gaps(cage, within=MEETING)
        if g.gap < -TOUCH or (g.gap <= MEETING and g.declared is None)
    ]
    for bar in cage.bars:
        gap = self_gap(bar) if bar.role in (Role.LINK, Role.TIE) else 0.0
        if gap < -TOUCH:
            (x, y, z), (dx, dy, dz) = bar.corners[1], bar.placings[0]
            found.append(Gap(bar.id, 0, bar.id, 0, gap, (x + dx, y + dy, z + dz), None))
    return tuple(found)
