"""Acts about attachments and instruments, each on a record that stands just before it."""

from collections.abc import Callable
from functools import partial

import msgspec

from models.acts import Acts, Instruments
from models.job import Attachment, Calibration, Job
from models.record.store import Store
from tests.record.a_job import NUMBER

__all__ = ["thing_cases"]

_ID = "the act under test"


def _bring(job: Job, store: Store) -> None:
    kept = msgspec.structs.replace(job, verdicts=(), numbered_findings=(), instrument_events=())
    Acts(store).bring_in(kept, by="tom", act_id="brought")


def _attach(job: Job, store: Store) -> object:
    picture = next(one for one in job.entries if isinstance(one, Attachment))
    new = msgspec.structs.replace(picture, id=_ID, about="")
    return Acts(store).attach(NUMBER, new, b"another picture", act_id=_ID)


def _calibrate(job: Job, store: Store) -> object:
    return Instruments(store).calibrate(
        job.instruments[0],
        Calibration(done_on="2031-03-20", due_on="2032-03-20", certificate="K-9"),
        person=job.people[1],
        act_id=_ID,
    )


def _found_out(job: Job, store: Store) -> object:
    return Instruments(store).found_out(
        "DI-3",
        last_good_on="2031-03-01",
        words="sticks",
        person=job.people[1],
        found_on="2031-03-20",
        act_id=_ID,
    )


def thing_cases(
    job: Job,
) -> dict[str, tuple[Callable[[Store], None], Callable[[Store], object]]]:
    """Give what the record holds before, and the act, for every act about these things."""
    before = partial(_bring, job)
    return {
        "attach": (before, partial(_attach, job)),
        "calibrate": (before, partial(_calibrate, job)),
        "found_out": (before, partial(_found_out, job)),
    }
