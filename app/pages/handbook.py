"""The Handbook desk: every rule and formula, to be searched, with its source and its tests."""

from __future__ import annotations

from PySide6.QtWidgets import QHBoxLayout, QVBoxLayout, QWidget

from app.frame.look import Look
from app.pages.desk import DeskPage, FlatLine, Rule, Words
from app.pages.table import DeskTable
from app.presenters.handbook import HandbookPresenter, PageLine
from app.viewmodels.rows import Column
from models.handbook import Entry
from reports.palette import Colour
from reports.sheet.medium import Size
from reports.typeface import Weight

__all__ = ["HandbookPage"]

_ENTRY_COLUMNS = (
    Column[Entry](title="name", text=lambda row: _listed(row.name), share=1.0, strong=True),
    Column[Entry](title="what it says", text=lambda row: row.statement, share=1.5),
)
_PAGE_COLUMNS = (
    Column[PageLine](title="", text=lambda row: row.what, share=0.7, strong=True),
    Column[PageLine](title="", text=lambda row: row.says, share=4.0),
)


class HandbookPage(DeskPage):
    """A line to search with; what was found at the left, the open page at the right."""

    def __init__(
        self, presenter: HandbookPresenter, *, look: Look, parent: QWidget | None = None
    ) -> None:
        super().__init__(name="Handbook", look=look, parent=parent)
        self._presenter = presenter
        column = QVBoxLayout(self)
        column.setContentsMargins(0, 0, 0, 0)
        column.setSpacing(0)
        column.addWidget(self._make_head())
        column.addWidget(Rule(look=self.look, parent=self))
        column.addWidget(self._make_middle(), 1)
        presenter.changed.connect(self.refresh)
        self.refresh()

    def _make_head(self) -> QWidget:
        head = QWidget()
        lines = QHBoxLayout(head)
        lines.setContentsMargins(24, 10, 24, 10)
        lines.setSpacing(16)
        self.line = FlatLine(
            name="Search the handbook",
            hint="A rule, a formula, the name of a number, or words",
            look=self.look,
        )
        self.line.textEdited.connect(self._presenter.search)
        self.line.entered.connect(lambda: self.entries.setFocus())
        self.line.given_up.connect(lambda: self.search(""))
        self._standing = Words(look=self.look, colour=Colour.INK2)
        lines.addWidget(self.line, 2)
        lines.addWidget(self._standing, 3)
        return head

    def _make_middle(self) -> QWidget:
        middle = QWidget()
        row = QHBoxLayout(middle)
        row.setContentsMargins(0, 0, 0, 0)
        row.setSpacing(0)
        self.entries = DeskTable(_ENTRY_COLUMNS, name="Rules and formulas", look=self.look)
        self.entries.looked_at.connect(self._open)
        row.addWidget(self.entries, 2)
        row.addWidget(Rule(look=self.look, upright=True))
        row.addWidget(self._make_page(), 3)
        return middle

    def _make_page(self) -> QWidget:
        panel = QWidget()
        column = QVBoxLayout(panel)
        column.setContentsMargins(0, 0, 0, 0)
        column.setSpacing(0)
        self._head = Words(look=self.look, size=Size.LEAD, weight=Weight.SEMI_BOLD)
        self._head.setMargin(8)
        column.addWidget(self._head)
        self.page = DeskTable(_PAGE_COLUMNS, name="The open page", look=self.look, edge=8)
        # Its two columns say themselves what they are.
        self.page.horizontalHeader().hide()
        column.addWidget(self.page, 1)
        return panel

    def search(self, words: str) -> None:
        """Search for words and open the first page found.

        Parameters
        ----------
        words : str
            A rule's id, a formula's name, the name of a number, or words.
        """
        self.line.setText(words)
        self._presenter.search(words)
        self.refresh()

    def refresh(self) -> None:
        """List what was found and open the first of it."""
        found = self._presenter.entries
        if found != self.entries.model_of_rows.rows:
            self.entries.set_rows(found)
            if found:
                self.entries.selectRow(0)
                self.entries.scrollToTop()
        self._standing.say(self._presenter.standing)
        self._open(self.entries.present_row)

    def _open(self, one: Entry | None) -> None:
        self._head.say(one.name if one is not None else "")
        self.page.set_rows(self._presenter.page(one) if one is not None else ())
        self.page.clearSelection()
        self.page.scrollToTop()

    def entrance(self) -> QWidget:
        """Give the line to search with."""
        return self.line


def _listed(name: str) -> str:
    """Write a formula's name in words, its module after it; a rule's id stays."""
    module, dot, function = name.rpartition(".")
    return f"{function.replace('_', ' ')} ({module.replace('_', ' ')})" if dot else name
