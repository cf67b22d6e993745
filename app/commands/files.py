"""Commands on job files, which need no record."""

import argparse
import json

from app import findings_text
from app.commands.spoken import NOT_WITHIN, WITHIN, UnusableError, read, say, status
from models.assess import assess

__all__ = ["check", "in_service", "traveler"]


def check(given: argparse.Namespace) -> int:
    """Judge a job file without any record, in words or as plain data."""
    job = read(given.jobfile)
    view = assess(job)
    if given.json:
        say(json.dumps(findings_text.as_data(view), indent=1, ensure_ascii=False))
    else:
        say(findings_text.as_text(view))
    return status(view)


def traveler(given: argparse.Namespace) -> int:
    """Write a job file's traveler."""
    from reports.traveler import write

    job = read(given.jobfile)
    write(assess(job), given.output)
    say(f"Traveler written to {given.output}")
    return WITHIN


def in_service(given: argparse.Namespace) -> int:
    """Say what moved since the final survey of an earlier job file."""
    from app.in_service_text import compared
    from models.assess.in_service import InServiceError

    try:
        words, nothing_moved = compared(read(given.earlier), read(given.present))
    except InServiceError as trouble:
        raise UnusableError(str(trouble)) from None
    say(words)
    return WITHIN if nothing_moved else NOT_WITHIN
