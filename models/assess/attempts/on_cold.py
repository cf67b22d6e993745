"""Whether the surveys of an attempt prove that its rotor was cold."""

from collections.abc import Iterable
from datetime import datetime

from models.assess.attempts.view import Attempt, attempt_subject
from models.assess.runout import SurveyRunout, compare_surveys
from models.assess.soak import time_constant_of
from models.job import Job
from models.rules import rule
from models.rules.cold import ColdFacts
from models.rules.rule import Finding
from models.units import unit_set

__all__ = ["cold_findings"]


def cold_findings(job: Job, attempt: Attempt) -> Iterable[Finding]:
    """Judge a second survey of a hot mount, where there is one in the same set-up."""
    closing = [
        one
        for one in attempt.surveys
        if one.entry.purpose in ("after", "again") and one.entry.is_closed
    ]
    hot = any(view.item.kind == "hot" for view in attempt.items)
    if not hot or len(closing) < 2:
        return
    first, second = closing[-2:]
    if first.entry.set_up.differences(second.entry.set_up):
        return
    constant, source = time_constant_of(job.plan)
    yield rule("second-survey-proves").apply(
        ColdFacts(
            units=unit_set(job.plan.rotor.units),
            difference=_difference(job, first, second),
            interval=_interval(first, second),
            time_constant=constant,
            agreement=job.plan.cooling.agreement.si,
            limit_origin=f"{job.plan.cooling.origin.words}; time constant: {source}",
        ),
        attempt_subject(attempt, entry=second.entry.id),
    )


def _difference(job: Job, first: SurveyRunout, second: SurveyRunout) -> float | None:
    changes = [one for one in compare_surveys(job, first, second) if not one.is_journal]
    known = [one.tir for one in changes if one.tir is not None]
    return max(known) if known and len(known) == len(changes) else None


def _interval(first: SurveyRunout, second: SurveyRunout) -> float | None:
    if first.entry.closed_at is None or second.entry.closed_at is None:
        return None
    begun = datetime.fromisoformat(first.entry.closed_at)
    ended = datetime.fromisoformat(second.entry.closed_at)
    if (begun.tzinfo is None) != (ended.tzinfo is None):
        return None
    return (ended - begun).total_seconds()
