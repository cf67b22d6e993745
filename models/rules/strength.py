"""Judgements on what a fit is stressed by and what it holds."""

from models.rules.compare import LENGTH_STEP, PRESSURE_STEP, TORQUE_STEP, at_least, at_most
from models.rules.holding import HOLDING_RULES
from models.rules.rule import Judgement, Rule, Verdict
from models.rules.strength_facts import HoldingFacts, LandFacts
from models.units import UnitSet

__all__ = ["RULES"]


def hub_does_not_yield(
    *,
    units: UnitSet,
    hub_stress: float,
    hub_stress_uncertainty: float,
    hub_yield_strength: float,
    proved: bool,
) -> Judgement:
    """Compare the equivalent stress at the bore with the part's yield strength."""
    return _stays_elastic(
        units, "The bore", hub_stress, hub_stress_uncertainty, hub_yield_strength, proved
    )


def seat_does_not_yield(
    *,
    units: UnitSet,
    shaft_stress: float,
    shaft_stress_uncertainty: float,
    shaft_yield_strength: float,
    proved: bool,
) -> Judgement:
    """Compare the greatest equivalent stress in the shaft with its yield strength."""
    return _stays_elastic(
        units,
        "The shaft under the fit",
        shaft_stress,
        shaft_stress_uncertainty,
        shaft_yield_strength,
        proved,
    )


def _stays_elastic(
    units: UnitSet,
    what: str,
    stress: float,
    uncertainty: float,
    strength: float,
    proved: bool,
) -> Judgement:
    verdict = at_most(
        stress,
        strength,
        resolution=PRESSURE_STEP,
        expanded_uncertainty=uncertainty,
        proved=proved,
    )
    words = (
        f"{what} is stressed to {units.both(stress, 'pressure')}, yield strength "
        f"{units.show(strength, 'pressure')}"
    )
    ends = {
        Verdict.WITHIN: f": {100.0 * stress / strength:.0f} % of it.",
        Verdict.CANNOT_TELL: f": ±{units.show(uncertainty, 'pressure')} cannot tell. Measure bore "
        "and seat again with a finer instrument or more readings, or let an inspector decide.",
        Verdict.OUTSIDE: ": it would yield and grip less than measured. An engineer decides.",
    }
    return Judgement(verdict, words + ends[verdict], {"room": strength - stress})


def fit_stays_closed(
    *,
    units: UnitSet,
    interference_at_trip: float,
    interference_uncertainty: float,
    proved: bool,
    release_speed: float | None = None,
) -> Judgement:
    """Ask for interference at trip speed; two surfaces that just touch no longer grip."""
    verdict = at_least(
        interference_at_trip,
        LENGTH_STEP,
        resolution=LENGTH_STEP,
        expanded_uncertainty=interference_uncertainty,
        proved=proved,
    )
    opens = ""
    if release_speed is not None:
        opens = f" It opens at {units.show(release_speed, 'speed')}."
    left = units.both(abs(interference_at_trip), "fit")
    ends = {
        Verdict.WITHIN: f"At trip speed {left} of interference are left.",
        Verdict.CANNOT_TELL: f"At trip speed {left} of "
        f"{'interference' if interference_at_trip > 0.0 else 'clearance'} are reckoned: "
        f"±{units.show(interference_uncertainty, 'fit')} cannot tell. Measure bore and seat again, "
        "or let an inspector decide.",
        Verdict.OUTSIDE: f"At trip speed the fit has opened by {left}. This part may not go on "
        "this seat.",
    }
    return Judgement(verdict, ends[verdict] + opens, {"room": interference_at_trip})


def fit_holds_torque(
    *,
    units: UnitSet,
    holding_torque: float,
    holding_uncertainty: float,
    torque_to_carry: float,
    friction: float,
    friction_source: str,
    proved: bool,
) -> Judgement:
    """Compare what friction holds at rest with what a part without a key must carry."""
    return _holds(
        units,
        "at rest",
        holding_torque,
        holding_uncertainty,
        torque_to_carry,
        f"{friction:.2f}, {friction_source}",
        proved,
    )


def fit_holds_torque_at_speed(
    *,
    units: UnitSet,
    holding_torque_at_speed: float,
    speed_uncertainty: float,
    torque_to_carry: float,
    friction: float,
    friction_source: str,
    proved: bool,
) -> Judgement:
    """Compare what friction still holds at maximum continuous speed with what must be carried."""
    return _holds(
        units,
        "at maximum continuous speed",
        holding_torque_at_speed,
        speed_uncertainty,
        torque_to_carry,
        f"{friction:.2f}, {friction_source}",
        proved,
    )


def _holds(
    units: UnitSet,
    when: str,
    held: float,
    uncertainty: float,
    carried: float,
    friction: str,
    proved: bool,
) -> Judgement:
    verdict = at_least(
        held,
        abs(carried),
        resolution=TORQUE_STEP,
        expanded_uncertainty=uncertainty,
        proved=proved,
    )
    words = (
        f"Friction ({friction}) holds {units.both(held, 'torque')} {when}, "
        f"{units.show(abs(carried), 'torque')} must be carried"
    )
    ends = {
        Verdict.WITHIN: ".",
        Verdict.CANNOT_TELL: f": ±{units.show(uncertainty, 'torque')} cannot tell. Measure bore "
        "and seat again, or let an inspector decide.",
        Verdict.OUTSIDE: ". The fit would slip.",
    }
    return Judgement(verdict, words + ends[verdict], {"room": held - abs(carried)})


_LAME = "R. G. Budynas, J. K. Nisbett, Shigley's Mechanical Engineering Design, 9th ed., 7-8"

RULES = (
    Rule(
        id="hub-not-yielding",
        statement="Under the greatest measured interference the part's bore stays elastic.",
        source=f"the plan's yield strength; thick cylinders after Lamé, {_LAME}",
        facts=LandFacts,
        judge=hub_does_not_yield,
    ),
    Rule(
        id="seat-not-yielding",
        statement="Under the greatest measured interference the shaft stays elastic.",
        source=f"the plan's yield strength; thick cylinders after Lamé, {_LAME}",
        facts=LandFacts,
        judge=seat_does_not_yield,
    ),
    Rule(
        id="fit-stays-closed-at-trip",
        statement="At trip speed some of the least measured interference is left.",
        source="the designer's growth in the plan; growth goes with the square of the speed",
        facts=LandFacts,
        judge=fit_stays_closed,
    ),
    Rule(
        id="fit-holds-torque",
        statement="At rest the friction of a part without a key holds the torque it must carry.",
        source=f"the plan's share of the torque; {_LAME}, equation 7-49",
        facts=HoldingFacts,
        judge=fit_holds_torque,
    ),
    Rule(
        id="fit-holds-torque-at-speed",
        statement="At maximum continuous speed the friction of a part without a key still holds "
        "the torque it must carry.",
        source=f"the designer's growth and the plan's share of the torque; {_LAME}, equation 7-49",
        facts=HoldingFacts,
        judge=fit_holds_torque_at_speed,
        edition=2,
    ),
    *HOLDING_RULES,
)
