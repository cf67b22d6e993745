"""What a plan leaves out, and what is not judged for it, in words."""

from __future__ import annotations

from collections import defaultdict
from collections.abc import Iterator, Mapping
from dataclasses import dataclass

from models.assess.heat_limits import highest_of
from models.assess.materials import material_of
from models.assess.torque import carries_torque
from models.job import Item, Plan, Step

__all__ = ["LackRow", "lacks_of"]

_MOST_NAMED = 3


@dataclass(frozen=True, kw_only=True)
class LackRow:
    """Something the plan leaves out, and what is not judged for it."""

    missing: str
    where: str
    so: str


def lacks_of(plan: Plan) -> tuple[LackRow, ...]:
    """Say what a plan leaves out, and what is not judged for it.

    Parameters
    ----------
    plan : Plan
        The plan.

    Returns
    -------
    tuple of LackRow
        Each thing once, with every place where it is missing.
    """
    places: dict[tuple[str, str], dict[int, str]] = defaultdict(dict)
    for missing, so in _lacks_of_rotor(plan):
        places[missing, so][0] = "the whole rotor"
    for number, step in enumerate(plan.steps, start=1):
        for missing, so in _lacks_of_step(step):
            places[missing, so][number] = step.title
        for item in step.items:
            title = step.title if len(step.items) == 1 else item.name
            for missing, so in _lacks_of_item(plan, item):
                places[missing, so][number] = title
    return tuple(
        LackRow(missing=missing, where=_places_words(where), so=so)
        for (missing, so), where in places.items()
    )


def _places_words(where: Mapping[int, str]) -> str:
    """Name each step where they are few; their numbers alone, in runs, where they are many."""
    if len(where) <= _MOST_NAMED:
        return "; ".join(f"step {at}, {title}" if at else title for at, title in where.items())
    runs: list[list[int]] = []
    for number in sorted(where):
        if runs and number == runs[-1][-1] + 1:
            runs[-1].append(number)
        else:
            runs.append([number])
    parts = [str(one[0]) if len(one) == 1 else f"{one[0]} to {one[-1]}" for one in runs]
    return f"steps {', '.join(parts)}"


def _lacks_of_rotor(plan: Plan) -> Iterator[tuple[str, str]]:
    rotor = plan.rotor
    if material_of(plan, plan.shaft.material) is None:
        yield (
            f"material of the shaft (“{plan.shaft.material}” is unknown)",
            "fit and heat not judged",
        )
    if plan.shaft.yield_strength is None:
        yield "yield strength of the shaft", "stress in the seats not judged"
    if rotor.trip_speed is None:
        yield "trip speed", "grip at speed not judged"
    if rotor.power is None or rotor.maximum_continuous_speed is None:
        yield "power and running speed", "torque that friction has to carry not judged"
    if plan.drift_limit is None:
        yield "limit of drift since the bare shaft", "what small changes add up to not judged"
    if plan.runout.reading_uncertainty is None and plan.decision_rule == "proved":
        yield (
            "uncertainty of a reading",
            "taken from the instrument's certificate where there is one",
        )


def _lacks_of_step(step: Step) -> Iterator[tuple[str, str]]:
    if step.survey_due and step.change_limit is None:
        yield "limit of change", "what the mount moved not judged"


def _lacks_of_item(plan: Plan, item: Item) -> Iterator[tuple[str, str]]:
    if item.axial is None:
        yield "axial position", "where the part rests not judged"
    if not item.lands:
        return
    if material_of(plan, item.material) is None:
        yield "material", "fit, heat and strength not judged"
    if item.kind == "hot" and item.mounting_clearance is None:
        yield "clearance while mounting", "heat target not worked out"
    if item.kind == "hot" and highest_of(plan, item)[0] is None:
        yield "highest temperature", "heat not judged"
    if item.yield_strength is None:
        yield "yield strength", "stress shown, not judged"
    if any(land.growth is None for land in item.lands):
        yield "growth with speed from its designer", "grip at speed estimated, not judged"
    if not carries_torque(plan, item) and not item.keyed:
        yield "share of the torque", "holding by friction not judged"
    roughness = (item.roughness, plan.shaft.roughness, plan.smoothing_factor)
    if any(part is None for part in roughness):
        yield "roughness of both surfaces, or their smoothing", "smoothing not counted"
