"""Primitives as DXF entities, in model space at true size or on a sheet of paper."""

from __future__ import annotations

from dataclasses import dataclass
from typing import Any

from ezdxf.enums import TextEntityAlignment

from detailer.drawing.dimensioning import parts
from detailer.drawing.primitives import (
    XY,
    Align,
    Dimension,
    Disc,
    Label,
    Path,
    Pen,
    Primitive,
    Tag,
)
from detailer.drawing.text import plain
from detailer.output.layers import (
    APPID,
    BOLD,
    NARROW,
    OF_PEN,
    REGULAR,
    STEEL,
    TEXTS,
    TITLES,
    dimension_style,
)

ALIGNMENT = {
    Align.LEFT: TextEntityAlignment.LEFT,
    Align.CENTRE: TextEntityAlignment.CENTER,
    Align.RIGHT: TextEntityAlignment.RIGHT,
}


def safe(text: str) -> str:
    """Return a text in which no reader of DXF finds a code.

    Parameters
    ----------
    text : str
        Any text.
    """
    if text.isalnum():
        return text
    found = plain(text).replace("^", "^ ")
    for code in ("%%", "\\U+", "\\M+", "\\u+", "\\m+"):
        while code in found:
            found = found.replace(code, f"{code[0]} {code[1:]}")
    return found


def safe_in_dimension(text: str) -> str:
    """Return the text of a dimension, where braces and backslashes format.

    Parameters
    ----------
    text : str
        Any text; ``<>`` stands for the distance.
    """
    found = safe(text).replace("\\", "\\\\")
    return found.replace("{", "\\{").replace("}", "\\}")


@dataclass(frozen=True, slots=True)
class Pencil:
    """Draws primitives of one view in one space of a document."""

    doc: Any
    space: Any
    scale: float  # what a millimetre on paper is here
    shift: XY

    def draw(self, items: tuple[Primitive, ...]) -> None:
        """Draw primitives in order.

        Parameters
        ----------
        items : tuple of Primitive
            In the view's own millimetres.
        """
        for item in items:
            match item:
                case Path():
                    self._path(item)
                case Disc():
                    self._disc(item)
                case Label():
                    self._text(self.space, item, self.scale)
                case Dimension():
                    self._dimension(item)

    def _at(self, point: XY) -> XY:
        return _r(point[0] + self.shift[0]), _r(point[1] + self.shift[1])

    def _looks(self, pen: Pen) -> dict[str, Any]:
        layer = OF_PEN[pen]
        looks: dict[str, Any] = {"layer": layer.name}
        if layer.linetype != "CONTINUOUS" and self.scale != 1:
            looks["ltscale"] = self.scale
        return looks

    def _path(self, item: Path) -> None:
        points = [self._at(p) for p in item.points]
        looks = self._looks(item.pen)
        if item.filled:
            self._fill(item, points)
        straight = not any(item.bulges)
        if len(points) == 2 and straight and item.width is None and item.pen not in STEEL:
            self.space.add_line(*points, dxfattribs=looks)
            return
        bulges = (*item.bulges, *(0.0,) * (len(points) - len(item.bulges)))
        vertices = [(x, y, round(b, 9)) for (x, y), b in zip(points, bulges, strict=False)]
        if item.width is not None:
            looks["const_width"] = _r(item.width)
        drawn = self.space.add_lwpolyline(
            vertices, format="xyb", close=item.closed, dxfattribs=looks
        )
        self._say(drawn, item.pen, item.tag)

    def _fill(self, item: Path, points: list[XY]) -> None:
        hatch = self.space.add_hatch(color=256, dxfattribs={"layer": OF_PEN[item.pen].name})
        bulges = (*item.bulges, *(0.0,) * (len(points) - len(item.bulges)))
        edge = [(x, y, round(b, 9)) for (x, y), b in zip(points, bulges, strict=False)]
        hatch.paths.add_polyline_path(edge, is_closed=True)

    def _disc(self, item: Disc) -> None:
        """Draw a circle; a full one is a ring as wide as its radius."""
        looks = self._looks(item.pen)
        if not item.filled:
            self.space.add_circle(self._at(item.centre), _r(item.radius), dxfattribs=looks)
            return
        (x, y), half = self._at(item.centre), _r(item.radius / 2)
        looks["const_width"] = 2 * half
        ring = self.space.add_lwpolyline(
            [(x - half, y, 1.0), (x + half, y, 1.0)], format="xyb", close=True, dxfattribs=looks
        )
        self._say(ring, item.pen, item.tag)

    def _text(self, space: Any, item: Label, scale: float) -> None:
        layer = TITLES if item.bold else TEXTS
        looks = {
            "layer": layer.name,
            "style": BOLD if item.bold else REGULAR,
            "height": _r(item.height * scale),
            "width": NARROW,
        }
        if item.angle:
            looks["rotation"] = _r(item.angle)
        text = space.add_text(safe(item.text), dxfattribs=looks)
        if item.align is Align.LEFT:
            text.dxf.insert = self._at(item.at)
        else:
            text.set_placement(self._at(item.at), align=ALIGNMENT[item.align])

    def _dimension(self, item: Dimension) -> None:
        """Draw a dimension with a block of its own picture, as every CAD system expects."""
        drawn = parts(item, self.scale)
        block = self.doc.blocks.new_anonymous_block(type_char="D")
        looks = {"layer": OF_PEN[Pen.DIMENSION].name}
        for start, end in drawn.lines:
            block.add_line(self._at(start), self._at(end), dxfattribs=looks)
        self._text(block, drawn.label, self.scale)
        text = safe_in_dimension(item.text)
        up, foot = (
            (90.0, (item.line, item.end[1]))
            if item.vertical
            else (
                0.0,
                (item.end[0], item.line),
            )
        )
        x, y = self._at(drawn.label.at)
        half = item.height * self.scale / 2
        self.space.new_entity(
            "DIMENSION",
            {
                "layer": looks["layer"],
                "dimstyle": dimension_style(self.doc, self.scale, item.height),
                "geometry": block.name,
                "dimtype": 160,  # rotated, a block of its own, text where we put it
                "defpoint": (*self._at(foot), 0.0),
                "defpoint2": (*self._at(item.start), 0.0),
                "defpoint3": (*self._at(item.end), 0.0),
                "text_midpoint": (x - half, y, 0.0) if item.vertical else (x, y + half, 0.0),
                "attachment_point": 5,
                "angle": up,
                "actual_measurement": _r(item.distance),
                "text": text if text != "<>" else "",
            },
        )

    def _say(self, entity: Any, pen: Pen, tag: Tag) -> None:
        """Let a bar carry its member and its mark."""
        if pen in STEEL and tag.mark:
            entity.set_xdata(
                APPID,
                [(1000, f"member={_short(tag.member)}"), (1000, f"mark={_short(tag.mark)}")],
            )


def _short(text: str) -> str:
    """Return a text as extended data may hold it: at most 255 bytes with its name."""
    return safe(text).encode("utf-8")[:240].decode("utf-8", "ignore")


def _r(value: float) -> float:
    """Return a length to 0.001, never minus nought."""
    return round(float(value), 3) + 0.0
