"""Geometric tests of declared contacts: does what the placer meant really touch?"""

from __future__ import annotations

from dataclasses import replace
from functools import lru_cache
from itertools import product

from detailer.cage.bar import Bar, Cage, Contact, Point
from detailer.cage.clearance import Gap, gaps, self_gap
from detailer.cage.line import centre_line, line_through
from detailer.cage.vec import add, distance, dot, sub, times, unit
from detailer.values import TOUCH, ContactKind, Role

LAP_STEP = 25.0
"""A lap is tried at steps of this. [mm]"""

PARALLEL = 0.9998
"""Cosine of the angle between lapped bars; about one degree."""


HOLDERS = (Role.LINK, Role.TIE)
"""What holds a bar by a corner contact."""


def contact_problem(cage: Cage, contact: Contact) -> str | None:
    """Return why a declared contact does not hold, None where it does.

    corner, crossing: bars touch at both ends of the window, a corner not only at a hook's tail.
    lap, bundle: some placing of one lies parallel to and touches some placing of the other over
    the whole window.

    Parameters
    ----------
    cage : Cage
        The cage.
    contact : Contact
        One of its contacts.
    """
    known = {bar.id: bar for bar in cage.bars}
    for id_ in (contact.a, contact.b):
        if id_ not in known:
            return f"there is no bar {id_}"
    a, b = known[contact.a], known[contact.b]
    if contact.kind in (ContactKind.LAP, ContactKind.BUNDLE):
        return _lap_problem(a, b, contact)
    if a.id == b.id:
        apart = self_gap(a)
        return None if abs(apart) <= TOUCH else f"the ends of {a.name} lie {apart:.1f} mm apart"
    pair = replace(cage, bars=(a, b), contacts=(contact,))
    return _touch_problem(a, b, contact, gaps(pair, within=TOUCH))


def contact_problems(cage: Cage) -> tuple[tuple[Contact, str], ...]:
    """Return every declared contact that does not hold, with the reason.

    Parameters
    ----------
    cage : Cage
        The cage.
    """
    known = {bar.id: bar for bar in cage.bars}
    touching: dict[tuple[str, str], list[Gap]] = {}
    for gap in gaps(cage, within=TOUCH):
        touching.setdefault((gap.a, gap.b), []).append(gap)
    found = []
    for contact in cage.contacts:
        ids = (min(contact.a, contact.b), max(contact.a, contact.b))
        simple = contact.kind in (ContactKind.CORNER, ContactKind.CROSSING) and ids[0] != ids[1]
        if simple and ids[0] in known and ids[1] in known:
            a, b = known[contact.a], known[contact.b]
            why = _touch_problem(a, b, contact, tuple(touching.get(ids, ())))
        else:
            why = contact_problem(cage, contact)
        if why is not None:
            found.append((contact, why))
    return tuple(found)


def corner_contacts(cage: Cage) -> tuple[Contact, ...]:
    """Return a contact for every bar that lies against a leg or a bend of a link or tie.

    For the placer to declare, over the bars it has placed: a seated bar touches the bend and
    neither leg, so only the true shapes tell. What touches a hook's tail is not among them.

    Parameters
    ----------
    cage : Cage
        The placed bars; its contacts and its concrete do not matter.
    """
    known = {bar.id: bar for bar in cage.bars}
    spans: dict[tuple[str, str], list[float]] = {}
    for gap in gaps(cage, within=TOUCH):
        a, b = known[gap.a], known[gap.b]
        holders = [(bar, k) for bar, k in ((a, gap.ai), (b, gap.bi)) if bar.role in HOLDERS]
        if len(holders) != 1 or gap.gap < -TOUCH:
            continue
        if not _on_tail(*holders[0], gap, (a.dia + b.dia) / 4):
            spans.setdefault((a.id, b.id), []).append(gap.at[0])
    return tuple(
        Contact(ContactKind.CORNER, a, b, min(xs), max(xs)) for (a, b), xs in sorted(spans.items())
    )


def _on_tail(holder: Bar, placing: int, gap: Gap, half: float) -> bool:
    """Return whether a contact lies on the straight tail of a hook, past its first 2 mm."""
    if len(holder.corners) < 4:
        return False
    x, y, z = sub(gap.at, holder.placings[placing])
    near = half + TOUCH / 2
    for (tx, ty, tz), (ux, uy, uz), size in _tails(holder.corners, holder.mandrels, holder.dia):
        share = (x - tx) * ux + (y - ty) * uy + (z - tz) * uz
        share = min(max(share, 0.0), max(size - 2.0, 0.0))
        if abs(y - ty - share * uy) > near or abs(z - tz - share * uz) > near:
            continue
        if distance((x, y, z), (tx + share * ux, ty + share * uy, tz + share * uz)) <= near:
            return True
    return False


@lru_cache(maxsize=256)
def _tails(
    corners: tuple[Point, ...], mandrels: tuple[float, ...], dia: float
) -> tuple[tuple[Point, Point, float], ...]:
    """Return tip, direction and length of the first and the last straight of a bar."""
    segments = line_through(corners, mandrels, dia).segments
    ends = (
        (segments[0].start, segments[0].end),
        (segments[-1].end, segments[-1].start),
    )
    return tuple((tip, unit(sub(root, tip)), distance(tip, root)) for tip, root in ends)


def _touch_problem(a: Bar, b: Bar, contact: Contact, found: tuple[Gap, ...]) -> str | None:
    mine = [g for g in found if {g.a, g.b} == {a.id, b.id}]
    slack = 2 * (a.dia + b.dia)
    for x in (contact.x0, contact.x1):
        near = [g for g in mine if abs(g.at[0] - x) <= slack]
        if not near:
            return f"{a.name} and {b.name} do not touch at x {x:.0f}"
        holder = a if a.role in HOLDERS else b
        if contact.kind is ContactKind.CORNER and all(
            _on_tail(holder, g.ai if g.a == holder.id else g.bi, g, (a.dia + b.dia) / 4)
            for g in near
        ):
            return f"{a.name} and {b.name} touch at a hook's tail at x {x:.0f}"
        deepest = min(g.gap for g in near)
        if deepest < -TOUCH:
            return f"{a.name} and {b.name} penetrate by {-deepest:.1f} mm at x {x:.0f}"
    return None


def _lap_problem(a: Bar, b: Bar, contact: Contact) -> str | None:
    reasons = []
    for i, j in product(range(len(a.placings)), range(len(b.placings))):
        if a.id == b.id and i >= j:
            continue
        why = _lap_of(a, i, b, j, contact)
        if why is None:
            return None
        reasons.append(why)
    return min(reasons, default=f"{a.name} has nothing to lie against")


def _lap_of(a: Bar, i: int, b: Bar, j: int, contact: Contact) -> str | None:
    steps = max(1, round((contact.x1 - contact.x0) / LAP_STEP))
    for k in range(steps + 1):
        x = contact.x0 + (contact.x1 - contact.x0) * k / steps
        apart = _apart(a, i, b, j, x)
        if apart is None:
            return f"{a.name} and {b.name} do not run parallel at x {x:.0f}"
        if abs(apart) > TOUCH:
            return f"{a.name} and {b.name} lie {apart:.1f} mm apart at x {x:.0f}"
    return None


def _apart(a: Bar, i: int, b: Bar, j: int, x: float) -> float | None:
    """Return the clear distance of two parallel bars at a plane x, None if they are not so."""
    ax, ay, az = a.placings[i]
    bx, by, bz = b.placings[j]
    best: float | None = None
    for one, other in product(centre_line(a).at_x(x - ax), centre_line(b).at_x(x - bx)):
        if abs(dot(one.direction, other.direction)) < PARALLEL:
            continue
        way = (0.0, other.y + by - one.y - ay, other.z + bz - one.z - az)
        along = dot(way, one.direction)
        square = add(way, times(one.direction, along), -1.0)
        gap = distance(square, (0.0, 0.0, 0.0)) - (a.dia + b.dia) / 2
        best = gap if best is None or abs(gap) < abs(best) else best
    return best
