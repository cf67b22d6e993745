"""The shelf of jobs as a drawing register: a row for each, with its rotor across."""

from __future__ import annotations

from typing import Any

from PySide6.QtCore import (
    QModelIndex,
    QPersistentModelIndex,
    QPointF,
    QRect,
    QRectF,
    QSize,
    Qt,
    Signal,
)
from PySide6.QtGui import QKeyEvent, QPainter, QPaintEvent, QPalette, QResizeEvent
from PySide6.QtWidgets import (
    QAbstractItemView,
    QFrame,
    QListView,
    QStyle,
    QStyledItemDelegate,
    QStyleOptionViewItem,
    QWidget,
)

from app.drawing.painter import paint_sheet
from app.frame.lettering import draw_at, draw_lines, fitted, wrapped
from app.frame.look import Look
from app.frame.plain import draw_focus, flat_painter
from app.frame.shapes import draw_verdict_shape
from app.pages.desk import dress_bar
from app.presenters.jobs import ShelfRow
from app.viewmodels.rows import ROW_ROLE, Column, RowsModel
from reports.palette import Colour
from reports.sheet.along import AlongLayout, along_the_rotor
from reports.sheet.elements import Sheet
from reports.sheet.medium import DESK, LineWidth, Size
from reports.sheet.pictures import RotorPicture
from reports.sheet.rotor_place import View
from reports.typeface import Weight

__all__ = ["ROW_HEIGHT", "ShelfView"]

ROW_HEIGHT = 96
"""Height of a job's row before the text is scaled [px]."""

_MARGIN = 24
_NAMES_SHARE = 0.28
_WORDS_SHARE = 0.31
Index = QModelIndex | QPersistentModelIndex


class _Rows(QStyledItemDelegate):
    """Paints the rows."""

    def __init__(self, shelf: ShelfView) -> None:
        super().__init__(shelf)
        self._shelf = shelf
        self._sheets: dict[tuple[int, RotorPicture], Sheet] = {}

    def sizeHint(self, option: QStyleOptionViewItem, index: Index) -> QSize:
        """Give the height of a row, which grows with the text."""
        return QSize(320, self._shelf.row_height)

    def paint(self, painter: QPainter, option: QStyleOptionViewItem, index: Index) -> None:
        """Paint names, rotor and what it waits for."""
        row: ShelfRow = index.data(ROW_ROLE)
        look = self._shelf.look
        room: QRect = option.rect
        state: QStyle.StateFlag = option.state
        painter.save()
        painter.setRenderHint(QPainter.RenderHint.Antialiasing)
        if state & QStyle.StateFlag.State_Selected:
            painter.fillRect(room, look.colour(Colour.SHEET))
        if row.is_on_desks:
            bar = QRect(room.left(), room.top(), round(look.line(LineWidth.HEAVY)), room.height())
            painter.fillRect(bar, look.colour(Colour.ACCENT))
        hair = QRectF(room.left(), room.bottom(), room.width(), 1.0)
        painter.fillRect(hair, look.colour(Colour.HAIR))
        left = room.left() + _MARGIN
        free = room.width() - 2.0 * _MARGIN
        names, words = free * _NAMES_SHARE, free * _WORDS_SHARE
        self._paint_names(painter, QRectF(left, room.top(), names, room.height()), row)
        middle = QRectF(left + names, room.top() + 4.0, free - names - words, room.height() - 14.0)
        self._paint_rotor(painter, middle, row)
        words_room = QRectF(room.right() - _MARGIN - words, room.top(), words, room.height())
        self._paint_waits(painter, words_room, row)
        painter.restore()

    def _paint_names(self, painter: QPainter, room: QRectF, row: ShelfRow) -> None:
        look = self._shelf.look
        head = "  ".join(part for part in (row.tag, row.serial) if part)
        font = look.font(Size.TITLE, weight=Weight.SEMI_BOLD)
        painter.setFont(fitted(font, [head], width=room.width() - 12.0))
        painter.setPen(look.colour(Colour.INK))
        base = room.top() + room.height() * 0.38
        draw_at(painter, QPointF(room.left(), base), head)
        note = look.font(Size.NOTE)
        painter.setFont(note)
        painter.setPen(look.colour(Colour.INK2))
        job = ", ".join(part for part in (f"job {row.number}", row.customer) if part)
        for line in (row.name, job):
            base += note.pixelSize() * 1.45
            cut = wrapped(line, note, width=room.width() - 12.0, most=1)
            draw_at(painter, QPointF(room.left(), base), cut[0] if cut else "")

    def _paint_rotor(self, painter: QPainter, room: QRectF, row: ShelfRow) -> None:
        if row.picture is None:
            return
        sheet = self._sheet(row.picture, round(room.width()), round(room.height()))
        offset = (round(room.left()), round(room.top()))
        palette = self._shelf.look.palette
        paint_sheet(painter=painter, sheet=sheet, palette=palette, offset=offset)

    def _sheet(self, picture: RotorPicture, width: int, height: int) -> Sheet:
        key = (width * 4096 + height, picture)
        if key not in self._sheets:
            if len(self._sheets) > 64:
                self._sheets.clear()
            layout = AlongLayout(
                medium=DESK,
                view=View.HALF,
                width=float(width),
                height=float(height),
                margin=0.0,
                gutter_left=8.0,
                gutter_right=24.0,
                rotor=(0.0, float(height)),
                names=(float(height), float(height)),
                planes=(float(height), float(height)),
                change_top=float(height),
                change_height=0.0,
            )
            self._sheets[key] = along_the_rotor(picture=picture, layout=layout)
        return self._sheets[key]

    def _paint_waits(self, painter: QPainter, room: QRectF, row: ShelfRow) -> None:
        look = self._shelf.look
        size = look.size(Size.LEAD)
        left = room.left()
        if row.verdict is not None:
            centre = QPointF(left + size / 2.0, room.top() + 14.0 + size / 2.0)
            draw_verdict_shape(painter, centre, size, row.verdict, look)
        left += size + 12.0
        font = look.font(Size.TEXT)
        painter.setFont(font)
        painter.setPen(look.colour(Colour.INK))
        lines = wrapped(row.waits, font, width=room.right() - left, most=3)
        bottom = draw_lines(painter, left, room.top() + 12.0, lines)
        note = look.font(Size.NOTE)
        painter.setFont(note)
        painter.setPen(look.colour(Colour.INK2))
        draw_at(painter, QPointF(left, bottom + note.pixelSize() * 1.1), row.built)


class ShelfView(QListView):
    """The jobs, one below the other; arrows walk, Enter or a double touch opens."""

    taken = Signal(object)
    """A job was taken; carries its row."""

    def __init__(self, *, look: Look, parent: QWidget | None = None) -> None:
        super().__init__(parent)
        self.look = look
        self.model_of_rows: RowsModel[ShelfRow] = RowsModel(
            [Column(title="Job", text=lambda row: row.spoken)], self
        )
        self.setAccessibleName("Jobs")
        self.setFrameShape(QFrame.Shape.NoFrame)
        self.setSelectionMode(QAbstractItemView.SelectionMode.SingleSelection)
        self.setEditTriggers(QAbstractItemView.EditTrigger.NoEditTriggers)
        self.setVerticalScrollMode(QAbstractItemView.ScrollMode.ScrollPerPixel)
        self.setHorizontalScrollBarPolicy(Qt.ScrollBarPolicy.ScrollBarAlwaysOff)
        self.setUniformItemSizes(True)
        self.setItemDelegate(_Rows(self))
        self.setModel(self.model_of_rows)
        self.doubleClicked.connect(lambda index: self.taken.emit(self.model_of_rows.row_at(index)))
        self.dress(look)

    @property
    def row_height(self) -> int:
        """Height of one row [px]."""
        return round(max(ROW_HEIGHT, self.look.size(Size.TEXT) * ROW_HEIGHT / 15.0))

    @property
    def present_row(self) -> ShelfRow | None:
        """The row that is chosen."""
        return self.model_of_rows.row_at(self.currentIndex())

    def set_rows(self, rows: tuple[ShelfRow, ...]) -> None:
        """Show other jobs; the chosen one stays chosen.

        Parameters
        ----------
        rows : tuple of ShelfRow
            From top to bottom.
        """
        before = self.present_row
        self.model_of_rows.set_rows(rows)
        numbers = [row.number for row in rows]
        here = next((row.number for row in rows if row.is_on_desks), "")
        wanted = before.number if before is not None and before.number in numbers else here
        if rows:
            place = numbers.index(wanted) if wanted in numbers else 0
            self.setCurrentIndex(self.model_of_rows.index(place, 0))

    def dress(self, look: Look) -> None:
        """Take over colours and sizes."""
        self.look = look
        dress_bar(self.verticalScrollBar(), look)
        palette = QPalette(self.palette())
        palette.setColor(QPalette.ColorRole.Base, look.colour(Colour.PAPER))
        self.setPalette(palette)
        self.scheduleDelayedItemsLayout()

    def resizeEvent(self, event: QResizeEvent) -> None:
        """Lay the rows out for the new width."""
        super().resizeEvent(event)
        self.scheduleDelayedItemsLayout()

    def keyPressEvent(self, event: QKeyEvent) -> None:
        """Open the present job with Enter."""
        if event.key() in (Qt.Key.Key_Return, Qt.Key.Key_Enter):
            row = self.present_row
            if row is not None and not event.isAutoRepeat():
                self.taken.emit(row)
            return
        super().keyPressEvent(event)

    def paintEvent(self, event: QPaintEvent) -> None:
        """Paint the rows, and the frame of the present one while the list has the keyboard."""
        super().paintEvent(event)
        if not self.hasFocus():
            return
        painter = flat_painter(self.viewport())
        index = self.currentIndex()
        frame: Any = self.visualRect(index) if index.isValid() else self.viewport().rect()
        draw_focus(painter, QRectF(frame), self.look)
        painter.end()
