"""The family of bad input: each is refused, doubted or noted, by name of row and field."""

from collections.abc import Callable
from pathlib import Path

import pytest
from project_files import CSV, ONE, TOML, Change, changed, errors, read, stations


def doubts(folder: Path, text: str, csv: str = CSV) -> list[tuple[str, str]]:
    return [(doubt.field, doubt.text) for doubt in read(folder, text, csv).doubts]


def test_a_width_and_depth_swapped(tmp_path: Path) -> None:
    text = changed(ONE, ("width = 300, depth = 500", "width = 450, depth = 230"))
    ((field, asked),) = doubts(tmp_path, text)
    assert field == "beam[1].section.depth" and "swapped" in asked


def test_b_moments_in_newton_millimetres(tmp_path: Path) -> None:
    text = changed(TOML, ("[0, 64, 0]", "[0, 64e6, 0]"), ("[59, -59]", "[59e3, -59e3]"))
    (error, *_) = errors(tmp_path, text)
    assert error.field.startswith("beam[2].span[1].moment")
    csv = stations(lambda r: [r[0], r[1], r[2] * 1000, r[3] * 1000, r[4], r[5]])
    found = errors(tmp_path, TOML, csv)
    assert any("M/(b d²)" in error.problem for error in found)


def test_b_moments_in_tonne_metres_are_asked_about(tmp_path: Path) -> None:
    csv = stations(lambda r: [r[0], r[1], r[2] * 9.81, r[3] * 9.81, r[4], r[5]])
    assert any("units?" in asked for _, asked in doubts(tmp_path, TOML, csv))


def test_b_moments_far_too_small_are_asked_about(tmp_path: Path) -> None:
    text = changed(TOML, ("[0, 64, 0]", "[0, 0.064, 0]"), ("[59, -59]", "[0.059, -0.059]"))
    assert any("units?" in asked for _, asked in doubts(tmp_path, text))


def test_c_areas_are_refused_and_odd_steel_is_asked_about(tmp_path: Path) -> None:
    text = changed(ONE, ("dead = 15, imposed = 8", "steel = { bottom = 6.03 }"))
    assert any(e.field == "beam[1].span[1].steel" for e in errors(tmp_path, text))
    text = changed(ONE, ("3T16", "12T32"))
    assert any("% of b d" in asked for _, asked in doubts(tmp_path, text))


def test_d_span_in_metres_written_as_millimetres(tmp_path: Path) -> None:
    (error,) = errors(tmp_path, changed(ONE, ("length = 4500", "length = 4500000")))
    assert error.field == "beam[1].span[2].length" and "perhaps 4500" in error.remedy
    (error,) = errors(tmp_path, changed(ONE, ("length = 4500", "length = 4.5")))
    assert "perhaps 4500" in error.remedy


def test_e_all_signs_turned_over(tmp_path: Path) -> None:
    csv = stations(lambda r: [r[0], r[1], -r[3], -r[2], -r[5], -r[4]])
    assert any("turned over" in asked for _, asked in doubts(tmp_path, TOML, csv))


def test_f_missing_station_at_a_face_is_interpolated(tmp_path: Path) -> None:
    csv = CSV.replace("1,0.25,30.9,18.7,117.1,70.6\n", "")
    project = read(tmp_path, TOML, csv)
    assert any("interpolated" in a.text and a.member == "FB1" for a in project.assumptions)


@pytest.mark.parametrize("row", ["1,0.00,", "1,6.00,", "2,4.80,"])
def test_f_stations_that_stop_short_are_refused(tmp_path: Path, row: str) -> None:
    csv = "\n".join(line for line in CSV.split("\n") if not line.startswith(row))
    (error,) = errors(tmp_path, TOML, csv)
    assert error.file == "fb1-stations.csv" and error.field == "x" and error.line


def test_g_only_sizes_of_moments(tmp_path: Path) -> None:
    def sizes(r: list[float]) -> list[float]:
        most = max(abs(r[2]), abs(r[3]))
        return [r[0], r[1], most, most, r[4], r[5]]

    assert any("signs are lost" in e.problem for e in errors(tmp_path, TOML, stations(sizes)))


def test_h_a_size_that_is_not_rolled(tmp_path: Path) -> None:
    (error,) = errors(tmp_path, changed(ONE, ("3T16", "3T30")))
    assert "30 mm bars are not rolled" in error.problem and error.remedy == "28 or 32?"


def test_i_links_in_centimetres(tmp_path: Path) -> None:
    assert any("mm?" in a for _, a in doubts(tmp_path, changed(ONE, ("@150", "@15"))))


@pytest.mark.parametrize("cover", [3, 110])
def test_j_cover_in_another_unit(tmp_path: Path, cover: int) -> None:
    text = changed(ONE, ("cover   = 30", f"cover   = {cover}"))
    assert ("beam[1].cover", f"cover of {cover} mm: is that meant in mm?") in doubts(tmp_path, text)


def test_k_a_bar_number(tmp_path: Path) -> None:
    assert any("#" in a for _, a in doubts(tmp_path, changed(ONE, ("3T16", "3-12#"))))


@pytest.mark.parametrize(
    ("change", "field"),
    [
        (("wall = 230", "wall = 0"), "beam[1].support[3].wall"),  # l
        (("size = [450, 300]", "size = [0, 300]"), "column[1].size[1]"),  # l
        (('{ at = "B1", column = "K1" }, ', ""), "beam[1].support"),  # m
        (('main  = "Fe 500"', 'main  = "Fe 5000"'), "steel.main"),  # n
    ],
)
def test_l_m_n_are_refused(tmp_path: Path, change: Change, field: str) -> None:
    (error,) = errors(tmp_path, changed(ONE, change))
    assert error.field == field


def test_m_five_supports_for_three_spans(tmp_path: Path) -> None:
    more = '{ at = "D1", column = "K1" },\n  { at = "E1", column = "K1" },'
    text = changed(TOML, ('{ at = "D1", column = "K1" },', more))
    (error,) = errors(tmp_path, text)
    assert error.problem == "5 supports for 3 spans between supports"


def test_shears_that_are_not_the_slope_of_the_moments(tmp_path: Path) -> None:
    assert any(
        "slopes" in a for _, a in doubts(tmp_path, changed(TOML, ("[59, -59]", "[80, -80]")))
    )
    csv = stations(lambda r: [*r[:4], -r[5], -r[4]])
    assert sum("not the slope" in a for _, a in doubts(tmp_path, TOML, csv)) == 3


@pytest.mark.parametrize(
    ("change", "column"),
    [
        (lambda h: h.replace("M max [kN m]", "M max [t m]"), "M max [t m]"),
        (lambda h: h.replace("M max [kN m]", "M max"), "M max"),
        (lambda h: h.replace("x [m]", "x [kN]"), "x [kN]"),
        (lambda h: h.replace("V min", "Vmni"), "Vmni [kN]"),
        (lambda h: h.replace("V min [kN]", "V max [kN]"), "V max [kN]"),
    ],
)
def test_headings(tmp_path: Path, change: Callable[[str], str], column: str) -> None:
    head, rest = CSV.split("\n", 1)
    found = errors(tmp_path, TOML, change(head) + "\n" + rest)
    assert any(e.file == "fb1-stations.csv" and (e.line, e.field) == (1, column) for e in found)


@pytest.mark.parametrize(
    ("line", "words"),
    [
        ("1,0.25,30.9,18.7,117.1,70.6", "stands on line"),
        ("1,0.3,30.9,18.7,117.1,", "an empty cell"),
        ("1,0.3,nan,18.7,117.1,70.6", "not a number"),
        ("1,0.3,1e999,18.7,117.1,70.6", "not a number"),
        ("1,0.3,18,30,117.1,70.6", "M max is less"),
        ("1,0.3,30.9,18.7,117.1", "5 cells under 6 headings"),
        ("4,0.3,30.9,18.7,117.1,70.6", "FB1 has 3 spans"),
        ("1,-0.3,30.9,18.7,117.1,70.6", "left of the span"),
    ],
)
def test_rows(tmp_path: Path, line: str, words: str) -> None:
    found = errors(tmp_path, TOML, CSV + line + "\n")
    assert len(found) == 1 and words in found[0].problem
    assert found[0].line == len(CSV.strip().split("\n")) + 1


def test_columns_in_any_order_and_other_units(tmp_path: Path) -> None:
    rows = [line.split(",") for line in CSV.strip().split("\n")[1:]]
    csv = "V min [N],M max (N·mm),x [mm],T [kNm],span,V max [N],M min [N mm]\n" + "\n".join(
        f"{float(vn) * 1e3},{float(mx) * 1e6},{float(x) * 1e3},-3,{span},"
        f"{float(vx) * 1e3},{float(mn) * 1e6}"
        for span, x, mx, mn, vx, vn in rows
    )
    one = read(tmp_path, TOML, csv).beams[0].spans[0].results
    two = read(tmp_path, TOML).beams[0].spans[0].results
    assert one is not None and two is not None
    for left, right in zip(one.rows, two.rows, strict=True):  # type: ignore[union-attr]
        assert left.m_min == pytest.approx(right.m_min) and left.v_max == pytest.approx(right.v_max)
        assert left.x == pytest.approx(right.x) and left.t == 3e6
