"""The one table of the desks: flat, ruled by hair lines, its present row in a frame."""

from __future__ import annotations

from collections.abc import Sequence
from typing import Any

from PySide6.QtCore import QModelIndex, QPersistentModelIndex, QPointF, QRect, QRectF, QSize, Qt
from PySide6.QtCore import Signal as QtSignal
from PySide6.QtGui import (
    QFont,
    QFontMetricsF,
    QKeyEvent,
    QPainter,
    QPaintEvent,
    QPalette,
    QResizeEvent,
)
from PySide6.QtWidgets import (
    QAbstractItemView,
    QFrame,
    QHeaderView,
    QStyle,
    QStyledItemDelegate,
    QStyleOptionViewItem,
    QTableView,
    QWidget,
)

from app.frame.lettering import draw_at, draw_struck, fitted, line_step, wrapped
from app.frame.look import Look
from app.frame.plain import draw_focus, flat_painter
from app.frame.shapes import draw_verdict_shape
from app.pages.desk import dress_bar
from app.viewmodels.rows import SHAPE_ROLE, STRUCK_ROLE, Column, RowsModel
from reports.palette import Colour
from reports.sheet.medium import LineWidth, Size
from reports.sheet.pictures import VerdictKind
from reports.typeface import Weight

__all__ = ["DeskTable", "shared_widths"]

_PAD = 8
_BAR = 4
Index = QModelIndex | QPersistentModelIndex


class _Cells(QStyledItemDelegate):
    """Paints the cells."""

    def __init__(self, table: DeskTable) -> None:
        super().__init__(table)
        self._table = table

    def _indent(self, index: Index) -> float:
        if index.data(SHAPE_ROLE) is None:
            return 0.0
        return self._table.look.size(Size.TEXT) + 8.0

    def _lines(self, index: Index, width: float) -> list[str]:
        text = index.data(Qt.ItemDataRole.DisplayRole) or ""
        font = self._table.cell_font(index.column())
        before = self._table.pad(index.column()) + self._indent(index)
        room = max(width - _PAD - before, 24.0)
        return [line for part in text.split("\n") for line in wrapped(part, font, width=room)]

    def sizeHint(self, option: QStyleOptionViewItem, index: Index) -> QSize:
        """Give the height that the words need in their column."""
        width = self._table.columnWidth(index.column())
        step = line_step(self._table.cell_font(index.column()))
        return QSize(width, round(len(self._lines(index, width)) * step + 10.0))

    def paint(self, painter: QPainter, option: QStyleOptionViewItem, index: Index) -> None:
        """Paint ground, shape, words and the hair line under them."""
        look = self._table.look
        room: QRect = option.rect
        state: QStyle.StateFlag = option.state
        painter.save()
        painter.setRenderHint(QPainter.RenderHint.Antialiasing)
        chosen = bool(state & QStyle.StateFlag.State_Selected)
        if chosen:
            painter.fillRect(room, look.colour(Colour.SHEET))
            if index.column() == 0:
                bar = QRect(room.left(), room.top(), _BAR, room.height())
                painter.fillRect(bar, look.colour(Colour.ACCENT))
        hair = QRectF(room.left(), room.bottom(), room.width(), 1.0)
        painter.fillRect(hair, look.colour(Colour.HAIR))
        self._paint_words(painter, QRectF(room), index)
        painter.restore()

    def _paint_words(self, painter: QPainter, room: QRectF, index: Index) -> None:
        look = self._table.look
        font = self._table.cell_font(index.column())
        painter.setFont(font)
        painter.setPen(look.colour(Colour.INK))
        step = line_step(font)
        kind = index.data(SHAPE_ROLE)
        if kind is not None:
            size = look.size(Size.TEXT)
            pad = self._table.pad(index.column())
            centre = QPointF(room.left() + pad + size / 2.0, room.top() + 5.0 + step / 2.0)
            # Qt hands an enumeration of words back as its word.
            draw_verdict_shape(painter, centre, size, VerdictKind(kind), look)
        lines = self._lines(index, room.width())
        right = self._table.model_of_rows.columns[index.column()].right
        base = room.top() + 5.0 + step * 0.77
        align = Qt.AlignmentFlag.AlignRight if right else Qt.AlignmentFlag.AlignLeft
        before = self._table.pad(index.column()) + self._indent(index)
        left = room.right() - _PAD if right else room.left() + before
        for line in lines:
            if index.data(STRUCK_ROLE) and line:
                draw_struck(painter, QPointF(left, base), line, align=align)
            else:
                draw_at(painter, QPointF(left, base), line, align=align)
            base += step


class _Heads(QHeaderView):
    """Paints the heads: captions over one line."""

    def __init__(self, table: DeskTable) -> None:
        super().__init__(Qt.Orientation.Horizontal, table)
        self._table = table
        self.setSectionsClickable(False)
        self.setSectionResizeMode(QHeaderView.ResizeMode.Fixed)
        self.setHighlightSections(False)

    def sizeHint(self) -> QSize:
        """Give one line of captions."""
        return QSize(super().sizeHint().width(), round(self._table.look.size(Size.NOTE) * 1.9))

    def paintSection(self, painter: QPainter, rect: QRect, logicalIndex: int) -> None:  # noqa: N803
        """Paint one head."""
        look = self._table.look
        column = self._table.model_of_rows.columns[logicalIndex]
        painter.save()
        painter.fillRect(rect, look.colour(Colour.PAPER))
        free = rect.width() - self._table.pad(logicalIndex) - 2.0
        painter.setFont(fitted(look.note_font(), [column.title], width=free))
        painter.setPen(look.colour(Colour.INK2))
        base = rect.bottom() - look.size(Size.NOTE) * 0.45
        if column.right:
            place = QPointF(rect.right() - _PAD, base)
            draw_at(painter, place, column.title, align=Qt.AlignmentFlag.AlignRight)
        else:
            pad = self._table.pad(logicalIndex)
            draw_at(painter, QPointF(rect.left() + pad, base), column.title)
        thin = look.line(LineWidth.NARROW)
        line = QRectF(rect.left(), rect.bottom() + 1.0 - thin, rect.width(), thin)
        painter.fillRect(line, look.colour(Colour.INK2))
        painter.restore()


def shared_widths(
    shares: Sequence[float], least: Sequence[float], room: float
) -> tuple[float, ...]:
    """Share a width among columns, none narrower than its longest word.

    Parameters
    ----------
    shares : sequence of float
        What each column should have beside the others [-].
    least : sequence of float
        What each column must have [px].
    room : float
        What there is [px].

    Returns
    -------
    tuple of float
        Widths that fill the room, or go beyond it where the words need more [px].

    Examples
    --------
    >>> shared_widths([1.0, 1.0, 2.0], [0.0, 0.0, 0.0], 400.0)
    (100.0, 100.0, 200.0)
    >>> shared_widths([1.0, 1.0, 2.0], [160.0, 0.0, 0.0], 400.0)
    (160.0, 80.0, 160.0)
    >>> shared_widths([1.0, 1.0], [300.0, 200.0], 400.0)
    (300.0, 200.0)
    """
    held: set[int] = set()
    while True:
        free = max(room - sum(least[place] for place in held), 0.0)
        total = sum(share for place, share in enumerate(shares) if place not in held)
        widths = tuple(
            least[place] if place in held else free * share / total
            for place, share in enumerate(shares)
        )
        narrow = {place for place, width in enumerate(widths) if width < least[place]}
        if not narrow:
            return widths
        held |= narrow


class DeskTable(QTableView):
    """Shows a `RowsModel`; arrows walk, Enter or a double touch takes the row."""

    taken = QtSignal(object)
    """A row was taken; carries it."""
    looked_at = QtSignal(object)
    """Another row is the present one; carries it, or None."""

    def __init__(
        self,
        columns: Sequence[Column[Any]],
        *,
        name: str,
        look: Look,
        grows: bool = False,
        edge: int = 24,
        parent: QWidget | None = None,
    ) -> None:
        super().__init__(parent)
        self.look = look
        self._grows = grows
        self.edge = edge
        self._least: list[float] = [0.0] * len(columns)
        self.model_of_rows: RowsModel[Any] = RowsModel(columns, self)
        self.setAccessibleName(name)
        self.setFrameShape(QFrame.Shape.NoFrame)
        self.setShowGrid(False)
        self.setTabKeyNavigation(False)
        self.setSelectionBehavior(QAbstractItemView.SelectionBehavior.SelectRows)
        self.setSelectionMode(QAbstractItemView.SelectionMode.SingleSelection)
        self.setEditTriggers(QAbstractItemView.EditTrigger.NoEditTriggers)
        self.setVerticalScrollMode(QAbstractItemView.ScrollMode.ScrollPerPixel)
        self.setHorizontalScrollMode(QAbstractItemView.ScrollMode.ScrollPerPixel)
        if grows:
            self.setVerticalScrollBarPolicy(Qt.ScrollBarPolicy.ScrollBarAlwaysOff)
        self.verticalHeader().hide()
        self.setHorizontalHeader(_Heads(self))
        self.setItemDelegate(_Cells(self))
        self.setModel(self.model_of_rows)
        self.doubleClicked.connect(lambda index: self.taken.emit(self.model_of_rows.row_at(index)))
        self.selectionModel().currentRowChanged.connect(
            lambda now, _before: self.looked_at.emit(self.model_of_rows.row_at(now))
        )
        self.dress(look)

    def pad(self, column: int) -> int:
        """Give the room before a column's words; the first one keeps the desk's margin [px]."""
        return self.edge if column == 0 else _PAD

    def set_rows(self, rows: Sequence[Any]) -> None:
        """Show other rows.

        Parameters
        ----------
        rows : sequence
            From top to bottom.
        """
        before = self.currentIndex().row()
        self.model_of_rows.set_rows(rows)
        self._measure()
        self._fit()
        if before >= 0 and rows:
            self.selectRow(min(before, len(rows) - 1))
        elif self.hasFocus():
            self._enter()

    @property
    def present_row(self) -> Any:  # noqa: ANN401  (whatever the rows are)
        """The row in the frame, None where there is none."""
        return self.model_of_rows.row_at(self.currentIndex())

    def dress(self, look: Look) -> None:
        """Take over colours and sizes."""
        self.look = look
        dress_bar(self.verticalScrollBar(), look)
        palette = QPalette(self.palette())
        palette.setColor(QPalette.ColorRole.Base, look.colour(Colour.PAPER))
        self.setPalette(palette)
        self.horizontalHeader().setFixedHeight(round(look.size(Size.NOTE) * 1.9))
        dress_bar(self.horizontalScrollBar(), look)
        self._measure()
        self._fit()

    def resizeEvent(self, event: QResizeEvent) -> None:
        """Share the width among the columns."""
        super().resizeEvent(event)
        self._fit()

    def _measure(self) -> None:
        """Find how wide each column must be so that its longest word stays inside it."""
        model = self.model_of_rows
        self._least = [
            max(
                (
                    metrics.horizontalAdvance(word)
                    for row in model.rows
                    for word in column.text(row).split()
                ),
                default=0.0,
            )
            + self.pad(place)
            + _PAD
            + (self.look.size(Size.TEXT) + 8.0 if column.shape is not None else 0.0)
            for place, column in enumerate(model.columns)
            for metrics in (QFontMetricsF(self.cell_font(place)),)
        ]

    def cell_font(self, column: int) -> QFont:
        """Give the font of a column's cells."""
        strong = self.model_of_rows.columns[column].strong
        weight = Weight.SEMI_BOLD if strong else Weight.REGULAR
        return self.look.font(Size.TEXT, weight=weight)

    def _fit(self) -> None:
        shares = [column.share for column in self.model_of_rows.columns]
        widths = shared_widths(shares, self._least, float(self.viewport().width()))
        for place, width in enumerate(widths):
            self.setColumnWidth(place, int(width))
        self.resizeRowsToContents()
        if self._grows:
            rows = sum(self.rowHeight(row) for row in range(self.model_of_rows.rowCount()))
            self.setFixedHeight(rows + self.horizontalHeader().height() + 2)

    def keyPressEvent(self, event: QKeyEvent) -> None:
        """Take the present row with Enter."""
        if event.key() in (Qt.Key.Key_Return, Qt.Key.Key_Enter):
            row = self.present_row
            if row is not None and not event.isAutoRepeat():
                self.taken.emit(row)
            return
        super().keyPressEvent(event)

    def paintEvent(self, event: QPaintEvent) -> None:
        """Paint the cells, and the frame of the present row while the table has the keyboard."""
        super().paintEvent(event)
        index = self.currentIndex()
        if not self.hasFocus():
            return
        painter = flat_painter(self.viewport())
        if index.isValid():
            top, height = self.rowViewportPosition(index.row()), self.rowHeight(index.row())
            frame = QRectF(0.0, top, self.viewport().width(), height)
        else:
            frame = QRectF(self.viewport().rect())
        draw_focus(painter, frame, self.look)
        painter.end()

    def focusInEvent(self, event: Any) -> None:  # noqa: ANN401  (Qt's own event)
        """Put the frame round the first row where none is present."""
        super().focusInEvent(event)
        self._enter()

    def _enter(self) -> None:
        if not self.currentIndex().isValid() and self.model_of_rows.rowCount():
            self.selectRow(0)
