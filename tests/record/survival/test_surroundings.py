"""What may befall the file and its folder from outside: a sentence and a way out each time."""

import shutil
import sqlite3
from collections.abc import Callable
from datetime import datetime, timedelta, timezone
from pathlib import Path

import pytest

from models.job import RunoutReading
from models.record.errors import RecordError, RecordMovedError
from models.record.store import FILE_NAME, Store
from models.record.verify import verify
from tests.journeys.test_random_rotors import slice_of_this_commit
from tests.record.survival.killed import State, state_of
from tests.record.whole_record import fill, one_act

BLOCK = 512
_ONE_IN = 24


@pytest.fixture(scope="module")
def filled(tmp_path_factory: pytest.TempPathFactory) -> Path:
    folder = tmp_path_factory.mktemp("filled")
    with Store.open(folder) as store:
        fill(store)
    return folder


def one_reading(store: Store, act_id: str) -> None:
    with one_act(store, act_id) as act:
        act.add_reading("open", RunoutReading(station="middle", mark=2, typed="5"))


def away(folder: Path) -> None:
    folder.rename(folder.with_name("away"))


def back(folder: Path) -> None:
    folder.with_name("away").rename(folder)


def file_away(folder: Path) -> None:
    (folder / FILE_NAME).rename(folder / "other name")


def file_back(folder: Path) -> None:
    (folder / "other name").rename(folder / FILE_NAME)


@pytest.mark.parametrize(("takes", "brings"), [(away, back), (file_away, file_back)])
def test_a_record_taken_away_while_it_is_open_says_so_and_goes_on_when_it_is_back(
    filled: Path, tmp_path: Path, takes: Callable[[Path], None], brings: Callable[[Path], None]
) -> None:
    folder = tmp_path / "shop"
    shutil.copytree(filled, folder)
    with Store.open(folder) as store:
        with store.writing():
            pass
        takes(folder)
        for _ in range(2):
            with pytest.raises(RecordMovedError, match=r"moved or removed.*put it back"):
                one_reading(store, "while away")
        brings(folder)
        one_reading(store, "while away")
        with store.reading() as session:
            assert verify(session).is_whole
    assert state_of(folder)["act"][0] == state_of(filled)["act"][0] + 1


def test_a_clock_that_steps_back_is_flagged_and_order_in_time_stays(
    filled: Path, tmp_path: Path
) -> None:
    shutil.copytree(filled, tmp_path, dirs_exist_ok=True)
    present = datetime(2040, 5, 6, 12, tzinfo=timezone(timedelta(hours=2)))
    hours = iter((0, -30, 1))

    def clock() -> datetime:
        return present + timedelta(hours=next(hours))

    with Store.open(tmp_path, clock=clock) as store:
        for number in range(3):
            with one_act(store, f"at some time {number}") as act:
                act.add_reading("open", RunoutReading(station=f"{number}", mark=1, typed="5"))
        with store.reading() as session:
            assert verify(session).is_whole
            rows = session.connection().exec_driver_sql(
                "SELECT entered_at_utc, clock_stepped_back FROM act"
                " WHERE act_id LIKE 'at some time%' ORDER BY sequence"
            )
            assert rows.all() == [
                ("2040-05-06T10:00:00.000000Z", 0),
                ("2040-05-06T10:00:00.000000Z", 1),
                ("2040-05-06T11:00:00.000000Z", 0),
            ]


def cut(path: Path, block: int) -> None:
    with path.open("r+b") as file:
        file.truncate(block * BLOCK)


def zeroed(path: Path, block: int) -> None:
    overwritten(path, block, bytes(BLOCK))


def scrambled(path: Path, block: int) -> None:
    overwritten(path, block, bytes((17 * place + 91) % 256 for place in range(BLOCK)))


def overwritten(path: Path, block: int, text: bytes) -> None:
    with path.open("r+b") as file:
        file.seek(block * BLOCK)
        file.write(text)


def what_is_wrong(folder: Path, before: State) -> str:
    """Open a torn file: it is refused with a sentence, or named by `verify`, or nothing is lost."""
    try:
        with Store.open(folder) as store, store.reading() as session:
            if not verify(session).is_whole:
                return ""
    except RecordError as trouble:
        words = str(trouble)
        ways_out = ("backup", "Move it away", "newer program")
        return "" if any(way in words for way in ways_out) else f"no way out: {words}"
    except Exception as error:
        return f"a defect: {error!r}"
    return "" if state_of(folder) == before else "a change went unseen"


def torn(filled: Path, folder: Path, blocks: list[int]) -> list[str]:
    before = state_of(filled)
    whole = (filled / FILE_NAME).read_bytes()
    path = folder / FILE_NAME
    found = []
    for block in blocks:
        for tear in (cut, zeroed, scrambled):
            path.write_bytes(whole)
            tear(path, block)
            said = what_is_wrong(folder, before)
            if said:
                found.append(f"{tear.__name__} at block {block}: {said}")
            for left in folder.iterdir():
                left.unlink()
    return found


def test_a_file_torn_at_some_of_its_blocks_is_never_taken_for_whole(
    filled: Path, tmp_path: Path
) -> None:
    size = (filled / FILE_NAME).stat().st_size // BLOCK
    part = slice_of_this_commit() // 24 % _ONE_IN
    blocks = [0, 1, *range(part, size, _ONE_IN)]

    assert torn(filled, tmp_path, blocks) == []


@pytest.mark.whole
def test_a_file_torn_at_any_block_is_never_taken_for_whole(filled: Path, tmp_path: Path) -> None:
    size = (filled / FILE_NAME).stat().st_size // BLOCK

    assert torn(filled, tmp_path, list(range(size))) == []


def test_a_lock_held_for_a_while_is_waited_for(filled: Path, tmp_path: Path) -> None:
    import threading

    shutil.copytree(filled, tmp_path, dirs_exist_ok=True)
    raw = sqlite3.connect(tmp_path / FILE_NAME, isolation_level=None, check_same_thread=False)
    raw.execute("BEGIN IMMEDIATE")
    freed = threading.Timer(0.3, lambda: raw.execute("ROLLBACK"))
    with Store.open(tmp_path) as store:
        freed.start()
        one_reading(store, "after the other")
        with store.reading() as session:
            assert verify(session).is_whole
    freed.join()
    raw.close()
