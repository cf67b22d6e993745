"""What every widget of the bench starts from: it has a look, a name, and paints itself flat."""

from __future__ import annotations

from PySide6.QtCore import QRectF, Qt
from PySide6.QtGui import QAccessible, QAccessibleEvent, QKeyEvent, QPainter, QPen
from PySide6.QtWidgets import QAbstractButton, QWidget

from app.frame.look import Look
from reports.palette import Colour
from reports.sheet.medium import LineWidth

__all__ = ["PlainButton", "PlainWidget", "announce", "draw_focus", "flat_painter"]


def flat_painter(widget: QWidget) -> QPainter:
    """Open a painter whose lines and words have smooth edges.

    Parameters
    ----------
    widget : QWidget
        What is painted.

    Returns
    -------
    QPainter
        To be ended by the caller, best in a ``with`` block's place of try and finally.
    """
    painter = QPainter(widget)
    painter.setRenderHint(QPainter.RenderHint.Antialiasing)
    painter.setRenderHint(QPainter.RenderHint.TextAntialiasing)
    return painter


def draw_focus(painter: QPainter, frame: QRectF, look: Look) -> None:
    """Draw the accent frame inside an element that has the keyboard.

    Parameters
    ----------
    painter : QPainter
        Where it is drawn.
    frame : QRectF
        The element [px].
    look : Look
        Its look.
    """
    width = look.line(LineWidth.HEAVY)
    pen = QPen(look.colour(Colour.ACCENT), width)
    pen.setJoinStyle(Qt.PenJoinStyle.MiterJoin)
    painter.setPen(pen)
    painter.setBrush(Qt.BrushStyle.NoBrush)
    inset = width / 2.0
    painter.drawRect(frame.adjusted(inset, inset, -inset, -inset))


def announce(widget: QWidget, text: str) -> None:
    """Tell assistive software what a widget now says, without moving the focus.

    Parameters
    ----------
    widget : QWidget
        What says it.
    text : str
        The words; an empty text is only stored.
    """
    if text == widget.accessibleDescription():
        return
    widget.setAccessibleDescription(text)
    if text:
        QAccessible.updateAccessibility(QAccessibleEvent(widget, QAccessible.Event.Alert))


class PlainWidget(QWidget):
    """A widget with a look that can change while it stands."""

    def __init__(
        self, *, name: str, look: Look | None = None, parent: QWidget | None = None
    ) -> None:
        super().__init__(parent)
        self._look = look or Look()
        self.setAccessibleName(name)

    @property
    def look(self) -> Look:
        """How this widget looks now."""
        return self._look

    def set_look(self, look: Look) -> None:
        """Take another look, for this widget and for every control inside it.

        Parameters
        ----------
        look : Look
            Colours, scale and motion from now on.
        """
        self._look = look
        for child in self.findChildren(QWidget):
            if isinstance(child, PlainWidget | PlainButton) and child.parent() is self:
                child.set_look(look)
        self.look_changed()
        self.updateGeometry()
        self.update()

    def look_changed(self) -> None:
        """Set up what depends on the look; widgets with parts of their own override this."""


class PlainButton(QAbstractButton):
    """A flat key. A click never takes the keyboard from where the readings go."""

    def __init__(
        self, text: str, *, look: Look | None = None, parent: QWidget | None = None
    ) -> None:
        super().__init__(parent)
        self._look = look or Look()
        self.setText(text)
        self.setAccessibleName(text)
        self.setFocusPolicy(Qt.FocusPolicy.TabFocus)

    @property
    def look(self) -> Look:
        """How this key looks now."""
        return self._look

    def set_look(self, look: Look) -> None:
        """Take another look.

        Parameters
        ----------
        look : Look
            Colours, scale and motion from now on.
        """
        self._look = look
        self.updateGeometry()
        self.update()

    def keyPressEvent(self, event: QKeyEvent) -> None:
        """Let Enter press the key as well; anything else goes where it went."""
        if event.key() in (Qt.Key.Key_Return, Qt.Key.Key_Enter) and not event.isAutoRepeat():
            self.click()
            return
        super().keyPressEvent(event)
