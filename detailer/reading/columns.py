"""Columns, and how a support turns under a beam."""

from __future__ import annotations

from math import cos, radians, sin

from detailer.model import BarGroup, Column, LinkZone
from detailer.reading.lines import KeyPath
from detailer.reading.notation import NotationError, parse_bars, parse_zone, sign_of_doubt
from detailer.reading.table import Log, Table

KEYS = ("mark", "size", "bars", "links", "cover", "above")
COVER, TIE, BAR = 40.0, 8, 16
"""What is assumed of a column that has no mark. [mm]"""


def read_columns(root: Table) -> tuple[Column, ...]:
    """Read every `[[column]]`."""
    found = root.items("column", "[[column]]")
    columns = tuple(_column(Table(root.log, path, item, KEYS)) for path, item in found)
    seen: set[str] = set()
    for (path, _), column in zip(found, columns, strict=True):
        if column.mark and column.mark in seen:
            root.log.refuse((*path, "mark"), f"{column.mark} stands twice", "Write another mark")
        seen.add(column.mark)
    return columns


def _column(table: Table) -> Column:
    x, y = table.numbers("size", 2, low=100, high=3000)
    cover = table.number("cover", COVER, low=0, high=200)
    mark = table.mark("mark", "K1")
    if "cover" not in table:
        table.log.assume("", f"Column {mark}: cover {COVER:g} mm to the ties.")
    if cover < 15 or cover > 100:
        table.log.doubt(table.at("cover"), f"cover of {cover:g} mm: is that meant in mm?")
    if "above" not in table:
        table.log.assume("", f"Column {mark} goes on above the beams.")
    links = _links(table, mark)
    return Column(
        mark=mark,
        size=(x, y),
        bars=_bars(table, mark),
        link_dia=links.dia,
        link_spacing=links.spacing,
        cover=cover,
        above=table.flag("above", True),
    )


def _bars(table: Table, mark: str) -> BarGroup:
    if "bars" not in table:
        table.log.assume("", f"Column {mark}: bars taken as 4-T{BAR}, one in each corner.")
        return BarGroup(4, BAR)
    groups = bars_at(table.log, table.at("bars"), table.text("bars"))
    if len(groups) > 1:
        table.refuse("bars", "bars of two kinds in a column", 'Write one kind, such as "8T16"')
    elif groups and (groups[0].count < 4 or groups[0].count % 2):
        table.refuse("bars", "a column has an even number, 4 or more", 'Write such as "8T16"')
    return groups[0] if groups else BarGroup(4, BAR)


def _links(table: Table, mark: str) -> LinkZone:
    usual = LinkZone(legs=2, dia=TIE, spacing=150)
    if "links" not in table:
        table.log.assume("", f"Column {mark}: ties taken as T{TIE}@150.")
        return usual
    zone = zone_at(table.log, table.at("links"), table.text("links"))
    if zone is not None and zone.length is not None:
        table.refuse("links", "column ties have no zones", 'Write such as "T8@150"')
    return zone or usual


def bars_at(log: Log, path: KeyPath, text: object) -> tuple[BarGroup, ...]:
    """Read bars written at a key; none where they are refused."""
    if not isinstance(text, str):
        log.refuse(path, "not a text", 'Write bars as "3T20"')
    elif log.clean(*path):
        try:
            groups = parse_bars(text)
        except NotationError as slip:
            log.refuse(path, slip.problem, slip.remedy)
        else:
            if sign_of_doubt(text):
                log.doubt(path, f"{text}: # read as mm, not as a bar number")
            return groups
    return ()


def zone_at(log: Log, path: KeyPath, text: object) -> LinkZone | None:
    """Read a zone of links written at a key; None where it is refused."""
    if not isinstance(text, str):
        log.refuse(path, "not a text", 'Write links as "2L-T8@150"')
    elif log.clean(*path):
        try:
            zone = parse_zone(text)
        except NotationError as slip:
            log.refuse(path, slip.problem, slip.remedy)
        else:
            if zone.spacing < 50:
                log.doubt(path, f"links {zone.spacing:g} mm apart: is that meant in mm?")
            if sign_of_doubt(text):
                log.doubt(path, f"{text}: # read as mm, not as a bar number")
            return zone
    return None


def turned(size: tuple[float, float], direction: float) -> tuple[float, float]:
    """Return a column's extents along and across a beam.

    Parameters
    ----------
    size : tuple of float
        Sizes along the grid's x and y. [mm]
    direction : float
        Of the beam, from the grid's x. [degrees]
    """
    x, y = size
    quarter = direction / 90
    if quarter == round(quarter):
        return (x, y) if round(quarter) % 2 == 0 else (y, x)
    c, s = abs(cos(radians(direction))), abs(sin(radians(direction)))
    return x * c + y * s, x * s + y * c
