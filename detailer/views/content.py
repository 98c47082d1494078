"""Everything a beam's sheet shows: views made when first asked for, and what they take on paper."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass
from functools import cached_property
from types import MappingProxyType

from detailer.cage.bar import Cage
from detailer.drawing.primitives import XY, View
from detailer.model import Beam
from detailer.values import Face, Role
from detailer.views.bent import bent_items
from detailer.views.chains import elevation_items
from detailer.views.cuts import Cut
from detailer.views.diagram import Curves, diagram_items
from detailer.views.elevation import picture, stage_of
from detailer.views.notes import Note, Text, set_notes
from detailer.views.outline import beam_depth
from detailer.views.pack import GAP
from detailer.views.pulled import pulled_items
from detailer.views.section import section_items
from detailer.views.sizes import web_of
from detailer.views.table import Table
from detailer.views.viewing import make_view

NOTE_WIDTHS = (185.0, 150.0, 120.0, 95.0)
"""Widths notes may be set in. [mm on paper]"""

DOUBT = (6.0, 15.0)
"""What width and height of a stack judged by another scale's may be too much. [mm on paper]"""

DOUBT_ABOUT_SECTIONS = 1.0
"""The same for the width of a section. [mm on paper]"""

FIRST = MappingProxyType({"stack": 25.0})
"""The scale at which views of a kind are judged while none are made: the likeliest."""

LOWER = (Face.BOTTOM, Face.LEFT, Face.RIGHT)


@dataclass(frozen=True)
class Content:
    """Everything a beam's sheet shows, views made once a scale."""

    beam: Beam
    cage: Cage
    cuts: tuple[Cut, ...]
    curves: Curves | None
    notes: tuple[Note, ...]
    table: Table

    @cached_property
    def texts(self) -> tuple[Text, ...]:
        """Return the notes set in each of the widths they may have."""
        return tuple(set_notes(self.notes, width) for width in NOTE_WIDTHS)

    @cached_property
    def table_size(self) -> XY:
        """Return width and height of the schedule. [mm on paper]"""
        return self.table.size

    @cached_property
    def note_sizes(self) -> tuple[XY, ...]:
        """Return the sizes the notes may have. [mm on paper]"""
        return tuple((w, t.height) for w, t in zip(NOTE_WIDTHS, self.texts, strict=True))

    @cached_property
    def _made(self) -> dict[tuple[str, float], tuple[View, ...]]:
        return {}

    def stack(self, scale: float) -> tuple[View, ...]:
        """Return the views that share an x axis, from the top down."""
        key = ("stack", scale)
        if key not in self._made:
            self._made[key] = tuple(_stack(self, scale))
        return self._made[key]

    def sections(self, scale: float) -> tuple[View, ...]:
        """Return the sections by letter, then links, ties and spacers."""
        key = ("sections", scale)
        if key not in self._made:
            self._made[key] = tuple(_sections(self, scale))
        return self._made[key]

    @property
    def length(self) -> float:
        """Return the length of the beam. [mm]"""
        beams = [p for p in self.cage.prisms if p.name.startswith("span ")]
        return max(p.x1 for p in beams) - min(p.x0 for p in beams)

    @property
    def depth(self) -> float:
        """Return the depth of the beam, steps included. [mm]"""
        low, high = beam_depth(self.cage)
        return high - low

    @property
    def breadth(self) -> float:
        """Return the breadth of the widest web. [mm]"""
        webs = (p for p in self.cage.prisms if p.name.endswith(" web"))
        return max(2 * y for p in webs for y, _ in p.outline)

    def about_stack(self, scale: float) -> XY:
        """Return what the views of an x axis take at least, judged by another scale's. [mm]"""
        known = self._known("stack", scale)
        wide, tall = stack_size(self.stack(known))
        if known == scale:
            return wide, tall
        shrunk = 1 / scale - 1 / known
        return wide + self.length * shrunk - DOUBT[0], tall + self.depth * shrunk - DOUBT[1]

    def about_sections(self, scale: float) -> tuple[XY, ...]:
        """Return what the sections take at least, judged by another scale's. [mm]"""
        known = self._known("sections", scale)
        sizes = tuple(size_of(v) for v in self.sections(known))
        if known == scale:
            return sizes
        shrunk = 1 / scale - 1 / known
        more = self.breadth * shrunk - DOUBT_ABOUT_SECTIONS, self.depth * shrunk
        return tuple((w + more[0], h + more[1]) for w, h in sizes)

    def _known(self, kind: str, scale: float) -> float:
        """Return the scale at which views of a kind are made: this one or the first one made."""
        made = [known for what, known in self._made if what == kind]
        if scale in made:
            return scale
        return made[0] if made else FIRST.get(kind, scale)


def _stack(content: Content, scale: float) -> Iterator[View]:
    cage = content.cage
    stage = stage_of(cage, scale, content.cuts)
    text = f"1:{scale:.0f}"
    middle = (stage.x0 + stage.x1) / 2
    top = pulled_items(stage, (Face.TOP,))
    if top:
        name, title = f"{cage.member} top bars", f"Top bars {text}"
        yield make_view(name, title, scale, top, middle=middle)
    items = (*picture(stage), *elevation_items(stage, content.beam))
    name, title = f"{cage.member} elevation", f"Elevation of {cage.member} {text}"
    yield make_view(name, title, scale, items, middle=middle)
    low = pulled_items(stage, LOWER)
    if low:
        sides = any(s.bar.face in LOWER[1:] for s in stage.strands)
        words = "Bottom and side bars" if sides else "Bottom bars"
        name, title = f"{cage.member} bottom bars", f"{words} {text}"
        yield make_view(name, title, scale, low, middle=middle)
    if content.curves is not None:
        moments = diagram_items(stage, content.curves)
        name = f"{cage.member} moments"
        yield make_view(name, "Moments, kN·m", scale, moments, middle=middle)


def _sections(content: Content, scale: float) -> Iterator[View]:
    cage = content.cage
    firsts: dict[str, Cut] = {}
    for cut in content.cuts:
        firsts.setdefault(cut.letter, cut)
    for letter in sorted(firsts, key=lambda n: (len(n), n)):
        name, title = f"{letter}-{letter}", f"{letter}-{letter} 1:{scale:.0f}"
        x = firsts[letter].x
        items = section_items(cage, x, scale, full=letter == content.cuts[0].letter)
        web = web_of(cage, x)
        middle = (web.x0 + web.x1) / 2
        yield make_view(f"{cage.member} {name}", title, scale, items, middle=middle)
    bent = bent_items(cage, scale)
    if bent:
        spaced = any(bar.role is Role.SPACER for bar in cage.bars)
        title = f"{'Links and spacers' if spaced else 'Links'} 1:{scale:.0f}"
        yield make_view(f"{cage.member} links", title, scale, bent)


def size_of(view: View) -> XY:
    """Return what a view takes on paper, its title included. [mm]

    Parameters
    ----------
    view : View
        The view.
    """
    x0, y0, x1, y1 = view.box
    return (x1 - x0) / view.scale, (y1 - y0) / view.scale


def stack_size(stack: tuple[View, ...]) -> XY:
    """Return what views that share an x axis take, one below the other. [mm]

    Parameters
    ----------
    stack : tuple of View
        The views, of one scale.
    """
    x0, x1 = min(v.box[0] for v in stack), max(v.box[2] for v in stack)
    return (x1 - x0) / stack[0].scale, sum(size_of(v)[1] + GAP for v in stack)
