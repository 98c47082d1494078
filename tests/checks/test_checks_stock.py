"""Bars longer than the stock."""

from __future__ import annotations

import dataclasses

import pytest
from check_cases import bottom, case, one

from detailer.checks import Case, stock
from detailer.values import Severity


def beam(length: float, **more: object) -> Case:
    return case(bottom("b", 0, length, 16, **more), lengths=(6000.0, 6000.0, 6000.0))  # type: ignore[arg-type]


def test_the_stock_itself_is_enough() -> None:
    assert list(stock.check(beam(12000.0))) == []


def test_a_bar_longer_than_the_stock() -> None:
    found = one(stock.check(beam(12010.0)), "stock")
    assert (found.found, found.required, found.unit) == (12010, 12000, "mm")
    assert found.severity is Severity.UNBUILDABLE
    assert found.site
    assert found.place.name == "support B1" and found.x == pytest.approx(6005)
    assert found.bars == ("b",)


def test_bends_are_part_of_the_length() -> None:
    # 11 700 outside to outside with a leg of 400: each bend of 4 φ takes 2 · 80 − π/2 · 72 = 46.9
    # off: 11 700 + 400 − 46.9 = 12 053
    assert list(stock.check(beam(11700.0, left=340.0))) == []
    found = one(stock.check(beam(11700.0, left=400.0)), "stock")
    assert found.found == 12053


def test_the_scheduled_length_counts_where_it_is_more() -> None:
    made = beam(11995.0)
    bars = tuple(dataclasses.replace(bar, length=12010.0) for bar in made.cage.bars)
    longer = dataclasses.replace(made, cage=dataclasses.replace(made.cage, bars=bars))
    assert one(stock.check(longer), "stock").found == 12010
