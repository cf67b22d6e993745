"""The only door to change anything.

Each function is one act of a person: it opens the write transaction, takes the facts, asks
`progress`, has the journal insert the rows and the verdicts due at this gate, and closes the link
of the chain, all in one transaction. What comes back is on the disk.

The gate refuses to start; it never refuses to record what already happened: an entry that gives
its reason in `out_of_order` is taken and becomes a finding. Nothing ever stands before a removal.
"""

import uuid
from collections.abc import Callable, Sequence
from dataclasses import dataclass
from datetime import datetime

import msgspec

from models.assess import Assessment, Standing, assess, finding_key
from models.job import (
    AnyEntry,
    AttemptOpened,
    AxialMeasured,
    Confirmation,
    Cooling,
    Decision,
    GaugeTry,
    Heating,
    Hot,
    Job,
    Mount,
    Place,
    Question,
    Removal,
    RunoutReading,
    RunoutSurvey,
    Settled,
    Signature,
    SizeReading,
    SizeSurvey,
    StoredVerdict,
    Warmth,
)
from models.record import journal, queries
from models.record.store import Store
from models.rules.progress import Act, Permission, may
from models.rules.rule import Verdict

__all__ = ["Acts", "NotAllowedError", "Reading", "Recorded", "new_id"]

Reading = RunoutReading | SizeReading | Hot | Warmth | GaugeTry

_JUDGED_AT = (Mount, Settled, AttemptOpened)


class NotAllowedError(Exception):
    """An act that may not start now; `name` says why in one word of the program's own."""

    def __init__(self, permission: Permission) -> None:
        self.name = permission.name
        self.words = permission.words
        super().__init__(permission.words)


@dataclass(frozen=True)
class Recorded:
    """An act that is on the disk."""

    sequence: int
    at: str


def new_id() -> str:
    """Make an identifier before the first try, so that a retry does nothing twice."""
    return str(uuid.uuid4())


def _local_now() -> datetime:
    return datetime.now().astimezone()


class Acts:
    """Everything a person can do to a shop's record."""

    def __init__(self, store: Store, *, now: Callable[[], datetime] = _local_now) -> None:
        self._store = store
        self._now = now

    def now(self) -> str:
        """Tell the time as entries write it, with the local offset."""
        return self._now().isoformat(timespec="seconds")

    def jobs(self) -> tuple[queries.JobRow, ...]:
        """List the shop's jobs."""
        with self._store.reading() as session:
            return queries.job_rows(session)

    def read(self, number: str) -> Job:
        """Read one job whole."""
        with self._store.reading() as session:
            return queries.read_job(session, number)

    def bring_in(self, job: Job, *, by: str, act_id: str) -> None:
        """Take a whole job from a job file into the record; one that is there is refused."""
        with self._store.writing() as session:
            journal.bring_in(session, job, by=by, act_id=act_id)

    def record(
        self, number: str, entry: AnyEntry, *, act_id: str | None = None, head: int | None = None
    ) -> Recorded:
        """Record a whole entry, or an empty one that readings will be added to.

        Raises
        ------
        NotAllowedError
            If the order of the work does not allow it and the entry gives no reason.
        """
        with self._store.writing() as session:
            job = queries.read_job(session, number)
            view = assess(job)
            # A retry after an unknown end: what is there already is not asked for again.
            is_new = all(one.id != entry.id for one in job.entries)
            if entry.out_of_order is None and is_new:
                _demand(_permission(view, entry))
            at = self.now()
            with journal.act(
                session,
                chain=number,
                kind=entry.title,
                by=entry.by,
                act_id=act_id or entry.id,
                done_at=entry.done_at,
                expected_head=head,
            ) as act:
                act.add_entry(entry)
                if isinstance(entry, _JUDGED_AT):
                    later = _with_entry(job, entry)
                    act.add_verdicts(_verdicts_due(later, entry, at))
            return Recorded(act.sequence, at)

    def add_reading(
        self,
        number: str,
        entry_id: str,
        reading: Reading,
        *,
        by: str,
        act_id: str,
        reason: str | None = None,
    ) -> Recorded:
        """Record one reading of an open entry, or one that supersedes an earlier reading.

        A correction inside a survey that is closed re-judges everything that rests on it; a
        verdict that turns out otherwise is stored beside the old one.
        """
        with self._store.writing() as session:
            at = self.now()
            # Only a correction can touch what has been judged; a first reading costs no look back.
            before = (
                _judged_already(queries.read_job(session, number), entry_id) if reason else None
            )
            with journal.act(
                session,
                chain=number,
                kind="reading" if reason is None else "correction",
                by=by,
                act_id=act_id,
                done_at=at,
            ) as act:
                act.add_reading(entry_id, reading, reason=reason)
                if before is not None:
                    act.flush()
                    after = assess(queries.read_job(session, number))
                    act.add_verdicts(_changed(before, after, entry_id, at))
            return Recorded(act.sequence, at)

    def answer(self, number: str, entry_id: str, question: Question, *, act_id: str) -> Recorded:
        """Record why a questioned reading stays."""
        with (
            self._store.writing() as session,
            journal.act(
                session,
                chain=number,
                kind="answer",
                by=question.by,
                act_id=act_id,
                done_at=question.at,
            ) as act,
        ):
            act.add_question(entry_id, question)
        return Recorded(act.sequence, question.at)

    def close_survey(self, number: str, entry_id: str, *, by: str, act_id: str) -> Recorded:
        """Close a survey: it is judged, and the verdicts are stored with it."""
        with self._store.writing() as session:
            at = self.now()
            with journal.act(
                session, chain=number, kind="survey closed", by=by, act_id=act_id, done_at=at
            ) as act:
                act.close_survey(entry_id, at)
                act.flush()
                view = assess(queries.read_job(session, number))
                act.add_verdicts(
                    _stored(one, entry_id, at)
                    for one in view.findings
                    if one.finding.subject.entry == entry_id or _rests_on(view, one, entry_id)
                )
            return Recorded(act.sequence, at)


def _judged_already(job: Job, entry_id: str) -> Assessment | None:
    """Assess the job as it stands if the entry is closed and so may carry verdicts."""
    entry = next((one for one in job.entries if one.id == entry_id), None)
    closed = not isinstance(entry, RunoutSurvey | SizeSurvey) or entry.closed_at is not None
    return assess(job) if closed else None


def _demand(permission: Permission) -> None:
    if not permission.allowed:
        raise NotAllowedError(permission)


def _refuse(name: str, words: str) -> Permission:
    return Permission(False, name, words)


def _permission(view: Assessment, entry: AnyEntry) -> Permission:
    """Ask whether an entry may be made now: by its person's role, then by the order of the work."""
    role = _role_permission(view, entry)
    if not role.allowed:
        return role
    if entry.supersedes is not None:
        return _correction_permission(view, entry)
    act = _act_of(entry)
    step = entry.place.step
    if act is None:
        return Permission(True)
    if act is Act.SURVEY_BARE_SHAFT:
        return may(view.progress, act, step=view.job.plan.steps[0].key)
    if step is None:
        return _refuse("no-step-named", "The entry names no step of the plan.")
    if isinstance(entry, RunoutSurvey) and entry.purpose == "before":
        return _before_permission(view, step)
    permission = may(view.progress, act, step=step, item=getattr(entry, "item", None))
    if permission.allowed and not isinstance(entry, AttemptOpened):
        latest = view.progress.latest(step)
        if latest is not None and entry.place.attempt != latest.number:
            return _refuse(
                "not-the-latest-attempt",
                f"Attempt {entry.place.attempt} at step {step} is not the latest; "
                f"attempt {latest.number} is.",
            )
    if permission.allowed and isinstance(entry, Settled):
        return _settled_permission(view, entry)
    return permission


def _act_of(entry: AnyEntry) -> Act | None:
    if isinstance(entry, Confirmation):
        furnace = entry.moment == "before the furnace"
        return Act.CONFIRM_FURNACE if furnace else Act.CONFIRM_DOOR
    if isinstance(entry, RunoutSurvey):
        return {
            "bare shaft": Act.SURVEY_BARE_SHAFT,
            "bare seat": Act.SURVEY_SEAT,
        }.get(entry.purpose, Act.SURVEY)
    if isinstance(entry, SizeSurvey) and entry.place.kind != "attempt":
        return None
    acts: dict[type, Act] = {
        AttemptOpened: Act.OPEN_ATTEMPT,
        SizeSurvey: Act.MEASURE,
        Heating: Act.HEAT,
        Mount: Act.MOUNT,
        AxialMeasured: Act.MEASURE_AXIAL,
        Cooling: Act.COOL,
        Removal: Act.REMOVE,
        Settled: Act.SETTLE,
        Signature: Act.SIGN,
    }
    return acts.get(type(entry))


def _correction_permission(view: Assessment, entry: AnyEntry) -> Permission:
    """Let a correction stand that names what it replaces, and a reason; it only records."""
    old = next((one for one in view.job.entries if one.id == entry.supersedes), None)
    if old is None or type(old) is not type(entry) or old.place != entry.place:
        return _refuse("nothing-to-correct", "The entry to be corrected is not in this place.")
    if any(one.supersedes == old.id for one in view.job.entries):
        return _refuse(
            "corrected-already", "That entry has been corrected already; correct the correction."
        )
    if not entry.reason:
        return _refuse("reason-missing", "A correction says why.")
    return Permission(True)


def _before_permission(view: Assessment, step: str) -> Permission:
    latest = view.progress.latest(step)
    if latest is None or latest.outcome is not None:
        return _refuse("no-attempt-open", f"No attempt at step {step} is open.")
    if any(item.mounted for item in latest.items):
        return _refuse(
            "part-is-on", "A part of this step is on; it is too late for a survey before."
        )
    return Permission(True)


def _settled_permission(view: Assessment, entry: Settled) -> Permission:
    latest = view.progress.latest(entry.place.step or "")
    came_off = latest is not None and latest.is_coming_off
    if (entry.outcome == "removed") != came_off:
        return _refuse(
            "outcome-not-true",
            "The attempt came off and cannot be settled otherwise."
            if came_off
            else "Nothing has been removed in this attempt.",
        )
    return Permission(True)


def _role_permission(view: Assessment, entry: AnyEntry) -> Permission:
    """Hold signatures and decisions to the roles of the people who give them."""
    person = next((one for one in view.job.people if one.key == entry.by), None)
    if person is None:
        return _refuse("person-unknown", f"Nobody in this job has the key “{entry.by}”.")
    if isinstance(entry, Decision) and person.role not in ("inspector", "engineer"):
        return _refuse(
            "role-may-not-decide", f"{person.name} is a {person.role}; an inspector decides."
        )
    if not isinstance(entry, Signature):
        return Permission(True)
    if entry.role != person.role:
        return _refuse(
            "role-not-held", f"{person.name} is a {person.role} and cannot sign as {entry.role}."
        )
    wanted = {"performed": "technician", "inspected": "inspector", "witnessed": "witness"}
    if wanted.get(entry.meaning, person.role) != person.role:
        return _refuse(
            "role-not-held",
            f"{person.name} is a {person.role}; “{entry.meaning}” is signed by a "
            f"{wanted[entry.meaning]}.",
        )
    attempt = view.attempt(entry.place.step or "", entry.place.attempt or 0)
    did_it = attempt is not None and any(
        one.by == entry.by and not isinstance(one, Signature | Decision) for one in attempt.entries
    )
    if entry.meaning == "inspected" and did_it:
        return _refuse(
            "performer-cannot-inspect",
            f"{person.name} worked on this step and cannot inspect it.",
        )
    return Permission(True)


def _with_entry(job: Job, entry: AnyEntry) -> Job:
    return msgspec.structs.replace(job, entries=(*job.entries, entry))


def _verdicts_due(job: Job, entry: AnyEntry, at: str) -> list[StoredVerdict]:
    """Judge an attempt at a gate: everything known of it then is stored with its inputs."""
    view = assess(job)
    place: Place = entry.place
    return [
        _stored(one, entry.id, at)
        for one in view.findings
        if (one.finding.subject.step, one.finding.subject.attempt) == (place.step, place.attempt)
        and one.finding.verdict is not Verdict.NOT_JUDGED
    ]


def _rests_on(view: Assessment, standing: Standing, entry_id: str) -> bool:
    """Whether a finding of fit rests on this size survey."""
    if standing.finding.rule.id != "interference-within":
        return False
    entry = next((one for one in view.job.entries if one.id == entry_id), None)
    subject = standing.finding.subject
    return isinstance(entry, SizeSurvey) and (
        (entry.item, entry.land, entry.place.step, entry.place.attempt)
        == (subject.item, subject.land, subject.step, subject.attempt)
    )


def _changed(
    before: Assessment, after: Assessment, entry_id: str, at: str
) -> Sequence[StoredVerdict]:
    """Find the verdicts that a correction turned, in every attempt that rested on it."""
    old = {finding_key(one.finding): one.finding.verdict for one in before.findings}
    return [
        _stored(one, entry_id, at)
        for one in after.findings
        if old.get(finding_key(one.finding)) is not one.finding.verdict
    ]


def _stored(standing: Standing, subject_entry: str, at: str) -> StoredVerdict:
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
