"""Plain values that every layer speaks: what a rule demands, and the closed vocabularies."""

from __future__ import annotations

from enum import Enum
from typing import NamedTuple

CAUTION = (
    "Draft: not for construction until a licensed engineer has checked it "
    "against the local codes and the design."
)
"""What every sheet, schedule and report says."""

TOUCH = 0.5
"""Two bars penetrate when they overlap by more than this. [mm]"""

COVER_SLACK = 0.1
"""Cover counts as kept when it is short by no more than this. [mm]"""

GAP_SLACK = 0.1
"""A clear distance counts as kept when it is short by no more than this. [mm]"""


class Required(NamedTuple):
    """What a code demands, where it says so, and which of its terms governs."""

    value: float
    clause: str
    because: str


class Severity(Enum):
    """How much a finding matters, worst first."""

    UNSAFE = "unsafe"
    UNBUILDABLE = "unbuildable"
    COSTLY = "costly"
    UNCLEAR = "unclear"

    @property
    def rank(self) -> int:
        """Return 0 for the worst."""
        return list(Severity).index(self)

    @property
    def blocks(self) -> bool:
        """Return whether `detailer check` must exit 1 for it."""
        return self in (Severity.UNSAFE, Severity.UNBUILDABLE)


class Face(Enum):
    """The face of the member a bar belongs to; left is +y, seen along +x."""

    TOP = "top"
    BOTTOM = "bottom"
    LEFT = "left"
    RIGHT = "right"
    NONE = "none"


class Role(Enum):
    """What a bar is for."""

    MAIN = "main"
    HANGER = "hanger"
    SIDE = "side"
    LINK = "link"
    TIE = "tie"
    SPACER = "spacer"


class SupportKind(Enum):
    """What a beam rests on."""

    COLUMN = "column"
    WALL = "wall"
    BEAM = "beam"


class ContactKind(Enum):
    """A contact between two bars that is meant."""

    CORNER = "corner"
    LAP = "lap"
    CROSSING = "crossing"
    BUNDLE = "bundle"


class EndForm(Enum):
    """How a bar ends."""

    STRAIGHT = "straight"
    BEND = "bend"
    HOOK = "hook"


class FlangeSide(Enum):
    """Where the slab lies, seen along +x."""

    BOTH = "both"
    LEFT = "left"
    RIGHT = "right"


class Exposure(Enum):
    """Exposure condition of IS 456:2000, Table 3."""

    MILD = "mild"
    MODERATE = "moderate"
    SEVERE = "severe"
    VERY_SEVERE = "very severe"
    EXTREME = "extreme"
