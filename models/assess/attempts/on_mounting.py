"""Findings on how a part was heated and mounted."""

from collections.abc import Iterable
from dataclasses import replace

from models.assess.attempts.on_people import instrument_finding
from models.assess.attempts.view import Attempt, ItemView, attempt_subject
from models.assess.heat import heat_facts
from models.job import Job
from models.rules import rule
from models.rules.facts import MountFacts
from models.rules.rule import Finding
from models.units import unit_set

__all__ = ["heat_findings", "mount_findings"]


def heat_findings(job: Job, attempt: Attempt, view: ItemView) -> Iterable[Finding]:
    """Judge heating and opening of an item."""
    if view.heat is None:
        return
    facts = heat_facts(job, view.heat, view.serial, view.confirmations)
    subject = attempt_subject(attempt, item=view.item.key)
    for rule_id in (
        "confirmed-before-furnace",
        "target-below-highest",
        "not-overheated",
        "bore-open",
        "heated-through",
        "confirmed-before-door",
    ):
        # A single temperature or a gauge alone has no spread to judge.
        if rule_id == "heated-through" and facts.spread is None:
            continue
        if rule_id == "not-overheated" and facts.hottest_part is None:
            continue
        yield rule(rule_id).apply(facts, subject)
    heating = view.heat.heating
    if heating is not None and heating.instrument is not None:
        about = replace(subject, entry=heating.id)
        yield instrument_finding(job, heating.instrument, heating.done_at, about)


def mount_findings(job: Job, attempt: Attempt, view: ItemView) -> Iterable[Finding]:
    """Judge how an item came to rest."""
    axial = view.item.axial
    facts = MountFacts(
        units=unit_set(job.plan.rotor.units),
        outcome=view.mount.outcome if view.mount else None,
        shoulder=view.mount.shoulder if view.mount else None,
        axial_position=view.axial_cold.value.si if view.axial_cold else None,
        axial_target=axial.target.si if axial else None,
        axial_tolerance=axial.tolerance.si if axial else None,
        limit_origin=axial.origin.words if axial else None,
    )
    subject = attempt_subject(attempt, item=view.item.key)
    # A taper stops nowhere: how far it is up is judged instead of a shoulder.
    if view.drawn_up is None or facts.outcome == "stopped short":
        yield rule("part-seated").apply(facts, subject)
    if axial is not None:
        yield rule("axial-position-right").apply(facts, subject)
