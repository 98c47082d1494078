"""The way of the data: project, envelopes, cages, marks, findings, drawings, files."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass
from pathlib import Path
from typing import TypeAlias

from detailer.cage.bar import Cage
from detailer.cage.wire import to_json
from detailer.checks import CHECKS, Case, run
from detailer.findings import Finding, ordered
from detailer.model import Beam, Project
from detailer.output import csv, html, json
from detailer.output.files import Batch, safe_names, whole
from detailer.placing import place
from detailer.schedule import Row, number, rows, summarise
from detailer.statics import Envelope, envelope
from detailer.strength.slices import Steel
from detailer.values import CAUTION

Progress: TypeAlias = Callable[[str, int, int], None]
"""Told what is being done, to which one, of how many."""


def quiet(what: str, done: int, of: int) -> None:
    """Report no progress.

    Parameters
    ----------
    what : str
        What is being done.
    done, of : int
        How far, of how many.
    """


@dataclass(frozen=True, slots=True, kw_only=True)
class Placed:
    """A project with its steel placed and numbered."""

    project: Project
    envelopes: tuple[Envelope | None, ...]
    cages: tuple[Cage, ...]
    rows: tuple[Row, ...]


def placed(project: Project, progress: Progress = quiet) -> Placed:
    """Return every beam's cage, with marks.

    Parameters
    ----------
    project : Project
        As read.
    progress : callable
        Told of each beam.
    """
    envelopes: list[Envelope | None] = []
    cages: list[Cage] = []
    for n, beam in enumerate(project.beams, start=1):
        progress(f"placing {beam.mark}", n, len(project.beams))
        envelopes.append(envelope(project, beam))
        cages.append(place(project, beam, envelopes[-1]))
    numbered = number(tuple(cages), project)
    return Placed(project=project, envelopes=tuple(envelopes), cages=numbered, rows=rows(numbered))


def findings_of(made: Placed, progress: Progress = quiet) -> tuple[Finding, ...]:
    """Return the findings of every beam, by support, worst first.

    Parameters
    ----------
    made : Placed
        The project with its steel.
    progress : callable
        Told of each beam.
    """
    found: list[Finding] = []
    for n, beam in enumerate(made.project.beams):
        progress(f"checking {beam.mark}", n + 1, len(made.project.beams))
        found += run(_case(made, n))
    return ordered(found)


def _case(made: Placed, n: int) -> Case:
    """Return one beam as the checks see it."""
    project = made.project
    return Case(
        project=project, beam=project.beams[n], envelope=made.envelopes[n], cage=made.cages[n]
    )


def write(
    project: Project, target: Path, progress: Progress = quiet
) -> tuple[tuple[str, ...], tuple[Finding, ...]]:
    """Write every file of a run; return their names and the findings.

    Parameters
    ----------
    project : Project
        As read.
    target : Path
        Folder to write to.
    progress : callable
        Told of each beam.
    """
    made = placed(project, progress)
    every: list[Finding] = []
    with whole(target) as batch:
        stems = safe_names(tuple(beam.mark for beam in project.beams))
        for n, stem in enumerate(stems):
            progress(f"checking and drawing {project.beams[n].mark}", n + 1, len(stems))
            case = _case(made, n)
            mine = run(case)
            _draw(batch, made, n, stem, mine, case.steel)
            every += mine
        found = ordered(every)
        batch.write("schedule.csv", csv.schedule(made.rows))
        summary = summarise(made.cages, made.rows)
        batch.write("summary.csv", csv.summary(summary))
        batch.write("findings.json", json.findings(found))
        batch.write("cage.json", to_json(made.cages, project).encode("utf-8"))
        batch.write(
            "assumptions.json",
            json.assumptions(project.number, project.assumptions, project.doubts),
        )
        content = html.Page(
            head=_head(project),
            findings=found,
            asked=tuple(question for question, _ in CHECKS),
            members=tuple(
                _member(batch, beam, stem) for beam, stem in zip(project.beams, stems, strict=True)
            ),
            rows=made.rows,
            summary=summary,
            assumptions=project.assumptions,
            doubts=project.doubts,
            links=tuple((name, name) for name in batch.names),
        )
        with batch.path("index.html").open("w", encoding="utf-8", newline="\n") as file:
            file.writelines(html.page(content))
        names = batch.names
    return names, found


def _draw(
    batch: Batch, made: Placed, n: int, stem: str, found: tuple[Finding, ...], steel: Steel
) -> None:
    """Write the drawing of one beam; nothing of it is kept."""
    from detailer.output.dxf import dxf_bytes
    from detailer.output.svg import svg_text
    from detailer.views.sheet import beam_drawing

    project = made.project
    drawing = beam_drawing(
        project,
        project.beams[n],
        made.envelopes[n],
        made.cages[n],
        found,
        made.rows,
        assumptions=project.assumptions,
        steel=steel,
    )
    date = project.issue.date
    batch.write(f"drawings/{stem}.dxf", dxf_bytes(drawing, caution=CAUTION, date=date))
    batch.write(f"drawings/{stem}.svg", svg_text(drawing).encode("utf-8"))


def _member(batch: Batch, beam: Beam, stem: str) -> html.Member:
    name = f"drawings/{stem}.svg"
    built = f"{beam.copies} off"
    if beam.mirrored:
        built += f", {beam.mirrored} opposite hand"
    return html.Member(
        mark=beam.mark,
        anchor=f"beam-{stem}",
        about=built,
        drawing=lambda: batch.read(name).decode("utf-8"),
        links=((f"drawings/{stem}.dxf", "DXF"), (name, "SVG")),
    )


def _head(project: Project) -> html.Head:
    issue = project.issue
    facts = (
        ("revision", issue.revision),
        ("date", issue.date),
        ("purpose", issue.purpose),
        ("concrete", project.concrete.grade),
        ("steel", f"{project.steel.main.name}, links {project.steel.links.name}"),
        ("code", f"{project.code}, {project.bending}"),
        ("drawn", issue.drawn),
        ("checked", issue.checked or "–"),
    )
    return html.Head(
        number=project.number,
        title=project.title,
        part=project.part,
        facts=tuple((name, value) for name, value in facts if value),
    )
