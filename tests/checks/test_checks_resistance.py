"""Bending resistance along the line: IS 456:2000, 38.1, Annex G, 26.2.1."""

from __future__ import annotations

import pytest
from check_cases import LD, area, bottom, case, lap, loops, one, only, parabola, top

from detailer.cage.bar import Bar
from detailer.checks import Case, resistance
from detailer.values import Severity, SupportKind

FOUR = (-100.0, -33.0, 33.0, 100.0)
PAIR = (-100.0, 100.0)


def simple(*bars: Bar, peak: float, **what: object) -> Case:
    more = {"m": parabola(peak), "kind": SupportKind.WALL, "step": 25.0, **what}
    return case(*bars, loops("l", 150), **more)  # type: ignore[arg-type]


def annex_g(steel: float, d: float, b: float = 300.0) -> float:
    """Return 0.87 fy As (d − 0.42 x), x from C = T with the block of 0.36 fck [N·mm]."""
    x = steel * 435 / (0.36 * 25 * b)
    return steel * 435 * (d - 0.42 * x)


FULL = annex_g(area(16, 4), 454.0)


def test_four_bars_of_16() -> None:
    # x = 804.2 · 435/2700 = 129.6 < 0.46 · 454; 804.2 · 435 (454 − 54.4) = 139.8
    assert pytest.approx(139.8, abs=0.05) == FULL / 1e6
    bars = bottom("b", -150, 6150, 16, FOUR)
    assert list(resistance.check(simple(bars, peak=0.995 * FULL))) == []
    found = one(resistance.check(simple(bars, peak=143e6)), "bending")
    assert (found.found, found.required, found.unit) == (139.8, 143.0, "kN m")
    assert found.severity is Severity.UNSAFE
    assert found.clause == "IS 456:2000, 38.1, 26.2.1"
    assert found.place.name == "span 1" and found.x == pytest.approx(3000)
    assert found.bars == ("b",)
    assert found.remedy == "Add bottom steel"


def test_top_bars_under_hogging() -> None:
    bars = top("t", -1000, 7000, 16, FOUR)
    made = simple(bars, peak=0, m=-FULL * 0.995)
    assert list(resistance.check(made)) == []
    found = one(resistance.check(simple(bars, peak=0, m=-145e6)), "bending")
    assert (found.found, found.required) == (139.8, 145)
    assert found.remedy == "Add top steel"


def test_a_bar_counts_by_its_embedment() -> None:
    # two bars stop at 2000: at 2000 + Ld/2 they count half: 3 φ 16 resist annex_g(603)
    half = 2000 + LD[16] / 2
    bars = bottom("b", -150, 6150, 16, PAIR), bottom("c", 2000, 6150, 16, (-33.0, 33.0))
    enough = annex_g(area(16, 3), 454.0)

    def spike(high: float) -> Case:
        return simple(*bars, peak=0, m=lambda x: high if abs(x - half) < 13 else 1e6, step=25.0)

    case_ = spike(0.97 * enough)
    assert list(resistance.check(case_)) == []
    found = one(resistance.check(spike(1.06 * enough)), "bending")
    assert found.found == pytest.approx(enough / 1e6, rel=0.03)
    assert found.remedy == "Extend or anchor the bars further"
    assert "not developed" in found.message


def test_top_bars_of_a_cantilever_go_back_behind_the_face() -> None:
    # clear overhang of 1.35 m, 80 kN·m at its face; half of Ld behind it: half of 4 φ 16
    def made(behind: float) -> Case:
        return case(
            top("t", 6150 - behind, 7470, 16, FOUR),
            loops("l", 150),
            tips=(0.0, 1500.0),
            m=lambda x: -80e6 * ((7500 - x) / 1350) ** 2 if x >= 6150 else 0.0,
            step=50.0,
        )

    assert list(resistance.check(made(LD[16]))) == []
    found = one(resistance.check(made(LD[16] / 2)), "bending")
    half = annex_g(area(16, 2), 454.0)
    assert found.found == pytest.approx(half / 1e6, abs=0.1)
    assert (found.required, found.x) == (80, 6150)
    assert found.place.name == "support B1"


def test_too_much_steel_does_not_yield() -> None:
    # 6 φ 25 = 2945: x would be 474 > 0.46 · 449.5 = 206.8: capped at
    # 0.36 · 0.46 (1 − 0.42 · 0.46) 25 · 300 · 449.5² = 202.5 kN·m
    limit = 0.36 * 0.46 * (1 - 0.42 * 0.46) * 25 * 300 * 449.5**2
    bars = bottom("b", -150, 6150, 25, (-100.0, -60.0, -20.0, 20.0, 60.0, 100.0))
    assert list(resistance.check(simple(bars, peak=0.99 * limit))) == []
    found = one(resistance.check(simple(bars, peak=1.03 * limit)), "bending")
    assert found.found == pytest.approx(limit / 1e6, abs=0.1)
    assert found.remedy == "Add compression steel or depth"


def test_each_stretch_is_told_once() -> None:
    bars = bottom("b", -150, 6150, 16, PAIR)
    two = annex_g(area(16, 2), 454.0)

    def humps(x: float) -> float:
        return 1.2 * two if 1500 < x < 2500 or 3500 < x < 4500 else 0.5 * two

    found = only(resistance.check(simple(bars, peak=0, m=humps)), "bending")
    # and at both ends, where half the moment meets bars that are not developed yet
    inside = [f for f in found if 1400 < f.x < 4600]
    assert len(inside) == 2
    assert all(f.found == pytest.approx(two / 1e6, abs=0.1) for f in inside)


def test_a_lap_counts_for_one_bar() -> None:
    # 2 + 2 φ 16 over a lap of Ld: no more than 2 at any place within it
    two = annex_g(area(16, 2), 454.0)
    x0, x1 = 2600.0, 2600.0 + LD[16]

    def made(peak: float) -> Case:
        return simple(
            bottom("a", -150, x1, 16, (-100.0, 84.0)),
            bottom("b", x0, 6150, 16, (-84.0, 100.0)),
            peak=0,
            m=lambda x: peak if x0 + 50 < x < x1 - 50 else 10e6,
            contacts=(lap("a", "b", x0, x1),),
        )

    assert list(resistance.check(made(0.99 * two))) == []
    found = one(resistance.check(made(1.1 * two)), "bending")
    assert found.found == pytest.approx(two / 1e6, rel=0.01)


def test_without_results_nothing_is_asked() -> None:
    assert list(resistance.check(simple(bottom("b", 0, 100), peak=1e9, m=None))) == []
