"""What a key does to the reading cell, apart from any keyboard, so that it can wait its turn."""

from __future__ import annotations

from dataclasses import dataclass
from enum import StrEnum

from PySide6.QtCore import Qt
from PySide6.QtGui import QKeyEvent

__all__ = ["Act", "Stroke", "stroke_of"]


class Act(StrEnum):
    """What a stroke asks for."""

    WRITE = "write"
    TAKE = "take"
    ERASE = "erase"
    CLEAR = "clear"
    CHANGE_SIGN = "change sign"


@dataclass(frozen=True, slots=True, kw_only=True)
class Stroke:
    """One stroke of a key, an indicator or the keypad.

    Attributes
    ----------
    act : Act
        What it asks for.
    at : float
        When it arrived, on a clock that never goes back [s].
    text : str
        What it writes, for `Act.WRITE` only.
    """

    act: Act
    at: float
    text: str = ""


_KEYS = {
    Qt.Key.Key_Return: Act.TAKE,
    Qt.Key.Key_Enter: Act.TAKE,
    Qt.Key.Key_Tab: Act.TAKE,
    Qt.Key.Key_Backspace: Act.ERASE,
    Qt.Key.Key_Escape: Act.CLEAR,
}
_LINE_ENDS = ("\r", "\n", "\r\n")
_COMMANDS = (
    Qt.KeyboardModifier.ControlModifier
    | Qt.KeyboardModifier.AltModifier
    | Qt.KeyboardModifier.MetaModifier
)


def stroke_of(event: QKeyEvent, *, at: float) -> Stroke | None:
    """Read a key event as a stroke.

    Parameters
    ----------
    event : QKeyEvent
        The event.
    at : float
        When it arrived [s].

    Returns
    -------
    Stroke or None
        Nothing for keys that only move the caret or belong to a command.
    """
    if event.modifiers() & _COMMANDS:
        return None
    act = _KEYS.get(Qt.Key(event.key()))
    if act is None and event.text() in _LINE_ENDS:
        # Some indicators end with a line feed, which is no Enter key to the window system.
        act = Act.TAKE
    if act is not None:
        return Stroke(act=act, at=at)
    if event.text() and event.text().isprintable():
        return Stroke(act=Act.WRITE, at=at, text=event.text())
    return None
