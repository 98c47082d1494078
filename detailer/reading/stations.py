"""Tables of results by station, as exported from a frame analysis."""

from __future__ import annotations

import csv
import io
import re
from collections.abc import Sequence
from dataclasses import dataclass
from difflib import get_close_matches
from pathlib import Path

from detailer.model import Station
from detailer.reading.lines import KeyPath, plain
from detailer.reading.table import Log

SAME_PLACE = 0.5
"""Stations nearer than this are one place written twice. [mm]"""

MOST_BYTES = 20_000_000
"""A larger table is not a beam's results."""

LENGTHS = {"m": 1000.0, "mm": 1.0}
MOMENTS = {"knm": 1e6, "nmm": 1.0, "nm": 1e3}
FORCES = {"kn": 1e3, "n": 1.0}
FOREIGN = ("t", "tm", "kgf", "kgfm", "kgm", "kg", "tf", "tfm", "kip", "kipft", "ft", "in", "lb")
COLUMNS = {
    "x": ("x", LENGTHS),
    "m max": ("m_max", MOMENTS),
    "m min": ("m_min", MOMENTS),
    "v max": ("v_max", FORCES),
    "v min": ("v_min", FORCES),
    "t": ("t", MOMENTS),
}
HEADING = re.compile(r"\s*([^\[\]()]*?)\s*(?:[\[(]([^\])]*)[\])])?\s*")
NUMBER = re.compile(r"[+\-−]?(?:\d+\.?\d*|\.\d+)(?:[eE][+\-]?\d{1,2})?", re.ASCII)
LARGEST = {"x": 3e4, "m_max": 1e12, "m_min": 1e12, "v_max": 1e9, "v_min": 1e9, "t": 1e12}
"""No beam has more. [mm, N·mm, N]"""


@dataclass(frozen=True, slots=True)
class Heading:
    """One column: the field it fills and what its unit is worth."""

    field: str
    factor: float
    text: str


@dataclass(frozen=True, slots=True)
class Row:
    """One station and the line it stands on."""

    line: int
    span: int
    station: Station


def read_stations(log: Log, path: KeyPath, folder: Path, name: str) -> tuple[Row, ...]:
    """Read a table of stations; empty where it is refused.

    Parameters
    ----------
    log : Log
        Takes what is wrong.
    path : tuple
        The key that names the table.
    folder : Path
        Where the project file lies.
    name : str
        The table's name, relative to the folder.
    """
    text = _text(log, path, folder, name)
    if text is None:
        return ()
    cells = _cells(log, path, name, text)
    headings = _headings(log, name, cells[0][1]) if cells else None
    if headings is None:
        return ()
    rows = (
        _row(log, name, line, headings, row)
        for line, row in cells[1:]
        if any(cell.strip() for cell in row)
    )
    return tuple(row for row in rows if row is not None)


def _cells(log: Log, path: KeyPath, name: str, text: str) -> list[tuple[int, list[str]]]:
    """Return the cells of every row and its line; none where this is no table."""
    head = text.split("\n", 1)[0]
    mark = ";" if ";" in head and "," not in head else "\t" if "\t" in head else ","
    reader = csv.reader(io.StringIO(text), delimiter=mark)
    cells: list[tuple[int, list[str]]] = []
    try:
        for row in reader:
            cells.append((reader.line_num, row))
    except csv.Error:
        log.refuse(path, f"{name} is not a table", "Save it as CSV")
        return []
    if not cells:
        log.refuse(path, f"{name} is empty", "Write a heading and one row a station")
    return cells


def is_workbook(name: object) -> bool:
    """Return whether a table's name is a workbook's.

    Parameters
    ----------
    name : object
        As written in the project file.
    """
    return str(name).lower().endswith((".xlsx", ".xlsm", ".xls", ".ods"))


def _text(log: Log, path: KeyPath, folder: Path, name: str) -> str | None:
    file = Path(name)
    if file.is_absolute() or ".." in file.parts or "\\" in name or ":" in name:
        log.refuse(path, "a table elsewhere", "Put the table beside the project file")
    else:
        try:
            source = (folder / file).read_bytes()
        except (OSError, ValueError):
            log.refuse(path, f"{name} cannot be read", "Put the table beside the project file")
            return None
        if len(source) > MOST_BYTES:
            log.refuse(path, f"{name} is too large", "Write one beam's stations")
            return None
        try:
            return source.decode("utf-8-sig").replace("\r\n", "\n").replace("\r", "\n")
        except UnicodeDecodeError:
            log.refuse(path, f"{name} is not UTF-8 text", "Save the table as CSV in UTF-8")
    return None


def _headings(log: Log, name: str, cells: Sequence[str]) -> tuple[Heading, ...] | None:
    found: list[Heading] = []
    sound = True
    for cell in cells:
        heading, slip = _heading(cell)
        if slip is not None:
            log.refuse_row(name, 1, plain(cell) or "an empty heading", slip)
            sound = False
        if heading is not None:
            if any(heading.field == other.field for other in found):
                log.refuse_row(name, 1, plain(cell), ("a column twice", "Write it once"))
                sound = False
            found.append(heading)
    fields = {heading.field for heading in found}
    for title, (field, _) in {"span": ("span", {}), **COLUMNS}.items():
        if sound and field not in fields and field != "t":
            remedy = f'Write a column "{_title(title)}" with its unit in brackets'
            log.refuse_row(name, 1, _title(title), ("this column is missing", remedy))
            sound = False
    return tuple(found) if sound else None


def _title(key: str) -> str:
    return key if key in ("x", "span") else key[0].upper() + key[1:]


def _heading(cell: str) -> tuple[Heading | None, tuple[str, str] | None]:
    """Return what a heading means, or (problem, remedy)."""
    match = HEADING.fullmatch(cell)
    title = " ".join(match[1].lower().replace("_", " ").split()) if match else ""
    if title == "span":
        return Heading("span", 1.0, plain(cell)), None
    if match is None or title not in COLUMNS:
        names = [*COLUMNS, "span"]
        near = get_close_matches(title, names, n=1, cutoff=0.6)
        listed = ", ".join(_title(key) for key in names)
        remedy = f"Did you mean {_title(near[0])}?" if near else f"Columns are {listed}"
        return None, ("unknown column", remedy)
    field, units = COLUMNS[title]
    unit = re.sub(r"[\s·.\-*]", "", match[2] or "").lower()
    allowed = {"x": "m or mm", "v": "kN or N"}.get(title[0], "kN m or N mm")
    if unit in units:
        return Heading(field, units[unit], plain(cell)), None
    if unit == "":
        return None, ("no unit", f"Write the unit in brackets, {allowed}")
    if unit in FOREIGN:
        return None, (f"the unit {plain(match[2])} is not read", f"Convert the column to {allowed}")
    return None, ("a unit that does not fit", f"Write {allowed} in brackets")


def _row(
    log: Log, name: str, line: int, headings: Sequence[Heading], cells: Sequence[str]
) -> Row | None:
    if len(cells) != len(headings):
        say = (f"{len(cells)} cells under {len(headings)} headings", "Write one cell a heading")
        log.refuse_row(name, line, "the row", say)
        return None
    values: dict[str, float] = {}
    for heading, cell in zip(headings, cells, strict=True):
        slip = _slip(heading, cell.strip())
        if slip is not None:
            log.refuse_row(name, line, heading.text, slip)
        else:
            values[heading.field] = float(cell.strip().replace("−", "-")) * heading.factor
    if len(values) < len(headings):
        return None
    span = int(values.pop("span"))
    for key in ("m", "v"):
        if values[f"{key}_max"] < values[f"{key}_min"]:
            say = (f"{key.upper()} max is less than {key.upper()} min", "Exchange the two")
            log.refuse_row(name, line, f"{key.upper()} max", say)
    values["t"] = abs(values.get("t", 0.0))
    return Row(line, span, Station(**values))


def _slip(heading: Heading, cell: str) -> tuple[str, str] | None:
    if not cell:
        return "an empty cell", "Write 0, or the value of the row above, whichever is meant"
    if not NUMBER.fullmatch(cell):
        return "not a number", "Write a number with a decimal point"
    value = float(cell.replace("−", "-"))
    if heading.field == "span":
        if value != int(value) or not 1 <= value <= 1000:
            return "not the number of a span", "Write 1, 2, …"
    elif abs(value * heading.factor) > LARGEST[heading.field]:
        return f"{value:.6g} is more than a beam has", "Compare the number with its unit"
    elif heading.field == "x" and value < 0:
        return "left of the span", "Count x from the left end of the span"
    return None
