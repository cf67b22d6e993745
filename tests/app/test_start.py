import pytest

from app import start
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
