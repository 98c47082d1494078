"""A hand-built cage of one two-span beam with two bottom layers, laps and marks: for views only."""

from __future__ import annotations

from dataclasses import replace

from detailer.cage.bar import Bar, Cage, Contact, Prism, Rest, Shape
from detailer.cage.forms import (
    Crank,
    EndShape,
    HookCorner,
    Path,
    across_path,
    bar_path,
    closed_link,
)
from detailer.cage.measure import exact_length
from detailer.values import ContactKind, EndForm, Face, Role, SupportKind

B, D, COVER = 300.0, 600.0, 30.0
LEFT, RIGHT = 225.0, 5775.0  # faces of span 1
LEFT2, RIGHT2 = 6225.0, 10775.0


def _bar(
    id_: str,
    role: Role,
    face: Face,
    layer: int,
    dia: float,
    form: Path,
    ys: tuple[float, ...],
    mark: str,
    code: str = "straight",
) -> Bar:
    y = form.corners[0][1]
    bar = Bar(
        id=id_,
        role=role,
        face=face,
        layer=layer,
        grade="Fe 500",
        dia=dia,
        corners=form.corners,
        mandrels=form.mandrels,
        placings=tuple((0.0, at - y, 0.0) for at in ys),
        mark=mark,
        shape=Shape("IS 2502", code, (("A", 100.0),)),
    )
    return replace(bar, length=-(-exact_length(bar) // 10) * 10)


def _links(id_: str, corner: HookCorner, xs: tuple[float, ...], mark: str) -> Bar:
    form = closed_link(
        y0=-B / 2 + COVER, y1=B / 2 - COVER, z0=-D + COVER, z1=-COVER, dia=8, corner=corner
    )
    bar = Bar(
        id=id_,
        role=Role.LINK,
        face=Face.NONE,
        layer=0,
        grade="Fe 415",
        dia=8,
        corners=form.corners,
        mandrels=form.mandrels,
        placings=tuple((x, 0.0, 0.0) for x in xs),
        mark=mark,
        shape=Shape("IS 2502", "closed link", (("A", 224.0), ("B", 524.0))),
    )
    return replace(bar, length=1700.0)


def link_places() -> tuple[float, ...]:
    xs: list[float] = []
    for x0, x1 in ((LEFT, RIGHT), (LEFT2, RIGHT2)):
        first, last = x0 + 50, x1 - 50
        a, b = first + 900, last - 900
        xs += [first + 150 * i for i in range(6)]
        n = -(-(b - a) // 200)
        xs += [a + (b - a) / n * i for i in range(int(n) + 1)]
        xs += [b + 150 * i for i in range(1, 7)]
    return tuple(xs)


def example_cage() -> Cage:
    """Return the cage."""
    bend_down = EndShape(form=EndForm.BEND, leg=350, up=False)
    bend_up = EndShape(form=EndForm.BEND, leg=300, up=True)
    top, low = -COVER - 8 - 10, -D + COVER + 8 + 10
    side = B / 2 - COVER - 8 - 10
    lap = 900.0
    long_bars = bar_path(-180, 3000 + lap / 2, side, top, left=bend_down, dia=16, mandrel=128)
    other = bar_path(
        3000 - lap / 2,
        11180,
        side - 16,
        top,
        right=bend_down,
        dia=16,
        mandrel=128,
        cranks=(Crank(x=3000 + lap / 2 + 50, dy=16.0),),
    )
    extra = bar_path(4600, 7500, 60, top, dia=20, mandrel=160)
    b1 = bar_path(-180, 6150, side, low, left=bend_up, dia=20, mandrel=160)
    b2 = bar_path(5850, 11180, side - 25, low, right=bend_up, dia=16, mandrel=128)
    second = bar_path(900, 5100, side, low + 45, dia=20, mandrel=160)
    face1 = bar_path(75, 10925, B / 2 - COVER - 8 - 5, -300, dia=10, mandrel=80)
    xs = link_places()
    bars = (
        _bar("B1", Role.MAIN, Face.BOTTOM, 1, 20, b1, (side, 0.0, -side), "01", "one bend"),
        _bar("B2", Role.MAIN, Face.BOTTOM, 1, 16, b2, (side - 25, -side + 25), "02", "one bend"),
        _bar("B3", Role.MAIN, Face.BOTTOM, 2, 20, second, (side, -side), "03"),
        _bar("T1", Role.MAIN, Face.TOP, 1, 16, long_bars, (side, -side), "04", "one bend"),
        _bar("T2", Role.MAIN, Face.TOP, 1, 16, other, (side - 16, -side + 16), "05", "one bend"),
        _bar("T3", Role.MAIN, Face.TOP, 1, 20, extra, (36.0, -36.0), "06"),
        _bar(
            "S1",
            Role.SIDE,
            Face.LEFT,
            0,
            10,
            face1,
            (B / 2 - COVER - 13, -B / 2 + COVER + 13),
            "07",
        ),
        _links("L1", HookCorner.TOP_LEFT, xs[::2], "08"),
        _links("L2", HookCorner.TOP_RIGHT, xs[1::2], "08"),
        _spacers(low + 22.5),
    )
    return Cage(
        member="FB9",
        copies=2,
        mirrored=1,
        supports=(
            Rest(name="A1", kind=SupportKind.COLUMN, x=0, width=450, across=300),
            Rest(name="B1", kind=SupportKind.COLUMN, x=6000, width=450, across=300),
            Rest(name="C1", kind=SupportKind.WALL, x=11000, width=450, across=300),
        ),
        prisms=_concrete(),
        cover=(COVER, COVER, COVER, COVER),
        aggregate=20,
        bars=bars,
        contacts=(Contact(ContactKind.LAP, "T1", "T2", 2550, 3450),),
    )


def _spacers(z: float) -> Bar:
    form = across_path(-B / 2 + COVER + 8, B / 2 - COVER - 8, 0.0, z)
    bar = _bar("P1", Role.SPACER, Face.NONE, 0, 25, form, (form.corners[0][1],), "09")
    places = tuple((x, 0.0, 0.0) for x in (1000.0, 2000.0, 3000.0, 4000.0, 5000.0))
    return replace(bar, placings=places)


def _box(y0: float, y1: float, z0: float, z1: float) -> tuple[tuple[float, float], ...]:
    return ((y0, z0), (y1, z0), (y1, z1), (y0, z1))


def _concrete() -> tuple[Prism, ...]:
    web = _box(-B / 2, B / 2, -D, 0)
    wide = _box(-700, 700, -130, 0)
    return (
        Prism(name="span 1 web", x0=-225, x1=6000, outline=web),
        Prism(name="span 1 flange", x0=-225, x1=6000, outline=wide),
        Prism(name="span 2 web", x0=6000, x1=11225, outline=web),
        Prism(name="span 2 flange", x0=6000, x1=11225, outline=wide),
        Prism(name="column A1", x0=-225, x1=225, outline=_box(-150, 150, -1100, 500)),
        Prism(name="column B1", x0=5775, x1=6225, outline=_box(-150, 150, -1100, 500)),
        Prism(name="wall C1", x0=10775, x1=11225, outline=_box(-150, 150, -1100, -600)),
    )
