"""Masses: by size, by member, per cubic metre, and the steel of laps and spacers apart."""

from __future__ import annotations

from collections.abc import Iterable, Sequence
from dataclasses import dataclass
from itertools import pairwise

from detailer.cage.bar import Cage, Prism
from detailer.cage.cut import outline_at
from detailer.cage.measure import exact_length
from detailer.schedule.rows import Row, mass_of
from detailer.values import ContactKind, Role, SupportKind


@dataclass(frozen=True, slots=True)
class SizeMass:
    """All bars of one grade and diameter."""

    grade: str
    dia: float  # [mm]
    number: int
    length: float  # scheduled, of all bars together [m]
    mass: float  # by scheduled lengths [kg]
    exact: float  # by exact lengths [kg]


@dataclass(frozen=True, slots=True)
class MemberMass:
    """The steel of one member, all members of its kind together."""

    member: str
    members: int
    mass: float  # by scheduled lengths [kg]
    laps: float  # of it, lapped lengths [kg]
    spacers: float  # of it, spacer bars [kg]
    concrete: float  # of one member [m³]
    density: float  # by scheduled lengths [kg/m³]


@dataclass(frozen=True, slots=True)
class Summary:
    """The steel of a project."""

    sizes: tuple[SizeMass, ...]
    members: tuple[MemberMass, ...]

    @property
    def mass(self) -> float:
        """Return the mass by scheduled lengths. [kg]"""
        return sum(size.mass for size in self.sizes)

    @property
    def exact(self) -> float:
        """Return the mass by exact lengths. [kg]"""
        return sum(size.exact for size in self.sizes)

    @property
    def laps(self) -> float:
        """Return the mass of lapped lengths. [kg]"""
        return sum(member.laps for member in self.members)

    @property
    def spacers(self) -> float:
        """Return the mass of spacer bars. [kg]"""
        return sum(member.spacers for member in self.members)


def summarise(cages: Iterable[Cage], rows: Sequence[Row]) -> Summary:
    """Return the masses of a project.

    Parameters
    ----------
    cages : iterable of Cage
        Cages with marks.
    rows : sequence of Row
        Their schedule.
    """
    return Summary(_sizes(rows), tuple(_member(cage, rows) for cage in cages))


def lap_mass(cage: Cage) -> float:
    """Return the mass of steel that laps use twice, in one member. [kg]

    Parameters
    ----------
    cage : Cage
        The placed steel.
    """
    bars = {bar.id: bar for bar in cage.bars}
    total = 0.0
    for contact in cage.contacts:
        if contact.kind is ContactKind.LAP:
            a, b = bars[contact.a], bars[contact.b]
            pairs = min(len(a.placings), len(b.placings))
            total += pairs * mass_of(min(a.dia, b.dia), contact.x1 - contact.x0)
    return total


def spacer_mass(cage: Cage) -> float:
    """Return the mass of spacer bars by scheduled lengths, in one member. [kg]

    Parameters
    ----------
    cage : Cage
        The placed steel.
    """
    return sum(
        len(bar.placings) * mass_of(bar.dia, bar.length or exact_length(bar))
        for bar in cage.bars
        if bar.role is Role.SPACER
    )


def concrete_volume(cage: Cage) -> float:
    """Return the concrete of one member without its supports. [m³]

    Where prisms overlap the concrete counts once.

    Parameters
    ----------
    cage : Cage
        The placed steel with its concrete.
    """
    own = tuple(prism for prism in cage.prisms if not _is_support(prism))
    cuts = sorted({x for prism in own for x in (prism.x0, prism.x1)})
    total = 0.0
    for x0, x1 in pairwise(cuts):
        total += (x1 - x0) * float(outline_at(own, (x0 + x1) / 2).area)
    return total / 1e9


def _is_support(prism: Prism) -> bool:
    return prism.name.split(" ", 1)[0] in {kind.value for kind in SupportKind}


def _sizes(rows: Sequence[Row]) -> tuple[SizeMass, ...]:
    found = []
    for grade, dia in sorted({(row.grade, row.dia) for row in rows}):
        own = [row for row in rows if (row.grade, row.dia) == (grade, dia)]
        found.append(
            SizeMass(
                grade,
                dia,
                sum(row.total for row in own),
                sum(row.total * row.length for row in own) / 1000,
                sum(row.mass for row in own),
                sum(row.exact_mass for row in own),
            )
        )
    return tuple(found)


def _member(cage: Cage, rows: Sequence[Row]) -> MemberMass:
    built = cage.copies + cage.mirrored
    mass = sum(row.mass for row in rows if row.member == cage.member)
    concrete = concrete_volume(cage)
    return MemberMass(
        member=cage.member,
        members=built,
        mass=mass,
        laps=built * lap_mass(cage),
        spacers=built * spacer_mass(cage),
        concrete=concrete,
        density=mass / (built * concrete) if built and concrete else 0.0,
    )
