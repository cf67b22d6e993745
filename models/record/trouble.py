"""Turn what the database library reports into the sentences of `errors`."""

import sqlite3
from pathlib import Path

from sqlalchemy.exc import DBAPIError

from models.record.errors import (
    AlreadyReplacedError,
    DiskFaultError,
    DiskFullError,
    LockedRecordError,
    NotARecordError,
    ReadOnlyError,
    RecordError,
    RecordIsFinalError,
    TornRecordError,
)
from models.record.triggers import FINAL

__all__ = ["sentence_for"]


def sentence_for(error: BaseException, path: Path) -> RecordError | None:
    """Name the trouble behind an error of the database; None where it is a defect of ours."""
    original = error.orig if isinstance(error, DBAPIError) else error
    if not isinstance(original, sqlite3.Error):
        # A damaged schema text shows as undecodable text, not as a database error.
        return TornRecordError(path, "unreadable text") if _is_decoding(original) else None
    words = str(original)
    if FINAL in words:
        return RecordIsFinalError(words.split(f"{FINAL}: ", 1)[1])
    if isinstance(original, sqlite3.IntegrityError):
        replaced = words.startswith("UNIQUE") and ".supersedes" in words
        return AlreadyReplacedError() if replaced else None
    return _by_code(getattr(original, "sqlite_errorcode", 0) & 0xFF, words, path)


def _is_decoding(error: BaseException | None) -> bool:
    return isinstance(error, UnicodeDecodeError)


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
    if code == sqlite3.SQLITE_CORRUPT or "Could not decode" in words:
        return TornRecordError(path, words)
    return None
