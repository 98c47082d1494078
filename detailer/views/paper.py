"""Sheets of paper a beam may be drawn on, from small to large."""

from __future__ import annotations

from dataclasses import dataclass

from detailer.drawing.border import BINDING, EDGE
from detailer.drawing.primitives import XY
from detailer.views.pack import Room

MARGIN = 12.0
"""From the edge of the paper to what is drawn; the frame lies between. [mm]"""

BINDING_MARGIN = 22.0
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
    return Room(BINDING_MARGIN, MARGIN, w - MARGIN, h - MARGIN)


TITLE_BLOCK = (185.0, 60.0)
"""Width and height of the title block. [mm]"""


def frame_of(paper: Paper) -> Room:
    """Return the frame: wider at the left, where sheets are bound.

    Parameters
    ----------
    paper : Paper
        The paper.
    """
    w, h = paper.size
    return Room(BINDING, EDGE, w - EDGE, h - EDGE)


def title_corner(paper: Paper) -> XY:
    """Return the lower left corner of the title block.

    Parameters
    ----------
    paper : Paper
        The paper.
    """
    frame = frame_of(paper)
    return frame.x1 - TITLE_BLOCK[0], frame.y0


def title_room(paper: Paper) -> Room:
    """Return what the title block takes, with some air.

    Parameters
    ----------
    paper : Paper
        The paper.
    """
    x, y = title_corner(paper)
    return Room(x - 4.0, y, x + TITLE_BLOCK[0], y + TITLE_BLOCK[1] + 4.0)
