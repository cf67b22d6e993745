import sys
import threading

import pytest

from app.last_resort import LastResort


@pytest.fixture
def last_resort(qtbot, tmp_path):
    told = []
    made = LastResort(file=tmp_path / "logs" / "errors.log", tell=told.append)
    made.install()
    yield made, told, tmp_path / "logs" / "errors.log"
    made.remove()


def raise_it(words):
    try:
        raise ZeroDivisionError(words)
    except ZeroDivisionError:
        sys.excepthook(*sys.exc_info())


def test_an_error_nobody_expected_is_logged_with_its_trace_and_told_with_the_way_out(last_resort):
    _, told, log = last_resort
    raise_it("of nothing")

    assert "ZeroDivisionError: of nothing" in log.read_text(encoding="utf-8")
    assert len(told) == 1
    assert str(log) in told[0]


def test_a_fault_that_comes_back_is_told_once_and_logged_every_time(last_resort):
    _, told, log = last_resort
    for words in ("first", "second", "third"):
        raise_it(words)

    assert len(told) == 1
    assert log.read_text(encoding="utf-8").count("Traceback") == 3


def test_an_error_in_another_thread_is_told_in_the_windows(last_resort, qtbot):
    made, told, _ = last_resort
    threads = []
    made._tell = lambda words: threads.append(threading.get_ident())

    worker = threading.Thread(target=lambda: 1 / 0)
    worker.start()
    worker.join()
    qtbot.waitUntil(lambda: bool(threads))

    assert threads == [threading.get_ident()]
    assert told == []


def test_afterwards_everything_is_as_it_was(qtbot, tmp_path):
    before = sys.excepthook
    made = LastResort(file=tmp_path / "errors.log", tell=pytest.fail)
    made.install()
    assert sys.excepthook != before

    made.remove()
    assert sys.excepthook is before
