"""Moment of resistance by strips and strains: shares no code with the program.

Plane sections; concrete by the parabola and rectangle of IS 456:2000, Fig. 21 (0.67 fck/1.5 from
a strain of 0.002 to 0.0035); steel by the curve of Fig. 23, on both sides of the neutral axis.
"""

from __future__ import annotations

from collections.abc import Sequence
from typing import NamedTuple

import numpy as np

STRIPS = 2000
SHARES = np.array([0.0, 0.80, 0.85, 0.90, 0.95, 0.975, 1.0])
INELASTIC = np.array([0.0, 0.0, 0.0001, 0.0003, 0.0007, 0.001, 0.002])


class Level(NamedTuple):
    """Steel at one depth below the fibre most pressed, and the stress it can't exceed."""

    depth: float
    area: float
    most: float


class Shape(NamedTuple):
    """A web with a flange at the pressed edge; a rectangle where the flange is as wide."""

    width: float
    depth: float
    flange: float
    thick: float


class Carried(NamedTuple):
    """Moment, neutral axis, and what steel and concrete in compression carry."""

    moment: float
    xu: float
    steel_pressed: float
    concrete: float


def steel(strain: float, fy: float) -> float:
    """Return the stress of steel, with the sign of the strain."""
    design = fy / 1.15
    if fy <= 250:
        size = min(200e3 * abs(strain), design)
    else:
        size = float(np.interp(abs(strain), SHARES * design / 200e3 + INELASTIC, SHARES * design))
    return size if strain >= 0 else -size


def concrete(strain: np.ndarray, fck: float) -> np.ndarray:
    """Return the stress of concrete at compressive strains."""
    part = np.clip(strain / 0.002, 0, 1)
    return 0.67 * fck / 1.5 * (2 * part - part * part)


def forces(
    shape: Shape, levels: Sequence[Level], fck: float, fy: float, xu: float, displaced: bool
) -> tuple[float, float, float, float]:
    """Return (net force, moment about the pressed edge, steel in compression, concrete)."""
    edges = np.linspace(0, min(xu, shape.depth), STRIPS + 1)
    at = (edges[1:] + edges[:-1]) / 2
    wide = np.where(at < shape.thick, shape.flange, shape.width)
    push = concrete(0.0035 * (xu - at) / xu, fck) * wide * np.diff(edges)
    net, moment = float(push.sum()), -float(push @ at)
    pressed = 0.0
    for level in levels:
        strain = 0.0035 * (level.depth - xu) / xu  # tension +
        stress = steel(strain, fy)
        stress = max(-level.most, min(stress, level.most))
        force = level.area * stress
        if strain < 0:
            pressed -= force
            if displaced:
                force += level.area * float(concrete(np.array(-strain), fck))
        net -= force
        moment += force * level.depth
    return net, moment, pressed, float(push.sum())


def resistance(
    shape: Shape,
    levels: Sequence[Level],
    fck: float,
    fy: float,
    *,
    most: float | None = None,
    displaced: bool = False,
) -> Carried:
    """Return what the section carries; the neutral axis lies no deeper than `most`."""
    low, high = 1e-3, most or shape.depth
    for _ in range(60):
        middle = (low + high) / 2
        if forces(shape, levels, fck, fy, middle, displaced)[0] < 0:
            low = middle
        else:
            high = middle
    net, moment, pressed, pushed = forces(shape, levels, fck, fy, high, displaced)
    if net < 0:  # stopped at the limit: the tension steel carries what compression balances
        tension = sum(
            (lv.area * min(steel(0.0035 * (lv.depth - high) / high, fy), lv.most), lv.depth)[0]
            for lv in levels
            if lv.depth > high
        )
        centre = (
            sum(
                lv.area * min(steel(0.0035 * (lv.depth - high) / high, fy), lv.most) * lv.depth
                for lv in levels
                if lv.depth > high
            )
            / tension
        )
        moment += net * centre
    return Carried(moment, high, pressed, pushed)
