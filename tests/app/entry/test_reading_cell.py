import pytest
from PySide6.QtCore import Qt
from PySide6.QtTest import QTest
from PySide6.QtWidgets import QLineEdit, QPushButton, QVBoxLayout, QWidget

from app.entry.cell_state import Asked, CellState
from app.entry.cell_unit import unit_for
from app.entry.reading_cell import ReadingCell
from app.entry.stray_strokes import StrayStrokes
from app.frame.key import Key
from models.units import inch_set


class Clock:
    def __init__(self):
        self.now = 100.0

    def __call__(self):
        return self.now


class Desk:
    """A page around the cell that remembers what it was told and answers when the test says so."""

    def __init__(self, qtbot):
        self.clock = Clock()
        self.window = QWidget()
        self.cell = ReadingCell(unit=unit_for(inch_set, "runout"), clock=self.clock)
        self.button = QPushButton("elsewhere")
        layout = QVBoxLayout(self.window)
        layout.addWidget(self.cell)
        layout.addWidget(self.button)
        self.taken = []
        self.corrected = []
        self.doubled = []
        self.cell.taken.connect(self.taken.append)
        self.cell.corrected.connect(lambda text, reason: self.corrected.append((text, reason)))
        self.cell.doubled.connect(self.doubled.append)
        qtbot.addWidget(self.window)
        self.window.resize(700, 300)
        with qtbot.waitActive(self.window):
            self.window.show()
            self.window.activateWindow()
        self.cell.ask(Asked(mark="225°"))
        self.cell.setFocus()

    @property
    def edit(self):
        return self.cell.findChild(QLineEdit)

    def type(self, text):
        for letter in text:
            key = {"\n": Qt.Key.Key_Return, "\t": Qt.Key.Key_Tab, "\b": Qt.Key.Key_Backspace}
            if letter in key:
                QTest.keyClick(self.edit, key[letter])
            else:
                QTest.keyClicks(self.edit, letter)

    def press(self, key, modifiers=Qt.KeyboardModifier.NoModifier):
        QTest.keyClick(self.edit, key, modifiers)

    def help(self):
        key = self.cell.findChild(Key)
        return key if key.isVisible() else None


@pytest.fixture
def desk(qtbot):
    return Desk(qtbot)


def test_an_empty_cell_waits_with_its_unit(desk):
    assert desk.cell.state is CellState.WAITING
    assert desk.cell.text == ""
    assert desk.edit.accessibleName() == "Reading at 225°"


def test_each_key_is_told_and_the_other_unit_follows(desk):
    told = []
    desk.cell.typed.connect(told.append)

    desk.type("-0.0003")

    assert told == ["-", "-0", "-0.", "-0.0", "-0.00", "-0.000", "-0.0003"]
    assert desk.cell.state is CellState.TYPING
    # By hand: 0.0003 x 25 400 µm = 7.62 µm.
    assert desk.cell.other_text == "−7.6 µm"


@pytest.mark.parametrize("end", ["\n", "\t"])
def test_enter_or_tab_takes_the_reading(desk, end):
    desk.type("0.0012" + end)

    assert desk.taken == ["0.0012"]
    assert desk.cell.state is CellState.WRITING
    assert desk.cell.text == "0.0012"


def test_the_reading_leaves_the_cell_when_the_next_mark_is_asked_for(desk):
    desk.type("0.0012\n")
    desk.cell.ask(Asked(mark="270°"))

    assert desk.cell.text == ""
    assert desk.cell.state is CellState.WAITING
    assert desk.edit.hasFocus()


def test_enter_alone_says_that_nothing_is_typed_and_moves_nowhere(desk):
    desk.type("\n")

    assert desk.taken == []
    assert desk.cell.notice == "Nothing typed for 225°"
    assert desk.cell.state is CellState.WAITING


def test_tab_leaves_an_empty_cell_so_that_the_keyboard_is_not_caught(desk):
    desk.type("\t")

    assert not desk.edit.hasFocus()
    assert desk.taken == []


def test_unreadable_text_stays_and_says_what_is_expected(desk):
    desk.type("l.0003\n")

    assert desk.cell.state is CellState.UNREADABLE
    assert desk.cell.text == "l.0003"
    assert desk.cell.notice == "“l.0003”: a length is a number such as −0.0003 in"
    assert desk.taken == []


def test_editing_unreadable_text_makes_it_a_reading_again(desk):
    desk.type("l.0003\n")
    desk.press(Qt.Key.Key_Home)
    desk.press(Qt.Key.Key_Delete)
    desk.type("\n")

    assert desk.taken == [".0003"]


def test_a_reading_may_carry_its_own_unit(desk):
    desk.type("-0.3 mil")
    # By hand: 0.3 thousandths of an inch are 7.62 µm.
    assert desk.cell.other_text == "−7.6 µm"


def test_backspace_in_the_empty_cell_asks_for_the_last_reading(desk, qtbot):
    with qtbot.waitSignal(desk.cell.asked_for_last, timeout=500):
        desk.type("\b")


def test_backspace_erases_while_there_is_something_to_erase(desk):
    asked = []
    desk.cell.asked_for_last.connect(lambda: asked.append(True))
    desk.type("12\b")

    assert desk.cell.text == "1"
    assert asked == []


def test_escape_clears_and_undo_brings_the_text_back(desk):
    desk.type("0.0012")
    desk.press(Qt.Key.Key_Escape)
    assert desk.cell.text == ""
    assert desk.help().text() == "Undo"

    QTest.mouseClick(desk.help(), Qt.MouseButton.LeftButton)
    assert desk.cell.text == "0.0012"
    assert desk.edit.hasFocus()


def test_undo_by_keyboard_after_escape(desk):
    desk.type("0.0012")
    desk.press(Qt.Key.Key_Escape)
    desk.press(Qt.Key.Key_Z, Qt.KeyboardModifier.ControlModifier)

    assert desk.cell.text == "0.0012"


def test_half_a_reading_does_not_move_to_another_mark_but_can_be_brought_back(desk):
    desk.type("0.00")
    desk.cell.ask(Asked(mark="90°", old="0.0040"))
    assert desk.cell.text == ""

    desk.cell.ask(Asked(mark="225°"))
    desk.cell.undo_clear()
    assert desk.cell.text == "0.00"


def test_asking_for_the_same_mark_again_keeps_what_is_typed(desk):
    desk.type("0.00")
    desk.cell.ask(Asked(mark="225°"))

    assert desk.cell.text == "0.00"


def test_undo_never_writes_over_what_was_typed_since(desk):
    desk.type("0.0012")
    desk.press(Qt.Key.Key_Escape)
    desk.type("5")
    desk.cell.undo_clear()

    assert desk.cell.text == "5"
    assert desk.help() is None


def test_readings_that_arrive_while_one_is_written_wait_in_order(desk):
    desk.type("0.0012\n0.0008\n-0.0001\n4")
    assert desk.taken == ["0.0012"]
    assert desk.cell.waiting_count == 2
    assert desk.cell.text == "0.0012"

    desk.cell.ask(Asked(mark="270°"))
    assert desk.taken == ["0.0012", "0.0008"]
    desk.cell.ask(Asked(mark="315°"))
    assert desk.taken == ["0.0012", "0.0008", "-0.0001"]
    desk.cell.ask(Asked(mark="0° again"))
    assert desk.cell.text == "4"
    assert desk.cell.state is CellState.TYPING


def test_a_page_that_answers_at_once_gets_every_reading_of_a_fast_indicator(desk):
    marks = iter(["270°", "315°", "0° again"])
    desk.cell.taken.connect(lambda _text: desk.cell.ask(Asked(mark=next(marks))))

    desk.type("0.0012\n0.0008\n-0.0001\n")

    assert desk.taken == ["0.0012", "0.0008", "-0.0001"]
    assert desk.cell.text == ""


def test_backspace_and_escape_wait_their_turn_too(desk):
    desk.type("1\n25\b6")
    desk.press(Qt.Key.Key_Escape)
    desk.type("7")
    desk.cell.ask(Asked(mark="270°"))

    assert desk.cell.text == "7"


def test_writing_is_said_only_when_it_takes_longer_than_a_blink(desk, qtbot):
    desk.type("0.0012\n")
    assert desk.cell.notice == ""

    qtbot.waitUntil(lambda: desk.cell.notice == "writing …", timeout=2000)


def test_the_same_value_within_300_ms_is_taken_once_and_said_so(desk):
    desk.type("0.0012\n")
    desk.cell.ask(Asked(mark="270°"))
    desk.clock.now += 0.299
    desk.type("0.0012\n")

    assert desk.taken == ["0.0012"]
    assert desk.doubled == ["0.0012"]
    assert desk.cell.notice == "sent twice, taken once"
    assert desk.cell.state is CellState.WAITING


def test_the_same_value_later_than_300_ms_is_a_reading(desk):
    desk.type("0.0012\n")
    desk.cell.ask(Asked(mark="270°"))
    desk.clock.now += 0.301
    desk.type("0.0012\n")

    assert desk.taken == ["0.0012", "0.0012"]
    assert desk.doubled == []


def test_another_value_within_300_ms_is_a_reading(desk):
    desk.type("0.0012\n")
    desk.cell.ask(Asked(mark="270°"))
    desk.type("0.0013\n")

    assert desk.taken == ["0.0012", "0.0013"]


def test_a_double_that_waited_is_known_by_when_it_was_sent(desk):
    desk.type("0.0012\n")
    desk.clock.now += 0.1
    desk.type("0.0012\n")
    desk.clock.now += 5.0
    desk.cell.ask(Asked(mark="270°"))

    assert desk.taken == ["0.0012"]
    assert desk.doubled == ["0.0012"]


def test_two_equal_readings_that_waited_for_a_slow_disk_are_two(desk):
    desk.type("0.0012\n")
    desk.clock.now += 2.0
    desk.type("0.0012\n")
    desk.clock.now += 5.0
    desk.cell.ask(Asked(mark="270°"))

    assert desk.taken == ["0.0012", "0.0012"]


def test_f2_says_that_both_were_meant(desk):
    desk.type("0.0012\n")
    desk.cell.ask(Asked(mark="270°"))
    desk.type("0.0012\n")
    desk.press(Qt.Key.Key_F2)

    assert desk.taken == ["0.0012", "0.0012"]
    assert not desk.cell.double_pending


def test_the_offer_to_take_both_ends_with_the_next_reading(desk):
    desk.type("0.0012\n")
    desk.cell.ask(Asked(mark="270°"))
    desk.type("0.0012\n3")
    desk.press(Qt.Key.Key_F2)

    assert desk.taken == ["0.0012"]
    assert desk.cell.text == "3"


def test_trouble_keeps_the_reading_and_tries_again(desk):
    desk.type("0.0012\n")
    desk.cell.refuse(
        what="The disk is full", where="D: on the bench computer", way_out="Free some room."
    )

    assert desk.cell.state is CellState.TROUBLE
    assert desk.cell.text == "0.0012"
    assert "The disk is full, D: on the bench computer. Free some room." in desk.cell.notice
    assert desk.help().text() == "Try again"

    QTest.mouseClick(desk.help(), Qt.MouseButton.LeftButton)
    assert desk.taken == ["0.0012", "0.0012"]
    assert desk.cell.state is CellState.WRITING


def test_enter_tries_again_unless_other_readings_wait_and_then_f5_does(desk):
    desk.type("0.0012\n")
    desk.cell.refuse(what="The disk is full", where="D:", way_out="Free some room.")
    desk.type("\n")
    assert desk.taken == ["0.0012", "0.0012"]

    desk.cell.refuse(what="The disk is full", where="D:", way_out="Free some room.")
    desk.type("0.0020\n")
    assert desk.taken == ["0.0012", "0.0012"]
    assert desk.cell.text == "0.0012"
    desk.press(Qt.Key.Key_F5)
    desk.cell.ask(Asked(mark="270°"))

    assert desk.taken == ["0.0012", "0.0012", "0.0012", "0.0020"]


def test_a_correction_takes_a_new_value_with_its_reason(desk):
    desk.cell.ask(Asked(mark="180°", old="0.0040", reason_needed=True))
    assert desk.cell.state is CellState.CORRECTING
    desk.type("0.0004\n")
    assert desk.corrected == []
    assert desk.cell.notice.startswith("Say why first: F1 misread · F2 wrong mark")

    desk.press(Qt.Key.Key_F4)
    desk.type("\n")
    assert desk.corrected == [("0.0004", "typing slip")]
    assert desk.taken == []


def test_the_last_value_is_corrected_without_a_reason(desk):
    desk.cell.ask(Asked(mark="180°", old="0.0040"))
    desk.type("0.0004\n")

    assert desk.corrected == [("0.0004", "")]


def test_a_digit_is_never_a_reason(desk):
    desk.cell.ask(Asked(mark="180°", old="0.0040", reason_needed=True))
    desk.type("1\n")

    assert desk.corrected == []
    assert desk.cell.text == "1"


def test_the_closing_mark_waits_beside_the_first_reading(desk):
    desk.cell.ask(Asked(mark="0° again", closing="0.0000 in"))
    assert desk.cell.state is CellState.CLOSING

    desk.type("0.0001\n")
    assert desk.taken == ["0.0001"]


def test_somebody_elses_cell_takes_nothing_and_loses_nothing(desk):
    wanted = []
    desk.cell.takeover_wanted.connect(lambda: wanted.append(True))
    desk.cell.lock("T. Alder signed in; take over with your PIN")
    desk.type("0.0012\n0.0013\n")

    assert desk.cell.state is CellState.NOT_YOURS
    assert desk.taken == []
    assert wanted
    assert "T. Alder signed in" in desk.cell.notice
    assert desk.cell.waiting_count == 2

    desk.cell.unlock()
    assert desk.taken == []
    assert desk.cell.text == "0.0012"
    desk.type("\n")
    assert desk.taken == ["0.0012"]
    desk.cell.ask(Asked(mark="270°"))
    assert desk.taken == ["0.0012", "0.0013"]


def test_a_resting_cell_keeps_what_arrives_for_the_next_mark(desk):
    desk.cell.rest()
    desk.type("0.0012\n")
    assert desk.taken == []

    desk.cell.ask(Asked(mark="0°"))
    assert desk.taken == ["0.0012"]


def test_a_touch_anywhere_in_the_cell_is_told_and_takes_the_keyboard(desk, qtbot):
    desk.button.setFocus()
    with qtbot.waitSignal(desk.cell.touched, timeout=500):
        QTest.mouseClick(desk.cell, Qt.MouseButton.LeftButton, pos=desk.cell.rect().topRight() / 1)
    assert desk.edit.hasFocus()


def test_figures_shrink_to_fit_and_never_leave_the_cell(desk):
    desk.cell.setFixedSize(608, 130)
    desk.type("-0.0003")
    full = desk.edit.font().pixelSize()
    desk.type("4567890")
    metrics = desk.edit.fontMetrics()

    assert full == 128
    assert desk.edit.font().pixelSize() < 96
    assert metrics.horizontalAdvance("−0.00034567890") <= desk.edit.width()


@pytest.mark.parametrize("width", range(400, 660, 20))
def test_a_true_minus_sign_and_the_caret_find_room_at_any_width(desk, width):
    desk.cell.setFixedSize(width, 130)
    desk.type("-0.0003")

    # Beside the figures a gap of 6 px and a caret of 4 px.
    assert desk.edit.fontMetrics().horizontalAdvance("−0.0003") + 10 <= desk.edit.width()


def test_one_figure_more_costs_one_step_of_size(desk):
    desk.cell.setFixedSize(608, 130)
    desk.type("-10.0003")

    assert desk.edit.font().pixelSize() in (112, 96)


def test_readings_sent_while_a_key_has_the_keyboard_come_into_the_cell(desk):
    StrayStrokes(cell=desk.cell, page=desk.window)
    desk.button.setFocus()
    QTest.keyClick(desk.button, Qt.Key.Key_Minus)
    assert desk.edit.hasFocus()
    desk.type("0.0003\n")

    assert desk.taken == ["-0.0003"]


def test_letters_and_space_stay_with_the_key_that_has_the_keyboard(desk):
    StrayStrokes(cell=desk.cell, page=desk.window)
    pressed = []
    desk.button.clicked.connect(lambda: pressed.append(True))
    desk.button.setFocus()
    QTest.keyClick(desk.button, Qt.Key.Key_X)
    QTest.keyClick(desk.button, Qt.Key.Key_Space)

    assert pressed == [True]
    assert desk.cell.text == ""
    assert desk.button.hasFocus()


def test_another_line_keeps_its_figures(desk):
    StrayStrokes(cell=desk.cell, page=desk.window)
    line = QLineEdit()
    desk.window.layout().addWidget(line)
    line.setFocus()
    QTest.keyClicks(line, "610")

    assert line.text() == "610"
    assert desk.cell.text == ""
