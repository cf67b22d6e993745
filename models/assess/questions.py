"""Readings that cannot be true, questioned in words; a person answers before the survey closes."""

import math
from collections.abc import Iterable, Sequence
from dataclasses import dataclass

import numpy as np

from models.assess.runout import SurveyRunout, read_survey, reading_uncertainty
from models.engineering.blunders import (
    Mistake,
    Suspicion,
    TwoSurveys,
    copied_survey,
    decimal_slip,
    likeliest_mistake,
    twice_or_half,
    unit_slip,
    wild_reading,
)
from models.engineering.errors import OutOfRangeError
from models.job import Job, RunoutSurvey, SizeSurvey
from models.units import Length, unit_set

__all__ = [
    "Asked",
    "all_questions",
    "closing_questions",
    "open_questions",
    "questions_at_station",
    "questions_of_sizes",
    "unanswered",
]

# No rotor that is worth stacking runs out by more (common practice).
_GREATEST_RUNOUT = 0.5e-3
# A size further from its nominal than this is no shrink fit (common practice).
_SIZE_SHARE = 0.005
_LEAST_SCATTER = 0.5e-6
_FEWEST_MARKS = 6
_WHOLE_SURVEY = ("survey",)

# Which rule a suspicion belongs to.
_RULE_OF = {
    Mistake.FLIPPED_SIGN: "sign-kept",
    Mistake.MIRRORED_ANGLES: "marks-counted-right",
    Mistake.TURNED_MARK: "reference-mark-kept",
    Mistake.SKIPPED_MARK: "no-mark-skipped",
    Mistake.SWAPPED_STATIONS: "stations-in-place",
    Mistake.SLIPPED_DECIMAL: "decimal-kept",
    Mistake.WRONG_UNIT: "unit-kept",
    Mistake.TWICE_OR_HALF: "totals-not-offsets",
}
_SURVEY_WORDS = {
    Mistake.FLIPPED_SIGN: "Every high spot lies half a turn from where it was: is the indicator's "
    "sign turned round?",
    Mistake.MIRRORED_ANGLES: "Every high spot lies where it would if the marks had been counted "
    "the other way, or from the other end: which way were they counted?",
    Mistake.TURNED_MARK: "All high spots have turned together: was the reference mark moved?",
    Mistake.SKIPPED_MARK: "One station has turned by one mark against all others: was a mark "
    "skipped there?",
    Mistake.SWAPPED_STATIONS: "Two neighbouring stations look like each other's earlier readings: "
    "were they read in each other's place?",
    Mistake.SLIPPED_DECIMAL: "Every station reads ten times, or a tenth, of what it read before: "
    "is the decimal point in its place?",
    Mistake.WRONG_UNIT: "Every station reads 25.4 times, or a 25.4th, of what it read before: is "
    "the indicator set to the other unit?",
    Mistake.TWICE_OR_HALF: "Every station reads twice, or half, of what it read before: were "
    "totals and offsets mixed up?",
}


@dataclass(frozen=True)
class Asked:
    """A question about a reading (station and mark), or about the survey as a whole."""

    where: tuple[str, ...]
    sentence: str
    proposed: str | None = None
    # The rule whose mistake is suspected.
    rule: str = ""

    @property
    def place(self) -> str:
        """The place in words."""
        return "the survey" if self.where == _WHOLE_SURVEY else " at mark ".join(self.where)


def questions_at_station(job: Job, survey: RunoutSurvey, key: str) -> tuple[Asked, ...]:
    """Question the readings of one station: far too large, or unlike the rest of their turn."""
    readings = survey.readings(key)
    if readings is None:
        return ()
    units = unit_set(job.plan.rotor.units)
    values = [
        math.nan if one is None else Length.read(one, survey.unit).si for one in readings.typed
    ]
    asked: list[Asked] = []
    known = [value for value in values if not math.isnan(value)]
    middle = float(np.median(known)) if known else 0.0
    for index, value in enumerate(values):
        away = abs(value - middle) if len(known) > 1 else abs(value)
        if away > _GREATEST_RUNOUT:
            asked.append(
                Asked(
                    (key, str(index)),
                    f"{units.both(value, 'runout')} is more than any rotor runs out: is the "
                    "decimal point or the unit right?",
                    rule="reading-possible",
                )
            )
    if asked or len(known) < _FEWEST_MARKS or len(readings.typed) < len(survey.angles):
        return tuple(asked)
    try:
        found = wild_reading(
            angles=[math.radians(angle.si) for angle in survey.angles],
            readings=values,
            scatter=_scatter(job, survey),
            resolution=_resolution(job, survey),
        )
    except OutOfRangeError:
        return ()
    if found is None or found.mark is None:
        return ()
    return (_wild(job, survey, key, found, values[found.mark]),)


def _wild(job: Job, survey: RunoutSurvey, key: str, found: Suspicion, value: float) -> Asked:
    units = unit_set(job.plan.rotor.units)
    proposed = None
    meant = ""
    if found.meant is not None:
        proposed = Length.text(found.meant, survey.unit, _decimals(survey))
        meant = f": {proposed} {survey.unit}?"
    angle = survey.angles[found.mark or 0]
    return Asked(
        (key, str(found.mark)),
        f"{units.show(value, 'runout')} at {angle.typed}° does not belong to the turn of the "
        f"others{meant or '.'}",
        proposed,
        rule="reading-belongs",
    )


def closing_questions(
    job: Job, survey: RunoutSurvey, before: RunoutSurvey | None
) -> tuple[Asked, ...]:
    """Question the survey as a whole beside the one before it: copied, turned, mirrored ..."""
    if before is None:
        return ()
    asked: list[Asked] = []
    pairs = [
        (mine, theirs)
        for one in survey.stations
        if (other := before.readings(one.station)) is not None
        for mine, theirs in zip(one.typed, other.typed, strict=False)
        if mine is not None and theirs is not None
    ]
    same_unit = survey.unit == before.unit and survey.angles == before.angles
    if pairs and same_unit:
        copied = copied_survey(
            typed=[mine for mine, _ in pairs],
            earlier=[theirs for _, theirs in pairs],
            scatter=_scatter(job, survey),
            resolution=_resolution(job, survey),
        )
        if copied is not None:
            asked.append(
                Asked(
                    _WHOLE_SURVEY,
                    "More readings in a row repeat the earlier survey to the last digit than "
                    "chance gives: were they read, or copied?",
                    rule="survey-read-anew",
                )
            )
    mistake = _mistake(job, read_survey(job, survey), read_survey(job, before))
    if mistake is not None and mistake.mistake in _SURVEY_WORDS:
        asked.append(
            Asked(
                _WHOLE_SURVEY,
                _SURVEY_WORDS[mistake.mistake],
                rule=_RULE_OF[mistake.mistake],
            )
        )
    return tuple(asked)


def _mistake(job: Job, present: SurveyRunout, earlier: SurveyRunout) -> Suspicion | None:
    both = [
        (one, other)
        for one in present.stations
        if (other := earlier.station(one.key)) is not None
        and one.fit is not None
        and other.fit is not None
    ]
    both.sort(key=lambda pair: pair[0].position)
    try:
        surveys = TwoSurveys(
            positions=np.array([one.position for one, _ in both]),
            earlier=np.array([other.vector for _, other in both]),
            present=np.array([one.vector for one, _ in both]),
            uncertainties=np.array(
                [
                    max(one.uncertainty, other.uncertainty, _LEAST_SCATTER / 2.0)
                    for one, other in both
                ]
            ),
            earlier_seconds=np.array([other.fit.second for _, other in both if other.fit]),
            present_seconds=np.array([one.fit.second for one, _ in both if one.fit]),
        )
        return likeliest_mistake(surveys=surveys, marks=len(present.entry.angles))
    except OutOfRangeError:
        return None


def questions_of_sizes(job: Job, survey: SizeSurvey) -> tuple[Asked, ...]:
    """Question diameters that lie far from the nominal one, with the figure probably meant."""
    item = next(one for step in job.plan.steps for one in step.items if one.key == survey.item)
    land = next(one for one in item.lands if one.key == survey.land)
    nominal = land.nominal_diameter.si
    units = unit_set(job.plan.rotor.units)
    asked = []
    for row, typed_row in enumerate(survey.typed):
        for column, typed in enumerate(typed_row):
            if typed is None:
                continue
            value = Length.read(typed, survey.unit).si
            if abs(value / nominal - 1.0) <= _SIZE_SHARE:
                continue
            found = _size_slip(value, nominal)
            proposed = None
            words = "is a digit missing?"
            if found is not None and found.factor is not None:
                proposed = Length.text(value / found.factor, survey.unit, _size_decimals(survey))
                words = f"{found.mistake.value}, {proposed} {survey.unit}?"
            asked.append(
                Asked(
                    (str(row), str(column)),
                    f"{typed} {survey.unit} lies far from the nominal "
                    f"{units.show(nominal, 'diameter')}: {words}",
                    proposed,
                )
            )
    return tuple(asked)


def _size_slip(value: float, nominal: float) -> Suspicion | None:
    for test in (unit_slip, decimal_slip, twice_or_half):
        found = test(value=value, expected=nominal)
        if found is not None:
            return found
    return None


def open_questions(
    job: Job, survey: RunoutSurvey | SizeSurvey, before: RunoutSurvey | None
) -> tuple[Asked, ...]:
    """List every question about a survey that nobody has answered."""
    return unanswered(survey, all_questions(job, survey, before))


def all_questions(
    job: Job, survey: RunoutSurvey | SizeSurvey, before: RunoutSurvey | None
) -> tuple[Asked, ...]:
    """List every question about a survey, answered or not."""
    asked: Iterable[Asked]
    if isinstance(survey, SizeSurvey):
        asked = questions_of_sizes(job, survey)
    else:
        asked = [
            one
            for station in survey.stations
            for one in questions_at_station(job, survey, station.station)
        ]
        # Beside the earlier survey only once there is nothing left to read.
        if all(len(one.typed) == len(survey.angles) for one in survey.stations):
            asked = [*asked, *closing_questions(job, survey, before)]
    return tuple(asked)


def unanswered(survey: RunoutSurvey | SizeSurvey, asked: Iterable[Asked]) -> tuple[Asked, ...]:
    """Leave out the questions that somebody has answered."""
    answered = {(tuple(one.where), one.question) for one in survey.kept}
    return tuple(one for one in asked if (one.where, one.sentence) not in answered)


def _scatter(job: Job, survey: RunoutSurvey) -> float:
    return max(reading_uncertainty(job, survey), _LEAST_SCATTER)


def _resolution(job: Job, survey: RunoutSurvey) -> float:
    instrument = job.instrument(survey.instrument)
    if instrument is not None and instrument.resolution is not None:
        return instrument.resolution.si
    return Length.read("1", survey.unit).si * 10.0 ** -_decimals(survey)


def _decimals(survey: RunoutSurvey) -> int:
    """Count the decimals this survey is typed with."""
    return _most_decimals(
        [text for one in survey.stations for text in one.typed if text is not None]
    )


def _size_decimals(survey: SizeSurvey) -> int:
    return _most_decimals([text for row in survey.typed for text in row if text is not None])


def _most_decimals(typed: Sequence[str]) -> int:
    return max((len(text.partition(".")[2]) for text in typed), default=0)
