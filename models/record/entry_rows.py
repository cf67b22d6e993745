"""An entry of a job laid out as rows of the record's tables."""

import uuid
from collections import Counter
from collections.abc import Iterator
from typing import NamedTuple

from models.job import (
    AnyEntry,
    Attachment,
    AttemptOpened,
    AxialMeasured,
    BalanceCorrection,
    BalanceRun,
    Confirmation,
    Cooling,
    Correction,
    Decision,
    DrawUp,
    GaugeTry,
    Handling,
    Heating,
    HighSpeedRun,
    Hot,
    JournalsWeighed,
    Magnetism,
    Mount,
    Note,
    OutsideOperation,
    PointEvent,
    Question,
    Removal,
    RunoutReading,
    RunoutSurvey,
    Settled,
    Signature,
    SizeReading,
    SizeSurvey,
    StationReadings,
    StationWatched,
    Tightening,
    TrialRound,
    VisualFinding,
    Warmth,
)
from models.record import tables
from models.record.canonical import canonical_text, normal
from models.record.errors import UnfitEntryError
from models.record.flat import Cell, columns_of, quantity_columns
from models.record.places import AnyReading, place_of
from models.record.reading_rows import reading_row, table_of_reading
from models.record.tables import Base
from models.units import Angle, Length

__all__ = [
    "COMMON",
    "DETAILS",
    "LEFT_OUT",
    "Line",
    "entry_lines",
    "kind_of",
    "new_key",
    "question_line",
    "reading_line",
]

COMMON = (
    "id",
    "place",
    "by",
    "done_at",
    "entered_at",
    "plan",
    "written_by",
    "supersedes",
    "reason",
    "out_of_order",
)

DETAILS: dict[type[AnyEntry], type[Base]] = {
    HighSpeedRun: tables.HighSpeedRun,
    Magnetism: tables.Magnetism,
    BalanceCorrection: tables.BalanceCorrection,
    BalanceRun: tables.BalanceRun,
    JournalsWeighed: tables.JournalsWeighed,
    TrialRound: tables.TrialRound,
    Attachment: tables.Attachment,
    AttemptOpened: tables.Attempt,
    AxialMeasured: tables.AxialPosition,
    Confirmation: tables.Confirmation,
    Cooling: tables.Cooling,
    Decision: tables.Decision,
    DrawUp: tables.DrawUp,
    Handling: tables.Handling,
    Heating: tables.Heating,
    Mount: tables.Mount,
    Note: tables.Note,
    OutsideOperation: tables.OutsideOperation,
    PointEvent: tables.PointEvent,
    Removal: tables.Removal,
    RunoutSurvey: tables.RunoutSurvey,
    Settled: tables.Settled,
    Signature: tables.Signature,
    SizeSurvey: tables.SizeSurvey,
    StationWatched: tables.StationWatched,
    Tightening: tables.Tightening,
    VisualFinding: tables.VisualFinding,
}

# Fields of each kind that stand in tables of their own.
LEFT_OUT: dict[type[AnyEntry], tuple[str, ...]] = {
    BalanceRun: ("readings",),
    HighSpeedRun: ("readings",),
    Magnetism: ("readings",),
    TrialRound: ("readings",),
    AttemptOpened: ("components",),
    Confirmation: ("checks",),
    Cooling: ("temperatures", "corrections"),
    DrawUp: ("advances",),
    Heating: ("temperatures", "gauge", "corrections"),
    RunoutSurvey: ("angles", "stations", "closed_at", "corrections", "kept"),
    SizeSurvey: ("positions", "angles", "typed", "closed_at", "corrections", "kept"),
}


class Line(NamedTuple):
    """A row on its way into a table; the act adds its chain, sequence and line."""

    table: type[Base]
    row: dict[str, Cell]


def kind_of(entry: AnyEntry) -> str:
    """Name the kind of an entry as job files do."""
    return str(entry.__struct_config__.tag)


def new_key() -> str:
    """Make a key for a row that brings none of its own."""
    return str(uuid.uuid4())


def common_columns(entry: AnyEntry) -> dict[str, Cell]:
    """Lay out what every entry says."""
    own = tuple(name for name in entry.__struct_fields__ if name not in COMMON)
    row = columns_of(entry, leave=("id", *own))
    return {"key": entry.id, "kind": kind_of(entry), **row}


def entry_lines(entry: AnyEntry) -> Iterator[Line]:
    """Lay out an entry with everything it holds, in reading order.

    Raises
    ------
    UnfitEntryError
        If its readings do not fit its own layout.
    """
    kind = type(entry)
    yield Line(tables.Entry, common_columns(entry))
    detail = {"key": entry.id, **columns_of(entry, leave=(*COMMON, *LEFT_OUT.get(kind, ())))}
    if isinstance(entry, SizeSurvey):
        detail |= _grid(entry)
    yield Line(DETAILS[kind], detail)
    yield from _parts(entry)
    if isinstance(entry, Heating | Cooling | RunoutSurvey | SizeSurvey):
        for number, correction in enumerate(entry.corrections, start=1):
            yield _correction(entry.id, number, correction)
    if isinstance(entry, RunoutSurvey | SizeSurvey):
        for question in entry.kept:
            yield question_line(entry.id, question)
    yield from _reading_lines(entry)


def question_line(entry_id: str, question: Question) -> Line:
    """Lay out a question about a reading, with its answer."""
    where = canonical_text([normal(word) for word in question.where])
    row = columns_of(question, leave=("where",))
    return Line(
        tables.Question,
        {"key": new_key(), "entry_key": entry_id, "where_json": where, **row},
    )


def reading_line(
    entry_id: str,
    reading: AnyReading,
    *,
    unit: str | None,
    by: str,
    taken_at: str | None,
    seconds: int | None = None,
    place: tuple[str, ...] | None = None,
) -> Line:
    """Lay out the first reading at its place."""
    row: dict[str, Cell] = {
        "key": new_key(),
        "entry_key": entry_id,
        "place_json": canonical_text([normal(word) for word in place or place_of(reading)]),
        "turn": 1,
        "supersedes": None,
        "reason": None,
        "by_person": by,
        "taken_at": taken_at,
        **reading_row(reading, unit=unit),
    }
    if isinstance(reading, RunoutReading):
        row["seconds_into_survey"] = seconds
    return Line(table_of_reading(reading), row)


def _grid(entry: SizeSurvey) -> dict[str, Cell]:
    widths = {len(row) for row in entry.typed}
    if len(widths) > 1:
        raise UnfitEntryError(entry.id, "its sizes are not a grid of positions by angles")
    return {"grid_positions": len(entry.typed), "grid_angles": max(widths, default=0)}


def _correction(entry_id: str, number: int, correction: Correction) -> Line:
    row = columns_of(correction, leave=("where",))
    where = canonical_text([normal(word) for word in correction.where])
    return Line(
        tables.BroughtCorrection,
        {"key": new_key(), "entry_key": entry_id, "number": number, "where_json": where, **row},
    )


def _parts(entry: AnyEntry) -> Iterator[Line]:
    if isinstance(entry, AttemptOpened):
        yield from _numbered(
            entry.id,
            tables.AttemptComponent,
            [{"item": item, "serial": serial} for item, serial in entry.components],
        )
    elif isinstance(entry, Confirmation):
        yield from _numbered(
            entry.id, tables.ConfirmationCheck, [columns_of(check) for check in entry.checks]
        )
    elif isinstance(entry, HighSpeedRun):
        yield from _numbered(
            entry.id, tables.VibrationReading, [columns_of(one) for one in entry.readings]
        )
    elif isinstance(entry, Magnetism):
        yield from _numbered(
            entry.id, tables.FieldReading, [columns_of(one) for one in entry.readings]
        )
    elif isinstance(entry, BalanceRun):
        yield from _numbered(
            entry.id, tables.BalanceReading, [columns_of(one) for one in entry.readings]
        )
    elif isinstance(entry, TrialRound):
        yield from _numbered(
            entry.id, tables.TrialReading, [columns_of(one) for one in entry.readings]
        )
    elif isinstance(entry, DrawUp):
        yield from _numbered(
            entry.id, tables.DrawUpAdvance, [columns_of(one) for one in entry.advances]
        )
    elif isinstance(entry, RunoutSurvey | SizeSurvey):
        yield from _numbered(
            entry.id,
            tables.SurveyAngle,
            [quantity_columns("angle", Angle, angle) for angle in entry.angles],
        )
    if isinstance(entry, SizeSurvey):
        yield from _numbered(
            entry.id,
            tables.SurveyPosition,
            [quantity_columns("position", Length, position) for position in entry.positions],
        )
    elif isinstance(entry, RunoutSurvey):
        yield from _numbered(entry.id, tables.RunoutStation, _stations(entry))


def _stations(entry: RunoutSurvey) -> list[dict[str, Cell]]:
    return [
        {
            "station": station.station,
            "mark_count": len(station.typed),
            "seconds_count": len(station.seconds),
        }
        for station in entry.stations
    ]


def _numbered(entry_id: str, table: type[Base], rows: list[dict[str, Cell]]) -> Iterator[Line]:
    for number, row in enumerate(rows, start=1):
        yield Line(table, {"key": new_key(), "entry_key": entry_id, "number": number, **row})


def _reading_lines(entry: AnyEntry) -> Iterator[Line]:
    if isinstance(entry, RunoutSurvey):
        by = entry.read_by or entry.by
        seen: set[tuple[str, ...]] = set()
        for reading, seconds in _runout_readings(entry):
            if place_of(reading) in seen:
                raise UnfitEntryError(entry.id, f"station {reading.station} stands in it twice")
            seen.add(place_of(reading))
            yield reading_line(
                entry.id, reading, unit=entry.unit, by=by, taken_at=None, seconds=seconds
            )
    elif isinstance(entry, SizeSurvey):
        for size in _size_readings(entry):
            yield reading_line(entry.id, size, unit=entry.unit, by=entry.by, taken_at=None)
    elif isinstance(entry, Heating | Cooling):
        yield from _temperature_lines(entry)


def _runout_readings(entry: RunoutSurvey) -> Iterator[tuple[RunoutReading, int | None]]:
    for station in entry.stations:
        if len(station.seconds) > len(station.typed):
            raise UnfitEntryError(entry.id, f"station {station.station} has times without marks")
        for mark, typed in enumerate(station.typed):
            seconds = station.seconds[mark] if mark < len(station.seconds) else None
            if typed is not None or seconds is not None:
                yield RunoutReading(station=station.station, mark=mark, typed=typed), seconds
        for reading in _without_marks(station):
            yield reading, None


def _without_marks(station: StationReadings) -> Iterator[RunoutReading]:
    name = station.station
    if station.again is not None:
        yield RunoutReading(station=name, mark="again", typed=station.again)
    if station.swept_total is not None:
        yield RunoutReading(station=name, mark="swept total", typed=station.swept_total)
    if station.total is not None:
        yield RunoutReading(station=name, mark="total", typed=station.total)
    if station.high_spot is not None:
        yield RunoutReading(station=name, mark="high spot", typed=station.high_spot.typed)


def _size_readings(entry: SizeSurvey) -> Iterator[SizeReading]:
    for position, row in enumerate(entry.typed):
        for angle, typed in enumerate(row):
            if typed is not None:
                yield SizeReading(position=position, angle=angle, typed=typed)


def _temperature_lines(entry: Heating | Cooling) -> Iterator[Line]:
    readings: list[Hot | Warmth | GaugeTry] = [*entry.temperatures]
    if isinstance(entry, Heating):
        readings += entry.gauge
    times: Counter[tuple[str, ...]] = Counter()
    for reading in readings:
        place = place_of(reading)
        times[place] += 1
        if times[place] > 1:
            # Two readings at one place and moment both stand when an entry comes in whole.
            place = (*place, str(times[place]))
        at = entry.done_at if isinstance(reading, Warmth) else reading.at
        yield reading_line(entry.id, reading, unit=None, by=entry.by, taken_at=at, place=place)
