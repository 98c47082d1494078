"""The tables that speak of the whole project: project, issue, concrete, steel, practice, grid."""

from __future__ import annotations

import math
import re
from dataclasses import dataclass
from datetime import date

from detailer.model import Concrete, Grid, Issue, Practice, Steel, SteelGrade
from detailer.model.materials import SIZE_OVER_RIBS
from detailer.reading.table import Log, Table
from detailer.values import Exposure

GRADES = {
    grade.name: grade
    for grade in (
        SteelGrade("Fe 500", 500),
        SteelGrade("Fe 500D", 500),
        SteelGrade("Fe 500S", 500),
        SteelGrade("Fe 415", 415),
        SteelGrade("Fe 415D", 415),
        SteelGrade("Fe 415S", 415),
        SteelGrade("Fe 550", 550),
        SteelGrade("Fe 550D", 550),
        SteelGrade("Fe 250", 250, deformed=False),
    )
}
"""Grades of steel that can be written: IS 1786, and IS 432 for plain bars (FROM MEMORY)."""

STRENGTHS = {f"M{n}": float(n) for n in range(20, 60, 5)}
"""Grades of concrete within IS 456: M20 at least (6.1.2), up to M55 (FROM MEMORY)."""

FIRE_HOURS = (0.5, 1.0, 1.5, 2.0, 3.0, 4.0)
"""Fire ratings of IS 456, Table 16A. [h]"""

STOCK = 12000.0
"""Usual longest bar delivered. [mm]"""

AGGREGATE = 20.0
"""Usual nominal maximum size of aggregate. [mm]"""


@dataclass(frozen=True, slots=True, kw_only=True)
class Header:
    """What `[project]` says."""

    number: str
    title: str
    part: str
    owner: str
    code: str
    bending: str
    ductile: bool
    lateral: bool


def read_header(root: Table) -> Header:
    """Read `[project]`."""
    keys = ("number", "title", "part", "owner", "code", "bending", "ductile", "lateral")
    table = root.table("project", keys, needed=True)
    code = table.text("code", example='"IS 456"')
    if table.clean("code") and code != "IS 456":
        table.refuse("code", "this code is not built yet", 'Write code = "IS 456"')
    bending = table.text("bending", example='"IS 2502"')
    if table.clean("bending") and bending != "IS 2502":
        table.refuse(
            "bending", "this bending standard is not built yet", 'Write bending = "IS 2502"'
        )
    ductile = table.flag("ductile")
    if ductile:
        table.refuse(
            "ductile",
            "ductile detailing (IS 13920) is not built yet",
            "Write ductile = false only where the building needs none",
        )
    if "lateral" not in table:
        root.log.assume("", "The beams resist no lateral load (IS 456, 26.2.3.3 b not applied).")
    return Header(
        number=table.text("number"),
        title=table.text("title"),
        part=table.text("part", ""),
        owner=table.text("owner", ""),
        code=code,
        bending=bending,
        ductile=ductile,
        lateral=table.flag("lateral", False),
    )


def read_issue(root: Table) -> Issue:
    """Read `[issue]`; the date is the date of every file."""
    keys = ("revision", "date", "purpose", "drawn", "checked", "approved", "document")
    table = root.table("issue", keys, needed=True)
    return Issue(
        revision=table.text("revision", example='"A"'),
        date=_date(table),
        **{key: table.text(key, "") for key in keys[2:]},
    )


def _date(table: Table) -> str:
    value = table.data.get("date")
    if value is None:
        table.missing("date", "2026-01-31")
        return ""
    try:
        return date.fromisoformat(str(value)[:10]).isoformat()
    except ValueError:
        table.refuse("date", "not a date", "Write date = 2026-01-31")
        return ""


def read_concrete(root: Table) -> Concrete:
    """Read `[concrete]`."""
    table = root.table("concrete", ("grade", "aggregate", "exposure", "fire_hours"), needed=True)
    if "aggregate" not in table:
        root.log.assume("", f"Aggregate of {AGGREGATE:g} mm.")
    if "fire_hours" not in table:
        root.log.assume("", "Fire resistance of 1 hour.")
    grade = table.text("grade", example='"M25"')
    strength = STRENGTHS.get(grade.upper().replace(" ", ""), math.nan)
    if table.clean("grade") and math.isnan(strength):
        table.refuse(
            "grade",
            f'"{grade[:20]}" is not a grade within IS 456',
            "Write M20 to M55 in steps of 5",
        )
    hours = table.number("fire_hours", 1.0, low=0.5, high=4, unit="h")
    if table.clean("fire_hours") and hours not in FIRE_HOURS:
        table.refuse("fire_hours", f"{hours:g} h is not tabled", "Write 0.5, 1, 1.5, 2, 3 or 4")
    return Concrete(
        grade=grade.upper().replace(" ", ""),
        fck=strength,
        aggregate=table.number("aggregate", AGGREGATE, low=6, high=80),
        exposure=table.choice("exposure", {e.value: e for e in Exposure}),
        fire_hours=hours,
    )


def read_steel(root: Table) -> Steel:
    """Read `[steel]`."""
    table = root.table("steel", ("main", "links", "stock", "sizes"), needed=True)
    main = _grade(table, "main")
    if "links" not in table:
        root.log.assume("", f"Links of {main.name}, as the main bars.")
    if "stock" not in table:
        root.log.assume("", f"Bars are delivered up to {STOCK:g} mm long.")
    return Steel(
        main=main,
        links=_grade(table, "links") if "links" in table else main,
        stock=table.number("stock", STOCK, low=3000, high=18000),
        sizes=_sizes(table),
    )


def _grade(table: Table, key: str) -> SteelGrade:
    text = table.text(key, example='"Fe 500"')
    found = re.fullmatch(r"\s*fe\s*-?\s*(\d+)\s*([ds]?)\s*", text, re.ASCII | re.IGNORECASE)
    name = f"Fe {found[1]}{found[2].upper()}" if found else ""
    if name in GRADES:
        return GRADES[name]
    if table.clean(key):
        listed = ", ".join(GRADES)
        table.refuse(key, f'"{text[:20]}" is not a grade of steel', f"Write one of {listed}")
    return GRADES["Fe 500"]


def _sizes(table: Table) -> tuple[int, ...]:
    product = tuple(SIZE_OVER_RIBS)
    listed = ", ".join(str(size) for size in product)
    if "sizes" not in table:
        table.log.assume("", f"All rolled sizes are held: {listed}.")
        return product
    sizes = []
    for path, item in table.items("sizes", "sizes = [8, 10, 12, 16, 20, 25, 32]"):
        if isinstance(item, int) and not isinstance(item, bool) and item in product:
            sizes.append(item)
        else:
            table.log.refuse(path, "this size is not rolled", f"Write sizes out of {listed}")
    if not sizes and table.clean("sizes"):
        table.refuse("sizes", "no size at all", f"Write sizes out of {listed}")
    return tuple(sorted(set(sizes)))


def read_practice(root: Table) -> Practice:
    """Read `[practice]`; every default is an assumption that the sheet prints."""
    keys = (
        "needle", "shaft", "link_step", "cut_step", "length_step", "first_link", "layer_gap",
        "spacer_size", "spacer_pitch",
    )  # fmt: skip
    table = root.table("practice", keys)
    usual = Practice()
    shaft = usual.shaft
    if "shaft" in table:
        one, two = table.numbers("shaft", 2, low=50, high=400)
        shaft = (one, two)
    practice = Practice(
        needle=table.number("needle", usual.needle, low=20, high=100),
        shaft=shaft,
        link_step=table.number("link_step", usual.link_step, low=1, high=100),
        cut_step=table.number("cut_step", usual.cut_step, low=1, high=500),
        length_step=table.number("length_step", usual.length_step, low=1, high=100),
        first_link=table.number("first_link", usual.first_link, low=10, high=150),
        layer_gap=table.number("layer_gap", low=15, high=150) if "layer_gap" in table else None,
        spacer_size=table.whole("spacer_size", usual.spacer_size, low=6, high=40),
        spacer_pitch=table.number("spacer_pitch", usual.spacer_pitch, low=300, high=3000),
    )
    if table.clean("spacer_size") and practice.spacer_size not in SIZE_OVER_RIBS:
        table.refuse("spacer_size", "this size is not rolled", "Write 20, 25 or 32")
    _assume_practice(root.log, table, practice)
    return practice


def _assume_practice(log: Log, table: Table, practice: Practice) -> None:
    fixing = {
        "needle": f"needle {practice.needle:g}",
        "shaft": f"shaft {practice.shaft[0]:g} × {practice.shaft[1]:g}",
        "first_link": f"first link {practice.first_link:g}",
        "link_step": f"link spacings in steps of {practice.link_step:g}",
    }
    steel = {
        "cut_step": f"cut-offs to {practice.cut_step:g}",
        "length_step": f"lengths to {practice.length_step:g}",
        "spacer_size": f"spacers T{practice.spacer_size}",
        "spacer_pitch": f"spacers each {practice.spacer_pitch:g}",
    }
    for words in (fixing, steel):
        left = [text for key, text in words.items() if key not in table]
        if left:
            log.assume("", f"Office default [mm]: {', '.join(left)}.")
    if "layer_gap" not in table:
        log.assume("", "Layers as near as the code allows.")


def read_grid(root: Table) -> Grid:
    """Read `[grid]`: names and places of the lines."""
    table = root.table("grid", ("x", "y", "level"))
    level = table.number("level", low=-1e6, high=1e6) if "level" in table else None
    return Grid(x=_lines(table, "x"), y=_lines(table, "y"), level=level)


def _lines(table: Table, key: str) -> tuple[tuple[str, float], ...]:
    data = table.data.get(key, {})
    lines = Table(table.log, table.at(key), data, data if isinstance(data, dict) and data else "-")
    for name in lines.data:
        if not re.fullmatch(r"[A-Za-z0-9]{1,8}'?", name, re.ASCII):
            table.refuse(key, "a grid line's name is letters and digits", "Write { A = 0 }")
    return tuple((name, lines.number(name, low=-1e7, high=1e7)) for name in lines.data)
