"""Flowables people recognise on a traveler's page: heads, tables, verdicts, signature boxes."""

from collections.abc import Sequence
from dataclasses import dataclass
from typing import Any, TypeAlias
from xml.sax.saxutils import escape

from reportlab.lib.enums import TA_CENTER, TA_RIGHT
from reportlab.lib.styles import ParagraphStyle
from reportlab.lib.units import mm
from reportlab.platypus import Flowable, KeepTogether, Paragraph, Spacer, Table, TableStyle

from reports.draw import SheetFlowable
from reports.page import CONTENT_WIDTH, font
from reports.palette import PAPER
from reports.sheet.elements import Box, Layer, sheet_of
from reports.sheet.medium import PAPER_MEDIUM
from reports.sheet.pictures import RangePicture, VerdictKind
from reports.sheet.ranges import fit_bar, fit_bar_height
from reports.sheet.verdict import verdict_shape
from reports.typeface import Weight

__all__ = [
    "Cell",
    "PlainStyle",
    "Signed",
    "bold",
    "cautions",
    "facts",
    "gap",
    "head",
    "note",
    "ranges",
    "shape",
    "signatures",
    "struck",
    "table",
    "text",
    "title",
    "verdict_line",
    "words",
]

_TEXT = ParagraphStyle(
    "text", fontName=font(), fontSize=8.5, leading=10.9, textColor=PAPER.ink, spaceAfter=1.2 * mm
)
_CELL = ParagraphStyle("cell", parent=_TEXT, fontSize=8, leading=9.6, spaceAfter=0)
_RIGHT = ParagraphStyle("right", parent=_CELL, alignment=TA_RIGHT)
_CENTRE = ParagraphStyle("centre", parent=_CELL, alignment=TA_CENTER)
_NOTE = ParagraphStyle(
    "note", fontName=font(condensed=True), fontSize=7, leading=8.8, textColor=PAPER.ink2
)
_NOTE_RIGHT = ParagraphStyle("note right", parent=_NOTE, alignment=TA_RIGHT)
_HEAD = ParagraphStyle(
    "head", fontName=font(Weight.SEMI_BOLD), fontSize=10, leading=12, textColor=PAPER.ink
)
_TITLE = ParagraphStyle(
    "title", fontName=font(Weight.SEMI_BOLD), fontSize=16, leading=19, textColor=PAPER.ink
)
_VERDICT = ParagraphStyle(
    "verdict", fontName=font(Weight.SEMI_BOLD), fontSize=11, leading=13.5, textColor=PAPER.ink
)
_BOLD = font(Weight.SEMI_BOLD)

# Marked words or a flowable; reportlab publishes no types.
Cell: TypeAlias = Any


class PlainStyle(TableStyle):  # type: ignore[misc]
    """A style of tables whose empty cells, too, are set in the one embedded family."""

    def __init__(self, commands: Sequence[tuple[object, ...]]) -> None:
        super().__init__([("FONT", (0, 0), (-1, -1), font(), 8), *commands])


def words(plain: str) -> str:
    """Make words safe for a paragraph; a true minus stands where a hyphen was typed as one."""
    return escape(plain)


def bold(plain: str) -> str:
    """Set words in the heavier weight."""
    return f'<font name="{_BOLD}">{escape(plain)}</font>'


def struck(plain: str) -> str:
    """Set a value that was replaced: readable, with a rule through it."""
    return f'<font color="{PAPER.ink2}"><strike>{escape(plain)}</strike></font>'


def gap(millimetres: float = 2.0) -> Spacer:
    """Leave some room."""
    return Spacer(1, millimetres * mm)


def text(marked: str) -> Paragraph:
    """Set a paragraph of marked words."""
    return Paragraph(marked, _TEXT)


def note(marked: str) -> Paragraph:
    """Set a caption."""
    return Paragraph(marked, _NOTE)


def title(plain: str, right: str = "") -> Flowable:
    """Set a page's own head."""
    return _two(Paragraph(escape(plain), _TITLE), Paragraph(escape(right), _NOTE_RIGHT), 0.64)


def head(plain: str, right: str = "") -> Flowable:
    """Set a section's head over a rule, with what it is measured in at the right."""
    row = _two(Paragraph(escape(plain), _HEAD), Paragraph(escape(right), _NOTE_RIGHT), 0.5)
    row.setStyle(
        TableStyle(
            [
                ("LINEBELOW", (0, 0), (-1, -1), 0.35 * mm, PAPER.ink),
                ("BOTTOMPADDING", (0, 0), (-1, -1), 1.2),
                ("TOPPADDING", (0, 0), (-1, -1), 2.6 * mm),
            ]
        )
    )
    row.keepWithNext = True
    row.spaceAfter = 1.4 * mm
    return row


def _two(left: Flowable, right: Flowable, share: float) -> Table:
    return Table(
        [[left, right]],
        colWidths=[CONTENT_WIDTH * share, CONTENT_WIDTH * (1.0 - share)],
        style=PlainStyle(
            [
                ("LEFTPADDING", (0, 0), (-1, -1), 0),
                ("RIGHTPADDING", (0, 0), (-1, -1), 0),
                ("VALIGN", (0, 0), (-1, -1), "BOTTOM"),
            ]
        ),
    )


def shape(kind: VerdictKind, millimetres: float = 2.4) -> SheetFlowable:
    """Set a verdict's shape beside a figure."""
    half = millimetres / 2.0
    items = verdict_shape(kind=kind, x=half, y=half, size=millimetres, medium=PAPER_MEDIUM)
    return SheetFlowable(
        sheet_of(
            width=millimetres,
            height=millimetres,
            medium=PAPER_MEDIUM,
            layers=[Layer(items=tuple(items))],
            title=kind.value,
        )
    )


def verdict_line(kind: VerdictKind, phrase: str, sentence: str) -> Flowable:
    """Set a verdict: shape, phrase and a sentence that names place, value and limit."""
    return Table(
        [
            [shape(kind, 6.0), Paragraph(escape(phrase), _VERDICT)],
            ["", Paragraph(escape(sentence), _TEXT)],
        ],
        colWidths=[9.0 * mm, CONTENT_WIDTH - 9.0 * mm],
        style=PlainStyle(
            [
                ("SPAN", (0, 0), (0, 1)),
                ("VALIGN", (0, 0), (0, 0), "TOP"),
                ("LEFTPADDING", (0, 0), (-1, -1), 0),
                ("RIGHTPADDING", (0, 0), (-1, -1), 0),
                ("TOPPADDING", (0, 0), (-1, -1), 0.5),
                ("BOTTOMPADDING", (0, 0), (-1, -1), 0.5),
            ]
        ),
    )


def table(
    header: Sequence[Cell],
    rows: Sequence[Sequence[Cell]],
    widths: Sequence[float],
    *,
    align: str = "",
    groups: Sequence[tuple[int, int, str]] = (),
    rules_after: Sequence[int] = (),
) -> Table:
    """Set a table; `align` has a letter for each column: l, r or c; widths are shares of the page.

    `groups` are words that stand over columns from one to another, counted from 0.
    """
    total = sum(widths)
    columns = [CONTENT_WIDTH * width / total for width in widths]
    styles = {"l": _CELL, "r": _RIGHT, "c": _CENTRE}
    letters = align or "l" * len(columns)
    body: list[list[Cell]] = []
    top = 0
    style: list[tuple[object, ...]] = [
        ("LEFTPADDING", (0, 0), (-1, -1), 0),
        ("RIGHTPADDING", (0, 0), (-1, -1), 1.6 * mm),
        ("TOPPADDING", (0, 0), (-1, -1), 1.1),
        ("BOTTOMPADDING", (0, 0), (-1, -1), 1.5),
        ("VALIGN", (0, 0), (-1, -1), "MIDDLE"),
    ]
    if groups:
        row: list[Cell] = [""] * len(columns)
        for start, end, name in groups:
            row[start] = Paragraph(bold(name), _CELL)
            style.append(("SPAN", (start, 0), (end, 0)))
        body.append(row)
        top = 1
    if header:
        body.append([_head_cell(one, letters[index]) for index, one in enumerate(header)])
        style.append(("LINEBELOW", (0, top), (-1, top), 0.25 * mm, PAPER.ink))
        top += 1
    for cells in rows:
        body.append(
            [
                Paragraph(cell, styles[letters[index]]) if isinstance(cell, str) else cell
                for index, cell in enumerate(cells)
            ]
        )
    for index in range(len(rows)):
        width = 0.25 if index in rules_after else 0.08
        colour = PAPER.ink2 if index in rules_after else PAPER.hair
        line = top + index
        style.append(("LINEBELOW", (0, line), (-1, line), width * mm, colour))
    made = Table(body, colWidths=columns, repeatRows=top, style=PlainStyle(style))
    made.hAlign = "LEFT"
    return made


def _head_cell(cell: Cell, letter: str) -> Cell:
    if not isinstance(cell, str):
        return cell
    return Paragraph(escape(cell), _NOTE_RIGHT if letter == "r" else _NOTE)


def facts(pairs: Sequence[tuple[str, str]], *, share: float = 0.16) -> Table:
    """Set names and what they are, a line each; the right side is marked words."""
    rows = [[Paragraph(escape(name), _NOTE), Paragraph(value, _CELL)] for name, value in pairs]
    return Table(
        rows or [["", ""]],
        colWidths=[CONTENT_WIDTH * share, CONTENT_WIDTH * (1.0 - share)],
        style=PlainStyle(
            [
                ("LEFTPADDING", (0, 0), (-1, -1), 0),
                ("RIGHTPADDING", (0, 0), (-1, -1), 0),
                ("TOPPADDING", (0, 0), (-1, -1), 0.8),
                ("BOTTOMPADDING", (0, 0), (-1, -1), 0.8),
                ("VALIGN", (0, 0), (-1, -1), "TOP"),
            ]
        ),
    )


def ranges(picture: RangePicture) -> Flowable:
    """Set measured ranges against their limits."""
    height = fit_bar_height(picture=picture, medium=PAPER_MEDIUM)
    place = Box(0.0, 0.0, CONTENT_WIDTH / mm, height)
    layer = fit_bar(picture=picture, place=place, medium=PAPER_MEDIUM)
    return SheetFlowable(
        sheet_of(
            width=CONTENT_WIDTH / mm,
            height=height,
            medium=PAPER_MEDIUM,
            layers=[layer],
            title="values against limits",
        )
    )


@dataclass(frozen=True)
class Signed:
    """A signature box: what it means, and who has signed where somebody has."""

    meaning: str
    name: str = ""
    more: str = ""
    at: str = ""
    covers: str = ""


def signatures(boxes: Sequence[Signed]) -> Flowable:
    """Set boxes side by side; an empty one is there to be signed by hand."""
    cells = []
    for box in boxes:
        cells.append(
            [
                Paragraph(escape(box.meaning), _NOTE),
                Spacer(1, 4.5 * mm),
                Paragraph(bold(box.name) if box.name else "&nbsp;", _CELL),
                Paragraph(escape(", ".join(one for one in (box.more, box.at) if one)) or
                          "name, date and time", _NOTE),
                Paragraph(escape(box.covers) or "&nbsp;", _NOTE),
            ]
        )  # fmt: skip
    width = CONTENT_WIDTH / max(len(boxes), 1)
    made = Table(
        [cells],
        colWidths=[width] * len(boxes),
        style=PlainStyle(
            [
                ("BOX", (0, 0), (-1, -1), 0.35 * mm, PAPER.ink),
                ("INNERGRID", (0, 0), (-1, -1), 0.25 * mm, PAPER.ink),
                ("VALIGN", (0, 0), (-1, -1), "TOP"),
                ("LEFTPADDING", (0, 0), (-1, -1), 2 * mm),
            ]
        ),
    )
    return KeepTogether([gap(2.5), made])


def cautions(sentences: Sequence[str]) -> Flowable:
    """Set cautions beside the one triangle of the document."""
    rows = [[_Triangle(), [Paragraph(escape(one), _TEXT) for one in sentences]]]
    return Table(
        rows,
        colWidths=[9.0 * mm, CONTENT_WIDTH - 9.0 * mm],
        style=PlainStyle(
            [("VALIGN", (0, 0), (-1, -1), "TOP"), ("LEFTPADDING", (0, 0), (-1, -1), 0)]
        ),
    )


class _Triangle(Flowable):  # type: ignore[misc]
    """The general warning sign, in ink: a triangle about a stroke and a point."""

    def wrap(self, available_width: float, available_height: float) -> tuple[float, float]:
        del available_width, available_height
        return 6.0 * mm, 6.0 * mm

    def draw(self) -> None:
        canvas = self.canv
        canvas.setStrokeColor(PAPER.ink)
        canvas.setFillColor(PAPER.ink)
        canvas.setLineWidth(0.45 * mm)
        path = canvas.beginPath()
        path.moveTo(0.4 * mm, 0.6 * mm)
        path.lineTo(5.6 * mm, 0.6 * mm)
        path.lineTo(3.0 * mm, 5.3 * mm)
        path.close()
        canvas.drawPath(path, stroke=1, fill=0)
        canvas.rect(2.75 * mm, 2.0 * mm, 0.5 * mm, 1.7 * mm, stroke=0, fill=1)
        canvas.circle(3.0 * mm, 1.35 * mm, 0.32 * mm, stroke=0, fill=1)
