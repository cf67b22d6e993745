"""One row of a form: the label, where to answer, and a sentence where the answer has a fault."""

from __future__ import annotations

from PySide6.QtCore import QEvent, QPointF, QRectF, QSize, Qt, Signal
from PySide6.QtGui import QFontMetricsF, QKeyEvent, QPainter, QPaintEvent, QPalette, QResizeEvent
from PySide6.QtWidgets import QLineEdit, QWidget

from app.entry.fields import ChoiceField, FormField, NumberField
from app.frame.key import Key
from app.frame.lettering import draw_at, fitted, wrapped
from app.frame.look import Look
from app.frame.plain import PlainWidget, announce, draw_focus, flat_painter
from reports.palette import Colour
from reports.sheet.medium import LineWidth, Size
from reports.typeface import Weight

__all__ = ["ChoiceRow", "FormRow", "LineRow"]

_GAP = 8
_LABEL_SHARE = 0.42
_EDIT_SHARE = 0.3
_LEAST_LABEL = 12
_ENTER = (Qt.Key.Key_Return, Qt.Key.Key_Enter)


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
            round(self.control_height() + extra + _GAP),
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
        if event.key() in _ENTER:
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
        self._line.entered.connect(self._take)
        self._line.textEdited.connect(self._edited)
        self.setFocusProxy(self._line)
        self.look_changed()

    @property
    def answer(self) -> str:
        """What is typed."""
        return self._line.text().strip()

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


class _AnswerKey(Key):
    """One answer; arrows walk, Space or its first letter chooses, Enter moves on."""

    def __init__(self, text: str, *, row: ChoiceRow) -> None:
        super().__init__(text, look=row.look, parent=row)
        self._row = row
        self.setCheckable(True)

    def keyPressEvent(self, event: QKeyEvent) -> None:
        """Tell the row; a digit an indicator sends goes on to the page."""
        if not self._row.take_key(self, event):
            super().keyPressEvent(event)


class ChoiceRow(FormRow):
    """A few answers as keys. Enter alone never answers: it only moves on from an answer."""

    def __init__(self, field: ChoiceField, *, look: Look, parent: QWidget | None = None) -> None:
        super().__init__(field, look=look, parent=parent)
        self._answer = ""
        self._keys: list[_AnswerKey] = []
        for answer in field.answers:
            key = _AnswerKey(answer, row=self)
            key.setAccessibleName(f"{field.label}: {answer}")
            key.clicked.connect(lambda _checked=False, answer=answer: self._choose(answer))
            self._keys.append(key)
        self.setFocusProxy(self._keys[0])
        self._show_answer()

    @property
    def answer(self) -> str:
        """Which answer is chosen."""
        return self._answer

    def set_answer(self, text: str) -> None:
        """Show an answer without telling anybody."""
        self._answer = text
        self._show_answer()

    def _choose(self, answer: str) -> None:
        changed = answer != self._answer
        self.set_answer(answer)
        if self._message:
            self.set_message("")
        if changed:
            self.answered.emit(self.name, answer)

    def _show_answer(self) -> None:
        chosen = next((key for key in self._keys if key.text() == self._answer), self._keys[0])
        for key in self._keys:
            key.setChecked(key.text() == self._answer)
            policy = Qt.FocusPolicy.TabFocus if key is chosen else Qt.FocusPolicy.NoFocus
            key.setFocusPolicy(policy)
        self.setFocusProxy(chosen)

    def take_key(self, key: Key, event: QKeyEvent) -> bool:
        """Walk, choose or move on.

        Parameters
        ----------
        key : Key
            The answer that has the keyboard.
        event : QKeyEvent
            What was pressed.

        Returns
        -------
        bool
            Whether it meant something here.
        """
        step = {Qt.Key.Key_Left: -1, Qt.Key.Key_Right: 1}.get(Qt.Key(event.key()))
        if step is not None:
            place = next(index for index, other in enumerate(self._keys) if other is key) + step
            self._keys[place % len(self._keys)].setFocus(Qt.FocusReason.OtherFocusReason)
            return True
        if event.key() in _ENTER:
            self._move_on(repeated=event.isAutoRepeat())
            return True
        letter = event.text().casefold()
        fitting = [other for other in self._keys if letter and other.text()[0] == letter]
        if letter.isalpha() and len(fitting) == 1:
            self._choose(fitting[0].text())
            return True
        return False

    def _move_on(self, *, repeated: bool) -> None:
        if repeated:
            return
        if self._answer or self._field.optional:
            self.moved_on.emit(self.name)
        else:
            self.set_message("Choose with the arrow keys and Space, then Enter")

    def place(self) -> None:
        """Share the room after the label among the answers."""
        left, height = float(self.control_left()), self.control_height()
        asked = [max(key.sizeHint().width(), 72) for key in self._keys]
        room = self.width() - left - _GAP * (len(asked) - 1)
        stretch = room / sum(asked)
        for key, wish in zip(self._keys, asked, strict=True):
            wide = wish * stretch
            key.setGeometry(round(left), 0, round(wide), height)
            left += wide + _GAP
        self.update()
