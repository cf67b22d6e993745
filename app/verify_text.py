"""What `verify` says: whether the record holds, and what does not, in words."""

from collections.abc import Callable
from dataclasses import dataclass
from pathlib import Path

from app.backup_text import counted
from models.acts.carrying import look_at
from models.job import Head
from models.jobfile import JobFileError, chain_of
from models.record.backup_check import compared_with_backups
from models.record.backups import FOLDER_NAME
from models.record.carried import CarriedError
from models.record.store import Store
from models.record.verify import verify

__all__ = ["Verified", "head_from", "verified", "verified_file"]


@dataclass(frozen=True)
class Verified:
    """The words of a verification, and whether everything held."""

    words: str
    is_whole: bool


def head_from(text: str) -> Head:
    """Read a head as a traveler prints it: sequence, a colon, the digest or how it begins.

    Raises
    ------
    ValueError
        If it is not of that form.
    """
    sequence, _, digest = text.partition(":")
    plain = "".join(digest.split()).lower()
    if not sequence.isdigit() or len(plain) < 16 or set(plain) - set("0123456789abcdef"):
        raise ValueError(f"“{text}” is no head; write it as 291:9c417e02b58d1fa6")
    return Head(sequence=int(sequence), digest=plain)


def verified(
    folder: Path,
    *,
    job: str | None,
    head: Head | None,
    progress: Callable[[int, int], None] = lambda _done, _of: None,
) -> Verified:
    """Recompute every link of a shop's record from its rows, and say what does not hold."""
    with Store.open(folder, create=False, on_network=True) as store, store.reading() as session:
        found = verify(session, number=job, expected=head, progress=progress)
        beside = compared_with_backups(session, (folder / FOLDER_NAME,))
    troubles = (*found.troubles, *found.file_troubles, *beside.troubles)
    lines = [trouble.words for trouble in troubles]
    whole = "holds: every link agrees with its rows"
    lines.append(f"{found.acts} acts: the record {'does not hold' if lines else whole}.")
    lines += [one.words for one in found.files_not_here]
    lines += (*beside.notices, *beside.lacking)
    if beside.backups:
        lines.append(
            f"Compared with {counted(beside.backups, 'backup')}; beside them "
            f"{counted(beside.files, 'attached file')} whole."
        )
    lines += [
        f"  {name}: {one.sequence} {one.digest[:16]}…" for name, one in sorted(found.heads.items())
    ]
    lines.append(
        "Whoever holds the file and rewrites all of it can make a record that holds; compare these "
        "heads with those printed on travelers already given out."
    )
    return Verified("\n".join(lines), not troubles)


def verified_file(path: Path, *, head: Head | None) -> Verified:
    """Recompute the chain that a job file carries, and say what does not hold.

    Raises
    ------
    OSError
        If the file cannot be read.
    """
    try:
        looked = look_at(path.read_bytes())
    except (CarriedError, JobFileError) as trouble:
        return Verified(f"{path.name}: {trouble}", False)
    found = looked.laid.head
    lines = [trouble.words for trouble in looked.troubles]
    if head is not None:
        lines += _compared(path, head)
    whole = "holds: every link agrees with its rows, and the job with both"
    lines.append(
        f"job {looked.laid.number}, {looked.laid.new_acts} acts: the file "
        f"{'does not hold' if lines else whole}."
    )
    is_whole = len(lines) == 1
    lines.append(f"  head {found.sequence}:{found.digest}")
    return Verified("\n".join(lines), is_whole)


def _compared(path: Path, head: Head) -> list[str]:
    for link in chain_of(path.read_bytes()):
        if link.act["sequence"] == head.sequence:
            same = str(link.act["digest"]).startswith(head.digest)
            return [] if same else [f"act {head.sequence} is not the one whose head was kept"]
    return [f"act {head.sequence}, whose head was kept, is not in the file"]
