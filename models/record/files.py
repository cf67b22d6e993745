"""Pictures and documents beside the record: each a file named by the digest of its content.

The database keeps name, kind, size and digest; the content would make every backup grow without
end. A file is on the disk before the row that speaks of it.
"""

import hashlib
import os
import uuid
from collections.abc import Iterator
from contextlib import suppress
from pathlib import Path
from typing import NamedTuple

from sqlalchemy import select
from sqlalchemy.orm import Session

from models.record import tables
from models.record.act import BROUGHT_IN
from models.record.errors import RecordError
from models.record.making import sync_folder
from models.record.tables import table

__all__ = [
    "FOLDER",
    "AttachedFileError",
    "FileTrouble",
    "digest_of_bytes",
    "file_troubles",
    "is_whole",
    "keep_file",
    "read_file",
]

FOLDER = "files"
_PIECE = 1 << 20


class AttachedFileError(RecordError):
    """A file beside the record is not as it was attached."""


class FileTrouble(NamedTuple):
    """A file that is missing or changed: of which entry, and what is wrong.

    `never_came` says that it was never here: its job came from elsewhere without its files.
    """

    entry: str
    words: str
    never_came: bool = False


def digest_of_bytes(content: bytes) -> str:
    """Digest the content of a file: SHA-256, 64 hexadecimal digits."""
    return hashlib.sha256(content).hexdigest()


def keep_file(folder: Path, content: bytes) -> str:
    """Put content beside the record and give its digest; the same content again changes nothing.

    When this returns, the file and its name are on the disk, readable by its owner only.

    Raises
    ------
    AttachedFileError
        If the folder or the disk do not take it.
    """
    digest = digest_of_bytes(content)
    beside = folder / FOLDER
    path = beside / digest
    draft = beside / f".{digest}.new-{uuid.uuid4()}"
    try:
        beside.mkdir(mode=0o700, exist_ok=True)
        if is_whole(path, digest):
            return digest
        handle = os.open(draft, os.O_CREAT | os.O_EXCL | os.O_WRONLY, 0o600)
        with os.fdopen(handle, "wb") as stream:
            stream.write(content)
            stream.flush()
            os.fsync(stream.fileno())
        draft.replace(path)
        sync_folder(beside)
        sync_folder(folder)
    except OSError as problem:
        with suppress(OSError):
            draft.unlink(missing_ok=True)
        raise AttachedFileError(
            f"The file could not be put into {beside}: {problem.strerror or problem}. Nothing is "
            "attached; make room or mend the folder, then attach it again."
        ) from problem
    return digest


def read_file(folder: Path, digest: str, *, name: str) -> bytes:
    """Read a file beside the record, and look whether it is as it was attached.

    Raises
    ------
    AttachedFileError
        If it is missing, cannot be read or is changed; the message names it.
    """
    path = folder / FOLDER / digest
    try:
        content = path.read_bytes()
    except FileNotFoundError:
        raise AttachedFileError(
            f"“{name}” is missing: {path} is not there. Put it back from a backup."
        ) from None
    except OSError as problem:
        raise AttachedFileError(
            f"“{name}” cannot be read from {path}: {problem.strerror or problem}."
        ) from problem
    if digest_of_bytes(content) != digest:
        raise AttachedFileError(
            f"“{name}” is not as it was attached: {path} has been changed. Put it back from a "
            "backup."
        )
    return content


def file_troubles(session: Session, folder: Path, chain_id: str) -> Iterator[FileTrouble]:
    """Look at every file that a chain speaks of, and say which is missing or changed."""
    of, act = table(tables.Attachment), table(tables.Act)
    asked = (
        select(of.c.key, of.c.name, of.c.file_digest, act.c.kind)
        .outerjoin(act, (act.c.chain_id == of.c.chain_id) & (act.c.sequence == of.c.sequence))
        .where(of.c.chain_id == chain_id)
        .order_by(of.c.sequence, of.c.line)
    )
    for row in session.execute(asked).all():
        path = folder / FOLDER / row.file_digest
        named = f"the attached file “{row.name}”"
        if not path.is_file() and row.kind == BROUGHT_IN:
            words = f"{named} did not come with the job; it belongs at {FOLDER}/{row.file_digest}"
            yield FileTrouble(row.key, words, never_came=True)
        elif not path.is_file():
            yield FileTrouble(row.key, f"{named} is missing")
        elif not is_whole(path, row.file_digest):
            yield FileTrouble(row.key, f"{named} is changed")


def is_whole(path: Path, digest: str) -> bool:
    """Whether a file can be read and has this digest."""
    found = hashlib.sha256()
    try:
        with path.open("rb") as stream:
            while piece := stream.read(_PIECE):
                found.update(piece)
    except OSError:
        return False
    return found.hexdigest() == digest
