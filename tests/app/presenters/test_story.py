import msgspec
import pytest

from app.presenters.story import StoryPresenter
from models.assess import assess
from models.job import Point, Signature
from reports.sheet.pictures import VerdictKind
from sample_data.load import compressor
from tests.app.open_shop import COMPRESSOR, PUMP


@pytest.fixture
def story(shop):
    presenter = StoryPresenter(shop.presenter)
    shop.open(COMPRESSOR)
    return presenter


def with_point(job, step, kind):
    plan = job.plan
    point = Point(kind=kind, role="witness", what="the survey")
    steps = tuple(
        msgspec.structs.replace(one, points=(*one.points, point)) if one.key == step else one
        for one in plan.steps
    )
    return msgspec.structs.replace(job, plans=(msgspec.structs.replace(plan, steps=steps),))


def shown(shop, job):
    shop.presenter._views[COMPRESSOR] = assess(job)
    shop.presenter.job_changed.emit()


def test_the_story_begins_with_the_bare_shaft_and_tells_every_attempt(story):
    titles = [one.title for one in story.chapters]

    assert titles[:4] == [
        "The bare shaft",
        "Step 1, Impeller, first stage",
        "Step 2, Spacer between stages 1 and 2",
        "Step 3, Impeller, second stage, attempt 1",
    ]
    assert len(titles) == 8


def test_a_remount_says_what_moved_what_was_done_and_what_was_found(story):
    chapter = story.chapters[3]

    assert (chapter.kind, chapter.outcome) == (VerdictKind.STOP, "came off again")
    assert chapter.sentences[0].startswith("E1 changed 0.0013 in (34.1 µm) TIR at 210°")
    assert "at the seat of Impeller, second stage (just mounted)" in chapter.sentences[1]
    assert "was taken off" in chapter.sentences[2]


def test_the_summary_counts_what_is_settled_and_what_came_off(story):
    assert story.summary == "6 of 15 steps are settled. One mount came off and went on again."


def test_a_chapter_is_drawn_before_and_after(story):
    picture = story.picture(story.chapters[3])

    assert [one.which.value for one in picture.curves] == ["before", "after"]
    assert picture.rotor.current_part.attempt == 1


def test_the_bare_shaft_is_drawn_with_every_part_to_come(story):
    picture = story.picture(story.chapters[0])

    assert [one.which.value for one in picture.curves] == ["after"]
    assert "on" not in {one.state.value for one in picture.rotor.parts}


def test_a_witness_point_that_holds_says_that_work_waits(story, shop):
    shown(shop, with_point(compressor(), "impeller-1", "hold"))
    (asked,) = story.chapters[1].asked

    assert asked.what == "hold point: the survey"
    assert asked.words == "waits for your name; work does not go past it before that"
    assert asked.kind is VerdictKind.LOOK


def test_a_witness_point_that_does_not_hold_says_so(story, shop):
    shown(shop, with_point(compressor(), "impeller-1", "witness"))

    assert story.chapters[1].asked[0].words.endswith("work may go on once you were invited")


def test_a_signed_point_says_when(story, shop):
    job = with_point(compressor(), "impeller-1", "hold")
    first = next(
        one for one in job.entries if isinstance(one, Signature) and one.place.step == "impeller-1"
    )
    signature = msgspec.structs.replace(
        first, id="w1", by="ES", role="witness", meaning="witnessed", covers="the survey"
    )
    shown(shop, msgspec.structs.replace(job, entries=(*job.entries, signature)))
    (asked,) = story.chapters[1].asked

    assert asked.kind is VerdictKind.WITHIN
    assert asked.words == f"signed {signature.done_at[:16].replace('T', ' ')}"


def test_another_job_is_another_story(story, shop):
    shop.presenter.choose_job(PUMP)
    shop.settle()

    assert story.heading == "Eight-stage pump rotor, EG-318 (invented)"


def test_a_job_without_any_survey_has_no_story_yet(story, shop):
    shown(shop, msgspec.structs.replace(compressor(), entries=(), verdicts=()))

    assert story.chapters == ()
    assert story.empty_words == "Nothing has been mounted yet; the plan is on its own desk."
