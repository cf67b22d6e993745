"""The acts themselves: each is one transaction and one link of the chain."""

from collections.abc import Callable
from dataclasses import dataclass
from datetime import datetime
from pathlib import Path

import msgspec

from models import jobfile
from models.acts.carrying import take_in, with_chain
from models.acts.materials import keep_material, materials_kept
from models.acts.numbering import number_findings, number_of_entry
from models.acts.permissions import demand, permission_for
from models.acts.verdicts import (
    changed_verdicts,
    judged_already,
    rests_on,
    stored_verdict,
    verdicts_due,
    with_entry,
)
from models.assess import assess
from models.job import (
    AnyEntry,
    Attachment,
    AttemptOpened,
    GaugeTry,
    Hot,
    Job,
    Mount,
    OwnMaterial,
    Person,
    Question,
    RunoutReading,
    RunoutSurvey,
    Settled,
    Signature,
    SizeReading,
    VisualFinding,
    Warmth,
)
from models.record import journal, queries
from models.record.carried import Laid
from models.record.files import keep_file, read_file
from models.record.key_rows import add_key_signature, authority_of_the_shop
from models.record.signed_text import read_text, to_sign
from models.record.store import Session, Store
from models.rules.progress import Permission

__all__ = ["Acts", "Reading", "Recorded", "SignedWith"]

Reading = RunoutReading | SizeReading | Hot | Warmth | GaugeTry
_JUDGED_AT = (Mount, Settled, AttemptOpened)
_NUMBERED_AT = (*_JUDGED_AT, RunoutSurvey, VisualFinding)


@dataclass(frozen=True)
class SignedWith:
    """The value behind a signature: what was signed, the value in base64, the papers in PEM."""

    text: str
    value: str
    certificate: str
    authority: str


@dataclass(frozen=True)
class Recorded:
    """An act that is on the disk."""

    sequence: int
    at: str


def _local_now() -> datetime:
    return datetime.now().astimezone()


def key_permission(
    session: Session, number: str, entry: Signature, signed: SignedWith | None
) -> Permission:
    """Ask for a key behind a signature, over what the record holds at this moment."""
    if signed is None:
        if authority_of_the_shop(session) is None:
            return Permission(True)
        return Permission(
            False,
            "signature-needs-key",
            "This shop signs with keys. Open a sitting with the passphrase, then sign.",
        )
    name = str(read_text(signed.text)["name"])
    if to_sign(session, number, entry, name=name).text != signed.text:
        return Permission(
            False,
            "moved-on-since-seen",
            "The record has moved on since you looked at what you sign. Look again, then sign.",
        )
    return Permission(True)


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

    def materials(self) -> tuple[OwnMaterial, ...]:
        """List the shop's own materials."""
        return materials_kept(self._store)

    def keep_material(self, material: OwnMaterial, *, person: Person, act_id: str) -> Recorded:
        """Keep a material that the shop answers for, or its next version."""
        at = self.now()
        sequence = keep_material(self._store, material, person=person, act_id=act_id, at=at)
        return Recorded(sequence, at)

    def bring_in(
        self, job: Job, *, by: str, act_id: str, signer: journal.Signer | None = None
    ) -> None:
        """Take a whole job from a job file into the record; one that is there is refused.

        `signer` puts a key behind each signature as it comes in; without one a signature keeps
        the value that the file holds for it, or stands on trust.
        """
        with self._store.writing() as session:
            journal.bring_in(session, job, by=by, act_id=act_id, signer=signer)

    def take_in(self, data: bytes, *, by: str, act_id: str | None = None) -> Laid:
        """Lay the job of a file down with its chain; a file that is all there does nothing.

        Raises
        ------
        JobFileError, CarriedError
            If the file is not taken; nothing of it is kept.
        """
        return take_in(self._store, data, by=by, at=self.now(), act_id=act_id)

    def write_file(self, number: str, path: Path) -> int:
        """Write a job file with the job's chain; says how many acts it carries."""
        job, chain = with_chain(self._store, number)
        jobfile.write(job, path, chain)
        return len(chain)

    def record(
        self,
        number: str,
        entry: AnyEntry,
        *,
        act_id: str | None = None,
        head: int | None = None,
        signed: SignedWith | None = None,
    ) -> Recorded:
        """Record a whole entry, or an empty one that readings will be added to.

        Raises
        ------
        NotAllowedError
            If the order of the work does not allow it and the entry gives no reason, or if it is a
            signature in a shop that has keys and no key stands behind it.
        """
        with self._store.writing() as session:
            job = queries.read_job(session, number)
            view = assess(job)
            # A retry after an unknown end: what is there already is not asked for again.
            is_new = all(one.id != entry.id for one in job.entries)
            if entry.out_of_order is None and is_new:
                demand(permission_for(view, entry))
            if isinstance(entry, Signature) and is_new:
                demand(key_permission(session, number, entry, signed))
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
                if signed is not None:
                    add_key_signature(
                        act,
                        entry=entry.id,
                        text=signed.text,
                        value=signed.value,
                        certificate=signed.certificate,
                        authority=signed.authority,
                    )
                if isinstance(entry, _JUDGED_AT):
                    later = with_entry(job, entry)
                    act.add_verdicts(verdicts_due(later, entry, at))
                if isinstance(entry, _NUMBERED_AT):
                    number_of_entry(act, with_entry(job, entry), entry, at=at)
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
            before = judged_already(queries.read_job(session, number), entry_id) if reason else None
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
                    act.add_verdicts(changed_verdicts(before, after, entry_id, at))
            return Recorded(act.sequence, at)

    def attach(
        self,
        number: str,
        entry: Attachment,
        content: bytes,
        *,
        act_id: str | None = None,
    ) -> Recorded:
        """Attach a picture or document: the file is on the disk before the row that names it.

        Raises
        ------
        AttachedFileError
            If the folder or the disk do not take the file; nothing is recorded then.
        """
        digest = keep_file(self._store.path.parent, content)
        whole = msgspec.structs.replace(entry, file_digest=digest, size_bytes=len(content))
        return self.record(number, whole, act_id=act_id)

    def attached(self, entry: Attachment) -> bytes:
        """Read an attached file, and look whether it is as it was attached.

        Raises
        ------
        AttachedFileError
            If it is missing or changed; the message names it.
        """
        return read_file(self._store.path.parent, entry.file_digest, name=entry.name)

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
                    stored_verdict(one, entry_id, at)
                    for one in view.findings
                    if one.finding.subject.entry == entry_id or rests_on(view, one, entry_id)
                )
                closed = next(one for one in view.job.entries if one.id == entry_id)
                number_findings(act, view, at=at, place=closed.place)
            return Recorded(act.sequence, at)
