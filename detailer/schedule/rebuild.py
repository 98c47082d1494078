"""From a scheduled shape back to a bar: what a bender makes who has nothing but the row."""

from __future__ import annotations

from dataclasses import dataclass
from math import asin, cos, degrees, radians, sin

from detailer.cage.bar import Point, Shape
from detailer.cage.vec import add, dot, times
from detailer.schedule.form import cross
from detailer.schedule.shapes import AS_DRAWN, END_WORDS, RIGHT, Kind, tan_half


@dataclass(frozen=True, slots=True)
class Step:
    """One leg along the axis, and the bend at its end (none after the last)."""

    edge: float  # from corner to corner [mm]
    twist: float = 0.0  # of this bend's plane against the one before [degrees]
    turn: float = 0.0  # [degrees]


def corners_of(shape: Shape, dia: float) -> tuple[Point, ...]:
    """Return the corners of the bar a shape describes, in axes of its own. [mm]

    Parameters
    ----------
    shape : Shape
        Code and dimensions as scheduled.
    dia : float
        Nominal diameter. [mm]
    """
    values = dict(shape.dimensions)
    if shape.code.startswith("closed link"):
        return _walk(_link_steps(shape, values, dia))
    if shape.code.startswith("cross tie"):
        return _walk(_tie_steps(shape, values, dia))
    return _walk(_bent_steps(shape, values, dia))


def _walk(steps: list[Step]) -> tuple[Point, ...]:
    """Walk along the legs, turning at each corner about the normal of its plane."""
    here: Point = (0.0, 0.0, 0.0)
    way: Point = (1.0, 0.0, 0.0)
    normal: Point = (0.0, 0.0, 1.0)
    corners = [here]
    for step in steps:
        here = add(here, way, step.edge)
        corners.append(here)
        normal = _rotated(normal, way, step.twist)
        way = _rotated(way, normal, step.turn)
    return tuple(corners)


def _rotated(v: Point, axis: Point, angle: float) -> Point:
    c, s = cos(radians(angle)), sin(radians(angle))
    spun = add(times(v, c), cross(axis, v), s)
    return add(spun, axis, dot(axis, v) * (1 - c))


def _link_steps(shape: Shape, values: dict[str, float], dia: float) -> list[Step]:
    hook = float(shape.code.split(",")[1].split("°")[0])
    axis = values["R"] + dia / 2
    a, e = values["A"] + dia, values["E"] + dia
    beyond = _beyond(hook, axis)
    tails = [t + axis * tan_half(hook) for t in _several(values, "T", 2)]
    turns = (hook, RIGHT, RIGHT, RIGHT, hook)
    edges = (tails[0], e + beyond, a, e, a + beyond)
    steps = [Step(edge, 0.0, turn) for edge, turn in zip(edges, turns, strict=True)]
    return [*steps, Step(tails[1])]


def _tie_steps(shape: Shape, values: dict[str, float], dia: float) -> list[Step]:
    words = shape.code.split(",")[1].replace("hooks", "").split("and")
    hooks = [float(word.strip().rstrip("°")) for word in words]
    first, last = hooks[0], hooks[-1]
    axis = values["R"] + dia / 2
    edge = values["A"] + dia + _beyond(first, axis) + _beyond(last, axis)
    tails = _several(values, "T", 2)
    twist = 180.0 if shape.code.endswith("opposite") else 0.0
    return [
        Step(tails[0] + axis * tan_half(first), 0.0, first),
        Step(edge, twist, last),
        Step(tails[1] + axis * tan_half(last)),
    ]


def _beyond(hook: float, axis: float) -> float:
    return axis * tan_half(hook) - axis if hook > RIGHT else 0.0


def _bent_steps(shape: Shape, values: dict[str, float], dia: float) -> list[Step]:
    legs = [value for letter, value in shape.dimensions if letter[0] not in "HRTVW"]
    angles, twists = _angles(shape, values, legs)
    radii = _several(values, "R", len(angles))
    steps: list[Step] = []
    full = [abs(angle) in (RIGHT, 180.0) for angle in angles]
    for i, leg in enumerate(legs):
        edge = leg
        edge -= dia / 2 if i and full[i - 1] else 0.0
        edge -= dia / 2 if i < len(angles) and full[i] else 0.0
        if i == len(angles):
            steps.append(Step(edge))
        elif angles[i] == 180.0:
            steps += [
                Step(edge, twists[i], RIGHT),
                Step(2 * radii[i] + dia, 0.0, RIGHT),
            ]
        else:
            steps.append(Step(edge, twists[i], angles[i]))
    return steps


def _angles(
    shape: Shape, values: dict[str, float], legs: list[float]
) -> tuple[list[float], list[float]]:
    """Return the angle of each bend, and the twist before it."""
    if shape.code == AS_DRAWN:
        angles = _several(values, "V", len(legs) - 1)
        return angles, [0.0, *_several(values, "W", len(angles) - 1)]
    words = shape.code.split(", ")
    base = "straight" if words[0].startswith("cranked") else words[0]
    ends = [180.0 if kind is Kind.HOOK else RIGHT for kind in _KINDS[base]]
    times_cranked = sum(1 for letter, _ in shape.dimensions if letter[0] == "H")
    rises = _several(values, "H", times_cranked)
    first = len(ends[:1])
    angles, inner = ends[:1], []
    for n, rise in enumerate(rises):
        slant = degrees(asin(rise / legs[first + 2 * n + 1]))
        inner += [len(angles)]
        angles += [slant, slant]
    angles += ends[1:]
    between = [i for i in range(len(angles) - 1) if i not in inner]
    given = _several(values, "W", len(between))
    twists = dict(zip(between, given, strict=True)) | dict.fromkeys(inner, 180.0)
    if words[-1] == "opposite":
        twists = {0: 180.0}
    return angles, [0.0, *(twists[i] for i in range(len(angles) - 1))]


_KINDS = {words: kinds for kinds, words in END_WORDS.items()}


def _several(values: dict[str, float], letter: str, count: int) -> list[float]:
    """Return the values of a letter: one for all, or numbered; 0 where the words say it all."""
    if f"{letter}1" in values:
        return [values[f"{letter}{n}"] for n in range(1, count + 1)]
    return [values.get(letter, 0.0)] * count
