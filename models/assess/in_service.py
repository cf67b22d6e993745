"""What moved in service: a rotor as received, less the same rotor as it was left."""

from dataclasses import dataclass

from models.assess.build import Assessment, live_entries
from models.assess.runout import StationChange, SurveyRunout, compare_surveys, read_survey
from models.job import Job, Rotor, RunoutSurvey
from models.units import UnitSet, unit_set

__all__ = ["InService", "InServiceError", "MovedStation", "in_service"]

# Two plans that put one station further apart than this do not mean one place (common practice:
# about the width of an indicator's tip and the care of who lays it on) [m].
_ONE_PLACE = 2e-3


class InServiceError(ValueError):
    """Two jobs that cannot be compared; its message says why, and the way out."""


@dataclass(frozen=True)
class MovedStation:
    """One station as received less as left, beside the part that is mounted nearest to it."""

    change: StationChange
    item: str | None
    # Mean interference on diameter, least of the part's lands, as the part was last mounted [m].
    interference: float | None
    units: UnitSet
    # Without one reference for clock angles a change is known only between bounds.
    one_clock: bool

    @property
    def least(self) -> float | None:
        """The least that the station moved, as TIR [m]; None where either survey lacks it."""
        if self.change.tir is not None and self.one_clock:
            return max(self.change.tir - (self.change.expanded_uncertainty or 0.0), 0.0)
        if self.change.plain_change is not None:
            return abs(self.change.plain_change)
        return None

    @property
    def has_moved(self) -> bool:
        """Whether more than the uncertainty of the vector is left; totals alone prove nothing."""
        return self.change.tir is not None and self.one_clock and bool(self.least)

    @property
    def sentence(self) -> str:
        """What the station did, and at which interference, in words."""
        one, show = self.change, self.units.show
        if one.tir is not None and self.one_clock:
            doubt = show(one.expanded_uncertainty or 0.0, "runout")
            words = f"{one.key}: {self.units.both(one.tir, 'runout')} TIR ± {doubt}"
            if self.has_moved:
                words += f" towards {one.clock_angle_degrees:.0f}°"
            else:
                words += ", no more than the surveys' uncertainty"
        elif one.plain_change is not None:
            words = (
                f"{one.key}: total changed by {show(one.plain_change, 'runout')} as read, "
                "without angles that compare or without the journal axis"
            )
        else:
            return f"{one.key}: not read in both surveys"
        if self.item is None:
            return words
        if self.interference is None:
            return f"{words}; nearest part {self.item}, its interference not measured"
        fit = self.units.both(self.interference, "fit")
        return f"{words}; nearest part {self.item}, left with {fit} of interference"


@dataclass(frozen=True)
class InService:
    """Two jobs of one rotor: the final survey of the first, the as-received one of the second."""

    left: RunoutSurvey
    received: RunoutSurvey
    stations: tuple[MovedStation, ...]
    cautions: tuple[str, ...]

    @property
    def moved(self) -> tuple[MovedStation, ...]:
        """Stations that moved by more than their uncertainty, the furthest first."""
        found = [one for one in self.stations if one.has_moved and not one.change.is_journal]
        return tuple(sorted(found, key=lambda one: -(one.change.tir or 0.0)))

    @property
    def sentence(self) -> str:
        """What is to be said first."""
        if self.moved:
            return f"In service {self.moved[0].sentence}."
        if any(one.one_clock and one.change.tir is not None for one in self.stations):
            return "No station moved in service by more than the surveys' uncertainty."
        return "What moved in service cannot be told: the two surveys share no vectors."


def in_service(earlier: Assessment, present: Job) -> InService:
    """Compare a rotor as it came in with the same rotor as the earlier job left it.

    Parameters
    ----------
    earlier : Assessment
        The earlier job, judged; it must hold a closed final survey.
    present : Job
        The present job; it must hold a closed survey as received.

    Returns
    -------
    InService
        Every station common to both surveys, in the journal axis where both journals were read.

    Raises
    ------
    InServiceError
        If the jobs are of two rotors, or either survey is missing.
    """
    before, after = earlier.job.plan.rotor, present.plan.rotor
    if before.serial != after.serial:
        raise InServiceError(
            f"job {earlier.job.number} is of rotor {before.serial} and job {present.number} of "
            f"rotor {after.serial}. Give two jobs of one rotor"
        )
    left = _last(earlier.job, "final")
    if left is None:
        raise InServiceError(
            f"job {earlier.job.number} holds no closed final survey. Give the job that the rotor "
            "was last released from"
        )
    received = _last(present, "as received")
    if received is None:
        raise InServiceError(
            f"job {present.number} holds no closed survey as received. Read the rotor before "
            "anything is taken off it"
        )
    clock = _clock_differs(before, after)
    apart = _apart(earlier.job, present)
    cautions = [
        *(f"the two surveys differ in {word}" for word in received.set_up.differences(left.set_up)),
        *(f"the two plans differ in the {word}: only totals compare" for word in clock),
        *(f"{key} lies elsewhere in the two plans: left out" for key in sorted(apart)),
    ]
    same_journals = {earlier.job.plan.first_journal, earlier.job.plan.second_journal} == {
        present.plan.first_journal,
        present.plan.second_journal,
    }
    changes = compare_surveys(
        present,
        _without(read_survey(earlier.job, left), apart),
        _without(read_survey(present, received), apart),
    )
    if not same_journals:
        cautions.append("the two plans name different journals: the present plan's are the axis")
    units = unit_set(after.units)
    stations = tuple(
        MovedStation(one, *_nearest(earlier, one.position), units, not clock) for one in changes
    )
    return InService(left, received, stations, tuple(cautions))


def _last(job: Job, kind: str) -> RunoutSurvey | None:
    found = [
        one
        for one in live_entries(job)
        if isinstance(one, RunoutSurvey) and one.place.kind == kind and one.is_closed
    ]
    return found[-1] if found else None


def _clock_differs(before: Rotor, after: Rotor) -> list[str]:
    told = (
        ("reference mark", before.reference_mark, after.reference_mark),
        ("end that angles are seen from", before.seen_from, after.seen_from),
        ("rotation", before.rotation, after.rotation),
    )
    return [word for word, one, other in told if one != other]


def _apart(earlier: Job, present: Job) -> frozenset[str]:
    there = {one.key: one.position.si for one in earlier.plan.stations}
    return frozenset(
        one.key
        for one in present.plan.stations
        if one.key in there and abs(one.position.si - there[one.key]) > _ONE_PLACE
    )


def _without(survey: SurveyRunout, keys: frozenset[str]) -> SurveyRunout:
    if not keys:
        return survey
    kept = [index for index, one in enumerate(survey.stations) if one.key not in keys]
    axis, doubt = survey.in_axis, survey.in_axis_uncertainty
    return SurveyRunout(
        survey.entry,
        tuple(survey.stations[index] for index in kept),
        None if axis is None else axis[kept],
        None if doubt is None else doubt[kept],
    )


def _nearest(view: Assessment, position: float) -> tuple[str | None, float | None]:
    """Find the part mounted nearest to a place, and the least mean interference of its lands."""
    last = {one.step.key: one for one in view.attempts}
    items = [item for attempt in last.values() for item in attempt.items]
    if not items:
        return None, None

    def gap(index: int) -> float:
        outline = items[index].item.outline
        return max(outline.start.si - position, position - outline.end.si, 0.0)

    nearest = items[min(range(len(items)), key=gap)]
    fits = [fit.interference.mean for fit in nearest.fits if fit.interference is not None]
    return nearest.item.key, min(fits, default=None)
