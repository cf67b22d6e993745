"""Whether an attempt may be read, from its temperatures."""

from models.assess.attempts.view import Attempt
from models.assess.materials import expansion_of
from models.engineering.bow_shape import side_to_side_bow
from models.job import Cooling, Job
from models.rules.facts import CoolFacts
from models.units import unit_set

__all__ = ["cool_facts", "cooling_matters"]


def cooling_matters(attempt: Attempt) -> bool:
    """Say whether an attempt has been so far that its warmth matters."""
    return any(view.item.kind == "hot" for view in attempt.items)


def cool_facts(job: Job, attempt: Attempt) -> CoolFacts:
    """State how warm the rotor last was, from the temperatures taken before the survey judged."""
    limits = job.plan.cooling
    cooling = _cooling_before(attempt)
    across = above = None
    if cooling is not None and cooling.temperatures:
        by_place: dict[int, list[float]] = {}
        for one in cooling.temperatures:
            by_place.setdefault(one.position.whole, []).append(one.temperature.si)
        opposite = [max(place) - min(place) for place in by_place.values() if len(place) > 1]
        across = max(opposite, default=None)
        if cooling.surroundings is not None:
            warmest = max(one.temperature.si for one in cooling.temperatures)
            above = warmest - cooling.surroundings.si
    return CoolFacts(
        units=unit_set(job.plan.rotor.units),
        side_to_side=across,
        above_surroundings=above,
        side_to_side_allowed=limits.side_to_side.si,
        above_surroundings_allowed=limits.above_surroundings.si,
        bow_per_kelvin=_bow_per_kelvin(job),
        limit_origin=limits.origin.words,
    )


def _cooling_before(attempt: Attempt) -> Cooling | None:
    if attempt.judged is None:
        return attempt.coolings[-1] if attempt.coolings else None
    ids = [one.id for one in attempt.entries]
    survey = ids.index(attempt.judged.entry.id)
    before = [one for one in attempt.coolings if ids.index(one.id) < survey]
    return before[-1] if before else None


def _bow_per_kelvin(job: Job) -> float | None:
    """Work out the mid-span bow per kelvin across, from the thinnest stretch between journals."""
    expansion = expansion_of(job.plan, job.plan.shaft.material)
    if expansion is None:
        return None
    first = job.plan.station(job.plan.first_journal).position.si
    second = job.plan.station(job.plan.second_journal).position.si
    low, high = min(first, second), max(first, second)
    # The mean diameter by length stands for the shaft: the bow is a caution here, not a limit.
    lengths = [
        (min(step.end.si, high) - max(step.start.si, low), step.diameter.si)
        for step in job.plan.shaft.steps
        if step.end.si > low and step.start.si < high
    ]
    total = sum(length for length, _ in lengths)
    if total <= 0.0:
        return None
    return side_to_side_bow(
        temperature_difference=1.0,
        span=high - low,
        diameter=sum(length * diameter for length, diameter in lengths) / total,
        expansion=expansion(20.0),
    )
