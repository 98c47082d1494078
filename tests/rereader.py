"""Reads the written files back as a stranger would, and lists where they disagree.

Nothing here is shared with what wrote them: `cage.json` is read with json, `schedule.csv` with
csv, drawings with ezdxf and an XML parser, and every length is measured anew from corners and
mandrels. A disagreement says what it is about, where, and both values.
"""

from __future__ import annotations

import csv
import json
from collections import defaultdict
from collections.abc import Iterator
from dataclasses import dataclass
from itertools import pairwise
from math import acos, cos, degrees, dist, pi, radians, sin, tan
from pathlib import Path
from typing import Any, NamedTuple

STEEL = 7850e-9
"""Mass of steel. [kg/mm³]"""

EXACT = 0.06
"""The exact length is printed to a tenth. [mm]"""

XYZ = tuple[float, float, float]


class Disagreement(NamedTuple):
    """What two files, or two places of one, say differently."""

    about: str
    where: str
    says: str


@dataclass(frozen=True)
class Line:
    """A bar's centre line, measured anew."""

    legs: tuple[float, ...]  # corner to corner
    turns: tuple[float, ...]  # degrees
    length: float
    points: tuple[XYZ, ...]  # straights and finely divided arcs


@dataclass(frozen=True)
class Files:
    """What one run wrote."""

    out: Path
    rows: tuple[dict[str, str], ...]
    summary: tuple[dict[str, str], ...]
    members: tuple[dict[str, Any], ...]

    def rows_of(self, member: str) -> list[dict[str, str]]:
        return [row for row in self.rows if row["member"] == member]


def open_files(out: Path) -> Files:
    def table(name: str) -> tuple[dict[str, str], ...]:
        with (out / name).open(encoding="utf-8", newline="") as file:
            return tuple(csv.DictReader(file))

    cage = json.loads((out / "cage.json").read_text(encoding="utf-8"))
    return Files(out, table("schedule.csv"), table("summary.csv"), tuple(cage["members"]))


def reread(out: Path, *, step: float = 10.0) -> list[Disagreement]:
    """Return every disagreement in what one run wrote; `step` is that of scheduled lengths."""
    from reread_sheets import reread_sheets

    files = open_files(out)
    found: list[Disagreement] = []
    for check in (_marks, _totals, _shapes, _hands, _masses):
        found += check(files)
    found += _lengths(files, step)
    found += reread_sheets(files)
    return found


def vector(a: XYZ, b: XYZ) -> XYZ:
    return b[0] - a[0], b[1] - a[1], b[2] - a[2]


def unit(a: XYZ, b: XYZ) -> XYZ:
    x, y, z = vector(a, b)
    size = dist(a, b)
    return x / size, y / size, z / size


def along(p: XYZ, way: XYZ, far: float) -> XYZ:
    return p[0] + far * way[0], p[1] + far * way[1], p[2] + far * way[2]


def measured(bar: dict[str, Any]) -> Line:
    """Return the centre line of a bar of cage.json from its corners and mandrels."""
    corners = [tuple(map(float, c)) for c in bar["corners"]]
    total, points = 0.0, [corners[0]]
    legs = tuple(dist(a, b) for a, b in pairwise(corners))
    turns, before = [], 0.0
    for k, mandrel in enumerate(bar["mandrels"], start=1):
        into, out = unit(corners[k - 1], corners[k]), unit(corners[k], corners[k + 1])
        turn = acos(max(-1.0, min(1.0, sum(p * q for p, q in zip(into, out, strict=True)))))
        radius = (mandrel + bar["diameter"]) / 2
        reach = radius * tan(turn / 2)
        total += legs[k - 1] - before - reach + radius * turn
        turns.append(degrees(turn))
        before = reach
        points += _arc(corners[k], into, out, turn, radius)
    points.append(corners[-1])
    return Line(legs, tuple(turns), total + legs[-1] - before, tuple(points))


def _arc(corner: XYZ, into: XYZ, out: XYZ, turn: float, radius: float) -> list[XYZ]:
    """Return points of an arc that touches two straight lines meeting at a corner."""
    if turn < 1e-6:
        return [corner]
    start = along(corner, into, -radius * tan(turn / 2))
    across = along(tuple(o / sin(turn) for o in out), into, -cos(turn) / sin(turn))
    centre = along(start, across, radius)
    steps = [turn * i / 100 for i in range(101)]
    return [along(along(centre, across, -radius * cos(a)), into, radius * sin(a)) for a in steps]


def crossings(line: Line, x: float) -> Iterator[tuple[float, float]]:
    """Yield y, z where a centre line crosses a plane while it runs mostly along x."""
    for a, b in pairwise(line.points):
        if min(a[0], b[0]) <= x < max(a[0], b[0]) and abs(unit(a, b)[0]) >= 0.5:
            part = (x - a[0]) / (b[0] - a[0])
            yield a[1] + part * (b[1] - a[1]), a[2] + part * (b[2] - a[2])


def _marks(files: Files) -> Iterator[Disagreement]:
    """Marks and numbers of the schedule are those of the cage."""
    for member in files.members:
        counts: dict[str, int] = defaultdict(int)
        for bar in member["bars"]:
            counts[bar["mark"]] += len(bar["placings"])
        listed = {r["mark"]: r for r in files.rows_of(member["mark"]) if not r["hand"]}
        for mark in sorted(set(counts) ^ set(listed)):
            where = "in the schedule only" if mark in listed else "not in the schedule"
            yield Disagreement("marks", f"{member['mark']} {mark}", where)
        for mark in sorted(set(counts) & set(listed)):
            said = listed[mark]["per member"]
            if int(said) != counts[mark]:
                yield Disagreement(
                    "counts", f"{member['mark']} {mark}", f"{said} for {counts[mark]} placed"
                )


def _totals(files: Files) -> Iterator[Disagreement]:
    """Totals are numbers per member times members built, and masses follow from totals."""
    for member in files.members:
        name, built = member["mark"], member["copies"] + member["mirrored"]
        for row in files.rows_of(name):
            each, members, total = (int(row[k]) for k in ("per member", "members", "total"))
            where = f"{name} {row['mark']}"
            may = {built, member["mirrored"] if row["hand"] else member["copies"]}
            if members not in may:
                yield Disagreement("members", where, f"{members} members, {built} built")
            if each * members != total:
                yield Disagreement("total", where, f"{each} × {members} is not {total}")
            if abs(total * float(row["kg each"]) - float(row["mass"])) > 0.001 * total + 0.001:
                yield Disagreement(
                    "mass", where, f"{total} × {row['kg each']} is not {row['mass']}"
                )
            area = pi / 4 * float(row["dia"]) ** 2
            if abs(area * float(row["length"]) * STEEL - float(row["kg each"])) > 0.001:
                yield Disagreement("mass", where, f"{row['kg each']} kg for one bar")


def _lengths(files: Files, step: float) -> Iterator[Disagreement]:
    """Scheduled lengths are centre lines rounded up: no allowance twice, no deduction forgotten."""
    firsts: dict[str, dict[str, Any]] = {}
    for member in files.members:
        for bar in member["bars"]:
            firsts.setdefault(bar["mark"], bar)
            own = measured(bar)
            if abs(own.length - bar["centre_line"]) > 0.01:
                says = f"centre line {bar['centre_line']}, measured {own.length:.2f}"
                yield Disagreement("length", f"{member['mark']} {bar['id']}", says)
    for row in files.rows:
        bar = firsts.get(row["mark"]) or firsts.get(row["mark"].removesuffix("M"))
        if bar is None:
            continue
        own, said = measured(bar), float(row["length"])
        where = f"{row['member']} {row['mark']}"
        slack = max(5.0, 0.1 * bar["diameter"] * len(bar["mandrels"]))
        if said - own.length > slack + step:
            says = f"{said:g} scheduled, {own.length:.1f} measured: allowed for twice"
            yield Disagreement("length", where, says)
        if own.length - said > slack:
            says = f"{said:g} scheduled, {own.length:.1f} measured: too short"
            yield Disagreement("length", where, says)
        if abs(float(row["exact length"]) - own.length) > EXACT:
            says = f"exact length {row['exact length']}, measured {own.length:.2f}"
            yield Disagreement("length", where, says)
        yield from _by_dimensions(row, where, slack, step)


def _by_dimensions(
    row: dict[str, str], where: str, slack: float, step: float
) -> Iterator[Disagreement]:
    """A bender who follows the dimensions gets the length scheduled."""
    dims = {k: float(v) for k, v in pairs(row["dimensions"])}
    dia, shape = float(row["dia"]), row["shape"]
    radius, legs = dims.get("R", 0.0), [dims[k] for k in "ABC" if k in dims]
    quarter = pi / 2 * (radius + dia / 2)
    if shape in ("straight", "bend one end", "bends both ends"):
        bent = sum(legs) - (len(legs) - 1) * (2 * (radius + dia) - quarter)
    elif shape == "closed link, 135° hooks":
        straight = 2 * (dims["A"] + dims["E"]) - 8 * radius + 2 * dims["T"]
        bent = straight + 3 * quarter + 2 * 1.5 * quarter
    else:
        return
    said = float(row["length"])
    if not -slack <= said - bent <= slack + step:
        yield Disagreement("length", where, f"{said:g} scheduled, {bent:.0f} by its dimensions")


def pairs(text: str) -> Iterator[tuple[str, str]]:
    """Yield letters and values of "A 200  B 4672"."""
    words = text.split()
    yield from zip(words[::2], words[1::2], strict=False)


def _shapes(files: Files) -> Iterator[Disagreement]:
    """One mark is one bar wherever it stands."""
    said: dict[str, tuple[str, ...]] = {}
    for row in files.rows:
        same = tuple(row[k] for k in ("grade", "dia", "length", "shape", "dimensions"))
        if said.setdefault(row["mark"], same) != same:
            yield Disagreement("shape", f"{row['member']} {row['mark']}", f"{same}")
    seen: dict[str, tuple[dict[str, Any], Line]] = {}
    for member in files.members:
        for bar in member["bars"]:
            own = measured(bar)
            first, line = seen.setdefault(bar["mark"], (bar, own))
            if not (_alike(first, line, bar, own)):
                yield Disagreement("shape", f"{member['mark']} {bar['mark']}", f"bar {bar['id']}")


def _alike(a: dict[str, Any], line: Line, b: dict[str, Any], other: Line) -> bool:
    if any(a[k] != b[k] for k in ("grade", "diameter", "length", "shape")):
        return False
    mine = (line.legs, line.turns, tuple(a["mandrels"]))
    for way in (1, -1):
        theirs = (other.legs[::way], other.turns[::way], tuple(b["mandrels"][::way]))
        if all(
            len(p) == len(q) and all(abs(u - v) <= 1.0 for u, v in zip(p, q, strict=True))
            for p, q in zip(mine, theirs, strict=True)
        ):
            return True
    return False


def _hands(files: Files) -> Iterator[Disagreement]:
    """A bar whose mirror image is another bar has no row shared by both hands."""
    for member in files.members:
        if not member["mirrored"]:
            continue
        rows = files.rows_of(member["mark"])
        built = str(member["copies"] + member["mirrored"])
        counts: dict[str, int] = defaultdict(int)
        for bar in member["bars"]:
            counts[bar["mark"]] += len(bar["placings"])
        for bar in member["bars"]:
            if bar["role"] in ("link", "tie") or not _handed(bar):
                continue
            row = next((r for r in rows if r["mark"] == bar["mark"] and not r["hand"]), None)
            paired = [
                other["mark"]
                for other in member["bars"]
                if other["mark"] != bar["mark"]
                and other["shape"]["code"] == bar["shape"]["code"]
                and other["length"] == bar["length"]
                and counts[other["mark"]] == counts[bar["mark"]]
            ]
            if row is not None and row["members"] == built and not paired:
                yield Disagreement("hand", f"{member['mark']} {bar['mark']}", "hands share a row")


def _handed(bar: dict[str, Any]) -> bool:
    """Return whether no turning brings a bar to its mirror image: bends lie in two planes."""
    corners = bar["corners"]
    if len(corners) < 4:
        return False
    ways = [unit(a, b) for a, b in pairwise(corners)]
    spins = []
    for a, b, c in zip(ways, ways[1:], ways[2:], strict=False):
        normal = (b[1] * c[2] - b[2] * c[1], b[2] * c[0] - b[0] * c[2], b[0] * c[1] - b[1] * c[0])
        spins.append(sum(p * q for p, q in zip(a, normal, strict=True)))
    size = sin(radians(1.0))
    spins = [s if abs(s) > size**2 else 0.0 for s in spins]
    return any(spins) and not all(
        abs(s + t) < 1e-6 for s, t in zip(spins, reversed(spins), strict=True)
    )


def _masses(files: Files) -> Iterator[Disagreement]:
    """Mass before rounding is the volume of the centre lines; sums are sums."""
    exact = 0.0
    for member in files.members:
        built = member["copies"] + member["mirrored"]
        for bar in member["bars"]:
            area = pi / 4 * bar["diameter"] ** 2
            exact += built * len(bar["placings"]) * measured(bar).length * area * STEEL
    said = sum(float(row["exact mass"]) for row in files.rows)
    if abs(said - exact) > 0.001 * exact:
        yield Disagreement("mass", "schedule", f"{said:.2f} kg exact, {exact:.2f} in the cage")
    scheduled = sum(float(row["mass"]) for row in files.rows)
    (whole,) = (row for row in files.summary if row["what"] == "all")
    by_size = sum(float(row["mass kg"]) for row in files.summary if row["what"] == "size")
    by_member = sum(float(row["mass kg"]) for row in files.summary if row["what"] == "member")
    for name, value in (
        ("rows", scheduled),
        ("sizes", by_size),
        ("members", by_member),
    ):
        if abs(value - float(whole["mass kg"])) > 0.01 * (1 + len(files.summary)):
            says = f"{name} {value:.2f} kg, in all {whole['mass kg']}"
            yield Disagreement("mass", "summary", says)
