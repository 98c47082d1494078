"""Bends and legs: IS 2502:1963; IS 456:2000, 26.2.2.4 b and 26.2.2.5."""

from __future__ import annotations

import dataclasses

import pytest
from cage_builders import tie
from check_cases import bottom, case, loops, one, only, rules, top

from detailer.cage import forms
from detailer.cage.bar import Bar
from detailer.checks import bends
from detailer.values import Severity


def with_mandrel(bar: Bar, mandrel: float) -> Bar:
    return dataclasses.replace(bar, mandrels=(mandrel,) * len(bar.mandrels))


def test_standard_bars_and_links() -> None:
    made = case(
        bottom("b", -86, 6086, 16, left=200, right=200),
        top("t", -86, 6086, 20, left=250, right=250),
        top("h", -86, 6086, 16, left=70, right=70, hooks=(True, True), z=-100),
        loops("l", 150),
        tie("e", -470, -30),
    )
    assert list(bends.check(made)) == []


@pytest.mark.parametrize(
    ("dia", "factor"),
    [(16, 4), (25, 4), (32, 6)],  # 6 above 25 mm
)
def test_radius_of_main_bars(dia: float, factor: float) -> None:
    bar = bottom("b", -86, 6086, dia, left=30 * dia)
    good = with_mandrel(bar, 2 * factor * dia)
    assert "bend-radius" not in rules(bends.check(case(good)))
    found = one(bends.check(case(with_mandrel(bar, (2 * factor - 1) * dia))), "bend-radius")
    assert found.found == pytest.approx((factor - 0.5) * dia)
    assert (found.required, found.unit) == (factor * dia, "mm")
    assert found.severity is Severity.UNSAFE
    assert "26.2.2.5" in found.clause and found.bars == ("b",)
    assert found.place.name == "support A1"


def test_radius_of_links() -> None:
    # two diameters
    assert "bend-radius" not in rules(bends.check(case(loops("l", 150))))
    found = one(bends.check(case(with_mandrel(loops("l", 150), 24))), "bend-radius")
    assert (found.found, found.required) == (12, 16)


@pytest.mark.parametrize(("leg", "short"), [(144.0, False), (143.5, False), (140.0, True)])
def test_four_diameters_beyond_a_bend(leg: float, short: bool) -> None:
    # outside leg less radius and bar: 140 − 64 − 16 = 60; 4 · 16 = 64, 1 mm let pass
    found = only(bends.check(case(bottom("b", -86, 6086, 16, left=leg))), "short-leg")
    assert bool(found) is short
    for finding in found:
        assert (finding.found, finding.required) == (60, 64)
        assert finding.severity is Severity.UNBUILDABLE
        assert finding.clause == "IS 2502:1963" and finding.site


def test_the_right_end_is_asked_too() -> None:
    made = case(bottom("b", -86, 6086, 16, left=200, right=130))
    assert one(bends.check(made), "short-leg").found == 50


def test_the_tail_of_a_hook() -> None:
    # a U hook: 4 φ straight beyond the half circle
    for tail, expected in ((64.0, []), (50.0, [50])):
        made = case(top("h", -86, 6086, 16, left=tail, hooks=(True, False)))
        assert [f.found for f in only(bends.check(made), "short-leg")] == expected


@pytest.mark.parametrize(("tail", "short"), [(64.0, False), (56.0, True)])
def test_tails_of_links(tail: float, short: bool) -> None:
    # IS 2502, 3.8: 8 φ = 64; IS 456 asks 6 φ = 48 beyond 135°
    path = forms.closed_link(
        y0=-120, y1=120, z0=-470, z1=-30, dia=8, corner=forms.HookCorner.TOP_LEFT, tail=tail
    )
    link = dataclasses.replace(loops("l", 150), corners=path.corners, mandrels=path.mandrels)
    found = only(bends.check(case(link)), "short-leg")
    assert bool(found) is short
    for finding in found:
        assert (finding.found, finding.required) == (56, 64)
        assert "3.8" in finding.clause and "26.2.2.4 b" in finding.clause


def test_bends_with_no_straight_between() -> None:
    # a crank of 10 mm between bends of 4 φ is flat and bends; a leg up and straight back is not:
    # two bends of 90° need 2 · 72 = 144 between their corners
    def stepped(rise: float) -> Bar:
        bar = bottom("b", 0, 6000, 16)
        corners = ((0, 0, -454), (1000, 0, -454), (1000, 0, -454 + rise), (6000, 0, -454 + rise))
        return dataclasses.replace(bar, corners=corners, mandrels=(128.0, 128.0))

    assert "bends-close" not in rules(bends.check(case(stepped(144.0))))
    found = one(bends.check(case(stepped(120.0))), "bends-close")
    assert (found.found, found.required) == (120, 144)
    assert found.severity is Severity.UNBUILDABLE


def test_cranks_are_no_legs() -> None:
    crank = forms.Crank(x=1000, dy=16)
    made = case(bottom("b", 0, 6000, 16, cranks=(crank,)))
    assert list(bends.check(made)) == []


def test_a_fault_is_told_once_a_mark() -> None:
    bar = bottom("b", -86, 6086, 16, (-100.0, 0.0, 100.0), left=130, right=130)
    assert len(only(bends.check(case(bar)), "short-leg")) == 1
