"""The line in the reading cell: its figures are huge and shrink to fit, its caret is a bar."""

from __future__ import annotations

from collections.abc import Callable

from PySide6.QtCore import QEvent, QPointF, QRectF, Qt, QTimer
from PySide6.QtGui import QFocusEvent, QFont, QFontMetricsF, QKeyEvent, QPaintEvent, QResizeEvent
from PySide6.QtWidgets import QApplication, QLineEdit, QWidget

from app.frame.lettering import fitted
from app.frame.look import Look
from app.frame.plain import flat_painter
from reports.palette import Colour
from reports.sheet.medium import Size
from reports.typeface import Weight

__all__ = ["CellEdit", "fit_figures"]

_STEPS = (1.0, 0.875, 0.75)
_CARET_WIDTH = 4.0
_BEFORE_CARET = 6.0


def fit_figures(text: str, look: Look, *, width: float, height: float) -> QFont:
    """Choose the size of the figures: 128, 112, 96, and less only where even that is too wide.

    Parameters
    ----------
    text : str
        What is typed.
    look : Look
        Gives the greatest size.
    width, height : float
        The room [px].

    Returns
    -------
    QFont
        The figures' font.
    """
    hero = look.size(Size.HERO)
    for step in _STEPS:
        font = look.font(step * hero, weight=Weight.MEDIUM)
        metrics = QFontMetricsF(font)
        fits_across = metrics.horizontalAdvance(text) <= width
        if fits_across and metrics.capHeight() * 1.1 <= height:
            return font
    lowest = look.font(min(_STEPS[-1] * hero, height / 0.77), weight=Weight.MEDIUM)
    return fitted(lowest, [text], width=width)


class CellEdit(QLineEdit):
    """A line edit that asks its cell first and paints its figures itself.

    Parameters
    ----------
    on_key : callable
        Gets every key first; true means it is dealt with.
    wants_key : callable
        Whether a key goes to the cell even where a shortcut of the window has it.
    """

    def __init__(
        self,
        *,
        on_key: Callable[[QKeyEvent], bool],
        wants_key: Callable[[int], bool],
        look: Look,
        parent: QWidget,
    ) -> None:
        super().__init__(parent)
        self._on_key = on_key
        self._wants_key = wants_key
        self._look = look
        self._caret_shown = True
        self._blink = QTimer(self)
        self._blink.timeout.connect(self._turn_caret)
        self.setFrame(False)
        self.setAutoFillBackground(False)
        self.setContextMenuPolicy(Qt.ContextMenuPolicy.NoContextMenu)
        self.setInputMethodHints(Qt.InputMethodHint.ImhPreferNumbers)
        self.textChanged.connect(self._refit)
        self.cursorPositionChanged.connect(self._show_caret)

    def set_look(self, look: Look) -> None:
        """Take another look.

        Parameters
        ----------
        look : Look
            Colours, scale and motion from now on.
        """
        self._look = look
        self._refit()
        self._restart_blink()

    def event(self, event: QEvent) -> bool:
        """Give Tab to the cell, which takes a reading with it, before it moves the focus."""
        if isinstance(event, QKeyEvent):
            if event.type() == QEvent.Type.ShortcutOverride and self._wants_key(event.key()):
                event.accept()
                return True
            tab = event.type() == QEvent.Type.KeyPress and event.key() == Qt.Key.Key_Tab
            if tab and self._on_key(event):
                return True
        return super().event(event)

    def keyPressEvent(self, event: QKeyEvent) -> None:
        """Ask the cell first; what it leaves edits the line or goes on to the page."""
        if event.key() != Qt.Key.Key_Tab and self._on_key(event):
            event.accept()
            return
        super().keyPressEvent(event)

    def focusInEvent(self, event: QFocusEvent) -> None:
        """Show the caret."""
        super().focusInEvent(event)
        self.deselect()
        self._restart_blink()
        self._repaint_cell()

    def focusOutEvent(self, event: QFocusEvent) -> None:
        """Hide the caret."""
        super().focusOutEvent(event)
        self._blink.stop()
        self._repaint_cell()

    def resizeEvent(self, event: QResizeEvent) -> None:
        """Fit the figures into the new room."""
        super().resizeEvent(event)
        self._refit()

    def _repaint_cell(self) -> None:
        self.update()
        cell = self.parentWidget()
        if cell is not None:
            cell.update()

    def _restart_blink(self) -> None:
        self._show_caret()
        flash = QApplication.cursorFlashTime()
        if flash > 0 and not self._look.less_motion and self.hasFocus():
            self._blink.start(flash // 2)
        else:
            self._blink.stop()

    def _turn_caret(self) -> None:
        self._caret_shown = not self._caret_shown
        self.update()

    def _show_caret(self) -> None:
        self._caret_shown = True
        self.update()

    def _shown(self) -> str:
        # The hyphen that keyboards send is narrower than a figure; a true minus is as wide.
        return self.text().replace("-", "−")

    def _refit(self) -> None:
        width = self.width() - _BEFORE_CARET - _CARET_WIDTH
        self.setFont(fit_figures(self._shown(), self._look, width=width, height=self.height()))
        self.update()

    def paintEvent(self, event: QPaintEvent) -> None:
        """Paint the figures with a true minus sign, and the caret."""
        painter = flat_painter(self)
        metrics = QFontMetricsF(self.font())
        shown = self._shown()
        base = (self.height() + metrics.capHeight()) / 2.0
        if self.hasSelectedText():
            start = metrics.horizontalAdvance(shown[: self.selectionStart()])
            end = metrics.horizontalAdvance(shown[: self.selectionEnd()])
            painter.fillRect(
                QRectF(start, 0.0, end - start, self.height()), self._look.colour(Colour.HAIR)
            )
        painter.setFont(self.font())
        painter.setPen(self._look.colour(Colour.INK))
        painter.drawText(QPointF(0.0, base), shown)
        if self.hasFocus() and self._caret_shown and not self.isReadOnly():
            at = metrics.horizontalAdvance(shown[: self.cursorPosition()])
            gap = _BEFORE_CARET if self.cursorPosition() else 0.0
            height = metrics.capHeight() * 1.08
            painter.fillRect(
                QRectF(at + gap, base - height * 0.97, _CARET_WIDTH, height),
                self._look.colour(Colour.ACCENT),
            )
        painter.end()
