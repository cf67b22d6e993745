"""Where an error goes that nobody expected: a log, and one dialog with a sentence."""

from __future__ import annotations

import logging
import sys
import threading
from collections.abc import Callable
from pathlib import Path
from types import TracebackType

import platformdirs
from PySide6.QtCore import QObject, Signal

__all__ = ["LastResort", "ask_dialog", "log_file", "show_dialog"]

_LOG = logging.getLogger("thirdjournal")


def log_file() -> Path:
    """Give the file in the user's own log folder."""
    return Path(platformdirs.user_log_dir("thirdjournal", appauthor=False)) / "errors.log"


def show_dialog(words: str) -> None:
    """Show a sentence and wait until it is put away.

    Parameters
    ----------
    words : str
        What went wrong and the way out.
    """
    from PySide6.QtWidgets import QMessageBox

    box = QMessageBox(QMessageBox.Icon.NoIcon, "Third Journal", words)
    box.addButton("Put away", QMessageBox.ButtonRole.AcceptRole)
    box.exec()


def ask_dialog(words: str, *, yes: str, no: str) -> bool:
    """Ask something before there is a window; the careful answer is the one at hand.

    Parameters
    ----------
    words : str
        What is asked, and what follows from it.
    yes, no : str
        Words on the two keys.

    Returns
    -------
    bool
        Whether `yes` was pressed.
    """
    from PySide6.QtWidgets import QMessageBox

    box = QMessageBox(QMessageBox.Icon.NoIcon, "Third Journal", words)
    wanted = box.addButton(yes, QMessageBox.ButtonRole.AcceptRole)
    careful = box.addButton(no, QMessageBox.ButtonRole.RejectRole)
    box.setDefaultButton(careful)
    box.setEscapeButton(careful)
    box.exec()
    return box.clickedButton() is wanted


class LastResort(QObject):
    """Takes over what no other place catches, while it is installed.

    The transaction an error ended has been rolled back by then; nothing half-made is recorded.
    """

    _seen = Signal()

    def __init__(
        self,
        *,
        file: Path | None = None,
        tell: Callable[[str], None] = show_dialog,
        parent: QObject | None = None,
    ) -> None:
        super().__init__(parent)
        self._file = file if file is not None else log_file()
        self._tell = tell
        self._telling = False
        self._told = False
        self._handler: logging.Handler | None = None
        self._before = (sys.excepthook, threading.excepthook)
        self._seen.connect(self._say_once)

    def install(self) -> None:
        """Take over from now on, in every thread."""
        self._file.parent.mkdir(parents=True, exist_ok=True)
        self._handler = logging.FileHandler(self._file, delay=True, encoding="utf-8")
        self._handler.setFormatter(logging.Formatter("%(asctime)s %(levelname)s %(message)s"))
        _LOG.addHandler(self._handler)
        self._before = (sys.excepthook, threading.excepthook)
        sys.excepthook = self.take
        threading.excepthook = self._take_from_thread

    def remove(self) -> None:
        """Give the place back to whoever had it."""
        sys.excepthook, threading.excepthook = self._before
        if self._handler is not None:
            _LOG.removeHandler(self._handler)
            self._handler.close()
            self._handler = None

    def take(
        self,
        kind: type[BaseException],
        error: BaseException,
        trace: TracebackType | None,
    ) -> None:
        """Log an error and say once that there was one.

        Parameters
        ----------
        kind : type
            Its class.
        error : BaseException
            The error.
        trace : TracebackType or None
            Where it came from.
        """
        if issubclass(kind, KeyboardInterrupt):
            sys.__excepthook__(kind, error, trace)
            return
        _LOG.error("unexpected %s", kind.__name__, exc_info=(kind, error, trace))
        self._seen.emit()

    def _take_from_thread(self, caught: threading.ExceptHookArgs) -> None:
        if caught.exc_value is not None:
            self.take(caught.exc_type, caught.exc_value, caught.exc_traceback)

    def _say_once(self) -> None:
        # A fault that comes back with every stroke must not bury the record under dialogs.
        if self._telling or self._told:
            return
        self._telling = self._told = True
        try:
            self._tell(
                "Something in the program itself went wrong. What was being recorded at that "
                f"moment is recorded whole or not at all. It is written down in {self._file}; "
                "give that file to whoever looks after the program, and open the window again."
            )
        finally:
            self._telling = False
