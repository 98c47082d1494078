"""Are bars far enough apart for concrete to pass, on paper and over their ribs?"""

from __future__ import annotations

from collections.abc import Iterator
from itertools import pairwise
from math import hypot

from detailer.cage.ribs import TOUCHING, Spot, taken
from detailer.checks.case import Case
from detailer.checks.stations import Station, stations
from detailer.findings import Finding
from detailer.model import over_ribs
from detailer.rules import is456
from detailer.strength.development import Rod
from detailer.values import GAP_SLACK, Face, Required, Severity

CROWDED = 4 / 3
"""Gaps under so many aggregates are hard to concrete (a trade article; fault of practice)."""


def check(case: Case) -> Iterator[Finding]:
    """Yield bars of a face that lie too close, once a place.

    Parameters
    ----------
    case : Case
        The member.
    """
    seen: set[tuple[object, ...]] = set()
    for station in stations(case):
        for face in (Face.BOTTOM, Face.TOP):
            for finding in (*_sideways(case, station, face), *_upwards(case, station, face)):
                key = (finding.rule, finding.place, finding.bars)
                if key not in seen:
                    seen.add(key)
                    yield finding


def _groups(station: Station, row: tuple[Rod, ...]) -> list[list[Rod]]:
    """Return the bars of a layer with those that touch put together."""
    groups: list[list[Rod]] = []
    for bar in row:
        last = groups[-1] if groups else []
        if any(_clear(station.x, other, bar) < TOUCHING for other in last):
            last.append(bar)
        else:
            groups.append([bar])
    return groups


def _clear(x: float, a: Rod, b: Rod) -> float:
    (ya, za), (yb, zb) = a.at(x), b.at(x)
    return hypot(ya - yb, za - zb) - (a.dia + b.dia) / 2


def _sideways(case: Case, station: Station, face: Face) -> Iterator[Finding]:
    """Yield gaps of a layer below 26.3.2, below it over ribs, or barely passing."""
    aggregate = case.cage.aggregate
    for layer in station.layers(face):
        groups = _groups(station, station.layer(face, layer))
        between = [
            (min(_clear(station.x, a, b) for a in left for b in right), left[-1], right[0])
            for left, right in pairwise(groups)
        ]
        if not between:
            continue
        lost = _growth(case, station, groups, face, layer) / len(between)
        for gap, a, b in between:
            need = is456.min_clear_gap(a.dia, b.dia, aggregate)
            ribs = Required(aggregate + 5, need.clause, "aggregate + 5, over ribs")
            if gap < need.value - GAP_SLACK:
                yield _finding(case, station, (a, b), gap, need, Severity.UNSAFE, "clear-spacing")
            elif gap - lost < ribs.value - GAP_SLACK:
                yield _finding(
                    case, station, (a, b), gap - lost, ribs, Severity.UNBUILDABLE, "rib-spacing"
                )
            elif gap < CROWDED * aggregate:
                wish = Required(CROWDED * aggregate, "common practice", "4/3 aggregate")
                yield _finding(case, station, (a, b), gap, wish, Severity.COSTLY, "congested")


def _growth(case: Case, station: Station, groups: list[list[Rod]], face: Face, layer: int) -> float:
    """Return what a layer packed anew over ribs loses of its gaps, links included. [mm]"""
    grown = taken([[Spot(*bar.at(station.x), bar.dia) for bar in group] for group in groups])
    links = [s.dia for s in case.shear.sets if abs(s.x - station.x) < 400]
    if not links or layer > 1:
        return grown
    link = max(links)
    return grown + 2 * (over_ribs(link) - link)


def _upwards(case: Case, station: Station, face: Face) -> Iterator[Finding]:
    """Yield layers closer in height than 26.3.2 allows, or out of line."""
    aggregate = case.cage.aggregate
    layers = station.layers(face)
    for low, high in pairwise(layers):
        below, above = station.layer(face, low), station.layer(face, high)
        for bar in above:
            ahead = [o for o in below if abs(o.at(station.x)[0] - bar.at(station.x)[0]) < 60]
            if not ahead:
                continue
            near = min(ahead, key=lambda o: (_clear(station.x, o, bar), o.id))
            gap = _clear(station.x, near, bar)
            need = is456.min_layer_gap(max(bar.dia, near.dia), aggregate)
            if TOUCHING <= gap < need.value - GAP_SLACK:
                yield _finding(
                    case, station, (near, bar), gap, need, Severity.UNSAFE, "layer-spacing"
                )
            yield from _out_of_line(case, station, bar, below)


ALIGNED = 6.0
"""A bar counts as above another when their axes are no further apart sideways. [mm]"""


def _out_of_line(
    case: Case, station: Station, bar: Rod, below: tuple[Rod, ...]
) -> Iterator[Finding]:
    """Yield a bar of an upper layer that closes the gap between two bars below it."""
    y = bar.at(station.x)[0]
    off = min(abs(o.at(station.x)[0] - y) for o in below)
    touching = any(
        _clear(station.x, bar, o) < TOUCHING
        for o in station.bars
        if o is not bar and o.face is bar.face
    )
    if off <= ALIGNED or touching or off > 40:
        return
    place = case.place(station.x)
    yield Finding(
        rule="layers-aligned",
        severity=Severity.UNBUILDABLE,
        member=case.beam.mark,
        place=place,
        x=station.x,
        bars=(bar.mark,),
        found=round(off, 1),
        required=ALIGNED,
        unit="mm",
        clause="IS 456:2000, 26.3.2",
        message=f"{place.name}: bar {bar.mark} of layer {bar.layer} lies {off:.0f} mm beside the "
        "bars of the layer before it",
        remedy="Put it in line with them",
        site="leave the bar where it falls, so that the needle cannot pass",
    )


def _finding(
    case: Case,
    station: Station,
    pair: tuple[Rod, Rod],
    gap: float,
    need: Required,
    severity: Severity,
    rule: str,
) -> Finding:
    place = case.place(station.x)
    marks = tuple(sorted({bar.mark for bar in pair}))
    return Finding(
        rule=rule,
        severity=severity,
        member=case.beam.mark,
        place=place,
        x=station.x,
        bars=marks,
        found=round(gap, 1),
        required=round(need.value, 1),
        unit="mm",
        clause=need.clause,
        message=f"{place.name}: {pair[0].face.value} bars {' and '.join(marks)} are {gap:.1f} mm "
        f"apart, {need.value:.0f} required ({need.because})",
        remedy="Use fewer or smaller bars, another layer, or move the lap",
        site="push bars into a second layer or leave one out" if severity.blocks else "",
    )
