"""Sizes of a section: its web, what is dimensioned on it, and where call-outs stand beside it."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass

from detailer.cage.bar import Cage
from detailer.cage.cut import Slice
from detailer.cage.measure import outer_box
from detailer.drawing.primitives import Dimension
from detailer.views.kit import TEXT, Kit

WING = 5.0
"""So much of a slab is shown beside the web. [mm on paper]"""

EXTENSION = 2.0
"""Length of an extension line that does not reach the concrete. [mm on paper]"""

FAR = 4.5
"""From the concrete to a call-out. [mm on paper]"""


@dataclass(frozen=True, slots=True, kw_only=True)
class Web:
    """The web of a slice in the picture's axes. [mm]"""

    x0: float
    x1: float
    z0: float
    z1: float


def web_of(cage: Cage, x: float) -> Web:
    """Return the web at a plane, in the picture's axes.

    Parameters
    ----------
    cage : Cage
        The cage.
    x : float
        The plane. [mm]
    """
    webs = [p for p in cage.prisms if p.name.endswith(" web") and p.x0 <= x <= p.x1]
    ys = [y for p in webs for y, _ in p.outline]
    zs = [z for p in webs for _, z in p.outline]
    return Web(x0=-max(ys), x1=-min(ys), z0=min(zs), z1=max(zs))


def beside(seen: Slice, web: Web, side: int) -> float:
    """Return how far from the web call-outs stand: beyond the slab, if there is one.

    Parameters
    ----------
    seen : Slice
        The slice.
    web : Web
        Its web.
    side : int
        +1 to the right of the picture, −1 to the left. [mm on paper]
    """
    y0, _, y1, _ = seen.outline.bounds
    slab = -y0 > web.x1 + 1.0 if side > 0 else -y1 < web.x0 - 1.0
    return WING + 2.0 if slab else FAR


def size_items(seen: Slice, web: Web, kit: Kit, words: float, *, full: bool) -> Iterator[Dimension]:
    """Yield width and depth, outside the words at the left; in full also slab and cover.

    Parameters
    ----------
    seen : Slice
        The slice.
    web : Web
        Its web.
    kit : Kit
        Member and scale.
    words : float
        Width of the call-outs at the left. [mm]
    full : bool
        Whether slab and cover are dimensioned here.
    """
    bottom = web.z0 - kit.mm(FAR + TEXT + 5.0)
    left = web.x0 - kit.mm(beside(seen, web, -1) + 2.0) - words
    short = bottom + kit.mm(EXTENSION)
    yield Dimension(start=(web.x0, short), end=(web.x1, short), line=bottom)
    near = left + kit.mm(EXTENSION)
    yield Dimension(start=(near, web.z0), end=(near, web.z1), line=left, vertical=True)
    slab = _slab(seen, web) if full else None
    if slab is not None:
        edge = web.x0 - kit.mm(WING)
        line = edge - kit.mm(EXTENSION + 1.0)
        yield Dimension(start=(edge, slab), end=(edge, web.z1), line=line, vertical=True)
    if full:
        yield from _cover(seen, web, kit)


def _slab(seen: Slice, web: Web) -> float | None:
    """Return the underside of the slab beside a web; None without one."""
    outline = getattr(seen.outline, "exterior", None)
    if outline is None:
        return None
    beyond = [z for y, z in outline.coords if not web.x0 - 1.0 <= -y <= web.x1 + 1.0]
    low = min(beyond, default=web.z0)
    return low if web.z0 + 1.0 < low < web.z1 - 1.0 else None


def _cover(seen: Slice, web: Web, kit: Kit) -> Iterator[Dimension]:
    """Yield the cover below the links, at the left where nothing else stands."""
    levels = [outer_box(bar).z0 + bar.placings[k][2] for bar, k in seen.links]
    if levels:
        edge = web.x0 - kit.mm(1.0)
        start, end = (edge, web.z0), (edge, min(levels))
        line = edge - kit.mm(EXTENSION)
        yield Dimension(start=start, end=end, line=line, text="<> cover", vertical=True)
