"""Continuous beams whose answers are textbook coefficients."""

from __future__ import annotations

import numpy as np
import pytest
from beam_builders import WEB, line, loads, project

from detailer.model import Beam, Section
from detailer.statics import Envelope, envelope
from detailer.statics.loads import FACTOR, stiffness

L, W = 6000.0, 20.0  # [mm, N/mm]
WLL = FACTOR * W * L * L  # [N·mm]
WL = FACTOR * W * L  # [N]

closed_form = pytest.mark.source("closed form, elementary statics", page_seen=False)


def of(beam: Beam) -> Envelope:
    found = envelope(project(beam), beam)
    assert found is not None
    return found


def dead(count: int) -> Envelope:
    return of(line([L] * count, [loads(W)] * count))


@closed_form
def test_factor_of_dead_and_imposed_load() -> None:
    assert FACTOR == 1.5


@closed_form
def test_stiffness_is_that_of_the_gross_web() -> None:
    beam = line([L], [loads(W)], sections=[Section(width=300, depth=600, slab=120, flange=1500)])
    assert stiffness(beam.spans[0]) == pytest.approx(300 * 600**3 / 12)


@closed_form
def test_simple_span_uniform() -> None:
    found = dead(1)
    assert found.form == "loads"
    assert found.moment(L / 2) == pytest.approx((WLL / 8, WLL / 8))
    assert found.moment(L / 4) == pytest.approx((WLL * 3 / 32,) * 2)
    assert found.shear(0) == pytest.approx((WL / 2,) * 2)
    assert found.shear(L) == pytest.approx((-WL / 2,) * 2)


@closed_form
@pytest.mark.parametrize("share", [0.1, 0.25, 0.4137, 0.5, 0.8])
def test_simple_span_point_load(share: float) -> None:
    """P a b / L under the load; P b / L and P a / L beside it."""
    p, a = 90e3, share * L
    found = of(line([L], [loads(0.0, 0.0, (a, p, 0.0))]))
    assert found.moment(a)[1] == pytest.approx(FACTOR * p * a * (L - a) / L)
    assert found.shear(a, side=-1)[1] == pytest.approx(FACTOR * p * (L - a) / L)
    assert found.shear(a, side=1)[0] == pytest.approx(-FACTOR * p * a / L)
    least, most = found.shear(a)
    assert (least, most) == pytest.approx((-FACTOR * p * a / L, FACTOR * p * (L - a) / L))


@closed_form
def test_two_point_loads_at_one_place_add_up() -> None:
    twice = of(line([L], [loads(0.0, 0.0, (2000.0, 30e3, 0.0), (2000.0, 60e3, 0.0))]))
    once = of(line([L], [loads(0.0, 0.0, (2000.0, 90e3, 0.0))]))
    for side in (-1, 0, 1):
        assert twice.shear(2000, side=side) == pytest.approx(once.shear(2000, side=side))
    assert twice.moment(2000) == pytest.approx(once.moment(2000))


@closed_form
@pytest.mark.parametrize("at", [0.0, L])
def test_point_load_on_a_support_bends_nothing(at: float) -> None:
    found = of(line([L], [loads(0.0, 0.0, (at, 90e3, 0.0))]))
    assert found.moment(L / 2) == pytest.approx((0, 0), abs=1e-6)
    assert found.shear(L / 2) == pytest.approx((0, 0), abs=1e-6)


@closed_form
def test_propped_cantilever() -> None:
    """A near span without load and very stiff holds its end: wL²/8, 5wL/8, 3wL/8, 9wL²/128."""
    stiff = Section(width=300, depth=50_000)
    found = of(line([L, L], [loads(0.0), loads(W)], sections=[stiff, WEB]))
    assert found.moment(L)[0] == pytest.approx(-WLL / 8, rel=1e-5)
    assert found.shear(L, side=1)[1] == pytest.approx(5 / 8 * WL, rel=1e-5)
    assert found.shear(2 * L)[0] == pytest.approx(-3 / 8 * WL, rel=1e-5)
    assert found.moment(L + 5 * L / 8)[1] == pytest.approx(9 / 128 * WLL, rel=1e-5)


@closed_form
def test_fixed_span() -> None:
    """Two very stiff neighbours: wL²/12 at the ends, wL²/24 between."""
    stiff = Section(width=300, depth=50_000)
    found = of(line([L] * 3, [loads(0.0), loads(W), loads(0.0)], sections=[stiff, WEB, stiff]))
    assert found.moment(L)[0] == pytest.approx(-WLL / 12, rel=1e-5)
    assert found.moment(2 * L)[0] == pytest.approx(-WLL / 12, rel=1e-5)
    assert found.moment(1.5 * L)[1] == pytest.approx(WLL / 24, rel=1e-5)


@closed_form
def test_two_equal_spans() -> None:
    """−wL²/8; 0.375, 0.625 wL; 9wL²/128 at 3L/8; no moment at 3L/4."""
    found = dead(2)
    assert found.moment(L)[0] == pytest.approx(-WLL / 8)
    assert found.shear(0)[1] == pytest.approx(0.375 * WL)
    assert found.shear(L, side=-1)[0] == pytest.approx(-0.625 * WL, rel=1e-5)
    assert found.shear(L, side=1)[1] == pytest.approx(0.625 * WL, rel=1e-5)
    assert found.moment(3 / 8 * L)[1] == pytest.approx(9 / 128 * WLL)
    left, right = found.beam.spans
    assert found.peak_sagging(left) == pytest.approx((3 / 8 * L, 9 / 128 * WLL))
    assert found.peak_hogging(1) == pytest.approx(WLL / 8)
    assert found.peak_hogging(0) == 0
    assert found.inflections(left, hogging=True) == pytest.approx((0.75 * L,), abs=0.1)
    assert found.inflections(left, hogging=False) == pytest.approx((0, 0.75 * L), abs=0.1)
    assert found.inflections(right, hogging=True) == pytest.approx((1.25 * L,), abs=0.1)


@closed_form
def test_three_equal_spans() -> None:
    """−0.1 wL²; 0.08, 0.025 wL²; shears 0.4, 0.6, 0.5 wL."""
    found = dead(3)
    for support in (L, 2 * L):
        assert found.moment(support)[0] == pytest.approx(-0.1 * WLL)
    assert found.moment(0.4 * L)[1] == pytest.approx(0.08 * WLL)
    assert found.moment(1.5 * L)[1] == pytest.approx(0.025 * WLL)
    assert found.shear(0)[1] == pytest.approx(0.4 * WL)
    assert found.shear(L, side=-1)[0] == pytest.approx(-0.6 * WL, rel=1e-5)
    assert found.shear(L, side=1)[1] == pytest.approx(0.5 * WL, rel=1e-5)


@closed_form
def test_four_equal_spans() -> None:
    """−0.1071, −0.0714, −0.1071 wL²."""
    found = dead(4)
    for support, value in ((1, 3 / 28), (2, 1 / 14), (3, 3 / 28)):
        assert found.moment(support * L)[0] == pytest.approx(-value * WLL)


@closed_form
@pytest.mark.parametrize(
    ("count", "support", "hogging", "sagging"),
    [
        (2, 1, -0.125, (0.0957,)),
        (3, 1, -0.1167, (0.1013, 0.075)),
        (4, 1, -0.1205, (0.0996, 0.0805)),
        (4, 2, -0.1071, (0.0996, 0.0805)),
    ],
)
def test_imposed_load_in_its_worst_pattern(
    count: int, support: int, hogging: float, sagging: tuple[float, ...]
) -> None:
    """Tabled coefficients of wL² for imposed load placed at will on equal spans."""
    found = of(line([L] * count, [loads(0.0, W)] * count))
    assert found.moment(support * L)[0] / WLL == pytest.approx(hogging, abs=5e-5)
    for span, value in zip(found.beam.spans, sagging, strict=False):
        assert found.peak_sagging(span)[1] / WLL == pytest.approx(value, abs=1e-4)


@closed_form
def test_central_point_loads_on_two_spans() -> None:
    """−3PL/16 = −0.1875 PL; 5PL/32 under the loads; end shear 5P/16."""
    p = 60e3
    found = of(line([L, L], [loads(0.0, 0.0, (L / 2, p, 0.0))] * 2))
    assert found.moment(L)[0] == pytest.approx(-FACTOR * 3 / 16 * p * L)
    assert found.moment(L / 2)[1] == pytest.approx(FACTOR * 5 / 32 * p * L)
    assert found.shear(0)[1] == pytest.approx(FACTOR * 5 / 16 * p)


@closed_form
def test_third_point_loads_on_two_spans() -> None:
    """−PL/3 at the support from two loads P in each span."""
    p = 40e3
    points = ((L / 3, p, 0.0), (2 * L / 3, p, 0.0))
    found = of(line([L, L], [loads(0.0, 0.0, *points)] * 2))
    assert found.moment(L)[0] == pytest.approx(-FACTOR * p * L / 3)


@closed_form
@pytest.mark.parametrize("left", [True, False])
def test_overhang(left: bool) -> None:
    """−wa²/2 − Pb at the root, shear wa + P; the far end of the span lifts by M/L."""
    a, p, b = 1500.0, 10e3, 1200.0  # the point load at b from the root
    at = a - b if left else b
    tip = loads(W, 0.0, (at, p, 0.0))
    tips = (a, 0.0) if left else (0.0, a)
    results = [tip, loads(0.0)] if left else [loads(0.0), tip]
    found = of(line([L], results, tips=tips))
    root, sign = (0.0, 1) if left else (L, -1)
    m = -FACTOR * (W * a * a / 2 + p * b)
    assert found.moment(root)[0] == pytest.approx(m)
    assert found.shear(root, side=-sign) == pytest.approx(
        (-sign * FACTOR * (W * a + p),) * 2, rel=1e-5
    )
    assert found.shear(L / 2) == pytest.approx((-sign * m / L,) * 2)
    half = -FACTOR * (W * 750**2 / 2 + p * (b - 750))
    assert found.moment(root - sign * 750)[0] == pytest.approx(half)
    tip_end = root - sign * a
    assert found.moment(tip_end) == pytest.approx((0, 0), abs=1e-3)
    beside = root - sign * b
    outer, inner = found.shear(beside, side=-sign), found.shear(beside, side=sign)
    assert abs(inner[0] - outer[0]) == pytest.approx(FACTOR * p, rel=1e-4)


@closed_form
def test_overhang_of_an_equal_line() -> None:
    """Overhang of L/2 with load on all: −wL²/8 at its root and wL²/16 midway."""
    found = of(line([L], [loads(W), loads(W)], tips=(0.0, L / 2)))
    assert found.moment(L)[0] == pytest.approx(-WLL / 8)
    assert found.moment(L / 2)[1] == pytest.approx(WLL / 16)
    assert found.shear(0)[1] == pytest.approx(0.375 * WL)


@closed_form
def test_unequal_stiffness() -> None:
    """Two spans, the right one twice as stiff: load on both −wL²/8, on the left one −wL²/12."""
    strong = Section(width=600, depth=500)
    found = of(line([L, L], [loads(W), loads(0.0)], sections=[WEB, strong]))
    assert found.moment(L)[0] == pytest.approx(-WLL / 12)
    assert of(line([L, L], [loads(W)] * 2, sections=[WEB, strong])).moment(L)[0] == (
        pytest.approx(-WLL / 8)
    )


@closed_form
def test_unequal_spans() -> None:
    """M = −w(L1³ + L2³)/(8 (L1 + L2))."""
    found = of(line([4000.0, 7000.0], [loads(W)] * 2))
    expected = -FACTOR * W * (4000**3 + 7000**3) / (8 * 11_000)
    assert found.moment(4000)[0] == pytest.approx(expected)


@closed_form
@pytest.mark.parametrize("share", [0.6, 1.0, 2.5])
def test_envelope_holds_dead_on_all_and_imposed_at_will(share: float) -> None:
    """Two spans: midway, all dead and the imposed load of this span only or the other only."""
    live = share * W
    found = of(line([L, L], [loads(W, live)] * 2))
    own, other, both = 1 / 8 - 1 / 32, -1 / 32, 1 / 16
    unit = FACTOR * L * L
    assert found.moment(L / 2)[1] == pytest.approx(unit * (both * W + own * live))
    assert found.moment(L / 2)[0] == pytest.approx(unit * (both * W + other * live))


def test_no_results_no_envelope() -> None:
    beam = line([L, L], [None, None])
    assert envelope(project(beam), beam) is None


def test_mixed_results_are_refused() -> None:
    beam = line([L, L], [loads(W), None])
    with pytest.raises(ValueError, match="different forms"):
        envelope(project(beam), beam)


def test_loads_give_no_torsion() -> None:
    found = dead(2)
    assert not found.twisted
    assert found.torsion(L / 2) == 0
    assert not np.any(found.torsions(np.linspace(0, 2 * L, 50)))
