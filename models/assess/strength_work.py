"""How pressure, stress, holding and release of a measured fit are worked out."""

from collections.abc import Sequence
from dataclasses import dataclass, replace

from models.assess.materials import material_of
from models.assess.sizes import LandFit
from models.assess.strength import FitStrength, LandAtSpeed, LandStrength, Release, Strength
from models.engineering.errors import OutOfRangeError
from models.engineering.fit_stress import hub_stresses, shaft_stresses, yield_margin
from models.engineering.fits import contact_pressure, smoothing_loss
from models.engineering.holding import (
    FRICTIONS,
    holding_force,
    holding_torque,
    torque_from_power,
)
from models.engineering.materials import Material, modulus
from models.engineering.rotation import (
    Joint,
    growth_at_speed,
    interference_at_speed,
    release_speed,
    release_speed_from_growth,
)
from models.job import Item, Land, Plan
from models.units import unit_set

__all__ = ["fit_strength"]

_REFERENCE_TEMPERATURE = 20.0


@dataclass(frozen=True)
class _Pair:
    """Hub and shaft as materials, at the reference temperature."""

    hub: Material
    shaft: Material
    hub_modulus: float
    shaft_modulus: float
    shaft_bore: float


def fit_strength(plan: Plan, item: Item, fits: Sequence[LandFit]) -> FitStrength | None:
    """Work out pressure, stress, holding and release of an item; None where not enough is known.

    Every land must be measured: a part does not grip on half of its lands.
    """
    pair = _pair(plan, item)
    if pair is None or not fits or any(fit.interference is None for fit in fits):
        return None
    friction = item.friction.si if item.friction else FRICTIONS[0].coefficient
    if friction <= 0.0:
        return None
    try:
        lands = tuple(_land_strength(plan, item, pair, fit) for fit in fits)
        torque, force = _held(item, [land.least_pressure for land in lands], friction)
    except OutOfRangeError:
        return None
    unsure = [land.pressure_uncertainty for land in lands]
    known = [one for one in unsure if one is not None]
    return FitStrength(
        item=item,
        lands=lands,
        friction=friction,
        friction_source=_friction_source(item),
        smoothing_source=_smoothing_source(plan, item),
        holding_torque=torque,
        holding_force=force,
        # The torque is proportional to the pressures, which may all err the same way.
        holding_torque_uncertainty=(
            _held(item, known, friction)[0] if len(known) == len(unsure) else None
        ),
        holding_torque_at_continuous=_held_at_continuous(item, lands, friction),
        torque_to_carry=_torque_to_carry(plan, item),
        hub_yield=_hub_yield(item, pair.hub),
        shaft_yield=_shaft_yield(plan, pair.shaft),
        trip_speed=plan.rotor.trip_speed.si if plan.rotor.trip_speed else None,
        units=unit_set(plan.rotor.units),
    )


def _pair(plan: Plan, item: Item) -> _Pair | None:
    hub, shaft = material_of(plan, item.material), material_of(plan, plan.shaft.material)
    if hub is None or shaft is None:
        return None
    return _Pair(
        hub=hub,
        shaft=shaft,
        hub_modulus=modulus(material=hub, temperature=_REFERENCE_TEMPERATURE),
        shaft_modulus=modulus(material=shaft, temperature=_REFERENCE_TEMPERATURE),
        shaft_bore=plan.shaft.bore.si if plan.shaft.bore else 0.0,
    )


def _land_strength(plan: Plan, item: Item, pair: _Pair, fit: LandFit) -> LandStrength:
    assert fit.interference is not None
    land = fit.land
    loss = _smoothing(plan, item)
    least = fit.interference.least - loss
    greatest = fit.interference.greatest
    diameter, outer = land.nominal_diameter.si, land.hub_outer_diameter.si
    high = _pressure(pair, land, greatest)
    hub = hub_stresses(pressure=high, interface_diameter=diameter, hub_outer_diameter=outer)
    shaft = shaft_stresses(
        pressure=high, interface_diameter=diameter, shaft_bore_diameter=pair.shaft_bore
    )
    worst = shaft.bore.von_mises if shaft.bore else shaft.seat.von_mises
    unsure = fit.expanded_uncertainty
    hub_yield, shaft_yield = _hub_yield(item, pair.hub), _shaft_yield(plan, pair.shaft)
    return LandStrength(
        key=land.key,
        least_interference=least,
        greatest_interference=greatest,
        smoothing_loss=loss,
        least_pressure=_pressure(pair, land, least),
        greatest_pressure=high,
        # The pressure is proportional to the interference.
        pressure_uncertainty=None if unsure is None else _pressure(pair, land, unsure),
        interference_uncertainty=unsure,
        hub=hub,
        shaft=shaft,
        hub_margin=_margin(hub.bore.von_mises, hub_yield),
        shaft_margin=_margin(worst, shaft_yield),
        at_speed=tuple(
            _at_speed(item, pair, land, least, name, speed) for name, speed in _speeds(plan)
        ),
        release=_release(item, pair, land, least),
    )


def _pressure(pair: _Pair, land: Land, interference: float) -> float:
    return contact_pressure(
        interference=interference,
        interface_diameter=land.nominal_diameter.si,
        hub_outer_diameter=land.hub_outer_diameter.si,
        shaft_bore_diameter=pair.shaft_bore,
        hub_modulus=pair.hub_modulus,
        shaft_modulus=pair.shaft_modulus,
        hub_poisson=pair.hub.poisson,
        shaft_poisson=pair.shaft.poisson,
    )


def _margin(stress: float, strength: Strength | None) -> float | None:
    if strength is None:
        return None
    return yield_margin(equivalent_stress=stress, yield_strength=strength.value)


def _speeds(plan: Plan) -> list[tuple[str, float]]:
    named = (
        ("maximum continuous", plan.rotor.maximum_continuous_speed),
        ("trip", plan.rotor.trip_speed),
    )
    return [(name, speed.si) for name, speed in named if speed is not None]


def _joints(item: Item, pair: _Pair, land: Land, interference: float) -> tuple[Joint, Joint]:
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
    item: Item, pair: _Pair, land: Land, least: float, name: str, speed: float
) -> LandAtSpeed:
    whole, alone = _joints(item, pair, land, least)
    left = interference_at_speed(joint=whole, speed=speed)
    left_alone = interference_at_speed(joint=alone, speed=speed)
    designed = None
    if land.growth is not None:
        designed = least - growth_at_speed(
            growth=land.growth.value.si, growth_speed=land.growth.speed.si, speed=speed
        )
    return LandAtSpeed(
        name=name,
        speed=speed,
        as_whole_disc=left,
        as_hub_alone=left_alone,
        by_designer=designed,
        least_pressure=_pressure(pair, land, left),
        greatest_pressure=_pressure(pair, land, left_alone),
        pressure_by_designer=None if designed is None else _pressure(pair, land, designed),
    )


def _release(item: Item, pair: _Pair, land: Land, least: float) -> Release:
    whole, alone = _joints(item, pair, land, least)
    designed = None
    if land.growth is not None:
        designed = release_speed_from_growth(
            interference=least,
            growth=land.growth.value.si,
            growth_speed=land.growth.speed.si,
        )
    return Release(release_speed(joint=whole), release_speed(joint=alone), designed)


def _held(item: Item, pressures: Sequence[float], friction: float) -> tuple[float, float]:
    """Add torque and axial force over the lands, each a ring of its own."""
    torque = force = 0.0
    for land, pressure in zip(item.lands, pressures, strict=True):
        torque += holding_torque(
            pressure=pressure,
            interface_diameter=land.nominal_diameter.si,
            contact_length=land.end.si - land.start.si,
            friction=friction,
        )
        force += holding_force(
            pressure=pressure,
            interface_diameter=land.nominal_diameter.si,
            contact_length=land.end.si - land.start.si,
            friction=friction,
        )
    return torque, force


def _held_at_continuous(item: Item, lands: Sequence[LandStrength], friction: float) -> float | None:
    """Tell the torque held at maximum continuous speed, where the designer gave every growth."""
    found = [land.at("maximum continuous") for land in lands]
    left = [one.pressure_by_designer for one in found if one is not None]
    known = [pressure for pressure in left if pressure is not None]
    return _held(item, known, friction)[0] if len(known) == len(lands) else None


def _torque_to_carry(plan: Plan, item: Item) -> float | None:
    power, speed = plan.rotor.power, plan.rotor.maximum_continuous_speed
    share = item.carried_torque_share
    if power is None or speed is None or share is None or speed.si <= 0.0:
        return None
    return share.si * torque_from_power(power=power.si, speed=speed.si)


def _smoothing(plan: Plan, item: Item) -> float:
    """Tell what smoothing takes: nothing, unless the plan gives its factor and both roughnesses."""
    bore, seat, factor = item.roughness, plan.shaft.roughness, plan.smoothing_factor
    if bore is None or seat is None or factor is None:
        return 0.0
    return smoothing_loss(factor=factor, bore_roughness=bore.si, seat_roughness=seat.si)


def _smoothing_source(plan: Plan, item: Item) -> str:
    if item.roughness is None or plan.shaft.roughness is None or plan.smoothing_factor is None:
        return "smoothing not counted"
    edition = plan.smoothing_edition or "edition not named in the plan"
    return f"smoothing {plan.smoothing_factor:g} of both roughnesses, taken as Rz, {edition}"


def _friction_source(item: Item) -> str:
    if item.friction is not None:
        return item.friction_origin.words if item.friction_origin else "the plan"
    lowest = FRICTIONS[0]
    return f"the lowest known, {lowest.condition}: {lowest.source}"


def _hub_yield(item: Item, hub: Material) -> Strength | None:
    if item.yield_strength is not None:
        return Strength(item.yield_strength.si, "the plan", by_plan=True)
    return _published_yield(hub)


def _shaft_yield(plan: Plan, shaft: Material) -> Strength | None:
    if plan.shaft.yield_strength is not None:
        return Strength(plan.shaft.yield_strength.si, "the plan", by_plan=True)
    return _published_yield(shaft)


def _published_yield(material: Material) -> Strength | None:
    if material.yield_strength is None:
        return None
    source = material.sources.yield_strength or material.name
    return Strength(
        material.yield_strength, f"published for {material.key}: {source}", by_plan=False
    )
