"""A disk that fails at any write: a sentence with a way out, and the act is whole or absent."""

import errno
import json
import os
import resource
import subprocess
import sys
from collections.abc import Callable, Iterator
from contextlib import contextmanager
from pathlib import Path
from typing import Any

import pytest

from models.job import Place, RunoutReading
from models.record import queries
from models.record.errors import DiskFaultError, DiskFullError
from models.record.store import Store
from models.record.verify import verify
from tests.journeys.test_random_rotors import SLICE, slice_of_this_commit
from tests.record.a_job import NUMBER, a_job, a_survey
from tests.record.survival.children import in_a_child
from tests.record.survival.shim import compiled
from tests.record.whole_record import one_act

ROOT = Path(__file__).resolve().parents[3]
_ONE_IN = 301


def failed(folder: Path, *, part: int, of: int) -> dict[str, Any]:
    """Run the program whose disk fails, with the shim under its writer."""
    library = compiled(folder)
    done = subprocess.run(
        [sys.executable, "-m", "tests.record.survival.faults", str(folder), str(part), str(of)],
        cwd=ROOT,
        env={**os.environ, "LD_PRELOAD": str(library)},
        capture_output=True,
        text=True,
        timeout=3000,
        check=False,
    )
    assert done.returncode == 0, done.stderr
    found: dict[str, Any] = json.loads(done.stdout)
    return found


def test_a_slice_of_all_writes_may_fail(tmp_path: Path) -> None:
    found = failed(tmp_path, part=slice_of_this_commit() // SLICE, of=_ONE_IN)

    assert found["faults"] == []
    # A shim that is not under the writer would count nothing.
    assert min(found["calls"].values()) > 20
    assert sum(found["said"].values()) > 0


@pytest.mark.whole
def test_any_write_may_fail(tmp_path: Path) -> None:
    found = failed(tmp_path, part=0, of=1)

    assert found["faults"] == []
    assert found["lives"] == 6 * sum(found["calls"].values())


def _acts_until_full(folder: Path, tell: Callable[[Any], None]) -> None:
    """Record until the disk is full; then say so, and record one more once there is room."""
    with Store.open(folder) as store:
        with one_act(store, "begin") as act:
            act.add_job(a_job())
            act.add_entry(a_survey("s", Place(kind="final"), 200))
        number = 0
        try:
            for number in range(100_000):
                with one_act(store, f"reading {number}") as act:
                    act.add_reading("s", RunoutReading(station=f"{number}", mark=0, typed="1"))
        except (DiskFullError, DiskFaultError) as trouble:
            tell(str(trouble))
        # Nothing but what was acknowledged is there, and it can still be read.
        with store.reading() as session:
            tell(len(queries.read_job(session, NUMBER).entries[0].stations) - number)
        tell("make room")
        with one_act(store, f"reading {number}") as act:
            act.add_reading("s", RunoutReading(station=f"{number}", mark=0, typed="1"))
        with store.reading() as session:
            tell(len(queries.read_job(session, NUMBER).entries[0].stations) - number)
            tell([trouble.words for trouble in verify(session).troubles])


@contextmanager
def small_file_system(folder: Path) -> Iterator[Path | None]:
    """Mount a disk of two megabytes; None where nobody may mount one."""
    folder.mkdir()
    mounted = subprocess.run(
        ["mount", "-t", "tmpfs", "-o", "size=2m", "tmpfs", str(folder)],
        capture_output=True,
        check=False,
    )
    if mounted.returncode != 0:
        yield None
        return
    try:
        yield folder
    finally:
        subprocess.run(["umount", str(folder)], check=True)


def test_a_full_disk_keeps_what_was_acknowledged_and_goes_on_once_there_is_room(
    tmp_path: Path,
) -> None:
    with small_file_system(tmp_path / "small disk") as small:
        if small is None:
            sys.stdout.write(
                "no file system could be mounted here; the size limit of a file stands for it"
            )
            return
        ballast = small / "other people's files"
        ballast.write_bytes(bytes(300_000))

        def tell_and_clear(tell: Callable[[Any], None]) -> None:
            def heard(what: Any) -> None:
                if what == "make room":
                    ballast.unlink()
                else:
                    tell(what)

            _acts_until_full(small, heard)

        sentence, kept, more, troubles = in_a_child(tell_and_clear).told
    assert "is full" in sentence
    assert "make room" in sentence
    assert (kept, more, troubles) == (0, 1, [])


@pytest.mark.parametrize("room", [0, 1, 4096, 20_000, 70_001])
def test_a_limit_on_the_size_of_a_file_stops_the_record_with_a_sentence(
    tmp_path: Path, room: int
) -> None:
    Store.open(tmp_path).close()
    (path,) = tmp_path.iterdir()
    limit = path.stat().st_size + 60_000 + room

    def limited(tell: Callable[[Any], None]) -> None:
        _, hard = resource.getrlimit(resource.RLIMIT_FSIZE)
        resource.setrlimit(resource.RLIMIT_FSIZE, (limit, hard))

        def heard(what: Any) -> None:
            if what == "make room":
                resource.setrlimit(resource.RLIMIT_FSIZE, (hard, hard))
            else:
                tell(what)

        _acts_until_full(tmp_path, heard)

    sentence, kept, more, troubles = in_a_child(limited).told
    assert "Nothing of this act was recorded" in sentence
    assert (kept, more, troubles) == (0, 1, [])


def test_the_numbers_of_the_system_have_sentences_too(tmp_path: Path) -> None:
    from models.record.errors import ReadOnlyError, RecordMovedError
    from models.record.trouble import sentence_for

    told = {
        number: type(sentence_for(OSError(number, "x"), tmp_path))
        for number in (errno.ENOSPC, errno.EROFS, errno.ENOENT, errno.EIO, errno.EBADF)
    }
    assert told == {
        errno.ENOSPC: DiskFullError,
        errno.EROFS: ReadOnlyError,
        errno.ENOENT: RecordMovedError,
        errno.EIO: DiskFaultError,
        errno.EBADF: type(None),
    }
