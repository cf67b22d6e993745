"""Entries beside the mounting that cannot be true are refused with their place."""

from typing import Any

import msgspec
import pytest

from models.jobfile.checks import faults
from tests.record.a_job import a_job
from tests.record.things import FOUND_OUT, NUMBERED

JOB = a_job()


def _told(change: dict[str, Any], entry_id: str) -> list[str]:
    entries = tuple(
        msgspec.structs.replace(one, **change) if one.id == entry_id else one for one in JOB.entries
    )
    before = {fault.place for fault in faults(JOB)}
    changed = msgspec.structs.replace(JOB, entries=entries)
    return [one.place.rpartition(".")[2] for one in faults(changed) if one.place not in before]


@pytest.mark.parametrize(
    ("entry_id", "change", "named"),
    [
        ("invited", {"at": "yesterday"}, ["at"]),
        ("invited", {"at": "2031-03-01T09:00:00"}, ["at"]),
        ("back", {"sent_on": "20.2.2031"}, ["sent_on"]),
        ("back", {"back_on": "2031-02-19"}, ["back_on"]),
        ("back", {"back_on": "2031-02-20"}, []),
        ("picture", {"file_digest": "AB" * 32}, ["file_digest"]),
        ("picture", {"size_bytes": -1}, ["size_bytes"]),
        ("picture", {"size_bytes": 0}, []),
    ],
)
def test_a_fault_names_its_place(entry_id: str, change: dict[str, Any], named: list[str]) -> None:
    assert _told(change, entry_id) == named


def test_a_finding_s_number_is_given_once() -> None:
    twice = msgspec.structs.replace(JOB, numbered_findings=(NUMBERED, NUMBERED))
    assert "numbered_findings[1].number" in {fault.place for fault in faults(twice)}
    assert "numbered_findings[1].number" not in {fault.place for fault in faults(JOB)}


def test_a_day_that_is_none_is_told_of_an_instrument_found_out() -> None:
    wrong = msgspec.structs.replace(FOUND_OUT, last_good_on="2031-02-30")
    told = {one.place for one in faults(msgspec.structs.replace(JOB, instrument_events=(wrong,)))}
    assert "instrument_events[0].last_good_on" in told
