"""What a run costs: `python -m tests.bench.bench_project`.

A seeded project of random beams is drawn whole, and against it the same finished primitives are
merely written to the same files with the same writers: the floor. Runs are paired, minima are
compared. Memory and the cost of long projects are measured in processes of their own.
"""

from __future__ import annotations

import argparse
import gc
import json
import resource
import shutil
import subprocess
import sys
import tempfile
import time
from collections.abc import Callable
from dataclasses import dataclass
from pathlib import Path

sys.path.insert(0, str(Path(__file__).parents[1]))

from generator import Draft

BEAMS = 200
ROUNDS = 3
SEED = 1000

TARGETS = {
    "ratio to the floor": 1.5,
    "help to a bare interpreter": 3.0,
    "memory a beam, kB": 100.0,
    "cost a beam, longest to shortest project": 1.1,
}


def project_text(beams: int, *, seed: int = SEED, kinds: int | None = None) -> str:
    """Return a project file of random beams; with `kinds` so many differ and then repeat."""
    drafts = []
    for number in range(beams):
        draft = Draft(seed + number % (kinds or beams), mark=f"RB{number + 1}")
        draft.fck, draft.fy, draft.cover = 30, 500, max(30, draft.cover)
        drafts.append(draft)
    head = drafts[0].header().partition("[[column]]")[0]
    columns, lines = [], []
    for number, draft in enumerate(drafts, start=1):
        table = draft.header().partition("[[column]]")[2]
        columns.append("[[column]]" + table.replace('"C1"', f'"C{number}"', 1))
        lines.append(draft.beam().replace('column = "C1"', f'column = "C{number}"'))
    return head + "\n".join(columns) + "\n" + "\n".join(lines)


@dataclass
class Finished:
    """Everything a run writes, made before the clock starts."""

    writes: list[tuple[str, Callable[[], bytes]]]

    def write(self, out: Path) -> None:
        for name, make in self.writes:
            path = out / name
            path.parent.mkdir(parents=True, exist_ok=True)
            path.write_bytes(make())


def finished(project_file: Path) -> Finished:
    """Return the writers of a run with their drawings, rows and findings already made."""
    from detailer import pipeline
    from detailer.cage.wire import to_json
    from detailer.checks import CHECKS
    from detailer.output import csv, html
    from detailer.output import json as json_files
    from detailer.output.dxf import dxf_bytes
    from detailer.output.files import safe_names
    from detailer.output.svg import svg_text
    from detailer.reading import read_project
    from detailer.schedule import summarise
    from detailer.values import CAUTION
    from detailer.views.sheet import beam_drawing

    project = read_project(project_file)
    made = pipeline.placed(project)
    found = pipeline.findings_of(made)
    stems = safe_names(tuple(beam.mark for beam in project.beams))
    drawings = [
        beam_drawing(
            project, beam, envelope, cage, found, made.rows, assumptions=project.assumptions
        )
        for beam, envelope, cage in zip(project.beams, made.envelopes, made.cages, strict=True)
    ]
    summary = summarise(made.cages, made.rows)
    texts: dict[str, str] = {}

    def svg(stem: str, number: int) -> bytes:
        texts[stem] = svg_text(drawings[number])
        return texts[stem].encode("utf-8")

    def page() -> bytes:
        members = tuple(
            html.Member(
                mark=beam.mark,
                anchor=f"beam-{stem}",
                about="1 off",
                drawing=lambda stem=stem: texts[stem],
                links=((f"drawings/{stem}.dxf", "DXF"), (f"drawings/{stem}.svg", "SVG")),
            )
            for beam, stem in zip(project.beams, stems, strict=True)
        )
        head = html.Head(number=project.number, title=project.title, part=project.part, facts=())
        content = html.Page(
            head=head,
            findings=found,
            asked=tuple(question for question, _ in CHECKS),
            members=members,
            rows=made.rows,
            summary=summary,
            assumptions=project.assumptions,
            doubts=project.doubts,
            links=(),
        )
        return "".join(html.page(content)).encode("utf-8")

    date = project.issue.date
    writes: list[tuple[str, Callable[[], bytes]]] = []
    for number, stem in enumerate(stems):
        writes += [
            (
                f"drawings/{stem}.dxf",
                lambda n=number: dxf_bytes(drawings[n], caution=CAUTION, date=date),
            ),
            (f"drawings/{stem}.svg", lambda s=stem, n=number: svg(s, n)),
        ]
    writes += [
        ("schedule.csv", lambda: csv.schedule(made.rows)),
        ("summary.csv", lambda: csv.summary(summary)),
        ("findings.json", lambda: json_files.findings(found)),
        ("cage.json", lambda: to_json(made.cages, project).encode("utf-8")),
        ("index.html", page),
    ]
    return Finished(writes)


def clocked(work: Callable[[], object]) -> float:
    """Return the processor time of some work. [s]"""
    gc.collect()
    start = time.process_time()
    work()
    return time.process_time() - start


def paired(beams: int, rounds: int) -> dict[str, float]:
    """Return the least time of whole runs and of the floor, taken in turns. [s]"""
    from detailer import api

    with tempfile.TemporaryDirectory() as name:
        folder = Path(name)
        file = folder / "project.toml"
        file.write_text(project_text(beams), encoding="utf-8")
        api.draw(out=folder / "warm")
        ready = finished(file)
        whole, floor = [], []
        for turn in range(rounds):
            whole.append(clocked(lambda: api.draw(file, folder / "whole")))
            floor.append(clocked(lambda turn=turn: ready.write(folder / f"floor{turn}")))
            shutil.rmtree(folder / f"floor{turn}")
    return {"whole": min(whole), "floor": min(floor)}


def alone(beams: int, kinds: int) -> dict[str, float]:
    """Return processor time and peak memory of one run in a process of its own. [s, kB]"""
    with tempfile.TemporaryDirectory() as name:
        file = Path(name) / "project.toml"
        file.write_text(project_text(beams, kinds=kinds), encoding="utf-8")
        told = subprocess.run(
            [sys.executable, __file__, "--one", str(file), str(Path(name) / "OUT")],
            check=True,
            capture_output=True,
            text=True,
        )
    return dict(json.loads(told.stdout.splitlines()[-1]))


def one(file: str, out: str) -> None:
    """Draw one project and print what it took."""
    from detailer import api

    api.draw(out=Path(out) / "warm")
    start = time.process_time()
    api.draw(file, Path(out) / "run")
    took = time.process_time() - start
    print(json.dumps({"time": took, "peak": resource.getrusage(resource.RUSAGE_SELF).ru_maxrss}))


def start_up(rounds: int = 9) -> dict[str, float]:
    """Return the least time of `detailer --help` and of an interpreter that does nothing. [s]"""

    def least(*arguments: str) -> float:
        best = float("inf")
        for _ in range(rounds):
            start = time.perf_counter()
            subprocess.run([sys.executable, *arguments], check=True, capture_output=True)
            best = min(best, time.perf_counter() - start)
        return best

    return {"help": least("-m", "detailer", "--help"), "bare": least("-c", "pass")}


def report(beams: int, rounds: int, longest: int) -> list[tuple[str, float, float]]:
    """Measure, print, and return what is measured against a target: name, value, target."""
    times = paired(beams, rounds)
    whole, floor = times["whole"] / beams * 1e3, times["floor"] / beams * 1e3
    print(f"{beams} beams: {whole:.0f} ms a beam, floor {floor:.0f} ms")
    starts = start_up()
    print(f"--help {starts['help'] * 1e3:.0f} ms, bare {starts['bare'] * 1e3:.0f} ms")
    kinds = min(10, beams)
    lengths = sorted({kinds, max(kinds, longest // 10), longest})
    runs = {count: alone(count, kinds) for count in lengths}
    for count, run in runs.items():
        each = run["time"] / count * 1e3
        print(f"{count} beams: {each:.0f} ms a beam, peak {run['peak']:.0f} kB")
    short, long = runs[lengths[0]], runs[lengths[-1]]
    apart = max(lengths[-1] - lengths[0], 1)
    results = {
        "ratio to the floor": whole / floor,
        "help to a bare interpreter": starts["help"] / starts["bare"],
        "memory a beam, kB": (long["peak"] - short["peak"]) / apart,
        "cost a beam, longest to shortest project": (long["time"] / lengths[-1])
        / (short["time"] / lengths[0]),
    }
    for name, value in results.items():
        good = "met" if value <= TARGETS[name] else "MISSED"
        print(f"{name}: {value:.2f} (target {TARGETS[name]:g}, {good})")
    return [(name, value, TARGETS[name]) for name, value in results.items()]


def main() -> None:
    parser = argparse.ArgumentParser(description=__doc__)
    parser.add_argument("--beams", type=int, default=BEAMS)
    parser.add_argument("--rounds", type=int, default=ROUNDS)
    parser.add_argument("--longest", type=int, default=1000)
    parser.add_argument("--one", nargs=2, metavar=("PROJECT", "OUT"), help=argparse.SUPPRESS)
    given = parser.parse_args()
    if given.one:
        one(*given.one)
    else:
        report(given.beams, given.rounds, given.longest)


if __name__ == "__main__":
    main()
