"""Findings and assumptions as JSON: the same keys always, numbers finite, bytes repeatable."""

from __future__ import annotations

import json
from collections.abc import Iterable
from math import isfinite
from typing import Any, Protocol

from detailer.findings import Finding
from detailer.values import CAUTION


class Assumed(Protocol):
    """Something taken for granted."""

    @property
    def number(self) -> int: ...  # noqa: D102
    @property
    def member(self) -> str: ...  # noqa: D102
    @property
    def text(self) -> str: ...  # noqa: D102


class Doubted(Protocol):
    """A question about the input."""

    @property
    def file(self) -> str: ...  # noqa: D102
    @property
    def line(self) -> int | None: ...  # noqa: D102
    @property
    def field(self) -> str: ...  # noqa: D102
    @property
    def text(self) -> str: ...  # noqa: D102


def findings(found: Iterable[Finding]) -> bytes:
    """Return findings.json: a list, in the order given.

    Parameters
    ----------
    found : iterable of Finding
        Ordered findings.
    """
    return _bytes([_finding(item) for item in found])


def assumptions(project: str, assumed: Iterable[Assumed], doubts: Iterable[Doubted]) -> bytes:
    """Return assumptions.json: the caution, what was assumed by number, what is in doubt.

    Parameters
    ----------
    project : str
        Number of the project.
    assumed : iterable of Assumed
        What was taken for granted.
    doubts : iterable of Doubted
        Questions about the input.
    """
    return _bytes(
        {
            "caution": CAUTION,
            "project": project,
            "assumptions": [
                {"number": f"A{item.number}", "member": item.member, "text": item.text}
                for item in assumed
            ],
            "doubts": [
                {"file": item.file, "line": item.line, "field": item.field, "text": item.text}
                for item in doubts
            ],
        }
    )


def _finding(item: Finding) -> dict[str, Any]:
    return {
        "rule": item.rule,
        "severity": item.severity.value,
        "member": item.member,
        "place": item.place.name,
        "x": _number(item.x),
        "bars": list(item.bars),
        "found": _number(item.found),
        "required": _number(item.required),
        "unit": item.unit,
        "clause": item.clause,
        "message": item.message,
        "remedy": item.remedy,
        "site": item.site,
        "caution": CAUTION,
    }


def _number(value: float) -> float | None:
    """Return a number to 0.001, None where there is none to write."""
    return round(float(value), 3) + 0.0 if isfinite(value) else None


def _bytes(data: Any) -> bytes:
    text = json.dumps(data, indent=1, ensure_ascii=False, allow_nan=False)
    return (text + "\n").encode("utf-8")
