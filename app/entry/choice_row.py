"""A row of a form with a few answers as keys, such as yes, no and does not apply."""

from __future__ import annotations

from PySide6.QtCore import Qt
from PySide6.QtGui import QKeyEvent
from PySide6.QtWidgets import QWidget

from app.entry.fields import ChoiceField
from app.entry.form_rows import ENTER_KEYS, ROW_GAP, FormRow
from app.frame.key import Key
from app.frame.look import Look

__all__ = ["ChoiceRow"]

_LEAST_ANSWER = 72


class _AnswerKey(Key):
    """One answer; arrows walk, Space or its first letter chooses, Enter moves on."""

    def __init__(self, text: str, *, row: ChoiceRow) -> None:
        super().__init__(text, look=row.look, parent=row)
        self._row = row
        self.setCheckable(True)

    def keyPressEvent(self, event: QKeyEvent) -> None:
        """Tell the row; a digit an indicator sends goes on to the page."""
        if not self._row.take_key(self, event):
            super().keyPressEvent(event)


class ChoiceRow(FormRow):
    """A few answers as keys. Enter alone never answers: it only moves on from an answer."""

    def __init__(self, field: ChoiceField, *, look: Look, parent: QWidget | None = None) -> None:
        super().__init__(field, look=look, parent=parent)
        self._answer = ""
        self._keys: list[_AnswerKey] = []
        for answer in field.answers:
            key = _AnswerKey(answer, row=self)
            key.setAccessibleName(f"{field.label}: {answer}")
            key.clicked.connect(lambda _checked=False, answer=answer: self._choose(answer))
            self._keys.append(key)
        self.setFocusProxy(self._keys[0])
        self._show_answer()

    @property
    def answer(self) -> str:
        """Which answer is chosen."""
        return self._answer

    def set_answer(self, text: str) -> None:
        """Show an answer without telling anybody."""
        self._answer = text
        self._show_answer()

    def _choose(self, answer: str) -> None:
        changed = answer != self._answer
        self.set_answer(answer)
        if self._message:
            self.set_message("")
        if changed:
            self.answered.emit(self.name, answer)

    def _show_answer(self) -> None:
        chosen = next((key for key in self._keys if key.text() == self._answer), self._keys[0])
        for key in self._keys:
            key.setChecked(key.text() == self._answer)
            policy = Qt.FocusPolicy.TabFocus if key is chosen else Qt.FocusPolicy.NoFocus
            key.setFocusPolicy(policy)
        self.setFocusProxy(chosen)

    def take_key(self, key: Key, event: QKeyEvent) -> bool:
        """Walk, choose or move on.

        Parameters
        ----------
        key : Key
            The answer that has the keyboard.
        event : QKeyEvent
            What was pressed.

        Returns
        -------
        bool
            Whether it meant something here.
        """
        step = {Qt.Key.Key_Left: -1, Qt.Key.Key_Right: 1}.get(Qt.Key(event.key()))
        if step is not None:
            place = next(index for index, other in enumerate(self._keys) if other is key) + step
            self._keys[place % len(self._keys)].setFocus(Qt.FocusReason.OtherFocusReason)
            return True
        if event.key() in ENTER_KEYS:
            self._move_on(repeated=event.isAutoRepeat())
            return True
        letter = event.text().casefold()
        fitting = [other for other in self._keys if letter and other.text()[0] == letter]
        if letter.isalpha() and len(fitting) == 1:
            self._choose(fitting[0].text())
            return True
        return False

    def _move_on(self, *, repeated: bool) -> None:
        if repeated:
            return
        if self._answer or self._field.optional:
            self.moved_on.emit(self.name)
        else:
            self.set_message("Choose with the arrow keys and Space, then Enter")

    def place(self) -> None:
        """Share the room after the label among the answers."""
        left, height = float(self.control_left()), self.control_height()
        asked = [max(key.sizeHint().width(), _LEAST_ANSWER) for key in self._keys]
        room = self.width() - left - ROW_GAP * (len(asked) - 1)
        stretch = room / sum(asked)
        for key, wish in zip(self._keys, asked, strict=True):
            wide = wish * stretch
            key.setGeometry(round(left), 0, round(wide), height)
            left += wide + ROW_GAP
        self.update()
