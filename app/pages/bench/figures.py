"""Figures by glove: the keypad writes where the keyboard is, and the verdict moves aside."""

from __future__ import annotations

from PySide6.QtCore import QCoreApplication, QEvent, QPointF, Qt
from PySide6.QtGui import QKeyEvent, QPaintEvent
from PySide6.QtWidgets import QWidget

from app.entry.keypad import Keypad
from app.frame.look import Look
from app.frame.plain import PlainWidget, flat_painter
from app.frame.shapes import draw_verdict_shape, shape_words
from app.frame.verdicts import ShownVerdict
from app.pages.bench.form_entry import FormEntry
from app.pages.bench.reading_entry import ReadingEntry
from reports.sheet.pictures import VerdictKind

__all__ = ["Figures", "VerdictBadge"]


class Figures:
    """The keypad, writing into the cell or into a line of the form, whichever is shown."""

    def __init__(
        self, *, entry: ReadingEntry, form: FormEntry, look: Look, parent: QWidget
    ) -> None:
        self.keypad_wanted = False
        self._cell = entry.cell
        self._form = form
        self.keypad = Keypad(look=look, parent=parent)
        self.keypad.setObjectName("figures")
        self.keypad.hide()
        self.keypad.written.connect(self._write)
        self.keypad.sign_changed.connect(self._change_sign)
        self.keypad.erased.connect(self._erase)
        self.keypad.cleared.connect(self._clear)
        self.keypad.taken.connect(self._take)

    @property
    def _in_form(self) -> bool:
        return self._form.isVisible()

    def _write(self, text: str) -> None:
        line = self._form.line()
        if not self._in_form:
            self._cell.write(text)
        elif line is not None:
            line.setFocus()
            line.insert(text)

    def _change_sign(self) -> None:
        line = self._form.line()
        if not self._in_form:
            self._cell.change_sign()
        elif line is not None:
            text = line.text()
            line.setText(text[1:] if text.startswith(("-", "−")) else f"−{text}")

    def _erase(self) -> None:
        line = self._form.line()
        if not self._in_form:
            self._cell.erase()
        elif line is not None:
            line.backspace()

    def _clear(self) -> None:
        line = self._form.line()
        if not self._in_form:
            self._cell.clear_entry()
        elif line is not None:
            line.clear()

    def _take(self) -> None:
        line = self._form.line()
        if not self._in_form:
            self._cell.take()
        elif line is not None:
            for kind in (QEvent.Type.KeyPress, QEvent.Type.KeyRelease):
                enter = QKeyEvent(kind, Qt.Key.Key_Return, Qt.KeyboardModifier.NoModifier, "\r")
                QCoreApplication.sendEvent(line, enter)


class VerdictBadge(PlainWidget):
    """The verdict's shape in the gutter of the change row, while the keypad covers the verdict."""

    def __init__(self, *, look: Look | None = None, parent: QWidget | None = None) -> None:
        super().__init__(name="Verdict", look=look, parent=parent)
        self._kind = VerdictKind.NOT_JUDGED
        self.hide()

    def set_kind(self, verdict: ShownVerdict) -> None:
        """Show another verdict.

        Parameters
        ----------
        verdict : ShownVerdict
            Whose shape is drawn.
        """
        self._kind = verdict.kind
        self.setAccessibleName(f"Verdict: {verdict.phrase}")
        self.setToolTip(f"{verdict.phrase}: {shape_words(verdict.kind)}")
        self.update()

    def paintEvent(self, event: QPaintEvent) -> None:
        """Paint the shape."""
        painter = flat_painter(self)
        centre = QPointF(self.width() / 2.0, self.height() / 2.0)
        draw_verdict_shape(
            painter, centre, float(min(self.width(), self.height())), self._kind, self._look
        )
        painter.end()
