"""Compare a record with its backups: a file that was rolled back lacks links that they hold."""

from dataclasses import dataclass
from pathlib import Path

from sqlalchemy import select
from sqlalchemy.orm import Session

from models.job import Head
from models.record import tables
from models.record.backup_files import lacking
from models.record.backups import Contents, backups_in, contents_of, links_held
from models.record.chain_check import Trouble
from models.record.errors import RecordError
from models.record.tables import table

__all__ = ["Compared", "compared_with_backups"]


@dataclass(frozen=True, kw_only=True)
class Compared:
    """What the backups of some folders say: what does not hold, and what is only to be known.

    `files` counts the attached files beside them that are whole, each once in a folder;
    `lacking` says which are not.
    """

    troubles: tuple[Trouble, ...]
    notices: tuple[str, ...]
    backups: int
    files: int = 0
    lacking: tuple[str, ...] = ()


def compared_with_backups(session: Session, folders: tuple[Path, ...]) -> Compared:
    """Demand that the record holds every link at which one of its backups ends.

    Acts that a restoring left behind are told, and are no trouble: it is on the record itself.
    """
    troubles: list[Trouble] = []
    notices: list[str] = []
    count = 0
    restored = _restorations(session)
    named: dict[Path, dict[str, str]] = {folder: {} for folder in folders}
    for path in (path for folder in folders for path in backups_in(folder)):
        try:
            contents = contents_of(path)
        except RecordError as trouble:
            notices.append(f"backup {path.name} is of no use: {trouble}")
            continue
        count += 1
        named[path.parent].update(contents.files)
        told = _missing(session, contents)
        # A restoring that the backup itself holds came before it, and explains nothing.
        later = [one for one in restored if not links_held(path, {one.chain: one.link})[one.chain]]
        if told and later:
            at, name = later[0].at, later[0].backup_name
            notices.append(
                f"backup {path.name} holds acts that were left behind on {at[:10]}, when the "
                f"record was put back to {name}"
            )
        else:
            troubles += told
    whole = 0
    lacks: list[str] = []
    for folder, files in named.items():
        missing = lacking(files, folder)
        whole += len(files) - len(missing)
        lacks += [
            f"the attached file “{files[digest]}” is missing or changed beside the backups in "
            f"{folder}; the next backup puts it there if the record still has it"
            for digest in missing
        ]
    return Compared(
        troubles=tuple(troubles),
        notices=tuple(notices),
        backups=count,
        files=whole,
        lacking=tuple(lacks),
    )


@dataclass(frozen=True, kw_only=True)
class _Restoring:
    chain: str
    link: Head
    at: str
    backup_name: str


def _restorations(session: Session) -> list[_Restoring]:
    act, of = table(tables.Act), table(tables.Restoration)
    rows = session.execute(
        select(act.c.chain_id, act.c.sequence, act.c.digest, act.c.entered_at_utc, of.c.backup_name)
        .join(of, (of.c.chain_id == act.c.chain_id) & (of.c.sequence == act.c.sequence))
        .order_by(act.c.sequence)
    )
    return [
        _Restoring(
            chain=row.chain_id,
            link=Head(sequence=row.sequence, digest=row.digest),
            at=row.entered_at_utc,
            backup_name=row.backup_name,
        )
        for row in rows
    ]


def _missing(session: Session, contents: Contents) -> list[Trouble]:
    act = table(tables.Act)
    told = []
    for chain, head in contents.heads.items():
        found = session.execute(
            select(act.c.digest).where(act.c.chain_id == chain, act.c.sequence == head.sequence)
        ).scalar_one_or_none()
        if found == head.digest:
            continue
        what = "was cut off" if found is None else "the chain was written anew"
        told.append(
            Trouble(
                job=contents.names[chain] or "the shop",
                sequence=head.sequence,
                table="act",
                what=f"{what}: backup {contents.path.name} holds another link here"
                if found is not None
                else f"{what}: backup {contents.path.name} ends there",
            )
        )
    return told
