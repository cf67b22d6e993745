import sys

import pytest
from PySide6.QtCore import QTimer
from PySide6.QtWidgets import QApplication

from app import last_resort, settings, start
from app.window import Window
from models.record.errors import FolderMissingError, NotARecordError
from models.record.store import FILE_NAME


def test_a_folder_that_is_not_there_is_told_and_refused(tmp_path):
    told = []
    with pytest.raises(FolderMissingError):
        start.open_store(tmp_path / "missing", tell=told.append)

    assert told == [
        f"The folder {tmp_path / 'missing'} does not exist. Create it, or choose another."
    ]


def test_a_file_of_something_else_is_told_and_left_alone(tmp_path):
    (tmp_path / FILE_NAME).write_bytes(b"not a record at all" * 100)
    told = []
    with pytest.raises(NotARecordError):
        start.open_store(tmp_path, tell=told.append)

    assert len(told) == 1
    assert (tmp_path / FILE_NAME).read_bytes() == b"not a record at all" * 100


def test_the_users_own_folder_is_made_where_it_is_missing(tmp_path, monkeypatch):
    monkeypatch.setattr(start, "shop_folder", lambda: tmp_path / "own" / "shop")
    start.open_store(tmp_path / "own" / "shop", tell=pytest.fail).close()

    assert (tmp_path / "own" / "shop" / FILE_NAME).is_file()


def test_the_window_opens_on_the_shop_and_closes_with_nothing_left_open(
    qapp, shop_folder, tmp_path, monkeypatch
):
    monkeypatch.setattr(settings, "settings_file", lambda: tmp_path / "window.ini")
    monkeypatch.setattr(last_resort, "log_file", lambda: tmp_path / "errors.log")
    before, seen = sys.excepthook, []

    def close_it():
        (window,) = [one for one in QApplication.topLevelWidgets() if isinstance(one, Window)]
        seen.append((window.isVisible(), window.present_desk))
        window.close()

    QTimer.singleShot(300, close_it)
    status = start.run(shop_folder, sign_in="AT", job="26-0417")

    assert status == 0
    assert seen == [(True, "Bench")]
    assert sys.excepthook is before
    assert (tmp_path / "window.ini").is_file()
    assert not (tmp_path / "errors.log").exists()
