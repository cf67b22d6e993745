"""The foot of the bench: the title block with the stages, and four keys as high as the foot."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass

from PySide6.QtCore import QPointF, QRectF, QSize, Qt, Signal
from PySide6.QtGui import QFontMetricsF, QPainter, QPaintEvent, QResizeEvent
from PySide6.QtWidgets import QWidget

from app.frame.key import Key
from app.frame.lettering import draw_at
from app.frame.look import Look
from app.frame.plain import PlainWidget, flat_painter
from reports.palette import Colour
from reports.sheet.medium import LineWidth, Size
from reports.typeface import Weight

__all__ = ["STAGES", "FootKey", "FootKeys", "TitleBlock", "TitleLine"]

STAGES = ("Sizes", "Fit", "Heat", "Mount", "Cool", "Runout", "Balance", "Settled")
"""The stages of a step, in plain words."""


@dataclass(frozen=True, slots=True, kw_only=True)
class TitleLine:
    """What the title block says.

    Attributes
    ----------
    rotor, job, step, plan : str
        Each as it is written: "R-0418 (invented)", "7 of 13, attempt 1", "B".
    written : str
        When the last entry was written, hh:mm:ss, or nothing yet.
    stage : str
        The present stage, one of the stages, or nothing.
    """

    rotor: str = ""
    job: str = ""
    step: str = ""
    plan: str = ""
    written: str = ""
    stage: str = ""

    @property
    def pairs(self) -> tuple[tuple[str, str], ...]:
        """Words and what they name, without those that are empty."""
        named = (("Rotor", self.rotor), ("Job", self.job), ("Step", self.step), ("Plan", self.plan))
        return tuple((word, value) for word, value in named if value)


class TitleBlock(PlainWidget):
    """The title block of the sheet: which rotor, job, step and plan, and the stages below."""

    def __init__(
        self,
        title: TitleLine | None = None,
        *,
        stages: Sequence[str] = STAGES,
        look: Look | None = None,
        parent: QWidget | None = None,
    ) -> None:
        super().__init__(name="Title block", look=look, parent=parent)
        self._stages = tuple(stages)
        self._title = TitleLine()
        self.set_title(title or TitleLine())

    @property
    def title(self) -> TitleLine:
        """What is written."""
        return self._title

    def set_title(self, title: TitleLine) -> None:
        """Write another title.

        Parameters
        ----------
        title : TitleLine
            Rotor, job, step, plan, time and stage.
        """
        self._title = title
        said = [f"{word} {value}" for word, value in title.pairs]
        if title.written:
            said.append(f"written {title.written}")
        if title.stage:
            said.append(f"stage {title.stage}")
        self.setAccessibleName("Title block: " + ", ".join(said))
        self.update()

    def sizeHint(self) -> QSize:
        """Its place at the foot, left."""
        return QSize(
            round(self._look.between(narrow=768.0, wide=1160.0)),
            round(self._look.between(narrow=80.0, wide=96.0)),
        )

    def paintEvent(self, event: QPaintEvent) -> None:
        """Paint both lines and what parts them."""
        painter = flat_painter(self)
        look = self._look
        painter.fillRect(self.rect(), look.colour(Colour.PAPER))
        middle = self.height() / 2.0
        painter.setPen(look.pen(Colour.HAIR))
        painter.drawLine(QPointF(0.0, middle), QPointF(float(self.width()), middle))
        edge = look.line(LineWidth.WIDE)
        painter.fillRect(QRectF(0.0, 0.0, self.width(), edge), look.colour(Colour.INK))
        self._paint_title(painter, middle)
        self._paint_stages(painter, middle)
        painter.end()

    def _left(self) -> float:
        return self._look.between(narrow=24.0, wide=32.0)

    def _shrink(self, needed: float) -> float:
        return min(1.0, (self.width() - 2.0 * self._left() + 8.0) / needed) if needed else 1.0

    def _paint_title(self, painter: QPainter, middle: float) -> None:
        look = self._look
        condensed = look.window_width < 1920.0
        least_gap = 12.0
        size = min(look.size(Size.NOTE), middle * 0.62)
        written = f"written {self._title.written}" if self._title.written else ""

        def width_at(pixels: float) -> float:
            word = QFontMetricsF(look.font(pixels, condensed=condensed))
            value = QFontMetricsF(look.font(pixels, weight=Weight.SEMI_BOLD, condensed=condensed))
            total = word.horizontalAdvance(written)
            for label, text in self._title.pairs:
                total += word.horizontalAdvance(f"{label} ") + value.horizontalAdvance(text)
            return total

        gaps = len(self._title.pairs)
        room = self.width() - self._left() - 14.0
        while size > 8.0 and width_at(size) + gaps * least_gap > room:
            size -= 1.0
        gap = min((room - width_at(size)) / gaps, size * 1.2) if gaps else 0.0
        plain = look.font(size, condensed=condensed)
        bold = look.font(size, weight=Weight.SEMI_BOLD, condensed=condensed)
        base = middle / 2.0 + QFontMetricsF(plain).capHeight() / 2.0 + 2.0
        left = self._left()
        for label, text in self._title.pairs:
            painter.setFont(plain)
            painter.setPen(look.colour(Colour.INK2))
            left = draw_at(painter, QPointF(left, base), f"{label} ")
            painter.setFont(bold)
            painter.setPen(look.colour(Colour.INK))
            left = draw_at(painter, QPointF(left, base), text) + gap
        painter.setFont(plain)
        painter.setPen(look.colour(Colour.INK2))
        right = QPointF(self.width() - 14.0, base)
        draw_at(painter, right, written, align=Qt.AlignmentFlag.AlignRight)

    def _paint_stages(self, painter: QPainter, middle: float) -> None:
        look = self._look
        condensed = look.window_width < 1920.0
        size = min(look.size(Size.NOTE), middle * 0.62)
        gap = look.between(narrow=20.0, wide=32.0)
        bold = look.font(size, weight=Weight.SEMI_BOLD, condensed=condensed)
        needed = sum(QFontMetricsF(bold).horizontalAdvance(stage) for stage in self._stages)
        needed += gap * (len(self._stages) - 1)
        size *= self._shrink(needed)
        gap *= self._shrink(needed)
        plain = look.font(size, condensed=condensed)
        bold = look.font(size, weight=Weight.SEMI_BOLD, condensed=condensed)
        base = middle * 1.5 + QFontMetricsF(plain).capHeight() / 2.0 - 1.0
        left = self._left()
        for stage in self._stages:
            present = stage == self._title.stage
            painter.setFont(bold if present else plain)
            painter.setPen(look.colour(Colour.INK if present else Colour.INK2))
            right = draw_at(painter, QPointF(left, base), stage)
            if present:
                bar = look.line(LineWidth.HEAVY) * 0.75
                painter.fillRect(
                    QRectF(left, base + size * 0.3, right - left, bar),
                    look.colour(Colour.ACCENT),
                )
            left = right + gap


@dataclass(frozen=True, slots=True, kw_only=True)
class FootKey:
    """One key of the foot.

    Attributes
    ----------
    name : str
        How the page knows it.
    words : str
        What it says.
    enabled : bool
        Whether it can be pressed now.
    """

    name: str
    words: str
    enabled: bool = True


class FootKeys(PlainWidget):
    """Keys side by side that fill the foot, with no gap to miss."""

    pressed = Signal(str)

    def __init__(
        self,
        keys: Sequence[FootKey] = (),
        *,
        look: Look | None = None,
        parent: QWidget | None = None,
    ) -> None:
        super().__init__(name="Keys", look=look, parent=parent)
        self._keys: list[Key] = []
        self._names: list[str] = []
        self.set_keys(keys)

    def set_keys(self, keys: Sequence[FootKey]) -> None:
        """Offer other keys.

        Parameters
        ----------
        keys : sequence of FootKey
            From left to right, four on the bench.
        """
        while len(self._keys) > len(keys):
            key = self._keys.pop()
            key.hide()
            key.deleteLater()
        while len(self._keys) < len(keys):
            key = Key("", outlined=False, look=self._look, parent=self)
            place = len(self._keys)
            key.clicked.connect(lambda _checked=False, place=place: self._press(place))
            key.show()
            self._keys.append(key)
        self._names = [offered.name for offered in keys]
        for key, offered in zip(self._keys, keys, strict=True):
            key.set_words(offered.words)
            key.setObjectName(offered.name)
            key.setEnabled(offered.enabled)
        self._place()

    def key(self, name: str) -> Key:
        """Find a key.

        Parameters
        ----------
        name : str
            How the page knows it.

        Returns
        -------
        Key
            The key itself.
        """
        return self._keys[self._names.index(name)]

    def _press(self, place: int) -> None:
        self.pressed.emit(self._names[place])

    def sizeHint(self) -> QSize:
        """Its place at the foot, right."""
        return QSize(
            round(self._look.between(narrow=512.0, wide=760.0)),
            round(self._look.between(narrow=80.0, wide=96.0)),
        )

    def _place(self) -> None:
        if not self._keys:
            return
        edge = round(self._look.line(LineWidth.WIDE))
        pitch = (self.width() - edge) / len(self._keys)
        for place, key in enumerate(self._keys):
            left = edge + round(place * pitch)
            right = edge + round((place + 1) * pitch) - (edge if place < len(self._keys) - 1 else 0)
            key.setGeometry(left, edge, right - left, self.height() - edge)
        self.update()

    def look_changed(self) -> None:
        """Place the keys for the new line widths."""
        self._place()

    def resizeEvent(self, event: QResizeEvent) -> None:
        """Share the width among the keys."""
        super().resizeEvent(event)
        self._place()

    def paintEvent(self, event: QPaintEvent) -> None:
        """Paint the lines between the keys and above them."""
        painter = flat_painter(self)
        painter.fillRect(self.rect(), self._look.colour(Colour.INK))
        painter.end()
