"""The top line: a desk for each kind of work, and who is signed in."""

from __future__ import annotations

from collections.abc import Sequence

from PySide6.QtCore import QPointF, QRectF, QSize, Qt, Signal
from PySide6.QtGui import QFont, QFontMetricsF, QPaintEvent, QResizeEvent
from PySide6.QtWidgets import QWidget

from app.frame.lettering import draw_at, fitted
from app.frame.look import Look
from app.frame.plain import PlainButton, PlainWidget, draw_focus, flat_painter
from reports.palette import Colour
from reports.sheet.medium import LineWidth, Size
from reports.typeface import Weight

__all__ = ["DESKS", "DesksLine"]

DESKS = ("Jobs", "Plan", "Bench", "Inspection", "Witness", "Register", "History")
"""The desks, in the order a job meets them."""


class _DeskKey(PlainButton):
    """One word of the line."""

    def __init__(self, text: str, *, look: Look, parent: QWidget) -> None:
        super().__init__(text, look=look, parent=parent)
        self.scale = 1.0

    def font_here(self) -> QFont:
        size = self.look.size(Size.NOTE) * self.scale
        size = min(size, self.look.between(narrow=36.0, wide=44.0) * 0.62)
        weight = Weight.SEMI_BOLD if self.isChecked() else Weight.REGULAR
        return self.look.font(size, weight=weight)

    def sizeHint(self) -> QSize:
        """Width of the word at its heaviest, so that choosing it moves nothing."""
        size = self.font_here().pixelSize()
        heaviest = QFontMetricsF(self.look.font(float(size), weight=Weight.SEMI_BOLD))
        gap = self.look.between(narrow=28.0, wide=40.0) * min(self.scale, 1.0)
        return QSize(round(heaviest.horizontalAdvance(self.text()) + gap), 32)

    def paintEvent(self, event: QPaintEvent) -> None:
        """Paint the word, and the line under the present desk."""
        painter = flat_painter(self)
        font = fitted(self.font_here(), [self.text()], width=float(self.width()))
        painter.setFont(font)
        present = self.isChecked()
        painter.setPen(self.look.colour(Colour.INK if present else Colour.INK2))
        metrics = QFontMetricsF(font)
        base = (self.height() + metrics.capHeight()) / 2.0
        middle = QPointF(self.width() / 2.0, base)
        right = draw_at(painter, middle, self.text(), align=Qt.AlignmentFlag.AlignHCenter)
        if present:
            bar = self.look.line(LineWidth.HEAVY)
            advance = metrics.horizontalAdvance(self.text())
            painter.fillRect(
                QRectF(right - advance, self.height() - bar, advance, bar),
                self.look.colour(Colour.ACCENT),
            )
        if self.hasFocus():
            draw_focus(painter, QRectF(self.rect()), self.look)
        painter.end()


class DesksLine(PlainWidget):
    """The desks by name, the present one underlined; at the right who is signed in."""

    desk_chosen = Signal(str)
    person_pressed = Signal()

    def __init__(
        self,
        desks: Sequence[str] = DESKS,
        *,
        present: str = "",
        person: str = "",
        look: Look | None = None,
        parent: QWidget | None = None,
    ) -> None:
        super().__init__(name="Desks", look=look, parent=parent)
        self._desks = [self._make(desk) for desk in desks]
        self._person = _DeskKey(person, look=self._look, parent=self)
        self._person.clicked.connect(lambda: self.person_pressed.emit())
        self.set_present(present)
        self.set_person(person)

    def _make(self, desk: str) -> _DeskKey:
        key = _DeskKey(desk, look=self._look, parent=self)
        key.setCheckable(True)
        key.setAccessibleName(f"{desk} desk")
        key.clicked.connect(lambda: self._choose(desk))
        return key

    def _choose(self, desk: str) -> None:
        self.set_present(self.present)
        self.desk_chosen.emit(desk)

    @property
    def present(self) -> str:
        """The present desk."""
        return self._present

    def set_present(self, desk: str) -> None:
        """Underline another desk.

        Parameters
        ----------
        desk : str
            One of the desks, or nothing.
        """
        self._present = desk
        for key in self._desks:
            key.setChecked(key.text() == desk)
        self._place()

    def set_person(self, person: str) -> None:
        """Say who is signed in.

        Parameters
        ----------
        person : str
            Name and role, or what to do where nobody is.
        """
        self._person.setText(person)
        self._person.setAccessibleName(f"Signed in: {person}" if person else "Nobody signed in")
        self._person.setVisible(bool(person))
        self._place()

    def sizeHint(self) -> QSize:
        """Give the whole width, one line high."""
        return QSize(
            round(self._look.window_width), round(self._look.between(narrow=36.0, wide=44.0))
        )

    def look_changed(self) -> None:
        """Place the words for the new scale."""
        self._place()

    def resizeEvent(self, event: QResizeEvent) -> None:
        """Place the words."""
        super().resizeEvent(event)
        self._place()

    def _place(self) -> None:
        keys = [*self._desks, self._person]
        margin = self._look.between(narrow=24.0, wide=32.0)
        for key in keys:
            key.scale = 1.0
        needed = sum(key.sizeHint().width() for key in keys) + 2.0 * margin
        if needed > self.width() > 0:
            for key in keys:
                key.scale = self.width() / needed * 0.96
        gap = self._look.between(narrow=28.0, wide=40.0) * min(keys[0].scale, 1.0)
        edge = round(self._look.line(LineWidth.WIDE))
        left = margin - gap / 2.0
        for key in self._desks:
            width = key.sizeHint().width()
            key.setGeometry(round(left), 0, width, self.height() - edge)
            left += width
        width = self._person.sizeHint().width()
        self._person.setGeometry(
            round(self.width() - margin + gap / 2.0 - width), 0, width, self.height() - edge
        )
        self.update()

    def paintEvent(self, event: QPaintEvent) -> None:
        """Paint the line under the line of words."""
        painter = flat_painter(self)
        edge = self._look.line(LineWidth.WIDE)
        painter.fillRect(
            QRectF(0.0, self.height() - edge, self.width(), edge), self._look.colour(Colour.INK2)
        )
        painter.end()
