"""DXF files, read back: clean, dimensioned truly, the same bytes each time."""

from __future__ import annotations

import hashlib
import io
import os
import subprocess
import sys
from dataclasses import replace
from itertools import pairwise
from pathlib import Path
from typing import Any

import ezdxf
import pytest
from output.sheet_samples import BAR, HOSTILE, ITEMS, drawing, view

from detailer.drawing.primitives import Dimension, Disc, Drawing, Label, Pen, Placed, Primitive
from detailer.drawing.primitives import Path as Line
from detailer.output.dxf import dxf_bytes, write_dxf
from detailer.output.entities import safe
from detailer.output.layers import APPID, OF_PEN

CAUTION = "Draft: not for construction."


def made(drawn: Drawing) -> Any:
    data = dxf_bytes(drawn, caution=CAUTION, date="2026-11-30")
    return ezdxf.read(io.StringIO(data.decode("utf-8")))


def test_audit_finds_nothing_to_say(tmp_path: Path) -> None:
    path = tmp_path / "a.dxf"
    write_dxf(drawing(*HOSTILE), path, caution=CAUTION, date="2026-11-30")
    doc = ezdxf.readfile(path)
    found = doc.audit()
    assert found.errors == [] and found.fixes == []
    assert doc.dxfversion == "AC1024" and doc.units == 4


def test_bytes_are_the_same_whatever_the_hash_seed() -> None:
    code = (
        "import sys; from output.sheet_samples import drawing, HOSTILE;"
        "from detailer.output.dxf import dxf_bytes;"
        "data = dxf_bytes(drawing(*HOSTILE), caution='c', date='2026-11-30');"
        "sys.stdout.buffer.write(data)"
    )
    folders = os.pathsep.join(str(Path(__file__).parents[n]) for n in (1, 2))
    found = set()
    for seed, zone in (("0", "UTC"), ("1", "Asia/Kolkata"), ("4242", "America/Lima")):
        env = {**os.environ, "PYTHONHASHSEED": seed, "TZ": zone, "PYTHONPATH": folders}
        data = subprocess.run(
            [sys.executable, "-c", code], env=env, capture_output=True, check=True
        )
        found.add(hashlib.sha256(data.stdout).hexdigest())
    assert len(found) == 1


def test_dimensions_measure_what_they_print() -> None:
    doc = made(drawing())
    items = [i for i in ITEMS if isinstance(i, Dimension)]
    found = doc.modelspace().query("DIMENSION")
    assert len(found) == len(items)
    for entity, item in zip(found, items, strict=True):
        assert entity.dxf.actual_measurement == pytest.approx(item.distance)
        assert entity.get_measurement() == pytest.approx(item.distance)
        block = doc.blocks.get(entity.dxf.geometry)
        lines, texts = block.query("LINE"), block.query("TEXT")
        assert len(lines) == 5 and [t.dxf.text for t in texts] == [item.printed]
        assert f"{entity.dxf.actual_measurement:.0f}" in item.printed
        along = 1 if item.vertical else 0
        feet = sorted((lines[2].dxf.start[along], lines[2].dxf.end[along]))
        assert feet == pytest.approx(sorted((item.start[along], item.end[along])))
        style = doc.dimstyles.get(entity.dxf.dimstyle)
        assert style.dxf.dimscale == 25 and style.dxf.dimtxt == item.height
    (paper,) = doc.layouts.get("FB1_1_ a_b_").query("DIMENSION")
    assert paper.dxf.dimstyle == "DETAILER-1" and paper.dxf.actual_measurement == 40


def test_bars_carry_their_mark() -> None:
    doc = made(drawing())
    steel = {OF_PEN[pen].name for pen in (Pen.BAR, Pen.BAR_EXTRA, Pen.LINK)}
    bars = [e for e in doc.modelspace() if e.dxf.layer in steel]
    assert len(bars) == 6
    for bar in bars:
        assert bar.dxftype() == "LWPOLYLINE"
        words = [value for code, value in bar.get_xdata(APPID) if code == 1000]
        assert words in (["member=FB1", "mark=03"], ["member=FB1", "mark=09"])
    course = bars[0].get_points("xyb")
    assert course[1][2] == pytest.approx(0.41421356, abs=1e-8)


def test_a_cut_bar_is_a_full_disc_of_its_size() -> None:
    doc = made(drawing())
    (disc, *_) = [
        e for e in doc.modelspace().query("LWPOLYLINE") if all(b for *_, b in e.get_points("xyb"))
    ]
    (x0, y0, _), (x1, _, _) = disc.get_points("xyb")
    assert ((x0 + x1) / 2, y0) == (3000, 100)
    assert (x1 - x0 + disc.dxf.const_width) / 2 == pytest.approx(10)


def test_every_sheet_has_its_layout_and_every_view_its_viewport() -> None:
    doc = made(drawing())
    assert [n for n in doc.layouts.names() if n != "Model"] == ["FB1_1_ a_b_", "FB1_1_ A_B_ 2"]
    layout = doc.layouts.get("FB1_1_ a_b_")
    ports = [v for v in layout.query("VIEWPORT") if v.dxf.id != 1]
    assert [round(v.dxf.view_height / v.dxf.height) for v in ports] == [25, 50]
    assert layout.dxf.paper_width == 420 and layout.dxf.paper_height == 297
    for port, placed in zip(ports, drawing().sheets[0].views, strict=True):
        x0, y0, _, _ = placed.view.box
        k, (dx, dy) = placed.view.scale, placed.model
        corner = (
            port.dxf.view_center_point.x - port.dxf.width * k / 2,
            port.dxf.view_center_point.y - port.dxf.height * k / 2,
        )
        assert corner == pytest.approx((x0 + dx - 0.8 * k, y0 + dy - 0.8 * k))
    assert tuple(doc.header["$EXTMIN"])[:2] == (-100, -3400)
    assert tuple(doc.header["$EXTMAX"])[:2] == (6500, 900)


def test_texts_are_as_high_in_model_space_as_their_view_asks() -> None:
    doc = made(drawing())
    heights = {e.dxf.text: e.dxf.height for e in doc.modelspace().query("TEXT")}
    assert heights == {"03": 62.5, "up": 62.5}
    assert {e.dxf.style for e in doc.modelspace().query("TEXT")} == {"DETAILER", "DETAILER-BOLD"}


@pytest.mark.parametrize("text", HOSTILE)
def test_no_text_is_read_as_a_code(text: str) -> None:
    found = safe(text)
    assert "%%" not in found and "\\U+" not in found and "\\M+" not in found
    assert found.isprintable()
    assert all(after == " " for mark, after in pairwise(found) if mark == "^")


def test_the_caution_and_the_date_are_in_the_properties() -> None:
    doc = made(drawing())
    assert dict(doc.header.custom_vars)["Caution"] == CAUTION
    assert dict(doc.header.custom_vars)["Issued"] == "2026-11-30"


@pytest.mark.parametrize(
    "item",
    [
        Label(at=(float("nan"), 0), text="a", height=2.5),
        Disc(centre=(0, 0), radius=float("inf"), pen=Pen.BAR),
        Line(points=((0, 0), (1, float("-inf"))), pen=Pen.BAR),
        Line(points=((0, 0), (1, 1)), bulges=(float("nan"),), pen=Pen.BAR),
        Dimension(start=(0, 0), end=(1, 0), line=float("nan")),
    ],
)
def test_numbers_that_are_none_are_refused(item: Primitive) -> None:
    sheet = drawing().sheets[0]
    placed = Placed(view=view("FB1 wrong", (item,)), at=(0, 0), model=(0, 0))
    wrong = replace(drawing(), sheets=(replace(sheet, views=(placed,)),))
    with pytest.raises(ValueError, match="FB1 wrong"):
        dxf_bytes(wrong, caution=CAUTION, date="")


def test_a_long_mark_fits_the_extended_data() -> None:
    bar = replace(ITEMS[3], tag=replace(BAR, mark="é" * 400))
    sheet = drawing().sheets[0]
    placed = Placed(view=view("v", (bar,)), at=(0, 0), model=(0, 0))
    doc = made(replace(drawing(), sheets=(replace(sheet, views=(placed,)),)))
    (found,) = doc.modelspace()
    assert all(len(value.encode()) <= 255 for code, value in found.get_xdata(APPID) if code == 1000)
