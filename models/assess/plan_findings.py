"""What a plan alone is judged by: the shaft's shear, and what the indicator resolves."""

from collections.abc import Iterable

from models.assess.torque import seat_shears
from models.job import Plan
from models.rules import rule
from models.rules.record_facts import ResolutionFacts
from models.rules.rule import Finding, Subject
from models.rules.strength_facts import ShearFacts
from models.units import unit_set

__all__ = ["plan_findings"]


def plan_findings(plan: Plan) -> Iterable[Finding]:
    """Judge the shear under every seat and the indicator, where the plan says what it needs."""
    yield from _resolution(plan)
    yield from _shears(plan)


def _resolution(plan: Plan) -> Iterable[Finding]:
    resolution = plan.runout.indicator_resolution
    limits = [one.change_limit for one in plan.steps if one.change_limit is not None]
    if resolution is None or not limits:
        return
    least = min(limits, key=lambda one: one.value.whole)
    facts = ResolutionFacts(
        units=unit_set(plan.rotor.units),
        resolution=resolution.si,
        least_limit=least.value.si,
        limit_origin=least.origin.words,
    )
    yield rule("indicator-resolves-limit").apply(facts, Subject())


def _shears(plan: Plan) -> Iterable[Finding]:
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
