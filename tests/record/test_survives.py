"""Several writers at once, and writers killed at any moment: nothing acknowledged is lost."""

import multiprocessing
import random
import time
from multiprocessing.connection import Connection
from pathlib import Path

import pytest

from models.job import Place, RunoutReading
from models.record import queries
from models.record.store import Store
from models.record.verify import verify
from tests.record.a_job import NUMBER, a_job, a_survey
from tests.record.whole_record import one_act

pytestmark = pytest.mark.skipif(
    "fork" not in multiprocessing.get_all_start_methods(), reason="children are forked warm"
)
READINGS_EACH = 15


def begin(folder: Path) -> None:
    with Store.open(folder) as store, one_act(store, "begin") as act:
        act.add_job(a_job())
        act.add_entry(a_survey("s", Place(kind="final"), 200))


def write(folder: Path, name: str, readings: int, told: Connection) -> None:
    with Store.open(folder) as store:
        for number in range(readings):
            with one_act(store, f"{name} {number}") as act:
                act.add_reading("s", RunoutReading(station=f"{name} {number}", mark=0, typed="1"))
            told.send(number)


def started(folder: Path, name: str, readings: int) -> tuple[multiprocessing.Process, Connection]:
    heard, told = multiprocessing.Pipe(duplex=False)
    # The parent holds no connection when it forks.
    context = multiprocessing.get_context("fork")
    child = context.Process(target=write, args=(folder, name, readings, told))
    child.start()
    told.close()
    return child, heard


def acts_in(folder: Path) -> int:
    with Store.open(folder) as store, store.reading() as session:
        found = verify(session)
        assert found.troubles == ()
        survey = queries.read_job(session, NUMBER).entries[0]
        assert len(survey.stations) == found.acts - 1
        return found.acts


def test_two_processes_that_write_at_once_lose_nothing(tmp_path: Path) -> None:
    begin(tmp_path)
    children = [started(tmp_path, name, READINGS_EACH)[0] for name in ("left", "right")]
    for child in children:
        child.join(60)
    assert [child.exitcode for child in children] == [0, 0]
    assert acts_in(tmp_path) == 1 + 2 * READINGS_EACH


@pytest.mark.parametrize("seed", range(6))
def test_a_writer_killed_at_any_moment_leaves_every_acknowledged_reading(
    tmp_path: Path, seed: int
) -> None:
    begin(tmp_path)
    child, heard = started(tmp_path, "killed", 10_000)
    acknowledged = heard.recv() + 1
    time.sleep(random.Random(seed).uniform(0, 0.15))
    child.kill()
    child.join(10)
    try:
        while True:
            acknowledged = heard.recv() + 1
    except EOFError:
        pass
    # One act may have reached the disk without having been told.
    assert acts_in(tmp_path) - 1 in (acknowledged, acknowledged + 1)
