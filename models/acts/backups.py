"""Backing the record up, and putting it back; each leaves its trace in the shop's chain."""

from datetime import datetime
from pathlib import Path

from models.record import journal
from models.record.act import PROGRAM
from models.record.backups import FOLDER_NAME, Backup, keep_generations, write_backup
from models.record.heads_seen import add_heads_seen
from models.record.restoring import Restored, put_back
from models.record.store import Store

__all__ = ["back_up", "restore"]


def back_up(store: Store, *, act_id: str, folder: Path | None = None) -> Backup:
    """Write a backup, keep in the shop's chain which heads it holds, and end old generations.

    Parameters
    ----------
    store : Store
        The open record.
    act_id : str
        A new id of the act; the same one again notes nothing a second time.
    folder : Path or None
        Where backups are kept; beside the record if absent. Old generations end there alone.

    Returns
    -------
    Backup
        What was written and compared with the record.

    Raises
    ------
    BackupError
        If it could not be written; the record is as it was.
    """
    kept = folder if folder is not None else store.path.parent / FOLDER_NAME
    backup = write_backup(store, kept)
    with (
        store.writing() as session,
        journal.act(
            session,
            chain=journal.SHOP,
            kind="backed up",
            by=PROGRAM,
            act_id=act_id,
            done_at=backup.made_at.isoformat(timespec="seconds"),
        ) as act,
    ):
        add_heads_seen(act, backup_name=backup.path.name, heads=backup.heads)
    keep_generations(kept, of=act.chain_id)
    return backup


def restore(backup: Path, folder: Path, *, act_id: str) -> Restored:
    """Put the record of a folder back to a backup; what stood there is set aside.

    Raises
    ------
    RecordError
        If the backup is damaged, or the folder does not allow it; nothing is changed then.
    """
    return put_back(
        backup,
        folder,
        act_id=act_id,
        now=lambda: datetime.now().astimezone().isoformat(timespec="seconds"),
    )
