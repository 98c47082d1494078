"""A back span of 5 m and a cantilever of 2 m with a load at its tip, 300 x 550.

Common practice, no source; every number is our own calculation.
"""

from __future__ import annotations

from collections.abc import Sequence
from pathlib import Path

import numpy as np
import pytest
from scenario import COLUMN, MEGA, Line, Scenario, bottom, build, links, loaded, over, top

from detailer.checks.laps import laps
from detailer.values import Face

BELOW = [bottom("1", "3T16"), bottom("2", "2T12")]
LINKS = [links(1, "2L-T8@200"), links(2, "2L-T8@200")]
TIP = ", point = [{ x = 2000, dead = 20, imposed = 0 }]"  # 30 kN factored


def line(above: Sequence[str]) -> Line:
    return Line(
        mark="SK3",
        width=300,
        depth=550,
        supports=[COLUMN] * 2,
        spans=[loaded(5000, 30, 10), loaded(2000, 30, 10, kind="overhang", more=TIP)],
        steel=[*above, *BELOW, *LINKS],
    )


LINE = line([top("1-2", "2T12"), over("B1", "2T20+2T16")])


@pytest.fixture(scope="module")
def made(tmp_path_factory: pytest.TempPathFactory) -> Scenario:
    return build(tmp_path_factory.mktemp("s03"), LINE)


def test_nothing_is_unsafe_or_unbuildable(made: Scenario) -> None:
    assert made.blocking == set()


def test_what_is_asked(made: Scenario) -> None:
    envelope = made.case.envelope
    assert envelope is not None
    # the cantilever full: 40 · 2²/2 + 30 · 2 = 140 at the centre, V = 40 · 2 + 30 = 110
    assert envelope.shear(5000, side=1)[1] / 1e3 == pytest.approx(110, abs=0.1)
    # both spans full: 40 · 5/2 + 140/5
    assert envelope.shear(5000, side=-1)[0] / 1e3 == pytest.approx(-128, abs=0.1)
    # the column's face counts: 140 - 110 · 0.15 + 40 · 0.15²/2
    assert made.moment(5000)[0] == pytest.approx(-123.95, abs=0.1)
    # the cantilever bears its dead load only: 30 · 2²/2 + 60 = 120, R = 40 · 5/2 - 120/5 = 76;
    # R²/2w = 72.2 at R/w = 1.9
    x, sagging = made.sagging(1)
    assert x == pytest.approx(1900, abs=30) and sagging == pytest.approx(72.2, abs=0.1)
    # the back span bears its dead load only: R = 75 - 140/5 = 47, zero at 2 R/w = 3.133
    assert made.hogging_ends(1) == pytest.approx([5000 - 3133], abs=2)


def test_the_tail_goes_past_the_inflection(made: Scenario) -> None:
    # two T12 are 226 of 1257 mm², 18 % and no third: zero at 1867 - 150 = 1717 from the face, and
    # d = 496 (2 T20 at 48, T16 at 46 and 91, 2 T12 at 47) to 502 (the outer ones) more, against
    # 12φ = 240 and 4700/16 = 294: 2213 to 2219 in steps of 50. To develop takes 971 (T20)
    for dia in (16, 20):
        assert {left for left, _ in made.reaches(1, dia)} == {2250}


def test_main_bars_go_out_to_the_tip(made: Scenario) -> None:
    # two T12 are no third of them, and the tip's load keeps the top in tension all along
    for dia, count in ((20, 2), (16, 2)):
        tails = [rod.tips for rod in made.rods(Face.TOP, dia)]
        assert tails == [pytest.approx((2600, 7000 - 30))] * count
    for x in (5150.0, 6000.0, 6900.0):
        asked = -made.moment(x)[0]
        (resists,) = made.case.steel.profile(np.array([x]), sagging=False, full=False)
        assert resists.moment / MEGA >= asked > 0


def test_corner_bars_turn_down_at_the_tip(made: Scenario) -> None:
    (through,) = (b for b in made.cage.bars if b.face is Face.TOP and b.dia == 12)
    assert len(through.placings) == 2
    before, end = through.corners[-2:]
    # behind the cover of 30; down, at least the 4φ of the bend and 4φ beyond it
    assert before[0] == end[0] == pytest.approx(7000 - 30 - 6)
    assert before[2] - end[2] >= (2 + 0.5 + 4) * 12
    assert end[2] > made.beam.spans[1].soffit + 30


def test_nothing_is_lapped(made: Scenario) -> None:
    # 7056 + bends come out of one length of stock; what meets over the support only passes there
    assert laps(made.case) == ()


def test_the_cantilever_has_two_bars_below(made: Scenario) -> None:
    below = [r for r in made.case.steel.bars if r.face is Face.BOTTOM and r.covers(6500)]
    assert [r.dia for r in below] == [12, 12]
    assert {r.tips[1] for r in below} == {7000 - 30}
    # and no sagging at all: the tip's load is dead
    assert made.moment(6500)[1] < 0


def test_span_to_depth_of_a_cantilever_is_kept(made: Scenario) -> None:
    # 2000/496 = 4.0 of 7
    assert not made.found("deflection")


def test_a_tail_that_stops_early_is_found(tmp_path: Path) -> None:
    short = line([top("1-2", "2T12"), over("B1", "2T20+2T16", 'reach = [1300, "end"]\n')])
    made = build(tmp_path, short)
    third = made.one("third-past-inflection", "support B1")
    # two T12 of 1257 mm²
    assert (third.found, third.required) == (226, 419)
    # x = 226.2 · 435 / (0.36 · 25 · 300) = 36.4; 226.2 · 435 (503.1 - 0.42 · 36.4) = 48.0;
    # 47 x - 15 x² = -48 at 3.943, 907 from the face; the depth of 496 to 503 more
    early = made.one("cut-off-extension", "support B1")
    assert early.found == 1300
    assert 907 + 496 - 3 <= early.required <= 907 + 503 + 3


def test_two_bars_alone_are_too_far_apart_in_the_cantilever(tmp_path: Path) -> None:
    made = build(tmp_path, line([top("1-2", "2T20"), over("B1", "2T16")]))
    # x = 628.3 · 435 / (0.36 · 25 · 300) = 101; 628.3 · 435 (500.2 - 0.42 · 101) = 125.1 > 123.95:
    # the extras are not needed, and stop where they are developed, 777 from the faces
    assert made.reaches(1, 16) == {(800, 800)}
    # 300 - 2 · 38 - 2 · 0.293 (16 - 10) - 2 · 20
    wide = made.one("maximum-spacing", "span 2")
    assert wide.found == pytest.approx(180.5, abs=0.1) and wide.required == 150
