"""Bars and links as offices write them: one grammar, one printed form.

::

    bars  = group { "+" group }           "3T20", "3-T20", "3 Ø20", "3-20Ø", "2T20+1T16"
    group = count [ "-" ] [ sign ] size [ sign ]
    zone  = [ legs "L" [ "-" ] ] [ sign ] size [ sign ] "@" spacing [ "x" length ]
    sign  = "T" | "Y" | "Tor" | "TMT" | "Ø" | "#" | "mm"
"""

from __future__ import annotations

import re
from collections.abc import Iterable

from detailer.model import BarGroup, LinkZone
from detailer.model.materials import SIZE_OVER_RIBS

LONGEST = 60
"""No written group of bars is longer than this. [characters]"""

MOST_BARS = 60
"""More bars than this in one group are a slip of the pen."""

_SIGN = r"(?:TMT|TOR|T|Y|Ø|#)"
_AFTER = r"(?:Ø|#|MM)"
_SIZE = rf"(?:{_SIGN}[ ]*(?P<a>\d{{1,3}})(?:[ ]*MM)?|(?P<b>\d{{1,3}})(?:[ ]*{_AFTER})?)"
_GROUP = re.compile(
    rf"(?P<count>\d{{1,3}})(?:[ ]*-[ ]*|[ ]*NOS?\.?[ ]*|(?=[ ]*{_SIGN})[ ]*|[ ]+){_SIZE}", re.ASCII
)
_ZONE = re.compile(
    rf"(?:(?P<legs>\d{{1,2}})[ ]*L[ ]*-?[ ]*)?{_SIZE}[ ]*@[ ]*(?P<pitch>\d{{1,4}}(?:\.\d+)?)"
    r"(?:[ ]*MM)?(?:[ ]*C/C)?(?:[ ]*X[ ]*(?P<length>\d{1,5}(?:\.\d+)?)(?:[ ]*MM)?)?",
    re.ASCII,
)
_ALIKE = str.maketrans(
    {**dict.fromkeys("ø∅⌀φΦϕ", "Ø"), **dict.fromkeys("‐‑–—−", "-"), "×": "X", "\u00a0": " "}
)


class NotationError(ValueError):
    """Writing that is not bars or links; tells what is wrong and what to write instead."""

    def __init__(self, problem: str, remedy: str) -> None:
        super().__init__(problem, remedy)
        self.problem, self.remedy = problem, remedy

    def __str__(self) -> str:
        return f"{self.problem}. {self.remedy}."


def parse_bars(text: str) -> tuple[BarGroup, ...]:
    """Return the groups of bars that a text names, in the order written.

    Parameters
    ----------
    text : str
        Such as "3T20", "4 Ø 12" or "2T20+1T16".
    """
    remedy = 'Write bars as "3T20" or "2T20+1T16"'
    groups = []
    for part in _plain(text, remedy).split("+"):
        match = _GROUP.fullmatch(part.strip())
        if match is None:
            raise NotationError(f"{_shown(text)} is not a group of bars", remedy)
        count = int(match["count"])
        if not 1 <= count <= MOST_BARS:
            raise NotationError(f"{count} bars in one group", f"Write 1 to {MOST_BARS} bars")
        groups.append(BarGroup(count, _size(match)))
    return tuple(groups)


def parse_zone(text: str) -> LinkZone:
    """Return the zone of links that a text names; two legs where none are written.

    Parameters
    ----------
    text : str
        Such as "2L-T8@150 x 900" or "T8@150".
    """
    remedy = 'Write links as "2L-T8@150 x 900" or "2L-T8@200"'
    match = _ZONE.fullmatch(_plain(text, remedy))
    if match is None:
        raise NotationError(f"{_shown(text)} is not a zone of links", remedy)
    length = None if match["length"] is None else float(match["length"])
    zone = LinkZone(
        legs=int(match["legs"] or 2),
        dia=_size(match),
        spacing=float(match["pitch"]),
        length=length,
    )
    if not 2 <= zone.legs <= 12:
        raise NotationError(f"links of {zone.legs} legs", "Write 2 to 12 legs")
    if not 10 <= zone.spacing <= 1000:
        raise NotationError(
            f"links {zone.spacing:g} mm apart", "Write the spacing in mm, such as @150"
        )
    if length is not None and length <= 0:
        raise NotationError("a zone without length", "Write how far it goes, such as x 900")
    return zone


def print_bars(groups: Iterable[BarGroup]) -> str:
    """Return groups of bars in the one printed form, such as "2-T20 + 1-T16".

    Parameters
    ----------
    groups : iterable of BarGroup
        The bars, in the order to be printed.
    """
    return " + ".join(f"{group.count}-T{group.dia}" for group in groups)


def print_zone(zone: LinkZone) -> str:
    """Return a zone of links in the one printed form, such as "2L-T8@150 x 900".

    Parameters
    ----------
    zone : LinkZone
        The zone.
    """
    tail = "" if zone.length is None else f" x {zone.length:.10g}"
    return f"{zone.legs}L-T{zone.dia}@{zone.spacing:.10g}{tail}"


def sign_of_doubt(text: str) -> bool:
    """Return whether a size may be meant as a bar number (12# is 12 mm here, 38 mm elsewhere).

    Parameters
    ----------
    text : str
        Bars as written.
    """
    return "#" in text


def _plain(text: str, remedy: str) -> str:
    if len(text) > LONGEST:
        raise NotationError(f"{len(text)} characters for a group of bars", remedy)
    plain = text.translate(_ALIKE)
    if not plain.isprintable():
        raise NotationError("a control character among the bars", remedy)
    return plain.upper().strip()


def _shown(text: str) -> str:
    return f'"{text}"' if text.strip() else "an empty text"


def _size(match: re.Match[str]) -> int:
    """Return the diameter of a match, refused where no mill rolls it. [mm]"""
    dia = int(match["a"] or match["b"])
    sizes = sorted(SIZE_OVER_RIBS)
    if dia in sizes:
        return dia
    below = [s for s in sizes if s < dia]
    above = [s for s in sizes if s > dia]
    near = [str(s) for s in (*below[-1:], *above[:1])]
    raise NotationError(f"{dia} mm bars are not rolled", f"{' or '.join(near)}?")
