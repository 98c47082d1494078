"""Laps: length, size, share, place. IS 456:2000, 26.2.5; lengths from σ φ/(4 τbd)."""

from __future__ import annotations

import pytest
from check_cases import LD, area, bottom, case, lap, loops, one, only, rules, top

from detailer.cage.bar import Bar, Contact
from detailer.checks import Case, laps
from detailer.values import Severity, SupportKind

FROM, TO = 2600.0, 4000.0


def spliced(
    length: float,
    *,
    dia: float = 16,
    ys: tuple[float, ...] = (0.0,),
    more: tuple[Bar, ...] = (),
    contacts: tuple[Contact, ...] = (),
    face: str = "bottom",
    start: float = FROM,
    inward: bool = False,
    **what: object,
) -> Case:
    """Return a beam whose bars at `ys` lap by `length` from `start`, the second beside the first.

    The second lies to the left of it, or towards the middle of the web.
    """
    make = bottom if face == "bottom" else top
    a = make("a", -100, start + length, dia, ys)
    beside = tuple(y - dia if inward and y > 0 else y + dia for y in ys)
    b = make("b", start, 6100, dia, beside)
    contact = lap("a", "b", start, start + length)
    return case(a, b, loops("l", 150), *more, contacts=(contact, *contacts), **what)  # type: ignore[arg-type]


def through(count: int, dia: float = 16) -> Bar:
    """Return bars that run through, so that a lap is a small share of the face."""
    return bottom("through", -100, 6100, dia, tuple(-110.0 + 4 * k for k in range(count)))


# -- length: 26.2.5.1 c ----------------------------------------------------------------------


def test_a_lap_of_ld_amid_the_section_is_enough() -> None:
    # M25, Fe 500: 0.87 · 500 · 16/(4 · 2.24) = 776.8; cover 38 >= 2 φ = 32, so factor 1
    assert LD[16] == pytest.approx(776.79, abs=0.01)
    assert not only(laps.check(spliced(777.0, more=(through(4),))), "lap-length")


def test_a_lap_shorter_than_ld() -> None:
    found = one(laps.check(spliced(770.0, more=(through(4),))), "lap-length")
    assert (found.found, found.required, found.unit) == (770, 777, "mm")
    assert found.severity is Severity.UNSAFE
    assert found.clause == "IS 456:2000, 26.2.5.1 c"
    assert found.place.name == "span 1"
    assert found.x == pytest.approx(FROM + 385)
    assert found.bars == ("a", "b")
    assert "7 mm" in found.remedy


def test_a_bottom_corner_with_thin_cover_takes_1_4() -> None:
    # φ 20 in the corner: 30 + 8 = 38 < 2 · 20 = 40: 1.4 · 971 = 1359; amid the section 971
    for length, expected in ((1359.0, []), (1350.0, [1359])):
        corner = spliced(length, dia=20, ys=(102.0,), inward=True, more=(through(4, 20),))
        assert [f.required for f in only(laps.check(corner), "lap-length")] == expected
    amid = spliced(971.0, dia=20, more=(through(4, 20),))
    assert not only(laps.check(amid), "lap-length")


def test_a_corner_of_small_bars_is_well_covered() -> None:
    # φ 16 in the corner: side 150 − 104 − 8 = 38 >= 32, bottom 38 >= 32: factor 1
    assert not only(
        laps.check(spliced(777.0, ys=(104.0,), inward=True, more=(through(4),))), "lap-length"
    )


def test_top_bars_with_thin_cover_take_1_4() -> None:
    # top as cast, 38 < 2 · 20: 1.4 · 971 = 1359; φ 16 is covered by 38 >= 32 and takes 1
    wide = top("through", -100, 6100, 20, (-110.0, -105.0, -100.0, -95.0))
    found = one(laps.check(spliced(1350.0, dia=20, face="top", more=(wide,))), "lap-length")
    assert (found.found, found.required) == (1350, 1359)
    assert "1.4" in found.message
    assert not only(laps.check(spliced(1359.0, dia=20, face="top", more=(wide,))), "lap-length")
    assert not only(laps.check(spliced(777.0, face="top", more=(wide,))), "lap-length")


def test_top_corner_with_thin_cover_takes_2() -> None:
    # both: top as cast, cover < 2 φ, and a corner: 2 · 971 = 1942
    wide = top("through", -100, 6100, 20, (-110.0, -105.0, -100.0, -95.0))
    for length, expected in ((1930.0, [1942]), (1942.0, [])):
        made = spliced(
            length, dia=20, ys=(102.0,), inward=True, face="top", more=(wide,), start=2000.0
        )
        assert [f.required for f in only(laps.check(made), "lap-length")] == expected


@pytest.mark.parametrize(("apart", "required"), [(128.0, []), (126.0, [1088])])
def test_laps_side_by_side_closer_than_6_phi(apart: float, required: list[int]) -> None:
    # φ 16: clear of the next lap = apart − 2 · 16; 96 = 6 φ is the limit (75 is less);
    # 1.4 · 776.8 = 1087.5
    ys = (-apart / 2, apart / 2)
    made = spliced(777.0, ys=ys, more=(through(8),))
    assert sorted({f.required for f in only(laps.check(made), "lap-length")}) == required


@pytest.mark.parametrize(("apart", "required"), [(96.0, []), (94.0, [680])])
def test_laps_of_small_bars_side_by_side_closer_than_75(apart: float, required: list[int]) -> None:
    # φ 10: 6 φ = 60 < 75: clear = apart − 20 >= 75; Ld = 485.5, 1.4 · 485.5 = 679.7
    ys = (-apart / 2, apart / 2)
    made = spliced(486.0, dia=10, ys=ys, more=(through(8),))
    assert sorted({f.required for f in only(laps.check(made), "lap-length")}) == required


def test_different_diameters_lap_by_the_smaller() -> None:
    # 26.2.5.1 e: φ 12 against φ 20: Ld of 12 = 582.6
    a = bottom("a", -100, 3300, 20)
    for length, expected in ((583.0, []), (575.0, [583])):
        b = bottom("b", 3300 - length, 6100, 12, (16.0,), z=-452.0)
        made = case(
            a, b, loops("l", 150), through(4), contacts=(lap("a", "b", 3300 - length, 3300),)
        )
        assert [f.required for f in only(laps.check(made), "lap-length")] == expected


def test_thirty_diameters_govern_strong_bond() -> None:
    # M40, Fe 250 counted as deformed: 217.5 φ/(4 · 1.9 · 1.6) = 17.9 φ < 30 φ = 480
    for length, expected in ((480.0, []), (470.0, [480])):
        made = spliced(length, more=(through(4),), fck=40, fy=250)
        assert [f.required for f in only(laps.check(made), "lap-length")] == expected


# -- size: 26.2.5.1 a, Amendment 3 -------------------------------------------------------------


def test_bars_above_32_are_not_lapped() -> None:
    sound = spliced(2300.0, dia=32, start=1500.0, more=(through(4, 32),))
    assert not only(laps.check(sound), "lap-size")
    found = one(laps.check(spliced(2600.0, dia=36, start=1500.0)), "lap-size")
    assert (found.found, found.required) == (36, 32)
    assert found.severity is Severity.UNSAFE
    assert "Amendment 3" in found.clause


# -- share: 26.2.5, 26.2.5.1 b -----------------------------------------------------------------


def test_half_the_bars_may_lap_at_a_section() -> None:
    # one lapped of two bars: 50 %; the second bar of a lap does not count in the total
    assert not only(laps.check(spliced(1100.0, more=(through(1),))), "lap-share")


def test_two_of_three_bars_lapped() -> None:
    made = spliced(1100.0, ys=(-80.0, 80.0), more=(through(1),))
    found = one(laps.check(made), "lap-share")
    # 2/3
    assert (found.found, found.required, found.unit) == (67, 50, "%")
    assert found.severity is Severity.UNSAFE
    assert "26.2.5.1 b" in found.clause
    assert found.remedy == "Stagger the laps by 1430 mm"  # 1.3 · 1100


def staggered(apart: float) -> Case:
    """Return two laps of 800, their middles so far apart, and no other bars."""
    first, second = 1200.0, 1200.0 + apart
    return case(
        bottom("a", -100, first + 800, 16, (-80.0,)),
        bottom("b", first, 6100, 16, (-64.0,)),
        bottom("c", -100, second + 800, 16, (80.0,)),
        bottom("d", second, 6100, 16, (64.0,)),
        loops("l", 150),
        contacts=(lap("a", "b", first, first + 800), lap("c", "d", second, second + 800)),
    )


def test_laps_count_as_staggered_at_1_3_lap_lengths() -> None:
    # 1.3 · 800 = 1040 between centres
    assert not only(laps.check(staggered(1040.0)), "lap-share")
    found = only(laps.check(staggered(1030.0)), "lap-share")
    assert found and all((f.found, f.required) == (100, 50) for f in found)


# -- place: 26.2.5 -----------------------------------------------------------------------------


def used(share: float) -> Case:
    """Return a lap of one of four φ 16 bars where so much of their moment is asked."""
    # 4 φ 16 = 804.2; C = T: x = 804.2 · 435/(0.36 · 25 · 300) = 129.57;
    # 804.2 · 435 (454 − 0.42 · 129.57) = 139.79 kN·m at d = 500 − 30 − 8 − 8 = 454;
    # within the lap five bars are there, four of them count by the share of embedment: the
    # resistance that the rule asks is of every bar at 0.87 fy: 5 φ 16 = 1005.3:
    # x = 161.97; 1005.3 · 435 (454 − 0.42 · 161.97) = 168.79
    return spliced(800.0, more=(through(3),), m=share * 168.79e6)


@pytest.mark.parametrize(
    ("share", "severity"),
    [(0.50, None), (0.52, Severity.COSTLY), (0.79, Severity.COSTLY), (0.82, Severity.UNSAFE)],
)
def test_laps_lie_where_half_the_resistance_is_used(
    share: float, severity: Severity | None
) -> None:
    # the bars beyond the lap's ends are one fewer: at its very ends both cover, so five count
    found = only(laps.check(used(share)), "lap-place")
    if severity is None:
        assert found == []
        return
    [finding] = found
    assert finding.severity is severity
    assert finding.found == pytest.approx(100 * share, abs=1)
    assert finding.required == 50
    assert finding.clause == "IS 456:2000, 26.2.5"


def test_a_lap_within_a_support() -> None:
    # inner column at 6000: faces 5850 and 6150; top bars in tension over it
    a = top("a", -100, 6600, 16)
    b = top("b", 5800, 12100, 16, (16.0,))
    made = case(
        a, b, loops("l", 150), top("t", -100, 12100, 16, (-100.0, 100.0)),
        lengths=(6000.0, 6000.0), m=-60e6, contacts=(lap("a", "b", 5800, 6600),),
    )  # fmt: skip
    found = one(laps.check(made), "lap-in-joint")
    assert (found.found, found.required) == (300, 0)  # the whole width of the column
    assert found.severity is Severity.UNSAFE
    assert found.place.name == "support B1"
    assert "lap-place" not in rules(laps.check(made))


def test_bars_that_pass_over_a_support_hardly_in_tension_are_no_splice() -> None:
    # bottom bars of two spans over an inner support under hogging
    a = bottom("a", -100, 6260, 16)
    b = bottom("b", 5740, 12100, 16, (16.0,))
    for kind in (SupportKind.COLUMN, SupportKind.WALL):
        made = case(
            a, b, loops("l", 150), lengths=(6000.0, 6000.0), kind=kind,
            m=lambda x: -60e6 if 5000 < x < 7000 else 40e6,
            contacts=(lap("a", "b", 5740, 6260),),
        )  # fmt: skip
        assert laps.laps(made) == ()
        assert list(laps.check(made)) == []


def test_without_results_bottom_bars_pass_and_top_bars_lap() -> None:
    for make, expected in ((bottom, 0), (top, 1)):
        made = case(
            make("a", -100, 6260, 16), make("b", 5740, 12100, 16, (16.0,)), loops("l", 150),
            lengths=(6000.0, 6000.0), contacts=(lap("a", "b", 5740, 6260),),
        )  # fmt: skip
        assert len(laps.laps(made)) == expected


def test_areas_are_those_of_circles() -> None:
    assert area(16, 4) == pytest.approx(804.2, abs=0.1)
