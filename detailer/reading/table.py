"""A table of the project file under reading: every slip is noted, none stops the reading.

A value that is refused comes back as NaN (numbers), as an empty text or as the first choice,
so that what depends on it stays silent: comparisons with NaN are false.
"""

from __future__ import annotations

import math
import re
from collections.abc import Iterable, Mapping
from difflib import get_close_matches
from typing import Any, TypeVar

from detailer.errors import InputError, Refused
from detailer.model import Assumption, Doubt
from detailer.reading.lines import KeyPath, find_lines, line_of, plain, printed
from detailer.reading.outside import OUTSIDE

T = TypeVar("T")

MARK = re.compile(r"[A-Za-z0-9](?:[A-Za-z0-9]|[-./](?=[A-Za-z0-9])){0,23}", re.ASCII)
"""A mark: letters, digits, - . / between them; never a way out of a folder."""

LONGEST_TEXT = 120
"""No text of a title block is longer than this. [characters]"""

BEYOND_MEASURE = 1e15
"""Nothing is as large as this in any unit."""


class Log:
    """What one reading refuses, doubts and assumes."""

    def __init__(self, file: str, source: bytes) -> None:
        self.file, self.source = file, source
        self.refused: list[tuple[KeyPath, str, str]] = []
        self.elsewhere: list[InputError] = []
        self.doubted: list[tuple[KeyPath, str]] = []
        self.elsewhere_doubted: list[Doubt] = []
        self.assumed: list[tuple[str, str]] = []

    def refuse(self, path: KeyPath, problem: str, remedy: str) -> None:
        """Note something that cannot be accepted."""
        if (path, problem, remedy) not in self.refused:
            self.refused.append((path, problem, remedy))

    def refuse_row(self, file: str, line: int | None, field: str, say: tuple[str, str]) -> None:
        """Note a slip in another file: (problem, remedy)."""
        self.elsewhere.append(
            InputError(file=file, line=line, field=field, problem=say[0], remedy=say[1])
        )

    def doubt(self, path: KeyPath, text: str) -> None:
        """Note a question: the value is accepted as written."""
        self.doubted.append((path, text))

    def assume(self, member: str, text: str) -> None:
        """Note something taken for granted; "" for the whole project."""
        if (member, text) not in self.assumed:
            self.assumed.append((member, text))

    def clean(self, *path: str | int) -> bool:
        """Return whether nothing under a key has been refused."""
        return not any(where[: len(path)] == path for where, _, _ in self.refused)

    def finish(self) -> tuple[tuple[Assumption, ...], tuple[Doubt, ...]]:
        """Return assumptions and doubts.

        Raises
        ------
        Refused
            With every error there is.
        """
        lines = find_lines(self.source) if self.refused or self.doubted else {}
        errors = [
            InputError(
                file=self.file,
                line=line_of(lines, path),
                field=printed(path),
                problem=problem,
                remedy=remedy,
            )
            for path, problem, remedy in self.refused
        ]
        if errors or self.elsewhere:
            raise Refused([*errors, *self.elsewhere])
        doubts = [
            Doubt(self.file, line_of(lines, path), printed(path), text)
            for path, text in self.doubted
        ]
        return (
            tuple(Assumption(n, member, text) for n, (member, text) in enumerate(self.assumed, 1)),
            tuple(doubts + self.elsewhere_doubted),
        )


class Table:
    """One table and where it stands."""

    def __init__(self, log: Log, path: KeyPath, data: object, known: Iterable[str]) -> None:
        self.log, self.path = log, path
        self.data: Mapping[str, Any] = data if isinstance(data, dict) else {}
        names = tuple(known)
        if not isinstance(data, dict):
            log.refuse(path, "not a table", f"Write {{ {names[0]} = … }}")
        for key in self.data:
            if key not in names:
                self._unknown(key, names)

    def _unknown(self, key: str, names: tuple[str, ...]) -> None:
        if key in OUTSIDE:
            self.refuse(key, *OUTSIDE[key])
            return
        near = get_close_matches(key.lower(), names, n=1, cutoff=0.6)
        remedy = f"Did you mean {near[0]}?" if near else f"Known here: {', '.join(names)}"
        self.refuse(key, f"unknown key {plain(key)}", remedy)

    def __contains__(self, key: str) -> bool:
        return key in self.data

    def at(self, *key: str | int) -> KeyPath:
        """Return the path of a key of this table."""
        return (*self.path, *key)

    def refuse(self, key: str, problem: str, remedy: str) -> None:
        """Note that a key cannot be accepted."""
        self.log.refuse(self.at(key), problem, remedy)

    def missing(self, key: str, example: str) -> None:
        """Note that a key must be written."""
        self.refuse(key, f"{key} is missing", f"Write {key} = {example}")

    def clean(self, *keys: str) -> bool:
        """Return whether nothing under the keys (or the whole table) has been refused."""
        if not keys:
            return self.log.clean(*self.path)
        return all(self.log.clean(*self.at(key)) for key in keys)

    def text(self, key: str, default: str | None = None, *, example: str = '"…"') -> str:
        """Return a text fit for print."""
        if key not in self.data:
            if default is None:
                self.missing(key, example)
            return default or ""
        value = self.data[key]
        if not isinstance(value, str):
            self.refuse(key, "not a text", f"Write {key} = {example}")
        elif not value.isprintable():
            self.refuse(key, "a control character in the text", "Write plain letters")
        elif len(value) > LONGEST_TEXT:
            self.refuse(key, f"{len(value)} characters", f"Write at most {LONGEST_TEXT}")
        else:
            return value.strip()
        return ""

    def mark(self, key: str, example: str) -> str:
        """Return a mark: letters, digits, - . / only."""
        value = self.text(key, example=f'"{example}"')
        if self.clean(key) and not MARK.fullmatch(value):
            self.refuse(
                key,
                f'"{value[:40]}" is not a mark',
                f'Write up to 24 letters and digits, with - . / between them, such as "{example}"',
            )
        return value

    def number(
        self, key: str, default: float | None = None, *, low: float, high: float, unit: str = "mm"
    ) -> float:
        """Return a number within limits; NaN where it is refused."""
        if key not in self.data:
            if default is None:
                self.missing(key, f"… (in {unit})" if unit else "…")
                return math.nan
            return default
        return self.within(self.at(key), self.data[key], low=low, high=high, unit=unit)

    def within(
        self, path: KeyPath, value: object, *, low: float, high: float, unit: str = "mm"
    ) -> float:
        """Return a value as a number within limits; NaN where it is refused."""
        asked = f"{low:.10g} to {high:.10g} {unit}".rstrip()
        if isinstance(value, bool) or not isinstance(value, int | float):
            self.log.refuse(path, "not a number", f"Write a number, {asked}")
        elif abs(value) > BEYOND_MEASURE:
            self.log.refuse(path, "a number beyond measure", f"Write {asked}")
        elif not low <= value <= high:
            shown = f"{float(value):.10g} {unit}".rstrip()
            self.log.refuse(path, f"{shown} cannot be", _suggest(value, low, high, asked))
        else:
            return float(value)
        return math.nan

    def whole(self, key: str, default: int | None = None, *, low: int, high: int) -> int:
        """Return a whole number within limits; `low` where it is refused."""
        value = self.data.get(key, default)
        if value is None:
            self.missing(key, str(low))
        elif isinstance(value, bool) or not isinstance(value, int) or not low <= value <= high:
            self.refuse(key, "not a whole number that can be", f"Write {low} to {high}")
        else:
            return value
        return low

    def flag(self, key: str, default: bool | None = None) -> bool:
        """Return true or false."""
        value = self.data.get(key, default)
        if isinstance(value, bool):
            return value
        if value is None:
            self.missing(key, "true or false")
        else:
            self.refuse(key, "neither true nor false", f"Write {key} = true or {key} = false")
        return False

    def choice(self, key: str, options: Mapping[str, T], default: str | None = None) -> T:
        """Return what a word stands for; the first option where it is refused."""
        value = self.data.get(key, default)
        listed = ", ".join(f'"{name}"' for name in options)
        if value is None:
            self.missing(key, listed.replace(", ", " or "))
        elif isinstance(value, str) and value in options:
            return options[value]
        else:
            near = get_close_matches(str(value).lower(), list(options), n=1, cutoff=0.7)
            remedy = f'Did you mean "{near[0]}"?' if near else f"Write one of {listed}"
            self.refuse(key, f"{_brief(value)} is not among the choices", remedy)
        return next(iter(options.values()))

    def pair(self, key: str) -> tuple[object, object] | None:
        """Return the two items of an array; None where it is absent or refused."""
        if key not in self.data:
            return None
        value = self.data[key]
        if isinstance(value, list) and len(value) == 2:
            return value[0], value[1]
        self.refuse(key, "not a pair", f"Write {key} = [left, right]")
        return None

    def numbers(
        self, key: str, count: int, *, low: float, high: float, unit: str = "mm"
    ) -> tuple[float, ...]:
        """Return so many numbers within limits; NaNs where they are refused."""
        value = self.data.get(key)
        if not isinstance(value, list) or len(value) != count:
            self.refuse(key, f"not {count} numbers", f"Write {key} = [{', '.join('…' * count)}]")
            return (math.nan,) * count
        return tuple(
            self.within(self.at(key, n), item, low=low, high=high, unit=unit)
            for n, item in enumerate(value)
        )

    def items(self, key: str, example: str) -> list[tuple[KeyPath, object]]:
        """Return the items of an array with their paths; none where it is absent."""
        value = self.data.get(key, [])
        if not isinstance(value, list):
            self.refuse(key, "not a list", f"Write {example}")
            return []
        return [(self.at(key, n), item) for n, item in enumerate(value)]

    def table(self, key: str, known: Iterable[str], *, needed: bool = False) -> Table:
        """Return a table below this one; an empty one where it is absent."""
        if key not in self.data and needed:
            self.missing(key, "a table, see the reference")
        return Table(self.log, self.at(key), self.data.get(key, {}), known)


def _suggest(value: float, low: float, high: float, asked: str) -> str:
    """Return a remedy, with the value in another unit where that would fit."""
    for factor in (1000, 0.001, 25.4, 10, 0.1):
        if low <= value * factor <= high:
            return f"Write {asked}; perhaps {value * factor:.6g}?"
    return f"Write {asked}"


def _brief(value: object) -> str:
    text = str(value)
    return f'"{text}"' if text.isprintable() and len(text) <= 40 else "what is written"
