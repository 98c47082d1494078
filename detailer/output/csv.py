"""The schedule as comma-separated values; text that a spreadsheet would run is made plain."""

from __future__ import annotations

import csv
import io
from collections.abc import Iterable, Sequence

from detailer.schedule import Row, Summary, mass_of
from detailer.values import CAUTION

COLUMNS = (
    "member",
    "mark",
    "role",
    "grade",
    "dia",
    "per member",
    "members",
    "total",
    "length",
    "exact length",
    "standard",
    "shape",
    "dimensions",
    "kg each",
    "mass",
    "exact mass",
    "hand",
    "note",
    "status",
)

LIVE = ("=", "+", "-", "@", "\t", "\r", "\n")
"""What a cell begins with that a spreadsheet takes for a formula."""


def schedule(rows: Iterable[Row]) -> bytes:
    """Return schedule.csv: one line a row, lengths in mm, masses in kg.

    Parameters
    ----------
    rows : iterable of Row
        The schedule.
    """
    return _table(COLUMNS, (_cells(row) for row in rows))


def summary(found: Summary) -> bytes:
    """Return summary.csv: masses by size, by member, and in all.

    Parameters
    ----------
    found : Summary
        The masses.
    """
    head = ("what", "name", "number", "length m", "mass kg", "exact mass kg", "kg per m3", "status")
    lines: list[tuple[str, ...]] = [
        (
            "size",
            f"{size.grade} {size.dia:g}",
            str(size.number),
            f"{size.length:.2f}",
            f"{size.mass:.2f}",
            f"{size.exact:.2f}",
            "",
            CAUTION,
        )
        for size in found.sizes
    ]
    for member in found.members:
        lines.append(
            (
                "member",
                member.member,
                str(member.members),
                "",
                f"{member.mass:.2f}",
                "",
                f"{member.density:.1f}",
                CAUTION,
            )
        )
    for what, mass in (("laps", found.laps), ("spacers", found.spacers)):
        lines.append(("of it", what, "", "", f"{mass:.2f}", "", "", CAUTION))
    lines.append(("all", "", "", "", f"{found.mass:.2f}", f"{found.exact:.2f}", "", CAUTION))
    return _table(head, lines)


def plain(text: str) -> str:
    """Return text that no spreadsheet runs as a formula.

    Parameters
    ----------
    text : str
        Text of the user's.
    """
    return f"'{text}" if text.startswith(LIVE) else text


def dimensions(row: Row) -> str:
    """Return a shape's dimensions as one text: "A 200  B 4672  R 64".

    Parameters
    ----------
    row : Row
        A row of the schedule.
    """
    return "  ".join(f"{letter} {value:g}" for letter, value in row.shape.dimensions)


def _cells(row: Row) -> Sequence[str]:
    return (
        plain(row.member),
        plain(row.mark),
        row.role.value,
        plain(row.grade),
        f"{row.dia:g}",
        str(row.per_member),
        str(row.members),
        str(row.total),
        f"{row.length:g}",
        f"{row.exact:.1f}",
        plain(row.shape.standard),
        plain(row.shape.code),
        dimensions(row),
        f"{mass_of(row.dia, row.length):.3f}",
        f"{row.mass:.3f}",
        f"{row.exact_mass:.3f}",
        "mirrored" if row.mirrored else "",
        plain(row.note),
        CAUTION,
    )


def _table(head: Sequence[str], lines: Iterable[Sequence[str]]) -> bytes:
    text = io.StringIO()
    writer = csv.writer(text, lineterminator="\r\n")
    writer.writerow(head)
    writer.writerows(lines)
    return text.getvalue().encode("utf-8")
