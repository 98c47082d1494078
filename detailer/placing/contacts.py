"""Contacts that the placer means, declared by kind."""

from __future__ import annotations

import itertools
from collections.abc import Iterator
from math import hypot

from detailer.cage.bar import Bar, Contact
from detailer.placing.strand import Strand
from detailer.values import ContactKind

BEND = 20.0
"""The bend of a crank takes up no more than this of the straight before it. [mm]"""

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
                yield Contact(ContactKind.LAP, min(a_id, b_id), max(a_id, b_id), *window)


def _touching(a: Strand, b: Strand) -> tuple[float, float] | None:
    """Return from where to where two strands touch, None where they do not."""
    x0, x1 = max(a.x0, b.x0), min(a.x1, b.x1)
    edges = {x0, x1}
    for s in (a, b):
        if s.crank:
            bent = (
                s.aside_to - BEND,
                s.aside_to,
                s.aside_to + s.crank,
                s.aside_to + s.crank + BEND,
            )
            edges |= {x for x in bent if x0 < x < x1}
    order = sorted(edges)
    for low, high in itertools.pairwise(order):
        if high - low < 1.0:
            continue
        ends = [hypot(a.at(x)[0] - b.at(x)[0], a.at(x)[1] - b.at(x)[1]) for x in (low, high)]
        if all(abs(d - (a.dia + b.dia) / 2) < TOUCHING for d in ends):
            return low, high
    return None


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
            first, second = sorted((spacer.id, id_))
            yield Contact(ContactKind.CROSSING, first, second, min(at), max(at))
