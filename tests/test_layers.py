"""Imports among the packages run downward only, wherever in a file they stand."""

from __future__ import annotations

import ast
from pathlib import Path

import pytest

ROOT = Path(__file__).parents[1] / "detailer"
BASE = ("values", "errors", "findings")
ALLOWED: dict[str, tuple[str, ...]] = {
    "values": (),
    "errors": (),
    "findings": ("values", "errors"),
    "model": (*BASE,),
    "rules": (*BASE,),
    "cage": (*BASE, "model"),
    "reading": (*BASE, "model", "rules"),
    "statics": (*BASE, "model", "rules"),
    "strength": (*BASE, "cage", "model", "rules"),
    "placing": (*BASE, "model", "rules", "statics", "strength", "cage"),
    "checks": (*BASE, "model", "rules", "statics", "strength", "cage"),
    "solving": (*BASE, "placing", "checks"),
    "schedule": (*BASE, "cage", "model", "rules"),
    "drawing": ("values",),
    "views": (*BASE, "cage", "model", "rules", "statics", "strength", "schedule", "drawing"),
    "output": (*BASE, "drawing", "cage", "schedule"),
    "register": (*BASE, "schedule", "cage"),
    "verifying": (*BASE, "output", "cage", "schedule"),
    "demo": (),
}
"""What each part may import of ours; the three at the bottom are open to all but the drawing."""

TOP = ("cli", "api", "pipeline", "__init__", "__main__")
"""Thin fronts: the commands and the verbs; they may import everything but are imported by none."""

HEAVY = ("ezdxf", "svgwrite", "shapely", "numpy", "tree_sitter", "tree_sitter_toml")
LIGHT = ("cli", "__init__", "__main__", "errors", "values", "findings", "model")
"""Parts that start without a heavy library."""


def part_of(path: Path) -> str:
    """Return the package or module right under the root that a file belongs to."""
    return path.relative_to(ROOT).parts[0].removesuffix(".py")


def imports(path: Path) -> list[tuple[int, str]]:
    """Return every imported dotted name with its line: in functions and for typing too."""
    package = ("detailer", *path.relative_to(ROOT).parent.parts)
    found: list[tuple[int, str]] = []
    for node in ast.walk(ast.parse(path.read_text(encoding="utf-8"))):
        if isinstance(node, ast.Import):
            found += [(node.lineno, alias.name) for alias in node.names]
        elif isinstance(node, ast.ImportFrom):
            above = package[: len(package) - node.level + 1] if node.level else ()
            module = ".".join((*above, *([node.module] if node.module else [])))
            if module == "detailer":
                found += [(node.lineno, f"detailer.{alias.name}") for alias in node.names]
            else:
                found.append((node.lineno, module))
        elif isinstance(node, ast.Call) and name_called(node) in ("import_module", "__import__"):
            literal = node.args[0] if node.args else None
            if isinstance(literal, ast.Constant) and isinstance(literal.value, str):
                found.append((node.lineno, literal.value))
    return found


def name_called(node: ast.Call) -> str:
    """Return the bare name of what is called."""
    if isinstance(node.func, ast.Attribute):
        return node.func.attr
    return node.func.id if isinstance(node.func, ast.Name) else ""


def wrong_imports(path: Path) -> list[str]:
    """Return the imports of a file that run upward or sideways."""
    part = part_of(path)
    if part in TOP:
        return []
    wrong = []
    for line, name in imports(path):
        if name != "detailer" and not name.startswith("detailer."):
            continue
        target = name.split(".")[1] if "." in name else "__init__"
        if target != part and target not in ALLOWED[part]:
            wrong.append(f"{path.relative_to(ROOT.parent)}:{line}: {part} imports {name}")
    return wrong


FILES = sorted(ROOT.rglob("*.py"))


def test_every_part_has_its_place() -> None:
    parts = {part_of(path) for path in FILES}
    assert parts - set(ALLOWED) - set(TOP) == set()


def test_the_table_has_no_way_round() -> None:
    """Following the table upward from any part never comes back to it."""

    def below(part: str, seen: tuple[str, ...] = ()) -> set[str]:
        assert part not in seen, f"{' > '.join((*seen, part))}"
        return {part}.union(*(below(lower, (*seen, part)) for lower in ALLOWED[part]))

    for part in ALLOWED:
        below(part)


@pytest.mark.parametrize("part", sorted(ALLOWED))
def test_imports_run_downward(part: str) -> None:
    wrong = [text for path in FILES if part_of(path) == part for text in wrong_imports(path)]
    assert wrong == []


def test_an_upward_import_is_found_wherever_it_hides(
    tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    monkeypatch.setattr(f"{__name__}.ROOT", tmp_path / "detailer")
    folder = tmp_path / "detailer" / "cage"
    folder.mkdir(parents=True)
    file = folder / "bad.py"
    file.write_text(
        "from detailer.model import Beam\n"
        "from typing import TYPE_CHECKING\n"
        "if TYPE_CHECKING:\n    from detailer.placing import place\n"
        "def f():\n    from detailer import checks\n    from ..views import sheet\n"
        "    import detailer\n    import importlib\n"
        "    importlib.import_module('detailer.output')\n",
        encoding="utf-8",
    )
    lines = [text.split(": ", 1)[1] for text in wrong_imports(file)]
    assert sorted(lines) == [
        "cage imports detailer",
        "cage imports detailer.checks",
        "cage imports detailer.output",
        "cage imports detailer.placing",
        "cage imports detailer.views",
    ]


def test_light_parts_start_without_heavy_libraries() -> None:
    wrong = []
    for path in FILES:
        if part_of(path) not in LIGHT or (path.parent != ROOT and part_of(path) != "model"):
            continue
        tree = ast.parse(path.read_text(encoding="utf-8"))
        for node in tree.body:
            names = []
            if isinstance(node, ast.Import):
                names = [alias.name for alias in node.names]
            elif isinstance(node, ast.ImportFrom) and node.module:
                names = [node.module]
            wrong += [f"{path.name}: {name}" for name in names if name.split(".")[0] in HEAVY]
    assert wrong == []
