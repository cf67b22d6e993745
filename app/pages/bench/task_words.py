"""What is to be done, in words: a heading, a few lines, and cautions with their triangle."""

from __future__ import annotations

from dataclasses import dataclass

from PySide6.QtCore import QPointF, QSize
from PySide6.QtGui import QFont, QPainter, QPaintEvent, QPen, QPolygonF
from PySide6.QtWidgets import QWidget

from app.frame.lettering import draw_at, line_step, wrapped
from app.frame.look import Look
from app.frame.plain import PlainWidget, announce, flat_painter
from reports.palette import Colour
from reports.sheet.medium import LineWidth, Size
from reports.typeface import Weight

__all__ = ["TaskWords"]

_TOP = 10.0
_BETWEEN = 0.32
_HEADING_STEP = 1.12
_SMALLEST = 0.42


@dataclass(frozen=True, slots=True)
class _Row:
    """One line as it is painted."""

    text: str
    font: QFont
    colour: Colour
    base: float
    left: float
    triangle: float = 0.0


class TaskWords(PlainWidget):
    """A heading, lines and cautions; type gives way where there is less room than it asks for."""

    def __init__(self, *, look: Look | None = None, parent: QWidget | None = None) -> None:
        super().__init__(name="Now", look=look, parent=parent)
        self._heading = ""
        self._lines: tuple[str, ...] = ()
        self._cautions: tuple[str, ...] = ()

    def set_words(
        self, *, heading: str, lines: tuple[str, ...] = (), cautions: tuple[str, ...] = ()
    ) -> None:
        """Say something else.

        Parameters
        ----------
        heading : str
            What is to be done.
        lines : tuple of str
            Why, with what, and how far.
        cautions : tuple of str
            What may hurt; each is said once.
        """
        words = (heading, lines, cautions)
        if words == (self._heading, self._lines, self._cautions):
            return
        self._heading, self._lines, self._cautions = words
        self.setAccessibleName(f"Now: {heading}")
        spoken = [heading, *lines, *(f"Caution: {caution}" for caution in cautions)]
        announce(self, " ".join(spoken))
        self.updateGeometry()
        self.update()

    @property
    def heading(self) -> str:
        """What is to be done."""
        return self._heading

    def _rows(self, width: float, shrunk: float) -> tuple[list[_Row], float]:
        heading = self._look.font(self._look.size(Size.TITLE) * shrunk, weight=Weight.SEMI_BOLD)
        text = self._look.font(self._look.size(Size.TEXT) * shrunk)
        step, top = heading.pixelSize() * _HEADING_STEP, _TOP * shrunk
        rows = []
        for line in wrapped(self._heading, heading, width=width):
            rows.append(_Row(line, heading, Colour.INK, top + step * 0.8, 0.0))
            top += step
        top += line_step(text) * _BETWEEN
        for sentence in self._lines:
            for line in wrapped(sentence, text, width=width):
                rows.append(_Row(line, text, Colour.INK, top + line_step(text) * 0.77, 0.0))
                top += line_step(text)
        return self._with_cautions(rows, top, text, width)

    def _with_cautions(
        self, rows: list[_Row], top: float, text: QFont, width: float
    ) -> tuple[list[_Row], float]:
        step = line_step(text)
        triangle = text.pixelSize() * 1.05
        left = triangle + text.pixelSize() * 0.5
        for caution in self._cautions:
            top += step * _BETWEEN
            for place, line in enumerate(wrapped(caution, text, width=width - left)):
                size = triangle if place == 0 else 0.0
                rows.append(_Row(line, text, Colour.INK, top + step * 0.77, left, size))
                top += step
        return rows, top + step * 0.2

    def heightForWidth(self, width: int) -> int:
        """Give the height that the words ask for at a width."""
        return round(self._rows(float(width), 1.0)[1])

    def sizeHint(self) -> QSize:
        """Ask for the room of all words at the present width."""
        width = self.width() or 608
        return QSize(width, self.heightForWidth(width))

    def paintEvent(self, event: QPaintEvent) -> None:
        """Paint every line, and a triangle before each caution."""
        painter = flat_painter(self)
        shrunk = 1.0
        rows, needed = self._rows(float(self.width()), shrunk)
        while needed > self.height() and shrunk > _SMALLEST:
            shrunk -= 0.04
            rows, needed = self._rows(float(self.width()), shrunk)
        for row in rows:
            painter.setFont(row.font)
            painter.setPen(self._look.colour(row.colour))
            draw_at(painter, QPointF(row.left, row.base), row.text)
            if row.triangle:
                self._paint_triangle(painter, row.base, row.triangle)
        painter.end()

    def _paint_triangle(self, painter: QPainter, base: float, size: float) -> None:
        """Paint the triangle that stands for caution and nothing else."""
        ink = self._look.colour(Colour.INK)
        width = self._look.line(LineWidth.WIDE)
        pen = QPen(ink, width)
        pen.setJoinStyle(self._look.pen(Colour.INK).joinStyle())
        painter.setPen(pen)
        top = base - size * 0.86
        corners = [QPointF(size / 2.0, top), QPointF(size, base), QPointF(0.0, base)]
        painter.drawPolygon(QPolygonF(corners))
        middle = size / 2.0
        painter.drawLine(QPointF(middle, top + size * 0.34), QPointF(middle, base - size * 0.3))
        painter.drawLine(QPointF(middle, base - size * 0.2), QPointF(middle, base - size * 0.1))
