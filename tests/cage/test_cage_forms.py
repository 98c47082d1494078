from math import dist, pi, sqrt

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from detailer.cage.bar import Bar
from detailer.cage.forms import (
    Crank,
    EndShape,
    HookCorner,
    bar_path,
    closed_link,
    corner_seat,
    cross_tie,
    link_corners,
    link_inside,
)
from detailer.cage.line import centre_line, problems
from detailer.cage.measure import exact_length, outer_box
from detailer.values import EndForm, Face, Role


def made(path, dia, role=Role.LINK):
    return Bar(
        id="b", role=role, face=Face.NONE, layer=0, grade="Fe 500", dia=dia,
        corners=path.corners, mandrels=path.mandrels,
    )  # fmt: skip


LINK = {"y0": -90.0, "y1": 90.0, "z0": -375.0, "z1": -25.0}


def test_link_length_is_that_of_the_published_rule_to_the_tenth():
    """230 x 450 less 30 cover: 1244.5 with bends of 2 dia and tails of 8 dia."""
    flat = closed_link(y0=-85, y1=85, z0=-420, z1=-30, dia=8, corner=HookCorner.TOP_LEFT, skew=0)
    radius = 20
    want = 2 * (162 + 382) - 6 * radius - 2 * radius + 3 * radius * pi / 2
    want += 2 * (radius * 3 * pi / 4 + 64)
    assert exact_length(made(flat, 8)) == pytest.approx(want)
    assert want == pytest.approx(1244.5, abs=0.05)


@pytest.mark.parametrize("corner", list(HookCorner))
@pytest.mark.parametrize("dia", [8.0, 10.0, 12.0])
def test_link_keeps_to_its_faces(corner, dia):
    link = made(closed_link(**LINK, dia=dia, corner=corner, x=500.0), dia)
    box = outer_box(link)
    assert problems(link) == ()
    assert (box.y0, box.y1, box.z0, box.z1) == pytest.approx((-90, 90, -375, -25), abs=0.02)
    assert box.x1 - box.x0 == pytest.approx(2 * dia, abs=0.05)


@pytest.mark.parametrize("corner", list(HookCorner))
def test_tails_point_into_the_core(corner):
    link = made(closed_link(**LINK, dia=8.0, corner=corner), 8.0)
    line = centre_line(link)
    sy, sz = corner.sides
    for s, sign in ((0.0, -1), (line.length, 1)):
        where, along = line.at(s)
        assert sign * along[1] * sy == pytest.approx(-1 / sqrt(2), abs=1e-6)
        assert sign * along[2] * sz == pytest.approx(-1 / sqrt(2), abs=1e-6)
        assert -90 < where[1] < 90
        assert -375 < where[2] < -25


@settings(max_examples=40, deadline=None)
@given(
    st.sampled_from(list(HookCorner)),
    st.sampled_from([6.0, 8.0, 10.0, 12.0, 16.0]),
    st.floats(0, 300),
    st.floats(0, 600),
    st.floats(1.0, 2.0),
)
def test_ends_of_a_link_never_penetrate(corner, dia, width, depth, wider):
    """Half the line against the other half, sampled: touching, and no closer."""
    path = closed_link(
        y0=0, y1=30 * dia + width, z0=0, z1=30 * dia + depth, dia=dia, corner=corner,
        bend=2 * dia * wider,
    )  # fmt: skip
    line = centre_line(made(path, dia))
    reach = 8 * dia + 4 * 2.5 * dia * wider * 2
    one = [line.at(reach * i / 150)[0] for i in range(151)]
    other = [line.at(line.length - reach * i / 150)[0] for i in range(151)]
    least = min(dist(p, q) for p in one for q in other)
    assert dia - 1e-6 <= least < dia * 1.02


def test_corner_bar_between_the_hooks_touches_and_does_not_penetrate():
    link = made(closed_link(**LINK, dia=8.0, corner=HookCorner.TOP_LEFT), 8.0)
    for dia in (12.0, 16.0, 25.0, 32.0):
        inside = link_inside(*LINK.values(), 8.0)
        seat = corner_seat(16.0, dia)
        y, z = inside.y1 - seat - dia / 2, inside.z1 - seat - dia / 2
        points = centre_line(link).points(0.5)
        least = min(sqrt((p[1] - y) ** 2 + (p[2] - z) ** 2) for p in points)
        assert least - dia / 2 - 4 == pytest.approx(0, abs=0.02)


def test_link_corners_by_position():
    path = link_corners(-90, 90, -375, -25, 8, HookCorner.BOTTOM_LEFT, 64, 0.0, 8)
    assert path == closed_link(**LINK, dia=8, corner=HookCorner.BOTTOM_LEFT)


@pytest.mark.parametrize("side", [1, -1])
@pytest.mark.parametrize("upright", [True, False])
def test_cross_tie(side, upright):
    tie = made(cross_tie(at=10, low=-400, high=-40, dia=8, upright=upright, side=side), 8)
    box = outer_box(tie)
    low, high = (box.z0, box.z1) if upright else (box.y0, box.y1)
    assert (low, high) == pytest.approx((-400, -40), abs=0.01)
    assert exact_length(tie) == pytest.approx(360 - 8 - 40 + 2 * (20 * 3 * pi / 4 + 64))


def test_bar_with_bent_ends_and_crank():
    path = bar_path(
        100, 5000, 50, -40, dia=20, mandrel=160,
        left=EndShape(form=EndForm.BEND, leg=400, up=False),
        right=EndShape(form=EndForm.HOOK, leg=80, up=False),
        cranks=(Crank(x=2000, dy=-20),),
    )  # fmt: skip
    bar = made(path, 20, Role.MAIN)
    box = outer_box(bar)
    assert problems(bar) == ()
    assert (box.x0, box.x1) == pytest.approx((100, 5000))
    assert box.z0 == pytest.approx(-40 + 10 - 400)
    assert box.z1 == pytest.approx(-30)
    assert [c.y for c in centre_line(bar).at_x(1500)] == [50]
    assert [c.y for c in centre_line(bar).at_x(3000)] == [30]
    assert path.corners[2:4] == ((2000, 50, -40), (2120, 30, -40))


def test_straight_bar():
    path = bar_path(0, 1000, 1, 2, dia=12, mandrel=96)
    assert path == (((0, 1, 2), (1000, 1, 2)), ())
