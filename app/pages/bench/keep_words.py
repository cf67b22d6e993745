"""Why a questioned reading stays as it is: words by function key, or words of one's own."""

from __future__ import annotations

from PySide6.QtCore import QPointF, QRect, Qt, Signal
from PySide6.QtGui import QKeySequence, QPaintEvent, QPalette, QResizeEvent, QShortcut
from PySide6.QtWidgets import QLineEdit, QWidget

from app.entry.question_line import ReasonKeys
from app.frame.key import Key
from app.frame.lettering import draw_at
from app.frame.look import Look
from app.frame.plain import PlainWidget, announce, flat_painter
from reports.palette import Colour
from reports.sheet.medium import Size

__all__ = ["KEEP_BECAUSE", "KeepWords"]

KEEP_BECAUSE = ("read twice, the same", "seen on the surface", "the same before", "own words")
"""Why a reading stays, in the order of F1 to F4; the last one opens a line to write on."""

_GAP = 8


class KeepWords(PlainWidget):
    """Keys for the usual words; an indicator that types meanwhile still types into the cell."""

    given = Signal(str)
    put_away = Signal()

    def __init__(self, *, look: Look | None = None, parent: QWidget | None = None) -> None:
        super().__init__(name="Why it is kept", look=look, parent=parent)
        self._ask = "It stays, because …"
        self._keys = ReasonKeys(KEEP_BECAUSE, look=self._look, parent=self)
        self._keys.chosen.connect(self._choose)
        for number, key in enumerate(self._keys.findChildren(Key), start=1):
            QShortcut(QKeySequence(f"F{number}"), key).activated.connect(key.click)
        self._line = QLineEdit(self)
        self._line.setObjectName("keep-words")
        self._line.setAccessibleName("Why the reading stays")
        self._line.returnPressed.connect(self._take)
        self._line.hide()
        self._back = Key("Back", hint="Esc", look=self._look, parent=self)
        self._back.setFocusPolicy(Qt.FocusPolicy.NoFocus)
        self._back.clicked.connect(lambda: self.put_away.emit())
        self.hide()

    def open(self) -> None:
        """Ask why."""
        self._say("It stays, because …")
        self._keys.show_reason("")
        self._line.clear()
        self._line.hide()
        self._keys.show()
        self.show()
        self.raise_()

    def _say(self, words: str) -> None:
        self._ask = words
        announce(self, words)
        self.update()

    def _choose(self, words: str) -> None:
        if words != KEEP_BECAUSE[-1]:
            self.given.emit(words)
            return
        self._keys.hide()
        self._line.show()
        self._line.setFocus()
        self._say("It stays, because … (Enter takes it)")

    def _take(self) -> None:
        words = self._line.text().strip()
        if any(letter.isalpha() for letter in words):
            self.given.emit(words)
        else:
            # An indicator may have typed here: a figure is no reason.
            self._say("Say it in words; a figure is no reason.")

    def look_changed(self) -> None:
        """Scale the line and take over the colours."""
        self._line.setFont(self._look.font(Size.TEXT))
        palette = QPalette(self._line.palette())
        palette.setColor(QPalette.ColorRole.Base, self._look.colour(Colour.PAPER))
        palette.setColor(QPalette.ColorRole.Text, self._look.colour(Colour.INK))
        self._line.setPalette(palette)
        self._lay_out()

    def resizeEvent(self, event: QResizeEvent) -> None:
        """Place keys and line under the question."""
        super().resizeEvent(event)
        self._lay_out()

    def _lay_out(self) -> None:
        touch = self._look.touch
        top = self.height() - touch
        self._keys.setGeometry(QRect(0, top, self.width(), touch))
        self._line.setGeometry(QRect(0, top, self.width(), touch))
        wide = self._back.sizeHint().width() + 2 * _GAP
        self._back.setGeometry(QRect(self.width() - wide, 0, wide, min(touch, top - 4)))

    def paintEvent(self, event: QPaintEvent) -> None:
        """Paint the question."""
        painter = flat_painter(self)
        painter.fillRect(self.rect(), self._look.colour(Colour.PAPER))
        painter.setFont(self._look.font(Size.TEXT))
        painter.setPen(self._look.colour(Colour.INK))
        draw_at(painter, QPointF(0.0, painter.font().pixelSize() * 1.1), self._ask)
        painter.end()
