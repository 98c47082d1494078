"""Layers and lanes: where across the beam each bar of a face lies.

The bars that run through take the link corners and share the width; extras go between them
while the layer still fits over ribs, and what does not fit goes into the next layer, aligned
with the one below it.
"""

from __future__ import annotations

from dataclasses import dataclass
from itertools import combinations_with_replacement, pairwise

from detailer.model import over_ribs
from detailer.placing.frame import Frame, gap_needed


@dataclass(frozen=True, slots=True, kw_only=True)
class Seat:
    """A place for one bar across the section; depth counts from the links' inner face."""

    y: float
    depth: float  # of the bar's centre [mm]
    layer: int
    dia: int
    corner: bool = False


@dataclass(frozen=True, slots=True, kw_only=True)
class Spacing:
    """What decides how close bars may lie."""

    aggregate: float
    layer_gap: float  # clear, between layers [mm]
    corners_last: bool = False  # layers above the first leave corners to the tails of hooks

    def gap(self, dias: tuple[int, ...]) -> float:
        """Return the least clear gap among bars of a layer."""
        top = max(dias)
        return gap_needed(top, top, self.aggregate)


def first_layer(frame: Frame, dias: tuple[int, ...]) -> tuple[Seat, ...]:
    """Seat bars in the first layer with equal clear gaps; `dias` in order from right to left."""
    if len(dias) == 1:
        return (Seat(y=frame.middle, depth=dias[0] / 2, layer=1, dia=dias[0]),)
    ends = frame.seat(dias[0]), frame.seat(dias[-1])
    gap = (frame.width - sum(ends) - sum(dias)) / (len(dias) - 1)
    seats = []
    y = frame.right + ends[0]
    for i, dia in enumerate(dias):
        corner = i in (0, len(dias) - 1)
        depth = dia / 2 + (frame.seat(dia) if corner else 0.0)
        seats.append(Seat(y=y + dia / 2, depth=depth, layer=1, dia=dia, corner=corner))
        y += dia + gap
    return tuple(seats)


def symmetric(dias: tuple[int, ...]) -> tuple[int, ...]:
    """Order diameters across the section: the largest in the corners, like faces like."""
    left: list[int] = []
    right: list[int] = []
    for i, dia in enumerate(sorted(dias, reverse=True)):
        (right if i % 2 == 0 else left).append(dia)
    return tuple(right + left[::-1])


def capacity(frame: Frame, dias: tuple[int, ...], spacing: Spacing) -> int:
    """Return how many of the bars, largest first, fit one layer over ribs; two always do."""
    order = tuple(sorted(dias, reverse=True))
    for count in range(len(order), 2, -1):
        row = order[:count]
        if frame.gap_over_ribs(row) >= spacing.gap(row) - 1e-6:
            return count
    return min(len(order), 2)


def seat_primary(
    frame: Frame, dias: tuple[int, ...], layer: int | None, spacing: Spacing
) -> tuple[Seat, ...]:
    """Seat the bars that run through: as many as fit in the first layer, the rest above."""
    if layer is not None and layer > 1:
        base = first_layer(frame, symmetric(dias))
        return tuple(
            Seat(
                y=s.y,
                depth=_layer_depth(s.dia, layer, max(dias), spacing),
                layer=layer,
                dia=s.dia,
                corner=s.corner,
            )
            for s in base
        )
    order = tuple(sorted(dias, reverse=True))
    count = len(order) if layer == 1 else capacity(frame, order, spacing)
    seats = list(first_layer(frame, symmetric(order[:count])))
    return tuple(seats) + stack(frame, tuple(seats), order[count:], spacing)


def _layer_depth(dia: int, layer: int, largest: int, spacing: Spacing) -> float:
    return (layer - 1) * (largest + spacing.layer_gap) + dia / 2


def seat_extras(
    frame: Frame,
    taken: tuple[Seat, ...],
    dias: tuple[int, ...],
    layer: int | None,
    spacing: Spacing,
) -> tuple[Seat, ...]:
    """Seat extras among seats already taken: in the gaps of the first layer, then above it."""
    first = tuple(sorted((s for s in taken if s.layer == 1), key=lambda s: s.y))
    if not first:
        return seat_primary(frame, dias, layer, spacing)
    if layer is not None and layer > 1:
        return stack(frame, taken, dias, spacing, lowest=layer)
    order = tuple(sorted(dias, reverse=True))
    for count in range(len(order), 0, -1):
        row = _between(frame, first, order[:count], spacing, forced=layer == 1)
        if row is not None:
            return row + stack(frame, taken + row, order[count:], spacing)
    return stack(frame, taken, order, spacing)


def _between(
    frame: Frame, first: tuple[Seat, ...], dias: tuple[int, ...], spacing: Spacing, *, forced: bool
) -> tuple[Seat, ...] | None:
    """Seat extras in the gaps of a layer with the greatest least gap; None if none fits."""
    if len(first) < 2:
        return None
    best: tuple[tuple[float, ...], tuple[Seat, ...]] | None = None
    for choice in combinations_with_replacement(range(len(first) - 1), len(dias)):
        seats, gap, slack = _fill_gaps(frame, first, dias, choice, spacing)
        slack = min(slack, _packed_slack(frame, (*first, *seats), spacing))
        lean = abs(sum(s.y - frame.middle for s in seats))
        score = (round(min(slack, 0.0), 6), round(-lean, 3), round(gap, 6))
        if (forced or slack >= -1e-6) and (best is None or score > best[0]):
            best = (score, seats)
    return best[1] if best else None


def _fill_gaps(
    frame: Frame,
    first: tuple[Seat, ...],
    dias: tuple[int, ...],
    choice: tuple[int, ...],
    spacing: Spacing,
) -> tuple[tuple[Seat, ...], float, float]:
    """Return the seats of one distribution, its least clear gap, and the least slack over ribs."""
    seats: list[Seat] = []
    least = slack = float("inf")
    for g in sorted(set(choice)):
        mine = [d for d, where in zip(dias, choice, strict=True) if where == g]
        a, b = first[g], first[g + 1]
        room = (b.y - b.dia / 2) - (a.y + a.dia / 2)
        gap = (room - sum(mine)) / (len(mine) + 1)
        everyone = (a.dia, b.dia, *mine)
        grown = sum(_growth(d) for d in mine) + (_growth(a.dia) + _growth(b.dia)) / 2
        grown += sum(_growth(frame.link) for s in (a, b) if s.corner)
        over_ribs_gap = (room - sum(mine) - grown) / (len(mine) + 1)
        slack = min(slack, over_ribs_gap - spacing.gap(everyone))
        least = min(least, gap)
        y = a.y + a.dia / 2
        for dia in mine:
            seats.append(Seat(y=y + gap + dia / 2, depth=dia / 2, layer=1, dia=dia))
            y += gap + dia
    return tuple(seats), least, slack


def _packed_slack(frame: Frame, row: tuple[Seat, ...], spacing: Spacing) -> float:
    """Return what the least gap of a layer has to spare when ribs take their share of all. [mm]"""
    spots = sorted((s.y, s.dia) for s in row)
    gaps = [b - a - (p + q) / 2 for (a, p), (b, q) in pairwise(spots)]
    grown = sum(_growth(dia) for _, dia in spots) + 2 * _growth(frame.link)
    return min(gaps) - grown / len(gaps) - (spacing.aggregate + 5)


def _growth(dia: float) -> float:
    """Return what ribs add to a diameter. [mm]"""
    return over_ribs(dia) - dia


def stack(
    frame: Frame,
    taken: tuple[Seat, ...],
    dias: tuple[int, ...],
    spacing: Spacing,
    *,
    lowest: int = 2,
) -> tuple[Seat, ...]:
    """Seat bars in the layers above, each in line with a bar of the first layer."""
    seats: list[Seat] = []
    left = sorted(dias, reverse=True)
    layer = lowest
    while left:
        used = [s for s in taken if s.layer == layer] + [s for s in seats if s.layer == layer]
        below = [s for s in (*taken, *seats) if s.layer == layer - 1]
        base = [s for s in taken if s.layer == 1] or below
        lanes = [s for s in base if all(abs(s.y - u.y) > (s.dia + u.dia) / 2 for u in used)]
        picks = _pick(
            sorted(lanes, key=lambda s: s.y),
            len(left),
            frame.middle,
            corners_last=spacing.corners_last,
        )
        if not picks:
            layer += 1
            if layer > lowest + 8:
                break
            continue
        deck = max((s.depth + s.dia / 2 for s in below), default=0.0)
        for lane in picks:
            dia = left.pop(0)
            inward = max(0.0, (dia - lane.dia) / 2) if lane.corner else 0.0
            y = lane.y + (inward if lane.y < frame.middle else -inward)
            depth = deck + spacing.layer_gap + dia / 2
            seats.append(Seat(y=y, depth=depth, layer=layer, dia=dia, corner=lane.corner))
        layer += 1
    return tuple(seats)


def _pick(lanes: list[Seat], count: int, middle: float, *, corners_last: bool) -> list[Seat]:
    """Pick lanes for so many bars: outermost pairs, the middle one for an odd bar."""
    inner = [lane for lane in lanes if not lane.corner]
    if corners_last and count <= len(inner):
        lanes = inner
    elif corners_last and count < len(lanes):
        return (inner + [lane for lane in lanes if lane.corner])[:count]
    count = min(count, len(lanes))
    picks: list[Seat] = []
    rest = list(lanes)
    if count % 2:
        centre = min(rest, key=lambda s: (abs(s.y - middle), s.y))
        picks.append(centre)
        rest.remove(centre)
    while len(picks) < count:
        picks += [rest.pop(0), rest.pop(-1)]
    return sorted(picks, key=lambda s: -abs(s.y - middle))
