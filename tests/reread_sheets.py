"""Drawings read back: every text, dimension and bar of a sheet against schedule and cage."""

from __future__ import annotations

import re
import xml.etree.ElementTree as ET
from collections import Counter, defaultdict
from collections.abc import Iterator
from dataclasses import dataclass, field
from math import dist, inf
from pathlib import Path
from typing import Any

import ezdxf
from rereader import Disagreement, Files, crossings, measured

CALL_OUT = re.compile(r"^(\d+)-(?:\d+L-)?T\d+-(\w+)(?: |$)")
"""Number, size and mark: "3-T20-01", "20-2L-T8-10 @ 200", "2-T16-06 T1"."""

SVG = "{http://www.w3.org/2000/svg}"

NEAR = 0.1
"""A bar's circle lies where the bar is. [mm]"""

ALIKE = 1.5
"""Sections that share a letter may differ by so much. [mm]"""


@dataclass
class View:
    """What one view of a drawing holds, in model space."""

    title: str
    box: tuple[float, float, float, float]
    texts: list[tuple[str, float, float, bool]] = field(default_factory=list)
    dimensions: list[Any] = field(default_factory=list)
    marks: set[str] = field(default_factory=set)
    discs: list[tuple[float, float, float, str]] = field(default_factory=list)
    concrete: list[list[tuple[float, float]]] = field(default_factory=list)
    heavy: list[float] = field(default_factory=list)  # x of the lines that mark sections

    def holds(self, x: float, y: float) -> bool:
        x0, y0, x1, y1 = self.box
        return x0 <= x <= x1 and y0 <= y <= y1

    @property
    def call_outs(self) -> Iterator[tuple[int, str]]:
        for text, *_ in self.texts:
            found = CALL_OUT.match(text)
            if found:
                yield int(found[1]), found[2]


@dataclass
class Page:
    """One DXF file."""

    views: list[View]
    paper: list[tuple[str, float, float]]  # texts on the sheet itself
    blocks: dict[str, str]  # text drawn in a dimension's picture


def reread_sheets(files: Files) -> Iterator[Disagreement]:
    for member in files.members:
        path = files.out / "drawings" / f"{member['mark']}.dxf"
        page = open_page(path)
        rows = files.rows_of(member["mark"])
        yield from _marks(member, page, rows)
        yield from _call_outs(member, page, rows)
        yield from _table(member, page, rows)
        yield from _copies(member, page, rows)
        for view in page.views:
            yield from _dimensions(member, view, page)
            yield from _chains(member, view)
        yield from _references(member, page)
        yield from _sections(member, page)
        yield from _same_picture(member, page, path.with_suffix(".svg"))


def open_page(path: Path) -> Page:
    doc = ezdxf.readfile(path)
    views, paper = [], []
    for layout in doc.layouts:
        if layout.name == "Model":
            continue
        for port in layout.query("VIEWPORT"):
            if port.dxf.id == 1:
                continue
            x, y, _ = port.dxf.view_center_point
            tall = port.dxf.view_height / 2
            wide = tall * port.dxf.width / port.dxf.height
            views.append(View("", (x - wide, y - tall, x + wide, y + tall)))
        paper += [(t.dxf.text, *_at(t)) for t in layout.query("TEXT")]
    for entity in doc.modelspace():
        _put(entity, views)
    blocks = {
        d.dxf.geometry: next(t.dxf.text for t in doc.blocks.get(d.dxf.geometry).query("TEXT"))
        for d in doc.modelspace().query("DIMENSION")
    }
    return Page(views, paper, blocks)


def _at(text: Any) -> tuple[float, float]:
    point = text.dxf.align_point if text.dxf.halign else text.dxf.insert
    return point.x, point.y


def _put(entity: Any, views: list[View]) -> None:
    kind, layer = entity.dxftype(), entity.dxf.layer
    if kind == "TEXT":
        x, y = _at(entity)
    elif kind == "DIMENSION":
        x, y = entity.dxf.text_midpoint.x, entity.dxf.text_midpoint.y
    elif kind == "LINE":
        x, y = entity.dxf.start.x, entity.dxf.start.y
    elif kind == "LWPOLYLINE":
        x, y = entity.get_points("xy")[0]
    else:
        return
    view = next((v for v in views if v.holds(x, y)), None)
    if view is None:
        raise ValueError(f"{kind} at {x:.0f}, {y:.0f} is seen by no viewport")
    if kind == "TEXT":
        bold = layer == "S-NOTE-TITLE"
        if bold and re.search(r" 1:\d+$|^Moments", entity.dxf.text):
            view.title = entity.dxf.text
        view.texts.append((entity.dxf.text, x, y, bold))
    elif kind == "DIMENSION":
        view.dimensions.append(entity)
    elif layer == "S-SHEE-FRAME":
        view.heavy.append(x)
    elif layer == "S-CONC-OUTLINE":
        points = entity.get_points("xy") if kind == "LWPOLYLINE" else []
        ends = points or [(p.x, p.y) for p in (entity.dxf.start, entity.dxf.end)]
        view.concrete.append([(float(a), float(b)) for a, b in ends])
    elif kind == "LWPOLYLINE" and entity.has_xdata("DETAILER"):
        said = dict(v.split("=", 1) for _, v in entity.get_xdata("DETAILER") if "=" in str(v))
        view.marks.add(said["mark"])
        points = entity.get_points("xyb")
        if entity.closed and len(points) == 2 and all(abs(p[2]) == 1.0 for p in points):
            (ax, ay, _), (bx, by, _) = points
            radius = dist((ax, ay), (bx, by)) / 2 + entity.dxf.const_width / 2
            view.discs.append(((ax + bx) / 2, (ay + by) / 2, radius, said["mark"]))


def _marks(
    member: dict[str, Any], page: Page, rows: list[dict[str, str]]
) -> Iterator[Disagreement]:
    """Marks drawn, marks called out and marks scheduled are the same."""
    listed = {row["mark"] for row in rows if not row["hand"]}
    drawn = set().union(*(view.marks for view in page.views))
    called = {mark for view in page.views for _, mark in view.call_outs}
    for what, seen in (("drawn", drawn), ("called out", called)):
        for mark in sorted(seen - listed):
            yield Disagreement("marks", f"{member['mark']} {mark}", f"{what}, not scheduled")
        for mark in sorted(listed - seen):
            yield Disagreement("marks", f"{member['mark']} {mark}", f"scheduled, not {what}")


def _call_outs(
    member: dict[str, Any], page: Page, rows: list[dict[str, str]]
) -> Iterator[Disagreement]:
    """In the elevation, and once more in the bars pulled out, call-outs add up to the schedule."""
    per = {row["mark"]: int(row["per member"]) for row in rows if not row["hand"]}
    for name, titles in (
        ("elevation", ("Elevation",)),
        ("pulled out", ("Top bars", "Bottom", "Links")),
    ):
        sums: Counter[str] = Counter()
        for view in page.views:
            if view.title.startswith(titles):
                for number, mark in view.call_outs:
                    sums[mark] += number
        for mark in sorted(per):
            if sums[mark] != per[mark]:
                says = f"{sums[mark]} in the {name}, {per[mark]} scheduled"
                yield Disagreement("call-outs", f"{member['mark']} {mark}", says)


def _table(
    member: dict[str, Any], page: Page, rows: list[dict[str, str]]
) -> Iterator[Disagreement]:
    """The schedule on the sheet says what schedule.csv says."""
    heads = {"mark": "mark", "per": "per member", "mem-": "members", "total": "total"}
    heads |= {"length": "length", "dimensions": "dimensions", "size": "size"}
    places = {heads[t]: (x, y) for t, x, y in page.paper if t in heads}
    middle, top = places["mark"]
    written = [(t, y) for t, x, y in page.paper if abs(x - middle) < 0.01 and y < top and t]
    low = next(y for t, _, y in page.paper if t.startswith("total ") and " kg in " in t)
    on_sheet: dict[str, dict[str, str]] = {}
    for mark, y in written:
        if y <= low or mark == "member":
            continue
        cells = {
            key: t
            for key, (x, _) in places.items()
            for t, tx, ty in page.paper
            if abs(tx - x) < 0.01 and abs(ty - y) < 0.01
        }
        on_sheet[mark] = cells
    for mark in sorted(set(on_sheet) ^ {row["mark"] for row in rows}):
        yield Disagreement("marks", f"{member['mark']} {mark}", "in one of two schedules")
    for row in rows:
        cells = on_sheet.get(row["mark"], {})
        for key, value in cells.items():
            said = f"T{row['dia']}" if key == "size" else row[key]
            if value.removesuffix("  opposite hand") != said:
                says = f"{key} {value!r} on the sheet, {said!r} in the schedule"
                yield Disagreement("shape", f"{member['mark']} {row['mark']}", says)


def _copies(
    member: dict[str, Any], page: Page, rows: list[dict[str, str]]
) -> Iterator[Disagreement]:
    """A sheet stands for as many members as are scheduled."""
    words = " ".join(t for t, _, _ in page.paper)
    note = re.search(r"Members of this kind: (\d+) as drawn(?:, (\d+) opposite-handed)?", words)
    foot = re.search(r"kg in (\d+) members?", words)
    built = member["copies"] + member["mirrored"]
    if note is None or int(note[1]) + int(note[2] or 0) != built:
        yield Disagreement("similar", member["mark"], f"{note and note[0]}, {built} built")
    if foot is None or int(foot[1]) != built:
        yield Disagreement("similar", member["mark"], f"{foot and foot[0]}, {built} built")
    for row in rows:
        shares = [int(r["members"]) for r in rows if r["mark"].rstrip("M") == row["mark"]]
        if not row["hand"] and not built <= sum(shares) <= 2 * built:
            says = f"{row['mark']}: {sum(shares)} members of {built}"
            yield Disagreement("similar", member["mark"], says)


def _span(dimension: Any) -> tuple[bool, float, float, float]:
    """Return whether it is vertical, where its line lies, and where it begins and ends."""
    d = dimension.dxf
    if abs(d.angle - 90.0) < 1e-6:
        a, b = sorted((d.defpoint2.y, d.defpoint3.y))
        return True, d.defpoint.x, a, b
    a, b = sorted((d.defpoint2.x, d.defpoint3.x))
    return False, d.defpoint.y, a, b


def _number(dimension: Any, page: Page) -> str:
    """Return what is printed: the text of the picture."""
    return page.blocks[dimension.dxf.geometry]


def _dimensions(member: dict[str, Any], view: View, page: Page) -> Iterator[Disagreement]:
    """Every dimension measures what its text says, in its picture and by its own points."""
    for dimension in view.dimensions:
        _, _, a, b = _span(dimension)
        said = re.search(r"\d+", _number(dimension, page))
        own = dimension.dxf.text
        shown = own.replace("<>", f"{b - a:.0f}") if own else f"{b - a:.0f}"
        where = f"{member['mark']} {view.title}"
        if said is None or abs(float(said[0]) - (b - a)) > 0.5 + 1e-6:
            says = f"{_number(dimension, page)!r} printed over {b - a:.1f} mm"
            yield Disagreement("dimension", where, says)
        elif shown != _number(dimension, page):
            says = f"{_number(dimension, page)!r} in its picture, {shown!r} by itself"
            yield Disagreement("dimension", where, says)
        if abs(dimension.dxf.actual_measurement - (b - a)) > 1e-3:
            says = f"{dimension.dxf.actual_measurement} kept for {b - a:.3f} mm"
            yield Disagreement("dimension", where, says)


def chains(view: View) -> Iterator[list[tuple[float, float, str]]]:
    """Yield dimensions of one line that follow one another: begin, end, own text."""
    lines: dict[tuple[bool, float], list[tuple[float, float, str]]] = defaultdict(list)
    for dimension in view.dimensions:
        vertical, line, a, b = _span(dimension)
        lines[vertical, round(line, 1)].append((a, b, dimension.dxf.text))
    for _, links in sorted(lines.items()):
        chain: list[tuple[float, float, str]] = []
        for link in sorted(links):
            if chain and abs(chain[-1][1] - link[0]) > 0.01:
                yield chain
                chain = []
            chain.append(link)
        yield chain


def _chains(member: dict[str, Any], view: View) -> Iterator[Disagreement]:
    """Whole millimetres of a chain add up to the whole it spans."""
    for chain in chains(view):
        parts = [_whole(a, b, text) for a, b, text in chain]
        whole = chain[-1][1] - chain[0][0]
        if abs(sum(parts) - whole) > 0.5 + 1e-6:
            says = f"{'+'.join(map(str, parts))} is not {whole:.1f}"
            yield Disagreement("chain", f"{member['mark']} {view.title}", says)


def _whole(a: float, b: float, text: str) -> int:
    digits = re.search(r"\d+", text)
    return int(digits[0]) if digits else round(b - a)


def _references(member: dict[str, Any], page: Page) -> Iterator[Disagreement]:
    """Chains of the elevation run from a support's face, axis or the beam's end to another."""
    known = [p[k] for p in member["prisms"] for k in ("x0", "x1")]
    for s in member["supports"]:
        known += [s["x"], s["x"] - s["width"] / 2, s["x"] + s["width"] / 2]
    for view in page.views:
        if not view.title.startswith("Elevation"):
            continue
        for chain in chains(view):
            for end in (chain[0][0], chain[-1][1]):
                if min(abs(end - x) for x in known) > 0.5 + 1e-6:
                    says = f"a chain ends at {end:.0f}, at no face, axis or end"
                    yield Disagreement("chain", f"{member['mark']} {view.title}", says)


def section_places(view: View) -> Iterator[tuple[str, float]]:
    """Yield letters and x of the section marks of an elevation."""
    letters = [(t, x) for t, x, _, bold in view.texts if bold and re.fullmatch(r"[A-Z]{1,2}", t)]
    for text, x in letters:
        yield text, min(view.heavy, key=lambda at: abs(at - x))


def _sections(member: dict[str, Any], page: Page) -> Iterator[Disagreement]:
    """Circles of a section lie where bars cross its plane, wherever its letter stands."""
    (elevation,) = (v for v in page.views if v.title.startswith("Elevation"))
    places: dict[str, set[float]] = defaultdict(set)
    for letter, x in section_places(elevation):
        places[letter].add(x)
    lines = [(bar, measured(bar)) for bar in member["bars"] if bar["role"] not in ("link", "tie")]
    drawn = {v.title.split("-")[0]: v for v in page.views if re.match(r"[A-Z]+-[A-Z]+ 1:", v.title)}
    for letter in sorted(set(places) ^ set(drawn)):
        yield Disagreement("section", f"{member['mark']} {letter}", "marked or drawn, not both")
    for letter in sorted(set(places) & set(drawn)):
        off = [_off(member, drawn[letter], x, lines) for x in sorted(places[letter])]
        for (far, says), slack in zip(sorted(off), (NEAR, *[ALIKE] * len(off)), strict=False):
            if far > slack:
                yield Disagreement("section", f"{member['mark']} {letter}", says)


def _off(
    member: dict[str, Any], view: View, x: float, lines: list[tuple[dict[str, Any], Any]]
) -> tuple[float, str]:
    """Return how far a section's circles lie from the bars that cross x, and the worst of them."""
    rest = [
        (-(y + dy), z + dz, bar["diameter"] / 2, bar["mark"])
        for bar, line in lines
        for dx, dy, dz in bar["placings"]
        for y, z in crossings(line, x - dx)
    ]
    if len(view.discs) != len(rest):
        return inf, f"{len(view.discs)} circles for {len(rest)} bars at x {x:.0f}"
    dx, dy = _shift(member, view, x)
    worst = (0.0, "")
    for cx, cy, radius, mark in view.discs:
        at = (cx - dx, cy - dy)
        best = min(rest, key=lambda b: (b[3] != mark, dist(at, b[:2])))
        rest.remove(best)
        far = dist(at, best[:2]) if best[3] == mark and abs(best[2] - radius) < 0.01 else inf
        says = f"circle of {mark} at {at[0]:.2f}, {at[1]:.2f}: {far:.2f} off at x {x:.0f}"
        worst = max(worst, (far, says))
    return worst


def _shift(member: dict[str, Any], view: View, x: float) -> tuple[float, float]:
    """Return how far a section stands from its own axes: its soffit against the cage's."""
    webs = [p for p in member["prisms"] if p["name"].endswith(" web") and p["x0"] <= x <= p["x1"]]
    low = min(z for p in webs for _, z in p["outline"])
    left = min(-y for p in webs for y, z in p["outline"] if z == low)
    points = [p for line in view.concrete for p in line]
    floor = min(y for _, y in points)
    return min(a for a, y in points if abs(y - floor) < 0.01) - left, floor - low


def _same_picture(member: dict[str, Any], page: Page, path: Path) -> Iterator[Disagreement]:
    """The SVG shows the same words, marks and circles, view by view."""
    groups = {
        g.get("data-view"): g
        for g in ET.fromstring(path.read_text(encoding="utf-8")).iter(f"{SVG}g")
        if g.get("class") == "view"
    }
    for view in page.views:
        name = _name_of(member["mark"], view)
        where = f"{member['mark']} {view.title}"
        if name not in groups:
            yield Disagreement("picture", where, "not in the SVG")
            continue
        group = groups[name]
        shown = Counter(_text(t) for t in group.iter(f"{SVG}text"))
        texts = Counter(_spaced(t) for t, *_ in view.texts)
        texts += Counter(page.blocks[d.dxf.geometry] for d in view.dimensions)
        if shown != texts:
            odd = sorted(((shown - texts) + (texts - shown)).elements())
            yield Disagreement("picture", where, f"texts in one of two pictures: {odd[:5]}")
        tagged = {e.get("data-mark") for e in group.iter() if e.get("data-mark")}
        if view.marks - tagged:
            yield Disagreement("picture", where, f"{sorted(view.marks - tagged)} not in the SVG")
        yield from _same_circles(where, view, group)


def _name_of(mark: str, view: View) -> str:
    if view.title.startswith("Elevation"):
        return f"{mark} elevation"
    kinds = {"Top": "top bars", "Bottom": "bottom bars", "Moments,": "moments", "Links": "links"}
    first = view.title.split(" ")[0]
    return f"{mark} {kinds.get(first, first)}"


def _text(element: ET.Element) -> str:
    return _spaced("".join(element.itertext()))


def _spaced(text: str) -> str:
    return " ".join(text.split())


def _same_circles(where: str, view: View, group: ET.Element) -> Iterator[Disagreement]:
    scale = re.search(r" 1:(\d+)$", view.title)
    if scale is None or not view.discs:
        return
    k = float(scale[1])
    shown = [
        (float(c.get("cx", 0)) * k, -float(c.get("cy", 0)) * k, c.get("data-mark"))
        for c in group.iter(f"{SVG}circle")
        if c.get("data-mark")
    ]
    x0, y0, _, first = view.discs[0]
    for a, b, mark in shown:
        if mark == first and all(
            any(m == n and dist((u - a, v - b), (x - x0, y - y0)) < NEAR for u, v, n in shown)
            for x, y, _, m in view.discs
        ):
            return
    yield Disagreement("picture", where, "circles lie elsewhere in the SVG")
