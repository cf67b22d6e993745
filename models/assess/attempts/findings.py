"""All findings of an attempt, in the order of the work."""

from collections.abc import Iterable

from models.assess.attempts.on_cold import cold_findings
from models.assess.attempts.on_cooling import cool_facts, cooling_matters
from models.assess.attempts.on_draw_up import draw_up_findings
from models.assess.attempts.on_mounting import heat_findings, mount_findings
from models.assess.attempts.on_people import people_findings
from models.assess.attempts.on_runout import runout_findings
from models.assess.attempts.on_sizes import size_findings
from models.assess.attempts.view import Attempt, attempt_subject
from models.assess.balance import balance_findings
from models.assess.strength_findings import strength_findings
from models.job import Job
from models.rules import rule
from models.rules.rule import Finding, Subject

__all__ = ["attempt_findings"]


def attempt_findings(job: Job, attempt: Attempt) -> Iterable[Finding]:
    """Judge all that an attempt holds, in the order of the work."""
    for view in attempt.items:
        yield from size_findings(job, attempt, view)
        about = attempt_subject(attempt, item=view.item.key)
        yield from strength_findings(job.plan, view.item, view.strength, about)
        yield from heat_findings(job, attempt, view)
        yield from draw_up_findings(job, attempt, view)
        yield from mount_findings(job, attempt, view)
    if cooling_matters(attempt):
        subject = Subject(step=attempt.step.key, attempt=attempt.number)
        yield rule("may-be-read").apply(cool_facts(job, attempt), subject)
    yield from cold_findings(job, attempt)
    yield from runout_findings(job, attempt)
    if attempt.balance is not None:
        asked = attempt.plan.balance
        yield from balance_findings(
            attempt.balance,
            where=f"after {attempt.step.title}",
            due=asked is not None and attempt.step.key in asked.after_steps,
            new_parts=[one.item.key for one in attempt.items],
            subject=attempt_subject(attempt),
        )
    yield from people_findings(job, attempt)
