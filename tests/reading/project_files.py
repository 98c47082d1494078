"""Small project files to plant slips in."""

from __future__ import annotations

from collections.abc import Callable
from importlib import resources
from pathlib import Path

import pytest

from detailer.errors import InputError, Refused
from detailer.model import Project
from detailer.reading import read_project

DEMO = resources.files("detailer.demo")
TOML = (DEMO / "tern-quay.toml").read_text()
CSV = (DEMO / "fb1-stations.csv").read_text()

ONE = """[project]
number  = "X-1"
title   = "One beam"
code    = "IS 456"
bending = "IS 2502"
ductile = false

[issue]
revision = "A"
date     = 2026-01-05

[concrete]
grade    = "M25"
exposure = "moderate"

[steel]
main  = "Fe 500"

[[column]]
mark = "K1"
size = [450, 300]

[[beam]]
mark    = "B1"
section = { width = 300, depth = 500 }
cover   = 30
support = [{ at = "A1", column = "K1" }, { at = "B1", column = "K1" }, { at = "C1", wall = 230 }]
span    = [{ length = 5000, dead = 15, imposed = 8 }, { length = 4500, dead = 15, imposed = 8 }]

  [[beam.bars]]
  face = "top"
  span = "1-2"
  bars = "2T16"

  [[beam.bars]]
  face = "bottom"
  span = "1-2"
  bars = "3T16"

  [[beam.links]]
  span  = "1-2"
  zones = ["2L-T8@150"]
"""
"""Two spans, loads, everything that may be absent left out."""

Change = tuple[str, str]


def changed(text: str, *changes: Change) -> str:
    for old, new in changes:
        assert old in text, old
        text = text.replace(old, new, 1)
    return text


def read(folder: Path, text: str, csv: str = CSV) -> Project:
    (folder / "p.toml").write_text(text, encoding="utf-8")
    (folder / "fb1-stations.csv").write_text(csv, encoding="utf-8")
    return read_project(folder / "p.toml")


def errors(folder: Path, text: str, csv: str = CSV) -> tuple[InputError, ...]:
    with pytest.raises(Refused) as caught:
        read(folder, text, csv)
    return caught.value.errors


def stations(change: Callable[[list[float]], list[float]]) -> str:
    """Return the demo's table with each row changed."""
    head, *rows = CSV.strip().split("\n")
    new = (change([float(cell) for cell in row.split(",")]) for row in rows)
    return "\n".join([head, *(",".join(f"{v:g}" for v in row) for row in new)]) + "\n"
