"""Layers, line types and styles of our DXF files.

A layer's name has three fields, in the manner of ISO 13567: who is responsible, what the element
is, how it is shown. ``S`` is the structural discipline.

=================== =======================================================================
S-CONC-OUTLINE      edges of concrete
S-CONC-HIDDEN       edges of concrete behind what is seen
S-GRID-AXIS         grid and centre lines
S-BARS-MAIN         bars
S-BARS-EXTRA        bars told apart from their neighbours by end ticks
S-BARS-LINK         links
S-DIMS-LINE         dimensions
S-NOTE-TEXT         texts
S-NOTE-TITLE        bold texts: titles, headings
S-NOTE-LINE         leaders and their dots
S-NOTE-SHAPE        drawn signs: circles of marks and grids, arrows, sketches
S-DIAG-ENVELOPE     what the design asks for
S-DIAG-RESIST       what the steel resists
S-TABL-LINE         fine lines of tables and of the title block
S-SHEE-FRAME        frame of a sheet
S-SHEE-VIEW         viewports; not plotted
=================== =======================================================================

Every layer is drawn in the paper's contrast colour, so nothing hangs on colour; widths tell what
is what. All lengths below are millimetres on paper.
"""

from __future__ import annotations

from types import MappingProxyType
from typing import Any, NamedTuple

from detailer.drawing.dimensioning import AIR, GAP, OVER, TICK
from detailer.drawing.primitives import Pen

APPID = "DETAILER"
"""Whose extended data an entity carries: ``member=…`` and ``mark=…``."""

FONTS = MappingProxyType({"DETAILER": "arial.ttf", "DETAILER-BOLD": "arialbd.ttf"})
"""Text styles: fonts that CAD systems have."""

NARROW = 0.9
"""Width factor that brings these fonts to the widths texts are laid out with."""

REGULAR, BOLD = FONTS

LINETYPES = MappingProxyType(
    {
        "DETAILER_HIDDEN": ("dashed __ __ __", (3.0, 2.0, -1.0)),
        "DETAILER_AXIS": ("chain ____ _ ____", (11.0, 8.0, -1.2, 0.6, -1.2)),
    }
)
"""Description and pattern: whole length, dash, gap, …"""


class Layer(NamedTuple):
    """A layer: its width in 1/100 mm, its line type."""

    name: str
    weight: int
    linetype: str = "CONTINUOUS"


TEXTS = Layer("S-NOTE-TEXT", 25)
TITLES = Layer("S-NOTE-TITLE", 35)
VIEWPORTS = Layer("S-SHEE-VIEW", 13)

OF_PEN = MappingProxyType(
    {
        Pen.FINE: Layer("S-TABL-LINE", 13),
        Pen.DIMENSION: Layer("S-DIMS-LINE", 18),
        Pen.LEADER: Layer("S-NOTE-LINE", 18),
        Pen.OUTLINE: Layer("S-CONC-OUTLINE", 25),
        Pen.HIDDEN: Layer("S-CONC-HIDDEN", 18, "DETAILER_HIDDEN"),
        Pen.AXIS: Layer("S-GRID-AXIS", 18, "DETAILER_AXIS"),
        Pen.LINK: Layer("S-BARS-LINK", 35),
        Pen.BAR: Layer("S-BARS-MAIN", 50),
        Pen.BAR_EXTRA: Layer("S-BARS-EXTRA", 50),
        Pen.FRAME: Layer("S-SHEE-FRAME", 70),
        Pen.TEXT: Layer("S-NOTE-SHAPE", 25),
        Pen.ENVELOPE: Layer("S-DIAG-ENVELOPE", 35),
        Pen.RESISTANCE: Layer("S-DIAG-RESIST", 50),
    }
)

STEEL = (Pen.BAR, Pen.BAR_EXTRA, Pen.LINK)
"""What is drawn with these pens is a bar and says which."""


def define(doc: Any) -> None:
    """Add line types, layers and text styles to a document.

    Parameters
    ----------
    doc : ezdxf.document.Drawing
        The document.
    """
    doc.appids.new(APPID)
    for name, (words, pattern) in LINETYPES.items():
        doc.linetypes.add(name, pattern=list(pattern), description=words)
    for layer in (*OF_PEN.values(), TEXTS, TITLES, VIEWPORTS):
        made = doc.layers.add(layer.name, color=7, linetype=layer.linetype, lineweight=layer.weight)
        made.dxf.plot = int(layer is not VIEWPORTS)
    for name, font in FONTS.items():
        doc.styles.add(name, font=font, dxfattribs={"width": NARROW})


def dimension_style(doc: Any, scale: float, height: float) -> str:
    """Return the dimension style of a scale and a text height, made when first asked for.

    Parameters
    ----------
    doc : ezdxf.document.Drawing
        The document.
    scale : float
        Of the view; 1 on paper.
    height : float
        Of the text. [mm on paper]
    """
    name = f"DETAILER-{scale:g}" + ("" if height == 2.5 else f"-H{height:g}")
    if name not in doc.dimstyles:
        doc.dimstyles.new(
            name,
            dxfattribs={
                "dimscale": scale,
                "dimtxt": height,
                "dimtxsty": REGULAR,
                "dimtsz": TICK,
                "dimexo": GAP,
                "dimexe": OVER,
                "dimgap": AIR,
                "dimtad": 1,
                "dimtih": 0,
                "dimtoh": 0,
                "dimtix": 1,
                "dimdec": 0,
                "dimlunit": 2,
                "dimlfac": 1.0,
                "dimrnd": 0.0,
                "dimzin": 8,
                "dimlwd": OF_PEN[Pen.DIMENSION].weight,
                "dimlwe": OF_PEN[Pen.DIMENSION].weight,
            },
        )
    return name
