"""What the journal has to look up before it writes; each by an index."""

from collections.abc import Mapping
from typing import Any, NamedTuple

from sqlalchemy import select
from sqlalchemy.orm import Session

from models.job import Calibration, Head, Instrument
from models.record import tables
from models.record.errors import AlreadyReplacedError, UnknownEntryError
from models.record.flat import Row, struct_from
from models.record.tables import Base, table

__all__ = [
    "KnownInstrument",
    "chain_of_job",
    "every_instrument",
    "head_of",
    "instrument_in_force",
    "instruments_in_force",
    "last_act",
    "last_version",
    "people_known",
    "plan_in_force",
    "refuse_second_replacement",
    "shop_chain",
]


class KnownInstrument(NamedTuple):
    """An instrument in force, with the key and the row of its version."""

    key: str
    facts: Instrument
    row: Row


def chain_of_job(session: Session, number: str) -> str | None:
    """Find the chain of a job."""
    job = table(tables.Job)
    return session.execute(
        select(job.c.chain_id).where(job.c.number == number)
    ).scalar_one_or_none()


def shop_chain(session: Session) -> str | None:
    """Find the shop's own chain."""
    chain = table(tables.Chain)
    # There is one; should a forger have put in another, `verify` names it.
    return session.execute(
        select(chain.c.chain_id).where(chain.c.kind == "shop").limit(1)
    ).scalar_one_or_none()


def last_act(session: Session, chain_id: str) -> Row | None:
    """Find the last act of a chain."""
    act = table(tables.Act)
    found = session.execute(
        select(act.c.sequence, act.c.digest, act.c.entered_at_utc)
        .where(act.c.chain_id == chain_id)
        .order_by(act.c.sequence.desc())
        .limit(1)
    )
    return found.mappings().one_or_none()


def head_of(session: Session, chain_id: str) -> Head | None:
    """Give the last link of a chain."""
    last = last_act(session, chain_id)
    return None if last is None else Head(sequence=last["sequence"], digest=last["digest"])


def last_version(
    session: Session, kind: type[Base], chain_id: str, named: Mapping[str, Any]
) -> Row | None:
    """Find the last version of a person, an instrument or a component."""
    of = table(kind)
    found = session.execute(
        select(of)
        .where(of.c.chain_id == chain_id, *(of.c[name] == cell for name, cell in named.items()))
        .order_by(of.c.sequence.desc(), of.c.line.desc())
        .limit(1)
    )
    return found.mappings().one_or_none()


def people_known(session: Session, chain_id: str, keys: set[str]) -> set[str]:
    """Find which of these people the chain or the shop knows."""
    person = table(tables.Person)
    shop = shop_chain(session)
    chains = [chain_id] if shop is None else [chain_id, shop]
    rows = session.execute(
        select(person.c.person_key).where(
            person.c.chain_id.in_(chains), person.c.person_key.in_(keys)
        )
    )
    return set(rows.scalars())


def instruments_in_force(
    session: Session, chain_id: str, tag: str | None = None
) -> list[KnownInstrument]:
    """List the last version of each instrument (or of one), in the order of their first."""
    of, done = table(tables.Instrument), table(tables.Calibration)
    calibration = [done.c[name].label(f"calibration_{name}") for name in _CALIBRATION]
    asked = (
        select(of, *calibration)
        .outerjoin(done, (done.c.chain_id == of.c.chain_id) & (done.c.instrument_key == of.c.key))
        .where(of.c.chain_id == chain_id)
        .order_by(of.c.sequence, of.c.line)
    )
    if tag is not None:
        asked = asked.where(of.c.tag == tag)
    newest: dict[str, KnownInstrument] = {}
    for row in session.execute(asked).mappings():
        newest[row["tag"]] = KnownInstrument(row["key"], _instrument(row), row)
    return list(newest.values())


def every_instrument(session: Session) -> list[Instrument]:
    """List each instrument that the shop or any job knows, as calibrated last."""
    of, done = table(tables.Instrument), table(tables.Calibration)
    calibration = [done.c[name].label(f"calibration_{name}") for name in _CALIBRATION]
    asked = select(of, *calibration).outerjoin(
        done, (done.c.chain_id == of.c.chain_id) & (done.c.instrument_key == of.c.key)
    )
    newest: dict[str, Row] = {}
    for row in session.execute(asked).mappings():
        known = newest.get(row["tag"])
        if known is None or _later(row, known):
            newest[row["tag"]] = row
    return [_instrument(newest[tag]) for tag in sorted(newest)]


def _later(one: Row, other: Row) -> bool:
    return (one["calibration_done_on"] or "") > (other["calibration_done_on"] or "")


_CALIBRATION = ("done_on", "due_on", "certificate", "result")


def _instrument(row: Row) -> Instrument:
    calibration = None
    if row["calibration_done_on"] is not None:
        calibration = struct_from(Calibration, row, prefix="calibration_")
    return struct_from(Instrument, row, given={"calibration": calibration})


def instrument_in_force(session: Session, chain_id: str, tag: str) -> KnownInstrument | None:
    """Find the last version of an instrument."""
    return next(iter(instruments_in_force(session, chain_id, tag)), None)


def refuse_second_replacement(session: Session, chain_id: str, entry_id: str) -> None:
    """Let an entry be replaced once.

    Raises
    ------
    UnknownEntryError
        If there is no such entry.
    AlreadyReplacedError
        If it has been replaced.
    """
    entry = table(tables.Entry)
    replacing = entry.alias("replacing")
    found = session.execute(
        select(entry.c.key, replacing.c.key.label("replacing"))
        .outerjoin(
            replacing,
            (replacing.c.chain_id == entry.c.chain_id) & (replacing.c.supersedes == entry.c.key),
        )
        .where(entry.c.chain_id == chain_id, entry.c.key == entry_id)
    ).one_or_none()
    if found is None:
        raise UnknownEntryError(entry_id, "it cannot be replaced, the job has no such entry")
    if found.replacing is not None:
        raise AlreadyReplacedError


def plan_in_force(session: Session, chain_id: str) -> tuple[int, str | None]:
    """Give number and document of the last plan revision; 0 and None before the first."""
    plan = table(tables.PlanRevision)
    found = session.execute(
        select(plan.c.number, plan.c.document_json)
        .where(plan.c.chain_id == chain_id)
        .order_by(plan.c.number.desc())
        .limit(1)
    ).one_or_none()
    return (0, None) if found is None else (found.number, found.document_json)
