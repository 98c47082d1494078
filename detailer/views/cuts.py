"""Where sections are cut: at faces, at midspan, in laps, and wherever what is cut changes."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass
from itertools import pairwise

from detailer.cage.bar import Cage
from detailer.cage.cut import CutBar, bars_at, links_at, outline_at
from detailer.cage.line import Straight, centre_line
from detailer.values import ContactKind, Role

FROM_FACE = 150.0
"""A section at a face is cut this far inside the span, before the first change. [mm]"""

SHORT = 100.0
"""A stretch shorter than this between two bar ends gets no section of its own. [mm]"""

STUBBY = 1000.0
"""A span or overhang shorter than this is not cut at its middle as a matter of course. [mm]"""

LEVEL = 1.0 - 1e-9
"""A bar in a crank has a direction with less of x than this."""


@dataclass(frozen=True, slots=True)
class Cut:
    """A place where a section is cut; equal ones have the same letter."""

    letter: str
    x: float


@dataclass(frozen=True, slots=True)
class _Place:
    """Where a section might be cut; `wanted` ones are, however equal to another."""

    span: int
    x: float
    wanted: bool


def cuts_of(cage: Cage, clear: tuple[tuple[float, float], ...]) -> tuple[Cut, ...]:
    """Return where a beam is cut, from left to right.

    At faces and at midspan always; elsewhere where a lap, or another set of sizes, is not
    yet shown in that span.

    Parameters
    ----------
    cage : Cage
        The cage, its bars marked.
    clear : tuple of (float, float)
        Each span between the faces of its supports. [mm]
    """
    letters: dict[object, str] = {}
    found: list[tuple[float, object]] = []
    shown: set[tuple[int, object]] = set()
    for place in sorted(_places(cage, clear), key=lambda p: (not p.wanted, p.x)):
        bars = bars_at(cage, place.x)
        same = place.span, _stock(cage, place.x, bars)
        if not place.wanted and same in shown:
            continue
        seen = signature(cage, place.x, bars)
        if place.wanted or seen not in letters:
            letters[seen] = ""
            shown.add(same)
            found.append((place.x, seen))
    for _, seen in sorted(found, key=lambda f: f[0]):
        if not letters[seen]:
            letters[seen] = letter(sum(1 for name in letters.values() if name))
    return tuple(Cut(letters[seen], x) for x, seen in sorted(found, key=lambda f: f[0]))


def letter(number: int) -> str:
    """Return the letter of a section, I and O left out; AA follows Z.

    Parameters
    ----------
    number : int
        From 0.
    """
    letters = "ABCDEFGHJKLMNPQRSTUVWXYZ"
    more, rest = divmod(number, len(letters))
    return letter(more - 1) + letters[rest] if more else letters[rest]


def signature(cage: Cage, x: float, bars: tuple[CutBar, ...]) -> object:
    """Return what makes two sections equal: concrete, bars by mark and place, kind of links.

    Parameters
    ----------
    cage : Cage
        The cage.
    x : float
        Where it is cut. [mm]
    bars : tuple of CutBar
        What is cut there.
    """
    outline = outline_at(cage.prisms, x)
    top = outline.bounds[3] if not outline.is_empty else 0.0
    shape = tuple(round(v) for v in (*outline.bounds[:3:2], outline.area)) if top == top else ()
    marks = tuple(sorted((c.bar.name, round(c.y), round(c.z - top)) for c in bars if c.square))
    links = tuple(sorted({bar.name for bar, _ in links_at(cage, x)}))
    return shape, marks, links


def _stock(cage: Cage, x: float, cut: tuple[CutBar, ...]) -> object:
    """Return the sizes cut at each face and layer, and the laps they are cut in."""
    bars = (c.bar for c in cut if c.square)
    sizes = tuple(sorted((bar.face.value, bar.layer, bar.dia) for bar in bars))
    laps = tuple(
        (contact.a, contact.b)
        for contact in cage.contacts
        if contact.kind is ContactKind.LAP and contact.x0 < x < contact.x1
    )
    return sizes, tuple(sorted(laps))


def _places(cage: Cage, clear: tuple[tuple[float, float], ...]) -> Iterator[_Place]:
    """Yield every place that a section might show."""
    events = sorted(set(_events(cage)))
    faces = [edge for s in cage.supports for edge in (s.x - s.width / 2, s.x + s.width / 2)]
    for span, (x0, x1) in enumerate(clear):
        stops = [x0, *(x for x in events if x0 + 1 < x < x1 - 1), x1]
        middle = (x0 + x1) / 2
        for a, b in pairwise(stops):
            if a <= middle < b and x1 - x0 >= STUBBY:
                yield _Place(span, middle if _level_at(cage, middle) else (a + b) / 2, True)
            elif b - a >= SHORT and _level_at(cage, (a + b) / 2):
                yield _Place(span, (a + b) / 2, False)
        if any(abs(x0 - face) < 1.0 for face in faces):
            yield _Place(span, x0 + min(FROM_FACE, (stops[1] - x0) / 2), True)
        if any(abs(x1 - face) < 1.0 for face in faces):
            yield _Place(span, x1 - min(FROM_FACE, (x1 - stops[-2]) / 2), True)


def _events(cage: Cage) -> Iterator[float]:
    """Yield every x where the set of bars cut, or the place of one of them, changes."""
    for bar in cage.bars:
        if bar.role in (Role.LINK, Role.TIE, Role.SPACER):
            continue
        line = centre_line(bar)
        ends: list[float] = []
        for piece in line.segments:
            if isinstance(piece, Straight):
                (xa, ya, za), (xb, yb, zb) = piece.start, piece.end
                if abs(xa - xb) > max(abs(ya - yb), abs(za - zb)):
                    ends += [xa, xb]
        for dx, _, _ in bar.placings:
            yield from (round(x + dx, 1) for x in ends)


def _level_at(cage: Cage, x: float) -> bool:
    return all(abs(c.along[0]) > LEVEL for c in bars_at(cage, x))
