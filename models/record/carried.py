"""A job's chain carried elsewhere: taken out of a record with every row, and laid down as it was.

What is laid keeps its chain, its keys and its digests, so that whoever has both records can compare
them act by act. It is only to be read there: work goes on where the chain began.
"""

import hashlib
from collections.abc import Sequence
from dataclasses import dataclass

from sqlalchemy import insert, select
from sqlalchemy.orm import Session

from models.job import Head
from models.jobfile.chain import Link
from models.record import tables
from models.record.act import Act
from models.record.canonical import FIRST_PREVIOUS, UnfitValueError
from models.record.entry_rows import Line, new_key
from models.record.errors import RecordError
from models.record.links import digest_of, filled
from models.record.lookups import chain_of_job, head_of
from models.record.tables import CHANGEABLE, Base, recorded_tables, table

__all__ = ["CarriedError", "Laid", "carried", "is_from_elsewhere", "lay", "note_taken_in"]


class CarriedError(RecordError):
    """A carried chain that does not hold, or does not fit what the record has of it."""


@dataclass(frozen=True)
class Laid:
    """What was laid: the chain, its job's number, its head, and how many acts were new."""

    chain_id: str
    number: str
    head: Head
    new_acts: int


def carried(session: Session, number: str) -> tuple[Link, ...]:
    """Take a job's chain out of a record, act by act with all its rows."""
    chain_id = chain_of_job(session, number)
    if chain_id is None:
        return ()
    rows: dict[int, list[tuple[int, str, dict[str, str | int]]]] = {}
    for of in recorded_tables():
        for row in session.execute(select(of).where(of.c.chain_id == chain_id)).mappings():
            cells = {name: cell for name, cell in filled(row).items() if cell is not None}
            rows.setdefault(row["sequence"], []).append((row["line"], of.name, cells))
    act = table(tables.Act)
    asked = select(act).where(act.c.chain_id == chain_id).order_by(act.c.sequence)
    return tuple(
        Link(
            act={name: cell for name, cell in filled(one).items() if cell is not None},
            rows=tuple((name, cells) for _, name, cells in sorted(rows.get(one["sequence"], ()))),
        )
        for one in session.execute(asked).mappings()
    )


def lay(session: Session, links: Sequence[Link]) -> Laid:
    """Lay a carried chain down; acts that are there already are compared and left.

    Raises
    ------
    CarriedError
        If a digest does not fit its rows, the acts do not follow each other, the chain differs from
        what the record has of it, a row is of a table that this program does not know, or another
        job of the record has its number.
    """
    if not links:
        raise CarriedError("The file carries no chain. Bring it in as a job without one.")
    _refuse_unlinked(links)
    chain_id = str(links[0].act["chain_id"])
    number = _number(links)
    there = _acts_there(session, chain_id)
    holder = chain_of_job(session, number)
    if holder is not None and holder != chain_id:
        raise CarriedError(
            f"The record holds another job {number}, with a chain of its own. Keep this file "
            "beside it; two jobs of one number cannot stand in one record."
        )
    for link in links:
        sequence = _whole(link, "sequence")
        if there.get(sequence, link.act["digest"]) != link.act["digest"]:
            raise CarriedError(
                f"Job {number}: from act {sequence} on the file tells another story than the "
                "record. One of the two was changed after they parted; compare them with heads on "
                "paper."
            )
    new = [link for link in links if _whole(link, "sequence") not in there]
    for link in new:
        _lay_one(session, link)
    head = head_of(session, chain_id)
    assert head is not None
    return Laid(chain_id, number, head, len(new))


def note_taken_in(act: Act, laid: Laid, *, data: bytes) -> None:
    """Note in the shop's chain which chain came in, up to which act, from which file."""
    act.put(
        Line(
            tables.TakenIn,
            {
                "key": new_key(),
                "job_chain_id": laid.chain_id,
                "job_number": laid.number,
                "head_sequence": laid.head.sequence,
                "head_digest": laid.head.digest,
                "file_digest": hashlib.sha256(data).hexdigest(),
            },
        )
    )


def is_from_elsewhere(session: Session, chain_id: str) -> bool:
    """Say whether a chain was laid here from a file, and so goes on elsewhere."""
    taken = table(tables.TakenIn)
    asked = select(taken.c.key).where(taken.c.job_chain_id == chain_id).limit(1)
    return session.execute(asked).first() is not None


def _refuse_unlinked(links: Sequence[Link]) -> None:
    previous, chain_id = FIRST_PREVIOUS, links[0].act.get("chain_id")
    for expected, link in enumerate(links, start=1):
        act = link.act
        where = f"act {act.get('sequence', '?')}"
        try:
            digest = digest_of(act, link.rows)
        except (UnfitValueError, KeyError, ValueError, TypeError) as error:
            raise CarriedError(f"The file's chain does not hold at {where}: {error}.") from error
        followed = (act.get("sequence"), act.get("previous_digest")) == (expected, previous)
        if digest != act.get("digest") or not followed or act.get("chain_id") != chain_id:
            raise CarriedError(
                f"The file's chain does not hold at {where}: a row or the act itself was changed, "
                "removed or added. Ask for the file anew, from the record it came from."
            )
        for name, cells in link.rows:
            if (cells.get("chain_id"), cells.get("sequence")) != (chain_id, expected):
                raise CarriedError(f"The file's chain does not hold at {where}: a row of {name} "
                                   "belongs elsewhere.")  # fmt: skip
        previous = digest


def _number(links: Sequence[Link]) -> str:
    for link in links:
        for name, cells in link.rows:
            if name == "job":
                return str(cells["number"])
    raise CarriedError("The file's chain opens no job.")


def _acts_there(session: Session, chain_id: str) -> dict[int, str]:
    act = table(tables.Act)
    asked = select(act.c.sequence, act.c.digest).where(act.c.chain_id == chain_id)
    return {row.sequence: row.digest for row in session.execute(asked)}


def _whole(link: Link, name: str) -> int:
    return int(link.act[name])


def _lay_one(session: Session, link: Link) -> None:
    known = {of.name: of for of in Base.metadata.tables.values() if of.name not in CHANGEABLE}
    for name, cells in link.rows:
        of = known.get(name)
        strange = {name} if of is None else cells.keys() - of.c.keys()
        if of is None or strange or name == "act":
            raise CarriedError(
                f"The file was written by a newer program: {', '.join(sorted(strange)) or name} is "
                "not known here. Open it with the program that wrote it."
            )
        session.execute(insert(of), [dict(cells)])
    act = table(tables.Act)
    if link.act.keys() - act.c.keys():
        raise CarriedError("The file was written by a newer program. Open it with that one.")
    session.execute(insert(act), [dict(link.act)])
