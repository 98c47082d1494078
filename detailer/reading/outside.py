"""What may be written one day and is not built yet: refused by name, never ignored."""

from __future__ import annotations

from collections.abc import Mapping
from types import MappingProxyType

CHOOSING = "choosing bars is not built yet"
"""Why a beam without bars or links is refused."""

_BUNDLES = ("bundled bars are not built yet", "Write single bars")
_COUPLERS = ("couplers are not built yet", "Write laps")
_BENT_UP = ("bent-up bars are not built yet", "Write straight bars and links")
_OPENINGS = ("openings are not built yet", "Take the key out and detail the opening by hand")

OUTSIDE: Mapping[str, tuple[str, str]] = MappingProxyType(
    {
        "hold": ("holding decisions is not built yet", "Take the table out"),
        "accept": ("accepting findings is not built yet", "Take the table out"),
        "cost": (CHOOSING, "Take cost out and write the bars chosen"),
        "steel": (
            f"required areas are not built yet: {CHOOSING}",
            "Write moment and shear, loads or a table of stations, and the bars chosen",
        ),
        "beam": (
            "a beam on a beam is not built yet",
            "Write column = or wall = for what it rests on",
        ),
        "bundle": _BUNDLES,
        "bundles": _BUNDLES,
        "bundled": _BUNDLES,
        "coupler": _COUPLERS,
        "couplers": _COUPLERS,
        "bent_up": _BENT_UP,
        "bent-up": _BENT_UP,
        "bentup": _BENT_UP,
        "cranked": _BENT_UP,
        "opening": _OPENINGS,
        "openings": _OPENINGS,
    }
)
"""Problem and remedy by key."""
