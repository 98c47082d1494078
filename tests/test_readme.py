"""The README names every key, every command and every file, and its pictures are there."""

from __future__ import annotations

import ast
import re
from pathlib import Path

import pytest

from detailer import api
from detailer.cli import _parser
from detailer.reading import beams, columns, geometry, project, steelwork

ROOT = Path(__file__).parents[1]
README = (ROOT / "README.md").read_text(encoding="utf-8")

KEYS = sorted(
    {
        *project.KEYS,
        *beams.KEYS,
        *columns.KEYS,
        *geometry.SECTION_KEYS,
        *geometry.SUPPORT_KEYS,
        *geometry.SPAN_KEYS,
        *steelwork.BAR_KEYS,
    }
)


@pytest.mark.parametrize("key", KEYS)
def test_every_key_is_told(key: str) -> None:
    assert re.search(rf"`[^`\n]*\b{key}\b[^`\n]*`", README)


def test_every_command_is_told() -> None:
    told = _parser().format_help()
    for name in ("draw", "check", "schedule", "start"):
        assert name in told
        assert f"`detailer {name}" in README


def test_every_file_is_told(tmp_path: Path) -> None:
    for name in api.draw(out=tmp_path).files:
        kind = re.sub(r"/\w+\.", "/MARK.", name)
        assert f"`{kind}`" in README, name


def test_pictures_are_there() -> None:
    pictures = re.findall(r"!\[[^\]]+\]\(([^)]+)\)", README)
    assert pictures
    for name in pictures:
        assert (ROOT / name).is_file(), name


def test_every_rule_of_a_finding_is_told() -> None:
    """The names of rules are the hyphenated words that checks hand to a finding."""
    named: set[str] = set()
    for path in sorted((ROOT / "detailer" / "checks").glob("*.py")):
        for node in ast.walk(ast.parse(path.read_text(encoding="utf-8"))):
            text = node.value if isinstance(node, ast.Constant) else None
            if isinstance(text, str) and re.fullmatch(r"[a-z]+(-[a-z]+)+", text):
                named.add(text)
    assert named
    missing = sorted(name for name in named if f"`{name}`" not in README)
    assert not missing, f"the README's table of findings lacks {', '.join(missing)}"
