"""The keypad on the screen, for gloves: it types into the cell and never has the keyboard."""

from __future__ import annotations

from PySide6.QtCore import QSize, Qt, Signal
from PySide6.QtGui import QPaintEvent, QResizeEvent
from PySide6.QtWidgets import QWidget

from app.entry.reading_cell import ReadingCell
from app.frame.key import Key
from app.frame.look import Look
from app.frame.plain import PlainWidget, flat_painter
from reports.palette import Colour
from reports.sheet.medium import LineWidth, Size

__all__ = ["Keypad"]

# Column, row and rows taken up; "Take" is twice as high since it is pressed most.
_FIGURES = ("7", "8", "9", "4", "5", "6", "1", "2", "3")
_KEY_NARROW = (152.0, 84.0)
_KEY_WIDE = (190.0, 102.0)


class Keypad(PlainWidget):
    """Four columns and four rows of keys for figures, sign, point, erase, clear and take."""

    written = Signal(str)
    sign_changed = Signal()
    erased = Signal()
    cleared = Signal()
    taken = Signal()

    def __init__(self, *, look: Look | None = None, parent: QWidget | None = None) -> None:
        super().__init__(name="Keypad", look=look, parent=parent)
        self._places: list[tuple[Key, int, int, int]] = []
        for place, figure in enumerate(_FIGURES):
            self._add(figure, figure, place % 3, place // 3).clicked.connect(
                lambda _checked=False, figure=figure: self.written.emit(figure)
            )
        self._add("+ −", "Change sign", 0, 3).clicked.connect(lambda: self.sign_changed.emit())
        self._add("0", "0", 1, 3).clicked.connect(lambda: self.written.emit("0"))
        self._add(".", "Decimal point", 2, 3).clicked.connect(lambda: self.written.emit("."))
        self._add("Erase", "Erase", 3, 0).clicked.connect(lambda: self.erased.emit())
        self._add("Clear", "Clear", 3, 1).clicked.connect(lambda: self.cleared.emit())
        self._add("Take", "Take", 3, 2, rows=2).clicked.connect(lambda: self.taken.emit())

    def _add(self, words: str, name: str, column: int, row: int, *, rows: int = 1) -> Key:
        key = Key(words, size=Size.TITLE, outlined=False, look=self._look, parent=self)
        key.setAccessibleName(name)
        key.setFocusPolicy(Qt.FocusPolicy.NoFocus)
        self._places.append((key, column, row, rows))
        return key

    def attach(self, cell: ReadingCell) -> None:
        """Type into a cell.

        Parameters
        ----------
        cell : ReadingCell
            Where the strokes go, through the same queue as those of an indicator.
        """
        self.written.connect(cell.write)
        self.sign_changed.connect(cell.change_sign)
        self.erased.connect(cell.erase)
        self.cleared.connect(cell.clear_entry)
        self.taken.connect(cell.take)

    def sizeHint(self) -> QSize:
        """Give the room of four by four keys for a glove."""
        width = self._look.between(narrow=_KEY_NARROW[0], wide=_KEY_WIDE[0])
        height = self._look.between(narrow=_KEY_NARROW[1], wide=_KEY_WIDE[1])
        return QSize(round(4.0 * width), round(4.0 * height))

    def look_changed(self) -> None:
        """Place the keys for the new line widths."""
        self._place()

    def resizeEvent(self, event: QResizeEvent) -> None:
        """Share the room among the keys."""
        super().resizeEvent(event)
        self._place()

    def _place(self) -> None:
        edge = round(self._look.line(LineWidth.NARROW))
        pitch_x = (self.width() - edge) / 4.0
        pitch_y = (self.height() - edge) / 4.0
        for key, column, row, rows in self._places:
            left, right = round(column * pitch_x), round((column + 1) * pitch_x)
            top, bottom = round(row * pitch_y), round((row + rows) * pitch_y)
            key.setGeometry(left + edge, top + edge, right - left - edge, bottom - top - edge)
        self.update()

    def paintEvent(self, event: QPaintEvent) -> None:
        """Paint the lines between the keys."""
        painter = flat_painter(self)
        painter.fillRect(self.rect(), self._look.colour(Colour.INK2))
        painter.end()
