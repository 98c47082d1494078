"""Bending resistance of a section with its steel where it lies, by IS 456:2000, Annex G."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass, replace
from math import inf
from typing import NamedTuple

from detailer.rules import is456
from detailer.strength.section import Gross

CLOSE = 1e-10
"""Forces that differ by this share are in balance."""

LEVEL = 1e-6
"""Steel no higher than this above the centroid lies at its level. [mm]"""


class Row(NamedTuple):
    """Steel at one level: z, and the stress it may develop there."""

    dia: float  # [mm]
    area: float  # [mm²]
    z: float  # [mm]
    limit_stress: float  # [N/mm²]


@dataclass(frozen=True, slots=True, kw_only=True)
class Resistance:
    """What a section carries."""

    moment: float  # [N·mm]
    d: float  # effective depth of the tension steel [mm]
    xu: float  # depth of the neutral axis [mm]
    xu_limit: float
    compression_used: bool  # steel in compression is needed for it
    over_reinforced: bool  # the tension steel cannot all yield; the moment is capped


def resistance(
    gross: Gross, rows: Sequence[Row], fck: float, fy: float, *, sagging: bool
) -> Resistance:
    """Return the moment of resistance of a section.

    Steel in the tension half carries its limit stress, and where it lies higher than the centroid
    no more than its strain gives; the neutral axis stays within xu,max of that centroid. Steel in
    the compression half counts only where the concrete alone is not enough, at the stress its
    strain gives.

    Parameters
    ----------
    gross : Gross
        Web and flange.
    rows : sequence of Row
        Steel of the section.
    fck : float
        Characteristic strength of concrete. [N/mm²]
    fy : float
        Characteristic strength of steel. [N/mm²]
    sagging : bool
        Whether the top is in compression.

    References
    ----------
    .. [1] IS 456:2000, G-1.1, G-1.2, G-2.2, G-2.3; 38.1 for the strains.
    """
    levels = [(gross.top - r.z if sagging else r.z - gross.soffit, r) for r in rows]
    pulled = [(at, r) for at, r in levels if at > gross.depth / 2 and r.limit_stress > 0]
    if not pulled:
        return Resistance(
            moment=0.0, d=0.0, xu=0.0, xu_limit=0.0, compression_used=False, over_reinforced=False
        )
    section = _section(_Block(gross, fck, sagging), pulled, fy)
    limit = is456.xu_limit(fy) * section.d
    if section.excess(limit) < 0:
        section = replace(section, pressed=tuple((at, r) for at, r in levels if at < limit))
    over = section.excess(limit) < 0
    return section.at(limit if over else _balance(section, limit), limit, over=over)


def _section(block: _Block, pulled: list[tuple[float, Row]], fy: float) -> _Section:
    """Return the section without steel in compression."""
    pull = sum(r.area * r.limit_stress for _, r in pulled)
    d = sum(at * r.area * r.limit_stress for at, r in pulled) / pull
    upper = tuple((at, r) for at, r in pulled if at < d - LEVEL)
    share = is456.CONCRETE_STRAIN / (is456.CONCRETE_STRAIN + is456.yield_strain(fy))
    return _Section(
        block=block,
        lower=tuple((at, r.area * r.limit_stress) for at, r in pulled if at >= d - LEVEL),
        upper=upper,
        pressed=(),
        fy=fy,
        d=d,
        pull=pull,
        yielding=share * min((at for at, _ in upper), default=inf),
    )


def _balance(section: _Section, high: float) -> float:
    """Return the depth at which compression meets tension, by false position."""
    low, below, above = 0.0, -section.pull, section.excess(high)
    side = 0
    for _ in range(80):
        middle = low - below * (high - low) / (above - below)
        here = section.excess(middle)
        if abs(here) <= CLOSE * section.pull:
            return middle
        if here < 0:
            low, below = middle, here
            if side < 0:
                above /= 2
            side = -1
        else:
            high, above = middle, here
            if side > 0:
                below /= 2
            side = 1
    return high


@dataclass(frozen=True, slots=True, kw_only=True)
class _Section:
    """Concrete and steel whose forces balance at some neutral axis."""

    block: _Block
    lower: tuple[tuple[float, float], ...]  # depth and force of steel below the centroid [mm, N]
    upper: tuple[tuple[float, Row], ...]  # depth and steel above it
    pressed: tuple[tuple[float, Row], ...]
    fy: float
    d: float  # of the steel in tension, all at its limit [mm]
    pull: float  # likewise [N]
    yielding: float  # neutral axis down to which all of it is at its limit [mm]

    def tension(self, xu: float) -> list[tuple[float, float]]:
        """Return depth and force of the steel in tension. [mm, N]"""
        return [*self.lower, *((at, self._force(xu, at, r)) for at, r in self.upper if at > xu)]

    def compression(self, xu: float) -> list[tuple[float, float]]:
        """Return depth and force of the steel in compression. [mm, N]"""
        return [(at, self._force(xu, at, r)) for at, r in self.pressed if at < xu]

    def _force(self, xu: float, at: float, row: Row) -> float:
        """Return the force of steel by its strain, unsigned. [N]"""
        strain = is456.CONCRETE_STRAIN * abs(at - xu) / xu
        return row.area * min(is456.steel_stress(strain, self.fy), row.limit_stress)

    def excess(self, xu: float) -> float:
        """Return compression less tension. [N]"""
        push = self.block.force(xu)[0] + sum(force for _, force in self.compression(xu))
        if xu <= self.yielding:
            return push - self.pull
        return push - sum(force for _, force in self.tension(xu))

    def at(self, xu: float, limit: float, *, over: bool) -> Resistance:
        """Return what it carries at a neutral axis."""
        pull, push = self.tension(xu), self.compression(xu)
        d = sum(at * force for at, force in pull) / sum(force for _, force in pull)
        concrete, arm = self.block.force(xu)
        return Resistance(
            moment=concrete * (d - arm) + sum(force * (d - at) for at, force in push),
            d=d,
            xu=xu,
            xu_limit=limit,
            compression_used=any(force > 0 for _, force in push),
            over_reinforced=over,
        )


@dataclass(frozen=True, slots=True)
class _Block:
    """The concrete's force and its depth, web and flange."""

    gross: Gross
    fck: float
    sagging: bool

    def force(self, xu: float) -> tuple[float, float]:
        """Return force and depth of its centre for a neutral axis. [N, mm]"""
        g, fck = self.gross, self.fck
        flange = g.flange_width if self.sagging else g.width
        if flange <= g.width or xu <= g.flange_depth:
            return is456.BLOCK_FORCE * fck * flange * xu, is456.BLOCK_CENTRE * xu
        web = is456.BLOCK_FORCE * fck * g.width * xu
        yf = is456.flange_depth(g.flange_depth, xu)
        wings = is456.FLANGE_STRESS * fck * (flange - g.width) * yf
        centre = (web * is456.BLOCK_CENTRE * xu + wings * yf / 2) / (web + wings)
        return web + wings, centre
