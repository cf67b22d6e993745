"""One more reading of an entry, and the closing of a survey, as rows."""

import hashlib
from datetime import datetime

from sqlalchemy import func, select
from sqlalchemy.orm import Session

from models.job import GaugeTry, Hot, RunoutReading, SizeReading, Warmth
from models.record import tables
from models.record.canonical import canonical_bytes
from models.record.entry_rows import Line, reading_line
from models.record.errors import ReasonMissingError, SurveyClosedError, UnknownEntryError
from models.record.flat import Cell, Row
from models.record.places import AnyReading, place_of, words_of
from models.record.reading_rows import TABLE_OF, reading_from
from models.record.tables import Base, table

__all__ = ["closing_line", "current_readings", "next_reading_line"]

_TAKEN_BY: dict[type, str] = {
    RunoutReading: "runout",
    SizeReading: "sizes",
    Hot: "heating",
    GaugeTry: "heating",
    Warmth: "cooling",
}
_SURVEYS = ("runout", "sizes")


def next_reading_line(
    session: Session,
    chain_id: str,
    entry_id: str,
    reading: AnyReading,
    *,
    reason: str | None,
    by: str | None,
    taken_at: str,
) -> Line:
    """Lay out a reading; if its place has one, as the reading that replaces it."""
    entry = _entry(session, chain_id, entry_id)
    _refuse_misfit(entry_id, entry, reading)
    line = reading_line(
        entry_id,
        reading,
        unit=entry["runout_unit"] or entry["size_unit"],
        by=by or entry["read_by_person"] or entry["by_person"],
        taken_at=reading.at if isinstance(reading, Hot | GaugeTry) else taken_at,
        seconds=_seconds(entry["done_at"], taken_at),
    )
    of = table(line.table)
    there = session.execute(
        select(of.c.key, of.c.turn, of.c.sequence, of.c.line)
        .where(
            of.c.chain_id == chain_id,
            of.c.entry_key == entry_id,
            of.c.place_json == line.row["place_json"],
        )
        .order_by(of.c.turn.desc())
        .limit(1)
    ).one_or_none()
    if there is None:
        if entry["closed_at"] is not None:
            raise SurveyClosedError(entry_id)
        return line
    if reason is None and (
        entry["closed_at"] is not None
        or _last_put(session, chain_id, entry_id, entry["kind"]) != (there.sequence, there.line)
    ):
        raise ReasonMissingError(place_of(reading))
    line.row.update(turn=there.turn + 1, supersedes=there.key, reason=reason)
    return line


def _entry(session: Session, chain_id: str, entry_id: str) -> Row:
    entry, closed = table(tables.Entry), table(tables.SurveyClosed)
    runout, sizes = table(tables.RunoutSurvey), table(tables.SizeSurvey)
    counts = [
        select(func.count())
        .where(part.c.chain_id == chain_id, part.c.entry_key == entry_id)
        .scalar_subquery()
        .label(name)
        for part, name in (
            (table(tables.SurveyAngle), "angle_count"),
            (table(tables.SurveyPosition), "position_count"),
        )
    ]
    asked = select(
        entry.c.kind,
        entry.c.by_person,
        entry.c.done_at,
        runout.c.read_by_person,
        runout.c.unit.label("runout_unit"),
        sizes.c.unit.label("size_unit"),
        closed.c.closed_at,
        *counts,
    ).select_from(entry)
    for other in (runout, sizes, closed):
        same = (other.c.chain_id == entry.c.chain_id) & (other.c.key == entry.c.key)
        asked = asked.outerjoin(other, same)
    found = session.execute(asked.where(entry.c.chain_id == chain_id, entry.c.key == entry_id))
    row = found.mappings().one_or_none()
    if row is None:
        raise UnknownEntryError(entry_id, "the job has no such entry")
    return row


def _refuse_misfit(name: str, entry: Row, reading: AnyReading) -> None:
    if _TAKEN_BY[type(reading)] != entry["kind"]:
        raise UnknownEntryError(name, f"an entry of kind {entry['kind']} takes no such reading")
    angles = positions = 0
    if isinstance(reading, RunoutReading) and isinstance(reading.mark, int):
        angles = reading.mark
    elif isinstance(reading, SizeReading):
        angles, positions = reading.angle, reading.position
        if not 0 <= positions < entry["position_count"]:
            raise UnknownEntryError(name, f"the survey has no position {positions}")
    else:
        return
    if not 0 <= angles < entry["angle_count"]:
        raise UnknownEntryError(name, f"the survey has no mark {angles}")


def _seconds(begun: str, taken: str) -> int | None:
    try:
        passed = datetime.fromisoformat(taken) - datetime.fromisoformat(begun)
    except (TypeError, ValueError):
        return None
    return max(0, int(passed.total_seconds()))


def _last_put(session: Session, chain_id: str, entry_id: str, kind: str) -> tuple[int, int] | None:
    """Find where the last reading of an entry was put, over all tables that take its readings."""
    last: tuple[int, int] | None = None
    for of in {table(TABLE_OF[reading]) for reading, taken in _TAKEN_BY.items() if taken == kind}:
        found = session.execute(
            select(of.c.sequence, of.c.line)
            .where(of.c.chain_id == chain_id, of.c.entry_key == entry_id)
            .order_by(of.c.sequence.desc(), of.c.line.desc())
            .limit(1)
        ).one_or_none()
        if found is not None and (last is None or (found.sequence, found.line) > last):
            last = (found.sequence, found.line)
    return last


def current_readings(
    session: Session, kind: type[Base], chain_id: str, entry_id: str
) -> dict[str, Row]:
    """Give the reading that stands at each place of an entry."""
    of = table(kind)
    rows = session.execute(
        select(of)
        .where(of.c.chain_id == chain_id, of.c.entry_key == entry_id)
        .order_by(of.c.place_json, of.c.turn)
    )
    return {row["place_json"]: row for row in rows.mappings()}


def closing_line(session: Session, chain_id: str, entry_id: str, at: str) -> Line:
    """Lay out the closing of a survey, with the digest of what stands in it.

    Raises
    ------
    SurveyClosedError
        If it is closed.
    UnknownEntryError
        If there is no such survey.
    """
    entry = _entry(session, chain_id, entry_id)
    if entry["kind"] not in _SURVEYS:
        raise UnknownEntryError(entry_id, "only a survey is closed")
    if entry["closed_at"] is not None:
        raise SurveyClosedError(entry_id)
    kind = tables.RunoutReading if entry["kind"] == "runout" else tables.SizeReading
    standing = current_readings(session, kind, chain_id, entry_id)
    read = [[place, words_of(reading_from(kind, row))] for place, row in standing.items()]
    row: dict[str, Cell] = {
        "key": entry_id,
        "closed_at": at,
        "reading_count": len(read),
        "readings_digest": hashlib.sha256(canonical_bytes(read)).hexdigest(),
    }
    return Line(tables.SurveyClosed, row)
