"""From size surveys to the interference of a land."""

import math
from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np
import numpy.typing as npt

from models.assess.materials import expansion_of
from models.engineering.errors import OutOfRangeError
from models.engineering.size_uncertainty import SizeMeasurement, interference_uncertainty
from models.engineering.sizes import (
    Interference,
    SizeSummary,
    diameter_at_reference,
    interference,
    summarise_sizes,
)
from models.job import Item, Job, Land, SizeSurvey
from models.units import Length

__all__ = ["LandFit", "Sizes", "land_fit", "read_sizes", "size_problem"]

# A steel instrument where its card says nothing else (common practice).
_GAUGE_EXPANSION = 11.5e-6
# What a contact thermometer on a soaked part is good for, and how far coefficients published for
# one steel stray, both as standard uncertainties (common practice; spread of published values).
_TEMPERATURE_UNCERTAINTY = 0.5
_EXPANSION_UNCERTAINTY_SHARE = 0.04


@dataclass(frozen=True, eq=False)
class Sizes:
    """One size survey, as read and brought to 20 °C."""

    entry: SizeSurvey
    as_read: SizeSummary
    at_reference: SizeSummary | None
    measurement: SizeMeasurement | None


@dataclass(frozen=True, eq=False)
class LandFit:
    """How bore and seat of one land meet, as far as they are known."""

    land: Land
    seat: Sizes | None
    bore: Sizes | None
    interference: Interference | None
    expanded_uncertainty: float | None

    @property
    def is_measured(self) -> bool:
        """Whether both sizes were taken and closed."""
        return all(
            one is not None and one.entry.closed_at is not None for one in (self.seat, self.bore)
        )


def read_sizes(survey: SizeSurvey) -> npt.NDArray[np.float64]:
    """Turn typed diameters into an array, positions × angles, NaN where nothing is typed yet."""
    values = np.full((len(survey.positions), len(survey.angles)), math.nan)
    for row, typed_row in enumerate(survey.typed):
        for column, typed in enumerate(typed_row):
            if typed is not None:
                values[row, column] = Length.read(typed, survey.unit).si
    return values


def land_fit(
    job: Job,
    item: Item,
    land: Land,
    surveys: Sequence[SizeSurvey],
) -> LandFit:
    """Work out the interference of a land from the latest survey of its seat and its bore."""
    seat = _latest(job, job.plan.shaft.material, item, land, "seat", surveys)
    bore = _latest(job, item.material, item, land, "bore", surveys)
    if seat is None or bore is None or seat.at_reference is None or bore.at_reference is None:
        return LandFit(land, seat, bore, None, None)
    fit = interference(
        seat=seat.at_reference,
        bore=bore.at_reference,
        nominal_diameter=land.nominal_diameter.si,
    )
    expanded = None
    if seat.measurement is not None and bore.measurement is not None:
        same = seat.entry.instrument == bore.entry.instrument
        expanded = 2.0 * interference_uncertainty(
            seat=seat.measurement,
            bore=bore.measurement,
            instrument_correlation=1.0 if same else 0.0,
        )
    return LandFit(land, seat, bore, fit, expanded)


def size_problem(survey: SizeSurvey) -> str | None:
    """Say what keeps a size survey from being summed up, if anything does."""
    if not any(typed is not None for row in survey.typed for typed in row):
        return "no size has been typed"
    return None


def _latest(
    job: Job,
    material: str | None,
    item: Item,
    land: Land,
    feature: str,
    surveys: Sequence[SizeSurvey],
) -> Sizes | None:
    mine = [
        one
        for one in surveys
        if (one.item, one.land, one.feature) == (item.key, land.key, feature)
        and size_problem(one) is None
    ]
    return _sum_up(job, material, mine[-1]) if mine else None


def _sum_up(job: Job, material: str | None, survey: SizeSurvey) -> Sizes:
    diameters = read_sizes(survey)
    places = [position.si for position in survey.positions]
    order = np.argsort(places, kind="stable")
    ordered = [places[index] for index in order]
    as_read = summarise_sizes(diameters=diameters[order], axial_positions=ordered)
    expansion = expansion_of(job.plan, material)
    part = survey.part_temperature
    if part is None or expansion is None:
        return Sizes(survey, as_read, None, None)
    gauge = survey.gauge_temperature or part
    instrument = job.instrument(survey.instrument)
    gauge_expansion = _GAUGE_EXPANSION
    if instrument is not None and instrument.expansion is not None:
        gauge_expansion = instrument.expansion.si
    try:
        coefficient = expansion(part.si)
        # One factor brings every reading to 20 °C: the correction is the same share of each.
        factor = (
            diameter_at_reference(
                diameter=as_read.mean,
                part_temperature=part.si,
                part_expansion=coefficient,
                gauge_temperature=gauge.si,
                gauge_expansion=gauge_expansion,
            )
            / as_read.mean
        )
    except OutOfRangeError:
        return Sizes(survey, as_read, None, None)
    at_reference = summarise_sizes(diameters=diameters[order] * factor, axial_positions=ordered)
    if instrument is None or instrument.uncertainty is None:
        return Sizes(survey, as_read, at_reference, None)
    read = diameters[~np.isnan(diameters)]
    spread = float(np.std(read, ddof=1)) if read.size > 1 else 0.0
    measurement = SizeMeasurement(
        diameter=as_read.mean,
        part_temperature=part.si,
        part_expansion=coefficient,
        gauge_temperature=gauge.si,
        gauge_expansion=gauge_expansion,
        instrument_uncertainty=instrument.uncertainty.si / 2.0,
        # Form is judged by least and greatest; only what repeating leaves open belongs here.
        repeatability=spread / math.sqrt(max(read.size, 1)),
        part_temperature_uncertainty=_TEMPERATURE_UNCERTAINTY,
        gauge_temperature_uncertainty=_TEMPERATURE_UNCERTAINTY,
        part_expansion_uncertainty=coefficient * _EXPANSION_UNCERTAINTY_SHARE,
        gauge_expansion_uncertainty=gauge_expansion * _EXPANSION_UNCERTAINTY_SHARE,
    )
    return Sizes(survey, as_read, at_reference, measurement)
