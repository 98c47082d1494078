import json
from dataclasses import replace

import pytest

from detailer.cage.bar import Bar, Cage, Contact, Prism, Rest, Shape
from detailer.cage.forms import HookCorner, closed_link
from detailer.cage.wire import SCHEMA, from_json, to_json
from detailer.model import Concrete, Grid, Issue, Practice, Project, Steel, SteelGrade
from detailer.values import ContactKind, Exposure, Face, Role, SupportKind

PROJECT = Project(
    number="1", title="Étage", part="B", owner="", code="IS 456", bending="IS 2502",
    ductile=False, lateral=False,
    issue=Issue(revision="A", date="2026-01-01", purpose="", drawn="", checked="", approved="",
                document=""),
    concrete=Concrete(grade="M25", fck=25, aggregate=20, exposure=Exposure.MILD, fire_hours=1),
    steel=Steel(main=SteelGrade("Fe 500", 500), links=SteelGrade("Fe 415", 415), stock=12000,
                sizes=(8, 16)),
    practice=Practice(), grid=Grid(), columns=(), beams=(),
)  # fmt: skip

LINK = closed_link(y0=-90, y1=90, z0=-425, z1=-25, dia=8, corner=HookCorner.TOP_LEFT)
CAGE = Cage(
    member="FB1", copies=2, mirrored=1,
    supports=(Rest(name="A1", kind=SupportKind.COLUMN, x=0.0, width=300.0, across=230.0),),
    prisms=(Prism(name="w", x0=0.0, x1=10.0, outline=((0.0, 0.0), (1.0, 0.0), (1.0, 2.5))),),
    cover=(25.0, 30.0, 25.0, 25.0), aggregate=20.0,
    bars=(
        Bar(id="m", role=Role.MAIN, face=Face.BOTTOM, layer=1, grade="Fe 500", dia=16.0,
            corners=((0.0, 0.0, 0.0), (1000.0, 0.0, 0.0)), mandrels=(), mark="01", length=1000.0,
            shape=Shape("IS 2502", "A", (("A", 1000.0),))),
        Bar(id="l", role=Role.LINK, face=Face.NONE, layer=0, grade="Fe 415", dia=8.0,
            corners=tuple((float(x), y, z) for x, y, z in LINK.corners),
            mandrels=tuple(map(float, LINK.mandrels)),
            placings=((100.0, 0.0, 0.0), (1e3 / 3, -1e-9, 0.0))),
    ),
    contacts=(Contact(ContactKind.CORNER, "l", "m", 100.0, 300.0),),
    origin=(1.0, 2.0, 3.0), direction=90.0,
)  # fmt: skip


def test_round_trip():
    text = to_json((CAGE, replace(CAGE, member="FB2")), PROJECT)
    back = from_json(text)
    assert to_json(back, PROJECT) == text
    assert [c.member for c in back] == ["FB1", "FB2"]
    assert back[0].bars[0] == CAGE.bars[0]
    for name in ("supports", "prisms", "cover", "contacts", "origin", "direction", "aggregate"):
        assert getattr(back[0], name) == getattr(CAGE, name)
    near = zip(back[0].bars[1].corners, CAGE.bars[1].corners, strict=True)
    assert all(p == pytest.approx(q, abs=6e-4) for p, q in near)


def test_the_file_says_what_it_is():
    text = to_json((CAGE,), PROJECT)
    data = json.loads(text)
    assert "Étage" in text
    assert "-0," not in text
    assert data["schema"] == SCHEMA
    bar = data["members"][0]["bars"][1]
    assert list(bar) == [
        "id", "mark", "role", "face", "layer", "grade", "diameter", "corners", "mandrels",
        "placings", "shape", "length", "centre_line",
    ]  # fmt: skip
    assert bar["role"] == "link"
    assert bar["placings"] == [[100, 0, 0], [333.333, 0, 0]]
    assert data["members"][0]["grades"] == {"concrete": "M25", "main": "Fe 500", "links": "Fe 415"}


def test_other_schemas_are_refused():
    with pytest.raises(ValueError, match="schema"):
        from_json('{"schema": 99}')
