import pytest
from PySide6.QtCore import Qt
from PySide6.QtWidgets import QAbstractButton, QLabel

from app.frame.look import Look
from app.pages.people import PeopleDialog
from sample_data.load import compressor


@pytest.fixture
def dialog(qtbot):
    made = PeopleDialog(
        compressor().people, asks="Who is at the window?", look=Look(), present="BQ"
    )
    qtbot.addWidget(made)
    with qtbot.waitActive(made):
        made.show()
        made.activateWindow()
    return made


def test_it_says_plainly_that_names_are_taken_on_trust(dialog):
    words = [one.text() for one in dialog.findChildren(QLabel)]

    assert any(text.startswith("Names are taken on trust:") for text in words)


def test_whoever_is_signed_in_is_in_the_frame_first(dialog):
    assert dialog.table.present_row.key == "BQ"
    assert dialog.table.hasFocus()


def test_arrow_and_enter_take_another_person(dialog, qtbot):
    qtbot.keyClick(dialog.table, Qt.Key.Key_Down)
    qtbot.keyClick(dialog.table, Qt.Key.Key_Return)

    assert dialog.chosen == "DO"
    assert not dialog.isVisible()


@pytest.mark.parametrize("how", ["escape", "key"])
def test_changing_nothing_chooses_nobody(dialog, qtbot, how):
    if how == "escape":
        qtbot.keyClick(dialog, Qt.Key.Key_Escape)
    else:
        key = next(
            one for one in dialog.findChildren(QAbstractButton) if one.text() == "Change nothing"
        )
        qtbot.mouseClick(key, Qt.MouseButton.LeftButton)

    assert dialog.chosen == ""
    assert not dialog.isVisible()


def test_once_people_have_keys_it_says_that_signing_asks(qtbot):
    made = PeopleDialog(compressor().people, asks="Who?", look=Look(), keyed=True)
    qtbot.addWidget(made)
    words = " ".join(one.text() for one in made.findChildren(QLabel))

    assert "Signing asks for that person's passphrase or PIN." in words
    assert "on trust" not in words
