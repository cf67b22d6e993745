"""The only writer of the record: one act, one transaction, one link of a chain."""

import uuid
from collections.abc import Callable, Iterator
from contextlib import AbstractContextManager, contextmanager
from datetime import UTC, datetime

from sqlalchemy import insert, select
from sqlalchemy.orm import Session

from models.job import Head, Job, KeySignature, Signature
from models.record import tables
from models.record.act import BROUGHT_IN, Act
from models.record.canonical import FIRST_PREVIOUS, normal
from models.record.carried import is_from_elsewhere
from models.record.errors import (
    ActDiffersError,
    FromElsewhereError,
    HeadMovedError,
    JobKnownError,
)
from models.record.finding_rows import add_instrument_event, add_numbered
from models.record.flat import Cell, Row
from models.record.key_rows import add_key_signature
from models.record.links import BODY_EDITION, digest_of, rows_text
from models.record.lookups import chain_of_job, last_act, shop_chain
from models.record.store import Store
from models.record.tables import table

__all__ = ["BROUGHT_IN", "SHOP", "Act", "Signer", "act", "bring_in"]

# Puts a key behind a signature that comes in, over what the record holds then.
Signer = Callable[[Session, str, Signature], KeySignature | None]
# The chain of the shop itself: its people and instruments.
SHOP = None


@contextmanager
def act(
    session: Session,
    *,
    chain: str | None,
    kind: str,
    by: str,
    act_id: str,
    done_at: str | None = None,
    expected_head: int | None = None,
) -> Iterator[Act]:
    """Record what one person does at one moment, in a transaction of `Store.writing`.

    Parameters
    ----------
    session
        A session of `Store.writing`.
    chain
        Number of the job, or `SHOP`.
    kind
        What is done, in a word or two.
    by
        Key of the person who acts.
    act_id
        A new id of the act; the same one again records nothing a second time.
    done_at
        When it was done, ISO 8601 with offset; now if absent.
    expected_head
        Sequence of the last act that the person saw; not compared if absent.

    Raises
    ------
    HeadMovedError
        If the chain has another last act than expected.
    ActDiffersError
        If an act of the same id, but of another kind, person or chain, is recorded.
    FromElsewhereError
        If the job's chain was laid here from a file: it goes on where it began.
    UnknownJobError
        If there is no such job and the act does not open it.
    UnknownPersonError
        If the act names somebody whom neither the job nor the shop knows.
    """
    store: Store = session.info["store"]
    chain_id = shop_chain(session) if chain is None else chain_of_job(session, chain)
    begun = chain_id is not None
    if chain_id is not None and chain is not None and is_from_elsewhere(session, chain_id):
        raise FromElsewhereError(chain)
    chain_id = chain_id or str(uuid.uuid4())
    recorded = _recorded(session, act_id, chain_id, kind, by)
    last = last_act(session, chain_id)
    sequence = 0 if last is None else last["sequence"]
    if recorded is None and expected_head is not None and expected_head != sequence:
        raise HeadMovedError(expected_head, sequence)
    now = store.clock()
    under_way = Act(
        session,
        chain_id=chain_id,
        number=chain,
        begun=begun,
        kind=kind,
        by=by,
        done_at=done_at or now.isoformat(timespec="milliseconds"),
        sequence=sequence + 1 if recorded is None else recorded.sequence,
        recorded=recorded,
    )
    if not begun and chain is None:
        under_way.begin_chain("shop")
    yield under_way
    if recorded is None:
        _write_link(store, session, under_way, act_id=act_id, now=now, last=last)


def _recorded(session: Session, act_id: str, chain_id: str, kind: str, by: str) -> Head | None:
    acts = table(tables.Act)
    found = session.execute(select(acts).where(acts.c.act_id == act_id)).one_or_none()
    if found is None:
        return None
    if (found.chain_id, found.kind, found.by_person) != (chain_id, kind, by):
        raise ActDiffersError(act_id)
    return Head(sequence=found.sequence, digest=found.digest)


def _write_link(
    store: Store, session: Session, ended: Act, *, act_id: str, now: datetime, last: Row | None
) -> None:
    ended.flush()
    ended.refuse_strangers()
    entered, stepped_back = _entered(now, last)
    offset = now.utcoffset()
    row: dict[str, Cell] = {
        "chain_id": ended.chain_id,
        "sequence": ended.sequence,
        "act_id": normal(act_id),
        "kind": normal(ended.kind),
        "by_person": normal(ended.by),
        "station_name": normal(store.station_name),
        "done_at": normal(ended.done_at),
        "entered_at_utc": entered,
        "entered_offset_minutes": 0 if offset is None else int(offset.total_seconds() // 60),
        "clock_stepped_back": int(stepped_back),
        "program_edition": store.program_edition,
        "body_edition": BODY_EDITION,
        "rows_json": rows_text(ended.rows),
        "previous_digest": FIRST_PREVIOUS if last is None else last["digest"],
    }
    row["digest"] = digest_of(row, ended.rows)
    session.execute(insert(table(tables.Act)), [row])
    ended.head = Head(sequence=ended.sequence, digest=str(row["digest"]))


def _entered(now: datetime, last: Row | None) -> tuple[str, bool]:
    # Order in time never contradicts order in the chain; a clock set back is flagged instead.
    entered = now.astimezone(UTC).strftime("%Y-%m-%dT%H:%M:%S.%fZ")
    if last is not None and entered < last["entered_at_utc"]:
        return last["entered_at_utc"], True
    return entered, False


def bring_in(
    session: Session, job: Job, *, by: str, act_id: str, signer: Signer | None = None
) -> Head:
    """Record a whole job from elsewhere: its facts, then an act for each entry, then verdicts.

    `signer` puts a key behind each signature; without one it keeps the value that the job holds for
    it. Entries and verdicts keep their own ids and times; the acts say when they came in. The same
    `act_id` again brings nothing in a second time.

    Raises
    ------
    JobKnownError
        If the record holds another job of this number.
    """
    acts = table(tables.Act)
    again = session.execute(select(acts.c.chain_id).where(acts.c.act_id == act_id)).scalar()
    if again is None and chain_of_job(session, job.number) is not None:
        raise JobKnownError(job.number)

    def one(suffix: str) -> AbstractContextManager[Act]:
        return act(session, chain=job.number, kind=BROUGHT_IN, by=by, act_id=f"{act_id}{suffix}")

    with one("") as opening:
        opening.add_job(job)
    values = {one.entry: one for one in job.key_signatures}
    for number, entry in enumerate(job.entries, start=1):
        value = values.get(entry.id)
        if signer is not None and isinstance(entry, Signature) and again is None:
            value = signer(session, job.number, entry)
        with one(f"/entry {number}") as one_entry:
            one_entry.add_entry(entry)
            if value is not None:
                add_key_signature(
                    one_entry,
                    entry=entry.id,
                    text=value.text,
                    value=value.value,
                    certificate=value.certificate,
                    authority=value.authority,
                )
    with one("/verdicts") as closing:
        closing.add_verdicts(job.verdicts)
        add_numbered(closing, job.numbered_findings)
        for event in job.instrument_events:
            add_instrument_event(closing, event)
    assert closing.head is not None
    return closing.head
