"""The rule set satisfies the protocols, by name, by parameters and for the type checker."""

from __future__ import annotations

import inspect

import pytest

from detailer.rules import is456, protocols
from detailer.rules.protocols import DetailingRules

RULES: DetailingRules = is456
KINDS = [
    kind
    for name, kind in sorted(vars(protocols).items())
    if name.endswith("Rules") and kind is not DetailingRules
]
QUESTIONS = [(kind, name) for kind in KINDS for name in sorted(vars(kind)) if name[0] != "_"]


def test_there_is_a_protocol_for_each_kind_of_question() -> None:
    assert len(KINDS) == 9
    assert set(KINDS) <= set(DetailingRules.__mro__)


@pytest.mark.parametrize(
    ("kind", "name"), QUESTIONS, ids=[f"{kind.__name__}.{name}" for kind, name in QUESTIONS]
)
def test_is456_answers(kind: type, name: str) -> None:
    asked = list(inspect.signature(getattr(kind, name)).parameters.values())[1:]
    given = inspect.signature(getattr(RULES, name)).parameters
    for parameter in asked:
        assert given[parameter.name].kind is parameter.kind
        assert given[parameter.name].default == parameter.default
    extra = [p for p in given.values() if p.name not in {a.name for a in asked}]
    assert all(p.default is not inspect.Parameter.empty for p in extra)
