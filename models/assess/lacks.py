"""What the calculations lack in a plan: each in words, with its step, its item and its field.

None of it keeps a plan from being issued; what rests on it is not judged.
"""

from collections.abc import Iterable

from models.assess.heat_limits import highest_of
from models.assess.materials import material_of, material_problem
from models.assess.torque import carries_torque
from models.job import Item, Job, Land, Plan, Step

__all__ = ["lacks"]

_CARRY_TORQUE = ("impeller", "wheel", "disc", "hub")


def lacks(job: Job) -> tuple[str, ...]:
    """Name what the plan in force leaves out and what therefore is not worked out or not judged."""
    plan = job.plan
    found = [*_of_rotor(plan), *_of_shaft(plan), *_of_limits(plan)]
    for number, step in enumerate(plan.steps, start=1):
        for item in step.items:
            named = step.title if step.title == item.name else f"{step.title}, {item.name}"
            place = f"Step {number}, {named}"
            found += [f"{place}: {one}" for one in _of_item(plan, step, item)]
    return tuple(found)


def _of_rotor(plan: Plan) -> Iterable[str]:
    rotor = plan.rotor
    if rotor.maximum_continuous_speed is None:
        yield (
            "Rotor: no maximum continuous speed, so what speed leaves of a fit, the torque to "
            "carry and the permissible unbalance are not worked out."
        )
    if rotor.trip_speed is None:
        yield "Rotor: no trip speed, so no fit is judged at it."
    if rotor.power is None:
        yield "Rotor: no power, so the torque that each part must carry is not worked out."


def _of_shaft(plan: Plan) -> Iterable[str]:
    shaft = plan.shaft
    for own in plan.materials:
        problem = material_problem(own)
        if problem is not None:
            yield f"Material “{own.name}”: it cannot be worked with, {problem}."
    if material_of(plan, shaft.material) is None:
        yield (
            f"Shaft: its material “{shaft.material}” is not in the table, so expansion, pressure, "
            "stress, sag and critical speed are not worked out."
        )
    if shaft.yield_strength is None:
        yield "Shaft: no yield strength, so the stress under the fits is shown and not judged."
    if plan.smoothing_factor is None:
        yield (
            "Smoothing factor: none, so roughness takes nothing from the interference that is "
            "counted on."
        )
        return
    if shaft.roughness is None:
        yield "Shaft: no roughness, so smoothing is not counted at any seat."
    if not plan.smoothing_edition:
        yield "Smoothing factor: its edition is not named, and editions differ by a factor of two."


def _of_limits(plan: Plan) -> Iterable[str]:
    if plan.drift_limit is None:
        yield "Drift limit: none, so what many small changes add up to is shown and not judged."
    if plan.runout.closure_limit is None:
        yield "Closure limit: none, so common practice stands in for it."
    if all(station.final_limit is None for station in plan.stations):
        yield "Final limits: no station has one, so the finished rotor's runout is not judged."


def _of_item(plan: Plan, step: Step, item: Item) -> Iterable[str]:
    if item is step.items[0] and step.survey_due and step.change_limit is None:
        yield "the step has no change limit, so what its mount moves is not judged."
    if item.mass is None:
        known = material_of(plan, item.material) is not None
        how = "is estimated from its outline" if known else "is left out"
        yield f"no mass, so it {how} in journal loads, sag and critical speed."
    if item.kind == "hydraulic" and item.taper is None:
        yield "no taper, so sizes are asked for as for a straight fit and no draw-up is judged."
    if item.kind != "hot":
        return
    if material_of(plan, item.material) is None:
        named = f"its material “{item.material}” is not in the table"
        if not item.material:
            named = "no material"
        yield f"{named}, so heat target, pressure, stress and holding are not worked out."
    if not item.lands:
        yield "no land, so neither fit nor heat is judged."
        return
    yield from _of_heat(plan, item)
    if item.yield_strength is None:
        yield "no yield strength, so the stress at its bore is shown and not judged."
    if item.friction is None:
        yield "no coefficient of friction, so the lowest known one is taken."
    carries = item.outline.kind in _CARRY_TORQUE and not item.keyed
    if carries and not carries_torque(plan, item):
        yield "no share of the torque, so what friction holds is shown and not judged."
    if plan.smoothing_factor is not None and item.roughness is None:
        yield "no roughness, so smoothing is not counted."
    missing = [land for land in item.lands if land.growth is None]
    if missing:
        yield (
            f"no growth by its designer{_named(item, missing)}, so the speed at which it opens is "
            "an estimate and not judged."
        )


def _of_heat(plan: Plan, item: Item) -> Iterable[str]:
    if item.mounting_clearance is None:
        yield "no mounting clearance, so there is no heat target."
    if highest_of(plan, item)[0] is None:
        yield "no highest temperature, so its heat target is not judged."
    if item.axial is None:
        yield "no axial place, so where it comes to rest is not judged."


def _named(item: Item, lands: list[Land]) -> str:
    if len(item.lands) == 1:
        return ""
    return f" at {', '.join(f'land {land.key}' for land in lands)}"
