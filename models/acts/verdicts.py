"""Verdicts that are stored at a gate, and those that a correction turns."""

import uuid
from collections.abc import Sequence

import msgspec

from models.assess import Assessment, Standing, assess, finding_key
from models.job import AnyEntry, Job, Place, RunoutSurvey, SizeSurvey, StoredVerdict
from models.rules.rule import Verdict

__all__ = [
    "changed_verdicts",
    "judged_already",
    "new_id",
    "rests_on",
    "stored_verdict",
    "verdicts_due",
    "with_entry",
]


def new_id() -> str:
    """Make an identifier before the first try, so that a retry does nothing twice."""
    return str(uuid.uuid4())


def judged_already(job: Job, entry_id: str) -> Assessment | None:
    """Assess the job as it stands if the entry is closed and so may carry verdicts."""
    entry = next((one for one in job.entries if one.id == entry_id), None)
    closed = not isinstance(entry, RunoutSurvey | SizeSurvey) or entry.closed_at is not None
    return assess(job) if closed else None


def with_entry(job: Job, entry: AnyEntry) -> Job:
    """Give the job as it stands with one more entry."""
    return msgspec.structs.replace(job, entries=(*job.entries, entry))


def verdicts_due(job: Job, entry: AnyEntry, at: str) -> list[StoredVerdict]:
    """Judge an attempt at a gate: everything known of it then is stored with its inputs."""
    view = assess(job)
    place: Place = entry.place
    return [
        stored_verdict(one, entry.id, at)
        for one in view.findings
        if (one.finding.subject.step, one.finding.subject.attempt) == (place.step, place.attempt)
        and one.finding.verdict is not Verdict.NOT_JUDGED
    ]


def rests_on(view: Assessment, standing: Standing, entry_id: str) -> bool:
    """Whether a finding of fit rests on this size survey."""
    if standing.finding.rule.id != "interference-within":
        return False
    entry = next((one for one in view.job.entries if one.id == entry_id), None)
    subject = standing.finding.subject
    return isinstance(entry, SizeSurvey) and (
        (entry.item, entry.land, entry.place.step, entry.place.attempt)
        == (subject.item, subject.land, subject.step, subject.attempt)
    )


def changed_verdicts(
    before: Assessment, after: Assessment, entry_id: str, at: str
) -> Sequence[StoredVerdict]:
    """Find the verdicts that a correction turned, in every attempt that rested on it."""
    old = {finding_key(one.finding): one.finding.verdict for one in before.findings}
    return [
        stored_verdict(one, entry_id, at)
        for one in after.findings
        if old.get(finding_key(one.finding)) is not one.finding.verdict
    ]


def stored_verdict(standing: Standing, subject_entry: str, at: str) -> StoredVerdict:
    """Write a finding as a verdict that is stored."""
    finding = standing.finding
    return StoredVerdict(
        id=new_id(),
        subject=finding.subject.entry or subject_entry,
        rule=finding.rule.id,
        edition=finding.rule.edition,
        verdict=finding.verdict.value,
        message=finding.message,
        inputs=dict(finding.inputs),
        judged_at=at,
        step=finding.subject.step,
        attempt=finding.subject.attempt,
    )
