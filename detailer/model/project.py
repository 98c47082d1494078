"""A project: what one project file says, with everything that had to be assumed."""

from __future__ import annotations

from dataclasses import dataclass, field

from detailer.model.beam import Beam, Column
from detailer.model.materials import Concrete, Steel


@dataclass(frozen=True, slots=True, kw_only=True)
class Issue:
    """What the title block says."""

    revision: str
    date: str  # ISO 8601
    purpose: str
    drawn: str
    checked: str
    approved: str
    document: str


@dataclass(frozen=True, slots=True, kw_only=True)
class Practice:
    """Office habits. [mm]"""

    needle: float = 40
    shaft: tuple[float, float] = (100, 150)
    link_step: float = 25
    cut_step: float = 50
    length_step: float = 10
    first_link: float = 50
    layer_gap: float | None = None  # None: the code's
    spacer_size: int = 25
    spacer_pitch: float = 1000


@dataclass(frozen=True, slots=True, kw_only=True)
class Grid:
    """Where nodes lie in plan."""

    x: tuple[tuple[str, float], ...] = ()
    y: tuple[tuple[str, float], ...] = ()
    level: float | None = None


@dataclass(frozen=True, slots=True)
class Assumption:
    """Something the tool took for granted; numbered over the project, printed on the sheet."""

    number: int  # A1, A2, …
    member: str  # "" for the whole project
    text: str


@dataclass(frozen=True, slots=True)
class Doubt:
    """A question about the input: accepted as written, and reported."""

    file: str
    line: int | None
    field: str
    text: str


@dataclass(frozen=True, slots=True, kw_only=True)
class Project:
    """Everything one project file says."""

    number: str
    title: str
    part: str
    owner: str
    code: str  # "IS 456"
    bending: str  # "IS 2502"
    ductile: bool
    lateral: bool
    issue: Issue
    concrete: Concrete
    steel: Steel
    practice: Practice
    grid: Grid
    columns: tuple[Column, ...]
    beams: tuple[Beam, ...]
    assumptions: tuple[Assumption, ...] = field(default=())
    doubts: tuple[Doubt, ...] = field(default=())
