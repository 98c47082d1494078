"""Notes of a sheet, made from data: materials, cover, laps, bends, findings, assumptions."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass

from detailer.cage.bar import Cage
from detailer.cage.cut import bars_at
from detailer.cage.line import centre_line
from detailer.drawing.metrics import width as text_width
from detailer.drawing.primitives import XY, Label, Primitive, Tag
from detailer.findings import Finding
from detailer.model import Assumption, Beam, Project
from detailer.values import ContactKind, Face, Role, Severity
from detailer.views.kit import TEXT
from detailer.views.lanes import Strand
from detailer.views.outline import clear_spans
from detailer.views.stops import laps_of

LINE = 3.7
"""From one line of text to the next. [mm on paper]"""

MOST_FINDINGS = 8
"""So many findings are told on the sheet; the report has all."""

CAUTION = (
    "DRAFT. Not for construction until a licensed engineer has checked it against the local "
    "codes and the design."
)


@dataclass(frozen=True, slots=True)
class Note:
    """A heading with its sentences."""

    heading: str
    texts: tuple[str, ...]


def notes_of(
    project: Project,
    beam: Beam,
    cage: Cage,
    strands: tuple[Strand, ...],
    findings: tuple[Finding, ...],
    assumptions: tuple[Assumption, ...],
) -> tuple[Note, ...]:
    """Return everything a sheet must say in words.

    Parameters
    ----------
    project, beam : Project, Beam
        What was asked.
    cage : Cage
        What was placed.
    strands : tuple of Strand
        Its long bars as lines.
    findings : tuple of Finding
        Sorted, of any members.
    assumptions : tuple of Assumption
        Of the project and of any members.
    """
    general = (
        *_materials(project),
        *_cover(beam, cage),
        *_laps(cage, strands),
        *_bends(cage),
        *_depths(beam, cage),
        *_practice(project),
        *_reading(beam),
    )
    mine = tuple(f for f in findings if f.member == beam.mark)
    taken = tuple(f"A{a.number}  {a.text}" for a in assumptions if a.member in ("", beam.mark))
    notes = [Note("Caution", (CAUTION,)), Note("Notes", general)]
    if mine:
        notes.append(Note(_counted(mine), tuple(_told(mine))))
    if taken:
        notes.append(Note("Assumed", taken))
    return tuple(notes)


def _materials(project: Project) -> Iterator[str]:
    concrete, steel = project.concrete, project.steel
    yield (
        f"Concrete {concrete.grade}, aggregate {concrete.aggregate:.0f} mm. Main steel "
        f"{steel.main.name}, links {steel.links.name} (T: ribbed bar, size in mm)."
    )


def _cover(beam: Beam, cage: Cage) -> Iterator[str]:
    names = ("top", "bottom", "left", "right")
    values = cage.cover
    if len(set(values)) == 1:
        yield f"Nominal cover {values[0]:.0f} mm to all steel, links included."
    else:
        parts = ", ".join(f"{n} {v:.0f}" for n, v in zip(names, values, strict=True))
        yield f"Nominal cover to all steel, links included: {parts} mm (left is +y, seen along +x)."
    built = f"{beam.copies} as drawn"
    built += f", {beam.mirrored} opposite-handed" if beam.mirrored else ""
    yield f"Members of this kind: {built}. Dimensions in mm."


def _laps(cage: Cage, strands: tuple[Strand, ...]) -> Iterator[str]:
    faces = (Face.TOP, Face.BOTTOM, Face.LEFT, Face.RIGHT)
    real = {(lap.x0, lap.x1) for lap in laps_of(cage, strands, faces)}
    sizes: dict[float, float] = {}
    for contact in cage.contacts:
        window = (float(round(contact.x0)), float(round(contact.x1)))
        if contact.kind is ContactKind.LAP and window in real:
            dia = min(cage.bar(contact.a).dia, cage.bar(contact.b).dia)
            length = contact.x1 - contact.x0
            sizes[dia] = min(length, sizes.get(dia, length))
    if sizes:
        parts = ", ".join(f"T{dia:.0f} {length:.0f}" for dia, length in sorted(sizes.items()))
        yield f"Least laps as drawn: {parts} mm."


def _bends(cage: Cage) -> Iterator[str]:
    main = sorted(
        {
            (b.dia, max(b.mandrels) / 2)
            for b in cage.bars
            if b.mandrels and b.role in (Role.MAIN, Role.HANGER) and max(b.mandrels) > 0
        }
    )
    parts = ", ".join(f"T{dia:.0f} {radius:.0f}" for dia, radius in main)
    if parts:
        yield f"Inner radius of bends: {parts} mm."
    links = [b for b in cage.bars if b.role in (Role.LINK, Role.TIE)]
    for dia in sorted({b.dia for b in links}):
        first = next(b for b in links if b.dia == dia)
        tail = centre_line(first).segments[-1].length
        yield (
            f"Links T{dia:.0f}: inner radius {max(first.mandrels) / 2:.0f} mm, straight tails "
            f"{tail:.0f} mm turned into the core, hook corners alternate."
        )


def placed_depths(cage: Cage) -> tuple[float | None, float | None]:
    """Return the least effective depth as placed of bottom steel at midspan and top at supports.

    Parameters
    ----------
    cage : Cage
        The cage.
    """
    spans = clear_spans(cage)
    middles = [(a + b) / 2 for a, b in spans]
    faces = [x for pair in spans for x in (pair[0] + 1.0, pair[1] - 1.0)]
    bottom = [d for x in middles if (d := _depth(cage, x, Face.BOTTOM)) is not None]
    top = [d for x in faces if (d := _depth(cage, x, Face.TOP)) is not None]
    return min(bottom, default=None), min(top, default=None)


def _depth(cage: Cage, x: float, face: Face) -> float | None:
    bars = [c for c in bars_at(cage, x) if c.bar.face is face and c.square]
    webs = [p for p in cage.prisms if p.name.startswith("span ") and p.x0 <= x <= p.x1]
    if not bars or not webs:
        return None
    area = sum(c.bar.dia**2 for c in bars)
    z = sum(c.bar.dia**2 * c.z for c in bars) / area
    zs = [z for p in webs for _, z in p.outline]
    return max(zs) - z if face is Face.BOTTOM else z - min(zs)


def _depths(beam: Beam, cage: Cage) -> Iterator[str]:
    for name, asked, placed in zip(
        ("bottom", "top"), beam.d_assumed, placed_depths(cage), strict=True
    ):
        if asked is not None and placed is not None:
            yield f"Depth d of {name} steel: calculation {asked:.0f}, placed {placed:.0f} mm."


def _practice(project: Project) -> Iterator[str]:
    p = project.practice
    gap = "the code's" if p.layer_gap is None else f"{p.layer_gap:.0f}"
    yield (
        f"Practice (mm): stock {project.steel.stock:.0f}; first link {p.first_link:.0f} from face; "
        f"layer gap {gap}; spacers T{p.spacer_size} at most {p.spacer_pitch:.0f} apart; "
        f"cut-offs to {p.cut_step:.0f}, lengths to {p.length_step:.0f}, chosen link spaces to "
        f"{p.link_step:.0f}; needle {p.needle:.0f}, shaft {p.shaft[0]:.0f} × {p.shaft[1]:.0f}."
    )


def _reading(beam: Beam) -> Iterator[str]:
    yield (
        "Sections are seen from left to right; equal ones have one letter. T1, B1 are the outer "
        "layers. Ticks end straight bars; overlapping bars are drawn apart."
    )
    if all(span.results is None for span in beam.spans):
        yield "No design results were given: bars stop by the code's simplified rules."


def _counted(findings: tuple[Finding, ...]) -> str:
    parts = []
    for severity in Severity:
        count = sum(1 for f in findings if f.severity is severity)
        if count:
            parts.append(f"{count} {severity.value}")
    return f"Findings: {', '.join(parts)}"


def _told(findings: tuple[Finding, ...]) -> Iterator[str]:
    """Yield the worst findings, one of each rule and place."""
    seen: set[tuple[str, str]] = set()
    worst = sorted(findings, key=lambda f: f.severity.rank)
    chosen: list[Finding] = []
    for f in worst:
        if (f.rule, f.place.name) not in seen:
            seen.add((f.rule, f.place.name))
            chosen.append(f)
    for f in chosen[:MOST_FINDINGS]:
        yield f"{f.severity.value.capitalize()}: {f.message} [{f.clause}]."
    if len(chosen) > MOST_FINDINGS:
        yield f"{len(chosen) - MOST_FINDINGS} more in the report."


def wrapped(text: str, width: float, height: float = TEXT) -> tuple[str, ...]:
    """Return a text broken into lines of a width; a word longer than a line stands alone.

    Parameters
    ----------
    text : str
        The text.
    width : float
        Of a line. [mm on paper]
    height : float
        Of the text. [mm on paper]
    """
    lines: list[str] = []
    for word in text.split():
        if lines and text_width(f"{lines[-1]} {word}", height) <= width:
            lines[-1] = f"{lines[-1]} {word}"
        else:
            lines.append(word)
    return tuple(lines)


@dataclass(frozen=True, slots=True)
class Text:
    """Notes set in lines of one width: heading or not, and indented or not."""

    lines: tuple[tuple[str, bool, float], ...]  # text, bold, indent

    @property
    def height(self) -> float:
        """Return the height of all lines. [mm on paper]"""
        return LINE * sum(1 for _, _, indent in self.lines if indent >= 0.0)


def set_notes(notes: tuple[Note, ...], width: float) -> Text:
    """Return notes set in lines.

    Parameters
    ----------
    notes : tuple of Note
        What to say.
    width : float
        Of the column. [mm on paper]
    """
    lines: list[tuple[str, bool, float]] = []
    for note in notes:
        if lines:
            lines.append(("", False, 0.0))
        lines.append((note.heading, True, 0.0))
        numbered = note.heading == "Notes"
        for i, text in enumerate(note.texts, start=1):
            indent = 5.0 if numbered else 0.0
            parts = wrapped(text, width - indent)
            if numbered:
                lines.append((f"{i}", False, 0.0))
                lines.append((parts[0], False, -indent))  # on the number's line
                parts = parts[1:]
            lines += [(part, False, indent) for part in parts]
    return Text(tuple(lines))


def note_items(text: Text, at: XY, member: str) -> tuple[Primitive, ...]:
    """Return set notes with their upper left corner at a place on paper.

    Parameters
    ----------
    text : Text
        The lines.
    at : tuple of (float, float)
        The upper left corner. [mm on paper]
    member : str
        Whose notes they are.
    """
    items: list[Primitive] = []
    y = at[1]
    for words, bold, indent in text.lines:
        if indent >= 0.0:
            y -= LINE
        if words:
            items.append(
                Label(
                    at=(at[0] + abs(indent), y), text=words, height=TEXT, bold=bold, tag=Tag(member)
                )
            )
    return tuple(items)
