"""The only reader of the record: frozen jobs, and the rows of the shelf."""

from dataclasses import dataclass
from typing import Any

from sqlalchemy import Select, and_, func, select
from sqlalchemy.orm import Session

from models.job import (
    Calibration,
    Component,
    Head,
    Instrument,
    InstrumentEvent,
    Job,
    KeySignature,
    OwnMaterial,
    Person,
    StoredVerdict,
)
from models.record import tables
from models.record.documents import inputs_from, material_from, plan_from
from models.record.entry_reader import EntryReader
from models.record.errors import UnknownJobError
from models.record.finding_rows import instrument_events, numbered_findings
from models.record.flat import struct_from
from models.record.gate import GOOD_OUTCOMES
from models.record.lookups import chain_of_job, head_of, instruments_in_force, shop_chain
from models.record.tables import Base, table

__all__ = [
    "JobRow",
    "calibrations",
    "head",
    "instruments",
    "instruments_of",
    "job_rows",
    "materials",
    "people",
    "read_job",
    "shelf_query",
    "shop_instrument_events",
]


@dataclass(frozen=True, kw_only=True)
class JobRow:
    """A job on the shelf."""

    number: str
    customer: str
    rotor_name: str
    rotor_serial: str
    opened_at: str
    plan: str
    steps_settled: int
    steps: int


def read_job(session: Session, number: str) -> Job:
    """Read a job whole; where a reading was replaced, the last one stands.

    Raises
    ------
    UnknownJobError
        If there is no job of this number.
    """
    chain_id = chain_of_job(session, number)
    if chain_id is None:
        raise UnknownJobError(number)
    (facts,) = _rows(session, tables.Job, chain_id)
    plans = _rows(session, tables.PlanRevision, chain_id)
    return struct_from(
        Job,
        facts,
        given={
            "people": _people(session, chain_id),
            "instruments": _instruments(session, chain_id),
            "components": tuple(
                struct_from(Component, row)
                for row in _newest(session, tables.Component, chain_id, ("serial", "item"))
            ),
            "plans": tuple(plan_from(row["document_json"]) for row in plans),
            "entries": EntryReader(session, chain_id).entries(),
            "verdicts": _verdicts(session, chain_id),
            "key_signatures": tuple(
                KeySignature(
                    entry=row["key"],
                    text=row["signed_text"],
                    value=row["value_base64"],
                    certificate=row["certificate_pem"],
                    authority=row["authority_pem"],
                )
                for row in _rows(session, tables.KeySignature, chain_id)
            ),
            "numbered_findings": numbered_findings(session, chain_id),
            "instrument_events": instrument_events(session, chain_id),
            "head": head_of(session, chain_id),
        },
    )


def head(session: Session, number: str) -> Head:
    """Give the last link of a job's chain.

    Raises
    ------
    UnknownJobError
        If there is no job of this number.
    """
    chain_id = chain_of_job(session, number)
    found = None if chain_id is None else head_of(session, chain_id)
    if found is None:
        raise UnknownJobError(number)
    return found


def people(session: Session) -> tuple[Person, ...]:
    """List the shop's people."""
    chain_id = shop_chain(session)
    return () if chain_id is None else _people(session, chain_id)


def instruments(session: Session) -> tuple[Instrument, ...]:
    """List the shop's instruments."""
    chain_id = shop_chain(session)
    return () if chain_id is None else _instruments(session, chain_id)


def instruments_of(session: Session, number: str) -> tuple[Instrument, ...]:
    """List the instruments of a job.

    Raises
    ------
    UnknownJobError
        If there is no job of this number.
    """
    chain_id = chain_of_job(session, number)
    if chain_id is None:
        raise UnknownJobError(number)
    return _instruments(session, chain_id)


def calibrations(session: Session, tag: str) -> tuple[Calibration, ...]:
    """List every calibration of an instrument that the record holds, the last one first."""
    of, done = table(tables.Instrument), table(tables.Calibration)
    rows = session.execute(
        select(done)
        .join(of, and_(done.c.chain_id == of.c.chain_id, done.c.instrument_key == of.c.key))
        .where(of.c.tag == tag)
        .order_by(done.c.done_on.desc())
    ).mappings()
    # The shop and every job keep a copy of the same calibration.
    return tuple(dict.fromkeys(struct_from(Calibration, row) for row in rows))


def shop_instrument_events(session: Session, tag: str) -> tuple[InstrumentEvent, ...]:
    """List what the shop found out about an instrument."""
    chain_id = shop_chain(session)
    return () if chain_id is None else instrument_events(session, chain_id, tag)


def materials(session: Session) -> tuple[OwnMaterial, ...]:
    """List the materials that the shop answers for, each as it knows it now."""
    chain_id = shop_chain(session)
    if chain_id is None:
        return ()
    rows = _newest(session, tables.ShopMaterial, chain_id, ("name",))
    return tuple(material_from(row["document_json"]) for row in rows)


def job_rows(session: Session) -> tuple[JobRow, ...]:
    """List the jobs, the last opened first."""
    return tuple(JobRow(**row) for row in session.execute(shelf_query()).mappings())


def shelf_query() -> Select[Any]:
    """Ask for the rows of the shelf; only the short table of jobs is read from end to end."""
    job, plan = table(tables.Job), table(tables.PlanRevision)
    newest = (
        select(func.max(plan.c.number))
        .where(plan.c.chain_id == job.c.chain_id)
        .correlate(job)
        .scalar_subquery()
    )
    return (
        select(
            job.c.number,
            job.c.customer,
            plan.c.rotor_name,
            plan.c.rotor_serial,
            job.c.opened_at,
            plan.c.revision.label("plan"),
            _settled_steps().label("steps_settled"),
            plan.c.step_count.label("steps"),
        )
        .join(plan, and_(plan.c.chain_id == job.c.chain_id, plan.c.number == newest))
        .order_by(job.c.opened_at.desc(), job.c.number)
    )


def _settled_steps() -> Any:  # noqa: ANN401  (a scalar subquery)
    job, plan, order = table(tables.Job), table(tables.PlanRevision), table(tables.PlanStep)
    entry, settled = table(tables.Entry), table(tables.Settled)
    later, replaced = entry.alias("later_attempt"), entry.alias("replacing")
    return (
        select(func.count(entry.c.place_step.distinct()))
        .select_from(entry)
        .join(settled, and_(settled.c.chain_id == entry.c.chain_id, settled.c.key == entry.c.key))
        .join(
            order,
            and_(
                order.c.chain_id == entry.c.chain_id,
                order.c.plan_key == plan.c.key,
                order.c.step == entry.c.place_step,
            ),
        )
        .where(
            entry.c.chain_id == job.c.chain_id,
            entry.c.kind == "settled",
            settled.c.outcome.in_(GOOD_OUTCOMES),
            ~select(replaced.c.key)
            .where(replaced.c.chain_id == entry.c.chain_id, replaced.c.supersedes == entry.c.key)
            .exists(),
            ~select(later.c.key)
            .where(
                later.c.chain_id == entry.c.chain_id,
                later.c.kind == "attempt",
                later.c.place_step == entry.c.place_step,
                later.c.place_attempt > entry.c.place_attempt,
            )
            .exists(),
        )
        .correlate(job, plan)
        .scalar_subquery()
    )


def _rows(session: Session, kind: type[Base], chain_id: str) -> list[Any]:
    of = table(kind)
    asked = select(of).where(of.c.chain_id == chain_id).order_by(of.c.sequence, of.c.line)
    return list(session.execute(asked).mappings())


def _newest(
    session: Session, kind: type[Base], chain_id: str, natural: tuple[str, ...]
) -> list[Any]:
    """Keep the last version of each, in the order in which the first versions came."""
    newest = {tuple(row[name] for name in natural): row for row in _rows(session, kind, chain_id)}
    return list(newest.values())


def _people(session: Session, chain_id: str) -> tuple[Person, ...]:
    rows = _newest(session, tables.Person, chain_id, ("person_key",))
    return tuple(struct_from(Person, row, given={"key": row["person_key"]}) for row in rows)


def _instruments(session: Session, chain_id: str) -> tuple[Instrument, ...]:
    return tuple(known.facts for known in instruments_in_force(session, chain_id))


def _verdicts(session: Session, chain_id: str) -> tuple[StoredVerdict, ...]:
    return tuple(
        struct_from(
            StoredVerdict,
            row,
            given={"id": row["key"], "inputs": inputs_from(row["inputs_json"])},
        )
        for row in _rows(session, tables.Verdict, chain_id)
    )
