"""A network folder and little room are told in the window; a yes is remembered."""

import shutil

import pytest

from app import start
from app.settings import Settings
from app.start import Opened, open_store
from models.record import folders
from models.record.errors import NetworkFolderError
from models.record.store import Store
from tests.app.open_shop import COMPRESSOR, PUMP
from tests.record.test_folders import Usage


@pytest.fixture
def on_network(shop_folder, monkeypatch):
    table = f"/dev/sda2 / ext4 rw 0 0\nserver:/x {shop_folder.resolve()} cifs rw 0 0\n"
    monkeypatch.setattr(folders, "mount_table", lambda: table)
    return shop_folder


def test_whoever_says_no_does_not_open_it(on_network):
    asked, told = [], []

    def no(words):
        asked.append(words)
        return False

    with pytest.raises(NetworkFolderError):
        open_store(on_network, tell=told.append, ask_alone=no)
    assert "lies on a network (cifs)" in asked[0]
    assert told == []


def test_whoever_says_yes_is_asked_once_and_told_each_time(
    on_network, monkeypatch, tmp_path, qtbot
):
    asked = []

    def yes(words, **_):
        asked.append(words)
        return True

    monkeypatch.setattr(start, "ask_dialog", yes)
    for _ in range(2):
        settings = Settings(folder=on_network, file=tmp_path / "window.ini")
        store = open_store(
            on_network,
            tell=pytest.fail,
            ask_alone=lambda words, kept=settings: start._go_on_alone(kept, words),
        )
        opened = Opened(store, settings)
        qtbot.addWidget(opened.window)
        opened.show(sign_in="AT", job=COMPRESSOR)
        assert "network folder" in opened.window.message.what
        assert "works alone" in opened.window.message.way_out
        qtbot.waitUntil(lambda one=opened: one.background.is_idle, timeout=20000)
        assert opened.shop.view_of(PUMP) is not None
        settings.write()
        opened.window.close()
        opened.close()
    assert len(asked) == 1


def test_little_room_is_told_when_a_job_is_opened(open_window, shop_folder, monkeypatch):
    opened = open_window(shop_folder, sign_in="AT")
    assert opened.window.message is None
    monkeypatch.setattr(shutil, "disk_usage", lambda _: Usage(10**12, 0, 40_000_000))
    opened.jobs.opened.emit(COMPRESSOR)
    assert "Only 40 MB are free" in opened.window.message.what


def test_a_folder_on_a_disk_is_opened_without_a_question(shop_folder):
    store = open_store(shop_folder, tell=pytest.fail, ask_alone=pytest.fail)
    assert isinstance(store, Store)
    assert not store.is_alone
    store.close()
