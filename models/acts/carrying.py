"""Jobs with their chain, carried from record to record."""

import uuid
from dataclasses import dataclass
from pathlib import Path
from tempfile import TemporaryDirectory

from models import jobfile
from models.job import Job
from models.jobfile import Link
from models.record import journal, queries
from models.record.carried import CarriedError, Laid, carried, lay, note_taken_in
from models.record.store import Store
from models.record.verify import Trouble, verify

__all__ = ["Looked", "look_at", "take_in", "with_chain"]


@dataclass(frozen=True)
class Looked:
    """What a job file with a chain holds, and what does not hold of it."""

    job: Job
    laid: Laid
    troubles: tuple[Trouble, ...]


def with_chain(store: Store, number: str) -> tuple[Job, tuple[Link, ...]]:
    """Read a job with its chain, at one moment of the record."""
    with store.reading() as session:
        return queries.read_job(session, number), carried(session, number)


def look_at(data: bytes) -> Looked:
    """Recompute the chain of a job file, without any record: it is laid down in a scratch one.

    Raises
    ------
    JobFileError
        If it is no job file.
    CarriedError
        If it carries no chain, or one that does not hold, or the job tells another story than the
        rows.
    """
    job, chain = jobfile.loads(data), jobfile.chain_of(data)
    with TemporaryDirectory() as scratch, Store.open(Path(scratch)) as store:
        with store.writing() as session:
            laid = lay(session, chain)
        with store.reading() as session:
            told = queries.read_job(session, laid.number)
            troubles = verify(session, number=laid.number).troubles
    if jobfile.dumps(told) != jobfile.dumps(job):
        raise CarriedError(
            f"The file tells job {job.number} otherwise than the rows of its chain do: one of the "
            "two was changed. Ask for the file anew, from the record it came from."
        )
    return Looked(job, laid, troubles)


def take_in(store: Store, data: bytes, *, by: str, at: str, act_id: str | None = None) -> Laid:
    """Lay the job of a file down in the record with its chain, and note it in the shop's.

    A file whose acts are all there does nothing; a later one of the same job brings its later acts.

    Raises
    ------
    JobFileError, CarriedError
        If the file is not taken; nothing of it is kept.
    """
    looked = look_at(data)
    if looked.troubles:
        raise CarriedError(f"The file's chain does not hold: {looked.troubles[0].words}.")
    person = next((one for one in looked.job.people if one.key == by), None)
    with store.writing() as session:
        laid = lay(session, jobfile.chain_of(data))
        if laid.new_acts == 0:
            return laid
        with journal.act(
            session,
            chain=journal.SHOP,
            kind="job taken in",
            by=by,
            act_id=act_id or str(uuid.uuid4()),
            done_at=at,
        ) as act:
            if person is not None:
                act.add_people([person])
            note_taken_in(act, laid, data=data)
        return laid
