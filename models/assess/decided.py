"""Which decisions count, and which findings they answer."""

from collections.abc import Iterable, Sequence

from models.job import AnyEntry, Decision, Job, NumberedFinding, Plan

__all__ = [
    "agreement_missing",
    "answers",
    "covered_by",
    "decision_about",
    "decisions_of",
    "numbered_about",
]

_SEPARATOR = ", "


def decisions_of(entries: Iterable[AnyEntry]) -> tuple[Decision, ...]:
    """Select the decisions, in the order in which they were recorded."""
    return tuple(one for one in entries if isinstance(one, Decision))


def agreement_missing(plan: Plan, decision: Decision) -> bool:
    """Whether the plan asks for the customer's agreement to it and none is named."""
    return decision.disposition in plan.customer_agrees_to and not decision.agreed_by


def answers(plan: Plan, decision: Decision) -> bool:
    """Whether a decision counts."""
    return not agreement_missing(plan, decision)


def numbered_about(job: Job) -> dict[int, str]:
    """Give what each finding's number is about."""
    return {one.number: one.about for one in job.numbered_findings}


def decision_about(
    job: Job, decisions: Sequence[Decision], key: str, entry: str | None
) -> Decision | None:
    """Find the last decision that counts for a finding: by its name, its number, or its entry."""
    about = numbered_about(job)
    found = None
    for one in decisions:
        named = {one.about}
        if one.finding is not None and one.finding in about:
            named.add(about[one.finding])
        if answers(job.plan, one) and any(_covers(name, key, entry) for name in named):
            found = one
    return found


def covered_by(one: NumberedFinding, key: str) -> bool:
    """Whether a numbered finding stands for a rule's finding of this name."""
    return _covers(one.about, key, None)


def _covers(name: str, key: str, entry: str | None) -> bool:
    # A number stands for every place at which one rule of one attempt was not kept.
    return name in (key, entry) or key.startswith(name + _SEPARATOR)
