"""What the desks are laid out with: words, lines to type in, drawings, and the page itself."""

from __future__ import annotations

from dataclasses import replace
from typing import Protocol, runtime_checkable

from PySide6.QtCore import QRectF, QSize, Qt, Signal
from PySide6.QtGui import QKeyEvent, QPaintEvent, QPalette
from PySide6.QtWidgets import (
    QFrame,
    QLabel,
    QLineEdit,
    QScrollArea,
    QScrollBar,
    QSizePolicy,
    QWidget,
)

from app.drawing.view import SheetView
from app.frame.key import Key
from app.frame.look import Look
from app.frame.plain import PlainButton, PlainWidget, draw_focus, flat_painter
from reports.palette import Colour
from reports.sheet.medium import BENCH_1280, DESK, LineWidth, Size
from reports.typeface import Weight

__all__ = [
    "DeskPage",
    "DeskScroll",
    "DeskSheet",
    "Dressed",
    "FlatLine",
    "Judged",
    "Rule",
    "Words",
    "desk_key",
    "desk_look",
    "dress_all",
    "dress_bar",
]

_TO_DESK = DESK.size(Size.TEXT) / BENCH_1280.size(Size.TEXT)


@runtime_checkable
class Dressed(Protocol):
    """A widget of Qt's own kind that takes over a look."""

    def dress(self, look: Look) -> None:
        """Take over colours and sizes."""


@runtime_checkable
class Judged(Protocol):
    """A page that shows a verdict, which has its page in the handbook."""

    def handbook_words(self) -> str:
        """Name the rule behind the verdict in front; nothing where there is none."""


def desk_look(look: Look) -> Look:
    """Give the look of a desk, read at arm's length, from the window's.

    Parameters
    ----------
    look : Look
        The window's look, whose sizes are the bench's.

    Returns
    -------
    Look
        The same colours, with the sizes of a desk.

    Examples
    --------
    >>> round(desk_look(Look()).size(Size.TEXT), 1)
    15.0
    """
    return replace(look, text_scale=look.text_scale * _TO_DESK, far=False)


def dress_all(widget: QWidget, look: Look) -> None:
    """Hand a look to everything inside a widget.

    Parameters
    ----------
    widget : QWidget
        A page or a part of one.
    look : Look
        The desk's look.
    """
    for child in widget.findChildren(QWidget):
        if isinstance(child, PlainWidget | PlainButton):
            child.set_look(look)
        elif isinstance(child, Dressed):
            child.dress(look)


class DeskPage(QWidget):
    """A desk; hands its look on to everything that lies on it."""

    def __init__(self, *, name: str, look: Look, parent: QWidget | None = None) -> None:
        super().__init__(parent)
        self._look = desk_look(look)
        self.setAccessibleName(f"{name} desk")

    @property
    def look(self) -> Look:
        """The desk's look."""
        return self._look

    def set_look(self, look: Look) -> None:
        """Take over the window's look.

        Parameters
        ----------
        look : Look
            The window's look.
        """
        self._look = desk_look(look)
        dress_all(self, self._look)
        self.look_changed()
        self.update()

    def look_changed(self) -> None:
        """Set up what depends on the look; desks with drawings override this."""

    def refresh(self) -> None:
        """Show what is known now; called when the desk comes to the front."""

    def entrance(self) -> QWidget:
        """Give what has the keyboard when the desk comes to the front.

        A focus proxy would do the same, but Qt's Tab then skips whatever stands before it.
        """
        return self


def desk_key(words: str, *, look: Look, parent: QWidget | None = None) -> Key:
    """Make a key of a desk, with some room beside its words.

    Parameters
    ----------
    words : str
        What it does.
    look : Look
        The desk's look.
    parent : QWidget or None
        What it lies on.

    Returns
    -------
    Key
        The key.
    """
    return _DeskKey(words, look=look, parent=parent)


class _DeskKey(Key):
    def sizeHint(self) -> QSize:
        """Give the words some room, so that they need not shrink."""
        asked = super().sizeHint()
        return QSize(asked.width() + 20, asked.height())


class Words(QLabel):
    """A sentence or a heading in the desk's type."""

    def __init__(
        self,
        text: str = "",
        *,
        look: Look,
        size: Size = Size.TEXT,
        weight: Weight = Weight.REGULAR,
        colour: Colour = Colour.INK,
        parent: QWidget | None = None,
    ) -> None:
        super().__init__(text, parent)
        self._size = size
        self._weight = weight
        self._colour = colour
        self.setTextFormat(Qt.TextFormat.PlainText)
        self.setWordWrap(True)
        self.setAccessibleName(text)
        self.dress(look)

    def say(self, text: str) -> None:
        """Say something else.

        Parameters
        ----------
        text : str
            The words.
        """
        self.setText(text)
        self.setAccessibleName(text)

    def dress(self, look: Look) -> None:
        """Take over colours and sizes."""
        self.setFont(look.font(self._size, weight=self._weight))
        palette = QPalette(self.palette())
        palette.setColor(QPalette.ColorRole.WindowText, look.colour(self._colour))
        self.setPalette(palette)


class Rule(QWidget):
    """The one line that parts two areas."""

    def __init__(self, *, look: Look, upright: bool = False, parent: QWidget | None = None) -> None:
        super().__init__(parent)
        self._look = look
        self._upright = upright
        if upright:
            self.setFixedWidth(2)
        else:
            self.setFixedHeight(2)

    def dress(self, look: Look) -> None:
        """Take over colours and sizes."""
        self._look = look
        self.update()

    def paintEvent(self, event: QPaintEvent) -> None:
        """Paint the line."""
        painter = flat_painter(self)
        thin = self._look.line(LineWidth.NARROW)
        width = thin if self._upright else self.width()
        height = self.height() if self._upright else thin
        painter.fillRect(QRectF(0.0, 0.0, width, height), self._look.colour(Colour.INK2))
        painter.end()


class FlatLine(QLineEdit):
    """A line to type words in; its accent frame shows the keyboard."""

    entered = Signal()
    given_up = Signal()

    def __init__(
        self, *, name: str, look: Look, hint: str = "", parent: QWidget | None = None
    ) -> None:
        super().__init__(parent)
        self._look = look
        self.setFrame(False)
        self.setAccessibleName(name)
        self.setPlaceholderText(hint)
        self.setTextMargins(8, 0, 8, 0)
        self.dress(look)

    def dress(self, look: Look) -> None:
        """Take over colours and sizes."""
        self._look = look
        self.setFont(look.font(Size.TEXT))
        palette = QPalette(self.palette())
        for role, token in (
            (QPalette.ColorRole.Base, Colour.PAPER),
            (QPalette.ColorRole.Text, Colour.INK),
            (QPalette.ColorRole.PlaceholderText, Colour.INK2),
            (QPalette.ColorRole.Highlight, Colour.ACCENT),
            (QPalette.ColorRole.HighlightedText, Colour.PAPER),
        ):
            palette.setColor(role, look.colour(token))
        self.setPalette(palette)
        self.setFixedHeight(round(max(36.0, look.size(Size.TEXT) * 2.2)))

    def keyPressEvent(self, event: QKeyEvent) -> None:
        """Take with Enter, give up with Esc."""
        if event.key() in (Qt.Key.Key_Return, Qt.Key.Key_Enter):
            if not event.isAutoRepeat():
                self.entered.emit()
        elif event.key() == Qt.Key.Key_Escape:
            self.given_up.emit()
        else:
            super().keyPressEvent(event)

    def paintEvent(self, event: QPaintEvent) -> None:
        """Paint the words as Qt does, and a frame of our own round them."""
        super().paintEvent(event)
        painter = flat_painter(self)
        frame = QRectF(self.rect())
        if self.hasFocus():
            draw_focus(painter, frame, self._look)
        else:
            half = self._look.line(LineWidth.NARROW) / 2.0
            painter.setPen(self._look.pen(Colour.INK2))
            painter.drawRect(frame.adjusted(half, half, -half, -half))
        painter.end()


class DeskSheet(SheetView):
    """A drawing on a desk, at its own proportions."""

    def __init__(self, *, look: Look, parent: QWidget | None = None) -> None:
        super().__init__(parent, palette=look.palette)
        policy = QSizePolicy(QSizePolicy.Policy.Expanding, QSizePolicy.Policy.Preferred)
        policy.setHeightForWidth(True)
        self.setSizePolicy(policy)

    def dress(self, look: Look) -> None:
        """Take over the colours."""
        self.use_palette(look.palette)

    def heightForWidth(self, width: int) -> int:
        """Give the height at which the whole sheet fills a width."""
        sheet = self.sheet()
        return round(width * sheet.height / sheet.width) if sheet is not None else 0

    def minimumSizeHint(self) -> QSize:
        """Give the least at which a drawing says anything."""
        return QSize(320, 60)


def dress_bar(bar: QScrollBar, look: Look) -> None:
    """Make a scroll bar flat: a plain bar in a plain groove.

    Parameters
    ----------
    bar : QScrollBar
        The bar.
    look : Look
        Gives its colours.
    """
    groove, handle = look.colour(Colour.PAPER).name(), look.colour(Colour.BEFORE).name()
    bar.setStyleSheet(
        f"QScrollBar:vertical {{ background: {groove}; width: 14px; border: none; }}"
        f"QScrollBar::handle:vertical {{ background: {handle}; min-height: 32px;"
        " margin: 2px 4px; border: none; }"
        f"QScrollBar:horizontal {{ background: {groove}; height: 14px; border: none; }}"
        f"QScrollBar::handle:horizontal {{ background: {handle}; min-width: 32px;"
        " margin: 4px 2px; border: none; }"
        "QScrollBar::add-line, QScrollBar::sub-line { height: 0px; width: 0px; }"
        f"QScrollBar::add-page, QScrollBar::sub-page {{ background: {groove}; }}"
    )


class DeskScroll(QScrollArea):
    """A column longer than the window, moved by wheel, by bar, or by what has the keyboard."""

    def __init__(self, *, name: str, look: Look, parent: QWidget | None = None) -> None:
        super().__init__(parent)
        self.setFrameShape(QFrame.Shape.NoFrame)
        self.setWidgetResizable(True)
        self.setHorizontalScrollBarPolicy(Qt.ScrollBarPolicy.ScrollBarAlwaysOff)
        self.setAccessibleName(name)
        self.dress(look)

    def dress(self, look: Look) -> None:
        """Take over the ground."""
        dress_bar(self.verticalScrollBar(), look)
        palette = QPalette(self.palette())
        palette.setColor(QPalette.ColorRole.Window, look.colour(Colour.PAPER))
        self.setPalette(palette)
