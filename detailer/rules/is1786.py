"""IS 1786:2008: sizes, masses and grades of deformed bars."""

from __future__ import annotations

from collections.abc import Mapping
from math import pi
from types import MappingProxyType

DENSITY = 7850.0
"""Density of steel. [kg/m³]"""

MASS: Mapping[float, float] = MappingProxyType(
    {
        4: 0.099,
        5: 0.154,
        6: 0.222,
        8: 0.395,
        10: 0.617,
        12: 0.888,
        16: 1.58,
        20: 2.47,
        25: 3.85,
        28: 4.83,
        32: 6.31,
        36: 7.99,
        40: 9.86,
    }
)
"""Nominal mass by size as printed. [kg/m]"""

SIZES = tuple(MASS)
"""Nominal sizes of the standard. [mm]"""

GRADES = MappingProxyType(
    {
        "Fe 415": 415.0,
        "Fe 415D": 415.0,
        "Fe 415S": 415.0,
        "Fe 500": 500.0,
        "Fe 500D": 500.0,
        "Fe 500S": 500.0,
        "Fe 550": 550.0,
        "Fe 550D": 550.0,
        "Fe 600": 600.0,
    }
)
"""Characteristic strength by grade. [N/mm²]"""

ELONGATION = MappingProxyType(
    {
        "Fe 415": 14.5,
        "Fe 415D": 18.0,
        "Fe 415S": 20.0,
        "Fe 500": 12.0,
        "Fe 500D": 16.0,
        "Fe 500S": 18.0,
        "Fe 550": 10.0,
        "Fe 550D": 14.5,
        "Fe 600": 10.0,
    }
)
"""Least elongation by grade. [%]"""

LENGTH_TOLERANCE = (75.0, 25.0)
"""What a bar of a specified length may be over and under (confirmed on a page). [mm]"""

STOCK_LENGTH = 12_000.0
"""Longest bar usually delivered: trade practice, FROM MEMORY (page_seen=False). [mm]"""


def area(dia: float) -> float:
    """Return the nominal area. [mm²]

    Parameters
    ----------
    dia : float
        Nominal diameter. [mm]

    References
    ----------
    .. [1] π d²/4; the areas printed in IS 1786:2008 lie up to 0.1 % above it (confirmed on
       makers' pages).
    """
    return pi * dia * dia / 4


def mass_per_metre(dia: float) -> float:
    """Return the nominal mass as printed. [kg/m]

    Parameters
    ----------
    dia : float
        Nominal diameter, one of SIZES. [mm]

    Raises
    ------
    KeyError
        For a size that is not rolled.

    References
    ----------
    .. [1] IS 1786:2008, Table 1 (confirmed on makers' pages).
    """
    return MASS[dia]


def mass_tolerance(dia: float) -> float:
    """Return the tolerance on the mass of a batch, plus and minus. [%]

    Parameters
    ----------
    dia : float
        Nominal diameter. [mm]

    References
    ----------
    .. [1] IS 1786:2008 (confirmed on a page; batch figures).
    """
    return 7.0 if dia <= 10 else 5.0 if dia <= 16 else 3.0


def bend_test_mandrel(dia: float) -> float:
    """Return the mandrel of the bend test of Fe 500, not of fabrication. [mm]

    Parameters
    ----------
    dia : float
        Nominal diameter. [mm]

    References
    ----------
    .. [1] IS 1786:2008 (confirmed on makers' pages).
    """
    return (4 if dia <= 20 else 5) * dia


def rebend_test_mandrel(dia: float) -> float:
    """Return the mandrel of the rebend test of Fe 415 and Fe 500. [mm]

    Parameters
    ----------
    dia : float
        Nominal diameter. [mm]

    References
    ----------
    .. [1] IS 1786:2008 (confirmed on makers' pages).
    """
    return (5 if dia <= 10 else 7) * dia
