"""Bars that meet where they should not, and contacts that do not hold."""

from __future__ import annotations

import pytest
from check_cases import bottom, case, lap, loops, one, rules

from detailer.cage.bar import Contact
from detailer.checks import clash
from detailer.values import ContactKind, Severity


def test_bars_apart_do_not_clash() -> None:
    assert list(clash.check(case(bottom("a", 0, 6000), bottom("b", 0, 6000, 16, (20.0,))))) == []


@pytest.mark.parametrize(
    ("apart", "gap", "word"), [(16.0, 0.0, "touch"), (13.0, -3.0, "penetrate")]
)
def test_bars_that_touch_or_penetrate(apart: float, gap: float, word: str) -> None:
    made = case(bottom("a", 1000, 4000), bottom("b", 2000, 5000, 16, (apart,)))
    found = one(clash.check(made), "clash")
    assert (found.found, found.required, found.unit) == (gap, 0, "mm")
    assert found.severity is Severity.UNBUILDABLE
    assert word in found.message
    assert found.bars == ("a", "b") and found.site
    assert 2000 <= found.x <= 4000 and found.place.name == "span 1"


def test_a_declared_lap_may_touch_but_not_penetrate() -> None:
    contact = lap("a", "b", 2000, 4000)
    # half a millimetre is let pass
    for apart, expected in ((16.0, set()), (15.6, set()), (15.0, {"clash", "contact"})):
        made = case(
            bottom("a", 1000, 4000), bottom("b", 2000, 5000, 16, (apart,)), contacts=(contact,)
        )
        assert rules(clash.check(made)) == expected


def test_a_contact_that_does_not_hold() -> None:
    made = case(
        bottom("a", 1000, 4000), bottom("b", 2000, 5000, 16, (18.0,)),
        contacts=(lap("a", "b", 2000, 4000),),
    )  # fmt: skip
    found = one(clash.check(made), "contact")
    assert found.severity is Severity.UNCLEAR
    assert found.x == 3000 and found.place.name == "span 1"
    assert "2.0 mm apart" in found.message
    assert found.bars == ("a", "b")


def test_a_lap_that_ends_before_its_window() -> None:
    made = case(
        bottom("a", 1000, 3500), bottom("b", 2000, 5000, 16, (16.0,)),
        contacts=(lap("a", "b", 2000, 4000),),
    )  # fmt: skip
    assert "parallel" in one(clash.check(made), "contact").message


def test_a_link_through_a_bar() -> None:
    # the leg's axis is at 150 − 30 − 4 = 116
    made = case(bottom("a", -110, 6110, 16, (116.0,), z=-250.0), loops("l", 150))
    found = list(clash.check(made))
    assert {(f.rule, f.found) for f in found} == {("clash", -12.0)}  # (16 + 8)/2
    assert [f.place.name for f in found] == ["span 1"]


def test_a_bar_off_the_corner_of_its_link() -> None:
    made = case(
        bottom("a", -110, 6110, 16, (90.0,)),
        loops("l", 150),
        contacts=(Contact(ContactKind.CORNER, "a", "l", 200.0, 5800.0),),
    )
    # it lies on the lower leg: −470 + 8 + 8, so it touches; 5 mm higher it does not
    assert "contact" not in rules(clash.check(made))
    high = case(
        bottom("a", -110, 6110, 16, (90.0,), z=-449.0),
        loops("l", 150),
        contacts=(Contact(ContactKind.CORNER, "a", "l", 200.0, 5800.0),),
    )
    assert "do not touch" in one(clash.check(high), "contact").message
