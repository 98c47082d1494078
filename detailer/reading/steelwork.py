"""The bars and links the engineer chose."""

from __future__ import annotations

import math
import re
from collections.abc import Sequence

from detailer.model import ChosenBars, ChosenLinks, Span, Support
from detailer.reading.columns import bars_at, zone_at
from detailer.reading.lines import KeyPath
from detailer.reading.outside import CHOOSING, OUTSIDE
from detailer.reading.table import Table
from detailer.values import EndForm, Face

BAR_KEYS = ("face", "span", "support", "bars", "layer", "stop", "reach", "end", "laps")
FACES = {"top": Face.TOP, "bottom": Face.BOTTOM, "side": Face.NONE}
ENDS = {form.value: form for form in EndForm}
Side = tuple[float | None, float | None]


class Line:
    """A beam line's supports and spans, as bars refer to them."""

    def __init__(self, supports: Sequence[Support], spans: Sequence[Span]) -> None:
        self.supports, self.spans = tuple(supports), tuple(spans)

    @property
    def ends(self) -> tuple[float, float]:
        """Return x of both ends of the beam. [mm]"""
        first, last = self.spans[0], self.spans[-1]
        return (
            first.x0 if first.left is None else self.supports[0].left,
            last.x1 if last.right is None else self.supports[-1].right,
        )

    def clear(self, span: Span) -> tuple[float, float]:
        """Return x of the faces a span is clear between. [mm]"""
        return (
            span.x0 if span.left is None else self.supports[span.left].right,
            span.x1 if span.right is None else self.supports[span.right].left,
        )


def read_bars(beam: Table, line: Line, lines: Sequence[int]) -> tuple[ChosenBars, ...]:
    """Read every `[[beam.bars]]` of a beam.

    Parameters
    ----------
    beam : Table
        The beam.
    line : Line
        Its supports and spans.
    lines : sequence of int
        Where the tables stand in the file; 0 where that is not known.
    """
    found = beam.items("bars", "[[beam.bars]]")
    return tuple(
        _bars(Table(beam.log, path, item, BAR_KEYS), line, at)
        for (path, item), at in zip(found, lines, strict=True)
    )


def _bars(table: Table, line: Line, at: int) -> ChosenBars:
    face = table.choice("face", FACES)
    spans, support = _where(table, line, face)
    layer = table.whole("layer", low=1, high=6) if "layer" in table else None
    if face is Face.NONE and layer is not None:
        table.refuse("layer", "side bars have no layers", "Take layer out")
    if "bars" not in table:
        table.missing("bars", f'"3T20" ({CHOOSING})')
    reach = _side(table, "reach")
    stop = _side(table, "stop")
    _extents(table, line, spans, support, (stop, reach))
    return ChosenBars(
        face=face,
        groups=bars_at(table.log, table.at("bars"), table.data["bars"]) if "bars" in table else (),
        spans=spans,
        support=support,
        layer=layer,
        stop=stop,
        reach=reach,
        ends=_ends(table),
        laps=_laps(table, line),
        line=at,
    )


def _where(table: Table, line: Line, face: Face) -> tuple[tuple[int, int] | None, int | None]:
    ways = [key for key in ("span", "support") if key in table]
    if len(ways) != 1:
        if ways:
            table.refuse("support", "span and support of one table", "Write one of them")
        else:
            table.missing("span", '1 or "1-3", or support = its name')
        return None, None
    if ways == ["span"]:
        return spans_at(table, len(line.spans)), None
    if face is Face.NONE:
        table.refuse("support", "side bars belong to spans", "Write span = …")
    name = table.text("support", example='"B1"')
    names = [support.name for support in line.supports]
    if name in names:
        return None, names.index(name)
    if table.clean("support") and names:
        table.refuse("support", f"no support {name[:24]}", f"Supports here: {', '.join(names)}")
    return None, None


def spans_at(table: Table, count: int) -> tuple[int, int] | None:
    """Read `span`: a number, or first and last as "1-3"; None where it is refused."""
    value = table.data.get("span")
    first = last = 0
    if isinstance(value, int) and not isinstance(value, bool):
        first = last = value
    elif isinstance(value, str):
        match = re.fullmatch(r"\s*(\d{1,3})\s*(?:[-–]\s*(\d{1,3}))?\s*", value, re.ASCII)
        if match:
            first, last = int(match[1]), int(match[2] or match[1])
    if 1 <= first <= last <= count:
        return first, last
    if count:
        example = f'Write 1 to {count}, or such as "1-{count}"' if count > 1 else "Write span = 1"
        table.refuse("span", "not a span of this beam", example)
    return None


def _side(table: Table, key: str) -> Side:
    pair = table.pair(key)
    if pair is None:
        return None, None
    values: list[float | None] = []
    for n, item in enumerate(pair):
        if item == "auto":
            values.append(None)
        elif item == "end" and key == "reach":
            values.append(math.inf)
        elif isinstance(item, str):
            words = '"end" or "auto"' if key == "reach" else '"auto"'
            table.log.refuse(table.at(key, n), "not a length", f"Write mm, {words}")
            values.append(None)
        else:
            low = -2000 if key == "reach" else 0
            values.append(table.within(table.at(key, n), item, low=low, high=30000))
    return values[0], values[1]


def _extents(
    table: Table,
    line: Line,
    spans: tuple[int, int] | None,
    support: int | None,
    given: tuple[Side, Side],
) -> None:
    """Refuse extents that leave the beam or that cross."""
    stop, reach = given
    if support is not None and stop != (None, None):
        table.refuse("stop", "bars over a support reach, they do not stop", "Write reach = …")
    for n in (0, 1):
        if stop[n] is not None and reach[n] is not None:
            table.refuse("reach", "stop and reach at one end", "Write one of them")
            return
    if spans is None and support is None:
        return
    if spans is not None:
        left = line.clear(line.spans[spans[0] - 1])[0]
        right = line.clear(line.spans[spans[1] - 1])[1]
        if (stop[0] or 0) + (stop[1] or 0) >= right - left:
            table.refuse("stop", "the bars end before they begin",
                         f"Stay within the {right - left:g} mm between the faces")  # fmt: skip
    else:
        left, right = line.supports[support or 0].left, line.supports[support or 0].right
    start, end = line.ends
    for n, room in enumerate((left - start, end - right)):
        value = reach[n]
        if value is not None and math.isfinite(value) and value > room:
            table.log.refuse(
                table.at("reach", n), f"{value:g} mm leaves the beam, {room:g} mm are there",
                'Write less, or "end"',
            )  # fmt: skip


def _ends(table: Table) -> tuple[EndForm | None, EndForm | None]:
    pair = table.pair("end")
    forms: list[EndForm | None] = []
    for n, item in enumerate(pair or (None, None)):
        form = ENDS.get(item) if isinstance(item, str) else None
        if pair is not None and form is None and item != "auto":
            listed = ", ".join(f'"{name}"' for name in ENDS)
            say = OUTSIDE.get(str(item), ("not a form of end", f"Write one of {listed}"))
            table.log.refuse(table.at("end", n), *say)
        forms.append(form)
    return forms[0], forms[1]


def _laps(table: Table, line: Line) -> tuple[float, ...] | None:
    if "laps" not in table:
        return None
    if "support" in table:
        table.refuse("laps", "bars over a support are not lapped", "Take laps out")
    start, end = line.ends if line.spans else (-1e6, 1e6)
    return tuple(
        table.within(path, item, low=start, high=end) if start < end else math.nan
        for path, item in table.items("laps", "laps = [x, …]")
    )


def read_links(beam: Table, line: Line, lines: Sequence[int]) -> tuple[ChosenLinks, ...]:
    """Read every `[[beam.links]]` of a beam; one that names several spans counts for each."""
    chosen: list[ChosenLinks] = []
    taken: set[int] = set()
    found = beam.items("links", "[[beam.links]]")
    for (path, item), at in zip(found, lines, strict=True):
        table = Table(beam.log, path, item, ("span", "zones"))
        if "span" not in table:
            table.missing("span", "1")
        numbers = spans_at(table, len(line.spans)) if "span" in table else None
        zones = tuple(
            zone
            for where, text in table.items("zones", 'zones = ["2L-T8@150"]')
            if (zone := zone_at(beam.log, where, text)) is not None
        )
        _legs(table, str(beam.data.get("mark", "")))
        if "zones" not in table:
            table.missing("zones", f'["2L-T8@150"] ({CHOOSING})')
        elif table.clean("zones") and sum(zone.length is None for zone in zones) != 1:
            table.refuse("zones", "not exactly one zone without a length",
                         'Leave "x …" out of the zone that takes what is left')  # fmt: skip
        for number in range(numbers[0], numbers[1] + 1) if numbers else ():
            if number in taken:
                table.refuse("span", f"span {number} has links already", "Write one table a span")
            taken.add(number)
            left, right = line.clear(line.spans[number - 1])
            if sum(zone.length or 0 for zone in zones) >= right - left:
                table.refuse("zones", "the zones are longer than the clear span",
                             f"Stay within {right - left:g} mm")  # fmt: skip
            chosen.append(ChosenLinks(span=number, zones=zones, line=at))
    return tuple(sorted(chosen, key=lambda links: links.span))


def _legs(table: Table, member: str) -> None:
    for _, text in table.items("zones", 'zones = ["2L-T8@150"]'):
        if isinstance(text, str) and "L" not in text.upper():
            table.log.assume(member, "Links without a number of legs have two.")


def refuse_absent(
    beam: Table, line: Line, bars: Sequence[ChosenBars], links: Sequence[ChosenLinks]
) -> None:
    """Refuse spans whose bars or links were left for the tool to choose."""
    for key, example in (("bars", "[[beam.bars]]"), ("links", "[[beam.links]]")):
        if key not in beam or not beam.data[key]:
            beam.refuse(key, f"no {key}: {CHOOSING}", f"Write {example} tables")
    if not beam.clean("bars") or not beam.clean("links"):
        return
    held = {links.span for links in links}
    for span in line.spans:
        where: KeyPath = beam.at("span", span.number - 1)
        for face, word in ((Face.BOTTOM, "bottom"), (Face.TOP, "top")):
            groups = [
                bar for bar in bars
                if bar.face is face and bar.spans and bar.spans[0] <= span.number <= bar.spans[1]
            ]  # fmt: skip
            if not groups:
                problem = f"span {span.number} has no {word} bars: {CHOOSING}"
                beam.log.refuse(where, problem, f'Write [[beam.bars]] face = "{word}" over it')
        if span.number not in held:
            problem = f"span {span.number} has no links: {CHOOSING}"
            beam.log.refuse(where, problem, "Write [[beam.links]] for it")
