"""One act that a key does, the clock of the drop window, or nothing but waiting."""

from __future__ import annotations

import math
import time
from collections.abc import Callable, Sequence

from PySide6.QtCore import QRect, Signal
from PySide6.QtGui import QResizeEvent
from PySide6.QtWidgets import QWidget

from app.frame.countdown import Countdown, DropWindow
from app.frame.key import Key as WideKey
from app.frame.look import Look
from app.frame.plain import PlainWidget
from app.pages.bench.task_words import TaskWords
from app.presenters.bench.state import Drop, Key, KeyTask, WaitTask
from reports.sheet.medium import Size
from reports.sheet.pictures import GapPicture

__all__ = ["BigKeys", "DropClock", "KeyEntry"]

_GAP = 16
_MOST_WORDS = 0.37
_DOOR_SHARE = 0.27


class BigKeys(PlainWidget):
    """A key of the whole width, or a wide one and others half as wide."""

    pressed = Signal(str)

    def __init__(self, *, look: Look | None = None, parent: QWidget | None = None) -> None:
        super().__init__(name="Keys", look=look, parent=parent)
        self._keys: tuple[Key, ...] = ()
        self._shown: list[WideKey] = []

    @property
    def keys(self) -> tuple[Key, ...]:
        """What can be pressed."""
        return self._keys

    def set_keys(self, keys: Sequence[Key]) -> None:
        """Offer other keys; the first is the wide one.

        Parameters
        ----------
        keys : sequence of Key
            From left to right.
        """
        if tuple(keys) == self._keys:
            return
        self._keys = tuple(keys)
        while len(self._shown) > len(keys):
            old = self._shown.pop()
            old.hide()
            old.deleteLater()
        while len(self._shown) < len(keys):
            self._shown.append(self._make(len(self._shown)))
        for shown, key in zip(self._shown, keys, strict=True):
            shown.set_words(key.label)
            shown.setObjectName(f"key {key.name}")
            shown.setEnabled(key.enabled)
            shown.setToolTip(key.hint)
            shown.setAccessibleDescription(key.hint)
        if self._shown:
            self.setFocusProxy(self._shown[0])
        self._lay_out()

    def _make(self, place: int) -> WideKey:
        made = WideKey("", size=Size.LEAD, look=self._look, parent=self)
        made.clicked.connect(lambda: self.pressed.emit(self._keys[place].name))
        made.show()
        return made

    def resizeEvent(self, event: QResizeEvent) -> None:
        """Share the width."""
        super().resizeEvent(event)
        self._lay_out()

    def _lay_out(self) -> None:
        count = len(self._shown)
        if not count:
            return
        share = (self.width() - _GAP * (count - 1)) / (count + (count > 1))
        left = 0.0
        for place, key in enumerate(self._shown):
            wide = share * (2 if place == 0 and count > 1 else 1)
            key.setGeometry(round(left), 0, round(wide), self.height())
            left += wide + _GAP


class DropClock:
    """A clock that can be read as it stood when the door was opened.

    Parameters
    ----------
    now : callable
        Seconds on the clock by which the record says when the door was opened.
    """

    def __init__(self, now: Callable[[], float]) -> None:
        self._now = now
        self._held: float | None = None

    def __call__(self) -> float:
        """Give the time [s]."""
        return self._now() if self._held is None else self._held

    def at(self, moment: float, act: Callable[[], None]) -> None:
        """Do something as if it were done at a moment.

        Parameters
        ----------
        moment : float
            When [s].
        act : callable
            What is done.
        """
        self._held = moment
        try:
            act()
        finally:
            self._held = None


class KeyEntry(PlainWidget):
    """The left columns while there is one act to do, or nothing."""

    pressed = Signal(str)
    door_opened = Signal()

    def __init__(
        self,
        *,
        clock: Callable[[], float] = time.time,
        look: Look | None = None,
        parent: QWidget | None = None,
    ) -> None:
        super().__init__(name="Act", look=look, parent=parent)
        self._clock = DropClock(clock)
        self._drop: Drop | None = None
        self.countdown: Countdown | None = None
        self.words = TaskWords(look=self._look, parent=self)
        self.keys = BigKeys(look=self._look, parent=self)
        self.keys.pressed.connect(self.pressed)
        self.door = WideKey("The door is open", size=Size.LEAD, look=self._look, parent=self)
        self.door.setObjectName("open door")
        self.door.clicked.connect(self._open_door)
        self.door.hide()
        self.setFocusProxy(self.keys)

    def show_task(self, task: KeyTask | WaitTask) -> None:
        """Show an act with its keys, or what is waited for.

        Parameters
        ----------
        task : KeyTask or WaitTask
            Heading, lines, cautions, and keys where there are any.
        """
        offered: tuple[Key, ...] = getattr(task, "keys", ())
        drop: Drop | None = getattr(task, "drop", None)
        hints = tuple(f"{key.label}: {key.hint}" for key in offered if key.hint)
        lines = (*task.lines, *hints) if drop is None else (*task.lines, drop.words, *hints)
        self.words.set_words(heading=task.heading, lines=lines, cautions=task.cautions)
        self.keys.set_keys(offered)
        self._show_drop(drop)
        self._lay_out()

    def _show_drop(self, drop: Drop | None) -> None:
        before, self._drop = self._drop, drop
        if drop is None:
            self._end_countdown()
            return
        if drop == before and self.countdown is not None:
            return
        window = DropWindow(in_air=drop.in_air, over_seat=drop.over_seat)
        gap = None if drop.gap is None else _closing(drop.gap, drop)
        if self.countdown is None:
            self.countdown = Countdown(
                window, gap=gap, clock=self._clock, look=self._look, parent=self
            )
            self.countdown.setObjectName("countdown")
            for key in self.countdown.findChildren(WideKey):
                # The bench brings keys of its own, in the words of the task.
                key.hide()
            self.countdown.show()
            self.keys.raise_()
        self.countdown.set_window(window, gap=gap)
        opened = drop.opened_at
        if opened is not None and (before is None or before.opened_at != opened):
            self._clock.at(opened, self.countdown.open_door)
            self.countdown.tick()
        self.door.setVisible(not self.countdown.counting)
        self.door.raise_()
        # Enter must not say "seated" while the furnace is still shut.
        self.setFocusProxy(self.door if not self.countdown.counting else self.keys)

    def _open_door(self) -> None:
        """Let the clock run at once; the moment is written afterwards."""
        if self.countdown is not None:
            self.countdown.open_door()
        self.door.hide()
        self.setFocusProxy(self.keys)
        self._lay_out()
        self.keys.setFocus()
        self.door_opened.emit()

    def _end_countdown(self) -> None:
        self.door.hide()
        self.setFocusProxy(self.keys)
        if self.countdown is not None:
            self.countdown.halt()
            self.countdown.hide()
            self.countdown.deleteLater()
            self.countdown = None

    def put_away(self) -> None:
        """Let no clock run on that nobody sees."""
        self._drop = None
        self._end_countdown()

    def asked_height(self, width: int) -> int:
        """Give the height in which words, clock and keys are seen at their full size.

        Parameters
        ----------
        width : int
            The room there is [px].

        Returns
        -------
        int
            Words, clock and keys [px].
        """
        words = self.words.heightForWidth(width)
        if self.countdown is not None:
            return words + self.countdown.sizeHint().height()
        return words + (self._key_height() + 16 if self.keys.keys else 0)

    def _key_height(self) -> int:
        return round(self._look.between(narrow=80.0, wide=96.0))

    def resizeEvent(self, event: QResizeEvent) -> None:
        """Put words, clock and keys in their places."""
        super().resizeEvent(event)
        self._lay_out()

    def look_changed(self) -> None:
        """Make room for the new scale."""
        self._lay_out()

    def _lay_out(self) -> None:
        width, height = self.width(), self.height()
        key = self._key_height()
        bottom = height - 8 - (key if self.keys.keys else 0)
        door = 0 if self.door.isHidden() else round(width * _DOOR_SHARE)
        self.door.setGeometry(QRect(0, bottom, door, key))
        left = door + (_GAP if door else 0)
        self.keys.setGeometry(QRect(left, bottom, width - left, key))
        if self.countdown is None:
            self.words.setGeometry(QRect(0, 0, width, bottom - 8))
            return
        words = min(self.words.heightForWidth(width), round(height * _MOST_WORDS))
        self.words.setGeometry(QRect(0, 0, width, words))
        self.countdown.setGeometry(QRect(0, words + 8, width, height - 16 - words))


def _closing(gap: GapPicture, drop: Drop) -> Callable[[float], GapPicture]:
    """Let the gap close in step with the time there is: its cautious end with the least time."""
    least, most = (end if end > 0.0 else math.inf for end in drop.in_air)

    def at(elapsed: float) -> GapPicture:
        return GapPicture(
            gap=gap.gap * (1.0 - elapsed / most),
            opening_gap=gap.opening_gap,
            least_gap=gap.least_gap * (1.0 - elapsed / least),
            bore_text=gap.bore_text,
            seat_text=gap.seat_text,
            gap_text=gap.gap_text,
            least_text=gap.least_text,
            tells=gap.tells,
        )

    return at
