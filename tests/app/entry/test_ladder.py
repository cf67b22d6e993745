import pytest
from PySide6.QtCore import Qt
from PySide6.QtTest import QTest
from PySide6.QtWidgets import QAbstractButton, QLineEdit, QVBoxLayout, QWidget

from app.entry.ladder import Ladder, Rung

RUNGS = (
    Rung(mark="0°", value="0"),
    Rung(mark="90°", value="+5", struck=("+50",), questioned=True),
    Rung(mark="180°", active=True),
    Rung(mark="270°", skipped=True),
)


@pytest.fixture
def page(qtbot):
    window = QWidget()
    layout = QVBoxLayout(window)
    window.entry = QLineEdit()
    window.ladder = Ladder(RUNGS, caption="readings in 0.0001 in")
    layout.addWidget(window.entry)
    layout.addWidget(window.ladder)
    qtbot.addWidget(window)
    window.resize(640, 220)
    with qtbot.waitActive(window):
        window.show()
        window.activateWindow()
    window.entry.setFocus()
    return window


def keys(ladder):
    return [key for key in ladder.findChildren(QAbstractButton) if key.isVisible()]


def test_each_mark_says_its_reading_its_struck_ones_and_its_question(page):
    names = [key.accessibleName() for key in keys(page.ladder)]

    assert names == [
        "0°: 0",
        "90°: +5; before it +50, struck; questioned",
        "180°: not read yet; to be read now",
        "270°: no surface here",
    ]


def test_a_click_on_a_mark_names_its_place_and_leaves_the_keyboard_where_it_is(page, qtbot):
    with qtbot.waitSignal(page.ladder.chosen, timeout=500) as chosen:
        QTest.mouseClick(keys(page.ladder)[1], Qt.MouseButton.LeftButton)

    assert chosen.args == [1]
    assert page.entry.hasFocus()


def test_the_keyboard_comes_to_the_active_mark_and_walks_from_there(page, qtbot):
    QTest.keyClick(page.entry, Qt.Key.Key_Tab)
    assert keys(page.ladder)[2].hasFocus()

    QTest.keyClick(keys(page.ladder)[2], Qt.Key.Key_Left)
    assert keys(page.ladder)[1].hasFocus()
    with qtbot.waitSignal(page.ladder.chosen, timeout=500) as chosen:
        QTest.keyClick(keys(page.ladder)[1], Qt.Key.Key_Return)
    assert chosen.args == [1]


def test_a_plan_with_fewer_marks_leaves_no_key_behind(page):
    page.ladder.set_rungs(RUNGS[:2])

    assert page.ladder.rungs == RUNGS[:2]
    assert len(keys(page.ladder)) == 2


def test_marks_are_high_enough_for_a_glove(page):
    page.ladder.resize(page.ladder.sizeHint())

    assert min(key.height() for key in keys(page.ladder)) >= 44
