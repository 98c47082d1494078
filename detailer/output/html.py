"""The page of one run: everything in one file that opens offline, findings first."""

from __future__ import annotations

from collections.abc import Callable, Iterable, Iterator, Sequence
from dataclasses import dataclass
from html import escape
from importlib.resources import files
from itertools import groupby
from math import isfinite

from detailer.findings import Finding
from detailer.output.json import Assumed, Doubted
from detailer.schedule import Row, Summary
from detailer.values import CAUTION, Severity

SIGNS = {
    Severity.UNSAFE: "■",
    Severity.UNBUILDABLE: "▲",
    Severity.COSTLY: "●",
    Severity.UNCLEAR: "○",
}
"""One sign a severity, so that print without colour tells them apart."""

MEANS = {
    Severity.UNSAFE: "breaks a rule or strength",
    Severity.UNBUILDABLE: "can't be fixed as drawn",
    Severity.COSTLY: "steel, time, an enquiry",
    Severity.UNCLEAR: "invites misreading",
}


@dataclass(frozen=True, slots=True, kw_only=True)
class Head:
    """What the top of the page says."""

    number: str
    title: str
    part: str
    facts: tuple[tuple[str, str], ...]  # name, value


@dataclass(frozen=True, slots=True, kw_only=True)
class Member:
    """One member on the page; its drawing is fetched when its turn comes."""

    mark: str
    anchor: str
    about: str  # "2 off"
    drawing: Callable[[], str]  # SVG text
    links: tuple[tuple[str, str], ...]  # file name, words


@dataclass(frozen=True, slots=True, kw_only=True)
class Page:
    """What the page holds."""

    head: Head
    findings: tuple[Finding, ...]  # ordered
    asked: tuple[str, ...]  # every question the checks ask
    members: tuple[Member, ...]
    rows: tuple[Row, ...]
    summary: Summary
    assumptions: tuple[Assumed, ...]
    doubts: tuple[Doubted, ...]
    links: tuple[tuple[str, str], ...]


def page(content: Page) -> Iterator[str]:
    """Yield index.html piece by piece, so that no more than one drawing is in memory.

    Parameters
    ----------
    content : Page
        What the page holds.
    """
    yield from _top(content)
    yield from _findings(content)
    for member in content.members:
        yield from _member(member, content)
    yield from _masses(content.summary)
    yield from _assumptions(content)
    yield _files(content.links)
    yield "</main><footer class='page'>" + escape(CAUTION) + "</footer>\n"
    yield (
        "<div id='chosen' role='status' aria-live='polite' hidden><span></span>"
        "<button type='button' aria-label='Let go of the mark'>Esc</button></div>\n"
    )
    yield f"<script>{_own('page.js')}</script>\n</body></html>\n"


def _own(name: str) -> str:
    return files("detailer.output").joinpath(name).read_text(encoding="utf-8")


def _top(content: Page) -> Iterator[str]:
    head = content.head
    title = f"{head.number} {head.title}".strip()
    yield (
        "<!doctype html>\n<html lang='en'><head><meta charset='utf-8'>"
        "<meta name='viewport' content='width=device-width, initial-scale=1'>"
        f"<title>{escape(title)}</title><style>{_own('page.css')}</style></head><body>\n"
        "<a class='skip' href='#findings'>Skip to the findings</a>\n<header class='page'>"
        f"<h1>{escape(title)}</h1><p class='sub'>{escape(head.part)}</p><dl class='title'>"
    )
    for name, value in head.facts:
        yield f"<div><dt>{escape(name)}</dt><dd>{escape(value)}</dd></div>"
    yield f"</dl><p class='caution' role='note'>{escape(CAUTION)}</p></header>\n"
    yield "<nav class='page' aria-label='On this page'><ul>"
    yield "<li><a href='#findings'>Findings</a></li>"
    for member in content.members:
        count = sum(1 for item in content.findings if item.member == member.mark)
        yield (
            f"<li><a href='#{member.anchor}'>{escape(member.mark)}"
            f" <span class='n'>{count or ''}</span></a></li>"
        )
    yield "<li><a href='#masses'>Masses</a></li><li><a href='#assumptions'>Assumptions</a></li>"
    yield "<li><a href='#files'>Files</a></li></ul></nav>\n<main>"


def _findings(content: Page) -> Iterator[str]:
    yield "<section id='findings'><h2>Findings</h2><ul class='counts'>"
    for severity in Severity:
        count = sum(1 for item in content.findings if item.severity is severity)
        yield (
            f"<li class='{severity.value}'><b>{count}</b>{SIGNS[severity]} {severity.value}"
            f"<br><small>{MEANS[severity]}</small></li>"
        )
    yield "</ul>\n"
    asked = "; ".join(content.asked)
    yield f"<p class='asked'><b>Asked:</b> {escape(asked)}. "
    yield "What is not named here is not checked.</p>"
    if not content.findings:
        yield "<p class='good'>None of these questions found anything to report.</p>"
    for mark, of_member in groupby(content.findings, key=lambda item: item.member):
        yield f"<h3>{escape(mark)}</h3>"
        for place, items in groupby(of_member, key=lambda item: item.place):
            name = place.name if place.name == mark else f"{mark} · {place.name}"
            yield f"<div class='place'><h4>{escape(name)}</h4>"
            yield from (_finding(item) for item in items)
            yield "</div>\n"
    yield "</section>\n"


def _finding(item: Finding) -> str:
    word = item.severity.value
    marks = " ".join(_mark(mark) for mark in item.bars)
    site = f"<p class='site'>{escape(item.site)}</p>" if item.site else ""
    unit = escape(item.unit)
    return (
        f"<div class='finding {word}'><div class='head'><p class='word w-{word}'>"
        f"{SIGNS[item.severity]} {word}</p><p class='rule'>{escape(item.rule)}</p></div>"
        f"<div class='say'><p>{escape(item.message)}</p>"
        f"<p class='fix'>{escape(item.remedy)}</p>{site}"
        + (f"<p>Marks {marks}</p>" if marks else "")
        + f"</div><dl class='nums'><dt>found</dt><dd><b>{_number(item.found)}</b> {unit}</dd>"
        f"<dt>required</dt><dd><b>{_number(item.required)}</b> {unit}</dd>"
        f"<dt>at x</dt><dd>{_number(item.x)} mm</dd>"
        f"<dd class='clause'>{escape(item.clause)}</dd></dl></div>\n"
    )


def _number(value: float) -> str:
    if not isfinite(value):
        return "–"
    digits = 0 if abs(value) >= 1000 else 1 if abs(value) >= 10 else 2
    text = f"{value:.{digits}f}"
    return text.rstrip("0").rstrip(".") if "." in text else text


def _mark(mark: str) -> str:
    text = escape(mark, quote=True)
    looks = f'class="mark" data-mark="{text}" aria-pressed="false"'
    return f'<button type="button" {looks}>{text}</button>'


def _member(member: Member, content: Page) -> Iterator[str]:
    rows = [row for row in content.rows if row.member == member.mark]
    yield (
        f"<section class='member' id='{member.anchor}'><h2>{escape(member.mark)} "
        f"<small>{escape(member.about)}</small></h2><figure><div class='bar'>"
        "<button type='button' data-zoom='out' aria-label='Smaller'>−</button>"
        "<button type='button' data-zoom='fit'>Fit</button>"
        "<button type='button' data-zoom='in' aria-label='Larger'>+</button>"
        f"<span class='links'>{_links(member.links)}</span></div>"
        "<div class='sheet' tabindex='0' role='group' "
        f"aria-label='Drawing of {escape(member.mark)}'>"
    )
    yield _inline(member.drawing())
    yield "</div></figure>\n"
    yield from _schedule(member.mark, rows)
    yield "</section>\n"


def _inline(svg: str) -> str:
    """Return an SVG file's element without what only a file of its own may begin with."""
    return svg[svg.index("<svg") :]


def _links(links: Iterable[tuple[str, str]]) -> str:
    return " ".join(f"<a href='{escape(name)}'>{escape(words)}</a>" for name, words in links)


HEADS = (
    ("mark", ""),
    ("bar", ""),
    ("shape", ""),
    ("dimensions", ""),
    ("length", "num"),
    ("exact", "num"),
    ("per member", "num"),
    ("members", "num"),
    ("total", "num"),
    ("kg", "num"),
    ("note", ""),
)


def _schedule(mark: str, rows: Sequence[Row]) -> Iterator[str]:
    yield f"<div class='table'><table><caption>Schedule of {escape(mark)}, lengths in mm</caption>"
    heads = "".join(f"<th scope='col' class='{kind}'>{word}</th>" for word, kind in HEADS)
    yield f"<thead><tr>{heads}</tr></thead><tbody>"
    yield from (_row(row) for row in rows)
    mass = sum(row.mass for row in rows)
    yield (
        "</tbody><tfoot><tr><th scope='row' colspan='9'>Mass of all members</th>"
        f"<td class='num'>{mass:.1f}</td><td></td></tr></tfoot></table></div>\n"
    )


def _row(row: Row) -> str:
    letters = "  ".join(f"<b>{letter}</b> {value:g}" for letter, value in row.shape.dimensions)
    say = f"Mark {row.mark}: {row.dia:g} mm {row.grade}, {row.shape.code}, {row.length:g} long"
    mark = escape(row.mark, quote=True)
    hand = "opposite hand, for mirrored members. " if row.mirrored else ""
    return (
        f'<tr data-mark="{mark}" data-say="{escape(say, quote=True)}"><td>{_mark(row.mark)}</td>'
        f"<td class='size'>{escape(row.grade)} Ø{row.dia:g}<br><small>{row.role.value}</small></td>"
        f"<td>{escape(row.shape.code)}</td><td class='dims'>{letters}</td>"
        f"<td class='num'>{row.length:g}</td><td class='num'>{row.exact:.1f}</td>"
        f"<td class='num'>{row.per_member}</td><td class='num'>{row.members}</td>"
        f"<td class='num'>{row.total}</td><td class='num'>{row.mass:.1f}</td>"
        f"<td class='note'>{escape(hand + row.note)}</td></tr>\n"
    )


def _masses(summary: Summary) -> Iterator[str]:
    yield "<section id='masses'><h2>Masses</h2><div class='table'><table><caption>By size</caption>"
    yield "<thead><tr><th>size</th><th class='num'>bars</th><th class='num'>length, m</th>"
    yield "<th class='num'>kg, scheduled</th><th class='num'>kg, exact</th></tr></thead><tbody>"
    for size in summary.sizes:
        yield (
            f"<tr><td>{escape(size.grade)} Ø{size.dia:g}</td><td class='num'>{size.number}</td>"
            f"<td class='num'>{size.length:.1f}</td><td class='num'>{size.mass:.1f}</td>"
            f"<td class='num'>{size.exact:.1f}</td></tr>"
        )
    yield (
        "</tbody><tfoot><tr><th scope='row' colspan='3'>All</th>"
        f"<td class='num'>{summary.mass:.1f}</td><td class='num'>{summary.exact:.1f}</td></tr>"
        "</tfoot></table></div><div class='table'><table><caption>By member</caption><thead><tr>"
        "<th>member</th><th class='num'>built</th><th class='num'>kg</th>"
        "<th class='num'>of it laps</th><th class='num'>of it spacers</th>"
        "<th class='num'>kg per m³ of concrete</th></tr></thead><tbody>"
    )
    for member in summary.members:
        yield (
            f"<tr><td>{escape(member.member)}</td><td class='num'>{member.members}</td>"
            f"<td class='num'>{member.mass:.1f}</td><td class='num'>{member.laps:.1f}</td>"
            f"<td class='num'>{member.spacers:.1f}</td>"
            f"<td class='num'>{member.density:.0f}</td></tr>"
        )
    yield "</tbody></table></div></section>\n"


def _assumptions(content: Page) -> Iterator[str]:
    yield "<section id='assumptions'><h2>Assumptions</h2><ol class='plain'>"
    for item in content.assumptions:
        about = f"{item.member}: " if item.member else ""
        yield f"<li><b>A{item.number}</b><span>{escape(about + item.text)}</span></li>"
    yield "</ol>" if content.assumptions else "<li>None.</li></ol>"
    if content.doubts:
        yield "<h3>Questions about the input</h3><ul class='plain'>"
        for doubt in content.doubts:
            line = "" if doubt.line is None else f":{doubt.line}"
            where = f"{doubt.file}{line}: {doubt.field}: "
            yield f"<li><span>{escape(where + doubt.text)}</span></li>"
        yield "</ul>"
    yield "</section>\n"


def _files(links: Iterable[tuple[str, str]]) -> str:
    items = "".join(f"<li><a href='{escape(n)}'>{escape(words)}</a></li>" for n, words in links)
    return f"<section id='files'><h2>Files</h2><ul class='plain files'>{items}</ul></section>\n"
