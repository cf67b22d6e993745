"""The program in a real window: it opens on the demo shop, and takes a reading typed into it."""

import os
import shutil
from collections.abc import Iterator
from pathlib import Path

import pytest
from PySide6.QtCore import Qt
from PySide6.QtGui import QGuiApplication
from PySide6.QtTest import QTest
from PySide6.QtWidgets import QAbstractButton, QLineEdit, QWidget
from pytestqt.qtbot import QtBot

from app.pages.bench.page import BenchPage
from app.settings import Settings
from app.start import Opened
from app.style.tokens import load_fonts
from models.acts import Acts
from models.record.store import Store
from sample_data.load import compressor

pytestmark = [
    pytest.mark.screen,
    pytest.mark.skipif(
        os.environ.get("QT_QPA_PLATFORM") == "offscreen", reason="there is no screen here"
    ),
]


@pytest.fixture
def opened(tmp_path: Path, qtbot: QtBot) -> Iterator[Opened]:
    with Store.open(tmp_path) as store:
        Acts(store).bring_in(compressor(), by="AT", act_id="demo")
    load_fonts()
    settings = Settings(folder=tmp_path, file=tmp_path / "window.ini")
    one = Opened(Store.open(tmp_path), settings)
    one.show(sign_in="AT", job="26-0417")
    qtbot.addWidget(one.window)
    yield one
    one.window.close()
    qtbot.waitUntil(lambda: one.writer.is_idle, timeout=20_000)
    one.close()
    shutil.rmtree(tmp_path, ignore_errors=True)


def part(opened: Opened, name: str) -> QWidget:
    page = opened.window.findChild(BenchPage)
    found = page.findChild(QWidget, name) if page else None
    assert isinstance(found, QWidget), name
    return found


def shown(opened: Opened, name: str) -> bool:
    page = opened.window.findChild(BenchPage)
    found = page.findChild(QWidget, name) if page else None
    return found is not None and found.isVisible()


def test_a_reading_typed_in_a_real_window_is_in_the_record(
    opened: Opened, qtbot: QtBot, tmp_path: Path
) -> None:
    assert QGuiApplication.platformName() == "xcb"
    qtbot.waitExposed(opened.window)
    qtbot.waitUntil(lambda: shown(opened, "key begin"), timeout=20_000)
    QTest.mouseClick(part(opened, "key begin"), Qt.MouseButton.LeftButton)
    qtbot.waitUntil(lambda: shown(opened, "form"), timeout=20_000)
    form = part(opened, "form")
    for name in ("part", "gauge"):
        line = form.row(name).findChild(QLineEdit)
        QTest.mouseClick(line, Qt.MouseButton.LeftButton)
        QTest.keyClicks(line, "72")
    QTest.mouseClick(part(opened, "take"), Qt.MouseButton.LeftButton)
    qtbot.waitUntil(lambda: shown(opened, "cell"), timeout=20_000)

    hand = part(opened, "cell").focusProxy() or part(opened, "cell")
    QTest.keyClicks(hand, "5.9600")
    QTest.keyClick(hand, Qt.Key.Key_Return)
    qtbot.waitUntil(lambda: opened.writer.is_idle, timeout=20_000)

    with Store.open(tmp_path) as store:
        survey = Acts(store).read("26-0417").entries[-1]
    assert survey.title == "Sizes"
    assert survey.typed[0][0] == "5.9600"


@pytest.mark.parametrize("desk", ["Jobs", "Plan", "Bench", "Inspection", "Witness"])
def test_every_desk_draws_itself_in_a_real_window(opened: Opened, qtbot: QtBot, desk: str) -> None:
    opened.window.show_desk(desk)
    qtbot.waitUntil(lambda: opened.writer.is_idle, timeout=20_000)
    qtbot.waitExposed(opened.window)
    qtbot.wait(300)

    picture = opened.window.grab().toImage()

    colours = {
        picture.pixelColor(x, y).name()
        for x in range(0, picture.width(), 7)
        for y in range(0, picture.height(), 7)
    }
    assert len(colours) > 10
    unnamed = [
        key
        for key in opened.window.findChildren(QAbstractButton)
        if key.isVisible() and not (key.accessibleName() or key.text())
    ]
    assert unnamed == []
