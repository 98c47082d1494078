"""Spans of 4, 5 and 4 m: the short end spans hog further than a share of them would tell.

Common practice, no source; every number is our own calculation.
"""

from __future__ import annotations

from pathlib import Path

import pytest
from scenario import bottom, build, terrace

SPANS = [4000, 5000, 4000]
BELOW = [bottom(f"{n}", "2T16") for n in (1, 2, 3)]


def test_hangers_that_are_a_third_let_extras_stop_where_they_are_developed(tmp_path: Path) -> None:
    made = build(tmp_path, terrace(SPANS, "2T12", "2T16", BELOW))
    assert made.hogging_ends(1) == pytest.approx([1367], abs=2)
    assert made.hogging_ends(2) == pytest.approx([1298, 1298], abs=2)
    assert made.sagging(2)[1] == pytest.approx(46.9, abs=0.1)
    # two T12 are 226 of 628 mm², 36 %, so that a third passes the inflection without the extras.
    # These need 777 past the face to be developed: less than 0.3 of the clear span (1110), which
    # is what a rule of thumb would give and which was first expected to fall short here
    assert made.reaches(1, 16) == made.reaches(2, 16) == {(800, 800)}
    assert made.blocking == set()


def test_light_hangers_send_extras_past_the_inflection(tmp_path: Path) -> None:
    made = build(tmp_path, terrace(SPANS, "2T10", "2T16", BELOW))
    # two T10 are 157 of 559 mm², 28 %. The envelope is zero at 1367 - 150 = 1217 and at
    # 1298 - 150 = 1148 from the faces; the depth of 454 more, in steps of 50
    assert made.reaches(1, 16) == {(1700, 1650)}
    assert made.reaches(2, 16) == {(1650, 1700)}
    assert 1700 > 0.3 * (4000 - 300)
    assert made.blocking == set()
