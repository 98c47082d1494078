"""6 m of 300 x 600 and 4 m of 300 x 450: level tops, a sunken top, and what the step asks of bars.

Common practice, no source; every number is our own calculation.
"""

from __future__ import annotations

from collections.abc import Sequence
from itertools import pairwise
from pathlib import Path

import numpy as np
import pytest
from scenario import COLUMN, MEGA, Line, Scenario, bottom, build, links, loaded, over, top

from detailer.cage.bar import Bar
from detailer.checks.laps import laps
from detailer.drawing.primitives import Pen
from detailer.values import Face, Role
from detailer.views.kit import Kit
from detailer.views.outline import concrete_outline

BELOW = [bottom("1", "3T20"), bottom("2", "3T16")]
DEVELOP = 20 * 435 / (4 * 2.24)  # 971 for T20


def line(above: Sequence[str], below: Sequence[str] = BELOW, *, drop: int = 0) -> Line:
    shallow = f", section = {{ width = 300, depth = 450, drop = {drop} }}"
    return Line(
        mark="SK4",
        width=300,
        depth=600,
        supports=[COLUMN] * 3,
        spans=[loaded(6000, 30, 15), loaded(4000, 30, 15, more=shallow)],
        steel=[*above, *below, links(1, "2L-T8@200"), links(2, "2L-T8@200")],
    )


def of(made: Scenario, face: Face, at: float) -> list[Bar]:
    """Return bars of a face that reach x, one for each shape."""
    bars = [b for b in made.cage.bars if b.face is face and b.role is Role.MAIN]
    return [b for b in bars if b.corners[0][0] <= at <= b.corners[-1][0]]


def level(bar: Bar) -> float:
    """Return z of a bar's longest straight."""
    return max(pairwise(bar.corners), key=lambda ends: ends[1][0] - ends[0][0])[0][2]


@pytest.fixture(scope="module")
def made(tmp_path_factory: pytest.TempPathFactory) -> Scenario:
    return build(tmp_path_factory.mktemp("s04"), line([top("1-2", "4T20")]))


@pytest.fixture(scope="module")
def sunken(tmp_path_factory: pytest.TempPathFactory) -> Scenario:
    return build(tmp_path_factory.mktemp("s04sunk"), line([top("1-2", "3T20")], drop=100))


@pytest.fixture(scope="module")
def flush(tmp_path_factory: pytest.TempPathFactory) -> Scenario:
    """Return the same sunken by 150, so that the soffits are in line."""
    return build(tmp_path_factory.mktemp("s04flush"), line([top("1-2", "3T20")], drop=150))


def test_nothing_is_unsafe_or_unbuildable(made: Scenario) -> None:
    assert made.blocking == set()


def test_what_is_asked(made: Scenario) -> None:
    envelope = made.case.envelope
    assert envelope is not None
    # the deep span is (600/450)³ = 2.370 times as stiff: three moments give
    # 45/8 (6³/2.370 + 4³) / (6/2.370 + 4) = 133.6 over the support
    assert envelope.shear(6000, side=-1)[0] / 1e3 == pytest.approx(-(135 + 133.6 / 6), abs=0.1)
    assert envelope.shear(6000, side=1)[1] / 1e3 == pytest.approx(90 + 133.6 / 4, abs=0.1)
    # the worse face counts, that of the short span: 133.6 - 123.4 · 0.15 + 45 · 0.15²/2
    assert made.hogging(1) == pytest.approx(115.6, abs=0.1)
    # span 1 full, span 2 dead: (45 · 91.1 + 30 · 64) / 8 / 6.53 = 115.2; R = 135 - 19.2 = 115.8
    # and R²/2w at R/w = 2.57
    x, sagging = made.sagging(1)
    assert x == pytest.approx(2573, abs=30) and sagging == pytest.approx(149.0, abs=0.1)
    # span 1 dead, span 2 full: (30 · 91.1 + 45 · 64) / 8 / 6.53 = 107.4; R = 90 - 26.9 = 63.1
    assert made.sagging(2)[1] == pytest.approx(44.3, abs=0.1)
    # span 2 dead: R = 60 - 115.2/4 = 31.2, zero at 2 R/w = 2.08
    assert made.hogging_ends(2) == pytest.approx([1921], abs=2)


def test_four_bars_at_the_support_of_the_shallow_span(made: Scenario) -> None:
    below = tuple((r.id, r.placing) for r in made.case.steel.bars if r.face is Face.BOTTOM)
    (alone,) = made.case.steel.profile(np.array([6151.0]), sagging=False, full=True, without=below)
    # 450 - 30 - 8 - 10 = 402, the corner bars 1.8 lower: 401.1. x = 1256.6 · 435 / 2700 = 202.4 is
    # 0.50 d, past 0.46 d = 184.5: 0.36 · 25 · 300 · 184.5 (401.1 - 0.42 · 184.5)
    assert alone.over_reinforced and alone.d == pytest.approx(401.1, abs=0.1)
    assert alone.moment / MEGA == pytest.approx(161.2, abs=0.2)
    # the bottom bars in compression bring the neutral axis back, 16φ = 256 being more than 200
    (held,) = made.case.steel.profile(np.array([6151.0]), sagging=False, full=True)
    assert held.compression_used and not held.over_reinforced
    assert held.moment > alone.moment > 133.6 * MEGA
    # x = 202.4 of 253.5; 1256.6 · 435 (551.1 - 0.42 · 202.4)
    (deep,) = made.case.steel.profile(np.array([5849.0]), sagging=False, full=True)
    assert deep.moment / MEGA == pytest.approx(254.8, abs=0.2)


def test_three_small_bars_are_too_little_in_the_long_span(tmp_path: Path) -> None:
    short = build(tmp_path, line([top("1-2", "4T20")], [bottom("1-2", "3T16")]))
    lack = short.one("bending", "span 1")
    # x = 603.2 · 435 / 2700 = 97.2; 603.2 · 435 (552.4 - 0.42 · 97.2)
    assert lack.found == pytest.approx(134.2, abs=0.2)
    assert lack.required == pytest.approx(149.0, abs=0.1)
    assert {rule for rule, _ in short.blocking} == {"bending"}


def test_top_bars_run_through_in_one_piece(made: Scenario) -> None:
    above = made.rods(Face.TOP, 20)
    assert len(above) == 4 and all(rod.tips[0] < 0 and rod.tips[1] > 10000 for rod in above)
    (row,) = (row for row in made.rows if row.mark == above[0].mark)
    assert row.length <= 12000
    assert laps(made.case) == ()


def test_bottom_bars_stop_at_the_step_150_apart(made: Scenario) -> None:
    long, short = of(made, Face.BOTTOM, 3000), of(made, Face.BOTTOM, 8000)
    assert not set(long) & set(short)
    # 30 + 8 above their own soffits; outer bars sit up to 2.4 off the corners of the links
    low = min(level(b) - 10 for b in long)
    assert low == pytest.approx(-600 + 38, abs=0.1)
    assert min(level(b) - 8 for b in short) - low == pytest.approx(150, abs=0.1)


def test_short_span_bars_go_straight_through_the_column(made: Scenario) -> None:
    # Ld/3 of T16 is 777/3 = 259, in steps of 50: the far face, inside the long span's depth
    for bar in of(made, Face.BOTTOM, 8000):
        assert bar.corners[0][0] == pytest.approx(6150 - 300)
        assert {round(z) for x, _, z in bar.corners if x < 6500} == {round(level(bar))}
    assert not made.found("bottom-into-support")


def test_long_span_bars_turn_up_in_the_column(made: Scenario) -> None:
    # Ld/3 of T20 is 324 and the soffit steps up: 300 - 40 - 8 - 16 = 236 to the column's far bars,
    # less what the top bars' legs may take
    for bar in of(made, Face.BOTTOM, 3000):
        before, end = bar.corners[-2:]
        assert 5850 + 150 < before[0] + 10 <= 5850 + 236
        assert before[0] == end[0] and before[1] == end[1]
        # straight to the bend, 8φ for the bend with 4φ beyond it, and the rest of the tail
        straight, tail = before[0] - 90 - 5850, end[2] - before[2] - 90 - 80
        assert straight + 160 + tail >= DEVELOP / 3
        # and the leg stays below the top bars
        assert end[2] < -50 - 20


def test_the_step_is_drawn(made: Scenario) -> None:
    outline = [p.points for p in concrete_outline(made.cage, Kit("SK4", 25.0))]
    corners = {(round(x), round(z)) for points in outline for x, z in points}
    assert {(5850, -600), (6150, -450)} <= corners
    assert not {(5850, -450), (6150, -600)} & corners
    solid = [p for p in concrete_outline(made.cage, Kit("SK4", 25.0)) if p.pen is Pen.OUTLINE]
    # nowhere does the soffit go on across the column
    for path in solid:
        for (x0, z0), (x1, z1) in pairwise(path.points):
            assert not (z0 == z1 < 0 and min(x0, x1) < 6000 < max(x0, x1))


def test_links_are_of_two_sizes(made: Scenario) -> None:
    # 5700 - 100 = 28 spaces of 200, 3700 - 100 = 18
    assert (len(made.link_xs(1)), len(made.link_xs(2))) == (29, 19)
    rows = [row for row in made.rows if row.role is Role.LINK]
    sizes = [dict(row.shape.dimensions) for row in rows if row.shape is not None]
    assert sorted((s["A"], s["E"]) for s in sizes) == [(224, 374), (224, 524)]


def test_extras_reach_as_far_as_they_take_to_develop(tmp_path: Path) -> None:
    made = build(tmp_path, line([top("1-2", "2T20"), over("B1", "2T20")]))
    assert made.blocking == set()
    # x = 628.3 · 435 / 2700 = 101; 628.3 · 435 (400.2 - 0.42 · 101) = 97.8, which is reached 158
    # from the face: 158 + 400 is less than 971, in steps of 50
    assert {right for _, right in made.reaches(1, 20)} == {1000}


# -- a sunken top ------------------------------------------------------------------------------


@pytest.mark.parametrize("which", ["sunken", "flush"])
def test_no_bar_turns_the_re_entrant_corner(request: pytest.FixtureRequest, which: str) -> None:
    made: Scenario = request.getfixturevalue(which)
    step = made.beam.spans[1].section.drop
    above = [b for b in made.cage.bars if b.face is Face.TOP and b.role is Role.MAIN]
    high = [b for b in above if level(b) > -step]
    low = [b for b in above if level(b) < -step]
    assert sum(len(b.placings) for b in high) == sum(len(b.placings) for b in low) == 3
    for bar in above:
        for (x0, _, z0), (x1, _, z1) in pairwise(bar.corners):
            # level or plumb: none slopes down to the other top
            assert abs(x1 - x0) < 0.1 or abs(z1 - z0) < 0.1
    # the upper ones turn down in the column, 40 + 8 + 16 inside it, and go nowhere near the slab
    assert {b.corners[-2][0] + 10 for b in high} == {6150 - 64}
    # the lower ones run straight on below them, developed beyond the face that asks for them
    assert all(b.corners[0][0] <= 6150 - DEVELOP for b in low)
    assert all(level(b) + 10 <= -step - 38 + 0.1 for b in low)


@pytest.mark.parametrize("which", ["sunken", "flush"])
def test_both_are_anchored(request: pytest.FixtureRequest, which: str) -> None:
    made: Scenario = request.getfixturevalue(which)
    step = made.beam.spans[1].section.drop
    low = {b.id for b in made.cage.bars if b.face is Face.TOP and level(b) < -step}
    others = tuple(
        (r.id, r.placing)
        for r in made.case.steel.bars
        if r.id in low or r.face is not Face.TOP or r.role is Role.SIDE
    )
    x = 5849.0
    (upper,) = made.case.steel.profile(np.array([x]), sagging=False, full=False, without=others)
    # 6086 - 100 - 5850 = 136 straight, 8φ for the bend with 4φ beyond it, 450 - 90 - 80 more: 576
    # of 971. x = 0.593 · 942.5 · 435 / 2700 = 90; 0.593 · 942.5 · 435 (550.8 - 0.42 · 90)
    assert upper.moment / MEGA == pytest.approx(124.8, abs=1.0)
    assert upper.moment / MEGA >= -made.moment(x)[0]
    # 151.8 of 184.4; 942.5 · 435 (400.8 - 0.42 · 151.8)
    (lower,) = made.case.steel.profile(np.array([6151.0]), sagging=False, full=False)
    assert lower.moment / MEGA == pytest.approx(138.2, abs=0.3)


def test_with_soffits_in_line_all_fits(flush: Scenario) -> None:
    assert flush.blocking == set()
    assert laps(flush.case) == ()
