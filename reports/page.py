"""The traveler's page: frame, binding margin, title block at its foot, and how it is numbered."""

from dataclasses import dataclass
from io import BytesIO
from typing import Any

from reportlab.lib.pagesizes import A4, LETTER
from reportlab.lib.units import mm
from reportlab.pdfbase.pdfmetrics import stringWidth
from reportlab.pdfgen.canvas import Canvas
from reportlab.platypus import BaseDocTemplate, Flowable, Frame, PageTemplate
from reportlab.platypus.doctemplate import ActionFlowable

from reports.palette import PAPER
from reports.typeface import Weight, paper_font_name

__all__ = ["CONTENT_WIDTH", "EvenPage", "Foot", "NowAt", "build", "font"]

# A4 and Letter share one block: 180 mm wide, the binding margin at the left.
_BLOCK_WIDTH = 180.0
_BINDING = 20.0
_INSIDE = 4.0
_TITLE_HEIGHT = 16.0
CONTENT_WIDTH = (_BLOCK_WIDTH - 2.0 * _INSIDE) * mm
_SIZES = {"A4": A4, "Letter": LETTER}


def font(weight: Weight = Weight.REGULAR, *, condensed: bool = False) -> str:
    """Name a font of the one family, registered by its path."""
    return paper_font_name(weight=weight, condensed=condensed)


@dataclass(frozen=True)
class Foot:
    """What the title block says on every page."""

    rotor: str
    rotor_more: str
    job: str
    job_more: str
    head: str
    head_more: str
    title: str
    author: str


class NowAt(ActionFlowable):  # type: ignore[misc]
    """From here on the title block names this part of the document."""

    def __init__(self, what: str, more: str = "") -> None:
        super().__init__()
        self._what = (what, more)

    def apply(self, doc: "_Document") -> None:
        """Tell the document; reportlab calls this when it comes to it."""
        doc.now_at = self._what


class EvenPage(Flowable):  # type: ignore[misc]
    """Stands at the top of a page and fills it if its number is odd.

    What follows begins on an even page, so that its two pages lie open side by side.
    """

    def wrap(self, available_width: float, available_height: float) -> tuple[float, float]:
        """Take the whole page, or nothing."""
        self._is_odd = self.canv.getPageNumber() % 2 == 1
        return (available_width, available_height if self._is_odd else 0.0)

    def draw(self) -> None:
        """Say why the page is empty; an unexplained one looks like one that was taken out."""
        if self._is_odd:
            self.canv.setFont(font(condensed=True), 7)
            self.canv.setFillColor(PAPER.ink2)
            self.canv.drawString(
                0, 4, "This page is empty, so that each step opens on two pages side by side."
            )


class _Document(BaseDocTemplate):  # type: ignore[misc]
    """A document of one page shape, whose number of pages is known on its second run."""

    def __init__(self, target: BytesIO, foot: Foot, size: str, pages: int | None) -> None:
        width, height = _SIZES[size]
        super().__init__(
            target,
            pagesize=(width, height),
            title=foot.title,
            author=foot.author,
            subject="Build and runout traveler",
            creator="Third Journal",
            invariant=1,
            lang="en",
            initialFontName=font(),
        )
        self.foot = foot
        self.pages = pages
        self.now_at = ("", "")
        self._margin = 10.0 * mm
        self._left = _BINDING * mm
        body = Frame(
            self._left + _INSIDE * mm,
            self._margin + (_TITLE_HEIGHT + _INSIDE) * mm,
            CONTENT_WIDTH,
            height - 2.0 * self._margin - (_TITLE_HEIGHT + 2.0 * _INSIDE) * mm,
            leftPadding=0,
            rightPadding=0,
            topPadding=0,
            bottomPadding=0,
            id="body",
        )
        self.addPageTemplates([PageTemplate(id="page", frames=[body], onPageEnd=self._furnish)])

    def _furnish(self, canvas: Canvas, doc: "_Document") -> None:
        width = _BLOCK_WIDTH * mm
        height = self.pagesize[1] - 2.0 * self._margin
        canvas.saveState()
        canvas.setStrokeColor(PAPER.ink)
        canvas.setLineWidth(0.5 * mm)
        canvas.rect(self._left, self._margin, width, height)
        canvas.line(
            self._left,
            self._margin + _TITLE_HEIGHT * mm,
            self._left + width,
            self._margin + _TITLE_HEIGHT * mm,
        )
        canvas.setLineWidth(0.25 * mm)
        of = "" if self.pages is None else f" of {self.pages}"
        cells = (
            (42.0, "rotor", doc.foot.rotor, doc.foot.rotor_more),
            (34.0, "job", doc.foot.job, doc.foot.job_more),
            (42.0, "part", *doc.now_at),
            (40.0, "record head", doc.foot.head, doc.foot.head_more),
            (22.0, "page", f"{canvas.getPageNumber()}{of}", ""),
        )
        left = self._left
        for wide, name, main, more in cells:
            if left > self._left:
                canvas.line(left, self._margin, left, self._margin + _TITLE_HEIGHT * mm)
            self._cell(canvas, left + 2.0 * mm, (wide - 4.0) * mm, (name, main, more))
            left += wide * mm
        canvas.restoreState()

    def _cell(self, canvas: Canvas, left: float, room: float, words: tuple[str, str, str]) -> None:
        name, main, more = words
        rows = (
            (11.3, font(condensed=True), 6.5, PAPER.ink2, name),
            (6.6, font(Weight.SEMI_BOLD), 8.5, PAPER.ink, main),
            (2.2, font(condensed=True), 7.0, PAPER.ink2, more),
        )
        for up, face, size, colour, text in rows:
            canvas.setFillColor(colour)
            fitted = size
            # A long name is set smaller down to 6 pt, then cut with a mark that it was.
            while fitted > 6.0 and stringWidth(text, face, fitted) > room:
                fitted -= 0.25
            while text and stringWidth(text, face, fitted) > room:
                text = text[:-2].rstrip() + "…"
            canvas.setFont(face, fitted)
            canvas.drawString(left, self._margin + up * mm, text)


def build(story: Any, foot: Foot, *, size: str = "A4") -> bytes:  # noqa: ANN401
    """Set a story twice: once to count its pages, once to number them; equal input, equal bytes.

    `story` is a function that makes the flowables anew, since setting uses them up.
    """
    counted = _Document(BytesIO(), foot, size, None)
    counted.build(story())
    pages = counted.page
    target = BytesIO()
    _Document(target, foot, size, pages).build(story())
    return target.getvalue()
