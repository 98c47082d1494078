"""A brute-force sampler of cage.json: walks every real bar in small steps and compares.

It shares no code with the program. It bends the bars by itself, cuts them into chords, and says
in plain sentences what touches undeclared, what penetrates, which declared contact does not
hold, and where cover is not kept.
"""

from __future__ import annotations

import json
import math
from itertools import pairwise
from typing import Any

import numpy as np
import shapely

STEP = 10.0  # along straights
SAGITTA = 0.004  # of chords in bends
MEET = 0.04  # an undeclared contact
DEEP = 0.5  # a penetration, or a declared contact that does not touch
SHORT = 0.1  # cover may be short by this


class Real:
    """One real bar: a chain of points, box and radius."""

    def __init__(self, bar: dict[str, Any], number: int, chain: np.ndarray) -> None:
        self.id, self.role, self.number = bar["id"], bar["role"], number
        self.r = bar["diameter"] / 2
        self.chain = chain + np.array(bar["placings"][number], dtype=float)
        self.low = self.chain.min(axis=0) - self.r
        self.high = self.chain.max(axis=0) + self.r
        p, q = self.chain[:-1], self.chain[1:]
        self.small = np.minimum(p, q) - self.r
        self.large = np.maximum(p, q) + self.r

    @property
    def name(self) -> str:
        return f"{self.id}[{self.number}]"


def chain_of(bar: dict[str, Any]) -> np.ndarray:
    """Bend a bar: cut each corner by its tangents, walk round, walk the straights."""
    corners = [np.array(c, dtype=float) for c in bar["corners"]]
    stops = [corners[0]]
    points: list[np.ndarray] = [corners[0]]
    for before, here, after, mandrel in zip(
        corners, corners[1:], corners[2:], bar["mandrels"], strict=False
    ):
        radius = mandrel / 2 + bar["diameter"] / 2
        a = (before - here) / np.linalg.norm(before - here)
        b = (after - here) / np.linalg.norm(after - here)
        opening = math.acos(max(-1.0, min(1.0, float(a @ b))))
        if math.pi - opening < 1e-6 or opening < 0.01:
            walk(points, here)
            continue
        tangent = radius / math.tan(opening / 2)
        middle = (a + b) / np.linalg.norm(a + b)
        centre = here + middle * radius / math.sin(opening / 2)
        walk(points, here + a * tangent)
        e = here + a * tangent - centre
        f = here + b * tangent - centre
        whole = math.pi - opening
        count = max(2, math.ceil(whole / (2 * math.acos(1 - SAGITTA / radius))))
        for k in range(1, count + 1):
            t = k / count
            mixed = (math.sin((1 - t) * whole) * e + math.sin(t * whole) * f) / math.sin(whole)
            points.append(centre + mixed)
        stops.append(here)
    walk(points, corners[-1])
    return np.array(points)


def walk(points: list[np.ndarray], goal: np.ndarray) -> None:
    start = points[-1]
    far = float(np.linalg.norm(goal - start))
    if far < 1e-6:
        return
    count = max(1, math.ceil(far / STEP))
    points.extend(start + (goal - start) * k / count for k in range(1, count + 1))


def reals_of(member: dict[str, Any]) -> list[Real]:
    found = []
    for bar in member["bars"]:
        chain = chain_of(bar)
        found += [Real(bar, k, chain) for k in range(len(bar["placings"]))]
    return found


def chords(real: Real, low: np.ndarray, high: np.ndarray) -> np.ndarray:
    """Return numbers of the chords whose boxes meet a box."""
    if (real.low > high).any() or (real.high < low).any():
        return np.zeros(0, dtype=int)
    meets = real.large[:, 0] >= low[0]
    meets &= real.small[:, 0] <= high[0]
    if not meets.any():
        return np.zeros(0, dtype=int)
    rows = np.flatnonzero(meets)
    small, large = real.small[rows, 1:], real.large[rows, 1:]
    return rows[np.all((small <= high[1:]) & (large >= low[1:]), axis=1)]


def clear(a: Real, ia: np.ndarray, b: Real, ib: np.ndarray) -> tuple[float, float]:
    """Return the least clear distance of some chords of two bars, and x where it is."""
    best, x = math.inf, 0.0
    for part in range(0, len(ia), 400):
        i, j = (m.ravel() for m in np.meshgrid(ia[part : part + 400], ib, indexing="ij"))
        centre = np.abs((a.chain[i] + a.chain[i + 1]) / 2 - (b.chain[j] + b.chain[j + 1]) / 2).max(
            axis=1
        )
        near = centre <= a.r + b.r + 2 * STEP
        i, j = i[near], j[near]
        if not len(i):
            continue
        gap, where = chord_gaps(a, i, b, j)
        k = int(np.argmin(gap))
        if gap[k] < best:
            best, x = float(gap[k]), float(where[k])
    return best, x


def chord_gaps(a: Real, i: np.ndarray, b: Real, j: np.ndarray) -> tuple[np.ndarray, np.ndarray]:
    """Try the crossing of the axes and all four ends against the other chord."""
    a0, a1, b0, b1 = a.chain[i], a.chain[i + 1], b.chain[j], b.chain[j + 1]
    tries = [
        (a0, foot(a0, b0, b1)),
        (a1, foot(a1, b0, b1)),
        (foot(b0, a0, a1), b0),
        (foot(b1, a0, a1), b1),
    ]
    u, v, w = a1 - a0, b1 - b0, a0 - b0
    uu, vv, uv = (u * u).sum(1), (v * v).sum(1), (u * v).sum(1)
    det = uu * vv - uv * uv
    safe = np.where(det > 1e-9, det, 1.0)
    s = ((uv * (v * w).sum(1) - vv * (u * w).sum(1)) / safe).clip(0, 1)[:, None]
    cross = a0 + s * u
    tries.append((cross, foot(cross, b0, b1)))
    best = np.full(len(i), np.inf)
    x = np.zeros(len(i))
    for p, q in tries:
        gap = between(a, p, b, q)
        closer = gap < best
        best[closer], x[closer] = gap[closer], p[closer, 0]
    return best, x


def foot(p: np.ndarray, q0: np.ndarray, q1: np.ndarray) -> np.ndarray:
    way = q1 - q0
    t = ((p - q0) * way).sum(1) / (way * way).sum(1)
    return q0 + t.clip(0, 1)[:, None] * way


def between(a: Real, p: np.ndarray, b: Real, q: np.ndarray) -> np.ndarray:
    """Clear distance for pairs of points on two axes; a bar ends flat, not round."""
    way = q - p
    far = np.linalg.norm(way, axis=1)
    past_a, past_b = past(a, p, way), past(b, q, -way)
    side_a = np.sqrt(np.maximum(far**2 - past_a**2, 0))
    side_b = np.sqrt(np.maximum(far**2 - past_b**2, 0))
    from_a = np.hypot(past_a, np.maximum(side_a - a.r, 0)) - b.r
    from_b = np.hypot(past_b, np.maximum(side_b - b.r, 0)) - a.r
    faces = np.maximum(past_a, past_b)
    gap = far - a.r - b.r
    gap = np.where(past_a > 0, from_a, gap)
    gap = np.where(past_b > 0, from_b, gap)
    both = np.hypot(faces, np.maximum(np.minimum(side_a, side_b) - a.r - b.r, 0))
    return np.where((past_a > 0) & (past_b > 0), both, gap)


def past(real: Real, p: np.ndarray, way: np.ndarray) -> np.ndarray:
    """How far a way leads straight out of a free end, 0 elsewhere."""
    found = np.zeros(len(p))
    for tip, inner in ((real.chain[0], real.chain[1]), (real.chain[-1], real.chain[-2])):
        out = (tip - inner) / np.linalg.norm(tip - inner)
        at = np.linalg.norm(p - tip, axis=1) < 1e-6
        found = np.where(at, np.maximum(way @ out, 0), found)
    return np.where(found > 1e-6, found, 0)


def pair_gap(a: Real, b: Real, margin: float = 1.0) -> tuple[float, float]:
    """Return the least clear distance of two real bars (inf if beyond a margin), and x."""
    if (a.low > b.high + margin).any() or (b.low > a.high + margin).any():
        return math.inf, 0.0
    ia = chords(a, b.low - margin, b.high + margin)
    if not len(ia):
        return math.inf, 0.0
    ib = chords(b, a.low - margin, a.high + margin)
    if not len(ib):
        return math.inf, 0.0
    return clear(a, ia, b, ib)


def touching(member: dict[str, Any]) -> list[str]:
    """Say which bars touch undeclared or penetrate."""
    reals = sorted(reals_of(member), key=lambda r: r.low[0])
    meant: dict[tuple[str, str], list[dict[str, Any]]] = {}
    for contact in member["contacts"]:
        meant.setdefault(ids(contact["a"], contact["b"]), []).append(contact)
    found = [line for real in reals if (line := own_ends(real))]
    low = np.array([r.low for r in reals])
    high = np.array([r.high for r in reals])
    for n, a in enumerate(reals):
        close = np.all((low[n + 1 :] <= high[n] + 1) & (high[n + 1 :] >= low[n] - 1), axis=1)
        for m in np.flatnonzero(close):
            b = reals[n + 1 + int(m)]
            gap, x = pair_gap(a, b)
            if gap < -DEEP:
                found.append(f"{a.name} and {b.name} penetrate by {-gap:.2f} at x {x:.0f}")
            elif gap <= MEET and not allowed(meant.get(ids(a.id, b.id), []), a, b, x):
                found.append(f"{a.name} and {b.name} touch undeclared at x {x:.0f}")
    return found


def allowed(contacts: list[dict[str, Any]], a: Real, b: Real, x: float) -> bool:
    slack = 4 * (a.r + b.r)
    return any(
        c["kind"] in ("lap", "bundle") or c["x0"] - slack <= x <= c["x1"] + slack for c in contacts
    )


def ids(a: str, b: str) -> tuple[str, str]:
    return (a, b) if a <= b else (b, a)


def own_ends(real: Real) -> str:
    """Say when the two ends of a link penetrate: the first third of it against the last."""
    if real.role not in ("link", "tie") or real.number or len(real.chain) < 9:
        return ""
    run = np.concatenate(([0.0], np.cumsum(np.linalg.norm(np.diff(real.chain, axis=0), axis=1))))
    first = np.flatnonzero(run[1:] <= run[-1] / 3)
    last = np.flatnonzero(run[:-1] >= 2 * run[-1] / 3)
    gap, x = clear(real, first, real, last)
    return f"the ends of {real.name} penetrate by {-gap:.2f} at x {x:.0f}" if gap < -DEEP else ""


def broken(member: dict[str, Any]) -> list[str]:
    """Say which declared contacts do not hold."""
    by_id: dict[str, list[Real]] = {}
    for real in reals_of(member):
        by_id.setdefault(real.id, []).append(real)
    found = []
    for c in member["contacts"]:
        if c["a"] not in by_id or c["b"] not in by_id:
            found.append(f"{c['kind']} {c['a']}, {c['b']}: no such bar")
            continue
        if c["a"] == c["b"] and c["kind"] in ("corner", "crossing"):
            continue
        lapped = c["kind"] in ("lap", "bundle")
        good = lap_holds if lapped else touch_holds
        if not good(c, by_id[c["a"]], by_id[c["b"]]):
            found.append(f"{c['kind']} {c['a']}, {c['b']} does not hold")
    return found


def touch_holds(c: dict[str, Any], one: list[Real], other: list[Real]) -> bool:
    """Corner and crossing: touching near both ends of the window."""
    for x in (c["x0"], c["x1"]):
        good = False
        for a in one:
            for b in other:
                slack = 4 * (a.r + b.r)
                if good or a.low[0] > x + slack or a.high[0] < x - slack:
                    continue
                box = np.array([slack, 1e9, 1e9])
                middle = np.array([x, 0.0, 0.0])
                ia, ib = (
                    chords(a, middle - box, middle + box),
                    chords(b, middle - box, middle + box),
                )
                gap = clear(a, ia, b, ib)[0] if len(ia) and len(ib) else math.inf
                good = abs(gap) <= DEEP
        if not good:
            return False
    return True


def lap_holds(c: dict[str, Any], one: list[Real], other: list[Real]) -> bool:
    """Lap and bundle: every point of one in the window lies against the other."""
    return any(a is not b and lies_against(a, b, c["x0"], c["x1"]) for a in one for b in other)


def lies_against(a: Real, b: Real, x0: float, x1: float) -> bool:
    inside = a.chain[(a.chain[:, 0] >= x0 - 1e-6) & (a.chain[:, 0] <= x1 + 1e-6)]
    if not len(inside) or x0 < max(a.low[0], b.low[0]) - 1 or x1 > min(a.high[0], b.high[0]) + 1:
        return False
    b0, b1 = b.chain[:-1], b.chain[1:]
    for p in inside:
        near = np.flatnonzero(np.abs(b0[:, 0] - p[0]) <= 40 * b.r)
        if not len(near):
            return False
        spot = foot(np.repeat(p[None], len(near), axis=0), b0[near], b1[near])
        gap = float(np.linalg.norm(spot - p, axis=1).min()) - a.r - b.r
        if abs(gap) > DEEP:
            return False
    return True


def uncovered(member: dict[str, Any]) -> list[str]:
    """Say where steel, pushed out by the cover, leaves the concrete."""
    cover = member["cover"]
    pushes = (
        ("top", 0.0, 1.0, cover["top"]),
        ("bottom", 0.0, -1.0, cover["bottom"]),
        ("left", 1.0, 0.0, cover["left"]),
        ("right", -1.0, 0.0, cover["right"]),
    )
    cuts = sorted({x for p in member["prisms"] for x in (p["x0"], p["x1"])})
    solids = [solid_at(member, (a + b) / 2) for a, b in pairwise(cuts)]
    found = []
    for real in reals_of(member):
        chain = real.chain
        way = np.gradient(chain, axis=0)
        way /= np.maximum(np.linalg.norm(way, axis=1), 1e-9)[:, None]
        if chain[:, 0].min() < cuts[0] - 1e-3 or chain[:, 0].max() > cuts[-1] + 1e-3:
            found.append(f"{real.name} leaves the concrete along x")
        zone = np.clip(np.searchsorted(cuts, chain[:, 0], side="right") - 1, 0, len(solids) - 1)
        for name, ny, nz, want in pushes:
            reach = real.r * np.sqrt(np.maximum(1 - (way[:, 1] * ny + way[:, 2] * nz) ** 2, 0))
            far = reach + want - SHORT
            y, z = chain[:, 1] + ny * far, chain[:, 2] + nz * far
            bad = np.zeros(len(chain), dtype=bool)
            for n in np.unique(zone):
                rows = zone == n
                bad[rows] = ~shapely.contains_xy(solids[n], y[rows], z[rows])
            if bad.any():
                found.append(f"{real.name}: {name} cover not kept at x {chain[bad][0, 0]:.0f}")
    return found


def solid_at(member: dict[str, Any], x: float) -> Any:
    return shapely.union_all(
        [shapely.Polygon(p["outline"]) for p in member["prisms"] if p["x0"] <= x <= p["x1"]]
    )


def sample(text: str) -> list[str]:
    """Return every fault the sampler sees in the text of a cage.json."""
    found = []
    for member in json.loads(text)["members"]:
        lines = touching(member) + broken(member) + uncovered(member)
        found += [f"{member['mark']}: {line}" for line in lines]
    return found
