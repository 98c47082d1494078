"""What ribs take of the width of a layer."""

from __future__ import annotations

from collections.abc import Iterable, Sequence
from itertools import pairwise
from math import hypot
from typing import NamedTuple

from detailer.model.materials import over_ribs

TOUCHING = 0.6
"""Bars this close lie against each other as a lap does. [mm]"""


class Spot(NamedTuple):
    """A bar where a section cuts it. [mm]"""

    y: float
    z: float
    dia: float

    def clear(self, other: Spot) -> float:
        """Return the clear distance to another bar. [mm]

        Parameters
        ----------
        other : Spot
            Of the same section.
        """
        return hypot(self.y - other.y, self.z - other.z) - (self.dia + other.dia) / 2


def groups_of(spots: Iterable[Spot]) -> list[list[Spot]]:
    """Return the bars of a layer from right to left, those that touch put together.

    Parameters
    ----------
    spots : iterable of Spot
        Bars of one layer.
    """
    groups: list[list[Spot]] = []
    for spot in sorted(spots):
        if groups and any(spot.clear(other) < TOUCHING for other in groups[-1]):
            groups[-1].append(spot)
        else:
            groups.append([spot])
    return groups


def taken(groups: Sequence[Sequence[Spot]]) -> float:
    """Return the width that ribs add to a layer. [mm]

    A bar grows to both sides; bars that touch push each other apart by as much as they lie
    beside each other, and not at all where one lies above the other.

    Parameters
    ----------
    groups : sequence
        Bars of the layer in groups that touch, from right to left.
    """
    width = 0.0
    for group in groups:
        width += (_growth(group[0].dia) + _growth(group[-1].dia)) / 2
        for a, b in pairwise(group):
            slope = abs(b.y - a.y) / max(hypot(b.y - a.y, b.z - a.z), 1e-9)
            width += slope * (_growth(a.dia) + _growth(b.dia)) / 2
    return width


def _growth(dia: float) -> float:
    """Return what ribs add to a diameter. [mm]"""
    return over_ribs(dia) - dia
