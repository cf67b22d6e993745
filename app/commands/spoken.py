"""What every command shares: how it speaks, reads, and ends."""

import sys
from collections.abc import Callable
from pathlib import Path
from typing import Any

from models.assess import Assessment
from models.job import Job
from models.rules.rule import Verdict

__all__ = [
    "NOT_WITHIN",
    "UNUSABLE",
    "WITHIN",
    "UnusableError",
    "read",
    "say",
    "status",
    "tell_network",
    "with_record",
]

WITHIN, NOT_WITHIN, UNUSABLE = 0, 1, 2
"""Exit status: every rule within; anything outside, in doubt or not judged; unusable input."""


class UnusableError(Exception):
    """Input that nothing can be done with; its message is one sentence with the way out."""


def say(text: str) -> None:
    """Say it on standard output, where a command speaks."""
    print(text)  # noqa: T201  (a command speaks on standard output)


def read(path: Path) -> Job:
    """Read a job file.

    Raises
    ------
    UnusableError
        If it is none; the message names the place of the fault.
    """
    from models.jobfile import JobFileError
    from models.jobfile import read as read_job

    try:
        return read_job(path)
    except JobFileError as trouble:
        raise UnusableError(f"{path}: {trouble}") from None


def status(view: Assessment) -> int:
    """Give the exit status of a job that was judged."""
    return WITHIN if view.verdict is Verdict.WITHIN else NOT_WITHIN


def tell_network(folder: Path) -> None:
    """Say on the error output that a folder lies on a network, where it does."""
    from models.record.folders import network_kind, network_words

    kind = network_kind(folder)
    if kind:
        print(f"thirdjournal: {network_words(folder, kind)}", file=sys.stderr)  # noqa: T201


def with_record(act: Callable[[], Any]) -> Any:  # noqa: ANN401  (whatever the act returns)
    """Do something with a record.

    Raises
    ------
    UnusableError
        If the record does not allow it.
    """
    from models.record.errors import RecordError

    try:
        return act()
    except RecordError as trouble:
        raise UnusableError(str(trouble)) from None
