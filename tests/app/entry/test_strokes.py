import pytest
from PySide6.QtCore import QEvent, Qt
from PySide6.QtGui import QKeyEvent

from app.entry.strokes import Act, stroke_of

NONE = Qt.KeyboardModifier.NoModifier


def stroke(key, text="", modifiers=NONE):
    return stroke_of(QKeyEvent(QEvent.Type.KeyPress, key, modifiers, text), at=3.0)


@pytest.mark.parametrize(
    ("key", "text"),
    [
        (Qt.Key.Key_Return, "\r"),
        (Qt.Key.Key_Enter, "\r"),
        (Qt.Key.Key_Tab, "\t"),
        (0, "\n"),
        (Qt.Key.Key_unknown, "\n"),
    ],
)
def test_whatever_an_indicator_ends_its_reading_with_takes_it(key, text):
    assert stroke(key, text).act is Act.TAKE


def test_a_figure_is_written_with_the_time_it_came(qtbot):
    written = stroke(Qt.Key.Key_5, "5")

    assert (written.act, written.text, written.at) == (Act.WRITE, "5", 3.0)


@pytest.mark.parametrize(
    ("key", "text", "modifiers"),
    [
        (Qt.Key.Key_Left, "", NONE),
        (Qt.Key.Key_F2, "", NONE),
        (Qt.Key.Key_C, "\x03", Qt.KeyboardModifier.ControlModifier),
        (Qt.Key.Key_5, "5", Qt.KeyboardModifier.AltModifier),
    ],
)
def test_keys_that_move_or_command_write_nothing(key, text, modifiers):
    assert stroke(key, text, modifiers) is None
