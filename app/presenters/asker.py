"""Whoever asks for a few answers in one form and does something with them in the writing thread."""

from __future__ import annotations

from collections.abc import Callable, Mapping
from typing import Any

from PySide6.QtCore import QObject, Signal

from app.presenters.keys import Asking
from app.presenters.writing import Writer
from models.acts import NotAllowedError
from models.record.errors import RecordError
from models.units import UnreadableNumberError

__all__ = ["Answers", "Asker"]

Answers = Mapping[str, str]


class Asker(QObject):
    """Asks one thing at a time; what does not serve is said in the form, which stays."""

    asked = Signal(object)
    """A form is to be shown; carries an `Asking`."""
    refused = Signal(str)
    """What was answered does not serve; the form stays. Carries the sentence."""
    finished = Signal()
    """What was asked is done; the form goes."""

    def __init__(self, writer: Writer, parent: QObject | None = None) -> None:
        super().__init__(parent)
        self._asks_writer = writer
        self._make: Callable[[Answers], Callable[[], Any]] | None = None
        self._done: Callable[[Any], None] | None = None

    def ask(
        self,
        asking: Asking,
        make: Callable[[Answers], Callable[[], Any]],
        done: Callable[[Any], None],
    ) -> None:
        """Show a form.

        Parameters
        ----------
        asking : Asking
            What it says and asks.
        make : callable
            Makes an act of the answers; raises what is then said in the form.
        done : callable
            Gets what the act gives back.
        """
        self._make, self._done = make, done
        self.asked.emit(asking)

    def answer(self, answers: dict[str, str]) -> None:
        """Do what the form is for.

        Parameters
        ----------
        answers : dict
            What was typed, by field.
        """
        if self._make is None:
            return
        try:
            act = self._make(answers)
        except (UnreadableNumberError, ValueError, OSError) as problem:
            self.refused.emit(str(problem))
            return
        self._asks_writer.write(act, done=self._finish, refused=self._refuse)

    def give_up(self) -> None:
        """Put the form away; nothing happens."""
        self._make = self._done = None

    def _finish(self, result: Any) -> None:  # noqa: ANN401  (the Writer hands back anything)
        done, self._make, self._done = self._done, None, None
        self.finished.emit()
        if done is not None:
            done(result)

    def _refuse(self, error: Exception) -> None:
        if isinstance(error, NotAllowedError):
            self.refused.emit(error.words)
        elif isinstance(error, RecordError):
            self.refused.emit(str(error))
        else:
            raise error
