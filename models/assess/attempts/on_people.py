"""Findings on who did, signed and measured what."""

from collections.abc import Iterable, Sequence

from models.assess.attempts.view import Attempt, attempt_subject
from models.job import Heating, Job, Mount, Removal, RunoutSurvey, Signature, SizeSurvey, Step
from models.rules import rule
from models.rules.facts import InstrumentFacts, OrderFacts, PeopleFacts
from models.rules.rule import Finding, Subject

__all__ = ["instrument_finding", "people_findings", "points_open"]


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
        points_due=tuple(_point_words(point.role, point.what) for point in attempt.step.points),
        points_open=points_open(attempt.step, attempt.signatures),
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


def points_open(step: Step, signatures: Sequence[Signature]) -> tuple[str, ...]:
    """Name the hold points of a step whose signature is still missing."""
    meanings = {"inspector": "inspected", "witness": "witnessed", "engineer": "decided"}
    given = {(one.role, one.meaning) for one in signatures}
    return tuple(
        _point_words(point.role, point.what)
        for point in step.points
        if point.kind == "hold" and (point.role, meanings.get(point.role, "performed")) not in given
    )


def _point_words(role: str, what: str) -> str:
    return f"{role} to sign: {what}"


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
