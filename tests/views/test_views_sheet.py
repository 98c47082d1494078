"""Whole sheets of the demo's beams: everything on the paper, nothing on top of anything."""

from __future__ import annotations

from itertools import combinations
from pathlib import Path
from typing import TypeAlias

import pytest

import detailer
from detailer.cage.bar import Cage
from detailer.drawing.primitives import Drawing, Pen, Placed, Sheet
from detailer.drawing.primitives import Label as Text
from detailer.drawing.primitives import Path as Line
from detailer.findings import Finding, Place
from detailer.model import Project
from detailer.placing.place import place
from detailer.reading import read_project
from detailer.schedule.numbering import number
from detailer.schedule.rows import rows
from detailer.statics import envelope
from detailer.values import Severity
from detailer.views.notes import CAUTION, wrapped
from detailer.views.sheet import beam_drawing, size_of

Made: TypeAlias = tuple[Project, tuple[Cage, ...], tuple[Drawing, ...]]

DEMO = Path(detailer.__file__).parent / "demo" / "tern-quay.toml"


@pytest.fixture(scope="module")
def made() -> Made:
    project = read_project(DEMO)
    envelopes = [envelope(project, beam) for beam in project.beams]
    cages = number(
        tuple(place(project, b, e) for b, e in zip(project.beams, envelopes, strict=True)), project
    )
    listed = rows(cages)
    found = tuple(
        beam_drawing(project, b, e, c, (_finding(b.mark),), listed, assumptions=project.assumptions)
        for b, e, c in zip(project.beams, envelopes, cages, strict=True)
    )
    return project, cages, found


def _finding(member: str) -> Finding:
    return Finding(
        rule="clear-spacing",
        severity=Severity.UNBUILDABLE,
        member=member,
        place=Place(0, "support A1"),
        x=0.0,
        bars=("01",),
        found=21.4,
        required=25.0,
        unit="mm",
        clause="IS 456:2000, 26.3.2",
        message="bars 01 are 21.4 mm apart, need 25",
        remedy="use two layers",
    )


def _sheets(made: Made) -> list[Sheet]:
    return [sheet for drawing in made[2] for sheet in drawing.sheets]


def _room(placed: Placed) -> tuple[float, float, float, float]:
    (x, y), (w, h) = placed.at, size_of(placed.view)
    return x, y, x + w, y + h


def test_views_lie_on_the_paper_and_apart(made: Made) -> None:
    for sheet in _sheets(made):
        rooms = [_room(p) for p in sheet.views]
        for x0, y0, x1, y1 in rooms:
            assert x0 >= 20 and y0 >= 10 and x1 <= sheet.size[0] - 10 and y1 <= sheet.size[1] - 10
        for a, b in combinations(rooms, 2):
            apart = a[2] <= b[0] or b[2] <= a[0] or a[3] <= b[1] or b[3] <= a[1]
            assert apart


def test_views_that_share_an_axis_are_aligned(made: Made) -> None:
    for sheet in _sheets(made):
        same = [
            p
            for p in sheet.views
            if p.view.name.split(" ", 1)[1] in ("elevation", "top bars", "bottom bars", "moments")
        ]
        origins = {round(p.at[0] - p.view.box[0] / p.view.scale, 6) for p in same}
        assert len(origins) == 1
        assert len({p.view.scale for p in same}) == 1


def test_the_elevation_is_true_in_model_space_and_views_lie_apart(made: Made) -> None:
    for sheet in _sheets(made):
        rooms = []
        for p in sheet.views:
            x0, y0, x1, y1 = p.view.box
            dx, dy = p.model
            rooms.append((x0 + dx, y0 + dy, x1 + dx, y1 + dy))
            if p.view.name.endswith(" elevation"):
                assert p.model == (0.0, 0.0)
        for a, b in combinations(rooms, 2):
            assert a[2] <= b[0] or b[2] <= a[0] or a[3] <= b[1] or b[3] <= a[1]


def test_a_sheet_says_what_it_must(made: Made) -> None:
    project, _, drawings = made
    for drawing in drawings:
        (sheet,) = drawing.sheets
        words = " ".join(i.text for i in sheet.items if isinstance(i, Text))
        assert CAUTION in words
        assert "Concrete M25" in words and "Fe 500" in words
        assert "Nominal cover" in words and "1 unbuildable" in words
        assert "bars 01 are 21.4 mm apart, need 25 [IS 456:2000, 26.3.2]." in words
        for assumption in project.assumptions:
            if assumption.member in ("", drawing.name):
                assert f"A{assumption.number}" in words
        names = {p.view.name for p in sheet.views}
        assert f"{drawing.name} A-A" in names and f"{drawing.name} moments" in names


def test_a_drawing_is_made_the_same_twice(made: Made) -> None:
    project, cages, drawings = made
    beam, cage = project.beams[2], cages[2]
    again = beam_drawing(
        project,
        beam,
        envelope(project, beam),
        cage,
        (_finding(beam.mark),),
        rows(cages),
        assumptions=project.assumptions,
    )
    assert again == drawings[2]


def test_words_are_broken_to_a_width() -> None:
    lines = wrapped("one two three four five six seven eight nine ten", 30.0)
    assert len(lines) > 1
    assert " ".join(lines) == "one two three four five six seven eight nine ten"


def test_the_diagram_shows_what_resists(made: Made) -> None:
    project, cages, _ = made
    beam, cage = project.beams[0], cages[0]
    drawing = beam_drawing(
        project,
        beam,
        envelope(project, beam),
        cage,
        (),
        rows(cages),
        assumptions=(),
    )
    (view,) = (p.view for p in drawing.sheets[0].views if p.view.name == "FB1 moments")
    lines = [
        i
        for i in view.items
        if isinstance(i, Line) and i.pen is Pen.RESISTANCE and len(i.points) > 1
    ]
    ends = sorted({round(y) for line in lines for _, y in line.points})
    assert min(ends) < 0 < max(ends)
    texts = [i.text for i in view.items if isinstance(i, Text)]
    assert texts.count("165") == 2 and "−140" in texts
