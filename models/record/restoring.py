"""Put the record back to what a backup holds, after a look; what stood there is set aside.

Where today's file can still be read, the backup takes its place inside one transaction of the
database, so that a window which has it open sees either record whole. Where it cannot, it is
renamed, with its journal, and the backup gets its name. Nothing is deleted.
"""

import shutil
import sqlite3
import uuid
from collections.abc import Callable
from contextlib import closing, suppress
from dataclasses import dataclass
from pathlib import Path

from models.record import journal
from models.record.act import PROGRAM
from models.record.backup_files import bring, lacking
from models.record.backups import (
    Contents,
    contents_of,
    copy_whole,
    links_held,
    made_at,
    opened_copy,
)
from models.record.errors import (
    BackupMissingError,
    OtherShopError,
    RecordError,
    SchemaDiffersError,
    TornRecordError,
)
from models.record.heads_seen import add_restoration
from models.record.making import free_place, make_empty, put_in_place
from models.record.store import FILE_NAME, Store
from models.record.trouble import sentences
from models.record.verify import verify

__all__ = ["Look", "Lost", "Restored", "look_into", "put_back"]


@dataclass(frozen=True, kw_only=True)
class Lost:
    """Acts of one chain that today's record holds and the backup does not.

    `job` is its number, or nothing for the shop's own chain; `parted` says that the backup is no
    earlier state of the chain but another one.
    """

    job: str
    acts: int
    last_at: str
    is_whole_job: bool
    parted: bool


@dataclass(frozen=True, kw_only=True)
class Look:
    """What a backup holds, and what would be left behind by going back to it."""

    backup: Contents
    today: Contents | None
    # Why today's file cannot be read; nothing where it can, or where there is none.
    unreadable: str
    lost: tuple[Lost, ...]

    @property
    def is_other_shop(self) -> bool:
        """Whether backup and record are of two shops."""
        shops = {one.shop for one in (self.backup, self.today) if one is not None and one.shop}
        return len(shops) > 1

    @property
    def acts_left_behind(self) -> int:
        """How many acts of today's record the backup does not hold."""
        return sum(one.acts for one in self.lost)


@dataclass(frozen=True, kw_only=True)
class Restored:
    """The record was put back.

    `files_back` counts the attached files brought back, `files_lacking` those that lie neither
    beside the record nor beside the backup as they were attached.
    """

    look: Look
    set_aside: Path | None
    files_back: int = 0
    files_lacking: int = 0


def look_into(backup: Path, folder: Path) -> Look:
    """Look what a backup holds, and compare it with the record of a folder; changes nothing.

    Raises
    ------
    RecordError
        If the backup is none, or is damaged.
    """
    if not backup.is_file():
        raise BackupMissingError(backup)
    with sentences(backup):
        held = contents_of(backup, whole=True)
    path = folder / FILE_NAME
    if not path.exists():
        return Look(backup=held, today=None, unreadable="", lost=())
    try:
        with sentences(path):
            today = contents_of(path, live=True)
            heads = links_held(path, held.heads, live=True)
            ahead = links_held(backup, today.heads)
    except RecordError as trouble:
        return Look(backup=held, today=None, unreadable=str(trouble), lost=())
    lost = tuple(
        Lost(
            job=today.names[chain],
            acts=head.sequence - (held.heads[chain].sequence if heads.get(chain) else 0),
            last_at=today.last_at[chain],
            is_whole_job=chain not in held.heads,
            parted=chain in held.heads and not heads[chain],
        )
        for chain, head in today.heads.items()
        if held.heads.get(chain) != head and not ahead[chain]
    )
    return Look(
        backup=held,
        today=today,
        unreadable="",
        lost=tuple(sorted(lost, key=lambda one: one.job)),
    )


def put_back(backup: Path, folder: Path, *, act_id: str, now: Callable[[], str]) -> Restored:
    """Put the record of a folder back to a backup, and keep in it that this was done.

    Parameters
    ----------
    backup : Path
        The backup.
    folder : Path
        Folder of the record; the record may be open in this process or another.
    act_id : str
        A new id of the act; the same one again does nothing a second time.
    now : callable
        Gives the present as the record writes it.

    Raises
    ------
    RecordError
        If the backup is damaged, or the folder does not allow it; nothing is changed then.
    """
    look = look_into(backup, folder)
    path = folder / FILE_NAME
    if look.today is not None and _is_done(path, act_id):
        return Restored(look=look, set_aside=None)
    if look.is_other_shop:
        raise OtherShopError(backup, path)
    name = f"shop set aside {now()[:19].replace(':', '').replace('T', ' ')}"
    aside = free_place(folder, name) if path.exists() else None
    work = folder / f".restoring-{uuid.uuid4()}"
    try:
        with sentences(path):
            work.mkdir()
            # First the files, then the record that names them: as at attaching.
            back = bring(look.backup.files, source=backup.parent, target=folder)
            draft = _prepared(backup, work, look, aside=aside, act_id=act_id, now=now())
            if aside is not None:
                _set_aside(path, aside, readable=not look.unreadable)
            if path.exists():
                _replace_within(path, draft)
            else:
                put_in_place(draft, path)
    finally:
        with suppress(OSError):
            shutil.rmtree(work)
    return Restored(
        look=look,
        set_aside=aside,
        files_back=len(back),
        files_lacking=len(lacking(look.backup.files, folder)),
    )


def _is_done(path: Path, act_id: str) -> bool:
    with sentences(path), opened_copy(path, live=True) as raw:
        found = raw.execute("SELECT 1 FROM act WHERE act_id = ?", (act_id,)).fetchone()
    return found is not None


def _prepared(
    backup: Path, work: Path, look: Look, *, aside: Path | None, act_id: str, now: str
) -> Path:
    """Make the record that will stand there: the backup in today's form, with this act in it."""
    draft = work / FILE_NAME
    make_empty(draft)
    with (
        opened_copy(backup) as source,
        closing(sqlite3.connect(draft)) as target,
    ):
        copy_whole(source, target)
    time = made_at(backup)
    with Store.open(work, create=False, on_network=True) as store:
        with store.reading() as session:
            found = verify(session)
        if not found.is_whole:
            raise SchemaDiffersError(backup, tuple(one.words for one in found.troubles))
        with (
            store.writing() as session,
            journal.act(
                session,
                chain=journal.SHOP,
                kind="restored from a backup",
                by=PROGRAM,
                act_id=act_id,
                done_at=now,
            ) as act,
        ):
            add_restoration(
                act,
                backup_name=backup.name,
                backup_made_at=look.backup.last_act_at if time is None else time.isoformat(),
                set_aside=None if aside is None else aside.name,
                left_behind=look.acts_left_behind,
            )
    return draft


def _set_aside(path: Path, aside: Path, *, readable: bool) -> None:
    """Keep today's file under another name: a copy where it can be read, else the file itself."""
    if not readable:
        beside = path.with_name(f"{path.name}-journal")
        if beside.exists():
            beside.rename(aside.with_name(f"{aside.name}-journal"))
        path.rename(aside)
        return
    draft = path.with_name(f".{aside.name}.new-{uuid.uuid4()}")
    try:
        make_empty(draft)
        with (
            opened_copy(path, live=True) as source,
            closing(sqlite3.connect(draft)) as target,
        ):
            copy_whole(source, target)
        if contents_of(draft).heads != contents_of(path, live=True).heads:
            raise TornRecordError(draft, "the copy set aside is not what was copied")
        put_in_place(draft, aside)
    finally:
        with suppress(OSError):
            draft.unlink(missing_ok=True)


def _replace_within(path: Path, draft: Path) -> None:
    with (
        closing(sqlite3.connect(draft)) as source,
        opened_copy(path, live=True) as target,
    ):
        target.execute("PRAGMA synchronous = EXTRA")
        copy_whole(source, target)
