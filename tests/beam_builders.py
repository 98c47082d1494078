"""Beam lines and projects built in memory, for tests of statics and strength."""

from __future__ import annotations

from collections.abc import Sequence

from detailer.model import (
    Beam,
    Concrete,
    Cover,
    Issue,
    Loads,
    PointLoad,
    Project,
    Results,
    Section,
    Span,
    Steel,
    SteelGrade,
    Support,
)
from detailer.model.project import Grid, Practice
from detailer.values import Exposure, SupportKind

WEB = Section(width=300.0, depth=500.0)


def loads(dead: float, imposed: float = 0.0, *points: tuple[float, float, float]) -> Loads:
    """Return loads of a span: N/mm, and (x, dead, imposed) of points in mm and N."""
    return Loads(
        dead=dead,
        imposed=imposed,
        points=tuple(PointLoad(x=x, dead=d, imposed=i) for x, d, i in points),
    )


def line(
    lengths: Sequence[float],
    results: Sequence[Results | None],
    *,
    tips: tuple[float, float] = (0.0, 0.0),
    sections: Sequence[Section] | None = None,
    kind: SupportKind = SupportKind.WALL,
    width: float = 0.0,
) -> Beam:
    """Return a line of spans; `tips` are overhangs, whose results stand first and last.

    Supports are walls of no width unless said otherwise, so that nothing is clamped at faces.
    """
    left, right = tips
    edges = [0.0]
    for length in lengths:
        edges.append(edges[-1] + length)
    ends: list[tuple[float, float, int | None, int | None]] = []
    if left:
        ends.append((-left, 0.0, None, 0))
    ends += [(edges[k], edges[k + 1], k, k + 1) for k in range(len(lengths))]
    if right:
        ends.append((edges[-1], edges[-1] + right, len(lengths), None))
    chosen = sections or [WEB] * len(ends)
    spans = tuple(
        Span(number=n, x0=x0, x1=x1, left=a, right=b, section=section, top=0.0, results=result)
        for n, ((x0, x1, a, b), section, result) in enumerate(
            zip(ends, chosen, results, strict=True), start=1
        )
    )
    supports = tuple(
        Support(name=f"{chr(65 + k)}1", kind=kind, x=x, width=width, across=300.0)
        for k, x in enumerate(edges)
    )
    return Beam(
        mark="B1",
        copies=1,
        mirrored=0,
        batch="",
        direction=0.0,
        cover=Cover(top=30.0, bottom=30.0, left=30.0, right=30.0),
        level=None,
        supports=supports,
        spans=spans,
        bars=(),
        links=(),
    )


def project(*beams: Beam, fck: float = 25, fy: float = 500, links: float = 415) -> Project:
    """Return a project of these beams and grades."""
    return Project(
        number="T1",
        title="Tests",
        part="Beams",
        owner="",
        code="IS 456",
        bending="IS 2502",
        ductile=False,
        lateral=False,
        issue=Issue(
            revision="A",
            date="2026-01-05",
            purpose="test",
            drawn="",
            checked="",
            approved="",
            document="",
        ),
        concrete=Concrete(
            grade=f"M{fck:.0f}",
            fck=fck,
            aggregate=20.0,
            exposure=Exposure.MODERATE,
            fire_hours=1.0,
        ),
        steel=Steel(
            main=SteelGrade(f"Fe {fy:.0f}", fy),
            links=SteelGrade(f"Fe {links:.0f}", links),
            stock=12_000.0,
            sizes=(8, 10, 12, 16, 20, 25, 32),
        ),
        practice=Practice(),
        grid=Grid(),
        columns=(),
        beams=beams,
    )
