"""The distinct slices of a member: one place for every set of bars that lie side by side."""

from __future__ import annotations

from dataclasses import dataclass
from itertools import pairwise

from detailer.checks.case import Case
from detailer.strength.development import Rod
from detailer.values import Face, Role

SHORT = 15.0
"""Stretches shorter than this are no slice of their own. [mm]"""


@dataclass(frozen=True, slots=True)
class Station:
    """The bars along the member at one place."""

    x: float
    bars: tuple[Rod, ...]

    def layer(self, face: Face, layer: int) -> tuple[Rod, ...]:
        """Return the bars of one layer from right to left.

        Parameters
        ----------
        face : Face
            TOP or BOTTOM.
        layer : int
            1 is the outermost.
        """
        mine = [
            b for b in self.bars if b.face is face and b.layer == layer and b.role is not Role.SIDE
        ]
        return tuple(sorted(mine, key=lambda b: (b.at(self.x)[0], b.id)))

    def layers(self, face: Face) -> tuple[int, ...]:
        """Return the numbers of the layers of a face.

        Parameters
        ----------
        face : Face
            TOP or BOTTOM.
        """
        return tuple(sorted({b.layer for b in self.bars if b.face is face and b.layer > 0}))


def stations(case: Case) -> tuple[Station, ...]:
    """Return one place for each distinct set of bars at each support and in each span.

    Parameters
    ----------
    case : Case
        The member.
    """
    bars = [b for b in case.steel.bars if b.face in (Face.TOP, Face.BOTTOM)]
    edges = {s for support in case.beam.supports for s in (support.left, support.right)}
    edges |= {tip for bar in bars for tip in bar.tips}
    edges |= {p[0] for bar in bars for p in bar.line}
    seen: set[tuple[object, ...]] = set()
    found = []
    for x0, x1 in pairwise(sorted(edges)):
        if x1 - x0 < SHORT:
            continue
        x = (x0 + x1) / 2
        here = tuple(bar for bar in bars if bar.covers(x))
        spots = tuple(sorted((b.mark, *(round(v, 1) for v in b.at(x))) for b in here))
        key = (case.place(x), spots)
        if here and key not in seen:
            seen.add(key)
            found.append(Station(x, here))
    return tuple(found)
