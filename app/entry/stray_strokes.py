"""Readings that arrive while a key has the keyboard are led into the cell, not lost."""

from __future__ import annotations

from PySide6.QtCore import QEvent, QObject
from PySide6.QtGui import QKeyEvent
from PySide6.QtWidgets import QWidget

from app.entry.reading_cell import ReadingCell

__all__ = ["StrayStrokes"]

_FIGURES = frozenset("0123456789.,+-−")


class StrayStrokes(QObject):
    """Watches a page for figures that no control of it wanted.

    Parameters
    ----------
    cell : ReadingCell
        Where they belong; it takes the keyboard with the first of them.
    page : QWidget
        The page that holds the cell.
    """

    def __init__(self, *, cell: ReadingCell, page: QWidget) -> None:
        super().__init__(page)
        self._cell = cell
        page.installEventFilter(self)

    def eventFilter(self, watched: QObject, event: QEvent) -> bool:
        """Lead a figure into the cell; everything else goes its way."""
        if not isinstance(event, QKeyEvent) or event.type() != QEvent.Type.KeyPress:
            return False
        if event.text() not in _FIGURES or not self._cell.isVisible():
            return False
        self._cell.setFocus()
        self._cell.write(event.text())
        return True
