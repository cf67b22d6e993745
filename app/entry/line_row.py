"""A row of a form for a number with its unit, or for a few words."""

from __future__ import annotations

from PySide6.QtCore import QEvent, QPointF, QRectF, Qt, Signal
from PySide6.QtGui import QFontMetricsF, QKeyEvent, QPainter, QPaintEvent, QPalette
from PySide6.QtWidgets import QLineEdit, QWidget

from app.entry.fields import FormField, NumberField, SecretField
from app.entry.form_rows import ENTER_KEYS, FormRow
from app.frame.lettering import draw_at
from app.frame.look import Look
from app.frame.plain import draw_focus, flat_painter
from reports.palette import Colour
from reports.sheet.medium import LineWidth, Size
from reports.typeface import Weight

__all__ = ["LineRow"]

_EDIT_SHARE = 0.3


class _Line(QLineEdit):
    """A flat line edit whose accent frame shows the keyboard."""

    entered = Signal()

    def __init__(self, *, row: LineRow) -> None:
        super().__init__(row)
        self._row = row
        self.setFrame(False)
        self.setContextMenuPolicy(Qt.ContextMenuPolicy.NoContextMenu)
        self.setTextMargins(10, 0, 10, 0)

    def event(self, event: QEvent) -> bool:
        """Let a Tab that an indicator sends take the number, and then move on as always."""
        tab = isinstance(event, QKeyEvent) and event.type() == QEvent.Type.KeyPress
        if tab and isinstance(event, QKeyEvent) and event.key() == Qt.Key.Key_Tab and self.text():
            self.entered.emit()
            return True
        return super().event(event)

    def keyPressEvent(self, event: QKeyEvent) -> None:
        """Take with Enter."""
        if event.key() in ENTER_KEYS:
            if not event.isAutoRepeat():
                self.entered.emit()
            return
        super().keyPressEvent(event)

    def paintEvent(self, event: QPaintEvent) -> None:
        """Paint the words as Qt does, and a frame of our own round them."""
        super().paintEvent(event)
        painter = flat_painter(self)
        look = self._row.look
        frame = QRectF(self.rect())
        if self.hasFocus():
            draw_focus(painter, frame, look)
        else:
            width = look.line(LineWidth.NARROW)
            painter.setPen(look.pen(Colour.INK2))
            painter.drawRect(frame.adjusted(width / 2, width / 2, -width / 2, -width / 2))
        painter.end()


class LineRow(FormRow):
    """A number with its unit, or a few words."""

    def __init__(self, field: FormField, *, look: Look, parent: QWidget | None = None) -> None:
        super().__init__(field, look=look, parent=parent)
        self._unit = field.unit if isinstance(field, NumberField) else None
        self._told = ""
        self._line = _Line(row=self)
        symbol = f" in {self._unit.symbol}" if self._unit and self._unit.symbol else ""
        self._line.setAccessibleName(field.label + symbol)
        if isinstance(field, SecretField):
            self._line.setEchoMode(QLineEdit.EchoMode.Password)
        self._line.entered.connect(self._take)
        self._line.textEdited.connect(self._edited)
        self.setFocusProxy(self._line)
        self.look_changed()

    @property
    def answer(self) -> str:
        """What is typed; of a secret every character counts."""
        text = self._line.text()
        return text if isinstance(self._field, SecretField) else text.strip()

    def set_answer(self, text: str) -> None:
        """Show an answer without telling anybody."""
        self._told = text
        self._line.setText(text)
        self.update()

    def _edited(self) -> None:
        if self._message:
            self.set_message("")
        self.update()

    def _take(self) -> None:
        text = self.answer
        if not text:
            if self._field.optional:
                self.moved_on.emit(self.name)
            else:
                self.set_message(f"Nothing typed for {self._field.label}")
            return
        if self._unit is not None:
            try:
                self._unit.read(text)
            except ValueError as unreadable:
                self.set_message(str(unreadable))
                return
        if text != self._told:
            self._told = text
            self.answered.emit(self.name, text)
        self.moved_on.emit(self.name)

    def other_text(self) -> str:
        """Give the number in the other unit, or nothing.

        Returns
        -------
        str
            With its symbol.
        """
        if self._unit is None or not self.answer:
            return ""
        try:
            return self._unit.other(self._unit.read(self.answer))
        except ValueError:
            return ""

    def look_changed(self) -> None:
        """Scale the line and take over the colours."""
        self._line.setFont(self._look.font(Size.LEAD, weight=Weight.MEDIUM))
        palette = QPalette(self._line.palette())
        palette.setColor(QPalette.ColorRole.Base, self._look.colour(Colour.PAPER))
        palette.setColor(QPalette.ColorRole.Text, self._look.colour(Colour.INK))
        palette.setColor(QPalette.ColorRole.Highlight, self._look.colour(Colour.ACCENT))
        palette.setColor(QPalette.ColorRole.HighlightedText, self._look.colour(Colour.PAPER))
        self._line.setPalette(palette)
        self.place()

    def place(self) -> None:
        """Put the line after the label; words get all the room."""
        left = self.control_left()
        width = self.width() * _EDIT_SHARE if self._unit else self.width() - left
        self._line.setGeometry(left, 0, round(width), self.control_height())
        self.update()

    def paint_more(self, painter: QPainter, height: int) -> None:
        """Paint the unit and the number in the other unit."""
        if self._unit is None:
            return
        left = self._line.geometry().right() + 12.0
        painter.setFont(self._look.font(Size.TEXT))
        painter.setPen(self._look.colour(Colour.INK2))
        base = (height + QFontMetricsF(painter.font()).capHeight()) / 2.0
        left = draw_at(painter, QPointF(left, base), self._unit.symbol) + 20.0
        painter.setFont(self._look.note_font())
        draw_at(painter, QPointF(left, base), self.other_text())
