"""What a check is given, and where along the member a finding lies."""

from __future__ import annotations

from dataclasses import dataclass
from functools import cached_property

from detailer.cage.bar import Cage
from detailer.findings import Place
from detailer.model import Beam, Project
from detailer.statics import Envelope
from detailer.strength.shear import Shear, shear_of
from detailer.strength.slices import Steel, steel_of


@dataclass(frozen=True, kw_only=True)
class Case:
    """One member with its steel placed."""

    project: Project
    beam: Beam
    envelope: Envelope | None
    cage: Cage

    @cached_property
    def steel(self) -> Steel:
        """Return the bars and what they develop, read off the cage."""
        return steel_of(self.project, self.beam, self.cage)

    @cached_property
    def shear(self) -> Shear:
        """Return the links and what they carry, read off the cage."""
        return shear_of(self.steel)

    def place(self, x: float) -> Place:
        """Return the support or the span that holds x.

        Parameters
        ----------
        x : float
            Along the member. [mm]
        """
        for k, support in enumerate(self.beam.supports):
            if support.left - 1 <= x <= support.right + 1:
                return Place(2 * k, f"support {support.name}")
        span = self.beam.span_at(x)
        before = sum(1 for support in self.beam.supports if support.x < x)
        return Place(2 * before - 1, f"span {span.number}")

    def names(self, *ids: str) -> tuple[str, ...]:
        """Return the marks of bars, sorted, each once.

        Parameters
        ----------
        *ids : str
            Ids of bars in the cage.
        """
        return tuple(sorted({self.cage.bar(id_).name for id_ in ids}))
