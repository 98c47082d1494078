"""Hand-made bars and cages for tests of the schedule."""

from __future__ import annotations

from dataclasses import replace

from detailer.cage import forms
from detailer.cage.bar import Bar, Cage, Contact, Point, Prism, Rest
from detailer.values import EndForm, Face, Role, SupportKind


def main_bar(
    id_: str,
    x0: float,
    x1: float,
    *,
    dia: float = 16,
    y: float = 0.0,
    z: float = -400.0,
    left: float = 0.0,
    right: float = 0.0,
    cranks: tuple[forms.Crank, ...] = (),
    up: bool = True,
    role: Role = Role.MAIN,
    face: Face = Face.BOTTOM,
    hooks: tuple[bool, bool] = (False, False),
) -> Bar:
    """Return a bar along x; `left` and `right` are outside legs (tails of hooks)."""
    ends = [
        None
        if not leg
        else forms.EndShape(form=EndForm.HOOK if hook else EndForm.BEND, leg=leg, up=up)
        for leg, hook in zip((left, right), hooks, strict=True)
    ]
    corners, mandrels = forms.bar_path(
        x0, x1, y, z, left=ends[0], right=ends[1], cranks=cranks, dia=dia, mandrel=8 * dia
    )
    return Bar(
        id=id_,
        role=role,
        face=face,
        layer=1,
        grade="Fe 500",
        dia=dia,
        corners=corners,
        mandrels=mandrels,
    )


def link(
    id_: str,
    width: float,
    height: float,
    *,
    dia: float = 8,
    corner: forms.HookCorner = forms.HookCorner.TOP_LEFT,
    xs: tuple[float, ...] = (0.0,),
    bend: float | None = None,
) -> Bar:
    """Return closed links of outside dimensions with their top at z = -30."""
    corners, mandrels = forms.closed_link(
        y0=-width / 2, y1=width / 2, z0=-30 - height, z1=-30, dia=dia, corner=corner, bend=bend
    )
    return Bar(
        id=id_,
        role=Role.LINK,
        face=Face.NONE,
        layer=0,
        grade="Fe 415",
        dia=dia,
        corners=corners,
        mandrels=mandrels,
        placings=tuple((x, 0.0, 0.0) for x in xs),
    )


def tie(id_: str, low: float, high: float, dia: float = 8, side: int = 1) -> Bar:
    """Return an upright cross tie between two levels."""
    corners, mandrels = forms.cross_tie(at=0.0, low=low, high=high, dia=dia, side=side)
    return Bar(
        id=id_,
        role=Role.TIE,
        face=Face.NONE,
        layer=0,
        grade="Fe 415",
        dia=dia,
        corners=corners,
        mandrels=mandrels,
    )


def spacer(id_: str, width: float, dia: float = 25, xs: tuple[float, ...] = (1000.0,)) -> Bar:
    """Return spacer bars across the member."""
    corners, mandrels = forms.across_path(-width / 2, width / 2, 0.0, -380.0)
    return Bar(
        id=id_,
        role=Role.SPACER,
        face=Face.NONE,
        layer=0,
        grade="Fe 500",
        dia=dia,
        corners=corners,
        mandrels=mandrels,
        placings=tuple((x, 0.0, 0.0) for x in xs),
    )


def cage(
    *bars: Bar,
    member: str = "B1",
    copies: int = 1,
    mirrored: int = 0,
    contacts: tuple[Contact, ...] = (),
) -> Cage:
    """Return a cage in a beam of 230 x 450 between two columns, 4.20 m clear."""
    web = ((-115.0, -450.0), (115.0, -450.0), (115.0, 0.0), (-115.0, 0.0))
    column = ((-150.0, -950.0), (150.0, -950.0), (150.0, 500.0), (-150.0, 500.0))
    return Cage(
        member=member,
        copies=copies,
        mirrored=mirrored,
        supports=(
            Rest(name="A1", kind=SupportKind.COLUMN, x=0.0, width=300.0, across=230.0),
            Rest(name="B1", kind=SupportKind.COLUMN, x=4500.0, width=300.0, across=230.0),
        ),
        prisms=(
            Prism(name="span 1 web", x0=-150.0, x1=4650.0, outline=web),
            Prism(name="column A1", x0=-150.0, x1=150.0, outline=column),
            Prism(name="column B1", x0=4350.0, x1=4650.0, outline=column),
        ),
        cover=(30.0, 30.0, 30.0, 30.0),
        aggregate=20.0,
        bars=bars,
        contacts=contacts,
    )


def moved(bar: Bar, id_: str, shift: Point) -> Bar:
    """Return the same bar elsewhere under another id."""
    corners = tuple(tuple(a + b for a, b in zip(c, shift, strict=True)) for c in bar.corners)
    return replace(bar, id=id_, corners=corners)


def mirror_x(bar: Bar, id_: str, about: float = 0.0) -> Bar:
    """Return the bar mirrored in a plane across the member."""
    return replace(bar, id=id_, corners=tuple((2 * about - x, y, z) for x, y, z in bar.corners))


def mirror_y(bar: Bar, id_: str) -> Bar:
    """Return the bar mirrored in the member's upright middle plane."""
    return replace(bar, id=id_, corners=tuple((x, -y, z) for x, y, z in bar.corners))


def turned_about(bar: Bar, id_: str) -> Bar:
    """Return the bar turned by 180° about the upright axis."""
    return replace(bar, id=id_, corners=tuple((-x, -y, z) for x, y, z in bar.corners))
