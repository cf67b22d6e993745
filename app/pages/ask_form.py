"""A dialog that says what is about to happen in whose name, and asks for what it takes."""

from __future__ import annotations

from PySide6.QtCore import QRectF, Signal
from PySide6.QtGui import QCloseEvent, QPaintEvent
from PySide6.QtWidgets import QDialog, QHBoxLayout, QVBoxLayout, QWidget

from app.entry.fields_form import FieldsForm
from app.frame.look import Look
from app.frame.plain import announce, flat_painter
from app.pages.desk import Words, desk_key, desk_look
from app.presenters.keys import Asking
from reports.palette import Colour
from reports.sheet.medium import DESK, LineWidth, Size
from reports.typeface import Weight

__all__ = ["AskForm"]


class AskForm(QDialog):
    """Shows an `Asking`; stays until it is done or given up, and says why it was refused."""

    answered = Signal(dict)
    given_up = Signal()

    def __init__(self, asking: Asking, *, look: Look, parent: QWidget | None = None) -> None:
        super().__init__(parent)
        self.setWindowTitle(asking.title)
        self.setAccessibleName(asking.title)
        self.setModal(True)
        dress = desk_look(look)
        self._look = dress
        column = QVBoxLayout(self)
        column.setContentsMargins(28, 22, 28, 22)
        column.setSpacing(10)
        column.addWidget(Words(asking.title, look=dress, size=Size.TEXT, colour=Colour.INK2))
        column.addWidget(Words(asking.who, look=dress, size=Size.LEAD, weight=Weight.SEMI_BOLD))
        for line in asking.lines:
            column.addWidget(Words(line, look=dress, size=Size.TEXT))
        self.form = FieldsForm(asking.fields, name=asking.title, look=dress, parent=self)
        self.form.finished.connect(self._take)
        column.addSpacing(6)
        column.addWidget(self.form, 1)
        self.said = Words("", look=dress, size=Size.TEXT, colour=Colour.STOP)
        self.said.hide()
        column.addWidget(self.said)
        if asking.note:
            column.addWidget(Words(asking.note, look=dress, size=Size.NOTE, colour=Colour.INK2))
        row = QHBoxLayout()
        row.setSpacing(12)
        row.addStretch(1)
        self.take = desk_key(asking.take, look=dress)
        self.take.clicked.connect(self._take)
        leave = desk_key("Change nothing", look=dress)
        leave.clicked.connect(self.reject)
        row.addWidget(self.take)
        row.addWidget(leave)
        column.addLayout(row)
        self._fields = asking.fields
        self.rejected.connect(self.given_up)
        grown = dress.size(Size.TEXT) / DESK.size(Size.TEXT)
        height = 270 + 58 * len(asking.fields) + 26 * len(asking.lines)
        self.resize(round(min(720 * grown, 1180)), round(min(height * grown, 780)))
        self.form.setFocus()

    def refuse(self, words: str) -> None:
        """Say why what was typed does not serve; secrets are typed anew."""
        for one in self._fields:
            if "pin" in one.name or "passphrase" in one.name:
                self.form.set_answer(one.name, "")
        self.take.setEnabled(True)
        self.said.say(words)
        self.said.show()
        announce(self.said, words)
        first = next((one for one in self._fields if not self.form.row(one.name).answer), None)
        if first is not None:
            self.form.go_to(first.name)

    def _take(self) -> None:
        for one in self._fields:
            if not one.optional and not self.form.row(one.name).answer:
                self.form.set_message(one.name, f"Nothing typed for {one.label}")
                self.form.go_to(one.name)
                return
        self.take.setEnabled(False)
        self.answered.emit(self.form.answers)

    def closeEvent(self, event: QCloseEvent) -> None:
        """Give up when the dialog is closed."""
        self.given_up.emit()
        super().closeEvent(event)

    def paintEvent(self, event: QPaintEvent) -> None:
        """Part the dialog from what lies behind it, also where no window frame does."""
        super().paintEvent(event)
        painter = flat_painter(self)
        wide = self._look.line(LineWidth.WIDE)
        painter.setPen(self._look.pen(Colour.INK, LineWidth.WIDE))
        frame = QRectF(self.rect())
        painter.drawRect(frame.adjusted(wide / 2, wide / 2, -wide / 2, -wide / 2))
        painter.end()
