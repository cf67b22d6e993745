"""What a plan alone is judged by: the shaft under the torque that it is to carry."""

from collections.abc import Iterable

from models.assess.torque import seat_shears
from models.job import Plan
from models.rules import rule
from models.rules.rule import Finding, Subject
from models.rules.strength_facts import ShearFacts
from models.units import unit_set

__all__ = ["plan_findings"]


def plan_findings(plan: Plan) -> Iterable[Finding]:
    """Judge the shear under every seat, where the plan gives a limit for it."""
    limit = plan.shaft.shear_limit
    if limit is None:
        return
    facts = ShearFacts(
        units=unit_set(plan.rotor.units),
        shear_limit=limit.value.si,
        limit_origin=limit.origin.words,
    )
    found = seat_shears(plan)
    if not found:
        yield rule("shaft-shear-allowed").apply(facts, Subject())
    for one in found:
        yield rule("shaft-shear-allowed").apply(
            ShearFacts(
                units=facts.units,
                shear=one.shear,
                shear_limit=limit.value.si,
                torque=one.torque,
                diameter=one.land.nominal_diameter.si,
                limit_origin=limit.origin.words,
            ),
            Subject(item=one.item.key, land=one.land.key),
        )
