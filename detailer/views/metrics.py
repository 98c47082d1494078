"""Widths of texts, the same on every machine: advances of one open condensed sans."""

from __future__ import annotations

from types import MappingProxyType

EM = 2048
CAPITALS = 0.729
"""Height of capitals. [em]"""

BOLD = 1.12
"""Bold texts are at most so much wider."""

_ADVANCES = (
    (506, "'"),
    (512, "ijl"),
    (543, "IJ"),
    (585, " ,.·’‘"),
    (621, "/:;\\|"),
    (648, "f"),
    (665, "-"),
    (719, "()[]"),
    (722, "t"),
    (738, "!²³"),
    (757, "r"),
    (847, '"'),
    (921, "*_`°–"),
    (954, "“”"),
    (960, "s"),
    (967, "z"),
    (978, "?"),
    (1013, "c"),
    (1026, "L"),
    (1060, "F"),
    (1067, "k"),
    (1090, "vxy"),
    (1109, "⌀πτ"),
    (1111, "P"),
    (1125, "TY"),
    (1127, "o"),
    (1129, "a"),
    (1134, "eé"),
    (1164, "E"),
    (1168, "hnuü"),
    (1170, "Sbdgpq"),
    (1172, "$0123456789{}"),
    (1174, "√"),
    (1208, "K"),
    (1215, "φ"),
    (1260, "AVΔ"),
    (1262, "XZ"),
    (1264, "B"),
    (1280, "R"),
    (1287, "C"),
    (1349, "U"),
    (1378, "N"),
    (1386, "H"),
    (1419, "D"),
    (1428, "G"),
    (1437, "&"),
    (1450, "OQØ"),
    (1507, "w"),
    (1544, "#+<=>^~±×−≥≤→"),
    (1590, "M"),
    (1751, "%"),
    (1795, "m"),
    (1822, "W"),
    (1843, "@—…"),
)

WIDEST = 1843
ADVANCE = MappingProxyType({char: step for step, chars in _ADVANCES for char in chars})
"""Advance of each character; any other counts as the widest. [1/2048 em]"""


def width(text: str, height: float, *, bold: bool = False) -> float:
    """Return the width of a text.

    Parameters
    ----------
    text : str
        One line.
    height : float
        Of its capitals. [mm]
    bold : bool
        Whether it is bold.
    """
    plain = sum(ADVANCE.get(char, WIDEST) for char in text) / EM * height / CAPITALS
    return plain * BOLD if bold else plain
