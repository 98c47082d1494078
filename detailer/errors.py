"""Refusals of input. A problem of the design itself is a finding, never an exception."""

from __future__ import annotations

from collections.abc import Iterable


class InputError(ValueError):
    """One thing in a file of the user's that cannot become a member."""

    def __init__(
        self, *, file: str, line: int | None, field: str, problem: str, remedy: str
    ) -> None:
        super().__init__(file, line, field, problem, remedy)
        self.file, self.line, self.field = file, line, field
        self.problem, self.remedy = problem, remedy

    def __str__(self) -> str:
        where = self.file if self.line is None else f"{self.file}:{self.line}"
        return f"{where}: {self.field}: {self.problem}. {self.remedy}."


class Refused(Exception):  # noqa: N818  what it is to the user, not a failure
    """All the input errors of one run, in the order of files and lines."""

    def __init__(self, errors: Iterable[InputError]) -> None:
        self.errors = tuple(sorted(errors, key=lambda e: (e.file, e.line or 0, e.field)))
        super().__init__("\n".join(str(error) for error in self.errors))
