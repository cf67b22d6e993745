"""One Qt table model for every table: frozen rows in, columns that say how each is shown."""

from __future__ import annotations

from collections.abc import Callable, Sequence
from dataclasses import dataclass
from typing import Any, Generic, TypeVar

from PySide6.QtCore import QAbstractTableModel, QModelIndex, QObject, QPersistentModelIndex, Qt

from reports.sheet.pictures import VerdictKind

__all__ = ["ROW_ROLE", "SHAPE_ROLE", "STRUCK_ROLE", "Column", "RowsModel"]

Row = TypeVar("Row")
Index = QModelIndex | QPersistentModelIndex

ROW_ROLE = Qt.ItemDataRole.UserRole
"""Role under which the frozen row itself is found."""
SHAPE_ROLE = Qt.ItemDataRole.UserRole + 1
"""Role under which a cell's verdict shape is found; None where it has none."""
STRUCK_ROLE = Qt.ItemDataRole.UserRole + 2
"""Role that says whether a cell's words have been struck."""

_NOWHERE = QModelIndex()


@dataclass(frozen=True, kw_only=True)
class Column(Generic[Row]):
    """How one column shows a row.

    Attributes
    ----------
    title : str
        Its head.
    text : callable
        From a row to the words in its cell.
    share : float
        Part of the free width it takes beside the others [-].
    right : bool
        Whether words end at the right edge, as figures do.
    shape : callable or None
        From a row to the verdict whose shape stands before the words.
    struck : bool
        Whether the words are shown with a rule through them.
    strong : bool
        Whether the words are what the row is known by.
    """

    title: str
    text: Callable[[Row], str]
    share: float = 1.0
    right: bool = False
    shape: Callable[[Row], VerdictKind | None] | None = None
    struck: bool = False
    strong: bool = False


class RowsModel(QAbstractTableModel, Generic[Row]):
    """Shows frozen rows; a change is other rows."""

    def __init__(self, columns: Sequence[Column[Row]], parent: QObject | None = None) -> None:
        super().__init__(parent)
        self._columns = tuple(columns)
        self._rows: tuple[Row, ...] = ()

    @property
    def columns(self) -> tuple[Column[Row], ...]:
        """The columns from left to right."""
        return self._columns

    @property
    def rows(self) -> tuple[Row, ...]:
        """The rows from top to bottom."""
        return self._rows

    def set_rows(self, rows: Sequence[Row]) -> None:
        """Show other rows.

        Parameters
        ----------
        rows : sequence
            From top to bottom; equal ones leave everything as it is.
        """
        new = tuple(rows)
        if new == self._rows:
            return
        self.beginResetModel()
        self._rows = new
        self.endResetModel()

    def row_at(self, index: Index) -> Row | None:
        """Give the row of an index, None where it points nowhere."""
        return self._rows[index.row()] if index.isValid() else None

    def rowCount(self, parent: Index = _NOWHERE) -> int:
        """Count the rows; a cell has none below it."""
        return 0 if parent.isValid() else len(self._rows)

    def columnCount(self, parent: Index = _NOWHERE) -> int:
        """Count the columns; a cell has none below it."""
        return 0 if parent.isValid() else len(self._columns)

    def data(self, index: Index, role: int = Qt.ItemDataRole.DisplayRole) -> Any:  # noqa: ANN401
        """Give what a view asks of a cell."""
        row = self.row_at(index)
        if row is None:
            return None
        column = self._columns[index.column()]
        if role == Qt.ItemDataRole.DisplayRole:
            return column.text(row)
        if role == Qt.ItemDataRole.AccessibleTextRole:
            return self._spoken(column, row)
        if role == Qt.ItemDataRole.TextAlignmentRole:
            side = Qt.AlignmentFlag.AlignRight if column.right else Qt.AlignmentFlag.AlignLeft
            return side | Qt.AlignmentFlag.AlignVCenter
        if role == ROW_ROLE:
            return row
        if role == SHAPE_ROLE:
            return column.shape(row) if column.shape is not None else None
        if role == STRUCK_ROLE:
            return column.struck
        return None

    @staticmethod
    def _spoken(column: Column[Row], row: Row) -> str:
        kind = column.shape(row) if column.shape is not None else None
        said = [column.title, "struck" if column.struck else "", kind.value if kind else ""]
        return ", ".join(part for part in (*said, column.text(row)) if part)

    def headerData(
        self,
        section: int,
        orientation: Qt.Orientation,
        role: int = Qt.ItemDataRole.DisplayRole,
    ) -> Any:  # noqa: ANN401
        """Give the head of a column."""
        shown = role in (Qt.ItemDataRole.DisplayRole, Qt.ItemDataRole.AccessibleTextRole)
        inside = 0 <= section < len(self._columns)
        if orientation is Qt.Orientation.Horizontal and shown and inside:
            return self._columns[section].title
        return None
