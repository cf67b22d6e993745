"""Trouble in words: what, where, and the way out, with a key where there is one."""

from __future__ import annotations

from dataclasses import dataclass

from PySide6.QtCore import QPointF, QRectF, QSize, Signal
from PySide6.QtGui import QFont, QPaintEvent, QResizeEvent
from PySide6.QtWidgets import QWidget

from app.frame.key import Key
from app.frame.lettering import draw_at, line_step, wrapped
from app.frame.look import Look
from app.frame.plain import PlainWidget, announce, flat_painter
from reports.palette import Colour
from reports.sheet.medium import LineWidth, Size
from reports.typeface import Weight

__all__ = ["Message", "MessageStrip"]

_PADDING = 16.0


@dataclass(frozen=True, slots=True, kw_only=True)
class Message:
    """Something that went wrong around the work, or has to be known.

    Attributes
    ----------
    what, where, way_out : str
        The thing, its place or value, and what to do about it.
    key : str
        Words on the key that goes the way out, or nothing.
    trouble : bool
        Whether it stops the work; otherwise it is only said.
    """

    what: str
    where: str = ""
    way_out: str = ""
    key: str = ""
    trouble: bool = True

    @property
    def spoken(self) -> str:
        """The message as one text."""
        return " ".join(part for part in (self.what, self.where, self.way_out) if part)


class MessageStrip(PlainWidget):
    """A strip with a solid edge; it stays until the way out is taken or it is put away."""

    way_out_taken = Signal()
    put_away = Signal()

    def __init__(self, *, look: Look | None = None, parent: QWidget | None = None) -> None:
        super().__init__(name="Message", look=look, parent=parent)
        self._message: Message | None = None
        self._key = Key("", look=self._look, parent=self)
        self._key.clicked.connect(lambda: self.way_out_taken.emit())
        self._away = Key("Put away", look=self._look, parent=self)
        self._away.clicked.connect(self._put_away)
        self.set_message(None)

    @property
    def message(self) -> Message | None:
        """What is said."""
        return self._message

    def set_message(self, message: Message | None) -> None:
        """Say something, or nothing.

        Parameters
        ----------
        message : Message or None
            What, where and the way out.
        """
        self._message = message
        self.setVisible(message is not None)
        if message is None:
            announce(self, "")
            return
        self._key.set_words(message.key)
        self._key.setVisible(bool(message.key))
        self._away.setVisible(not message.trouble)
        self.setAccessibleName("Trouble" if message.trouble else "Message")
        announce(self, message.spoken)
        self._place()
        self.updateGeometry()

    def _put_away(self) -> None:
        self.set_message(None)
        self.put_away.emit()

    def _edge(self) -> float:
        return self._look.line(LineWidth.HEAVY) * 2.5

    def _keys_width(self) -> float:
        keys = [key for key in (self._away, self._key) if not key.isHidden()]
        return sum(key.sizeHint().width() + _PADDING for key in keys)

    def _lines(self, width: float) -> list[tuple[str, QFont]]:
        message = self._message
        if message is None:
            return []
        room = width - self._edge() - 2.0 * _PADDING - self._keys_width()
        head = self._look.font(Size.TEXT, weight=Weight.SEMI_BOLD)
        body = self._look.font(Size.TEXT)
        rest = " ".join(part for part in (message.where, message.way_out) if part)
        lines = [(line, head) for line in wrapped(message.what, head, width=room)]
        if rest:
            lines += [(line, body) for line in wrapped(rest, body, width=room)]
        return lines

    def heightForWidth(self, width: int) -> int:
        """Give the height the words need at a width."""
        step = line_step(self._look.font(Size.TEXT))
        return round(max(len(self._lines(width)) * step + _PADDING, self._look.touch + _PADDING))

    def sizeHint(self) -> QSize:
        """Give the whole width, and the height its words need."""
        width = self.width() if self.isVisible() else round(self._look.window_width)
        return QSize(width, self.heightForWidth(width))

    def look_changed(self) -> None:
        """Place the keys for the new scale."""
        self._place()

    def resizeEvent(self, event: QResizeEvent) -> None:
        """Place the keys at the right."""
        super().resizeEvent(event)
        self._place()

    def _place(self) -> None:
        right = self.width() - _PADDING
        for key in (self._key, self._away):
            if key.isHidden():
                continue
            size = key.sizeHint()
            top = (self.height() - size.height()) / 2.0
            key.setGeometry(round(right - size.width()), round(top), size.width(), size.height())
            right -= size.width() + _PADDING
        self.update()

    def paintEvent(self, event: QPaintEvent) -> None:
        """Paint the edge and the words."""
        if self._message is None:
            return
        painter = flat_painter(self)
        look = self._look
        painter.fillRect(self.rect(), look.colour(Colour.PAPER))
        edge = Colour.STOP if self._message.trouble else Colour.INK
        painter.fillRect(QRectF(0.0, 0.0, self._edge(), self.height()), look.colour(edge))
        thin = look.line(LineWidth.NARROW)
        for top in (0.0, self.height() - thin):
            painter.fillRect(QRectF(0.0, top, self.width(), thin), look.colour(Colour.INK2))
        lines = self._lines(self.width())
        step = line_step(look.font(Size.TEXT))
        base = (self.height() - step * len(lines)) / 2.0 + step * 0.76
        painter.setPen(look.colour(Colour.INK))
        for line, font in lines:
            painter.setFont(font)
            draw_at(painter, QPointF(self._edge() + _PADDING, base), line)
            base += step
        painter.end()
