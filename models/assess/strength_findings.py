"""What the plan asks for of a fit's strength, judged.

A rule is applied only where the plan asks for it: a yield strength, a growth or a share of the
torque stands there. What is not asked for is named by `models.assess.lacks`.
"""

from collections.abc import Iterable
from dataclasses import replace

from models.assess.strength import FitStrength, LandStrength
from models.assess.torque import carries_torque
from models.job import Item, Land, Plan
from models.rules import rule
from models.rules.rule import Finding, Subject
from models.rules.strength_facts import HoldingFacts, LandFacts
from models.units import unit_set

__all__ = ["strength_findings"]


def strength_findings(
    plan: Plan, item: Item, strength: FitStrength | None, subject: Subject
) -> Iterable[Finding]:
    """Judge stress, torque and grip at speed of an item, as far as its plan asks for them."""
    for land in item.lands:
        found = _of_land(strength, land.key)
        asked = (
            ("hub-not-yielding", item.yield_strength is not None),
            ("seat-not-yielding", plan.shaft.yield_strength is not None),
            ("fit-stays-closed-at-trip", land.growth is not None),
        )
        facts = _land_facts(plan, item, land, found)
        for rule_id, is_asked in asked:
            if is_asked:
                origin = land.growth.origin.words if land.growth and "trip" in rule_id else None
                yield rule(rule_id).apply(
                    replace(facts, limit_origin=origin), replace(subject, land=land.key)
                )
    if not item.lands:
        return
    holding = _holding_facts(plan, item, strength)
    grows = all(land.growth is not None for land in item.lands)
    # Friction is no safety for a keyed part: the key carries the torque first.
    if carries_torque(plan, item) and not item.keyed:
        yield rule("fit-holds-torque").apply(holding, subject)
        if grows:
            yield rule("fit-holds-torque-at-speed").apply(holding, subject)
    if item.thrust is not None:
        about = replace(holding, limit_origin=item.thrust.origin.words)
        yield rule("fit-holds-thrust").apply(about, subject)
        if grows:
            yield rule("fit-holds-thrust-at-speed").apply(about, subject)


def _of_land(strength: FitStrength | None, key: str) -> LandStrength | None:
    if strength is None:
        return None
    return next((one for one in strength.lands if one.key == key), None)


def _land_facts(plan: Plan, item: Item, land: Land, found: LandStrength | None) -> LandFacts:
    proved = plan.decision_rule == "proved"
    trip = found.at("trip") if found else None
    part, shaft = item.yield_strength, plan.shaft.yield_strength
    return LandFacts(
        units=unit_set(plan.rotor.units),
        hub_stress=found.hub_stress if found else None,
        hub_stress_uncertainty=_unsure(found, found.hub_stress if found else 0.0, proved),
        hub_yield_strength=part.si if part else None,
        shaft_stress=found.shaft_stress if found else None,
        shaft_stress_uncertainty=_unsure(found, found.shaft_stress if found else 0.0, proved),
        shaft_yield_strength=shaft.si if shaft else None,
        interference_at_trip=trip.by_designer if trip else None,
        interference_uncertainty=((trip.uncertainty if trip else None) if proved else 0.0),
        release_speed=found.release.by_designer if found else None,
        proved=proved,
    )


def _unsure(found: LandStrength | None, stress: float, proved: bool) -> float | None:
    """Give the expanded uncertainty of a stress, which is proportional to the pressure."""
    # Simple acceptance needs no uncertainty; proving does.
    if not proved:
        return 0.0
    if found is None or found.pressure_uncertainty is None:
        return None
    if found.greatest_pressure <= 0.0:
        return 0.0
    return stress * found.pressure_uncertainty / found.greatest_pressure


def _holding_facts(plan: Plan, item: Item, strength: FitStrength | None) -> HoldingFacts:
    proved = plan.decision_rule == "proved"
    thrust = item.thrust.value.si if item.thrust else None
    if strength is None:
        return HoldingFacts(units=unit_set(plan.rotor.units), proved=proved, thrust=thrust)
    held = strength.holding
    return HoldingFacts(
        units=strength.units,
        holding_torque=held.torque,
        holding_torque_at_speed=held.torque_at_continuous,
        holding_uncertainty=held.torque_uncertainty if proved else 0.0,
        speed_uncertainty=held.torque_uncertainty_at_continuous if proved else 0.0,
        torque_to_carry=held.torque_to_carry,
        holding_force=held.force,
        holding_force_at_speed=held.force_at_continuous,
        force_uncertainty=held.force_uncertainty if proved else 0.0,
        force_speed_uncertainty=held.force_uncertainty_at_continuous if proved else 0.0,
        force_demanded=held.demanded,
        force_demanded_at_speed=held.demanded_at_continuous,
        thrust=held.thrust,
        friction=held.friction,
        friction_source=held.friction_source,
        proved=proved,
        limit_origin="the rotor's power and the plan's share of the torque",
    )
