"""Other people's SQL cannot change, remove or replace what is recorded."""

import sqlite3
from collections.abc import Iterator
from pathlib import Path

import pytest

from models.job import RunoutReading
from models.record.act import Act
from models.record.errors import RecordIsFinalError, UnknownEntryError
from models.record.store import Store
from tests.record.whole_record import behind_the_back, fill, one_act, tables_of


@pytest.fixture(scope="module")
def filled(tmp_path_factory: pytest.TempPathFactory) -> Iterator[Store]:
    folder: Path = tmp_path_factory.mktemp("filled")
    with Store.open(folder) as store:
        fill(store)
        yield store


def test_every_table_of_the_live_schema_holds_a_row(filled: Store) -> None:
    with behind_the_back(filled) as (raw, _):
        empty = [
            name
            for name in tables_of(raw)
            if raw.execute(f"SELECT count(*) FROM {name}").fetchone() == (0,)
        ]
        assert len(tables_of(raw)) > 30
    assert empty == []


@pytest.mark.parametrize("recursive", ["ON", "OFF"])
@pytest.mark.parametrize(
    "statement",
    [
        "UPDATE {table} SET {first} = {first}",
        "DELETE FROM {table}",
        "INSERT OR REPLACE INTO {table} SELECT * FROM {table}",
        "INSERT INTO {table} SELECT * FROM {table} WHERE true"
        " ON CONFLICT DO UPDATE SET {first} = {first}",
        "INSERT OR IGNORE INTO {table} SELECT * FROM {table}",
    ],
)
def test_a_recorded_table_refuses(filled: Store, statement: str, recursive: str) -> None:
    with behind_the_back(filled) as (raw, _):
        # Off is what other programs have; then REPLACE would not fire a delete trigger.
        raw.execute(f"PRAGMA recursive_triggers = {recursive}")
        for table in tables_of(raw):
            before = raw.execute(f"SELECT * FROM {table}").fetchall()
            text = statement.format(table=table, first="chain_id")
            with pytest.raises(sqlite3.IntegrityError, match="the record is final"):
                raw.execute(text)
            assert raw.execute(f"SELECT * FROM {table}").fetchall() == before


def test_a_row_cannot_take_the_place_of_another_by_any_unique_column(filled: Store) -> None:
    with behind_the_back(filled) as (raw, _):
        for table in ("runout_reading", "entry", "act", "job"):
            names = [row[1] for row in raw.execute(f"PRAGMA table_info({table})")]
            own = {"key": "'new'", "sequence": "sequence + 1000"}
            columns = ", ".join(own.get(name, name) for name in names)
            where = "WHERE supersedes IS NOT NULL" if table == "entry" else "LIMIT 1"
            with pytest.raises(sqlite3.IntegrityError, match="the record is final"):
                raw.execute(f"INSERT OR REPLACE INTO {table} SELECT {columns} FROM {table} {where}")


def test_a_row_cannot_be_added_to_an_act_that_is_closed(filled: Store) -> None:
    with behind_the_back(filled) as (raw, _), pytest.raises(sqlite3.IntegrityError, match="closed"):
        raw.execute("INSERT INTO note SELECT chain_id, 'x', sequence, 99, words FROM note")


def test_a_row_without_an_act_does_not_stay(filled: Store) -> None:
    with behind_the_back(filled) as (raw, _):
        raw.execute("PRAGMA foreign_keys = ON")
        with pytest.raises(sqlite3.IntegrityError, match="FOREIGN KEY"):
            raw.execute("INSERT INTO note SELECT chain_id, 'x', 9999, 1, words FROM note")


def test_the_program_itself_is_refused_with_a_sentence(filled: Store) -> None:
    with (
        pytest.raises(RecordIsFinalError, match="Record a correction instead"),
        filled.writing() as session,
    ):
        session.connection().exec_driver_sql("UPDATE note SET words = 'other'")


def test_a_reading_session_cannot_write(filled: Store) -> None:
    with pytest.raises(Exception, match="may only be read"), filled.reading() as session:
        session.connection().exec_driver_sql("DELETE FROM alembic_version")


def _read_here_and_nowhere(act: Act) -> None:
    for entry_id in ("open", "nowhere"):
        act.add_reading(entry_id, RunoutReading(station="middle", mark=3, typed="99"))


def test_an_act_that_fails_half_way_leaves_nothing(filled: Store) -> None:
    with filled.reading() as session:
        before = session.connection().exec_driver_sql("SELECT count(*) FROM act").scalar_one()
    with pytest.raises(UnknownEntryError), one_act(filled, "fails") as act:
        _read_here_and_nowhere(act)
    with filled.reading() as session:
        after = session.connection().exec_driver_sql("SELECT count(*) FROM act").scalar_one()
        kept = session.connection().exec_driver_sql(
            "SELECT count(*) FROM runout_reading WHERE typed = '99'"
        )
        assert (before, 0) == (after, kept.scalar_one())
