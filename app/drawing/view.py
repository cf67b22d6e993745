"""A widget that shows a sheet, zooms it, and lets a touched mark explain itself."""

from __future__ import annotations

from PySide6.QtCore import QPointF, QRectF, QSize, Qt, Signal
from PySide6.QtGui import QKeyEvent, QMouseEvent, QPainter, QPaintEvent, QPen, QWheelEvent
from PySide6.QtWidgets import QSizePolicy, QWidget

from app.drawing.painter import paint_sheet
from app.style.tokens import colour
from reports.palette import LIGHT, Colour, Palette
from reports.sheet.elements import Mark, Sheet

__all__ = ["GREATEST_ZOOM", "SheetView"]

GREATEST_ZOOM = 16.0
"""Largest enlargement over the size at which the whole sheet fits [-]."""

_WHEEL_STEP = 1.25
_CLICK_REACH = 6.0


class SheetView(QWidget):
    """Shows one sheet, as large as fits; every mark can be touched or reached by key.

    Wheel or ``+`` and ``−`` zoom, ``0`` shows the whole sheet again, dragging or Shift with the
    arrow keys moves it, the arrow keys alone walk through the marks, Enter or Space touches the
    one in the frame.

    Attributes
    ----------
    touched : Signal
        Name and sentence of the mark that was touched.
    """

    touched = Signal(str, str)

    def __init__(self, parent: QWidget | None = None, *, palette: Palette = LIGHT) -> None:
        super().__init__(parent)
        self._sheet: Sheet | None = None
        self._palette = palette
        self._zoom = 1.0
        self._pan = QPointF(0.0, 0.0)
        self._pressed: QPointF | None = None
        self._moved = False
        self._chosen: int | None = None
        self.setFocusPolicy(Qt.FocusPolicy.StrongFocus)
        self.setSizePolicy(QSizePolicy.Policy.Expanding, QSizePolicy.Policy.Expanding)
        self.setMouseTracking(True)

    def show_sheet(self, sheet: Sheet) -> None:
        """Show another sheet; zoom and place stay while its size stays.

        Parameters
        ----------
        sheet : Sheet
            What is shown from now on.
        """
        before = self._sheet
        name = self.chosen_mark().name if self.chosen_mark() else None  # type: ignore[union-attr]
        if before is None or (before.width, before.height) != (sheet.width, sheet.height):
            self._zoom, self._pan = 1.0, QPointF(0.0, 0.0)
            self.updateGeometry()
        self._sheet = sheet
        names = [mark.name for mark in sheet.marks]
        self._chosen = names.index(name) if name in names else None
        self.setAccessibleName(sheet.title)
        self.setAccessibleDescription(sheet.description)
        self.update()

    def use_palette(self, palette: Palette) -> None:
        """Paint in other colours from now on.

        Parameters
        ----------
        palette : Palette
            Light, dark or contrast.
        """
        self._palette = palette
        self.update()

    def sheet(self) -> Sheet | None:
        """Give the sheet that is shown."""
        return self._sheet

    def zoom(self) -> float:
        """Give the enlargement over the size at which the whole sheet fits [-]."""
        return self._zoom

    def chosen_mark(self) -> Mark | None:
        """Give the mark in the frame that the arrow keys move."""
        if self._sheet is None or self._chosen is None:
            return None
        return self._sheet.marks[self._chosen]

    def scale(self) -> float:
        """Give the device-independent pixels to a sheet unit [-]."""
        if self._sheet is None:
            return 1.0
        fit = min(self.width() / self._sheet.width, self.height() / self._sheet.height)
        return fit * self._zoom

    def corner(self) -> QPointF:
        """Give the place of the sheet's upper left corner in the widget."""
        if self._sheet is None:
            return QPointF(0.0, 0.0)
        scale = self.scale()
        free = QPointF(
            (self.width() - scale * self._sheet.width) / 2.0,
            (self.height() - scale * self._sheet.height) / 2.0,
        )
        if self._zoom == 1.0:
            # Whole pixels, or every upright line of a sheet at its own size would blur.
            return QPointF(round(free.x()), round(free.y()))
        return free + self._pan

    def on_sheet(self, place: QPointF) -> QPointF:
        """Turn a place in the widget into one on the sheet."""
        return (place - self.corner()) / self.scale()

    def mark_at(self, place: QPointF) -> Mark | None:
        """Find the mark at a place in the widget; a gloved finger may miss by a little."""
        if self._sheet is None:
            return None
        point = self.on_sheet(place)
        found = self._sheet.at(point.x(), point.y())
        if found is not None:
            return found
        reach = _CLICK_REACH / self.scale()
        near = [
            mark for mark in self._sheet.marks if mark.box.grown(reach).holds(point.x(), point.y())
        ]
        return near[0] if near else None

    def zoom_by(self, factor: float, about: QPointF | None = None) -> None:
        """Enlarge or reduce; the point beneath `about` stays where it is.

        Parameters
        ----------
        factor : float
            How much larger [-].
        about : QPointF, optional
            A place in the widget; its middle otherwise.
        """
        anchor = about or QPointF(self.width() / 2.0, self.height() / 2.0)
        point = self.on_sheet(anchor)
        self._zoom = min(max(self._zoom * factor, 1.0), GREATEST_ZOOM)
        if self._zoom == 1.0:
            self._pan = QPointF(0.0, 0.0)
        else:
            self._pan += anchor - (self.corner() + point * self.scale())
        self.update()

    def pan_by(self, right: float, down: float) -> None:
        """Move the sheet, by device-independent pixels; a sheet shown whole stays."""
        if self._zoom > 1.0:
            self._pan += QPointF(right, down)
            self.update()

    def sizeHint(self) -> QSize:
        """Ask for the sheet's own size."""
        if self._sheet is None:
            return QSize(640, 240)
        return QSize(round(self._sheet.width), round(self._sheet.height))

    def paintEvent(self, event: QPaintEvent) -> None:
        """Paint ground, sheet and the frame of the chosen mark."""
        painter = QPainter(self)
        painter.fillRect(event.rect(), colour(palette=self._palette, token=Colour.PAPER))
        if self._sheet is not None:
            corner = self.corner()
            paint_sheet(
                painter=painter,
                sheet=self._sheet,
                palette=self._palette,
                scale=self.scale(),
                offset=(corner.x(), corner.y()),
            )
            self._paint_frame(painter)
        painter.end()

    def _paint_frame(self, painter: QPainter) -> None:
        mark = self.chosen_mark()
        if mark is None or not self.hasFocus():
            return
        scale, corner = self.scale(), self.corner()
        frame = QRectF(
            corner.x() + scale * mark.box.left,
            corner.y() + scale * mark.box.top,
            scale * mark.box.width,
            scale * mark.box.height,
        ).adjusted(-4.0, -4.0, 4.0, 4.0)
        accent = colour(palette=self._palette, token=Colour.ACCENT)
        pen = QPen(accent, 4.0)
        pen.setJoinStyle(Qt.PenJoinStyle.MiterJoin)
        painter.setPen(pen)
        painter.setBrush(Qt.BrushStyle.NoBrush)
        painter.drawRect(frame)

    def wheelEvent(self, event: QWheelEvent) -> None:
        """Zoom about the pointer."""
        turns = event.angleDelta().y() / 120.0
        self.zoom_by(_WHEEL_STEP**turns, event.position())
        event.accept()

    def mousePressEvent(self, event: QMouseEvent) -> None:
        """Remember where a touch began."""
        if event.button() is Qt.MouseButton.LeftButton:
            self._pressed, self._moved = event.position(), False

    def mouseMoveEvent(self, event: QMouseEvent) -> None:
        """Move an enlarged sheet; show by the pointer's shape what can be touched."""
        if self._pressed is None:
            over = self.mark_at(event.position()) is not None
            self.setCursor(
                Qt.CursorShape.PointingHandCursor if over else Qt.CursorShape.ArrowCursor
            )
            return
        step = event.position() - self._pressed
        if self._moved or step.manhattanLength() > _CLICK_REACH:
            self._moved = True
            if self._zoom > 1.0:
                self._pressed = event.position()
                self.pan_by(step.x(), step.y())

    def mouseReleaseEvent(self, event: QMouseEvent) -> None:
        """Touch what lies beneath, unless the sheet was moved."""
        if event.button() is not Qt.MouseButton.LeftButton or self._pressed is None:
            return
        self._pressed = None
        mark = None if self._moved else self.mark_at(event.position())
        if mark is not None and self._sheet is not None:
            self._chosen = self._sheet.marks.index(mark)
            self.update()
            self.touched.emit(mark.name, mark.tells)

    def keyPressEvent(self, event: QKeyEvent) -> None:
        """Zoom, move, walk through the marks and touch them."""
        shifted = bool(event.modifiers() & Qt.KeyboardModifier.ShiftModifier)
        key = event.key()
        if key in (Qt.Key.Key_Plus, Qt.Key.Key_Equal):
            self.zoom_by(_WHEEL_STEP)
        elif key == Qt.Key.Key_Minus:
            self.zoom_by(1.0 / _WHEEL_STEP)
        elif key == Qt.Key.Key_0:
            self.zoom_by(1.0 / GREATEST_ZOOM)
        elif key in _ARROWS and shifted:
            right, down = _ARROWS[Qt.Key(key)]
            self.pan_by(-right * self.width() / 10.0, -down * self.height() / 10.0)
        elif key in _ARROWS:
            self._walk(1 if sum(_ARROWS[Qt.Key(key)]) > 0 else -1)
        elif key in (Qt.Key.Key_Return, Qt.Key.Key_Enter, Qt.Key.Key_Space):
            mark = self.chosen_mark()
            if mark is not None:
                self.touched.emit(mark.name, mark.tells)
        else:
            super().keyPressEvent(event)

    def _walk(self, step: int) -> None:
        if self._sheet is None or not self._sheet.marks:
            return
        count = len(self._sheet.marks)
        if self._chosen is None:
            self._chosen = 0 if step > 0 else count - 1
        else:
            self._chosen = (self._chosen + step) % count
        self.setAccessibleDescription(self._sheet.marks[self._chosen].tells)
        self.update()


_ARROWS = {
    Qt.Key.Key_Left: (-1, 0),
    Qt.Key.Key_Right: (1, 0),
    Qt.Key.Key_Up: (0, -1),
    Qt.Key.Key_Down: (0, 1),
}
