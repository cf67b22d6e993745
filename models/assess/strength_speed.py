"""What speed and running temperatures leave of a land's fit, and what they stress it by."""

import math
from dataclasses import replace

from models.assess.strength import LandAtSpeed, Release
from models.assess.strength_pair import Pair, pressure_of, running_pair, warmth
from models.engineering.rotation import (
    Joint,
    growth_at_speed,
    interference_at_speed,
    release_speed,
    release_speed_from_growth,
)
from models.engineering.stress_at_speed import hub_bore_stress_at_speed, shaft_stress_at_speed
from models.job import Item, Land, Plan

__all__ = ["lands_at_speed", "release_of"]


def lands_at_speed(
    plan: Plan, item: Item, pair: Pair, land: Land, *, least: float, greatest: float,
    uncertainty: float | None,
) -> tuple[LandAtSpeed, ...]:  # fmt: skip
    """Work a land out at maximum continuous and at trip speed, as far as the plan gives them."""
    return tuple(
        _at_speed(item, pair, land, least, greatest, uncertainty, name, speed)
        for name, speed in _speeds(plan)
    )


def release_of(item: Item, pair: Pair, land: Land, least: float) -> Release:
    """Find the speeds at which a land opens, at the temperatures it runs at."""
    warm = least + warmth(item, pair, land)[0]
    whole, alone = _joints(item, running_pair(item, pair), land, warm)
    designed = None
    if land.growth is not None:
        designed = release_speed_from_growth(
            interference=warm,
            growth=land.growth.value.si,
            growth_speed=land.growth.speed.si,
        )
    return Release(release_speed(joint=whole), release_speed(joint=alone), designed)


def _speeds(plan: Plan) -> list[tuple[str, float]]:
    named = (
        ("maximum continuous", plan.rotor.maximum_continuous_speed),
        ("trip", plan.rotor.trip_speed),
    )
    return [(name, speed.si) for name, speed in named if speed is not None]


def _joints(item: Item, pair: Pair, land: Land, interference: float) -> tuple[Joint, Joint]:
    """Make two uniform discs of a part: as wide as all of it, and as its hub alone."""
    alone = Joint(
        interference=interference,
        interface_diameter=land.nominal_diameter.si,
        hub_outer_diameter=land.hub_outer_diameter.si,
        shaft_bore_diameter=pair.shaft_bore,
        hub_modulus=pair.hub_modulus,
        shaft_modulus=pair.shaft_modulus,
        hub_poisson=pair.hub.poisson,
        shaft_poisson=pair.shaft.poisson,
        hub_density=pair.hub.density,
        shaft_density=pair.shaft.density,
    )
    widest = max(land.hub_outer_diameter.si, item.outline.outer.si)
    return replace(alone, hub_outer_diameter=widest), alone


def _at_speed(
    item: Item,
    pair: Pair,
    land: Land,
    least: float,
    greatest: float,
    uncertainty: float | None,
    name: str,
    speed: float,
) -> LandAtSpeed:
    added, unsure = warmth(item, pair, land)
    warm = running_pair(item, pair)
    whole, alone = _joints(item, warm, land, least + added)
    left = interference_at_speed(joint=whole, speed=speed)
    left_alone = interference_at_speed(joint=alone, speed=speed)
    designed = None
    if land.growth is not None:
        designed = least + added - growth_at_speed(
            growth=land.growth.value.si, growth_speed=land.growth.speed.si, speed=speed
        )  # fmt: skip
    # Stress rests on the greatest interference: on what the hub alone leaves of it for the shaft,
    # which is pressed most, and for the hub on the worse of the two discs.
    tight_whole, tight_alone = _joints(item, warm, land, greatest + added)
    pressures = [
        pressure_of(warm, land, interference_at_speed(joint=joint, speed=speed))
        for joint in (tight_whole, tight_alone)
    ]
    hubs = [
        hub_bore_stress_at_speed(
            pressure=pressure,
            interface_diameter=land.nominal_diameter.si,
            hub_outer_diameter=land.hub_outer_diameter.si,
            spinning_outer_diameter=joint.hub_outer_diameter,
            poisson=warm.hub.poisson,
            density=warm.hub.density,
            speed=speed,
        )
        for pressure, joint in zip(pressures, (tight_whole, tight_alone), strict=True)
    ]
    return LandAtSpeed(
        name=name,
        speed=speed,
        as_whole_disc=left,
        as_hub_alone=left_alone,
        by_designer=designed,
        least_pressure=pressure_of(warm, land, left),
        greatest_pressure=pressure_of(warm, land, left_alone),
        pressure_by_designer=None if designed is None else pressure_of(warm, land, designed),
        warmth=added,
        uncertainty=None if uncertainty is None else math.hypot(uncertainty, unsure),
        hub_as_whole_disc=hubs[0],
        hub_alone=hubs[1],
        shaft=shaft_stress_at_speed(
            pressure=max(pressures),
            interface_diameter=land.nominal_diameter.si,
            shaft_bore_diameter=warm.shaft_bore,
            poisson=warm.shaft.poisson,
            density=warm.shaft.density,
            speed=speed,
        ),
    )
