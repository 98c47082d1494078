"""What the engineer chose: bars and links as written in the project file."""

from __future__ import annotations

from dataclasses import dataclass

from detailer.values import EndForm, Face


@dataclass(frozen=True, slots=True)
class BarGroup:
    """So many bars of one size."""

    count: int
    dia: int  # [mm]


@dataclass(frozen=True, slots=True, kw_only=True)
class ChosenBars:
    """One `[[beam.bars]]` table. Either `spans` or `support` is given, never both.

    `face` is TOP or BOTTOM, or NONE for side bars (counted per face). `stop` is measured
    inside the faces, `reach` past the faces; None where the engineer left it to the tool,
    and `math.inf` for "end".
    """

    face: Face
    groups: tuple[BarGroup, ...]
    spans: tuple[int, int] | None = None  # first and last span, 1-based
    support: int | None = None  # index into Beam.supports
    layer: int | None = None  # 1 is the outermost
    stop: tuple[float | None, float | None] = (None, None)
    reach: tuple[float | None, float | None] = (None, None)
    ends: tuple[EndForm | None, EndForm | None] = (None, None)
    laps: tuple[float, ...] | None = None  # middles, along the line from its first support [mm]
    line: int = 0  # where it stands in the project file

    @property
    def count(self) -> int:
        """Return the number of bars."""
        return sum(group.count for group in self.groups)


@dataclass(frozen=True, slots=True, kw_only=True)
class LinkZone:
    """A stretch of links of one kind; `length` None takes what is left of the span."""

    legs: int
    dia: int  # [mm]
    spacing: float  # [mm]
    length: float | None = None  # from the support face [mm]


@dataclass(frozen=True, slots=True, kw_only=True)
class ChosenLinks:
    """One `[[beam.links]]` table: the zones of a span, left to right."""

    span: int  # 1-based
    zones: tuple[LinkZone, ...]
    line: int = 0
