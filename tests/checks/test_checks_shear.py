"""Shear along the line: IS 456:2000, 40, Tables 19 and 20, 22.6.2.1; torsion 41.3."""

from __future__ import annotations

import pytest
from check_cases import area, bottom, case, loops, one, only, rules, top

from detailer.cage.bar import Bar
from detailer.checks import Case, shear
from detailer.values import Severity, SupportKind

FOUR = (-100.0, -33.0, 33.0, 100.0)
D = 454.0
BD = 300 * D

# 4 φ 16: pt = 100 · 804.2/(300 · 454) = 0.5905; M25: τc = 0.49 + 0.08 · 0.0905/0.25 = 0.519
CONCRETE = (0.49 + 0.08 * (100 * area(16, 4) / BD - 0.5) / 0.25) * BD
# 2L-8 at 150: 0.87 · 415 · 100.53 · 454/150
LINKS = 0.87 * 415 * area(8, 2) * D / 150
TOTAL = CONCRETE + LINKS


def beam(*bars: Bar, w: float = 0.0, hoops: Bar | None = None, **what: object) -> Case:
    """Return a simple span on walls under w [N/mm]; links at 150 from face to face."""
    more = {
        "m": 50e6,
        "v": lambda x: w * (3000 - x),
        "kind": SupportKind.WALL,
        **what,
    }
    mine = bars or (bottom("b", -110, 6110, 16, FOUR),)
    return case(*mine, hoops or loops("l", 150, first=150, last=5850), **more)  # type: ignore[arg-type]


def test_what_the_section_carries() -> None:
    assert pytest.approx((70.7, 109.9), abs=0.05) == (CONCRETE / 1e3, LINKS / 1e3)
    made = beam(w=1.0)
    carried = made.shear.capacity(3000.0, made.beam.spans[0], made.steel.bars[0].face)
    assert (carried.concrete, carried.links) == pytest.approx((CONCRETE, LINKS), rel=1e-4)
    assert carried.limit == pytest.approx(3.1 * BD)  # Table 20


def test_shear_counts_at_d_from_the_face() -> None:
    # 22.6.2.1: x = 150 + 454 = 604, w (3000 − 604)
    limit = TOTAL / (3000 - 604)
    assert list(shear.check(beam(w=0.999 * limit))) == []
    found = only(shear.check(beam(w=1.02 * limit)), "shear")
    assert len(found) == 2 and found[0].place.name == "support A1"
    assert [f.x <= 604 or f.x >= 5396 - 25 for f in found] == [True, True]
    for finding in found:
        assert finding.found == pytest.approx(TOTAL / 1e3, abs=0.1)
        assert finding.required == pytest.approx(1.02 * TOTAL / 1e3, abs=0.1)
        assert (finding.unit, finding.severity) == ("kN", Severity.UNSAFE)
        assert finding.clause == "IS 456:2000, 40.4"
        assert finding.bars == ("l",)


def test_in_compression_counts_nothing_but_tension_steel_does() -> None:
    # under hogging the top counts: 2 φ 16: pt 0.2952, τc = 0.3835
    made = beam(
        bottom("b", -110, 6110, 16, FOUR), top("t", -110, 6110, 16, (-100.0, 100.0)),
        m=-50e6, v=170e3,
    )  # fmt: skip
    concrete = (0.36 + 0.13 * (100 * area(16, 2) / BD - 0.25) / 0.25) * BD
    found = one(shear.check(made), "shear")
    assert found.found == pytest.approx((concrete + LINKS) / 1e3, abs=0.1)
    assert found.required == 170


def test_bars_count_that_go_on_at_least_d_past_the_section() -> None:
    # note to Table 19: two of four stop at 1500; up to 1500 + 454 two count
    bars = bottom("b", -110, 6110, 16, (-100.0, 100.0)), bottom("c", 1500, 6110, 16, (-33.0, 33.0))
    two = (0.36 + 0.13 * (100 * area(16, 2) / BD - 0.25) / 0.25) * BD + LINKS
    made = beam(*bars, v=170e3)
    found = one(shear.check(made), "shear")
    assert found.found == pytest.approx(two / 1e3, abs=0.1)
    span = made.beam.spans[0]
    face = made.steel.bars[0].face
    assert made.shear.capacity(1950.0, span, face).total == pytest.approx(two, rel=1e-4)
    assert made.shear.capacity(1960.0, span, face).total == pytest.approx(TOTAL, rel=1e-4)
    assert list(shear.check(beam(v=170e3))) == []


def test_each_place_has_its_own_links() -> None:
    # at 300 in the middle half: 70.7 + 54.9 = 125.6; V = 130 only there too much
    middle = loops("m", 300, first=1500, last=4500)
    ends = loops("l", 150, first=150, last=1350), loops("k", 150, first=4650, last=5850)
    made = beam(bottom("b", -110, 6110, 16, FOUR), *ends, hoops=middle, v=130e3)
    found = one(shear.check(made), "shear")
    assert found.found == pytest.approx((CONCRETE + LINKS / 2) / 1e3, abs=0.1)
    assert found.place.name == "span 1"
    assert 1500 <= found.x <= 4500


def test_links_stronger_than_415_count_as_415() -> None:
    found = one(shear.check(beam(v=185e3, links=500)), "shear")
    assert found.found == pytest.approx(TOTAL / 1e3, abs=0.1)


def test_no_links_help_beyond_the_limit() -> None:
    # 40.2.3: 3.1 · 300 · 454 = 422.2 kN, and at the face itself, not at d from it
    strong = loops("l", 50, first=150, last=5850, dia=12)
    limit = 3.1 * BD / (3000 - 150)
    assert list(shear.check(beam(w=0.99 * limit, hoops=strong))) == []
    found = one(shear.check(beam(w=1.02 * limit, hoops=strong)), "shear-limit")
    assert found.required == pytest.approx(422.2, abs=0.1)
    assert found.found == pytest.approx(1.02 * 422.2, abs=0.2)
    assert found.severity is Severity.UNSAFE
    assert found.clause == "IS 456:2000, 40.2.3"
    assert found.place.name == "support A1"


def test_torsion_adds_to_the_shear() -> None:
    # Ve = V + 1.6 T/b = 10 + 1.6 · 10/0.3 = 63.3 < 70.7: least links only (41.3.2)
    few = loops("l", 300, first=150, last=5850)
    assert list(shear.check(beam(v=10e3, t=10e6, hoops=few))) == []
    # T 12: Ve = 74 > 70.7: now the links must resist it (41.4.3):
    # corner bars 16: b1 = 300 − 60 − 16 − 16 = 208, d1 = 408; s = 300:
    # 12e6 · 300/(208 · 408 · 361.05) + 10e3 · 300/(2.5 · 408 · 361.05) = 117.5 + 8.1 = 125.6
    found = one(shear.check(beam(v=10e3, t=12e6, hoops=few)), "torsion-links")
    assert found.found == pytest.approx(100.5, abs=0.1)
    assert found.required == pytest.approx(125.6, abs=0.2)
    assert (found.unit, found.severity) == ("mm2", Severity.UNSAFE)
    assert found.clause == "IS 456:2000, 41.4.3"


def test_equivalent_shear_is_bound_by_the_same_limit() -> None:
    strong = loops("l", 50, first=150, last=5850, dia=12)
    # V 300 + 1.6 T/b: 422.2 at T = 22.9 kN·m
    assert "shear-limit" not in rules(shear.check(beam(v=300e3, t=22.8e6, hoops=strong)))
    found = one(shear.check(beam(v=300e3, t=24e6, hoops=strong)), "shear-limit")
    assert found.found == 428


def test_without_results_nothing_is_asked() -> None:
    assert list(shear.check(beam(m=None))) == []
