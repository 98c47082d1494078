"""Cover and width as given: IS 456:2000, Tables 16 and 16A, Fig. 1, 26.4.1, 5.3.3."""

from __future__ import annotations

import dataclasses

import pytest
from check_cases import bottom, case, loops, one, only, rules

from detailer.checks import Case, given_cover
from detailer.model import Section
from detailer.values import Exposure, Severity


def beam(
    given: float = 30.0,
    *,
    dia: float = 16,
    link: float = 8,
    exposure: Exposure = Exposure.MODERATE,
    fck: float = 25,
    hours: float = 1.0,
    aggregate: float = 20.0,
    **what: object,
) -> Case:
    made = case(
        bottom("b", -110, 6110, dia, (-80.0, 80.0)),
        loops("l", 150, dia=link),
        cover=(given,) * 4,
        fck=fck,
        **what,  # type: ignore[arg-type]
    )
    concrete = dataclasses.replace(
        made.project.concrete, exposure=exposure, fire_hours=hours, aggregate=aggregate
    )
    return dataclasses.replace(made, project=dataclasses.replace(made.project, concrete=concrete))


@pytest.mark.parametrize(
    ("exposure", "fck", "dia", "need"),
    [
        (Exposure.MILD, 25, 16, 20),
        (Exposure.MILD, 25, 12, 15),  # bars up to 12: 5 less
        (Exposure.MODERATE, 25, 16, 30),
        (Exposure.MODERATE, 40, 12, 30),  # no reduction
        (Exposure.SEVERE, 30, 16, 45),
        (Exposure.SEVERE, 35, 16, 40),  # M35 and above: 5 less
        (Exposure.VERY_SEVERE, 30, 16, 50),
        (Exposure.VERY_SEVERE, 40, 16, 45),
        (Exposure.EXTREME, 40, 16, 75),
    ],
)
def test_table_16(exposure: Exposure, fck: float, dia: float, need: float) -> None:
    def made(given: float) -> Case:
        return beam(given, exposure=exposure, fck=fck, dia=dia, hours=0.0, aggregate=10.0)

    assert "given-cover" not in rules(given_cover.check(made(need)))
    found = one(given_cover.check(made(need - 1)), "given-cover")
    assert (found.found, found.required, found.unit) == (need - 1, need, "mm")
    assert found.severity is Severity.UNSAFE
    assert found.clause == "IS 456:2000, Table 16"
    assert found.place.name == "B1" and found.place.order == -1


@pytest.mark.parametrize(
    ("hours", "spans", "need"),
    [(1.0, 1, 20), (2.0, 1, 40), (2.0, 2, 30), (3.0, 1, 60), (3.0, 2, 40), (4.0, 2, 50)],
)
def test_table_16a(hours: float, spans: int, need: float) -> None:
    def made(given: float) -> Case:
        return beam(
            given, hours=hours, exposure=Exposure.MILD, lengths=(6000.0,) * spans, aggregate=10.0
        )

    assert "fire-cover" not in rules(given_cover.check(made(need)))
    found = one(given_cover.check(made(need - 1)), "fire-cover")
    assert (found.found, found.required) == (need - 1, need)
    assert found.clause == "IS 456:2000, Table 16A"


def test_no_fire_asks_nothing() -> None:
    made = beam(
        15, hours=0.0, exposure=Exposure.MILD, dia=12, section=Section(width=150, depth=500)
    )
    assert not {"fire-cover", "fire-width"} & rules(given_cover.check(made))


@pytest.mark.parametrize(("hours", "need"), [(1.0, 200), (2.0, 200), (3.0, 240), (4.0, 280)])
def test_width_for_fire(hours: float, need: float) -> None:
    def made(width: float) -> Case:
        return beam(75, hours=hours, section=Section(width=width, depth=500))

    assert "fire-width" not in rules(given_cover.check(made(need)))
    found = one(given_cover.check(made(need - 10)), "fire-width")
    assert (found.found, found.required) == (need - 10, need)
    assert found.severity is Severity.UNSAFE
    assert found.clause == "IS 456:2000, Fig. 1"


def test_the_least_cover_of_the_four_faces_counts() -> None:
    made = beam(30)
    less = dataclasses.replace(made.beam.cover, left=25)
    found = one(
        given_cover.check(
            dataclasses.replace(made, beam=dataclasses.replace(made.beam, cover=less))
        ),
        "given-cover",
    )
    assert (found.found, found.required) == (25, 30)


def test_a_bar_has_its_own_size_for_cover() -> None:
    # to the main bar 20 + 8 = 28 and 24 + 8 = 32, links between
    mild = Exposure.MILD
    assert "cover-for-bar" not in rules(given_cover.check(beam(24, dia=32, exposure=mild)))
    found = one(given_cover.check(beam(20, dia=32, exposure=mild)), "cover-for-bar")
    assert (found.found, found.required) == (28, 32)
    assert found.clause == "IS 456:2000, 26.4.1"


def test_the_aggregate_fits_between_bar_and_form() -> None:
    # 5.3.3: 5 mm less than the cover: 25 for 20
    mild = Exposure.MILD
    assert "aggregate-size" not in rules(given_cover.check(beam(25, exposure=mild)))
    found = one(given_cover.check(beam(24, exposure=mild)), "aggregate-size")
    assert (found.found, found.required) == (24, 25)
    assert found.severity is Severity.COSTLY
    assert "smaller aggregate" in found.remedy
    assert found.clause == "IS 456:2000, 5.3.3"


def test_what_was_chosen_well_is_clean() -> None:
    assert only(given_cover.check(beam()), "given-cover") == []
    assert list(given_cover.check(beam())) == []
