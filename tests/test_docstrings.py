"""Every public rule says what it takes, in which unit, and where it comes from."""

from __future__ import annotations

import ast
import importlib
import inspect
import re
from collections.abc import Callable
from pathlib import Path
from types import ModuleType

import pytest

import detailer.rules

RULES = Path(detailer.rules.__file__).parent
FILES = sorted(
    path for path in RULES.rglob("*.py") if path.name not in ("__init__.py", "protocols.py")
)
UNIT = re.compile(r"\[(mm|mm²|N|N·mm|N/mm|N/mm²|kg/m|kg/m³|degrees|h|%|-)(, (mm|-))?\]")
NUMBERS = ("float", "int", "Required", "tuple[float, float]", "tuple[float, ...]", "float | None")

FROM_MEMORY = (
    "is1786.STOCK_LENGTH",
    "is2502.ALLOWANCE_LEAST",
    "is2502.ALLOWANCE_STEP",
    "is2502.LENGTH_TOLERANCE",
    "is2502.STRAIGHT_TOLERANCE",
    "is2502.bend_allowance",
    "is2502.bending_tolerance",
    "is2502.hook_allowance",
    "is2502.min_straight_end",
    "is2502.round_up",
    "is2502.straight_length",
    "is456.flexure.CURVE",
    "is456.flexure.steel_stress",
    "sp34.BOTTOM_SHARE_END",
    "sp34.BOTTOM_SHARE_INTERIOR",
    "sp34.BOTTOM_STOP_END",
    "sp34.BOTTOM_STOP_INTERIOR",
    "sp34.CANTILEVER_ALL_REACH",
    "sp34.SIMPLE_STOP",
    "sp34.TOP_ALL_REACH",
    "sp34.TOP_EXTRA_REACH",
    "sp34.TOP_EXTRA_SHARE",
    "sp34.TOP_THROUGH_SHARE",
    "sp34.bottom_stop",
    "sp34.simple_stop",
    "sp34.top_reaches",
)
"""Everything in the rules that rests on a value nobody has seen on a page."""


def short_name(path: Path) -> str:
    """Return "is456.bond" for its file."""
    return ".".join(path.relative_to(RULES).with_suffix("").parts)


def module_of(path: Path) -> ModuleType:
    """Return the imported module of a file."""
    return importlib.import_module(f"detailer.rules.{short_name(path)}")


def public_functions() -> list[tuple[str, Callable[..., object]]]:
    """Return every public rule with its name."""
    found: list[tuple[str, Callable[..., object]]] = []
    for path in FILES:
        module = module_of(path)
        found += [
            (f"{short_name(path)}.{name}", value)
            for name, value in sorted(vars(module).items())
            if inspect.isfunction(value) and value.__module__ == module.__name__ and name[0] != "_"
        ]
    return found


FUNCTIONS = public_functions()
IDS = [name for name, _ in FUNCTIONS]


def section(doc: str, title: str) -> str:
    """Return the text of a numpydoc section, or nothing."""
    found = re.search(rf"^{title}\n-+\n(.*?)(?=^\w[\w ]*\n-+\n|\Z)", doc, re.M | re.S)
    return found.group(1) if found else ""


def parameters(doc: str) -> dict[str, str]:
    """Return the parameters a docstring names, each with its text."""
    entries = re.findall(r"^(\w[\w, ]*) : (.*?)(?=^\w|\Z)", section(doc, "Parameters"), re.M | re.S)
    return {name: text for names, text in entries for name in names.split(", ")}


def test_there_are_rules() -> None:
    assert len(FUNCTIONS) > 80


@pytest.mark.parametrize(("name", "rule"), FUNCTIONS, ids=IDS)
def test_parameters_are_those_of_the_signature(name: str, rule: Callable[..., object]) -> None:
    assert list(parameters(inspect.getdoc(rule) or "")) == list(inspect.signature(rule).parameters)


@pytest.mark.parametrize(("name", "rule"), FUNCTIONS, ids=IDS)
def test_every_number_has_its_unit(name: str, rule: Callable[..., object]) -> None:
    doc = inspect.getdoc(rule) or ""
    texts = parameters(doc)
    for parameter in inspect.signature(rule).parameters.values():
        if parameter.annotation in NUMBERS:
            assert UNIT.search(texts[parameter.name]), f"{name}: {parameter.name} has no [unit]"
    if inspect.signature(rule).return_annotation in NUMBERS:
        assert UNIT.search(doc.splitlines()[0]), f"{name}: its result has no [unit]"


@pytest.mark.parametrize(("name", "rule"), FUNCTIONS, ids=IDS)
def test_every_rule_has_a_reference(name: str, rule: Callable[..., object]) -> None:
    """The standard with its clause, or geometry; and how far it is known."""
    text = section(inspect.getdoc(rule) or "", "References")
    assert re.search(
        r"\.\. \[1\] (IS 456:2000, |IS 2502:1963|IS 1786:2008|SP 34:1987|Geometry|π)", text
    )
    assert re.search(r"confirmed|second-hand|derived|FROM MEMORY|see :func:", text), name
    if "IS 456:2000" in text:
        assert re.search(r"\d+\.\d|Table \d|Fig\. \d|G-\d", text), f"{name}: no clause"


@pytest.mark.parametrize(("name", "rule"), FUNCTIONS, ids=IDS)
def test_every_refusal_is_documented(name: str, rule: Callable[..., object]) -> None:
    if "raise " in inspect.getsource(rule):
        assert section(inspect.getdoc(rule) or "", "Raises"), name


def docstrings(path: Path) -> list[tuple[str, str]]:
    """Return the docstrings of functions and of values in a file."""
    body = ast.parse(path.read_text(encoding="utf-8")).body
    found = []
    for node, after in zip(body, [*body[1:], None], strict=True):
        if isinstance(node, ast.FunctionDef):
            found.append((node.name, ast.get_docstring(node) or ""))
        elif isinstance(node, ast.Assign | ast.AnnAssign):
            target = node.targets[0] if isinstance(node, ast.Assign) else node.target
            found.append((ast.unparse(target), text_of(after)))
    return found


def text_of(node: ast.stmt | None) -> str:
    """Return a bare string that stands as a statement, or nothing."""
    if isinstance(node, ast.Expr) and isinstance(node.value, ast.Constant):
        return str(node.value.value)
    return ""


def test_values_from_memory_are_marked_counted_and_listed() -> None:
    marked = []
    for path in FILES:
        for name, text in docstrings(path):
            if "FROM MEMORY" in text or "page_seen" in text:
                assert "FROM MEMORY" in text, name
                assert "page_seen=False" in text, name
                marked.append(f"{short_name(path)}.{name}")
    assert tuple(sorted(marked)) == tuple(sorted(FROM_MEMORY))
    assert len(marked) == 26


def test_no_mark_stands_outside_a_docstring() -> None:
    """What is FROM MEMORY is marked at the value, where the count finds it."""
    for path in FILES:
        inside = sum(text.count("FROM MEMORY") for _, text in docstrings(path))
        assert path.read_text(encoding="utf-8").count("FROM MEMORY") == inside, path.name


def test_every_value_has_a_docstring() -> None:
    silent = [
        f"{short_name(path)}.{name}"
        for path in FILES
        for name, text in docstrings(path)
        if not text and name[0] != "_"
    ]
    assert silent == []
