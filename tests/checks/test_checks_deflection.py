"""Span over effective depth: IS 456:2000, 23.2.1, Figs. 4, 5 and 6."""

from __future__ import annotations

from math import log10

import pytest
from check_cases import area, bottom, case, loops, low_z, one, parabola, top

from detailer.checks import Case, deflection
from detailer.model import Section
from detailer.values import Severity, SupportKind

PAIR = (-100.0, 100.0)
D = 254.0
"""300 − 30 − 8 − 8 [mm]."""

THREE = area(16, 3)
CARRIED = THREE * 435 * (D - 0.42 * THREE * 435 / 2700)
"""3 φ 16 in 300 × 300: x = 97.2, 55.9 kN·m [N·mm]."""


def allowed(
    basic: float, used: float, pt: float, pc: float, *, fy: float = 500, ratio: float = 1.0
) -> float:
    """Return the ratio by hand: Fig. 4 by the formula of SP 24, Fig. 5 and 6 by their points."""
    fs = 0.58 * fy * used
    kt = min(1 / (0.225 + 0.00322 * fs + 0.625 * log10(pt)), 2.0)
    kc = min(1 + pc / (3 + pc), 1.5)
    kf = max(0.8, 0.8 + 2 / 7 * (ratio - 0.3))
    return basic * kt * kc * kf


PT = 100 * THREE / (300 * D)  # 0.792
PC = 100 * area(12, 2) / (300 * D)  # 0.297


def simple(length: float, peak: float, **what: object) -> Case:
    more = {
        "section": Section(width=300.0, depth=300.0),
        "m": parabola(peak, length),
        "lengths": (length,),
        "kind": SupportKind.WALL,
        **what,
    }
    return case(
        bottom("b", -110, length + 110, 16, (-100.0, 0.0, 100.0), z=low_z(16, depth=300)),
        top("t", -110, length + 110, 12, PAIR),
        loops("l", 150, height=240),
        **more,  # type: ignore[arg-type]
    )


def test_the_hand_numbers() -> None:
    assert pytest.approx(55.9, abs=0.05) == CARRIED / 1e6
    # fs = 290 · 50/55.9 = 259; kt = 1.004, kc = 1.090: 20 · 1.004 · 1.090 = 21.9
    assert allowed(20, 50e6 / CARRIED, PT, PC) == pytest.approx(21.88, abs=0.01)


def test_a_simple_span() -> None:
    # 21.88 · 254 = 5558
    assert list(deflection.check(simple(5550.0, 50e6))) == []
    found = one(deflection.check(simple(5700.0, 50e6)), "deflection")
    # 5700/254 = 22.4
    assert (found.found, found.required, found.unit) == (22.4, 21.9, "")
    assert found.severity is Severity.UNSAFE
    assert found.clause == "IS 456:2000, 23.2.1"
    assert found.place.name == "span 1" and found.x == pytest.approx(2850, abs=60)
    assert found.bars == ("b",)
    assert "simple" in found.message


def test_less_stress_allows_more() -> None:
    # half the moment: fs = 130: kt = 1/(0.225 + 0.4174 − 0.0634) = 1.727
    assert list(deflection.check(simple(5700.0, 25e6))) == []
    limit = allowed(20, 25e6 / CARRIED, PT, PC)
    found = one(deflection.check(simple(1.02 * limit * D, 25e6)), "deflection")
    assert found.required == pytest.approx(limit, abs=0.1)


def test_a_continuous_span_has_26() -> None:
    length = 6000.0
    limit = allowed(26, 50e6 / CARRIED, PT, PC)  # 28.4: 7225

    def made(length: float) -> Case:
        whole = parabola(50e6, length)
        return simple(length, 0, lengths=(length, length), m=lambda x: whole(x % length))

    assert list(deflection.check(made(length))) == []
    # bars of the first span only reach through it; the second has none and is not asked
    found = one(deflection.check(made(1.03 * limit * D)), "deflection")
    assert found.required == pytest.approx(limit, abs=0.1)
    assert found.place.name == "span 1" and "continuous" in found.message


def test_a_cantilever_has_7() -> None:
    # 300 × 200, 2 φ 16 above at d = 154: x = 64.8 < 0.46 d = 70.8; 22.2 kN·m; 2 φ 10 below
    d, steel = 154.0, area(16, 2)
    carried = steel * 435 * (d - 0.42 * steel * 435 / 2700)
    assert carried / 1e6 == pytest.approx(22.2, abs=0.05)
    limit = allowed(7, 15e6 / carried, 100 * steel / (300 * d), 100 * area(10, 2) / (300 * d))
    assert limit * d == pytest.approx(1450, abs=2)

    def made(tip: float) -> Case:
        return case(
            top("t", -110, 6000 + tip - 30, 16, PAIR),
            bottom("b", -110, 6000 + tip - 30, 10, PAIR, z=low_z(10, depth=200)),
            loops("l", 100, height=140),
            tips=(0.0, tip), m=-15e6, section=Section(width=300.0, depth=200.0),
        )  # fmt: skip

    assert list(deflection.check(made(1440.0))) == []
    found = one(deflection.check(made(1480.0)), "deflection")
    # 1480/154 = 9.6, 9.4
    assert (found.found, found.required) == (9.6, 9.4)
    assert found.place.name == "span 2" and found.bars == ("t",)


def test_beyond_10_m_the_ratio_falls() -> None:
    # 300 × 600, d = 554: 20 · 10/length
    def made(length: float) -> Case:
        return case(
            bottom("b", -110, length + 110, 16, (-100.0, 0.0, 100.0), z=low_z(16, depth=600)),
            top("t", -110, length + 110, 12, PAIR),
            loops("l", 150, height=540),
            section=Section(width=300.0, depth=600.0), kind=SupportKind.WALL,
            m=parabola(100e6, length), lengths=(length,),
        )  # fmt: skip

    carried = THREE * 435 * (554 - 0.42 * THREE * 435 / 2700)
    share = 300 * 554 / 100
    at = allowed(20, 100e6 / carried, THREE / share, area(12, 2) / share)
    # at · 10 000/L = L/554
    edge = (at * 10_000 * 554) ** 0.5
    assert 10_000 < edge < 14_000
    assert list(deflection.check(made(0.995 * edge))) == []
    found = one(deflection.check(made(1.02 * edge)), "deflection")
    assert found.required == pytest.approx(at * 10_000 / (1.02 * edge), abs=0.1)


def test_a_flange_counts_for_the_steel_and_against_the_ratio() -> None:
    # bf = min(l/6 + 300 + 6 · 100, 1200) = 1200 of a span of 6 m: bw/bf = 0.25: 0.8
    flanged = Section(width=300.0, depth=300.0, slab=100.0, flange=1200.0)
    x = THREE * 435 / (0.36 * 25 * 1200)
    carried = THREE * 435 * (D - 0.42 * x)
    share = 1200 * D / 100
    limit = allowed(20, 60e6 / carried, THREE / share, area(12, 2) / share, ratio=0.25)
    length = limit * D
    assert length / 6 + 900 > 1200
    assert list(deflection.check(simple(0.99 * length, 60e6, section=flanged))) == []
    found = one(deflection.check(simple(1.02 * length, 60e6, section=flanged)), "deflection")
    assert found.required == pytest.approx(limit, abs=0.1)


def test_without_results_or_sagging_nothing_is_asked() -> None:
    assert list(deflection.check(simple(9000.0, 0, m=None))) == []
    assert list(deflection.check(simple(9000.0, 0, m=-10e6))) == []
