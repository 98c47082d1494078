"""Elevation, bars pulled out, sections of a hand-built cage: nothing left out, all adds up."""

from __future__ import annotations

import re
from collections import Counter
from itertools import combinations, pairwise
from math import dist
from types import SimpleNamespace
from typing import Any

import pytest
from example_cage import LEFT, LEFT2, RIGHT, RIGHT2, example_cage

from detailer.cage.bar import Cage
from detailer.cage.cut import bars_at, cut
from detailer.drawing.metrics import width as text_width
from detailer.drawing.primitives import Dimension, Disc, Label, Path, Pen, Primitive
from detailer.values import Face, Role
from detailer.views.bent import bent_bars, bent_items
from detailer.views.chains import elevation_items
from detailer.views.cuts import cuts_of, signature
from detailer.views.elevation import Stage, picture, stage_of
from detailer.views.outline import clear_spans
from detailer.views.pulled import pulled_bars, pulled_items
from detailer.views.section import groups_of, section_items, spacers_at
from detailer.views.stops import laps_of
from detailer.views.zones import link_sets, zones_between

SCALES = (25.0, 40.0, 50.0)
CALL_OUT = re.compile(r"(\d+)-(?:\dL-)?T\d+-(\S+)")
LOWER = (Face.BOTTOM, Face.LEFT, Face.RIGHT)


@pytest.fixture(scope="module")
def cage() -> Cage:
    return example_cage()


def _stage(cage: Cage, scale: float) -> Stage:
    return stage_of(cage, scale, cuts_of(cage, clear_spans(cage)))


def _beam(cage: Cage) -> Any:
    columns = [SimpleNamespace(mark="K1"), SimpleNamespace(mark="K1"), None]
    return SimpleNamespace(supports=[SimpleNamespace(column=c) for c in columns])


def _elevation(cage: Cage, scale: float) -> list[Primitive]:
    stage = _stage(cage, scale)
    return [*picture(stage), *elevation_items(stage, _beam(cage))]


def _counts(cage: Cage, roles: tuple[Role, ...]) -> Counter[str]:
    found: Counter[str] = Counter()
    for bar in cage.bars:
        if bar.role in roles:
            found[bar.mark] += len(bar.placings)
    return found


def _called(items: list[Primitive]) -> Counter[str]:
    found: Counter[str] = Counter()
    for item in items:
        if isinstance(item, Label) and (match := CALL_OUT.match(item.text)):
            found[match[2]] += int(match[1])
    return found


def text_boxes(
    items: list[Primitive], scale: float
) -> list[tuple[str, float, float, float, float]]:
    """Return text and box of every label and every dimension that is wide enough for its text."""
    found = []
    for item in items:
        if isinstance(item, Label):
            wide, tall = text_width(item.text, item.height) * scale, item.height * scale
            share = {"left": 0.0, "centre": 0.5, "right": 1.0}[item.align.value]
            x, y = item.at
            found.append((item.text, x - share * wide, y, x + (1 - share) * wide, y + tall))
    return found


@pytest.mark.parametrize("scale", SCALES)
def test_every_bar_is_in_the_elevation(cage: Cage, scale: float) -> None:
    drawn = {
        item.tag.mark
        for item in _elevation(cage, scale)
        if (isinstance(item, Path) and item.pen in (Pen.BAR, Pen.LINK))
        or (isinstance(item, Disc) and item.pen is Pen.BAR)
    }
    assert drawn >= {bar.mark for bar in cage.bars}


@pytest.mark.parametrize("scale", SCALES)
def test_call_outs_of_the_elevation_add_up(cage: Cage, scale: float) -> None:
    assert _called(_elevation(cage, scale)) == _counts(cage, tuple(Role))


def test_lines_that_overlap_are_drawn_apart(cage: Cage) -> None:
    stage = _stage(cage, 40.0)
    for a, b in combinations(stage.strands, 2):
        (a0, a1, za), (b0, b1, zb) = a.body, b.body
        if a0 < b1 and b0 < a1:
            assert abs(za - zb) >= 1.2 * 40.0 - 1e-6


@pytest.mark.parametrize("scale", SCALES)
def test_chains_close_in_whole_millimetres(cage: Cage, scale: float) -> None:
    lines: dict[float, list[Dimension]] = {}
    for item in _elevation(cage, scale):
        if isinstance(item, Dimension):
            assert item.distance == pytest.approx(round(item.distance), abs=1e-9)
            assert str(round(item.distance)) in item.printed
            lines.setdefault(item.line, []).append(item)
    totals = []
    for chain in lines.values():
        ends = sorted((d.start[0], d.end[0]) for d in chain)
        assert all(b[0] >= a[1] - 1e-9 for a, b in pairwise(ends))
        totals.append(sum(int(re.findall(r"\d+", d.printed)[0]) for d in chain))
    clear = (RIGHT - LEFT) + (RIGHT2 - LEFT2)
    assert 11000 in totals  # centres
    assert 11450 in totals  # clear spans and supports
    assert clear in totals  # link zones
    assert totals.count(clear) >= 1


def test_cut_offs_and_laps_are_dimensioned_from_faces(cage: Cage) -> None:
    items = [i for i in _elevation(cage, 40.0) if isinstance(i, Dimension)]
    texts = {i.printed for i in items}
    assert {"1175", "1275", "675", "900 lap"} <= texts
    assert laps_of(cage, _stage(cage, 40.0).strands, (Face.TOP,))[0].x0 == 2550


@pytest.mark.parametrize("scale", SCALES)
def test_texts_of_the_elevation_are_clear_of_each_other(cage: Cage, scale: float) -> None:
    boxes = text_boxes(_elevation(cage, scale), scale)
    for (a, ax0, ay0, ax1, ay1), (b, bx0, by0, bx1, by1) in combinations(boxes, 2):
        apart = ax1 <= bx0 or bx1 <= ax0 or ay1 <= by0 or by1 <= ay0
        assert apart, (a, b)


@pytest.mark.parametrize("scale", SCALES)
def test_leaders_of_the_elevation_do_not_cross(cage: Cage, scale: float) -> None:
    leaders = [
        i.points for i in _elevation(cage, scale) if isinstance(i, Path) and i.pen is Pen.LEADER
    ]
    for p, q in combinations(leaders, 2):
        assert not _cross(p[0], p[-1], q[0], q[-1])


def _cross(a: Any, b: Any, c: Any, d: Any) -> bool:
    def side(p: Any, q: Any, r: Any) -> float:
        return float((q[0] - p[0]) * (r[1] - p[1]) - (q[1] - p[1]) * (r[0] - p[0]))

    return side(a, b, c) * side(a, b, d) < 0 and side(c, d, a) * side(c, d, b) < 0


def test_texts_are_at_least_two_and_a_half_high(cage: Cage) -> None:
    for item in (*_elevation(cage, 50.0), *section_items(cage, 3000.0, 20.0)):
        if isinstance(item, Label | Dimension):
            assert item.height >= 2.5


def test_bars_pulled_out_are_all_there_and_add_up(cage: Cage) -> None:
    stage = _stage(cage, 40.0)
    items = [*pulled_items(stage, (Face.TOP,)), *pulled_items(stage, LOWER)]
    long_roles = (Role.MAIN, Role.HANGER, Role.SIDE)
    assert _called(items) == _counts(cage, long_roles)
    assert {i.tag.mark for i in items if isinstance(i, Path)} == set(_counts(cage, long_roles))
    assert "3-T20-01  L = 6580" in {i.text for i in items if isinstance(i, Label)}
    cross = {b.bar.mark: b.count for b in bent_bars(cage)}
    assert cross == _counts(cage, (Role.LINK, Role.TIE, Role.SPACER))
    drawn = {i.tag.mark for i in bent_items(cage, 15.0) if isinstance(i, Path)}
    assert drawn == set(cross)


def test_bars_pulled_out_keep_their_shape_and_place(cage: Cage) -> None:
    stage = _stage(cage, 40.0)
    for face in (Face.TOP, Face.BOTTOM):
        for pulled in pulled_bars(stage, (face,)):
            a, b = (
                pulled.strand.true,
                next(
                    i
                    for i in pulled_items(stage, (face,))
                    if isinstance(i, Path) and i.tag.mark == pulled.strand.bar.mark
                ),
            )
            assert [p[0] for p in b.points] == pytest.approx([p[0] for p in a.points])
            lengths = [dist(p, q) for p, q in pairwise(a.points)]
            assert [dist(p, q) for p, q in pairwise(b.points)] == pytest.approx(lengths)


def test_sections_show_what_cut_finds(cage: Cage) -> None:
    for place in cuts_of(cage, clear_spans(cage)):
        items = section_items(cage, place.x, 20.0)
        found = sorted((c.bar.mark, -c.y, c.z) for c in cut(cage, place.x).bars)
        discs = sorted(
            (i.tag.mark, *i.centre)
            for i in items
            if isinstance(i, Disc) and i.pen is Pen.BAR and i.filled
        )
        assert len(discs) == len(found)
        for (mark, y, z), (name, x, up) in zip(found, discs, strict=True):
            assert mark == name
            assert abs(x - y) <= 0.1 and abs(up - z) <= 0.1
        links = [i for i in items if isinstance(i, Path) and i.pen is Pen.LINK]
        assert any(i.width == 8.0 for i in links)


def test_call_outs_of_sections_add_up(cage: Cage) -> None:
    for place in cuts_of(cage, clear_spans(cage)):
        seen = cut(cage, place.x)
        called = _called(list(section_items(cage, place.x, 15.0)))
        assert called == Counter(c.bar.mark for c in seen.bars)
        assert sum(len(g.bars) for row in groups_of(seen) for g in row) == len(seen.bars)


def test_equal_sections_share_a_letter_and_no_others_do(cage: Cage) -> None:
    cuts = cuts_of(cage, clear_spans(cage))
    for a, b in combinations(cuts, 2):
        seen = [signature(cage, c.x, bars_at(cage, c.x)) for c in (a, b)]
        assert (a.letter == b.letter) == (seen[0] == seen[1])
    for x0, x1 in clear_spans(cage):
        places = [c.x for c in cuts if x0 < c.x < x1]
        assert any(x - x0 <= 150 for x in places)
        assert any(x1 - x <= 150 for x in places)
        assert any(abs(x - (x0 + x1) / 2) < 600 for x in places)
    assert any(2550 < c.x < 3450 for c in cuts)  # the lap


def test_spacers_show_where_there_is_a_second_layer(cage: Cage) -> None:
    assert [bar.mark for bar in spacers_at(cage, 3000.0)] == ["09"]
    assert spacers_at(cage, 8000.0) == ()


def test_links_are_counted_once(cage: Cage) -> None:
    sets = link_sets(cage)
    zones = [z for x0, x1 in clear_spans(cage) for z in zones_between(sets, x0, x1)]
    assert sum(z.count for z in zones) == len(sets)
    assert [z.texts for z in zones[:3]] == [
        ("7-2L-T8-08 @ 150",),
        ("18-2L-T8-08 @ 192",),
        ("7-2L-T8-08 @ 150",),
    ]
