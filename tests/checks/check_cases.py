"""Members for tests of single checks: a beam line, its results by formula, its bars by hand.

Unless said otherwise: one span of 6 m between the centres of columns of 300 (faces at x 150 and
5850), 300 × 500, cover 30 all round, M25, Fe 500 bars, Fe 415 links, aggregate 20.
"""

from __future__ import annotations

from collections.abc import Callable, Iterable, Sequence
from dataclasses import replace
from itertools import pairwise
from math import pi

import beam_builders
import cage_builders
import numpy as np

from detailer.cage.bar import Bar, Cage, Contact, Prism, Rest
from detailer.checks import Case
from detailer.findings import Finding
from detailer.model import Cover, Results, Section, Station, Stations
from detailer.statics import envelope
from detailer.values import ContactKind, Face, Role, SupportKind

SECTION = Section(width=300.0, depth=500.0)

Course = Callable[[float], float] | float
"""Moment, shear or torsion along the line, x from the first support."""

LD = {dia: 0.87 * 500 * dia / (4 * 1.4 * 1.6) for dia in (8, 10, 12, 16, 20, 25, 32, 36)}
"""26.2.1 and 26.2.1.1 for M25 and Fe 500: σ φ/(4 τbd), 48.55 φ. [mm]"""


def area(dia: float, count: int = 1) -> float:
    """Return the area of bars [mm²]."""
    return count * pi * dia * dia / 4


def parabola(peak: float, length: float = 6000.0) -> Callable[[float], float]:
    """Return the moments of a simple span under even load [N·mm]."""
    return lambda x: 4 * peak * x * (length - x) / length**2


def case(
    *bars: Bar,
    lengths: Sequence[float] = (6000.0,),
    tips: tuple[float, float] = (0.0, 0.0),
    m: Course | tuple[Course, Course] | None = None,
    v: Course = 0.0,
    t: Course = 0.0,
    section: Section = SECTION,
    kind: SupportKind = SupportKind.COLUMN,
    width: float = 300.0,
    cover: tuple[float, float, float, float] = (30.0, 30.0, 30.0, 30.0),
    contacts: Iterable[Contact] = (),
    fck: float = 25,
    fy: float = 500,
    links: float = 415,
    step: float = 100.0,
) -> Case:
    """Return a member; `m` of two courses is the least and the greatest moment."""
    count = len(lengths) + sum(1 for tip in tips if tip)
    results: list[Results | None] = [None] * count
    if m is not None:
        ends = [0.0]
        for length in lengths:
            ends.append(ends[-1] + length)
        pieces = list(pairwise(ends))
        if tips[0]:
            pieces.insert(0, (-tips[0], 0.0))
        if tips[1]:
            pieces.append((ends[-1], ends[-1] + tips[1]))
        low, high = m if isinstance(m, tuple) else (m, m)
        results = [_stations(a, b, low, high, v, t, step) for a, b in pieces]
    beam = beam_builders.line(
        lengths, results, tips=tips, sections=[section] * count, kind=kind, width=width
    )
    top, bottom, left, right = cover
    beam = replace(beam, cover=Cover(top=top, bottom=bottom, left=left, right=right))
    project = beam_builders.project(beam, fck=fck, fy=fy, links=links)
    half = section.width / 2
    web = ((-half, -section.depth), (half, -section.depth), (half, 0.0), (-half, 0.0))
    placed = replace(
        cage_builders.cage(*bars, contacts=tuple(contacts)),
        supports=tuple(
            Rest(name=s.name, kind=s.kind, x=s.x, width=s.width, across=s.across)
            for s in beam.supports
        ),
        prisms=(Prism(name="web", x0=beam.start, x1=beam.end, outline=web),),
        cover=cover,
    )
    return of(project, beam, placed)


def of(project: object, beam: object, cage: Cage) -> Case:
    return Case(project=project, beam=beam, envelope=envelope(project, beam), cage=cage)  # type: ignore[arg-type]


def _at(course: Course, x: float) -> float:
    return float(course(x) if callable(course) else course)


def _stations(
    a: float, b: float, low: Course, high: Course, v: Course, t: Course, step: float
) -> Stations:
    xs = np.linspace(a, b, max(3, round((b - a) / step) + 1)).tolist()
    # shears count by their greater size, so both ends of their envelope are the same here
    return Stations(
        tuple(
            Station(
                x=x - a,
                m_max=_at(high, x),
                m_min=_at(low, x),
                v_max=_at(v, x),
                v_min=_at(v, x),
                t=_at(t, x),
            )
            for x in xs
        )
    )


def low_z(dia: float, link: float = 8.0, depth: float = 500.0, cover: float = 30.0) -> float:
    """Return the level of a bottom bar that lies on its links."""
    return -depth + cover + link + dia / 2


def high_z(dia: float, link: float = 8.0, cover: float = 30.0) -> float:
    """Return the level of a top bar that hangs in its links."""
    return -cover - link - dia / 2


def bottom(
    name: str, x0: float, x1: float, dia: float = 16, ys: Sequence[float] = (0.0,), **more: object
) -> Bar:
    """Return bottom bars of one id, one at each y; legs turn up."""
    return _row(name, x0, x1, dia, ys, Face.BOTTOM, {"z": low_z(dia), "up": True, **more})


def top(
    name: str, x0: float, x1: float, dia: float = 16, ys: Sequence[float] = (0.0,), **more: object
) -> Bar:
    """Return top bars of one id, one at each y; legs turn down."""
    return _row(name, x0, x1, dia, ys, Face.TOP, {"z": high_z(dia), "up": False, **more})


def _row(
    name: str,
    x0: float,
    x1: float,
    dia: float,
    ys: Sequence[float],
    face: Face,
    more: dict[str, object],
) -> Bar:
    layer = more.pop("layer", 1)
    bar = cage_builders.main_bar(name, x0, x1, dia=dia, y=ys[0], face=face, **more)  # type: ignore[arg-type]
    placings = tuple((0.0, y - ys[0], 0.0) for y in ys)
    return replace(bar, placings=placings, layer=layer)


def side(name: str, x0: float, x1: float, dia: float, zs: Sequence[float], face: Face) -> Bar:
    """Return side bars of one face, one at each level."""
    y = (150 - 30 - 8 - dia / 2) * (1 if face is Face.LEFT else -1)
    bar = cage_builders.main_bar(name, x0, x1, dia=dia, y=y, z=zs[0], face=face, role=Role.SIDE)
    return replace(bar, placings=tuple((0.0, 0.0, z - zs[0]) for z in zs))


def loops(
    name: str,
    spacing: float,
    *,
    first: float = 200.0,
    last: float = 5800.0,
    dia: float = 8,
    width: float = 240.0,
    height: float = 440.0,
) -> Bar:
    """Return closed links of two legs, evenly from first to last, no further apart than told."""
    count = max(1, int(np.ceil((last - first) / spacing - 1e-9)))
    xs = tuple(np.linspace(first, last, count + 1).tolist())
    return cage_builders.link(name, width, height, dia=dia, xs=xs)


def lap(a: str, b: str, x0: float, x1: float) -> Contact:
    return Contact(ContactKind.LAP, a, b, x0, x1)


def only(found: Iterable[Finding], rule: str) -> list[Finding]:
    """Return the findings of one rule."""
    return [f for f in found if f.rule == rule]


def one(found: Iterable[Finding], rule: str) -> Finding:
    """Return the only finding of a rule."""
    rows = list(found)
    mine = only(rows, rule)
    assert len(mine) == 1, [(f.rule, f.message) for f in rows]
    return mine[0]


def rules(found: Iterable[Finding]) -> set[str]:
    return {f.rule for f in found}
