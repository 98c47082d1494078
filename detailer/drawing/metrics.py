"""Widths of texts, the same on every machine: advances of one open condensed sans.

The table beside this module holds, for the regular and the bold face, advances in 1/2048 em and
the characters that have them. It is read from the font's own tables, never from the machine's.
"""

from __future__ import annotations

import json
from functools import cache, lru_cache
from importlib.resources import files
from types import MappingProxyType
from typing import NamedTuple

CAPITALS = 0.729
"""Height of capitals. [em]"""


class Face(NamedTuple):
    """Advances of one face. [em]"""

    advance: MappingProxyType[str, float]
    widest: float


@cache
def _face(name: str) -> Face:
    data = json.loads(files(__package__).joinpath("advances.json").read_text(encoding="utf-8"))
    em = float(data["em"])
    steps = {char: float(step) / em for step, chars in data[name].items() for char in chars}
    return Face(MappingProxyType(steps), max(steps.values()))


@lru_cache(maxsize=4096)
def width(text: str, height: float, *, bold: bool = False) -> float:
    """Return the width of a text; a character the table lacks counts as the widest.

    Parameters
    ----------
    text : str
        One line.
    height : float
        Of its capitals. [mm]
    bold : bool
        Whether it is bold.

    Returns
    -------
    float
        [mm]
    """
    face = _face("bold" if bold else "regular")
    step, widest = face.advance, face.widest
    return sum(step.get(char, widest) for char in text) * height / CAPITALS
