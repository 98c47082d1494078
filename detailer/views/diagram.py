"""Moments asked for and resisted along a beam, aligned with its elevation.

Sagging is drawn below the axis and hogging above, on the side where the steel is.
"""

from __future__ import annotations

from bisect import bisect_left
from collections.abc import Iterator
from dataclasses import dataclass
from itertools import pairwise

from detailer.drawing.primitives import XY, Align, Path, Pen, Primitive
from detailer.views.elevation import Stage
from detailer.views.kit import TEXT, Kit
from detailer.views.labels import Wish, set_row

HEIGHT = 24.0
"""From the greatest hogging to the greatest sagging value. [mm on paper]"""

FLAT = 0.5e6
"""Moments below this are not labelled. [N·mm]"""


@dataclass(frozen=True, slots=True, kw_only=True)
class Curves:
    """Moments by place; resistance empty where nothing is to be shown. [mm, N·mm]"""

    xs: tuple[float, ...]
    most: tuple[float, ...]  # greatest sagging the design asks for
    least: tuple[float, ...]  # greatest hogging, negative
    at: tuple[float, ...] = ()  # places of the resistance
    sagging: tuple[float, ...] = ()
    hogging: tuple[float, ...] = ()  # magnitudes


@dataclass(frozen=True, slots=True)
class _Scale:
    """Moments to true millimetres of the picture."""

    unit: float

    def y(self, moment: float) -> float:
        return -moment * self.unit


def diagram_items(stage: Stage, curves: Curves) -> tuple[Primitive, ...]:
    """Return envelope, resistance, axis, cut-offs and the values at peaks.

    Parameters
    ----------
    stage : Stage
        The elevation it is aligned with.
    curves : Curves
        What to draw.
    """
    kit = stage.kit
    up = max((*(-m for m in curves.least), *curves.hogging, 0.0))
    down = max((*curves.most, *curves.sagging, 0.0))
    scale = _Scale(kit.mm(HEIGHT) / max(up + down, 1.0))
    return (
        *_axis(stage, kit),
        *_cut_offs(stage, curves, scale),
        *_lines(curves, scale, kit),
        *_peaks(stage, curves, scale),
        *_legend(stage, curves, scale.y(-up) + kit.mm(7.5)),
    )


def _axis(stage: Stage, kit: Kit) -> Iterator[Path]:
    yield kit.line((stage.x0, 0.0), (stage.x1, 0.0), pen=Pen.OUTLINE)
    tall = kit.mm(1.5)
    for x in sorted(x for pair in stage.supports for x in pair):
        yield kit.line((x, -tall), (x, tall), pen=Pen.OUTLINE)


def _lines(curves: Curves, scale: _Scale, kit: Kit) -> Iterator[Path]:
    for ms in (curves.most, curves.least):
        yield from _curve(curves.xs, ms, Pen.ENVELOPE, scale, kit)
    for ms in (curves.sagging, tuple(-m for m in curves.hogging)):
        yield from _curve(curves.at, ms, Pen.RESISTANCE, scale, kit)


def _curve(
    xs: tuple[float, ...], moments: tuple[float, ...], pen: Pen, scale: _Scale, kit: Kit
) -> Iterator[Path]:
    points = tuple((round(x, 1), round(scale.y(m), 1)) for x, m in zip(xs, moments, strict=True))
    if len(points) > 1:
        yield Path(points=_thinned(points), pen=pen, tag=kit.named(""))


def _thinned(points: tuple[XY, ...]) -> tuple[XY, ...]:
    """Return points without those on the straight between their neighbours."""
    kept = [points[0]]
    for here, after in pairwise(points[1:]):
        (x0, y0), (x1, y1), (x2, y2) = kept[-1], here, after
        if abs((x1 - x0) * (y2 - y0) - (x2 - x0) * (y1 - y0)) > 0.5 * max(abs(x2 - x0), 1.0):
            kept.append(here)
    return (*kept, points[-1])


def value_at(xs: tuple[float, ...], values: tuple[float, ...], x: float) -> float:
    """Return the value nearest to a place; zero where there are none.

    Parameters
    ----------
    xs : tuple of float
        Places, ascending. [mm]
    values : tuple of float
        Values at them.
    x : float
        Where. [mm]
    """
    if not xs:
        return 0.0
    at = bisect_left(xs, x)
    near = range(max(at - 1, 0), min(at + 1, len(xs)))
    return values[min(near, key=lambda i: abs(xs[i] - x))]


def _cut_offs(stage: Stage, curves: Curves, scale: _Scale) -> Iterator[Path]:
    """Yield a thin upright at each end of a straight bar inside the spans."""
    kit = stage.kit
    for s in stage.strands:
        top = s.bar.face.value == "top"
        if s.bar.face.value not in ("top", "bottom"):
            continue
        for is_bent, x in zip(s.bent, (s.x0, s.x1), strict=True):
            inside = any(x0 + 1 < x < x1 - 1 for x0, x1 in stage.clear)
            if is_bent or not inside:
                continue
            values = tuple(-m for m in curves.hogging) if top else curves.sagging
            asked = curves.least if top else curves.most
            far = (scale.y(value_at(curves.at, values, x)), scale.y(value_at(curves.xs, asked, x)))
            reach = max(*far, kit.mm(3.0)) if top else min(*far, -kit.mm(3.0))
            line = kit.line((x, 0.0), (x, reach), pen=Pen.HIDDEN, tag=kit.tag(s.bar))
            yield line


def _peaks(stage: Stage, curves: Curves, scale: _Scale) -> Iterator[Primitive]:
    """Yield the greatest values: hogging at each face, sagging in each span."""
    kit = stage.kit
    above: list[tuple[float, float]] = []
    below: list[tuple[float, float]] = []
    for x0, x1 in stage.clear:
        inside = [i for i, x in enumerate(curves.xs) if x0 - 1.0 <= x <= x1 + 1.0]
        if not inside:
            continue
        for i, face in ((inside[0], x0), (inside[-1], x1)):
            if any(abs(face - edge) < 1.0 for pair in stage.supports for edge in pair):
                above.append((curves.xs[i], curves.least[i]))
        i = max(inside, key=lambda i: (curves.most[i], -i))
        below.append((curves.xs[i], curves.most[i]))
    top = max((scale.y(m) for m in (*curves.least, *(-h for h in curves.hogging))), default=0.0)
    low = min((scale.y(m) for m in (*curves.most, *curves.sagging)), default=0.0)
    yield from _values(stage, above, scale, top + kit.mm(2.5), way=1)
    yield from _values(stage, below, scale, low - kit.mm(2.5), way=-1)


def _values(
    stage: Stage, peaks: list[tuple[float, float]], scale: _Scale, edge: float, *, way: int
) -> Iterator[Primitive]:
    kit = stage.kit
    shown = [(x, m) for x, m in peaks if abs(m) > FLAT]
    texts = [f"{m / 1e6:.0f}".replace("-", "−") for _, m in shown]
    wishes = tuple(
        Wish(low=x, high=x, width=kit.width(t)) for (x, _), t in zip(shown, texts, strict=True)
    )
    ends = stage.x0 - kit.mm(5.0), stage.x1 + kit.mm(5.0)
    places = set_row(wishes, left=ends[0], right=ends[1], gap=kit.mm(1.5))
    base = edge if way > 0 else edge - kit.mm(TEXT)
    for (x, m), text, at in zip(shown, texts, places, strict=True):
        tag = kit.named("")
        yield kit.text((at, base), text)
        yield from kit.leader((at, edge - way * kit.mm(0.7)), (x, scale.y(m)), tag=tag)


def _legend(stage: Stage, curves: Curves, y: float) -> Iterator[Primitive]:
    kit = stage.kit
    x = stage.x0
    for pen, words in (
        (Pen.ENVELOPE, "envelope, kN·m, sagging below"),
        (Pen.RESISTANCE, "resistance of what is placed"),
        (Pen.HIDDEN, "bar ends"),
    ):
        if pen is Pen.RESISTANCE and not curves.at:
            continue
        middle = y + kit.mm(TEXT / 2)
        yield kit.line((x, middle), (x + kit.mm(9.0), middle), pen=pen)
        yield kit.text((x + kit.mm(10.5), y), words, align=Align.LEFT)
        x += kit.mm(10.5 + 8.0) + kit.width(words)
