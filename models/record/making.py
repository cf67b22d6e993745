"""A new record, made beside its place and put there whole, or not at all."""

import os
import uuid
from contextlib import suppress
from itertools import chain, count
from pathlib import Path

from models.record.connections import engine_for
from models.record.migrations import bring_up_to_date
from models.record.tables import CHANGEABLE
from models.record.trouble import sentences

__all__ = ["free_place", "make_empty", "make_record", "put_in_place", "sync_folder"]


def make_record(path: Path) -> None:
    """Make a new record; if another window has made one in the meantime, that one stays.

    Raises
    ------
    RecordError
        If folder or disk do not allow it; nothing is left at its place then.
    """
    draft = path.with_name(f".{path.name}.new-{uuid.uuid4()}")
    with sentences(path):
        try:
            make_empty(draft)
            engine = engine_for(draft, writing=True)
            try:
                with engine.connect() as connection, connection.begin():
                    bring_up_to_date(connection, changeable=CHANGEABLE)
            finally:
                engine.dispose()
            put_in_place(draft, path)
        finally:
            # What could not be made says why; that its draft stays is no second trouble.
            with suppress(OSError):
                draft.unlink(missing_ok=True)


def make_empty(path: Path) -> None:
    """Make an empty file that only its owner may read."""
    os.close(os.open(path, os.O_CREAT | os.O_EXCL | os.O_WRONLY, 0o600))


def put_in_place(draft: Path, path: Path) -> None:
    """Give a finished file its name, unless another file has it."""
    try:
        # Unlike a rename, a link never takes the place of a file that another window has made
        # in the meantime.
        os.link(draft, path)
    except FileExistsError:
        return
    except OSError:
        if not path.exists():
            draft.rename(path)
    sync_folder(path.parent)


def free_place(folder: Path, name: str) -> Path:
    """Find a name for a kept record that no other file has: the name itself, or with a number."""
    numbered = (f"{name}, {number}" for number in count(2))
    return next(
        place
        for one in chain([name], numbered)
        if not (place := folder / f"{one}.thirdjournal").exists()
    )


def sync_folder(folder: Path) -> None:
    """Have the names in a folder on the disk, where the system can be asked to."""
    if os.name != "posix":
        return
    opened = os.open(folder, os.O_RDONLY)
    try:
        os.fsync(opened)
    finally:
        os.close(opened)
