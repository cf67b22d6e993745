import pytest
from PySide6.QtCore import Qt
from PySide6.QtTest import QTest
from PySide6.QtWidgets import QAbstractButton, QLineEdit, QVBoxLayout, QWidget

from app.entry.cell_state import Asked, CellState
from app.entry.cell_unit import unit_for
from app.entry.keypad import Keypad
from app.entry.question_line import Question, QuestionLine, ReasonKeys
from app.entry.reading_cell import ReadingCell
from models.units import inch_set


@pytest.fixture
def bench(qtbot):
    """A cell with its keypad, a question line and the reasons, wired as a page wires them."""
    window = QWidget()
    window.cell = ReadingCell(unit=unit_for(inch_set, "runout"))
    window.keypad = Keypad()
    window.keypad.attach(window.cell)
    window.question = QuestionLine()
    window.reasons = ReasonKeys()
    window.reasons.chosen.connect(window.cell.choose_reason)
    window.cell.reason_chosen.connect(window.reasons.show_reason)
    layout = QVBoxLayout(window)
    for widget in (window.cell, window.question, window.reasons, window.keypad):
        layout.addWidget(widget)
    qtbot.addWidget(window)
    window.resize(640, 700)
    with qtbot.waitActive(window):
        window.show()
        window.activateWindow()
    window.cell.ask(Asked(mark="225°"))
    window.cell.setFocus()
    return window


def edit(bench):
    return bench.cell.findChild(QLineEdit)


def touch(widget, *names):
    for name in names:
        key = next(
            key for key in widget.findChildren(QAbstractButton) if key.accessibleName() == name
        )
        QTest.mouseClick(key, Qt.MouseButton.LeftButton)


def test_a_reading_is_typed_and_taken_by_touch_alone(bench):
    taken = []
    bench.cell.taken.connect(taken.append)
    touch(bench.keypad, "0", "Decimal point", "0", "0", "1", "2", "Change sign", "Take")

    assert taken == ["−0.0012"]
    assert edit(bench).hasFocus()


def test_the_sign_changes_back(bench):
    touch(bench.keypad, "5", "Change sign", "Change sign")

    assert bench.cell.text == "5"


def test_erase_and_clear(bench):
    touch(bench.keypad, "5", "7", "Erase")
    assert bench.cell.text == "5"
    touch(bench.keypad, "Clear")
    assert bench.cell.text == ""


def test_every_key_is_large_enough_for_a_glove(bench):
    bench.keypad.setFixedSize(bench.keypad.sizeHint())
    sizes = [key.size() for key in bench.keypad.findChildren(QAbstractButton)]

    # 152 x 84 px, less the line between two keys.
    assert len(sizes) == 15
    assert min(size.width() for size in sizes) >= 150
    assert min(size.height() for size in sizes) >= 82


def test_touches_wait_while_a_reading_is_written(bench):
    touch(bench.keypad, "1", "Take", "2")
    assert bench.cell.text == "1"

    bench.cell.ask(Asked(mark="270°"))
    assert bench.cell.text == "2"


QUESTION = Question(
    name="reading-17",
    mark="180°",
    sentence="25.4 times its neighbours: 0.0003 in?",
    proposal="0.0003 in",
)


def test_a_question_takes_no_keyboard_and_no_digit_answers_it(bench):
    answers = []
    for signal in (bench.question.proposed_taken, bench.question.kept, bench.question.read_again):
        signal.connect(answers.append)
    bench.question.set_question(QUESTION)
    QTest.keyClicks(edit(bench), "0.0012")
    QTest.keyClick(edit(bench), Qt.Key.Key_Return)

    assert answers == []
    assert edit(bench).hasFocus()
    assert bench.cell.state is CellState.WRITING
    assert bench.question.question == QUESTION


@pytest.mark.parametrize(
    ("key", "words", "signal"),
    [
        (Qt.Key.Key_F2, "Take 0.0003 in", "proposed_taken"),
        (Qt.Key.Key_F3, "Keep, because …", "kept"),
        (Qt.Key.Key_F4, "Read 180° again", "read_again"),
    ],
)
def test_a_question_is_answered_by_function_key_or_touch(bench, qtbot, key, words, signal):
    bench.question.set_question(QUESTION)
    with qtbot.waitSignal(getattr(bench.question, signal), timeout=500) as by_key:
        QTest.keyClick(edit(bench), key)
    with qtbot.waitSignal(getattr(bench.question, signal), timeout=500) as by_touch:
        touch(bench.question, words)

    assert by_key.args == by_touch.args == ["reading-17"]
    assert edit(bench).hasFocus()


def test_an_answered_question_leaves_no_key_behind(bench):
    answers = []
    bench.question.kept.connect(answers.append)
    bench.question.set_question(QUESTION)
    bench.question.set_question(None)
    QTest.keyClick(edit(bench), Qt.Key.Key_F3)

    assert answers == []
    assert not bench.question.isVisible()


def test_where_nothing_can_be_proposed_f2_does_nothing(bench):
    answers = []
    bench.question.proposed_taken.connect(answers.append)
    bench.question.set_question(Question(name="r", mark="90°", sentence="Copied from before?"))
    QTest.keyClick(edit(bench), Qt.Key.Key_F2)

    assert answers == []


def test_f2_belongs_to_a_reading_sent_twice_while_the_cell_asks_about_it(bench):
    answers, taken = [], []
    bench.question.proposed_taken.connect(answers.append)
    bench.cell.taken.connect(taken.append)
    bench.question.set_question(QUESTION)
    for _ in range(2):
        QTest.keyClicks(edit(bench), "0.0012")
        QTest.keyClick(edit(bench), Qt.Key.Key_Return)
        bench.cell.ask(Asked(mark="270°"))
    assert bench.cell.double_pending
    QTest.keyClick(edit(bench), Qt.Key.Key_F2)

    assert taken == ["0.0012", "0.0012"]
    assert answers == []
    bench.cell.ask(Asked(mark="315°"))
    QTest.keyClick(edit(bench), Qt.Key.Key_F2)
    assert answers == ["reading-17"]


def test_how_many_questions_are_open_is_said(bench):
    bench.question.set_question(QUESTION, open_count=3)

    assert bench.question.accessibleDescription() == (
        "180°: 25.4 times its neighbours: 0.0003 in? (2 more)"
    )


def test_a_reason_by_function_key_or_by_touch_is_the_same(bench):
    corrected = []
    bench.cell.corrected.connect(lambda text, reason: corrected.append((text, reason)))
    for value, choose in (
        ("4", lambda: QTest.keyClick(edit(bench), Qt.Key.Key_F3)),
        ("5", lambda: touch(bench.reasons, "slipped")),
    ):
        bench.cell.ask(Asked(mark="180°", old="0.0040", reason_needed=True))
        QTest.keyClicks(edit(bench), value)
        choose()
        assert [
            key.text() for key in bench.reasons.findChildren(QAbstractButton) if key.isChecked()
        ] == ["slipped"]
        bench.cell.take()

    assert corrected == [("4", "slipped"), ("5", "slipped")]
