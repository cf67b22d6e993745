"""The bench from the record alone: the next step of the unfinished job, through a remount."""

import math
from collections.abc import Iterator
from pathlib import Path

import pytest
from pytestqt.qtbot import QtBot

from app.presenters.bench.bench import BenchPresenter
from app.presenters.bench.state import FormTask, ReadingTask
from app.presenters.writing import Writer
from models.acts import Acts
from models.record.errors import RecordError
from models.record.store import Store
from models.rules.progress import Act, Stage
from models.rules.rule import Verdict
from sample_data.load import compressor
from sample_data.next_steps import next_attempts
from tests.app.presenters.ahead import Hand

FIRST, SECOND = next_attempts()


@pytest.fixture
def hand(tmp_path: Path, qtbot: QtBot) -> Iterator[Hand]:
    job = compressor()
    with Store.open(tmp_path) as store:
        acts = Acts(store)
        acts.bring_in(job, by="AT", act_id="demo")
        writer = Writer(surroundings=(RecordError,))
        one = Hand(qtbot, BenchPresenter(acts, writer, job.number, "AT"), writer)
        one.settle_down()
        yield one
        writer.close()


def test_the_next_step_goes_through_a_remount_to_within_limits(hand: Hand) -> None:
    hand.until_read(FIRST)

    assert hand.act is Act.REMOVE
    verdict = hand.presenter.state.verdict
    assert verdict.verdict is Verdict.OUTSIDE
    assert verdict.phrase == "Remount required"
    assert verdict.is_final
    assert any(name == "the bend sits" for name, _ in verdict.facts)

    hand.take_off(FIRST)
    assert hand.act is Act.OPEN_ATTEMPT
    hand.until_read(SECOND)

    assert hand.act is Act.SETTLE
    assert hand.presenter.state.verdict.verdict is Verdict.WITHIN
    hand.press("settle")
    hand.press("sign")

    assert hand.refusals == []
    view = hand.presenter.view
    assert view is not None
    found = view.attempt(SECOND.step, 2)
    assert found is not None
    for change in found.changes:
        truth = SECOND.true_changes[change.key]
        if change.change is not None and not change.is_journal:
            assert change.expanded_uncertainty is not None
            away = 2.0 * abs(change.change - truth)
            # Rounding of the readings is not in the stated uncertainty where few marks help.
            assert away <= change.expanded_uncertainty, change


def test_typing_shows_what_the_value_would_say_before_it_is_taken(hand: Hand) -> None:
    hand.press("begin")
    hand.fill({"instrument": "OM-06", "part": "72", "gauge": "72"})

    hand.presenter.typed("5.96")

    task = hand.presenter.state.task
    assert isinstance(task, ReadingTask)
    assert task.unit == "in"
    assert hand.presenter.other_unit_text("5.96") == "151.384 mm"
    assert hand.presenter.state.title.stage is Stage.SIZES


def test_a_size_in_the_wrong_unit_is_questioned_and_the_next_mark_is_active_at_once(
    hand: Hand,
) -> None:
    hand.press("begin")
    hand.fill({"instrument": "OM-06", "part": "72", "gauge": "72"})

    hand.presenter.take("151.384")

    task = hand.presenter.state.task
    assert isinstance(task, ReadingTask)
    assert task.question is not None
    assert task.question.proposed == "5.960"
    assert task.rungs[0].questioned
    assert task.rungs[1].active

    hand.presenter.answer_proposed()
    hand.settle_down()
    task = hand.presenter.state.task
    assert isinstance(task, ReadingTask)
    assert task.question is None
    assert task.rungs[0].struck == ("151.384",)
    assert task.rungs[0].value == "5.960"


def test_the_last_reading_is_struck_and_stays_when_another_is_taken(hand: Hand) -> None:
    hand.press("begin")
    hand.fill({"instrument": "OM-06", "part": "72", "gauge": "72"})
    hand.presenter.take("5.9600")
    hand.presenter.take("5.9500")

    hand.presenter.ask_for_last()
    task = hand.presenter.state.task
    assert isinstance(task, ReadingTask)
    assert task.correcting == "5.9500"
    assert task.reasons == ()
    hand.presenter.take("5.9599")
    hand.settle_down()
    hand.presenter.reload()

    task = hand.task(ReadingTask)
    assert task.rungs[1].struck == ("5.9500",)
    assert task.rungs[1].value == "5.9599"


@pytest.mark.parametrize("text", ["", "twelve", "nan", "1,5", "5.96 kg", "--3", "1e400"])
def test_what_is_no_length_is_refused_in_a_sentence_and_nothing_moves(
    hand: Hand, text: str
) -> None:
    hand.press("begin")
    hand.fill({"instrument": "OM-06", "part": "72", "gauge": "72"})

    hand.presenter.take(text)

    assert len(hand.refusals) == 1
    task = hand.task(ReadingTask)
    assert all(rung.value == "" for rung in task.rungs)


def test_a_form_names_the_field_that_cannot_be_read(hand: Hand) -> None:
    hand.press("begin")

    hand.presenter.fill({"instrument": "OM-06", "part": "warm", "gauge": "72"})
    hand.presenter.fill({"instrument": "OM-06", "part": "", "gauge": "72"})
    hand.settle_down()

    assert "warm" in hand.refusals[0]
    assert hand.refusals[1] == "Temperature of the shaft is still empty."
    assert isinstance(hand.presenter.state.task, FormTask)


def test_a_note_can_be_kept_at_any_time(hand: Hand) -> None:
    hand.presenter.press("note")
    hand.fill({"words": "crane out of order until ten"})

    view = hand.presenter.view
    assert view is not None
    assert view.job.entries[-1].title == "Note"
    assert hand.act is Act.OPEN_ATTEMPT


def test_the_true_changes_of_the_first_attempt_are_over_the_limit() -> None:
    greatest = max(2.0 * abs(change) for change in FIRST.true_changes.values())

    assert greatest > 25.4e-6
    assert math.isfinite(FIRST.true_kink_position)


def test_a_job_that_is_not_there_is_said_once(tmp_path: Path, qtbot: QtBot) -> None:
    with Store.open(tmp_path) as store:
        writer = Writer(surroundings=(RecordError,))
        acts = Acts(store)
        acts.bring_in(compressor(), by="AT", act_id="demo")
        said: list[str] = []
        presenter = BenchPresenter(acts, writer, "no such job", "AT")
        presenter.refused.connect(said.append)
        qtbot.waitUntil(lambda: writer.is_idle or writer.is_halted, timeout=20_000)
        writer.close()

    assert len(said) <= 1
    assert presenter.view is None
