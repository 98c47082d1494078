"""What the design asks of a face along the line, and what rows of bars would resist there."""

from __future__ import annotations

from dataclasses import dataclass
from math import pi

import numpy as np
from numpy.typing import NDArray

from detailer.model import Beam, LinkZone, Project, Span
from detailer.rules import is456
from detailer.statics import Envelope
from detailer.strength.bending import Row, resistance
from detailer.strength.section import shape_of
from detailer.strength.torsion import added_moment, with_torsion
from detailer.values import Face


def area(dia: float) -> float:
    """Return the nominal area of a bar. [mm²]"""
    return pi * dia * dia / 4


@dataclass(frozen=True, slots=True)
class Demand:
    """Tension asked of the faces of one beam."""

    project: Project
    beam: Beam
    envelope: Envelope

    def tension(self, face: Face, xs: NDArray[np.float64]) -> NDArray[np.float64]:
        """Return the moment that puts a face in tension, 0 where none does. [N·mm]

        All torsion counts, even where the concrete would resist it (41.3.2): links are not known
        yet, and bars run further for it.

        Parameters
        ----------
        face : Face
            TOP or BOTTOM.
        xs : ndarray
            Places along the line. [mm]
        """
        bottom, top = with_torsion(*self.envelope.moments(xs), self._added(xs))
        return bottom if face is Face.BOTTOM else top

    def _added(self, xs: NDArray[np.float64]) -> NDArray[np.float64]:
        """Return the moment that torsion adds. [N·mm]"""
        added = np.zeros(len(xs))
        if self.envelope.twisted:
            twist = self.envelope.torsions(xs)
            for span in self.beam.spans:
                here = (xs >= span.x0) & (xs <= span.x1)
                mine = added_moment(twist[here], span.section)
                added[here] = np.maximum(added[here], mine)
        return added

    def tension_at(self, face: Face, x: float) -> float:
        """Return the same at one place. [N·mm]"""
        return float(self.tension(face, np.array([x]))[0])

    def shear_at(self, x: float) -> float:
        """Return the largest shear, unsigned. [N]"""
        least, most = self.envelope.shears(np.array([x]))
        return float(max(abs(least[0]), abs(most[0])))

    def peak(self, face: Face, x0: float, x1: float) -> tuple[float, float]:
        """Return where between two places a face is most in tension, and how much."""
        xs = np.linspace(x0, x1, max(2, int((x1 - x0) / 10) + 1))
        values = self.tension(face, xs)
        at = int(np.argmax(values))
        return float(xs[at]), float(values[at])

    def falls_to(self, face: Face, start: float, stop: float, capacity: float) -> float:
        """Return where, going from start to stop, tension first falls to a capacity; or stop."""
        count = max(2, int(abs(stop - start) / 5) + 1)
        xs = np.linspace(start, stop, count)
        values = self.tension(face, xs)
        above = np.nonzero(values > capacity)[0]
        if len(above) == 0:
            return start
        last = int(above[0])
        while last + 1 < count and values[last + 1] > capacity:
            last += 1
        if last + 1 == count:
            return stop
        a, b = float(values[last]), float(values[last + 1])
        share = (a - capacity) / (a - b) if a > b else 1.0
        return float(xs[last] + share * (xs[last + 1] - xs[last]))

    def resists(self, span: Span, face: Face, bars: tuple[tuple[float, float], ...]) -> float:
        """Return the moment that bars (diameter, z) resist in a span, fully developed. [N·mm]"""
        if not bars:
            return 0.0
        steel = self.project.steel.main
        rows = [Row(dia=dia, area=area(dia), z=z, limit_stress=0.87 * steel.fy) for dia, z in bars]
        gross = shape_of(self.project, self.beam, span)
        fck = self.project.concrete.fck
        return resistance(gross, rows, fck, steel.fy, sagging=face is Face.BOTTOM).moment

    def cut_allowed(
        self,
        span: Span,
        face: Face,
        x: float,
        bars: tuple[tuple[float, float], ...],
        depth: float,
        cut_dia: float,
        zone: LinkZone | None,
    ) -> bool:
        """Return whether a bar may stop in tension at x by 26.2.3.2 a or c.

        `bars` are those that go on.
        """
        moment = self.tension_at(face, x)
        if moment <= 0:
            return True
        b, fck = span.section.width, self.project.concrete.fck
        steel = sum(area(dia) for dia, _ in bars)
        permitted = is456.shear_strength(100 * steel / (b * depth), fck) * b * depth
        if zone is not None:
            asv = zone.legs * area(zone.dia)
            permitted += is456.link_shear(asv, zone.spacing, depth, self.project.steel.links.fy)
        shear = self.shear_at(x)
        if shear <= is456.cutoff_shear_limit(permitted).value:
            return True
        twice = 2 * moment <= self.resists(span, face, bars)
        small = cut_dia <= is456.CUTOFF_DOUBLE_MAX_DIA
        return twice and small and shear <= is456.cutoff_double_area_limit(permitted).value
