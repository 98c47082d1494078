"""What shape a bar is: legs and bends read off its geometry, told in words and letters.

Code words are our own: the letters of IS 2502's shape tables were not seen. Dimensions of main
bars are outside ones, those of links and ties inside ones, in whole millimetres.
"""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass
from enum import Enum
from math import radians, sin, tan

from detailer.cage.bar import Bar, Shape
from detailer.schedule.form import SAME, Form, form_of
from detailer.values import Role

STANDARD = "IS 2502"
RIGHT = 90.0
LETTERS = "ABCDEFGJKLMNPQSU"  # H, I, O, R, T, V, W are not letters of legs
AS_DRAWN = "bent as drawn"
SQUARE = 0.5
"""A bend counts as a right angle within this. [degrees]"""


class Family(Enum):
    """How a bar is measured, and by which rule its length is found."""

    BENT = "bent"  # outside dimensions
    CLOSED = "closed link"  # inside dimensions
    TIE = "cross tie"  # inside dimension


class Kind(Enum):
    """What a bend is to the bender."""

    SQUARE = "right angle"
    HOOK = "hook"  # 180°: two corners of the cage, one bend
    SLANT = "slant"  # any other angle


@dataclass(frozen=True, slots=True)
class Bend:
    """One bend between two legs."""

    kind: Kind
    angle: float  # [degrees]
    radius: float  # inner [mm]


@dataclass(frozen=True, slots=True, kw_only=True)
class Parts:
    """A bar as the bender measures it.

    `legs` has one length more than `bends` for bent bars: outside where a leg meets a right
    angle or a hook, along the axis where it meets a slant. Of a closed link they are the two
    inside dimensions, of a tie the one; `tails` are the straights beyond the end hooks.
    """

    family: Family
    legs: tuple[float, ...]  # [mm]
    bends: tuple[Bend, ...]
    twists: tuple[float, ...]  # from bend to bend [degrees]
    tails: tuple[float, ...] = ()  # [mm]


def parts_of(bar: Bar) -> Parts:
    """Return a bar as the bender measures it, legs exact.

    Parameters
    ----------
    bar : Bar
        The bar.
    """
    form = form_of(bar)
    if bar.role in (Role.LINK, Role.TIE):
        found = _closed(form, bar.dia) or _tie(form, bar.dia)
        if found is not None:
            return found
    one, other = _bent(form, bar.dia), _bent(form.turned(), bar.dia)
    return min(one, other, key=_reading)


def shape_of(parts: Parts) -> Shape:
    """Return the words and whole-millimetre dimensions of a bar.

    Parameters
    ----------
    parts : Parts
        As :func:`parts_of` finds them.
    """
    match parts.family:
        case Family.CLOSED:
            code = f"closed link, {_hooks(parts)} hooks"
        case Family.TIE:
            opposite = ", opposite" if _opposite(parts.twists[0]) else ""
            code = f"cross tie, {_hooks(parts)} hooks{opposite}"
        case Family.BENT:
            code = _words(parts)
    return Shape(STANDARD, code, tuple(_dimensions(parts)))


def _reading(parts: Parts) -> tuple[tuple[int, ...], ...]:
    """Return what decides from which end a bar is read: bends first, then the shorter end."""
    kinds = list(Kind)
    return (
        tuple(kinds.index(bend.kind) for bend in parts.bends),
        tuple(round(leg) for leg in parts.legs),
        tuple(round(twist) for twist in parts.twists),
    )


def _bent(form: Form, dia: float) -> Parts:
    """Return legs and bends, the two corners of a 180° hook as one bend."""
    edges, turns, twists = form.legs, form.turns, form.twists
    legs, bends, between = [edges[0]], [], []
    hook_open = False
    for i, turn in enumerate(turns):
        square = abs(turn - RIGHT) <= SQUARE
        if hook_open:
            hook_open = False
            legs.append(edges[i + 1] + dia / 2)
            continue
        if i:
            between.append(twists[i - 1])
        radius = form.mandrels[i] / 2
        if square:
            legs[-1] += dia / 2
        if square and _is_hook(form, i, dia):
            bends.append(Bend(Kind.HOOK, 180.0, radius))
            hook_open = True
            continue
        kind = Kind.SQUARE if square else Kind.SLANT
        bends.append(Bend(kind, RIGHT if square else turn, radius))
        legs.append(edges[i + 1] + (dia / 2 if square else 0.0))
    return Parts(family=Family.BENT, legs=tuple(legs), bends=tuple(bends), twists=tuple(between))


def _is_hook(form: Form, i: int, dia: float) -> bool:
    """Return whether corners i and i + 1 are the two halves of one 180° bend."""
    if i + 1 >= len(form.mandrels) or abs(form.turns[i + 1] - RIGHT) > SQUARE:
        return False
    across = form.mandrels[i] + dia
    return abs(form.legs[i + 1] - across) <= SAME and abs(form.twists[i]) <= SQUARE


def _closed(form: Form, dia: float) -> Parts | None:
    """Return the inside dimensions of a closed rectangular link; None if it is none."""
    turns = form.turns
    if len(turns) != 5 or any(abs(t - RIGHT) > SQUARE for t in turns[1:4]):
        return None
    if any(abs(t) > SQUARE for t in form.twists) or abs(turns[0] - turns[4]) > SQUARE:
        return None
    if len({round(m) for m in form.mandrels}) > 1:
        return None
    ends = _end_bends(form, dia)
    inside = sorted((form.legs[2] - dia, form.legs[3] - dia))
    return Parts(
        family=Family.CLOSED,
        legs=tuple(inside),
        bends=tuple(ends),
        twists=(0.0,),
        tails=_tails(form, dia),
    )


def _tie(form: Form, dia: float) -> Parts | None:
    """Return the inside dimension of a tie with a hook at each end; None if it is none."""
    if len(form.turns) != 2 or min(form.turns) < RIGHT - SQUARE:
        return None
    flat = abs(form.twists[0]) <= SQUARE or _opposite(form.twists[0])
    if not flat or abs(form.mandrels[0] - form.mandrels[1]) > SAME:
        return None
    axis = (form.mandrels[0] + dia) / 2
    outline = form.legs[1] - sum(_beyond(turn, axis) for turn in form.turns)
    return Parts(
        family=Family.TIE,
        legs=(outline - dia,),
        bends=tuple(_end_bends(form, dia)),
        twists=form.twists,
        tails=_tails(form, dia),
    )


def _end_bends(form: Form, dia: float) -> list[Bend]:
    turns = (form.turns[0], form.turns[-1])
    kinds = (Kind.SQUARE if abs(t - RIGHT) <= SQUARE else Kind.SLANT for t in turns)
    return [
        Bend(kind, round(turn), form.mandrels[0] / 2)
        for kind, turn in zip(kinds, turns, strict=True)
    ]


def _beyond(turn: float, axis: float) -> float:
    """Return how far the corner of a bend lies outside the axis's own outline. [mm]"""
    return axis * tan_half(turn) - axis if turn > RIGHT else 0.0


def tan_half(angle: float) -> float:
    """Return the tangent of half an angle. [degrees]"""
    return tan(radians(angle) / 2)


def _tails(form: Form, dia: float) -> tuple[float, float]:
    first, last = form.turns[0], form.turns[-1]
    axis = (form.mandrels[0] + dia) / 2
    return form.legs[0] - axis * tan_half(first), form.legs[-1] - axis * tan_half(last)


def _opposite(twist: float) -> bool:
    return abs(abs(twist) - 180) <= SQUARE


def _hooks(parts: Parts) -> str:
    angles = sorted({round(bend.angle) for bend in parts.bends})
    return " and ".join(f"{angle}°" for angle in angles)


def cranks_of(parts: Parts) -> tuple[int, ...]:
    """Return the index of the first bend of each crank: two equal slants that undo each other.

    Parameters
    ----------
    parts : Parts
        A bent bar.
    """
    found: list[int] = []
    bends = parts.bends
    for i in range(len(bends) - 1):
        pair = bends[i], bends[i + 1]
        slants = all(bend.kind is Kind.SLANT and bend.angle < RIGHT for bend in pair)
        free = not found or found[-1] < i - 1
        undone = abs(pair[0].angle - pair[1].angle) <= SQUARE and _opposite(parts.twists[i])
        if slants and free and undone:
            found.append(i)
    return tuple(found)


def _words(parts: Parts) -> str:
    """Return the form of a bent bar in words; a form without a name is bent as drawn."""
    kinds = [bend.kind for bend in parts.bends]
    cranks = cranks_of(parts)
    slanted = {i for first in cranks for i in (first, first + 1)}
    rest = [i for i in range(len(kinds)) if i not in slanted]
    ends = [kinds[i] for i in rest]
    at_ends = all(i in (0, len(kinds) - 1) for i in rest)
    if len(ends) > 2 or not at_ends or Kind.SLANT in ends:
        return AS_DRAWN
    base = END_WORDS[tuple(ends)]
    if len(ends) == 2 and not cranks and _opposite(parts.twists[0]):
        base += ", opposite"
    if not cranks:
        return base
    times = (
        ("cranked", "cranked twice")[len(cranks) - 1]
        if len(cranks) < 3
        else (f"cranked {len(cranks)} times")
    )
    return times if base == "straight" else f"{base}, {times}"


END_WORDS = {
    (): "straight",
    (Kind.SQUARE,): "bend one end",
    (Kind.HOOK,): "hook one end",
    (Kind.SQUARE, Kind.SQUARE): "bends both ends",
    (Kind.SQUARE, Kind.HOOK): "bend and hook",
    (Kind.HOOK, Kind.HOOK): "hooks both ends",
}


def _dimensions(parts: Parts) -> Iterator[tuple[str, float]]:
    """Yield letters with whole millimetres (angles: whole degrees)."""
    match parts.family:
        case Family.CLOSED:
            yield from zip("AE", (float(round(leg)) for leg in parts.legs), strict=True)
        case Family.TIE:
            yield "A", float(round(parts.legs[0]))
        case Family.BENT:
            yield from ((_letter(i), float(round(leg))) for i, leg in enumerate(parts.legs))
            yield from _angles(parts)
    yield from _numbered("R", [bend.radius for bend in parts.bends])
    yield from _numbered("T", list(parts.tails))


def _letter(number: int) -> str:
    """Return A, B, C …, and past the alphabet A2, B2, …"""
    again, at = divmod(number, len(LETTERS))
    return LETTERS[at] + (str(again + 1) if again else "")


def _angles(parts: Parts) -> Iterator[tuple[str, float]]:
    """Yield rises of cranks, and what angles the words leave open."""
    words, cranks = _words(parts), cranks_of(parts)
    if words == AS_DRAWN:
        yield from _listed("V", [bend.angle for bend in parts.bends])
        yield from _listed("W", list(parts.twists))
        return
    rises = [parts.legs[i + 1] * sin(radians(parts.bends[i].angle)) for i in cranks]
    yield from _listed("H", rises)
    between = [t for i, t in enumerate(parts.twists) if i not in cranks]
    if any(abs(t) > SQUARE for t in between) and not words.endswith("opposite"):
        yield from _listed("W", between)


def _listed(letter: str, values: list[float]) -> Iterator[tuple[str, float]]:
    """Yield values under one letter, numbered where there are several."""
    for i, value in enumerate(values, start=1):
        yield (letter if len(values) == 1 else f"{letter}{i}"), float(round(value))


def _numbered(letter: str, values: list[float]) -> Iterator[tuple[str, float]]:
    """Yield one value where all agree in whole millimetres, otherwise each."""
    yield from _listed(letter, values[:1] if len({round(v) for v in values}) == 1 else values)
