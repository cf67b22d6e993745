import pytest
from PySide6.QtCore import Qt
from PySide6.QtTest import QTest
from PySide6.QtWidgets import QAbstractButton, QApplication

from app.entry.cell_unit import unit_for
from app.entry.fields import ChoiceField, NumberField, TextField, check_field
from app.entry.fields_form import FieldsForm
from models.units import inch_set

FIELDS = (
    NumberField(
        name="bore", label="Temperature at the bore", unit=unit_for(inch_set, "temperature")
    ),
    check_field(name="marks", label="Match marks agree"),
    ChoiceField(name="method", label="Heated by", answers=("oven", "induction", "gas ring")),
    TextField(name="remark", label="Remark", optional=True),
)


@pytest.fixture
def form(qtbot):
    form = FieldsForm(FIELDS)
    form.told = []
    form.answered.connect(lambda name, text: form.told.append((name, text)))
    qtbot.addWidget(form)
    form.resize(640, 400)
    with qtbot.waitActive(form):
        form.show()
        form.activateWindow()
    form.go_to("bore")
    return form


def type_(text):
    QTest.keyClicks(QApplication.focusWidget(), text)


def press(*keys):
    for key in keys:
        QTest.keyClick(QApplication.focusWidget(), key)


def test_the_whole_form_is_filled_by_keyboard_alone(form, qtbot):
    type_("610")
    press(Qt.Key.Key_Return)
    press(Qt.Key.Key_Right, Qt.Key.Key_Space, Qt.Key.Key_Return)
    type_("i")
    press(Qt.Key.Key_Return)
    with qtbot.waitSignal(form.finished, timeout=500):
        press(Qt.Key.Key_Return)

    assert form.told == [("bore", "610"), ("marks", "no"), ("method", "induction")]
    assert form.answers == {"bore": "610", "marks": "no", "method": "induction"}


def test_enter_alone_never_answers_a_check(form):
    form.go_to("marks")
    press(Qt.Key.Key_Return, Qt.Key.Key_Return)

    assert form.told == []
    assert form.row("marks").answer == ""
    assert form.row("marks").message == "Choose with the arrow keys and Space, then Enter"


def test_a_digit_that_an_indicator_sends_answers_no_check(form):
    form.go_to("marks")
    type_("1")

    assert form.told == []


def test_an_unreadable_number_stays_and_says_what_is_expected(form):
    type_("hot")
    press(Qt.Key.Key_Return)

    assert form.told == []
    assert form.row("bore").answer == "hot"
    assert "a temperature is a number" in form.row("bore").message
    press(Qt.Key.Key_Backspace)
    assert form.row("bore").message == ""


def test_a_number_that_has_to_be_there_is_not_passed_over(form):
    press(Qt.Key.Key_Return)

    assert form.row("bore").message == "Nothing typed for Temperature at the bore"
    assert QApplication.focusWidget().accessibleName() == "Temperature at the bore in °F"


def test_the_other_unit_stands_beside_the_number(form):
    type_("212")

    # Water boils at 212 °F, which is 100 °C.
    assert form.row("bore").other_text() == "100 °C"


def test_a_check_is_answered_by_touch_and_answered_anew(form):
    for answer in ("yes", "does not apply"):
        key = next(
            key
            for key in form.findChildren(QAbstractButton)
            if key.accessibleName() == f"Match marks agree: {answer}"
        )
        assert key.height() >= 44
        QTest.mouseClick(key, Qt.MouseButton.LeftButton)

    assert form.told == [("marks", "yes"), ("marks", "does not apply")]


def test_an_answer_already_recorded_is_told_again_only_when_it_changes(form):
    form.set_answer("bore", "610")
    form.go_to("bore")
    press(Qt.Key.Key_Return)
    assert form.told == []

    form.go_to("bore")
    type_("5")
    press(Qt.Key.Key_Return)
    assert form.told == [("bore", "6105")]


def test_other_fields_replace_the_old_ones(form):
    form.set_fields([FIELDS[3]])

    assert form.answers == {}
    with pytest.raises(KeyError):
        form.row("bore")
