"""The Witness desk: the rotor's story in pictures, to be shown to a visitor."""

from __future__ import annotations

from PySide6.QtGui import QResizeEvent
from PySide6.QtWidgets import QHBoxLayout, QStackedWidget, QVBoxLayout, QWidget

from app.frame.look import Look
from app.pages.desk import DeskPage, DeskScroll, DeskSheet, Rule, Words
from app.pages.drawings import attempt_sheet
from app.pages.table import DeskTable
from app.presenters.story import Asked, Chapter, StoryPresenter
from app.viewmodels.rows import Column
from reports.palette import Colour
from reports.sheet.medium import Size
from reports.typeface import Weight

__all__ = ["StoryPage"]

_CHAPTERS_SHARE = 0.29
_CHAPTER_COLUMNS = (
    Column[Chapter](
        title="the story so far",
        text=lambda row: f"{row.title}\n{row.outcome}, {row.subtitle}",
        shape=lambda row: row.kind,
    ),
)
_ASKED_COLUMNS = (
    Column[Asked](
        title="asked of the witness",
        text=lambda row: row.what,
        shape=lambda row: row.kind,
        share=1.4,
    ),
    Column[Asked](title="as it stands", text=lambda row: row.words),
)


class StoryPage(DeskPage):
    """Chapters at the left, the one that is looked at at the right."""

    def __init__(
        self, presenter: StoryPresenter, *, look: Look, parent: QWidget | None = None
    ) -> None:
        super().__init__(name="Witness", look=look, parent=parent)
        self._presenter = presenter
        around = QVBoxLayout(self)
        around.setContentsMargins(0, 0, 0, 0)
        self._stack = QStackedWidget(self)
        around.addWidget(self._stack)
        empty = QWidget()
        column = QVBoxLayout(empty)
        column.setContentsMargins(24, 40, 24, 24)
        self._empty = Words(look=self.look, size=Size.LEAD, colour=Colour.INK2)
        column.addWidget(self._empty)
        column.addStretch(1)
        self._stack.addWidget(empty)
        self._stack.addWidget(self._make_story())
        presenter.changed.connect(self.refresh)
        self.refresh()

    def _make_story(self) -> QWidget:
        whole = QWidget()
        column = QVBoxLayout(whole)
        column.setContentsMargins(0, 0, 0, 0)
        column.setSpacing(0)
        head = QWidget()
        lines = QVBoxLayout(head)
        lines.setContentsMargins(24, 10, 24, 8)
        lines.setSpacing(2)
        self._heading = Words(look=self.look, size=Size.TITLE, weight=Weight.SEMI_BOLD)
        self._summary = Words(look=self.look, colour=Colour.INK2)
        lines.addWidget(self._heading)
        lines.addWidget(self._summary)
        column.addWidget(head)
        column.addWidget(Rule(look=self.look))
        row = QHBoxLayout()
        row.setContentsMargins(0, 0, 0, 0)
        row.setSpacing(0)
        self.chapters = DeskTable(_CHAPTER_COLUMNS, name="Chapters of the story", look=self.look)
        self.chapters.looked_at.connect(self._show_chapter)
        row.addWidget(self.chapters)
        row.addWidget(Rule(look=self.look, upright=True))
        row.addWidget(self._make_chapter(), 1)
        column.addLayout(row, 1)
        return whole

    def _make_chapter(self) -> QWidget:
        scroll = DeskScroll(name="Chapter", look=self.look)
        inner = QWidget()
        column = QVBoxLayout(inner)
        column.setContentsMargins(24, 12, 24, 16)
        column.setSpacing(8)
        self._title = Words(look=self.look, size=Size.LEAD, weight=Weight.SEMI_BOLD)
        self._outcome = Words(look=self.look, colour=Colour.INK2)
        self._sentences = Words(look=self.look)
        self.sheet = DeskSheet(look=self.look)
        self.asked = DeskTable(_ASKED_COLUMNS, name="Asked", look=self.look, grows=True, edge=0)
        for part in (self._title, self._outcome, self.sheet, self._sentences, self.asked):
            column.addWidget(part)
        column.addStretch(1)
        scroll.setWidget(inner)
        return scroll

    def refresh(self) -> None:
        """Tell the story as it is known now."""
        presenter = self._presenter
        chapters = presenter.chapters
        self._empty.say(presenter.empty_words)
        self._stack.setCurrentIndex(1 if chapters else 0)
        self._heading.say(presenter.heading)
        self._summary.say(presenter.summary)
        is_new = self.chapters.present_row is None
        self.chapters.set_rows(chapters)
        if chapters and is_new:
            self.chapters.selectRow(len(chapters) - 1)
        self._show_chapter(self.chapters.present_row)

    def entrance(self) -> QWidget:
        """Give the chapters."""
        return self.chapters

    def _show_chapter(self, chapter: Chapter | None) -> None:
        if chapter is None:
            return
        self._title.say(chapter.title)
        self._outcome.say(f"{chapter.outcome}, {chapter.subtitle}")
        self._sentences.say("\n".join(chapter.sentences))
        self.asked.set_rows(chapter.asked)
        self.asked.setVisible(bool(chapter.asked))
        self._draw()

    def _draw(self) -> None:
        self.chapters.setFixedWidth(round(max(self.width() * _CHAPTERS_SHARE, 300.0)))
        chapter: Chapter | None = self.chapters.present_row
        picture = self._presenter.picture(chapter) if chapter is not None else None
        if picture is None or not self.isVisible():
            return
        width = float(max(self.width() - self.chapters.width() - 64, 400))
        planes = self.look.between(narrow=200.0, wide=300.0)
        sheet = attempt_sheet(picture, width=width, planes=planes)
        self.sheet.setFixedHeight(round(sheet.height))
        self.sheet.show_sheet(sheet)

    def showEvent(self, event: object) -> None:
        """Draw what was left undrawn while another desk was in front."""
        self._draw()

    def look_changed(self) -> None:
        """Draw for the new width."""
        self._draw()

    def resizeEvent(self, event: QResizeEvent) -> None:
        """Draw for the new width."""
        super().resizeEvent(event)
        self._draw()
