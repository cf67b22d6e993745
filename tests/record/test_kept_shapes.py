"""A small record of each released form, kept as its own program wrote it, and opened by today's.

`shapes/form_1` was written by the last program of form 1 (commit bd99063) from `whole_record.fill`:
every recorded table has rows in it. Beside it lies the job file that the same program wrote of it.
"""

import gzip
import sqlite3
from pathlib import Path

import pytest

from models.job import RunoutReading
from models.jobfile import portable
from models.record import queries
from models.record.errors import NewerRecordError
from models.record.migrations import FORM
from models.record.schema import differences
from models.record.store import FILE_NAME, Store
from models.record.verify import verify
from tests.record.a_job import NUMBER
from tests.record.whole_record import one_act

SHAPES = Path(__file__).parent / "shapes"
RELEASED = sorted(path.name.split(".")[0] for path in SHAPES.glob("form_*.thirdjournal.gz"))


@pytest.fixture(params=RELEASED)
def form(request: pytest.FixtureRequest) -> str:
    return str(request.param)


@pytest.fixture
def kept(form: str, tmp_path: Path) -> Path:
    path = tmp_path / FILE_NAME
    path.write_bytes(gzip.decompress((SHAPES / f"{form}.thirdjournal.gz").read_bytes()))
    path.chmod(0o600)
    return path


def rows_of(path: Path) -> dict[str, list[tuple[object, ...]]]:
    raw = sqlite3.connect(path)
    names = [
        name
        for (name,) in raw.execute("SELECT name FROM sqlite_schema WHERE type = 'table'")
        if not name.startswith("sqlite_") and name != "alembic_version"
    ]
    rows = {
        name: sorted(raw.execute(f'SELECT * FROM "{name}"').fetchall(), key=repr) for name in names
    }
    raw.close()
    return rows


def test_every_form_before_todays_is_kept() -> None:
    assert [int(name.removeprefix("form_")) for name in RELEASED] == list(range(1, FORM))


def test_a_kept_record_has_rows_in_every_table_of_its_form(kept: Path) -> None:
    assert [name for name, rows in rows_of(kept).items() if not rows] == []


def test_it_is_brought_up_whole_with_a_copy_made_first(kept: Path, form: str) -> None:
    number = form.removeprefix("form_")
    before, as_it_was = rows_of(kept), kept.read_bytes()
    with Store.open(kept.parent) as store, store.reading() as session:
        assert verify(session).troubles == ()
        assert differences(session.connection()) == ()
    (copy,) = kept.parent.glob(f"shop of form {number}*")
    assert rows_of(copy) == before
    assert copy.read_bytes()[:16] == as_it_was[:16]
    after = rows_of(kept)
    # A new column stays NULL in the rows of then.
    for name, rows in before.items():
        width = len(rows[0])
        assert [row[:width] for row in after[name]] == rows, name
        assert {cell for row in after[name] for cell in row[width:]} <= {None}, name


def test_every_entry_reads_back_as_the_program_of_then_wrote_it_out(kept: Path, form: str) -> None:
    # A job file leaves defaults out, so a word that came later does not show.
    told = gzip.decompress((SHAPES / f"{form}.json.gz").read_bytes())
    with Store.open(kept.parent) as store, store.reading() as session:
        assert portable.dumps(queries.read_job(session, NUMBER)) == told


def test_work_goes_on_in_it(kept: Path) -> None:
    with Store.open(kept.parent) as store:
        with one_act(store, "one more today") as act:
            act.add_reading("open", RunoutReading(station="middle", mark=1, typed="3"))
        with store.reading() as session:
            assert verify(session).is_whole


def test_going_back_is_refused_with_both_numbers(kept: Path, form: str) -> None:
    Store.open(kept.parent).close()
    raw = sqlite3.connect(kept)
    raw.execute(f"PRAGMA user_version = {FORM + 1}")
    raw.close()
    with pytest.raises(NewerRecordError, match=f"form {FORM + 1}.*up to {FORM}"):
        Store.open(kept.parent)
