"""Findings on who did, signed and measured what."""

from collections.abc import Iterable

from models.assess.attempts.view import Attempt, attempt_subject
from models.assess.points import waits_for
from models.job import Heating, Job, Mount, Removal, RunoutSurvey, SizeSurvey
from models.rules import rule
from models.rules.facts import InstrumentFacts, OrderFacts, PeopleFacts
from models.rules.rule import Finding, Subject

__all__ = ["instrument_finding", "people_findings"]


def people_findings(job: Job, attempt: Attempt) -> Iterable[Finding]:
    """Judge who signed and which instruments measured."""
    inspected = {one.by for one in attempt.signatures if one.meaning == "inspected"}
    performed = {
        one.by
        for one in attempt.entries
        if isinstance(one, Mount | Heating | SizeSurvey | Removal | RunoutSurvey)
    }
    facts = PeopleFacts(
        performers=tuple(sorted(job.person(key).name for key in performed)),
        inspectors=tuple(sorted(job.person(key).name for key in inspected)),
        points_due=tuple(one.due_words for one in attempt.points),
        points_open=waits_for(attempt.points),
        points_without=tuple(
            f"{one.point.what}, {one.how}"
            for one in attempt.points
            if one.passed and not one.signed
        ),
        agreed_waiver=_agreed_waiver(job),
    )
    yield rule("performer-not-inspector").apply(facts, attempt_subject(attempt))
    if attempt.settled is not None and attempt.settled.outcome != "removed":
        yield rule("points-signed").apply(facts, attempt_subject(attempt))
    for entry in attempt.entries:
        if entry.out_of_order is not None:
            yield rule("in-order").apply(
                OrderFacts(entry=entry.title, out_of_order=entry.out_of_order),
                attempt_subject(attempt, entry=entry.id),
            )


def _agreed_waiver(job: Job) -> str | None:
    for one in job.plan.waivers:
        if one.what == "whoever performed may inspect":
            return f"agreed by {one.agreed_by} on {one.agreed_on}, {one.reason.rstrip('.')}"
    return None


def instrument_finding(job: Job, tag: str, done_at: str, subject: Subject) -> Finding:
    """Judge an instrument on the day it was used."""
    instrument = job.instrument(tag)
    calibration = instrument.calibration if instrument else None
    facts = InstrumentFacts(
        tag=tag,
        used_on=done_at[:10],
        due_on=calibration.due_on if calibration else None,
    )
    return rule("instrument-in-calibration").apply(facts, subject)
