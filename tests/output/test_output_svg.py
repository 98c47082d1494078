"""SVG pictures: well formed whatever the text, marks to be lit, the geometry of the paper."""

from __future__ import annotations

import re
import xml.etree.ElementTree as ET
from dataclasses import replace

import pytest
from output.sheet_samples import HOSTILE, drawing, view

from detailer.drawing.metrics import width
from detailer.drawing.primitives import Label, Path, Pen, Placed, Tag
from detailer.drawing.text import plain
from detailer.output.svg import name_of, svg_text

NS = "{http://www.w3.org/2000/svg}"


def test_hostile_texts_stay_texts() -> None:
    root = ET.fromstring(svg_text(drawing(*HOSTILE)))
    texts = ["".join(e.itertext()) for e in root.iter(f"{NS}text")]
    for text in HOSTILE:
        assert plain(text) in texts
    assert not list(root.iter(f"{NS}script"))


def test_the_picture_is_named_for_those_who_cannot_see_it() -> None:
    root = ET.fromstring(svg_text(drawing()))
    assert root.get("role") == "img"
    ids = {e.get("id"): e for e in root.iter() if e.get("id")}
    title, desc = (ids[name] for name in root.get("aria-labelledby", "").split())
    assert (title.text, desc.text) == ("Beam FB1", "A beam.")
    assert len(ids) == len([e for e in root.iter() if e.get("id")])


def test_two_drawings_in_one_page_share_no_id() -> None:
    one, two = drawing(), replace(drawing(), name="FB_1")
    ids = [set(re.findall(r' id="([^"]+)"', svg_text(d))) for d in (one, two)]
    assert ids[0] and not ids[0] & ids[1]


def test_sheets_lie_below_one_another() -> None:
    root = ET.fromstring(svg_text(drawing()))
    assert root.get("viewBox") == "0 0 420.0 604.0"
    papers = [g for g in root.iter(f"{NS}g") if g.get("class") == "paper"]
    assert [g.get("transform") for g in papers] == ["translate(0 0.0)", "translate(0 307.0)"]
    views = [g.get("data-view") for g in papers[0] if g.get("class") == "view"]
    assert views == ["FB1 elevation", "FB1 A-A"]


def test_what_shows_a_bar_says_so() -> None:
    root = ET.fromstring(svg_text(drawing()))
    lit = [e for e in root.iter() if e.get("data-mark") == "03"]
    assert {e.tag for e in lit} == {f"{NS}path", f"{NS}circle", f"{NS}text"}
    assert all("mark-03" in (e.get("class") or "").split() for e in lit)


def test_marks_that_differ_have_classes_that_differ() -> None:
    marks = ["a b", "a-b", "a_b", "a_20_b", "ä", "", "A b", "a/b"]
    names = [name_of(mark) for mark in marks]
    assert len(set(names)) == len(marks)
    assert all(re.fullmatch(r"[A-Za-z0-9_-]*", name) for name in names)


def test_an_arc_bows_to_the_side_its_bulge_says() -> None:
    arc = Path(points=((0, 0), (10, 0)), bulges=(1.0,), pen=Pen.BAR, tag=Tag("m", "1"))
    shown = shown_of(arc)
    (path,) = re.findall(r' d="(M[^"]*A[^"]*)"', shown)
    assert path == "M0,100A5,5 0 0 0 10,100"  # to the right of its way, below it on the sheet


def shown_of(item: Path) -> str:
    base = replace(view("v", (item,), 1.0), box=(0, 0, 10, 10))
    sheet = replace(
        drawing().sheets[0],
        size=(200, 100),
        views=(Placed(view=base, at=(0, 0), model=(0, 0)),),
        items=(),
    )
    return svg_text(replace(drawing(), sheets=(sheet,)))


def test_texts_keep_the_width_they_were_laid_out_with() -> None:
    root = ET.fromstring(svg_text(drawing("Two words")))
    (text,) = [e for e in root.iter(f"{NS}text") if e.text == "Two words"]
    assert float(text.get("textLength", "0")) == pytest.approx(width("Two words", 3.5), abs=1e-3)
    assert float(text.get("font-size", "0")) == pytest.approx(3.5 / 0.729, abs=1e-3)


def test_numbers_are_short_and_finite() -> None:
    text = svg_text(drawing())
    assert not re.search(r"\d\.\d{4,}", text)
    bad = Label(at=(float("nan"), 0), text="a", height=2.5)
    sheet = replace(drawing().sheets[0], items=(bad,))
    with pytest.raises(ValueError, match="not finite"):
        svg_text(replace(drawing(), sheets=(sheet,)))
