"""Long reading and working-out in a thread of its own, so that the window never waits for it."""

from collections.abc import Callable
from concurrent.futures import Future, ThreadPoolExecutor
from dataclasses import dataclass
from typing import Any

from PySide6.QtCore import QObject, Qt, Signal

__all__ = ["Background"]


@dataclass(frozen=True)
class _Task:
    words: str
    done: Callable[[Any], None]
    failed: Callable[[Exception], None]


class Background(QObject):
    """Runs work one after the other beside the window and hands each result back to it.

    Nothing here writes to the record: that is the Writer's alone.
    """

    working = Signal(str)
    """What is being worked on, in words; empty when nothing is."""

    _came_back = Signal(object, object, object)

    def __init__(self, parent: QObject | None = None) -> None:
        super().__init__(parent)
        self._pool = ThreadPoolExecutor(max_workers=1, thread_name_prefix="background")
        self._under_way: list[_Task] = []
        self._came_back.connect(self._on_back, Qt.ConnectionType.QueuedConnection)

    @property
    def is_idle(self) -> bool:
        """Whether every result has been handed back."""
        return not self._under_way

    def run(
        self,
        work: Callable[[], Any],
        *,
        words: str,
        done: Callable[[Any], None],
        failed: Callable[[Exception], None],
    ) -> None:
        """Queue some work.

        Parameters
        ----------
        work : callable
            Runs in the other thread; touches no widget.
        words : str
            What is being done: "reading job C-19".
        done : callable
            Gets what the work returns, in the window's thread.
        failed : callable
            Gets the error, in the window's thread.
        """
        task = _Task(words, done, failed)
        self._under_way.append(task)
        if len(self._under_way) == 1:
            self.working.emit(words)
        future: Future[Any] = self._pool.submit(work)
        future.add_done_callback(lambda ended: self._hand_back(task, ended))

    def close(self) -> None:
        """Finish what is being worked on, leave out the rest, and end the thread."""
        self._pool.shutdown(wait=True, cancel_futures=True)

    def _hand_back(self, task: _Task, future: "Future[Any]") -> None:
        if future.cancelled():
            return
        error = future.exception()
        self._came_back.emit(task, None if error else future.result(), error)

    def _on_back(self, task: _Task, result: object, error: Exception | None) -> None:
        self._under_way.remove(task)
        self.working.emit(self._under_way[0].words if self._under_way else "")
        if error is None:
            task.done(result)
        else:
            task.failed(error)
