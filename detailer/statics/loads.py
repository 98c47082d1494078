"""The continuous beam under characteristic loads: every pattern, exactly."""

from __future__ import annotations

import itertools
from collections.abc import Iterator

import numpy as np

from detailer.model import Beam, Loads, Span
from detailer.statics.envelope import Floats

FACTOR = 1.5
"""Partial safety factor of dead and imposed load, IS 456:2000, Table 18."""

STEP = 50.0
"""Places of the envelope are no further apart. [mm]"""


def stiffness(span: Span) -> float:
    """Return the second moment of area of the gross web, b D³/12. [mm⁴]

    Parameters
    ----------
    span : Span
        One span.
    """
    return span.section.width * span.section.depth**3 / 12


def free_moment(
    length: float, udl: float, points: tuple[tuple[float, float], ...], x: Floats
) -> Floats:
    """Return moments of a simply supported span. [N·mm]

    Parameters
    ----------
    length : float
        Span. [mm]
    udl : float
        Uniform load. [N/mm]
    points : tuple of (float, float)
        Place from the left end and size of each point load. [mm, N]
    x : ndarray
        Places from the left end. [mm]
    """
    m = udl * x * (length - x) / 2
    for a, p in points:
        m = m + p * np.where(x <= a, x * (length - a), a * (length - x)) / length
    return np.asarray(m)


def free_shear(
    length: float, udl: float, points: tuple[tuple[float, float], ...], x: Floats, side: int
) -> Floats:
    """Return shears dM/dx of a simply supported span, just left (−1) or right (+1) of x. [N]

    Parameters
    ----------
    length : float
        Span. [mm]
    udl : float
        Uniform load. [N/mm]
    points : tuple of (float, float)
        Place from the left end and size of each point load. [mm, N]
    x : ndarray
        Places from the left end. [mm]
    side : int
        Which limit to take at a point load.
    """
    v = udl * (length / 2 - x)
    for a, p in points:
        before = x < a - 1e-9 if side > 0 else x <= a + 1e-9
        v = v + np.where(before, p * (length - a) / length, -p * a / length)
    return np.asarray(v)


def tip_moment(
    length: float, udl: float, points: tuple[tuple[float, float], ...], from_tip: Floats
) -> Floats:
    """Return moments of an overhang at distances from its tip. [N·mm]

    Parameters
    ----------
    length : float
        Overhang. [mm]
    udl : float
        Uniform load. [N/mm]
    points : tuple of (float, float)
        Distance from the tip and size of each point load. [mm, N]
    from_tip : ndarray
        Places. [mm]
    """
    m = -udl * from_tip**2 / 2
    for a, p in points:
        m = m - p * np.maximum(from_tip - a, 0.0)
    return np.asarray(m)


def tip_shear(
    length: float, udl: float, points: tuple[tuple[float, float], ...], from_tip: Floats, side: int
) -> Floats:
    """Return the load between the tip and a place, unsigned. [N]

    Parameters
    ----------
    length : float
        Overhang. [mm]
    udl : float
        Uniform load. [N/mm]
    points : tuple of (float, float)
        Distance from the tip and size of each point load. [mm, N]
    from_tip : ndarray
        Places. [mm]
    side : int
        +1 counts a point load at the place itself, −1 does not.
    """
    v = udl * from_tip
    for a, p in points:
        v = v + np.where(from_tip >= a - 1e-9 if side > 0 else from_tip > a + 1e-9, p, 0.0)
    return np.asarray(v)


def _rotations(
    length: float, udl: float, points: tuple[tuple[float, float], ...]
) -> tuple[float, float]:
    """Return 6 A a/L and 6 A b/L of the free moment diagram, for the three-moment equation."""
    left = right = udl * length**3 / 4
    for a, p in points:
        b = length - a
        left += p * a * (length**2 - a**2) / length
        right += p * b * (length**2 - b**2) / length
    return left, right


def support_moments(
    beam: Beam, loaded: int, udl: float, points: tuple[tuple[float, float], ...]
) -> Floats:
    """Return the moments at all supports from the load of one span. [N·mm]

    Parameters
    ----------
    beam : Beam
        The beam line.
    loaded : int
        Index of the loaded span.
    udl : float
        Its uniform load. [N/mm]
    points : tuple of (float, float)
        Its point loads, from the left end of the span. [mm, N]

    References
    ----------
    .. [1] The three-moment equation for spans of different stiffness.
    """
    inner = [(n, s) for n, s in enumerate(beam.spans) if not s.overhang]
    count = len(beam.supports)
    matrix = np.eye(count)
    right = np.zeros(count)
    span = beam.spans[loaded]
    if span.overhang:
        tip = _from_tip(span, points)
        end = tip_moment(span.length, udl, tip, np.array([span.length]))[0]
        right[span.right if span.left is None else span.left] = end
    for (n0, s0), (n1, s1) in itertools.pairwise(inner):
        k = s0.right
        if k is None:
            continue
        i0, i1 = stiffness(s0), stiffness(s1)
        matrix[k, k] = 2 * (s0.length / i0 + s1.length / i1)
        matrix[k, k - 1] = s0.length / i0
        matrix[k, k + 1] = s1.length / i1
        if n0 == loaded:
            right[k] -= _rotations(s0.length, udl, points)[0] / i0
        if n1 == loaded:
            right[k] -= _rotations(s1.length, udl, points)[1] / i1
    return np.asarray(np.linalg.solve(matrix, right), dtype=np.float64)


def _from_tip(
    span: Span, points: tuple[tuple[float, float], ...]
) -> tuple[tuple[float, float], ...]:
    """Return point loads of an overhang by their distance from the tip."""
    if span.left is None:
        return points
    return tuple((span.length - a, p) for a, p in points)


def places(beam: Beam, span: Span) -> Floats:
    """Return the places of a span's envelope, from its left end; a jump stands twice. [mm]

    Parameters
    ----------
    beam : Beam
        The beam line.
    span : Span
        One of its spans.
    """
    count = max(4, int(np.ceil(span.length / STEP)))
    xs = set(np.linspace(0.0, span.length, count + 1).tolist())
    xs |= {x - span.x0 for x in beam.clear(span)}
    if isinstance(span.results, Loads):
        at = {p.x for p in span.results.points}
        xs |= at
    else:
        at = set()
    return np.array(sorted([*xs, *at]))


def responses(
    beam: Beam, span: Span, loaded: int, udl: float, points: tuple[tuple[float, float], ...]
) -> tuple[Floats, Floats]:
    """Return moments and shears in one span from the loads of another or itself.

    Parameters
    ----------
    beam : Beam
        The beam line.
    span : Span
        Where.
    loaded : int
        Index of the loaded span.
    udl : float
        Its uniform load. [N/mm]
    points : tuple of (float, float)
        Its point loads. [mm, N]
    """
    xs = places(beam, span)
    sides = np.where(np.concatenate([np.diff(xs) < 1e-9, [False]]), -1, 1)
    own = beam.spans[loaded].number == span.number
    if span.overhang:
        if not own:
            return np.zeros(len(xs)), np.zeros(len(xs))
        tip = _from_tip(span, points)
        leftward = span.left is None
        s = xs if leftward else span.length - xs
        m = tip_moment(span.length, udl, tip, s)
        sign = -1.0 if leftward else 1.0
        v = np.where(
            sides * (1 if leftward else -1) > 0,
            tip_shear(span.length, udl, tip, s, 1),
            tip_shear(span.length, udl, tip, s, -1),
        )
        return m, sign * v
    ends = support_moments(beam, loaded, udl, points)
    a, b = float(ends[span.left]), float(ends[span.right])
    m = a + (b - a) * xs / span.length
    v = np.full(len(xs), (b - a) / span.length)
    if own:
        m = m + free_moment(span.length, udl, points, xs)
        v = v + np.where(
            sides > 0,
            free_shear(span.length, udl, points, xs, 1),
            free_shear(span.length, udl, points, xs, -1),
        )
    return m, v


def cases(beam: Beam) -> Iterator[tuple[int, float, tuple[tuple[float, float], ...], bool]]:
    """Yield (span, uniform load, point loads, imposed?) of every characteristic case.

    Parameters
    ----------
    beam : Beam
        A beam line whose spans all carry loads.
    """
    for n, span in enumerate(beam.spans):
        loads = span.results
        if not isinstance(loads, Loads):
            raise ValueError(f"span {span.number} carries no loads")
        yield n, loads.dead, tuple((p.x, p.dead) for p in loads.points), False
        yield n, loads.imposed, tuple((p.x, p.imposed) for p in loads.points), True
