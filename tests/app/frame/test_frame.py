from itertools import pairwise

import pytest
from PySide6.QtCore import Qt
from PySide6.QtTest import QTest
from PySide6.QtWidgets import QAbstractButton, QLineEdit, QVBoxLayout, QWidget

from app.frame.desks import DESKS, DesksLine
from app.frame.foot import STAGES, FootKey, FootKeys, TitleBlock, TitleLine
from app.frame.look import Look
from app.frame.prompt import Prompt, PromptBlock
from app.frame.verdicts import ShownVerdict, VerdictBand, VerdictPane
from reports.sheet.pictures import VerdictKind

LOOK_AGAIN = ShownVerdict(
    kind=VerdictKind.LOOK,
    phrase="Look again",
    sentences=("S7 changed 0.0010 in TIR, limit 0.0010 in: ±0.0001 in cannot tell.",),
    facts=("so far 8 of 14 stations",),
)
FOOT = (
    FootKey(name="keypad", words="Keypad"),
    FootKey(name="skip", words="Skip mark"),
    FootKey(name="note", words="Note, photo"),
    FootKey(name="leave", words="Leave", enabled=False),
)


@pytest.fixture
def page(qtbot):
    """A window with a line where the readings go, and room for the widget under test."""
    window = QWidget()
    window.entry = QLineEdit()
    window.layout_ = QVBoxLayout(window)
    window.layout_.addWidget(window.entry)
    qtbot.addWidget(window)
    window.resize(1280, 300)

    def put(widget):
        window.layout_.addWidget(widget)
        with qtbot.waitActive(window):
            window.show()
            window.activateWindow()
        window.entry.setFocus()
        return widget

    window.put = put
    return window


def click(widget):
    QTest.mouseClick(widget, Qt.MouseButton.LeftButton)


def named(widget, name):
    return next(key for key in widget.findChildren(QAbstractButton) if key.accessibleName() == name)


def test_a_foot_key_names_itself_and_leaves_the_keyboard_with_the_reading(page, qtbot):
    foot = page.put(FootKeys(FOOT))
    with qtbot.waitSignal(foot.pressed, timeout=500) as pressed:
        click(foot.key("skip"))

    assert pressed.args == ["skip"]
    assert page.entry.hasFocus()


def test_a_key_that_cannot_be_pressed_now_stays_silent(page):
    foot = page.put(FootKeys(FOOT))
    told = []
    foot.pressed.connect(told.append)
    click(foot.key("leave"))

    assert told == []


def test_foot_keys_fill_the_whole_foot_with_nothing_between_but_a_line(qtbot):
    foot = FootKeys(FOOT)
    qtbot.addWidget(foot)
    foot.resize(512, 80)
    foot.show()
    edges = [foot.key(offered.name).geometry() for offered in FOOT]

    assert all(edge.height() == 78 for edge in edges)
    assert all(0 <= right.left() - left.right() - 1 <= 2 for left, right in pairwise(edges))
    assert edges[-1].right() == 511


def test_enter_presses_the_key_that_has_the_keyboard(page, qtbot):
    foot = page.put(FootKeys(FOOT))
    QTest.keyClick(page.entry, Qt.Key.Key_Tab)
    with qtbot.waitSignal(foot.pressed, timeout=500) as pressed:
        QTest.keyClick(foot.key("keypad"), Qt.Key.Key_Return)

    assert pressed.args == ["keypad"]


def test_the_title_block_says_which_rotor_is_open_and_what_was_written_last(qtbot):
    block = TitleBlock(
        TitleLine(
            rotor="R-0418 (invented)",
            job="J-0031",
            step="7 of 13, attempt 1",
            plan="B",
            written="14:32:07",
            stage="Runout",
        )
    )
    qtbot.addWidget(block)

    assert block.accessibleName() == (
        "Title block: Rotor R-0418 (invented), Job J-0031, Step 7 of 13, attempt 1, Plan B, "
        "written 14:32:07, stage Runout"
    )


def test_the_stages_are_eight_plain_words():
    assert STAGES == ("Sizes", "Fit", "Heat", "Mount", "Cool", "Runout", "Balance", "Settled")


def test_a_desk_is_chosen_by_name_and_shown_only_when_the_window_has_changed(page, qtbot):
    line = page.put(DesksLine(present="Bench", person="T. Alder, technician"))
    with qtbot.waitSignal(line.desk_chosen, timeout=500) as chosen:
        click(named(line, "History desk"))

    assert chosen.args == ["History"]
    assert line.present == "Bench"
    assert named(line, "Bench desk").isChecked()
    assert not named(line, "History desk").isChecked()
    line.set_present("History")
    assert named(line, "History desk").isChecked()
    assert page.entry.hasFocus()


def test_who_is_signed_in_can_be_pressed(page, qtbot):
    line = page.put(DesksLine(present="Bench", person="T. Alder, technician"))
    with qtbot.waitSignal(line.person_pressed, timeout=500):
        click(named(line, "Signed in: T. Alder, technician"))


@pytest.mark.parametrize("scale", [0.8, 1.0, 2.0])
def test_no_desk_lies_over_another_or_over_the_person_at_any_text_scale(qtbot, scale):
    line = DesksLine(present="Bench", person="T. Alder, technician")
    qtbot.addWidget(line)
    line.resize(1280, 36)
    line.show()
    line.set_look(Look(text_scale=scale))
    places = sorted(key.geometry().getCoords() for key in line.findChildren(QAbstractButton))

    assert len(places) == len(DESKS) + 1
    assert all(left[2] < right[0] for left, right in pairwise(places))
    assert places[-1][2] <= 1280


def test_the_prompt_is_heard_whole(qtbot):
    block = PromptBlock(Prompt(mark="225°", head="S8", lines=("mark 6 of 8, then 270°",)))
    qtbot.addWidget(block)

    assert block.accessibleName() == "Now: 225°"
    assert block.accessibleDescription() == "225°; S8; mark 6 of 8, then 270°"


def test_a_verdict_opens_its_reasons_by_click_and_by_enter(page, qtbot):
    pane = page.put(VerdictPane(LOOK_AGAIN))
    with qtbot.waitSignal(pane.opened, timeout=500):
        click(pane)
    assert page.entry.hasFocus()
    pane.setFocus()
    with qtbot.waitSignal(pane.opened, timeout=500):
        QTest.keyClick(pane, Qt.Key.Key_Return)


def test_a_verdict_is_heard_with_phrase_sentence_and_fact(qtbot):
    pane = VerdictPane(LOOK_AGAIN)
    qtbot.addWidget(pane)

    assert pane.accessibleName() == "Verdict: Look again; opens the reasons"
    assert pane.accessibleDescription() == (
        "Look again. S7 changed 0.0010 in TIR, limit 0.0010 in: ±0.0001 in cannot tell. "
        "so far 8 of 14 stations"
    )


def test_the_end_of_a_survey_has_one_key_for_what_is_next(page, qtbot):
    band = page.put(VerdictBand(LOOK_AGAIN, next_words="Read S7 again"))
    with qtbot.waitSignal(band.went_on, timeout=500):
        click(named(band, "Read S7 again"))
    with qtbot.waitSignal(band.opened, timeout=500):
        click(named(band, "Reasons"))
    assert page.entry.hasFocus()
