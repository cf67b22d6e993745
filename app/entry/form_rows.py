"""One row of a form: the label, where to answer, and a sentence where the answer has a fault."""

from __future__ import annotations

from PySide6.QtCore import QPointF, QSize, Qt, Signal
from PySide6.QtGui import QPainter, QPaintEvent, QResizeEvent
from PySide6.QtWidgets import QWidget

from app.entry.fields import FormField
from app.frame.lettering import draw_at, fitted, wrapped
from app.frame.look import Look
from app.frame.plain import PlainWidget, announce, flat_painter
from reports.palette import Colour
from reports.sheet.medium import Size

__all__ = ["ENTER_KEYS", "ROW_GAP", "FormRow"]

ENTER_KEYS = (Qt.Key.Key_Return, Qt.Key.Key_Enter)
"""Both keys that take an answer and move on."""
ROW_GAP = 8
"""Distance between rows, and between keys of a row [px]."""

_LABEL_SHARE = 0.42
_LEAST_LABEL = 12


class FormRow(PlainWidget):
    """What the rows have in common."""

    answered = Signal(str, str)
    moved_on = Signal(str)

    def __init__(self, field: FormField, *, look: Look, parent: QWidget | None = None) -> None:
        super().__init__(name=field.label, look=look, parent=parent)
        self._field = field
        self._message = ""

    @property
    def name(self) -> str:
        """How the page knows the field."""
        return self._field.name

    @property
    def answer(self) -> str:
        """What is answered, or nothing."""
        raise NotImplementedError

    @property
    def message(self) -> str:
        """The sentence at the field, or nothing."""
        return self._message

    def set_answer(self, text: str) -> None:
        """Show an answer without telling anybody.

        Parameters
        ----------
        text : str
            What is recorded already.
        """
        raise NotImplementedError

    def set_message(self, text: str) -> None:
        """Say something at the field.

        Parameters
        ----------
        text : str
            A sentence, or nothing.
        """
        self._message = text
        announce(self, text)
        self.updateGeometry()
        self.place()

    def place(self) -> None:
        """Put the controls in their places."""
        self.update()

    def control_height(self) -> int:
        """Give the height of what is touched.

        Returns
        -------
        int
            At least a glove's [px].
        """
        return round(max(self._look.touch, self._look.size(Size.LEAD) * 1.5))

    def control_left(self) -> int:
        """Give where the controls begin, the same in every row.

        Returns
        -------
        int
            From the row's left edge [px].
        """
        return round(self.width() * _LABEL_SHARE)

    def sizeHint(self) -> QSize:
        """Give one control's height, and a line more where there is a message."""
        extra = self._look.size(Size.NOTE) * 1.25 if self._message else 0.0
        return QSize(
            round(self._look.between(narrow=608.0, wide=872.0)),
            round(self.control_height() + extra + ROW_GAP),
        )

    def minimumSizeHint(self) -> QSize:
        """Give the same height, so that no row is squeezed."""
        return QSize(320, self.sizeHint().height())

    def look_changed(self) -> None:
        """Place the controls for the new scale."""
        self.place()

    def resizeEvent(self, event: QResizeEvent) -> None:
        """Place the controls."""
        super().resizeEvent(event)
        self.place()

    def paintEvent(self, event: QPaintEvent) -> None:
        """Paint the label and the message."""
        painter = flat_painter(self)
        look = self._look
        room = self.control_left() - 16.0
        font = look.font(Size.TEXT)
        height = self.control_height()
        lines = wrapped(self._field.label, font, width=room)
        while len(lines) > 1 and font.pixelSize() > _LEAST_LABEL:
            if len(lines) * font.pixelSize() * 1.12 <= height:
                break
            font.setPixelSize(font.pixelSize() - 1)
            lines = wrapped(self._field.label, font, width=room)
        step = font.pixelSize() * 1.12
        painter.setFont(font)
        painter.setPen(look.colour(Colour.INK))
        base = (height - step * len(lines)) / 2.0 + step * 0.8
        for line in lines:
            draw_at(painter, QPointF(0.0, base), line)
            base += step
        if self._message:
            left = self.control_left()
            note = fitted(look.note_font(), [self._message], width=self.width() - left, least=12.0)
            painter.setFont(note)
            draw_at(painter, QPointF(left, height + note.pixelSize() * 1.05), self._message)
        self.paint_more(painter, height)
        painter.end()

    def paint_more(self, painter: QPainter, height: int) -> None:
        """Paint what only this kind of row has.

        Parameters
        ----------
        painter : QPainter
            Where it is painted.
        height : int
            Height of the controls [px].
        """
