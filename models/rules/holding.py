"""Judgements on thrust with torque, and on the shear in the shaft."""

from models.rules.compare import FORCE_STEP, PRESSURE_STEP, at_least, at_most
from models.rules.rule import Judgement, Rule, Verdict
from models.rules.strength_facts import HoldingFacts, ShearFacts
from models.units import UnitSet

__all__ = ["HOLDING_RULES", "SHAFT_RULES"]


def fit_holds_thrust(
    *,
    units: UnitSet,
    holding_force: float,
    force_uncertainty: float,
    force_demanded: float,
    thrust: float,
    friction: float,
    friction_source: str,
    proved: bool,
) -> Judgement:
    """Compare what friction holds at rest with thrust and torque together."""
    return _holds(
        units, "at rest", holding_force, force_uncertainty, force_demanded, thrust,
        f"{friction:.2f}, {friction_source}", proved,
    )  # fmt: skip


def fit_holds_thrust_at_speed(
    *,
    units: UnitSet,
    holding_force_at_speed: float,
    force_speed_uncertainty: float,
    force_demanded_at_speed: float,
    thrust: float,
    friction: float,
    friction_source: str,
    proved: bool,
) -> Judgement:
    """Compare what friction still holds at maximum continuous speed with both loads together."""
    return _holds(
        units, "at maximum continuous speed", holding_force_at_speed, force_speed_uncertainty,
        force_demanded_at_speed, thrust, f"{friction:.2f}, {friction_source}", proved,
    )  # fmt: skip


def _holds(
    units: UnitSet,
    when: str,
    held: float,
    uncertainty: float,
    demanded: float,
    thrust: float,
    friction: str,
    proved: bool,
) -> Judgement:
    verdict = at_least(
        held,
        demanded,
        resolution=FORCE_STEP,
        expanded_uncertainty=uncertainty,
        proved=proved,
    )
    turned = " together with the torque" if demanded > abs(thrust) else ""
    words = (
        f"Friction ({friction}) holds {units.both(held, 'force')} {when}; the thrust of "
        f"{units.show(abs(thrust), 'force')}{turned} demands {units.show(demanded, 'force')}"
    )
    ends = {
        Verdict.WITHIN: ".",
        Verdict.CANNOT_TELL: f": ±{units.show(uncertainty, 'force')} cannot tell. Measure bore and "
        "seat again, or let an inspector decide.",
        Verdict.OUTSIDE: ". The fit would slip along the shaft.",
    }
    return Judgement(verdict, words + ends[verdict], {"room": held - demanded})


def shaft_shear_is_allowed(
    *, units: UnitSet, shear: float, shear_limit: float, torque: float, diameter: float
) -> Judgement:
    """Compare the shear under a seat with the limit that the plan gives for the shaft."""
    verdict = at_most(shear, shear_limit, resolution=PRESSURE_STEP)
    words = (
        f"The shaft carries {units.both(torque, 'torque')} at Ø "
        f"{units.show(diameter, 'diameter')}: {units.both(shear, 'pressure')} of shear, "
        f"{units.show(shear_limit, 'pressure')} allowed"
    )
    end = "." if verdict is Verdict.WITHIN else ". An engineer decides about power and diameter."
    return Judgement(verdict, words + end, {"room": shear_limit - shear})


_SHIGLEY = "R. G. Budynas, J. K. Nisbett, Shigley's Mechanical Engineering Design, 9th ed."

HOLDING_RULES = (
    Rule(
        id="fit-holds-thrust",
        statement="At rest friction holds the thrust of a part and, without a key, its torque "
        "together.",
        source=f"the plan's thrust; {_SHIGLEY}, 7-8; vector sum of both at the seat, by hand",
        facts=HoldingFacts,
        judge=fit_holds_thrust,
    ),
    Rule(
        id="fit-holds-thrust-at-speed",
        statement="At maximum continuous speed friction still holds the thrust of a part and, "
        "without a key, its torque together.",
        source=f"the designer's growth and the plan's thrust; {_SHIGLEY}, 7-8; vector sum of both "
        "at the seat, by hand",
        facts=HoldingFacts,
        judge=fit_holds_thrust_at_speed,
    ),
)

SHAFT_RULES = (
    Rule(
        id="shaft-shear-allowed",
        statement="Under every seat the torque in the shaft, added up from the free end to the "
        "coupling, stays below the shaft's shear limit.",
        source=f"the plan's shear limit; {_SHIGLEY}, 3-12: 16 T/(π d³), from memory",
        facts=ShearFacts,
        judge=shaft_shear_is_allowed,
    ),
)
