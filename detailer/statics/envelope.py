"""The envelope of moments and shears that a beam line must resist."""

from __future__ import annotations

from dataclasses import dataclass, field

import numpy as np
from numpy.typing import NDArray

from detailer.model import Beam, Span

Floats = NDArray[np.float64]

SAME = 1e-9
"""Two stations no further apart are one place that stands twice. [mm]"""


@dataclass(frozen=True, slots=True, kw_only=True, eq=False)
class SpanEnvelope:
    """Results of one span at ascending places; a place may stand twice where a value jumps."""

    number: int  # of the span
    x: Floats  # along the line [mm]
    m_max: Floats  # [N·mm]
    m_min: Floats
    v_max: Floats  # [N]
    v_min: Floats
    t: Floats  # unsigned [N·mm]


@dataclass(frozen=True, slots=True, kw_only=True, eq=False)
class Envelope:
    """Enveloped results along a beam line; sagging +, V = dM/dx.

    Inside a support that is cast with the beam the design moment is the one at its face
    (IS 456:2000, 22.6.1, FROM MEMORY, page_seen=False).
    """

    form: str  # "loads", "stations" or "hand"
    beam: Beam
    spans: tuple[SpanEnvelope, ...]
    _rigid: tuple[tuple[float, float, float], ...] = field(default=())

    def moments(self, xs: Floats) -> tuple[Floats, Floats]:
        """Return the least and the greatest design moment at places. [N·mm]

        Parameters
        ----------
        xs : ndarray
            Places along the line. [mm]
        """
        return self._worst("m_min", "m_max", xs, clamp=True)

    def moment(self, x: float, *, side: int = 0) -> tuple[float, float]:
        """Return the least and the greatest design moment at a place. [N·mm]

        Parameters
        ----------
        x : float
            Place along the line. [mm]
        side : int
            −1 and +1 take the value just left and right of it, 0 the worse of both.
        """
        at = np.array([x + 1e-3 * side])
        least, most = self.moments(at)
        return float(least[0]), float(most[0])

    def shears(self, xs: Floats) -> tuple[Floats, Floats]:
        """Return the least and the greatest shear at places. [N]

        Parameters
        ----------
        xs : ndarray
            Places along the line. [mm]
        """
        return self._worst("v_min", "v_max", xs, clamp=False)

    def shear(self, x: float, *, side: int = 0) -> tuple[float, float]:
        """Return the least and the greatest shear at a place. [N]

        Parameters
        ----------
        x : float
            Place along the line. [mm]
        side : int
            As for :meth:`moment`.
        """
        least, most = self.shears(np.array([x + 1e-3 * side]))
        return float(least[0]), float(most[0])

    def torsions(self, xs: Floats) -> Floats:
        """Return the largest torsion at places, unsigned. [N·mm]

        Parameters
        ----------
        xs : ndarray
            Places along the line. [mm]
        """
        return self._worst("t", "t", xs, clamp=False)[1]

    def torsion(self, x: float) -> float:
        """Return the largest torsion at a place, unsigned. [N·mm]

        Parameters
        ----------
        x : float
            Place along the line. [mm]
        """
        return float(self.torsions(np.array([x]))[0])

    @property
    def twisted(self) -> bool:
        """Return whether any torsion is given."""
        return any(bool(np.any(span.t > 0)) for span in self.spans)

    def sample(self, span: Span, step: float = 50.0) -> Floats:
        """Return places between the faces of a span. [mm]

        The faces are among them, the stations that were given, and where a value jumps.

        Parameters
        ----------
        span : Span
            One span of the line.
        step : float
            No two places are further apart. [mm]
        """
        x0, x1 = self.beam.clear(span)
        count = max(2, int(np.ceil((x1 - x0) / step)) + 1)
        mine = next(s for s in self.spans if s.number == span.number)
        own = mine.x if self.form == "stations" else mine.x[:-1][np.diff(mine.x) < SAME]
        own = own[(own > x0) & (own < x1)]
        return np.unique(np.concatenate([np.linspace(x0, x1, count), own]))

    def peak_sagging(self, span: Span) -> tuple[float, float]:
        """Return where in a span the sagging moment is greatest, and how great. [mm, N·mm]

        Parameters
        ----------
        span : Span
            One span of the line.
        """
        xs = self.sample(span, 10.0)
        _, most = self.moments(xs)
        at = int(np.argmax(most))
        return float(xs[at]), float(most[at])

    def peak_hogging(self, support: int) -> float:
        """Return the greatest hogging moment at a support, unsigned. [N·mm]

        Parameters
        ----------
        support : int
            Index of the support.
        """
        at = self.beam.supports[support]
        xs = np.array([at.left, at.x, at.right])
        inside = (xs >= self.beam.start) & (xs <= self.beam.end)
        least, _ = self.moments(xs[inside])
        return float(max(0.0, -least.min()))

    def inflections(self, span: Span, *, hogging: bool) -> tuple[float, ...]:
        """Return where tension of one sense begins or ends in a span. [mm]

        Parameters
        ----------
        span : Span
            One span of the line.
        hogging : bool
            Of the hogging moment; otherwise of the sagging one.
        """
        xs = self.sample(span, 10.0)
        least, most = self.moments(xs)
        values = np.maximum(-least, 0.0) if hogging else np.maximum(most, 0.0)
        signed = -least if hogging else most
        turns = np.nonzero((values[:-1] > 0) != (values[1:] > 0))[0]
        found = []
        for i in turns:
            a, b = float(signed[i]), float(signed[i + 1])
            found.append(float(xs[i] + (xs[i + 1] - xs[i]) * (a / (a - b) if a != b else 0.5)))
        return tuple(found)

    def _worst(self, low: str, high: str, xs: Floats, *, clamp: bool) -> tuple[Floats, Floats]:
        """Return the least and the greatest over all spans that hold each place."""
        at = self._clamped(xs) if clamp else np.asarray(xs, dtype=np.float64)
        least = np.full(len(at), np.inf)
        most = np.full(len(at), -np.inf)
        for span in self.spans:
            inside = (at >= span.x[0] - 1e-6) & (at <= span.x[-1] + 1e-6)
            if not inside.any():
                continue
            here = at[inside]
            for name, pick, out in ((low, np.minimum, least), (high, np.maximum, most)):
                out[inside] = pick(out[inside], _between(span.x, getattr(span, name), here, pick))
        return np.where(np.isfinite(least), least, 0.0), np.where(np.isfinite(most), most, 0.0)

    def _clamped(self, xs: Floats) -> Floats:
        """Move places inside monolithic supports to the face on their side of the centre.

        At a centre that two spans share the side of the worse moment is not known, so the
        centre goes to the right face; callers that need both ask at both faces.
        """
        at = np.array(xs, dtype=np.float64)
        for left, centre, right in self._rigid:
            at = np.where((at > left) & (at < centre), left, at)
            at = np.where((at >= centre) & (at < right), right, at)
        return np.clip(at, self.spans[0].x[0], self.spans[-1].x[-1])


def _between(x: Floats, values: Floats, at: Floats, pick: np.ufunc) -> Floats:
    """Interpolate; at a place that stands twice take the worse of the two values."""
    result = np.interp(at, x, values)
    jumps = np.nonzero(np.diff(x) < SAME)[0]
    for i in jumps:
        same = np.abs(at - x[i]) < 1e-6
        if same.any():
            result = np.where(same, pick(values[i], values[i + 1]), result)
    return np.asarray(result, dtype=np.float64)


def rigid_zones(beam: Beam) -> tuple[tuple[float, float, float], ...]:
    """Return (left, centre, right) of the supports cast with the beam. [mm]

    At the ends of the line, where no span lies beyond, the outer half counts to the inner
    face as well.

    Parameters
    ----------
    beam : Beam
        The beam line.
    """
    zones = []
    for n, support in enumerate(beam.supports):
        if not support.monolithic:
            continue
        left, right = beam.spans_of(n)
        if left is None:
            zones.append((support.left - 1.0, support.left - 1.0, support.right))
        elif right is None:
            zones.append((support.left, support.right + 1.0, support.right + 1.0))
        else:
            zones.append((support.left, support.x, support.right))
    return tuple(zones)
