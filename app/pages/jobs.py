"""The Jobs desk: the shelf, what may be done with a job on it, and the question before a change."""

from __future__ import annotations

from collections.abc import Callable
from pathlib import Path

from PySide6.QtWidgets import QFileDialog, QHBoxLayout, QStackedWidget, QVBoxLayout, QWidget

from app.frame.look import Look
from app.pages.desk import DeskPage, FlatLine, Rule, Words, desk_key
from app.pages.shelf import ShelfView
from app.presenters.jobs import FILTERS, JobsPresenter
from models.job import Job, Person
from reports.palette import Colour
from reports.sheet.medium import Size
from reports.typeface import Weight

__all__ = ["AskPath", "JobsPage"]

AskPath = Callable[[str, str, str], str]
"""Asks for a file: title, proposed name, kinds; gives its path or nothing."""

_JOB_FILES = "Job files (*.job.json *.json)"
_TRAVELERS = "Travelers (*.pdf)"


class JobsPage(DeskPage):
    """The shelf and its keys."""

    def __init__(
        self,
        presenter: JobsPresenter,
        *,
        look: Look,
        ask_person: Callable[[tuple[Person, ...]], str],
        ask_to_read: AskPath | None = None,
        ask_to_write: AskPath | None = None,
        parent: QWidget | None = None,
    ) -> None:
        super().__init__(name="Jobs", look=look, parent=parent)
        self._presenter = presenter
        self._ask_person = ask_person
        self._ask_to_read = ask_to_read or self._dialog_to_read
        self._ask_to_write = ask_to_write or self._dialog_to_write
        column = QVBoxLayout(self)
        column.setContentsMargins(0, 0, 0, 0)
        column.setSpacing(0)
        column.addWidget(self._make_head())
        column.addWidget(Rule(look=self.look, parent=self))
        column.addWidget(self._make_middle(), 1)
        self._question = self._make_question()
        column.addWidget(self._question)
        column.addWidget(Rule(look=self.look, parent=self))
        column.addWidget(self._make_foot())
        presenter.rows_changed.connect(self.refresh)
        presenter.figures_wanted.connect(self._ask_figures)
        presenter.figures_refused.connect(self._refuse_figures)
        presenter.file_read.connect(self._take)
        presenter.opened.connect(lambda _number: self._close_question())
        self._close_question()
        self.refresh()

    def _make_head(self) -> QWidget:
        head = QWidget(self)
        row = QHBoxLayout(head)
        row.setContentsMargins(24, 12, 24, 12)
        row.setSpacing(8)
        title = Words("Jobs", look=self.look, size=Size.TITLE, weight=Weight.SEMI_BOLD)
        title.setWordWrap(False)
        row.addWidget(title)
        row.addSpacing(24)
        self._search = FlatLine(
            name="Search the shelf",
            hint="Search: serial, tag, customer, part",
            look=self.look,
        )
        self._search.textChanged.connect(self._presenter.search)
        row.addWidget(self._search, 1)
        row.addSpacing(16)
        self._filters = {word: desk_key(word, look=self.look) for word in FILTERS}
        for word, key in self._filters.items():
            key.setCheckable(True)
            key.setAccessibleName(f"Show: {word}")
            key.clicked.connect(lambda _checked=False, word=word: self._presenter.set_filter(word))
            row.addWidget(key)
        return head

    def _make_middle(self) -> QWidget:
        self._middle = QStackedWidget(self)
        self.shelf = ShelfView(look=self.look)
        self.shelf.taken.connect(lambda row: self._presenter.ask_to_open(row.number))
        empty = QWidget()
        column = QVBoxLayout(empty)
        column.setContentsMargins(24, 40, 24, 24)
        self._empty = Words(look=self.look, size=Size.LEAD, colour=Colour.INK2)
        column.addWidget(self._empty)
        column.addStretch(1)
        self._middle.addWidget(self.shelf)
        self._middle.addWidget(empty)
        return self._middle

    def _make_question(self) -> QWidget:
        strip = QWidget(self)
        column = QVBoxLayout(strip)
        column.setContentsMargins(24, 10, 24, 10)
        column.setSpacing(6)
        column.addWidget(Rule(look=self.look))
        row = QHBoxLayout()
        row.setSpacing(12)
        self._asks = Words(look=self.look, weight=Weight.SEMI_BOLD)
        row.addWidget(self._asks, 1)
        self._figures = FlatLine(name="Last figures of the serial", look=self.look)
        self._figures.setFixedWidth(140)
        self._figures.entered.connect(self._give_figures)
        self._figures.given_up.connect(self._close_question)
        row.addWidget(self._figures)
        change = desk_key("Change the rotor", look=self.look)
        change.clicked.connect(self._give_figures)
        row.addWidget(change)
        stay = desk_key("Stay with this one", look=self.look)
        stay.clicked.connect(self._close_question)
        row.addWidget(stay)
        column.addLayout(row)
        self._refusal = Words(look=self.look)
        column.addWidget(self._refusal)
        return strip

    def _make_foot(self) -> QWidget:
        foot = QWidget(self)
        row = QHBoxLayout(foot)
        row.setContentsMargins(24, 10, 24, 12)
        row.setSpacing(12)
        self._open = desk_key("Open at the bench", look=self.look)
        self._open.clicked.connect(self._open_present)
        self._bring = desk_key("Bring in a job file …", look=self.look)
        self._bring.clicked.connect(self.bring_in)
        self._write = desk_key("Write job file …", look=self.look)
        self._write.clicked.connect(self.write_job_file)
        self._traveler = desk_key("Write traveler …", look=self.look)
        self._traveler.clicked.connect(self.write_traveler)
        for key in (self._open, self._bring, self._write, self._traveler):
            row.addWidget(key)
        row.addStretch(1)
        self._count = Words(look=self.look, size=Size.NOTE, colour=Colour.INK2)
        self._count.setWordWrap(False)
        row.addWidget(self._count)
        return foot

    def refresh(self) -> None:
        """Show the jobs as they are known now."""
        rows = self._presenter.rows
        self.shelf.set_rows(rows)
        self._middle.setCurrentIndex(0 if rows else 1)
        # Asked of the window, which need not be the active one while its shelf is being read.
        if self.window().focusWidget() is self:
            self.entrance().setFocus()
        self._empty.say(self._presenter.empty_words)
        for word, key in self._filters.items():
            key.setChecked(word == self._presenter.filter)
        for key in (self._open, self._write, self._traveler):
            key.setEnabled(bool(rows))
        self._count.say("1 job shown" if len(rows) == 1 else f"{len(rows)} jobs shown")

    def entrance(self) -> QWidget:
        """Give the shelf, or the key that brings a first job once the shelf is known empty."""
        if self.shelf.model_of_rows.rows:
            return self.shelf
        return self._bring if self._presenter.is_read else self

    def _open_present(self) -> None:
        row = self.shelf.present_row
        if row is not None:
            self._presenter.ask_to_open(row.number)

    # -- changing the rotor

    def _ask_figures(self, sentence: str) -> None:
        self._asks.say(sentence)
        self._refusal.say("")
        self._refusal.hide()
        self._figures.clear()
        self._question.show()
        self._figures.setFocus()

    def _give_figures(self) -> None:
        self._presenter.give_figures(self._figures.text())

    def _refuse_figures(self, sentence: str) -> None:
        self._refusal.say(sentence)
        self._refusal.show()
        self._figures.selectAll()
        self._figures.setFocus()

    def _close_question(self) -> None:
        self._question.hide()
        self.entrance().setFocus()

    # -- files

    def bring_in(self) -> None:
        """Ask for a job file; what is read whole is taken into the record."""
        path = self._ask_to_read("Bring in a job file", "", _JOB_FILES)
        if path:
            self._presenter.read_file(Path(path))

    def _take(self, job: Job) -> None:
        by = self._who_brings_in(job)
        if by:
            self._presenter.bring_in(job, by=by)

    def _who_brings_in(self, job: Job) -> str:
        bringer = self._presenter.bringer(job)
        return bringer.key if bringer is not None else self._ask_person(job.people)

    def write_job_file(self) -> None:
        """Ask where to, and write the job file of the present row."""
        row = self.shelf.present_row
        if row is None:
            return
        path = self._ask_to_write("Write job file", f"{row.number}.job.json", _JOB_FILES)
        if path:
            self._presenter.write_job_file(row.number, Path(path))

    def write_traveler(self) -> None:
        """Ask where to, and write the traveler of the present row."""
        row = self.shelf.present_row
        if row is None:
            return
        path = self._ask_to_write("Write traveler", f"traveler {row.number}.pdf", _TRAVELERS)
        if path:
            self._presenter.write_traveler(row.number, Path(path))

    def _dialog_to_read(self, title: str, name: str, kinds: str) -> str:
        return QFileDialog.getOpenFileName(self, title, name, kinds)[0]

    def _dialog_to_write(self, title: str, name: str, kinds: str) -> str:
        return QFileDialog.getSaveFileName(self, title, name, kinds)[0]
