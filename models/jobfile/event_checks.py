"""What entries beside the mounting must hold true in themselves."""

import datetime
import re
from collections.abc import Iterator

from models.job import AnyEntry, Attachment, Job, OutsideOperation, PointEvent
from models.jobfile.faults import Fault

__all__ = ["event_faults", "standing_faults"]

_DIGEST = re.compile(r"[0-9a-f]{64}")


def event_faults(place: str, entry: AnyEntry) -> Iterator[Fault]:
    """Find what does not hold true in one entry of these kinds."""
    if isinstance(entry, PointEvent):
        yield from _instant(f"{place}.at", entry.at)
    elif isinstance(entry, OutsideOperation):
        yield from _day(f"{place}.sent_on", entry.sent_on)
        if entry.back_on is not None:
            yield from _day(f"{place}.back_on", entry.back_on)
            if entry.back_on < entry.sent_on:
                yield Fault(f"{place}.back_on", entry.back_on, f"no day before {entry.sent_on}")
    elif isinstance(entry, Attachment):
        if not _DIGEST.fullmatch(entry.file_digest):
            expected = "a SHA-256 in 64 small hexadecimal digits"
            yield Fault(f"{place}.file_digest", entry.file_digest, expected)
        if entry.size_bytes < 0:
            yield Fault(f"{place}.size_bytes", entry.size_bytes, "0 or more")


def standing_faults(job: Job) -> Iterator[Fault]:
    """Find what does not hold true in numbered findings and in instruments found out."""
    given: set[int] = set()
    for index, one in enumerate(job.numbered_findings):
        here = f"numbered_findings[{index}]"
        if one.number < 1:
            yield Fault(f"{here}.number", one.number, "a number from 1")
        if one.number in given:
            yield Fault(f"{here}.number", one.number, "a number that no earlier one has")
        given.add(one.number)
        yield from _instant(f"{here}.opened_at", one.opened_at)
    for index, event in enumerate(job.instrument_events):
        here = f"instrument_events[{index}]"
        yield from _day(f"{here}.last_good_on", event.last_good_on)
        yield from _day(f"{here}.found_on", event.found_on)


def _day(place: str, written: str) -> Iterator[Fault]:
    try:
        datetime.date.fromisoformat(written)
    except ValueError:
        yield Fault(place, written, "a date such as 2026-10-05")


def _instant(place: str, written: str) -> Iterator[Fault]:
    expected = "an instant with its offset, such as 2026-10-05T07:30:00-05:00"
    try:
        if datetime.datetime.fromisoformat(written).tzinfo is None:
            yield Fault(place, written, expected)
    except ValueError:
        yield Fault(place, written, expected)
