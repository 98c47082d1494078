"""Scheduled lengths: by the bending standard's rule, beside the exact length of the centre line."""

from __future__ import annotations

from dataclasses import dataclass
from math import radians

from detailer.cage.bar import Bar
from detailer.cage.measure import exact_length
from detailer.rules import is2502
from detailer.schedule.shapes import Bend, Family, Kind, Parts, parts_of, tan_half

RULE_RADIUS = 2.0
"""The link rule is made for this inner radius, in diameters."""

RULE_TAIL = 8.0
"""The link rule is made for this straight tail, in diameters."""

END_ADDITION = {90: 10.0, 135: 12.0, 180: 14.0}
"""What one end hook of a tie adds to its inside dimension, in diameters.

Half of what IS 2502, Table VIII adds for the two ends of a link; by geometry 9.82, 11.78 and
13.75 at an inner radius of two diameters and a tail of eight.
"""


@dataclass(frozen=True, slots=True, kw_only=True)
class Length:
    """The length of one bar. [mm]"""

    rule: float  # by the standard's rule from whole-millimetre dimensions
    exact: float  # of the centre line
    scheduled: float  # rounded up
    tolerance: float  # what rule and exact may differ by
    note: str = ""


def length_of(bar: Bar, step: float) -> Length:
    """Return the scheduled length of a bar.

    The rule's length where it agrees with the centre line; the centre line's where it does
    not, with a note that says so.

    Parameters
    ----------
    bar : Bar
        The bar.
    step : float
        Lengths are rounded up to a multiple of it. [mm]
    """
    parts = parts_of(bar)
    rule, exact = rule_length(parts, bar.dia), exact_length(bar)
    tolerance = max(5.0, 0.1 * bar.dia * bend_count(parts))
    agrees = abs(rule - exact) <= tolerance
    differs = f"by the centre line; the rule gives {rule:.0f}{_why(parts, bar.dia)}"
    return Length(
        rule=rule,
        exact=exact,
        scheduled=is2502.round_up(rule if agrees else exact, step),
        tolerance=tolerance,
        note="" if agrees else differs,
    )


def bend_count(parts: Parts) -> int:
    """Return the number of bends of a bar, the corners of a closed link among them.

    Parameters
    ----------
    parts : Parts
        The bar.
    """
    return len(parts.bends) + (3 if parts.family is Family.CLOSED else 0)


def rule_length(parts: Parts, dia: float) -> float:
    """Return a bar's length by IS 2502 from its whole-millimetre dimensions. [mm]

    Parameters
    ----------
    parts : Parts
        The bar as the bender measures it.
    dia : float
        Nominal diameter. [mm]

    References
    ----------
    .. [1] IS 2502:1963: outside dimensions less R/2 + d for each right angle (seen on a
       secondary page); hook allowance (FROM MEMORY, page_seen=False); Table VIII for links,
       on inside dimensions. Slants: geometry.
    """
    legs = [float(round(leg)) for leg in parts.legs]
    match parts.family:
        case Family.CLOSED:
            ends = round(parts.bends[0].angle)
            length = is2502.stirrup_length(legs[0], legs[1], dia, ends) + _longer_tails(parts, dia)
        case Family.TIE:
            ends_added = sum(END_ADDITION.get(round(b.angle), 12.0) for b in parts.bends)
            length = legs[0] + ends_added * dia + _longer_tails(parts, dia)
        case Family.BENT:
            length = sum(legs) + sum(_bend_term(bend, dia) for bend in parts.bends)
    return length


def _longer_tails(parts: Parts, dia: float) -> float:
    return sum(round(tail) - RULE_TAIL * dia for tail in parts.tails)


def _bend_term(bend: Bend, dia: float) -> float:
    """Return what a bend adds to the sum of the legs. [mm]"""
    match bend.kind:
        case Kind.SQUARE:
            return -(bend.radius / 2 + dia)
        case Kind.HOOK:
            # Allowance beyond the bend's outer face holds a tail of 4 d; the leg measures the
            # tail from the outer face too: tail + R + d.
            standard_leg = 4 * dia + bend.radius + dia
            return is2502.hook_allowance(dia, round(bend.radius / dia)) - standard_leg
        case Kind.SLANT:
            axis = bend.radius + dia / 2
            return axis * radians(bend.angle) - 2 * axis * tan_half(bend.angle)


def _why(parts: Parts, dia: float) -> str:
    """Return why the rule does not fit a link, in brackets; nothing for a bent bar."""
    made_for = RULE_RADIUS * dia
    if parts.family is Family.BENT or abs(parts.bends[0].radius - made_for) <= 0.5:
        return ""
    return f" (made for an inner radius of {made_for:.0f})"
