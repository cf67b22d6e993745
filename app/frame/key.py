"""The key: a flat field with words in it, pressed by glove, mouse or keyboard."""

from __future__ import annotations

from PySide6.QtCore import QPointF, QRectF, QSize, Qt
from PySide6.QtGui import QFont, QFontMetricsF, QPainter, QPaintEvent
from PySide6.QtWidgets import QWidget

from app.frame.lettering import draw_at, fitted, wrapped
from app.frame.look import Look
from app.frame.plain import PlainButton, draw_focus, flat_painter
from reports.palette import Colour
from reports.sheet.medium import LineWidth, Size
from reports.typeface import Weight

__all__ = ["KEY_WORDS_SHARE", "Key"]

KEY_WORDS_SHARE = 0.52
"""Greatest size of the words on a key as a share of its height [-]."""

_PADDING = 8.0
_ONE_LINE_FROM = 0.8


class Key(PlainButton):
    """A flat key; `hint` names the function key that does the same.

    Parameters
    ----------
    text : str
        The words on it, broken into lines where they are too long.
    hint : str
        Name of a function key, or nothing.
    size : Size
        Size of the words.
    outlined : bool
        Whether it has an outline of its own, or its neighbours part it off.
    """

    def __init__(
        self,
        text: str,
        *,
        hint: str = "",
        size: Size = Size.TEXT,
        outlined: bool = True,
        look: Look | None = None,
        parent: QWidget | None = None,
    ) -> None:
        super().__init__(text, look=look, parent=parent)
        self._size = size
        self._outlined = outlined
        self._hint = hint
        self.set_words(text, hint=hint)

    @property
    def hint(self) -> str:
        """The function key that does the same, or nothing."""
        return self._hint

    def set_words(self, text: str, *, hint: str | None = None) -> None:
        """Say something else on the key.

        Parameters
        ----------
        text : str
            The words.
        hint : str or None
            Name of a function key; None keeps the present one.
        """
        if hint is not None:
            self._hint = hint
        self.setText(text)
        self.setAccessibleName(text)
        self.setToolTip(f"{text} ({self._hint})" if self._hint else "")
        self.updateGeometry()
        self.update()

    def _font(self) -> QFont:
        weight = Weight.SEMI_BOLD if self._outlined and self.isChecked() else Weight.MEDIUM
        condensed = self.look.window_width < 1920.0
        return self.look.font(self._size, weight=weight, condensed=condensed)

    def _hint_font(self) -> QFont:
        return self.look.note_font()

    def sizeHint(self) -> QSize:
        """Room for the words on one line, and never less than a glove needs."""
        width = QFontMetricsF(self._font()).horizontalAdvance(self.text()) + 2.0 * _PADDING
        if self._hint:
            width += QFontMetricsF(self._hint_font()).horizontalAdvance(self._hint) + _PADDING
        height = max(self.look.touch, self._font().pixelSize() * 1.6)
        return QSize(round(max(width, self.look.touch)), round(height))

    def minimumSizeHint(self) -> QSize:
        """Give the least that can be touched."""
        return QSize(self.look.touch, self.look.touch)

    def paintEvent(self, event: QPaintEvent) -> None:
        """Paint the field, the words and the frame of the keyboard."""
        painter = flat_painter(self)
        frame = QRectF(self.rect())
        down = self.isDown() and self.isEnabled()
        ground = Colour.INK if down else Colour.SHEET
        painter.fillRect(frame, self.look.colour(ground if self.isEnabled() else Colour.PAPER))
        if self._outlined:
            width = self.look.line(LineWidth.NARROW)
            painter.setPen(self.look.pen(Colour.INK2))
            painter.drawRect(frame.adjusted(width / 2, width / 2, -width / 2, -width / 2))
        words = Colour.PAPER if down else Colour.INK if self.isEnabled() else Colour.INK2
        painter.setPen(self.look.colour(words))
        self._paint_words(painter, frame)
        if self.isChecked():
            bar = self.look.line(LineWidth.HEAVY) * 1.5
            painter.fillRect(
                QRectF(0.0, frame.height() - bar, frame.width(), bar),
                self.look.colour(Colour.ACCENT),
            )
        if self.hasFocus():
            draw_focus(painter, frame, self.look)
        painter.end()

    def _paint_words(self, painter: QPainter, frame: QRectF) -> None:
        left = frame.left()
        room = frame.width() - 2.0 * _PADDING
        if self._hint:
            hint = self._hint_font()
            hint.setPixelSize(max(min(hint.pixelSize(), round(frame.height() * 0.46)), 8))
            painter.setFont(hint)
            advance = QFontMetricsF(painter.font()).horizontalAdvance(self._hint)
            base = frame.center().y() + QFontMetricsF(painter.font()).capHeight() / 2.0
            draw_at(painter, QPointF(frame.left() + _PADDING, base), self._hint)
            left += advance + _PADDING
            room -= advance + _PADDING
        font = self._font()
        tallest = round(frame.height() * KEY_WORDS_SHARE)
        font.setPixelSize(max(min(font.pixelSize(), tallest), 8))
        least = font.pixelSize() * _ONE_LINE_FROM
        one_line = fitted(font, [self.text()], width=room, least=least)
        if QFontMetricsF(one_line).horizontalAdvance(self.text()) <= room:
            font = one_line
        lines = wrapped(self.text(), font, width=room)
        step = font.pixelSize() * 1.15
        if len(lines) * step > frame.height() - 4.0:
            font.setPixelSize(max(int((frame.height() - 4.0) / len(lines) / 1.15), 8))
        font = fitted(font, lines, width=room)
        step = font.pixelSize() * 1.15
        painter.setFont(font)
        middle = left + (frame.right() - left) / 2.0
        base = frame.center().y() + QFontMetricsF(font).capHeight() / 2.0
        base -= step * (len(lines) - 1) / 2.0
        for line in lines:
            draw_at(painter, QPointF(middle, base), line, align=Qt.AlignmentFlag.AlignHCenter)
            base += step
