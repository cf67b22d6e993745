"""The verdict beside the readings, and across the whole band when the survey is done."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass

from PySide6.QtCore import QPointF, QRectF, QSize, Signal
from PySide6.QtGui import QFont, QFontMetricsF, QPainter, QPaintEvent, QResizeEvent
from PySide6.QtWidgets import QWidget

from app.frame.key import Key
from app.frame.lettering import draw_at, draw_lines, fitted, line_step, wrapped
from app.frame.look import Look
from app.frame.plain import PlainButton, PlainWidget, announce, draw_focus, flat_painter
from app.frame.shapes import draw_verdict_shape, shape_words
from reports.palette import Colour
from reports.sheet.medium import Size
from reports.sheet.pictures import VerdictKind
from reports.typeface import Weight

__all__ = ["ShownVerdict", "VerdictBand", "VerdictPane"]

_MARGIN = 12.0
_INSET = 10.0
_MOST_LINES_BESIDE = 2
_HEAD_SHARE = 0.66
_SHAPE_GROWTH_FAR = 1.4
_WORD_SHARE = 0.16
_WORD_SHARE_FAR = 0.21


@dataclass(frozen=True, slots=True, kw_only=True)
class ShownVerdict:
    """A verdict as it is shown: always a shape, a phrase and a sentence.

    Attributes
    ----------
    kind : VerdictKind
        Which of the three, or none yet.
    phrase : str
        The words: "Look again", "Not judged yet".
    sentences : tuple of str
        Place, value, limit and ± first; at most two.
    facts : tuple of str
        Small facts: how far the survey is; at the end station, amount and angle, and so on.
    """

    kind: VerdictKind
    phrase: str
    sentences: tuple[str, ...] = ()
    facts: tuple[str, ...] = ()

    @property
    def spoken(self) -> str:
        """The verdict as one text, for somebody who hears it."""
        return ". ".join(
            part.rstrip(".") for part in (self.phrase, *self.sentences, *self.facts) if part
        )


class VerdictPane(PlainButton):
    """The verdict while readings come in; a click or Enter opens where it comes from."""

    opened = Signal()

    def __init__(
        self,
        verdict: ShownVerdict,
        *,
        look: Look | None = None,
        parent: QWidget | None = None,
    ) -> None:
        super().__init__(verdict.phrase, look=look, parent=parent)
        self._verdict = verdict
        self.clicked.connect(lambda: self.opened.emit())
        self.set_verdict(verdict)

    @property
    def verdict(self) -> ShownVerdict:
        """What is shown."""
        return self._verdict

    def set_verdict(self, verdict: ShownVerdict) -> None:
        """Show another verdict.

        Parameters
        ----------
        verdict : ShownVerdict
            Shape, phrase, sentences and facts.
        """
        self._verdict = verdict
        self.setText(verdict.phrase)
        self.setAccessibleName(f"Verdict: {verdict.phrase}; opens the reasons")
        announce(self, verdict.spoken)
        self.setToolTip(shape_words(verdict.kind))
        self.update()

    def sizeHint(self) -> QSize:
        """Width and height of its place beside the dial."""
        return QSize(
            round(self.look.between(narrow=300.0, wide=462.0)),
            round(self.look.between(narrow=337.0, wide=427.0)),
        )

    def paintEvent(self, event: QPaintEvent) -> None:
        """Paint shape, phrase, sentences and facts; what does not fit opens."""
        painter = flat_painter(self)
        width = self.width() - 2.0 * _INSET
        painter.translate(_INSET, 0.0)
        top = self._paint_head(painter, width)
        bottom = self._paint_facts(painter, width)
        self._paint_sentences(painter, top, bottom, width)
        painter.translate(-_INSET, 0.0)
        if self.hasFocus():
            draw_focus(painter, QRectF(self.rect()), self.look)
        painter.end()

    def _paint_head(self, painter: QPainter, width: float) -> float:
        look, verdict = self.look, self._verdict
        painter.setPen(look.colour(Colour.INK))
        shape = look.between(narrow=104.0, wide=120.0) * (_SHAPE_GROWTH_FAR if look.far else 1.0)
        shape = min(shape, self.height() * 0.34, width * 0.4)
        # Grown type takes no more of the pane than it has, so that the sentence keeps its room.
        font = look.font(Size.WORD, weight=Weight.SEMI_BOLD)
        share = _WORD_SHARE_FAR if look.far else _WORD_SHARE
        font.setPixelSize(max(min(font.pixelSize(), round(self.height() * share)), 8))
        left = shape + 14.0
        lines = wrapped(verdict.phrase, font, width=width - left)
        widest = max(QFontMetricsF(font).horizontalAdvance(line) for line in lines)
        if widest <= width - left and len(lines) <= _MOST_LINES_BESIDE:
            centre = QPointF(shape / 2.0, _MARGIN + shape / 2.0)
            draw_verdict_shape(painter, centre, shape, verdict.kind, look)
            painter.setFont(font)
            capital = QFontMetricsF(font).capHeight()
            step = font.pixelSize() * 0.96
            base = centre.y() + (capital - step * (len(lines) - 1)) / 2.0
            base = max(base, _MARGIN + capital)
            for line in lines:
                draw_at(painter, QPointF(left, base), line)
                base += step
            return max(_MARGIN + shape, base - step + font.pixelSize() * 0.3) + 8.0
        shape *= 0.88
        centre = QPointF(shape / 2.0, _MARGIN + shape / 2.0)
        draw_verdict_shape(painter, centre, shape, verdict.kind, look)
        font = fitted(font, verdict.phrase.split(" "), width=width)
        room = self.height() * _HEAD_SHARE - _MARGIN - shape
        while font.pixelSize() > 8 and font.pixelSize() * 0.98 * len(
            wrapped(verdict.phrase, font, width=width)
        ) > max(room, 10.0):
            font.setPixelSize(font.pixelSize() - 1)
        painter.setFont(font)
        step = font.pixelSize() * 0.98
        base = _MARGIN + shape + step * 0.9
        for line in wrapped(verdict.phrase, font, width=width):
            draw_at(painter, QPointF(0.0, base), line)
            base += step
        return base - step + font.pixelSize() * 0.34

    def _paint_facts(self, painter: QPainter, width: float) -> float:
        font = self.look.note_font()
        font.setPixelSize(max(min(font.pixelSize(), round(self.height() * 0.068)), 8))
        painter.setFont(font)
        painter.setPen(self.look.colour(Colour.INK2))
        step = font.pixelSize() * 1.2
        lines = [
            line
            for fact in self._verdict.facts
            for line in wrapped(fact, painter.font(), width=width, most=2)
        ]
        top = self.height() - step * len(lines) - 6.0
        for place, line in enumerate(lines):
            draw_at(painter, QPointF(0.0, top + step * place + step * 0.68), line)
        return top - 4.0

    def _height_of_sentences(self, font: QFont, width: float) -> float:
        lines = [wrapped(text, font, width=width) for text in self._verdict.sentences]
        between = max(len(lines) - 1, 0) * 0.35
        return line_step(font) * (sum(len(part) for part in lines) + between)

    def _paint_sentences(self, painter: QPainter, top: float, bottom: float, width: float) -> None:
        font = self.look.font(Size.TEXT)
        smallest = self.look.size(Size.NOTE) / max(self.look.text_scale, 1.0) * 0.8
        while font.pixelSize() > smallest and self._height_of_sentences(font, width) > bottom - top:
            font.setPixelSize(font.pixelSize() - 1)
        painter.setFont(font)
        painter.setPen(self.look.colour(Colour.INK))
        step = line_step(font)
        for sentence in self._verdict.sentences:
            room = int((bottom - top) / step)
            if room < 1:
                return
            lines = wrapped(sentence, painter.font(), width=width, most=room)
            top = draw_lines(painter, 0.0, top, lines) + step * 0.35


class VerdictBand(PlainWidget):
    """The verdict at the end of a survey, across the whole band, with a key for what is next."""

    went_on = Signal()
    opened = Signal()

    def __init__(
        self,
        verdict: ShownVerdict,
        *,
        next_words: str,
        look: Look | None = None,
        parent: QWidget | None = None,
    ) -> None:
        super().__init__(name="Verdict", look=look, parent=parent)
        self._verdict = verdict
        self._next = Key(next_words, size=Size.LEAD, look=self._look, parent=self)
        self._next.clicked.connect(lambda: self.went_on.emit())
        self._reasons = Key("Reasons", look=self._look, parent=self)
        self._reasons.clicked.connect(lambda: self.opened.emit())
        self.set_verdict(verdict, next_words=next_words)

    @property
    def verdict(self) -> ShownVerdict:
        """What is shown."""
        return self._verdict

    def set_verdict(self, verdict: ShownVerdict, *, next_words: str) -> None:
        """Show another verdict.

        Parameters
        ----------
        verdict : ShownVerdict
            Shape, phrase, sentences and three facts.
        next_words : str
            The key for what is next.
        """
        self._verdict = verdict
        self._next.set_words(next_words)
        self.setAccessibleName(f"Verdict: {verdict.phrase}")
        announce(self, verdict.spoken)
        self._place()

    def look_changed(self) -> None:
        """Place the keys for the new scale."""
        self._place()

    def sizeHint(self) -> QSize:
        """Give the middle band of the bench."""
        return QSize(
            round(self._look.between(narrow=1232.0, wide=1856.0)),
            round(self._look.between(narrow=337.0, wide=427.0)),
        )

    def resizeEvent(self, event: QResizeEvent) -> None:
        """Place the keys."""
        super().resizeEvent(event)
        self._place()

    def _shape(self) -> float:
        return min(self._look.between(narrow=160.0, wide=190.0), self.height() * 0.48)

    def _place(self) -> None:
        height = round(self._look.between(narrow=80.0, wide=96.0))
        wide = round(
            min(max(self._next.sizeHint().width() * 1.2, self.width() * 0.26), self.width() * 0.32)
        )
        top = self.height() - height - 8
        self._next.setGeometry(self.width() - wide, top, wide, height)
        other = max(self._reasons.sizeHint().width(), round(wide * 0.4))
        self._reasons.setGeometry(self.width() - wide - other - 16, top, other, height)
        self.update()

    def paintEvent(self, event: QPaintEvent) -> None:
        """Paint the shape, the word and the facts."""
        painter = flat_painter(self)
        shape, look = self._shape(), self._look
        draw_verdict_shape(
            painter, QPointF(shape / 2.0, 16.0 + shape / 2.0), shape, self._verdict.kind, look
        )
        left = shape + 32.0
        room = self.width() - left
        font = look.font(Size.MARK, weight=Weight.SEMI_BOLD)
        font.setPixelSize(max(min(font.pixelSize(), round(self.height() * 0.32)), 8))
        font = fitted(font, [self._verdict.phrase], width=room)
        painter.setFont(font)
        painter.setPen(look.colour(Colour.INK))
        base = 16.0 + QFontMetricsF(font).capHeight() + 4.0
        draw_at(painter, QPointF(left, base), self._verdict.phrase)
        painter.setFont(self._text_font(Weight.REGULAR))
        top = base + font.pixelSize() * 0.26
        for sentence in self._verdict.sentences[:2]:
            lines = wrapped(sentence, painter.font(), width=room, most=2)
            top = draw_lines(painter, left, top, lines)
        self._paint_facts(painter, max(top, 16.0 + shape) + 8.0)
        painter.end()

    def _text_font(self, weight: Weight) -> QFont:
        font = self._look.font(Size.TEXT, weight=weight)
        font.setPixelSize(max(min(font.pixelSize(), round(self.height() * 0.082)), 8))
        return font

    def _paint_facts(self, painter: QPainter, top: float) -> None:
        facts: Sequence[str] = self._verdict.facts[:3]
        if not facts:
            return
        right = self._reasons.geometry().left() - 24.0
        font = self._text_font(Weight.MEDIUM)
        font = fitted(font, facts, width=right, least=font.pixelSize() * 0.72)
        painter.setFont(font)
        room = max(int((self.height() - top) / line_step(font)), 1)
        each = max(room // len(facts), 1)
        for fact in facts:
            lines = wrapped(fact, font, width=right, most=each)
            top = draw_lines(painter, 0.0, top, lines)
