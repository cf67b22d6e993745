"""Findings on the record of a job beside its attempts: seen, sent off, found out, late, decided."""

from collections.abc import Iterable, Sequence
from datetime import date, datetime, timedelta

from models.assess.decided import decisions_of
from models.job import (
    AnyEntry,
    Component,
    Decision,
    Entry,
    Job,
    OutsideOperation,
    VisualFinding,
)
from models.rules import rule
from models.rules.record_facts import (
    ComponentFacts,
    DecisionFacts,
    FoundOutFacts,
    LateFacts,
    OutsideFacts,
    SeenFacts,
)
from models.rules.rule import Finding, Subject
from models.units import unit_set

__all__ = [
    "HOURS_USUAL",
    "about",
    "due_again",
    "hours_allowed",
    "hours_between",
    "outside_open",
    "read_with",
    "record_findings",
]

# Common practice: what is done in a shift is entered before the shift is over.
HOURS_USUAL = 12.0


def record_findings(job: Job, entries: Sequence[AnyEntry]) -> Iterable[Finding]:
    """Judge what stands in the record beside sizes, heat, mounts and runout."""
    yield from _found_out(job, entries)
    for one in entries:
        if isinstance(one, VisualFinding):
            facts = SeenFacts(subject=one.subject, words=one.words, weight=one.weight)
            where = f"{one.seen_at}: {one.words}"
            yield rule("seen-conforms").apply(facts, about(one, item=one.subject, feature=where))
        if one.supersedes is None and hours_between(one) > hours_allowed(job):
            yield _late(job, one)
    yield from _outside(entries)
    for component in job.components:
        if component.substitute_for is not None:
            yield _substitute(component)
    yield from _decisions(job, decisions_of(entries))


def about(entry: Entry, **more: str | None) -> Subject:
    """Name the place of an entry as the subject of a finding."""
    place = entry.place
    return Subject(step=place.step, attempt=place.attempt, entry=entry.id, **more)


def read_with(entries: Iterable[AnyEntry], tag: str, *, after: str) -> tuple[AnyEntry, ...]:
    """Select what was read with an instrument after a day; the day is that of the place."""
    return tuple(
        one
        for one in entries
        if getattr(one, "instrument", None) == tag and one.done_at[:10] > after
    )


def hours_between(entry: Entry) -> float:
    """Tell how long after it was done an entry was made, h."""
    done, entered = (_moment(one) for one in (entry.done_at, entry.entered_at))
    return (entered - done) / timedelta(hours=1)


def hours_allowed(job: Job) -> float:
    """Tell how long after the deed an entry is still in time, h."""
    after = job.plan.late_after
    return HOURS_USUAL if after is None else after.si / 3600.0


def outside_open(entries: Sequence[AnyEntry]) -> tuple[OutsideOperation, ...]:
    """Select the work that was sent off and is not back."""
    sent = [one for one in entries if isinstance(one, OutsideOperation)]
    came = {one.sent_as for one in sent if one.back_on is not None}
    return tuple(one for one in sent if one.back_on is None and one.id not in came)


def _moment(written: str) -> datetime:
    found = datetime.fromisoformat(written)
    return found if found.tzinfo is not None else found.astimezone()


def _found_out(job: Job, entries: Sequence[AnyEntry]) -> Iterable[Finding]:
    for event in job.instrument_events:
        for one in read_with(entries, event.tag, after=event.last_good_on):
            facts = FoundOutFacts(
                tag=event.tag,
                reading=one.title,
                used_on=one.done_at[:10],
                last_good_on=event.last_good_on,
            )
            feature = f"{one.title} with {event.tag}, {one.done_at[:16]}"
            yield rule("instrument-still-good").apply(facts, about(one, feature=feature))


def _late(job: Job, entry: AnyEntry) -> Finding:
    limit = job.plan.late_after
    facts = LateFacts(
        entry=entry.title,
        hours_between=hours_between(entry),
        hours_allowed=hours_allowed(job),
        reason=entry.reason or entry.out_of_order or "",
        limit_origin="common practice" if limit is None else "the plan",
    )
    feature = f"{entry.title} of {entry.done_at[:16]}"
    return rule("entered-in-time").apply(facts, about(entry, feature=feature))


def _outside(entries: Sequence[AnyEntry]) -> Iterable[Finding]:
    waiting = {one.id for one in outside_open(entries)}
    for one in entries:
        if not isinstance(one, OutsideOperation):
            continue
        if one.back_on is None and one.id not in waiting:
            continue
        facts = OutsideFacts(
            what=one.what,
            works=one.works,
            back_on=one.back_on,
            certificate=one.certificate,
            result=one.result,
        )
        named = about(one, item=one.subject, feature=one.what)
        yield rule("outside-work-back").apply(facts, named)


def _substitute(component: Component) -> Finding:
    facts = ComponentFacts(
        serial=component.serial,
        substitute_for=component.substitute_for,
        approved_by=component.approved_by or "",
    )
    return rule("substitute-approved").apply(facts, Subject(item=component.item))


def _decisions(job: Job, decisions: Sequence[Decision]) -> Iterable[Finding]:
    roles = {one.key: one.role for one in job.people}
    for one in decisions:
        facts = DecisionFacts(
            units=unit_set(job.plan.rotor.units),
            disposition=one.disposition,
            role=roles.get(one.by),
            needs_customer=one.disposition in job.plan.customer_agrees_to,
            agreed_by=one.agreed_by or "",
        )
        named = about(one, feature=f"decision on {one.about}")
        yield rule("decided-with-authority").apply(facts, named)


def due_again(due_on: str, *, today: str, days: int) -> bool:
    """Whether a calibration falls due within some days of today, or has done so."""
    return date.fromisoformat(due_on) <= date.fromisoformat(today) + timedelta(days=days)
