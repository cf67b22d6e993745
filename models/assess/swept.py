"""A total swept without stopping, beside what the readings at the marks say of the same surface."""

import math
from collections.abc import Iterable
from dataclasses import dataclass
from typing import Literal

import numpy as np

from models.assess.runout import StationRunout, SurveyRunout, reading_uncertainty
from models.job import Job
from models.units import Length, UnitSet, unit_set

__all__ = ["SweptView", "swept_views"]

# Points that a fitted curve is drawn through to find its highest and lowest: half a degree apart.
_POINTS = 720
# A total is the difference of two readings, each with its own doubt; taken twice for 95 %.
_EXPANDED = 2.0 * math.sqrt(2.0)


@dataclass(frozen=True)
class SweptView:
    """One station at which the marks were read and the total was swept too."""

    survey: str
    station: str
    swept: float
    """Total as swept [m]."""
    at_marks: float
    """Greatest less least reading at the marks [m]."""
    reach: float
    """Total of the curve fitted to the marks, between them too, and no less than at them [m]."""
    doubt: float
    """Expanded uncertainty of a difference between two totals [m]."""
    marks: int
    aliased: tuple[int, ...]
    units: UnitSet

    @property
    def outcome(self) -> Literal["agrees", "swept is short", "form between marks"]:
        """What the two totals say of each other."""
        if self.swept < self.at_marks - self.doubt:
            return "swept is short"
        if self.swept > self.reach + self.doubt:
            return "form between marks"
        return "agrees"

    @property
    def sentence(self) -> str:
        """What was found and what to do, in words."""
        swept = self.units.both(self.swept, "runout")
        if self.outcome == "swept is short":
            return (
                f"{self.station}: the swept total of {swept} is less than the "
                f"{self.units.both(self.at_marks, 'runout')} between its own marks, which cannot "
                "be: sweep and read it again."
            )
        if self.outcome == "form between marks":
            lobes = " and ".join(str(one) for one in self.aliased)
            also = f" {lobes} lobes would even read as an offset." if lobes else ""
            return (
                f"{self.station}: the swept total of {swept} is more than the "
                f"{self.units.both(self.reach, 'runout')} that {self.marks} marks account for: "
                "there is form between the marks, a scratch or many lobes. Look at the surface, or "
                f"read at more marks.{also}"
            )
        return (
            f"{self.station}: the swept total of {swept} agrees with the "
            f"{self.units.both(self.reach, 'runout')} that its marks account for."
        )


def swept_views(job: Job, surveys: Iterable[SurveyRunout]) -> tuple[SweptView, ...]:
    """Set every swept total beside the marks of its station.

    Parameters
    ----------
    job : Job
        The job, for its units and what its readings are known to.
    surveys : iterable of SurveyRunout
        The surveys as read.

    Returns
    -------
    tuple of SweptView
        One for each station with both; none where the total alone was taken.
    """
    found = []
    units = unit_set(job.plan.rotor.units)
    for survey in surveys:
        resolution = job.plan.runout.indicator_resolution
        doubt = _EXPANDED * reading_uncertainty(job, survey.entry)
        doubt += resolution.si if resolution is not None else 0.0
        for station in survey.stations:
            typed = survey.entry.readings(station.key)
            if typed is None or typed.swept_total is None or station.fit is None:
                continue
            lever = survey.entry.set_up.lever_angle
            shown = Length.read(typed.swept_total, survey.entry.unit).si
            found.append(
                SweptView(
                    survey=survey.entry.id,
                    station=station.key,
                    # The marks' readings are corrected for the lever's angle already.
                    swept=shown * (1.0 if lever is None else math.cos(math.radians(lever.si))),
                    at_marks=station.fit.sampled_tir,
                    reach=_reach(station),
                    doubt=doubt,
                    marks=station.fit.count,
                    aliased=station.fit.aliased_harmonics,
                    units=units,
                )
            )
    return tuple(found)


def _reach(station: StationRunout) -> float:
    fit = station.fit
    if fit is None:
        return math.nan
    turn = np.linspace(0.0, 2.0 * math.pi, _POINTS, endpoint=False)
    curve = (fit.eccentricity * np.exp(-1j * turn)).real
    if not math.isnan(fit.second.real):
        curve = curve + (fit.second * np.exp(-2j * turn)).real
    return max(float(np.ptp(curve)), fit.sampled_tir)
