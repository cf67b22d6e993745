"""What strokes do to the reading cell: they write, take, wait their turn, and are never lost."""

from __future__ import annotations

import time
from collections import deque
from collections.abc import Callable, Sequence

from PySide6.QtCore import Qt, QTimer, Signal
from PySide6.QtGui import QKeyEvent
from PySide6.QtWidgets import QWidget

from app.entry.cell_edit import CellEdit
from app.entry.cell_state import BUSY, CORRECTION_REASONS, Asked, CellState
from app.entry.cell_unit import CellUnit
from app.entry.strokes import Act, Stroke, stroke_of
from app.frame.look import Look
from app.frame.plain import PlainWidget
from models.units import Quantity

__all__ = ["CellStrokes"]

_DOUBLE_WITHIN = 0.3
_SAY_WRITING_AFTER_MS = 100


class CellStrokes(PlainWidget):
    """The part of the reading cell that deals with strokes; how it looks is not its business.

    Parameters
    ----------
    unit : CellUnit
        How the text is read.
    reasons : sequence of str
        Why a reading may be replaced, for F1, F2 and so on.
    clock : callable
        Seconds on a clock that never goes back; two equal readings within 0.3 s are one.
    """

    typed = Signal(str)
    taken = Signal(str)
    corrected = Signal(str, str)
    reason_chosen = Signal(str)
    doubled = Signal(str)
    cleared = Signal(str)
    asked_for_last = Signal()
    takeover_wanted = Signal()
    touched = Signal()
    state_changed = Signal(str)

    def __init__(
        self,
        *,
        unit: CellUnit,
        reasons: Sequence[str] = CORRECTION_REASONS,
        clock: Callable[[], float] = time.monotonic,
        look: Look | None = None,
        parent: QWidget | None = None,
    ) -> None:
        super().__init__(name="Reading", look=look, parent=parent)
        self._unit = unit
        self._reasons = tuple(reasons)
        self._clock = clock
        self._asked: Asked | None = None
        self._queue: deque[Stroke] = deque()
        self._replaying = False
        self._lock = ""
        self._trouble = ""
        self._writing = False
        self._slow = False
        self._unreadable = False
        self._notice = ""
        self._reason = ""
        self._cleared_text = ""
        self._double_text = ""
        self._last_text = ""
        self._last_at = float("-inf")
        self._in_hand = ""
        self._edit = CellEdit(
            on_key=self._take_key, wants_key=self._wants_key, look=self._look, parent=self
        )
        self._edit.setAccessibleName("Reading")
        self._edit.textEdited.connect(self._text_edited)
        self._slow_timer = QTimer(self, singleShot=True, interval=_SAY_WRITING_AFTER_MS)
        self._slow_timer.timeout.connect(self._say_writing)
        self.setFocusProxy(self._edit)

    @property
    def state(self) -> CellState:
        """How far the cell is."""
        if self._lock:
            return CellState.NOT_YOURS
        if self._trouble:
            return CellState.TROUBLE
        if self._writing:
            return CellState.WRITING
        if self._asked is None:
            return CellState.RESTING
        if self._unreadable:
            return CellState.UNREADABLE
        if self._correcting:
            return CellState.CORRECTING
        if self._edit.text():
            return CellState.TYPING
        return CellState.WAITING if self._asked.closing is None else CellState.CLOSING

    @property
    def text(self) -> str:
        """What is typed."""
        return self._edit.text()

    @property
    def quantity(self) -> Quantity | None:
        """What the typed text means, where it can be read."""
        try:
            return self._unit.read(self._edit.text()) if self._edit.text().strip() else None
        except ValueError:
            return None

    @property
    def other_text(self) -> str:
        """The value in the other unit, or nothing."""
        quantity = self.quantity
        return "" if quantity is None else self._unit.other(quantity)

    @property
    def waiting_count(self) -> int:
        """How many whole readings wait for their turn [-]."""
        return sum(stroke.act is Act.TAKE for stroke in self._queue)

    @property
    def double_pending(self) -> bool:
        """Whether F2 now means that both readings were meant."""
        return bool(self._double_text) and self.state not in BUSY

    @property
    def _correcting(self) -> bool:
        return self._asked is not None and self._asked.old is not None

    def _settle(self) -> None:
        """Show what has changed; the cell itself knows how."""
        raise NotImplementedError

    def choose_reason(self, reason: str) -> None:
        """Say why the reading is replaced.

        Parameters
        ----------
        reason : str
            One of the reasons.
        """
        if self._correcting and reason in self._reasons:
            self._reason = reason
            self._notice = ""
            self._settle()
            self.reason_chosen.emit(reason)

    def undo_clear(self) -> None:
        """Bring back what Esc cleared, unless something was typed since."""
        if self._cleared_text and not self._edit.text() and self.state not in BUSY:
            text, self._cleared_text = self._cleared_text, ""
            self._put(text)

    def both_were_meant(self) -> None:
        """Take the reading that was sent twice a second time, for the present mark."""
        if self.double_pending and not self._edit.text():
            text, self._double_text = self._double_text, ""
            self._send(text, at=self._clock())

    def try_again(self) -> None:
        """Hand out the reading that could not be written once more."""
        if self.state is CellState.TROUBLE:
            self._trouble = ""
            self._hand_out()

    def _wants_key(self, key: int) -> bool:
        if key in (Qt.Key.Key_Escape, Qt.Key.Key_Backspace):
            return True
        return self._function(key) is not None

    def _function(self, key: int) -> Callable[[], None] | None:
        number = key - Qt.Key.Key_F1
        state = self.state
        if state is CellState.TROUBLE:
            return self.try_again if key == Qt.Key.Key_F5 else None
        if self._correcting and state not in BUSY and 0 <= number < len(self._reasons):
            return lambda: self.choose_reason(self._reasons[number])
        if self.double_pending and key == Qt.Key.Key_F2:
            return self.both_were_meant
        return None

    def _take_key(self, event: QKeyEvent) -> bool:
        function = self._function(event.key())
        if function is not None:
            function()
            return True
        if event.key() == Qt.Key.Key_Z and event.modifiers() == Qt.KeyboardModifier.ControlModifier:
            self.undo_clear()
            return True
        stroke = stroke_of(event, at=self._clock())
        if stroke is None:
            return self.state in BUSY and event.key() == Qt.Key.Key_Delete
        if stroke.act is Act.TAKE and event.isAutoRepeat():
            return True
        empty_tab = event.key() == Qt.Key.Key_Tab and not self._edit.text() and not self._queue
        if empty_tab and self.state is not CellState.WRITING:
            return False
        self._receive(stroke)
        return True

    def _receive(self, stroke: Stroke) -> None:
        if self.state not in BUSY:
            self._perform(stroke)
            return
        if stroke.act is Act.TAKE and not self._queue:
            if self.state is CellState.TROUBLE:
                self.try_again()
                return
            if self.state is CellState.NOT_YOURS:
                self.takeover_wanted.emit()
                return
        self._queue.append(stroke)
        if self.state is CellState.NOT_YOURS and stroke.act is Act.TAKE:
            self.takeover_wanted.emit()
        self._settle()

    def _replay(self) -> None:
        if self._replaying:
            return
        self._replaying = True
        try:
            while self._queue and self.state not in BUSY:
                self._perform(self._queue.popleft())
        finally:
            self._replaying = False
        self._settle()

    def _perform(self, stroke: Stroke) -> None:
        if stroke.act is Act.WRITE:
            self._edit.insert(stroke.text)
        elif stroke.act is Act.TAKE:
            self._take(at=stroke.at)
        elif stroke.act is Act.ERASE:
            self._erase()
        elif stroke.act is Act.CLEAR:
            self._clear()
        elif self._edit.text().startswith(("-", "−")):
            self._put(self._edit.text()[1:])
        else:
            self._put("−" + self._edit.text().removeprefix("+"))

    def _text_edited(self) -> None:
        self._unreadable = False
        self._notice = ""
        self._cleared_text = ""
        self._double_text = ""
        self._settle()
        self.typed.emit(self._edit.text())

    def _put(self, text: str) -> None:
        self._edit.setText(text)
        self._text_edited()

    def _erase(self) -> None:
        if self._edit.text():
            self._edit.backspace()
        else:
            self.asked_for_last.emit()

    def _clear(self) -> None:
        text = self._edit.text()
        if text:
            self._put("")
            self._cleared_text = text
            self._settle()
            self.cleared.emit(text)

    def _take(self, *, at: float) -> None:
        text = self._edit.text().strip()
        if not text:
            self._notice = f"Nothing typed for {self._asked.mark if self._asked else 'this mark'}"
            self._settle()
            return
        try:
            self._unit.read(text)
        except ValueError as unreadable:
            self._unreadable = True
            self._notice = str(unreadable)
            self._settle()
            return
        if self._correcting and self._asked and self._asked.reason_needed and not self._reason:
            self._notice = "Say why first: " + self._reason_words()
            self._settle()
            return
        if text == self._last_text and at - self._last_at <= _DOUBLE_WITHIN:
            self._drop_double(text, at=at)
            return
        self._send(text, at=at)

    def _reason_words(self) -> str:
        return " · ".join(f"F{number} {word}" for number, word in enumerate(self._reasons, start=1))

    def _drop_double(self, text: str, *, at: float) -> None:
        self._last_at = at
        self._edit.clear()
        self._double_text = text
        self._settle()
        self.doubled.emit(text)

    def _send(self, text: str, *, at: float) -> None:
        self._last_text, self._last_at = text, at
        self._edit.setText(text)
        self._in_hand = text
        self._hand_out()

    def _hand_out(self) -> None:
        self._writing = True
        self._slow = False
        self._notice = ""
        self._double_text = ""
        self._slow_timer.start()
        self._settle()
        if self._correcting:
            self.corrected.emit(self._in_hand, self._reason)
        else:
            self.taken.emit(self._in_hand)

    def _finish(self) -> None:
        was_in_hand = self._writing or bool(self._trouble)
        self._writing = False
        self._trouble = ""
        self._unreadable = False
        self._notice = ""
        self._slow_timer.stop()
        if was_in_hand:
            self._edit.clear()

    def _say_writing(self) -> None:
        self._slow = True
        self._settle()
