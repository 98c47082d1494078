"""Sheets of paper a beam may be drawn on, from small to large."""

from __future__ import annotations

from dataclasses import dataclass

from detailer.drawing.primitives import XY
from detailer.views.pack import Room

MARGIN = 12.0
"""From the edge of the paper to what is drawn; the frame lies between. [mm]"""

BINDING = 22.0
"""The same at the left, where sheets are bound. [mm]"""


@dataclass(frozen=True, slots=True)
class Paper:
    """A size of paper with the scale of the elevation tried on it."""

    name: str
    size: XY  # [mm]
    scale: float


A3, A2, A1, A0 = (420.0, 297.0), (594.0, 420.0), (841.0, 594.0), (1189.0, 841.0)

PAPERS = (
    *(Paper("A3", A3, scale) for scale in (25.0, 40.0, 50.0)),
    *(Paper("A2", A2, scale) for scale in (25.0, 40.0, 50.0)),
    *(Paper("A1", A1, scale) for scale in (25.0, 40.0, 50.0)),
    *(Paper("A0", A0, scale) for scale in (50.0, 75.0, 100.0)),
)


def space_of(paper: Paper) -> Room:
    """Return what may be drawn on.

    Parameters
    ----------
    paper : Paper
        The paper.
    """
    w, h = paper.size
    return Room(BINDING, MARGIN, w - MARGIN, h - MARGIN)


TITLE_BLOCK = (185.0, 60.0)
"""Width and height of the title block. [mm]"""


def title_room(paper: Paper) -> Room:
    """Return where the title block lies: in the lower right corner, with some air.

    Parameters
    ----------
    paper : Paper
        The paper.
    """
    space = space_of(paper)
    width, height = TITLE_BLOCK
    return Room(space.x1 - width - 3.0, space.y0, space.x1, space.y0 + height + 3.0)
