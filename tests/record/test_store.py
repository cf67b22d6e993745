"""Trouble with the file is a sentence with a way out, and nothing half-written is shown."""

import os
import shutil
import sqlite3
import subprocess
import sys
import tempfile
from collections.abc import Iterator
from pathlib import Path

import pytest

from models.record import queries
from models.record.errors import (
    DiskFullError,
    EmptyFileError,
    FolderMissingError,
    LockedRecordError,
    NewerRecordError,
    NotARecordError,
    RecordMissingError,
    SchemaDiffersError,
    TornRecordError,
)
from models.record.migrations import FORM
from models.record.store import FILE_NAME, Store
from models.record.verify import verify
from tests.record.a_job import NUMBER, a_job
from tests.record.whole_record import fill, one_act


@pytest.fixture
def closed(tmp_path: Path) -> Path:
    with Store.open(tmp_path) as store:
        fill(store)
    return tmp_path / FILE_NAME


def test_a_new_record_is_its_owners_alone_and_leaves_nothing_beside_it(tmp_path: Path) -> None:
    Store.open(tmp_path).close()
    assert [path.name for path in tmp_path.iterdir()] == [FILE_NAME]
    assert (tmp_path / FILE_NAME).stat().st_mode & 0o777 == 0o600


def test_opening_an_up_to_date_record_loads_no_migration_library(closed: Path) -> None:
    code = (
        "import sys; from pathlib import Path; from models.record.store import Store;"
        f"Store.open(Path({str(closed.parent)!r})).close(); print('alembic' in sys.modules)"
    )
    done = subprocess.run([sys.executable, "-c", code], capture_output=True, text=True, check=True)
    assert done.stdout == "False\n"


def test_settings_are_those_the_record_relies_on(store: Store) -> None:
    with store.writing() as session:
        found = {
            name: session.connection().exec_driver_sql(f"PRAGMA {name}").scalar_one()
            for name in ("journal_mode", "synchronous", "foreign_keys", "recursive_triggers")
        }
        trusted = session.connection().exec_driver_sql("PRAGMA trusted_schema").scalar_one()
    # SQLite's own numbers: synchronous 3 is EXTRA.
    assert found == {
        "journal_mode": "delete",
        "synchronous": 3,
        "foreign_keys": 1,
        "recursive_triggers": 1,
    }
    assert trusted == 0


def test_a_missing_folder_and_a_missing_record(tmp_path: Path) -> None:
    with pytest.raises(FolderMissingError, match="does not exist"):
        Store.open(tmp_path / "nowhere")
    with pytest.raises(RecordMissingError, match="no record"):
        Store.open(tmp_path, create=False)
    assert list(tmp_path.iterdir()) == []


def test_an_empty_file(tmp_path: Path) -> None:
    (tmp_path / FILE_NAME).touch()
    with pytest.raises(EmptyFileError, match="last backup"):
        Store.open(tmp_path)


def test_a_text_file_and_another_programs_database(tmp_path: Path) -> None:
    path = tmp_path / FILE_NAME
    path.write_text("a shopping list\n" * 100)
    with pytest.raises(NotARecordError, match="no record of this program"):
        Store.open(tmp_path)
    path.unlink()
    other = sqlite3.connect(path)
    other.execute("CREATE TABLE act (one TEXT)")
    other.close()
    with pytest.raises(NotARecordError):
        Store.open(tmp_path)


def test_a_newer_file_names_both_numbers(closed: Path) -> None:
    raw = sqlite3.connect(closed)
    raw.execute("PRAGMA user_version = 7")
    raw.close()
    with pytest.raises(
        NewerRecordError, match=f"has form 7; this program knows forms up to {FORM}"
    ):
        Store.open(closed.parent)


def test_an_older_form_is_brought_up_to_date_and_kept_as_it_was(closed: Path) -> None:
    raw = sqlite3.connect(closed)
    raw.execute("DROP TRIGGER note_never_changes")
    raw.execute("PRAGMA user_version = 0")
    raw.close()
    with Store.open(closed.parent) as store, store.reading() as session:
        assert verify(session).is_whole
        assert session.connection().exec_driver_sql("PRAGMA user_version").scalar_one() == FORM
    (copy,) = closed.parent.glob("shop of form 0*")
    assert copy.stat().st_mode & 0o777 == 0o600
    kept = sqlite3.connect(copy)
    assert kept.execute("PRAGMA user_version").fetchone() == (0,)
    assert kept.execute("SELECT count(*) FROM note").fetchone() == (1,)
    kept.close()


def test_an_older_form_that_was_tampered_with_is_not_brought_up_to_date(closed: Path) -> None:
    raw = sqlite3.connect(closed)
    raw.execute("DROP TRIGGER note_never_changes")
    raw.execute("UPDATE note SET words = 'other'")
    raw.execute("PRAGMA user_version = 0")
    raw.commit()
    raw.close()
    with pytest.raises(SchemaDiffersError, match="table note, row note: is changed"):
        Store.open(closed.parent)
    raw = sqlite3.connect(closed)
    assert raw.execute("PRAGMA user_version").fetchone() == (0,)
    raw.close()


@pytest.mark.parametrize("kept", [0.5, 0.999])
def test_a_torn_file(closed: Path, kept: float) -> None:
    os.truncate(closed, int(closed.stat().st_size * kept))
    with pytest.raises(TornRecordError, match="last verified backup"):
        Store.open(closed.parent)


def test_a_zeroed_page(closed: Path) -> None:
    with closed.open("r+b") as file:
        file.seek(4096 * 20)
        file.write(bytes(4096))
    with pytest.raises(TornRecordError):
        Store.open(closed.parent)


def test_a_missing_trigger_and_a_foreign_table_are_named(closed: Path) -> None:
    raw = sqlite3.connect(closed)
    raw.execute("DROP TRIGGER act_never_changes")
    raw.execute("CREATE VIEW stray AS SELECT 1")
    raw.close()
    with pytest.raises(SchemaDiffersError, match="trigger act_never_changes is missing") as caught:
        Store.open(closed.parent)
    assert "view stray was added" in caught.value.differences


def test_a_file_held_by_another_window(closed: Path) -> None:
    with Store.open(closed.parent, busy_seconds=0.2) as store:
        raw = sqlite3.connect(closed, isolation_level=None)
        raw.execute("BEGIN IMMEDIATE")
        with pytest.raises(LockedRecordError, match="Nothing was recorded"), store.writing():
            pass
        with store.reading() as session:
            assert queries.read_job(session, NUMBER).number == NUMBER
        raw.execute("ROLLBACK")
        raw.execute("BEGIN EXCLUSIVE")
        with pytest.raises(LockedRecordError):
            Store.open(closed.parent, busy_seconds=0.2)
        raw.close()


def _open_jobs(store: Store, numbers: Iterator[int]) -> None:
    for number in numbers:
        with one_act(store, f"job {number}", chain=f"J{number}") as act:
            act.add_job(a_job(f"J{number}"))


def test_a_full_disk_loses_only_the_act_that_did_not_fit(store: Store) -> None:
    fill(store)
    with store.writing() as session:
        pages = session.connection().exec_driver_sql("PRAGMA page_count").scalar_one()
        session.connection().exec_driver_sql(f"PRAGMA max_page_count = {pages + 4}")
    fitted = iter(range(50))
    with pytest.raises(DiskFullError, match="make room"):
        _open_jobs(store, fitted)
    # The one that failed was taken from the numbers too.
    opened = next(fitted) - 1
    with store.reading() as session:
        assert len(queries.job_rows(session)) == 1 + opened
        assert verify(session).is_whole


AS_NOBODY = """
import os, sys
from pathlib import Path
from models.record import queries
from models.record.errors import ReadOnlyError
from models.record.store import Store
import tests.record.whole_record as whole
folder, empty = Path(sys.argv[1]), Path(sys.argv[2])
Store.open(folder).close()
os.setuid(65534)
with Store.open(folder) as store:
    with store.reading() as session:
        print(len(queries.job_rows(session)))
    def write():
        with whole.one_act(store, "x", chain="J") as act:
            act.add_job(whole.a_job("J"))
    for what in (write, lambda: Store.open(empty)):
        try:
            what()
        except ReadOnlyError as error:
            print("may only be read" in str(error))
"""


@pytest.mark.skipif(
    not hasattr(os, "getuid") or os.getuid() != 0, reason="only root can become somebody else"
)
def test_a_read_only_folder_is_read_and_refuses_to_be_written(closed: Path) -> None:
    with tempfile.TemporaryDirectory() as name:
        folder, empty = Path(name) / "full", Path(name) / "empty"
        for each in (Path(name), folder, empty):
            each.mkdir(exist_ok=True)
            each.chmod(0o755)
        shutil.copy(closed, folder / FILE_NAME)
        (folder / FILE_NAME).chmod(0o644)
        done = subprocess.run(
            [sys.executable, "-c", AS_NOBODY, str(folder), str(empty)],
            capture_output=True,
            text=True,
            check=False,
        )
    assert (done.stdout, done.stderr) == ("1\nTrue\nTrue\n", "")
