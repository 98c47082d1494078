"""Clear distances of bars: IS 456:2000, 26.3.2, nominal and over ribs."""

from __future__ import annotations

import dataclasses

import pytest
from cage_builders import link
from check_cases import bottom, case, low_z, one, only, rules, top

from detailer.cage.bar import Bar
from detailer.checks import Case, spacing
from detailer.values import Severity


def row(*ys: float, dia: float = 16, aggregate: float = 20, links: bool = False) -> Case:
    """Return bottom bars through at these places, without links unless asked."""
    bars: tuple[Bar, ...] = (bottom("b", -150, 6150, dia, ys),)
    if links:
        bars = (*bars, link("l", 240, 440, xs=tuple(range(200, 5801, 200))))
    made = case(*bars)
    return dataclasses.replace(made, cage=dataclasses.replace(made.cage, aggregate=aggregate))


def pair(gap: float, dia: float = 16, **what: object) -> Case:
    half = (gap + dia) / 2
    return row(-half, half, dia=dia, **what)  # type: ignore[arg-type]


# -- sideways: 26.3.2 a ----------------------------------------------------------------------------


def test_bars_closer_than_aggregate_and_5() -> None:
    assert "clear-spacing" not in rules(spacing.check(pair(25.0)))
    found = only(spacing.check(pair(24.0)), "clear-spacing")
    # once a place: support, span, support
    assert [f.place.name for f in found] == ["support A1", "span 1", "support B1"]
    for finding in found:
        assert (finding.found, finding.required, finding.unit) == (24, 25, "mm")
        assert finding.severity is Severity.UNSAFE
        assert finding.clause == "IS 456:2000, 26.3.2"
        assert finding.bars == ("b",)
        assert finding.site
        assert "aggregate + 5" in finding.message


def test_the_larger_bar_governs() -> None:
    # φ 32 beside φ 16: 32 > 25
    def mixed(gap: float) -> Case:
        return case(
            bottom("a", -150, 6150, 32, (-60.0,)), bottom("b", -150, 6150, 16, (-36.0 + gap,))
        )

    assert "clear-spacing" not in rules(spacing.check(_flat(mixed(32.5))))
    found = only(spacing.check(_flat(mixed(31.0))), "clear-spacing")
    assert found and all((f.found, f.required) == (31, 32) for f in found)


def _flat(made: Case) -> Case:
    """Return the same with all bars at one level, so that gaps are level ones."""
    bars = tuple(
        dataclasses.replace(bar, corners=tuple((x, y, -440.0) for x, y, _ in bar.corners))
        for bar in made.cage.bars
    )
    return dataclasses.replace(made, cage=dataclasses.replace(made.cage, bars=bars))


def test_over_ribs_two_bars() -> None:
    # 16 is 19 over ribs: both sides of two bars, 2 · 3 = 6 of the one gap: 31 − 6 = 25
    assert rules(spacing.check(pair(31.0))) == set()
    found = only(spacing.check(pair(30.0)), "rib-spacing")
    assert len(found) == 3
    for finding in found:
        assert (finding.found, finding.required) == (24, 25)
        assert finding.severity is Severity.UNBUILDABLE
        assert finding.site
        assert "over ribs" in finding.message


def test_over_ribs_with_links() -> None:
    # links of 8 are 11 over ribs, both legs: 6 more: 37 − 6 − 6 = 25
    assert rules(spacing.check(pair(37.0, links=True))) == set()
    found = only(spacing.check(pair(36.0, links=True)), "rib-spacing")
    assert found and all(f.found == 24 for f in found)


def test_over_ribs_is_shared_by_the_gaps() -> None:
    # three bars: 3 · 3 = 9 of two gaps, 4.5 each: 29.5 is just enough
    for gap, expected in ((29.6, set()), (29.0, {"rib-spacing"})):
        made = row(-gap - 16, 0.0, gap + 16)
        assert rules(spacing.check(made)) == expected
    assert only(spacing.check(row(-45.0, 0.0, 45.0)), "rib-spacing")[0].found == 24.5


def test_hard_to_concrete_below_four_thirds_of_aggregate() -> None:
    # aggregate 40: 45 asked; 4/3 · 40 = 53.3
    assert rules(spacing.check(pair(54.0, aggregate=40))) == set()
    found = only(spacing.check(pair(52.0, aggregate=40)), "congested")
    for finding in found:
        assert (finding.found, finding.required) == (52, 53.3)
        assert finding.severity is Severity.COSTLY
        assert finding.site == ""
    assert found


def test_bars_that_touch_are_one_group() -> None:
    """A lap: two bars in contact, counted as one, and their neighbours from its outer sides."""
    # 0 and 16 touch; the next bar's surface 35 from the second: 16 + 8 + 35 + 8 = 67;
    # ribs: three bars 3 · 3 = 9 of the one gap: 35 − 9 = 26
    assert rules(spacing.check(row(0.0, 16.0, 67.0))) == set()
    found = only(spacing.check(row(0.0, 16.0, 56.0)), "clear-spacing")
    assert found and all(f.found == 24 for f in found)


def test_where_a_third_bar_lies_only_for_a_stretch() -> None:
    made = case(bottom("b", -150, 6150, 16, (-50.0, 50.0)), bottom("x", 2000, 4000, 16, (10.0,)))
    found = one(spacing.check(made), "clear-spacing")
    # 50 − 10 − 16 = 24
    assert (found.found, found.place.name, found.x) == (24, "span 1", 3000)
    assert found.bars == ("b", "x")


def test_top_bars_are_asked_too() -> None:
    found = only(spacing.check(case(top("t", -150, 6150, 16, (-20.0, 20.0)))), "clear-spacing")
    assert found and all(f.found == 24 and "top bars" in f.message for f in found)


# -- upwards: 26.3.2 c -----------------------------------------------------------------------------


def stacked(gap: float, low: float = 20, high: float = 20, off: float = 0.0) -> Case:
    """Return two layers of two bars, so far apart in height and out of line."""
    z = low_z(low) + low / 2 + gap + high / 2
    return case(
        bottom("a", -150, 6150, low, (-70.0, 70.0)),
        bottom("b", -150, 6150, high, (-70.0 + off, 70.0), z=z, layer=2),
    )


@pytest.mark.parametrize(
    ("gap", "low", "high", "required"),
    [
        (20.0, 20, 20, None),
        (19.0, 20, 20, 20),  # the largest bar
        (19.0, 16, 20, 20),  # whichever layer it is in
        (15.0, 12, 12, None),
        (14.0, 12, 12, 15),  # 15 mm > 2/3 · 20 = 13.3 > 12
    ],
)
def test_layers_one_above_another(
    gap: float, low: float, high: float, required: float | None
) -> None:
    found = only(spacing.check(stacked(gap, low, high)), "layer-spacing")
    assert bool(found) is (required is not None)
    for finding in found:
        assert (finding.found, finding.required) == (gap, required)
        assert finding.severity is Severity.UNSAFE
        assert finding.clause == "IS 456:2000, 26.3.2"
        assert finding.bars == ("a", "b")


def test_two_thirds_of_large_aggregate() -> None:
    # 2/3 · 40 = 26.7 > φ 20
    for gap, expected in ((27.0, set()), (26.0, {26.7})):
        made = stacked(gap)
        wide = dataclasses.replace(made, cage=dataclasses.replace(made.cage, aggregate=40.0))
        found = only(spacing.check(wide), "layer-spacing")
        assert {f.required for f in found} == expected


@pytest.mark.parametrize(("off", "found"), [(0.0, False), (6.0, False), (10.0, True), (30.0, True)])
def test_layers_lie_in_line(off: float, found: bool) -> None:
    made = only(spacing.check(stacked(25.0, off=off)), "layers-aligned")
    assert bool(made) is found
    for finding in made:
        assert (finding.found, finding.required) == (off, 6)
        assert finding.severity is Severity.UNBUILDABLE
        assert finding.site
        assert finding.bars == ("b",)


def test_a_lapped_bar_beside_its_partner_may_stand_out_of_line() -> None:
    z = low_z(20) + 45
    made = case(
        bottom("a", -150, 6150, 20, (-70.0, 70.0)),
        bottom("b", -150, 4000, 20, (-70.0, 70.0), z=z, layer=2),
        bottom("c", 3000, 6150, 20, (-50.0, 50.0), z=z, layer=2),
    )
    here = [f for f in spacing.check(made) if f.rule == "layers-aligned" and f.x < 4000]
    assert here == []
