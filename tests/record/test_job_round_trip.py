"""A job that goes in comes out the same."""

import typing
from collections.abc import Callable
from pathlib import Path

import msgspec
import pytest

import sample_data
from models.job import AnyEntry, Head, Job
from models.record import journal, queries
from models.record.errors import JobKnownError, UnknownJobError
from models.record.store import Store
from models.record.verify import verify
from tests.record.a_job import a_job


def brought_in(store: Store, job: Job) -> Job:
    with store.writing() as session:
        head = journal.bring_in(session, job, by="tom", act_id=f"in {job.number}")
    with store.reading() as session:
        back = queries.read_job(session, job.number)
    assert back.head == head
    return msgspec.structs.replace(back, head=None)


def test_a_whole_job_comes_back_identical(store: Store) -> None:
    job = a_job()
    assert brought_in(store, job) == job


def test_the_small_job_holds_every_kind_of_entry() -> None:
    assert {type(entry) for entry in a_job().entries} == set(typing.get_args(AnyEntry))


@pytest.mark.parametrize("sample", [sample_data.compressor, sample_data.pump])
def test_the_invented_builds_come_back_identical(store: Store, sample: Callable[[], Job]) -> None:
    job = sample()
    with store.writing() as session:
        journal.bring_in(session, job, by=job.people[0].key, act_id="in")
    with store.reading() as session:
        back = queries.read_job(session, job.number)
        assert verify(session).is_whole
    assert msgspec.structs.replace(back, head=None) == msgspec.structs.replace(job, head=None)


def test_a_job_passes_through_a_second_record_unchanged(store: Store, tmp_path: Path) -> None:
    first = brought_in(store, a_job())
    (tmp_path / "other").mkdir()
    with Store.open(tmp_path / "other") as other:
        assert brought_in(other, first) == first


def test_a_job_from_another_record_keeps_the_head_it_left_with(store: Store) -> None:
    left_with = Head(sequence=7, digest="ab" * 32)
    brought_in(store, msgspec.structs.replace(a_job(), head=left_with))
    with store.reading() as session:
        kept = session.connection().exec_driver_sql(
            "SELECT brought_head_sequence, brought_head_digest FROM job"
        )
        assert tuple(kept.one()) == (7, "ab" * 32)


def test_two_jobs_may_use_the_same_ids_of_entries(store: Store) -> None:
    one, two = a_job("R-1"), a_job("R-2")
    assert brought_in(store, one) == one
    assert brought_in(store, two) == two


def test_a_number_is_brought_in_once(store: Store) -> None:
    brought_in(store, a_job())
    with store.writing() as session, pytest.raises(JobKnownError, match="R-17"):
        journal.bring_in(session, a_job(), by="tom", act_id="another act")


def test_bringing_in_again_under_the_same_act_records_nothing_twice(store: Store) -> None:
    first = brought_in(store, a_job())
    assert brought_in(store, a_job()) == first
    with store.reading() as session:
        assert queries.head(session, "R-17").sequence == len(first.entries) + 2


def test_the_shelf_counts_settled_steps(store: Store) -> None:
    brought_in(store, a_job())
    with store.reading() as session:
        (row,) = queries.job_rows(session)
    # By hand: step one ended within limits in its second attempt, step two was not begun.
    assert (row.steps_settled, row.steps) == (1, 2)
    assert (row.number, row.rotor_serial, row.plan) == ("R-17", "S-4711", "B")


def test_an_unknown_number_is_a_sentence(store: Store) -> None:
    with store.reading() as session, pytest.raises(UnknownJobError, match="no job R-99"):
        queries.read_job(session, "R-99")
