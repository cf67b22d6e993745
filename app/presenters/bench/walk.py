"""The order in which a person goes round: where the next reading belongs."""

from collections.abc import Sequence
from dataclasses import dataclass

import msgspec

from models.job import (
    Place,
    Plan,
    RunoutReading,
    RunoutSurvey,
    SizeReading,
    SizeSurvey,
    Station,
    StationReadings,
)

__all__ = [
    "Spot",
    "next_spot",
    "runout_spots",
    "size_spots",
    "stations_due",
    "typed_at",
    "with_reading",
    "with_stations_due",
]


@dataclass(frozen=True)
class Spot:
    """One place of a survey: station and mark, or axial position and clock angle, by index."""

    station: str = ""
    mark: int | str = 0
    position: int = 0

    @property
    def is_again(self) -> bool:
        """Whether the first mark is read again here, to close the circle."""
        return self.mark == "again"

    def reading(self, typed: str | None) -> RunoutReading | SizeReading:
        """Make the reading that goes here."""
        if self.station:
            if self.mark == "again":
                return RunoutReading(station=self.station, mark="again", typed=typed)
            return RunoutReading(station=self.station, mark=int(self.mark), typed=typed)
        return SizeReading(position=self.position, angle=int(self.mark), typed=typed)


def stations_due(plan: Plan, place: Place, purpose: str) -> tuple[Station, ...]:
    """List the stations a survey reads: those in reach, at a bare seat those before the step."""
    if purpose == "bare shaft" or place.step is None:
        return plan.stations_in_reach(None)
    if purpose != "bare seat":
        return plan.stations_in_reach(place.step)
    number = plan.step_number(place.step)
    return plan.stations_in_reach(plan.steps[number - 2].key if number > 1 else None)


def with_stations_due(plan: Plan, survey: RunoutSurvey) -> RunoutSurvey:
    """Give the survey with a place for every station due; the record keeps only those read."""
    known = {one.station: one for one in survey.stations}
    due = [one.key for one in stations_due(plan, survey.place, survey.purpose)]
    rest = [key for key in known if key not in due]
    stations = tuple(known.get(key, StationReadings(station=key)) for key in (*due, *rest))
    return msgspec.structs.replace(survey, stations=stations)


def runout_spots(plan: Plan, survey: RunoutSurvey) -> tuple[Spot, ...]:
    """List every reading of a runout survey in the order it is taken: both journals first."""
    due = [one.station for one in survey.stations]
    journals = [key for key in (plan.first_journal, plan.second_journal) if key in due]
    rest = [key for key in due if key not in journals]
    marks: list[int | str] = list(range(len(survey.angles)))
    if plan.runout.close_circle:
        marks.append("again")
    if plan.runout.order == "mark by mark":
        return tuple(Spot(station=key, mark=mark) for mark in marks for key in journals + rest)
    return tuple(Spot(station=key, mark=mark) for key in journals + rest for mark in marks)


def size_spots(survey: SizeSurvey) -> tuple[Spot, ...]:
    """List every diameter of a size survey: all angles at a position, then the next position."""
    return tuple(
        Spot(position=position, mark=angle)
        for position in range(len(survey.positions))
        for angle in range(len(survey.angles))
    )


def typed_at(survey: RunoutSurvey | SizeSurvey, spot: Spot) -> tuple[bool, str | None]:
    """Tell whether a spot has been read, and what was typed (None: no surface here)."""
    if isinstance(survey, SizeSurvey):
        if spot.position >= len(survey.typed):
            return False, None
        row = survey.typed[spot.position]
        index = int(spot.mark)
        return (index < len(row) and row[index] is not None), (
            row[index] if index < len(row) else None
        )
    readings = survey.readings(spot.station)
    if readings is None:
        return False, None
    if spot.is_again:
        return readings.again is not None, readings.again
    index = int(spot.mark)
    if index < len(readings.typed):
        return True, readings.typed[index]
    return False, None


def next_spot(survey: RunoutSurvey | SizeSurvey, spots: Sequence[Spot]) -> Spot | None:
    """Find the first spot of the walk that has not been read."""
    return next((spot for spot in spots if not typed_at(survey, spot)[0]), None)


def with_reading(
    survey: RunoutSurvey | SizeSurvey, spot: Spot, typed: str | None
) -> RunoutSurvey | SizeSurvey:
    """Give the survey as it is with one more reading, or with one replaced."""
    if isinstance(survey, SizeSurvey):
        rows = [list(row) for row in survey.typed]
        while len(rows) <= spot.position:
            rows.append([])
        row = rows[spot.position]
        row += [None] * (int(spot.mark) + 1 - len(row))
        row[int(spot.mark)] = typed
        return msgspec.structs.replace(survey, typed=tuple(tuple(row) for row in rows))
    stations = tuple(
        _station_with(one, spot, typed) if one.station == spot.station else one
        for one in survey.stations
    )
    return msgspec.structs.replace(survey, stations=stations)


def _station_with(readings: StationReadings, spot: Spot, typed: str | None) -> StationReadings:
    if spot.is_again:
        return msgspec.structs.replace(readings, again=typed)
    marks = list(readings.typed)
    marks += [None] * (int(spot.mark) + 1 - len(marks))
    marks[int(spot.mark)] = typed
    return msgspec.structs.replace(readings, typed=tuple(marks))
