"""From typed readings to vectors in the journal axis, and to what a mount moved."""

import math
from collections.abc import Sequence
from dataclasses import dataclass
from functools import lru_cache

import numpy as np
import numpy.typing as npt

from models.assess.ground import Ground, ground_of
from models.engineering.bow import KinkFit, fit_one_kink
from models.engineering.errors import OutOfRangeError
from models.engineering.harmonics import HarmonicFit, fit_harmonics
from models.engineering.indicator import lever_corrected
from models.engineering.mount_change import ChangeBounds, change_at_stations, change_bounds
from models.engineering.runout import datum_uncertainty, journal_datum
from models.job import Job, RunoutSurvey, StationReadings
from models.units import Angle, Length

__all__ = [
    "StationChange",
    "StationRunout",
    "SurveyRunout",
    "compare_surveys",
    "read_station",
    "read_survey",
    "reading_uncertainty",
    "where_the_bend_sits",
]

# Fewer marks cannot tell an offset from the mean, let alone from a second harmonic.
_LEAST_MARKS = 3
# A fit by weights needs some doubt at every station, also where none was stated.
_LEAST_UNCERTAINTY = 0.1e-6


@dataclass(frozen=True, eq=False)
class StationRunout:
    """One station of a survey: its readings and what they say."""

    key: str
    position: float
    angles: npt.NDArray[np.float64]
    readings: npt.NDArray[np.float64]
    fit: HarmonicFit | None
    vector: complex
    uncertainty: float
    total: float
    closure: float | None

    @property
    def is_read(self) -> bool:
        """Whether anything was read here."""
        return not math.isnan(self.total)

    @property
    def has_vector(self) -> bool:
        """Whether the readings tell a vector and not only a total."""
        return not math.isnan(self.vector.real)


@dataclass(frozen=True, eq=False)
class SurveyRunout:
    """A survey's stations as read, and in the journal axis once both journals are known."""

    entry: RunoutSurvey
    stations: tuple[StationRunout, ...]
    in_axis: npt.NDArray[np.complex128] | None
    in_axis_uncertainty: npt.NDArray[np.float64] | None

    def station(self, key: str) -> StationRunout | None:
        """Find a station by key."""
        return next((one for one in self.stations if one.key == key), None)

    def corrected(self, key: str) -> complex | None:
        """Give a station's vector in the journal axis, once there is one."""
        if self.in_axis is None:
            return None
        for index, one in enumerate(self.stations):
            if one.key == key and one.has_vector:
                return complex(self.in_axis[index])
        return None


@dataclass(frozen=True, eq=False)
class StationChange:
    """What a mount moved at one station: a vector where angles are known, else bounds."""

    key: str
    position: float
    is_journal: bool
    before: complex | None
    after: complex | None
    change: complex | None
    tir: float | None
    clock_angle_degrees: float | None
    expanded_uncertainty: float | None
    plain_change: float | None
    bounds: ChangeBounds | None
    reading_uncertainty: float


@dataclass(frozen=True)
class _Means:
    """All that a station's readings are turned into a vector with, beside the readings."""

    position: float
    angles: tuple[float, ...]
    unit: str
    counted_as_planned: bool
    lever_angle: float | None
    reading_uncertainty: float
    mark_uncertainty: float

    @classmethod
    def of(cls, job: Job, survey: RunoutSurvey, station: str) -> "_Means":
        lever = survey.set_up.lever_angle
        return cls(
            position=_position(job, station),
            angles=_angles(survey.angles, survey.counted == "as planned"),
            unit=survey.unit,
            counted_as_planned=survey.counted == "as planned",
            lever_angle=None if lever is None else math.radians(lever.si),
            reading_uncertainty=reading_uncertainty(job, survey),
            mark_uncertainty=_mark_uncertainty(job),
        )

    def value(self, text: str | None) -> float:
        if text is None:
            return math.nan
        value = _metres(text, self.unit)
        if self.lever_angle is None:
            return value
        return lever_corrected(reading=value, lever_angle=self.lever_angle)


def read_station(job: Job, survey: RunoutSurvey, readings: StationReadings) -> StationRunout:
    """Turn the typed readings of one station into a vector with its uncertainty."""
    return _read_station(_Means.of(job, survey, readings.station), readings)


# While a survey is read, one station changes with each key; the others are found here.
@lru_cache(maxsize=8192)
def _read_station(means: _Means, readings: StationReadings) -> StationRunout:
    angles = np.array(means.angles, dtype=np.float64)
    values = np.array(
        [means.value(text) for text in readings.typed]
        + [math.nan] * (len(angles) - len(readings.typed)),
        dtype=np.float64,
    )
    count = int(np.sum(~np.isnan(values)))
    fit: HarmonicFit | None = None
    vector, uncertainty, total = complex(math.nan, math.nan), math.nan, math.nan
    if count >= _LEAST_MARKS:
        try:
            fit = fit_harmonics(
                angles=angles,
                readings=values,
                instrument_uncertainty=means.reading_uncertainty,
                indexing_uncertainty=means.mark_uncertainty,
            )
        except OutOfRangeError:
            fit = None
    if fit is not None:
        vector, uncertainty, total = fit.eccentricity, fit.vector_uncertainty, fit.sampled_tir
    elif readings.total is not None:
        total = means.value(readings.total)
        if readings.high_spot is not None:
            turn = _turned(math.radians(readings.high_spot.si), means.counted_as_planned)
            vector = total / 2.0 * complex(math.cos(turn), math.sin(turn))
            uncertainty = math.hypot(
                means.reading_uncertainty, total / 2.0 * means.mark_uncertainty
            )
    closure = None
    if readings.again is not None and readings.typed and readings.typed[0] is not None:
        closure = means.value(readings.again) - values[0]
    return StationRunout(
        readings.station,
        means.position,
        angles,
        values,
        fit,
        vector,
        uncertainty,
        total,
        closure,
    )


def read_survey(job: Job, survey: RunoutSurvey) -> SurveyRunout:
    """Turn a survey into vectors, and into the journal axis once both journals are read.

    A survey read before is not read again.
    """
    return _read_survey(ground_of(job), survey)


@lru_cache(maxsize=1024)
def _read_survey(ground: Ground, survey: RunoutSurvey) -> SurveyRunout:
    job = ground.job
    known = {one.key for one in job.plan.stations}
    # What was read where this plan revision names no station stays in the record, unjudged.
    stations = tuple(
        read_station(job, survey, one) for one in survey.stations if one.station in known
    )
    keys = [one.key for one in stations]
    in_axis = uncertainty = None
    journals = (job.plan.first_journal, job.plan.second_journal)
    if all(key in keys and stations[keys.index(key)].has_vector for key in journals):
        first, second = (keys.index(key) for key in journals)
        positions = [one.position for one in stations]
        in_axis = journal_datum(
            positions=positions,
            vectors=[one.vector for one in stations],
            first_journal=first,
            second_journal=second,
        )
        uncertainty = datum_uncertainty(
            positions=positions,
            uncertainties=[_or_zero(one.uncertainty) for one in stations],
            first_journal=first,
            second_journal=second,
        )
    return SurveyRunout(survey, stations, in_axis, uncertainty)


def compare_surveys(
    job: Job, before: SurveyRunout, after: SurveyRunout
) -> tuple[StationChange, ...]:
    """Work out the change at every station common to both surveys, in the journal axis."""
    common = [one.key for one in after.stations if before.station(one.key) is not None]
    journals = (job.plan.first_journal, job.plan.second_journal)
    pairs = [(before.station(key), after.station(key)) for key in common]
    with_datum = all(key in common and _both_vectors(pairs[common.index(key)]) for key in journals)
    found = None
    if with_datum:
        found = change_at_stations(
            positions=[one.position for one, _ in _known(pairs)],
            before_vectors=[one.vector for one, _ in _known(pairs)],
            after_vectors=[other.vector for _, other in _known(pairs)],
            before_uncertainties=[_or_zero(one.uncertainty) for one, _ in _known(pairs)],
            after_uncertainties=[_or_zero(other.uncertainty) for _, other in _known(pairs)],
            first_journal=common.index(journals[0]),
            second_journal=common.index(journals[1]),
        )
    changes = []
    for index, (one, other) in enumerate(_known(pairs)):
        vector = tir = angle = expanded = bounds = None
        plain = other.total - one.total if one.is_read and other.is_read else None
        if found is not None and _both_vectors((one, other)):
            vector = complex(found.changes[index])
            tir = float(found.tir[index])
            angle = math.degrees(float(found.angles[index])) % 360.0
            expanded = 2.0 * float(found.tir_uncertainties[index])
        elif plain is not None:
            bounds = change_bounds(tir_before=one.total, tir_after=other.total)
        changes.append(
            StationChange(
                key=one.key,
                position=one.position,
                is_journal=one.key in journals,
                before=before.corrected(one.key),
                after=after.corrected(one.key),
                change=vector,
                tir=tir,
                clock_angle_degrees=angle,
                expanded_uncertainty=expanded,
                plain_change=plain,
                bounds=bounds,
                reading_uncertainty=math.hypot(
                    _or_zero(one.uncertainty), _or_zero(other.uncertainty)
                ),
            )
        )
    return tuple(changes)


def where_the_bend_sits(job: Job, changes: Sequence[StationChange]) -> KinkFit | None:
    """Fit one kink to the change of the shaft's own stations, where they bear it."""
    shaft = [
        one
        for one in changes
        if one.change is not None and job.plan.station(one.key).kind != "part"
    ]
    inner = [one for one in shaft if not one.is_journal]
    if len(inner) < _LEAST_MARKS:
        return None
    try:
        return fit_one_kink(
            positions=[one.position for one in shaft],
            changes=[one.change for one in shaft if one.change is not None],
            uncertainties=[max(one.reading_uncertainty, _LEAST_UNCERTAINTY) for one in shaft],
            first_journal_position=job.plan.station(job.plan.first_journal).position.si,
            second_journal_position=job.plan.station(job.plan.second_journal).position.si,
        )
    except OutOfRangeError:
        return None


_Pair = tuple[StationRunout | None, StationRunout | None]


def _known(pairs: Sequence[_Pair]) -> list[tuple[StationRunout, StationRunout]]:
    return [(one, other) for one, other in pairs if one is not None and other is not None]


def _both_vectors(pair: _Pair) -> bool:
    one, other = pair
    return one is not None and other is not None and one.has_vector and other.has_vector


def _or_zero(value: float) -> float:
    return 0.0 if math.isnan(value) else value


def _turned(angle: float, as_planned: bool) -> float:
    """Count an angle as the plan does; a survey counted the other way is mirrored, not turned."""
    return angle if as_planned else -angle % (2.0 * math.pi)


@lru_cache(maxsize=64)
def _angles(typed: tuple[Angle, ...], as_planned: bool) -> tuple[float, ...]:
    return tuple(_turned(math.radians(angle.si), as_planned) for angle in typed)


@lru_cache(maxsize=65536)
def _metres(text: str, unit: str) -> float:
    return Length.read(text, unit).si


def _position(job: Job, station: str) -> float:
    return job.plan.station(station).position.si


def reading_uncertainty(job: Job, survey: RunoutSurvey) -> float:
    """Find the standard uncertainty of one reading: the plan's, else from the certificate."""
    planned = job.plan.runout.reading_uncertainty
    if planned is not None:
        return planned.si
    instrument = job.instrument(survey.instrument)
    if instrument is None or instrument.uncertainty is None:
        return 0.0
    return instrument.uncertainty.si / 2.0


def _mark_uncertainty(job: Job) -> float:
    planned = job.plan.runout.mark_uncertainty
    return math.radians(planned.si) if planned is not None else 0.0
