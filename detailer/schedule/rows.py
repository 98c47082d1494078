"""Schedule rows: one a member and mark, counted and weighed over all members."""

from __future__ import annotations

from collections.abc import Iterable, Iterator
from dataclasses import dataclass
from math import pi

from detailer.cage.bar import Bar, Cage, Shape
from detailer.cage.measure import exact_length
from detailer.schedule.form import form_of
from detailer.schedule.lengths import length_of
from detailer.schedule.numbering import kin_of, placing_order
from detailer.values import Role

DENSITY = 7850e-9
"""Mass of steel. [kg/mm³] (IS 1786:2008)"""

UNROUNDED = 1e-6


@dataclass(frozen=True, slots=True, kw_only=True)
class Row:
    """Bars of one mark in one member."""

    member: str
    mark: str
    role: Role  # of the first bar of this mark
    grade: str
    dia: float  # [mm]
    per_member: int  # real bars in one member
    members: int  # members of this kind that are built
    length: float  # scheduled, of one bar [mm]
    exact: float  # of one bar's centre line [mm]
    shape: Shape
    mirrored: bool = False  # True: the opposite-handed bars, for mirrored members only
    note: str = ""

    @property
    def total(self) -> int:
        """Return the number of bars over all members."""
        return self.per_member * self.members

    @property
    def mass(self) -> float:
        """Return the mass of all bars by their scheduled length. [kg]"""
        return self.total * mass_of(self.dia, self.length)

    @property
    def exact_mass(self) -> float:
        """Return the mass of all bars by their exact length. [kg]"""
        return self.total * mass_of(self.dia, self.exact)


def mass_of(dia: float, length: float) -> float:
    """Return the mass of one bar at its nominal area. [kg]

    Parameters
    ----------
    dia : float
        Nominal diameter. [mm]
    length : float
        Length. [mm]

    References
    ----------
    .. [1] IS 1786:2008: 0.00785 kg per mm² and metre.
    """
    return pi * dia**2 / 4 * length * DENSITY


def rows(cages: Iterable[Cage]) -> tuple[Row, ...]:
    """Return the schedule of numbered cages, in the order in which bars are placed.

    Bars that a mirrored member needs opposite-handed stand in rows of their own: under the
    mark of the equal bar if the project has one, otherwise under their own mark with an M.

    Parameters
    ----------
    cages : iterable of Cage
        Cages with marks, from :func:`detailer.schedule.number`.
    """
    numbered = tuple(cages)
    hands = _Hands(numbered)
    return tuple(row for cage in numbered for row in _rows_of(cage, hands))


class _Hands:
    """The marks of opposite-handed bars; looked up only where members are mirrored."""

    def __init__(self, cages: tuple[Cage, ...]) -> None:
        mirrored = any(cage.mirrored for cage in cages)
        bars = (bar for cage in cages for bar in cage.bars) if mirrored else ()
        self._firsts = {bar.mark: bar for bar in reversed(tuple(bars))}

    def other(self, bar: Bar) -> str:
        """Return the mark of a bar's mirror image; its own where turning does it."""
        form = form_of(bar)
        if not form.handed:
            return bar.mark
        image = form.mirrored()
        for mark, first in sorted(self._firsts.items()):
            if first.dia == bar.dia and kin_of(first).takes(bar, image):
                return mark
        return f"{bar.mark}M"


def _rows_of(cage: Cage, hands: _Hands) -> Iterator[Row]:
    firsts: dict[str, Bar] = {}
    counts: dict[str, int] = {}
    for bar in placing_order(cage.bars):
        firsts.setdefault(bar.mark, bar)
        counts[bar.mark] = counts.get(bar.mark, 0) + len(bar.placings)
    built = cage.copies + cage.mirrored
    if not cage.mirrored:
        for mark in sorted(firsts):
            yield _row(cage, firsts[mark], mark, counts[mark], built)
        return
    opposite = {mark: hands.other(first) for mark, first in firsts.items()}
    for mark in sorted(firsts):
        both = opposite[mark] == mark or counts.get(opposite[mark]) == counts[mark]
        yield _row(cage, firsts[mark], mark, counts[mark], built if both else cage.copies)
        if not both:
            yield _row(
                cage, firsts[mark], opposite[mark], counts[mark], cage.mirrored, mirrored=True
            )


def _row(
    cage: Cage, first: Bar, mark: str, count: int, members: int, *, mirrored: bool = False
) -> Row:
    if first.shape is None or first.length is None:
        raise ValueError(f"bar {first.id} has not been numbered")
    return Row(
        member=cage.member,
        mark=mark,
        role=first.role,
        grade=first.grade,
        dia=first.dia,
        per_member=count,
        members=members,
        length=first.length,
        exact=exact_length(first),
        shape=first.shape,
        mirrored=mirrored,
        note=length_of(first, UNROUNDED).note,
    )
