"""What a check is given, and where along the member a finding lies."""

from __future__ import annotations

from dataclasses import dataclass

from detailer.cage.bar import Cage
from detailer.findings import Place
from detailer.model import Beam, Project
from detailer.statics import Envelope


@dataclass(frozen=True, slots=True, kw_only=True)
class Case:
    """One member with its steel placed."""

    project: Project
    beam: Beam
    envelope: Envelope | None
    cage: Cage

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
