"""The concrete section of a span as bending sees it."""

from __future__ import annotations

from dataclasses import dataclass

from detailer.model import Beam, Project, Span
from detailer.rules import is456
from detailer.values import FlangeSide


@dataclass(frozen=True, slots=True, kw_only=True)
class Gross:
    """Web and effective flange of a span; z in the member's axes. [mm]"""

    width: float
    depth: float
    top: float
    flange_width: float  # the web's where there is no flange
    flange_depth: float

    @property
    def soffit(self) -> float:
        """Return z of the soffit. [mm]"""
        return self.top - self.depth


def shape_of(project: Project, beam: Beam, span: Span) -> Gross:
    """Return the section of a span with its effective flange.

    Parameters
    ----------
    project : Project
        The project; its code decides the effective width.
    beam : Beam
        The beam line; continuous where it has more than one span.
    span : Span
        One of its spans.

    References
    ----------
    .. [1] IS 456:2000, 23.1.2, with 0.7 × span between zero moments of a continuous beam.
    """
    section = span.section
    flange = section.width
    if section.flange is not None and section.slab > 0 and not span.overhang:
        between = span.length * (0.7 if len(beam.spans) > 1 else 1.0)
        flange = is456.effective_flange(
            between,
            section.width,
            section.slab,
            both_sides=section.flange_side is FlangeSide.BOTH,
            actual=section.flange,
        ).value
    return Gross(
        width=section.width,
        depth=section.depth,
        top=span.top,
        flange_width=max(flange, section.width),
        flange_depth=section.slab,
    )
