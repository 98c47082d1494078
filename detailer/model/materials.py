"""Concrete and steel as the project file states them."""

from __future__ import annotations

from dataclasses import dataclass
from types import MappingProxyType

from detailer.values import Exposure

SIZE_OVER_RIBS = MappingProxyType(
    {6: 8, 8: 11, 10: 13, 12: 14, 16: 19, 20: 23, 25: 29, 28: 33, 32: 37, 36: 42, 40: 46}
)
"""Overall size of a ribbed bar by nominal diameter. [mm]

12, 16 and 25 from published practitioners' notes, the others FROM MEMORY (page_seen=False).
"""


def over_ribs(dia: float) -> float:
    """Return the size over ribs of a nominal diameter. [mm]

    Parameters
    ----------
    dia : float
        Nominal diameter. [mm]
    """
    known = SIZE_OVER_RIBS.get(round(dia))
    return float(known) if known is not None else 1.15 * dia


@dataclass(frozen=True, slots=True, kw_only=True)
class Concrete:
    """Concrete of the project."""

    grade: str  # "M25"
    fck: float  # [N/mm²]
    aggregate: float  # nominal maximum size [mm]
    exposure: Exposure
    fire_hours: float


@dataclass(frozen=True, slots=True)
class SteelGrade:
    """A grade of reinforcement."""

    name: str  # "Fe 500"
    fy: float  # [N/mm²]
    deformed: bool = True


@dataclass(frozen=True, slots=True, kw_only=True)
class Steel:
    """Reinforcement of the project."""

    main: SteelGrade
    links: SteelGrade
    stock: float  # longest bar delivered [mm]
    sizes: tuple[int, ...]  # diameters held [mm]
