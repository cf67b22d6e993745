"""Rows of numbered findings and of instruments found out."""

from collections.abc import Iterable

from sqlalchemy import func, select
from sqlalchemy.orm import Session

from models.job import InstrumentEvent, NumberedFinding
from models.record import tables
from models.record.act import Act
from models.record.entry_rows import Line, new_key
from models.record.flat import columns_of, struct_from
from models.record.tables import table

__all__ = [
    "add_instrument_event",
    "add_numbered",
    "instrument_events",
    "next_finding_number",
    "numbered_findings",
]


def add_numbered(act: Act, findings: Iterable[NumberedFinding]) -> None:
    """Put numbered findings into a job's chain."""
    for one in findings:
        act.put(Line(tables.NumberedFinding, {"key": new_key(), **columns_of(one)}))


def add_instrument_event(act: Act, event: InstrumentEvent) -> None:
    """Put an event of an instrument into the chain of the shop, or of a job that used it."""
    row = columns_of(event, leave=("id",))
    act.put(Line(tables.InstrumentEvent, {"key": event.id, **row}))


def next_finding_number(session: Session, chain_id: str) -> int:
    """Give the number after the last one given in a job; none is ever given twice."""
    of = table(tables.NumberedFinding)
    last = session.execute(
        select(func.max(of.c.number)).where(of.c.chain_id == chain_id)
    ).scalar_one()
    return 1 + (last or 0)


def numbered_findings(session: Session, chain_id: str) -> tuple[NumberedFinding, ...]:
    """List the numbered findings of a job, by number."""
    of = table(tables.NumberedFinding)
    asked = select(of).where(of.c.chain_id == chain_id).order_by(of.c.number)
    return tuple(struct_from(NumberedFinding, row) for row in session.execute(asked).mappings())


def instrument_events(
    session: Session, chain_id: str, tag: str | None = None
) -> tuple[InstrumentEvent, ...]:
    """List what was found out about the instruments of a chain, in the order of recording."""
    of = table(tables.InstrumentEvent)
    asked = select(of).where(of.c.chain_id == chain_id).order_by(of.c.sequence, of.c.line)
    if tag is not None:
        asked = asked.where(of.c.tag == tag)
    return tuple(
        struct_from(InstrumentEvent, row, given={"id": row["key"]})
        for row in session.execute(asked).mappings()
    )
