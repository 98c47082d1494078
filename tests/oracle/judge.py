"""An independent judge: calls a placed beam clean when it is clean with something to spare.

It shares no code with the program: it reads the project file and cage.json as data, solves the
line by finite elements, and walks along it in small steps. What it doesn't call clean need not
be wrong; what it calls clean must raise no unsafe and no unbuildable finding.
"""

from __future__ import annotations

import itertools
import tomllib
from math import ceil, hypot, pi
from typing import Any

import numpy as np

BOND = {20: 1.2, 25: 1.4, 30: 1.5, 35: 1.7, 40: 1.9}
XU = {415: 0.48, 500: 0.46, 550: 0.443}
WIDEST = {415: 180, 500: 150, 550: 135}
TAU_C_PT = (0.15, 0.25, 0.50, 0.75, 1.00, 1.25, 1.50, 1.75, 2.00, 2.25, 2.50, 2.75, 3.00)
TAU_C = {
    20: (0.28, 0.36, 0.48, 0.56, 0.62, 0.67, 0.72, 0.75, 0.79, 0.81, 0.82, 0.82, 0.82),
    25: (0.29, 0.36, 0.49, 0.57, 0.64, 0.70, 0.74, 0.78, 0.82, 0.85, 0.88, 0.90, 0.92),
    30: (0.29, 0.37, 0.50, 0.59, 0.66, 0.71, 0.76, 0.80, 0.84, 0.88, 0.91, 0.94, 0.96),
    35: (0.29, 0.37, 0.50, 0.59, 0.67, 0.73, 0.78, 0.82, 0.86, 0.90, 0.93, 0.96, 0.99),
    40: (0.30, 0.38, 0.51, 0.60, 0.68, 0.74, 0.79, 0.84, 0.88, 0.92, 0.95, 0.98, 1.01),
}  # IS 456:2000, Table 19
TAU_MAX = {20: 2.8, 25: 3.1, 30: 3.5, 35: 3.7, 40: 4.0}


def area(dia: float) -> float:
    return pi * dia * dia / 4


class Line:
    """Geometry and envelope of one beam line, from the project file alone."""

    def __init__(self, text: str) -> None:
        data = tomllib.loads(text)
        self.beam: dict[str, Any] = data["beam"][0]
        self.fck = int(data["concrete"]["grade"][1:])
        self.fy = int(data["steel"]["main"].split()[1])
        self.fyl = int(data["steel"]["links"].split()[1])
        self.aggregate = data["concrete"]["aggregate"]
        self.stock = data["steel"].get("stock", 12000)
        columns = {c["mark"]: c["size"] for c in data.get("column", [])}
        self.widths = [
            columns[s["column"]][0] if "column" in s else s["wall"] for s in self.beam["support"]
        ]
        self.monolithic = ["column" in s for s in self.beam["support"]]
        self.spans: list[dict[str, Any]] = []
        x = 0.0
        support = -1
        for k, span in enumerate(self.beam["span"]):
            section = {**self.beam["section"], **span.get("section", {})}
            if "overhang" in span and k == 0:
                x0, x1, left, right = -float(span["overhang"]), 0.0, None, 0
            elif "overhang" in span:
                x0, x1, left, right = x, x + float(span["overhang"]), support, None
            else:
                if support < 0:
                    support, x = 0, 0.0
                x0, x1, left, right = x, x + float(span["length"]), support, support + 1
                support, x = support + 1, x1
            if left is None:
                support = 0
            self.spans.append(
                {"x0": x0, "x1": x1, "left": left, "right": right, "section": section, "load": span}
            )
        self.supports = sorted(
            {s["x1"] for s in self.spans if s["right"] is not None}
            | {s["x0"] for s in self.spans if s["left"] is not None}
        )
        self.solve()

    def clear(self, span: dict[str, Any]) -> tuple[float, float]:
        x0, x1 = span["x0"], span["x1"]
        if span["left"] is not None:
            x0 += self.widths[span["left"]] / 2
        if span["right"] is not None:
            x1 -= self.widths[span["right"]] / 2
        return x0, x1

    def solve(self) -> None:
        """Envelope by beam elements of about 80 mm, one load case a span."""
        nodes: list[float] = []
        stiff: list[float] = []
        owner: list[int] = []
        for k, span in enumerate(self.spans):
            count = max(8, ceil((span["x1"] - span["x0"]) / 80))
            xs = np.linspace(span["x0"], span["x1"], count + 1)
            nodes += list(xs[:-1])
            section = span["section"]
            stiff += [section["width"] * section["depth"] ** 3] * count
            owner += [k] * count
        nodes.append(self.spans[-1]["x1"])
        x = np.array(nodes)
        n = len(x)
        h = np.diff(x)
        ei = np.array(stiff) / stiff[0]
        band = np.zeros((2 * n, 2 * n))
        for e in range(n - 1):
            a, L = ei[e], h[e]
            k = (
                a
                / L**3
                * np.array(
                    [
                        [12, 6 * L, -12, 6 * L],
                        [6 * L, 4 * L * L, -6 * L, 2 * L * L],
                        [-12, -6 * L, 12, -6 * L],
                        [6 * L, 2 * L * L, -6 * L, 4 * L * L],
                    ]
                )
            )
            band[2 * e : 2 * e + 4, 2 * e : 2 * e + 4] += k
        fixed = [2 * int(np.argmin(abs(x - s))) for s in self.supports]
        free = [d for d in range(2 * n) if d not in fixed]
        inverse = np.linalg.inv(band[np.ix_(free, free)])
        cases: list[tuple[np.ndarray, np.ndarray, np.ndarray]] = []
        for k, span in enumerate(self.spans):
            for kind in ("dead", "imposed"):
                load = span["load"]
                w = load.get(kind, 0.0)
                force = np.zeros(2 * n)
                fixed_end = np.zeros((n - 1, 4))
                for e in range(n - 1):
                    if owner[e] == k:
                        L = h[e]
                        f = w * np.array([L / 2, L * L / 12, L / 2, -L * L / 12])
                        force[2 * e : 2 * e + 4] -= f
                        fixed_end[e] = f
                for p in load.get("point", []):
                    at = int(np.argmin(abs(x - (span["x0"] + p["x"]))))
                    force[2 * at] -= p[kind] * 1e3
                u = np.zeros(2 * n)
                u[free] = inverse @ force[free]
                moment, v_left, v_right = np.zeros((n, 2)), np.zeros(n), np.zeros(n)
                for e in range(n - 1):
                    a, L = ei[e], h[e]
                    kk = (
                        a
                        / L**3
                        * np.array(
                            [
                                [12, 6 * L, -12, 6 * L],
                                [6 * L, 4 * L * L, -6 * L, 2 * L * L],
                                [-12, -6 * L, 12, -6 * L],
                                [6 * L, 2 * L * L, -6 * L, 4 * L * L],
                            ]
                        )
                    )
                    end = kk @ u[2 * e : 2 * e + 4] + fixed_end[e]
                    moment[e, 1] = -end[1]
                    moment[e + 1, 0] = end[3]
                    v_right[e] = end[0]
                    v_left[e + 1] = -end[2]
                m = np.where(np.arange(n) == n - 1, moment[:, 0], moment[:, 1])
                cases.append((m, v_left, v_right))
        self.x = x
        dead = cases[0::2]
        live = cases[1::2]

        def envelope(i: int) -> tuple[np.ndarray, np.ndarray]:
            base = 1.5 * sum(c[i] for c in dead)
            high = base + 1.5 * sum(np.maximum(c[i], 0) for c in live)
            low = base + 1.5 * sum(np.minimum(c[i], 0) for c in live)
            return low, high

        self.m_min, self.m_max = envelope(0)
        (a0, a1), (b0, b1) = envelope(1), envelope(2)
        self.v = np.maximum.reduce([abs(a0), abs(a1), abs(b0), abs(b1)])

    def moment(self, at: float) -> tuple[float, float]:
        return (float(np.interp(at, self.x, self.m_min)), float(np.interp(at, self.x, self.m_max)))

    def shear(self, at: float) -> float:
        return float(np.interp(at, self.x, self.v))

    def bond(self, dia: float) -> float:
        return dia * 0.87 * self.fy / (4 * 1.6 * BOND[self.fck])


class Rod:
    """One real bar of cage.json along the beam."""

    def __init__(self, bar: dict[str, Any], shift: list[float], line: Line) -> None:
        self.dia, self.face, self.role = bar["diameter"], bar["face"], bar["role"]
        pts = [[c + s for c, s in zip(p, shift, strict=True)] for p in bar["corners"]]
        self.extra = [0.0, 0.0]
        self.run = list(pts)
        radius = 8 * self.dia / 2 if self.dia <= 25 else 6 * self.dia
        for side in (0, 1):
            run = self.run if side == 0 else self.run[::-1]
            if len(run) > 2 and abs(run[0][0] - run[1][0]) < 1.0:
                leg = hypot(run[0][2] - run[1][2], run[0][1] - run[1][1]) - radius - self.dia / 2
                self.extra[side] = max(0.0, 8 * self.dia + leg - 4 * self.dia - radius)
                run = run[1:]
            self.run = run if side == 0 else run[::-1]
        if self.run[0][0] > self.run[-1][0]:
            self.run, self.extra = self.run[::-1], self.extra[::-1]
        self.x0, self.x1 = self.run[0][0], self.run[-1][0]
        self.bent = [e > 0 for e in self.extra]
        self.full = line.bond(self.dia)
        self.length = bar.get("length") or 0.0

    def at(self, x: float) -> tuple[float, float]:
        xs = [p[0] for p in self.run]
        return (
            float(np.interp(x, xs, [p[1] for p in self.run])),
            float(np.interp(x, xs, [p[2] for p in self.run])),
        )

    def share(self, x: float) -> float:
        return max(
            0.0,
            min(
                1.0,
                (x - self.x0 + self.extra[0]) / self.full,
                (self.x1 - x + self.extra[1]) / self.full,
            ),
        )


class Judge:
    """Judges one member of cage.json against one project file."""

    def __init__(self, text: str, member: dict[str, Any]) -> None:
        self.line = Line(text)
        self.member = member
        self.bars = [
            Rod(bar, shift, self.line)
            for bar in member["bars"]
            if bar["role"] == "main"
            for shift in bar["placings"]
        ]
        self.links = sorted(
            (bar["corners"][0][0] + shift[0], bar["diameter"])
            for bar in member["bars"]
            if bar["role"] == "link"
            for shift in bar["placings"]
        )
        self.laps = any(c["kind"] == "lap" for c in member["contacts"])

    def reasons(self) -> list[str]:
        """Return why the beam isn't called clean; empty if it is."""
        found: list[str] = []
        for check in (
            self.gaps,
            self.strength,
            self.shear,
            self.cuts,
            self.amounts,
            self.lengths,
            self.supports,
        ):
            found += check()
        return found

    def here(self, x: float, face: str | None = None) -> list[Rod]:
        return [b for b in self.bars if b.x0 <= x <= b.x1 and face in (None, b.face)]

    def stations(self, step: float = 50.0) -> list[tuple[dict[str, Any], float]]:
        out = []
        for span in self.line.spans:
            x0, x1 = self.line.clear(span)
            out += [(span, float(x)) for x in np.arange(x0 + 1, x1, step)]
        return out

    def gaps(self) -> list[str]:
        agg = self.line.aggregate
        xs = {b.x0 + 2 for b in self.bars} | {b.x1 - 2 for b in self.bars}
        xs |= {x for _, x in self.stations(100.0)}
        for x in sorted(xs):
            rods = self.here(x)
            spots = [(b, *b.at(x)) for b in rods]
            for i, (a, ya, za) in enumerate(spots):
                for b, yb, zb in spots[i + 1 :]:
                    touch = (a.dia + b.dia) / 2
                    clear = hypot(ya - yb, za - zb) - touch
                    if abs(clear) < 0.5:
                        continue
                    big = max(a.dia, b.dia)
                    if abs(za - zb) < touch and clear < max(big, agg + 5) + 0.15 * big + 4:
                        return [f"gap {clear:.1f} at {x:.0f}"]
                    if abs(za - zb) >= touch and clear < max(15, agg * 2 / 3, big) - 0.05:
                        return [f"layer gap {clear:.1f} at {x:.0f}"]
        return []

    def resistance(
        self,
        x: float,
        span: dict[str, Any],
        sagging: bool,
        *,
        full: bool = False,
        without: Rod | None = None,
    ) -> tuple[float, float]:
        """Return (moment, effective depth) from a rectangular stress block on the web."""
        section = span["section"]
        rods = [b for b in self.here(x, "bottom" if sagging else "top") if b is not without]
        force = sum(area(b.dia) * (1.0 if full else b.share(x)) for b in rods) * 0.87 * self.line.fy
        if force <= 0:
            return 0.0, section["depth"] - 60.0
        top = 0.0
        depth = sum(
            area(b.dia) * abs((top - section["depth"] if not sagging else top) - b.at(x)[1])
            for b in rods
        ) / sum(area(b.dia) for b in rods)
        xu = force / (0.36 * self.line.fck * section["width"])
        limit = XU[self.line.fy] * depth
        if xu > limit:
            return 0.36 * self.line.fck * section["width"] * limit * (depth - 0.42 * limit), depth
        return force * (depth - 0.42 * xu), depth

    def face_moment(self, span: dict[str, Any], x: float) -> tuple[float, float]:
        return self.line.moment(x)

    def strength(self) -> list[str]:
        for span, x in self.stations():
            low, high = self.line.moment(x)
            for sagging, need in ((True, high), (False, -low)):
                if need > 1e6 and self.resistance(x, span, sagging)[0] * 0.98 < need:
                    return [f"moment {need / 1e6:.0f} at {x:.0f}"]
        return []

    def permitted(self, span: dict[str, Any], x: float, sagging: bool) -> tuple[float, float]:
        section = span["section"]
        _, d = self.resistance(x, span, sagging)
        rods = [
            b
            for b in self.here(x, "bottom" if sagging else "top")
            if b.x0 <= x - d and b.x1 >= x + d
        ]
        pt = 100 * sum(area(b.dia) for b in rods) / (section["width"] * d)
        tau = float(np.interp(pt, TAU_C_PT, TAU_C[self.line.fck]))
        near = [g for g in self.links if abs(g[0] - x) < 700]
        pairs = [
            (b[0] - a[0], a[1]) for a, b in itertools.pairwise(near) if a[0] - 1 <= x <= b[0] + 1
        ]
        if not pairs:
            pairs = [(60.0 + abs(near[0][0] - x), near[0][1])] if near else [(1e9, 8.0)]
        space, dia = max(pairs)
        vus = 0.87 * min(self.line.fyl, 415) * 2 * area(dia) * d / max(space, 50.0)
        return tau * section["width"] * d, vus

    def shear(self) -> list[str]:
        for span, x in self.stations():
            section = span["section"]
            low, high = self.line.moment(x)
            vc, vus = self.permitted(span, x, high >= -low)
            v = self.line.shear(x)
            if v > 0.97 * (vc + vus):
                return [f"shear {v / 1e3:.0f} at {x:.0f}"]
            if v > 0.9 * TAU_MAX[self.line.fck] * section["width"] * (section["depth"] - 70):
                return ["shear stress"]
        for (a, dia), (b, _) in zip(self.links, self.links[1:], strict=False):
            span = next(s for s in self.line.spans if a <= s["x1"] or s is self.line.spans[-1])
            x0, x1 = self.line.clear(span)
            if not (x0 - 1 <= a and b <= x1 + 1):
                continue
            section = span["section"]
            most = min(
                300.0,
                0.75 * (section["depth"] - 90),
                2 * area(dia) * 0.87 * min(415, self.line.fyl) / (0.4 * section["width"]),
            )
            if b - a > most + 0.5:
                return [f"links {b - a:.0f} apart at {a:.0f}"]
        return []

    def in_support(self, x: float) -> bool:
        return any(
            abs(x - s) <= w / 2 + 1
            for s, w in zip(self.line.supports, self.line.widths, strict=True)
        )

    def cuts(self) -> list[str]:
        for rod in self.bars:
            for end, side in ((rod.x0, 1), (rod.x1, -1)):
                if self.in_support(end):
                    continue
                span = next((s for s in self.line.spans if s["x0"] <= end <= s["x1"]), None)
                if span is None:
                    continue
                tip = (span["left"] is None and end < span["x0"] + 100) or (
                    span["right"] is None and end > span["x1"] - 100
                )
                if tip:
                    continue
                if not rod.bent[0 if side > 0 else 1]:
                    lap = [
                        o
                        for o in self.bars
                        if o is not rod
                        and o.x0 < end < o.x1
                        and hypot(o.at(end)[0] - rod.at(end)[0], o.at(end)[1] - rod.at(end)[1])
                        < (o.dia + rod.dia) / 2 + 0.5
                    ]
                    if lap:
                        continue
                sagging = rod.face == "bottom"
                _, d = self.resistance(end, span, sagging, full=True)
                back = end + side * max(d, 12 * rod.dia)
                for x in np.linspace(end, back, 12):
                    low, high = self.line.moment(float(x))
                    need = high if sagging else -low
                    rest, _ = self.resistance(float(x), span, sagging, full=True, without=rod)
                    others = sum(
                        1
                        for o in self.bars
                        if o.face == rod.face and (abs(o.x0 - end) < 60 or abs(o.x1 - end) < 60)
                    )
                    if need > 0 and need > rest * 0.985 * (1 if others < 2 else 0.6):
                        return [f"cut at {end:.0f} inside the extension"]
                low, high = self.line.moment(end)
                need = high if sagging else -low
                if need > 0:
                    vc, vus = self.permitted(span, end, sagging)
                    if self.line.shear(end) > 0.64 * (vc + vus):
                        rest, _ = self.resistance(end - side * 5, span, sagging, full=True)
                        if not (rest > 2.1 * need and self.line.shear(end) < 0.72 * (vc + vus)):
                            return [f"cut at {end:.0f} in tension"]
        return []

    def amounts(self) -> list[str]:
        for span, x in self.stations(100.0):
            section = span["section"]
            low, high = self.line.moment(x)
            for face, need in (("bottom", high), ("top", -low)):
                rods = self.here(x, face)
                steel = sum(area(b.dia) for b in rods)
                if steel > 0.037 * section["width"] * section["depth"]:
                    return ["too much steel"]
                if need <= 0:
                    continue
                if steel < 0.86 * section["width"] * (section["depth"] - 35) / self.line.fy:
                    return [f"little {face} steel at {x:.0f}"]
                ys = sorted(b.at(x)[0] for b in rods)
                wide = max((b - a for a, b in itertools.pairwise(ys)), default=0.0)
                if wide > WIDEST[self.line.fy] - 5:
                    return [f"{face} bars {wide:.0f} apart at {x:.0f}"]
        return []

    def lengths(self) -> list[str]:
        out = [f"{b.length:.0f} long" for b in self.bars if b.length > self.line.stock]
        if self.laps:
            windows = [c for c in self.member["contacts"] if c["kind"] == "lap"]
            if any(not self.in_support(c["x0"]) or not self.in_support(c["x1"]) for c in windows):
                out.append("lapped in a span")
        for span in self.line.spans:
            section = span["section"]
            d = section["depth"] - 60
            basic = (
                6.5
                if None in (span["left"], span["right"])
                else 16.0
                if (len(self.line.spans) == 1)
                else 20.0
            )
            if (span["x1"] - span["x0"]) / d > basic:
                out.append("slender")
        return out

    def supports(self) -> list[str]:
        for span in self.line.spans:
            x0, x1 = self.line.clear(span)
            for support, face, side in ((span["left"], x0, -1), (span["right"], x1, 1)):
                if support is None:
                    continue
                inside = list(self.here((x0 + x1) / 2, "bottom"))
                total = sum(area(b.dia) for b in inside)
                kept = 0.0
                for b in inside:
                    past = (b.x1 - face) if side > 0 else (face - b.x0)
                    past += b.extra[1 if side > 0 else 0]
                    if past >= b.full / 3 - 0.5:
                        kept += area(b.dia)
                inner = 0 < support < len(self.line.supports) - 1 or any(
                    None in (s["left"], s["right"]) and support in (s["left"], s["right"])
                    for s in self.line.spans
                )
                if kept < total * (0.26 if inner else 0.34):
                    return [f"bottom steel at support {support}"]
                if not inner and None not in (span["left"], span["right"]):
                    m1, _ = self.resistance(face - side * 1200, span, True, full=True)
                    v = self.line.shear(span["x1" if side > 0 else "x0"])
                    for b in inside:
                        l0 = (
                            (b.x1 if side > 0 else -b.x0)
                            - side * self.line.supports[support]
                            + b.extra[1 if side > 0 else 0]
                        )
                        if b.full > 1.27 * m1 / max(v, 1.0) + l0:
                            return ["bar too large at the support"]
        return []


def sound(text: str, member: dict[str, Any]) -> list[str]:
    """Return the judge's reasons against a member; empty if it is clean."""
    return Judge(text, member).reasons()
