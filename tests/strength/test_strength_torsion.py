"""Torsion: equivalent shear, the bending it adds, and when steel must resist it at all."""

from __future__ import annotations

from dataclasses import replace

import numpy as np
import pytest
from beam_builders import line, project
from cage_builders import cage, link, main_bar
from hypothesis import given
from hypothesis import strategies as st

from detailer.cage.bar import Cage
from detailer.checks import Case, cutoffs, resistance, shear
from detailer.checks.demand import moments_asked, tension_asked
from detailer.findings import Finding
from detailer.model import Section, Station, Stations
from detailer.rules import is456
from detailer.statics import envelope
from detailer.strength.torsion import added_moment, with_torsion
from detailer.values import Face, Role

CANOPY = Section(width=300.0, depth=600.0)


def asked(least: float, most: float, t: float, section: Section = CANOPY) -> tuple[float, float]:
    added = added_moment(np.array([t]), section)
    bottom, top = with_torsion(np.array([least]), np.array([most]), added)
    return float(bottom[0]), float(top[0])


@pytest.mark.source("GATE CE 2004: Mu 200, Vu 20, Tu 9, 300 × 425; key not shown", page_seen=False)
def test_added_moment_of_an_examination_question() -> None:
    """Ve 68.0, Mt 12.79, Me1 212.8: options 68 and 213."""
    bottom, top = asked(200e6, 200e6, 9e6, Section(width=300, depth=425))
    assert bottom / 1e6 == pytest.approx(212.8, abs=0.05)
    assert top == 0
    assert is456.torsion_shear(20e3, 9e6, 300) / 1e3 == pytest.approx(68.0)


def test_golden_of_a_spandrel_under_a_canopy() -> None:
    """300 × 600: T 30.4, V 63.8, M 53: Me1 106.7, Ve 225.8, Me2 0.6. By us, printed nowhere."""
    t = 30.375e6
    bottom, top = asked(-53.1e6, -53.1e6, t)
    assert top / 1e6 == pytest.approx(106.7, abs=0.05)
    assert bottom / 1e6 == pytest.approx(0.5, abs=0.05)
    assert is456.torsion_shear(63.8e3, t, 300) / 1e3 == pytest.approx(225.8, abs=0.05)


@given(st.floats(-300, 300), st.floats(0, 100))
def test_of_one_moment_it_is_what_the_clause_says(m: float, t: float) -> None:
    """Me1 = M + Mt on the tension face; Me2 = Mt − M on the other where Mt is the greater."""
    bottom, top = asked(m * 1e6, m * 1e6, t * 1e6)
    tension, other = is456.torsion_moments(abs(m) * 1e6, t * 1e6, 600, 300)
    faces = (bottom, top) if m >= 0 else (top, bottom)
    assert faces == pytest.approx((tension, other), abs=1.0)


@given(st.floats(-300, 300), st.floats(0, 300), st.floats(0, 100))
def test_of_an_envelope_it_is_the_worst_of_its_moments(low: float, more: float, t: float) -> None:
    bottom, top = asked(low * 1e6, (low + more) * 1e6, t * 1e6)
    each = [asked(m * 1e6, m * 1e6, t * 1e6) for m in np.linspace(low, low + more, 7)]
    assert bottom == pytest.approx(max(b for b, _ in each), abs=1.0)
    assert top == pytest.approx(max(a for _, a in each), abs=1.0)


# -- the checks ----------------------------------------------------------------------------

LENGTH = 5000.0
LINKS = tuple(np.arange(200.0, 4801.0, 100.0).tolist())


def spandrel(
    *,
    t: float = 30.4e6,
    v: float = 63.8e3,
    m: float = 53e6,
    top: float = 25,
    bottom: float = 20,
    link_dia: float = 10,
    ties: float = 0,
) -> Case:
    """Return a spandrel twisted alike all along, hogging m all along, two bars a face."""
    rows = tuple(
        Station(x=x, m_max=-m, m_min=-m, v_max=v, v_min=v, t=t) for x in (0.0, 2500.0, LENGTH)
    )
    beam = line([LENGTH], [Stations(rows)], sections=[CANOPY], width=300.0)
    placed = cage_of(top, bottom, link_dia, ties)
    read = project(beam)
    return Case(project=read, beam=beam, envelope=envelope(read, beam), cage=placed)


def cage_of(top: float, bottom: float, link_dia: float, ties: float) -> Cage:
    bars = []
    for name, face, dia, z in (("t", Face.TOP, top, -55.0), ("b", Face.BOTTOM, bottom, -545.0)):
        bar = main_bar(name, -2000, 7000, dia=dia, y=-90, z=z, face=face)
        bars.append(replace(bar, placings=((0.0, 0.0, 0.0), (0.0, 180.0, 0.0))))
    outer = link("l", 240, 540, dia=link_dia, xs=LINKS)
    inner = [link("i", 100, 540, dia=ties, xs=tuple(x + 12 for x in LINKS))] if ties else []
    return cage(*bars, outer, *inner)


def rules(found: list[Finding]) -> set[str]:
    return {f.rule for f in found}


def test_torsion_adds_to_the_bending_asked() -> None:
    case = spandrel()
    assert case.envelope is not None
    span = case.beam.spans[0]
    bottom, top = moments_asked(case, case.envelope, span, np.array([2500.0]))
    assert (bottom[0] / 1e6, top[0] / 1e6) == pytest.approx((0.65, 106.65), abs=0.05)
    only = tension_asked(case, case.envelope, span, Face.TOP, np.array([2500.0]))
    assert only[0] == top[0]


def test_top_steel_for_bending_alone_is_found_short() -> None:
    """2 bars of 16 resist 90: enough for 53, not for 106.7."""
    plain, twisted = spandrel(t=0.0, top=16), spandrel(top=16)
    assert list(resistance.check(plain)) == []
    [finding] = resistance.check(twisted)
    assert (finding.rule, finding.required) == ("bending", pytest.approx(106.65, abs=0.06))
    assert "torsion included" in finding.message
    assert "41.4.2" in finding.clause
    assert list(resistance.check(spandrel(top=25))) == []


def test_torsion_under_the_strength_of_concrete_adds_nothing() -> None:
    """τve ≤ τc: 41.3.2 asks least links only."""
    case = spandrel(t=2e6, v=10e3)
    assert case.envelope is not None
    bottom, top = moments_asked(case, case.envelope, case.beam.spans[0], np.array([2500.0]))
    assert (bottom[0], top[0]) == (0.0, pytest.approx(53e6))
    carried = case.shear.capacity(2500.0, case.beam.spans[0], Face.TOP)
    assert is456.torsion_shear(10e3, 2e6, 300) < carried.concrete


def test_the_other_face_is_asked_too() -> None:
    """Mt 53.6 against M 10: the bottom is asked 43.6 and has no bars."""
    case = spandrel(m=10e6)
    bare = replace(case, cage=replace(case.cage, bars=case.cage.bars[:1] + case.cage.bars[2:]))
    findings = list(resistance.check(bare))
    assert [f.required for f in findings] == [pytest.approx(43.6, abs=0.1)]
    assert list(resistance.check(case)) == []


def test_links_for_torsion_and_shear() -> None:
    """T s/(b1 d1 0.87 fy) + V s/(2.5 d1 0.87 fy), 10 mm at 100: 96 mm² asked of 157.

    b1 and d1 by the largest bar: 300 − 60 − 20 − 25 = 195 and 495.
    """
    case = spandrel()
    assert list(shear.check(case)) == []
    fewer = replace(
        case, cage=replace(case.cage, bars=(*case.cage.bars[:2], link("l", 240, 540, dia=10,
        xs=tuple(np.arange(200.0, 4801.0, 200.0).tolist()))))
    )  # fmt: skip
    [finding] = shear.check(fewer)
    s, design = 200.0, 0.87 * 415
    need = 30.4e6 * s / (195 * 495 * design) + 63.8e3 * s / (2.5 * 495 * design)
    assert finding.rule == "torsion-links"
    assert finding.required == pytest.approx(need, abs=0.1)
    assert finding.found == pytest.approx(157.1, abs=0.05)
    assert finding.clause == "IS 456:2000, 41.4.3"


def test_inner_legs_do_not_resist_torsion() -> None:
    """Outer links of 8 mm at 100 have 100.5 mm²; twice the torsion asks more, whatever inside."""
    light = spandrel(t=38e6, link_dia=8, ties=12)
    carried = light.shear.capacity(2500.0, light.beam.spans[0], Face.TOP)
    assert carried.hoop == pytest.approx(100.5, abs=0.1)
    assert carried.asv == pytest.approx(100.5 + 226.2, abs=0.1)
    assert rules(list(shear.check(light))) == {"torsion-links"}
    assert list(shear.check(spandrel(t=38e6, link_dia=12))) == []


def test_links_at_their_floor() -> None:
    """(τve − τc) b s/(0.87 fy) governs beside much shear; all legs count for it."""
    s, design = 100.0, 0.87 * 415
    case = spandrel(v=300e3, t=4e6)
    carried = case.shear.capacity(2500.0, case.beam.spans[0], Face.TOP)
    ve = is456.torsion_shear(300e3, 4e6, 300)
    floor = (ve - carried.concrete) / carried.d * s / design
    formula = 4e6 * s / (195 * 495 * design) + 300e3 * s / (2.5 * 495 * design)
    assert floor > formula
    narrow = spandrel(v=300e3, t=4e6, link_dia=8)
    [finding] = shear.check(narrow)
    assert finding.required == pytest.approx(floor, rel=0.01)
    assert list(shear.check(spandrel(v=300e3, t=4e6, link_dia=8, ties=10))) == []


def test_bars_stop_where_torsion_still_needs_them() -> None:
    """Two top bars of four stop at 3 m: the other two resist 53, not 106.7."""
    plain, twisted = (spandrel(t=t, top=16) for t in (0.0, 30.4e6))
    for case, expected in ((plain, set()), (twisted, {"cut-off-extension"})):
        extra = replace(
            main_bar("x", -2000, 3000, dia=16, y=-30, z=-55, face=Face.TOP),
            placings=((0.0, 0.0, 0.0), (0.0, 60.0, 0.0)),
            role=Role.MAIN,
        )
        more = replace(case, cage=replace(case.cage, bars=(*case.cage.bars, extra)))
        found = rules([f for f in cutoffs.check(more) if f.rule == "cut-off-extension"])
        assert found == expected
