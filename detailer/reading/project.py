"""From a project file to a project."""

from __future__ import annotations

import re
from dataclasses import asdict
from pathlib import Path
from typing import Any

import tomli

from detailer.errors import InputError, Refused
from detailer.model import Project
from detailer.reading.beams import Around, read_beams
from detailer.reading.columns import read_columns
from detailer.reading.header import (
    read_concrete,
    read_grid,
    read_header,
    read_issue,
    read_practice,
    read_steel,
)
from detailer.reading.table import Log, Table

KEYS = ("project", "issue", "concrete", "steel", "practice", "grid", "column", "beam")
MOST_BYTES = 5_000_000
"""A larger file is not a project file."""


def read_project(path: Path) -> Project:
    """Read a project file and the tables beside it.

    Parameters
    ----------
    path : Path
        The project file.

    Returns
    -------
    Project
        With every assumption numbered and every doubt listed.

    Raises
    ------
    Refused
        With every error at once, each with file, line, key, problem and remedy.
    """
    path = Path(path)
    text = _text(path)
    log = Log(path.name, text.encode())
    root = Table(log, (), _parsed(path.name, text), KEYS)
    header = read_header(root)
    issue, concrete, steel = read_issue(root), read_concrete(root), read_steel(root)
    practice, grid, columns = read_practice(root), read_grid(root), read_columns(root)
    log.assume("", "Cover is to the links (IS 456, 26.4.1).")
    around = Around(
        folder=path.parent,
        columns={column.mark: column for column in columns},
        grid=grid,
        bars=iter(_headers(text, "bars")),
        links=iter(_headers(text, "links")),
    )
    beams = read_beams(root, around)
    assumptions, doubts = log.finish()
    return Project(
        **asdict(header),
        issue=issue,
        concrete=concrete,
        steel=steel,
        practice=practice,
        grid=grid,
        columns=columns,
        beams=beams,
        assumptions=assumptions,
        doubts=doubts,
    )


def _refused(name: str, line: int | None, field: str, problem: str, remedy: str) -> Refused:
    return Refused([InputError(file=name, line=line, field=field, problem=problem, remedy=remedy)])


def _text(path: Path) -> str:
    try:
        source = path.read_bytes()
    except (OSError, ValueError) as slip:
        reason = "no such file" if isinstance(slip, FileNotFoundError) else "it cannot be read"
        remedy = "Name a project file, or make one with `detailer start`"
        raise _refused(path.name or str(path), None, "the file", reason, remedy) from slip
    if len(source) > MOST_BYTES:
        raise _refused(path.name, None, "the file", "too large", "Name a project file")
    try:
        return source.decode("utf-8-sig").replace("\r\n", "\n")
    except UnicodeDecodeError as slip:
        line = source[: slip.start].count(b"\n") + 1
        raise _refused(path.name, line, "the file", "not UTF-8 text", "Save it as UTF-8") from slip


def _parsed(name: str, text: str) -> dict[str, Any]:
    try:
        return tomli.loads(text)
    except tomli.TOMLDecodeError as slip:
        problem = f"not TOML: {slip.msg}"
        raise _refused(name, slip.lineno, "the file", problem, "Mend this line first") from slip
    except (RecursionError, ValueError) as slip:
        raise _refused(
            name, None, "the file", "not TOML", "Write it as the reference shows"
        ) from slip


def _headers(text: str, key: str) -> list[int]:
    """Return the lines of the [[beam.<key>]] tables, in order."""
    head = re.compile(rf"\s*\[\[\s*beam\s*\.\s*{key}\s*\]\]")
    return [n for n, line in enumerate(text.split("\n"), 1) if head.match(line)]
