"""Four spans of 4.5 m: extras reach unequally far left and right of one support.

Common practice, no source; every number is our own calculation.
"""

from __future__ import annotations

from pathlib import Path

import pytest
from scenario import bottom, build, terrace

BELOW = [bottom(f"{n}", "2T16") for n in (1, 2, 3, 4)]


def test_reaches_over_one_support_are_unequal(tmp_path: Path) -> None:
    made = build(tmp_path, terrace([4500] * 4, "2T10", "2T16", BELOW))
    # at the centres 81.4 and 60.8 (three moments, worst pattern); at the faces, where they count:
    assert made.hogging(1) == pytest.approx(68.2, abs=0.1)
    assert made.hogging(2) == pytest.approx(49.0, abs=0.1)
    assert made.hogging_ends(1) == pytest.approx([1205], abs=2)
    assert made.hogging_ends(2) == pytest.approx([1688, 1286], abs=2)
    # 150 less to the face, the depth of 454 more: 1509 and 1992, 1590, in steps of 50
    assert made.reaches(1, 16) == {(1550, 2000)}
    assert made.reaches(2, 16) == {(1600, 1600)}
    assert made.reaches(3, 16) == {(2000, 1550)}
    assert made.blocking == set()
    assert made.sagging(1)[1] == pytest.approx(61.5, abs=0.1)
