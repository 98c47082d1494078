"""Side-face steel: IS 456:2000, 26.5.1.3 and 26.5.1.7 b."""

from __future__ import annotations

import pytest
from check_cases import area, bottom, case, low_z, one, only, rules, side, top

from detailer.cage.bar import Bar
from detailer.checks import Case, side_steel
from detailer.model import Section
from detailer.values import Face, Severity

PAIR = (-100.0, 100.0)


def beam(depth: float, *sides: Bar, section: Section | None = None, **what: object) -> Case:
    return case(
        bottom("b", -110, 6110, 16, PAIR, z=low_z(16, depth=depth)),
        top("t", -110, 6110, 16, PAIR),
        *sides,
        section=section or Section(width=300.0, depth=depth),
        **what,  # type: ignore[arg-type]
    )


def both(dia: float, *zs: float) -> tuple[Bar, Bar]:
    return (
        side("s", -110, 6110, dia, zs, Face.LEFT),
        side("r", -110, 6110, dia, zs, Face.RIGHT),
    )


def test_a_web_of_750_needs_none() -> None:
    assert list(side_steel.check(beam(750))) == []


def test_a_deeper_web_without_any() -> None:
    found = list(side_steel.check(beam(760)))
    assert rules(found) == {"side-steel", "side-spacing"}
    amount = one(found, "side-steel")
    # 0.1 % of 300 · 760
    assert (amount.found, amount.required, amount.unit) == (0, 228, "mm2")
    assert amount.severity is Severity.UNSAFE
    assert amount.clause == "IS 456:2000, 26.5.1.3"
    wide = one(found, "side-spacing")
    # 760 − 2 · 46 between the axes of bottom and top bars
    assert (wide.found, wide.required, wide.unit) == (668, 300, "mm")


@pytest.mark.parametrize(("dia", "short"), [(10, False), (8, True)])
def test_a_thousandth_of_the_web(dia: float, short: bool) -> None:
    # 300 · 800/1000 = 240: 4 φ 10 = 314, 4 φ 8 = 201
    found = list(side_steel.check(beam(800, *both(dia, -282, -518))))
    assert bool(only(found, "side-steel")) is short
    for finding in only(found, "side-steel"):
        assert (finding.found, finding.required) == (201, 240)
        assert finding.bars == ("r", "s")
    assert only(found, "side-spacing") == []  # 708/3 = 236
    assert area(8, 4) == pytest.approx(201.1, abs=0.1)


def test_no_further_apart_than_300() -> None:
    # levels −754, −400, −46: 354 apart
    found = one(side_steel.check(beam(800, *both(16, -400.0))), "side-spacing")
    assert (found.found, found.required) == (354, 300)
    assert found.severity is Severity.UNSAFE
    # bars at one face alone leave the other open
    left, _ = both(16, -282, -518)
    bare = one(side_steel.check(beam(800, left)), "side-spacing")
    assert bare.found == 708 and "right" in bare.message


def test_no_further_apart_than_the_web_is_wide() -> None:
    # 200 wide: 236 > 200
    narrow = Section(width=200.0, depth=800.0)
    found = one(side_steel.check(beam(800, *both(10, -282, -518), section=narrow)), "side-spacing")
    assert (found.found, found.required) == (236, 200)
    closer = beam(800, *both(10, -223, -400, -577), section=narrow)
    assert only(side_steel.check(closer), "side-spacing") == []


def test_the_slab_is_no_part_of_the_web() -> None:
    # 850 − 125 = 725
    flanged = Section(width=300.0, depth=850.0, slab=125.0, flange=1200.0)
    assert list(side_steel.check(beam(850, section=flanged))) == []
    deeper = Section(width=300.0, depth=900.0, slab=125.0, flange=1200.0)
    found = one(side_steel.check(beam(900, section=deeper)), "side-steel")
    assert found.required == round(0.001 * 300 * 775)


def test_a_twisted_web_over_450() -> None:
    # 26.5.1.7 b: 500 > 450 under torsion: bars at −454 and −46 are 408 apart
    assert list(side_steel.check(beam(500, m=20e6))) == []
    found = one(side_steel.check(beam(500, m=20e6, t=5e6)), "side-spacing")
    assert (found.found, found.required) == (408, 300)
    assert list(side_steel.check(beam(500, *both(12, -250.0), m=20e6, t=5e6))) == []
    assert list(side_steel.check(beam(450, m=20e6, t=5e6))) == []
