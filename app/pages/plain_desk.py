"""A desk with nothing on it but what to do first."""

from __future__ import annotations

from PySide6.QtWidgets import QVBoxLayout, QWidget

from app.frame.look import Look
from app.pages.desk import DeskPage, Words
from reports.palette import Colour
from reports.sheet.medium import Size

__all__ = ["PlainDesk"]


class PlainDesk(DeskPage):
    """One sentence."""

    def __init__(self, words: str, *, look: Look, parent: QWidget | None = None) -> None:
        super().__init__(name="Empty", look=look, parent=parent)
        column = QVBoxLayout(self)
        column.setContentsMargins(24, 40, 24, 24)
        self.words = Words(words, look=self.look, size=Size.LEAD, colour=Colour.INK2)
        column.addWidget(self.words)
        column.addStretch(1)
