"""Frame, title block and caution of a sheet."""

from __future__ import annotations

from collections.abc import Iterator

from detailer.drawing.border import EDGE, border_items
from detailer.drawing.metrics import width as text_width
from detailer.drawing.primitives import XY, Label, Path, Pen, Primitive, Tag
from detailer.model import Beam, Project
from detailer.views.notes import wrapped
from detailer.views.paper import TITLE_BLOCK, Paper, frame_of, title_corner

SMALL = 2.5
LARGE = 3.5
LARGEST = 5.0
PAD = 1.8

STATUS = "DRAFT – not checked by a licensed engineer"


def frame_items(
    project: Project, beam: Beam, paper: Paper, title: str, scales: str
) -> tuple[Primitive, ...]:
    """Return the frame and the filled title block of a sheet.

    Parameters
    ----------
    project : Project
        What the sheet belongs to.
    beam : Beam
        What it shows.
    paper : Paper
        What it is drawn on.
    title : str
        Title of the drawing.
    scales : str
        Scales of its views.
    """
    return (
        *border_items(paper.size),
        *_block(project, beam, paper, title, scales),
    )


def _block(
    project: Project, beam: Beam, paper: Paper, title: str, scales: str
) -> Iterator[Primitive]:
    x0, y0 = title_corner(paper)
    width, height = TITLE_BLOCK
    tag = Tag(beam.mark)
    box = ((x0, y0), (x0 + width, y0), (x0 + width, y0 + height), (x0, y0 + height))
    yield Path(points=box, pen=Pen.OUTLINE, closed=True)
    issue = project.issue
    number = issue.document or f"{project.number}-{beam.mark}"
    rows: tuple[tuple[float, tuple[tuple[float, str, str, float], ...]], ...] = (
        (12.0, ((1.0, "Project", f"{project.number}  {project.title}", LARGE),)),
        (12.0, ((0.6, "Part", project.part, LARGE), (0.4, "Owner", project.owner, LARGE))),
        (12.0, ((1.0, "Drawing", title, LARGE),)),
        (
            12.0,
            (
                (0.3, "Rules", f"{project.code}, {project.bending}", SMALL),
                (0.26, "Scales", scales, SMALL),
                (0.14, "Paper", paper.name, SMALL),
                (0.3, "Purpose", issue.purpose, SMALL),
            ),
        ),
        (
            12.0,
            (
                (0.14, "Drawn", issue.drawn, SMALL),
                (0.14, "Checked", issue.checked, SMALL),
                (0.14, "Approved", issue.approved, SMALL),
                (0.16, "Date", issue.date, SMALL),
                (0.3, "Document", number, LARGE),
                (0.12, "Revision", issue.revision, LARGEST),
            ),
        ),
    )
    y = y0 + height
    for tall, cells in rows:
        yield from _row((x0, y), width, tall, cells, tag)
        y -= tall


def _row(
    at: XY, width: float, tall: float, cells: tuple[tuple[float, str, str, float], ...], tag: Tag
) -> Iterator[Primitive]:
    x, y = at
    low = y - tall
    yield Path(points=((x, low), (x + width, low)), pen=Pen.FINE)
    for share, name, text, height in cells:
        wide = share * width
        yield Path(points=((x + wide, y), (x + wide, low)), pen=Pen.FINE)
        yield Label(at=(x + PAD, y - 1.2 - SMALL), text=name, height=SMALL, tag=tag)
        yield from _filled((x + PAD, low + 1.8), text, height, wide - 2 * PAD, tag)
        x += wide


def _filled(at: XY, text: str, height: float, room: float, tag: Tag) -> Iterator[Label]:
    """Yield a text as large as its cell allows, cut with a dot where even small letters do not."""
    if not text:
        return
    for size in (height, LARGE, SMALL):
        if size <= height and text_width(text, size, bold=True) <= room:
            yield Label(at=at, text=text, height=size, bold=True, tag=tag)
            return
    first = wrapped(text, room)[0]
    while len(first) > 1 and text_width(f"{first}…", SMALL, bold=True) > room:
        first = first[:-1]
    yield Label(at=at, text=f"{first}…", height=SMALL, bold=True, tag=tag)


def status_item(paper: Paper, member: str) -> Label:
    """Return the caution that stands along the lower edge of every sheet.

    Parameters
    ----------
    paper : Paper
        The paper.
    member : str
        What the sheet shows.
    """
    room = frame_of(paper)
    at = (room.x0 + PAD, room.y0 - (EDGE + SMALL) / 2)
    return Label(at=at, text=STATUS, height=SMALL, bold=True, tag=Tag(member))
