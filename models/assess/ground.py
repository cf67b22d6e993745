"""What every attempt of a job rests on, hashed once: plan, people, instruments, components."""

import msgspec

from models.job import Job

__all__ = ["Ground", "ground_of"]

_REMEMBERED = 8


class Ground:
    """A job without entries, verdicts and head, as a key to what was worked out before.

    A plan has thousands of parts; their hash is worked out once for the job and not at each look.
    """

    __slots__ = ("_hash", "job")

    def __init__(self, job: Job) -> None:
        self.job = job
        self._hash = hash(job)

    def __hash__(self) -> int:
        return self._hash

    def __eq__(self, other: object) -> bool:
        if not isinstance(other, Ground):
            return NotImplemented
        return self.job is other.job or (self._hash == other._hash and self.job == other.job)


def _without_history(job: Job) -> Job:
    """Leave out what grows with the work and what no attempt is worked out from."""
    return msgspec.structs.replace(
        job,
        entries=(),
        verdicts=(),
        key_signatures=(),
        numbered_findings=(),
        instrument_events=(),
        head=None,
    )


_recent: tuple[tuple[Job, Ground], ...] = ()


def ground_of(job: Job) -> Ground:
    """Give the ground of a job; that of a job seen lately is found again."""
    global _recent
    for known, ground in _recent:
        if known is job:
            return ground
    ground = Ground(_without_history(job))
    # The same plan read anew is the same ground, so that later looks need not compare it again.
    ground = next((one for _, one in _recent if one == ground), ground)
    # One assignment, so that another thread sees the old row or the new one.
    _recent = ((job, ground), *_recent[: _REMEMBERED - 1])
    return ground
