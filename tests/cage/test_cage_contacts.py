import pytest

from detailer.cage.bar import Bar, Cage, Contact, Prism
from detailer.cage.clearance import gaps, undeclared
from detailer.cage.contacts import contact_problem, contact_problems, corner_contacts
from detailer.cage.cover import Side, covers
from detailer.cage.cut import cut
from detailer.cage.forms import (
    Crank,
    HookCorner,
    Path,
    across_path,
    bar_path,
    closed_link,
    corner_seat,
)
from detailer.values import ContactKind, Face, Role


def made(id_, path, dia, role=Role.MAIN, xs=(0.0,)):
    return Bar(
        id=id_, role=role, face=Face.NONE, layer=0, grade="Fe 500", dia=float(dia),
        corners=path[0], mandrels=path[1], placings=tuple((x, 0.0, 0.0) for x in xs),
    )  # fmt: skip


def cage_of(*bars, contacts=(), prisms=()):
    return Cage(
        member="B", copies=1, mirrored=0, supports=(), prisms=prisms, cover=(25, 25, 25, 25),
        aggregate=20, bars=bars, contacts=contacts,
    )  # fmt: skip


LINK = closed_link(y0=-90, y1=90, z0=-425, z1=-25, dia=8, corner=HookCorner.TOP_LEFT)


def test_corner_contact():
    link = made("l", LINK, 8, Role.LINK, xs=(100.0, 250.0, 400.0))
    seat = (1 - 0.5**0.5) * (16 - 8)
    bar = made("m", bar_path(0, 500, 82 - seat - 8, -417 + seat + 8, dia=16, mandrel=128), 16)
    contact = Contact(ContactKind.CORNER, "l", "m", 100, 400)
    assert contact_problem(cage_of(link, bar), contact) is None
    off = made("m", bar_path(0, 500, 72, -405, dia=16, mandrel=128), 16)
    assert "do not touch" in contact_problem(cage_of(link, off), contact)
    assert contact_problems(cage_of(link, off, contacts=(contact,)))[0][0] == contact
    short = made("m", bar_path(0, 300, 82 - seat - 8, -417 + seat + 8, dia=16, mandrel=128), 16)
    assert "400" in contact_problem(cage_of(link, short), contact)


def test_corner_contacts_are_found_by_shape():
    link = made("l", LINK, 8, Role.LINK, xs=(100.0, 250.0, 400.0))
    seat = (1 - 0.5**0.5) * (16 - 8)
    bar = made("m", bar_path(0, 300, 82 - seat - 8, -417 + seat + 8, dia=16, mandrel=128), 16)
    free = made("n", bar_path(0, 300, 0, -300, dia=16, mandrel=128), 16)
    (contact,) = corner_contacts(cage_of(link, bar, free))
    assert (contact.kind, contact.a, contact.b) == (ContactKind.CORNER, "l", "m")
    assert (contact.x0, contact.x1) == pytest.approx((100, 250), abs=4)
    assert contact_problem(cage_of(link, bar), contact) is None


def test_a_tail_is_no_corner():
    link = made("l", LINK, 8, Role.LINK, xs=(100.0,))
    tip = LINK.corners[0]
    y, z = tip[1] - (8 + 4) / 2**0.5 + 10, tip[2] + (8 + 4) / 2**0.5 + 10
    bar = made("m", bar_path(0, 300, y, z, dia=16, mandrel=128), 16)
    assert len(gaps(cage_of(link, bar), within=0.5)) == 1
    assert corner_contacts(cage_of(link, bar)) == ()
    wrong = Contact(ContactKind.CORNER, "l", "m", 100, 100)
    assert "tail" in contact_problem(cage_of(link, bar), wrong)


@pytest.mark.parametrize("dia", [12, 16, 20, 25, 32])
def test_a_bar_that_fills_the_bend_is_a_corner(dia):
    link = made("l", LINK, 8, Role.LINK, xs=(100.0,))
    seat = corner_seat(16, dia)
    y, z = 82 - seat - dia / 2, -33 - seat - dia / 2
    bar = made("m", bar_path(0, 300, y, z, dia=dia, mandrel=8 * dia), dia)
    assert [c.b for c in corner_contacts(cage_of(link, bar))] == ["m"]
    assert undeclared(cage_of(link, bar, contacts=corner_contacts(cage_of(link, bar)))) == ()


def test_self_contact_of_a_link():
    link = made("l", LINK, 8, Role.LINK)
    assert contact_problem(cage_of(link), Contact(ContactKind.CROSSING, "l", "l", 0, 0)) is None


def test_lap_contact():
    a = made("a", bar_path(0, 3000, 0, 0, dia=20, mandrel=160), 20)
    b = made(
        "b", bar_path(2000, 6000, 20, 0, dia=20, mandrel=160, cranks=(Crank(x=3050, dy=-20),)), 20
    )
    hold = Contact(ContactKind.LAP, "a", "b", 2000, 3000)
    assert contact_problem(cage_of(a, b), hold) is None
    far = made("b", bar_path(2000, 6000, 23, 0, dia=20, mandrel=160), 20)
    assert "apart" in contact_problem(cage_of(a, far), hold)
    short = made("b", bar_path(2100, 6000, 20, 0, dia=20, mandrel=160), 20)
    assert "parallel" in contact_problem(cage_of(a, short), hold)
    assert "no bar" in contact_problem(cage_of(a), hold)


def test_crossing_contact():
    bar = made("m", bar_path(0, 3000, 0, 0, dia=20, mandrel=160), 20)
    spacer = made("s", across_path(-80, 80, 0, 22.5), 25, Role.SPACER, xs=(500.0, 1500.0))
    contact = Contact(ContactKind.CROSSING, "m", "s", 500, 1500)
    assert contact_problem(cage_of(bar, spacer), contact) is None


TEE = ((-115, -450), (115, -450), (115, -125), (600, -125), (600, 0), (-600, 0), (-600, -125),
       (-115, -125))  # fmt: skip


def test_covers_in_a_tee():
    web = Prism(name="w", x0=0, x1=4000, outline=TEE)
    link = made("l", LINK, 8, Role.LINK, xs=(100.0, 3900.0))
    bar = made("m", bar_path(30, 3960, 70, -400, dia=16, mandrel=128), 16)
    one, two, main = covers(cage_of(link, bar, prisms=(web,)))
    assert one.to(Side.TOP) == pytest.approx(25, abs=0.05)
    assert one.to(Side.BOTTOM) == pytest.approx(25, abs=0.05)
    assert one.to(Side.LEFT) == pytest.approx(25, abs=0.05)
    assert one.to(Side.RIGHT) == pytest.approx(25, abs=0.05)
    assert two.to(Side.END) == pytest.approx(92, abs=0.1)
    assert main.to(Side.START) == pytest.approx(30)
    assert main.to(Side.END) == pytest.approx(40)
    assert main.to(Side.LEFT) == pytest.approx(115 - 78)
    assert main.to(Side.BOTTOM) == pytest.approx(50 - 8)


def test_cover_outside_is_negative_and_a_column_hides_sides():
    web = ((-115, -450), (115, -450), (115, 0), (-115, 0))
    wide = ((-300, -900), (300, -900), (300, 500), (-300, 500))
    prisms = (
        Prism(name="w", x0=0, x1=4000, outline=web),
        Prism(name="c", x0=-400, x1=0, outline=wide),
    )
    bar = made("m", bar_path(-350, 3960, 105, -400, dia=16, mandrel=128), 16)
    (cover,) = covers(cage_of(bar, prisms=prisms))
    assert cover.to(Side.LEFT) == pytest.approx(2)
    out = made("m", bar_path(100, 3960, 125, -400, dia=16, mandrel=128), 16)
    (cover,) = covers(cage_of(out, prisms=prisms))
    assert cover.to(Side.LEFT) == pytest.approx(-18)
    inside = made("m", bar_path(-350, -50, 125, -400, dia=16, mandrel=128), 16)
    (cover,) = covers(cage_of(inside, prisms=prisms))
    assert cover.to(Side.LEFT) == pytest.approx(300 - 133)


def test_cut():
    web = Prism(name="w", x0=0, x1=4000, outline=TEE)
    link = made("l", LINK, 8, Role.LINK, xs=(100.0, 300.0))
    tie = made("t", Path(((0, 0, -425), (0, 0, -25)), ()), 8, Role.TIE, xs=(308.0,))
    low = made("m", bar_path(30, 3960, 70, -400, dia=16, mandrel=128), 16)
    high = made("n", bar_path(30, 2000, 0, -50, dia=16, mandrel=128), 16)
    slice_ = cut(cage_of(link, tie, high, low, prisms=(web,)), 290)
    assert [(c.bar.id, c.y, c.z) for c in slice_.bars] == [("m", 70, -400), ("n", 0, -50)]
    assert all(c.square for c in slice_.bars)
    assert [(b.id, k) for b, k in slice_.links] == [("l", 1), ("t", 0)]
    assert slice_.outline.area == pytest.approx(230 * 325 + 1200 * 125)
    assert len(cut(cage_of(low, high, prisms=(web,)), 3000).bars) == 1
    assert cut(cage_of(low, prisms=(web,)), 5000).outline.is_empty
