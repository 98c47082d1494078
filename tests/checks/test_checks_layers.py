"""Second layers and the spacer bars that hold them: IS 456:2000, 26.3.2; practice 1 m."""

from __future__ import annotations

import dataclasses

import pytest
from cage_builders import spacer
from check_cases import bottom, case, one

from detailer.checks import Case, layers
from detailer.values import Face, Severity


def beam(*spots: float, length: float = 4000.0, face: Face = Face.BOTTOM, layer: int = 2) -> Case:
    """Return a second layer from 1000 on, with spacers at these places."""
    bars = [bottom("b", -110, 6110, 20), bottom("c", 1000, 1000 + length, 20, z=-407, layer=layer)]
    if spots:
        bars.append(dataclasses.replace(spacer("s", 200, xs=spots), face=face))
    return case(*bars)


def test_a_second_layer_without_spacers() -> None:
    found = one(layers.check(beam()), "layer-held")
    assert (found.found, found.required, found.unit) == (4000, 1000, "mm")
    assert found.severity is Severity.COSTLY
    assert found.clause.startswith("IS 456:2000, 26.3.2")
    assert found.place.name == "span 1" and found.x == 3000
    assert found.bars == ("c",)


@pytest.mark.parametrize(
    ("spots", "free"),
    [
        ((2000.0, 3000.0, 4000.0), None),
        ((2500.0, 4000.0), None),  # up to half as much again is let pass
        ((2000.0, 3600.0, 4000.0), 1600),
        ((1500.0, 2500.0, 3490.0), 1510),  # to the end of the bar
        ((2000.0, 3000.0, 6000.0), 2000),  # one past the bar's end holds nothing
    ],
)
def test_spacers_each_metre(spots: tuple[float, ...], free: float | None) -> None:
    found = list(layers.check(beam(*spots)))
    assert [f.found for f in found] == ([free] if free else [])


def test_spacers_of_the_other_face_hold_nothing() -> None:
    assert list(layers.check(beam(2000.0, 3000.0, 4000.0, face=Face.TOP)))


def test_short_bars_and_first_layers_need_none() -> None:
    assert list(layers.check(beam(length=1500.0))) == []
    assert list(layers.check(beam(layer=1))) == []
