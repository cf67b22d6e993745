"""The dialog in which somebody says who they are."""

from __future__ import annotations

from collections.abc import Sequence

from PySide6.QtCore import QRectF
from PySide6.QtGui import QPaintEvent
from PySide6.QtWidgets import QDialog, QHBoxLayout, QVBoxLayout, QWidget

from app.frame.look import Look
from app.frame.plain import flat_painter
from app.pages.desk import Words, desk_key, desk_look
from app.pages.table import DeskTable
from app.viewmodels.rows import Column
from models.job import Person
from reports.palette import Colour
from reports.sheet.medium import DESK, LineWidth, Size
from reports.typeface import Weight

__all__ = ["PeopleDialog"]

_ON_TRUST = (
    "Names are taken on trust: whoever sits here may choose any of them, until people's keys are "
    "set up. What you record from now on stands under the name you choose."
)


_SIGNING_ASKS = (
    "What you record from now on stands under the name you choose. Signing asks for that person's "
    "passphrase or PIN."
)


class PeopleDialog(QDialog):
    """Lists people with their role; Enter or a double touch takes one."""

    def __init__(
        self,
        people: Sequence[Person],
        *,
        asks: str,
        look: Look,
        present: str = "",
        keyed: bool = False,
        parent: QWidget | None = None,
    ) -> None:
        super().__init__(parent)
        self.setWindowTitle("Who is at the window")
        self.setAccessibleName("Who is at the window")
        self.chosen = ""
        dress = desk_look(look)
        self._look = dress
        column = QVBoxLayout(self)
        column.setContentsMargins(24, 20, 24, 20)
        column.setSpacing(12)
        column.addWidget(Words(asks, look=dress, size=Size.LEAD, weight=Weight.SEMI_BOLD))
        self.table = DeskTable(
            [
                Column(title="name", text=lambda one: one.name, share=1.4, strong=True),
                Column(title="role", text=lambda one: one.role),
                Column(title="acts for", text=lambda one: one.employer or "the shop", share=1.6),
            ],
            name="People",
            edge=8,
            look=dress,
        )
        self.table.set_rows(tuple(people))
        self.table.taken.connect(self._take)
        column.addWidget(self.table, 1)
        column.addWidget(
            Words(
                _SIGNING_ASKS if keyed else _ON_TRUST,
                look=dress,
                size=Size.NOTE,
                colour=Colour.INK2,
            )
        )
        row = QHBoxLayout()
        row.setSpacing(12)
        row.addStretch(1)
        take = desk_key("This is me", look=dress)
        take.clicked.connect(lambda: self._take(self.table.present_row))
        leave = desk_key("Change nothing", look=dress)
        leave.clicked.connect(self.reject)
        row.addWidget(take)
        row.addWidget(leave)
        column.addLayout(row)
        grown = dress.size(Size.TEXT) / DESK.size(Size.TEXT)
        self.resize(round(min(680 * grown, 1180)), round(min(480 * grown, 740)))
        keys = [one.key for one in people]
        self.table.selectRow(keys.index(present) if present in keys else 0)
        self.table.setFocus()

    def paintEvent(self, event: QPaintEvent) -> None:
        """Part the dialog from what lies behind it, also where no window frame does."""
        super().paintEvent(event)
        painter = flat_painter(self)
        wide = self._look.line(LineWidth.WIDE)
        painter.setPen(self._look.pen(Colour.INK, LineWidth.WIDE))
        frame = QRectF(self.rect())
        painter.drawRect(frame.adjusted(wide / 2, wide / 2, -wide / 2, -wide / 2))
        painter.end()

    def _take(self, person: Person | None) -> None:
        if person is not None:
            self.chosen = person.key
            self.accept()
