"""What a signature is over: who, as what, and the links of exactly the acts that it covers."""

import hashlib
from collections.abc import Iterable
from typing import Any, NamedTuple

from sqlalchemy import select
from sqlalchemy.orm import Session

from models.job import Head, Place, Signature
from models.record import tables
from models.record.canonical import canonical_bytes, canonical_text, normal, parse
from models.record.errors import UnknownJobError
from models.record.lookups import chain_of_job, head_of
from models.record.tables import recorded_tables, table

__all__ = ["ToSign", "acts_about", "covered_digest", "read_text", "to_sign"]

_WHAT = "third journal, signature"
_EDITION = 1
Link = tuple[int, str]


class ToSign(NamedTuple):
    """What is about to be signed: the text, and the digest that people compare."""

    text: str
    digest: str
    head: Head


def to_sign(session: Session, number: str, entry: Signature, *, name: str) -> ToSign:
    """Write what a signature of a job covers at this moment.

    Parameters
    ----------
    session
        A session in which nothing of the signature's own act is written yet.
    number
        The job.
    entry
        The signature entry: who, role, meaning, place and words of what it covers. One that
        belongs to an attempt covers every act about that attempt; any other the whole chain.
    name
        Printed name of the person.

    Raises
    ------
    UnknownJobError
        If there is no job of this number.
    """
    chain_id = chain_of_job(session, number)
    head = None if chain_id is None else head_of(session, chain_id)
    if chain_id is None or head is None:
        raise UnknownJobError(number)
    place = entry.place
    links = acts_about(session, chain_id, place, until=head.sequence)
    digest = covered_digest(links)
    text = canonical_text(
        {
            "what": _WHAT,
            "edition": _EDITION,
            "job": normal(number),
            "chain": chain_id,
            "entry": normal(entry.id),
            "person": normal(entry.by),
            "name": normal(name),
            "role": entry.role,
            "meaning": entry.meaning,
            "covers": normal(entry.covers),
            "place": [place.kind, place.step, place.attempt],
            "done_at": normal(entry.done_at),
            "acts": [list(link) for link in links],
            "covered_digest": digest,
            "head": [head.sequence, head.digest],
        }
    )
    return ToSign(text, digest, head)


def read_text(text: str) -> dict[str, Any]:
    """Read a signed text back.

    Raises
    ------
    UnfitValueError
        If it is not in its canonical form.
    ValueError
        If it is no text of a signature of this program.
    """
    read = parse(text)
    if not isinstance(read, dict) or read.get("what") != _WHAT:
        raise ValueError("it is no text that this program has people sign")
    if read.get("edition") != _EDITION:
        raise ValueError(f"its text has edition {read.get('edition')}; {_EDITION} is known")
    return read


def covered_digest(links: Iterable[Link]) -> str:
    """Digest the links that a signature covers, 64 hexadecimal digits."""
    return hashlib.sha256(canonical_bytes([list(link) for link in links])).hexdigest()


def acts_about(session: Session, chain_id: str, place: Place, *, until: int) -> list[Link]:
    """List sequence and digest of every act about a place, in order.

    An attempt's acts are those that put an entry there, or a reading, a closing or an answer to
    one of its entries; a signature anywhere else covers all acts so far.
    """
    act = table(tables.Act)
    asked = select(act.c.sequence, act.c.digest).where(
        act.c.chain_id == chain_id, act.c.sequence <= until
    )
    if place.kind == "attempt":
        asked = asked.where(act.c.sequence.in_(_sequences(session, chain_id, place)))
    rows = session.execute(asked.order_by(act.c.sequence))
    return [(row.sequence, row.digest) for row in rows]


def _sequences(session: Session, chain_id: str, place: Place) -> set[int]:
    entry = table(tables.Entry)
    rows = session.execute(
        select(entry.c.key, entry.c.sequence).where(
            entry.c.chain_id == chain_id,
            entry.c.place_kind == place.kind,
            entry.c.place_step == place.step,
            entry.c.place_attempt == place.attempt,
        )
    ).all()
    keys = [row.key for row in rows]
    found = {row.sequence for row in rows}
    for of in recorded_tables():
        if "entry_key" in of.c:
            asked = select(of.c.sequence).where(of.c.chain_id == chain_id, of.c.entry_key.in_(keys))
            found |= set(session.execute(asked).scalars())
    closed = table(tables.SurveyClosed)
    asked = select(closed.c.sequence).where(closed.c.chain_id == chain_id, closed.c.key.in_(keys))
    return found | set(session.execute(asked).scalars())
