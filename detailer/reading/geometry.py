"""Supports, spans and sections of a beam line, in its own axes."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass, replace
from itertools import pairwise

from detailer.model import Column, Cover, Results, Section, Span, Support
from detailer.reading.columns import BAR, COVER, TIE, turned
from detailer.reading.table import Table
from detailer.values import FlangeSide, SupportKind

SECTION_KEYS = ("width", "depth", "slab", "flange", "flange_side", "drop")
SUPPORT_KEYS = ("at", "column", "wall", "offset")
SPAN_KEYS = (
    "length", "clear", "overhang", "section",
    "moment", "shear", "dead", "imposed", "point", "results",
)  # fmt: skip
LEAST_CLEAR = 300.0
"""Less than this between faces is no span. [mm]"""


@dataclass(frozen=True, slots=True, kw_only=True)
class Reach:
    """One span as written: which measure, how long, and its section."""

    kind: str  # "length", "clear", "overhang"; "" where it is refused
    size: float  # [mm]
    section: Section
    results: Results | None


def read_section(table: Table, base: Section | None, member: str) -> Section:
    """Read a `section`; a span's takes from the beam's what it does not say itself."""
    own = {
        "width": table.number("width", base.width if base else None, low=100, high=3000),
        "depth": table.number("depth", base.depth if base else None, low=100, high=3000),
        "slab": table.number("slab", base.slab if base else 0.0, low=0, high=1000),
        "drop": table.number("drop", base.drop if base else 0.0, low=-2000, high=2000),
    }
    flange = base.flange if base else None
    if "flange" in table:
        flange = table.number("flange", low=100, high=20000)
    side = base.flange_side.value if base else FlangeSide.BOTH.value
    section = Section(
        **own,
        flange=flange,
        flange_side=table.choice("flange_side", {s.value: s for s in FlangeSide}, side),
    )
    _doubt_section(table, section, member)
    return section


def _doubt_section(table: Table, section: Section, member: str) -> None:
    key = "depth" if "depth" in table else "width"
    if section.width > section.depth:
        table.log.doubt(
            table.at(key),
            f"{member} is wider ({section.width:g}) than deep ({section.depth:g}): "
            "width and depth swapped?",
        )
    if section.width < 150:
        table.log.doubt(table.at("width"), f"a web of {section.width:g} mm is narrow: in mm?")
    if section.flange is not None:
        if section.slab == 0:
            table.refuse("slab", "a flange without its thickness", "Write slab = …")
        elif section.flange < section.width:
            table.refuse("flange", "a flange narrower than the web", "Write the whole width")
    elif section.slab > 0:
        table.log.assume(member, "A slab without a flange's width: taken as a rectangle.")
    if section.slab >= section.depth:
        table.refuse("slab", "a slab as thick as the beam", "Write the slab's own thickness")


def read_support(
    table: Table, columns: dict[str, Column], *, direction: float, across: float, member: str
) -> Support:
    """Read one support; its x is set once all spans are known."""
    name = table.mark("at", "A1")
    ways = [key for key in ("column", "wall", "beam") if key in table]
    if not ways:
        table.missing("column", '"K1" (or [along, across]), or wall = its width')
    elif len(ways) > 1:
        table.refuse(ways[1], f"{' and '.join(ways)} at one support", "Write one of them")
    wide, deep, column = float("nan"), across, None
    kind = SupportKind.WALL if ways[:1] == ["wall"] else SupportKind.COLUMN
    if kind is SupportKind.WALL:
        wide = table.number("wall", low=75, high=2000)
    elif isinstance(table.data.get("column"), list):
        wide, deep = table.numbers("column", 2, low=100, high=3000)
        table.log.assume(
            member,
            f"Column at {name}: cover {COVER:g} mm, ties T{TIE}, bars T{BAR} at the far face.",
        )
    elif "column" in table:
        column = _named(table, columns)
        wide, deep = turned(column.size, direction) if column else (float("nan"), across)
    return Support(
        name=name,
        kind=kind,
        x=0.0,
        width=wide,
        across=deep,
        offset=table.number("offset", 0.0, low=-2000, high=2000),
        column=column,
    )


def _named(table: Table, columns: dict[str, Column]) -> Column | None:
    mark = table.text("column", example='"K1"')
    if table.clean("column") and mark not in columns:
        known = ", ".join(sorted(columns)) or "none"
        table.refuse("column", f"no [[column]] {mark[:24]}", f"Columns here: {known}")
    return columns.get(mark)


def read_reach(table: Table, base: Section, member: str) -> Reach:
    """Read how long a span is, and its section."""
    ways = [key for key in ("length", "clear", "overhang") if key in table]
    kind, size = "", float("nan")
    if len(ways) == 1:
        kind = ways[0]
        low, high = (100, 8000) if kind == "overhang" else (500, 30000)
        size = table.number(kind, low=low, high=high)
    elif ways:
        table.refuse(ways[1], f"{' and '.join(ways)} of one span", "Write one of them")
    else:
        table.missing("length", "… (between centres), or clear = …, or overhang = …")
    section = base
    if "section" in table:
        section = read_section(table.table("section", SECTION_KEYS), base, member)
    return Reach(kind=kind, size=size, section=section, results=None)


def fits(beam: Table, supports: Sequence[Support], reaches: Sequence[Reach]) -> bool:
    """Return whether supports and spans belong together; refuse where they do not."""
    inner = [n for n, reach in enumerate(reaches) if reach.kind != "overhang"]
    if any(reach.kind == "" for reach in reaches) or not reaches or not supports:
        return False
    if not inner:
        beam.refuse(
            "span", "a cantilever without a back span is not built yet", "Write the span behind it"
        )
        return False
    for n, reach in enumerate(reaches):
        if reach.kind == "overhang" and n not in (0, len(reaches) - 1):
            beam.log.refuse(
                beam.at("span", n, "overhang"), "an overhang between spans",
                "Write it first or last",
            )  # fmt: skip
            return False
    if len(supports) != len(inner) + 1:
        beam.refuse(
            "support",
            f"{len(supports)} supports for {len(inner)} spans between supports",
            f"Write {len(inner) + 1} supports",
        )
        return False
    return True


def lay_out(
    supports: Sequence[Support], reaches: Sequence[Reach]
) -> tuple[tuple[Support, ...], tuple[Span, ...]]:
    """Return supports and spans at their places along the line."""
    lead = 1 if reaches[0].kind == "overhang" else 0
    inner = [reach for reach in reaches if reach.kind != "overhang"]
    xs = [0.0]
    for (one, other), reach in zip(pairwise(supports), inner, strict=True):
        more = (one.width + other.width) / 2 if reach.kind == "clear" else 0.0
        xs.append(xs[-1] + reach.size + more)
    datum = reaches[lead].section.drop
    spans = []
    for n, reach in enumerate(reaches):
        left, right = n - lead, n - lead + 1
        x0 = xs[left] if left >= 0 else -reach.size
        x1 = xs[right] if right < len(xs) else xs[left] + reach.size
        spans.append(
            Span(
                number=n + 1,
                x0=x0,
                x1=x1,
                left=left if left >= 0 else None,
                right=right if right < len(xs) else None,
                section=reach.section,
                top=datum - reach.section.drop,
                results=reach.results,
            )
        )
    placed = (replace(s, x=x) for s, x in zip(supports, xs, strict=True))
    return tuple(placed), tuple(spans)


def read_cover(beam: Table) -> Cover:
    """Read `cover`: one number for all faces, or a table of the four."""
    names = ("top", "bottom", "left", "right")
    if "cover" not in beam:
        beam.missing("cover", "30")
    if isinstance(beam.data.get("cover"), dict):
        table = beam.table("cover", names)
        values = {name: table.number(name, low=0, high=200) for name in names}
    else:
        one = beam.number("cover", 30, low=0, high=200)
        values = dict.fromkeys(names, one)
    for value in sorted(set(values.values())):
        if value < 15 or value > 100:
            beam.log.doubt(beam.at("cover"), f"cover of {value:g} mm: is that meant in mm?")
    return Cover(**values)
