"""The commands: draw, check, schedule, start. They parse, call, print, and tell by exit codes."""

from __future__ import annotations

import argparse
import sys
import time

from detailer import __version__

TYPE_CHECKING = False
if TYPE_CHECKING:
    from collections.abc import Sequence

    from detailer.api import Scheduled
    from detailer.errors import Refused
    from detailer.findings import Finding

CLEAN, FOUND, BAD_INPUT = 0, 1, 2
PATIENCE = 2.0
"""Work that takes longer reports its progress. [s]"""


def main(arguments: Sequence[str] | None = None) -> int:
    """Run one command and return its exit code: 0 clean, 1 findings that block, 2 bad input.

    Parameters
    ----------
    arguments : sequence of str, optional
        As typed; those of the process where absent.
    """
    given = _parser().parse_args(arguments)
    if given.command is None:
        _parser().print_help()
        return CLEAN
    from detailer.errors import Refused

    try:
        return _run(given)
    except Refused as refused:
        return _refuse(refused)
    except OSError as problem:
        print(f"detailer: {problem}", file=sys.stderr)
        return BAD_INPUT


def _parser() -> argparse.ArgumentParser:
    parser = argparse.ArgumentParser(
        prog="detailer",
        description="From reinforced-concrete design results to placed bars, checked drawings "
        "and a bar bending schedule.",
    )
    parser.add_argument("--version", action="version", version=f"detailer {__version__}")
    commands = parser.add_subparsers(dest="command", metavar="COMMAND")
    about = "project file; the Tern Quay demo where absent"
    draw = commands.add_parser("draw", help="write drawings, schedule, findings and a page")
    draw.add_argument("project", nargs="?", metavar="PROJECT", help=about)
    draw.add_argument("-o", "--out", default="OUT", help="folder to write to (default: OUT)")
    check = commands.add_parser("check", help="print the findings; exit 1 if any blocks")
    check.add_argument("project", nargs="?", metavar="PROJECT", help=about)
    schedule = commands.add_parser("schedule", help="print the bar bending schedule")
    schedule.add_argument("project", nargs="?", metavar="PROJECT", help=about)
    start = commands.add_parser("start", help="write the demo as a project to begin from")
    start.add_argument("folder", metavar="DIR")
    return parser


def _run(given: argparse.Namespace) -> int:
    from detailer import api

    match given.command:
        case "draw":
            made = api.draw(given.project, given.out, progress=_Reporter())
            print(f"{len(made.files)} files written to {made.out}")
            print(_count(made.findings))
            return CLEAN
        case "check":
            found = api.check(given.project, progress=_Reporter())
            _print_findings(found)
            print(f"Asked: {'; '.join(api.questions())}. What is not named is not checked.")
            return FOUND if any(item.severity.blocks for item in found) else CLEAN
        case "schedule":
            _print_schedule(api.schedule(given.project, progress=_Reporter()))
            return CLEAN
        case _:
            for path in api.start(given.folder):
                print(path)
            return CLEAN


class _Reporter:
    """Says on stderr how far long work has come, at most once a second."""

    def __init__(self) -> None:
        self._next = time.monotonic() + PATIENCE

    def __call__(self, what: str, done: int, of: int) -> None:
        """Report one step."""
        if time.monotonic() >= self._next:
            self._next = time.monotonic() + 1.0
            print(f"{what} ({done} of {of})", file=sys.stderr, flush=True)


def _refuse(refused: Refused) -> int:
    for error in refused.errors:
        print(error, file=sys.stderr)
    count = len(refused.errors)
    print(f"{count} error{'s' if count != 1 else ''}; nothing was written.", file=sys.stderr)
    return BAD_INPUT


def _count(found: tuple[Finding, ...]) -> str:
    from detailer.values import Severity

    counts = (
        (sum(1 for item in found if item.severity is severity), severity.value)
        for severity in Severity
    )
    listed = ", ".join(f"{count} {word}" for count, word in counts)
    return f"{len(found)} finding{'s' if len(found) != 1 else ''}: {listed}"


def _print_findings(found: tuple[Finding, ...]) -> None:
    from detailer.values import CAUTION

    before = None
    for item in found:
        where = (item.member, item.place)
        if where != before:
            name = item.place.name
            print(item.member if name == item.member else f"{item.member}, {name}")
            before = where
        marks = f" [{', '.join(item.bars)}]" if item.bars else ""
        print(f"  {item.severity.value.upper():<11} {item.rule} at x {item.x:.0f}{marks}")
        print(f"    {item.message}")
        print(
            f"    found {item.found:g} {item.unit}, required {item.required:g} {item.unit}"
            f" ({item.clause})"
        )
        print(f"    change: {item.remedy}")
        if item.site:
            print(f"    otherwise site will: {item.site}")
    print(_count(found))
    print(CAUTION)


def _print_schedule(made: Scheduled) -> None:
    from detailer.values import CAUTION

    form = "{:<8} {:<5} {:<9} {:>3} {:>4} {:>4} {:>5} {:>7} {:>9}  {}"
    print(
        form.format(
            "member", "mark", "grade", "dia", "per", "off", "total", "length", "mass kg", "shape"
        )
    )
    for row in made.rows:
        dims = " ".join(f"{letter}{value:g}" for letter, value in row.shape.dimensions)
        print(
            form.format(
                row.member,
                row.mark,
                row.grade,
                f"{row.dia:g}",
                row.per_member,
                row.members,
                row.total,
                f"{row.length:g}",
                f"{row.mass:.1f}",
                f"{row.shape.code}: {dims}",
            )
        )
    print()
    for size in made.summary.sizes:
        print(f"{size.grade} {size.dia:g} mm: {size.mass:.1f} kg")
    total = made.summary
    print(f"all: {total.mass:.1f} kg, of it laps {total.laps:.1f}, spacers {total.spacers:.1f}")
    print(CAUTION)
