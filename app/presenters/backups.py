"""The record's backups: when one is due, where they are, what one holds, and going back to it."""

from __future__ import annotations

import uuid
from collections.abc import Callable
from dataclasses import dataclass
from datetime import UTC, datetime, timedelta
from pathlib import Path

from PySide6.QtCore import QObject, Signal

from app.backup_text import local_time, look_words
from app.presenters.background import Background
from app.presenters.shop import Said, ShopPresenter
from models.acts.backups import back_up, restore
from models.job import Signature
from models.record.backups import FOLDER_NAME, LAST_KEPT, Backup, backups_in, copy_backup, made_at
from models.record.errors import RecordError
from models.record.restoring import Look, Restored, look_into
from models.record.store import Store

__all__ = ["BACKED_UP_AFTER_ACTS", "SCHEDULE", "BackupRow", "BackupsPresenter"]

BACKED_UP_AFTER_ACTS = 200
"""After how many acts in this window a backup is made [-]."""

SCHEDULE = (
    "Made at the start where the last is older than a day, once a job's final is signed, and after "
    f"{BACKED_UP_AFTER_ACTS} acts. The last {LAST_KEPT} are kept, then one a day for a month, "
    "then one a month for ever."
)
"""When backups are made, and how long they are kept."""

_STALE = timedelta(days=1)


@dataclass(frozen=True, kw_only=True)
class BackupRow:
    """One backup, as the desk shows it."""

    path: Path
    made: str
    place: str
    size: str


class BackupsPresenter(QObject):
    """Backs up on its schedule and by hand; a second folder gets a copy of each backup."""

    changed = Signal()
    """The backups, or what is said of one, changed."""

    def __init__(
        self,
        shop: ShopPresenter,
        store: Store,
        *,
        second_folder: str = "",
        keep_second_folder: Callable[[str], None] = lambda _: None,
        parent: QObject | None = None,
    ) -> None:
        super().__init__(parent)
        self._shop = shop
        self._store = store
        self._second = second_folder
        self._keep_second = keep_second_folder
        self._rows: tuple[BackupRow, ...] = ()
        self._acts = 0
        self._finals: dict[str, set[str]] = {}
        self._second_is_missing = False
        self._look: Look | None = None
        self._under_way = False
        # A share that does not answer must hold up nothing but the backups themselves.
        self.beside = Background(self)

    @property
    def is_idle(self) -> bool:
        """Whether nothing is being copied, listed or looked into."""
        return self.beside.is_idle

    def close(self) -> None:
        """Finish what is being copied, and end the thread."""
        self.beside.close()

    # -- the schedule

    def begin(self) -> None:
        """Back up from now on when it is due; first of all where the last is older than a day."""
        self._shop.writer.written.connect(self._count)
        self._shop.job_changed.connect(self._look_for_final)
        self._look_for_final()
        self.beside.run(
            lambda: backups_in(self._folder),
            words="looking for the last backup",
            done=self._back_up_if_stale,
            failed=self._not_read,
        )

    @property
    def _folder(self) -> Path:
        return self._store.path.parent / FOLDER_NAME

    def _back_up_if_stale(self, found: list[Path]) -> None:
        time = made_at(found[0]) if found else None
        if time is None or datetime.now(UTC) - time > _STALE:
            self.back_up()

    def _count(self) -> None:
        self._acts += 1
        if self._acts >= BACKED_UP_AFTER_ACTS:
            self.back_up()

    def _look_for_final(self) -> None:
        job = self._shop.job
        if job is None:
            return
        signed = {
            one.id
            for one in job.entries
            if isinstance(one, Signature) and one.place.kind == "final"
        }
        before = self._finals.setdefault(job.number, signed)
        self._finals[job.number] = signed
        if signed - before:
            self.back_up()

    # -- backing up

    def back_up(self) -> None:
        """Write a backup now, and copy it to the second folder."""
        if self._under_way:
            return
        self._under_way = True
        self._acts = 0
        act_id = str(uuid.uuid4())
        self._shop.writer.write(
            lambda: back_up(self._store, act_id=act_id),
            done=self._backed_up,
            refused=self._not_backed_up,
        )

    def _backed_up(self, backup: Backup) -> None:
        self._under_way = False
        self._acts = 0
        self.read()
        if self._second:
            self._copy(backup.path)

    def _not_backed_up(self, error: Exception) -> None:
        self._under_way = False
        self._not_read(error)

    def _copy(self, backup: Path) -> None:
        folder = Path(self._second)
        self.beside.run(
            lambda: copy_backup(backup, folder),
            words="copying the backup",
            done=self._copied,
            failed=self._not_copied,
        )

    def _copied(self, _path: Path) -> None:
        self._second_is_missing = False
        self.read()

    def _not_copied(self, error: Exception) -> None:
        if not isinstance(error, RecordError):
            raise error
        # A stick that is not there is told once, not at every backup.
        if not self._second_is_missing:
            self._second_is_missing = True
            self._shop.said.emit(Said(what=str(error)))
        self.changed.emit()

    # -- the second folder

    @property
    def second_folder(self) -> str:
        """Where each backup is copied to; nothing where nowhere."""
        return self._second

    def set_second_folder(self, folder: str) -> None:
        """Copy each backup to another folder from now on, the last one at once.

        Parameters
        ----------
        folder : str
            A folder on a stick or a share; nothing for none.
        """
        self._second = folder
        self._second_is_missing = False
        self._keep_second(folder)
        found = backups_in(self._folder)
        if folder and found:
            self._copy(found[0])
        self.read()

    # -- what is shown

    def read(self) -> None:
        """List the backups anew."""
        self.beside.run(
            self._list, words="listing the backups", done=self._have_rows, failed=self._not_read
        )

    def _list(self) -> tuple[BackupRow, ...]:
        places = [(self._folder, "beside the record")]
        if self._second:
            places.append((Path(self._second), self._second))
        found = [
            (path, place, path.stat().st_size)
            for folder, place in places
            for path in backups_in(folder)
        ]
        rows = [
            BackupRow(path=path, made=_made(path), place=place, size=f"{size / 1e6:.1f} MB")
            for path, place, size in found
        ]
        return tuple(sorted(rows, key=lambda row: row.path.name, reverse=True))

    def _have_rows(self, rows: tuple[BackupRow, ...]) -> None:
        self._rows = rows
        self.changed.emit()

    def _not_read(self, error: Exception) -> None:
        if not isinstance(error, RecordError | OSError):
            raise error
        self._shop.said.emit(Said(what=str(error)))

    @property
    def rows(self) -> tuple[BackupRow, ...]:
        """The backups, the newest first."""
        return self._rows

    @property
    def last_words(self) -> str:
        """When the last backup was made and where it is, in a sentence."""
        here = [row for row in self._rows if row.path.parent == self._folder]
        if not here:
            return "There is no backup yet."
        return f"Last backup {here[0].made}, in {self._folder}."

    @property
    def second_words(self) -> str:
        """What the second folder holds, in a sentence."""
        if not self._second:
            return "Backups lie on the same disk as the record. Choose a stick or a share as well."
        there = [row for row in self._rows if str(row.path.parent) == self._second]
        if self._second_is_missing or not there:
            return f"{self._second} holds no copy of the last backup: it could not be written."
        return f"Copied to {self._second}, the last of {there[0].made}."

    # -- going back

    @property
    def look(self) -> Look | None:
        """What was looked into last."""
        return self._look

    @property
    def look_words(self) -> str:
        """What the backup looked into holds, and what would be left behind."""
        return look_words(self._look) if self._look is not None else ""

    def look_into(self, row: BackupRow) -> None:
        """Look into a backup; nothing is changed.

        Parameters
        ----------
        row : BackupRow
            The backup.
        """
        folder = self._store.path.parent
        self.beside.run(
            lambda: look_into(row.path, folder),
            words=f"looking into {row.path.name}",
            done=self._have_look,
            failed=self._not_read,
        )

    def _have_look(self, look: Look) -> None:
        self._look = look
        self.changed.emit()

    def put_back(self) -> None:
        """Put the record back to the backup that was looked into."""
        if self._look is None:
            return
        backup, act_id = self._look.backup.path, str(uuid.uuid4())
        folder = self._store.path.parent
        self._shop.writer.write(
            lambda: restore(backup, folder, act_id=act_id),
            done=self._have_put_back,
            refused=self._not_read,
        )

    def _have_put_back(self, done: Restored) -> None:
        self._look = None
        kept = f"What stood there is kept as {done.set_aside.name}." if done.set_aside else ""
        self._shop.said.emit(
            Said(what=f"The record is what {done.look.backup.path.name} held.", way_out=kept)
        )
        self._shop.read_all_anew()
        self.read()


def _made(path: Path) -> str:
    time = made_at(path)
    return local_time(time.isoformat()) if time is not None else ""
