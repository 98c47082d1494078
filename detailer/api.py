"""The verbs of the command line for Python: read, draw, check, schedule, start.

>>> from detailer import api
>>> made = api.draw("project.toml", "OUT")  # doctest: +SKIP
"""

from __future__ import annotations

from dataclasses import dataclass
from importlib.resources import files
from pathlib import Path

from detailer import pipeline
from detailer.checks import CHECKS
from detailer.errors import InputError, Refused
from detailer.findings import Finding
from detailer.model import Project
from detailer.pipeline import Progress, quiet
from detailer.schedule import Row, Summary, summarise

DEMO = "tern-quay.toml"
"""The project that is drawn when none is named."""


@dataclass(frozen=True, slots=True, kw_only=True)
class Drawn:
    """What one run wrote."""

    out: Path
    files: tuple[str, ...]
    findings: tuple[Finding, ...]


@dataclass(frozen=True, slots=True, kw_only=True)
class Scheduled:
    """The schedule of a project."""

    rows: tuple[Row, ...]
    summary: Summary


def read(project: str | Path | None = None) -> Project:
    """Return a project as read.

    Parameters
    ----------
    project : path, optional
        The project file; the demo where absent.

    Raises
    ------
    Refused
        With every error of the input.
    """
    from detailer.reading import read_project

    if project is not None:
        return read_project(Path(project))
    return read_project(Path(str(files("detailer.demo"))) / DEMO)


def draw(
    project: str | Path | None = None, out: str | Path = "OUT", *, progress: Progress = quiet
) -> Drawn:
    """Write drawings, schedule, findings, cage and the page of a project.

    Parameters
    ----------
    project : path, optional
        The project file; the demo where absent.
    out : path
        Folder to write to; every file is written, or none is.
    progress : callable
        Told what is being done, how far, of how many.

    Raises
    ------
    Refused
        With every error of the input.
    """
    target = Path(out)
    names, findings = pipeline.write(read(project), target, progress)
    return Drawn(out=target, files=names, findings=findings)


def check(project: str | Path | None = None, *, progress: Progress = quiet) -> tuple[Finding, ...]:
    """Return the findings of a project, by support, worst first.

    Parameters
    ----------
    project : path, optional
        The project file; the demo where absent.
    progress : callable
        Told what is being done, how far, of how many.

    Raises
    ------
    Refused
        With every error of the input.
    """
    return pipeline.findings_of(pipeline.placed(read(project), progress), progress)


def questions() -> tuple[str, ...]:
    """Return every question that the checks ask; what is not among them is not checked."""
    return tuple(question for question, _ in CHECKS)


def schedule(project: str | Path | None = None, *, progress: Progress = quiet) -> Scheduled:
    """Return the rows and masses of a project.

    Parameters
    ----------
    project : path, optional
        The project file; the demo where absent.
    progress : callable
        Told what is being done, how far, of how many.

    Raises
    ------
    Refused
        With every error of the input.
    """
    made = pipeline.placed(read(project), progress)
    return Scheduled(rows=made.rows, summary=summarise(made.cages, made.rows))


def start(folder: str | Path) -> tuple[Path, ...]:
    """Write the demo project as files to begin from, and return them.

    Parameters
    ----------
    folder : path
        Where to; no file of it is overwritten.

    Raises
    ------
    Refused
        Where a file of that name is there already.
    """
    demo = [
        item for item in files("detailer.demo").iterdir() if item.name.endswith((".toml", ".csv"))
    ]
    target = Path(folder)
    there = [target / item.name for item in demo if (target / item.name).exists()]
    if there:
        raise Refused(
            InputError(
                file=str(path),
                line=None,
                field="start",
                problem="is there already",
                remedy="Name an empty folder",
            )
            for path in there
        )
    target.mkdir(parents=True, exist_ok=True)
    made = []
    for item in sorted(demo, key=lambda entry: entry.name):
        (target / item.name).write_bytes(item.read_bytes())
        made.append(target / item.name)
    return tuple(made)
