"""A question beside a reading: it waits, never takes the keyboard, and no digit answers it."""

from __future__ import annotations

from collections.abc import Callable, Sequence
from dataclasses import dataclass

from PySide6.QtCore import QPointF, QSize, Qt, Signal
from PySide6.QtGui import QKeySequence, QPaintEvent, QResizeEvent, QShortcut
from PySide6.QtWidgets import QWidget

from app.entry.cell_state import CORRECTION_REASONS
from app.frame.key import Key
from app.frame.lettering import draw_at, wrapped
from app.frame.look import Look
from app.frame.plain import PlainWidget, announce, flat_painter
from app.frame.shapes import draw_verdict_shape
from reports.palette import Colour
from reports.sheet.medium import Size
from reports.sheet.pictures import VerdictKind

__all__ = ["Question", "QuestionLine", "ReasonKeys"]

_GAP = 8


@dataclass(frozen=True, slots=True, kw_only=True)
class Question:
    """A doubt about a reading that is already written.

    Attributes
    ----------
    name : str
        How the page knows the reading.
    mark : str
        Where it was read: "225°".
    sentence : str
        The doubt, with the figure meant: "25.4 times its neighbours: 0.0003 in?".
    proposal : str
        What F2 takes, or nothing where there is nothing to propose.
    """

    name: str
    mark: str
    sentence: str
    proposal: str = ""


class QuestionLine(PlainWidget):
    """One open question with its three answers: F2, F3, F4, or a touch."""

    proposed_taken = Signal(str)
    kept = Signal(str)
    read_again = Signal(str)

    def __init__(self, *, look: Look | None = None, parent: QWidget | None = None) -> None:
        super().__init__(name="Question", look=look, parent=parent)
        self._question: Question | None = None
        self._open_count = 0
        self._take = self._add("Take", "F2", Qt.Key.Key_F2, self._answer_take)
        self._keep = self._add("Keep, because …", "F3", Qt.Key.Key_F3, self._answer_keep)
        self._again = self._add("Read again", "F4", Qt.Key.Key_F4, self._answer_again)
        self.set_question(None)

    def _add(self, words: str, hint: str, code: Qt.Key, answer: Callable[[], None]) -> Key:
        key = Key(words, hint=hint, look=self._look, parent=self)
        key.setFocusPolicy(Qt.FocusPolicy.NoFocus)
        key.clicked.connect(lambda: answer())
        # A shortcut of a hidden widget is dead, so an answered question leaves no key behind.
        QShortcut(QKeySequence(code), key).activated.connect(key.click)
        return key

    @property
    def question(self) -> Question | None:
        """The question that is open."""
        return self._question

    def set_question(self, question: Question | None, *, open_count: int = 1) -> None:
        """Ask a question, or none.

        Parameters
        ----------
        question : Question or None
            The oldest one that is open.
        open_count : int
            How many are open, this one included [-].
        """
        self._question = question
        self._open_count = open_count if question else 0
        self.setVisible(question is not None)
        if question is None:
            announce(self, "")
            return
        self._take.setVisible(bool(question.proposal))
        self._take.set_words(f"Take {question.proposal}")
        self._again.set_words(f"Read {question.mark} again")
        self.setAccessibleName(f"Question about {question.mark}")
        announce(self, self._words())
        self._place()

    def _words(self) -> str:
        question = self._question
        if question is None:
            return ""
        more = f" ({self._open_count - 1} more)" if self._open_count > 1 else ""
        return f"{question.mark}: {question.sentence}{more}"

    def _answer_take(self) -> None:
        if self._question and self._question.proposal:
            self.proposed_taken.emit(self._question.name)

    def _answer_keep(self) -> None:
        if self._question:
            self.kept.emit(self._question.name)

    def _answer_again(self) -> None:
        if self._question:
            self.read_again.emit(self._question.name)

    def sizeHint(self) -> QSize:
        """Give room for two lines and the keys under them."""
        lines = self._look.size(Size.NOTE) * 2.5
        width = self._look.between(narrow=608.0, wide=872.0)
        return QSize(round(width), round(lines + self._look.touch + _GAP))

    def look_changed(self) -> None:
        """Place the keys for the new scale."""
        self._place()

    def resizeEvent(self, event: QResizeEvent) -> None:
        """Place the keys under the sentence."""
        super().resizeEvent(event)
        self._place()

    def _place(self) -> None:
        keys = [key for key in (self._take, self._keep, self._again) if not key.isHidden()]
        _share_row(keys, width=self.width(), bottom=self.height(), height=self._look.touch)
        self.update()

    def paintEvent(self, event: QPaintEvent) -> None:
        """Paint the shape of looking again, and the sentence."""
        if self._question is None:
            return
        painter = flat_painter(self)
        shape = self._look.between(narrow=20.0, wide=24.0)
        font = self._look.note_font()
        step = font.pixelSize() * 1.2
        draw_verdict_shape(
            painter, QPointF(shape / 2.0, step / 2.0), shape, VerdictKind.LOOK, self._look
        )
        painter.setFont(font)
        painter.setPen(self._look.colour(Colour.INK))
        left = shape + _GAP
        base = step * 0.8
        for line in wrapped(self._words(), font, width=self.width() - left, most=2):
            draw_at(painter, QPointF(left, base), line)
            base += step
        painter.end()


class ReasonKeys(PlainWidget):
    """Why a reading is replaced, F1 and so on; the cell itself listens to the function keys."""

    chosen = Signal(str)

    def __init__(
        self,
        reasons: Sequence[str] = CORRECTION_REASONS,
        *,
        look: Look | None = None,
        parent: QWidget | None = None,
    ) -> None:
        super().__init__(name="Why it is replaced", look=look, parent=parent)
        self._keys: list[Key] = []
        for number, reason in enumerate(reasons, start=1):
            key = Key(reason, hint=f"F{number}", look=self._look, parent=self)
            key.setFocusPolicy(Qt.FocusPolicy.NoFocus)
            key.setCheckable(True)
            key.clicked.connect(lambda _checked=False, reason=reason: self._choose(reason))
            self._keys.append(key)

    def _choose(self, reason: str) -> None:
        self.show_reason(reason)
        self.chosen.emit(reason)

    def show_reason(self, reason: str) -> None:
        """Mark the reason that is chosen, also where it was chosen by a function key.

        Parameters
        ----------
        reason : str
            One of the reasons, or nothing.
        """
        for key in self._keys:
            key.setChecked(key.text() == reason)

    def sizeHint(self) -> QSize:
        """Give one row of keys under the cell."""
        return QSize(round(self._look.between(narrow=608.0, wide=872.0)), self._look.touch)

    def look_changed(self) -> None:
        """Place the keys for the new scale."""
        _share_row(self._keys, width=self.width(), bottom=self.height(), height=self.height())

    def resizeEvent(self, event: QResizeEvent) -> None:
        """Share the width among the keys."""
        super().resizeEvent(event)
        self.look_changed()


def _share_row(keys: Sequence[Key], *, width: int, bottom: int, height: int) -> None:
    """Lay keys side by side, each as wide as its words ask in proportion."""
    asked = [key.sizeHint().width() for key in keys]
    room = width - _GAP * (len(keys) - 1)
    left = 0.0
    for key, wish in zip(keys, asked, strict=True):
        wide = room * wish / sum(asked)
        key.setGeometry(round(left), bottom - height, round(wide), height)
        left += wide + _GAP
