"""Bending resistance of a section with its steel where it lies, by IS 456:2000, Annex G."""

from __future__ import annotations

from collections.abc import Callable, Sequence
from dataclasses import dataclass
from typing import NamedTuple

from detailer.rules import is456
from detailer.strength.section import Gross

CLOSE = 1e-10
"""Forces that differ by this share are in balance."""


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

    Steel in the tension half carries its limit stress at its own level; the neutral axis
    stays within xu,max. Steel in the compression half counts only where the concrete alone
    is not enough, at the stress its strain gives.

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
    .. [1] IS 456:2000, G-1.1, G-1.2, G-2.2, G-2.3.
    """

    def level(row: Row) -> float:
        return gross.top - row.z if sagging else row.z - gross.soffit

    tension = [(level(r), r.area * r.limit_stress) for r in rows if level(r) > gross.depth / 2]
    pull = sum(force for _, force in tension)
    if pull <= 0:
        return Resistance(
            moment=0.0, d=0.0, xu=0.0, xu_limit=0.0, compression_used=False, over_reinforced=False
        )
    d = sum(at * force for at, force in tension) / pull
    limit = is456.xu_limit(fy) * d
    block = _Block(gross, fck, sagging)
    concrete, arm = block.force(limit)
    if concrete >= pull:
        xu = _balance(lambda x: block.force(x)[0], pull, limit)
        force, arm = block.force(xu)
        return _result(pull * d - force * arm, d, xu, limit)
    pressed = [(level(r), r) for r in rows if level(r) <= gross.depth / 2]

    def push(x: float) -> list[tuple[float, float]]:
        return [
            (at, r.area * _compressed(x, at, fy, r.limit_stress)) for at, r in pressed if at < x
        ]

    def total(x: float) -> float:
        return block.force(x)[0] + sum(force for _, force in push(x))

    over = total(limit) < pull
    xu = limit if over else _balance(total, pull, limit)
    concrete, arm = block.force(xu)
    moment = concrete * (d - arm) + sum(force * (d - at) for at, force in push(xu))
    used = any(force > 0 for _, force in push(xu))
    return _result(moment, d, xu, limit, used=used, over=over)


def _result(
    moment: float, d: float, xu: float, limit: float, *, used: bool = False, over: bool = False
) -> Resistance:
    return Resistance(
        moment=moment, d=d, xu=xu, xu_limit=limit, compression_used=used, over_reinforced=over
    )


def _compressed(xu: float, at: float, fy: float, limit: float) -> float:
    """Return the stress of steel at a depth in the compression zone. [N/mm²]"""
    strain = is456.CONCRETE_STRAIN * (xu - at) / xu
    return min(is456.steel_stress(strain, fy), limit)


def _balance(force: Callable[[float], float], pull: float, high: float) -> float:
    """Return the depth at which a growing force reaches the pull, by false position."""
    low, below, above = 0.0, 0.0, force(high)
    side = 0
    for _ in range(80):
        middle = low + (pull - below) * (high - low) / (above - below)
        here = force(middle)
        if abs(here - pull) <= CLOSE * pull:
            return middle
        if here < pull:
            low, below = middle, here
            if side < 0:
                above = pull + (above - pull) / 2
            side = -1
        else:
            high, above = middle, here
            if side > 0:
                below = pull + (below - pull) / 2
            side = 1
    return high


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
