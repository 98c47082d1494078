"""The demo drawn whole: every file, twice the same, and nothing that two files say differently.

Faults 70–73, 75–77 and 83 can't arise in a cage, so they are planted in what was written: the
re-reader must find each of them, and call the untouched files clean.
"""

from __future__ import annotations

import csv
import json
import re
import shutil
from collections.abc import Callable, Iterator
from pathlib import Path
from typing import Any

import ezdxf
import pytest
from generator import random_project
from rereader import Disagreement, reread

from detailer import api

Rows = list[dict[str, str]]
KILOGRAM = 7850e-9 * 3.14159265358979 / 4


@pytest.fixture(scope="module")
def drawn(tmp_path_factory: pytest.TempPathFactory) -> Path:
    out = tmp_path_factory.mktemp("drawn") / "OUT"
    api.draw(out=out)
    return out


@pytest.fixture
def copy(drawn: Path, tmp_path: Path) -> Path:
    return Path(shutil.copytree(drawn, tmp_path / "copy"))


def about(found: list[Disagreement]) -> set[str]:
    return {item.about for item in found}


def test_every_file_is_written_twice_the_same(drawn: Path, tmp_path: Path) -> None:
    again = tmp_path / "again"
    api.draw(out=again)
    names = sorted(str(p.relative_to(drawn)) for p in drawn.rglob("*") if p.is_file())
    assert names == sorted(
        [f"drawings/FB{n}.{kind}" for n in (1, 2, 3) for kind in ("dxf", "svg")]
        + ["assumptions.json", "cage.json", "findings.json", "index.html"]
        + ["schedule.csv", "summary.csv"]
    )
    for name in names:
        assert (drawn / name).read_bytes() == (again / name).read_bytes(), name


@pytest.mark.parametrize("mark", ["FB1", "FB2", "FB3"])
def test_every_drawing_passes_the_audit_without_a_fix(drawn: Path, mark: str) -> None:
    audit = ezdxf.readfile(drawn / "drawings" / f"{mark}.dxf").audit()
    assert not audit.errors
    assert not audit.fixes


def test_nothing_disagrees(drawn: Path) -> None:
    assert reread(drawn) == []


def test_what_the_demo_must_show(drawn: Path) -> None:
    with (drawn / "schedule.csv").open(encoding="utf-8", newline="") as file:
        links = [r for r in csv.DictReader(file) if r["member"] == "FB2" and r["role"] == "link"]
    assert [r["per member"] for r in links] == ["21"]
    texts = dxf_texts(drawn / "drawings" / "FB2.dxf")
    assert any(t.startswith("21-2L-T8-") and t.endswith("@ 195") for t in texts)
    found = json.loads((drawn / "findings.json").read_text(encoding="utf-8"))
    (short,) = (f for f in found if f["rule"] == "cut-off-extension" and f["member"] == "FB3")
    assert short["clause"] == "IS 456:2000, 26.2.3.1"
    assert short["found"] == 450
    assert short["required"] == pytest.approx(565, abs=5)
    assert short["place"] == "support B3"


def test_reaches_over_inner_supports_are_unequal_and_enough(drawn: Path) -> None:
    (member, *_) = json.loads((drawn / "cage.json").read_text(encoding="utf-8"))["members"]
    over = [b for b in member["bars"] if b["face"] == "top" and b["diameter"] == 20]
    faces = [(s["x"] - s["width"] / 2, s["x"] + s["width"] / 2) for s in member["supports"][1:3]]
    reaches = set()
    for bar in over:
        x0, x1 = bar["corners"][0][0], bar["corners"][-1][0]
        left, right = next(f for f in faces if x0 < f[0] and x1 > f[1])
        reaches.add((round(left - x0), round(x1 - right)))
    assert reaches == {(1000, 1200), (1200, 1000)}


@pytest.mark.slow
@pytest.mark.parametrize("seed", range(6))
def test_random_beams_read_back_clean(seed: int, tmp_path: Path) -> None:
    project = tmp_path / "project.toml"
    project.write_text(random_project(seed), encoding="utf-8")
    api.draw(project, tmp_path / "OUT")
    assert reread(tmp_path / "OUT") == []
    audit = ezdxf.readfile(tmp_path / "OUT" / "drawings" / "RB1.dxf").audit()
    assert not audit.errors and not audit.fixes


# ---- faults planted in the schedule


def in_schedule(out: Path, change: Callable[[Rows], Rows]) -> None:
    path = out / "schedule.csv"
    with path.open(encoding="utf-8", newline="") as file:
        reader = csv.DictReader(file)
        rows, names = list(reader), reader.fieldnames
    assert names is not None
    with path.open("w", encoding="utf-8", newline="") as file:
        writer = csv.DictWriter(file, names)
        writer.writeheader()
        writer.writerows(change(rows))


def set_length(row: dict[str, str], length: float) -> None:
    """Change a length with every mass that follows from it, so that only the length is wrong."""
    row["length"] = f"{length:g}"
    row["kg each"] = f"{KILOGRAM * float(row['dia']) ** 2 * length:.3f}"
    row["mass"] = f"{int(row['total']) * KILOGRAM * float(row['dia']) ** 2 * length:.3f}"


def marks(out: Path) -> list[tuple[str, str]]:
    with (out / "schedule.csv").open(encoding="utf-8", newline="") as file:
        return [(r["member"], r["mark"]) for r in csv.DictReader(file) if not r["hand"]]


def longer(shape: str, by: Callable[[float], float]) -> Callable[[Rows], Rows]:
    def change(rows: Rows) -> Rows:
        for row in rows:
            if row["shape"].startswith(shape):
                set_length(row, float(row["length"]) + by(float(row["dia"])))
        return rows

    return change


@pytest.mark.parametrize(
    ("shape", "by"),
    [
        ("closed link", lambda d: 3 * 9 * d / 2),  # fault 70: allowance on top of a centre line
        ("closed link", lambda d: 8 * d),  # fault 70: inside rule on outside sizes
        ("bends both ends", lambda d: 2 * 3 * d),  # fault 71: two bends not deducted
        ("bend one end", lambda d: 3 * d),  # fault 71: one bend not deducted
        ("bends both ends", lambda d: -2 * 3 * d),  # fault 71: deducted twice
        ("straight", lambda d: -20.0),
    ],
)
def test_faults_70_and_71_a_bend_allowed_for_wrongly(
    copy: Path, shape: str, by: Callable[[float], float]
) -> None:
    in_schedule(copy, longer(shape, by))
    found = reread(copy)
    places = {item.where for item in found if item.about == "length"}
    with (copy / "schedule.csv").open(encoding="utf-8", newline="") as file:
        wrong = {f"{r['member']} {r['mark']}" for r in csv.DictReader(file) if r["shape"] == shape}
    assert wrong <= places


def test_fault_72_a_total_is_not_multiplied(copy: Path) -> None:
    def change(rows: Rows) -> Rows:
        for row in rows:
            if row["member"] == "FB2":
                row["total"] = row["per member"]
        return rows

    in_schedule(copy, change)
    found = [item for item in reread(copy) if item.about == "total"]
    assert {item.where for item in found} == {f"FB2 {m}" for b, m in marks(copy) if b == "FB2"}


def test_fault_72_members_differ_from_what_is_built(copy: Path) -> None:
    def change(rows: Rows) -> Rows:
        for row in rows:
            if row["member"] == "FB2":
                row["members"] = "2"
                row["total"] = str(2 * int(row["per member"]))
                set_length(row, float(row["length"]))
        return rows

    in_schedule(copy, change)
    assert {"members", "similar"} <= about(reread(copy))


def test_fault_73_both_hands_under_one_mark(tmp_path: Path) -> None:
    (tmp_path / "in").mkdir()
    project = next(p for p in api.start(tmp_path / "in") if p.suffix == ".toml")
    text = project.read_text(encoding="utf-8").replace("copies  = 2", "copies = 1\nmirrored = 1", 1)
    project.write_text(text, encoding="utf-8")
    out = tmp_path / "OUT"
    api.draw(project, out)
    assert reread(out) == []
    shared: list[str] = []

    def change(rows: Rows) -> Rows:
        kept = [row for row in rows if not row["hand"]]
        shared.extend(row["mark"] for row in rows if row["hand"])
        for row in kept:
            if row["member"] == "FB1":
                row["members"] = "2"
                row["total"] = str(2 * int(row["per member"]))
                set_length(row, float(row["length"]))
        return kept

    in_schedule(out, change)
    assert shared, "the demo has a bar with a hand"
    assert "hand" in about(reread(out))


def test_fault_75_a_mark_drawn_is_not_scheduled(copy: Path) -> None:
    gone = marks(copy)[0]
    in_schedule(copy, lambda rows: [r for r in rows if (r["member"], r["mark"]) != gone])
    found = reread(copy)
    assert {i.where for i in found if i.about == "marks"} == {" ".join(gone)}


def test_fault_75_one_mark_two_shapes(copy: Path) -> None:
    def change(rows: Rows) -> Rows:
        last = next(r for r in rows if r["member"] == "FB3" and r["role"] == "link")
        last["dimensions"] = last["dimensions"].replace("A 224", "A 244")
        set_length(last, float(last["length"]) + 40)
        return rows

    in_schedule(copy, change)
    assert {"shape", "length"} <= about(reread(copy))


# ---- faults planted in a drawing


def dxf_texts(path: Path) -> list[str]:
    doc = ezdxf.readfile(path)
    return [t.dxf.text for t in doc.modelspace().query("TEXT")]


def in_drawing(out: Path, mark: str, change: Callable[[Any], None]) -> None:
    path = out / "drawings" / f"{mark}.dxf"
    doc = ezdxf.readfile(path)
    change(doc)
    doc.saveas(path)


def texts(doc: Any, pattern: str, paper: bool = False) -> Iterator[Any]:
    spaces = [lay for lay in doc.layouts if (lay.name != "Model") is paper]
    for space in spaces:
        for text in space.query("TEXT"):
            if re.search(pattern, text.dxf.text):
                yield text


def test_a_drawing_saved_again_is_still_clean(copy: Path) -> None:
    in_drawing(copy, "FB1", lambda doc: None)
    assert reread(copy) == []


def test_fault_75_a_mark_scheduled_is_not_drawn(copy: Path) -> None:
    def change(doc: Any) -> None:
        for text in texts(doc, r"-12(?: |$)"):
            text.dxf.text = text.dxf.text.replace("-12", "-99")

    in_drawing(copy, "FB2", change)
    where = {i.where for i in reread(copy) if i.about == "marks"}
    assert {"FB2 12", "FB2 99"} <= where


def test_fault_75_two_schedules_disagree(copy: Path) -> None:
    def change(doc: Any) -> None:
        text = next(texts(doc, r"^4620$", paper=True))
        text.dxf.text = "4640"

    in_drawing(copy, "FB2", change)
    assert [(i.about, i.where) for i in reread(copy)] == [("shape", "FB2 11")]


@pytest.mark.parametrize("pattern", [r"^3-T20-01$", r"^3-T20-01  L", r"^20-2L-T8-10 @"])
def test_fault_76_a_mark_is_counted_at_several_call_outs(copy: Path, pattern: str) -> None:
    def change(doc: Any) -> None:
        text = next(texts(doc, pattern))
        number, rest = text.dxf.text.split("-", 1)
        text.dxf.text = f"{int(number) + 1}-{rest}"

    in_drawing(copy, "FB1", change)
    assert "call-outs" in about(reread(copy))


def test_fault_77_a_sheet_stands_for_more_members_than_are_built(copy: Path) -> None:
    def change(doc: Any) -> None:
        text = next(texts(doc, "Members of this kind", paper=True))
        text.dxf.text = text.dxf.text.replace("2 as drawn", "3 as drawn")

    in_drawing(copy, "FB1", change)
    assert about(reread(copy)) == {"similar"}


def test_fault_77_a_similar_member_has_another_bar(copy: Path) -> None:
    cage = json.loads((copy / "cage.json").read_text(encoding="utf-8"))
    links = [b for b in cage["members"][2]["bars"] if b["role"] == "link"]
    for bar in links:
        for corner in bar["corners"]:
            corner[1] += 20 if corner[1] > 0 else 0
    (copy / "cage.json").write_text(json.dumps(cage), encoding="utf-8")
    assert "shape" in about(reread(copy))


def first_dimension(doc: Any, printed: str) -> Any:
    for dimension in doc.modelspace().query("DIMENSION"):
        block = doc.blocks.get(dimension.dxf.geometry)
        if [t.dxf.text for t in block.query("TEXT")] == [printed]:
            return dimension
    raise LookupError(printed)


def test_fault_83_a_dimension_says_another_number(copy: Path) -> None:
    def change(doc: Any) -> None:
        dimension = first_dimension(doc, "3900")
        dimension.dxf.text = "3920"
        for text in doc.blocks.get(dimension.dxf.geometry).query("TEXT"):
            text.dxf.text = "3920"

    in_drawing(copy, "FB2", change)
    assert {"dimension", "chain"} <= about(reread(copy))


def test_fault_83_a_chain_does_not_close(copy: Path) -> None:
    def change(doc: Any) -> None:
        dimension = first_dimension(doc, "4450")
        foot = dimension.dxf.defpoint3
        dimension.dxf.defpoint3 = (foot.x - 30, foot.y, 0)
        dimension.dxf.actual_measurement = 4420

    in_drawing(copy, "FB3", change)
    assert {"dimension", "chain"} <= about(reread(copy))


def test_fault_83_one_cut_off_is_measured_from_the_grid(copy: Path) -> None:
    def change(doc: Any) -> None:
        dimension = first_dimension(doc, "4100")
        start = dimension.dxf.defpoint2
        assert start.x == 225
        dimension.dxf.defpoint2 = (start.x - 60, start.y, 0)
        dimension.dxf.actual_measurement = 4160
        for text in doc.blocks.get(dimension.dxf.geometry).query("TEXT"):
            text.dxf.text = "4160"

    in_drawing(copy, "FB3", change)
    assert "chain" in about(reread(copy))


def test_a_circle_beside_its_bar_is_found(copy: Path) -> None:
    def change(doc: Any) -> None:
        disc = next(
            e
            for e in doc.modelspace().query("LWPOLYLINE")
            if e.has_xdata("DETAILER") and e.closed and len(e) == 2
        )
        disc.translate(0.0, 0.2, 0.0)

    in_drawing(copy, "FB1", change)
    assert "section" in about(reread(copy))
