"""The Register desk's page: a leaf for each thing that the shop keeps for all its jobs."""

from __future__ import annotations

from collections.abc import Sequence

from PySide6.QtWidgets import QVBoxLayout, QWidget

from app.frame.look import Look
from app.pages.desk import DeskPage, Words
from app.pages.leaves import Leaves
from app.pages.register.people import PeopleLeaf
from app.presenters.register import RegisterPresenter
from reports.palette import Colour
from reports.sheet.medium import Size
from reports.typeface import Weight

__all__ = ["RegisterPage"]


class RegisterPage(DeskPage):
    """People first, then what else the shop keeps."""

    def __init__(
        self,
        presenter: RegisterPresenter,
        *,
        look: Look,
        more: Sequence[tuple[str, QWidget]] = (),
        parent: QWidget | None = None,
    ) -> None:
        super().__init__(name="Register", look=look, parent=parent)
        self._presenter = presenter
        column = QVBoxLayout(self)
        column.setContentsMargins(0, 12, 0, 0)
        column.setSpacing(6)
        title = Words("Register", look=self.look, size=Size.TITLE, weight=Weight.SEMI_BOLD)
        title.setContentsMargins(24, 0, 24, 0)
        column.addWidget(title)
        self._shop = Words(look=self.look, size=Size.NOTE, colour=Colour.INK2)
        self._shop.setContentsMargins(24, 0, 24, 0)
        column.addWidget(self._shop)
        self.leaves = Leaves(look=self.look, parent=self)
        self.people = PeopleLeaf(presenter, look=self.look)
        self.leaves.add("People", self.people)
        for name, leaf in more:
            self.leaves.add(name, leaf)
        column.addWidget(self.leaves, 1)
        presenter.changed.connect(self._show)
        self._show()

    def _show(self) -> None:
        self._shop.say(self._presenter.shop_words)
        self.leaves.count("People", len(self._presenter.rows))

    def refresh(self) -> None:
        """Read the register again."""
        self._presenter.read()

    def entrance(self) -> QWidget:
        """Give the table of the leaf that is shown."""
        return self.leaves.entrance()
