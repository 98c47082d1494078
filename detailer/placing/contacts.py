"""Contacts that the placer means, declared by kind."""

from __future__ import annotations

import itertools
from collections.abc import Iterator
from math import hypot

from detailer.cage.bar import Bar, Contact
from detailer.placing.strand import Strand
from detailer.values import ContactKind

TOUCHING = 0.3
"""Surfaces this close are meant to touch. [mm]"""


def laps(pairs: tuple[tuple[str, Strand], ...]) -> Iterator[Contact]:
    """Yield a lap for every two bars of a face that lie touching and parallel.

    Parameters
    ----------
    pairs : tuple of (id, Strand)
        Every strand under the id of its bar.
    """
    order = sorted(pairs, key=lambda p: (p[1].face.value, p[1].x0, p[0]))
    for i, (a_id, a) in enumerate(order):
        for b_id, b in order[i + 1 :]:
            if b.face is not a.face or b.x0 > a.x1:
                continue
            window = _touching(a, b)
            if window is not None:
                yield Contact(ContactKind.LAP, *sorted((a_id, b_id)), *window)


def _touching(a: Strand, b: Strand) -> tuple[float, float] | None:
    """Return from where to where two strands touch, None where they do not."""
    x0, x1 = max(a.x0, b.x0), min(a.x1, b.x1)
    edges = {x0, x1}
    for s in (a, b):
        if s.crank:
            edges |= {x for x in (s.aside_to, s.aside_to + s.crank) if x0 < x < x1}
    order = sorted(edges)
    for low, high in itertools.pairwise(order):
        if high - low < 1.0:
            continue
        ends = [hypot(a.at(x)[0] - b.at(x)[0], a.at(x)[1] - b.at(x)[1]) for x in (low, high)]
        if all(abs(d - (a.dia + b.dia) / 2) < TOUCHING for d in ends):
            return low, high
    return None


def corners(links: tuple[Bar, ...], pairs: tuple[tuple[str, Strand], ...]) -> Iterator[Contact]:
    """Yield a contact for every bar that lies against a link or tie.

    Parameters
    ----------
    links : tuple of Bar
        Links and ties.
    pairs : tuple of (id, Strand)
        Every strand under the id of its bar.
    """
    for link in links:
        xs = sorted(p[0] for p in link.placings)
        faces = _faces(link)
        touched: dict[str, list[float]] = {}
        for id_, s in pairs:
            at = [x for x in xs if s.covers(x) and _against(s.at(x), s.dia / 2, faces)]
            if at:
                touched.setdefault(id_, []).extend(at)
        for id_, at in sorted(touched.items()):
            yield Contact(ContactKind.CORNER, *sorted((link.id, id_)), min(at), max(at))


def _faces(link: Bar) -> tuple[float, float, float, float]:
    """Return the inner faces of a link, or the outer faces of a tie: y0, y1, z0, z1."""
    r = link.dia / 2
    inner = link.corners[2:-2] if len(link.corners) > 5 else link.corners
    ys = [y for _, y, _ in inner]
    zs = [z for _, _, z in inner]
    return min(ys) + r, max(ys) - r, min(zs) + r, max(zs) - r


def _against(
    at: tuple[float, float], radius: float, faces: tuple[float, float, float, float]
) -> bool:
    """Return whether a bar touches one of the legs."""
    y, z = at
    y0, y1, z0, z1 = faces
    near = TOUCHING + radius
    sides = min(abs(y - y0), abs(y1 - y)) <= near and z0 - 1 <= z <= z1 + 1
    decks = min(abs(z - z0), abs(z1 - z)) <= near and y0 - 1 <= y <= y1 + 1
    return sides or decks


def crossings(spacers: tuple[Bar, ...], pairs: tuple[tuple[str, Strand], ...]) -> Iterator[Contact]:
    """Yield a contact for every bar that rests on a spacer.

    Parameters
    ----------
    spacers : tuple of Bar
        Spacer bars.
    pairs : tuple of (id, Strand)
        Every strand under the id of its bar.
    """
    for spacer in spacers:
        z = spacer.corners[0][2]
        touched: dict[str, list[float]] = {}
        for id_, s in pairs:
            for x, _, _ in spacer.placings:
                if s.covers(x) and abs(abs(s.at(x)[1] - z) - (s.dia + spacer.dia) / 2) < TOUCHING:
                    touched.setdefault(id_, []).append(x)
        for id_, at in sorted(touched.items()):
            yield Contact(ContactKind.CROSSING, *sorted((spacer.id, id_)), min(at), max(at))
