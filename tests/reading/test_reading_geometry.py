from math import cos, inf, radians, sin
from pathlib import Path

import pytest
from generator import random_project
from hypothesis import HealthCheck, given, settings
from hypothesis import strategies as st
from project_files import CSV, ONE, TOML, changed, read

from detailer.errors import Refused
from detailer.model import Beam
from detailer.reading.columns import turned
from detailer.values import Face


def beam(folder: Path, *changes: tuple[str, str]) -> Beam:
    return read(folder, changed(ONE, *changes)).beams[0]


@pytest.mark.parametrize(
    ("direction", "size"),
    [('"x"', (450, 300)), ('"y"', (300, 450)), ("90", (300, 450)), ("180", (450, 300))],
)
def test_direction_turns_columns(tmp_path: Path, direction: str, size: tuple[float, float]) -> None:
    read_beam = beam(tmp_path, ("cover   = 30", f"cover   = 30\ndirection = {direction}"))
    assert (read_beam.supports[0].width, read_beam.supports[0].across) == size
    assert read_beam.supports[0].column is not None
    assert read_beam.supports[0].column.size == (450, 300)


def test_oblique_columns_take_their_projections() -> None:
    c, s = cos(radians(30)), sin(radians(30))
    assert turned((450, 300), 30) == pytest.approx((450 * c + 300 * s, 450 * s + 300 * c))
    assert turned((450, 300), 89.999999) == pytest.approx((300, 450), abs=0.01)


def test_left_overhang_and_steps(tmp_path: Path) -> None:
    got = beam(
        tmp_path,
        (
            "span    = [",
            "span    = [{ overhang = 1500, dead = 9, imposed = 4, section = { drop = 20 } }, ",
        ),
        ("length = 4500,", "length = 4500, section = { depth = 450, drop = 50 },"),
        ('span = "1-2"', 'span = "1-3"'),
        ('span = "1-2"', 'span = "1-3"'),
        ('span  = "1-2"', 'span  = "1-3"'),
    )
    assert [(s.x0, s.x1) for s in got.spans] == [(-1500, 0), (0, 5000), (5000, 9500)]
    assert [s.top for s in got.spans] == [-20, 0, -50]
    assert (got.spans[0].left, got.spans[0].right) == (None, 0)
    assert got.start == -1500 and got.spans[2].section.width == 300
    assert [links.span for links in got.links] == [1, 2, 3]


def test_column_by_its_sides(tmp_path: Path) -> None:
    text = changed(ONE, ('{ at = "B1", column = "K1" }', '{ at = "B1", column = [300, 600] }'))
    project = read(tmp_path, text)
    support = project.beams[0].supports[1]
    assert (support.width, support.across, support.column) == (300, 600, None)
    assert any("Column at B1" in a.text for a in project.assumptions)


def test_bars_in_full(tmp_path: Path) -> None:
    extra = (
        '  [[beam.bars]]\n  face = "side"\n  span = "1-2"\n  bars = "2T10"\n\n'
        '  [[beam.bars]]\n  face = "bottom"\n  span = 1\n  bars = "1T12"\n  layer = 2\n'
        '  stop = [500, "auto"]\n  end = ["straight", "hook"]\n\n'
        '  [[beam.bars]]\n  face = "top"\n  support = "B1"\n  bars = "2-T16 + 1T12"\n'
        '  reach = ["auto", "end"]\n\n  [[beam.links]]'
    )
    got = beam(tmp_path, ("  [[beam.links]]", extra)).bars
    assert got[2].face is Face.NONE and got[2].spans == (1, 2)
    assert got[3].layer == 2 and got[3].stop == (500, None)
    assert [e and e.value for e in got[3].ends] == ["straight", "hook"]
    assert got[4].support == 1 and got[4].reach == (None, inf) and got[4].count == 3


def test_cover_by_face(tmp_path: Path) -> None:
    table = "cover   = { top = 30, bottom = 40, left = 25, right = 35 }"
    got = beam(tmp_path, ("cover   = 30", table)).cover
    assert (got.top, got.bottom, got.left, got.right) == (30, 40, 25, 35)


def test_no_results(tmp_path: Path) -> None:
    text = ONE.replace(", dead = 15, imposed = 8", "")
    project = read(tmp_path, text)
    assert all(span.results is None for span in project.beams[0].spans)
    assert any("simplified rules" in a.text for a in project.assumptions)


def test_grid_against_spans(tmp_path: Path) -> None:
    grid = "[grid]\nx = { A = 0, B = 5000, C = 9600 }\ny = { 1 = 0 }\nlevel = 3500\n[[column]]"
    project = read(tmp_path, changed(ONE, ("[[column]]", grid)))
    assert project.beams[0].level == 3500
    assert [d.field for d in project.doubts] == ["beam[1].support[3].at"]
    assert project.doubts[0].line


@pytest.mark.parametrize("seed", range(40))
def test_random_beams_are_read_or_refused_as_deep(tmp_path: Path, seed: int) -> None:
    try:
        read(tmp_path, random_project(seed))
    except Refused as refused:
        assert all("deep beams" in e.problem for e in refused.errors), refused


WORDS = st.sampled_from(
    ["0", "-1", "1e9", "nan", '""', '"x"', "[]", "{}", "true", "[1, 2]", '["a"]', "2026-01-01", "7"]
)


@settings(max_examples=150, deadline=None, suppress_health_check=list(HealthCheck))
@given(st.data())
def test_a_mutated_file_is_read_or_refused(tmp_path: Path, data: st.DataObject) -> None:
    lines = TOML.split("\n")
    spots = [n for n, line in enumerate(lines) if "=" in line and not line.startswith("#")]
    for _ in range(data.draw(st.integers(1, 3))):
        n = data.draw(st.sampled_from(spots))
        parts = lines[n].split("=")
        k = data.draw(st.integers(1, len(parts) - 1))
        parts[k] = f" {data.draw(WORDS)}" + ("" if k == len(parts) - 1 else ", width")
        lines[n] = "=".join(parts)
    try:
        read(tmp_path, "\n".join(lines), CSV)
    except Refused as refused:
        assert refused.errors and all(e.problem and e.remedy for e in refused.errors)
