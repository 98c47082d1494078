"""What is not built is refused by name; every error comes at once, on its line."""

from pathlib import Path

import pytest
from project_files import CSV, ONE, TOML, Change, changed, errors, read

from detailer.errors import Refused
from detailer.reading import read_project

BUILT = "not built yet"
BARS = '  face = "bottom"\n'


@pytest.mark.parametrize(
    ("change", "field", "words"),
    [
        (("ductile = false", "ductile = true"), "project.ductile", BUILT),
        (('code    = "IS 456"', 'code    = "EN 1992"'), "project.code", BUILT),
        (('bending = "IS 2502"', 'bending = "BS 8666"'), "project.bending", BUILT),
        (('column = "K1" }, {', 'beam = "FB7" }, {'), "beam[1].support[1].beam", BUILT),
        (('mark    = "B1"', 'mark = "B1"\nresults = "a.xlsx"'), "beam[1].results", BUILT),
        (('mark    = "B1"', 'mark = "B1"\nopenings = []'), "beam[1].openings", "openings"),
        (('mark    = "B1"', 'mark = "B1"\nhold = []'), "beam[1].hold", BUILT),
        (("[[column]]", '[[accept]]\nrule = "x"\n[[column]]'), "accept", BUILT),
        (("[[column]]", "[practice]\ncost = {}\n[[column]]"), "practice.cost", BUILT),
        ((BARS, BARS + "  bundles = 2\n"), "beam[1].bars[2].bundles", "bundled"),
        ((BARS, BARS + "  couplers = true\n"), "beam[1].bars[2].couplers", "couplers"),
        ((BARS, BARS + "  bent_up = true\n"), "beam[1].bars[2].bent_up", "bent-up"),
        ((BARS, BARS + '  end = ["coupler", "bend"]\n'), "beam[1].bars[2].end[1]", "couplers"),
        (("depth = 500", "depth = 2200"), "beam[1].span[1]", "deep beams"),
        (('  [[beam.bars]]\n  face = "top"\n  span = "1-2"\n  bars = "2T16"\n', ""),
         "beam[1].span[1]", "no top bars"),
        (('face = "bottom"\n  span = "1-2"', 'face = "bottom"\n  span = 1'),
         "beam[1].span[2]", "no bottom bars"),
        (('span  = "1-2"', "span  = 1"), "beam[1].span[2]", "no links"),
    ],
)  # fmt: skip
def test_refused_by_name(tmp_path: Path, change: Change, field: str, words: str) -> None:
    found = errors(tmp_path, changed(ONE, change))
    assert any(e.field == field and words in e.problem for e in found), found


def test_a_beam_without_bars(tmp_path: Path) -> None:
    found = errors(tmp_path, ONE.split("  [[beam.bars]]")[0])
    assert {e.field for e in found} == {"beam[1].bars", "beam[1].links"}
    assert all("choosing bars is not built yet" in e.problem for e in found)


def test_ductile_has_no_default(tmp_path: Path) -> None:
    (error,) = errors(tmp_path, changed(ONE, ("ductile = false\n", "")))
    assert error.field == "project.ductile" and "missing" in error.problem and error.line == 1


@pytest.mark.parametrize(
    ("change", "remedy"),
    [
        (("cover   = 30", "cover   = 30\nlevle = 3"), "Did you mean level?"),
        (("depth = 500", "dept = 500"), "Did you mean depth?"),
        (("[issue]", "[isue]"), "Did you mean issue?"),
        (('exposure = "moderate"', 'exposure = "modrate"'), 'Did you mean "moderate"?'),
        (('face = "bottom"', 'face = "botom"'), 'Did you mean "bottom"?'),
    ],
)
def test_the_nearest_is_named(tmp_path: Path, change: Change, remedy: str) -> None:
    assert remedy in [e.remedy for e in errors(tmp_path, changed(ONE, change))]


def test_all_errors_at_once_on_their_lines(tmp_path: Path) -> None:
    text = changed(
        TOML,
        ('grade      = "M25"', 'grade      = "M2"'),
        ('main  = "Fe 500"', 'main  = "Fe 5000"'),
        ("copies  = 2", "copies  = 2\ncolour = 1"),
        ('{ at = "C1", column = "K1" }', '{ at = "C1", column = "K9" }'),
        ('bars = "3T20"', 'bars = "3T30"'),
        ("overhang = 1800, dead = 18.0", 'overhang = 1800, dead = "x"'),
        ('zones = ["2L-T8@150"]', 'zones = ["2L-T8@150", "2L-T8"]'),
    )
    bad = CSV.replace("2,0.50,", "2,zero,")
    found = errors(tmp_path, text, bad)
    rows = text.split("\n")
    wanted = {
        "concrete.grade": "M2",
        "steel.main": "Fe 5000",
        "beam[1].colour": "colour",
        "beam[1].support[3].column": "K9",
        "beam[1].bars[4].bars": "3T30",
        "beam[3].span[2].dead": '"x"',
        "beam[3].links[2].zones[2]": '"2L-T8"]',
    }
    assert {e.field for e in found} == {*wanted, "x [m]"}
    for error in found:
        if error.file == "p.toml":
            assert error.line and wanted[error.field] in rows[error.line - 1], error
        else:
            assert bad.split("\n")[(error.line or 0) - 1].startswith("2,zero,")
        assert error.problem and error.remedy and str(error).endswith(".")


@pytest.mark.parametrize(
    ("text", "line"),
    [
        ("[project", 1),
        ('[project]\na = "\x07"\n', 2),
        ("a = 1\na = 2\n", 2),
        ("x = " + "[" * 9999, None),
    ],
)
def test_what_is_not_toml(tmp_path: Path, text: str, line: int | None) -> None:
    (error,) = errors(tmp_path, text)
    assert error.field == "the file"
    assert line is None or error.line == line


def test_files_that_are_not_there_or_not_text(tmp_path: Path) -> None:
    for path in (tmp_path / "none.toml", tmp_path):
        with pytest.raises(Refused):
            read_project(path)
    (tmp_path / "b.toml").write_bytes(b"a = 1\nb = \xff")
    with pytest.raises(Refused, match=r"b\.toml:2"):
        read_project(tmp_path / "b.toml")


@pytest.mark.parametrize(
    "name", ["../../etc/passwd", "/etc/passwd", "a\\\\b.csv", "no.csv", "\\u0000"]
)
def test_tables_lie_beside_the_project(tmp_path: Path, name: str) -> None:
    found = errors(tmp_path, changed(TOML, ('"fb1-stations.csv"', f'"{name}"')))
    assert [e.field for e in found] == ["beam[1].results"]


@pytest.mark.parametrize(
    "mark",
    ["../x", "a/../b", "/a", "a//b", "", " ", "a b", "<b>", "a\\\\b", "\\u202e", "A" * 30, "é"],
)
def test_hostile_marks(tmp_path: Path, mark: str) -> None:
    found = errors(tmp_path, changed(ONE, ('mark    = "B1"', f'mark    = "{mark}"')))
    assert [e.field for e in found] == ["beam[1].mark"]


@pytest.mark.parametrize("title", ["\\u0007bell", "a\\nb", "x" * 500, "\\u202eabc"])
def test_hostile_texts(tmp_path: Path, title: str) -> None:
    found = errors(tmp_path, changed(ONE, ('"One beam"', f'"{title}"')))
    assert [e.field for e in found] == ["project.title"]
    assert all(str(e).isprintable() for e in found)


def test_hostile_keys_and_headings(tmp_path: Path) -> None:
    (error,) = errors(tmp_path, changed(ONE, ("[issue]", '[issue]\n"a\\u001b[31m" = 1')))
    assert str(error).isprintable() and error.line == ONE[: ONE.index("[issue]")].count("\n") + 2
    for csv in ("\x1b[31m" + CSV, "", "\x00", '"' + "x" * 200_000, "a;b\n1;2", '"span\n",x'):
        found = errors(tmp_path, TOML, csv)
        assert found and all(str(e).isprintable() for e in found)


def test_marks_that_would_be_one_file(tmp_path: Path) -> None:
    text = changed(TOML, ('mark    = "FB2"', 'mark    = "fb1"'))
    assert [e.field for e in errors(tmp_path, text)] == ["beam[2].mark"]


@pytest.mark.parametrize(
    "value", ["nan", "inf", "-inf", "true", '"5 m"', "[]", "{}", "1e400", "9" * 400]
)
@pytest.mark.parametrize("key", ["length = 5000", "width = 300", "cover   = 30", "dead = 15"])
def test_values_that_are_no_numbers(tmp_path: Path, key: str, value: str) -> None:
    name = key.split("=")[0]
    found = errors(tmp_path, changed(ONE, (key, f"{name}= {value}")))
    assert any(name.strip() in e.field for e in found)


@pytest.mark.parametrize(
    ("change", "field"),
    [
        (("length = 5000", "length = 5000, clear = 4500"), "beam[1].span[1].clear"),
        (('wall = 230', 'wall = 230, column = "K1"'), "beam[1].support[3].wall"),
        (("length = 4500, dead = 15, imposed = 8", "length = 4500"), "beam[1].span[2]"),
        (("length = 4500, dead = 15, imposed = 8", "length = 4500, moment = [0, 1, 0]"),
         "beam[1].span[2].shear"),
        (('"2L-T8@150"', '"2L-T8@150 x 900"'), "beam[1].links[1].zones"),
        (('"2L-T8@150"', '"2L-T8@150 x 4900", "2L-T8@200"'), "beam[1].links[1].zones"),
        (('"2L-T8@150"', '"2L-T8@150", "2L-T8@200"'), "beam[1].links[1].zones"),
        (('face = "bottom"\n  span = "1-2"', 'face = "bottom"\n  span = "1-3"'),
         "beam[1].bars[2].span"),
        (('face = "bottom"\n  span = "1-2"', 'face = "bottom"\n  support = "Z9"'),
         "beam[1].bars[2].support"),
        ((BARS, BARS + "  stop = [9000, 9000]\n"), "beam[1].bars[2].stop"),
        ((BARS, BARS + '  stop = [100, "end"]\n'), "beam[1].bars[2].stop[2]"),
        ((BARS, BARS + "  reach = [9000, 0]\n"), "beam[1].bars[2].reach[1]"),
        ((BARS, BARS + "  laps = [99000]\n"), "beam[1].bars[2].laps[1]"),
        (("cover   = 30", "cover   = { top = 30, bottom = 30 }"), "beam[1].cover.left"),
        (("depth = 500", "depth = 500, flange = 1200"), "beam[1].section.slab"),
        (("cover   = 30", "cover   = 135"), "beam[1].cover"),
        (("imposed = 8 }", "imposed = 8, point = [{ x = 6000, dead = 1 }] }"),
         "beam[1].span[1].point[1].x"),
        (("cover   = 30", "cover   = 30\nd_assumed = { bottom = 500 }"),
         "beam[1].d_assumed.bottom"),
    ],
)  # fmt: skip
def test_what_cannot_be(tmp_path: Path, change: Change, field: str) -> None:
    assert field in [e.field for e in errors(tmp_path, changed(ONE, change))]


def test_mixed_forms_in_one_beam(tmp_path: Path) -> None:
    hand = "length = 4500, moment = [-60, 30, 0], shear = [60, -40]"
    text = changed(ONE, ("length = 4500, dead = 15, imposed = 8", hand))
    assert any("in one beam" in e.problem for e in errors(tmp_path, text))


def test_defaults_are_assumptions(tmp_path: Path) -> None:
    texts = {(a.member, a.text) for a in read(tmp_path, ONE).assumptions}
    for said in (
        ("", "Aggregate of 20 mm."),
        ("", "Fire resistance of 1 hour."),
        ("", "Links of Fe 500, as the main bars."),
        ("", "Column K1: bars taken as 4-T16, one in each corner."),
        ("B1", "One member of this mark."),
    ):
        assert said in texts
