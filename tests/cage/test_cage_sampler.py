"""The sampler itself: it calls a good cage good, and sees each planted fault."""

from dataclasses import replace

import pytest
from cage.test_cage_wire import PROJECT
from hypothesis import given, settings
from hypothesis import strategies as st
from oracle.sampler import sample

from detailer.cage.bar import Bar, Cage, Contact, Prism
from detailer.cage.clearance import undeclared
from detailer.cage.contacts import contact_problems
from detailer.cage.forms import HookCorner, bar_path, closed_link, corner_seat
from detailer.cage.wire import to_json
from detailer.values import ContactKind, Face, Role

WEB = ((-115, -450), (115, -450), (115, 0), (-115, 0))


def made(id_, path, dia, role=Role.MAIN, xs=(0.0,)):
    return Bar(
        id=id_, role=role, face=Face.NONE, layer=0, grade="Fe 500", dia=float(dia),
        corners=path[0], mandrels=path[1], placings=tuple((x, 0.0, 0.0) for x in xs),
    )  # fmt: skip


def good():
    seat = corner_seat(16, 16)
    y, z = 115 - 25 - 8 - seat - 8, 450 - 25 - 8 - seat - 8
    bars, contacts = [], []
    for k, corner in enumerate((HookCorner.TOP_LEFT, HookCorner.TOP_RIGHT)):
        link = closed_link(y0=-90, y1=90, z0=-425, z1=-25, dia=8, corner=corner)
        xs = tuple(100.0 + 300 * i + 150 * k for i in range(6))
        bars.append(made(f"l{k}", link, 8, Role.LINK, xs=xs))
    for name, a, b in (("bl", y, -z), ("br", -y, -z), ("tl", y, -450 + z), ("tr", -y, -450 + z)):
        bars.append(made(name, bar_path(30, 1970, a, b, dia=16, mandrel=128), 16))
        contacts += [
            Contact(ContactKind.CORNER, name, f"l{k}", 100 + 150 * k, 1600 + 150 * k)
            for k in (0, 1)
        ]
    bars.append(made("one", bar_path(30, 1200, 20, -409, dia=16, mandrel=128), 16))
    bars.append(made("two", bar_path(600, 1970, 36, -409, dia=16, mandrel=128), 16))
    contacts.append(Contact(ContactKind.LAP, "one", "two", 600, 1200))
    for name, link, x0, x1 in (
        ("one", "l0", 100, 1000),
        ("one", "l1", 250, 1150),
        ("two", "l0", 700, 1600),
        ("two", "l1", 850, 1750),
    ):
        contacts.append(Contact(ContactKind.CORNER, name, link, x0, x1))
    return Cage(
        member="B", copies=1, mirrored=0, supports=(), cover=(25, 25, 25, 25), aggregate=20,
        prisms=(Prism(name="w", x0=0, x1=2000, outline=WEB),),
        bars=tuple(bars), contacts=tuple(contacts),
    )  # fmt: skip


def swap(cage, id_, path):
    bars = tuple(
        replace(b, corners=path[0], mandrels=path[1]) if b.id == id_ else b for b in cage.bars
    )
    return replace(cage, bars=bars)


def both(cage):
    """The sampler's sentences, and how many faults the program itself sees in the steel."""
    return sample(to_json((cage,), PROJECT)), undeclared(cage), contact_problems(cage)


def test_a_good_cage_is_good():
    seen, clashes, broken = both(good())
    assert broken == ()
    assert clashes == ()
    assert seen == []


def test_a_missing_declaration_is_seen():
    cage = good()
    bare = replace(cage, contacts=tuple(c for c in cage.contacts if c.kind is not ContactKind.LAP))
    seen, clashes, _ = both(bare)
    assert [(g.a, g.b) for g in clashes] == [("one", "two")]
    assert seen == ["B: one[0] and two[0] touch undeclared at x " + seen[0].split()[-1]]


@pytest.mark.parametrize(
    ("y", "z", "word"),
    [(35, -409, "penetrate"), (39, -409, "lap"), (36, -405, "corner"), (36, -411, "penetrate")],
)
def test_a_bar_out_of_place_is_seen(y, z, word):
    moved = swap(good(), "two", bar_path(600, 1970, y, z, dia=16, mandrel=128))
    seen, clashes, broken = both(moved)
    assert any(word in line for line in seen)
    assert clashes or broken


def test_cover_lost_is_seen():
    link = closed_link(y0=-90, y1=90.2, z0=-425, z1=-25, dia=8, corner=HookCorner.TOP_LEFT)
    seen, _, _ = both(swap(good(), "l0", link))
    assert any("left cover" in line for line in seen)


@settings(max_examples=12, deadline=None)
@given(st.integers(-40, 40), st.integers(-30, 60), st.integers(-300, 300))
def test_program_and_sampler_see_the_same_clashes(dy, dz, dx):
    """Move one bar anywhere: what clearly penetrates for one penetrates for the other."""
    path = bar_path(600 + dx, 1970, 36.3 + dy, -409.3 + dz, dia=16, mandrel=128)
    seen, clashes, _ = both(swap(good(), "two", path))
    deep = {tuple(sorted((f"{g.a}[{g.ai}]", f"{g.b}[{g.bi}]"))) for g in clashes if g.gap < -0.6}
    sampled = {}
    for line in seen:
        if "penetrate by" in line:
            a, _, b, *_, by, _, _, _ = line.removeprefix("B: ").split()
            sampled[tuple(sorted((a, b)))] = float(by)
    assert deep <= set(sampled)
    assert {pair for pair, by in sampled.items() if by > 0.6} <= deep
