"""Moments, shears and torsion along a beam line, from whatever form the results came in."""

from __future__ import annotations

import numpy as np

from detailer.model import Beam, HandResults, Loads, Project, Span, Stations
from detailer.statics.envelope import Envelope, Floats, SpanEnvelope, rigid_zones
from detailer.statics.loads import FACTOR, cases, places, responses

__all__ = ["Envelope", "SpanEnvelope", "envelope"]


def envelope(project: Project, beam: Beam) -> Envelope | None:
    """Return the envelope of a beam line; None where its spans carry no results.

    Parameters
    ----------
    project : Project
        The project; its code decides the load factors.
    beam : Beam
        The beam line; all its spans carry results of one form.

    Raises
    ------
    ValueError
        Where spans of one line carry results of different forms.

    Notes
    -----
    Loads: 1.5 (D + L), dead factored on all spans, imposed in every pattern; since each
    place takes each span's imposed load or leaves it, the worst pattern is the sum of all
    contributions of one sign.
    """
    kinds = {type(span.results) for span in beam.spans}
    if kinds == {type(None)}:
        return None
    if len(kinds) > 1:
        raise ValueError(f"beam {beam.mark}: spans carry results of different forms")
    kind = kinds.pop()
    if kind is Loads:
        form, spans = "loads", _from_loads(beam)
    elif kind is Stations:
        form, spans = "stations", [_from_stations(span) for span in beam.spans]
    else:
        form, spans = "hand", [_by_hand(span) for span in beam.spans]
    return Envelope(form=form, beam=beam, spans=tuple(spans), _rigid=rigid_zones(beam))


def _from_loads(beam: Beam) -> list[SpanEnvelope]:
    """Return the envelope of every pattern of factored loads."""
    listed = list(cases(beam))
    result = []
    for span in beam.spans:
        xs = places(beam, span)
        base_m, base_v = np.zeros(len(xs)), np.zeros(len(xs))
        extra = np.zeros((4, len(xs)))
        for loaded, udl, points, imposed in listed:
            m, v = responses(beam, span, loaded, FACTOR * udl, _factored(points))
            if imposed:
                extra += [
                    np.maximum(m, 0),
                    np.minimum(m, 0),
                    np.maximum(v, 0),
                    np.minimum(v, 0),
                ]
            else:
                base_m, base_v = base_m + m, base_v + v
        result.append(
            SpanEnvelope(
                number=span.number,
                x=xs + span.x0,
                m_max=base_m + extra[0],
                m_min=base_m + extra[1],
                v_max=base_v + extra[2],
                v_min=base_v + extra[3],
                t=np.zeros(len(xs)),
            )
        )
    return result


def _factored(points: tuple[tuple[float, float], ...]) -> tuple[tuple[float, float], ...]:
    return tuple((x, FACTOR * p) for x, p in points)


def _from_stations(span: Span) -> SpanEnvelope:
    """Return results as exported, linear between stations; the outer two stand at the ends."""
    if not isinstance(span.results, Stations):
        raise ValueError(f"span {span.number} carries no stations")
    rows = span.results.rows

    def column(name: str) -> Floats:
        return np.array([getattr(row, name) for row in rows], dtype=np.float64)

    x = column("x") + span.x0
    x[[0, -1]] = span.x0, span.x1
    return SpanEnvelope(
        number=span.number,
        x=x,
        m_max=column("m_max"),
        m_min=column("m_min"),
        v_max=column("v_max"),
        v_min=column("v_min"),
        t=column("t"),
    )


def _by_hand(span: Span) -> SpanEnvelope:
    """Return one parabola through three moments, one line through two shears."""
    if not isinstance(span.results, HandResults):
        raise ValueError(f"span {span.number} carries no hand results")
    left, middle, right = span.results.moment
    count = max(8, int(np.ceil(span.length / 50)))
    s = np.linspace(0.0, 1.0, count + 1)
    m = left * (1 - s) * (1 - 2 * s) + 4 * middle * s * (1 - s) + right * s * (2 * s - 1)
    v0, v1 = span.results.shear
    v = v0 + (v1 - v0) * s
    zero = np.zeros(len(s))
    return SpanEnvelope(
        number=span.number, x=span.x0 + s * span.length, m_max=m, m_min=m, v_max=v, v_min=v, t=zero
    )
