"""Whatever is changed behind the triggers is found, and the words say where."""

import sqlite3
from collections.abc import Iterator

import pytest

from models.job import Head
from models.record import queries
from models.record.store import Store
from models.record.verify import SHOP_NAME, Verification, verify
from tests.record.a_job import NUMBER
from tests.record.whole_record import behind_the_back, fill, tables_of

# Rows that another row or act depends on are moved with everything switched off.
_UNGUARDED = ("PRAGMA foreign_keys = OFF", "PRAGMA ignore_check_constraints = ON")


@pytest.fixture(scope="module")
def filled(tmp_path_factory: pytest.TempPathFactory) -> Iterator[Store]:
    with Store.open(tmp_path_factory.mktemp("filled")) as store:
        fill(store)
        yield store


def tampered(store: Store, table: str, statement: str) -> Verification:
    """Take the triggers of a table off, change it, put them on again, verify, and undo it all."""
    with behind_the_back(store) as (raw, session):
        for setting in _UNGUARDED:
            raw.execute(setting)
        raw.execute("BEGIN")
        triggers = raw.execute(
            "SELECT name, sql FROM sqlite_schema WHERE type = 'trigger' AND tbl_name = ?", (table,)
        ).fetchall()
        for name, _ in triggers:
            raw.execute(f"DROP TRIGGER {name}")
        assert raw.execute(statement).rowcount >= 1, statement
        for _, text in triggers:
            raw.execute(text)
        found = verify(session)
        raw.execute("ROLLBACK")
    return found


def columns_with_a_row(raw: sqlite3.Connection, table: str) -> Iterator[tuple[str, str, str]]:
    """Name each column of a table with its type and a row, one where it is filled if there is."""
    info = raw.execute(f"PRAGMA table_info({table})").fetchall()
    key = "act_id" if table == "act" else "key"
    for _, column, kind, *_ in info:
        (row,) = raw.execute(
            f'SELECT {key} FROM {table} ORDER BY "{column}" IS NULL, sequence DESC LIMIT 1'
        ).fetchone()
        yield column, kind, f"{key} = '{row}'"


def test_an_untouched_record_is_whole(filled: Store) -> None:
    with filled.reading() as session:
        found = verify(session)
    assert found.troubles == ()
    assert found.heads.keys() == {NUMBER, SHOP_NAME}


def test_a_change_of_any_column_of_any_table_is_named(filled: Store) -> None:
    with behind_the_back(filled) as (raw, _):
        cases = [
            (table, *case) for table in tables_of(raw) for case in columns_with_a_row(raw, table)
        ]
    assert len(cases) > 300
    missed = []
    for table, column, kind, where in cases:
        new = (
            f'COALESCE("{column}", 0) + 1000'
            if kind == "INTEGER"
            else f"COALESCE(\"{column}\", '') || 'x'"
        )
        found = tampered(filled, table, f'UPDATE {table} SET "{column}" = {new} WHERE {where}')
        if not any(trouble.table == table and trouble.job for trouble in found.troubles):
            missed.append(f"{table}.{column}: {[trouble.words for trouble in found.troubles]}")
    assert missed == []


def test_a_changed_reading_is_named_with_its_job_act_and_row(filled: Store) -> None:
    with behind_the_back(filled) as (raw, _):
        key, sequence = raw.execute(
            "SELECT key, sequence FROM runout_reading WHERE typed = '8'"
        ).fetchone()
    found = tampered(
        filled, "runout_reading", f"UPDATE runout_reading SET typed = '9' WHERE key = '{key}'"
    )
    assert [trouble.words for trouble in found.troubles] == [
        f"job R-17, act {sequence}, table runout_reading, row {key}: is changed"
    ]


def test_a_removed_row_is_named(filled: Store) -> None:
    found = tampered(filled, "note", "DELETE FROM note")
    words = [trouble.words for trouble in found.troubles]
    assert any("table note, row note: was removed" in said for said in words)


def test_an_added_row_is_named(filled: Store) -> None:
    found = tampered(
        filled, "note", "INSERT INTO note SELECT chain_id, 'lift', sequence, 99, words FROM note"
    )
    assert [trouble.key for trouble in found.troubles if "was added" in trouble.what] == ["lift"]


def test_a_row_of_an_act_that_is_not_there_is_named(filled: Store) -> None:
    found = tampered(
        filled, "note", "INSERT INTO note SELECT chain_id, 'lift', 9999, 1, words FROM note"
    )
    assert any("without an act" in trouble.what for trouble in found.troubles)


def test_a_removed_act_is_named(filled: Store) -> None:
    found = tampered(filled, "act", "DELETE FROM act WHERE act_id = 'brought/entry 3'")
    words = [trouble.words for trouble in found.troubles]
    assert "job R-17, act 4, table act: is missing before act 5" in words


def test_two_acts_in_the_other_order_are_named(filled: Store) -> None:
    found = tampered(
        filled,
        "act",
        "UPDATE act SET act_id = CASE act_id WHEN 'brought/entry 3' THEN 'brought/entry 4 '"
        " ELSE 'brought/entry 3 ' END WHERE act_id IN ('brought/entry 3', 'brought/entry 4')",
    )
    assert {4, 5} <= {trouble.sequence for trouble in found.troubles}


def test_a_trigger_taken_off_is_named(filled: Store) -> None:
    with behind_the_back(filled) as (raw, session):
        raw.execute("BEGIN")
        raw.execute("DROP TRIGGER note_never_changes")
        found = verify(session)
        raw.execute("ROLLBACK")
    assert [trouble.words for trouble in found.troubles] == [
        "trigger note_never_changes is missing"
    ]


def test_text_that_no_longer_decodes_is_a_trouble_and_not_a_crash(filled: Store) -> None:
    found = tampered(filled, "note", "UPDATE note SET words = CAST(x'ff' AS TEXT)")
    assert any(
        trouble.table == "note" and "cannot be read" in trouble.what for trouble in found.troubles
    )


def test_a_head_kept_elsewhere_shows_a_tail_that_was_cut(filled: Store) -> None:
    with filled.reading() as session:
        last = queries.head(session, NUMBER)
        kept = Head(sequence=last.sequence + 2, digest="0" * 64)
        found = verify(session, number=NUMBER, expected=kept)
    assert f"the chain ends at act {last.sequence}" in found.troubles[0].words


def test_a_head_kept_elsewhere_shows_a_chain_written_anew(filled: Store) -> None:
    with filled.reading() as session:
        last = queries.head(session, NUMBER)
        good = verify(session, number=NUMBER, expected=last)
        other = verify(session, number=NUMBER, expected=Head(sequence=3, digest="1" * 64))
    assert good.is_whole
    assert "written anew" in other.troubles[0].words
