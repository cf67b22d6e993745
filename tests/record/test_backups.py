"""Backups: verified copies, kept by generations, compared with the record, put back."""

import os
import shutil
import sqlite3
from collections.abc import Callable, Iterator
from datetime import UTC, datetime, timedelta
from pathlib import Path

import pytest

from models.acts.backups import back_up, restore
from models.job import RunoutReading
from models.record import queries
from models.record.backup_check import compared_with_backups
from models.record.backups import (
    FOLDER_NAME,
    BackupError,
    backups_in,
    contents_of,
    copy_backup,
    generations_to_keep,
    made_at,
)
from models.record.errors import (
    LockedRecordError,
    NewerRecordError,
    NotARecordError,
    OtherShopError,
    RecordError,
    TornRecordError,
)
from models.record.restoring import look_into
from models.record.store import FILE_NAME, Store
from models.record.verify import verify
from tests.record.a_job import NUMBER, a_job
from tests.record.survival.killed import state_of
from tests.record.test_kept_shapes import SHAPES
from tests.record.whole_record import fill, one_act


class Clock:
    """A clock that a test sets."""

    def __init__(self) -> None:
        self.now = datetime.now(UTC).replace(microsecond=0)

    def __call__(self) -> datetime:
        return self.now


@pytest.fixture
def clock() -> Clock:
    return Clock()


@pytest.fixture
def store(tmp_path: Path, clock: Clock) -> Iterator[Store]:
    folder = tmp_path / "shop"
    folder.mkdir()
    with Store.open(folder, clock=clock) as opened:
        fill(opened)
        yield opened


def one_reading(store: Store, name: str) -> None:
    with one_act(store, name) as act:
        act.add_reading("open", RunoutReading(station=name, mark=1, typed="5"))


def troubles_of(store: Store) -> list[str]:
    with store.reading() as session:
        return [trouble.words for trouble in verify(session).troubles]


def test_a_backup_is_the_record_whole_under_a_dated_name(store: Store, clock: Clock) -> None:
    before = state_of(store.path.parent)
    backup = back_up(store, act_id="b")

    assert backup.path.parent == store.path.parent / FOLDER_NAME
    assert backup.path.name == f"shop {clock.now:%Y-%m-%d %H%M%S}Z.thirdjournal"
    assert made_at(backup.path) == clock.now
    assert backup.path.stat().st_mode & 0o777 == 0o600
    copy = store.path.parent / "copy"
    copy.mkdir()
    shutil.copy(backup.path, copy / FILE_NAME)
    assert state_of(copy) == before
    with Store.open(copy) as opened:
        assert troubles_of(opened) == []


def test_the_heads_it_holds_are_kept_in_the_shops_chain_once(store: Store) -> None:
    with store.reading() as session:
        heads = verify(session).heads
    backup = back_up(store, act_id="b")
    one_reading(store, "later")
    back_up(store, act_id="c")

    with store.reading() as session:
        rows = session.connection().exec_driver_sql(
            "SELECT backup_name, head_sequence, head_digest FROM chain_head_seen"
            " JOIN job ON job.chain_id = of_chain ORDER BY chain_head_seen.sequence"
        )
        kept = [tuple(row) for row in rows]
    first, second = (row for row in kept if row[0] != "shop 2031-03-04 110000Z.thirdjournal")
    assert first == (backup.path.name, heads[NUMBER].sequence, heads[NUMBER].digest)
    assert second[1] == heads[NUMBER].sequence + 1
    assert troubles_of(store) == []


def test_what_lies_in_the_folder_besides_is_left_alone(store: Store, clock: Clock) -> None:
    back_up(store, act_id="b")
    folder = store.path.parent / FOLDER_NAME
    (folder / "somebody's notes.txt").write_text("mine")
    for number in range(15):
        clock.now += timedelta(minutes=1)
        back_up(store, act_id=f"more {number}")

    assert (folder / "somebody's notes.txt").read_text() == "mine"
    # Ten, and the last of the day and the month is among them.
    assert len(backups_in(folder)) == 10
    assert not list(folder.glob(".*"))


def test_generations() -> None:
    start = datetime(2040, 1, 1, 8, tzinfo=UTC)
    # Three a day for a hundred days.
    times = [start + timedelta(hours=8 * number) for number in range(300)]
    kept = sorted(generations_to_keep(times), reverse=True)

    assert kept[:10] == times[:-11:-1]
    last = times[-1]
    days = {time.date() for time in times if last - time < timedelta(days=31)}
    assert {time.date() for time in kept if last - time < timedelta(days=31)} == days
    assert {(time.year, time.month) for time in kept} == {
        (2040, 1),
        (2040, 2),
        (2040, 3),
        (2040, 4),
    }
    # January's is the last of its last day: 8:00, 16:00 and 0:00 are the hours.
    assert min(kept) == datetime(2040, 1, 31, 16, tzinfo=UTC)
    assert len(kept) < 50
    assert generations_to_keep(kept) == set(kept)


@pytest.mark.parametrize("steps", [1, 7, 40])
def test_generations_thinned_day_by_day_are_those_thinned_at_once_or_more(steps: int) -> None:
    start = datetime(2040, 1, 1, 8, tzinfo=UTC)
    kept: set[datetime] = set()
    for number in range(400):
        kept.add(start + timedelta(hours=13 * number))
        if number % steps == 0:
            kept = generations_to_keep(kept)
    months = {(time.year, time.month) for time in kept}
    assert len(months) == 8


def missing(folder: Path) -> None:
    """Leave the parent of the folder out."""


def a_file(folder: Path) -> None:
    folder.parent.mkdir()
    folder.write_text("in the way")


@pytest.mark.parametrize("prepare", [missing, a_file])
def test_a_folder_that_takes_no_backup_says_so_and_the_record_goes_on(
    store: Store, tmp_path: Path, prepare: Callable[[Path], None]
) -> None:
    folder = tmp_path / "stick" / "backups"
    prepare(folder)
    before = state_of(store.path.parent)
    with pytest.raises(BackupError, match=r"No backup was written into .*stick.*back up again"):
        back_up(store, act_id="b", folder=folder)
    assert state_of(store.path.parent) == before
    one_reading(store, "goes on")


def test_a_copy_that_ends_elsewhere_is_thrown_away(
    store: Store, monkeypatch: pytest.MonkeyPatch
) -> None:
    def short_copy(source: sqlite3.Connection, target: sqlite3.Connection) -> None:
        source.backup(target)
        target.execute("DROP TRIGGER act_never_vanishes")
        target.execute("DELETE FROM act WHERE act_id = 'asked'")
        target.commit()

    monkeypatch.setattr("models.record.backups.copy_whole", short_copy)
    with pytest.raises(BackupError, match="does not end where the record does"):
        back_up(store, act_id="b")
    assert list((store.path.parent / FOLDER_NAME).iterdir()) == []


def test_others_write_while_a_backup_is_made(store: Store) -> None:
    for number in range(5):
        one_reading(store, f"before {number}")
        backup = back_up(store, act_id=f"b {number}")
        assert contents_of(backup.path, whole=True).heads == backup.heads
    assert troubles_of(store) == []


def test_a_record_that_was_rolled_back_is_found(store: Store, tmp_path: Path) -> None:
    old = tmp_path / "old copy"
    back_up(store, act_id="first", folder=old)
    one_reading(store, "later")
    backup = back_up(store, act_id="second")
    folders = (store.path.parent / FOLDER_NAME,)
    with store.reading() as session:
        assert compared_with_backups(session, folders).troubles == ()
        assert compared_with_backups(session, folders).backups == 1
    store.close()

    # Somebody puts an older copy in the record's place, behind the program's back.
    (older,) = backups_in(old)
    shutil.copy(older, store.path)
    with Store.open(store.path.parent) as rolled, rolled.reading() as session:
        assert verify(session).is_whole
        told = [one.words for one in compared_with_backups(session, folders).troubles]
    assert f"job {NUMBER}" in " ".join(told)
    assert all(f"was cut off: backup {backup.path.name} ends there" in one for one in told)


def test_a_job_written_anew_is_found_by_the_heads_in_the_shops_chain(store: Store) -> None:
    back_up(store, act_id="b")
    raw = sqlite3.connect(store.path)
    raw.execute("DROP TRIGGER chain_head_seen_never_changes")
    raw.execute(
        "UPDATE chain_head_seen SET head_digest = replace(head_digest, 'a', 'b')"
        " WHERE of_chain = (SELECT chain_id FROM job)"
    )
    raw.commit()
    raw.close()
    assert any("the chain was written anew" in one for one in troubles_of(store))


def test_a_look_says_what_would_be_left_behind_and_changes_nothing(store: Store) -> None:
    backup = back_up(store, act_id="b").path
    one_reading(store, "later")
    one_reading(store, "and later")
    with one_act(store, "another job", chain="J-2") as act:
        act.add_job(a_job("J-2"))
    before = state_of(store.path.parent)

    look = look_into(backup, store.path.parent)

    assert look.backup.jobs == (NUMBER,)
    lost = {one.job: one for one in look.lost}
    assert set(lost) == {"", NUMBER, "J-2"}
    assert (lost[NUMBER].acts, lost[NUMBER].is_whole_job, lost[NUMBER].parted) == (2, False, False)
    assert (lost["J-2"].acts, lost["J-2"].is_whole_job) == (1, True)
    assert state_of(store.path.parent) == before


def test_restoring_sets_today_aside_and_says_so_in_the_record(store: Store) -> None:
    folder = store.path.parent
    backup = back_up(store, act_id="b").path
    one_reading(store, "later")
    before = state_of(folder)

    done = restore(backup, folder, act_id="r")
    again = restore(backup, folder, act_id="r")

    assert done.set_aside is not None
    assert again.set_aside is None
    # The window that had it open sees the record as it is now, and works on.
    assert troubles_of(store) == []
    with store.reading() as session:
        (row,) = session.connection().exec_driver_sql(
            "SELECT backup_name, set_aside_name, acts_left_behind FROM restoration"
            " WHERE backup_name NOT LIKE '%2031%'"
        )
        stations = {one.station for one in queries.read_job(session, NUMBER).entries[-1].stations}
    assert row == (backup.name, done.set_aside.name, 2)
    assert "later" not in stations
    one_reading(store, "goes on")
    aside = folder / "aside"
    aside.mkdir()
    shutil.copy(done.set_aside, aside / FILE_NAME)
    assert state_of(aside) == before


def test_what_a_restoring_left_behind_is_told_and_is_no_trouble(store: Store, clock: Clock) -> None:
    folder = store.path.parent
    first = back_up(store, act_id="b").path
    one_reading(store, "later")
    clock.now += timedelta(hours=1)
    second = back_up(store, act_id="c").path
    restore(first, folder, act_id="r")
    with store.reading() as session:
        found = compared_with_backups(session, (folder / FOLDER_NAME,))
    assert found.troubles == ()
    (said,) = found.notices
    assert second.name in said
    assert f"put back to {first.name}" in said


@pytest.mark.parametrize("damage", ["cut", "foreign", "empty", "gone"])
def test_a_record_that_cannot_be_read_is_renamed_and_the_backup_takes_its_place(
    store: Store, damage: str
) -> None:
    folder = store.path.parent
    backup = back_up(store, act_id="b").path
    store.close()
    if damage == "cut":
        os.truncate(store.path, 700)
    elif damage == "foreign":
        store.path.write_text("a shopping list\n" * 100)
    elif damage == "empty":
        store.path.write_bytes(b"")
    else:
        store.path.unlink()
    there = store.path.read_bytes() if store.path.exists() else None

    done = restore(backup, folder, act_id="r")

    if there is None:
        assert done.set_aside is None
    else:
        assert done.set_aside is not None
        assert done.set_aside.read_bytes() == there
    with Store.open(folder) as opened:
        assert troubles_of(opened) == []


def test_a_backup_of_an_older_form_is_put_back_in_todays(tmp_path: Path) -> None:
    import gzip

    folder = tmp_path / "new place"
    folder.mkdir()
    old = tmp_path / "shop 2031-01-01 000000Z.thirdjournal"
    old.write_bytes(gzip.decompress((SHAPES / "form_1.thirdjournal.gz").read_bytes()))
    restore(old, folder, act_id="r")
    with Store.open(folder) as store:
        assert troubles_of(store) == []
    assert contents_of(old).form == 1


def torn(path: Path) -> type[RecordError]:
    with path.open("r+b") as file:
        file.seek(4096 * 20)
        file.write(bytes(4096))
    return TornRecordError


def foreign(path: Path) -> type[RecordError]:
    path.write_text("a shopping list\n" * 100)
    return NotARecordError


def newer(path: Path) -> type[RecordError]:
    raw = sqlite3.connect(path)
    raw.execute("PRAGMA user_version = 99")
    raw.close()
    return NewerRecordError


def changed(path: Path) -> type[RecordError]:
    raw = sqlite3.connect(path)
    raw.execute("DROP TRIGGER note_never_changes")
    raw.execute("UPDATE note SET words = 'other'")
    raw.commit()
    raw.close()
    return RecordError


@pytest.mark.parametrize("spoil", [torn, foreign, newer, changed])
def test_a_backup_that_is_spoilt_is_not_put_back(
    store: Store, spoil: Callable[[Path], type[RecordError]]
) -> None:
    backup = back_up(store, act_id="b").path
    before = state_of(store.path.parent)
    error = spoil(backup)
    with pytest.raises(error):
        restore(backup, store.path.parent, act_id="r")
    assert state_of(store.path.parent) == before
    assert not list(store.path.parent.glob("*set aside*"))
    assert not list(store.path.parent.glob(".*"))


def test_restoring_waits_for_no_writer_for_ever(
    store: Store, monkeypatch: pytest.MonkeyPatch
) -> None:
    monkeypatch.setattr("models.record.backups._PATIENCE", 3)
    backup = back_up(store, act_id="b").path
    raw = sqlite3.connect(store.path, isolation_level=None)
    raw.execute("BEGIN IMMEDIATE")
    before = state_of(store.path.parent)
    with pytest.raises(LockedRecordError, match="in use"):
        restore(backup, store.path.parent, act_id="r")
    raw.execute("ROLLBACK")
    raw.close()
    assert state_of(store.path.parent) == before


def test_another_shops_backup_never_takes_the_place_of_this_record(
    store: Store, tmp_path: Path
) -> None:
    (tmp_path / "other").mkdir()
    with Store.open(tmp_path / "other") as other:
        back_up(other, act_id="b")
        backup = back_up(other, act_id="c").path
    before = state_of(store.path.parent)
    with pytest.raises(OtherShopError, match="another shop"):
        restore(backup, store.path.parent, act_id="r")
    assert state_of(store.path.parent) == before


def test_two_shops_on_one_stick_keep_their_own_generations(
    store: Store, tmp_path: Path, clock: Clock
) -> None:
    stick = tmp_path / "stick"
    stick.mkdir()
    (tmp_path / "other").mkdir()
    with Store.open(tmp_path / "other", clock=clock) as other:
        back_up(other, act_id="a")
        clock.now += timedelta(seconds=1)
        theirs = copy_backup(back_up(other, act_id="b").path, stick)
    for number in range(12):
        clock.now += timedelta(minutes=1)
        copy_backup(back_up(store, act_id=f"mine {number}").path, stick)
    assert theirs.exists()
    assert len(backups_in(stick)) == 11


def test_a_copy_is_made_once_and_a_folder_that_is_gone_is_named(
    store: Store, tmp_path: Path
) -> None:
    backup = back_up(store, act_id="b").path
    stick = tmp_path / "stick"
    with pytest.raises(BackupError, match=r"stick: the folder is not there.*back up again"):
        copy_backup(backup, stick)
    stick.mkdir()
    copied = copy_backup(backup, stick)
    assert copy_backup(backup, stick) == copied
    assert contents_of(copied, whole=True).heads == contents_of(backup).heads
