"""The benches of a window: one for each job that was opened there, kept while the window stands."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass

from PySide6.QtWidgets import QStackedWidget, QWidget

from app.frame.look import Look
from app.pages.plain_desk import PlainDesk
from app.presenters.shop import ShopPresenter

__all__ = ["Bench", "Benches", "MakeBench"]


@dataclass(kw_only=True)
class Bench:
    """The bench of one job, as the window needs it.

    Attributes
    ----------
    page : QWidget
        What is shown.
    person : str
        Key of who acts at it.
    sign_in : callable
        Lets another person act at it; nothing typed is lost.
    reload : callable
        Reads the job again, once something was recorded at another desk.
    desk_acts : int
        How many acts the other desks had recorded when it was read [-].
    """

    page: QWidget
    person: str
    sign_in: Callable[[str], None]
    reload: Callable[[], None]
    desk_acts: int = 0


MakeBench = Callable[[str, str, Look, QWidget], Bench]
"""Makes the bench for a job and a person, with a look, inside a parent."""


class Benches:
    """Brings the bench of the job on the desks to the front, or says why it is closed."""

    def __init__(
        self,
        shop: ShopPresenter,
        stack: QStackedWidget,
        *,
        make_bench: MakeBench,
        window: QWidget,
    ) -> None:
        self._shop = shop
        self._stack = stack
        self._make_bench = make_bench
        self._window = window
        # Kept while the window stands: what was typed at a bench is found again.
        self._benches: dict[str, Bench] = {}
        self.closed = PlainDesk("", look=Look(), parent=window)

    @property
    def pages(self) -> tuple[QWidget, ...]:
        """The benches that have been made."""
        return tuple(bench.page for bench in self._benches.values())

    @property
    def is_closed(self) -> bool:
        """Whether the sentence why there is no bench is in front."""
        return self._stack.currentWidget() is self.closed

    def why_closed(self) -> str:
        """Say why nobody can work at the bench now; nothing where somebody can.

        Returns
        -------
        str
            A sentence, or nothing.
        """
        shop = self._shop
        if not shop.is_read:
            return "working: reading the shelf"
        if not shop.job_number:
            return "Choose a job first, at the Jobs desk."
        if shop.job is None:
            return f"working: job {shop.job_number} is being read"
        if shop.person is None:
            return "Say who is at the window first: press the words at the upper right."
        return ""

    def show(self, look: Look) -> None:
        """Bring the bench of the job on the desks to the front.

        Parameters
        ----------
        look : Look
            The window's look.
        """
        words = self.why_closed()
        if words:
            self.closed.words.say(words)
            self._stack.setCurrentWidget(self.closed)
            return
        job, person = self._shop.job_number, self._shop.person_key
        bench = self._benches.get(job)
        if bench is None:
            bench = self._make_bench(job, person, look, self._window)
            bench.desk_acts = self._shop.desk_acts
            self._benches[job] = bench
            self._stack.addWidget(bench.page)
        if bench.person != person:
            bench.person = person
            bench.sign_in(person)
        if bench.desk_acts != self._shop.desk_acts:
            bench.desk_acts = self._shop.desk_acts
            bench.reload()
        self._stack.setCurrentWidget(bench.page)
