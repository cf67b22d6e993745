import pytest

from app.presenters.jobs import JobsPresenter
from models import jobfile
from reports.sheet.pictures import PartState
from sample_data.load import pump
from tests.app.open_shop import COMPRESSOR, PUMP


@pytest.fixture
def jobs(shop):
    presenter = JobsPresenter(shop.presenter)
    shop.open(COMPRESSOR)
    return presenter


def numbers(presenter):
    return [row.number for row in presenter.rows]


def test_before_the_shelf_is_read_it_says_so_in_words(shop):
    assert JobsPresenter(shop.presenter).empty_words == "working: reading the shelf"


def test_an_empty_shelf_says_what_to_do_first(empty_shop):
    presenter = JobsPresenter(empty_shop.presenter)
    empty_shop.open()

    assert presenter.rows == ()
    assert presenter.empty_words == "No job yet. Open a job file."


def test_only_open_jobs_are_shown_until_another_filter_is_chosen(jobs):
    assert numbers(jobs) == [COMPRESSOR]

    jobs.set_filter("Settled")
    assert numbers(jobs) == [PUMP]


def test_open_jobs_come_first_though_another_was_opened_later(jobs):
    jobs.set_filter("All")

    assert numbers(jobs) == [COMPRESSOR, PUMP]


def test_a_filter_nobody_knows_shows_open_jobs(jobs):
    jobs.set_filter("lost")

    assert jobs.filter == "Open"


@pytest.mark.parametrize("words", ["hr-4471", "K-207B", "saltmarsh", "spacer 4471", "SALT stage"])
def test_a_job_is_found_by_any_word_of_serial_tag_customer_or_part(jobs, words):
    jobs.set_filter("All")
    jobs.search(words)

    assert numbers(jobs) == [COMPRESSOR]


def test_every_word_must_be_found(jobs):
    jobs.search("saltmarsh pump")

    assert jobs.rows == ()
    assert jobs.empty_words == "No open job holds “saltmarsh pump”. Search for less."


def test_a_row_says_how_far_it_is_and_what_it_waits_for(jobs):
    (row,) = jobs.rows

    assert (row.tag, row.serial) == ("K-207B", "HR-4471")
    assert row.built == "6 of 15 steps settled"
    assert row.waits == (
        "Waits for attempt 1 at step 7, Impeller, fourth stage, from a technician."
    )


def test_a_row_draws_what_is_on_what_is_in_hand_and_what_is_to_come(jobs):
    (row,) = jobs.rows
    states = [part.state for part in row.picture.parts]

    assert states.count(PartState.ON) == 6
    assert row.picture.current_part.name == "Impeller, fourth stage"
    assert states.count(PartState.TO_COME) >= 8


def test_opening_the_job_on_the_desks_asks_nothing(jobs, qtbot):
    with qtbot.waitSignal(jobs.opened) as opened:
        jobs.ask_to_open(COMPRESSOR)

    assert opened.args == [COMPRESSOR]


def test_changing_the_rotor_asks_for_the_serials_last_figures(jobs, shop, qtbot):
    with qtbot.waitSignal(jobs.figures_wanted), qtbot.assertNotEmitted(jobs.opened):
        jobs.ask_to_open(PUMP)

    assert shop.presenter.job_number == COMPRESSOR


def test_figures_of_another_rotor_are_refused_with_a_sentence(jobs, shop, qtbot):
    jobs.ask_to_open(PUMP)
    with qtbot.waitSignal(jobs.figures_refused) as refused:
        jobs.give_figures("471")

    assert refused.args[0].startswith("“471” is not how the serial of job EG-2026-61 ends.")
    assert shop.presenter.job_number == COMPRESSOR


@pytest.mark.parametrize("typed", ["318", " 318 ", "3-18"])
def test_the_right_figures_change_the_rotor(jobs, shop, typed):
    jobs.ask_to_open(PUMP)
    jobs.give_figures(typed)

    assert shop.presenter.job_number == PUMP


def test_figures_given_unasked_change_nothing(jobs, shop):
    jobs.give_figures("318")

    assert shop.presenter.job_number == COMPRESSOR


def test_a_bad_job_file_is_said_in_its_own_sentence_and_nothing_is_kept(empty_shop, tmp_path):
    presenter = JobsPresenter(empty_shop.presenter)
    path = tmp_path / "bad.job.json"
    path.write_text('{"form": "something else", "edition": 1}', encoding="utf-8")
    presenter.file_read.connect(lambda _job: pytest.fail("taken"))
    presenter.read_file(path)
    empty_shop.settle()

    (said,) = empty_shop.said
    assert said.what == "bad.job.json is not taken."
    assert said.way_out.startswith(
        "form is “something else”; expected is “thirdjournal job”. Nothing of it was kept"
    )
    assert empty_shop.acts.jobs() == ()


def test_a_file_that_is_not_there_is_said(empty_shop, tmp_path):
    JobsPresenter(empty_shop.presenter).read_file(tmp_path / "missing.job.json")
    empty_shop.settle()

    assert [said.what for said in empty_shop.said] == ["missing.job.json cannot be read."]


def test_a_job_file_that_is_brought_in_lies_in_the_record(empty_shop, tmp_path):
    presenter = JobsPresenter(empty_shop.presenter)
    empty_shop.open()
    path = tmp_path / "pump.job.json"
    jobfile.write(pump(), path)
    read = []
    presenter.file_read.connect(read.append)
    presenter.read_file(path)
    empty_shop.settle()
    presenter.bring_in(read[0], by=read[0].people[0].key)
    empty_shop.settle()
    presenter.set_filter("Settled")

    assert numbers(presenter) == [PUMP]
    assert [row.number for row in empty_shop.acts.jobs()] == [PUMP]


def test_a_job_that_is_there_already_is_refused_in_words(shop, jobs):
    jobs.bring_in(pump(), by=pump().people[0].key)
    shop.settle()

    assert [said.what for said in shop.said] == [
        "The record already holds a job EG-2026-61. Open that one."
    ]
    assert not shop.writer.is_halted


def test_who_is_signed_in_brings_in_only_what_they_belong_to(shop, jobs):
    job = pump()
    shop.presenter.sign_in(job.people[1].key)
    assert jobs.bringer(job) == job.people[1]

    shop.presenter.sign_in("somebody else")
    assert jobs.bringer(job) is None


def test_the_job_file_that_is_written_reads_back_as_the_job(jobs, shop, tmp_path):
    path = tmp_path / "out.job.json"
    jobs.write_job_file(PUMP, path)
    shop.settle()

    assert jobfile.read(path).entries == shop.acts.read(PUMP).entries
    assert shop.said[-1].what == f"The job file of {PUMP} is written to {path}."


def test_a_folder_that_is_not_there_is_said(jobs, shop, tmp_path):
    jobs.write_job_file(PUMP, tmp_path / "nowhere" / "out.job.json")
    shop.settle()

    assert shop.said[-1].what == f"Stopped while writing the job file of {PUMP}."


def test_a_traveler_is_written_beside_the_window_and_said(jobs, shop, tmp_path):
    worked_on = []
    shop.background.working.connect(worked_on.append)
    path = tmp_path / "traveler.pdf"
    jobs.write_traveler(PUMP, path)
    shop.settle()

    assert worked_on == [f"writing the traveler of {PUMP}", ""]
    assert path.read_bytes().startswith(b"%PDF-")
    assert shop.said[-1].what == f"The traveler of {PUMP} is written to {path}."


def test_a_traveler_that_cannot_be_written_is_said(jobs, shop, tmp_path):
    jobs.write_traveler(PUMP, tmp_path / "nowhere" / "traveler.pdf")
    shop.settle()

    assert shop.said[-1].what == f"Stopped while writing the traveler of {PUMP}."
