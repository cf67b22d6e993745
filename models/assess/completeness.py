"""What a finished build still lacks on paper, and what was waived on the way."""

from collections.abc import Sequence

from models.assess.attempts import Attempt
from models.assess.record_findings import outside_open
from models.job import AnyEntry, Job
from models.rules.record_facts import CompleteFacts

__all__ = ["complete_facts", "missing_signatures", "waived"]


def complete_facts(
    job: Job, entries: Sequence[AnyEntry], attempts: Sequence[Attempt], still_open: Sequence[str]
) -> CompleteFacts:
    """State what is undecided, unsigned, outside and waived, for the rules."""
    return CompleteFacts(
        findings_open=tuple(dict.fromkeys((*still_open, *_numbers_open(job, still_open)))),
        signatures_missing=missing_signatures(attempts),
        outside_open=tuple(
            f"{one.subject}, {one.what}, sent to {one.works} on {one.sent_on}"
            for one in outside_open(entries)
        ),
        waived=waived(job, attempts),
    )


def missing_signatures(attempts: Sequence[Attempt]) -> tuple[str, ...]:
    """Name the signatures that settled attempts lack, reviews included."""
    lacks: list[str] = []
    for one in attempts:
        if one.settled is None or one.settled.outcome == "removed":
            continue
        where = one.step.title
        if all(signed.meaning != "performed" for signed in one.signatures):
            lacks.append(f"{where}, signature of who did it")
        lacks += [f"{where}, {point.due_words}" for point in one.points if not point.passed]
    return tuple(lacks)


def waived(job: Job, attempts: Sequence[Attempt]) -> tuple[str, ...]:
    """List what the plan agreed to waive, and the points passed without a signature."""
    agreed = [f"{one.what}, agreed by {one.agreed_by}" for one in job.plan.waivers]
    without = [
        f"{one.step.title}, {point.point.what}, {point.how}"
        for one in attempts
        if one.settled is not None and one.settled.outcome != "removed"
        for point in one.points
        if point.passed and not point.signed
    ]
    return (*agreed, *without)


def _numbers_open(job: Job, still_open: Sequence[str]) -> list[str]:
    return [
        f"finding {one.number}"
        for one in job.numbered_findings
        if any(key == one.about or key.startswith(f"{one.about}, ") for key in still_open)
    ]
