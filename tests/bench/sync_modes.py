"""Measure journal mode and sync under the program's own writer: how long one act takes.

    python -m tests.bench.sync_modes [FOLDER]

Each mode gets a record of its own below FOLDER (a temporary one if absent; it must lie on the disk
that is to be measured) and takes the same readings, one act each, and one backup. All modes are
gone through several times; the quietest round of each is printed, since a shared machine disturbs
some. Nothing is asserted. How often one act calls the disk (write, sync, make, remove) is counted
by the tests' shim, in a process of its own.
"""

import os
import statistics
import subprocess
import sys
import tempfile
import time
from pathlib import Path

from models.job import Place, RunoutReading
from models.record import connections
from models.record.backups import write_backup
from models.record.store import Store
from tests.record.a_job import a_job, a_survey
from tests.record.survival.shim import Fault, Shim, compiled
from tests.record.whole_record import one_act

ACTS, ROUNDS = 200, 4
MODES = (
    ("DELETE", "EXTRA"),
    ("DELETE", "FULL"),
    ("DELETE", "NORMAL"),
    ("TRUNCATE", "FULL"),
    ("WAL", "FULL"),
    ("WAL", "NORMAL"),
)
_NUMBERS = {"NORMAL": "1", "FULL": "2", "EXTRA": "3"}
_OTHERS = tuple(
    one for one in connections._SETTINGS if one[0] not in ("journal_mode", "synchronous")
)


def set_mode(journal: str, sync: str) -> None:
    """Let every connection from now on use another journal and sync."""
    connections._SETTINGS = (
        ("journal_mode", journal, journal.lower()),
        ("synchronous", sync, _NUMBERS[sync]),
        *_OTHERS,
    )


def add_one(store: Store, number: int) -> None:
    """Record one reading as one act."""
    with one_act(store, f"reading {number}") as act:
        reading = RunoutReading(station=f"{number // 4}", mark=number % 4, typed="1")
        act.add_reading("s", reading)


def begin(store: Store) -> None:
    """Open the survey that takes the readings."""
    with one_act(store, "begin") as act:
        act.add_job(a_job())
        act.add_entry(a_survey("s", Place(kind="final"), 200))


def one_round(folder: Path) -> tuple[float, float, float]:
    """Give median and 99th part of a hundred of one act, and one backup's time, all in ms."""
    spent = []
    folder.mkdir()
    with Store.open(folder) as store:
        begin(store)
        for number in range(ACTS):
            begun = time.perf_counter()
            add_one(store, number)
            spent.append(1000 * (time.perf_counter() - begun))
        begun = time.perf_counter()
        write_backup(store, folder / "backups")
        backup = 1000 * (time.perf_counter() - begun)
    return statistics.median(spent), sorted(spent)[int(0.99 * ACTS)], backup


def count(folder: Path) -> None:
    """Print for each mode how many calls to the disk one act makes, under the shim."""
    for journal, sync in MODES:
        set_mode(journal, sync)
        place = folder / f"{journal} {sync} counted"
        place.mkdir()
        with Store.open(place) as store:
            begin(store)
            add_one(store, 0)
            shim = Shim()
            shim.arm(place, Fault.COUNT, 0)
            add_one(store, 1)
            sys.stdout.write(f"{journal} {sync}: {shim.disarm()} calls to the disk in one act\n")


def main(folder: Path) -> None:
    """Measure every mode, then count."""
    rounds: dict[tuple[str, str], list[tuple[float, float, float]]] = {}
    for number in range(ROUNDS):
        for mode in MODES:
            set_mode(*mode)
            rounds.setdefault(mode, []).append(one_round(folder / f"{' '.join(mode)} {number}"))
    for (journal, sync), found in rounds.items():
        middle, slow, backup = min(found)
        sys.stdout.write(
            f"{journal:<9}{sync:<8}median {middle:6.2f} ms   {1000 / middle:5.0f} acts/s"
            f"   99 % {slow:7.2f} ms   one backup {backup:6.1f} ms\n"
        )
    sys.stdout.flush()
    told = {**os.environ, "LD_PRELOAD": str(compiled(folder))}
    again = [sys.executable, "-m", "tests.bench.sync_modes", str(folder)]
    subprocess.run(again, env=told, check=True)


if __name__ == "__main__":
    if "LD_PRELOAD" in os.environ:
        count(Path(sys.argv[1]))
    else:
        with tempfile.TemporaryDirectory(dir=sys.argv[1] if sys.argv[1:] else None) as name:
            main(Path(name))
