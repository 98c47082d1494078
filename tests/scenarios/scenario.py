"""Whole beams as an office meets them: written as a project file, placed, checked, asked.

All names are invented; the numbers are common practice without a source, or our own calculation.
Loads in the files are characteristic: 2/3 of the factored ones the tests speak of.
"""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass
from functools import cached_property
from pathlib import Path

from detailer import pipeline
from detailer.cage.bar import Bar, Cage
from detailer.checks import Case
from detailer.findings import Finding
from detailer.model import Beam, Project
from detailer.reading import read_project
from detailer.schedule import Row
from detailer.strength.development import Rod
from detailer.values import Face, Role

MEGA = 1e6
"""kN·m in N·mm."""


@dataclass(frozen=True, slots=True, kw_only=True)
class Line:
    """One beam line as a drafter would write it."""

    mark: str
    width: int
    depth: int
    supports: Sequence[str]  # TOML of each, without `at`
    spans: Sequence[str]  # TOML of each
    steel: Sequence[str]  # [[beam.bars]] and [[beam.links]] tables
    cover: int = 30
    column: tuple[int, int] = (300, 300)  # along, across
    results: str = ""  # stations, as CSV
    more: str = ""  # further keys of the beam
    exposure: str = "moderate"

    def text(self) -> str:
        """Return the project file."""
        supports = "".join(
            f'  {{ at = "{chr(65 + n)}1", {support} }},\n'
            for n, support in enumerate(self.supports)
        )
        spans = "".join(f"  {{ {span} }},\n" for span in self.spans)
        stations = 'results = "stations.csv"\n' if self.results else ""
        return (
            HEADER.format(
                along=self.column[0],
                across=self.column[1],
                exposure=self.exposure,
                title=self.mark,
            )
            + f'[[beam]]\nmark = "{self.mark}"\n'
            f"section = {{ width = {self.width}, depth = {self.depth} }}\n"
            f"cover = {self.cover}\n{stations}{self.more}"
            f"support = [\n{supports}]\nspan = [\n{spans}]\n" + "".join(self.steel)
        )


HEADER = """[project]
number = "SK-40"
title = "Saltmarsh Kiln, {title}"
code = "IS 456"
bending = "IS 2502"
ductile = false

[issue]
revision = "A"
date = 2026-02-02

[concrete]
grade = "M25"
aggregate = 20
exposure = "{exposure}"
fire_hours = 1

[steel]
main = "Fe 500"
links = "Fe 415"
stock = 12000

[[column]]
mark = "K1"
size = [{along}, {across}]
bars = "4T16"
links = "T8@150"
cover = 40

"""

COLUMN = 'column = "K1"'


def loaded(
    length: int, dead: float, imposed: float, *, kind: str = "length", more: str = ""
) -> str:
    """Return a span under factored loads [kN/m], written as the characteristic ones."""
    return f"{kind} = {length}, dead = {dead / 1.5:.6g}, imposed = {imposed / 1.5:.6g}{more}"


def _bars(face: str, where: str, bars: str, more: str) -> str:
    return f'\n[[beam.bars]]\nface = "{face}"\n{where}\nbars = "{bars}"\n{more}'


def top(span: str, bars: str, more: str = "") -> str:
    """Return top bars along spans."""
    return _bars("top", f'span = "{span}"', bars, more)


def bottom(span: str, bars: str, more: str = "") -> str:
    """Return bottom bars along spans."""
    return _bars("bottom", f'span = "{span}"', bars, more)


def over(support: str, bars: str, more: str = "") -> str:
    """Return top bars over a support."""
    return _bars("top", f'support = "{support}"', bars, more)


def side(span: str, bars: str) -> str:
    """Return side bars, of each face."""
    return _bars("side", f'span = "{span}"', bars, "")


def links(span: int, *zones: str) -> str:
    """Return the links of a span."""
    return f"\n[[beam.links]]\nspan = {span}\nzones = {list(zones)}\n"


def terrace(
    spans: Sequence[int], through: str, extras: str, below: Sequence[str], *, depth: int = 500
) -> Line:
    """Return a line of 230 under 24 + 12 kN/m: bars through, and extras over inner supports."""
    count = len(spans)
    return Line(
        mark=f"SK2{count}",
        width=230,
        depth=depth,
        supports=[COLUMN] * (count + 1),
        spans=[loaded(span, 24, 12) for span in spans],
        steel=[
            top(f"1-{count}", through),
            *[over(f"{chr(65 + n)}1", extras) for n in range(1, count)],
            *below,
            *[links(n, "2L-T8@200") for n in range(1, count + 1)],
        ],
    )


@dataclass(frozen=True)
class Scenario:
    """A beam placed and checked."""

    project: Project
    case: Case
    rows: tuple[Row, ...]
    findings: tuple[Finding, ...]

    @property
    def beam(self) -> Beam:
        return self.case.beam

    @property
    def cage(self) -> Cage:
        return self.case.cage

    @cached_property
    def blocking(self) -> set[tuple[str, str]]:
        """Return (rule, place) of what is unsafe or unbuildable."""
        return {(f.rule, f.place.name) for f in self.findings if f.severity.blocks}

    def found(self, rule: str, place: str | None = None) -> list[Finding]:
        return [f for f in self.findings if f.rule == rule and place in (None, f.place.name)]

    def one(self, rule: str, place: str | None = None) -> Finding:
        """Return the only finding of a rule (at a place)."""
        found = self.found(rule, place)
        assert len(found) == 1, [f.message for f in self.findings]
        return found[0]

    def rods(self, face: Face, dia: int, role: Role = Role.MAIN) -> list[Rod]:
        """Return the real bars of a face and size, left to right."""
        roles = {bar.id: bar.role for bar in self.cage.bars}
        mine = [
            rod
            for rod in self.case.steel.bars
            if rod.face is face and rod.dia == dia and roles[rod.id] is role
        ]
        return sorted(mine, key=lambda rod: (rod.tips, rod.id, rod.placing))

    def bars(self, role: Role) -> list[Bar]:
        return [bar for bar in self.cage.bars if bar.role is role]

    def link_xs(self, span: int) -> list[float]:
        """Return where links stand between the faces of a span."""
        x0, x1 = self.beam.clear(self.beam.spans[span - 1])
        return sorted({s.x for s in self.case.shear.sets if x0 < s.x < x1})

    def hogging_ends(self, span: int) -> list[float]:
        """Return how far from the nearer end of a span its hogging envelope is zero."""
        assert self.case.envelope is not None
        here = self.beam.spans[span - 1]
        zeros = self.case.envelope.inflections(here, hogging=True)
        return [min(x - here.x0, here.x1 - x) for x in zeros]

    def sagging(self, span: int) -> tuple[float, float]:
        """Return where a span sags most, from its left end, and by how much [kN·m]."""
        assert self.case.envelope is not None
        here = self.beam.spans[span - 1]
        x, moment = self.case.envelope.peak_sagging(here)
        return x - here.x0, moment / MEGA

    def hogging(self, support: int) -> float:
        """Return the greatest hogging moment at the faces of a support [kN·m]."""
        assert self.case.envelope is not None
        return self.case.envelope.peak_hogging(support) / MEGA

    def reaches(self, support: int, dia: int) -> set[tuple[int, int]]:
        """Return how far top bars over one support go past its faces, left and right."""
        at = self.beam.supports[support]
        others = [s for s in self.beam.supports if s is not at]
        return {
            (round(at.left - rod.tips[0]), round(rod.tips[1] - at.right))
            for rod in self.rods(Face.TOP, dia)
            if rod.covers(at.x) and not any(rod.covers(s.x) for s in others)
        }

    def moment(self, x: float) -> tuple[float, float]:
        """Return the design moments [kN·m] at x."""
        assert self.case.envelope is not None
        least, most = self.case.envelope.moment(x)
        return least / MEGA, most / MEGA


def build(folder: Path, line: Line) -> Scenario:
    """Return a beam line placed and checked."""
    (folder / "project.toml").write_text(line.text(), encoding="utf-8")
    if line.results:
        (folder / "stations.csv").write_text(line.results, encoding="utf-8")
    project = read_project(folder / "project.toml")
    made = pipeline.placed(project)
    case = Case(
        project=project,
        beam=project.beams[0],
        envelope=made.envelopes[0],
        cage=made.cages[0],
    )
    return Scenario(project=project, case=case, rows=made.rows, findings=pipeline.findings_of(made))
