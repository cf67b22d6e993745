"""What friction holds over all lands of a part, and what it has to hold."""

from collections.abc import Sequence

from models.assess.strength import Holding, LandStrength
from models.assess.torque import torque_to_carry
from models.engineering.holding import FRICTIONS, holding_force, holding_torque
from models.engineering.holding_both import force_demanded
from models.job import Item, Plan

__all__ = ["friction_of", "holding_of"]


def friction_of(item: Item) -> tuple[float, str]:
    """Give the coefficient of friction and where it comes from; the lowest known by default."""
    if item.friction is not None:
        origin = item.friction_origin.words if item.friction_origin else "the plan"
        return item.friction.si, origin
    lowest = FRICTIONS[0]
    return lowest.coefficient, f"the lowest known, {lowest.condition}: {lowest.source}"


def holding_of(plan: Plan, item: Item, lands: Sequence[LandStrength]) -> Holding:
    """Add up what all lands hold, at rest and at maximum continuous speed."""
    friction, source = friction_of(item)
    torque, force = _held(item, [land.least_pressure for land in lands], friction)
    unsure = _held_if_known(item, [land.pressure_uncertainty for land in lands], friction)
    running = [land.at("maximum continuous") for land in lands]
    at_speed = _held_if_known(
        item, [one.pressure_by_designer if one else None for one in running], friction
    )
    unsure_at_speed = _held_if_known(
        item, [land.pressure_uncertainty_at("maximum continuous") for land in lands], friction
    )
    carried = torque_to_carry(plan, item)
    thrust = item.thrust.value.si if item.thrust else None
    return Holding(
        friction=friction,
        friction_source=source,
        torque=torque,
        force=force,
        # Both are proportional to the pressures, which may all err the same way.
        torque_uncertainty=unsure[0] if unsure else None,
        force_uncertainty=unsure[1] if unsure else None,
        torque_at_continuous=at_speed[0] if at_speed else None,
        force_at_continuous=at_speed[1] if at_speed else None,
        torque_uncertainty_at_continuous=unsure_at_speed[0] if unsure_at_speed else None,
        force_uncertainty_at_continuous=unsure_at_speed[1] if unsure_at_speed else None,
        torque_to_carry=carried,
        thrust=thrust,
        demanded=_demanded(item, thrust, carried, (torque, force)),
        demanded_at_continuous=_demanded(item, thrust, carried, at_speed),
    )


def _demanded(
    item: Item,
    thrust: float | None,
    torque: float | None,
    held: tuple[float, float] | None,
) -> float | None:
    # A key takes the torque and leaves the thrust to friction.
    turning = 0.0 if item.keyed else torque
    if turning is None and item.carried_torque_share is not None:
        return None
    turning = turning or 0.0
    if thrust is None or held is None:
        return None
    if turning and not held[0] > 0.0:
        # Nothing holds at all: by the radius of the seat, so that the demand still has a number.
        return float((thrust**2 + (2.0 * turning / _seat_diameter(item)) ** 2) ** 0.5)
    return force_demanded(
        torque=turning, thrust=thrust, holding_torque=held[0], holding_force=held[1]
    )


def _seat_diameter(item: Item) -> float:
    return max(land.nominal_diameter.si for land in item.lands)


def _held_if_known(
    item: Item, pressures: Sequence[float | None], friction: float
) -> tuple[float, float] | None:
    known = [one for one in pressures if one is not None]
    return _held(item, known, friction) if len(known) == len(pressures) else None


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
