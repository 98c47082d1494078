"""Where bars stop: IS 456:2000, 26.2.3.1 and the three ways of 26.2.3.2."""

from __future__ import annotations

from math import sqrt

import pytest
from check_cases import SECTION, area, bottom, case, lap, loops, one, only, parabola, top

from detailer.checks import Case, cutoffs
from detailer.model import Section
from detailer.values import Severity, SupportKind

D = 454.0
"""500 − 30 − 8 − 16/2 [mm]."""

AS = 402.124
"""2 φ 16 [mm²]."""

REST = AS * 435 * (D - 0.42 * AS * 435 / (0.36 * 25 * 300))
"""What 2 φ 16 resist by Annex G: x = 64.8, 74.65 kN·m [N·mm]."""

PAIR = (-100.0, 100.0)
INNER = (-40.0, 40.0)


def test_the_hand_numbers() -> None:
    assert area(16, 2) == pytest.approx(AS, abs=0.01)
    assert pytest.approx(74.65, abs=0.01) == REST / 1e6


# -- past the theoretical point: 26.2.3.1 -------------------------------------------------------


def stopped(left: float, right: float = 5990.0, dia: float = 16, **what: object) -> Case:
    """Return 2 φ 16 that run through and two bars from `left` to `right`, under 120 kN·m.

    Those two end within their supports before the centre.
    """
    more = {"m": parabola(120e6), "kind": SupportKind.WALL, "step": 25.0, **what}
    return case(
        bottom("through", -150, 6150, 16, PAIR),
        bottom("cut", left, right, dia, INNER),
        loops("l", 150, last=5750),
        **more,  # type: ignore[arg-type]
    )


THEORY = 6000 * (1 - sqrt(1 - REST / 120e6)) / 2
"""4 · 120 · a (1 − a) = 74.65 at a = 0.1926: 1156 from the left support [mm]."""


def test_bars_that_go_d_past_the_point_may_stop() -> None:
    # max(d, 12 φ) = max(454, 192); the point is found to 5 mm, and 6 mm are let pass
    assert pytest.approx(1155.8, abs=0.1) == THEORY
    assert not only(cutoffs.check(stopped(THEORY - D)), "cut-off-extension")
    assert not only(cutoffs.check(stopped(10, 6000 - THEORY + D)), "cut-off-extension")


@pytest.mark.parametrize("left", [True, False])
def test_bars_that_stop_short_of_it(left: bool) -> None:
    at = THEORY - 400 if left else 6000 - THEORY + 400
    made = stopped(at) if left else stopped(10, at)
    found = one(cutoffs.check(made), "cut-off-extension")
    assert found.found == pytest.approx(400, abs=5)
    assert (found.required, found.unit) == (454, "mm")
    assert found.severity is Severity.UNSAFE
    assert found.clause == "IS 456:2000, 26.2.3.1"
    assert found.place.name == "span 1"
    assert found.x == pytest.approx(at)
    assert found.bars == ("cut",)
    assert "effective depth" in found.message


def test_bars_that_stop_where_they_are_needed() -> None:
    found = one(cutoffs.check(stopped(2000.0)), "cut-off-extension")
    assert (found.found, found.required) == (0, 454)


def test_twelve_diameters_govern_in_a_shallow_beam() -> None:
    # 300 × 250: 2 φ 16 at d = 204; 12 · 25 = 300 > 204
    rest = AS * 435 * (204 - 0.42 * AS * 435 / 2700)
    peak = 1.5 * rest
    theory = 6000 * (1 - sqrt(1 - rest / peak)) / 2
    shallow = Section(width=300.0, depth=250.0)

    def made(kept: float) -> Case:
        return case(
            bottom("through", -150, 6150, 16, PAIR, z=-204.0),
            bottom("cut", theory - kept, 5990, 25, INNER, z=-204.0),
            loops("l", 100, height=190),
            section=shallow, m=parabola(peak), kind=SupportKind.WALL, step=25.0,
        )  # fmt: skip

    assert not only(cutoffs.check(made(300.0)), "cut-off-extension")
    found = one(cutoffs.check(made(250.0)), "cut-off-extension")
    assert found.found == pytest.approx(250, abs=5)
    assert found.required == 300
    assert "12 φ" in found.message


def test_bars_that_are_nowhere_needed_may_stop_anywhere() -> None:
    made = stopped(2000.0, 4000.0, m=parabola(0.99 * REST))
    assert not only(cutoffs.check(made), "cut-off-extension")


def test_ends_in_supports_laps_and_free_ends_are_no_cuts() -> None:
    assert cutoffs.cuts(stopped(150.0)) == ()  # at the face
    lapped = case(
        bottom("a", -150, 3800, 16), bottom("b", 3000, 6150, 16, (16.0,)), loops("l", 150),
        contacts=(lap("a", "b", 3000, 3800),), m=parabola(50e6),
    )  # fmt: skip
    assert cutoffs.cuts(lapped) == ()
    tip = case(top("t", -150, 7470, 16, PAIR), loops("l", 150), tips=(0.0, 1500.0), m=-20e6)
    assert cutoffs.cuts(tip) == ()


def test_ends_within_30_mm_stop_together() -> None:
    made = case(
        bottom("through", -150, 6150, 16, PAIR),
        bottom("p", 1000, 6150, 16), bottom("q", 1029, 6150, 16, (40.0,)),
        bottom("r", 1070, 6150, 16, (-40.0,)), loops("l", 150), m=parabola(50e6),
    )  # fmt: skip
    assert [c.marks for c in cutoffs.cuts(made)] == [("p", "q"), ("r",)]


def over_support(reach: float) -> Case:
    """Return 2 φ 16 through and two that reach past the inner face, under 120 kN·m there."""
    return case(
        top("through", -150, 12150, 16, PAIR),
        top("cut", 5850 - reach, 6150 + reach, 16, INNER),
        loops("l", 150, last=11800),
        lengths=(6000.0, 6000.0),
        m=lambda x: -120e6 * (1 - abs(x - 6000) / 1500),
        step=50.0,
    )


def test_top_bars_past_the_face_of_a_support() -> None:
    # 120 (1 − u/1500) = 74.65 at u = 566.9 from the centre, 416.9 past the face; + d = 870.9
    past = 1500 * (1 - REST / 120e6) - 150
    assert past == pytest.approx(416.9, abs=0.1)
    assert not only(cutoffs.check(over_support(past + D)), "cut-off-extension")
    found = only(cutoffs.check(over_support(800.0)), "cut-off-extension")
    assert [f.place.name for f in found] == ["support B1"] * 2
    for finding in found:
        # measured from the face: the length a fixer can see
        assert finding.found == 800
        assert finding.required == pytest.approx(past + D, abs=5)
        assert "past the face" in finding.message


def test_without_results_nothing_is_asked() -> None:
    assert list(cutoffs.check(stopped(2000.0, m=None))) == []


# -- in a tension zone: 26.2.3.2 ------------------------------------------------------------------

# At the cut 2 φ 16 go on: pt = 100 · 402.1/(300 · 454) = 0.2952; Table 19, M25: τc = 0.36 +
# 0.13 · 0.0452/0.25 = 0.3835, times b d = 52.24 kN. Links 2L-8 at 150: 100.53 · 361.05 · 454/150
# = 109.86. Permitted 162.1; 2/3 of it 108.1, 3/4 of it 121.6.
CONCRETE = (0.36 + 0.13 * (100 * AS / (300 * D) - 0.25) / 0.25) * 300 * D
ASV = area(8, 2)


def tense(v: float, m: float = 60e6, spacing: float = 150.0, dia: float = 16) -> Case:
    """Return two bars that stop at 1500 under a moment and a shear alike all along."""
    return case(
        bottom("through", -150, 6150, 16, PAIR),
        bottom("cut", 1500, 5990, dia, INNER),
        loops("l", spacing, last=5750 if spacing == 150 else 5800),
        m=m,
        v=v,
        kind=SupportKind.WALL,
    )


def test_way_a_two_thirds_of_the_shear() -> None:
    links = ASV * 0.87 * 415 * D / 150
    assert (CONCRETE / 1e3, links / 1e3) == pytest.approx((52.24, 109.86), abs=0.02)
    limit = 2 / 3 * (CONCRETE + links)
    assert not only(cutoffs.check(tense(0.99 * limit)), "cut-off-in-tension")
    found = one(cutoffs.check(tense(110e3)), "cut-off-in-tension")
    assert found.found == 110.0
    assert found.required == pytest.approx(limit / 1e3, abs=0.1)
    assert (found.unit, found.severity) == ("kN", Severity.UNSAFE)
    assert found.clause == "IS 456:2000, 26.2.3.2"
    assert found.place.name == "span 1" and found.x == 1500
    assert found.bars == ("cut",)


@pytest.mark.parametrize(
    ("v", "m", "found"),
    [
        (115e3, 36e6, False),  # the rest carries twice 36, and V <= 121.6
        (115e3, 38e6, True),  # twice 38 > 74.65
        (121e3, 36e6, False),
        (122.5e3, 36e6, True),  # V > 3/4 of the permitted shear
    ],
)
def test_way_c_twice_the_area(v: float, m: float, found: bool) -> None:
    assert bool(only(cutoffs.check(tense(v, m)), "cut-off-in-tension")) is found


@pytest.mark.parametrize(("v", "found"), [(168e3, False), (172e3, True)])
def test_way_b_extra_links(v: float, found: bool) -> None:
    # links at 100 <= d/(8 β) = 454/(8 · 0.5) = 113.5; extra 0.4 b s/fy = 0.4 · 300 · 100/415 =
    # 28.9, so 100.53 − 28.9 = 71.6 left: V = 52.24 + 71.6 · 361.05 · 454/100 = 169.6 kN
    limit = CONCRETE + (ASV - 0.4 * 300 * 100 / 415) * 0.87 * 415 * D / 100
    assert limit / 1e3 == pytest.approx(169.6, abs=0.1)
    made = tense(v, spacing=100.0)
    assert v > 2 / 3 * (CONCRETE + ASV * 0.87 * 415 * D / 100)  # way a does not serve
    assert bool(only(cutoffs.check(made), "cut-off-in-tension")) is found


def test_way_b_needs_its_spacing() -> None:
    # at 120 > 113.5 the same bars may not stop, though the area would do; 5600/120 -> 47 · 119.1
    s = 5600 / 47
    links = ASV * 0.87 * 415 * D / s
    v = 0.70 * (CONCRETE + links)
    extra = ASV - (v - CONCRETE) * s / (0.87 * 415 * D)
    assert extra > 0.4 * 300 * s / 415
    assert only(cutoffs.check(tense(v, spacing=120.0)), "cut-off-in-tension")


def test_bars_that_stop_under_compression_are_free() -> None:
    assert not only(cutoffs.check(tense(400e3, m=-60e6)), "cut-off-in-tension")


def test_the_section_is_the_one_of_the_numbers() -> None:
    assert (SECTION.width, SECTION.depth) == (300, 500)
