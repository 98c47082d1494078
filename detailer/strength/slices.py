"""Resistance along a beam, read off the cage: every bar at the stress its embedment develops."""

from __future__ import annotations

from dataclasses import dataclass, field
from math import pi

import numpy as np
from numpy.typing import NDArray

from detailer.cage.bar import Cage
from detailer.model import Beam, Project, Span
from detailer.strength.bending import Resistance, Row, resistance
from detailer.strength.development import Rod, rods, shares
from detailer.strength.section import Gross, shape_of
from detailer.values import Face

Floats = NDArray[np.float64]


def area(dia: float) -> float:
    """Return the nominal area of a bar. [mm²]

    Parameters
    ----------
    dia : float
        Nominal diameter. [mm]
    """
    return pi * dia * dia / 4


@dataclass(frozen=True, slots=True, eq=False)
class Steel:
    """The bars of a beam and what they develop, ready to be asked at many places."""

    project: Project
    beam: Beam
    cage: Cage
    bars: tuple[Rod, ...]
    shapes: dict[int, Gross]
    known: dict[tuple[object, ...], Resistance] = field(default_factory=dict)  # slices met before

    def at(self, x: float, face: Face) -> tuple[Rod, ...]:
        """Return the bars of a face at x.

        Parameters
        ----------
        x : float
            Along the member. [mm]
        face : Face
            TOP or BOTTOM.
        """
        return tuple(bar for bar in self.bars if bar.face is face and bar.covers(x))

    def depth(self, x: float, face: Face, span: Span | None = None) -> float:
        """Return the effective depth of a face's steel at x, 0 where there is none. [mm]

        Parameters
        ----------
        x : float
            Along the member. [mm]
        face : Face
            The face in tension.
        span : Span, optional
            Whose section; the one that holds x if absent.
        """
        here = self.at(x, face)
        total = sum(area(bar.dia) for bar in here)
        if total == 0:
            return 0.0
        level = sum(area(bar.dia) * bar.at(x)[1] for bar in here) / total
        shape = self.shapes[(span or self.beam.span_at(x)).number]
        return shape.top - level if face is Face.BOTTOM else level - shape.soffit

    def profile(
        self,
        xs: Floats,
        *,
        sagging: bool,
        full: bool = False,
        without: tuple[tuple[str, int], ...] = (),
        span: Span | None = None,
    ) -> list[Resistance]:
        """Return the resistance at places.

        Parameters
        ----------
        xs : ndarray
            Along the member. [mm]
        sagging : bool
            Whether the bottom is in tension.
        full : bool
            Count every bar that is there at 0.87 fy, whatever its embedment.
        without : tuple of (str, int)
            Real bars (id, placing) left out.
        span : Span, optional
            Whose section; at each place the one that holds it if absent.
        """
        bars = tuple(b for b in self.bars if (b.id, b.placing) not in without)
        steel, concrete = self.project.steel.main, self.project.concrete
        if full:
            table = np.array([(xs >= b.tips[0]) & (xs <= b.tips[1]) for b in bars], dtype=float)
        else:
            table = shares(self.project, self.cage, bars, xs)
        stress = np.round(table.reshape(len(bars), len(xs)).T * (0.87 * steel.fy), 1)
        level = np.round(np.array([b.levels(xs) for b in bars]).reshape(len(bars), len(xs)).T, 2)
        result = []
        for k, x in enumerate(xs.tolist()):
            number = (span or self.beam.span_at(x)).number
            key = (number, sagging, without, stress[k].tobytes(), level[k].tobytes())
            if key not in self.known:
                rows = tuple(
                    Row(b.dia, area(b.dia), z, s)
                    for b, z, s in zip(bars, level[k].tolist(), stress[k].tolist(), strict=True)
                    if s > 0
                )
                self.known[key] = resistance(
                    self.shapes[number], rows, concrete.fck, steel.fy, sagging=sagging
                )
            result.append(self.known[key])
        return result

    def moment(self, x: float, *, sagging: bool, full: bool = False) -> Resistance:
        """Return the resistance at one place.

        Parameters
        ----------
        x : float
            Along the member. [mm]
        sagging : bool
            Whether the bottom is in tension.
        full : bool
            As for :meth:`profile`.
        """
        return self.profile(np.array([x]), sagging=sagging, full=full)[0]


def steel_of(project: Project, beam: Beam, cage: Cage) -> Steel:
    """Return the steel of a placed beam.

    Parameters
    ----------
    project, beam : Project, Beam
        What was detailed.
    cage : Cage
        Its placed steel.
    """
    return Steel(
        project, beam, cage, rods(cage), {s.number: shape_of(project, beam, s) for s in beam.spans}
    )


def moment_resistance(
    project: Project, beam: Beam, cage: Cage, x: float, sagging: bool
) -> Resistance:
    """Return the resistance of the slice at x.

    Parameters
    ----------
    project, beam : Project, Beam
        What was detailed.
    cage : Cage
        Its placed steel.
    x : float
        Along the member. [mm]
    sagging : bool
        Whether the bottom is in tension.
    """
    return steel_of(project, beam, cage).moment(x, sagging=sagging)
