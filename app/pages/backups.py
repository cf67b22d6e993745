"""The Backups desk: the last one, the second folder, a look into one, and going back to it."""

from __future__ import annotations

from collections.abc import Callable

from PySide6.QtCore import Qt
from PySide6.QtWidgets import QFileDialog, QHBoxLayout, QVBoxLayout, QWidget

from app.frame.look import Look
from app.pages.desk import DeskPage, DeskScroll, Rule, Words, desk_key
from app.pages.table import DeskTable
from app.presenters.backups import SCHEDULE, BackupRow, BackupsPresenter
from app.viewmodels.rows import Column
from reports.palette import Colour
from reports.sheet.medium import Size
from reports.typeface import Weight

__all__ = ["BackupsPage"]

_COLUMNS = (
    Column[BackupRow](title="made", text=lambda row: row.made, strong=True),
    Column[BackupRow](title="where", text=lambda row: row.place, share=1.6),
    Column[BackupRow](title="size", text=lambda row: row.size, right=True, share=0.6),
)
_PUT_BACK = "Put the record back to it"
_SURE = "Yes, put it back now"


class BackupsPage(DeskPage):
    """Backups at the left, what one of them holds at the right."""

    def __init__(
        self,
        presenter: BackupsPresenter,
        *,
        look: Look,
        ask_folder: Callable[[str], str] | None = None,
        parent: QWidget | None = None,
    ) -> None:
        super().__init__(name="Backups", look=look, parent=parent)
        self._presenter = presenter
        self._ask_folder = ask_folder or self._dialog
        self._asked = False
        column = QVBoxLayout(self)
        column.setContentsMargins(0, 0, 0, 0)
        column.setSpacing(0)
        column.addWidget(self._make_head())
        column.addWidget(Rule(look=self.look, parent=self))
        row = QHBoxLayout()
        row.setContentsMargins(0, 0, 0, 0)
        row.setSpacing(0)
        self.backups = DeskTable(_COLUMNS, name="Backups", look=self.look)
        self.backups.looked_at.connect(self._choose)
        self.backups.taken.connect(self._presenter.look_into)
        row.addWidget(self.backups, 5)
        row.addWidget(Rule(look=self.look, upright=True))
        row.addWidget(self._make_held(), 4)
        column.addLayout(row, 1)
        column.addWidget(Rule(look=self.look, parent=self))
        column.addWidget(self._make_foot())
        presenter.changed.connect(self._show)
        self._show()

    def _make_head(self) -> QWidget:
        head = QWidget(self)
        lines = QVBoxLayout(head)
        lines.setContentsMargins(24, 12, 24, 12)
        lines.setSpacing(4)
        lines.addWidget(Words("Backups", look=self.look, size=Size.TITLE, weight=Weight.SEMI_BOLD))
        self._last = Words(look=self.look)
        self._second = Words(look=self.look, colour=Colour.INK2)
        lines.addWidget(self._last)
        lines.addWidget(self._second)
        lines.addWidget(Words(SCHEDULE, look=self.look, size=Size.NOTE, colour=Colour.INK2))
        return head

    def _make_held(self) -> QWidget:
        scroll = DeskScroll(name="What the backup holds", look=self.look)
        inner = QWidget()
        column = QVBoxLayout(inner)
        column.setContentsMargins(24, 12, 24, 16)
        column.setSpacing(10)
        self._held = Words(look=self.look)
        self._asks = Words(look=self.look, weight=Weight.SEMI_BOLD)
        self._back = desk_key(_PUT_BACK, look=self.look)
        self._back.clicked.connect(self._put_back)
        column.addWidget(self._held)
        column.addWidget(self._asks)
        column.addWidget(self._back, 0, Qt.AlignmentFlag.AlignLeft)
        column.addStretch(1)
        scroll.setWidget(inner)
        return scroll

    def _make_foot(self) -> QWidget:
        foot = QWidget(self)
        row = QHBoxLayout(foot)
        row.setContentsMargins(24, 10, 24, 12)
        row.setSpacing(12)
        self._now = desk_key("Back up now", look=self.look)
        self._now.clicked.connect(self._presenter.back_up)
        self._into = desk_key("Look into it", look=self.look)
        self._into.clicked.connect(self._look_into)
        second = desk_key("Second folder …", look=self.look)
        second.clicked.connect(self.choose_second_folder)
        self._none = desk_key("No second folder", look=self.look)
        self._none.clicked.connect(lambda: self._presenter.set_second_folder(""))
        for key in (self._now, self._into, second, self._none):
            row.addWidget(key)
        row.addStretch(1)
        return foot

    def refresh(self) -> None:
        """List the backups anew."""
        self._presenter.read()

    def entrance(self) -> QWidget:
        """Give the backups, or the key that makes the first."""
        return self.backups if self._presenter.rows else self._now

    def choose_second_folder(self) -> None:
        """Ask for the folder that gets a copy of each backup."""
        folder = self._ask_folder(self._presenter.second_folder)
        if folder:
            self._presenter.set_second_folder(folder)

    def _dialog(self, present: str) -> str:
        return QFileDialog.getExistingDirectory(self, "Copy each backup to", present)

    def _show(self) -> None:
        presenter = self._presenter
        self._last.say(presenter.last_words)
        self._second.say(presenter.second_words)
        if self.backups.model_of_rows.rows != presenter.rows:
            self.backups.set_rows(presenter.rows)
        self._into.setEnabled(bool(presenter.rows))
        self._none.setVisible(bool(presenter.second_folder))
        self._held.say(
            presenter.look_words or "Choose a backup and look into it; that changes nothing."
        )
        self._forget_question()

    def _forget_question(self) -> None:
        self._asked = False
        self._asks.hide()
        self._back.set_words(_PUT_BACK)
        self._back.setAccessibleName(_PUT_BACK)
        self._back.setVisible(self._presenter.look is not None)

    def _choose(self, _row: object) -> None:
        self._forget_question()

    def _look_into(self) -> None:
        row = self.backups.present_row
        if row is not None:
            self._presenter.look_into(row)

    def _put_back(self) -> None:
        look = self._presenter.look
        if look is None:
            return
        if self._asked:
            self._forget_question()
            self._presenter.put_back()
            return
        self._asked = True
        lost = look.acts_left_behind
        acts = "1 act is" if lost == 1 else f"{lost} acts are"
        self._asks.say(
            f"The record would be what {look.backup.path.name} holds, and {acts} left behind. "
            "Today's record is set aside, not deleted. Is that what you want?"
        )
        self._asks.show()
        self._back.set_words(_SURE)
        self._back.setAccessibleName(_SURE)
