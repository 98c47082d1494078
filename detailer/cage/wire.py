"""The placed cage as a file: cage.json, versioned, coordinates to 0.001 mm."""

from __future__ import annotations

import json
from typing import Any

from detailer.cage.bar import Bar, Cage, Contact, Point, Prism, Rest, Shape
from detailer.cage.measure import exact_length
from detailer.model import Project
from detailer.values import ContactKind, Face, Role, SupportKind

SCHEMA = 1
"""Version of the file's form; raised whenever a reader must change."""


def to_json(cages: tuple[Cage, ...], project: Project) -> str:
    """Return cage.json: one line a bar, the same text for the same cages.

    Parameters
    ----------
    cages : tuple of Cage
        The placed members.
    project : Project
        What they belong to; gives the names, the codes and the grades.
    """
    head = {
        "schema": SCHEMA,
        "units": "mm",
        "project": {
            "number": project.number,
            "title": project.title,
            "part": project.part,
            "owner": project.owner,
            "revision": project.issue.revision,
            "date": project.issue.date,
        },
        "rules": {"code": project.code, "bending": project.bending, "ductile": project.ductile},
    }
    lines = [f"{_text(key)}: {_text(value)}" for key, value in head.items()]
    members = ",\n".join(_member(cage, project) for cage in cages)
    return "{\n" + ",\n".join([*lines, f'"members": [\n{members}\n]']) + "\n}\n"


def _member(cage: Cage, project: Project) -> str:
    steel = project.steel
    fields: dict[str, Any] = {
        "mark": cage.member,
        "copies": cage.copies,
        "mirrored": cage.mirrored,
        "origin": _numbers(cage.origin),
        "direction": _number(cage.direction),
        "grades": {
            "concrete": project.concrete.grade,
            "main": steel.main.name,
            "links": steel.links.name,
        },
        "cover": dict(zip(("top", "bottom", "left", "right"), _numbers(cage.cover), strict=True)),
        "aggregate": _number(cage.aggregate),
        "supports": [_rest(rest) for rest in cage.supports],
    }
    lines = [f"{_text(key)}: {_text(value)}" for key, value in fields.items()]
    lines.append(_list("prisms", [_prism(prism) for prism in cage.prisms]))
    lines.append(_list("bars", [_bar(bar) for bar in cage.bars]))
    lines.append(_list("contacts", [_contact(contact) for contact in cage.contacts]))
    return "{" + ",\n".join(lines) + "}"


def _list(name: str, rows: list[dict[str, Any]]) -> str:
    return f'"{name}": [\n' + ",\n".join(_text(row) for row in rows) + "\n]"


def _text(value: object) -> str:
    return json.dumps(value, ensure_ascii=False, separators=(",", ":"), allow_nan=False)


def _number(value: float) -> float | int:
    """Return a number rounded to 0.001, whole numbers without a point, never −0."""
    rounded = round(float(value), 3)
    return int(rounded) if rounded == int(rounded) else rounded


def _numbers(values: tuple[float, ...]) -> list[float | int]:
    return [_number(value) for value in values]


def _rest(rest: Rest) -> dict[str, Any]:
    return {
        "name": rest.name,
        "kind": rest.kind.value,
        "x": _number(rest.x),
        "width": _number(rest.width),
        "across": _number(rest.across),
    }


def _prism(prism: Prism) -> dict[str, Any]:
    return {
        "name": prism.name,
        "x0": _number(prism.x0),
        "x1": _number(prism.x1),
        "outline": [_numbers(point) for point in prism.outline],
    }


def _bar(bar: Bar) -> dict[str, Any]:
    shape = bar.shape
    return {
        "id": bar.id,
        "mark": bar.mark,
        "role": bar.role.value,
        "face": bar.face.value,
        "layer": bar.layer,
        "grade": bar.grade,
        "diameter": _number(bar.dia),
        "corners": [_numbers(point) for point in bar.corners],
        "mandrels": _numbers(bar.mandrels),
        "placings": [_numbers(shift) for shift in bar.placings],
        "shape": None
        if shape is None
        else {
            "standard": shape.standard,
            "code": shape.code,
            "dimensions": {letter: _number(size) for letter, size in shape.dimensions},
        },
        "length": None if bar.length is None else _number(bar.length),
        "centre_line": _number(exact_length(bar)),
    }


def _contact(contact: Contact) -> dict[str, Any]:
    return {
        "kind": contact.kind.value,
        "a": contact.a,
        "b": contact.b,
        "x0": _number(contact.x0),
        "x1": _number(contact.x1),
    }


def from_json(text: str) -> tuple[Cage, ...]:
    """Return the cages of a cage.json.

    Parameters
    ----------
    text : str
        The file.

    Raises
    ------
    ValueError
        If the text is no cage.json of this schema.
    """
    data = json.loads(text)
    if not isinstance(data, dict) or data.get("schema") != SCHEMA:
        raise ValueError(f"no cage.json of schema {SCHEMA}")
    return tuple(_cage_of(member) for member in data["members"])


def _cage_of(member: dict[str, Any]) -> Cage:
    cover = member["cover"]
    return Cage(
        member=member["mark"],
        copies=member["copies"],
        mirrored=member["mirrored"],
        supports=tuple(
            Rest(
                name=r["name"],
                kind=SupportKind(r["kind"]),
                x=float(r["x"]),
                width=float(r["width"]),
                across=float(r["across"]),
            )
            for r in member["supports"]
        ),
        prisms=tuple(
            Prism(
                name=p["name"],
                x0=float(p["x0"]),
                x1=float(p["x1"]),
                outline=tuple((float(y), float(z)) for y, z in p["outline"]),
            )
            for p in member["prisms"]
        ),
        cover=(
            float(cover["top"]),
            float(cover["bottom"]),
            float(cover["left"]),
            float(cover["right"]),
        ),
        aggregate=float(member["aggregate"]),
        bars=tuple(_bar_of(bar) for bar in member["bars"]),
        contacts=tuple(
            Contact(ContactKind(c["kind"]), c["a"], c["b"], float(c["x0"]), float(c["x1"]))
            for c in member["contacts"]
        ),
        origin=_point(member["origin"]),
        direction=float(member["direction"]),
    )


def _bar_of(bar: dict[str, Any]) -> Bar:
    shape = bar["shape"]
    return Bar(
        id=bar["id"],
        mark=bar["mark"],
        role=Role(bar["role"]),
        face=Face(bar["face"]),
        layer=bar["layer"],
        grade=bar["grade"],
        dia=float(bar["diameter"]),
        corners=tuple(_point(p) for p in bar["corners"]),
        mandrels=tuple(float(m) for m in bar["mandrels"]),
        placings=tuple(_point(p) for p in bar["placings"]),
        shape=None
        if shape is None
        else Shape(
            shape["standard"],
            shape["code"],
            tuple((letter, float(size)) for letter, size in shape["dimensions"].items()),
        ),
        length=None if bar["length"] is None else float(bar["length"]),
    )


def _point(values: list[float]) -> Point:
    x, y, z = values
    return float(x), float(y), float(z)
