"""Findings on a hub that was drawn up its taper."""

from collections.abc import Iterable
from dataclasses import replace

from models.assess.attempts.on_people import instrument_finding
from models.assess.attempts.view import Attempt, ItemView, attempt_subject
from models.job import Job
from models.rules import rule
from models.rules.draw_up import DrawUpFacts
from models.rules.rule import Finding
from models.units import unit_set

__all__ = ["draw_up_findings"]


def draw_up_findings(job: Job, attempt: Attempt, view: ItemView) -> Iterable[Finding]:
    """Judge a draw-up by what its plan asks for."""
    found = view.drawn_up
    if found is None:
        return
    taper, entry = found.taper, found.entry
    proved = job.plan.decision_rule == "proved"
    facts = DrawUpFacts(
        units=unit_set(job.plan.rotor.units),
        least_advance=found.least_advance,
        greatest_advance=found.greatest_advance,
        advance_uncertainty=found.advance_uncertainty if proved else 0.0,
        least_advance_allowed=taper.least_advance.value.si,
        greatest_advance_allowed=taper.greatest_advance.value.si,
        contact=entry.contact.si if entry and entry.contact else None,
        contact_wanted=taper.least_contact.value.si if taper.least_contact else None,
        dilation_pressure=(
            entry.dilation_pressure.si if entry and entry.dilation_pressure else None
        ),
        dilation_allowed=taper.greatest_dilation.value.si if taper.greatest_dilation else None,
        pressure_at_yield=found.pressure_at_yield,
        seating_loss=found.seating_loss,
        hold=entry.hold.si if entry and entry.hold else None,
        hold_wanted=taper.least_hold.value.si if taper.least_hold else None,
        proved=proved,
    )
    subject = attempt_subject(attempt, item=view.item.key, entry=entry.id if entry else None)
    # Judged where the plan asks for it; a growth only where it was measured.
    asked = (
        ("advance-within", taper.least_advance, True),
        ("taper-contact", taper.least_contact, taper.least_contact is not None),
        ("dilation-allowed", taper.greatest_dilation, True),
        ("seating-loss-usual", None, found.seating_loss is not None),
        ("piston-held", taper.least_hold, taper.least_hold is not None),
    )
    for rule_id, limit, is_asked in asked:
        if is_asked:
            origin = limit.origin.words if limit is not None else None
            yield rule(rule_id).apply(replace(facts, limit_origin=origin), subject)
    if entry is not None and entry.instrument is not None:
        yield instrument_finding(job, entry.instrument, entry.done_at, subject)
