"""Who may tell what beside the mounting, and what stops a signature."""

from typing import get_args

from models.assess import Assessment
from models.assess.attempts.on_people import instrument_finding
from models.assess.attempts.view import finding_key
from models.assess.decided import decision_about, decisions_of
from models.assess.record_findings import hours_allowed, hours_between
from models.job import (
    AnyEntry,
    Attachment,
    Decision,
    OutsideOperation,
    Person,
    PointEvent,
    Signature,
    VisualFinding,
)
from models.job.plan import Disposition, Role
from models.rules.progress import Permission
from models.rules.record import MAY_CONCEDE
from models.rules.rule import Subject, Verdict

__all__ = ["MAY_DECIDE", "NO_WORK", "beside_permission", "dispositions_open_to"]

# What an inspector may record of a step and still inspect it.
NO_WORK = (Attachment, Decision, PointEvent, Signature, VisualFinding)

MAY_DECIDE = ("inspector", "engineer")
"""Roles that may decide a finding at all."""
_CONCEDING = ("repair", "use as is under concession")
_YES = Permission(True)


def dispositions_open_to(role: Role) -> tuple[Disposition, ...]:
    """List what somebody of a role may decide about a finding; nothing for who decides none."""
    if role not in MAY_DECIDE:
        return ()
    every: tuple[Disposition, ...] = get_args(Disposition)
    return tuple(one for one in every if one not in _CONCEDING or role in MAY_CONCEDE)


def beside_permission(view: Assessment, entry: AnyEntry, person: Person) -> Permission:
    """Ask what concerns entries beside the mounting, decisions, signatures and late entries."""
    late = _late(view, entry)
    if not late.allowed:
        return late
    if isinstance(entry, PointEvent):
        return _point(view, entry, person)
    if isinstance(entry, OutsideOperation):
        return _outside(view, entry)
    if isinstance(entry, Decision):
        return _decision(entry, person)
    if isinstance(entry, Signature):
        return _overdue(view, entry)
    return _YES


def _no(name: str, words: str) -> Permission:
    return Permission(False, name, words)


def _late(view: Assessment, entry: AnyEntry) -> Permission:
    between = hours_between(entry)
    if between <= hours_allowed(view.job) or entry.reason or entry.out_of_order:
        return _YES
    return _no(
        "late-without-reason",
        f"{entry.title} was done {between:.0f} h before it is entered. Say why it is entered late.",
    )


def _point(view: Assessment, entry: PointEvent, person: Person) -> Permission:
    step = next((one for one in view.job.plan.steps if one.key == entry.place.step), None)
    asked = (entry.point_kind, entry.point_role, entry.what)
    points = () if step is None else step.points
    if all((one.kind, one.role, one.what) != asked for one in points):
        return _no("no-such-point", f"The plan has no {entry.point_kind} point “{entry.what}”.")
    if entry.event != "waived":
        return _YES
    if person.role == entry.point_role and entry.point_role != "technician":
        return _YES
    # A customer waives by letter more often than in person; an inspector records it.
    if entry.point_role == "witness" and person.role == "inspector" and entry.how.strip():
        return _YES
    how = (
        "the customer waives it, or an inspector records by which letter the customer did"
        if entry.point_role == "witness"
        else f"only another {entry.point_role} waives it"
    )
    return _no(
        "may-not-waive",
        f"{person.name} is {person.role} and cannot waive “{entry.what}” of the "
        f"{entry.point_role}: {how}.",
    )


def _outside(view: Assessment, entry: OutsideOperation) -> Permission:
    if entry.sent_as is None:
        return _YES
    sent = next((one for one in view.job.entries if one.id == entry.sent_as), None)
    if not isinstance(sent, OutsideOperation) or sent.back_on is not None:
        return _no("nothing-sent", f"Nothing recorded says that {entry.subject} was sent off.")
    if entry.back_on is not None and entry.back_on < sent.sent_on:
        return _no(
            "back-before-sent",
            f"{entry.subject} was sent on {sent.sent_on} and cannot be back on {entry.back_on}.",
        )
    return _YES


def _decision(entry: Decision, person: Person) -> Permission:
    if entry.disposition not in dispositions_open_to(person.role):
        return _no(
            "role-may-not-concede",
            f"{person.name} is {person.role}; “{entry.disposition}” is decided by the rotor "
            "engineer, for the design authority. An inspector decides rework or scrap.",
        )
    return _YES


def _overdue(view: Assessment, entry: Signature) -> Permission:
    """Stop a signature over readings of an instrument that was past due; the readings stay."""
    job = view.job
    decisions = decisions_of(job.entries)
    for one in job.entries:
        tag = getattr(one, "instrument", None)
        if one.place != entry.place or tag is None:
            continue
        found = instrument_finding(job, tag, one.done_at, _about(one))
        if found.verdict is not Verdict.OUTSIDE:
            continue
        if _is_decided(view, one.id) or decision_about(job, decisions, finding_key(found), one.id):
            continue
        due = found.inputs["due_on"]
        return _no(
            "instrument-past-due",
            f"{tag} fell due on {due} and was used on {one.done_at[:10]}. Have it calibrated and "
            "record that at the Register desk, or have the finding decided; then sign.",
        )
    return _YES


def _about(entry: AnyEntry) -> Subject:
    place = entry.place
    return Subject(step=place.step, attempt=place.attempt, entry=entry.id)


def _is_decided(view: Assessment, entry_id: str) -> bool:
    return any(
        one.finding.rule.id == "instrument-in-calibration"
        and one.finding.subject.entry == entry_id
        and one.answered_by is not None
        for one in view.findings
    )
