"""Every finding says where, both numbers, the clause and a remedy; the README names every rule."""

from __future__ import annotations

import ast
import itertools
import re
from collections.abc import Iterator
from itertools import takewhile
from math import isfinite
from pathlib import Path

import pytest
from generator import random_project, roomy_project

import detailer.demo
from detailer import pipeline
from detailer.findings import Finding
from detailer.reading import read_project
from detailer.values import Severity

ROOT = Path(__file__).parents[2]
README = (ROOT / "README.md").read_text(encoding="utf-8")
DEMO = Path(detailer.demo.__file__).parent / "tern-quay.toml"
SEEDS = (1, 2, 3, 5, 8, 13, 21, 34)
ROOMY = (4, 7)

UNITS = {"mm", "mm2", "kN", "kN m", "%", ""}


def table() -> list[str]:
    """Return the rows of the README's table of findings."""
    rows = README[README.rindex("\n", 0, README.index("`clash` (")) + 1 :].splitlines()
    return list(takewhile(lambda row: row.startswith("|"), rows))


def findings(path: Path) -> tuple[Finding, ...]:
    return pipeline.findings_of(pipeline.placed(read_project(path)))


@pytest.fixture(scope="module", params=["demo", *SEEDS, *(f"roomy {s}" for s in ROOMY)])
def made(
    request: pytest.FixtureRequest, tmp_path_factory: pytest.TempPathFactory
) -> tuple[Finding, ...]:
    if request.param == "demo":
        return findings(DEMO)
    path = tmp_path_factory.mktemp("random") / "project.toml"
    seed = request.param
    text = random_project(seed) if isinstance(seed, int) else roomy_project(int(seed.split()[1]))
    path.write_text(text, encoding="utf-8")
    return findings(path)


def test_every_finding_says_where(made: tuple[Finding, ...]) -> None:
    for finding in made:
        assert finding.member and isfinite(finding.x)
        assert finding.place.name == finding.member or re.fullmatch(
            r"(support|span) \S+", finding.place.name
        ), finding
        assert finding.message.startswith(f"{finding.place.name}: "), finding
        if finding.place.name == finding.member:
            assert finding.place.order == -1
        assert (finding.place.order % 2 == 0) == finding.place.name.startswith("support")
        assert list(finding.bars) == sorted(set(finding.bars))


def test_every_finding_has_both_numbers(made: tuple[Finding, ...]) -> None:
    for finding in made:
        assert isfinite(finding.found) and isfinite(finding.required), finding
        assert finding.unit in UNITS, finding
        # two equal numbers are no fault, unless the fault is said in words
        if finding.rule not in ("contact",):
            assert finding.found != finding.required, finding


def test_every_finding_has_a_clause_and_a_remedy(made: tuple[Finding, ...]) -> None:
    for finding in made:
        assert finding.clause.strip() and finding.remedy.strip(), finding
        assert not finding.message.endswith("."), finding


def test_what_cannot_be_built_says_what_site_will_do(made: tuple[Finding, ...]) -> None:
    for finding in made:
        if finding.severity is Severity.UNBUILDABLE:
            assert finding.site.strip(), finding


def test_numbers_stand_in_the_message_as_well(made: tuple[Finding, ...]) -> None:
    """At least one of the two, to the whole number, but for a few that say it in words."""
    words = {"contact", "closing-length", "corner-seat", "link-open", "sizes-alike", "corner-empty",
             "link-on-bend", "leg-turned-out", "lap-in-joint"}  # fmt: skip
    for finding in made:
        if finding.rule in words:
            continue
        told = {float(n) for n in re.findall(r"-?\d+(?:\.\d+)?", finding.message)}
        mine = {finding.found, finding.required}
        near = any(abs(abs(a) - abs(b)) <= 1 for a in told for b in mine)
        assert near, (finding.found, finding.required, finding.message)


def test_findings_stand_in_order(made: tuple[Finding, ...]) -> None:
    """Of each place the worst first; the place with the worst first."""
    seen: list[tuple[str, str]] = []
    for finding in made:
        key = finding.member, finding.place.name
        if seen and seen[-1] == key:
            continue
        assert key not in seen, "a place stands in two parts"
        seen.append(key)
    for one, other in itertools.pairwise(made):
        if (one.member, one.place) == (other.member, other.place):
            assert one.severity.rank <= other.severity.rank


def test_severities_are_those_of_the_readme(made: tuple[Finding, ...]) -> None:
    for finding in made:
        severities = next(row for row in table() if f"`{finding.rule}`" in row).rsplit("|", 2)[1]
        assert finding.severity.value in severities, (finding.rule, finding.severity)


# -- the names of rules ----------------------------------------------------------------------------


def _strings(node: ast.expr) -> Iterator[str]:
    if isinstance(node, ast.Constant) and isinstance(node.value, str):
        yield node.value
    elif isinstance(node, ast.IfExp):
        yield from _strings(node.body)
        yield from _strings(node.orelse)


def _assigned(target: ast.expr, value: ast.expr) -> Iterator[str]:
    if isinstance(target, ast.Tuple) and isinstance(value, ast.Tuple):
        for one, other in zip(target.elts, value.elts, strict=True):
            yield from _assigned(one, other)
    elif isinstance(target, ast.Name) and target.id == "rule":
        yield from _strings(value)


def emitted() -> set[str]:
    """Return every name handed to a parameter, a keyword or a variable called `rule`."""
    names: set[str] = set()
    for path in sorted((ROOT / "detailer" / "checks").glob("*.py")):
        tree = ast.parse(path.read_text(encoding="utf-8"))
        at = {
            f.name: [a.arg for a in f.args.args].index("rule")
            for f in ast.walk(tree)
            if isinstance(f, ast.FunctionDef) and "rule" in [a.arg for a in f.args.args]
        }
        for node in ast.walk(tree):
            if isinstance(node, ast.Call):
                for word in node.keywords:
                    if word.arg == "rule":
                        names |= set(_strings(word.value))
                place = at.get(getattr(node.func, "id", ""))
                if place is not None and place < len(node.args):
                    names |= set(_strings(node.args[place]))
            elif isinstance(node, ast.Assign):
                names |= set(_assigned(node.targets[0], node.value))
    return names


def test_the_readme_names_every_rule() -> None:
    names = emitted()
    # one word, several, by keyword, by position, by variable
    assert {"clash", "bend-radius", "no-lap", "lap-place", "torsion-links", "shear"} <= names
    assert len(names) > 50
    told = "\n".join(table())
    assert sorted(name for name in names if f"`{name}`" not in told) == []


def test_the_readme_names_no_other() -> None:
    told = set(re.findall(r"`([a-z]+(?:-[a-z]+)*)`", "\n".join(table())))
    assert told - emitted() == set()


def test_what_is_emitted_is_known(made: tuple[Finding, ...]) -> None:
    assert {finding.rule for finding in made} <= emitted()
