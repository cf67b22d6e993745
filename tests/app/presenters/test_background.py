import threading

import pytest

from app.presenters.background import Background


@pytest.fixture
def background():
    made = Background()
    yield made
    made.close()


def test_work_runs_beside_the_window_and_its_result_comes_back_into_it(background, qtbot):
    threads = []
    background.run(
        threading.get_ident,
        words="asking where it runs",
        done=lambda ident: threads.extend([ident, threading.get_ident()]),
        failed=pytest.fail,
    )
    qtbot.waitUntil(lambda: background.is_idle)

    worked_in, told_in = threads
    assert worked_in != told_in
    assert told_in == threading.get_ident()


def test_it_says_what_it_works_on_and_when_it_has_ended(background, qtbot):
    said = []
    background.working.connect(said.append)
    for words in ("one", "two"):
        background.run(lambda: None, words=words, done=lambda _: None, failed=pytest.fail)
    qtbot.waitUntil(lambda: background.is_idle)

    assert said == ["one", "two", ""]


def test_an_error_goes_to_whoever_asked(background, qtbot):
    errors = []

    def work():
        raise OSError("no such disk")

    background.run(work, words="failing", done=lambda _: pytest.fail("done"), failed=errors.append)
    qtbot.waitUntil(lambda: background.is_idle)

    assert [str(error) for error in errors] == ["no such disk"]
