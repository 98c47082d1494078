"""Envelopes against two solvers that share no code with the program, and against equilibrium."""

from __future__ import annotations

from dataclasses import replace
from pathlib import Path
from random import Random

import numpy as np
import pytest
from beam_builders import line, loads, project
from generator import random_project
from oracle.judge import Line
from oracle.stiffness import Given, Solved, patterns, solve

from detailer.model import Beam, Loads, Section
from detailer.reading import read_project
from detailer.statics import Envelope, envelope
from detailer.statics.loads import STEP


def of(beam: Beam) -> Envelope:
    found = envelope(project(beam), beam)
    assert found is not None
    return found


def random_line(rng: Random, most: int = 4) -> Beam:
    """Return a line of at most `most` spans and overhangs, unequal in every respect."""
    tips = tuple(rng.choice((0.0, float(rng.randint(500, 2000)))) for _ in range(2))
    bays = rng.randint(1, most - sum(t > 0 for t in tips))
    lengths = [float(rng.randint(2000, 8000)) for _ in range(bays)]
    whole = [*([tips[0]] if tips[0] else []), *lengths, *([tips[1]] if tips[1] else [])]
    sections = [Section(width=300.0, depth=rng.choice((300.0, 450.0, 700.0))) for _ in whole]
    results = []
    for length in whole:
        points = tuple(
            (round(rng.random() * length, 1), rng.uniform(0, 50e3), rng.uniform(0, 50e3))
            for _ in range(rng.choice((0, 0, 1, 2)))
        )
        results.append(loads(rng.uniform(5, 30), rng.uniform(0, 30), *points))
    return line(lengths, results, tips=(tips[0], tips[1]), sections=sections)


def given(beam: Beam) -> list[Given]:
    found = []
    for span in beam.spans:
        assert isinstance(span.results, Loads)
        points = tuple((p.x, p.dead, p.imposed) for p in span.results.points)
        inertia = span.section.width * span.section.depth**3 / 12
        found.append(
            Given(span.x0, span.x1, inertia, span.results.dead, span.results.imposed, points)
        )
    return found


def by_patterns(beam: Beam) -> list[Solved]:
    return list(patterns(given(beam), [s.x for s in beam.supports]))


@pytest.mark.parametrize("seed", range(30))
def test_envelope_is_the_worst_of_every_pattern(seed: int) -> None:
    """Moments at every station and shears on both sides of it, to a millionth of the peak."""
    beam = random_line(Random(seed))
    found, solved = of(beam), by_patterns(beam)
    peak_m = max(abs(s.m_max).max() + abs(s.m_min).max() for s in found.spans)
    peak_v = max(abs(s.v_max).max() + abs(s.v_min).max() for s in found.spans)
    for span in found.spans:
        twins = np.diff(span.x) < 1e-9
        sides = np.where(np.append(twins, False), -1, 1)
        sides[-1] = -1
        for k in range(0, len(span.x), 3):
            both = [s.at(float(span.x[k]), int(sides[k])) for s in solved]
            ms, vs = [b[0] for b in both], [b[1] for b in both]
            assert span.m_max[k] == pytest.approx(max(ms), abs=1e-6 * peak_m)
            assert span.m_min[k] == pytest.approx(min(ms), abs=1e-6 * peak_m)
            assert span.v_max[k] == pytest.approx(max(vs), abs=1e-6 * peak_v)
            assert span.v_min[k] == pytest.approx(min(vs), abs=1e-6 * peak_v)


def kink(high: np.ndarray | float, low: np.ndarray | float) -> np.ndarray | float:
    """Return by how much a chord of 50 mm lies outside where one pattern takes over another."""
    return (high - low) * STEP / 4


@pytest.mark.parametrize("seed", range(100, 108))
def test_between_stations_the_envelope_is_linear_and_close(seed: int) -> None:
    """Half way between stations a chord misses w h²/8 at most, and at kinks errs safely."""
    beam = random_line(Random(seed))
    found, solved = of(beam), by_patterns(beam)
    missed = 1.5 * 60 * STEP**2 / 8
    for span in found.spans:
        for x in ((span.x[:-1] + span.x[1:]) / 2)[::7]:
            ms = [s.at(float(x))[0] for s in solved]
            least, most = found.moment(float(x))
            low, high = found.shear(float(x))
            outside = kink(high, low)
            assert -missed <= most - max(ms) <= missed + outside
            assert -missed <= min(ms) - least <= missed + outside


def test_the_solvers_agree() -> None:
    """The stiffness method against −wL²/8 of two spans and a point load by hand."""
    bays = [g.loaded(1.0, False) for g in given(line([4000.0] * 2, [loads(10.0)] * 2))]
    solved = solve(bays, [0.0, 4000.0, 8000.0])
    assert solved.at(4000.0)[0] == pytest.approx(-10 * 4000**2 / 8)
    bays = [g.loaded(1.0, False) for g in given(line([4000.0], [loads(0, 0, (1000.0, 8e3, 0))]))]
    solved = solve(bays, [0.0, 4000.0])
    assert solved.at(1000.0)[0] == pytest.approx(6e6)
    assert solved.at(1000.0, -1)[1] == pytest.approx(6e3)
    assert solved.at(1000.0, 1)[1] == pytest.approx(-2e3)


def snapped(beam: Beam, nodes: np.ndarray) -> Beam:
    """Return the beam with each point load on the node nearest to it."""
    spans = []
    for span in beam.spans:
        assert isinstance(span.results, Loads)
        points = tuple(
            replace(p, x=float(nodes[np.argmin(abs(nodes - span.x0 - p.x))]) - span.x0)
            for p in span.results.points
        )
        spans.append(replace(span, results=replace(span.results, points=points)))
    return replace(beam, spans=tuple(spans))


@pytest.mark.parametrize("first", range(0, 40, 10))
def test_envelope_of_project_files(first: int, tmp_path: Path) -> None:
    """40 random project files against finite elements: within half a percent of the peak.

    The elements carry a point load at their nearest node, so it is moved there for both; at the
    node itself the two sides of the jump differ, so shears are not compared there. Where one
    pattern takes over another between stations the envelope may lie further outside.
    """
    for seed in range(first, first + 10):
        text = random_project(seed)
        file = tmp_path / f"{seed}.toml"
        file.write_text(text, encoding="utf-8")
        judged = Line(text)
        beam = snapped(read_project(file).beams[0], judged.x)
        found = of(beam)
        peak_m = max(abs(judged.m_min).max(), abs(judged.m_max).max())
        peak_v = judged.v.max()
        for span in beam.spans:
            assert isinstance(span.results, Loads)
            x0, x1 = beam.clear(span)
            within = (judged.x > x0 + 1) & (judged.x < x1 - 1)
            xs = judged.x[within]
            least, most = found.moments(xs)
            low, high = found.shears(xs)
            below, above = judged.m_min[within] - least, most - judged.m_max[within]
            for over in (below, above):
                assert over.min() > -0.005 * peak_m, seed
                assert (over - kink(high, low)).max() < 0.005 * peak_m, seed
            apart = np.ones(len(xs), dtype=bool)
            for point in span.results.points:
                apart &= abs(xs - span.x0 - point.x) > 1
            off = abs(np.maximum(high, -low) - judged.v[within])
            assert off[apart].max() < 0.005 * peak_v, seed


@pytest.mark.parametrize("seed", range(200, 212))
def test_shear_is_the_slope_of_the_moment(seed: int) -> None:
    """Of one loading (no imposed load, so no envelope): V = dM/dx between stations."""
    beam = random_line(Random(seed))
    dead_only = [
        loads(s.results.dead, 0.0, *((p.x, p.dead, 0.0) for p in s.results.points))
        for s in beam.spans
        if isinstance(s.results, Loads)
    ]
    bare = line(
        [s.length for s in beam.spans if not s.overhang],
        dead_only,
        tips=(max(0.0, -beam.spans[0].x0), beam.spans[-1].x1 - beam.supports[-1].x),
        sections=[s.section for s in beam.spans],
    )
    found = of(bare)
    peak = max(abs(s.v_max).max() for s in found.spans)
    for span in found.spans:
        assert np.array_equal(span.m_max, span.m_min)
        assert np.array_equal(span.v_max, span.v_min)
        step = np.diff(span.x)
        apart = step > 1e-3
        slope = np.diff(span.m_max)[apart] / step[apart]
        mean = (span.v_max[:-1] + span.v_max[1:])[apart] / 2
        assert slope == pytest.approx(mean, abs=1e-5 * peak)


@pytest.mark.parametrize("seed", range(300, 312))
def test_reactions_carry_all_load(seed: int) -> None:
    """Jumps of shear at the supports add up to the load; its moment about x = 0 is theirs."""
    beam = random_line(Random(seed))
    for k, span in enumerate(beam.spans):
        assert isinstance(span.results, Loads)
        alone = [span.results if n == k else loads(0.0) for n, _ in enumerate(beam.spans)]
        dead = [loads(r.dead, 0.0, *((p.x, p.dead, 0.0) for p in r.points)) for r in alone]
        bare = line(
            [s.length for s in beam.spans if not s.overhang],
            dead,
            tips=(max(0.0, -beam.spans[0].x0), beam.spans[-1].x1 - beam.supports[-1].x),
            sections=[s.section for s in beam.spans],
        )
        found = of(bare)
        ends = {s.number: s for s in found.spans}
        reactions = []
        for n, support in enumerate(bare.supports):
            left, right = bare.spans_of(n)
            up = (ends[right.number].v_max[0] if right else 0.0) - (
                ends[left.number].v_max[-1] if left else 0.0
            )
            reactions.append((support.x, up))
        loaded = dead[k]
        total = 1.5 * (loaded.dead * span.length + sum(p.dead for p in loaded.points))
        first = 1.5 * (
            loaded.dead * span.length * (span.x0 + span.x1) / 2
            + sum(p.dead * (span.x0 + p.x) for p in loaded.points)
        )
        assert sum(up for _, up in reactions) == pytest.approx(total, rel=1e-9)
        assert sum(x * up for x, up in reactions) == pytest.approx(first, rel=1e-9, abs=1.0)
