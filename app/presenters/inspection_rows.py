"""The rows of the Inspection desk, each from the job as it was worked out."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass
from datetime import date
from typing import Literal

from app.presenters.reasons import Reason, reasons_of
from app.presenters.wording import day_and_time, in_words, place_words
from models.assess import Assessment, Attempt, Standing, finding_key
from models.job import Entry, Instrument, Job, Place, Role
from models.rules.rule import Finding, Verdict
from models.units import unit_set
from reports.job_pictures import verdict_kind
from reports.sheet.pictures import VerdictKind

__all__ = [
    "AmendmentRow",
    "AttemptRow",
    "FindingRow",
    "InstrumentRow",
    "Meaning",
    "PointRow",
    "amendments_of",
    "attempt_title",
    "finding_row",
    "instrument_row",
    "many",
    "points_of",
]

Meaning = Literal["performed", "inspected", "witnessed", "decided"]
"""What a signature says."""

_DAYS_BEFORE_DUE = 30
_MEANING_OF: dict[str, Meaning] = {
    "technician": "performed",
    "inspector": "inspected",
    "witness": "witnessed",
    "engineer": "decided",
}


@dataclass(frozen=True, kw_only=True)
class FindingRow:
    """A finding that is not within its limits and that nothing has answered.

    `place` is where a decision about it belongs; None where only going on with the work answers it.
    """

    key: str
    kind: VerdictKind
    phrase: str
    where: str
    sentence: str
    reasons: tuple[Reason, ...]
    rule: str
    step: str | None = None
    attempt: int | None = None
    place: Place | None = None


@dataclass(frozen=True, kw_only=True)
class PointRow:
    """A signature that a settled step waits for."""

    step: str
    attempt: int
    where: str
    kind: str
    role: Role
    meaning: Meaning
    what: str
    holds: bool


@dataclass(frozen=True, kw_only=True)
class AmendmentRow:
    """Something recorded that was replaced later; both stay."""

    where: str
    was: str
    now: str
    reason: str
    by: str
    at: str


@dataclass(frozen=True, kw_only=True)
class InstrumentRow:
    """An instrument and the day its calibration falls due."""

    tag: str
    kind: str
    due: str
    words: str
    verdict: VerdictKind


@dataclass(frozen=True, kw_only=True)
class AttemptRow:
    """An attempt that can be laid beside another."""

    step: str
    attempt: int
    title: str
    sentence: str
    kind: VerdictKind


def many(number: int, what: str) -> str:
    """Count things in words."""
    return f"1 {what}" if number == 1 else f"{number} {what}s"


def finding_row(job: Job, standing: Standing) -> FindingRow:
    """Show a finding with everything it rests on."""
    finding = standing.finding
    subject = finding.subject
    return FindingRow(
        key=finding_key(finding),
        kind=verdict_kind(finding.verdict),
        phrase=finding.phrase,
        where=place_words(job, subject),
        sentence=in_words(job, finding.message),
        reasons=reasons_of(finding, unit_set(job.plan.rotor.units)),
        rule=finding.rule.id,
        step=subject.step,
        attempt=subject.attempt,
        place=_place_of_decision(job, finding),
    )


def _place_of_decision(job: Job, finding: Finding) -> Place | None:
    subject = finding.subject
    if subject.step is not None:
        return Place(kind="attempt", step=subject.step, attempt=subject.attempt)
    # What still lacks an input of the whole build, or a paper, comes by the work and not by a word.
    if finding.verdict is Verdict.NOT_JUDGED or finding.rule.id == "record-complete":
        return None
    entry = next((one for one in job.entries if one.id == subject.entry), None)
    return Place(kind="final") if entry is None else entry.place


def attempt_title(view: Assessment, attempt: Attempt) -> str:
    """Name an attempt by its step and number."""
    number = view.job.plan.step_number(attempt.step.key)
    return f"step {number}, {attempt.step.title}, attempt {attempt.number}"


def points_of(view: Assessment) -> Iterator[PointRow]:
    """List the signatures that settled steps wait for."""
    for step in view.job.plan.steps:
        attempts = view.attempts_at(step.key)
        last = attempts[-1] if attempts else None
        if last is None or last.settled is None or last.settled.outcome == "removed":
            continue
        given = {(one.role, one.meaning) for one in last.signatures}
        where = attempt_title(view, last)
        wanted: list[tuple[str, Role, str]] = [("hold", "technician", "the work of this step")]
        # A point that was waived, or that nobody came to after notice, waits for nobody.
        wanted += [
            (one.point.kind, one.point.role, one.point.what)
            for one in last.points
            if not one.passed
        ]
        for kind, role, what in wanted:
            meaning = _MEANING_OF[role]
            signed = any(said == meaning and by == role for by, said in given)
            if not signed:
                yield PointRow(
                    step=step.key,
                    attempt=last.number,
                    where=where,
                    kind=kind,
                    role=role,
                    meaning=meaning,
                    what=what,
                    holds=kind != "review",
                )


def amendments_of(job: Job) -> Iterator[AmendmentRow]:
    """List what was replaced, reading by reading and entry by entry."""
    names = {one.key: one.name for one in job.people}
    by_id = {one.id: one for one in job.entries}
    for entry in job.entries:
        for one in getattr(entry, "corrections", ()):
            yield AmendmentRow(
                where=f"{_entry_words(job, entry)}: {_mark_words(entry, one.where)}",
                was=one.was,
                now=one.now,
                reason=one.reason,
                by=names.get(one.by, one.by),
                at=day_and_time(one.at),
            )
        replaced = by_id.get(entry.supersedes or "")
        if replaced is not None:
            yield AmendmentRow(
                where=_entry_words(job, entry),
                was=f"entered {day_and_time(replaced.entered_at)}",
                now=f"entered {day_and_time(entry.entered_at)}",
                reason=entry.reason or "",
                by=names.get(entry.by, entry.by),
                at=day_and_time(entry.entered_at),
            )


def _entry_words(job: Job, entry: Entry) -> str:
    place = entry.place
    if place.step is None:
        return f"{entry.title}, {place.kind}"
    number = job.plan.step_number(place.step)
    return f"{entry.title}, step {number}, attempt {place.attempt}"


def _mark_words(entry: Entry, where: tuple[str, ...]) -> str:
    angles = getattr(entry, "angles", ())
    if len(where) == 2 and where[1].isdigit() and int(where[1]) < len(angles):
        return f"{where[0]} at {angles[int(where[1])].written}"
    return ", ".join(where)


def instrument_row(one: Instrument, today: date) -> InstrumentRow:
    """Say when an instrument is due, seen from a day."""
    if one.calibration is None:
        return InstrumentRow(
            tag=one.tag,
            kind=one.kind,
            due="",
            words="No calibration is recorded.",
            verdict=VerdictKind.NOT_JUDGED,
        )
    days = (date.fromisoformat(one.calibration.due_on) - today).days
    verdict, words = VerdictKind.WITHIN, f"in {many(days, 'day')}"
    if days < 0:
        ago = f"{many(-days, 'day')} ago"
        verdict, words = VerdictKind.STOP, f"{ago}; do not use it until it is calibrated"
    elif days <= _DAYS_BEFORE_DUE:
        verdict, words = VerdictKind.LOOK, f"{words if days else 'today'}; send it soon"
    return InstrumentRow(
        tag=one.tag, kind=one.kind, due=one.calibration.due_on, words=words, verdict=verdict
    )
