"""A value typed while the record cannot be written stays on the screen, and is written once."""

import sqlite3
from contextlib import contextmanager

import pytest
from PySide6.QtCore import Qt
from PySide6.QtTest import QTest
from PySide6.QtWidgets import QApplication, QWidget

from app.pages.bench.page import BenchPage
from models.record.store import FILE_NAME
from models.record.verify import verify
from sample_data.next_steps import next_attempts
from tests.app.open_shop import COMPRESSOR
from tests.journeys.killed_bench import Technician


@contextmanager
def held_by_another(opened, folder):
    other = sqlite3.connect(folder / FILE_NAME, isolation_level=None)
    other.execute("BEGIN IMMEDIATE")
    yield "in use by another window or program"
    other.close()


@contextmanager
def full_disk(opened, folder):
    with opened._store.writing() as session:
        pages = session.connection().exec_driver_sql("PRAGMA page_count").scalar_one()
        session.connection().exec_driver_sql(f"PRAGMA max_page_count = {pages}")
    yield "is full"
    with opened._store.writing() as session:
        session.connection().exec_driver_sql("PRAGMA max_page_count = 1000000")


@contextmanager
def folder_taken_away(opened, folder):
    folder.rename(folder.with_name("away"))
    yield "was moved or removed"
    folder.with_name("away").rename(folder)


def readings_in(opened):
    with opened._store.reading() as session:
        assert verify(session).is_whole
        count = session.connection().exec_driver_sql(
            "SELECT (SELECT count(*) FROM size_reading) + (SELECT count(*) FROM runout_reading)"
        )
        return count.scalar_one()


def shows_it(page, typed, said):
    """Demand the value in the cell, and a sentence that can be read whole."""
    cell = page.findChild(QWidget, "cell")
    assert cell.text == typed
    assert f"{typed} at" in cell.notice
    assert said in cell.notice
    message = page.message.message
    assert cell.has_room_for_notice or said in message.where


@pytest.mark.parametrize("trouble", [held_by_another, full_disk, folder_taken_away])
def test_the_cell_keeps_its_text_says_why_and_trying_again_writes_it_once(
    shop_folder, open_window, monkeypatch, trouble
):
    monkeypatch.setattr("models.record.store.BUSY_SECONDS", 0.2)
    opened = open_window(shop_folder, sign_in="AT", job=COMPRESSOR)
    opened.window.show_desk("Bench")
    hand = Technician(opened, next_attempts())
    hand.quiet()
    while hand.seen("cell") is None:
        hand.move()
        hand.quiet()
    page = opened.window.findChild(BenchPage)
    cell = page.findChild(QWidget, "cell")
    before = readings_in(opened)
    typed = hand.reading_asked_for()

    with trouble(opened, shop_folder) as said:
        hand.type_reading(cell)
        hand.wait(lambda: opened.writer.is_halted or opened.writer.is_idle)
        while not opened.writer.is_halted:
            # The pages that the record has already may take some more.
            typed, before = hand.reading_asked_for(), readings_in(opened)
            hand.type_reading(cell)
            hand.wait(lambda: opened.writer.is_halted or opened.writer.is_idle)
        shows_it(page, typed, said)
        QTest.keyClick(QApplication.focusWidget(), Qt.Key.Key_F5)
        hand.wait(lambda: opened.writer.is_halted)
        shows_it(page, typed, said)
    assert readings_in(opened) == before

    QTest.keyClick(QApplication.focusWidget(), Qt.Key.Key_F5)
    hand.wait(lambda: opened.writer.is_idle)

    assert readings_in(opened) == before + 1
    assert cell.text == ""
    assert page.message.message is None
