"""Trouble with the record, each a sentence that says what happened and the way out."""

from pathlib import Path

from models.record.folders import network_words

__all__ = [
    "ActDiffersError",
    "AlreadyReplacedError",
    "BackupMissingError",
    "CommitUnknownError",
    "DiskFaultError",
    "DiskFullError",
    "EmptyFileError",
    "FolderMissingError",
    "FromElsewhereError",
    "HeadMovedError",
    "JobKnownError",
    "LockedRecordError",
    "NetworkFolderError",
    "NewerRecordError",
    "NotARecordError",
    "OtherShopError",
    "PredecessorNotSettledError",
    "ReadOnlyError",
    "ReasonMissingError",
    "RecordError",
    "RecordIsFinalError",
    "RecordMissingError",
    "RecordMovedError",
    "SchemaDiffersError",
    "SurveyClosedError",
    "TornRecordError",
    "UnfitEntryError",
    "UnknownEntryError",
    "UnknownJobError",
    "UnknownPersonError",
    "UnsafeSettingError",
]


class RecordError(Exception):
    """Something keeps the record from being opened, read or written."""


class FolderMissingError(RecordError):
    """The folder that should hold the record is not there."""

    def __init__(self, folder: Path) -> None:
        super().__init__(f"The folder {folder} does not exist. Create it, or choose another.")


class RecordMissingError(RecordError):
    """The folder holds no record, and none was to be made."""

    def __init__(self, path: Path) -> None:
        super().__init__(
            f"There is no record at {path}. Choose the folder that holds it, or start a new one."
        )


class RecordMovedError(RecordError):
    """The file was taken away while it was open."""

    def __init__(self, path: Path) -> None:
        super().__init__(
            f"{path} is no longer where it was opened: it, or its folder, was moved or removed. "
            "Nothing of this act was recorded; put it back where it was, and try again."
        )


class BackupMissingError(RecordError):
    """There is no backup at the place named."""

    def __init__(self, path: Path) -> None:
        super().__init__(
            f"There is no backup at {path}. Choose one of those in the folder “backups” beside "
            "the record, or on the stick where they are kept."
        )


class OtherShopError(RecordError):
    """A backup of one shop was to take the place of another's record."""

    def __init__(self, backup: Path, path: Path) -> None:
        super().__init__(
            f"{backup} holds the record of another shop than {path}. Nothing was changed; choose a "
            "backup of this shop, or an empty folder to put that one into."
        )


class ReadOnlyError(RecordError):
    """The file or its folder cannot be written."""

    def __init__(self, path: Path) -> None:
        super().__init__(
            f"{path} or its folder may only be read, so nothing can be recorded. "
            "Ask whoever owns the folder for the right to write, or work in another folder."
        )


class NotARecordError(RecordError):
    """The file was made by something else."""

    def __init__(self, path: Path) -> None:
        super().__init__(
            f"{path} is no record of this program. Move it away, or choose another folder."
        )


class NetworkFolderError(RecordError):
    """The folder lies on a network, and nobody said to go on."""

    def __init__(self, folder: Path, kind: str) -> None:
        self.folder = folder
        self.kind = kind
        super().__init__(network_words(folder, kind))


class EmptyFileError(RecordError):
    """The file is there but holds nothing."""

    def __init__(self, path: Path) -> None:
        super().__init__(
            f"{path} is empty. If it held a record, put the last backup in its place; "
            "if not, delete it and open the folder again."
        )


class NewerRecordError(RecordError):
    """The file was written by a newer program."""

    def __init__(self, path: Path, found: int, known: int) -> None:
        self.found = found
        self.known = known
        super().__init__(
            f"{path} has form {found}; this program knows forms up to {known}. "
            "Open it with the newer program that wrote it."
        )


class TornRecordError(RecordError):
    """The file is damaged."""

    def __init__(self, path: Path, found: str) -> None:
        super().__init__(
            f"{path} is damaged ({found}). Keep it as it is, put the last verified backup in its "
            "place, and enter again what came after that backup."
        )


class LockedRecordError(RecordError):
    """Another program holds the file."""

    def __init__(self, path: Path) -> None:
        super().__init__(
            f"{path} is in use by another window or program and did not become free in time. "
            "Nothing was recorded; close the other one, or try again."
        )


class DiskFullError(RecordError):
    """There is no room left for what should be recorded."""

    def __init__(self, path: Path) -> None:
        super().__init__(
            f"The disk that holds {path} is full. Nothing of this act was recorded; "
            "make room and enter it again."
        )


class DiskFaultError(RecordError):
    """The disk refused to read or write."""

    def __init__(self, path: Path, found: str) -> None:
        super().__init__(
            f"The disk that holds {path} reported a fault ({found}). Nothing of this act was "
            "recorded; check the disk and its cable, then open the record again."
        )


class CommitUnknownError(DiskFaultError):
    """The disk failed at the very end of an act, which may be in the record or not."""

    def __init__(self, path: Path, found: str) -> None:
        RecordError.__init__(
            self,
            f"The disk that holds {path} reported a fault ({found}) at the last moment: this act "
            "may be in the record or not. Check the disk and its cable, then try again: what is "
            "there already is not recorded a second time.",
        )


class SchemaDiffersError(RecordError):
    """Tables or triggers are not those that the program made."""

    def __init__(self, path: Path, differences: tuple[str, ...]) -> None:
        self.differences = differences
        super().__init__(
            f"{path} was changed by something else: {'; '.join(differences)}. "
            "Keep it as evidence and put the last verified backup in its place."
        )


class UnsafeSettingError(RecordError):
    """The database library refused a setting that the record relies on."""

    def __init__(self, setting: str, wanted: str, found: str) -> None:
        super().__init__(
            f"The database library keeps {setting} at {found} where {wanted} is needed, so the "
            "record would not be safe. Install the program's own Python environment again."
        )


class FromElsewhereError(RecordError):
    """The job goes on in another record."""

    def __init__(self, number: str) -> None:
        super().__init__(
            f"Job {number} came here with its chain from another record and is kept to be read and "
            "checked. Work on it goes on in the record where it began."
        )


class HeadMovedError(RecordError):
    """Somebody else recorded something since the job was read."""

    def __init__(self, expected: int, found: int) -> None:
        self.expected = expected
        self.found = found
        super().__init__(
            f"The job has moved on from act {expected} to act {found} since it was read. "
            "Nothing was recorded; read the job again and repeat the entry if it still holds."
        )


class PredecessorNotSettledError(RecordError):
    """An attempt may not start yet."""

    def __init__(self, step: str, open_step: str, open_attempt: int | None) -> None:
        self.step = step
        self.open_step = open_step
        self.open_attempt = open_attempt
        what = "no attempt" if open_attempt is None else f"attempt {open_attempt}, not settled"
        super().__init__(
            f"An attempt at step {step} cannot start: step {open_step} has {what}. "
            "Settle it first, or record the attempt as out of order with a reason."
        )


class UnknownPersonError(RecordError):
    """An act names somebody whom the record does not know."""

    def __init__(self, keys: tuple[str, ...]) -> None:
        self.keys = keys
        super().__init__(
            f"The record does not know {', '.join(keys)}. Add them to the people first."
        )


class UnknownJobError(RecordError):
    """No job has this number."""

    def __init__(self, number: str) -> None:
        super().__init__(f"The record holds no job {number}. Look for it on the shelf of jobs.")


class JobKnownError(RecordError):
    """A job of this number is already there."""

    def __init__(self, number: str) -> None:
        super().__init__(f"The record already holds a job {number}. Open that one.")


class UnknownEntryError(RecordError):
    """No such entry, or one that takes no such reading."""

    def __init__(self, entry_id: str, why: str) -> None:
        super().__init__(f"Entry {entry_id}: {why}. Read the job again and choose the entry anew.")


class UnfitEntryError(RecordError):
    """An entry holds something that the record has no place for."""

    def __init__(self, entry_id: str, why: str) -> None:
        super().__init__(f"Entry {entry_id} cannot be recorded: {why}. Correct it first.")


class SurveyClosedError(RecordError):
    """A closed survey takes no new places."""

    def __init__(self, entry_id: str) -> None:
        super().__init__(
            f"Survey {entry_id} is closed. Correct one of its readings with a reason, "
            "or open a new survey."
        )


class ReasonMissingError(RecordError):
    """A reading that is not the last one was to be replaced without a reason."""

    def __init__(self, place: tuple[str, ...]) -> None:
        super().__init__(
            f"There is already a reading at {', '.join(place)}, and others after it. "
            "Say why it is replaced."
        )


class AlreadyReplacedError(RecordError):
    """A row was to be replaced a second time."""

    def __init__(self) -> None:
        super().__init__(
            "What should be replaced has been replaced before. Correct the correction instead."
        )


class RecordIsFinalError(RecordError):
    """Something tried to change what is recorded."""

    def __init__(self, words: str) -> None:
        super().__init__(f"Nothing recorded changes: {words}. Record a correction instead.")


class ActDiffersError(RecordError):
    """An act of the same id was recorded with something else in it."""

    def __init__(self, act_id: str) -> None:
        super().__init__(
            f"Act {act_id} is in the record already, as something else. "
            "Read the job again and repeat the entry if it is missing."
        )
