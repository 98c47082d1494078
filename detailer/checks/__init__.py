"""Checks: one module a question, each reads the cage and yields findings."""

from __future__ import annotations

from collections.abc import Callable, Iterator

from detailer.checks import (
    anchorage,
    clash,
    cover,
    cutoffs,
    deflection,
    depth,
    laps,
    resistance,
    shear,
    spacing,
    stock,
)
from detailer.checks.case import Case
from detailer.findings import Finding, ordered

__all__ = ["CHECKS", "Case", "run"]

CHECKS: tuple[tuple[str, Callable[[Case], Iterator[Finding]]], ...] = (
    ("clashes and contacts of bars", clash.check),
    ("cover as placed", cover.check),
    ("clear spacing in a layer", spacing.check),
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
