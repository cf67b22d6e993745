"""The register's people: who they are, whether they may sign, and what is done about it."""

from __future__ import annotations

from PySide6.QtWidgets import QHBoxLayout, QVBoxLayout, QWidget

from app.frame.look import Look
from app.pages.desk import Rule, Words, desk_key
from app.pages.table import DeskTable
from app.presenters.keys import RegisterRow
from app.presenters.register import RegisterPresenter
from app.viewmodels.rows import Column
from reports.palette import Colour
from reports.sheet.medium import Size

__all__ = ["PeopleLeaf"]

_COLUMNS = (
    Column[RegisterRow](title="name", text=lambda row: row.person.name, share=1.4, strong=True),
    Column[RegisterRow](title="initials", text=lambda row: row.person.initials, share=0.5),
    Column[RegisterRow](title="role", text=lambda row: row.person.role, share=0.7),
    Column[RegisterRow](
        title="acts for", text=lambda row: row.person.employer or "the shop", share=1.4
    ),
    Column[RegisterRow](title="key", text=lambda row: row.standing, share=1.3),
    Column[RegisterRow](
        title="certificate, first figures", text=lambda row: row.certificate, share=1.9
    ),
)


class PeopleLeaf(QWidget):
    """A table of people, and below it what may be done."""

    def __init__(
        self, presenter: RegisterPresenter, *, look: Look, parent: QWidget | None = None
    ) -> None:
        super().__init__(parent)
        self._presenter = presenter
        column = QVBoxLayout(self)
        column.setContentsMargins(0, 0, 0, 0)
        column.setSpacing(0)
        self.table = DeskTable(_COLUMNS, name="People of the shop", look=look)
        column.addWidget(self.table, 1)
        self._words = Words(look=look, size=Size.NOTE, colour=Colour.INK2)
        self._words.setContentsMargins(24, 6, 24, 6)
        column.addWidget(self._words)
        column.addWidget(Rule(look=look, parent=self))
        foot = QHBoxLayout()
        foot.setContentsMargins(24, 10, 24, 10)
        foot.setSpacing(12)
        self.keys = {
            "set up": desk_key("Set up keys …", look=look),
            "enrol": desk_key("New person …", look=look),
            "change": desk_key("New passphrase …", look=look),
            "replace": desk_key("Replace a lost key …", look=look),
            "unlock": desk_key("Unlock …", look=look),
            "retire": desk_key("Retire …", look=look),
        }
        for name, key in self.keys.items():
            key.clicked.connect(lambda _=False, name=name: self._press(name))
            foot.addWidget(key)
        foot.addStretch(1)
        column.addLayout(foot)
        self.table.selectionModel().currentRowChanged.connect(lambda *_: self._offer())
        presenter.changed.connect(self.refresh)
        self.refresh()

    def refresh(self) -> None:
        """Show the people as the record has them."""
        self.table.set_rows(self._presenter.rows)
        self._words.say(self._presenter.words)
        self._offer()

    def _offer(self) -> None:
        offered = self._presenter.offered(self.table.present_row)
        for name, key in self.keys.items():
            key.setVisible(name in offered)

    def _press(self, name: str) -> None:
        self._presenter.press(name, self.table.present_row)
