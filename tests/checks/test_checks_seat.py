"""Bars in the corners of links: geometry of a circle in a bend."""

from __future__ import annotations

from math import hypot, sqrt

import pytest
from cage_builders import link
from check_cases import bottom, case, loops, one, only, rules, top

from detailer.checks import Case, seat
from detailer.values import Severity

# Links of 8, 240 × 440: inner faces at y ±112, z −462 and −38; bends of 2 φ: inner radius 16.


def beam(dia: float = 16, off: float = 0.0, *, upper: bool = True) -> Case:
    """Return bars in all corners, their surfaces so far off both legs."""
    at = 112 - dia / 2 - off
    bars = [bottom("b", -110, 6110, dia, (-at, at), z=-462 + dia / 2 + off)]
    if upper:
        bars.append(top("t", -110, 6110, 16, (-104.0, 104.0)))
    return case(*bars, loops("l", 150))


def test_bars_against_both_legs() -> None:
    assert list(seat.check(beam())) == []


@pytest.mark.parametrize(("dia", "told"), [(16, False), (12, False), (10, True), (8, True)])
def test_a_small_bar_sits_off_the_legs(dia: float, told: bool) -> None:
    # (1 − 1/√2)(16 − φ/2): 2.3 for 16, 2.9 for 12, 3.2 for 10, 3.5 for 8; 3 mm are let pass
    off = (1 - 1 / sqrt(2)) * (16 - dia / 2)
    found = only(seat.check(beam(dia, off)), "corner-seat")
    assert bool(found) is told
    for finding in found:
        assert finding.found == round(off, 1)
        assert (finding.required, finding.unit) == (3, "mm")
        assert finding.severity is Severity.COSTLY
        assert finding.bars == ("b", "l")
        assert finding.place.name == "span 1"
    assert len(found) <= 1  # the worst of a place


def test_a_corner_without_a_bar() -> None:
    found = one(seat.check(beam(upper=False)), "corner-empty")
    assert found.severity is Severity.UNBUILDABLE
    assert (found.required, found.bars) == (45, ("l",))
    # to the bottom bar of the same side: 424 in height less 8, 8 aside
    assert found.found == pytest.approx(hypot(8, 416), abs=0.1)
    assert found.site and found.place.name == "span 1"


@pytest.mark.parametrize(("aside", "empty"), [(37.0, False), (40.0, True)])
def test_how_far_a_bar_belongs_to_a_corner(aside: float, empty: bool) -> None:
    # √2 (8 + 2.34) + 2 · 16 = 46.6 from the corner of the legs: hypot(8 + 37.9, 8)
    at = 104 - aside
    made = case(
        bottom("b", -110, 6110, 16, (-at, 104.0), z=-454),
        top("t", -110, 6110, 16, (-104.0, 104.0)),
        loops("l", 150),
    )
    found = only(seat.check(made), "corner-empty")
    assert bool(found) is empty
    for finding in found:
        assert finding.found == pytest.approx(hypot(48, 8), abs=0.05)


def test_where_bars_stop_the_corner_is_empty() -> None:
    made = case(
        bottom("b", -110, 6110, 16, (-104.0, 104.0), z=-454),
        top("t", -110, 3000, 16, (-104.0, 104.0)),
        loops("l", 150),
    )
    found = one(seat.check(made), "corner-empty")
    assert found.x > 3000


@pytest.mark.parametrize(("at", "on_bend"), [(0.0, False), (-20.0, True)])
def test_a_link_on_the_bend_of_its_corner_bar(at: float, on_bend: bool) -> None:
    # outside of the bend at −86: the straight begins 64 + 16 = 80 from there, at −6
    made = case(
        bottom("b", -86, 6110, 16, (-104.0, 104.0), z=-454, left=200),
        top("t", -110, 6110, 16, (-104.0, 104.0)),
        link("l", 240, 440, xs=(at, 200.0, 350.0)),
    )
    found = only(seat.check(made), "link-on-bend")
    assert bool(found) is on_bend
    for finding in found:
        # the end that hooks out of the upright leg stands half a diameter to the left: −24
        assert (finding.found, finding.required) == (18, 0)
        assert finding.severity is Severity.COSTLY
        assert finding.place.name == "support A1"
        assert finding.remedy == "Shift the link off the bend"


def test_beyond_all_bars_no_corner_is_asked() -> None:
    made = case(bottom("b", 1000, 2000, 16), link("l", 240, 440, xs=(3000.0,)))
    assert rules(seat.check(made)) == set()
