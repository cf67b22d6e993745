"""Connections to the one file, each with the settings that the record relies on."""

import sqlite3
from pathlib import Path

from sqlalchemy import Connection, Engine, create_engine, event
from sqlalchemy.pool import QueuePool

from models.record.errors import UnsafeSettingError

__all__ = ["BUSY_SECONDS", "engine_for", "engines_alone"]

BUSY_SECONDS = 5

# Setting, what is asked for, what the library must then read back.
_SETTINGS = (
    ("journal_mode", "DELETE", "delete"),
    ("synchronous", "EXTRA", "3"),
    ("foreign_keys", "ON", "1"),
    ("recursive_triggers", "ON", "1"),
    ("trusted_schema", "OFF", "0"),
    ("cell_size_check", "ON", "1"),
    # What changes is overwritten: an old wrap of a key must not linger in the file.
    ("secure_delete", "ON", "1"),
)


def engines_alone(path: Path, *, busy_seconds: float = BUSY_SECONDS) -> tuple[Engine, Engine]:
    """Prepare the one connection that keeps a file to itself, to read and to write with in turn.

    Raises
    ------
    sqlite3.OperationalError
        When it is first used, if another has the file.
    """

    def connect() -> sqlite3.Connection:
        connection = _opened(path, busy_seconds)
        try:
            connection.execute("PRAGMA locking_mode = EXCLUSIVE")
            _set(connection, writing=True, busy_seconds=busy_seconds)
            # In this mode a lock, once taken, stays until the connection closes.
            connection.execute("BEGIN EXCLUSIVE")
            connection.execute("COMMIT")
        except BaseException:
            connection.close()
            raise
        return connection

    engine = create_engine(
        "sqlite://", creator=connect, poolclass=QueuePool, pool_size=1, max_overflow=0
    )

    def begin(connection: Connection) -> None:
        writes = connection.get_execution_options()["writes"]
        connection.exec_driver_sql(f"PRAGMA query_only = {0 if writes else 1}")
        connection.exec_driver_sql("BEGIN IMMEDIATE" if writes else "BEGIN")

    event.listen(engine, "begin", begin)
    return engine.execution_options(writes=False), engine.execution_options(writes=True)


def engine_for(path: Path, *, writing: bool, busy_seconds: float = BUSY_SECONDS) -> Engine:
    """Prepare connections that only read, or that take the write lock when they begin."""

    def connect() -> sqlite3.Connection:
        connection = _opened(path, busy_seconds)
        try:
            _set(connection, writing=writing, busy_seconds=busy_seconds)
        except BaseException:
            connection.close()
            raise
        return connection

    engine = create_engine("sqlite://", creator=connect, poolclass=QueuePool)
    # A deferred start would fail at once, without waiting, when two writers meet.
    statement = "BEGIN IMMEDIATE" if writing else "BEGIN"

    def begin(connection: Connection) -> None:
        connection.exec_driver_sql(statement)

    event.listen(engine, "begin", begin)
    return engine


def _opened(path: Path, busy_seconds: float) -> sqlite3.Connection:
    return sqlite3.connect(
        f"{path.absolute().as_uri()}?mode=rw",
        uri=True,
        timeout=busy_seconds,
        isolation_level=None,
        check_same_thread=False,
    )


def _set(connection: sqlite3.Connection, *, writing: bool, busy_seconds: float) -> None:
    waits = str(int(busy_seconds * 1000))
    only_reads = "0" if writing else "1"
    for name, asked, expected in (
        ("busy_timeout", waits, waits),
        *_SETTINGS,
        ("query_only", only_reads, only_reads),
    ):
        connection.execute(f"PRAGMA {name} = {asked}")
        (found,) = connection.execute(f"PRAGMA {name}").fetchone()
        if str(found) != expected:
            raise UnsafeSettingError(name, expected, str(found))
