"""Anchorage at supports: IS 456:2000, 26.2.3.3, 26.2.3.4, 26.2.1."""

from __future__ import annotations

import dataclasses

import pytest
from check_cases import LD, area, bottom, case, loops, one, only, parabola, rules, top

from detailer.checks import Case, anchorage
from detailer.values import Severity, SupportKind

UDL = 36.0
"""Factored load of a simple span of 6 m: M 162 kN·m, V 108 kN at the centres [N/mm]."""


def simple(*bars: object, **what: object) -> Case:
    """Return a simple span on walls of 300 under its load."""
    more = {
        "m": parabola(UDL * 6000**2 / 8),
        "v": lambda x: UDL * (3000 - x),
        "kind": SupportKind.WALL,
        **what,
    }
    return case(*bars, loops("l", 150), **more)  # type: ignore[arg-type]


# -- a third into a simple support: 26.2.3.3 a ---------------------------------------------------


def test_a_third_by_ld_over_3_is_enough() -> None:
    # φ 16: Ld/3 = 776.8/3 = 258.9 past the face at 150 and 5850
    made = simple(
        bottom("a", 150 - 259, 5850 + 259, 16),
        bottom("b", 600, 5400, 16, (-100.0, 100.0)),
    )
    assert not only(anchorage.check(made), "bottom-into-support")


@pytest.mark.parametrize("side", [0, 1])
def test_a_third_that_falls_short_of_ld_over_3(side: int) -> None:
    ends = [150 - 259.0, 5850 + 259.0]
    ends[side] += (150 - 250 - ends[0]) if side == 0 else (5850 + 250 - ends[1])
    made = simple(bottom("a", ends[0], ends[1], 16), bottom("b", 600, 5400, 16, (-100.0, 100.0)))
    found = one(anchorage.check(made), "bottom-into-support")
    assert (found.found, found.required, found.unit) == (250, 259, "mm")
    assert found.severity is Severity.UNSAFE
    assert found.clause == "IS 456:2000, 26.2.3.3 a"
    assert found.place.name == f"support {'AB'[side]}1"
    assert found.x == (150, 5850)[side]
    assert found.bars == ("a", "b")
    assert found.site


def test_less_than_a_third_enters() -> None:
    # one of four: 0.25 < 1/3; the best of those that stop is 450 short of the face
    made = simple(bottom("a", -150, 6150, 16), bottom("b", 600, 5400, 16, (-100.0, -50.0, 100.0)))
    found = only(anchorage.check(made), "bottom-into-support")
    assert [(f.found, f.required) for f in found] == [(-450, 259)] * 2
    assert found[0].bars == ("b",)


def test_a_third_is_of_area_not_of_bars() -> None:
    # 2 φ 12 of 226 enter, 1 φ 25 of 491 stops: 226/717 = 0.315 < 1/3; with φ 20: 226/540 = 0.42
    for dia, expected in ((25, 2), (20, 0)):
        made = simple(bottom("a", -150, 6150, 12, (-100.0, 100.0)), bottom("b", 600, 5400, dia))
        assert len(only(anchorage.check(made), "bottom-into-support")) == expected
    assert area(12, 2) / (area(12, 2) + area(25)) == pytest.approx(0.3154, abs=1e-4)


def test_a_bend_counts_8_phi_and_what_is_longer_in_full() -> None:
    # φ 16 bent at 4 φ: the body ends (64 + 16) before the outside of the bend; 8 φ = 128 for the
    # bend with its first 4 φ = 64 of tail; leg 160 has a tail of 160 − 80 = 80, so 16 more.
    # Outside of the bend at 34 (184 past the face less 80): 150 − 34 − 80 + 128 + 16 = 180
    def bent(x: float) -> Case:
        return simple(
            bottom("a", x, 6150, 16, left=160),
            bottom("b", 600, 5400, 16, (-100.0, 100.0)),
        )

    found = one(anchorage.check(bent(34.0)), "bottom-into-support")
    assert (found.found, found.required) == (180, 259)
    assert not only(anchorage.check(bent(34.0 - 79.0)), "bottom-into-support")


def test_a_quarter_enters_a_continuous_support() -> None:
    # one of four at the inner support serves; at the ends a third is asked
    def two_spans(inner: float) -> Case:
        return case(
            bottom("a", -150, 6000 + inner, 16),
            bottom("b", -150, 5600, 16, (-100.0, -50.0, 100.0)),
            bottom("c", 6000 - 500, 12150, 16, (-110.0, -60.0, 60.0, 110.0)),
            loops("l", 150),
            lengths=(6000.0, 6000.0),
            m=lambda x: 80e6 if (x % 6000) < 4500 else -80e6,
        )

    # 150 past the centre's face at 5850: x = 6109 is 259 past
    assert not only(anchorage.check(two_spans(109.0)), "bottom-into-support")
    found = one(anchorage.check(two_spans(100.0)), "bottom-into-support")
    assert (found.found, found.required) == (250, 259)
    assert found.place.name == "support B1"
    assert "a quarter" in found.message


def test_members_that_resist_lateral_load_develop_at_the_face() -> None:
    # 26.2.3.3 b: Ld = 777 past the face
    def lateral(past: float) -> Case:
        made = simple(bottom("a", 150 - past, 5850 + past, 16, (-100.0, 100.0)))
        return dataclasses.replace(made, project=dataclasses.replace(made.project, lateral=True))

    assert not only(anchorage.check(lateral(777.0)), "bottom-into-support")
    found = only(anchorage.check(lateral(700.0)), "bottom-into-support")
    assert [(f.found, f.required) for f in found] == [(700, 777)] * 2
    assert {f.clause for f in found} == {"IS 456:2000, 26.2.3.3 b"}


def test_a_span_that_never_sags_is_asked_nothing() -> None:
    made = simple(bottom("a", 600, 5400, 16), m=-20e6)
    assert not only(anchorage.check(made), "bottom-into-support")


def test_without_results_the_middle_of_the_span_counts() -> None:
    made = simple(bottom("a", 200, 5800, 16), m=None)
    found = only(anchorage.check(made), "bottom-into-support")
    assert [(f.found, f.required) for f in found] == [(-50, 259)] * 2


# -- size of bars at a simple support: 26.2.3.3 c ------------------------------------------------


def loaded(v: float, past: float) -> Case:
    """Return 2 φ 25 that go `past` beyond the centres of walls, under so much shear there."""
    return simple(
        bottom("a", -past, 6000 + past, 25, (-90.0, 90.0)),
        v=lambda x: v * (3000 - x) / 3000,
    )


def test_ld_of_bars_at_a_simple_support() -> None:
    # 2 φ 25 = 981.7, d = 500 − 38 − 12.5 = 449.5: x = 981.7 · 435/(0.36 · 25 · 300) = 158.17;
    # M1 = 981.7 · 435 (449.5 − 0.42 · 158.17) = 163.59 kN·m. V 1 mm inside the centre.
    # 1.3 M1/V + L0 = 1.3 · 163.59e6/V + 100 against Ld = 1213.7
    m1 = 981.75 * 435 * (449.5 - 0.42 * 158.17)
    assert m1 / 1e6 == pytest.approx(163.6, abs=0.1)
    limit = 1.3 * m1 / (LD[25] - 100)  # V at which both are equal: 191 kN
    assert limit / 1e3 == pytest.approx(190.96, abs=0.2)
    assert not only(anchorage.check(loaded(0.99 * limit, 100)), "bar-size")
    found = only(anchorage.check(loaded(1.02 * limit, 100)), "bar-size")
    assert [f.place.name for f in found] == ["support A1", "support B1"]
    first = found[0]
    assert first.found == 1214
    # 1.3 M1/(1.02 limit) + 100 = 1113.7/1.02 + 100
    assert first.required == pytest.approx(1191.9, abs=1.5)
    assert first.severity is Severity.UNSAFE
    assert first.clause == "IS 456:2000, 26.2.3.3 c"
    assert first.bars == ("a",)


def test_l0_is_what_lies_beyond_the_centre() -> None:
    m1 = 981.75 * 435 * (449.5 - 0.42 * 158.17)
    limit = 1.3 * m1 / (LD[25] - 140)
    assert only(anchorage.check(loaded(limit, 100)), "bar-size")
    assert not only(anchorage.check(loaded(0.99 * limit, 140)), "bar-size")


def inflected(v: float) -> Case:
    """Return two spans whose sagging ends 1500 from the inner support, under so much shear."""

    def moment(x: float) -> float:
        at = min(x, 12000 - x)
        return 100e6 * at / 2000 if at < 2000 else 100e6 * (1 - (at - 2000) / 2500)

    return case(
        bottom("a", -150, 12150, 25, (-90.0, 90.0)),
        loops("l", 150, last=11800.0),
        lengths=(6000.0, 6000.0),
        m=moment,
        v=lambda x: v if 3000 < x < 9000 else 10e3,
        kind=SupportKind.WALL,
    )


def test_ld_of_bars_at_a_point_of_inflection() -> None:
    # M1 as above 163.6; L0 no more than max(d, 12 φ) = max(449.5, 300) = 449.5; no 1.3:
    # 163.6e6/V + 449.5 >= 1213.7 up to V = 214.1 kN
    m1 = 981.75 * 435 * (449.5 - 0.42 * 158.17)
    limit = m1 / (LD[25] - 449.5)
    assert limit / 1e3 == pytest.approx(214.1, abs=0.2)
    assert not only(anchorage.check(inflected(0.99 * limit)), "bar-size")
    found = only(anchorage.check(inflected(1.03 * limit)), "bar-size")
    # once from each span, at the same support
    assert [f.place.name for f in found] == ["support B1", "support B1"]
    assert [round(f.x) for f in found] == [4500, 7500]
    assert found[0].required == pytest.approx(m1 / (1.03 * limit) + 449.5, abs=1.5)
    assert "1.3" not in found[0].message


# -- a third of the top past the inflection: 26.2.3.4 ---------------------------------------------


def hogged(through: float, *, third: float = 12) -> Case:
    """Return two spans with hogging to 1500 from the inner centre; top bars of two lengths."""
    return case(
        top("long", 6000 - through, 6000 + through, third, (-100.0, 100.0)),
        top("short", 5000, 7000, 16, (-50.0, 50.0)),
        bottom("b", -150, 12150, 16, (-100.0, 100.0)),
        loops("l", 150, last=11800.0),
        lengths=(6000.0, 6000.0),
        m=lambda x: -60e6 * (1 - abs(x - 6000) / 1500),
    )


def test_a_third_goes_on_past_the_inflection() -> None:
    # 2 φ 12 = 226.2 of 226.2 + 402.1 = 628.3: 0.36. d of the top at the face:
    # (226.2 · 456 + 402.1 · 454)/628.3 = 454.7; 12 φ = 192; clear 5700/16 = 356:
    # 1500 + 454.7 = 1954.7 from the centre
    made = hogged(1960.0)
    assert not only(anchorage.check(made), "third-past-inflection")


def test_a_third_that_stops_before_it() -> None:
    found = only(anchorage.check(hogged(1930.0)), "third-past-inflection")
    assert [f.place.name for f in found] == ["support B1"] * 2
    first = found[0]
    assert (first.found, first.required, first.unit) == (0, 209, "mm2")  # 628.3/3 = 209.4
    assert first.x == pytest.approx(6000 - 1954.7, abs=11)
    assert first.severity is Severity.UNSAFE
    assert first.clause == "IS 456:2000, 26.2.3.4"
    assert first.bars == ("long", "short")


def test_less_than_a_third_past_it() -> None:
    # 2 φ 10 = 157.1 of 559.2: 0.28; a third is 186.4
    found = only(anchorage.check(hogged(2500.0, third=10)), "third-past-inflection")
    assert [(f.found, f.required) for f in found] == [(157, 186)] * 2
    assert found[0].bars == ("short",)


# -- top bars in an end column ---------------------------------------------------------------------


def ended(past: float, leg: float = 0.0, **what: object) -> Case:
    return case(
        top("t", 150 - past, 5850 + 280, 16, left=leg, right=160),
        bottom("b", -150, 6150, 16, (-100.0, 100.0)),
        loops("l", 150),
        **what,  # type: ignore[arg-type]
    )


def test_a_top_bar_that_stops_straight_in_the_end_column() -> None:
    found = one(anchorage.check(ended(250.0)), "top-anchorage")
    # nothing is found from Ld/3 = 259 on; the required number is the whole Ld
    assert (found.found, found.required) == (250, 777)
    assert found.severity is Severity.UNSAFE  # there are no results
    assert found.place.name == "support A1" and found.site
    with_results = ended(250.0, m=lambda x: -20e6 if x < 500 or x > 5500 else 40e6)
    assert one(anchorage.check(with_results), "top-anchorage").severity is Severity.COSTLY


def test_a_top_bar_long_enough_or_bent_is_not_named() -> None:
    assert not only(anchorage.check(ended(259.0)), "top-anchorage")
    assert not only(anchorage.check(ended(250.0, leg=160.0)), "top-anchorage")
    assert not only(anchorage.check(ended(250.0, kind=SupportKind.WALL)), "top-anchorage")


# -- a built-in end without moment: 22.5.2 --------------------------------------------------------


@pytest.mark.parametrize(("hogging", "asked"), [(3.0, True), (4.1, False)])
def test_an_end_cast_with_its_column_without_moment(hogging: float, asked: bool) -> None:
    # sagging 120 = w l²/8: w l²/24 = 40; a tenth of it, 4 kN·m, is enough to be believed
    made = ended(280.0, 160.0, m=lambda x: 120e6 if 200 < x < 5800 else -hogging * 1e6, step=50.0)
    found = only(anchorage.check(made), "end-moment")
    assert bool(found) is asked
    for finding in found:
        assert (finding.found, finding.required) == (hogging, 40)
        assert finding.severity is Severity.UNCLEAR
        assert finding.unit == "kN m"
    if asked:
        assert [f.place.name for f in found] == ["support A1", "support B1"]


def test_a_wall_is_not_asked_for_an_end_moment() -> None:
    assert "end-moment" not in rules(anchorage.check(simple(bottom("a", -150, 6150, 16))))


# -- an overhang with its steel below -------------------------------------------------------------


@pytest.mark.parametrize("right", [True, False])
@pytest.mark.parametrize(("below", "wrong"), [(16, False), (20, True)])
def test_main_steel_of_an_overhang_on_the_wrong_face(
    right: bool, below: float, wrong: bool
) -> None:
    tips = (0.0, 1500.0) if right else (1500.0, 0.0)
    made = case(
        top("t", -1450 if not right else -100, 7450 if right else 6100, 16, (-90.0, 90.0)),
        bottom("b", -1450 if not right else -100, 7450 if right else 6100, below, (-90.0, 90.0)),
        loops("l", 150),
        tips=tips,
        m=lambda x: -50e6,
    )
    found = only(anchorage.check(made), "tension-face")
    assert bool(found) is wrong
    for finding in found:
        # 2 φ 16 = 402, 2 φ 20 = 628
        assert (finding.found, finding.required) == (402, 628)
        assert finding.severity is Severity.UNSAFE
        assert finding.bars == ("b",)
        # 0.4 of the clear overhang of 1350 from the face
        assert finding.x == pytest.approx(6150 + 540 if right else -150 - 540)
