"""IS 2502:1963: lengths of links on inside dimensions, hooks, bends, radii."""

from __future__ import annotations

from math import pi

import pytest

from detailer.rules import is2502


@pytest.mark.source(
    "IS 2502:1963, Table VIII, as quoted: inside dimensions, + 24 d", page_seen=True
)
@pytest.mark.parametrize(
    ("a", "e", "dia", "length"),
    [(434, 164, 8, 1388), (204, 354, 8, 1308), (400, 200, 10, 1440), (600, 300, 12, 2088)],
)
def test_closed_link_with_135_degree_hooks(a: float, e: float, dia: float, length: float) -> None:
    assert is2502.stirrup_length(a, e, dia) == length


@pytest.mark.source("IS 2502:1963, Table VIII through the diamond link, + 20 d", page_seen=True)
def test_closed_link_with_square_ends() -> None:
    assert is2502.stirrup_length(400, 200, 10, 90) == 1200 + 200


@pytest.mark.source("IS 2502:1963, 3.8, as quoted: at least 8 d beyond the curve", page_seen=True)
def test_ends_of_links() -> None:
    assert [is2502.link_tail(dia) for dia in (6, 8, 10, 12)] == [48, 64, 80, 96]


@pytest.mark.source(
    "Exam page on IS 2502:1963: k = 4 for deformed bars, 6 above 25", page_seen=False
)
def test_radii_of_bends() -> None:
    """Seen second-hand. Links bend at 2 d, which Table VIII is built on."""
    assert [is2502.bend_radius(dia) for dia in (12, 20, 25, 28, 32)] == [48, 80, 100, 168, 192]
    assert is2502.bend_radius(10, link=True) == 20
    assert is2502.mandrel(10, link=True) == 40
    assert is2502.mandrel(16) == 128


@pytest.mark.source("IS 2502:1963, Table II through a published schedule: 6 d", page_seen=False)
def test_bend_allowance_of_a_published_schedule() -> None:
    """16 mm: 96 up to 100."""
    assert is2502.bend_allowance(16, 4) == 100


@pytest.mark.source(
    "IS 2502:1963, Table II through a published schedule: 8 mm, 90", page_seen=False
)
def test_hook_allowance_of_a_published_schedule() -> None:
    """The page used k = 3."""
    assert is2502.hook_allowance(8, 3) == 90


@pytest.mark.source("IS 2502:1963, non-standard bend as quoted: A + E - R/2 - d", page_seen=True)
def test_bent_bar_by_outside_legs() -> None:
    assert is2502.bent_length((300, 500), 10, 40) == 800 - 20 - 10
    assert is2502.bent_length((300, 500, 300), 10, 40) == 1100 - 2 * 30
    assert is2502.bent_length((300,), 10, 40) == 300


@pytest.mark.source(
    "Published schedule: a crank of 45 degrees adds 0.42 h, 0.414 h", page_seen=False
)
def test_crank() -> None:
    assert is2502.crank_extra(100, 45) == pytest.approx(41.4, abs=0.05)
    assert is2502.crank_extra(100, 45) == pytest.approx(100 * (2**0.5 - 1))


@pytest.mark.source("IS 2502:1963, tolerances", page_seen=False)
@pytest.mark.parametrize(
    ("dimension", "plus", "minus"), [(750, 3, 5), (1500, 5, 10), (2500, 6, 15), (2501, 7, 25)]
)
def test_tolerances(dimension: float, plus: float, minus: float) -> None:
    """FROM MEMORY."""
    assert is2502.bending_tolerance(dimension) == (plus, minus)


@pytest.mark.parametrize(("angle", "times"), [(90, 19.63), (135, 23.56), (180, 27.49)])
def test_additions_follow_from_two_diameters_and_tails_of_eight(angle: int, times: float) -> None:
    """The proof behind 20, 24 and 28: each is the exact addition rounded up to the next even d."""
    exact = is2502.exact_link_length(400, 200, 10, angle) - 1200
    assert exact / 10 == pytest.approx(times, abs=0.005)
    assert 0 < is2502.LINK_ADDITION[angle] - times < 0.52


@pytest.mark.parametrize(
    ("k", "hook", "bend"), [(2, 8.85, 4.93), (3, 11.0, 5.50), (4, 13.1, 6.07), (6, 17.4, 7.21)]
)
def test_allowances_follow_from_geometry(k: int, hook: float, bend: float) -> None:
    """π(k + ½) + 4 − (k + 1), and half the arc; the table rounds them to half a diameter."""
    assert pi * (k + 0.5) + 4 - (k + 1) == pytest.approx(hook, abs=0.06)
    assert pi / 2 * (k + 0.5) + 4 - (k + 1) == pytest.approx(bend, abs=0.01)
    assert is2502.HOOK_ALLOWANCE[k] == pytest.approx(hook, abs=0.45)
    assert is2502.BEND_ALLOWANCE[k] == pytest.approx(bend, abs=0.25)


@pytest.mark.parametrize(("k", "times"), [(2, 2.07), (3, 2.50), (4, 2.93), (6, 3.79)])
def test_deduction_is_close_to_the_exact_one(k: int, times: float) -> None:
    """R/2 + d of the standard against the arc itself."""
    assert is2502.bend_deduction(1.0, k) == pytest.approx(times, abs=0.005)
    assert abs(k / 2 + 1 - times) <= 0.21 + 1e-9


def test_lengths_are_rounded_up_and_whole_ones_kept() -> None:
    assert is2502.round_up(1301, 25) == 1325
    assert is2502.round_up(1300, 25) == 1300
    assert is2502.round_up(1300 + 1e-10, 25) == 1300


@pytest.mark.source("IS 2502:1963, straight end of main bars", page_seen=False)
def test_straight_end_of_main_bars() -> None:
    """4 d, FROM MEMORY."""
    assert is2502.min_straight_end(16).value == 64
