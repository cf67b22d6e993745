"""Turn what the database library reports into the sentences of `errors`."""

import errno
import os
import sqlite3
from collections.abc import Iterator
from contextlib import contextmanager
from pathlib import Path

from sqlalchemy.exc import DBAPIError

from models.record.errors import (
    AlreadyReplacedError,
    CommitUnknownError,
    DiskFaultError,
    DiskFullError,
    LockedRecordError,
    NotARecordError,
    ReadOnlyError,
    RecordError,
    RecordIsFinalError,
    RecordMovedError,
    TornRecordError,
)
from models.record.triggers import FINAL

__all__ = ["sentence_for", "sentences"]

_READ_ONLY = (errno.EACCES, errno.EPERM, errno.EROFS)
_NO_ROOM = (errno.ENOSPC, errno.EDQUOT, errno.EFBIG)
_GONE = (errno.ENOENT, errno.ENOTDIR, errno.ESTALE)

# The journal is removed, or is being removed: that is what makes an act count.
_AFTER_THE_COMMIT = (sqlite3.SQLITE_IOERR_DIR_FSYNC, sqlite3.SQLITE_IOERR_DELETE)


@contextmanager
def sentences(path: Path) -> Iterator[None]:
    """Say what goes wrong with a file of the record inside the block as one of `errors`."""
    try:
        yield
    except RecordError:
        raise
    except Exception as error:
        sentence = sentence_for(error, path)
        if sentence is None:
            raise
        raise sentence from error


def sentence_for(error: BaseException, path: Path) -> RecordError | None:
    """Name the trouble behind an error of database or disk; None where it is a defect of ours."""
    original = error.orig if isinstance(error, DBAPIError) else error
    if isinstance(original, OSError):
        return _by_number(original.errno, os.strerror(original.errno or 0), path)
    if not isinstance(original, sqlite3.Error):
        # A damaged schema text shows as undecodable text, not as a database error.
        return TornRecordError(path, "unreadable text") if _is_decoding(original) else None
    words = str(original)
    if FINAL in words:
        return RecordIsFinalError(words.split(f"{FINAL}: ", 1)[1])
    if isinstance(original, sqlite3.IntegrityError):
        replaced = words.startswith("UNIQUE") and ".supersedes" in words
        return AlreadyReplacedError() if replaced else None
    code = getattr(original, "sqlite_errorcode", 0)
    if code in _AFTER_THE_COMMIT:
        return CommitUnknownError(path, words)
    if code == sqlite3.SQLITE_READONLY_DBMOVED or (
        code & 0xFF == sqlite3.SQLITE_CANTOPEN and not path.exists()
    ):
        return RecordMovedError(path)
    if code & 0xFF == sqlite3.SQLITE_CANTOPEN and os.access(path.parent, os.W_OK):
        # The folder would take a file, the disk does not.
        return DiskFaultError(path, words)
    return _by_code(code & 0xFF, words, path)


def _is_decoding(error: BaseException | None) -> bool:
    return isinstance(error, UnicodeDecodeError)


def _by_number(number: int | None, words: str, path: Path) -> RecordError | None:
    if number in _READ_ONLY:
        return ReadOnlyError(path)
    if number in _NO_ROOM:
        return DiskFullError(path)
    if number in _GONE:
        return RecordMovedError(path)
    return DiskFaultError(path, words) if number == errno.EIO else None


def _by_code(code: int, words: str, path: Path) -> RecordError | None:
    if code in (sqlite3.SQLITE_BUSY, sqlite3.SQLITE_LOCKED):
        return LockedRecordError(path)
    if code == sqlite3.SQLITE_FULL:
        return DiskFullError(path)
    if code in (sqlite3.SQLITE_READONLY, sqlite3.SQLITE_CANTOPEN, sqlite3.SQLITE_PERM):
        return ReadOnlyError(path)
    if code == sqlite3.SQLITE_IOERR:
        return DiskFaultError(path, words)
    if code == sqlite3.SQLITE_NOTADB:
        return NotARecordError(path)
    # A length that no row of ours has is a torn one too.
    torn = code in (sqlite3.SQLITE_CORRUPT, sqlite3.SQLITE_TOOBIG)
    if torn or "Could not decode" in words:
        return TornRecordError(path, words)
    return None
