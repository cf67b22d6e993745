"""What `backup` and `restore` say: what was written, what a backup holds, what would be lost."""

import uuid
from datetime import datetime
from pathlib import Path

from models.acts.backups import back_up, restore
from models.record.backups import Backup, Contents, made_at
from models.record.restoring import Look, Lost, look_into
from models.record.store import Store

__all__ = ["backed_up", "counted", "local_time", "look_words", "looked_into", "put_back"]


def local_time(written: str) -> str:
    """Write a time of the record as a person reads it here: day and time of day.

    Parameters
    ----------
    written : str
        ISO 8601, in UTC or with offset.

    Returns
    -------
    str
        As "2026-12-01 11:30"; nothing for nothing.
    """
    if not written:
        return ""
    return datetime.fromisoformat(written).astimezone().strftime("%Y-%m-%d %H:%M")


def backed_up(folder: Path, *, to: Path | None) -> str:
    """Write a backup of a shop's record and say where it is.

    Raises
    ------
    RecordError
        If the record cannot be opened, or the backup not written.
    """
    with Store.open(folder, create=False, on_network=True) as store:
        backup = back_up(store, act_id=str(uuid.uuid4()), folder=to)
        size = backup.path.stat().st_size
    return (
        f"Backup written and compared with the record: {backup.path} "
        f"({size / 1e6:.1f} MB, {len(backup.heads)} chains).{_files_words(backup)}"
    )


def _files_words(backup: Backup) -> str:
    words = f" {counted(backup.files, 'attached file')} beside it, each as attached."
    if not backup.files_lacking:
        return words if backup.files else ""
    lack = counted(backup.files_lacking, "attached file")
    return f"{words} {lack} not as attached beside the record: `thirdjournal verify` names each."


def counted(number: int, what: str) -> str:
    """Count things in words, as "1 backup", "3 backups"."""
    return f"{number} {what}" if number == 1 else f"{number} {what}s"


def looked_into(backup: Path, folder: Path) -> str:
    """Say what a backup holds and what going back to it would leave behind; changes nothing."""
    return look_words(look_into(backup, folder))


def put_back(backup: Path, folder: Path) -> str:
    """Put the record of a folder back to a backup, and say what became of the present one."""
    done = restore(backup, folder, act_id=str(uuid.uuid4()))
    lines = [look_words(done.look), f"The record of {folder} now is what {backup.name} held."]
    if done.files_back:
        lines.append(f"{counted(done.files_back, 'attached file')} brought back.")
    if done.files_lacking:
        lack = counted(done.files_lacking, "attached file")
        lines.append(f"{lack} lie neither here nor beside the backup as attached.")
    if done.set_aside is not None:
        lines.append(f"What stood there is kept as {done.set_aside}.")
    return "\n".join(lines)


def look_words(look: Look) -> str:
    """Say in lines what a backup holds, and what would be left behind.

    Parameters
    ----------
    look : Look
        The look into the backup.

    Returns
    -------
    str
        A few lines.
    """
    lines = [_held(look.backup)]
    if look.unreadable:
        lines.append(f"Today's record cannot be compared: {look.unreadable}")
    elif look.today is None:
        lines.append("There is no record in the folder; nothing would be left behind.")
    elif not look.lost:
        lines.append("Nothing recorded today is missing in it.")
    else:
        lines.append("Today's record holds what this backup does not; it would be left behind:")
        lines += [f"  {_left(one)}" for one in look.lost]
    return "\n".join(lines)


def _held(contents: Contents) -> str:
    time = made_at(contents.path)
    dated = f", made {local_time(time.isoformat())}" if time is not None else ""
    jobs = ", ".join(contents.jobs) or "none"
    last = local_time(contents.last_act_at) or "never"
    return f"{contents.path.name}{dated}: jobs {jobs}; last act {last}."


def _left(lost: Lost) -> str:
    name = f"job {lost.job}" if lost.job else "the shop's own chain"
    acts = "1 act" if lost.acts == 1 else f"{lost.acts} acts"
    words = f"{name}: {acts}, the last of {local_time(lost.last_at)}"
    if lost.is_whole_job:
        return f"{words} – all of it"
    return f"{words} – the backup holds another chain under this name" if lost.parted else words
