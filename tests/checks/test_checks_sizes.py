"""Sizes that are rolled, held, and told apart: IS 1786:2008; practice."""

from __future__ import annotations

import pytest
from check_cases import bottom, case, loops, one, only, top

from detailer.checks import sizes
from detailer.values import Severity


@pytest.mark.parametrize("dia", [8, 10, 12, 16, 20, 25, 32])
def test_sizes_of_the_project(dia: float) -> None:
    assert list(sizes.check(case(bottom("b", 0, 6000, dia)))) == []


@pytest.mark.parametrize(
    ("dia", "near", "clause", "word"),
    [
        (28, 25, "sizes of the project", "not held"),
        (36, 32, "sizes of the project", "not held"),
        (14, 12, "IS 1786:2008", "not rolled"),
        (22, 20, "IS 1786:2008", "not rolled"),
        (16.5, 16, "IS 1786:2008", "not rolled"),
    ],
)
def test_sizes_that_site_does_not_have(dia: float, near: float, clause: str, word: str) -> None:
    found = one(sizes.check(case(bottom("b", 0, 6000, dia))), "size-held")
    assert (found.found, found.required, found.unit) == (dia, near, "mm")
    assert found.severity is Severity.UNBUILDABLE
    assert (found.clause, found.bars) == (clause, ("b",))
    assert word in found.message and found.site
    assert found.place.name == "support A1"


def test_links_are_asked_too() -> None:
    found = one(sizes.check(case(loops("l", 150, dia=6))), "size-held")
    assert (found.found, found.required, found.bars) == (6, 8, ("l",))


@pytest.mark.parametrize(
    ("small", "large", "alike"),
    [(16, 20, True), (20, 25, True), (25, 32, True), (12, 16, False), (16, 25, False)],
)
def test_neighbours_of_the_range_in_one_face(small: int, large: int, alike: bool) -> None:
    made = case(bottom("a", 0, 6000, small), bottom("b", 0, 6000, large, (60.0,)))
    found = only(sizes.check(made), "sizes-alike")
    assert bool(found) is alike
    for finding in found:
        assert finding.severity is Severity.COSTLY
        assert finding.found == large - small
        assert (finding.place.name, finding.bars) == ("span 1", ("a", "b"))
        assert f"T{small} and T{large}" in finding.message


def test_of_two_faces_they_are_not_mixed_up() -> None:
    made = case(bottom("a", 0, 6000, 16), top("b", 0, 6000, 20))
    assert list(sizes.check(made)) == []


def test_where_they_do_not_meet_in_the_middle_nothing_is_said() -> None:
    made = case(bottom("a", 0, 6000, 16), bottom("b", 0, 2000, 20, (60.0,)))
    assert list(sizes.check(made)) == []
