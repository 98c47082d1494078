"""The concrete a cage lies in: webs, flanges, columns, walls as prisms along the line."""

from __future__ import annotations

from collections.abc import Iterator

from detailer.cage.bar import Prism, Rest
from detailer.model import Beam, Span
from detailer.values import FlangeSide, SupportKind

STUB = 500.0
"""How far a support is shown above and below the beam. [mm]"""


def prisms_of(beam: Beam) -> tuple[Prism, ...]:
    """Return the concrete of a beam line with its supports.

    Parameters
    ----------
    beam : Beam
        The beam line.
    """
    return (*_spans(beam), *_supports(beam))


def rests_of(beam: Beam) -> tuple[Rest, ...]:
    """Return the supports as the cage knows them."""
    return tuple(
        Rest(name=s.name, kind=s.kind, x=s.x, width=s.width, across=s.across) for s in beam.supports
    )


def _box(y0: float, y1: float, z0: float, z1: float) -> tuple[tuple[float, float], ...]:
    return ((y0, z0), (y1, z0), (y1, z1), (y0, z1))


def _spans(beam: Beam) -> Iterator[Prism]:
    for n, span in enumerate(beam.spans):
        x0 = beam.start if n == 0 else span.x0
        x1 = beam.end if n == len(beam.spans) - 1 else span.x1
        half = span.section.width / 2
        yield Prism(
            name=f"span {span.number} web",
            x0=x0,
            x1=x1,
            outline=_box(-half, half, span.soffit, span.top),
        )
        yield from _flange(span, x0, x1)


def _flange(span: Span, x0: float, x1: float) -> Iterator[Prism]:
    section = span.section
    if section.flange is None or section.slab <= 0 or section.flange <= section.width:
        return
    half = section.width / 2
    wing = section.flange - section.width
    match section.flange_side:
        case FlangeSide.BOTH:
            y0, y1 = -half - wing / 2, half + wing / 2
        case FlangeSide.LEFT:
            y0, y1 = -half, half + wing
        case FlangeSide.RIGHT:
            y0, y1 = -half - wing, half
    yield Prism(
        name=f"span {span.number} flange",
        x0=x0,
        x1=x1,
        outline=_box(y0, y1, span.top - section.slab, span.top),
    )


def _supports(beam: Beam) -> Iterator[Prism]:
    for n, support in enumerate(beam.supports):
        spans = [span for span in beam.spans_of(n) if span is not None]
        soffit = min(span.soffit for span in spans)
        top = max(span.top for span in spans)
        y0 = -support.offset - support.across / 2
        y1 = -support.offset + support.across / 2
        if support.kind is SupportKind.COLUMN:
            goes_on = support.column is None or support.column.above
            z1 = top + STUB if goes_on else top
            outline = _box(y0, y1, soffit - STUB, z1)
        else:
            outline = _box(y0, y1, soffit - STUB, soffit)
        yield Prism(
            name=f"{support.kind.value} {support.name}",
            x0=support.left,
            x1=support.right,
            outline=outline,
        )
