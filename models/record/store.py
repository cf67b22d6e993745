"""The one file of a shop's record: opened, checked, and handed out in transactions.

The file is never opened, hashed or copied by other means than the one database library of the
process: closing any other handle on it would drop the lock under a writer.
"""

import platform
import uuid
from collections.abc import Callable, Iterator
from contextlib import contextmanager, suppress
from datetime import datetime
from importlib.metadata import PackageNotFoundError, version
from pathlib import Path
from typing import Self

from sqlalchemy import Connection, Engine
from sqlalchemy.orm import Session

from models.record.connections import BUSY_SECONDS, engine_for, engines_alone
from models.record.errors import (
    EmptyFileError,
    FolderMissingError,
    NetworkFolderError,
    NewerRecordError,
    NotARecordError,
    RecordMissingError,
    SchemaDiffersError,
    TornRecordError,
)
from models.record.folders import network_kind
from models.record.making import free_place, make_empty, make_record, put_in_place
from models.record.migrations import APPLICATION_ID, FORM, bring_up_to_date
from models.record.schema import differences
from models.record.tables import CHANGEABLE
from models.record.trouble import sentences
from models.record.verify import verify

__all__ = ["FILE_NAME", "Session", "Store"]

FILE_NAME = "shop.thirdjournal"


def _now() -> datetime:
    return datetime.now().astimezone()


def _program_edition() -> str:
    try:
        return version("thirdjournal")
    except PackageNotFoundError:
        return "from source"


class Store:
    """An open record.

    `clock` gives the present with its offset; `station_name` says which computer this is.
    """

    def __init__(
        self,
        path: Path,
        *,
        clock: Callable[[], datetime],
        station_name: str,
        busy_seconds: float,
        alone: bool = False,
    ) -> None:
        self.path = path
        self.clock = clock
        self.station_name = station_name
        self.program_edition = _program_edition()
        self.is_alone = alone
        if alone:
            self._reader, self._writer = engines_alone(path, busy_seconds=busy_seconds)
            return
        self._reader = engine_for(path, writing=False, busy_seconds=busy_seconds)
        self._writer = engine_for(path, writing=True, busy_seconds=busy_seconds)

    @classmethod
    def open(
        cls,
        folder: Path,
        *,
        create: bool = True,
        clock: Callable[[], datetime] = _now,
        station_name: str | None = None,
        busy_seconds: float = BUSY_SECONDS,
        on_network: bool = False,
    ) -> Self:
        """Open the record of a folder; a missing one is made if `create` says so.

        On a network folder it is opened only if `on_network` says so, and then for this process
        alone.

        Raises
        ------
        RecordError
            If the folder or the file cannot be used; the message says why, and the way out.
        """
        if not folder.is_dir():
            raise FolderMissingError(folder)
        kind = network_kind(folder)
        if kind and not on_network:
            raise NetworkFolderError(folder, kind)
        path = folder / FILE_NAME
        if not path.exists():
            if not create:
                raise RecordMissingError(path)
            make_record(path)
        store = cls(
            path,
            clock=clock,
            station_name=station_name or platform.node() or "unnamed computer",
            busy_seconds=busy_seconds,
            alone=bool(kind),
        )
        try:
            store._examine()
        except BaseException:
            store.close()
            raise
        return store

    def close(self) -> None:
        """Give the file back."""
        self._reader.dispose()
        self._writer.dispose()

    def __enter__(self) -> Self:
        return self

    def __exit__(self, *_: object) -> None:
        self.close()

    @contextmanager
    def reading(self) -> Iterator[Session]:
        """Hand out a session that sees one state of the record and cannot write.

        Keep it short: while it is open, nobody's act can be put on the disk.
        """
        with self._session(self._reader) as session:
            yield session

    @contextmanager
    def writing(self) -> Iterator[Session]:
        """Hand out a session that holds the write lock; all of it is recorded, or nothing.

        When the block ends without an error, what it recorded is on the disk.
        """
        with self._session(self._writer) as session:
            session.connection()
            yield session

    @contextmanager
    def _session(self, engine: Engine) -> Iterator[Session]:
        with sentences(self.path):
            session = Session(engine, autoflush=False, expire_on_commit=False)
            session.info["store"] = self
            with session, session.begin():
                yield session

    def _examine(self) -> None:
        if self.path.stat().st_size == 0:
            raise EmptyFileError(self.path)
        with sentences(self.path), self._reader.connect() as connection:
            found = _form(self.path, connection)
            _refuse_torn(self.path, connection)
        if found < FORM:
            self._migrate(found)
        with sentences(self.path), self._reader.connect() as connection:
            said = differences(connection)
        if said:
            raise SchemaDiffersError(self.path, said)

    def _migrate(self, found: int) -> None:
        with sentences(self.path):
            self._keep_copy(f"{self.path.stem} of form {found}")
            with self._writer.connect() as connection, connection.begin():
                bring_up_to_date(connection, changeable=CHANGEABLE)
                whole = verify(Session(connection))
                if not whole.is_whole:
                    said = tuple(trouble.words for trouble in whole.troubles)
                    raise SchemaDiffersError(self.path, said)

    def _keep_copy(self, name: str) -> None:
        """Keep the record as it was before it takes its next form; an earlier copy stays."""
        draft = self.path.with_name(f".{name}.new-{uuid.uuid4()}")
        try:
            make_empty(draft)
            connection = self._writer.raw_connection()
            try:
                connection.cursor().execute("VACUUM INTO ?", (str(draft),))
            finally:
                connection.close()
            put_in_place(draft, free_place(self.path.parent, name))
        finally:
            with suppress(OSError):
                draft.unlink(missing_ok=True)


def _form(path: Path, connection: Connection) -> int:
    application = connection.exec_driver_sql("PRAGMA application_id").scalar_one()
    if application != APPLICATION_ID:
        raise NotARecordError(path)
    found = int(connection.exec_driver_sql("PRAGMA user_version").scalar_one())
    if found > FORM:
        raise NewerRecordError(path, found, FORM)
    return found


def _refuse_torn(path: Path, connection: Connection) -> None:
    pages = connection.exec_driver_sql("PRAGMA page_count").scalar_one()
    size = connection.exec_driver_sql("PRAGMA page_size").scalar_one()
    missing = pages * size - path.stat().st_size
    if missing > 0:
        raise TornRecordError(path, f"{missing} bytes are missing at its end")
    found = connection.exec_driver_sql("PRAGMA quick_check(1)").scalar_one()
    if found != "ok":
        raise TornRecordError(path, found)
