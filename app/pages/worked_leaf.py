"""A leaf of numbers worked out: the numbers at the left, what stands behind one at the right."""

from __future__ import annotations

from collections.abc import Callable, Sequence

from PySide6.QtGui import QShowEvent
from PySide6.QtWidgets import QHBoxLayout, QWidget

from app.frame.look import Look
from app.pages.table import DeskTable
from app.presenters.reasons import Reason
from app.presenters.worked_rows import WorkedRow
from app.viewmodels.rows import Column

__all__ = ["WorkedLeaf"]

_COLUMNS = (
    Column[WorkedRow](title="of", text=lambda row: row.where, share=1.7),
    Column[WorkedRow](title="number", text=lambda row: row.what, share=1.7, strong=True),
    Column[WorkedRow](title="is", text=lambda row: row.value, share=1.2, right=True),
)
_REASON_COLUMNS = (
    Column[Reason](title="behind it", text=lambda row: row[0], share=0.6),
    Column[Reason](title="which says", text=lambda row: row[1], share=2.2),
)


class WorkedLeaf(QWidget):
    """Works its numbers out when it is first looked at, since nothing else needs all of them."""

    def __init__(
        self,
        rows: Callable[[], Sequence[WorkedRow]],
        *,
        look: Look,
        parent: QWidget | None = None,
    ) -> None:
        super().__init__(parent)
        self._rows = rows
        self._stale = True
        row = QHBoxLayout(self)
        row.setContentsMargins(0, 0, 0, 0)
        row.setSpacing(0)
        self.table = DeskTable(_COLUMNS, name="Numbers worked out", look=look)
        self.reasons = DeskTable(_REASON_COLUMNS, name="What stands behind it", look=look)
        row.addWidget(self.table, 3)
        row.addWidget(self.reasons, 3)
        self.table.looked_at.connect(self._open)
        self.setFocusProxy(self.table)

    def refresh(self) -> None:
        """Another job or another state of it is shown."""
        self._stale = True
        if self.isVisible():
            self._fill()

    def showEvent(self, event: QShowEvent) -> None:
        """Work the numbers out, if that has not been done for what is shown."""
        super().showEvent(event)
        self._fill()

    def _fill(self) -> None:
        if self._stale:
            self._stale = False
            self.table.set_rows(self._rows())
            self._open(self.table.present_row)

    def _open(self, row: WorkedRow | None) -> None:
        self.reasons.set_rows(row.reasons if row is not None else ())
