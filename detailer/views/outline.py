"""The concrete of a beam line seen from its side: one outline, columns and walls broken off."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass
from typing import Any

from detailer.cage.bar import Cage, Prism
from detailer.drawing.primitives import XY, Path, Pen
from detailer.views.kit import Kit

STUB_ABOVE = 5.0
"""A support that goes on above is shown so high. [mm on paper]"""

STUB_BELOW = 7.0
"""A support is shown so far below the beam. [mm on paper]"""


@dataclass(frozen=True, slots=True)
class _Block:
    """A prism seen from the side."""

    x0: float
    x1: float
    z0: float
    z1: float


def _block(prism: Prism) -> _Block:
    zs = [z for _, z in prism.outline]
    return _Block(prism.x0, prism.x1, min(zs), max(zs))


def _is_support(prism: Prism) -> bool:
    return not prism.name.startswith("span ")


def beam_depth(cage: Cage) -> tuple[float, float]:
    """Return z of the lowest soffit and of the highest top of the beam itself. [mm]

    Parameters
    ----------
    cage : Cage
        The cage.
    """
    blocks = [_block(p) for p in cage.prisms if not _is_support(p)]
    return min(b.z0 for b in blocks), max(b.z1 for b in blocks)


def concrete_outline(cage: Cage, kit: Kit) -> Iterator[Path]:
    """Yield the outline, the breaks of the supports, their faces and the slab within it.

    Parameters
    ----------
    cage : Cage
        The cage.
    kit : Kit
        Member and scale.
    """
    import shapely

    geo: Any = shapely
    low, high = beam_depth(cage)
    floor, roof = low - kit.mm(STUB_BELOW), high + kit.mm(STUB_ABOVE)
    beams = [_block(p) for p in cage.prisms if not _is_support(p)]
    stubs = [_block(p) for p in cage.prisms if _is_support(p)]
    shown = [_Block(b.x0, b.x1, max(b.z0, floor), min(b.z1, roof)) for b in stubs]
    solid = geo.union_all([geo.box(b.x0, b.z0, b.x1, b.z1) for b in (*beams, *shown)])
    body = geo.union_all([geo.box(b.x0, b.z0, b.x1, b.z1) for b in beams])
    breaks = [(b.x0, b.x1, z) for b in shown for z in (b.z0, b.z1) if z in (floor, roof)]
    cuts = [geo.LineString([(x0, z), (x1, z)]) for x0, x1, z in breaks]
    edge = solid.boundary.difference(geo.union_all(cuts).buffer(1e-3)) if cuts else solid.boundary
    yield from _lines(edge, kit, Pen.OUTLINE)
    for x0, x1, z in breaks:
        yield _break(x0, x1, z, kit)
    for b in shown:
        for x in (b.x0, b.x1):
            face = geo.LineString([(x, low - 1), (x, high + 1)]).intersection(body)
            yield from _lines(face.difference(solid.boundary.buffer(1e-3)), kit, Pen.HIDDEN)
    yield from _slabs(cage, kit)


def _slabs(cage: Cage, kit: Kit) -> Iterator[Path]:
    for prism in cage.prisms:
        if prism.name.endswith(" flange"):
            b = _block(prism)
            yield kit.line((b.x0, b.z0), (b.x1, b.z0), pen=Pen.HIDDEN)


def _lines(shape: Any, kit: Kit, pen: Pen) -> Iterator[Path]:
    for part in _parts(shape):
        coords = tuple((round(x, 3), round(z, 3)) for x, z in part.coords)
        if len(coords) > 1:
            yield Path(points=coords, pen=pen, tag=kit.named(""))


def _parts(shape: Any) -> list[Any]:
    import shapely

    geo: Any = shapely
    merged = geo.line_merge(shape) if shape.geom_type == "MultiLineString" else shape
    parts = getattr(merged, "geoms", [merged])
    lines = (p for p in parts if p.geom_type in ("LineString", "LinearRing") and not p.is_empty)
    return sorted(lines, key=lambda p: p.bounds)


def _break(x0: float, x1: float, z: float, kit: Kit) -> Path:
    """Return a break line: level, with a zigzag in its middle."""
    over, size, middle = kit.mm(1.0), kit.mm(1.0), (x0 + x1) / 2
    points: tuple[XY, ...] = (
        (x0 - over, z),
        (middle - size / 2, z),
        (middle - size / 4, z + size),
        (middle + size / 4, z - size),
        (middle + size / 2, z),
        (x1 + over, z),
    )
    return Path(points=points, pen=Pen.DIMENSION, tag=kit.named(""))


def support_faces(cage: Cage) -> tuple[tuple[float, float], ...]:
    """Return x of the two faces of each support. [mm]

    Parameters
    ----------
    cage : Cage
        The cage.
    """
    return tuple((s.x - s.width / 2, s.x + s.width / 2) for s in cage.supports)


def clear_spans(cage: Cage) -> tuple[tuple[float, float], ...]:
    """Return each span between faces, or from a face to a free tip. [mm]

    Parameters
    ----------
    cage : Cage
        The cage.
    """
    faces = support_faces(cage)
    beams = [p for p in cage.prisms if not _is_support(p)]
    start, end = min(p.x0 for p in beams), max(p.x1 for p in beams)
    stops = [start, *(x for pair in faces for x in pair), end]
    pairs = zip(stops[::2], stops[1::2], strict=True)
    return tuple((a, b) for a, b in pairs if b - a > 1.0)
