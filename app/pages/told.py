"""Leaves of the Inspection desk: what was told beside the mounting, numbers, and old verdicts."""

from __future__ import annotations

from PySide6.QtWidgets import QHBoxLayout, QVBoxLayout, QWidget

from app.frame.look import Look
from app.pages.desk import Rule, Words, desk_key
from app.pages.leaves import Leaves
from app.pages.table import DeskTable
from app.presenters.telling.rows import NumberedRow, OldVerdictRow, ToldRow
from app.presenters.telling.telling import TellingPresenter
from app.viewmodels.rows import Column
from reports.palette import Colour
from reports.sheet.medium import Size

__all__ = ["TOLD", "ToldLeaf", "add_told_leaves"]

TOLD, NUMBERED, OLD_VERDICTS = "Also told", "Numbered", "Old verdicts"

_TOLD_COLUMNS = (
    Column[ToldRow](title="what", text=lambda row: row.kind, share=0.8, strong=True),
    Column[ToldRow](title="where", text=lambda row: row.where, share=1.2),
    Column[ToldRow](title="in words", text=lambda row: row.words, share=3.4),
    Column[ToldRow](title="by", text=lambda row: row.by, share=0.9),
    Column[ToldRow](title="when", text=lambda row: row.at, share=0.9),
)
_NUMBERED_COLUMNS = (
    Column[NumberedRow](title="number", text=lambda row: str(row.number), share=0.4, strong=True),
    Column[NumberedRow](title="finding", text=lambda row: row.words, share=3.0),
    Column[NumberedRow](title="opened", text=lambda row: row.opened, share=0.9),
    Column[NumberedRow](title="how it stands", text=lambda row: row.stands, share=1.6),
)
_OLD_COLUMNS = (
    Column[OldVerdictRow](title="rule", text=lambda row: row.rule, share=1.1, strong=True),
    Column[OldVerdictRow](title="where", text=lambda row: row.where),
    Column[OldVerdictRow](title="stands as given", text=lambda row: row.was, share=1.4),
    Column[OldVerdictRow](title="today's rule says", text=lambda row: row.now, share=1.1),
    Column[OldVerdictRow](title="in words", text=lambda row: row.because, share=2.4),
)
_KEYS = {
    "seen": "Something seen …",
    "point": "At a point …",
    "sent": "Work sent off …",
    "back": "Work is back …",
    "tight": "Tightened …",
    "file": "Picture or document …",
}


class ToldLeaf(QWidget):
    """A table of what was told, and below it what may be told."""

    def __init__(
        self, presenter: TellingPresenter, *, look: Look, parent: QWidget | None = None
    ) -> None:
        super().__init__(parent)
        self._presenter = presenter
        column = QVBoxLayout(self)
        column.setContentsMargins(0, 0, 0, 0)
        column.setSpacing(0)
        self.table = DeskTable(_TOLD_COLUMNS, name="Also told", look=look)
        column.addWidget(self.table, 1)
        self._words = Words(look=look, size=Size.NOTE, colour=Colour.INK2)
        self._words.setContentsMargins(24, 6, 24, 6)
        column.addWidget(self._words)
        column.addWidget(Rule(look=look, parent=self))
        foot = QHBoxLayout()
        foot.setContentsMargins(24, 10, 24, 10)
        foot.setSpacing(12)
        self.keys = {}
        for name, words in _KEYS.items():
            key = desk_key(words, look=look)
            key.clicked.connect(lambda _=False, name=name: self._presenter.press(name))
            foot.addWidget(key)
            self.keys[name] = key
        foot.addStretch(1)
        column.addLayout(foot)

    def refresh(self) -> None:
        """Show what is told by now."""
        rows = self._presenter.told
        self.table.set_rows(rows)
        offered = self._presenter.offered
        for name, key in self.keys.items():
            key.setVisible(name in offered)
        self._words.say(
            "What is told here stands in the traveler."
            if rows
            else "Nothing is told yet: what was seen, sent off, tightened or attached, or what "
            "happened at a point."
        )


def add_told_leaves(leaves: Leaves, presenter: TellingPresenter, *, look: Look) -> None:
    """Put up the three leaves, and show each anew when the job changes.

    Parameters
    ----------
    leaves : Leaves
        Where they are put up.
    presenter : TellingPresenter
        What they show.
    look : Look
        How they look.
    """
    told = ToldLeaf(presenter, look=look)
    numbered = DeskTable(_NUMBERED_COLUMNS, name="Numbered findings", look=look)
    old = DeskTable(_OLD_COLUMNS, name="Verdicts that today's rules give otherwise", look=look)
    for name, leaf in ((TOLD, told), (NUMBERED, numbered), (OLD_VERDICTS, old)):
        leaves.add(name, leaf)

    def refresh() -> None:
        told.refresh()
        numbered.set_rows(presenter.numbered)
        old.set_rows(presenter.old_verdicts)
        leaves.count(NUMBERED, sum(1 for one in presenter.numbered if one.stands == "open"))
        leaves.count(OLD_VERDICTS, len(presenter.old_verdicts))

    presenter.changed.connect(refresh)
    refresh()
