"""How a bar ends in its last support: straight, bent or hooked, sized to what the rule asks."""

from __future__ import annotations

from dataclasses import dataclass
from math import ceil

from detailer.model import Beam, Project
from detailer.placing.strand import End
from detailer.rules import is456, is2502
from detailer.values import EndForm, SupportKind

ASSUMED_COLUMN = (40.0, 8.0, 16.0)
"""Cover, tie and bar taken for a column of which only the size is given. [mm]"""


@dataclass(frozen=True, slots=True, kw_only=True)
class Room:
    """What an end support offers one bar. [mm]"""

    past_face: float  # from the inner face to the outermost point a bar may reach
    drop: float  # longest leg, outside to outside, that stays within the beam
    capped: bool  # whether no leg may be longer, needed or not


def far_clear(beam: Beam, support: int) -> float:
    """Return what a bar must keep from the outer face of an end support. [mm]

    In a column: its cover, tie and bar, so that a bend stays in the core; on a wall: the
    beam's own cover.
    """
    at = beam.supports[support]
    if at.kind is SupportKind.COLUMN:
        if at.column is None:
            return sum(ASSUMED_COLUMN)
        return at.column.cover + at.column.link_dia + at.column.bars.dia
    return max(beam.cover.left, beam.cover.right)


def development(project: Project, dia: float, stress: float | None = None) -> float:
    """Return the development length of a main bar in tension. [mm]

    Parameters
    ----------
    project : Project
        Its grades.
    dia : float
        Nominal diameter. [mm]
    stress : float, optional
        Stress to develop; 0.87 fy where absent. [N/mm²]
    """
    steel = project.steel.main
    bond = is456.bond_stress(project.concrete.fck, deformed=steel.deformed)
    return is456.development_length(dia, 0.87 * steel.fy if stress is None else stress, bond).value


def bend_leg(dia: float, tail: float, step: float) -> float:
    """Return the leg of a bend, outside to outside, for a straight tail, rounded up. [mm]"""
    radius = is2502.bend_radius(dia)
    return ceil((radius + dia + tail) / step - 1e-9) * step


def end_for(
    dia: float, need: float, room: Room, *, want: EndForm | None, step: float, least: float = 0.0
) -> tuple[float, End]:
    """Return how far past the inner face a bar goes and how it ends there.

    Parameters
    ----------
    dia : float
        Nominal diameter. [mm]
    need : float
        Anchorage asked past the inner face. [mm]
    room : Room
        What the support offers.
    want : EndForm or None
        The form the engineer fixed.
    step : float
        Rounding of legs. [mm]
    least : float
        Anchorage without which the bar is unsafe; a leg longer than the beam allows is cut
        back to what fits as long as this is kept. [mm]
    """
    if want is EndForm.STRAIGHT or (want is None and need <= room.past_face):
        reach = room.past_face if want is None or need > room.past_face else need
        return reach, End()
    radius = is2502.bend_radius(dia)
    straight = max(0.0, room.past_face - radius - dia)
    standard = 4 * dia
    bend = is456.anchorage_value(dia, 90)
    hook = is456.anchorage_value(dia, 180)
    tail = max(standard, need - straight - bend + standard)
    leg = bend_leg(dia, tail, step)
    fits = leg <= room.drop
    if want is EndForm.HOOK or (want is None and not fits and straight + hook >= need):
        return room.past_face, End(EndForm.HOOK, standard)
    if not fits:
        short = room.drop // step * step
        kept = straight + bend + short - radius - dia - standard
        if short >= bend_leg(dia, standard, step) and (kept >= least or room.capped):
            leg = short
    return room.past_face, End(EndForm.BEND, leg)
