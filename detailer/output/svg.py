"""SVG: one picture a drawing, its sheets below one another, on the paper's own millimetres.

Every sheet is a group of class ``paper``, every view one of class ``view`` with an id. What shows
a bar carries its mark as ``data-mark`` and as a class ``mark-…``, so a page can light it. Ids and
classes of one drawing start with its name, so several drawings can stand in one page. A filled
disc is a ``circle``; an outlined one is a ``path``, so that lighting never fills it.
"""

from __future__ import annotations

from dataclasses import dataclass
from itertools import pairwise
from typing import Any

import svgwrite.container
import svgwrite.drawing
import svgwrite.path
import svgwrite.shapes
import svgwrite.text

from detailer.drawing.dimensioning import Segment, parts
from detailer.drawing.metrics import CAPITALS, width
from detailer.drawing.placed import require_finite
from detailer.drawing.primitives import (
    XY,
    Align,
    Dimension,
    Disc,
    Drawing,
    Label,
    Path,
    Pen,
    Primitive,
    Sheet,
    Tag,
)
from detailer.drawing.text import plain

_Svg: Any = svgwrite.drawing.Drawing
_Group: Any = svgwrite.container.Group
_Style: Any = svgwrite.container.Style
_Path: Any = svgwrite.path.Path
_Circle: Any = svgwrite.shapes.Circle
_Rect: Any = svgwrite.shapes.Rect
_Text: Any = svgwrite.text.Text
"""The library has no types of its own."""

BETWEEN = 10.0
"""Between two sheets. [mm]"""

DASHES = {Pen.HIDDEN: "2 1", Pen.AXIS: "8 1.2 0.6 1.2"}
"""Patterns of lines that are not whole. [mm on paper]"""

FONT = "'DejaVu Sans Condensed','DejaVu Sans','Arial','Liberation Sans',sans-serif"
ANCHOR = {Align.LEFT: "start", Align.CENTRE: "middle", Align.RIGHT: "end"}


def svg_text(drawing: Drawing) -> str:
    """Return a drawing as SVG.

    Parameters
    ----------
    drawing : Drawing
        What is drawn.

    Raises
    ------
    ValueError
        A number in it is not finite.
    """
    require_finite(drawing)
    wide = max((s.size[0] for s in drawing.sheets), default=1.0)
    tall = sum(s.size[1] + BETWEEN for s in drawing.sheets) - BETWEEN if drawing.sheets else 1.0
    stem = f"d-{name_of(drawing.name)}"
    svg = _Svg(
        size=(f"{_n(wide)}mm", f"{_n(tall)}mm"),
        viewBox=f"0 0 {_n(wide)} {_n(tall)}",
        debug=False,
        role="img",
        id=stem,
        **{"class_": "drawing", "aria-labelledby": f"{stem}-title {stem}-desc"},
    )
    _named(svg, stem, drawing)
    top = 0.0
    for number, sheet in enumerate(drawing.sheets, 1):
        svg.add(_sheet(sheet, f"{stem}-{number}", top))
        top += sheet.size[1] + BETWEEN
    return str(svg.tostring()) + "\n"


def name_of(text: str) -> str:
    """Return a text as part of an id or class: no two texts give the same one.

    Parameters
    ----------
    text : str
        A name or a mark.
    """
    return "".join(
        c if c.isascii() and (c.isalnum() or c == "-") else f"_{ord(c):x}_" for c in text
    )


def _named(svg: Any, stem: str, drawing: Drawing) -> None:
    title, desc = plain(drawing.title) or plain(drawing.name), plain(drawing.description)
    svg.set_desc(title=title, desc=desc)
    for element, suffix in zip(svg.elements[:2], ("title", "desc"), strict=True):
        element.xml.set("id", f"{stem}-{suffix}")
    svg.add(_Style(_css()))


def _css() -> str:
    """Return the look of every pen and of texts, bound to drawings of ours."""
    rules = [
        "svg.drawing text{fill:#000;stroke:none;font-family:" + FONT + ";font-stretch:condensed}",
        "svg.drawing .bold{font-weight:700}",
        "svg.drawing path{fill:none;stroke:#000;stroke-linejoin:round}",
        "svg.drawing .full{fill:#000}",
    ]
    for pen in Pen:
        dash = f";stroke-dasharray:{DASHES[pen]}" if pen in DASHES else ""
        rules.append(f"svg.drawing .{_pen(pen)}{{stroke-width:{pen.width:g}{dash}}}")
    return "".join(rules)


def _sheet(sheet: Sheet, name: str, top: float) -> Any:
    group = _Group(id=name, class_="paper", debug=False, transform=f"translate(0 {_n(top)})")
    group.add(_Rect((0, 0), (_n(sheet.size[0]), _n(sheet.size[1])), fill="#fff", class_="ground"))
    for placed in sheet.views:
        view = placed.view
        at = Frame(placed.at, (view.box[0], view.box[1]), view.scale, sheet.size[1])
        child = _Group(
            id=f"{name}-{name_of(view.name)}",
            class_="view",
            debug=False,
            **{"data-view": plain(view.name)},
        )
        _fill(child, view.items, at)
        group.add(child)
    child = _Group(id=f"{name}-items", class_="items", debug=False)
    _fill(child, sheet.items, Frame((0.0, 0.0), (0.0, 0.0), 1.0, sheet.size[1]))
    group.add(child)
    return group


@dataclass(frozen=True, slots=True)
class Frame:
    """Where true millimetres of a view lie on a sheet whose y runs down."""

    at: XY
    origin: XY
    scale: float
    height: float

    def point(self, xy: XY) -> XY:
        """Return a point on the sheet."""
        x = self.at[0] + (xy[0] - self.origin[0]) / self.scale
        y = self.at[1] + (xy[1] - self.origin[1]) / self.scale
        return _n(x), _n(self.height - y)


def _fill(group: Any, items: tuple[Primitive, ...], frame: Frame) -> None:
    drawn: set[Segment] = set()  # lines that dimensions of one chain share
    for item in items:
        match item:
            case Path():
                group.add(_path(item, frame))
            case Disc():
                group.add(_disc(item, frame))
            case Label():
                group.add(_text(item, frame, _marked(item.tag)))
            case Dimension():
                group.add(_dimension(item, frame, drawn))


def _path(item: Path, frame: Frame) -> Any:
    looks = _marked(item.tag, _pen(item.pen), "full" if item.filled else "")
    if item.width is not None:
        looks["style"] = f"stroke-width:{_n(item.width / frame.scale)}"
    return _Path(d=_course(item, frame), debug=False, **looks)


def _course(item: Path, frame: Frame) -> str:
    """Return straights and arcs as path commands; an arc is told by its bulge."""
    points = [frame.point(p) for p in item.points]
    if item.closed:
        points.append(points[0])
    bulges = (*item.bulges, *(0.0,) * (len(points) - len(item.bulges)))
    words = [f"M{points[0][0]:g},{points[0][1]:g}"]
    steps = zip(pairwise(points), pairwise((*item.points, item.points[0])), bulges, strict=False)
    for (_, b), (true_a, true_b), bulge in steps:
        if abs(bulge) < 1e-9:
            words.append(f"L{b[0]:g},{b[1]:g}")
            continue
        chord = ((true_b[0] - true_a[0]) ** 2 + (true_b[1] - true_a[1]) ** 2) ** 0.5
        r = _n(chord / frame.scale * (1 + bulge * bulge) / (4 * abs(bulge)))
        large, sweep = int(abs(bulge) > 1), int(bulge < 0)
        words.append(f"A{r:g},{r:g} 0 {large} {sweep} {b[0]:g},{b[1]:g}")
    return "".join(words) + ("Z" if item.closed else "")


def _disc(item: Disc, frame: Frame) -> Any:
    (x, y), r = frame.point(item.centre), _n(item.radius / frame.scale)
    if item.filled:
        return _Circle((x, y), r, debug=False, **_marked(item.tag, "disc"))
    half = f"a{r:g},{r:g} 0 1 0"
    course = f"M{_n(x - r):g},{y:g}{half} {_n(2 * r):g},0{half} {_n(-2 * r):g},0Z"
    return _Path(d=course, debug=False, **_marked(item.tag, _pen(item.pen)))


def _text(item: Label, frame: Frame, looks: dict[str, Any]) -> Any:
    text = plain(item.text)
    x, y = frame.point(item.at)
    if item.bold:
        looks["class_"] = f"{looks.get('class_', '')} bold".strip()
    if item.angle:
        looks["transform"] = f"rotate({_n(-item.angle):g} {x:g} {y:g})"
    if item.align is not Align.LEFT:
        looks["text_anchor"] = ANCHOR[item.align]
    if len(text) > 1:
        looks["textLength"] = _n(width(text, item.height, bold=item.bold))
        looks["lengthAdjust"] = "spacingAndGlyphs"
    size = _n(item.height / CAPITALS)
    return _Text(text, insert=(x, y), font_size=size, debug=False, **looks)


def _dimension(item: Dimension, frame: Frame, drawn: set[Segment]) -> Any:
    """Return a dimension without the lines that its neighbour in the chain has drawn."""
    group = _Group(debug=False, **_marked(item.tag, "dimension"))
    made = parts(item, frame.scale)
    words = []
    for a, b in made.lines:
        (ax, ay), (bx, by) = ends = frame.point(a), frame.point(b)
        if ends not in drawn:
            drawn.add(ends)
            words.append(f"M{ax:g},{ay:g}L{bx:g},{by:g}")
    if words:
        group.add(_Path(d="".join(words), class_=_pen(Pen.DIMENSION), debug=False))
    group.add(_text(made.label, frame, {}))
    return group


def _marked(tag: Tag, *classes: str) -> dict[str, Any]:
    """Return class and data attributes of what shows a bar."""
    names = [name for name in classes if name]
    looks: dict[str, Any] = {}
    if tag.mark:
        names.append(f"mark-{name_of(tag.mark)}")
        looks["data-mark"] = plain(tag.mark)
        if tag.member:
            looks["data-member"] = plain(tag.member)
    if names:
        looks["class_"] = " ".join(names)
    return looks


def _pen(pen: Pen) -> str:
    return "pen-" + pen.label.replace(" ", "-")


def _n(value: float) -> float:
    """Return a number to 0.001, never minus nought."""
    return round(value, 3) + 0.0
