"""Time shops of growing size: opening, the shelf, one job, verifying, beside reading and hashing.

Run it as `python -m tests.bench.shop_speed 20 200 2000`; it makes such shops of small jobs with a
row in every table, prints milliseconds of processor time, and asserts nothing.
"""

import hashlib
import sqlite3
import sys
import tempfile
import time
from collections.abc import Callable
from pathlib import Path

import msgspec

from models.record import journal, queries
from models.record.store import FILE_NAME, Store
from models.record.verify import verify
from tests.record.a_job import a_job


def make(folder: Path, jobs: int) -> None:
    """Bring in so many jobs."""
    job = a_job()
    with Store.open(folder) as store:
        for number in range(jobs):
            one = msgspec.structs.replace(job, number=f"N{number}")
            with store.writing() as session:
                journal.bring_in(session, one, by="tom", act_id=f"brought {number}")


def timed(what: Callable[[], object]) -> float:
    begun = time.process_time()
    what()
    return (time.process_time() - begun) * 1000.0


def hashed(path: Path) -> str:
    """Read every row of every table and hash it: the least that anything can do with them."""
    raw = sqlite3.connect(path)
    digest = hashlib.sha256()
    names = raw.execute("SELECT name FROM sqlite_schema WHERE type = 'table'").fetchall()
    for (name,) in names:
        for row in raw.execute(f'SELECT * FROM "{name}"'):
            digest.update(repr(row).encode())
    raw.close()
    return digest.hexdigest()


def main() -> None:
    """Print a line for each size."""
    for jobs in [int(one) for one in sys.argv[1:]] or [20, 200]:
        with tempfile.TemporaryDirectory() as home:
            folder = Path(home)
            make(folder, jobs)
            path = folder / FILE_NAME
            plain = timed(lambda at=path: hashed(at))
            opened = timed(lambda at=folder: Store.open(at).close())
            with Store.open(folder) as store:
                with store.reading() as session:
                    shelf = timed(lambda s=session: queries.job_rows(s))
                    one = timed(lambda s=session: queries.read_job(s, "N7"))
                with store.reading() as session:
                    whole = timed(lambda s=session: verify(s))
            sys.stdout.write(
                f"{jobs:6} jobs, {path.stat().st_size / 1e6:7.1f} MB: open {opened:8.1f} ms, "
                f"shelf {shelf:7.1f}, one job {one:6.1f}, verify {whole:9.1f} = "
                f"{plain / whole:5.3f} of reading and hashing ({plain:.1f})\n"
            )
            sys.stdout.flush()


if __name__ == "__main__":
    main()
