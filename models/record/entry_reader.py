"""Entries of a job taken up from their rows: what stands, and what was struck."""

from collections import defaultdict
from typing import Any

import msgspec
from sqlalchemy import select
from sqlalchemy.orm import Session

from models.job import (
    Advance,
    AnyEntry,
    AttemptOpened,
    BalanceRun,
    Check,
    Confirmation,
    Cooling,
    Correction,
    DrawUp,
    Entry,
    FieldReading,
    GaugeTry,
    Heating,
    HighSpeedRun,
    Hot,
    Magnetism,
    Place,
    PlaneReading,
    Question,
    RunoutSurvey,
    SizeSurvey,
    StationReadings,
    TrialReading,
    TrialRound,
    VibrationReading,
    Warmth,
)
from models.record import tables
from models.record.entry_rows import COMMON, DETAILS
from models.record.flat import Row, quantity_from, struct_from
from models.record.places import words_of
from models.record.reading_rows import READING_TABLES, high_spot_of, reading_from
from models.record.tables import Base, table
from models.units import Angle, Length

__all__ = ["EntryReader"]

_PARTS: tuple[type[Base], ...] = (
    tables.AttemptComponent,
    tables.ConfirmationCheck,
    tables.SurveyAngle,
    tables.SurveyPosition,
    tables.RunoutStation,
    tables.DrawUpAdvance,
    tables.BalanceReading,
    tables.VibrationReading,
    tables.FieldReading,
    tables.TrialReading,
    tables.BroughtCorrection,
)


class EntryReader:
    """All rows of one job's entries, read once, and the entries made from them."""

    def __init__(self, session: Session, chain_id: str) -> None:
        self._entries = _rows(session, tables.Entry, chain_id)
        self._details = {
            kind.__struct_config__.tag: (kind, _by_key(session, of, chain_id))
            for kind, of in DETAILS.items()
        }
        self._parts = {of: _by_entry(session, of, chain_id) for of in _PARTS}
        self._questions = _by_entry(session, tables.Question, chain_id)
        self._closed = _by_key(session, tables.SurveyClosed, chain_id)
        self._readings = {of: _by_entry(session, of, chain_id) for of in READING_TABLES}

    def entries(self) -> tuple[AnyEntry, ...]:
        """Make every entry, in the order in which they were recorded."""
        return tuple(self._entry(row) for row in self._entries)

    def _entry(self, row: Row) -> AnyEntry:
        kind, details = self._details[row["kind"]]
        key = row["key"]
        given = self._common(row)
        if kind is AttemptOpened:
            given["components"] = tuple(
                (part["item"], part["serial"]) for part in self._parts[tables.AttemptComponent][key]
            )
        elif kind is Confirmation:
            given["checks"] = tuple(
                struct_from(Check, part) for part in self._parts[tables.ConfirmationCheck][key]
            )
        elif kind is HighSpeedRun:
            given["readings"] = tuple(
                struct_from(VibrationReading, part)
                for part in self._parts[tables.VibrationReading][key]
            )
        elif kind is Magnetism:
            given["readings"] = tuple(
                struct_from(FieldReading, part) for part in self._parts[tables.FieldReading][key]
            )
        elif kind is BalanceRun:
            given["readings"] = tuple(
                struct_from(PlaneReading, part) for part in self._parts[tables.BalanceReading][key]
            )
        elif kind is TrialRound:
            given["readings"] = tuple(
                struct_from(TrialReading, part) for part in self._parts[tables.TrialReading][key]
            )
        elif kind is DrawUp:
            given["advances"] = tuple(
                struct_from(Advance, part) for part in self._parts[tables.DrawUpAdvance][key]
            )
        elif kind is RunoutSurvey:
            given |= self._survey(key) | self._runout(key)
        elif kind is SizeSurvey:
            given |= self._survey(key) | self._sizes(key, details[key])
        elif kind is Heating or kind is Cooling:
            given |= self._temperatures(key, gauge=kind is Heating)
        made: AnyEntry = struct_from(kind, details[key], given=given)
        return made

    def _common(self, row: Row) -> dict[str, Any]:
        given = {"id": row["key"], "place": struct_from(Place, row, prefix="place_")}
        common = struct_from(Entry, row, given=given)
        return {name: getattr(common, name) for name in COMMON}

    def _survey(self, key: str) -> dict[str, Any]:
        closed = self._closed.get(key)
        return {
            "angles": tuple(
                quantity_from(Angle, "angle", part) for part in self._parts[tables.SurveyAngle][key]
            ),
            "closed_at": None if closed is None else closed["closed_at"],
            "kept": tuple(
                struct_from(Question, row, given={"where": _words(row["where_json"])})
                for row in self._questions[key]
            ),
        }

    def _runout(self, key: str) -> dict[str, Any]:
        standing, struck = self._standing(key, (tables.RunoutReading,))
        laid_out = {
            part["station"]: (part["mark_count"], part["seconds_count"])
            for part in self._parts[tables.RunoutStation][key]
        }
        of_station: dict[str, list[Row]] = {station: [] for station in laid_out}
        for row in standing:
            of_station.setdefault(row["station"], []).append(row)
        stations = tuple(
            _station(name, rows, *laid_out.get(name, (0, 0))) for name, rows in of_station.items()
        )
        return {"stations": stations, "corrections": struck}

    def _sizes(self, key: str, detail: Row) -> dict[str, Any]:
        standing, struck = self._standing(key, (tables.SizeReading,))
        parts = self._parts
        positions, angles = detail["grid_positions"], detail["grid_angles"]
        if standing:
            positions = max(positions, len(parts[tables.SurveyPosition][key]))
            angles = max(angles, len(parts[tables.SurveyAngle][key]))
        grid: list[list[str | None]] = [[None] * angles for _ in range(positions)]
        for row in standing:
            grid[row["position_index"]][row["angle_index"]] = row["typed"]
        return {
            "positions": tuple(
                quantity_from(Length, "position", part)
                for part in parts[tables.SurveyPosition][key]
            ),
            "typed": tuple(tuple(row) for row in grid),
            "corrections": struck,
        }

    def _temperatures(self, key: str, *, gauge: bool) -> dict[str, Any]:
        standing, struck = self._standing(key, (tables.TemperatureReading, tables.GaugeTry))
        read = [
            reading_from(tables.GaugeTry if "size_nm" in row else tables.TemperatureReading, row)
            for row in standing
        ]
        given: dict[str, Any] = {
            "temperatures": tuple(one for one in read if isinstance(one, Hot | Warmth)),
            "corrections": struck,
        }
        if gauge:
            given["gauge"] = tuple(one for one in read if isinstance(one, GaugeTry))
        return given

    def _standing(
        self, key: str, kinds: tuple[type[Base], ...]
    ) -> tuple[list[Row], tuple[Correction, ...]]:
        """Give what stands at each place, in the order of first readings, and what was struck."""
        standing: dict[tuple[type[Base], str], Row] = {}
        struck: list[tuple[tuple[int, int], Correction]] = []
        for kind in kinds:
            for row in self._readings[kind][key]:
                place = (kind, row["place_json"])
                if place in standing:
                    correction = _correction(kind, standing[place], row)
                    struck.append(((row["sequence"], row["line"]), correction))
                standing[place] = row
        struck.sort(key=lambda one: one[0])
        brought = [
            struct_from(Correction, part, given={"where": _words(part["where_json"])})
            for part in self._parts[tables.BroughtCorrection][key]
        ]
        return list(standing.values()), (*brought, *(correction for _, correction in struck))


def _station(name: str, rows: list[Row], mark_count: int, seconds_count: int) -> StationReadings:
    at_marks = {row["mark_index"]: row for row in rows if row["what"] == "mark"}
    if at_marks and max(at_marks) >= mark_count:
        # No further than what was read: a mark beyond it is still to come, not without a surface.
        mark_count = max(at_marks) + 1
    if any(
        row["seconds_into_survey"] is not None and index >= seconds_count
        for index, row in at_marks.items()
    ):
        seconds_count = mark_count
    elsewhere = {row["what"]: row for row in rows if row["what"] != "mark"}
    single = {what: row["typed"] for what, row in elsewhere.items()}
    high_spot = elsewhere.get("high spot")
    typed: list[str | None] = [None] * mark_count
    seconds: list[int | None] = [None] * seconds_count
    for index, row in at_marks.items():
        typed[index] = row["typed"]
        if index < seconds_count:
            seconds[index] = row["seconds_into_survey"]
    return StationReadings(
        station=name,
        typed=tuple(typed),
        again=single.get("again"),
        seconds=tuple(seconds),
        swept_total=single.get("swept total"),
        total=single.get("total"),
        high_spot=None if high_spot is None else high_spot_of(high_spot),
    )


def _correction(kind: type[Base], before: Row, after: Row) -> Correction:
    return Correction(
        where=_words(after["place_json"]),
        was=words_of(reading_from(kind, before)),
        now=words_of(reading_from(kind, after)),
        reason=after["reason"] or "typed again",
        by=after["by_person"],
        at=after["taken_at"] or "",
    )


def _words(text: str) -> tuple[str, ...]:
    return msgspec.json.decode(text, type=tuple[str, ...])


def _rows(session: Session, kind: type[Base], chain_id: str) -> list[Row]:
    of = table(kind)
    asked = select(of).where(of.c.chain_id == chain_id).order_by(of.c.sequence, of.c.line)
    return [dict(row) for row in session.execute(asked).mappings()]


def _by_key(session: Session, kind: type[Base], chain_id: str) -> dict[str, Row]:
    return {row["key"]: row for row in _rows(session, kind, chain_id)}


def _by_entry(session: Session, kind: type[Base], chain_id: str) -> dict[str, list[Row]]:
    grouped: dict[str, list[Row]] = defaultdict(list)
    for row in _rows(session, kind, chain_id):
        grouped[row["entry_key"]].append(row)
    return grouped
