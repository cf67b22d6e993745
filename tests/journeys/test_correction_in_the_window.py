"""A slip at the bench, seen at once and put right: both values stay in window and record."""

from collections.abc import Iterator
from pathlib import Path

import pytest
from PySide6.QtCore import Qt
from PySide6.QtTest import QTest
from PySide6.QtWidgets import QApplication, QWidget
from pytestqt.qtbot import QtBot

from app.settings import Settings
from app.start import Opened
from app.style.tokens import load_fonts
from models.acts import Acts
from models.record.store import Store
from sample_data.next_steps import next_attempts
from tests.journeys.killed_bench import JOB, Technician, make_shop


@pytest.fixture
def technician(tmp_path: Path, qtbot: QtBot) -> Iterator[Technician]:
    make_shop(tmp_path)
    load_fonts()
    opened = Opened(Store.open(tmp_path), Settings(folder=tmp_path, file=tmp_path / "w.ini"))
    opened.show(sign_in="AT", job=JOB)
    qtbot.addWidget(opened.window)
    qtbot.waitActive(opened.window)
    one = Technician(opened, next_attempts())
    while one.seen("cell") is None:
        one.move()
        one.quiet()
    yield one
    one.quiet()
    opened.window.close()
    opened.close()


def type_and_enter(technician: Technician, text: str) -> None:
    hand = technician.wait(QApplication.focusWidget)
    QTest.keyClicks(hand, text)
    QTest.keyClick(hand, Qt.Key.Key_Return)
    technician.quiet()


def rungs(technician: Technician) -> list[tuple[str, tuple[str, ...]]]:
    ladder = technician.page.findChild(QWidget, "ladder")
    return [(one.value, tuple(one.struck)) for one in ladder.rungs]


def test_the_last_value_is_struck_by_typing_another(technician: Technician, tmp_path: Path) -> None:
    type_and_enter(technician, "5.9600")
    type_and_enter(technician, "5.9500")

    QTest.keyClick(technician.wait(QApplication.focusWidget), Qt.Key.Key_Backspace)
    technician.quiet()
    type_and_enter(technician, "5.9599")

    assert rungs(technician)[:2] == [("5.9600", ()), ("5.9599", ("5.9500",))]
    with Store.open(tmp_path) as store:
        survey = Acts(store).read(JOB).entries[-1]
    assert survey.typed[0][:2] == ("5.9600", "5.9599")
    assert [(one.was, one.now) for one in survey.corrections] == [("5.9500", "5.9599")]


def test_a_figure_in_the_wrong_unit_is_questioned_while_the_survey_goes_on(
    technician: Technician, tmp_path: Path
) -> None:
    type_and_enter(technician, "151.38")
    type_and_enter(technician, "5.9600")
    assert technician.seen("question") is not None

    QTest.keyClick(technician.wait(QApplication.focusWidget), Qt.Key.Key_F2)
    technician.quiet()

    with Store.open(tmp_path) as store:
        survey = Acts(store).read(JOB).entries[-1]
    # 151.38 mm is 5.9598 in; both stay.
    assert survey.typed[0][:2] == ("5.9598", "5.9600")
    assert survey.corrections[0].was == "151.38"


def test_letters_stay_in_the_cell_and_nothing_is_recorded(
    technician: Technician, tmp_path: Path
) -> None:
    type_and_enter(technician, "l.96")

    assert technician.seen("cell").text == "l.96"
    with Store.open(tmp_path) as store:
        survey = Acts(store).read(JOB).entries[-1]
    assert all(value is None for row in survey.typed for value in row)
