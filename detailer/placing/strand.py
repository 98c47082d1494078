"""A strand: one real bar on its way to the cage, still as a line with ends and a crank."""

from __future__ import annotations

from dataclasses import dataclass, replace
from math import hypot

from detailer.cage import forms
from detailer.rules import is2502
from detailer.values import EndForm, Face, Role


@dataclass(frozen=True, slots=True)
class End:
    """How a strand ends; the leg of a bend is measured outside to outside. [mm]"""

    form: EndForm = EndForm.STRAIGHT
    leg: float = 0.0


STRAIGHT = End()


@dataclass(frozen=True, slots=True, kw_only=True)
class Strand:
    """One bar along the beam. `x0` and `x1` are its outermost points. [mm]

    Its left end may lie aside by `aside` (dy, dz) up to `aside_to`, from where it cranks
    back into its own line at 1 in 6.
    """

    run: int  # index of the run it belongs to
    role: Role
    face: Face
    layer: int
    dia: float
    y: float
    z: float
    x0: float
    x1: float
    left: End = STRAIGHT
    right: End = STRAIGHT
    corner: bool = False
    seated: bool = True  # where its layer's seating put it; False once it had to give way
    aside: tuple[float, float] = (0.0, 0.0)
    aside_to: float = 0.0

    @property
    def crank(self) -> float:
        """Return the length of the crank along x. [mm]"""
        return forms.CRANK_SLOPE * hypot(*self.aside)

    def at(self, x: float) -> tuple[float, float]:
        """Return (y, z) of the centre line at x, bends of ends left out."""
        if self.aside == (0.0, 0.0):
            return self.y, self.z
        length = self.crank
        if x >= self.aside_to + length:
            return self.y, self.z
        share = min(1.0, (self.aside_to + length - x) / length)
        return self.y + share * self.aside[0], self.z + share * self.aside[1]

    def covers(self, x: float) -> bool:
        """Return whether the strand is there at x."""
        return self.x0 <= x <= self.x1

    def moved(self, dy: float, dz: float) -> Strand:
        """Return the strand elsewhere in the section."""
        return replace(self, y=self.y + dy, z=self.z + dz)


def path(strand: Strand) -> forms.Path:
    """Return corner points of the centre line and the mandrel at each inner corner.

    Parameters
    ----------
    strand : Strand
        The bar; a top bar's legs turn down, a bottom bar's up.
    """
    y, z = strand.at(strand.x0)
    cranks: tuple[forms.Crank, ...] = ()
    if strand.crank:
        dy, dz = strand.aside
        cranks = (forms.Crank(x=strand.aside_to, dy=-dy, dz=-dz),)
    return forms.bar_path(
        strand.x0,
        strand.x1,
        y,
        z,
        left=_shape(strand, strand.left),
        right=_shape(strand, strand.right),
        cranks=cranks,
        dia=strand.dia,
        mandrel=2 * is2502.bend_radius(strand.dia),
    )


def _shape(strand: Strand, end: End) -> forms.EndShape:
    return forms.EndShape(form=end.form, leg=end.leg, up=strand.face is not Face.TOP)
