"""Copies of the record: made by the online backup call, verified, dated, kept by generations.

A backup is a whole record under a name with its time (UTC). It is written beside its place,
compared with the record, and only then given its name.
"""

import re
import sqlite3
import uuid
from collections.abc import Iterable, Iterator
from contextlib import closing, contextmanager, suppress
from dataclasses import dataclass
from datetime import UTC, datetime, timedelta
from pathlib import Path

from sqlalchemy.orm import Session

from models.job import Head
from models.record.backup_files import bring, files_named, lacking
from models.record.errors import NewerRecordError, NotARecordError, RecordError, TornRecordError
from models.record.heads_seen import all_heads
from models.record.making import free_place, make_empty, put_in_place
from models.record.migrations import APPLICATION_ID, FORM
from models.record.store import Store
from models.record.trouble import sentence_for, sentences

__all__ = [
    "DAYS_KEPT",
    "FOLDER_NAME",
    "LAST_KEPT",
    "Backup",
    "BackupError",
    "Contents",
    "backups_in",
    "contents_of",
    "copy_backup",
    "copy_whole",
    "generations_to_keep",
    "keep_generations",
    "links_held",
    "made_at",
    "opened_copy",
    "write_backup",
]

FOLDER_NAME = "backups"
# The last ten; then one a day for a month; then one a month for ever.
LAST_KEPT = 10
DAYS_KEPT = 31
_NAME = re.compile(r"shop (\d{4}-\d\d-\d\d \d{6})Z(?:, \d+)?\.thirdjournal")
_STAMP = "%Y-%m-%d %H%M%S"
_PATIENCE = 50


class BackupError(RecordError):
    """A backup could not be written; the record itself is as it was."""

    def __init__(self, folder: Path, why: str) -> None:
        super().__init__(
            f"No backup was written into {folder}: {why}. The record itself is whole and open; "
            "see to the folder, then back up again."
        )


@dataclass(frozen=True, kw_only=True)
class Backup:
    """A backup that was written and verified; heads by the id of their chain.

    `files` says how many attached files lie beside it, each looked at by its digest, and
    `files_lacking` how many could not, since they are not as attached beside the record either.
    """

    path: Path
    made_at: datetime
    heads: dict[str, Head]
    files: int = 0
    files_lacking: int = 0


@dataclass(frozen=True, kw_only=True)
class Contents:
    """What a copy of the record holds.

    Heads and the time of each chain's last act by the id of the chain; names likewise: the number
    of the job, or nothing for the shop's own. The names of attached files by their digest.
    """

    path: Path
    form: int
    heads: dict[str, Head]
    names: dict[str, str]
    last_at: dict[str, str]
    files: dict[str, str]

    @property
    def shop(self) -> str:
        """Id of the shop's own chain; nothing where it has not begun."""
        return next((chain for chain, name in self.names.items() if not name), "")

    @property
    def jobs(self) -> tuple[str, ...]:
        """Numbers of the jobs in it."""
        return tuple(sorted(name for name in self.names.values() if name))

    @property
    def last_act_at(self) -> str:
        """When the last act was entered, ISO 8601 in UTC; nothing if there is none."""
        return max(self.last_at.values(), default="")


def made_at(path: Path) -> datetime | None:
    """Read the time in a backup's name; None if it is no backup's name."""
    found = _NAME.fullmatch(path.name)
    return None if found is None else datetime.strptime(found[1], _STAMP).replace(tzinfo=UTC)


def backups_in(folder: Path) -> list[Path]:
    """List the backups in a folder, the newest first; nothing where there is no folder."""
    try:
        found = [path for path in folder.iterdir() if made_at(path) is not None]
    except OSError:
        return []
    return sorted(found, key=lambda path: (made_at(path), path.name), reverse=True)


def write_backup(store: Store, folder: Path) -> Backup:
    """Copy the record into a folder of backups, compare the copy, and give it its name.

    The record stands still for the copy: readers go on, who writes waits.

    Raises
    ------
    BackupError
        If folder or disk do not allow it, or the copy is not what was copied.
    """
    now = store.clock().astimezone(UTC)
    draft = folder / f".backup.new-{uuid.uuid4()}"
    try:
        folder.mkdir(mode=0o700, exist_ok=True)
        make_empty(draft)
        with store.reading() as session:
            heads = all_heads(session)
            _copy(session, draft)
        found = contents_of(draft, whole=True)
        if found.heads != heads:
            raise BackupError(folder, "the copy does not end where the record does")
        # Before the backup has its name: one that stands there has its files beside it.
        bring(found.files, source=store.path.parent, target=folder)
        missing = len(lacking(found.files, folder))
        path = _free(folder, now)
        put_in_place(draft, path)
    except BackupError:
        raise
    except (OSError, sqlite3.Error, RecordError) as error:
        raise BackupError(folder, _reason(error, folder)) from error
    finally:
        with suppress(OSError):
            draft.unlink(missing_ok=True)
    return Backup(
        path=path,
        made_at=now,
        heads=heads,
        files=len(found.files) - missing,
        files_lacking=missing,
    )


def _reason(error: Exception, folder: Path) -> str:
    if isinstance(error, OSError) and error.strerror:
        return error.strerror.lower()
    said = error if isinstance(error, RecordError) else sentence_for(error, folder)
    return str(said or error).split(". ")[0].rstrip(".")


def _copy(session: Session, draft: Path) -> None:
    source = session.connection().connection.driver_connection
    assert isinstance(source, sqlite3.Connection)
    with closing(sqlite3.connect(draft)) as target:
        copy_whole(source, target)


def copy_whole(source: sqlite3.Connection, target: sqlite3.Connection) -> None:
    """Copy a whole file in one go, or nothing of it.

    Raises
    ------
    sqlite3.OperationalError
        If either is held by another and does not become free in time.
    """
    waited = 0

    def watch(status: int, _left: int, _whole: int) -> None:
        nonlocal waited
        waited += status in (sqlite3.SQLITE_BUSY, sqlite3.SQLITE_LOCKED)
        if waited > _PATIENCE:
            held = sqlite3.OperationalError("database is locked")
            held.sqlite_errorcode = sqlite3.SQLITE_BUSY
            raise held

    source.backup(target, progress=watch, sleep=0.1)


def _free(folder: Path, now: datetime) -> Path:
    stamp = now.strftime(_STAMP)
    return free_place(folder, f"shop {stamp}Z")


@contextmanager
def opened_copy(path: Path, *, live: bool = False) -> Iterator[sqlite3.Connection]:
    """Open a file to look into it; one that is in use may have to take a broken act back first."""
    if path.stat().st_size == 0:
        raise NotARecordError(path)
    mode = "rw" if live else "ro"
    uri = f"{path.absolute().as_uri()}?mode={mode}"
    with closing(sqlite3.connect(uri, uri=True)) as connection:
        yield connection


def contents_of(path: Path, *, whole: bool = False, live: bool = False) -> Contents:
    """Look into a copy of the record; `whole` also reads every page of it.

    `live` says that it is no copy but the record itself, which others may write.

    Raises
    ------
    RecordError
        If it is none, is damaged, or of a newer form.
    """
    with sentences(path), opened_copy(path, live=live) as connection:
        (application,) = connection.execute("PRAGMA application_id").fetchone()
        (form,) = connection.execute("PRAGMA user_version").fetchone()
        if application != APPLICATION_ID:
            raise NotARecordError(path)
        if form > FORM:
            raise NewerRecordError(path, form, FORM)
        if whole:
            (said,) = connection.execute("PRAGMA integrity_check(1)").fetchone()
            if said != "ok":
                raise TornRecordError(path, said)
        rows = connection.execute(
            "SELECT chain.chain_id, act.sequence, act.digest, act.entered_at_utc,"
            " COALESCE(job.number, '') FROM chain"
            " JOIN act ON act.chain_id = chain.chain_id AND act.sequence ="
            " (SELECT max(sequence) FROM act WHERE act.chain_id = chain.chain_id)"
            " LEFT JOIN job ON job.chain_id = chain.chain_id"
        ).fetchall()
        files = files_named(connection)
    return Contents(
        path=path,
        form=form,
        heads={row[0]: Head(sequence=row[1], digest=row[2]) for row in rows},
        names={row[0]: row[4] for row in rows},
        last_at={row[0]: row[3] for row in rows},
        files=files,
    )


def links_held(path: Path, heads: dict[str, Head], *, live: bool = False) -> dict[str, bool]:
    """Say of each head whether a file holds this very link."""
    with opened_copy(path, live=live) as raw:
        return {
            chain: raw.execute(
                "SELECT digest FROM act WHERE chain_id = ? AND sequence = ?", (chain, head.sequence)
            ).fetchone()
            == (head.digest,)
            for chain, head in heads.items()
        }


def generations_to_keep(times: Iterable[datetime]) -> set[datetime]:
    """Choose which backups stay: the last ten, one a day for a month, one a month for ever.

    Of a day, and of a month, the last one stays.
    """
    newest = sorted(set(times), reverse=True)
    kept = set(newest[:LAST_KEPT])
    days: dict[object, datetime] = {}
    months: dict[object, datetime] = {}
    for time in newest:
        months.setdefault((time.year, time.month), time)
        if newest[0] - time < timedelta(days=DAYS_KEPT):
            days.setdefault(time.date(), time)
    return kept | set(days.values()) | set(months.values())


def _is_of(path: Path, shop: str) -> bool:
    try:
        return contents_of(path).shop == shop
    except RecordError:
        return False


def copy_backup(backup: Path, folder: Path) -> Path:
    """Copy a backup into a second folder, on a stick or a share, and compare the copy.

    Raises
    ------
    BackupError
        If the folder is not there or does not allow it.
    """
    draft = folder / f".backup.new-{uuid.uuid4()}"
    place = folder / backup.name
    try:
        if not folder.is_dir():
            raise BackupError(folder, "the folder is not there")
        held = contents_of(backup)
        bring(held.files, source=backup.parent, target=folder)
        if place.exists():
            return place
        make_empty(draft)
        with opened_copy(backup) as source, closing(sqlite3.connect(draft)) as target:
            copy_whole(source, target)
        if contents_of(draft, whole=True).heads != held.heads:
            raise BackupError(folder, "the copy does not end where the backup does")
        put_in_place(draft, place)
    except BackupError:
        raise
    except (OSError, sqlite3.Error, RecordError) as error:
        raise BackupError(folder, _reason(error, folder)) from error
    finally:
        with suppress(OSError):
            draft.unlink(missing_ok=True)
    keep_generations(folder, of=held.shop)
    return place


def keep_generations(folder: Path, *, of: str) -> list[Path]:
    """Remove a shop's backups whose generation is over; give what was removed.

    Backups of other shops, and what cannot be read, are left alone.
    """
    dated = {
        path: time
        for path in backups_in(folder)
        if (time := made_at(path)) is not None and _is_of(path, of)
    }
    kept = generations_to_keep(dated.values())
    removed = [path for path, time in dated.items() if time not in kept]
    for path in removed:
        path.unlink(missing_ok=True)
    return removed
