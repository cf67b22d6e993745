"""Plain facts on what a fit grips, holds and is stressed by."""

from dataclasses import dataclass

from models.rules.rule import known
from models.units import UnitSet, metric_set

__all__ = ["HoldingFacts", "LandFacts", "ShearFacts"]


@dataclass(frozen=True, kw_only=True)
class LandFacts:
    """One land under its greatest measured interference, and at speed under its least."""

    units: UnitSet = metric_set
    hub_stress: float | None = known(
        "the stress at the bore, from the sizes of bore and seat and both materials", "Pa"
    )
    hub_stress_uncertainty: float | None = known("the uncertainty of the stress at the bore", "Pa")
    hub_yield_strength: float | None = known("the part's yield strength", "Pa")
    shaft_stress: float | None = known(
        "the stress in the shaft, from the sizes of bore and seat and both materials", "Pa"
    )
    shaft_stress_uncertainty: float | None = known("the uncertainty of the shaft's stress", "Pa")
    shaft_yield_strength: float | None = known("the shaft's yield strength", "Pa")
    interference_at_trip: float | None = known(
        "the interference at trip speed, from sizes, growth and trip speed", "m"
    )
    interference_uncertainty: float | None = known("the uncertainty of the interference", "m")
    release_speed: float | None = known("the speed at which the fit opens", "rad/s")
    proved: bool | None = known("the plan's decision rule")
    limit_origin: str | None = known("the limit's origin")


@dataclass(frozen=True, kw_only=True)
class HoldingFacts:
    """What friction holds over all lands of a part that no key helps, and what it must carry."""

    units: UnitSet = metric_set
    holding_torque: float | None = known(
        "the torque that friction holds, from the sizes of bore and seat and both materials", "N·m"
    )
    holding_torque_at_speed: float | None = known(
        "the torque that friction holds at maximum continuous speed", "N·m"
    )
    holding_uncertainty: float | None = known("the uncertainty of the torque held", "N·m")
    speed_uncertainty: float | None = known(
        "the uncertainty of the torque held at maximum continuous speed", "N·m"
    )
    holding_force: float | None = known(
        "the force that friction holds, from the sizes of bore and seat and both materials", "N"
    )
    holding_force_at_speed: float | None = known(
        "the force that friction holds at maximum continuous speed", "N"
    )
    force_uncertainty: float | None = known("the uncertainty of the force held", "N")
    force_speed_uncertainty: float | None = known(
        "the uncertainty of the force held at maximum continuous speed", "N"
    )
    force_demanded: float | None = known("thrust and torque to carry, as one force", "N")
    force_demanded_at_speed: float | None = known(
        "thrust and torque to carry at maximum continuous speed, as one force", "N"
    )
    thrust: float | None = known("the thrust to carry", "N")
    torque_to_carry: float | None = known(
        "the torque to carry, from the rotor's power and maximum continuous speed", "N·m"
    )
    friction: float | None = known("the coefficient of friction", "-")
    friction_source: str | None = known("where the coefficient of friction comes from")
    proved: bool | None = known("the plan's decision rule")
    limit_origin: str | None = known("the limit's origin")


@dataclass(frozen=True, kw_only=True)
class ShearFacts:
    """The shaft under one land, where it carries the torque from the free end to the coupling."""

    units: UnitSet = metric_set
    shear: float | None = known("the shear, from power, speed and the shares of the parts", "Pa")
    shear_limit: float | None = known("the shear limit of the shaft", "Pa")
    torque: float | None = known("the torque in the shaft", "N·m")
    diameter: float | None = known("the diameter of the seat", "m")
    limit_origin: str | None = known("the limit's origin")
