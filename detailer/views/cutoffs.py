"""Chains of cut-offs and laps, from face to face, set so that no line runs through a number."""

from __future__ import annotations

from collections.abc import Iterator
from itertools import pairwise, permutations
from typing import TypeAlias

from detailer.drawing.primitives import Dimension
from detailer.values import Face
from detailer.views.elevation import Stage
from detailer.views.kit import TEXT, Kit
from detailer.views.stops import laps_of, rows_of, stops_between

ROW = 6.0
"""From one dimension line to the next. [mm on paper]"""

EXTENSION = 2.0
"""Length of an extension line that does not reach the beam. [mm on paper]"""

MOST_ORDERS = 4
"""Up to so many chains are tried in every order."""

Row: TypeAlias = tuple[tuple[float, str], ...]
"""Stops of a chain, each with what lies to its right."""

Line: TypeAlias = tuple[Row, ...]
"""Chains that stand on one line."""


def chain(
    stops: tuple[float, ...],
    line: float,
    kit: Kit,
    *,
    starts: tuple[float, ...] | None = None,
    texts: tuple[str, ...] = (),
) -> Iterator[Dimension]:
    """Yield dimensions from stop to stop, at whole millimetres so that they close.

    Parameters
    ----------
    stops : tuple of float
        x, ascending; those within a millimetre of the one before are left out. [mm]
    line : float
        y of the dimension line. [mm]
    kit : Kit
        Member and scale.
    starts : tuple of float, optional
        y where the extension line of each stop begins; just above the line if absent. [mm]
    texts : tuple of str, optional
        Text of each dimension; its distance if absent or empty.
    """
    lead = line + kit.mm(EXTENSION)
    ends = starts if starts is not None else (lead,) * len(stops)
    points = [(float(round(x)), y) for x, y in zip(stops, ends, strict=True)]
    for i, (a, b) in enumerate(pairwise(points)):
        if b[0] - a[0] >= 1.0:
            text = texts[i] if i < len(texts) else ""
            yield Dimension(start=a, end=b, line=line, text=text, height=TEXT)


def cut_lines(stage: Stage, faces: tuple[Face, ...]) -> tuple[Line, ...]:
    """Return the chains of cut-offs and laps, from the beam outwards.

    Those that share no stretch stand on one line; the order of lines is the one in which
    fewest extension lines run through a number.

    Parameters
    ----------
    stage : Stage
        The elevation.
    faces : tuple of Face
        Which faces of the beam.
    """
    laps = laps_of(stage.cage, stage.strands, faces)
    rows: list[Row] = []
    for x0, x1 in stage.clear:
        stops = stops_between(stage.strands, laps, faces, x0, x1)
        rows += [row for row in rows_of((x0, x1), stops, laps) if row not in rows]
    lines: list[list[Row]] = []
    for row in rows:
        for line in lines:
            if all(row[0][0] >= r[-1][0] - 1.0 or row[-1][0] <= r[0][0] + 1.0 for r in line):
                line.append(row)
                break
        else:
            lines.append([row])
    found = tuple(tuple(line) for line in lines)
    if not 1 < len(found) <= MOST_ORDERS:
        return found
    return min(permutations(found), key=lambda order: _hits(stage, order))


def _hits(stage: Stage, order: tuple[Line, ...]) -> int:
    """Return how many extension lines run through numbers of lines nearer to the beam."""
    return sum(
        1
        for i, line in enumerate(order)
        for x in _stops(stage, line)
        if _crossed(stage, order[:i], x) is not None
    )


def _stops(stage: Stage, line: Line) -> set[float]:
    return {x for row in line for x, _ in row if not at_face(stage, x)}


def _crossed(stage: Stage, nearer: tuple[Line, ...], x: float) -> int | None:
    """Return the outermost line, counted from the beam, whose number an extension would cross."""
    kit = stage.kit
    for i in range(len(nearer) - 1, -1, -1):
        for row in nearer[i]:
            for (a, kind), (b, _) in pairwise(row):
                words = f"{b - a:.0f} lap" if kind == "lap" else f"{b - a:.0f}"
                if abs((a + b) / 2 - x) < kit.width(words) / 2 + kit.mm(0.6):
                    return i
    return None


def cut_items(
    stage: Stage, lines: tuple[Line, ...], reach: float, *, above: bool
) -> tuple[tuple[Dimension, ...], float]:
    """Return the chains above or below the beam, and y of the line after the last.

    The extension lines of stops come from the beam, unless a number is in the way; those of
    faces are short.

    Parameters
    ----------
    stage : Stage
        The elevation.
    lines : tuple of Line
        As :func:`cut_lines` gives them.
    reach : float
        How far from the beam the call-outs reach. [mm]
    above : bool
        Which side of the beam.
    """
    kit, way = stage.kit, 1 if above else -1
    first = reach + way * kit.mm(ROW - 1.5 if above else ROW)
    near = stage.high + kit.mm(1.0) if above else stage.low - kit.mm(1.0)
    items: list[Dimension] = []
    for i, line in enumerate(lines):
        at = first + way * kit.mm(ROW) * i
        for row in line:
            starts: list[float] = []
            for x, _ in row:
                hit = _crossed(stage, lines[:i], x)
                if at_face(stage, x):
                    starts.append(at - way * kit.mm(EXTENSION))
                elif hit is None:
                    starts.append(near)
                else:
                    over = TEXT + 1.4 if above else 0.6
                    starts.append(first + way * kit.mm(ROW * hit + over))
            texts = tuple("<> lap" if kind == "lap" else "" for _, kind in row)
            stops = tuple(x for x, _ in row)
            items += chain(stops, at, kit, starts=tuple(starts), texts=texts)
    return tuple(items), first + way * kit.mm(ROW) * len(lines)


def at_face(stage: Stage, x: float) -> bool:
    """Return whether a stop of a chain is the face of a support or the end of the beam.

    Parameters
    ----------
    stage : Stage
        The elevation.
    x : float
        The stop. [mm]
    """
    return any(abs(x - edge) < 1.0 for pair in (*stage.clear, *stage.supports) for edge in pair)
