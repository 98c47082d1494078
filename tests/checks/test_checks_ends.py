"""Ends in supports, butts and gaps: geometry; IS 456:2000, 26.2.2.1 and 26.2.5.1 c."""

from __future__ import annotations

import dataclasses

import pytest
from check_cases import bottom, case, one, only, rules, top

from detailer.cage.bar import Bar
from detailer.checks import Case, ends
from detailer.model.beam import Column
from detailer.model.steelwork import BarGroup
from detailer.values import Severity, SupportKind

# Columns of 300 at x 0 and 6000: outer faces at −150 and 6150. Of columns given by their size
# only 40 + 8 + 16 = 64 belong to the column: −86 and 6086.


# -- within the column's own bars ------------------------------------------------------------------


@pytest.mark.parametrize(("tip", "found"), [(-86.0, None), (-87.0, None), (-100.0, 50.0)])
def test_ends_stay_inside_the_bars_of_the_column(tip: float, found: float | None) -> None:
    rows = only(ends.check(case(bottom("b", tip, 6000, 16))), "end-in-core")
    assert [r.found for r in rows] == ([found] if found else [])
    for row in rows:
        assert (row.required, row.unit) == (64, "mm")
        assert row.severity is Severity.UNBUILDABLE
        assert (row.place.name, row.bars) == ("support A1", ("b",))
        assert row.site


def test_at_the_right_end() -> None:
    found = one(ends.check(case(bottom("b", 0, 6130, 16))), "end-in-core")
    # 6150 − 6130
    assert (found.found, found.place.name) == (20, "support B1")


def test_the_column_that_is_given_counts() -> None:
    # 50 + 10 + 25 = 85
    column = Column(
        mark="K1", size=(300, 300), bars=BarGroup(4, 25), link_dia=10, link_spacing=150, cover=50
    )

    def made(tip: float) -> Case:
        plain = case(bottom("b", tip, 6000, 16))
        supports = tuple(dataclasses.replace(s, column=column) for s in plain.beam.supports)
        return dataclasses.replace(plain, beam=dataclasses.replace(plain.beam, supports=supports))

    assert "end-in-core" not in rules(ends.check(made(-65.0)))
    found = one(ends.check(made(-75.0)), "end-in-core")
    assert (found.found, found.required) == (75, 85)


def test_on_a_wall_the_cover_counts() -> None:
    wall = SupportKind.WALL
    assert "end-in-core" not in rules(ends.check(case(bottom("b", -120, 6000), kind=wall)))
    found = one(ends.check(case(bottom("b", -130, 6000), kind=wall)), "end-in-core")
    assert (found.found, found.required) == (20, 30)


# -- legs ------------------------------------------------------------------------------------------


def leg(bar: Bar) -> Case:
    return case(bar)


@pytest.mark.parametrize("make", [bottom, top])
def test_legs_turn_into_the_joint(make: object) -> None:
    upward = make is bottom
    good = make("b", -86, 6000, 16, left=200)  # type: ignore[operator]
    assert "leg-turned-out" not in rules(ends.check(leg(good)))
    wrong = make("b", -86, 6000, 16, left=200, up=not upward)  # type: ignore[operator]
    found = one(ends.check(leg(wrong)), "leg-turned-out")
    # the leg of 200 outside stands 192 off the axis
    assert (found.found, found.required) == (192, 0)
    assert found.severity is Severity.UNSAFE
    assert found.clause.startswith("IS 456:2000, 26.2.2.1")
    assert found.place.name == "support A1"


@pytest.mark.parametrize("make", [bottom, top])
@pytest.mark.parametrize(("outside", "long"), [(432.0, False), (440.0, True)])
def test_legs_fit_the_beam(make: object, outside: float, long: bool) -> None:
    # φ 16: axis at 46 from its face; to the cover of the other face 500 − 46 − 30 = 424;
    # a leg of 440 outside reaches 432 beyond the axis
    bar = make("b", -86, 6086, 16, right=outside)  # type: ignore[operator]
    found = only(ends.check(leg(bar)), "leg-too-long")
    assert bool(found) is long
    for finding in found:
        assert (finding.found, finding.required) == (432, 424)
        assert finding.severity is Severity.UNBUILDABLE
        assert finding.place.name == "support B1" and finding.site


# -- bent at both ends -----------------------------------------------------------------------------


@pytest.mark.parametrize(
    ("left", "right", "slack"),
    [(-86.0, 6086.0, 0.0), (-80.0, 6086.0, 6.0), (-76.0, 6086.0, None), (-86.0, 6070.0, None)],
)
def test_a_bar_bent_at_both_ends_needs_10_to_spare(
    left: float, right: float, slack: float | None
) -> None:
    made = case(top("t", left, right, 16, left=200, right=200))
    found = only(ends.check(made), "closing-length")
    assert [f.found for f in found] == ([] if slack is None else [slack])
    for finding in found:
        assert finding.required == 10
        assert finding.severity is Severity.COSTLY


def test_a_bar_with_one_free_end_closes_by_itself() -> None:
    made = case(top("t", -86, 6086, 16, left=200))
    assert "closing-length" not in rules(ends.check(made))


# -- butts: 26.2.5.1 c -----------------------------------------------------------------------------


def butt(gap: float, dia: float = 16, y: float = 16.0) -> Case:
    """Return two bars in one line, the second so far beyond the end of the first."""
    return case(bottom("a", -80, 3000, dia), bottom("b", 3000 + gap, 6080, dia, (y,)))


@pytest.mark.parametrize(
    ("gap", "dia", "found"),
    [
        (100.0, 16, (0, 240)),  # a gap
        (0.0, 16, (0, 240)),
        (-230.0, 16, (230, 240)),  # 15 φ
        (-240.0, 16, None),
        (-190.0, 10, (190, 200)),  # 200 mm
        (-200.0, 10, None),
        (350.0, 16, None),  # another bar, further on
    ],
)
def test_bars_that_end_against_each_other(
    gap: float, dia: float, found: tuple[float, float] | None
) -> None:
    rows = only(ends.check(butt(gap, dia, y=float(dia))), "no-lap")
    assert [(r.found, r.required) for r in rows] == ([found] if found else [])
    for row in rows:
        assert row.severity is Severity.UNBUILDABLE
        assert row.clause == "IS 456:2000, 26.2.5.1 c"
        assert (row.place.name, row.bars, row.x) == ("span 1", ("a", "b"), 3000)
        assert row.site


def test_bars_that_lie_elsewhere_are_no_butt() -> None:
    assert "no-lap" not in rules(ends.check(butt(50.0, y=40.0)))


def test_within_a_support_bars_may_end() -> None:
    made = case(bottom("a", -80, 5950), bottom("b", 6050, 12080), lengths=(6000.0, 6000.0))
    assert "no-lap" not in rules(ends.check(made))


# -- gaps between top extras -----------------------------------------------------------------------


@pytest.mark.parametrize(("gap", "silly"), [(499.0, True), (500.0, False)])
def test_extras_that_stop_shortly_from_each_other(gap: float, silly: bool) -> None:
    made = case(top("a", -80, 2800, 16, (-40.0,)), top("b", 2800 + gap, 6080, 16, (40.0,)))
    found = only(ends.check(made), "silly-gap")
    assert bool(found) is silly
    for finding in found:
        assert (finding.found, finding.required) == (499, 500)
        assert finding.severity is Severity.COSTLY
        assert (finding.place.name, finding.bars) == ("span 1", ("a", "b"))


def test_extras_of_two_sizes_are_two_bars() -> None:
    made = case(top("a", -80, 2800, 16, (-40.0,)), top("b", 3000, 6080, 20, (40.0,)))
    assert "silly-gap" not in rules(ends.check(made))
