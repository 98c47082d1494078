"""Cover as placed to every bar: IS 456:2000, 26.4.1."""

from __future__ import annotations

import dataclasses

import pytest
from check_cases import bottom, case, loops, one, top

from detailer.cage.bar import Prism
from detailer.checks import Case, cover
from detailer.values import Severity

PAIR = (-100.0, 100.0)


def beam(hoop_width: float = 240.0, hoop_height: float = 440.0, **what: object) -> Case:
    """Return a beam of 300 × 500; links have their top at 30 below the concrete's."""
    return case(
        loops("l", 150, width=hoop_width, height=hoop_height),
        bottom("b", -110, 6110, 16, PAIR),
        top("t", -110, 6110, 16, PAIR),
        **what,  # type: ignore[arg-type]
    )


def test_links_at_their_cover() -> None:
    # 300 − 2 · 30 = 240, 500 − 2 · 30 = 440
    assert list(cover.check(beam())) == []


def test_links_too_wide() -> None:
    # (300 − 244)/2 = 28 at either side
    found = list(cover.check(beam(hoop_width=244.0)))
    assert sorted(f.message.split(" at the ")[1].split(" ")[0] for f in found) == ["left", "right"]
    for finding in found:
        assert (finding.rule, finding.found, finding.required) == ("cover-placed", 28, 30)
        assert (finding.unit, finding.severity) == ("mm", Severity.UNSAFE)
        assert finding.clause == "IS 456:2000, 26.4.1"
        assert finding.place.name == "span 1"
        assert finding.bars == ("l",)


def test_links_too_high() -> None:
    # the top stays at 30; 446 leaves 24 at the soffit
    found = one(cover.check(beam(hoop_height=446.0)), "cover-placed")
    assert found.found == 24
    assert "bottom face" in found.message


@pytest.mark.parametrize(("level", "found"), [(-38.0, []), (-37.8, [29.8])])
def test_a_tenth_of_a_millimetre_is_let_pass(level: float, found: list[float]) -> None:
    made = case(top("t", -110, 6110, 16, PAIR, z=level))
    assert [f.found for f in cover.check(made)] == found


def test_each_face_has_its_own_cover() -> None:
    # 50 asked at the bottom, where links leave 30
    made = beam(cover=(30.0, 50.0, 30.0, 30.0))
    found = {(f.bars, f.found, f.required) for f in cover.check(made)}
    assert found == {(("l",), 30, 50), (("b",), 38, 50)}
    # seen along +x left is +y: 45 asked there alone
    one_side = beam(cover=(30.0, 30.0, 45.0, 30.0))
    found = [f for f in cover.check(one_side) if f.bars == ("l",)]
    assert [(f.found, f.required) for f in found] == [(30, 45)]
    assert "left face" in found[0].message


def test_a_bent_end_too_near_the_top() -> None:
    # a bottom bar at −454 bent up by 430 outside to tip: tip at −462 + 430 = −32
    assert list(cover.check(case(bottom("b", -110, 6110, 16, left=432)))) == []
    found = one(cover.check(case(bottom("b", -110, 6110, 16, left=445))), "cover-placed")
    assert found.found == 17  # −462 + 445
    assert "top face" in found.message
    assert found.place.name == "support A1"


def test_the_worst_of_each_bar_and_place_is_told_once() -> None:
    made = case(loops("l", 150, width=244), loops("k", 150, width=248, first=260, last=5740))
    found = list(cover.check(made))
    assert sorted((f.bars, f.found) for f in found) == [
        (("k",), 26.0),
        (("k",), 26.0),
        (("l",), 28.0),
        (("l",), 28.0),
    ]


def test_within_a_wider_column_the_web_has_no_side_faces() -> None:
    wide = loops("l", 150, width=280, first=-100, last=50)
    made = case(wide)
    assert {f.found for f in cover.check(made)} == {10.0}  # the web runs on to the column's face
    outline = ((-200.0, -1000.0), (200.0, -1000.0), (200.0, 500.0), (-200.0, 500.0))
    column = Prism(name="column A1", x0=-150, x1=150, outline=outline)
    inside = dataclasses.replace(
        made, cage=dataclasses.replace(made.cage, prisms=(*made.cage.prisms, column))
    )
    assert list(cover.check(inside)) == []


def test_a_bar_outside_the_concrete() -> None:
    found = one(cover.check(case(top("t", -110, 6110, 16, z=2.0))), "cover-placed")
    assert found.found == -10  # 2 + 8 above the top
