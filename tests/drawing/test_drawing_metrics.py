"""Widths of texts and the parts of dimensions."""

from __future__ import annotations

import pytest
from hypothesis import given
from hypothesis import strategies as st

from detailer.drawing.dimensioning import parts
from detailer.drawing.metrics import CAPITALS, width
from detailer.drawing.primitives import Dimension
from detailer.drawing.text import plain


def test_a_width_is_the_sum_of_advances() -> None:
    assert width("0", CAPITALS) == pytest.approx(1172 / 2048)
    assert width("AB", 2.5) == pytest.approx(width("A", 2.5) + width("B", 2.5))
    assert width("", 2.5) == 0


def test_what_the_table_lacks_counts_as_the_widest() -> None:
    every = "".join(chr(c) for c in range(32, 127)) + "Ø⌀φ±≥≤×°²√–’"
    assert max(width(c, 2.5) for c in every) <= width("漢", 2.5)


def test_bold_is_wider() -> None:
    assert width("Elevation", 3.5, bold=True) > width("Elevation", 3.5)


@pytest.mark.parametrize("char", "Ø⌀φ±≥≤×°²√–’é₹")
def test_the_signs_of_the_trade_are_in_the_table(char: str) -> None:
    assert width(char, 1.0) < width("漢", 1.0)


@given(st.text(alphabet=st.characters()))
def test_a_plain_text_is_one_clean_line(text: str) -> None:
    found = plain(text)
    assert found == plain(found)
    found.encode("utf-8")
    assert not any(ord(c) < 32 for c in found)
    assert "\u202e" not in found and "\x85" not in found


MM = st.integers(-9000, 9000)


@given(MM, MM, MM, MM, MM, st.booleans(), st.sampled_from([1.0, 20.0, 50.0]))
def test_a_dimension_reaches_over_what_it_measures(
    x0: int, y0: int, x1: int, y1: int, line: int, vertical: bool, scale: float
) -> None:
    item = Dimension(start=(x0, y0), end=(x1, y1), line=line, vertical=vertical)
    drawn = parts(item, scale)
    a, b = drawn.lines[2]
    along, across = (1, 0) if vertical else (0, 1)
    assert b[along] - a[along] == item.distance
    assert a[across] == b[across] == line
    assert drawn.label.text == str(int(item.distance))
    for tick, end in zip(drawn.lines[3:], (a, b), strict=True):
        middle = tuple((p + q) / 2 for p, q in zip(*tick, strict=True))
        assert middle == pytest.approx(end)
    assert drawn.label.at[along] == pytest.approx((a[along] + b[along]) / 2)


def test_a_text_too_wide_for_its_ticks_stands_clear_of_them() -> None:
    narrow = parts(Dimension(start=(0, 0), end=(50, 0), line=0), 50.0)
    wide = parts(Dimension(start=(0, 0), end=(5000, 0), line=0), 50.0)
    assert narrow.label.at[1] > narrow.lines[3][1][1] > wide.label.at[1] > 0
