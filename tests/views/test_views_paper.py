"""Texts in a row, blocks on paper."""

from __future__ import annotations

from itertools import pairwise

from hypothesis import given
from hypothesis import strategies as st

from detailer.views.labels import Wish, set_row
from detailer.views.pack import Room, pack, set_rows

PLACES = st.lists(st.tuples(st.floats(0, 10000), st.floats(50, 900)), min_size=1, max_size=12)


@given(PLACES)
def test_texts_of_a_row_never_overlap(wanted: list[tuple[float, float]]) -> None:
    wishes = tuple(
        Wish(low=x - 50, high=x + 50, width=w) for x, w in sorted(wanted, key=lambda p: p[0])
    )
    found = set_row(wishes, left=0, right=10000, gap=40)
    assert len(found) == len(wishes)
    for (a, x), (b, y) in pairwise(zip(wishes, found, strict=True)):
        assert y - x >= (a.width + b.width) / 2 + 40 - 1e-6


def test_a_text_keeps_clear_of_a_line() -> None:
    wish = Wish(low=400, high=600, width=200)
    (alone,) = set_row((wish,), left=0, right=1000, gap=10)
    assert abs(alone - 500) <= 2.5
    (beside,) = set_row((wish,), left=0, right=1000, gap=10, blocked=((495, 505),))
    assert abs(beside - 500) >= 105
    assert wish.anchor(beside) in (400, 600) or 400 < beside < 600


SIZES = st.lists(st.tuples(st.floats(10, 150), st.floats(10, 100)), min_size=1, max_size=4)


@given(SIZES)
def test_packed_blocks_lie_apart_and_inside(sizes: list[tuple[float, float]]) -> None:
    space, fixed = Room(20, 10, 410, 287), (Room(225, 10, 410, 70),)
    found = pack(space, fixed, tuple((size,) for size in sizes))
    if found is None:
        return
    rooms = [Room(x, y - h, x + w, y) for (w, h), (_, (x, y)) in zip(sizes, found, strict=True)]
    for i, room in enumerate(rooms):
        assert room.x0 >= 20 and room.x1 <= 410 + 1e-6 and room.y0 >= 10 - 1e-6 and room.y1 <= 287
        assert not any(room.meets(other) for other in (*fixed, *rooms[:i]))


def test_rows_of_small_blocks() -> None:
    row = set_rows(((40, 30), (40, 20), (40, 30)), 90)
    assert row is not None
    assert row.size == (85, 65)
    assert row.places == ((0.0, -30.0), (45.0, -20.0), (0.0, -65.0))
    assert set_rows(((100, 10),), 90) is None
