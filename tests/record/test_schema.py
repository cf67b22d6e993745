"""The file's form: migration, classes and triggers agree, and nothing is left out of a digest."""

from collections.abc import Iterator
from pathlib import Path
from typing import Any

import pytest
from sqlalchemy import Connection, Engine, create_engine, event, text

from models.job import RunoutReading
from models.record import links, migrations, queries
from models.record.links import digest_of
from models.record.migrations import bring_up_to_date, make_triggers
from models.record.schema import differences
from models.record.store import Store
from models.record.tables import CHANGEABLE, OF_A_LIBRARY, Base, recorded_tables
from tests.record.a_job import NUMBER, at
from tests.record.whole_record import behind_the_back, fill, one_act, tables_of

# Tables that grow with the work; the shelf lists jobs and their plans, which are few.
BIG = {table.name for table in recorded_tables()} - {"job", "plan_revision"} | {"act"}


@pytest.fixture
def migrated() -> Iterator[Connection]:
    engine = create_engine("sqlite://")
    with engine.connect() as connection:
        bring_up_to_date(connection, changeable=CHANGEABLE)
        yield connection
    engine.dispose()


def test_the_steps_make_what_the_classes_say(migrated: Connection) -> None:
    assert differences(migrated) == ()


def test_a_difference_would_be_told(migrated: Connection) -> None:
    migrated.execute(text("DROP TRIGGER note_never_changes"))
    migrated.execute(text("DROP INDEX ix_person_chain_id_person_key"))
    migrated.execute(text("ALTER TABLE note ADD COLUMN more TEXT"))
    migrated.execute(text("CREATE TABLE stray (one TEXT)"))
    assert differences(migrated) == (
        "index ix_person_chain_id_person_key is missing",
        "trigger note_never_changes is missing",
        "table stray was added",
        "table note is changed",
    )


def test_triggers_made_again_are_the_same(migrated: Connection) -> None:
    migrated.execute(text("DROP TRIGGER note_never_changes"))
    make_triggers(migrated, changeable=CHANGEABLE)
    assert differences(migrated) == ()


def test_every_table_is_strict_and_every_constraint_has_a_name(migrated: Connection) -> None:
    rows = migrated.execute(text("PRAGMA table_list")).mappings().all()
    loose = [
        row["name"] for row in rows if not row["strict"] and not row["name"].startswith("sqlite_")
    ]
    assert loose == list(OF_A_LIBRARY)
    unnamed = [
        f"{table.name}: {constraint}"
        for table in Base.metadata.tables.values()
        for constraint in table.constraints
        if constraint.name is None
    ]
    assert unnamed == []


def test_the_number_of_steps_is_the_form() -> None:
    steps = Path(migrations.__path__[0]) / "steps"
    assert len(list(steps.glob("step_*.py"))) == migrations.FORM


def test_no_column_of_any_row_is_left_out_of_its_act(
    store: Store, monkeypatch: pytest.MonkeyPatch
) -> None:
    told: dict[str, set[str]] = {}

    def listen(act: dict[str, object], rows: list[tuple[str, dict[str, object]]]) -> str:
        for table, row in [("act", act), *rows]:
            told.setdefault(table, set()).update(
                name for name, cell in row.items() if cell is not None
            )
        return digest_of(act, rows)

    monkeypatch.setattr("models.record.journal.digest_of", listen)
    fill(store)
    with behind_the_back(store) as (raw, _):
        live = {
            table: {
                row[1]
                for row in raw.execute(f"PRAGMA table_info({table})")
                if raw.execute(f'SELECT count("{row[1]}") FROM {table}').fetchone() != (0,)
            }
            for table in tables_of(raw)
        }
    live["act"].remove("digest")
    assert told == live


def test_a_record_without_its_digest_column_would_be_noticed() -> None:
    row = {"previous_digest": "0" * 64, "a": 1, "digest": "x"}
    assert digest_of(row, []) == digest_of({**row, "digest": "y"}, [])
    assert digest_of(row, []) != digest_of({**row, "a": 2}, [])
    assert links.filled({"a": None, "b": 0}) == {"b": 0}


@pytest.fixture
def filled(store: Store) -> Store:
    fill(store)
    return store


def plan_of(store: Store, statement: str) -> list[str]:
    with store.reading() as session:
        rows = session.connection().exec_driver_sql(f"EXPLAIN QUERY PLAN {statement}")
        return [row[-1] for row in rows]


def scans(plan: list[str]) -> list[str]:
    return [line for line in plan if line.startswith("SCAN") and line.split()[1] in BIG]


def test_the_shelf_reads_no_big_table_from_end_to_end(filled: Store) -> None:
    with filled.reading() as session:
        asked = queries.shelf_query().compile(
            session.connection(), compile_kwargs={"literal_binds": True}
        )
    assert scans(plan_of(filled, str(asked))) == []


def test_a_scan_would_be_noticed(filled: Store) -> None:
    assert scans(plan_of(filled, "SELECT * FROM entry WHERE done_at = 'x'")) != []


def test_neither_reading_a_job_nor_adding_a_reading_reads_a_big_table_from_end_to_end(
    filled: Store,
) -> None:
    asked: list[tuple[str, Any]] = []

    def listen(_: Any, __: Any, statement: str, parameters: Any, *___: Any) -> None:
        if statement.startswith("SELECT"):
            asked.append((statement, parameters))

    event.listen(Engine, "before_cursor_execute", listen)
    try:
        with filled.reading() as session:
            queries.read_job(session, NUMBER)
        with one_act(filled, "one more") as act:
            act.add_reading("open", RunoutReading(station="middle", mark=1, typed="3"))
            act.close_survey("open", at(300))
    finally:
        event.remove(Engine, "before_cursor_execute", listen)
    assert len(asked) > 30
    with filled.reading() as session:
        plans = [
            row[-1]
            for statement, parameters in asked
            for row in session.connection().exec_driver_sql(
                f"EXPLAIN QUERY PLAN {statement}", parameters
            )
        ]
    assert scans(plans) == []
