"""One span of 9 m, 350 x 1000: the faces of a web deeper than 750 want steel of their own.

Common practice, no source; every number is our own calculation.
"""

from __future__ import annotations

from collections.abc import Sequence
from itertools import pairwise
from pathlib import Path

import numpy as np
import pytest
from scenario import COLUMN, MEGA, Line, Scenario, bottom, build, links, loaded, side, top

from detailer.values import Face, Role, Severity

MIDDLE = 4500.0


def line(faces: Sequence[str], *, depth: int = 1000, zone: str = "2L-T10@300") -> Line:
    return Line(
        mark="SK6",
        width=350,
        depth=depth,
        supports=[COLUMN] * 2,
        spans=[loaded(9000, 45, 15)],
        steel=[top("1", "3T16"), bottom("1", "4T25"), *faces, links(1, zone)],
    )


@pytest.fixture(scope="module")
def made(tmp_path_factory: pytest.TempPathFactory) -> Scenario:
    return build(tmp_path_factory.mktemp("s06"), line([side("1", "3T10")]))


def test_nothing_is_unsafe_or_unbuildable(made: Scenario) -> None:
    assert made.blocking == set()


def test_what_is_asked(made: Scenario) -> None:
    # w l²/8 = 60 · 9²/8 and w l/2
    assert made.moment(MIDDLE)[1] == pytest.approx(607.5, abs=0.1)
    assert made.case.envelope is not None
    assert made.case.envelope.shear(0.0)[1] / 1e3 == pytest.approx(270, abs=0.1)


def test_four_bars_are_enough(made: Scenario) -> None:
    # 1000 - 30 - 10 - 12.5 = 947.5 for the inner two; the corner bars sit 0.293 (20 - 12.5) = 2.2
    # higher: 946.4 on average
    assert made.case.steel.depth(MIDDLE, Face.BOTTOM) == pytest.approx(946.4, abs=0.1)


def test_side_bars_in_the_lower_half_help(made: Scenario, tmp_path: Path) -> None:
    bare = build(tmp_path, line([]))
    (alone,) = bare.case.steel.profile(np.array([MIDDLE]), sagging=True, full=True)
    # x = 1963.5 · 435 / (0.36 · 25 · 350) = 271.1; 1963.5 · 435 (946.4 - 0.42 · 271.1)
    assert alone.xu == pytest.approx(271.1, abs=0.2)
    assert alone.moment / MEGA == pytest.approx(711.1, abs=0.5)
    (resists,) = made.case.steel.profile(np.array([MIDDLE]), sagging=True, full=True)
    # two T10 at a depth of 722 yield too: x = 2120.6 · 435 / 3150 = 292.8;
    # 1963.5 · 435 (946.4 - 123.0) + 157.1 · 435 (721.9 - 123.0)
    assert resists.moment / MEGA == pytest.approx(744.2, abs=0.5)


def test_bars_stand_in_one_layer(made: Scenario) -> None:
    rods = made.rods(Face.BOTTOM, 25)
    assert [rod.layer for rod in rods] == [1] * 4
    ys = sorted(rod.at(MIDDLE)[0] for rod in rods)
    # (350 - 2 · 40 - 2 · 2.2 - 4 · 25) / 3
    assert [b - a - 25 for a, b in pairwise(ys)] == pytest.approx([55.2] * 3, abs=0.1)


def test_three_bars_on_each_face(made: Scenario) -> None:
    sides = made.bars(Role.SIDE)
    levels = {
        face: sorted(b.corners[0][2] for b in sides if b.face is face)
        for face in (Face.LEFT, Face.RIGHT)
    }
    assert levels[Face.LEFT] == pytest.approx(levels[Face.RIGHT])
    # six T10 are 471 mm² of 0.1 % of 350 · 1000 = 350. The corner bars' axes lie at
    # 30 + 10 + 12.5 + 2.2 = 54.7 and 30 + 10 + 8 + 3.5 = 51.5: (1000 - 106.2) / 4 = 223 apart
    steps = [b - a for a, b in pairwise([-945.3, *levels[Face.LEFT], -51.5])]
    assert steps == pytest.approx([223.4] * 4, abs=2)
    assert {abs(b.corners[0][1]) for b in sides} == {175 - 30 - 10 - 5}
    assert not made.found("side-steel") and not made.found("side-spacing")


def test_side_bars_enter_the_columns(made: Scenario) -> None:
    # nominal bars go 150 past each face
    (row,) = (row for row in made.rows if row.role is Role.SIDE)
    assert (row.per_member, row.length) == (6, 8700 + 2 * 150)


def test_two_small_bars_on_each_face_are_too_little(tmp_path: Path) -> None:
    found = build(tmp_path, line([side("1", "2T10")]))
    little = found.one("side-steel", "span 1")
    # four T10 are 314 mm²; at 298 they stand close enough
    assert (little.found, little.required) == (314, 350)
    assert little.severity is Severity.UNSAFE
    assert not found.found("side-spacing")


def test_two_bars_of_12_on_each_face_are_just_enough(tmp_path: Path) -> None:
    # 452 mm², (1000 - 106.2) / 3 = 298 apart, 300 allowed
    assert build(tmp_path, line([side("1", "2T12")])).blocking == set()


def test_one_bar_on_each_face_is_too_far_from_the_next(tmp_path: Path) -> None:
    found = build(tmp_path, line([side("1", "1T16")]))
    # 402 mm² would do, but half of 1000 - 106.2 is 447
    assert not found.found("side-steel")
    wide = found.found("side-spacing")
    assert wide and all(f.required == 300 for f in wide)
    assert max(f.found for f in wide) == pytest.approx(447, abs=3)


@pytest.mark.parametrize(("depth", "asked"), [(750, False), (760, True)])
def test_webs_up_to_750_ask_for_none(tmp_path: Path, depth: int, asked: bool) -> None:
    found = build(tmp_path, line([], depth=depth))
    assert bool(found.found("side-steel")) is asked
    assert bool(found.found("side-spacing")) is asked
    if asked:
        # 0.1 % of 350 · 760
        assert found.one("side-steel").required == 266


def test_links_are_30_at_297(made: Scenario) -> None:
    xs = made.link_xs(1)
    # 8700 - 100 = 8600 = 29 spaces of 296.6 <= 300
    assert len(xs) == 30
    assert [b - a for a, b in pairwise(xs)] == pytest.approx([8600 / 29] * 29)
    (row,) = (row for row in made.rows if row.role is Role.LINK)
    # inside 350 - 80 by 1000 - 80: 2 (270 + 920) + 24 · 10 = 2620. The centre line has radii of
    # 25: 2 (280 + 930) - 3 (2 - π/2) 25 for the bends, and 2 (3π/4 · 25 - 25 + 80) for the hooks
    assert row.per_member == 30 and row.length == 2620
    assert row.exact == pytest.approx(2615.7, abs=0.1)


def test_shear_asks_for_least_links_only(made: Scenario) -> None:
    # at d from the face 270 - 60 (0.15 + 0.946) = 204 kN. 100 · 1963 / (350 · 946) = 0.593: τc is
    # 0.52, 173 kN; two T10 at 296.6 carry 0.87 · 415 · 157.1 · 946 / 296.6 = 181 kN more; the
    # least is 0.4 · 350 / (0.87 · 415) = 0.388 of 157.1 / 296.6 = 0.530 mm²/mm
    rules = ("shear", "shear-limit", "link-area", "link-spacing", "link-count")
    assert not [f.message for rule in rules for f in made.found(rule)]


def test_links_further_apart_than_300_are_found(tmp_path: Path) -> None:
    found = build(tmp_path, line([side("1", "3T10")], zone="2L-T12@350"))
    # 8600 are 25 spaces of 344 <= 350, where the area would do at 226.2 / 0.388 = 583 and 0.75 d
    # is 709
    wide = found.one("link-spacing", "span 1")
    assert (round(wide.found), wide.required) == (344, 300)
    assert not found.found("link-area")


def test_no_deep_beam(made: Scenario) -> None:
    # 9000/1000 of 2 for a simple span; 9000/946 = 9.5 of 20
    assert not made.found("deflection")
