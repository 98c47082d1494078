"""Links: where they stand along the beam, their legs, and the corner their hooks close at."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass, replace
from math import ceil, hypot

from detailer.cage import forms
from detailer.cage.bar import Bar
from detailer.model import Beam, LinkZone, Project, Span
from detailer.placing.frame import Frame
from detailer.placing.strand import Strand
from detailer.rules import is2502
from detailer.values import EndForm, Face, Role

HUG = 0.1
"""Tails lie against the bar they bend round within this, and clear others by it. [mm]"""

LEG_STEP = 8.0
"""Legs of bent ends are looked at in steps of this. [mm]"""

LEG_ROOM = 130.0
"""A link so near a bent end looks at the bend and the leg as one. [mm]"""


@dataclass(frozen=True, slots=True, kw_only=True)
class LinkRow:
    """Links of one kind at equal spaces in one span."""

    span: int  # number
    zone: LinkZone
    xs: tuple[float, ...]


def stations(
    project: Project, beam: Beam, span: Span, zones: tuple[LinkZone, ...]
) -> tuple[LinkRow, ...]:
    """Return where the links of a span stand.

    A zone's length counts from the support face; spaces within a zone are equal,
    n = ceil(L / s); the link on a boundary is counted once, in the closer zone; at a free
    end the last link sits at the cover.

    Parameters
    ----------
    project, beam, span : Project, Beam, Span
        Where the zones lie.
    zones : tuple of LinkZone
        Left to right.

    References
    ----------
    .. [1] Common practice, no source.
    """
    x0, x1 = beam.clear(span)
    bounds = _bounds(x0, x1, zones)
    free = max(beam.cover.left, beam.cover.right)
    first = project.practice.first_link
    start = x0 + (free + zones[0].dia / 2 if span.left is None else first)
    stop = x1 - (free + zones[-1].dia / 2 if span.right is None else first)
    edges = [start, *bounds[1:-1], stop]
    spaces = [
        max(1, ceil((b - a) / zone.spacing - 1e-9))
        for a, b, zone in zip(edges[:-1], edges[1:], zones, strict=True)
    ]
    pitch = [(b - a) / n for a, b, n in zip(edges[:-1], edges[1:], spaces, strict=True)]
    rows = []
    for i, zone in enumerate(zones):
        own_left = i == 0 or pitch[i] < pitch[i - 1]
        own_right = i == len(zones) - 1 or pitch[i] <= pitch[i + 1]
        numbers = range(0 if own_left else 1, spaces[i] + (1 if own_right else 0))
        xs = tuple(edges[i] + n * pitch[i] for n in numbers)
        rows.append(LinkRow(span=span.number, zone=zone, xs=xs))
    return tuple(rows)


def _bounds(x0: float, x1: float, zones: tuple[LinkZone, ...]) -> list[float]:
    """Return the boundaries of the zones, faces included."""
    rest = (x1 - x0) - sum(zone.length or 0.0 for zone in zones)
    bounds = [x0]
    for zone in zones:
        bounds.append(bounds[-1] + (rest if zone.length is None else zone.length))
    return bounds


@dataclass(frozen=True, slots=True)
class Ring:
    """Outside faces of one closed link in a section, or of a tie (y0 = y1). [mm]"""

    y0: float
    y1: float
    z0: float
    z1: float


def rings(
    frame: Frame, zone: LinkZone, bars: tuple[tuple[float, float, float], ...]
) -> tuple[Ring, ...]:
    """Return the closed links of a set, the outer one first; a tie for an odd leg.

    Inner legs stand beside bars, near equal parts of the width, clear of every bar.

    Parameters
    ----------
    frame : Frame
        Room inside the outer link.
    zone : LinkZone
        Legs and diameter.
    bars : tuple of (y, z, dia)
        Bars of the span. [mm]
    """
    dia = zone.dia
    outer = Ring(
        frame.right - frame.link,
        frame.left + frame.link,
        frame.bottom - frame.link,
        frame.top + frame.link,
    )
    found = [outer]
    inner = zone.legs - 2
    pairs, odd = divmod(max(inner, 0), 2)
    part = frame.width / (zone.legs - 1)
    for k in range(pairs):
        target = frame.right + part * (k + 1)
        right = _leg_place(target, dia, bars, frame)
        left = _leg_place(2 * frame.middle - target, dia, bars, frame)
        found.append(Ring(right - dia / 2, left + dia / 2, outer.z0, outer.z1))
    if odd:
        y = _leg_place(frame.middle, dia, bars, frame)
        found.append(Ring(y, y, outer.z0, outer.z1))
    return tuple(found)


def _leg_place(
    target: float, dia: float, bars: tuple[tuple[float, float, float], ...], frame: Frame
) -> float:
    """Return y of a leg near a target, clear of every bar it would pass."""
    for step in range(int(frame.width)):
        for y in (target + step, target - step):
            inside = frame.right + dia < y < frame.left - dia
            if inside and all(abs(y - by) >= (dia + bd) / 2 + 0.5 for by, _, bd in bars):
                return y
    return target


def link_bars(
    frame: Frame, rows: tuple[LinkRow, ...], strands: tuple[Strand, ...], grade: str
) -> Iterator[Bar]:
    """Yield the links of one span as bars, one entry a ring and hook corner.

    The hooks alternate between two corners along the beam; a corner whose tails would meet
    a bar is passed over.

    Parameters
    ----------
    frame : Frame
        Room inside the links of the span.
    rows : tuple of LinkRow
        Where the links stand.
    strands : tuple of Strand
        All bars along the beam.
    grade : str
        Of the links.
    """
    number = 0
    for index, row in enumerate(rows):
        if not row.xs:
            continue
        zone = row.zone
        near = tuple(s for s in strands if s.x1 >= row.xs[0] and s.x0 <= row.xs[-1])
        bars = tuple(
            dict.fromkeys(
                (*s.at(x), s.dia)
                for s in near
                for x in row.xs[:: max(1, len(row.xs) // 6)]
                if s.covers(x)
            )
        )
        for k, ring in enumerate(rings(frame, zone, bars)):
            shift = k * (2 * zone.dia + 2.0)
            by_corner: dict[forms.HookCorner, list[float]] = {}
            found: dict[tuple[object, int], forms.HookCorner] = {}  # by bars, odd or even
            for x in row.xs:
                there = _around(near, x, zone.dia)
                key = (there, number % 2)
                if key not in found:
                    found[key] = _hook_corner(frame, ring, zone.dia, there, number)
                by_corner.setdefault(found[key], []).append(x + shift)
                number += 1
            for corner, xs in by_corner.items():
                name = f"L{row.span}.{index + 1}.{k + 1}.{corner.name.lower()}"
                yield _bar(name, ring, zone.dia, frame.bend, corner, xs, grade)


def _around(
    strands: tuple[Strand, ...], x: float, dia: float
) -> tuple[tuple[float, float, float], ...]:
    """Return (y, z, diameter) of what a link at x must clear: bars, and legs of bent ends.

    The ends of a link pass each other, so its tails reach a diameter before x and after it: a
    bar that cranks there, or ends there, is met where it is.
    """
    met = ((*s.at(at), s.dia) for at in (x, x - dia, x + dia) for s in strands if s.covers(at))
    found = list(dict.fromkeys(met))
    for s in strands:
        for end, tip, inward in ((s.left, s.x0, 1.0), (s.right, s.x1, -1.0)):
            axis = tip + inward * s.dia / 2
            if end.form is EndForm.STRAIGHT or abs(axis - x) > (s.dia + dia) / 2 + dia + LEG_ROOM:
                continue
            y, z = s.at(tip)
            into = -1.0 if s.face is Face.TOP else 1.0
            length = end.leg if end.form is EndForm.BEND else 8 * s.dia + 2 * s.dia
            found += [
                (y, z + into * k * LEG_STEP, s.dia) for k in range(int(length / LEG_STEP) + 1)
            ]
    return tuple(found)


def _bar(
    name: str,
    ring: Ring,
    dia: int,
    bend: float,
    corner: forms.HookCorner,
    xs: list[float],
    grade: str,
) -> Bar:
    """Return links of one shape at places along the beam."""
    corners, mandrels = _shape(ring, dia, bend, corner)
    return Bar(
        id=name,
        role=Role.LINK if ring.y1 > ring.y0 else Role.TIE,
        face=Face.NONE,
        layer=0,
        grade=grade,
        dia=float(dia),
        corners=corners,
        mandrels=mandrels,
        placings=tuple((x, 0.0, 0.0) for x in xs),
    )


def _shape(
    ring: Ring, dia: int, bend: float, corner: forms.HookCorner
) -> tuple[tuple[tuple[float, float, float], ...], tuple[float, ...]]:
    tail = is2502.link_tail(dia)
    if ring.y1 == ring.y0:
        return forms.cross_tie(at=ring.y0, low=ring.z0, high=ring.z1, dia=dia, bend=bend, tail=tail)
    return forms.closed_link(
        y0=ring.y0, y1=ring.y1, z0=ring.z0, z1=ring.z1, dia=dia, corner=corner, bend=bend, tail=tail
    )


def _hook_corner(
    frame: Frame,
    ring: Ring,
    dia: int,
    bars: tuple[tuple[float, float, float], ...],
    number: int,
) -> forms.HookCorner:
    """Return the corner the hooks of one link close at."""
    corners = forms.HookCorner
    cycle = (corners.TOP_LEFT, corners.TOP_RIGHT, corners.BOTTOM_LEFT, corners.BOTTOM_RIGHT)
    if number % 2:
        cycle = (cycle[1], cycle[0], cycle[3], cycle[2])
    if ring.y1 == ring.y0:
        return cycle[0]

    def score(corner: forms.HookCorner) -> tuple[bool, bool]:
        met = _tail_depth(ring, dia, frame.bend, corner, bars) > 0
        return met, not _holds_bar(ring, dia, frame.bend, corner, bars)

    return min(cycle, key=score)


def hooks_meet(frame: Frame, zone: LinkZone, bars: tuple[tuple[float, float, float], ...]) -> float:
    """Return how deep tails of the outer link cut into bars at its best corner; 0 if clear. [mm]

    Parameters
    ----------
    frame : Frame
        Room inside the outer link.
    zone : LinkZone
        Legs and diameter.
    bars : tuple of (y, z, dia)
        Bars of the section. [mm]
    """
    ring = rings(frame, replace(zone, legs=2), bars)[0]
    corners = tuple(forms.HookCorner)
    return max(0.0, min(_tail_depth(ring, zone.dia, frame.bend, c, bars) for c in corners))


def _tail_depth(
    ring: Ring,
    dia: int,
    bend: float,
    corner: forms.HookCorner,
    bars: tuple[tuple[float, float, float], ...],
) -> float:
    """Return how deep the tails of a hook cut into bars. [mm]

    The bar they bend round may touch them; others must not.
    """
    tails = _tails(ring, dia, bend, corner)
    return max(
        (
            (dia + bar) / 2
            + (-HUG if _in_corner(ring, dia, bend, corner, (y, z, bar)) else HUG)
            - _point_to_segment((y, z), *tail)
            for tail in tails
            for y, z, bar in bars
        ),
        default=0.0,
    )


def _tails(
    ring: Ring, dia: int, bend: float, corner: forms.HookCorner
) -> tuple[tuple[tuple[float, float], tuple[float, float]], ...]:
    """Return the straight tails of a closed link in y-z."""
    points, _ = _shape(ring, dia, bend, corner)
    tail = is2502.link_tail(dia)
    found = []
    for tip, vertex in ((points[0], points[1]), (points[-1], points[-2])):
        (_, y0, z0), (_, y1, z1) = tip, vertex
        share = tail / hypot(y1 - y0, z1 - z0)
        found.append(((y0, z0), (y0 + share * (y1 - y0), z0 + share * (z1 - z0))))
    return tuple(found)


def _point_to_segment(
    point: tuple[float, float], a: tuple[float, float], b: tuple[float, float]
) -> float:
    """Return the distance of a point from a segment."""
    dx, dy = b[0] - a[0], b[1] - a[1]
    share = ((point[0] - a[0]) * dx + (point[1] - a[1]) * dy) / (dx * dx + dy * dy)
    share = min(1.0, max(0.0, share))
    return hypot(point[0] - a[0] - share * dx, point[1] - a[1] - share * dy)


def _holds_bar(
    ring: Ring,
    dia: int,
    bend: float,
    corner: forms.HookCorner,
    bars: tuple[tuple[float, float, float], ...],
) -> bool:
    """Return whether a bar lies in a corner of a link."""
    return any(_in_corner(ring, dia, bend, corner, bar) for bar in bars)


def _in_corner(
    ring: Ring, dia: int, bend: float, corner: forms.HookCorner, bar: tuple[float, float, float]
) -> bool:
    """Return whether a bar is the one that lies in a corner of a link."""
    left = corner in (forms.HookCorner.TOP_LEFT, forms.HookCorner.BOTTOM_LEFT)
    top = corner in (forms.HookCorner.TOP_LEFT, forms.HookCorner.TOP_RIGHT)
    y = ring.y1 - dia if left else ring.y0 + dia
    z = ring.z1 - dia if top else ring.z0 + dia
    return hypot(bar[0] - y, bar[1] - z) <= (bar[2] / 2 + bend) * 1.5
