"""A value typed while the record cannot be written stays on the screen, and is written once."""

import sqlite3
from contextlib import contextmanager

import pytest
from PySide6.QtCore import Qt
from PySide6.QtTest import QTest
from PySide6.QtWidgets import QApplication, QWidget
from sqlalchemy import event

from app.pages.bench.page import BenchPage
from models.record.store import FILE_NAME, Store
from models.record.verify import verify
from sample_data.next_steps import next_attempts
from tests.app.open_shop import COMPRESSOR
from tests.journeys.killed_bench import Technician


@contextmanager
def held_by_another(opened, folder):
    other = sqlite3.connect(folder / FILE_NAME, isolation_level=None)
    other.execute("BEGIN IMMEDIATE")
    yield "in use by another window or program"
    other.execute("ROLLBACK")
    other.close()


@contextmanager
def full_disk(opened, folder):
    with opened._store.reading() as session:
        pages = session.connection().exec_driver_sql("PRAGMA page_count").scalar_one()
    room = [pages]

    def limit(raw, *_):
        raw.execute(f"PRAGMA max_page_count = {room[0]}")

    # Each connection that is about to write has no more room than this.
    event.listen(opened._store._writer, "checkout", limit)
    yield "is full"
    room[0] = 1_000_000


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
    monkeypatch.setitem(Store.open.__func__.__kwdefaults__, "busy_seconds", 0.2)
    opened = open_window(shop_folder, sign_in="AT", job=COMPRESSOR)
    opened.window.show_desk("Bench")
    hand = Technician(opened, next_attempts())
    hand.quiet()
    while hand.seen("cell") is None:
        hand.move()
        hand.quiet()
    page = opened.window.findChild(BenchPage)
    cell = page.findChild(QWidget, "cell")
    before, typed = 0, ""

    def until_it_halts():
        nonlocal before, typed
        while not opened.writer.is_halted:
            before, typed = readings_in(opened), hand.reading_asked_for()
            hand.type_reading(cell)
            hand.wait(lambda: opened.writer.is_halted or opened.writer.is_idle)

    with trouble(opened, shop_folder) as said:
        # The pages that the record has already may take some more, before and after a new try.
        for _ in range(2):
            until_it_halts()
            shows_it(page, typed, said)
            QTest.keyClick(QApplication.focusWidget(), Qt.Key.Key_F5)
            hand.wait(lambda: opened.writer.is_halted or opened.writer.is_idle)
        until_it_halts()
    assert readings_in(opened) == before

    QTest.keyClick(QApplication.focusWidget(), Qt.Key.Key_F5)
    hand.wait(lambda: opened.writer.is_idle)

    assert readings_in(opened) == before + 1
    assert cell.text == ""
    assert page.message.message is None
