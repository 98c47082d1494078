"""Marks: one for all equal bars of a project, in the order in which bars are placed."""

from __future__ import annotations

from collections.abc import Iterable, Iterator
from dataclasses import dataclass, replace

from detailer.cage.bar import Bar, Cage
from detailer.model import Project
from detailer.schedule.form import Form, form_of
from detailer.schedule.lengths import length_of
from detailer.schedule.shapes import parts_of, shape_of
from detailer.values import Face, Role


@dataclass(frozen=True, slots=True)
class Kin:
    """Bars that are one mark: the first of them stands for all."""

    first: Bar
    form: Form

    def takes(self, bar: Bar, form: Form) -> bool:
        """Return whether a bar is equal to these."""
        return _stock(bar) == _stock(self.first) and self.form.equals(form)


def kin_of(bar: Bar) -> Kin:
    """Return a new family of equal bars.

    Parameters
    ----------
    bar : Bar
        Its first bar.
    """
    return Kin(bar, form_of(bar))


def placing_order(bars: Iterable[Bar]) -> tuple[Bar, ...]:
    """Sort bars as they are fixed: bottom, top, sides, links, ties, spacers.

    Parameters
    ----------
    bars : iterable of Bar
        Bars of one cage.
    """
    return tuple(sorted(bars, key=_order))


def number(cages: tuple[Cage, ...], project: Project) -> tuple[Cage, ...]:
    """Return the cages with mark, shape and scheduled length of every bar.

    Bars of one grade, diameter and form (corners within 0.5 mm, however turned) share a mark
    across the project; a mirror image that no turning brings to cover is another bar.

    Parameters
    ----------
    cages : tuple of Cage
        All cages of the project, in the order of the project file.
    project : Project
        Its step of lengths.
    """
    families: list[Kin] = []
    index: dict[tuple[str, float, int], list[int]] = {}
    known: dict[tuple[int, str], int] = {}
    for n, cage in enumerate(cages):
        for bar in placing_order(cage.bars):
            known[n, bar.id] = _family(bar, families, index)
    marked = tuple(_marked(families, project.practice.length_step))
    return tuple(
        replace(cage, bars=tuple(_named(b, marked[known[n, b.id]]) for b in cage.bars))
        for n, cage in enumerate(cages)
    )


def _family(bar: Bar, families: list[Kin], index: dict[tuple[str, float, int], list[int]]) -> int:
    """Return the number of the family a bar belongs to, a new one if need be."""
    kin = kin_of(bar)
    alike = index.setdefault((*_stock(bar), len(kin.form.mandrels)), [])
    for i in alike:
        if families[i].takes(bar, kin.form):
            return i
    families.append(kin)
    alike.append(len(families) - 1)
    return len(families) - 1


def _marked(families: list[Kin], step: float) -> Iterator[Bar]:
    digits = max(2, len(str(len(families))))
    for n, kin in enumerate(families, start=1):
        yield replace(
            kin.first,
            mark=f"{n:0{digits}d}",
            shape=shape_of(parts_of(kin.first)),
            length=length_of(kin.first, step).scheduled,
        )


def _named(bar: Bar, like: Bar) -> Bar:
    return replace(bar, mark=like.mark, shape=like.shape, length=like.length)


def _stock(bar: Bar) -> tuple[str, float]:
    return bar.grade, bar.dia


def _order(bar: Bar) -> tuple[object, ...]:
    start = min(x + bar.corners[0][0] for x, _, _ in bar.placings)
    return _group(bar), bar.layer, round(start, 1), bar.id


def _group(bar: Bar) -> int:
    """Return when a bar is placed: by its role, long bars by their face first."""
    later = {Role.SIDE: 2, Role.LINK: 3, Role.TIE: 4, Role.SPACER: 5}
    if bar.role in later:
        return later[bar.role]
    return 0 if bar.face is Face.BOTTOM else 1
