"""Two spans of 5 m, two T16 through and two more over the support: four bars in 230 mm.

Common practice, no source; every number is our own calculation.
"""

from __future__ import annotations

from dataclasses import replace
from itertools import pairwise
from pathlib import Path

import numpy as np
import pytest
from scenario import MEGA, Scenario, bottom, build, links, over, terrace, top

from detailer.values import Face, Role, Severity

LINE = terrace([5000, 5000], "2T16", "2T16", [bottom("1-2", "3T16")])
ONE_LAYER = replace(
    LINE,
    steel=[
        top("1-2", "2T16"),
        over("B1", "2T16", "layer = 1\n"),
        bottom("1-2", "3T16"),
        links(1, "2L-T8@200"),
        links(2, "2L-T8@200"),
    ],
)


@pytest.fixture(scope="module")
def made(tmp_path_factory: pytest.TempPathFactory) -> Scenario:
    return build(tmp_path_factory.mktemp("s02a"), ONE_LAYER)


def test_what_is_asked(made: Scenario) -> None:
    envelope = made.case.envelope
    assert envelope is not None
    # both spans loaded: w l²/8 = 112.5 over the support, V = 5 w l/8 = 112.5 beside it
    assert envelope.shear(5000, side=-1)[0] / 1e3 == pytest.approx(-112.5, abs=0.1)
    # the column's face counts: 112.5 - 112.5 · 0.15 + 36 · 0.15²/2
    assert made.moment(5000)[0] == pytest.approx(-96.0, abs=0.1)
    # one span loaded: M over the support (36 + 24) 5²/16 = 93.75, so R = 90 - 18.75 = 71.25
    # and R²/2w = 70.5 at R/w = 1.98
    x, sagging = made.sagging(1)
    assert x == pytest.approx(1980, abs=30) and sagging == pytest.approx(70.5, abs=0.1)
    # the other span loaded: R = 60 - 18.75 = 41.25, zero at 2 R/w = 3.4375
    assert made.hogging_ends(1) == pytest.approx([5000 - 3437.5], abs=2)


def test_four_bars_in_one_layer_fit_on_paper_only(made: Scenario) -> None:
    ys = sorted(rod.at(5000)[0] for rod in made.rods(Face.TOP, 16) if rod.covers(5000))
    # (230 - 2·38 - 2·2.34 - 4·16) / 3, and (230 - 2·41 - 2·2.34 - 4·19) / 3 over ribs
    assert [b - a - 16 for a, b in pairwise(ys)] == pytest.approx([28.4] * 3, abs=0.1)
    found = made.found("rib-spacing", "support B1")
    assert found and all(f.severity is Severity.UNBUILDABLE for f in found)
    assert min(f.found for f in found) == pytest.approx(22.4, abs=0.1)
    assert {f.required for f in found} == {25.0}
    assert not made.found("clear-spacing")
    assert {rule for rule, _ in made.blocking} == {"rib-spacing"}


def test_left_open_the_fourth_bar_goes_into_a_second_layer(tmp_path: Path) -> None:
    free = build(tmp_path, LINE)
    over_support = [rod.layer for rod in free.rods(Face.TOP, 16) if rod.covers(5000)]
    assert sorted(over_support) == [1, 1, 1, 2]
    assert free.blocking == set()
    (spacers,) = (row for row in free.rows if row.role is Role.SPACER)
    assert spacers.per_member >= 2


def test_extras_stop_by_what_goes_on_not_by_a_quarter_of_the_span(made: Scenario) -> None:
    extras = tuple((r.id, r.placing) for r in made.rods(Face.TOP, 16) if r.tips[0] > 1000)
    theory = 4850.0 - 225
    (rest,) = made.case.steel.profile(np.array([theory]), sagging=False, full=True, without=extras)
    # x = 402.1 · 435 / (0.36 · 25 · 230) = 84.5; 402.1 · 435 (451.7 - 0.42 · 84.5)
    assert rest.moment / MEGA == pytest.approx(72.8, abs=0.1)
    assert made.moment(theory)[0] == pytest.approx(-72.8, abs=0.2)
    # 225 + d = 677 from the face; to develop 0.87 fy there takes 16 · 435 / (4 · 2.24) = 777:
    # 800 in steps of 50, less than a quarter of the clear span (1175)
    assert made.reaches(1, 16) == {(800, 800)}


def test_the_size_in_one_layer_is_enough(made: Scenario) -> None:
    # 655 mm² would do for the 112.5 kN m at the centre; four T16 are 804
    (resists,) = made.case.steel.profile(np.array([5000.0]), sagging=False, full=True)
    assert resists.moment / MEGA == pytest.approx(133.6, abs=0.3)
    assert not made.found("bending")
