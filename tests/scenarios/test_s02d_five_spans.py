"""Spans of 4, three of 4.5, and 4 m, 21.8 m overall: what runs through is lapped.

Common practice, no source; every number is our own calculation.
"""

from __future__ import annotations

import pytest
from scenario import Scenario, bottom, build, terrace

from detailer.checks.laps import laps
from detailer.values import ContactKind, Face, Role

LINE = terrace(
    [4000, 4500, 4500, 4500, 4000], "2T12", "2T16", [bottom("1-5", "2T12+1T16")], depth=450
)


@pytest.fixture(scope="module")
def made(tmp_path_factory: pytest.TempPathFactory) -> Scenario:
    return build(tmp_path_factory.mktemp("s02d"), LINE)


def lap_centres(made: Scenario, face: Face, dia: float) -> list[float]:
    found = []
    for contact in made.cage.contacts:
        one, two = made.cage.bar(contact.a), made.cage.bar(contact.b)
        if contact.kind is ContactKind.LAP and one.face is face and one.dia == two.dia == dia:
            found.append((contact.x0 + contact.x1) / 2)
    return sorted(found)


def test_nothing_is_unsafe_or_unbuildable(made: Scenario) -> None:
    assert made.blocking == set()


def test_what_is_asked(made: Scenario) -> None:
    assert made.beam.end - made.beam.start == 21800
    peaks = [made.sagging(n)[1] for n in range(1, 6)]
    assert peaks == pytest.approx([48.0, 37.7, 40.9, 37.7, 48.0], abs=0.2)
    # 70 and 66 at the centres of the supports, these at the worse of their faces
    assert made.hogging(1) == pytest.approx(57.4, abs=0.1)
    assert made.hogging(2) == pytest.approx(54.2, abs=0.1)


def test_every_piece_comes_from_stock(made: Scenario) -> None:
    assert max(row.length for row in made.rows) <= 12000


def test_top_bars_are_lapped_once_in_the_middle_span(made: Scenario) -> None:
    one, two = lap_centres(made, Face.TOP, 12)
    # 1.3 · 590 apart, so that half the steel is lapped at a section
    assert two - one >= 767
    assert all(abs(x - 10750) < 800 for x in (one, two))


def test_bottom_bars_are_lapped_twice_near_supports(made: Scenario) -> None:
    corners, middle = lap_centres(made, Face.BOTTOM, 12), lap_centres(made, Face.BOTTOM, 16)
    assert (len(corners), len(middle)) == (4, 2)
    for x in (*corners, *middle):
        assert min(abs(x - support.x) for support in made.beam.supports) <= 1350
    assert corners[1] - corners[0] >= 767 and corners[3] - corners[2] >= 767


def test_laps_are_as_long_as_bars_take_to_develop(made: Scenario) -> None:
    # 12 and 16 · 435 / (4 · 2.24) = 583 and 777, rounded up to 10
    assert {(p.a.dia, round(p.length)) for p in laps(made.case)} == {(12.0, 590), (16.0, 780)}


def test_bars_that_are_alike_share_a_mark(made: Scenario) -> None:
    (extras,) = {rod.mark for rod in made.rods(Face.TOP, 16)}
    (row,) = (row for row in made.rows if row.mark == extras)
    assert (row.per_member, row.length) == (8, 1900)
    (link,) = (row for row in made.rows if row.role is Role.LINK)
    assert link.per_member == sum(len(made.link_xs(n)) for n in range(1, 6))
