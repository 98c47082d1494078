"""What the design says: the forms in which results reach the drafter, mm and N inside."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TypeAlias


@dataclass(frozen=True, slots=True, kw_only=True)
class Station:
    """Enveloped results at one place; x from the left end of its span."""

    x: float  # [mm]
    m_max: float  # [N·mm], sagging +
    m_min: float
    v_max: float  # [N], V = dM/dx
    v_min: float
    t: float = 0.0  # largest torsion, unsigned [N·mm]


@dataclass(frozen=True, slots=True)
class Stations:
    """Results by station, as exported from a frame analysis."""

    rows: tuple[Station, ...]


@dataclass(frozen=True, slots=True, kw_only=True)
class HandResults:
    """Three moments (one parabola between support centres) and two shears (at centres)."""

    moment: tuple[float, float, float]  # left, middle, right [N·mm]
    shear: tuple[float, float]  # left, right [N]


@dataclass(frozen=True, slots=True, kw_only=True)
class PointLoad:
    """A characteristic point load; x from the left end of its span."""

    x: float  # [mm]
    dead: float  # [N]
    imposed: float  # [N]


@dataclass(frozen=True, slots=True, kw_only=True)
class Loads:
    """Characteristic loads of a span; own weight is the reader's to have included."""

    dead: float  # [N/mm]
    imposed: float  # [N/mm]
    points: tuple[PointLoad, ...] = ()


Results: TypeAlias = Stations | HandResults | Loads
