"""Attached files beside backups: each once, named by its digest, shared by every generation.

Nothing recorded vanishes, so a later backup names what an earlier one does; none is removed here.
"""

import hashlib
import os
import sqlite3
import uuid
from collections.abc import Iterable
from contextlib import suppress
from pathlib import Path

from models.record.files import FOLDER, is_whole
from models.record.making import sync_folder

__all__ = ["bring", "files_named", "lacking"]

_PIECE = 1 << 20


def files_named(raw: sqlite3.Connection) -> dict[str, str]:
    """Read which attached files a record names: the name by the digest.

    A record of a form that knew no attachments names none.
    """
    known = raw.execute(
        "SELECT 1 FROM sqlite_master WHERE type = 'table' AND name = 'attachment'"
    ).fetchone()
    if known is None:
        return {}
    return dict(raw.execute("SELECT file_digest, name FROM attachment ORDER BY file_digest"))


def lacking(digests: Iterable[str], folder: Path) -> list[str]:
    """List the digests whose file beside a record or a backup is missing or changed."""
    beside = folder / FOLDER
    return [one for one in digests if not is_whole(beside / one, one)]


def bring(digests: Iterable[str], *, source: Path, target: Path) -> list[str]:
    """Copy attached files that are missing or changed at the target; give what was copied.

    What is missing or changed at the source itself is left out. A changed file at the target is
    kept beside the good one under another name.

    Parameters
    ----------
    digests : iterable of str
        SHA-256 of each file, 64 hexadecimal digits.
    source, target : Path
        Folders of a record or of backups.

    Raises
    ------
    OSError
        If the target does not take a file; whatever was copied before stays.
    """
    beside = target / FOLDER
    copied = []
    for digest in lacking(digests, target):
        place = source / FOLDER / digest
        if not is_whole(place, digest):
            continue
        beside.mkdir(mode=0o700, exist_ok=True)
        _copy(place, beside / digest, digest)
        copied.append(digest)
    if copied:
        sync_folder(beside)
        sync_folder(target)
    return copied


def _copy(place: Path, path: Path, digest: str) -> None:
    draft = path.with_name(f".{digest}.new-{uuid.uuid4()}")
    try:
        handle = os.open(draft, os.O_CREAT | os.O_EXCL | os.O_WRONLY, 0o600)
        found = hashlib.sha256()
        with os.fdopen(handle, "wb") as target, place.open("rb") as source:
            while piece := source.read(_PIECE):
                found.update(piece)
                target.write(piece)
            target.flush()
            os.fsync(target.fileno())
        if found.hexdigest() != digest or not is_whole(draft, digest):
            raise OSError(None, f"the copy of {place.name[:16]}… is not what was copied")
        if path.exists():
            path.rename(path.with_name(f"{digest}.changed-{uuid.uuid4()}"))
        draft.replace(path)
    finally:
        with suppress(OSError):
            draft.unlink(missing_ok=True)
