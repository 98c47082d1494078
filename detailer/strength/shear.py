"""Shear and torsion along a beam with the links as placed: IS 456:2000, 40 and 41."""

from __future__ import annotations

from bisect import bisect_left, bisect_right
from dataclasses import dataclass
from math import inf

from detailer.cage.bar import Bar, Cage
from detailer.model import Span
from detailer.rules import is456
from detailer.strength.development import Rod
from detailer.strength.slices import Steel, area
from detailer.values import ContactKind, Face, Role

SET = 40.0
"""Links of one set stand no further apart than this along the member. [mm]"""


@dataclass(frozen=True, slots=True, kw_only=True)
class LinkSet:
    """Links that stand together: an outer one and what stands inside it."""

    x: float
    legs: int
    asv: float  # all legs [mm²]
    hoop: float  # the two legs of the outer link [mm²]
    dia: float
    marks: tuple[str, ...]
    closed: bool


@dataclass(frozen=True, slots=True, kw_only=True)
class ShearCapacity:
    """What a section carries in shear."""

    concrete: float  # τc b d [N]
    links: float  # [N]
    limit: float  # τc,max b d [N]
    pt: float  # [%]
    d: float  # [mm]
    asv: float  # all legs [mm²]
    hoop: float  # the two legs of the outer links [mm²]
    spacing: float  # of the links around the section [mm]

    @property
    def total(self) -> float:
        """Return what the section carries. [N]"""
        return self.concrete + self.links


def link_sets(cage: Cage) -> tuple[LinkSet, ...]:
    """Return the link sets of a cage from left to right.

    Parameters
    ----------
    cage : Cage
        The placed steel.
    """
    widest = _widest(cage)
    placed = sorted(
        (
            (_middle(bar) + shift[0], bar.id, bar)
            for bar in cage.bars
            if bar.role in (Role.LINK, Role.TIE)
            for shift in bar.placings
        ),
        key=lambda item: item[:2],
    )
    groups: list[list[tuple[float, Bar]]] = []
    for x, _, bar in placed:
        outer = bar.role is Role.LINK and _width(bar) >= widest - 1
        if groups and not outer and x - groups[-1][0][0] < SET:
            groups[-1].append((x, bar))
        else:
            groups.append([(x, bar)])
    return tuple(_set(group) for group in groups)


def _middle(bar: Bar) -> float:
    xs = [p[0] for p in bar.corners]
    return (min(xs) + max(xs)) / 2


def _width(bar: Bar) -> float:
    ys = [p[1] for p in bar.corners]
    return max(ys) - min(ys)


def _widest(cage: Cage) -> float:
    return max((_width(b) for b in cage.bars if b.role is Role.LINK), default=0.0)


def _set(group: list[tuple[float, Bar]]) -> LinkSet:
    legs = [2 if bar.role is Role.LINK else 1 for _, bar in group]
    outer = max((bar for _, bar in group if bar.role is Role.LINK), key=_width, default=None)
    return LinkSet(
        x=group[0][0],
        legs=sum(legs),
        asv=sum(n * area(bar.dia) for n, (_, bar) in zip(legs, group, strict=True)),
        hoop=2 * area(outer.dia) if outer else 0.0,
        dia=min(bar.dia for _, bar in group),
        marks=tuple(sorted({bar.name for _, bar in group})),
        closed=group[0][1].role is Role.LINK,
    )


@dataclass(frozen=True, slots=True, eq=False)
class Shear:
    """Links of a beam, ready to be asked at many places."""

    steel: Steel
    sets: tuple[LinkSet, ...]
    held: dict[tuple[str, int], tuple[bool, bool]]  # ends in a support, a lap or at a free end

    def around(self, x: float, span: Span) -> tuple[float, float]:
        """Return area and spacing of the links around x within a span. [mm², mm]

        Parameters
        ----------
        x : float
            Along the member. [mm]
        span : Span
            Its span.
        """
        a, b, spacing = self.beside(x, span)
        return min((s.asv for s in (a, b) if s), default=0.0), spacing

    def beside(self, x: float, span: Span) -> tuple[LinkSet | None, LinkSet | None, float]:
        """Return the link sets left and right of x within a span, and their distance. [mm]

        Parameters
        ----------
        x : float
            Along the member. [mm]
        span : Span
            Its span.
        """
        x0, x1 = self.steel.beam.clear(span)
        xs = [s.x for s in self.sets]
        first, last = bisect_left(xs, x0 - 1), bisect_right(xs, x1 + 1)
        if last - first < 2:
            return (self.sets[first], None, x1 - x0) if last > first else (None, None, inf)
        k = min(max(bisect_right(xs, x), first + 1), last - 1)
        a, b = self.sets[k - 1], self.sets[k]
        return a, b, b.x - a.x

    def counted(self, x: float, face: Face, d: float) -> tuple[Rod, ...]:
        """Return the tension bars that go on at least d past x, or into a support or tip.

        Parameters
        ----------
        x : float
            Along the member. [mm]
        face : Face
            The face in tension.
        d : float
            Effective depth. [mm]

        References
        ----------
        .. [1] IS 456:2000, note to Table 19.
        """
        found = []
        for bar in self.steel.at(x, face):
            left, right = self.held[bar.id, bar.placing]
            if (left or bar.tips[0] <= x - d) and (right or bar.tips[1] >= x + d):
                found.append(bar)
        return tuple(found)

    def capacity(self, x: float, span: Span, face: Face) -> ShearCapacity:
        """Return what the section at x carries in shear.

        Parameters
        ----------
        x : float
            Along the member. [mm]
        span : Span
            Its span.
        face : Face
            The face in tension there.
        """
        project = self.steel.project
        fck = project.concrete.fck
        b = span.section.width
        d = self.steel.depth(x, face, span) or span.section.depth - 50
        pt = 100 * sum(area(r.dia) for r in self.counted(x, face, d)) / (b * d)
        left, right, spacing = self.beside(x, span)
        near = [s for s in (left, right) if s]
        asv = min((s.asv for s in near), default=0.0)
        links = is456.link_shear(asv, spacing, d, project.steel.links.fy) if asv else 0.0
        return ShearCapacity(
            concrete=is456.shear_strength(pt, fck) * b * d,
            links=links,
            limit=is456.max_shear_stress(fck) * b * d,
            pt=pt,
            d=d,
            asv=asv,
            hoop=min((s.hoop for s in near), default=0.0),
            spacing=spacing,
        )


def shear_of(steel: Steel) -> Shear:
    """Return the links of a beam's steel.

    Parameters
    ----------
    steel : Steel
        The placed steel.
    """
    held = {
        (bar.id, bar.placing): (_held(steel, bar, 0), _held(steel, bar, 1)) for bar in steel.bars
    }
    return Shear(steel, link_sets(steel.cage), held)


def _held(steel: Steel, bar: Rod, side: int) -> bool:
    """Return whether a bar's end lies in a support, in a lap or at a free end."""
    beam, end = steel.beam, bar.tips[side]
    if any(s.left - 1 <= end <= s.right + 1 for s in beam.supports):
        return True
    if end < beam.start + 100 or end > beam.end - 100:
        return True
    return any(
        c.kind is ContactKind.LAP and bar.id in (c.a, c.b) and c.x0 - 1 <= end <= c.x1 + 1
        for c in steel.cage.contacts
    )
