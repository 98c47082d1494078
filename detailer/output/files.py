"""Files of one run: all of them whole in their place, or none of them touched."""

from __future__ import annotations

import shutil
import tempfile
from contextlib import contextmanager, suppress
from pathlib import Path, PurePosixPath
from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from collections.abc import Iterator

RESERVED = {"con", "prn", "aux", "nul"} | {f"{p}{n}" for p in ("com", "lpt") for n in range(1, 10)}
"""Names that some systems keep for devices."""


class Batch:
    """Files on their way; they lie in a folder beside their target until all are whole."""

    def __init__(self, work: Path) -> None:
        self._work = work
        self._names: list[str] = []

    @property
    def names(self) -> tuple[str, ...]:
        """Return the names written so far, in order."""
        return tuple(self._names)

    def write(self, name: str, data: bytes) -> None:
        """Write a whole file.

        Parameters
        ----------
        name : str
            Path below the target, with forward slashes.
        data : bytes
            Its content.
        """
        self.path(name).write_bytes(data)

    def path(self, name: str) -> Path:
        """Return where a file of this name must be written for now.

        Parameters
        ----------
        name : str
            Path below the target, with forward slashes.
        """
        parts = PurePosixPath(name).parts
        if not parts or ".." in parts or name.startswith("/"):
            raise ValueError(f"{name!r} does not lie below the output folder")
        place = self._work.joinpath(*parts)
        place.parent.mkdir(parents=True, exist_ok=True)
        if name not in self._names:
            self._names.append(name)
        return place

    def read(self, name: str) -> bytes:
        """Return a file written before.

        Parameters
        ----------
        name : str
            As it was written.
        """
        return self.path(name).read_bytes()


@contextmanager
def whole(target: Path) -> Iterator[Batch]:
    """Gather files and move them to a folder together when the block ends well.

    Where the block fails, or a file cannot be moved, the folder is left as it was.

    Parameters
    ----------
    target : Path
        The output folder; made if absent. Files in it that are not ours stay.
    """
    made = _make(target)
    work = Path(tempfile.mkdtemp(prefix=".detailer-", dir=target))
    try:
        (work / "new").mkdir()
        batch = Batch(work / "new")
        yield batch
        _move(batch.names, work, target)
    except BaseException:
        shutil.rmtree(work, ignore_errors=True)
        for folder in made:
            with suppress(OSError):
                folder.rmdir()
        raise
    shutil.rmtree(work, ignore_errors=True)


def safe_names(marks: tuple[str, ...]) -> tuple[str, ...]:
    """Return file names for marks: plain characters, each name once, whatever the system's case.

    Parameters
    ----------
    marks : tuple of str
        Marks of members.
    """
    names: list[str] = []
    taken: set[str] = set()
    for mark in marks:
        plain = "".join(c if c.isascii() and (c.isalnum() or c in "-_+") else "_" for c in mark)
        stem = plain or "_"
        if stem.lower() in RESERVED:
            stem += "_"
        name, again = stem, 2
        while name.lower() in taken:
            name, again = f"{stem}_{again}", again + 1
        taken.add(name.lower())
        names.append(name)
    return tuple(names)


def _make(target: Path) -> list[Path]:
    """Make a folder and return what was made, innermost first."""
    missing = [p for p in (target, *target.parents) if not p.exists()]
    target.mkdir(parents=True, exist_ok=True)
    return missing


def _move(names: tuple[str, ...], work: Path, target: Path) -> None:
    """Move new files in; where one fails put back what they replaced."""
    replaced: list[tuple[Path, Path | None]] = []
    folders: list[Path] = []
    try:
        for number, name in enumerate(names):
            place = target / name
            folders += _make(place.parent)
            old: Path | None = None
            if place.exists():
                old = work / f"old-{number}"
                place.replace(old)
            replaced.append((place, old))
            (work / "new" / name).replace(place)
    except BaseException:
        for place, old in reversed(replaced):
            place.unlink(missing_ok=True)
            if old is not None:
                old.replace(place)
        for folder in folders:
            with suppress(OSError):
                folder.rmdir()
        raise
