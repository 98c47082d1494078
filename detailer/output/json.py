"""Findings and assumptions as JSON: the same keys always, numbers finite, bytes repeatable."""

from __future__ import annotations

import json
from collections.abc import Iterable
from math import isfinite
from typing import Any

from detailer.findings import Finding
from detailer.model import Project
from detailer.values import CAUTION


def findings(found: Iterable[Finding]) -> bytes:
    """Return findings.json: a list, in the order given.

    Parameters
    ----------
    found : iterable of Finding
        Ordered findings.
    """
    return _bytes([_finding(item) for item in found])


def assumptions(project: Project) -> bytes:
    """Return assumptions.json: the caution, what was assumed by number, what is in doubt.

    Parameters
    ----------
    project : Project
        The project as read.
    """
    return _bytes(
        {
            "caution": CAUTION,
            "project": project.number,
            "assumptions": [
                {"number": f"A{item.number}", "member": item.member, "text": item.text}
                for item in project.assumptions
            ],
            "doubts": [
                {"file": item.file, "line": item.line, "field": item.field, "text": item.text}
                for item in project.doubts
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
