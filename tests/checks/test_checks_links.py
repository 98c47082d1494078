"""Links along the line: IS 456:2000, 26.5.1.2, 26.5.1.5, 26.5.1.6, 26.5.1.7; practice."""

from __future__ import annotations

import dataclasses
import itertools
from collections.abc import Sequence

import pytest
from cage_builders import link
from check_cases import area, bottom, case, loops, low_z, one, only, parabola, rules, top

from detailer.cage.bar import Bar
from detailer.checks import Case, links
from detailer.model import Section
from detailer.model.steelwork import ChosenLinks, LinkZone
from detailer.values import Face, Role, Severity

PAIR = (-100.0, 100.0)


def beam(*hoops: Bar, **what: object) -> Case:
    """Return a span with two bars in each face and these links."""
    section = what.get("section", Section(width=300.0, depth=500.0))
    return case(
        bottom("b", -150, 6150, 16, PAIR, z=low_z(16, depth=section.depth)),  # type: ignore[attr-defined]
        top("t", -150, 6150, 16, PAIR),
        *hoops,
        **what,  # type: ignore[arg-type]
    )


def spots(*xs: float, dia: float = 8, width: float = 240.0) -> Bar:
    return link("l", width, 440, dia=dia, xs=xs)


def every(step: float, first: float = 200.0, last: float = 5800.0) -> list[float]:
    """Return places a step apart from both ends, the rest in the middle where it is less."""
    left, right = [first], [last]
    while left[-1] + step < right[0] - step:
        left.append(left[-1] + step)
        right.insert(0, right[0] - step)
    return left + ([] if right[0] - left[-1] <= step else [(left[-1] + right[0]) / 2]) + right


# -- how far apart: 26.5.1.5 -----------------------------------------------------------------------


def test_a_span_without_links() -> None:
    found = one(links.check(beam()), "link-spacing")
    assert (found.found, found.required) == (5700, 300)  # clear between 150 and 5850
    assert found.severity is Severity.UNSAFE
    assert found.place.name == "span 1"


@pytest.mark.parametrize(("step", "wide"), [(300.0, False), (306.0, True)])
def test_no_further_than_300(step: float, wide: bool) -> None:
    # 0.75 d = 0.75 · 454 = 340 > 300
    made = beam(spots(*every(step)))
    found = only(links.check(made), "link-spacing")
    assert bool(found) is wide
    for finding in found:
        assert (finding.found, finding.required) == (306, 300)
        assert finding.severity is Severity.UNSAFE
        assert finding.clause == "IS 456:2000, 26.5.1.5"


@pytest.mark.parametrize(("step", "wide"), [(265.0, False), (270.0, True)])
def test_no_further_than_three_quarters_of_d(step: float, wide: bool) -> None:
    # 300 × 400: d = 400 − 46 = 354, 0.75 d = 265.5
    made = beam(spots(*every(step)), section=Section(width=300.0, depth=400.0))
    found = only(links.check(made), "link-spacing")
    assert bool(found) is wide
    assert [(f.found, f.required) for f in found] == [(270, 265.5)] * wide


def test_the_widest_space_is_the_one_told() -> None:
    xs = every(200.0)
    kept = [x for x in xs if abs(x - 3000) > 350 and x != 1000.0]
    found = one(links.check(beam(spots(*kept))), "link-spacing")
    widest = max(b - a for a, b in itertools.pairwise(kept))
    assert found.found == pytest.approx(widest)
    assert found.x == pytest.approx(3000, abs=250)


# -- how much: 26.5.1.6 ----------------------------------------------------------------------------


@pytest.mark.parametrize(("step", "light"), [(255.0, False), (265.0, True)])
@pytest.mark.parametrize("fy", [415, 500])
def test_least_area(step: float, light: bool, fy: float) -> None:
    # 350 wide: 0.4 · 350 s/(0.87 · 415): 98.9 at 255, 102.8 at 265 against 2 · 50.27; Fe 500 links
    # count as 415
    made = beam(spots(*every(step)), section=Section(width=350.0, depth=500.0), links=fy)
    found = only(links.check(made), "link-area")
    assert bool(found) is light
    for finding in found:
        assert (finding.found, finding.required, finding.unit) == (100.5, 102.8, "mm2")
        assert finding.severity is Severity.UNSAFE
        assert finding.clause == "IS 456:2000, 26.5.1.6"
    assert area(8, 2) == pytest.approx(100.53, abs=0.01)


# -- the first link --------------------------------------------------------------------------------


@pytest.mark.parametrize(("away", "far"), [(50.0, False), (58.0, False), (62.0, True)])
def test_the_first_link_stands_50_from_the_face(away: float, far: bool) -> None:
    # its own diameter is let pass
    made = beam(spots(*every(150.0, 150 + away, 5800.0)))
    found = only(links.check(made), "first-link")
    assert bool(found) is far
    for finding in found:
        assert (finding.found, finding.required) == (62, 50)
        assert finding.severity is Severity.COSTLY
        assert finding.place.name == "support A1"


def test_the_first_link_at_the_right_and_at_a_free_tip() -> None:
    made = beam(spots(*every(150.0, 200.0, 5750.0)))
    found = one(links.check(made), "first-link")
    assert (found.found, found.place.name) == (100, "support B1")
    tip = case(
        top("t", -150, 7470, 16, PAIR), bottom("b", -150, 7470, 16, PAIR),
        spots(*every(150.0), *every(150.0, 6200.0, 7350.0)), tips=(0.0, 1500.0),
    )  # fmt: skip
    # 150 from the tip, which is no support
    assert "first-link" not in rules(links.check(tip))


# -- torsion: 26.5.1.7 a ---------------------------------------------------------------------------


@pytest.mark.parametrize(("step", "wide"), [(166.0, False), (170.0, True)])
def test_links_that_resist_torsion(step: float, wide: bool) -> None:
    # 8 mm links of 240 × 440 outside: x1 = 232, y1 = 432; least of 232, (232 + 432)/4 = 166, 300
    made = beam(spots(*every(step)), m=20e6, t=5e6)
    found = only(links.check(made), "torsion-spacing")
    assert bool(found) is wide
    for finding in found:
        assert (finding.found, finding.required) == (170, 166)
        assert finding.severity is Severity.UNSAFE
        assert finding.clause == "IS 456:2000, 26.5.1.7 a"
    assert not only(links.check(beam(spots(*every(step)), m=20e6)), "torsion-spacing")


def test_x1_governs_a_narrow_web() -> None:
    # 200 × 900: x1 = 132, y1 = 832: (132 + 832)/4 = 241 > 132
    def narrow(step: float) -> Case:
        hoops = link("l", 140, 840, xs=tuple(every(step)))
        return beam(hoops, section=Section(width=200.0, depth=900.0), m=20e6, t=5e6)

    assert not only(links.check(narrow(132.0)), "torsion-spacing")
    assert one(links.check(narrow(140.0)), "torsion-spacing").required == 132


def test_an_open_link_where_the_beam_is_twisted() -> None:
    corners = tuple((0.0, y, z) for y, z in ((-116, -40), (-116, -466), (116, -466), (116, -40)))
    u = Bar(
        id="u", role=Role.LINK, face=Face.NONE, layer=0, grade="Fe 415", dia=8,
        corners=corners, mandrels=(32.0, 32.0), placings=tuple((x, 0.0, 0.0) for x in every(150.0)),
    )  # fmt: skip
    found = one(links.check(beam(u, m=20e6, t=5e6)), "link-open")
    assert (found.found, found.required) == (0, 1)
    assert found.severity is Severity.UNSAFE
    assert "link-open" not in rules(links.check(beam(u, m=20e6)))
    assert "link-open" not in rules(links.check(beam(spots(*every(150.0)), m=20e6, t=5e6)))


# -- legs, common practice -------------------------------------------------------------------------


@pytest.mark.parametrize(("width", "found"), [(510.0, []), (530.0, [462.0])])
def test_legs_across_a_wide_beam(width: float, found: list[float]) -> None:
    # 530 − 60 − 8 = 462 > 450; 510 gives 442
    hoops = spots(*every(150.0), width=width - 60, dia=8)
    made = beam(hoops, section=Section(width=width, depth=500.0))
    legs = only(links.check(made), "leg-spacing")
    assert [(f.found, f.required, f.severity) for f in legs] == [
        (x, 450, Severity.COSTLY) for x in found
    ]


def test_an_inner_link_makes_four_legs() -> None:
    hoops = spots(*every(150.0), width=470)
    inner = link("i", 150, 440, xs=tuple(x + 10 for x in every(150.0)))
    made = beam(hoops, inner, section=Section(width=530.0, depth=500.0))
    assert "leg-spacing" not in rules(links.check(made))


@pytest.mark.parametrize(("step", "tight"), [(70.0, False), (65.0, True)])
def test_links_of_four_legs_let_fingers_in(step: float, tight: bool) -> None:
    # 65 − 8 = 57 < 60
    xs = every(step)
    made = beam(spots(*xs), link("i", 100, 440, xs=tuple(x + 10 for x in xs)))
    found = only(links.check(made), "link-clear")
    assert bool(found) is tight
    for finding in found:
        # the rest in the middle of the span may be closer still
        assert finding.found <= 57 and finding.required == 60
        assert finding.severity is Severity.COSTLY
    assert "link-clear" not in rules(links.check(beam(spots(*xs))))  # two legs


# -- compression bars that count: 26.5.1.2 with 26.5.3.2 c -----------------------------------------


def pressed(step: float, peak: float, dia: float = 12) -> Case:
    return case(
        bottom("b", -150, 6150, 25, (-100.0, -33.0, 33.0, 100.0)),
        top("t", -150, 6150, dia, PAIR),
        spots(*every(step)),
        m=parabola(peak),
    )


def test_links_hold_compression_bars() -> None:
    # 4 φ 25: d = 449.5; xu,max = 0.46 d; Mlim = 0.36 · 0.46 (1 − 0.42 · 0.46) 25 · 300 · 449.5² =
    # 202.5 kN·m. Beyond it 2 φ 12 above count: 16 · 12 = 192
    limit = 0.36 * 0.46 * (1 - 0.42 * 0.46) * 25 * 300 * 449.5**2
    assert limit / 1e6 == pytest.approx(202.5, abs=0.1)
    assert "compression-held" not in rules(links.check(pressed(210.0, 0.99 * limit)))
    assert "compression-held" not in rules(links.check(pressed(190.0, 1.05 * limit)))
    found = one(links.check(pressed(210.0, 1.05 * limit)), "compression-held")
    assert (found.found, found.required) == (210, 192)
    assert found.severity is Severity.UNSAFE
    assert found.clause == "IS 456:2000, 26.5.1.2"
    assert found.bars == ("t",)
    # 16 · 16 = 256
    assert "compression-held" not in rules(links.check(pressed(210.0, 1.05 * limit, 16)))


# -- as many as were chosen ------------------------------------------------------------------------


def chosen(xs: Sequence[float], *zones: LinkZone) -> Case:
    made = beam(spots(*xs))
    return dataclasses.replace(
        made, beam=dataclasses.replace(made.beam, links=(ChosenLinks(span=1, zones=zones),))
    )


def test_links_stand_as_close_as_chosen() -> None:
    whole = LinkZone(legs=2, dia=8, spacing=150)
    assert "link-count" not in rules(links.check(chosen(every(150.0), whole)))
    found = one(links.check(chosen(every(160.0), whole)), "link-count")
    assert (found.found, found.required) == (160, 150)
    assert found.severity is Severity.COSTLY


def test_each_zone_has_its_own_spacing() -> None:
    end = LinkZone(legs=2, dia=8, spacing=100, length=950)
    amid = LinkZone(legs=2, dia=8, spacing=200)
    xs = [
        *every(100.0, 200.0, 1100.0),
        *every(200.0, 1300.0, 4700.0),
        *every(100.0, 4900.0, 5800.0),
    ]
    assert "link-count" not in rules(links.check(chosen(xs, end, amid, end)))
    found = one(links.check(chosen([x for x in xs if x != 500.0], end, amid, end)), "link-count")
    assert (found.found, found.required) == (200, 100)
    assert found.x == pytest.approx(150 + 475)


def test_a_loop_is_even() -> None:
    assert len(loops("l", 200).placings) == 29
