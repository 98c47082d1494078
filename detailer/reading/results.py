"""Design results of a beam line, in whichever form they come."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import replace
from itertools import pairwise
from pathlib import Path

from detailer.model import HandResults, Loads, PointLoad, Results, Span, Station, Stations
from detailer.reading.stations import SAME_PLACE, Row, is_workbook, read_stations
from detailer.reading.table import Table

REACHES = 1.0
"""Stations must reach both ends of a span within this. [mm]"""

MOMENT, FORCE, LOAD = 1e6, 1e6, 1e4
"""No beam has more. [kN·m, kN, kN/m]"""

FORMS = {Stations: "stations", HandResults: "moments and shears", Loads: "loads"}


def read_results(table: Table) -> Results | None:
    """Read the results written in one span; None where there are none."""
    hand = [key for key in ("moment", "shear") if key in table]
    loads = [key for key in ("dead", "imposed", "point") if key in table]
    if "results" in table:
        table.refuse("results", "a table for one span", "Name it once, in [[beam]]")
        return None
    if hand and loads:
        table.refuse(loads[0], f"{loads[0]} beside {hand[0]}", "Write moments or loads, not both")
        return None
    if len(hand) == 1:
        other = "shear" if hand == ["moment"] else "moment"
        example = "[left, right]" if other == "shear" else "[left, middle, right]"
        table.missing(other, example)
        return None
    if hand:
        return _hand(table)
    return _loads(table) if loads else None


def _hand(table: Table) -> HandResults:
    left, middle, right = table.numbers("moment", 3, low=-MOMENT, high=MOMENT, unit="kN m")
    v_left, v_right = table.numbers("shear", 2, low=-FORCE, high=FORCE, unit="kN")
    return HandResults(
        moment=(left * 1e6, middle * 1e6, right * 1e6), shear=(v_left * 1e3, v_right * 1e3)
    )


def _loads(table: Table) -> Loads:
    points = []
    for path, item in table.items("point", "point = [{ x = …, dead = …, imposed = … }]"):
        load = Table(table.log, path, item, ("x", "dead", "imposed"))
        if "dead" not in load and "imposed" not in load:
            load.missing("dead", "… (in kN)")
        points.append(
            PointLoad(
                x=load.number("x", low=0, high=30000),
                dead=load.number("dead", 0.0, low=0, high=FORCE, unit="kN") * 1e3,
                imposed=load.number("imposed", 0.0, low=0, high=FORCE, unit="kN") * 1e3,
            )
        )
    return Loads(
        dead=table.number("dead", low=0, high=LOAD, unit="kN/m"),
        imposed=table.number("imposed", low=0, high=LOAD, unit="kN/m"),
        points=tuple(points),
    )


def with_results(beam: Table, spans: Sequence[Span], folder: Path, member: str) -> tuple[Span, ...]:
    """Return the spans with the results of the beam's table, and of one form only."""
    named = "results" in beam
    if named and is_workbook(beam.data["results"]):
        beam.refuse("results", "results in a workbook are not built yet", "Save the table as CSV")
        return tuple(spans)
    for span in spans:
        if named and span.results is not None:
            beam.refuse("results", f"a table beside the results of span {span.number}",
                        "Write one of them")  # fmt: skip
            return tuple(spans)
        if isinstance(span.results, Loads):
            _points(beam, span, span.results)
    if named:
        return _stations(beam, spans, folder, member)
    forms = {FORMS[type(span.results)] for span in spans if span.results is not None}
    bare = [span.number for span in spans if span.results is None]
    if forms and bare:
        beam.log.refuse(
            beam.at("span", bare[0] - 1), f"span {bare[0]} has no results and others have",
            "Write results for every span or for none",
        )  # fmt: skip
    elif len(forms) > 1:
        beam.refuse("span", f"{' and '.join(sorted(forms))} in one beam", "Write one form a beam")
    elif not forms:
        beam.log.assume(member, "No results: bars extend by the simplified rules.")
    return tuple(spans)


def _points(beam: Table, span: Span, loads: Loads) -> None:
    for n, load in enumerate(loads.points):
        if load.x > span.length:
            beam.log.refuse(
                beam.at("span", span.number - 1, "point", n, "x"),
                f"{load.x:g} mm lies past the end of the span",
                f"Write 0 to {span.length:g} mm from its left end",
            )


def _stations(beam: Table, spans: Sequence[Span], folder: Path, member: str) -> tuple[Span, ...]:
    name = beam.text("results", example='"file.csv"')
    if not beam.clean("results"):
        return tuple(spans)
    rows = read_stations(beam.log, beam.at("results"), folder, name)
    if not rows:
        return tuple(spans)
    for row in rows:
        if row.span > len(spans):
            say = (f"{member} has {len(spans)} spans", f"Write 1 to {len(spans)}")
            beam.log.refuse_row(name, row.line, "span", say)
    return tuple(
        replace(span, results=Stations(_of_span(beam, name, span, rows))) for span in spans
    )


def _of_span(beam: Table, name: str, span: Span, rows: Sequence[Row]) -> tuple[Station, ...]:
    """Return the stations of a span in order; refuse doubles and what does not reach its ends."""
    mine = sorted((row for row in rows if row.span == span.number), key=lambda row: row.station.x)
    for before, row in pairwise(mine):
        if row.station.x - before.station.x < SAME_PLACE:
            say = (f"this place stands on line {before.line} already", "Write one row a place")
            beam.log.refuse_row(name, row.line, "x", say)
    if len(mine) < 3:
        say = (
            f"{len(mine)} stations in span {span.number}",
            "Write at least 3, better every 250 mm",
        )
        beam.log.refuse_row(name, mine[0].line if mine else None, "x", say)
    elif span.length == span.length:
        ends = (
            (mine[0], mine[0].station.x, 0.0, "first"),
            (mine[-1], mine[-1].station.x, span.length, "last"),
        )
        for row, x, asked, word in ends:
            if abs(x - asked) > REACHES:
                say = (
                    f"the {word} station of span {span.number} is at {x:g} mm, not {asked:g}",
                    f"Write stations from 0 to {span.length:g} mm",
                )
                beam.log.refuse_row(name, row.line, "x", say)
    return tuple(row.station for row in mine)
