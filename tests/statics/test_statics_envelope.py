"""What an envelope answers: given stations, hand moments, faces, symmetry, linearity."""

from __future__ import annotations

from itertools import pairwise

import numpy as np
import pytest
from beam_builders import WEB, line, loads, project
from hypothesis import given, settings
from hypothesis import strategies as st

from detailer.model import Beam, HandResults, Loads, PointLoad, Section, Station, Stations
from detailer.statics import Envelope, SpanEnvelope, envelope
from detailer.statics.envelope import Floats, rigid_zones
from detailer.values import SupportKind

L = 6000.0


def of(beam: Beam) -> Envelope:
    found = envelope(project(beam), beam)
    assert found is not None
    return found


def stations(*rows: tuple[float, ...]) -> Stations:
    """Return rows of (x, m_max, m_min, v_max, v_min[, t])."""
    names = ("x", "m_max", "m_min", "v_max", "v_min", "t")
    return Stations(tuple(Station(**dict(zip(names, row, strict=False))) for row in rows))


# -- stations ------------------------------------------------------------------------------

SPAN_1 = stations(
    (0, 0, 0, 90e3, 60e3),
    (1500, 80e6, 40e6, 50e3, 30e3, 5e6),
    (3000, 100e6, 20e6, 10e3, -10e3, 0),
    (L, -60e6, -120e6, -80e3, -110e3, 2e6),
)
SPAN_2 = stations(
    (0, -55e6, -130e6, 100e3, 70e3, 8e6),
    (2000, 30e6, -10e6, 40e3, 20e3),
    (4000, 0, 0, -40e3, -60e3),
)


def exported(**how: object) -> Envelope:
    return of(line([L, 4000.0], [SPAN_1, SPAN_2], **how))  # type: ignore[arg-type]


@pytest.mark.parametrize(
    ("x", "moment", "shear"),
    [
        (0.0, (0, 0), (60e3, 90e3)),
        (750.0, (20e6, 40e6), (45e3, 70e3)),
        (1500.0, (40e6, 80e6), (30e3, 50e3)),
        (2000.0, (40e6 - 20e6 / 3, 80e6 + 20e6 / 3), (30e3 - 40e3 / 3, 50e3 - 40e3 / 3)),
        (4500.0, (-50e6, 20e6), (-60e3, -35e3)),
        (7000.0, (-70e6, -12.5e6), (45e3, 70e3)),
        (10_000.0, (0, 0), (-60e3, -40e3)),
    ],
)
def test_stations_are_joined_by_straight_lines(
    x: float, moment: tuple[float, float], shear: tuple[float, float]
) -> None:
    found = exported()
    assert found.form == "stations"
    assert found.moment(x) == pytest.approx(moment)
    assert found.shear(x) == pytest.approx(shear)


def test_a_centre_shared_by_two_spans_takes_the_worse() -> None:
    found = exported()
    assert found.moment(L) == pytest.approx((-130e6, -55e6))
    assert found.shear(L) == pytest.approx((-110e3, 100e3))
    assert found.shear(L, side=-1) == pytest.approx((-110e3, -80e3), rel=1e-4)
    assert found.shear(L, side=1) == pytest.approx((70e3, 100e3), rel=1e-4)
    assert found.torsion(L) == pytest.approx(8e6)
    assert found.torsion(750) == pytest.approx(2.5e6)
    assert found.twisted


def test_peaks_of_stations() -> None:
    found = exported()
    left, right = found.beam.spans
    assert found.peak_sagging(left) == pytest.approx((3000, 100e6))
    assert found.peak_sagging(right) == pytest.approx((8000, 30e6))
    assert found.peak_hogging(1) == pytest.approx(130e6)
    assert found.inflections(left, hogging=False) == pytest.approx((0, 4875))
    assert found.inflections(left, hogging=True) == pytest.approx((3000 + 3000 / 7,))


def test_a_jump_is_two_stations_at_one_place() -> None:
    """Built in memory, for files refuse doubles: both sides, and the worse at the place itself."""
    jump = stations(
        (0, 0, 0, 50e3, 50e3), (2000, 100e6, 90e6, 50e3, 40e3), (2000, 100e6, 90e6, -25e3, -30e3),
        (L, 0, 0, -25e3, -25e3),
    )  # fmt: skip
    found = of(line([L], [jump]))
    assert found.shear(2000, side=-1) == pytest.approx((40e3, 50e3), rel=1e-4)
    assert found.shear(2000, side=1) == pytest.approx((-30e3, -25e3), rel=1e-4)
    assert found.shear(2000) == pytest.approx((-30e3, 50e3))
    assert found.moment(2000) == pytest.approx((90e6, 100e6))
    low, high = found.shears(np.array([1000.0, 2000.0, 4000.0]))
    assert low == pytest.approx([45e3, -30e3, -27.5e3])
    assert high == pytest.approx([50e3, 50e3, -25e3])


def test_outer_stations_stand_at_the_ends_of_the_span() -> None:
    """A table may end up to a millimetre short; nothing is lost at the centre between spans."""
    short = stations((0.6, 0, 0, 9e3, 9e3), (3000, 5e6, 0, 0, 0), (L - 0.8, -8e6, -9e6, -9e3, -9e3))
    found = of(line([L, L], [short, short]))
    for x, low in ((L, -9e6), (L - 0.5, -9e6), (L + 0.3, 0)):
        assert found.moment(x)[0] == pytest.approx(low, abs=2e4)
    assert found.shear(L) == pytest.approx((-9e3, 9e3))


def test_sample_holds_faces_stations_and_jumps() -> None:
    found = exported(kind=SupportKind.COLUMN, width=400.0)
    for span in found.beam.spans:
        xs = found.sample(span, 50)
        assert (xs[0], xs[-1]) == found.beam.clear(span)
        assert np.diff(xs).max() <= 50 + 1e-9
        assert np.diff(xs).min() > 0
    assert {1500.0, 3000.0} <= set(found.sample(found.beam.spans[0]).tolist())
    point = of(line([12_000.0], [loads(10, 5, (4321.7, 90e3, 0))]))
    assert 4321.7 in point.sample(point.beam.spans[0])


# -- results by hand -----------------------------------------------------------------------


def by_hand(moment: tuple[float, float, float], shear: tuple[float, float]) -> Envelope:
    return of(line([L], [HandResults(moment=moment, shear=shear)]))


@pytest.mark.parametrize(
    "moment", [(0.0, 90e6, 0.0), (-120e6, 70e6, -80e6), (-50e6, -20e6, 0.0), (0.0, 0.0, -60e6)]
)
def test_three_moments_make_one_parabola(moment: tuple[float, float, float]) -> None:
    found = by_hand(moment, (90e3, -95e3))
    assert found.form == "hand"
    for x, value in zip((0, L / 2, L), moment, strict=True):
        assert found.moment(x) == pytest.approx((value, value), abs=1.0)
    xs = np.linspace(0, L, 61)
    least, most = found.moments(xs)
    assert np.array_equal(least, most)
    bend = np.diff(most, 2)
    assert bend == pytest.approx(np.full(59, bend[0]), abs=1e-6 * max(map(abs, moment)))
    assert found.shear(L / 4) == pytest.approx((43.75e3,) * 2)


def test_a_uniform_load_written_by_hand() -> None:
    """wL²/8 between supports: the parabola is that of the load, slope and all."""
    w = 30.0
    hand = by_hand((0, w * L * L / 8, 0), (w * L / 2, -w * L / 2))
    same = of(line([L], [loads(w / 1.5)]))
    xs = np.linspace(0, L, 41)
    assert hand.moments(xs)[0] == pytest.approx(same.moments(xs)[0], rel=1e-3, abs=1.0)
    assert hand.shears(xs)[0] == pytest.approx(same.shears(xs)[0], abs=1.0)


# -- faces ---------------------------------------------------------------------------------


def on(kind: SupportKind, width: float = 500.0) -> Envelope:
    return of(line([L, L], [loads(20, 10), loads(20, 10)], tips=(0.0, 0.0), kind=kind, width=width))


@pytest.mark.parametrize("kind", [SupportKind.COLUMN, SupportKind.BEAM])
def test_inside_a_support_cast_with_the_beam_the_face_counts(kind: SupportKind) -> None:
    found, bare = on(kind), on(SupportKind.WALL)
    for x, face in ((L - 249, L - 250), (L - 1, L - 250), (L, L + 250), (L + 100, L + 250)):
        assert found.moment(x) == pytest.approx(bare.moment(face))
    for x, face in ((-249, 250), (0, 250), (200, 250), (2 * L, 2 * L - 250), (2 * L + 240, 11_750)):
        assert found.moment(x) == pytest.approx(bare.moment(face))
    for x in (300.0, 2000.0, L - 250, L + 250):
        assert found.moment(x) == pytest.approx(bare.moment(x))
    assert found.peak_hogging(1) == pytest.approx(-bare.moment(L - 250)[0])
    assert bare.peak_hogging(1) == pytest.approx(-bare.moment(L)[0])


def test_shear_is_not_taken_at_the_face() -> None:
    found, bare = on(SupportKind.COLUMN), on(SupportKind.WALL)
    for x in (0.0, 100.0, L - 100, L, L + 100):
        assert found.shear(x) == pytest.approx(bare.shear(x))


def test_rigid_zones_of_ends_and_overhangs() -> None:
    """The outer half of an end support counts to its inner face; with an overhang it does not."""
    bare = line([L], [loads(1)], kind=SupportKind.COLUMN, width=400.0)
    assert rigid_zones(bare) == ((-201, -201, 200), (L - 200, L + 201, L + 201))
    tipped = line(
        [L], [loads(1), loads(1)], tips=(1500.0, 0.0), kind=SupportKind.COLUMN, width=400.0
    )
    assert rigid_zones(tipped)[0] == (-200, 0, 200)
    wall = line([L], [loads(1)], width=400.0)
    assert rigid_zones(wall) == ()


# -- properties ----------------------------------------------------------------------------

FORCE = st.integers(0, 40).map(float)
SECTIONS = st.sampled_from([WEB, Section(width=300, depth=700), Section(width=230, depth=350)])


@st.composite
def lines(draw: st.DrawFn) -> Beam:
    """Draw a line of spans and overhangs with uniform and point loads."""
    lengths = draw(st.lists(st.integers(4, 32).map(lambda n: n * 250.0), min_size=1, max_size=4))
    tips = draw(st.tuples(*[st.sampled_from([0.0, 1000.0, 1750.0])] * 2))
    whole = [*filter(None, tips[:1]), *lengths, *filter(None, tips[1:])]
    results, sections = [], []
    for length in whole:
        count = draw(st.integers(0, 2))
        points = [
            (draw(st.integers(1, 9)) * length / 10, draw(FORCE) * 1e3, draw(FORCE) * 1e3)
            for _ in range(count)
        ]
        results.append(loads(draw(FORCE), draw(FORCE), *points))
        sections.append(draw(SECTIONS))
    return line(lengths, results, tips=tips, sections=sections)


def rebuilt(beam: Beam, results: list[Loads], *, flipped: bool = False) -> Beam:
    """Return the same line with other loads, mirrored or not."""
    order = -1 if flipped else 1
    spans = beam.spans[::order]
    tips = (
        beam.spans[0].length if beam.spans[0].left is None else 0.0,
        beam.spans[-1].length if beam.spans[-1].right is None else 0.0,
    )
    return line(
        [s.length for s in spans if not s.overhang],
        results[::order],
        tips=(tips[::order][0], tips[::order][1]),
        sections=[s.section for s in spans],
    )


def of_loads(beam: Beam) -> list[Loads]:
    return [s.results for s in beam.spans if isinstance(s.results, Loads)]


def scaled(given_loads: Loads, dead: float, imposed: float) -> Loads:
    return Loads(
        dead=dead * given_loads.dead,
        imposed=imposed * given_loads.imposed,
        points=tuple(
            PointLoad(x=p.x, dead=dead * p.dead, imposed=imposed * p.imposed)
            for p in given_loads.points
        ),
    )


def scale_of(found: Envelope) -> tuple[float, float]:
    """Return a moment and a shear against which differences are small or not."""
    m = max(float(max(abs(s.m_max).max(), abs(s.m_min).max())) for s in found.spans)
    v = max(float(max(abs(s.v_max).max(), abs(s.v_min).max())) for s in found.spans)
    return 1e-9 * m + 1.0, 1e-9 * v + 0.01


def near(a: Floats | float, b: Floats | float, slack: float) -> bool:
    return bool(np.all(np.abs(np.asarray(a) - b) <= slack))


@settings(max_examples=30)
@given(lines())
def test_a_mirrored_line_has_the_mirrored_envelope(beam: Beam) -> None:
    mirrored = [
        Loads(
            dead=r.dead,
            imposed=r.imposed,
            points=tuple(
                PointLoad(x=s.length - p.x, dead=p.dead, imposed=p.imposed) for p in r.points
            ),
        )
        for s, r in zip(beam.spans, of_loads(beam), strict=True)
    ]
    here, there = of(beam), of(rebuilt(beam, mirrored, flipped=True))
    m, v = scale_of(here)
    for a, b in zip(here.spans, there.spans[::-1], strict=True):
        assert near(b.m_max[::-1], a.m_max, m)
        assert near(b.m_min[::-1], a.m_min, m)
        assert near(-b.v_min[::-1], a.v_max, v)
        assert near(-b.v_max[::-1], a.v_min, v)


@settings(max_examples=30)
@given(lines(), st.sampled_from([0.25, 1.0, 3.0]))
def test_the_envelope_grows_with_the_load(beam: Beam, factor: float) -> None:
    """All loads times a factor; and dead plus imposed alone add up to both together."""
    both = of(beam)
    m, v = scale_of(both)
    grown = of(rebuilt(beam, [scaled(r, factor, factor) for r in of_loads(beam)]))
    dead = of(rebuilt(beam, [scaled(r, 1, 0) for r in of_loads(beam)]))
    live = of(rebuilt(beam, [scaled(r, 0, 1) for r in of_loads(beam)]))
    for name, slack in (("m_max", m), ("m_min", m), ("v_max", v), ("v_min", v)):
        for k, span in enumerate(both.spans):
            here = getattr(span, name)
            assert near(getattr(grown.spans[k], name), factor * here, 4 * slack)
            apart = getattr(dead.spans[k], name) + getattr(live.spans[k], name)
            assert near(apart, here, 4 * slack)


@settings(max_examples=30)
@given(lines())
def test_the_envelope_holds_no_load_and_every_load(beam: Beam) -> None:
    """Least is no more than most; dead alone, and with all the imposed load, lies between."""
    found = of(beam)
    m, v = scale_of(found)
    for imposed in (0, 1):
        uniform = [
            Loads(
                dead=r.dead + imposed * r.imposed,
                imposed=0.0,
                points=tuple(
                    PointLoad(x=p.x, dead=p.dead + imposed * p.imposed, imposed=0.0)
                    for p in r.points
                ),
            )
            for r in of_loads(beam)
        ]
        one = of(rebuilt(beam, uniform))
        for a, b in zip(found.spans, one.spans, strict=True):
            assert (a.m_min - m <= b.m_max).all() and (b.m_max <= a.m_max + m).all()
            assert (a.v_min - v <= b.v_max).all() and (b.v_max <= a.v_max + v).all()


@settings(max_examples=30)
@given(lines())
def test_moments_run_on_over_supports(beam: Beam) -> None:
    found = of(beam)
    m, _ = scale_of(found)
    for a, b in pairwise(found.spans):
        assert isinstance(a, SpanEnvelope)
        assert near(a.m_min[-1], b.m_min[0], m)
        assert near(a.m_max[-1], b.m_max[0], m)
    assert near(found.spans[0].m_max[0], 0, m)
    assert near(found.spans[-1].m_max[-1], 0, m)


@settings(max_examples=30)
@given(lines(), st.floats(-1000, 40_000))
def test_one_place_and_many_places_agree(beam: Beam, x: float) -> None:
    found = of(beam)
    xs = np.array([x - 700, x, x + 1234])
    for k, at in enumerate(xs.tolist()):
        assert found.moment(at) == (found.moments(xs)[0][k], found.moments(xs)[1][k])
        assert found.shear(at) == (found.shears(xs)[0][k], found.shears(xs)[1][k])
        assert found.torsion(at) == found.torsions(xs)[k] == 0
