"""The ladder: every mark of the circle with its reading, its struck ones and its questions."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass

from PySide6.QtCore import QPointF, QRectF, QSize, Qt, Signal
from PySide6.QtGui import QFontMetricsF, QKeyEvent, QPainter, QPaintEvent, QResizeEvent
from PySide6.QtWidgets import QWidget

from app.frame.lettering import draw_at, draw_struck, fitted
from app.frame.look import Look
from app.frame.plain import PlainButton, PlainWidget, draw_focus, flat_painter
from app.frame.shapes import draw_verdict_shape
from reports.palette import Colour
from reports.sheet.medium import LineWidth, Size
from reports.sheet.pictures import VerdictKind
from reports.typeface import Weight

__all__ = ["Ladder", "Rung"]

_LEAST_HEIGHT = 44.0
_LEAST_OF_MARKS = 0.75


@dataclass(frozen=True, slots=True, kw_only=True)
class Rung:
    """One mark of the ladder.

    Attributes
    ----------
    mark : str
        Where it is read: "225°", "0° again".
    value : str
        The reading as it stands, or nothing.
    struck : tuple of str
        Earlier readings of this mark that were replaced, oldest first.
    questioned : bool
        Whether a question about it is open.
    active : bool
        Whether it is the one to read now.
    skipped : bool
        Whether there is no surface to read here.
    """

    mark: str
    value: str = ""
    struck: tuple[str, ...] = ()
    questioned: bool = False
    active: bool = False
    skipped: bool = False

    @property
    def spoken(self) -> str:
        """What the rung says to somebody who hears it."""
        said = self.value or ("no surface here" if self.skipped else "not read yet")
        parts = [f"{self.mark}: {said}"]
        if self.struck:
            parts.append("before it " + ", ".join(self.struck) + ", struck")
        if self.questioned:
            parts.append("questioned")
        if self.active:
            parts.append("to be read now")
        return "; ".join(parts)


class _RungKey(PlainButton):
    """One mark, to be clicked or walked to with the arrow keys."""

    def __init__(self, rung: Rung, *, look: Look, parent: Ladder) -> None:
        super().__init__(rung.mark, look=look, parent=parent)
        self.rung = rung
        self._ladder = parent
        self.setFocusPolicy(Qt.FocusPolicy.NoFocus)

    def show_rung(self, rung: Rung) -> None:
        self.rung = rung
        self.setText(rung.mark)
        self.setAccessibleName(rung.spoken)
        self.update()

    def keyPressEvent(self, event: QKeyEvent) -> None:
        """Walk along the ladder."""
        step = {Qt.Key.Key_Left: -1, Qt.Key.Key_Right: 1}.get(Qt.Key(event.key()))
        if step is not None:
            self._ladder.walk(self, step)
            return
        super().keyPressEvent(event)

    def paintEvent(self, event: QPaintEvent) -> None:
        """Paint reading, struck readings and question; the ladder paints the mark."""
        painter = flat_painter(self)
        look, rung = self.look, self.rung
        width = float(self.width())
        middle = width / 2.0
        centre = Qt.AlignmentFlag.AlignHCenter
        shrunk = self._ladder.shrinking()
        note = look.note_font(weight=Weight.SEMI_BOLD if rung.active else Weight.REGULAR)
        note.setPixelSize(max(round(note.pixelSize() * shrunk), 8))
        base = note.pixelSize() * 1.0
        base += look.size(Size.LEAD) * shrunk
        self._paint_value(painter, middle, base, shrunk)
        small = look.note_font()
        small.setPixelSize(note.pixelSize())
        painter.setFont(fitted(small, ["  ".join(rung.struck)], width=width - 6.0))
        painter.setPen(look.colour(Colour.INK2))
        base += note.pixelSize() * 1.05
        if rung.struck:
            draw_struck(
                painter,
                QPointF(middle, base),
                "  ".join(rung.struck),
                align=centre,
                rule=look.line(LineWidth.NARROW) * 1.5,
            )
        if self.hasFocus():
            draw_focus(painter, QRectF(self.rect()), look)
        painter.end()

    def _paint_value(self, painter: QPainter, middle: float, base: float, shrunk: float) -> None:
        look, rung = self.look, self.rung
        shown, colour, weight = rung.value, Colour.INK, Weight.MEDIUM
        size = Size.LEAD
        if not shown and rung.active:
            shown, colour, weight = "…", Colour.ACCENT, Weight.SEMI_BOLD
        elif not shown and rung.skipped:
            shown, colour, size = "none", Colour.INK2, Size.NOTE
        elif not shown:
            shown, colour = "—", Colour.HAIR
        font = look.font(look.size(size) * shrunk, weight=weight)
        shape = look.between(narrow=16.0, wide=20.0) if rung.questioned else 0.0
        gap = 4.0 if shape else 0.0
        font = fitted(font, [shown], width=self.width() - 2.0 - shape - gap)
        painter.setFont(font)
        painter.setPen(look.colour(colour))
        metrics = QFontMetricsF(font)
        whole = metrics.horizontalAdvance(shown) + gap + shape
        right = draw_at(painter, QPointF(middle - whole / 2.0, base), shown)
        if shape:
            centre = QPointF(right + gap + shape / 2.0, base - metrics.capHeight() / 2.0)
            draw_verdict_shape(painter, centre, shape, VerdictKind.LOOK, look)


class Ladder(PlainWidget):
    """The marks of the circle in the order they are read; `chosen` names the place in it."""

    chosen = Signal(int)

    def __init__(
        self,
        rungs: Sequence[Rung] = (),
        *,
        caption: str = "",
        look: Look | None = None,
        parent: QWidget | None = None,
    ) -> None:
        super().__init__(name="Readings of this station", look=look, parent=parent)
        self._keys: list[_RungKey] = []
        self._caption = caption
        self.set_rungs(rungs)

    @property
    def rungs(self) -> tuple[Rung, ...]:
        """What the ladder shows."""
        return tuple(key.rung for key in self._keys)

    @property
    def caption(self) -> str:
        """The line under the ladder: unit, indicator, sense."""
        return self._caption

    def set_caption(self, caption: str) -> None:
        """Say under the ladder in what the readings are written.

        Parameters
        ----------
        caption : str
            Unit, indicator, sense.
        """
        self._caption = caption
        self.setAccessibleDescription(caption)
        self.update()

    def set_rungs(self, rungs: Sequence[Rung]) -> None:
        """Show other marks or other readings.

        Parameters
        ----------
        rungs : sequence of Rung
            In the order they are read.
        """
        while len(self._keys) > len(rungs):
            key = self._keys.pop()
            key.hide()
            key.deleteLater()
        while len(self._keys) < len(rungs):
            key = _RungKey(rungs[len(self._keys)], look=self._look, parent=self)
            place = len(self._keys)
            key.clicked.connect(lambda _checked=False, place=place: self.chosen.emit(place))
            key.show()
            self._keys.append(key)
        stop = next((place for place, rung in enumerate(rungs) if rung.active), 0)
        for place, (key, rung) in enumerate(zip(self._keys, rungs, strict=True)):
            key.show_rung(rung)
            if not key.hasFocus():
                key.setFocusPolicy(
                    Qt.FocusPolicy.TabFocus if place == stop else Qt.FocusPolicy.NoFocus
                )
        self._place()

    def walk(self, key: QWidget, step: int) -> None:
        """Move the keyboard to the neighbour of a mark.

        Parameters
        ----------
        key : QWidget
            The mark that has it.
        step : int
            -1 towards the first, 1 towards the last [-].
        """
        place = next(index for index, other in enumerate(self._keys) if other is key) + step
        if 0 <= place < len(self._keys):
            self._keys[place].setFocus(Qt.FocusReason.OtherFocusReason)

    def _paint_marks(self, painter: QPainter) -> None:
        if not self._keys:
            return
        full = self._look.note_font(weight=Weight.SEMI_BOLD)
        full.setPixelSize(max(round(full.pixelSize() * self.shrinking()), 8))
        base = float(full.pixelSize())
        room = self.width() / len(self._keys) - 2.0
        marks = [key.rung.mark for key in self._keys]
        every = 1
        size = fitted(full, marks, width=room).pixelSize()
        if size < _LEAST_OF_MARKS * full.pixelSize():
            # Overfull: every second mark goes unnamed, so that the others can be read.
            every = 2
            size = fitted(full, marks[::2], width=1.9 * room).pixelSize()
        active = next((at for at, key in enumerate(self._keys) if key.rung.active), None)
        for place, key in enumerate(self._keys):
            crowded = active is not None and every > 1 and abs(place - active) == 1
            if place != active and (place % every or crowded):
                continue
            weight = Weight.SEMI_BOLD if place == active else Weight.REGULAR
            font = self._look.note_font(weight=weight)
            font.setPixelSize(size)
            painter.setFont(font)
            painter.setPen(self._look.colour(Colour.ACCENT if place == active else Colour.INK2))
            middle = key.geometry().left() + key.width() / 2.0
            advance = QFontMetricsF(font).horizontalAdvance(key.rung.mark)
            middle = min(max(middle, advance / 2.0), self.width() - advance / 2.0)
            draw_at(
                painter, QPointF(middle, base), key.rung.mark, align=Qt.AlignmentFlag.AlignHCenter
            )

    def _place(self) -> None:
        if not self._keys:
            return
        pitch = self.width() / len(self._keys)
        height = round(self._rung_height() * self.shrinking())
        for place, key in enumerate(self._keys):
            left, right = round(place * pitch), round((place + 1) * pitch)
            key.setGeometry(left, 0, right - left, height)
        self.update()

    def _rung_height(self) -> float:
        rows = self._look.size(Size.NOTE) * 2.3 + self._look.size(Size.LEAD)
        return max(rows, _LEAST_HEIGHT)

    def _caption_height(self) -> float:
        return self._look.size(Size.NOTE) * 1.25

    def shrinking(self) -> float:
        """Give the share to which the rows shrink where the ladder has less room than it asks for.

        Returns
        -------
        float
            At most 1 [-].
        """
        return min(1.0, self.height() / (self._rung_height() + self._caption_height()))

    def look_changed(self) -> None:
        """Make room for the scaled figures."""
        self._place()

    def sizeHint(self) -> QSize:
        """Room for marks, readings, struck readings and the caption."""
        return QSize(
            round(self._look.between(narrow=608.0, wide=872.0)),
            round(self._rung_height() + self._caption_height()),
        )

    def resizeEvent(self, event: QResizeEvent) -> None:
        """Share the width among the marks."""
        super().resizeEvent(event)
        self._place()

    def paintEvent(self, event: QPaintEvent) -> None:
        """Paint the marks and the caption."""
        painter = flat_painter(self)
        self._paint_marks(painter)
        font = self._look.note_font()
        font.setPixelSize(max(round(font.pixelSize() * self.shrinking()), 8))
        font = fitted(font, [self._caption], width=float(self.width()))
        painter.setFont(font)
        painter.setPen(self._look.colour(Colour.INK2))
        draw_at(painter, QPointF(0.0, self.height() - font.pixelSize() * 0.3), self._caption)
        painter.end()
