"""Effective depth as placed against the one of the calculation: IS 456:2000, 23.0."""

from __future__ import annotations

import dataclasses

import pytest
from check_cases import bottom, case, loops, one, top

from detailer.checks import Case, depth
from detailer.values import Severity


def beam(assumed: tuple[float | None, float | None], *, second: bool = False) -> Case:
    bars = [
        bottom("b", -110, 6110, 16, (-100.0, 100.0)),
        top("t", -110, 6110, 20, (-100.0, 100.0)),
        loops("l", 150),
    ]
    if second:
        bars.append(bottom("c", -110, 6110, 16, (-100.0, 100.0), z=-415.0, layer=2))
    made = case(*bars)
    return dataclasses.replace(made, beam=dataclasses.replace(made.beam, d_assumed=assumed))


@pytest.mark.parametrize(("assumed", "found"), [(454.0, False), (455.4, False), (456.0, True)])
def test_bottom_bars_lie_deeper_than_assumed(assumed: float, found: bool) -> None:
    # 500 − 30 − 8 − 8 = 454; 1.5 mm are let pass
    rows = list(depth.check(beam((assumed, None))))
    assert bool(rows) is found
    for row in rows:
        assert (row.rule, row.found, row.required) == ("depth-assumed", 454, 456)
        assert row.severity is Severity.COSTLY
        assert row.clause == "IS 456:2000, 23.0"
        assert (row.place.name, row.bars) == ("span 1", ("b",))
        assert "cover" not in row.message


def test_top_bars_at_every_support() -> None:
    # 500 − 30 − 8 − 10 = 452
    rows = list(depth.check(beam((None, 460.0))))
    assert [r.place.name for r in rows] == ["support A1", "support B1"]
    assert {(r.found, r.required) for r in rows} == {(452, 460)}


def test_a_depth_short_by_the_link_hints_at_the_cover() -> None:
    assert (
        "(its cover is to the main bar?)"
        in one(depth.check(beam((462.0, None))), "depth-assumed").message
    )


def test_a_second_layer_draws_the_centroid_up() -> None:
    # (454 + 415)/2 = 434.5
    row = one(depth.check(beam((454.0, None), second=True)), "depth-assumed")
    assert (row.found, row.required) == (434.5, 454)


def test_nothing_assumed_nothing_asked() -> None:
    assert list(depth.check(beam((None, None)))) == []
