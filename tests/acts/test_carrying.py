"""A job with its chain in another shop's record: checkable in both, the same bytes out again."""

import json
import sqlite3
from contextlib import closing
from pathlib import Path

import msgspec
import pytest

from models import jobfile
from models.acts import Acts, new_id
from models.acts.carrying import look_at, with_chain
from models.job import Job, Note, Place
from models.record.carried import CarriedError
from models.record.errors import FromElsewhereError
from models.record.store import FILE_NAME, Store
from models.record.verify import verify
from tests.record.a_job import NUMBER, at
from tests.record.survival.cases import _job
from tests.record.whole_record import one_act

JOB = _job()


@pytest.fixture
def home(tmp_path: Path) -> Store:
    folder = tmp_path / "home"
    folder.mkdir()
    with Store.open(folder, station_name="stand 1") as store:
        Acts(store).bring_in(JOB, by="tom", act_id="brought")
        yield store


@pytest.fixture
def elsewhere(tmp_path: Path) -> Store:
    folder = tmp_path / "elsewhere"
    folder.mkdir()
    with Store.open(folder, station_name="desk") as store:
        yield store


def exported(store: Store) -> bytes:
    job, chain = with_chain(store, NUMBER)
    return jobfile.dumps(job, chain)


def taken(store: Store, data: bytes):
    return Acts(store).take_in(data, by="tom")


def note(store: Store) -> None:
    acts = Acts(store)
    entry = Note(
        id=new_id(), place=Place(kind="final"), by="tom", done_at=at(300), entered_at=at(300),
        plan=JOB.plan.revision, words="seen later",
    )  # fmt: skip
    acts.record(NUMBER, entry)


def changed(data: bytes, work) -> bytes:
    document = json.loads(data)
    work(document)
    return json.dumps(document, ensure_ascii=False).encode()


def test_a_job_reads_the_same_with_and_without_its_chain(home):
    job, chain = with_chain(home, NUMBER)
    assert jobfile.loads(jobfile.dumps(job, chain)) == job == jobfile.loads(jobfile.dumps(job))
    assert jobfile.chain_of(jobfile.dumps(job)) == ()
    assert len(chain) == job.head.sequence


def test_taken_in_elsewhere_it_verifies_and_gives_the_same_bytes(home, elsewhere):
    data = exported(home)
    laid = taken(elsewhere, data)
    with elsewhere.reading() as session:
        found = verify(session)
    assert found.troubles == ()
    assert found.heads[NUMBER] == laid.head
    assert exported(elsewhere) == data


def test_taken_in_twice_it_does_nothing(home, elsewhere):
    data = exported(home)
    taken(elsewhere, data)
    with elsewhere.reading() as session:
        before = verify(session).acts
    assert taken(elsewhere, data).new_acts == 0
    with elsewhere.reading() as session:
        assert verify(session).acts == before


def test_a_later_file_of_the_same_job_brings_its_later_acts(home, elsewhere):
    first = exported(home)
    taken(elsewhere, first)
    note(home)
    later = exported(home)
    assert taken(elsewhere, later).new_acts == 1
    assert exported(elsewhere) == later
    # The earlier file again is all there already.
    assert taken(elsewhere, first).new_acts == 0


def test_what_came_from_elsewhere_goes_on_where_it_began(home, elsewhere):
    taken(elsewhere, exported(home))
    with pytest.raises(FromElsewhereError, match="where it began"):
        note(elsewhere)


def test_its_own_record_takes_its_own_file_as_known(home):
    assert taken(home, exported(home)).new_acts == 0
    note(home)


def test_two_records_that_went_on_apart_are_told(home, elsewhere, tmp_path):
    copy = tmp_path / "copy"
    copy.mkdir()
    with closing(sqlite3.connect(home.path)) as raw:
        raw.execute("VACUUM INTO ?", (str(copy / FILE_NAME),))
    note(home)
    with Store.open(copy) as other:
        note(other)
        note(other)
        taken(elsewhere, exported(other))
    with pytest.raises(CarriedError, match="tells another story than the record"):
        taken(elsewhere, exported(home))


def test_another_job_of_the_same_number_is_refused(home, elsewhere):
    Acts(elsewhere).bring_in(JOB, by="tom", act_id="other")
    with pytest.raises(CarriedError, match="with a chain of its own"):
        taken(elsewhere, exported(home))


def test_a_file_without_a_chain_is_told(home, elsewhere):
    job, _ = with_chain(home, NUMBER)
    with pytest.raises(CarriedError, match="carries no chain"):
        taken(elsewhere, jobfile.dumps(job))


def _reading(document) -> None:
    for link in document["chain"]:
        for name, cells in link["rows"]:
            if name == "runout_reading" and cells["typed"] != "0":
                cells["typed"] = "0"
                return


def _entry(document) -> None:
    next(one for one in document["entries"] if one["entry"] == "note")["words"] = "nothing seen"


def _table(document) -> None:
    document["chain"][-1]["rows"][0][0] = "of_tomorrow"


@pytest.mark.parametrize(
    ("work", "said"),
    [
        (_reading, "does not hold at act"),
        (lambda document: document["chain"].pop(3), "does not hold at act 5"),
        (lambda document: document["chain"][5]["act"].update(by_person="iris"), "at act 6"),
        (lambda document: document["chain"][2]["rows"].pop(), "does not hold at act 3"),
        (_entry, "otherwise than the rows of its chain"),
        (_table, "does not hold at act"),
    ],
    ids=["a reading", "an act gone", "another person", "a row gone", "an entry", "a table"],
)
def test_a_file_changed_anywhere_is_refused_and_leaves_nothing(home, elsewhere, work, said):
    data = changed(exported(home), work)
    with pytest.raises(CarriedError, match=said):
        taken(elsewhere, data)
    with elsewhere.reading() as session:
        assert verify(session).acts == 0


def test_a_chain_cut_at_its_end_is_told_by_the_job_beside_it(home):
    data = changed(exported(home), lambda document: document["chain"].pop())
    with pytest.raises(CarriedError, match="otherwise than the rows"):
        look_at(data)


def test_signatures_are_checked_in_the_file_alone(home):
    looked = look_at(exported(home))
    assert looked.troubles == ()
    assert looked.job == with_chain(home, NUMBER)[0]


def test_people_and_verdicts_come_along(home, elsewhere):
    with one_act(home, "one more") as act:
        act.add_people([msgspec.structs.replace(JOB.people[0], employer="Elsewhere")])
    taken(elsewhere, exported(home))
    there: Job = Acts(elsewhere).read(NUMBER)
    assert there.verdicts == JOB.verdicts
    assert there.people[0].employer == "Elsewhere"
