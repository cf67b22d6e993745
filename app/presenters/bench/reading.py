"""A survey being read: what has been taken, what is being typed, and what it says so far."""

import math
from collections.abc import Sequence
from dataclasses import dataclass, field

import msgspec

from app.presenters.bench.state import QuestionShown, ReadingTask, RungShown
from app.presenters.bench.walk import (
    Spot,
    next_spot,
    runout_spots,
    size_spots,
    typed_at,
    with_reading,
    with_stations_due,
)
from models.assess import Attempt, LandFit, StationChange, SurveyRunout
from models.assess.attempts import station_facts
from models.assess.questions import (
    Asked,
    closing_questions,
    questions_at_station,
    questions_of_sizes,
    unanswered,
)
from models.assess.runout import compare_surveys, read_survey
from models.assess.sizes import land_fit
from models.job import Job, Question, RunoutSurvey, SizeSurvey
from models.rules import rule
from models.rules.rule import Finding, Subject
from models.units import Length, Quantity, UnreadableNumberError, unit_set
from reports.job_pictures import dial_picture
from reports.sheet.pictures import DialPicture

__all__ = ["Reading", "SoFar"]

AnySurvey = RunoutSurvey | SizeSurvey
# What one whole figure on the ladder stands for, in nm: 0.0001 in, or 1 µm.
_STEPS = {"in": 2540, "mil": 2540, "µm": 1000, "mm": 1000}


@dataclass(frozen=True)
class SoFar:
    """What a runout survey says with what has been typed."""

    survey: SurveyRunout | None = None
    changes: tuple[StationChange, ...] = ()
    findings: dict[str, Finding] = field(default_factory=dict)
    stations_read: tuple[str, ...] = ()


class Reading:
    """The survey that is open, with the spot to read now."""

    def __init__(self, job: Job, survey: AnySurvey, attempt: Attempt | None) -> None:
        self.job = msgspec.structs.replace(job, entries=(), verdicts=(), head=None)
        self.survey: AnySurvey = survey
        if isinstance(survey, RunoutSurvey):
            self.survey = with_stations_due(job.plan, survey)
        self.attempt = attempt
        self.baseline = attempt.baseline if attempt else None
        self.spots = (
            runout_spots(job.plan, self.survey)
            if isinstance(self.survey, RunoutSurvey)
            else size_spots(self.survey)
        )
        self.correcting: Spot | None = None
        self.live: str | None = None
        # What was typed there, in the order in which it is being written.
        self.unwritten: dict[Spot, str | None] = {}
        self.struck: dict[Spot, tuple[str, ...]] = self._struck_before()
        self._asked: dict[str, tuple[Asked, ...]] = {}
        for station in self._stations_touched():
            self._ask(station)

    def _struck_before(self) -> dict[Spot, tuple[str, ...]]:
        struck: dict[Spot, tuple[str, ...]] = {}
        for one in self.survey.corrections:
            for spot in self.spots:
                if one.where == self._where(spot):
                    struck[spot] = (*struck.get(spot, ()), one.was)
        return struck

    def _where(self, spot: Spot) -> tuple[str, ...]:
        if isinstance(self.survey, SizeSurvey):
            return (str(spot.position), str(spot.mark))
        return (spot.station, str(spot.mark))

    # The spot to read now -------------------------------------------------------------------

    @property
    def next_spot(self) -> Spot | None:
        """The first spot nobody has read."""
        return next_spot(self.survey, self.spots)

    @property
    def active(self) -> Spot | None:
        """The spot the next value belongs to."""
        return self.correcting or self.next_spot

    @property
    def last_spot(self) -> Spot | None:
        """The spot read last, in the order of the walk."""
        done = [spot for spot in self.spots if typed_at(self.survey, spot)[0]]
        return done[-1] if done else None

    @property
    def unit(self) -> str:
        """Unit in which the survey is typed."""
        return self.survey.unit

    def read(self, text: str) -> Quantity:
        """Read what was typed as a length in the survey's unit."""
        return Length.read(text, self.unit)

    def text_in_unit(self, quantity: Quantity) -> str:
        """Give the number as it goes into the survey: as typed, or turned into its unit."""
        if quantity.unit == self.unit:
            return quantity.typed
        turned = quantity.to(self.unit, 7)
        return turned.rstrip("0").rstrip(".") if "." in turned else turned

    # What is taken --------------------------------------------------------------------------

    def take(self, spot: Spot, typed: str | None) -> None:
        """Put a reading in its place; an old one there is struck, and stays visible."""
        was_read, old = typed_at(self.survey, spot)
        if was_read and old is not None:
            self.struck[spot] = (*self.struck.get(spot, ()), old)
        self.survey = with_reading(self.survey, spot, typed)
        self.unwritten[spot] = typed
        self.correcting = None
        self.live = None
        self._ask(spot.station)

    def written(self, spot: Spot) -> None:
        """Note that a reading is on the disk."""
        self.unwritten.pop(spot, None)

    @property
    def in_hand(self) -> tuple[str | None, str] | None:
        """The first value that is not on the disk yet, and its mark."""
        for spot, typed in self.unwritten.items():
            angle = self.survey.angles[0 if spot.is_again else int(spot.mark)]
            return typed, f"{angle.typed}°"
        return None

    def keep(self, question: Question) -> None:
        """Note that a question was answered."""
        self.survey = msgspec.structs.replace(self.survey, kept=(*self.survey.kept, question))

    # What is asked --------------------------------------------------------------------------

    def _stations_touched(self) -> tuple[str, ...]:
        if isinstance(self.survey, SizeSurvey):
            return ("",)
        return tuple(one.station for one in self.survey.stations if one.typed)

    def _ask(self, station: str) -> None:
        if isinstance(self.survey, SizeSurvey):
            self._asked[""] = questions_of_sizes(self.job, self.survey)
        else:
            self._asked[station] = questions_at_station(self.job, self.survey, station)

    @property
    def questions(self) -> tuple[Asked, ...]:
        """Questions that nobody has answered; beside the earlier survey once all is read."""
        asked = [one for station in self._asked.values() for one in station]
        if isinstance(self.survey, RunoutSurvey) and self.next_spot is None:
            before = self.baseline.entry if self.baseline else None
            asked += closing_questions(self.job, self.survey, before)
        return unanswered(self.survey, asked)

    def spot_of(self, asked: Asked) -> Spot | None:
        """Find the spot a question is about; None where it is about the whole survey."""
        return next((spot for spot in self.spots if self._where(spot) == asked.where), None)

    # What it says so far --------------------------------------------------------------------

    def survey_with_live(self) -> AnySurvey:
        """Give the survey as if what is being typed had been taken."""
        spot = self.active
        if self.live is None or spot is None:
            return self.survey
        try:
            quantity = self.read(self.live)
        except UnreadableNumberError:
            return self.survey
        return with_reading(self.survey, spot, self.text_in_unit(quantity))

    def so_far(self) -> SoFar:
        """Work out what the readings say, the one being typed included."""
        survey = self.survey_with_live()
        if not isinstance(survey, RunoutSurvey):
            return SoFar()
        worked = read_survey(self.job, survey)
        read = tuple(one.station for one in survey.stations if one.typed)
        if self.baseline is None or self.attempt is None:
            return SoFar(worked, stations_read=read)
        changes = tuple(
            change
            for change in compare_surveys(self.job, self.baseline, worked)
            if change.key in read
        )
        rule_id = "seat-came-back" if survey.purpose == "bare seat" else "runout-changed"
        findings = {
            change.key: rule(rule_id).apply(
                station_facts(self.job, self.attempt.step, change), Subject(station=change.key)
            )
            for change in changes
            if not change.is_journal and change.tir is not None
        }
        return SoFar(worked, changes, findings, read)

    # What is shown --------------------------------------------------------------------------

    def task(self, so_far: SoFar, reasons: tuple[str, ...]) -> ReadingTask | None:
        """Show the reading to take now; None when nothing is left to read."""
        spot = self.active
        if spot is None:
            return None
        if isinstance(self.survey, SizeSurvey):
            return self._size_task(self.survey, spot, reasons)
        return self._runout_task(self.survey, spot, so_far, reasons)

    def fit_so_far(self) -> LandFit | None:
        """Work out the fit of the land in hand, with what is being typed; sizes only."""
        live = self.survey_with_live()
        if not isinstance(live, SizeSurvey) or self.attempt is None:
            return None
        item = next(one.item for one in self.attempt.items if one.item.key == live.item)
        land = next(one for one in item.lands if one.key == live.land)
        others = [
            sizes.entry
            for view in self.attempt.items
            for fit in view.fits
            for sizes in (fit.seat, fit.bore)
            if sizes is not None and sizes.entry.id != live.id
        ]
        return land_fit(self.job, item, land, [*others, live])

    def _question(self) -> QuestionShown | None:
        asked = self.questions
        return QuestionShown(asked[0].sentence, asked[0].proposed) if asked else None

    def _rung(self, spot: Spot, place: str) -> RungShown:
        was_read, typed = typed_at(self.survey, spot)
        asked = {one.where for one in self.questions}
        return RungShown(
            place=place,
            value="" if not was_read else self._shown(typed),
            struck=self.struck.get(spot, ()),
            active=spot == self.active,
            questioned=self._where(spot) in asked,
            writing=spot in self.unwritten,
        )

    def _shown(self, typed: str | None) -> str:
        """Show a value on the ladder: a runout in whole steps, as an indicator's hand reads it."""
        if typed is None:
            return "–"
        if isinstance(self.survey, SizeSurvey):
            return typed
        step = _STEPS.get(self.unit)
        if step is None:
            return typed.replace("-", "−")
        steps = self.read(typed).whole / step
        if steps != round(steps):
            return f"{steps:+.1f}".replace("-", "−")
        return f"{steps:+.0f}".replace("-", "−") if steps else "0"

    def rung_spots(self) -> tuple[Spot, ...]:
        """List the spots of the ladder: those of the station, or of the axial position, in hand."""
        spot = self.active
        if spot is None:
            return ()
        if isinstance(self.survey, SizeSurvey):
            return tuple(one for one in self.spots if one.position == spot.position)
        return tuple(one for one in self.spots if one.station == spot.station)

    def _old_value(self) -> str | None:
        if self.correcting is None:
            return None
        return typed_at(self.survey, self.correcting)[1] or ""

    def _runout_task(
        self, survey: RunoutSurvey, spot: Spot, so_far: SoFar, reasons: tuple[str, ...]
    ) -> ReadingTask:
        plan = self.job.plan
        station = plan.station(spot.station)
        marks = len(survey.angles)
        angle = survey.angles[0 if spot.is_again else int(spot.mark)]
        if spot.is_again:
            line = "the first mark again, to close the circle"
        else:
            number = int(spot.mark) + 1
            following = survey.angles[number % marks]
            then = f"{following.typed}°" + (" again" if number == marks else "")
            line = f"mark {number} of {marks}, then {then}"
        instrument = survey.instrument
        return ReadingTask(
            mark=f"{angle.typed}°",
            where=f"{spot.station}, {station.name}",
            lines=(line, *self._before_line(spot)),
            unit=survey.unit,
            other_unit="µm" if survey.unit in ("in", "mil") else "in",
            rungs=tuple(
                self._rung(
                    one,
                    f"{survey.angles[0].typed}° again"
                    if one.is_again
                    else f"{survey.angles[int(one.mark)].typed}°",
                )
                for one in self.rung_spots()
            ),
            caption=f"in {_step_words(survey.unit)}, {instrument}, + towards the indicator",
            dial=self._dial(spot, so_far),
            correcting=self._old_value(),
            reasons=reasons if self._reason_needed() else (),
            question=self._question(),
            is_closing=spot.is_again,
        )

    def _reason_needed(self) -> bool:
        return self.correcting is not None and self.correcting != self.last_spot

    def _before_line(self, spot: Spot) -> tuple[str, ...]:
        if self.baseline is None:
            return ()
        entry = self.baseline.entry
        readings = entry.readings(spot.station)
        index = 0 if spot.is_again else int(spot.mark)
        if readings is None or index >= len(readings.typed) or readings.typed[index] is None:
            return ()
        typed = str(readings.typed[index]).replace("-", "−")
        return (f"before the mount: {typed} {entry.unit}",)

    def _dial(self, spot: Spot, so_far: SoFar) -> DialPicture | None:
        if so_far.survey is None or not isinstance(self.survey, RunoutSurvey):
            return None
        worked = so_far.survey.station(spot.station)
        if worked is None:
            return None
        angle = self.survey.angles[0 if spot.is_again else int(spot.mark)]
        step = self.attempt.step if self.attempt else None
        limit = step.change_limit.value.si if step and step.change_limit else None
        finding = so_far.findings.get(spot.station)
        return dial_picture(
            self.job,
            worked,
            before=self.baseline.corrected(spot.station) if self.baseline else None,
            after_datum=so_far.survey.corrected(spot.station),
            limit=limit,
            active_angle=math.radians(angle.si),
            open_mark=None if spot.is_again or self.live is None else int(spot.mark),
            verdict=finding.verdict if finding else None,
        )

    def _size_task(self, survey: SizeSurvey, spot: Spot, reasons: tuple[str, ...]) -> ReadingTask:
        units = unit_set(self.job.plan.rotor.units)
        position = survey.positions[spot.position]
        angle = survey.angles[int(spot.mark)]
        places = len(survey.positions)
        return ReadingTask(
            mark=f"{angle.typed}°",
            where=f"{survey.feature} at land {survey.land}, {_place_name(spot.position, places)}",
            lines=(
                f"{units.show(position.si, 'position')} from the datum face",
                f"place {spot.position + 1} of {places}, reading {int(spot.mark) + 1} of "
                f"{len(survey.angles)}",
            ),
            unit=survey.unit,
            other_unit="mm" if survey.unit == "in" else "in",
            rungs=tuple(
                self._rung(one, f"{survey.angles[int(one.mark)].typed}°")
                for one in self.rung_spots()
            ),
            caption=f"diameters in {_unit_words(survey.unit)}, {survey.instrument}",
            correcting=self._old_value(),
            reasons=reasons if self._reason_needed() else (),
            question=self._question(),
            kind="sizes",
        )


def _step_words(unit: str) -> str:
    return {"in": "0.0001 in", "mil": "0.0001 in", "µm": "µm", "mm": "µm"}.get(unit, unit)


def _unit_words(unit: str) -> str:
    return {"in": "inches", "mil": "thousandths of an inch"}.get(unit, unit)


def _place_name(index: int, places: int) -> str:
    names: Sequence[str] = {1: ("middle",), 2: ("first end", "second end")}.get(
        places, ("first end", "middle", "second end")
    )
    return names[index] if places <= 3 else f"place {index + 1}"
