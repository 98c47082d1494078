from dataclasses import replace
from random import Random

import pytest
from cage_builders import cage, link, main_bar, mirror_x, mirror_y, moved, spacer, tie, turned_about
from hypothesis import given, settings
from hypothesis import strategies as st

from detailer.cage import forms
from detailer.cage.bar import Bar
from detailer.schedule import number, placing_order
from detailer.schedule.form import form_of
from detailer.values import Face, Role


class Habits:
    """As much of a project as numbering asks for."""

    class practice:  # noqa: N801
        length_step = 10.0


def marks(*bars: Bar) -> list[str]:
    (numbered,) = number((cage(*bars),), Habits)
    return [numbered.bar(bar.id).mark for bar in bars]


BENT = main_bar("a", 40, 4640, left=200, right=300)
CRANKED = main_bar("c", 0, 6000, left=250, cranks=(forms.Crank(x=4000, dy=16),))


def test_equal_bars_share_a_mark_wherever_they_lie() -> None:
    other = moved(BENT, "b", (700.0, 55.5, 3.0))
    assert marks(BENT, other) == ["01", "01"]


def test_a_bar_turned_end_for_end_or_over_is_the_same() -> None:
    over = replace(BENT, id="d", corners=tuple((x, -y, -z) for x, y, z in BENT.corners))
    assert marks(BENT, mirror_x(BENT, "b"), turned_about(BENT, "c"), over) == ["01"] * 4


def test_legs_that_differ_by_more_than_half_a_millimetre_part() -> None:
    near = main_bar("b", 40, 4640.4, left=200, right=300)
    far = main_bar("c", 40, 4640.7, left=200, right=300)
    assert marks(BENT, near, far) == ["01", "01", "02"]


@pytest.mark.parametrize("change", [{"grade": "Fe 415"}, {"dia": 20.0}, {"mandrels": (96.0, 96.0)}])
def test_grade_diameter_and_mandrel_part(change: dict[str, object]) -> None:
    assert marks(BENT, replace(BENT, id="b", **change)) == ["01", "02"]


def test_hand_matters_for_bars_in_three_dimensions_only() -> None:
    assert marks(CRANKED, mirror_y(CRANKED, "d")) == ["01", "02"]
    assert marks(CRANKED, turned_about(CRANKED, "d")) == ["01", "01"]
    in_plane = main_bar("p", 0, 6000, left=250, cranks=(forms.Crank(x=4000, dz=16),))
    assert marks(in_plane, mirror_x(in_plane, "q")) == ["01", "01"]


def test_links_of_either_hook_corner_are_one_mark() -> None:
    links = [link(f"l{c.name}", 170, 390, corner=c) for c in forms.HookCorner]
    assert marks(*links) == ["01"] * 4


def test_ties_hooked_to_either_side_are_one_mark() -> None:
    assert marks(tie("a", -420, -30), tie("b", -420, -30, side=-1)) == ["01", "01"]


def test_order_is_bottom_top_side_links_ties_spacers() -> None:
    bars = [
        spacer("s", 170),
        tie("t", -420, -30),
        link("l", 170, 390),
        main_bar("side", 0, 4000, dia=10, role=Role.SIDE, face=Face.LEFT),
        main_bar("hanger", 0, 4500, dia=12, role=Role.HANGER, face=Face.TOP),
        main_bar("second", 500, 4000, dia=16),
        main_bar("first", 40, 4640, dia=16),
    ]
    assert marks(*bars) == ["07", "06", "05", "04", "03", "02", "01"]
    assert placing_order(bars) == placing_order(reversed(bars))


def test_marks_are_unique_over_the_project_and_shared_by_equal_bars() -> None:
    one = cage(BENT, link("l", 170, 390), member="B1")
    two = cage(main_bar("x", 0, 3000), moved(BENT, "y", (1, 2, 3)), member="B2")
    first, second = number((one, two), Habits)
    assert [b.mark for b in first.bars] == ["01", "02"]
    assert [b.mark for b in second.bars] == ["03", "01"]


def test_a_hundred_marks_take_three_digits() -> None:
    bars = [main_bar(f"b{n:03}", 0, 1000 + 20 * n) for n in range(100)]
    assert marks(*bars)[0] == "001"
    assert len(set(marks(*bars))) == 100


@given(st.randoms(use_true_random=False))
@settings(max_examples=25, deadline=None)
def test_listing_bars_in_another_order_changes_no_mark(rng: Random) -> None:
    bars = [BENT, CRANKED, mirror_y(CRANKED, "m"), link("l", 170, 390), spacer("s", 170)]
    given_order = dict(zip((b.id for b in bars), marks(*bars), strict=True))
    rng.shuffle(bars)
    assert dict(zip((b.id for b in bars), marks(*bars), strict=True)) == given_order


LEGS = st.floats(120, 600)


@given(LEGS, LEGS, st.floats(1000, 9000), st.floats(-30, 30), st.floats(-30, 30))
@settings(max_examples=60, deadline=None)
def test_a_form_does_not_depend_on_where_or_how_a_bar_lies(
    left: float, right: float, length: float, dy: float, dz: float
) -> None:
    steps = (forms.Crank(x=length * 0.5, dy=dy, dz=dz),) if abs(dy) + abs(dz) > 1 else ()
    bar = main_bar("a", 0, length, left=left, right=right, cranks=steps)
    form = form_of(bar)
    assert form.equals(form_of(moved(bar, "b", (12.5, -3.25, 99.0))))
    assert form.equals(form_of(turned_about(bar, "c")))
    assert form.equals(form.turned())
    assert form.handed == (not form.equals(form_of(mirror_y(bar, "d"))))
