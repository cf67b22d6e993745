"""What stands right of the ladder: an open question, why it stays, or why a reading is replaced."""

from __future__ import annotations

from PySide6.QtCore import QRect, Signal
from PySide6.QtGui import QResizeEvent
from PySide6.QtWidgets import QWidget

from app.entry.question_line import Question, QuestionLine, ReasonKeys
from app.frame.lettering import wrapped
from app.frame.look import Look
from app.frame.plain import PlainWidget
from app.pages.bench.keep_words import KeepWords
from app.pages.bench.shown import question_of
from app.presenters.bench.state import ReadingTask, Task

__all__ = ["Beside"]

_SHAPE = 36.0


class Beside(PlainWidget):
    """One of three, or nothing; none of them takes the keyboard from the cell."""

    proposed_taken = Signal()
    kept = Signal(str)
    read_again = Signal()
    done = Signal()

    def __init__(self, *, look: Look | None = None, parent: QWidget | None = None) -> None:
        super().__init__(name="Beside the ladder", look=look, parent=parent)
        self.question = QuestionLine(look=self._look, parent=self)
        self.question.setObjectName("question")
        self.reasons = ReasonKeys(look=self._look, parent=self)
        self.reasons.setObjectName("why-replaced")
        self.words = KeepWords(look=self._look, parent=self)
        self.words.setObjectName("why-kept")
        self.reasons.hide()
        self.question.proposed_taken.connect(lambda _name: self.proposed_taken.emit())
        self.question.read_again.connect(lambda _name: self.read_again.emit())
        self.question.kept.connect(lambda _name: self._ask_why())
        self.words.given.connect(self._keep)
        self.words.put_away.connect(self.close_words)
        self._asked: Question | None = None
        self.hide()

    def show_task(self, task: Task) -> None:
        """Show what the task has beside its ladder.

        Parameters
        ----------
        task : Task
            Only readings have anything.
        """
        reading = task if isinstance(task, ReadingTask) else None
        asked = None if reading is None else question_of(reading)
        why = reading is not None and reading.correcting is not None and bool(reading.reasons)
        if asked != self._asked:
            self._asked = asked
            self.words.hide()
            self.question.set_question(asked)
        if self.reasons.isHidden() is why:
            self.reasons.show_reason("")
            self.reasons.setVisible(why)
        self.setVisible(why or asked is not None)

    def _ask_why(self) -> None:
        self.question.hide()
        self.words.open()

    def _keep(self, words: str) -> None:
        self.words.hide()
        self.kept.emit(words)
        self.done.emit()

    def close_words(self) -> bool:
        """Go back from the words to the question.

        Returns
        -------
        bool
            Whether there was anything to go back from.
        """
        if self.words.isHidden():
            return False
        self.words.hide()
        self.question.setVisible(self._asked is not None)
        self.done.emit()
        return True

    def wanted_height(self, width: float) -> int:
        """Give the height of what stands here, 0 for nothing.

        Parameters
        ----------
        width : float
            The room there will be [px].

        Returns
        -------
        int
            Sentence and keys, or keys alone [px].
        """
        if self._asked is None:
            return 0 if self.reasons.isHidden() else self.reasons.sizeHint().height()
        words = f"{self._asked.mark}: {self._asked.sentence}"
        font = self._look.note_font()
        lines = len(wrapped(words, font, width=width - _SHAPE, most=2))
        return round(lines * font.pixelSize() * 1.25 + self._look.touch + 8)

    def resizeEvent(self, event: QResizeEvent) -> None:
        """Give each of the three the whole room."""
        super().resizeEvent(event)
        whole = QRect(0, 0, self.width(), self.height())
        for part in (self.question, self.words, self.reasons):
            part.setGeometry(whole)
