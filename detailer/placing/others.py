"""Side-face bars and the spacer bars that hold layers apart."""

from __future__ import annotations

from collections.abc import Callable, Iterator
from itertools import pairwise

from detailer.cage.bar import Bar
from detailer.model import Beam, Project, Span
from detailer.placing.ends import far_clear
from detailer.placing.frame import Frame
from detailer.placing.runs import in_line
from detailer.placing.strand import Strand
from detailer.values import Face, Role

LINK_ROOM = 18.0
"""What a spacer keeps from the axes of links, whose ends pass each other. [mm]"""

REACH = 450.0
"""A spacer may stand this far from where it is wanted. [mm]"""

SIDE_INTO_SUPPORT = 150.0
"""Nominal side-face bars run this far into a support (common practice, no source). [mm]"""


def side_strands(
    project: Project,
    beam: Beam,
    frames: dict[int, Frame],
    strands: tuple[Strand, ...],
    anchorage: float,
) -> Iterator[Strand]:
    """Yield the side-face bars, equally spaced between the outermost layers.

    Parameters
    ----------
    project, beam : Project, Beam
        What is to be placed.
    frames : dict of int to Frame
        By span number.
    strands : tuple of Strand
        Bars of top and bottom, already placed.
    anchorage : float
        How far past the support faces; more than nominal where the bars resist torsion. [mm]
    """
    run = 1000
    for chosen in beam.bars:
        if chosen.face is not Face.NONE or chosen.spans is None:
            continue
        for span in beam.spans[chosen.spans[0] - 1 : chosen.spans[1]]:
            run += 1
            yield from _side_of_span(
                beam,
                span,
                frames[span.number],
                strands,
                chosen.count,
                float(chosen.groups[0].dia),
                anchorage,
                run,
            )


def _side_of_span(
    beam: Beam,
    span: Span,
    frame: Frame,
    strands: tuple[Strand, ...],
    count: int,
    dia: float,
    anchorage: float,
    run: int,
) -> Iterator[Strand]:
    here = [s for s in strands if s.x0 < span.x1 and s.x1 > span.x0]
    low = max((s.z for s in here if s.face is Face.BOTTOM), default=frame.bottom)
    high = min((s.z for s in here if s.face is Face.TOP), default=frame.top)
    x0, x1 = (_side_end(beam, span, side, anchorage) for side in (-1, 1))
    for face, y in ((Face.RIGHT, frame.right + dia / 2), (Face.LEFT, frame.left - dia / 2)):
        for k in range(1, count + 1):
            yield Strand(
                run=run,
                role=Role.SIDE,
                face=face,
                layer=0,
                dia=dia,
                y=y,
                z=low + (high - low) * k / (count + 1),
                x0=x0,
                x1=x1,
            )


def _side_end(beam: Beam, span: Span, side: int, anchorage: float) -> float:
    """Return where a side bar of a span ends."""
    x0, x1 = beam.clear(span)
    support = span.left if side < 0 else span.right
    near = x0 if side < 0 else x1
    if support is None:
        return near - side * max(beam.cover.left, beam.cover.right)
    at = beam.supports[support]
    if not beam.continuous(support):
        return near + side * min(
            max(anchorage, SIDE_INTO_SUPPORT), at.width - far_clear(beam, support)
        )
    if anchorage > at.width / 2 - 15 and in_line(beam, Face.NONE, support):
        return near + side * anchorage
    return near + side * min(SIDE_INTO_SUPPORT, at.width / 2 - 15)


def spacer_bars(
    project: Project,
    beam: Beam,
    frames: dict[int, Frame],
    strands: tuple[Strand, ...],
    link_xs: tuple[float, ...],
    dia: int,
) -> Iterator[Bar]:
    """Yield spacer bars across the beam under every second and third layer.

    They stand half way between links, where nothing but the layers they hold apart is in
    their way; where no such place is near, none is placed and the checks say so.

    Parameters
    ----------
    project, beam : Project, Beam
        What is to be placed.
    frames : dict of int to Frame
        By span number.
    strands : tuple of Strand
        Bars along the beam.
    link_xs : tuple of float
        Where links stand, ascending. [mm]
    dia : int
        Of the spacers. [mm]
    """
    levels: dict[tuple[Face, int, float], list[Strand]] = {}
    for s in strands:
        if s.layer >= 2 and s.face in (Face.TOP, Face.BOTTOM):
            into = -1.0 if s.face is Face.TOP else 1.0
            level = round(s.z - into * (s.dia + dia) / 2, 3)
            levels.setdefault((s.face, s.layer, level), []).append(s)
    order = sorted(levels, key=lambda k: (k[0].value, k[1], k[2]))
    places = _free_places(strands, link_xs, dia)
    for number, key in enumerate(order, start=1):
        face, layer, z = key
        xs = _places(levels[key], z, places, project.practice.spacer_pitch)
        for group, at in _by_span(beam, xs).items():
            frame = frames[group]
            half = (frame.width - 10) / 2 // 5 * 5
            yield Bar(
                id=f"P{number}.{group}",
                role=Role.SPACER,
                face=face,
                layer=layer - 1,
                grade=project.steel.main.name,
                dia=float(dia),
                corners=((0.0, frame.middle - half, z), (0.0, frame.middle + half, z)),
                mandrels=(),
                placings=tuple((x, 0.0, 0.0) for x in at),
            )


def _free_places(
    strands: tuple[Strand, ...], link_xs: tuple[float, ...], dia: int
) -> Callable[[float, float], float | None]:
    """Return what finds the free place for a spacer at a level nearest to one wanted."""
    between = [(a + b) / 2 for a, b in pairwise(link_xs) if b - a > dia + 2 * LINK_ROOM]

    def blocked(x: float, z: float) -> bool:
        return any(
            abs(s.at(x)[1] - z) < (s.dia + dia) / 2 - 0.05
            for s in strands
            if s.covers(x) or s.covers(x - dia) or s.covers(x + dia)
        )

    def near(x: float, z: float) -> float | None:
        free = [g for g in between if abs(g - x) < REACH and not blocked(g, z)]
        return min(free, key=lambda g: (abs(g - x), g), default=None)

    return near


def _places(
    held: list[Strand],
    z: float,
    near: Callable[[float, float], float | None],
    pitch: float,
) -> list[float]:
    """Return where spacers stand under the bars they hold."""
    found: list[float] = []
    for s in held:
        x0, x1 = s.x0 + 100, s.x1 - 100
        count = max(2, int((x1 - x0) // pitch) + 2)
        for k in range(count):
            x = x0 + (x1 - x0) * k / (count - 1)
            if any(abs(x - other) < pitch / 4 for other in found):
                continue
            place = near(x, z)
            if place is not None and s.x0 <= place <= s.x1 and place not in found:
                found.append(place)
    return sorted(found)


def _by_span(beam: Beam, xs: list[float]) -> dict[int, list[float]]:
    groups: dict[int, list[float]] = {}
    for x in xs:
        groups.setdefault(beam.span_at(x).number, []).append(x)
    return groups
