from itertools import pairwise
from math import dist, isfinite, pi

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from detailer.cage.bar import Bar
from detailer.cage.line import centre_line, problems, require_bendable
from detailer.cage.measure import exact_length, outer_box
from detailer.values import Face, Role


def bar(corners, mandrels, dia=16.0, **kw):
    return Bar(
        id="b1", role=Role.MAIN, face=Face.BOTTOM, layer=1, grade="Fe 500", dia=dia,
        corners=tuple(tuple(map(float, c)) for c in corners), mandrels=tuple(mandrels), **kw,
    )  # fmt: skip


def test_length_of_a_right_bend():
    b = bar([(0, 0, 0), (1000, 0, 0), (1000, 0, 500)], [128.0])
    radius = 64 + 8
    assert exact_length(b) == pytest.approx(1500 - 2 * radius + radius * pi / 2)
    assert problems(b) == ()


def test_hook_of_two_corners_is_a_half_circle():
    b = bar([(0, 0, 0), (1000, 0, 0), (1000, 0, 144), (800, 0, 144)], [128.0, 128.0])
    assert exact_length(b) == pytest.approx(1000 - 72 + 72 * pi + 200 - 72)
    assert problems(b) == ()


def test_crossings_of_a_hook():
    b = bar([(0, 0, 0), (1000, 0, 0), (1000, 0, 144), (800, 0, 144)], [128.0, 128.0])
    hits = centre_line(b).at_x(1000 - 72 + 72 / 2)
    assert [round(h.z, 3) for h in hits] == [
        round(72 - 72 * 3**0.5 / 2, 3),
        round(72 + 72 * 3**0.5 / 2, 3),
    ]
    assert len(centre_line(b).at_x(900)) == 2
    assert len(centre_line(b).at_x(500)) == 1
    assert len(centre_line(b).at_x(1000 - 72)) == 2
    assert centre_line(b).at_x(1001) == ()


def test_bends_too_close_are_named_and_clamped():
    b = bar([(0, 0, 0), (1000, 0, 0), (1000, 0, 60), (1400, 0, 60)], [128.0, 128.0])
    assert "b1" in problems(b)[0]
    assert isfinite(exact_length(b))
    with pytest.raises(ValueError, match="b1"):
        require_bendable(b)


def test_degenerate_bars_survive():
    for corners in (
        [(0, 0, 0), (0, 0, 0)],
        [(0, 0, 0), (0, 0, 0), (0, 0, 0)],
        [(0, 0, 0), (500, 0, 0), (0, 0, 0)],
        [(0, 0, 0), (500, 0, 0), (900, 0, 0)],
        [(0, 0, 0), (500, 0, 0), (500, 0, 0), (500, 0, 400)],
    ):
        b = bar(corners, [128.0] * (len(corners) - 2))
        line = centre_line(b)
        assert isfinite(line.length)
        assert all(isfinite(v) for p in line.points(10) for v in p)
        assert all(isfinite(v) for v in outer_box(b))


def test_outer_box_of_a_bend():
    b = bar([(0, 0, 0), (1000, 0, 0), (1000, 0, 500)], [128.0])
    box = outer_box(b)
    assert box == pytest.approx((0, 1008, -8, 8, -8, 500))


COORD = st.integers(-2000, 2000).map(float)
POINT = st.tuples(COORD, COORD, COORD)


@st.composite
def any_bar(draw):
    corners = draw(st.lists(POINT, min_size=2, max_size=6))
    mandrels = draw(
        st.lists(st.sampled_from([0.0, 32.0, 128.0, 300.0]), min_size=len(corners) - 2,
                 max_size=len(corners) - 2)
    )  # fmt: skip
    return bar(corners, mandrels, dia=draw(st.sampled_from([8.0, 16.0, 32.0])))


@settings(max_examples=60, deadline=None)
@given(any_bar())
def test_length_equals_dense_sampling(b):
    line = centre_line(b)
    points = line.points(0.5)
    walked = sum(dist(p, q) for p, q in pairwise(points))
    assert walked == pytest.approx(line.length, rel=1e-4, abs=1e-3)
    assert points[-1] == pytest.approx(b.corners[-1], abs=1e-3)


@settings(max_examples=60, deadline=None)
@given(any_bar(), st.floats(0.01, 0.99))
def test_crossings_lie_on_the_line(b, share):
    line = centre_line(b)
    where, _ = line.at(share * line.length)
    hits = line.arc_lengths_at(where[0])
    for s in hits:
        assert line.at(s)[0][0] == pytest.approx(where[0], abs=1e-4)
    moving = [line.at(share * line.length + e)[0][0] for e in (-0.01, 0.01)]
    if abs(moving[0] - moving[1]) > 1e-3:
        assert min(abs(s - share * line.length) for s in hits) < 1e-2


@settings(max_examples=60, deadline=None)
@given(any_bar())
def test_a_bar_turned_round_is_as_long(b):
    turned = bar(b.corners[::-1], b.mandrels[::-1], dia=b.dia)
    assert exact_length(turned) == pytest.approx(exact_length(b), abs=1e-3)
