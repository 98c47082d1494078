"""The room inside the links of a span: where bars may lie."""

from __future__ import annotations

from dataclasses import dataclass
from math import sqrt

from detailer.model import Beam, Span, over_ribs
from detailer.rules import is456, is2502
from detailer.values import Face


@dataclass(frozen=True, slots=True, kw_only=True)
class Frame:
    """Inside faces of the links of one span, in the member's axes. [mm]"""

    right: float  # least y
    left: float  # greatest y
    bottom: float
    top: float
    link: float  # diameter of the links
    bend: float  # inner radius of their bends

    @property
    def width(self) -> float:
        """Return the clear width between the vertical legs. [mm]"""
        return self.left - self.right

    @property
    def middle(self) -> float:
        """Return y half way between the vertical legs. [mm]"""
        return (self.left + self.right) / 2

    def seat(self, dia: float) -> float:
        """Return how far a corner bar sits off both legs. [mm]

        Parameters
        ----------
        dia : float
            Diameter of the corner bar. [mm]

        References
        ----------
        .. [1] Geometry: a circle of radius R pushed into a bend of inner radius r > R.
        """
        return max(0.0, (1 - 1 / sqrt(2)) * (self.bend - dia / 2))

    def level(self, face: Face, depth: float) -> float:
        """Return z of what lies `depth` inside the links' inner face. [mm]

        Parameters
        ----------
        face : Face
            TOP or BOTTOM.
        depth : float
            Distance from the inner face of the links towards the core. [mm]
        """
        return self.bottom + depth if face is Face.BOTTOM else self.top - depth

    def gap_over_ribs(self, dias: tuple[int, ...]) -> float:
        """Return the clear gap of a layer packed over ribs from the cover faces. [mm]

        Links and bars both at their size over ribs; the corner seat as for nominal sizes.

        Parameters
        ----------
        dias : tuple of int
            Nominal diameters of all bars of the layer, the corner bars first. [mm]
        """
        if len(dias) < 2:
            return self.width
        room = self.width - 2 * (over_ribs(self.link) - self.link)
        seats = self.seat(dias[0]) + self.seat(dias[1])
        return (room - seats - sum(over_ribs(d) for d in dias)) / (len(dias) - 1)


def frame_of(beam: Beam, span: Span) -> Frame:
    """Return the room inside the links of a span.

    The links' bends are at the standard's radius, or at the radius of the largest bar where
    that is larger, so that a corner bar and the hook beside it have room.

    Parameters
    ----------
    beam : Beam
        The beam line.
    span : Span
        One of its spans.
    """
    dia = max(zone.dia for links in beam.links if links.span == span.number for zone in links.zones)
    largest = max((g.dia for bars in beam.bars for g in bars.groups), default=0)
    half = span.section.width / 2
    return Frame(
        right=-half + beam.cover.right + dia,
        left=half - beam.cover.left - dia,
        bottom=span.soffit + beam.cover.bottom + dia,
        top=span.top - beam.cover.top - dia,
        link=dia,
        bend=max(is2502.bend_radius(dia, link=True), largest / 2),
    )


def common(frames: list[Frame]) -> Frame:
    """Return the room that several spans share."""
    return Frame(
        right=max(f.right for f in frames),
        left=min(f.left for f in frames),
        bottom=max(f.bottom for f in frames),
        top=min(f.top for f in frames),
        link=max(f.link for f in frames),
        bend=max(f.bend for f in frames),
    )


def gap_needed(a: float, b: float, aggregate: float) -> float:
    """Return the least clear distance between two bars of a layer. [mm]

    Parameters
    ----------
    a, b : float
        Nominal diameters. [mm]
    aggregate : float
        Nominal maximum size of the aggregate. [mm]
    """
    return is456.min_clear_gap(a, b, aggregate).value
