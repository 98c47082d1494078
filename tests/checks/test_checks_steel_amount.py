"""Least and most steel, widest spacing: IS 456:2000, 26.5.1.1, 26.3.3, Table 15."""

from __future__ import annotations

import pytest
from check_cases import area, bottom, case, only, parabola, rules, top

from detailer.checks import Case, steel_amount
from detailer.model import Section
from detailer.values import Severity

PAIR = (-70.0, 70.0)


def beam(dia: float = 16, ys: tuple[float, ...] = PAIR, **what: object) -> Case:
    more = {"m": parabola(60e6), **what}
    return case(
        bottom("b", -110, 6110, dia, ys),
        top("t", -110, 6110, 12, PAIR),
        **more,  # type: ignore[arg-type]
    )


# -- least: 26.5.1.1 a -----------------------------------------------------------------------------


def test_least_steel_in_tension() -> None:
    # 2 φ 12 = 226.2; d = 456: 0.85 · 300 · 456/500 = 232.6. 2 φ 16 = 402
    assert "minimum-steel" not in rules(steel_amount.check(beam(16)))
    [found] = only(steel_amount.check(beam(12)), "minimum-steel")
    assert (found.found, found.required, found.unit) == (226, 233, "mm2")
    assert found.severity is Severity.UNSAFE
    assert found.clause == "IS 456:2000, 26.5.1.1 a"
    assert found.bars == ("b",)
    assert "bottom steel" in found.message
    assert area(12, 2) == pytest.approx(226.2, abs=0.05)


def test_it_falls_with_the_strength_of_steel() -> None:
    # Fe 550: 0.85 · 300 · 456/550 = 211; Fe 415: 280
    assert "minimum-steel" not in rules(steel_amount.check(beam(12, fy=550)))
    [found] = only(steel_amount.check(beam(12, fy=415)), "minimum-steel")
    assert found.required == 280


def test_the_top_counts_where_it_is_in_tension() -> None:
    # the top has 2 φ 12 = 226 < 232.6 but lies in compression in the parabola
    hogs = beam(16, m=-20e6)
    [found] = only(steel_amount.check(hogs), "minimum-steel")
    assert (found.found, found.bars) == (226, ("t",))
    assert only(steel_amount.check(beam(16, m=-0.9e6)), "minimum-steel") == []  # under 1 kN·m


def test_without_results_quarters_hog_and_the_middle_sags() -> None:
    [found] = only(steel_amount.check(beam(16, m=None)), "minimum-steel")
    assert found.bars == ("t",)
    x0, clear = 150.0, 5700.0
    assert not x0 + clear / 4 < found.x < x0 + 3 * clear / 4
    [bare] = only(
        steel_amount.check(case(top("t", -110, 6110, 16, PAIR), m=parabola(60e6))), "minimum-steel"
    )
    # no bottom bars at all: d is taken as 450
    assert (bare.found, bare.required, bare.bars) == (0, 230, ())


# -- most: 26.5.1.1 b ------------------------------------------------------------------------------


@pytest.mark.parametrize(("count", "too_much"), [(7, False), (8, True)])
def test_most_steel_of_a_face(count: int, too_much: bool) -> None:
    # 4 % of 300 · 500 = 6000; 7 φ 32 = 5630, 8 φ 32 = 6434
    ys = tuple(-98.0 + 28 * k for k in range(count))
    found = only(steel_amount.check(beam(32, ys)), "maximum-steel")
    assert bool(found) is too_much
    for finding in found:
        assert (finding.found, finding.required) == (6434, 6000)
        assert finding.severity is Severity.UNSAFE
        assert finding.clause == "IS 456:2000, 26.5.1.1 b"


def test_laps_count_for_the_most() -> None:
    # 4 φ 32 lap 4 φ 32 over a stretch
    made = case(
        bottom("a", -110, 4500, 32, (-98.0, -42.0, 14.0, 70.0)),
        bottom("b", 2000, 6110, 32, (-66.0, -10.0, 46.0, 102.0)),
        m=parabola(60e6),
    )
    [found] = only(steel_amount.check(made), "maximum-steel")
    assert found.bars == ("a", "b")
    assert found.place.name == "span 1" and 2000 < found.x < 4500


# -- widest: 26.3.3, Table 15 at no redistribution -------------------------------------------------


@pytest.mark.parametrize(("fy", "most"), [(415, 180), (500, 150), (550, 135)])
def test_bars_in_tension_close_enough_to_hold_cracks(fy: float, most: float) -> None:
    # Fe 550 by analogy: 75 000/550
    wide = Section(width=400.0, depth=500.0)

    def made(gap: float) -> Case:
        half = (gap + 16) / 2
        return beam(16, (-half, half), fy=fy, section=wide)

    assert "maximum-spacing" not in rules(steel_amount.check(made(most)))
    [found] = only(steel_amount.check(made(most + 2)), "maximum-spacing")
    assert (found.found, found.required, found.unit) == (most + 2, most, "mm")
    assert found.severity is Severity.UNSAFE
    assert found.clause == "IS 456:2000, Table 15"
    assert found.place.name == "span 1"


def test_bars_in_compression_may_be_far_apart() -> None:
    made = case(
        bottom("b", -110, 6110, 16, (-104.0, 0.0, 104.0)),
        top("t", -110, 6110, 16, (-104.0, 104.0)),
        m=parabola(60e6),
    )
    assert "maximum-spacing" not in rules(steel_amount.check(made))
    # the same under hogging: 208 − 16 = 192
    hogs = case(
        bottom("b", -110, 6110, 16, (-104.0, 0.0, 104.0)),
        top("t", -110, 6110, 16, (-104.0, 104.0)),
        m=-60e6,
    )
    [found] = only(steel_amount.check(hogs), "maximum-spacing")
    assert (found.found, found.bars) == (192, ("t",))
