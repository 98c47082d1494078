"""Random beams from a seed, as project files: what a drafter might be handed.

Bars are chosen by crude coefficients (not by the program), so that many beams come out sound,
some tight and a few wrong, as in life.
"""

from __future__ import annotations

from math import pi
from random import Random

BOND = {20: 1.2, 25: 1.4, 30: 1.5, 35: 1.7, 40: 1.9}
SIZES = (12, 16, 20, 25, 32)


def area(dia: int) -> float:
    return pi * dia * dia / 4


def choose(rng: Random, need: float, most: int) -> tuple[int, int]:
    """Return (count, size) of bars for an area: few bars that cover it without much waste."""
    options = []
    for dia in SIZES:
        count = max(2, -(-int(need) // int(area(dia))))
        if count <= most:
            options.append((count * area(dia) + rng.random() * 40, count, dia))
    if not options:
        return most, 32
    return min(options)[1:]


class Draft:
    """One random beam line with its project header."""

    def __init__(self, seed: int, *, mark: str = "RB1", ductile: bool = False) -> None:
        rng = Random(seed)
        self.rng = rng
        self.mark = mark
        self.fck = rng.choice((20, 25, 30, 35, 40))
        self.fy = rng.choice((415, 500, 500, 550))
        self.count = rng.choice((1, 1, 2, 2, 2, 3, 3, 4, 5))
        self.width = rng.choice((200, 230, 250, 300, 300, 350, 400))
        self.cover = rng.choice((25, 30, 30, 40))
        base = rng.uniform(3.0, 6.5)
        uneven = rng.random() < 0.3
        self.spans = [
            round(base * (rng.uniform(0.55, 1.6) if uneven else rng.uniform(0.85, 1.15)), 2)
            for _ in range(self.count)
        ]
        self.spans = [min(9.0, max(2.0, s)) for s in self.spans]
        self.tips = [
            round(rng.uniform(0.8, 1.8), 2) if rng.random() < 0.25 else 0.0 for _ in range(2)
        ]
        self.kind = "wall" if self.count == 1 and rng.random() < 0.5 else "column"
        self.support = rng.choice((230, 300, 400, 450, 500))
        longest = max(self.spans)
        depth = max(300, int(longest * 1000 / rng.uniform(10, 13) / 50) * 50)
        step = rng.random() < 0.15 and self.count > 1
        self.depths = [
            depth - (100 if step and k % 2 and depth > 450 else 0) for k in range(self.count)
        ]
        self.flange = rng.random() < 0.4
        self.dead = round(rng.uniform(8, 22) * self.width / 300, 1)
        self.live = round(self.dead * rng.uniform(0.3, 0.8), 1)

    def header(self) -> str:
        return f"""[project]
number  = "RB-{self.mark}"
title   = "Random beams"
part    = "Line {self.mark}"
code    = "IS 456"
bending = "IS 2502"
ductile = false

[issue]
revision = "A"
date     = 2026-01-05
purpose  = "test"

[concrete]
grade      = "M{self.fck}"
aggregate  = 20
exposure   = "{"mild" if self.cover < 30 else "moderate"}"
fire_hours = 1

[steel]
main  = "Fe {self.fy}"
links = "Fe 415"
stock = 12000
sizes = [8, 10, 12, 16, 20, 25, 32]

[[column]]
mark  = "C1"
size  = [{self.support}, {max(300, self.width)}]
bars  = "8T16"
links = "T8@150"
cover = 40
"""

    def moments(self) -> tuple[list[float], list[float]]:
        """Return crude factored hogging at each support and sagging in each span [N·mm]."""
        w = 1.5 * (self.dead + self.live)
        n = self.count
        hog = []
        for k in range(n + 1):
            near = [self.spans[i] for i in (k - 1, k) if 0 <= i < n]
            inner = 0 < k < n
            value = 0.12 * w * max(near) ** 2 if inner else 0.0
            tip = self.tips[0] if k == 0 else self.tips[1] if k == n else 0.0
            hog.append(max(value, w * tip**2 / 2) * 1e6)
        sag = [
            (0.128 if n == 1 else 0.1 if k in (0, n - 1) else 0.08) * w * s**2 * 1e6
            for k, s in enumerate(self.spans)
        ]
        return hog, sag

    def steel_for(self, moment: float, depth: float) -> float:
        d = depth - self.cover - 25
        least = 0.85 * self.width * d / self.fy
        return max(1.2 * moment / (0.87 * self.fy * 0.84 * d), 1.05 * least)

    def most(self, dia: int) -> int:
        """Return how many bars fit two layers."""
        room = self.width - 2 * self.cover - 22
        return 2 * max(2, int((room + 25) // (dia * 1.17 + 25)))

    def beam(self) -> str:
        rng, n = self.rng, self.count
        lead = 1 if self.tips[0] else 0
        names = [f"{chr(65 + k)}1" for k in range(n + 1)]
        supports = ",\n".join(
            f'  {{ at = "{name}", '
            + ('column = "C1" }' if self.kind == "column" else f"wall = {self.support} }}")
            for name in names
        )
        section = f"width = {self.width}, depth = {self.depths[0]}"
        if self.flange:
            section += ", slab = 120, flange = 1500"
        spans = []
        load = f"dead = {self.dead}, imposed = {self.live}"
        if self.tips[0]:
            spans.append(f"  {{ overhang = {self.tips[0] * 1000:.0f}, {load} }}")
        for k, s in enumerate(self.spans):
            own = ""
            if self.depths[k] != self.depths[0]:
                own = (
                    ", section = { "
                    + section.replace(f"depth = {self.depths[0]}", f"depth = {self.depths[k]}")
                    + " }"
                )
            point = ""
            if rng.random() < 0.15:
                point = (
                    f", point = [{{ x = {s * 500:.0f}, dead = {self.dead:.0f}, "
                    f"imposed = {self.live:.0f} }}]"
                )
            spans.append(f"  {{ length = {s * 1000:.0f}, {load}{point}{own} }}")
        if self.tips[1]:
            own = ""
            if self.depths[-1] != self.depths[0]:
                own = (
                    ", section = { "
                    + section.replace(f"depth = {self.depths[0]}", f"depth = {self.depths[-1]}")
                    + " }"
                )
            spans.append(f"  {{ overhang = {self.tips[1] * 1000:.0f}, {load}{own} }}")
        lines = [
            "[[beam]]",
            f'mark    = "{self.mark}"',
            f"section = {{ {section} }}",
            f"cover   = {self.cover}",
            f"support = [\n{supports},\n]",
            "span = [\n" + ",\n".join(spans) + ",\n]",
        ]
        return "\n".join(lines) + "\n" + self.bars(lead, len(spans), names) + self.links(lead)

    def bars(self, lead: int, total: int, names: list[str]) -> str:
        hog, sag = self.moments()
        rng = self.rng
        least = min(self.depths)
        worst = max(self.steel_for(0.0, d) for d in self.depths)
        through = next((d for d in (12, 16, 20) if 2 * area(d) >= worst / 1.0), 20)
        heaviest = max(hog)
        if heaviest and 2 * area(through) < self.steel_for(heaviest, least) / 3:
            through = 20 if through == 16 else 16
        across = self.across(through)
        out = [
            self.table("top", f'span = "1-{total}"' if total > 1 else "span = 1", across, through)
        ]
        for k, moment in enumerate(hog):
            depth = min(self.depths[max(0, k - 1)], self.depths[min(k, self.count - 1)])
            need = self.steel_for(moment, depth) - across * area(through)
            if moment > 0 and need > 0:
                count, dia = choose(rng, need, max(2, self.most(20) - 2))
                out.append(self.table("top", f'support = "{names[k]}"', count, dia))
        for k, moment in enumerate(sag):
            count, dia = choose(rng, self.steel_for(moment, self.depths[k]), self.most(20))
            count = max(count, self.across(dia))
            out.append(self.table("bottom", f"span = {k + 1 + lead}", count, dia))
        bottom = next((d for d in (12, 16, 20) if 2 * area(d) >= worst), 20)
        for tip, number in ((self.tips[0], 1), (self.tips[1], total)):
            if tip:
                out.append(self.table("bottom", f"span = {number}", self.across(bottom), bottom))
        deep = max(self.depths)
        if deep > 750:
            each = max(2, -(-(deep - 150) // 300))
            out.append(
                self.table(
                    "side",
                    f'span = "1-{total}"' if total > 1 else "span = 1",
                    each,
                    10 if self.width < 350 else 12,
                )
            )
        return "".join(out)

    def across(self, dia: int) -> int:
        """Return how many bars keep the distance that limits cracks."""
        widest = {415: 180, 500: 150, 550: 135}[self.fy] - 12
        room = self.width - 2 * self.cover - 20
        return max(2, -(-(room - dia) // (widest + dia)) + 1)

    @staticmethod
    def table(face: str, where: str, count: int, dia: int) -> str:
        return f'\n  [[beam.bars]]\n  face = "{face}"\n  {where}\n  bars = "{count}T{dia}"\n'

    def links(self, lead: int) -> str:
        out = []
        w = 1.5 * (self.dead + self.live)
        lengths = (
            ([self.tips[0]] if self.tips[0] else [])
            + self.spans
            + ([self.tips[1]] if self.tips[1] else [])
        )
        for number, length in enumerate(lengths, 1):
            k = min(max(number - 1 - lead, 0), self.count - 1)
            d = self.depths[k] - self.cover - 20
            shear = (
                (0.65 * w * length + 5)
                * 1e3
                * (1.7 if number - 1 - lead not in range(self.count) else 1.0)
            )
            rest = shear - 0.4 * self.width * d
            dia = 8 if self.width < 350 else 10
            asv = 2 * area(dia)
            space = 0.87 * 415 * asv * d / rest if rest > 0 else 300.0
            floor = asv * 0.87 * 415 / (0.4 * self.width)
            space = min(space, 0.95 * floor, 0.7 * (d - 30), 290.0)
            tight = max(75, int(space // 25) * 25)
            loose = min(tight + 50, int(min(0.95 * floor, 0.7 * (d - 30), 290.0) // 25) * 25)
            end = int(length * 1000 * 0.3 / 50) * 50
            if number - 1 - lead in range(self.count) and loose > tight and length > 3:
                zones = (
                    f'"2L-T{dia}@{tight} x {end}", "2L-T{dia}@{loose}", "2L-T{dia}@{tight} x {end}"'
                )
            else:
                zones = f'"2L-T{dia}@{tight}"'
            out.append(f"\n  [[beam.links]]\n  span = {number}\n  zones = [{zones}]\n")
        return "".join(out)

    def text(self) -> str:
        return self.header() + "\n" + self.beam()


class RoomyDraft(Draft):
    """A line with steel, width and supports to spare: most come out sound."""

    def __init__(self, seed: int) -> None:
        super().__init__(seed)
        rng = self.rng
        self.fck = rng.choice((25, 30, 35))
        self.fy = rng.choice((415, 500))
        self.count = rng.choice((1, 2, 2, 3, 3))
        self.width = rng.choice((300, 350, 400))
        self.cover = rng.choice((30, 40))
        base = rng.uniform(0.85, 1.0) * {1: 6.5, 2: 5.3, 3: 3.6}[self.count]
        self.spans = [round(base * rng.uniform(0.93, 1.0), 2) for _ in range(self.count)]
        tips = [round(rng.uniform(0.9, 1.4), 2) if rng.random() < 0.2 else 0.0 for _ in range(2)]
        self.tips = tips if self.count < 3 else [0.0, 0.0]
        self.kind = "column"
        self.support = rng.choice((400, 450, 500))
        depth = max(400, int(base * 1000 / rng.uniform(9.5, 11.5) / 50) * 50)
        depth = 850 if rng.random() < 0.15 else depth
        step = rng.random() < 0.25 and self.count > 1 and depth > 450
        self.depths = [depth - (100 if step and k % 2 else 0) for k in range(self.count)]
        self.flange = rng.random() < 0.3
        self.dead = round(rng.uniform(10, 20), 1)
        self.live = round(self.dead * rng.uniform(0.3, 0.6), 1)

    def steel_for(self, moment: float, depth: float) -> float:
        return 1.25 * super().steel_for(moment, depth)


def roomy_project(seed: int) -> str:
    """Return the project file of one roomy beam line."""
    return RoomyDraft(seed).text()


def random_project(seed: int) -> str:
    """Return the project file of one random beam line."""
    return Draft(seed).text()
