"""One span of 4.5 m between columns, 230 x 450, three bars below and two hangers above.

Common practice, no source; every number is our own calculation.
"""

from __future__ import annotations

from itertools import pairwise

import numpy as np
import pytest
from scenario import COLUMN, MEGA, Line, Scenario, bottom, build, links, loaded, top

from detailer.cage.bar import Bar
from detailer.placing.frame import frame_of
from detailer.schedule.lengths import length_of
from detailer.values import Face, Role, Severity

LINE = Line(
    mark="SK1",
    width=230,
    depth=450,
    column=(300, 230),
    supports=[COLUMN] * 2,
    spans=[loaded(4500, 20, 10)],
    steel=[top("1", "2T12"), bottom("1", "3T16"), links(1, "2L-T8@200")],
)
MIDDLE = 2250.0


@pytest.fixture(scope="module")
def made(tmp_path_factory: pytest.TempPathFactory) -> Scenario:
    return build(tmp_path_factory.mktemp("s01"), LINE)


def test_nothing_is_unsafe_or_unbuildable(made: Scenario) -> None:
    assert made.blocking == set()


def test_what_is_asked(made: Scenario) -> None:
    # w l²/8 = 30 · 4.5² / 8 and w l/2 between the support centres
    assert made.moment(MIDDLE)[1] == pytest.approx(75.9, abs=0.1)
    assert made.case.envelope is not None
    assert made.case.envelope.shear(0.0)[1] / 1e3 == pytest.approx(67.5, abs=0.1)


def test_depth_counts_the_corner_seat(made: Scenario) -> None:
    # 450 - 30 - 8 - 8 = 404 for the middle bar; the two in the corners sit 0.293 (16 - 8) = 2.34
    # higher: 404 - 2/3 · 2.34 = 402.4
    assert made.case.steel.depth(MIDDLE, Face.BOTTOM) == pytest.approx(402.44, abs=0.05)
    (resists,) = made.case.steel.profile(np.array([MIDDLE]), sagging=True, full=True)
    # x = 603.2 · 435 / (0.36 · 25 · 230) = 126.8; 603.2 · 435 (402.4 - 0.42 · 126.8)
    assert resists.moment / MEGA == pytest.approx(91.6, abs=0.2)


def test_three_bars_fit_in_one_layer(made: Scenario) -> None:
    rods = made.rods(Face.BOTTOM, 16)
    ys = sorted(rod.at(MIDDLE)[0] for rod in rods)
    gaps = [b - a - 16 for a, b in pairwise(ys)]
    # (230 - 2·30 - 2·8 - 2·2.34 - 3·16) / 2, and with links of 11 and bars of 19 over ribs
    assert gaps == pytest.approx([50.6, 50.6], abs=0.1)
    assert frame_of(made.beam, made.beam.spans[0]).gap_over_ribs((16, 16, 16)) == pytest.approx(
        43.2, abs=0.1
    )


def test_links_are_22_at_195(made: Scenario) -> None:
    xs = made.link_xs(1)
    # first at 50 from each face: 4200 - 100 = 4100 = 21 spaces of 195.2 <= 200 (20 of 205 are not)
    assert len(xs) == 22
    assert xs[0] == pytest.approx(150 + 50) and xs[-1] == pytest.approx(4350 - 50)
    assert [b - a for a, b in pairwise(xs)] == pytest.approx([4100 / 21] * 21)
    (row,) = (row for row in made.rows if row.role is Role.LINK)
    assert row.per_member == 22
    # 2 (154 + 374) + 24·8 on inside dimensions; the centre line bends at 2φ with tails of 8φ
    assert row.length == 1250 and row.exact == pytest.approx(1244.5, abs=0.1)
    link = next(bar for bar in made.cage.bars if bar.role is Role.LINK)
    assert length_of(link, 10).rule == 1248


def test_length_of_a_bar_between_column_bars() -> None:
    # 4672 = 4200 + 2 (300 - 40 - 8 - 16), legs of 200. By the rule R/2 + φ = 3φ off for each bend
    # at 4φ: 5072 - 2·48 = 4976. The centre line: a bend takes 2·5φ off and gives π/2 · 4.5φ back:
    # 5072 - 2·46.9 = 4978.2. (The two had changed places where this was first written down.)
    y, z = 0.0, 8.0
    bar = Bar(
        id="bottom",
        role=Role.MAIN,
        face=Face.BOTTOM,
        layer=1,
        grade="Fe 500",
        dia=16.0,
        corners=((8, y, 200), (8, y, z), (4664, y, z), (4664, y, 200)),
        mandrels=(128.0, 128.0),
    )
    length = length_of(bar, 10)
    assert length.rule == 4976
    assert length.exact == pytest.approx(4978.2, abs=0.1)
    assert length.scheduled == 4980


def test_bottom_legs_stand_inside_the_legs_of_the_hangers(made: Scenario) -> None:
    # The hangers take the place at the column bars: 12 + 25 further in, 4672 - 74 = 4598. Ld/3 is
    # 259: 119 straight, 128 for the bend with 4φ beyond it, 12 more: 64 + 16 + 76 = 156, so 160.
    (below,) = (row for row in made.rows if row.dia == 16)
    assert below.per_member == 3
    assert below.shape is not None
    sizes = dict(below.shape.dimensions)
    assert (sizes["A"], sizes["B"], sizes["C"]) == (160, 4598, 160)
    # 4918 - 2·48 = 4822; the centre line is 2.2 longer
    assert below.length == 4830 and below.exact == pytest.approx(4824.2, abs=0.1)
    (above,) = (row for row in made.rows if row.dia == 12)
    assert above.shape is not None and dict(above.shape.dimensions)["B"] == 4672


def test_a_third_of_the_bottom_steel_is_anchored(made: Scenario) -> None:
    assert not made.found("bottom-into-support") and not made.found("bar-size")
    assert not made.found("minimum-steel")


def test_the_end_moment_is_asked_for(made: Scenario) -> None:
    for place in ("support A1", "support B1"):
        asked = made.one("end-moment", place)
        assert asked.severity is Severity.UNCLEAR
        # w l²/24, for comparison
        assert asked.required == pytest.approx(25.3, abs=0.1) and asked.found == 0


def test_the_hangers_leave_no_tolerance(made: Scenario) -> None:
    closing = made.one("closing-length")
    assert closing.severity is Severity.COSTLY
    assert (closing.found, closing.required) == (0, 10)
