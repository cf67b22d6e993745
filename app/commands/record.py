"""Commands on a shop's record: verify, back up, put back, export, take in."""

import argparse
import sys

from app.commands.spoken import (
    NOT_WITHIN,
    WITHIN,
    UnusableError,
    say,
    tell_network,
    with_record,
)

__all__ = ["backup", "export", "restore", "take_in", "verify"]


def verify(given: argparse.Namespace) -> int:
    """Recompute a record, or the chain of a job file, and say what does not hold."""
    from app.verify_text import head_from, verified, verified_file
    from models.record.store import FILE_NAME

    in_file = given.record.is_file() and given.record.name != FILE_NAME
    if given.head is not None and given.job is None and not in_file:
        raise UnusableError("--head belongs to one job; name it with --job")
    try:
        head = head_from(given.head) if given.head is not None else None
    except ValueError as trouble:
        raise UnusableError(str(trouble)) from None
    if in_file:
        found = with_record(lambda: verified_file(given.record, head=head))
    else:
        folder = given.record.parent if given.record.name == FILE_NAME else given.record
        tell_network(folder)
        found = with_record(
            lambda: verified(folder, job=given.job, head=head, progress=_say_progress)
        )
    say(found.words)
    return WITHIN if found.is_whole else NOT_WITHIN


def backup(given: argparse.Namespace) -> int:
    """Write a backup of a record, compared with it."""
    from app.backup_text import backed_up

    tell_network(given.record)
    say(with_record(lambda: backed_up(given.record, to=given.to)))
    return WITHIN


def restore(given: argparse.Namespace) -> int:
    """Put a record back to a backup, or only look into it."""
    from app.backup_text import looked_into, put_back

    tell_network(given.record)
    act = looked_into if given.look else put_back
    say(with_record(lambda: act(given.backup, given.record)))
    return WITHIN


def _say_progress(done: int, of: int) -> None:
    """Show a person at the screen how far a long verification is; Ctrl+C stops it."""
    if of > 20 and done % 10 == 0 and sys.stderr.isatty():
        print(f"\r{done} of {of} chains", end="", file=sys.stderr, flush=True)  # noqa: T201


def export(given: argparse.Namespace) -> int:
    """Write a job file that carries the chain of its job."""
    from models.acts import Acts
    from models.record.store import Store

    def work() -> int:
        with Store.open(given.record, create=False) as store:
            return Acts(store).write_file(given.job, given.output)

    acts = with_record(work)
    say(f"Job {given.job} with its chain of {acts} acts written to {given.output}")
    return WITHIN


def take_in(given: argparse.Namespace) -> int:
    """Lay a job file with its chain down in another shop's record."""
    from models.acts import Acts
    from models.jobfile import JobFileError
    from models.record.store import Store

    def work() -> str:
        with Store.open(given.record, create=False) as store:
            laid = Acts(store).take_in(given.jobfile.read_bytes(), by=given.by)
        new = f"{laid.new_acts} acts are new" if laid.new_acts else "all of it was there already"
        return f"Job {laid.number}: {new}; head {laid.head.sequence}:{laid.head.digest[:16]}"

    try:
        say(with_record(work))
    except JobFileError as trouble:
        raise UnusableError(f"{given.jobfile}: {trouble}") from None
    return WITHIN
