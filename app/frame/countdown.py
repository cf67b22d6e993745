"""The drop window: how long the part still goes over its seat, counted on the cautious end."""

from __future__ import annotations

import math
import time
from collections.abc import Callable
from dataclasses import dataclass

from PySide6.QtCore import QPointF, QSize, QTimer, Signal
from PySide6.QtGui import QFontMetricsF, QPainter, QPaintEvent, QResizeEvent
from PySide6.QtWidgets import QWidget

from app.drawing.painter import paint_sheet
from app.frame.key import Key
from app.frame.lettering import draw_at, fitted
from app.frame.look import Look
from app.frame.plain import PlainWidget, announce, flat_painter
from app.frame.shapes import draw_verdict_shape
from reports.palette import Colour
from reports.sheet.elements import Box, Sheet
from reports.sheet.gap import gap_view
from reports.sheet.medium import Size
from reports.sheet.pictures import GapPicture, VerdictKind
from reports.typeface import Weight

__all__ = ["Countdown", "DropWindow", "minutes_text"]

_LOOK_FROM = 0.25
_TONES = (60, 30, 10)
_TICK_MS = 200
_MARGIN = 12.0
_PICTURE_FROM = 0.56


@dataclass(frozen=True, slots=True, kw_only=True)
class DropWindow:
    """Both parts of the time there is, each from the cautious to the other end.

    Attributes
    ----------
    in_air : tuple of float
        Least and greatest time in the room until it no longer goes over the seat [s].
    over_seat : tuple of float
        Least and greatest time over the seat until it grips [s].
    """

    in_air: tuple[float, float]
    over_seat: tuple[float, float]


def minutes_text(seconds: float) -> str:
    """Write a time as minutes and seconds, never more than there is.

    Parameters
    ----------
    seconds : float
        What is left; below zero it is over [s].

    Returns
    -------
    str
        `m:ss`, or `+m:ss over`.

    Examples
    --------
    >>> minutes_text(400.9)
    '6:40'
    >>> minutes_text(-11.2)
    '+0:12 over'
    """
    whole = math.floor(seconds)
    text = f"{abs(whole) // 60}:{abs(whole) % 60:02d}"
    return f"+{text} over" if whole < 0 else text


class Countdown(PlainWidget):
    """Counts while the part hangs and asks nothing; its keys may also be pressed afterwards.

    Parameters
    ----------
    window : DropWindow
        What is counted.
    gap : callable or None
        Gives the picture of the gap so many seconds after the door was opened.
    clock : callable
        Seconds on a clock that never goes back.
    """

    seated = Signal()
    stopped_short = Signal()
    tone_due = Signal(int)

    def __init__(
        self,
        window: DropWindow,
        *,
        gap: Callable[[float], GapPicture] | None = None,
        clock: Callable[[], float] = time.monotonic,
        look: Look | None = None,
        parent: QWidget | None = None,
    ) -> None:
        super().__init__(name="Drop window", look=look, parent=parent)
        self._window = window
        self._gap = gap
        self._clock = clock
        self._opened_at: float | None = None
        self._over_seat_at: float | None = None
        self._halted_at: float | None = None
        self._last_left = math.inf
        self._seated = Key("Seated", size=Size.LEAD, look=self._look, parent=self)
        self._seated.clicked.connect(lambda: self.seated.emit())
        self._short = Key("Stopped short", size=Size.LEAD, look=self._look, parent=self)
        self._short.clicked.connect(lambda: self.stopped_short.emit())
        self.setFocusProxy(self._seated)
        self._timer = QTimer(self, interval=_TICK_MS)
        self._timer.timeout.connect(self.tick)
        self._say()

    def set_window(
        self, window: DropWindow, *, gap: Callable[[float], GapPicture] | None = None
    ) -> None:
        """Count another window; what has already passed stays passed.

        Parameters
        ----------
        window : DropWindow
            What is counted.
        gap : callable or None
            Gives the picture of the gap.
        """
        self._window = window
        self._gap = gap
        self._say()

    def open_door(self) -> None:
        """Begin to count the time in air."""
        self._opened_at = self._clock()
        self._over_seat_at = self._halted_at = None
        self._last_left = math.inf
        self._timer.start()
        self.tick()

    def reach_seat(self) -> None:
        """Begin to count the time over the seat, where somebody has a hand or a pedal free."""
        self._over_seat_at = self._clock()
        self._last_left = math.inf
        self.tick()

    def halt(self) -> None:
        """Stand still where it is."""
        self._halted_at = self._clock()
        self._timer.stop()
        self._say()

    @property
    def counting(self) -> bool:
        """Whether time passes."""
        return self._opened_at is not None and self._halted_at is None

    @property
    def left(self) -> float:
        """What is left of the present part, on its cautious end; below zero it is over [s]."""
        least = (self._window.in_air if self._over_seat_at is None else self._window.over_seat)[0]
        since = self._opened_at if self._over_seat_at is None else self._over_seat_at
        return least if since is None else least - (self._now() - since)

    @property
    def shape(self) -> VerdictKind | None:
        """The verdict's shape: none until a quarter is left, then look again, then stop."""
        whole = (self._window.in_air if self._over_seat_at is None else self._window.over_seat)[0]
        if self._opened_at is None or self.left > _LOOK_FROM * whole:
            return None
        return VerdictKind.LOOK if self.left > 0.0 else VerdictKind.STOP

    @property
    def words(self) -> tuple[str, str, str]:
        """Words before the figures, the figures, and what comes then."""
        figures = minutes_text(self.left)
        if self._over_seat_at is not None:
            return "over the seat", figures, ""
        return "in air", figures, f"then over the seat {minutes_text(self._window.over_seat[0])}"

    def _now(self) -> float:
        return self._clock() if self._halted_at is None else self._halted_at

    def tick(self) -> None:
        """Show the present time, and tell when a tone is due."""
        left = self.left
        for tone in _TONES:
            if left <= tone < self._last_left and self._last_left != math.inf:
                self.tone_due.emit(tone)
        changed = self._last_left == math.inf or math.floor(left) != math.floor(self._last_left)
        self._last_left = left
        if changed:
            self._say()

    def _say(self) -> None:
        before, figures, then = self.words
        self.setAccessibleName(f"Drop window: {before} {figures}{', ' + then if then else ''}")
        # Read aloud only where the meaning changes; a voice that counts drowns every other.
        kind = self.shape
        announce(self, "" if kind is None else f"{kind.value}: {before}")
        self.update()

    def ranges_text(self) -> str:
        """Give both ranges in words.

        Returns
        -------
        str
            The cautious and the other end of both parts.
        """
        air, seat = self._window.in_air, self._window.over_seat
        return (
            f"in air {minutes_text(air[0])} to {minutes_text(air[1])}, "
            f"over the seat {minutes_text(seat[0])} to {minutes_text(seat[1])}; "
            "counted on the cautious end"
        )

    def sizeHint(self) -> QSize:
        """Give the middle band of the bench."""
        return QSize(
            round(self._look.between(narrow=1232.0, wide=1856.0)),
            round(self._look.between(narrow=337.0, wide=427.0)),
        )

    def look_changed(self) -> None:
        """Place the keys for the new scale."""
        self._place()

    def resizeEvent(self, event: QResizeEvent) -> None:
        """Place the keys."""
        super().resizeEvent(event)
        self._place()

    def _key_height(self) -> int:
        return round(self._look.between(narrow=80.0, wide=96.0))

    def _place(self) -> None:
        height, gap = self._key_height(), 16
        short = round((self.width() - gap) / 3.0)
        top = self.height() - height
        self._seated.setGeometry(0, top, self.width() - gap - short, height)
        self._short.setGeometry(self.width() - short, top, short, height)
        self.update()

    def paintEvent(self, event: QPaintEvent) -> None:
        """Paint words, figures, shape and gap."""
        painter = flat_painter(self)
        bottom = self.height() - self._key_height() - _MARGIN
        picture_left = self.width() * (_PICTURE_FROM if self._gap else 1.0)
        self._paint_time(painter, bottom, picture_left - 24.0)
        if self._gap is not None:
            self._paint_gap(painter, Box(picture_left, 4.0, float(self.width()), bottom))
        painter.end()

    def _paint_time(self, painter: QPainter, bottom: float, right: float) -> None:
        look = self._look
        before, figures, then = self.words
        note = fitted(look.note_font(), [self.ranges_text()], width=right)
        lead = look.font(Size.LEAD)
        lead.setPixelSize(max(min(lead.pixelSize(), int(bottom * 0.15)), 8))
        place = look.between(narrow=104.0, wide=124.0)
        taken = lead.pixelSize() * 2.6 + note.pixelSize() * 1.4
        hero = look.font(Size.HERO, weight=Weight.MEDIUM)
        hero.setPixelSize(max(min(hero.pixelSize(), int((bottom - taken) / 0.75)), 16))
        hero = fitted(hero, [figures], width=right - place)
        if self.shape is not None:
            top = lead.pixelSize() * 1.3
            centre = QPointF(place * 0.46, top + QFontMetricsF(hero).capHeight() / 2.0 + 6.0)
            size = min(look.between(narrow=92.0, wide=112.0), bottom * 0.5)
            draw_verdict_shape(painter, centre, size, self.shape, look)
        painter.setPen(look.colour(Colour.INK))
        painter.setFont(lead)
        base = float(lead.pixelSize())
        draw_at(painter, QPointF(place, base), before)
        painter.setFont(hero)
        base += QFontMetricsF(hero).capHeight() + lead.pixelSize() * 0.5
        draw_at(painter, QPointF(place - hero.pixelSize() * 0.04, base), figures)
        painter.setFont(lead)
        base += lead.pixelSize() * 1.35
        draw_at(painter, QPointF(place, base), then)
        painter.setFont(note)
        painter.setPen(look.colour(Colour.INK2))
        draw_at(painter, QPointF(0.0, bottom - note.pixelSize() * 0.3), self.ranges_text())

    def _paint_gap(self, painter: QPainter, place: Box) -> None:
        if self._gap is None:
            return
        elapsed = 0.0 if self._opened_at is None else self._now() - self._opened_at
        medium = self._look.medium
        layer = gap_view(picture=self._gap(elapsed), place=place, medium=medium)
        sheet = Sheet(width=place.right, height=place.bottom, medium=medium, items=layer.items)
        paint_sheet(painter=painter, sheet=sheet, palette=self._look.palette)
