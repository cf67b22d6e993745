"""What `verify` says: whether the record holds, and what does not, in words."""

from dataclasses import dataclass
from pathlib import Path

from models.job import Head
from models.record.backup_check import compared_with_backups
from models.record.backups import FOLDER_NAME
from models.record.store import Store
from models.record.verify import verify

__all__ = ["Verified", "head_from", "verified"]


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


def verified(folder: Path, *, job: str | None, head: Head | None) -> Verified:
    """Recompute every link of a shop's record from its rows, and say what does not hold."""
    with Store.open(folder, create=False) as store, store.reading() as session:
        found = verify(session, number=job, expected=head)
        beside = compared_with_backups(session, (folder / FOLDER_NAME,))
    troubles = (*found.troubles, *beside.troubles)
    lines = [trouble.words for trouble in troubles]
    whole = "holds: every link agrees with its rows"
    lines.append(f"{found.acts} acts: the record {'does not hold' if lines else whole}.")
    lines += beside.notices
    lines += [
        f"  {name}: {one.sequence} {one.digest[:16]}…" for name, one in sorted(found.heads.items())
    ]
    lines.append(
        "Whoever holds the file and rewrites all of it can make a record that holds; compare these "
        "heads with those printed on travelers already given out."
    )
    return Verified("\n".join(lines), not troubles)
