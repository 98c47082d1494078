"""Checks: one module a question, each reads the cage and yields findings."""

from __future__ import annotations

from collections.abc import Callable, Iterator

from detailer.checks import (
    anchorage,
    bends,
    clash,
    cover,
    cutoffs,
    deflection,
    depth,
    ends,
    given_cover,
    laps,
    layers,
    links,
    resistance,
    seat,
    shear,
    side_steel,
    sizes,
    spacing,
    steel_amount,
    stock,
)
from detailer.checks.case import Case
from detailer.findings import Finding, ordered

__all__ = ["CHECKS", "Case", "run"]

CHECKS: tuple[tuple[str, Callable[[Case], Iterator[Finding]]], ...] = (
    ("clashes and contacts of bars", clash.check),
    ("cover as given", given_cover.check),
    ("cover as placed", cover.check),
    ("clear spacing, nominal and over ribs", spacing.check),
    ("least and most steel, widest spacing", steel_amount.check),
    ("layers held", layers.check),
    ("bars in the corners of links", seat.check),
    ("bends and legs", bends.check),
    ("sizes and grades", sizes.check),
    ("ends in supports, butts, gaps", ends.check),
    ("side-face steel", side_steel.check),
    ("links along the line", links.check),
    ("bars longer than the stock", stock.check),
    ("bending resistance along the line", resistance.check),
    ("depth placed and depth assumed", depth.check),
    ("where bars stop", cutoffs.check),
    ("anchorage at supports", anchorage.check),
    ("laps", laps.check),
    ("shear and torsion along the line", shear.check),
    ("span to depth", deflection.check),
)
"""Every question that is asked, in words for the page."""


def run(case: Case) -> tuple[Finding, ...]:
    """Return what all checks find in one member, by place, worst first.

    Parameters
    ----------
    case : Case
        The member.
    """
    return ordered(finding for _, check in CHECKS for finding in check(case))
