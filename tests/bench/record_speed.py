"""Time the record: opening, reading a job of 4,000 readings, one act per reading, verifying.

Run it as `python -m tests.bench.record_speed`; it prints milliseconds and asserts nothing.
"""

import statistics
import sys
import tempfile
import time
from collections.abc import Callable
from pathlib import Path

import msgspec

from models.job import Job, Place, RunoutReading, StationReadings
from models.record import journal, queries
from models.record.store import Store
from models.record.verify import verify
from tests.record.a_job import NUMBER, a_job, a_survey
from tests.record.whole_record import one_act

SURVEYS, STATIONS, MARKS, ACTS = 40, 25, 4, 200


def job_of_4000_readings() -> Job:
    typed = tuple(str(mark) for mark in range(MARKS))
    stations = tuple(
        StationReadings(station=f"station {number}", typed=typed) for number in range(STATIONS)
    )
    surveys = tuple(
        a_survey(f"survey {number}", Place(kind="final"), 200, stations=stations)
        for number in range(SURVEYS)
    )
    return msgspec.structs.replace(a_job(), entries=surveys)


def timed(name: str, times: int, what: Callable[[int], object]) -> None:
    spent = []
    for number in range(times):
        begun = time.perf_counter()
        what(number)
        spent.append((time.perf_counter() - begun) * 1000)
    middle, worst = statistics.median(spent), max(spent)
    sys.stdout.write(f"{name:<40} median {middle:8.2f} ms   worst {worst:8.2f} ms\n")


def read(store: Store) -> Job:
    with store.reading() as session:
        return queries.read_job(session, NUMBER)


def add_one(store: Store, number: int) -> None:
    with one_act(store, f"reading {number}") as act:
        act.add_reading(
            "survey 0",
            RunoutReading(station=f"more {number // MARKS}", mark=number % MARKS, typed="1"),
        )


def shelf(store: Store) -> object:
    with store.reading() as session:
        return queries.job_rows(session)


def check(store: Store) -> object:
    with store.reading() as session:
        return verify(session)


def main() -> None:
    job = job_of_4000_readings()
    with tempfile.TemporaryDirectory() as folder:
        timed("make a new record", 1, lambda _: Store.open(Path(folder)).close())
        with Store.open(Path(folder)) as store:

            def bring(_: int) -> None:
                with store.writing() as session:
                    journal.bring_in(session, job, by="tom", act_id="in")

            timed("bring in 4,000 readings", 1, bring)
            timed("open", 5, lambda _: Store.open(Path(folder)).close())
            timed("read the job", 7, lambda _: read(store))
            timed("shelf", 7, lambda _: shelf(store))
            timed("one reading, one act, on the disk", ACTS, lambda n: add_one(store, n))
            timed("verify all", 3, lambda _: check(store))
        size = sum(path.stat().st_size for path in Path(folder).iterdir())
        sys.stdout.write(f"file {size / 1e6:.1f} MB\n")


if __name__ == "__main__":
    main()
