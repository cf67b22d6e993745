"""The one thread that writes: acts in the order they were made, their answers back to the page.

A value counts as written when its act comes back. When one fails, all that follow wait behind it
and are tried again in the same order with the same identifiers, so that nothing is lost, doubled
or out of order.
"""

from collections import deque
from collections.abc import Callable
from concurrent.futures import Future, ThreadPoolExecutor
from dataclasses import dataclass
from typing import Any

from PySide6.QtCore import QObject, Qt, Signal

__all__ = ["Task", "Writer"]


@dataclass(frozen=True)
class Task:
    """One act to be written, and whom to tell."""

    act: Callable[[], Any]
    done: Callable[[Any], None]
    refused: Callable[[Exception], None]


class Writer(QObject):
    """Runs acts one after the other in a thread of its own."""

    written = Signal(str)
    """Something is on the disk; carries nothing but the fact, for whoever shows the time."""
    failed = Signal(Exception)
    """The surroundings failed (disk, lock ...); what waits is kept until `try_again`."""
    idle = Signal()
    """Nothing waits to be written."""

    _came_back = Signal(object, object)

    def __init__(
        self, *, surroundings: tuple[type[Exception], ...], parent: QObject | None = None
    ) -> None:
        super().__init__(parent)
        self._surroundings = surroundings
        self._pool = ThreadPoolExecutor(max_workers=1, thread_name_prefix="writer")
        self._waiting: deque[Task] = deque()
        self._running: Task | None = None
        self._halted = False
        self._came_back.connect(self._on_back, Qt.ConnectionType.QueuedConnection)

    @property
    def is_idle(self) -> bool:
        """Whether nothing waits to be written."""
        return self._running is None and not self._waiting

    @property
    def is_halted(self) -> bool:
        """Whether writing stopped at trouble and waits for `try_again`."""
        return self._halted

    def write(
        self,
        act: Callable[[], Any],
        *,
        done: Callable[[Any], None],
        refused: Callable[[Exception], None],
    ) -> None:
        """Queue an act; `done` gets what it returns, `refused` an error that no retry mends."""
        self._waiting.append(Task(act, done, refused))
        self._next()

    def try_again(self) -> None:
        """Go on after trouble, from the act that failed."""
        self._halted = False
        self._next()

    def close(self) -> None:
        """Finish what is being written and end the thread."""
        self._pool.shutdown(wait=True)

    def _next(self) -> None:
        if self._running is not None or self._halted:
            return
        if not self._waiting:
            self.idle.emit()
            return
        self._running = self._waiting.popleft()
        future: Future[Any] = self._pool.submit(self._running.act)
        future.add_done_callback(self._hand_back)

    def _hand_back(self, future: "Future[Any]") -> None:
        """Cross from the writing thread to the page's."""
        error = future.exception()
        self._came_back.emit(None if error else future.result(), error)

    def _on_back(self, result: object, error: Exception | None) -> None:
        task = self._running
        self._running = None
        if task is None:
            return
        if error is None:
            self.written.emit("")
            task.done(result)
        elif isinstance(error, self._surroundings):
            self._waiting.appendleft(task)
            self._halted = True
            self.failed.emit(error)
            return
        else:
            task.refused(error)
        self._next()
