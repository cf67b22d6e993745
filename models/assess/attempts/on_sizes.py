"""Findings on the sizes of an attempt and on the fit that they make."""

from collections.abc import Iterable
from dataclasses import replace

from models.assess.attempts.on_people import instrument_finding
from models.assess.attempts.view import Attempt, ItemView, attempt_subject
from models.assess.land_limits import limits_of
from models.assess.sizes import LandFit
from models.job import Job
from models.rules import rule
from models.rules.blunders import WarmSizeFacts
from models.rules.facts import FitFacts, SizeFacts
from models.rules.rule import Finding
from models.units import unit_set

__all__ = ["fit_facts", "size_findings"]


def size_findings(job: Job, attempt: Attempt, view: ItemView) -> Iterable[Finding]:
    """Judge the sizes of an item and the interference that they make."""
    units = unit_set(job.plan.rotor.units)
    for fit in view.fits:
        subject = attempt_subject(attempt, item=view.item.key, land=fit.land.key)
        for feature, sizes in (("seat", fit.seat), ("bore", fit.bore)):
            if sizes is None:
                continue
            entry = sizes.entry
            facts = SizeFacts(
                units=units,
                feature=feature,
                mean_diameter=sizes.as_read.mean,
                least_diameter=sizes.as_read.least,
                greatest_diameter=sizes.as_read.greatest,
                nominal_diameter=fit.land.nominal_diameter.si,
                part_temperature=entry.part_temperature.si if entry.part_temperature else None,
            )
            about = replace(subject, feature=feature, entry=entry.id)
            yield rule("sizes-plausible").apply(facts, about)
            yield rule("part-temperature-known").apply(facts, about)
            if entry.part_temperature is not None and entry.gauge_temperature is not None:
                warm = WarmSizeFacts(
                    feature=feature,
                    part_temperature=entry.part_temperature.si,
                    gauge_temperature=entry.gauge_temperature.si,
                )
                yield rule("size-not-taken-hot").apply(warm, about)
            yield instrument_finding(job, entry.instrument, entry.done_at, about)
        facts_of_fit = fit_facts(job, fit)
        yield rule("seat-larger-than-bore").apply(facts_of_fit, subject)
        yield rule("interference-within").apply(facts_of_fit, subject)


def fit_facts(job: Job, fit: LandFit) -> FitFacts:
    """State how bore and seat of a land fit, for the rules."""
    proved = job.plan.decision_rule == "proved"
    found = fit.interference
    least, greatest = limits_of(fit.land)
    return FitFacts(
        units=unit_set(job.plan.rotor.units),
        least_interference=found.least if found else None,
        mean_interference=found.mean if found else None,
        greatest_interference=found.greatest if found else None,
        # Simple acceptance needs no uncertainty; proving does.
        expanded_uncertainty=fit.expanded_uncertainty if proved else 0.0,
        least_allowed=least.value.si,
        greatest_allowed=greatest.value.si,
        proved=proved,
        limit_origin=least.origin.words,
    )
