"""What a verdict rests on: inputs, formula, source, and where the limit comes from."""

from __future__ import annotations

from PySide6.QtCore import QPointF, QRect, QRectF, Qt, Signal
from PySide6.QtGui import QPaintEvent, QPalette, QResizeEvent
from PySide6.QtWidgets import QFrame, QPlainTextEdit, QWidget

from app.frame.key import Key
from app.frame.lettering import draw_at
from app.frame.look import Look
from app.frame.plain import PlainWidget, draw_focus, flat_painter
from app.pages.bench.scroll_bars import flatten_scroll_bars
from reports.palette import Colour
from reports.sheet.medium import Size
from reports.typeface import Weight

__all__ = ["ReasonsPanel"]

_MARGIN = 16


class ReasonsPanel(PlainWidget):
    """A plain panel over dial and verdict. Esc closes it, wherever the keyboard is."""

    closed = Signal()

    def __init__(self, *, look: Look | None = None, parent: QWidget | None = None) -> None:
        super().__init__(name="Reasons", look=look, parent=parent)
        self._phrase = ""
        self._listed: tuple[str, ...] = ()
        self._text = QPlainTextEdit(self)
        self._text.setObjectName("reasons-text")
        self._text.setReadOnly(True)
        self._text.setFrameShape(QFrame.Shape.NoFrame)
        self._text.setFocusPolicy(Qt.FocusPolicy.TabFocus)
        self._text.setTextInteractionFlags(
            Qt.TextInteractionFlag.TextSelectableByMouse
            | Qt.TextInteractionFlag.TextSelectableByKeyboard
        )
        self._close = Key("Close", hint="Esc", look=self._look, parent=self)
        self._close.clicked.connect(self.close_panel)
        self.setFocusProxy(self._text)
        self.hide()

    @property
    def lines(self) -> tuple[str, ...]:
        """What is listed."""
        return tuple(line for line in self._text.toPlainText().split("\n") if line)

    def open(self, phrase: str, lines: tuple[str, ...]) -> None:
        """List what a verdict rests on.

        Parameters
        ----------
        phrase : str
            The verdict's words.
        lines : tuple of str
            Inputs, formula, source, and the limit's origin.
        """
        self.show_reasons(phrase, lines)
        self.show()
        self.raise_()

    def show_reasons(self, phrase: str, lines: tuple[str, ...]) -> None:
        """Keep the list in step with a verdict that has changed."""
        listed = lines or ("Nothing is judged yet, so there is nothing it rests on.",)
        if phrase == self._phrase and listed == self._listed:
            return
        self._phrase, self._listed = phrase, listed
        self._text.setPlainText("\n".join(listed).strip())
        self._text.setAccessibleName(f"What “{phrase}” rests on")
        self.update()

    def close_panel(self) -> None:
        """Put the panel away."""
        if self.isVisible():
            self.hide()
            self.closed.emit()

    def look_changed(self) -> None:
        """Scale the text and take over the colours."""
        self._text.setFont(self._look.font(Size.TEXT))
        palette = QPalette(self._text.palette())
        palette.setColor(QPalette.ColorRole.Base, self._look.colour(Colour.PAPER))
        palette.setColor(QPalette.ColorRole.Text, self._look.colour(Colour.INK))
        palette.setColor(QPalette.ColorRole.Highlight, self._look.colour(Colour.ACCENT))
        palette.setColor(QPalette.ColorRole.HighlightedText, self._look.colour(Colour.PAPER))
        self._text.setPalette(palette)
        flatten_scroll_bars(self._text, self._look)
        self._lay_out()

    def resizeEvent(self, event: QResizeEvent) -> None:
        """Place text and key."""
        super().resizeEvent(event)
        self._lay_out()

    def _lay_out(self) -> None:
        head = self._head_height()
        wide = self._close.sizeHint().width() + 24
        left = self.width() - wide - _MARGIN
        self._close.setGeometry(QRect(left, 10, wide, self._look.touch))
        # The document keeps a margin of its own of 4 px.
        width = self.width() - 2 * _MARGIN + 8
        self._text.setGeometry(QRect(_MARGIN - 4, head, width, self.height() - head - 8))

    def _head_height(self) -> int:
        return self._look.touch + 18

    def paintEvent(self, event: QPaintEvent) -> None:
        """Paint the ground and the heading."""
        painter = flat_painter(self)
        painter.fillRect(self.rect(), self._look.colour(Colour.PAPER))
        painter.setFont(self._look.font(Size.LEAD, weight=Weight.SEMI_BOLD))
        painter.setPen(self._look.colour(Colour.INK))
        base = 10.0 + self._look.touch / 2.0 + painter.font().pixelSize() * 0.35
        draw_at(painter, QPointF(float(_MARGIN), base), self._phrase)
        if self._text.hasFocus():
            draw_focus(painter, QRectF(self.rect()), self._look)
        painter.end()
