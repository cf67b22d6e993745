"""The one active cell of the bench: it takes readings from keys, an indicator or the keypad."""

from __future__ import annotations

import time
from collections.abc import Callable, Sequence

from PySide6.QtCore import QSize, Qt
from PySide6.QtGui import QMouseEvent, QPaintEvent, QResizeEvent
from PySide6.QtWidgets import QWidget

from app.entry.cell_face import CellFace, notice_fits, paint_cell, place_cell
from app.entry.cell_state import BUSY, CORRECTION_REASONS, Asked, CellState
from app.entry.cell_strokes import CellStrokes
from app.entry.cell_unit import CellUnit
from app.entry.strokes import Act, Stroke
from app.frame.key import Key
from app.frame.look import Look
from app.frame.plain import announce

__all__ = ["ReadingCell"]


class ReadingCell(CellStrokes):
    """One huge cell. Enter or Tab takes; nothing typed is ever thrown away.

    A reading is *taken* by the signal of that name and the cell then waits for one of `ask`,
    `rest` or `refuse`. Whatever arrives meanwhile waits in order.

    Parameters
    ----------
    unit : CellUnit
        How the text is read.
    reasons : sequence of str
        Why a reading may be replaced, for F1, F2 and so on.
    clock : callable
        Seconds on a clock that never goes back; two equal readings within 0.3 s are one.
    """

    def __init__(
        self,
        *,
        unit: CellUnit,
        reasons: Sequence[str] = CORRECTION_REASONS,
        clock: Callable[[], float] = time.monotonic,
        look: Look | None = None,
        parent: QWidget | None = None,
    ) -> None:
        super().__init__(unit=unit, reasons=reasons, clock=clock, look=look, parent=parent)
        self._shown_state: CellState | None = None
        self._help = Key("Undo", look=self._look, parent=self)
        self._help.setFocusPolicy(Qt.FocusPolicy.NoFocus)
        self._help.clicked.connect(self._press_help)
        self.setCursor(Qt.CursorShape.IBeamCursor)
        self._settle()

    # What the page asks of the cell

    def ask(self, asked: Asked) -> None:
        """Ask for a reading; what was in hand is done with, and waiting strokes go on.

        Text that was typed for another mark and not taken is cleared, with undo.

        Parameters
        ----------
        asked : Asked
            The mark and whether it corrects or closes something.
        """
        moved = self._asked is not None and self._asked.mark != asked.mark
        self._asked = asked
        self._reason = ""
        self._finish()
        if moved and self._edit.text():
            # Half a reading for one mark must not become the reading of another.
            self._clear()
        self._settle()
        self._replay()

    def rest(self) -> None:
        """Ask for nothing more; strokes that still arrive wait for the next `ask`."""
        self._asked = None
        self._finish()
        self._settle()

    def refuse(self, *, what: str, where: str, way_out: str, text: str = "") -> None:
        """Say that the reading could not be written; it stays in the cell to be tried again.

        Parameters
        ----------
        what, where, way_out : str
            What went wrong, with what, and what to do.
        text : str
            The reading, where the cell has gone on to ask for the next one meanwhile.
        """
        self._writing = False
        self._trouble = f"{what}, {where}. {way_out}"
        if text:
            self._edit.setText(text)
        self._settle()

    def lock(self, sentence: str) -> None:
        """Take no reading from whoever is here now; what is typed meanwhile waits.

        Parameters
        ----------
        sentence : str
            Who is signed in, and how to take over.
        """
        self._lock = sentence
        self._settle()

    def unlock(self) -> None:
        """Take readings again; the first that waited stands in the cell until Enter is pressed."""
        self._lock = ""
        while self._queue and self.state not in BUSY:
            stroke = self._queue.popleft()
            if stroke.act is Act.TAKE:
                break
            self._perform(stroke)
        self._settle()

    def set_unit(self, unit: CellUnit) -> None:
        """Read another kind of quantity from now on.

        Parameters
        ----------
        unit : CellUnit
            How the text is read.
        """
        self._unit = unit
        self._settle()

    # What the keypad does; it never has the keyboard itself

    def write(self, text: str) -> None:
        """Write as if typed.

        Parameters
        ----------
        text : str
            What is written at the caret.
        """
        self._receive(Stroke(act=Act.WRITE, at=self._clock(), text=text))

    def take(self) -> None:
        """Take the reading, as Enter does."""
        self._receive(Stroke(act=Act.TAKE, at=self._clock()))

    def erase(self) -> None:
        """Erase the last figure; in an empty cell ask for the last reading."""
        self._receive(Stroke(act=Act.ERASE, at=self._clock()))

    def clear_entry(self) -> None:
        """Clear the cell, with undo."""
        self._receive(Stroke(act=Act.CLEAR, at=self._clock()))

    def change_sign(self) -> None:
        """Change the sign of what is typed."""
        self._receive(Stroke(act=Act.CHANGE_SIGN, at=self._clock()))

    @property
    def has_room_for_notice(self) -> bool:
        """Whether the sentence can be read whole in the cell."""
        return notice_fits(self._face(), self.size(), self._look)

    @property
    def notice(self) -> str:
        """The sentence the cell says now, or nothing."""
        return self._face().notice

    def _press_help(self) -> None:
        {
            "Undo": self.undo_clear,
            "Both were meant": self.both_were_meant,
            "Try again": self.try_again,
            "Take over": self.takeover_wanted.emit,
        }[self._help.text()]()

    # Looks

    def _face(self) -> CellFace:
        return CellFace(
            state=self.state,
            asked=self._asked,
            symbol=self._unit.symbol,
            other=self.other_text,
            notice=self._notice,
            lock=self._lock,
            trouble=self._trouble,
            slow=self._slow,
            reason=self._reason,
            reasons=self._reason_words(),
            cleared=self._cleared_text,
            double=self._double_text,
            waiting=self.waiting_count,
        ).with_words()

    def _settle(self) -> None:
        face = self._face()
        busy = face.state in BUSY
        if self._edit.isReadOnly() != busy:
            self._edit.setReadOnly(busy)
        self._help.setVisible(bool(face.help_words))
        if face.help_words:
            self._help.set_words(face.help_words, hint=face.help_hint)
        place_cell(face, self.size(), self._look, self._edit, self._help)
        mark = self._asked.mark if self._asked else ""
        self._edit.setAccessibleName(f"Reading at {mark}" if mark else "Reading")
        announce(self, face.notice)
        if self._shown_state is not face.state:
            self._shown_state = face.state
            self.state_changed.emit(face.state.value)
        self.update()

    def look_changed(self) -> None:
        """Scale figures and key."""
        self._edit.set_look(self._look)
        self._settle()

    def sizeHint(self) -> QSize:
        """Room for the figures at full size."""
        height = self._look.between(narrow=130.0, wide=160.0) * max(self._look.text_scale, 1.0)
        return QSize(round(self._look.between(narrow=608.0, wide=872.0)), round(height))

    def resizeEvent(self, event: QResizeEvent) -> None:
        """Place the figures and the key."""
        super().resizeEvent(event)
        self._settle()

    def mousePressEvent(self, event: QMouseEvent) -> None:
        """Take the keyboard, wherever in the cell it is touched."""
        self._edit.setFocus(Qt.FocusReason.MouseFocusReason)
        self.touched.emit()
        event.accept()

    def paintEvent(self, event: QPaintEvent) -> None:
        """Paint frame, units and sentences; the figures paint themselves."""
        paint_cell(self, self._face(), self._look, focused=self._edit.hasFocus())
