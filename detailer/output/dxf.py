"""DXF, version R2010: model space in true millimetres, a layout at scale for every sheet.

Views lie in model space where their drawing says; the elevation keeps its true coordinates. Each
sheet is a layout with a viewport for every view. Layers, line types and styles are told in
:mod:`detailer.output.layers`. The same drawing gives the same bytes.
"""

from __future__ import annotations

from collections.abc import Iterator
from contextlib import contextmanager
from io import StringIO
from pathlib import Path
from typing import Any

from ezdxf import units
from ezdxf._options import options
from ezdxf.filemanagement import new

from detailer.drawing.placed import model_box, model_extents, paper_box, require_finite
from detailer.drawing.primitives import Drawing, Placed, Sheet
from detailer.output.entities import Pencil, safe
from detailer.output.layers import VIEWPORTS, define

ROOM = 0.8
"""Viewports are so much larger than their views on every side. [mm on paper]"""

FORBIDDEN = '<>/\\":;?*|=`,'
"""What the name of a layout can't hold."""

LONGEST = 60
"""Characters of a layout's name."""


def write_dxf(drawing: Drawing, path: Path, *, caution: str, date: str) -> None:
    """Write a drawing.

    Parameters
    ----------
    drawing : Drawing
        What is drawn.
    path : Path
        Where to.
    caution : str
        Kept in the file's properties; sheets print their own.
    date : str
        Date of issue, ISO 8601. It is the file's only date.
    """
    path.write_bytes(dxf_bytes(drawing, caution=caution, date=date))


def dxf_bytes(drawing: Drawing, *, caution: str, date: str) -> bytes:
    """Return a drawing as the bytes of a DXF file.

    Parameters
    ----------
    drawing : Drawing
        What is drawn.
    caution : str
        Kept in the file's properties.
    date : str
        Date of issue, ISO 8601.

    Raises
    ------
    ValueError
        A number in the drawing is not finite.
    """
    require_finite(drawing)
    with _repeatable():
        doc: Any = new("R2010", setup=False, units=units.MM)
        _head(doc, drawing, caution, date)
        define(doc)
        names = _layout_names(drawing.sheets)
        for number, (sheet, name) in enumerate(zip(drawing.sheets, names, strict=True)):
            if number == 0:
                doc.layouts.rename("Layout1", name)
                layout = doc.layouts.get(name)
            else:
                layout = doc.layouts.new(name)
            _sheet(doc, layout, sheet)
        return _encoded(doc)


@contextmanager
def _repeatable() -> Iterator[None]:
    """Keep the clock and random identifiers out of the file."""
    before = options.write_fixed_meta_data_for_testing
    options.write_fixed_meta_data_for_testing = True
    try:
        yield
    finally:
        options.write_fixed_meta_data_for_testing = before


def _head(doc: Any, drawing: Drawing, caution: str, date: str) -> None:
    x0, y0, x1, y1 = (round(n, 3) for n in model_extents(drawing))
    header = doc.header
    header["$MEASUREMENT"] = 1
    header["$LTSCALE"] = 1.0
    header["$PSLTSCALE"] = 0  # patterns carry the scale of their view
    header["$EXTMIN"], header["$EXTMAX"] = (x0, y0, 0.0), (x1, y1, 0.0)
    header["$LIMMIN"], header["$LIMMAX"] = (x0, y0), (x1, y1)
    header["$LWDISPLAY"] = 1
    for name, value in (
        ("Title", drawing.title),
        ("Description", drawing.description),
        ("Caution", caution),
        ("Issued", date),
    ):
        header.custom_vars.append(name, safe(value)[:250])
    space = doc.modelspace()
    space.reset_extents((x0, y0, 0.0), (x1, y1, 0.0))
    space.reset_limits((x0, y0), (x1, y1))
    tall = max(y1 - y0, (x1 - x0) / 1.8) * 1.05
    doc.set_modelspace_vport(tall, ((x0 + x1) / 2, (y0 + y1) / 2))


def _sheet(doc: Any, layout: Any, sheet: Sheet) -> None:
    wide, tall = sheet.size
    layout.page_setup(size=(wide, tall), margins=(0, 0, 0, 0), units="mm")
    layout.reset_extents((0.0, 0.0, 0.0), (wide, tall, 0.0))
    layout.reset_limits((0.0, 0.0), (wide, tall))
    layout.dxf_layout.dxf.layout_flags = 0  # patterns are not scaled by viewports
    Pencil(doc, layout, 1.0, (0.0, 0.0)).draw(sheet.items)
    space = doc.modelspace()
    for placed in sheet.views:
        Pencil(doc, space, placed.view.scale, placed.model).draw(placed.view.items)
        _viewport(layout, placed)


def _viewport(layout: Any, placed: Placed) -> None:
    x0, y0, x1, y1 = paper_box(placed)
    a0, b0, a1, b1 = model_box(placed)
    tall = y1 - y0 + 2 * ROOM
    layout.add_viewport(
        center=(round((x0 + x1) / 2, 3), round((y0 + y1) / 2, 3)),
        size=(round(x1 - x0 + 2 * ROOM, 3), round(tall, 3)),
        view_center_point=(round((a0 + a1) / 2, 3), round((b0 + b1) / 2, 3)),
        view_height=round(tall, 3) * placed.view.scale,
        dxfattribs={"layer": VIEWPORTS.name},
    )


def _layout_names(sheets: tuple[Sheet, ...]) -> tuple[str, ...]:
    """Return names layouts may have, each once, whatever the case of letters."""
    names: list[str] = []
    for sheet in sheets:
        kept = "".join("_" if c in FORBIDDEN else c for c in safe(sheet.name)).strip()
        stem = kept[:LONGEST] or "Sheet"
        name, again = stem, 2
        while name.casefold() in {"model", *(n.casefold() for n in names)}:
            name, again = f"{stem} {again}", again + 1
        names.append(name)
    return tuple(names)


def _encoded(doc: Any) -> bytes:
    for kind in sorted(doc.entitydb.dxf_types_in_use()):
        doc.classes.add_class(kind)
    stream = StringIO()
    doc.write(stream)
    return bytes(doc.encode(stream.getvalue()))
