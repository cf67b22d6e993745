"""The prompt: the mark to read now, readable at three metres, with its reason beside it."""

from __future__ import annotations

from dataclasses import dataclass

from PySide6.QtCore import QPointF, QSize
from PySide6.QtGui import QFont, QFontMetricsF, QPainter, QPaintEvent
from PySide6.QtWidgets import QWidget

from app.frame.lettering import draw_at, fitted
from app.frame.look import Look
from app.frame.plain import PlainWidget, announce, flat_painter
from reports.palette import Colour
from reports.sheet.medium import Size
from reports.typeface import Weight

__all__ = ["Prompt", "PromptBlock"]

_GREATEST_SHARE = 0.58
_GAP = 28.0


@dataclass(frozen=True, slots=True, kw_only=True)
class Prompt:
    """The one thing to do now.

    Attributes
    ----------
    mark : str
        The huge word: "225°", "0° again", "hub".
    head : str
        What it is: "S8, shaft beside impeller 4".
    lines : tuple of str
        Where one is and what was read before; at most two.
    """

    mark: str
    head: str = ""
    lines: tuple[str, ...] = ()

    @property
    def spoken(self) -> str:
        """The prompt as one text, for somebody who hears it."""
        return "; ".join(part for part in (self.mark, self.head, *self.lines) if part)


def _no_taller(font: QFont, text: str, *, height: float) -> QFont:
    inked = QFontMetricsF(font).tightBoundingRect(text).height()
    if inked > height > 0.0:
        font.setPixelSize(max(int(font.pixelSize() * height / inked), 8))
    return font


class PromptBlock(PlainWidget):
    """The mark at a size for three metres, and up to three lines beside it."""

    def __init__(
        self, prompt: Prompt, *, look: Look | None = None, parent: QWidget | None = None
    ) -> None:
        super().__init__(name="Now", look=look, parent=parent)
        self._prompt = prompt
        self.set_prompt(prompt)

    @property
    def prompt(self) -> Prompt:
        """What is asked."""
        return self._prompt

    def set_prompt(self, prompt: Prompt) -> None:
        """Ask for something else.

        Parameters
        ----------
        prompt : Prompt
            The mark and its lines.
        """
        self._prompt = prompt
        self.setAccessibleName(f"Now: {prompt.mark}")
        announce(self, prompt.spoken)
        self.update()

    def sizeHint(self) -> QSize:
        """Room for the mark at its full size."""
        return QSize(
            round(self._look.between(narrow=608.0, wide=872.0)),
            round(self._look.size(Size.MARK) * 1.04),
        )

    def paintEvent(self, event: QPaintEvent) -> None:
        """Paint the mark and the lines."""
        painter = flat_painter(self)
        look = self._look
        font = look.font(Size.MARK, weight=Weight.MEDIUM)
        font.setPixelSize(min(font.pixelSize(), max(round(self.height() / 0.8), 8)))
        font = fitted(font, [self._prompt.mark], width=self.width() * _GREATEST_SHARE)
        painter.setFont(font)
        painter.setPen(look.colour(Colour.INK))
        font = _no_taller(font, self._prompt.mark, height=float(self.height()))
        painter.setFont(font)
        inked = QFontMetricsF(font).tightBoundingRect(self._prompt.mark)
        # Middle of what is inked: a tail as in "again" would leave the block below.
        base = (self.height() - inked.height()) / 2.0 - inked.top()
        right = draw_at(painter, QPointF(2.0, base), self._prompt.mark)
        self._paint_lines(painter, right + _GAP)
        painter.end()

    def _paint_lines(self, painter: QPainter, left: float) -> None:
        look = self._look
        texts = [text for text in (self._prompt.head, *self._prompt.lines) if text][:3]
        room = self.width() - left
        size = look.size(Size.TEXT)
        step = size * 1.1
        if step * len(texts) > self.height():
            size *= self.height() / (step * len(texts))
            step = size * 1.1
        base = (self.height() - step * len(texts)) / 2.0 + step * 0.78
        heavy = look.font(size, weight=Weight.SEMI_BOLD)
        widest = max((QFontMetricsF(heavy).horizontalAdvance(text) for text in texts), default=0.0)
        condensed = widest > room
        size = min(
            fitted(
                look.font(size, weight=Weight.SEMI_BOLD, condensed=condensed),
                texts,
                width=room,
                least=12.0,
            ).pixelSize(),
            size,
        )
        for text in texts:
            head = text == self._prompt.head
            weight = Weight.SEMI_BOLD if head else Weight.REGULAR
            painter.setFont(look.font(float(size), weight=weight, condensed=condensed))
            painter.setPen(look.colour(Colour.INK if head else Colour.INK2))
            draw_at(painter, QPointF(left, base), text)
            base += step
