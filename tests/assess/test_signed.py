"""A signature stands for what was there when it was given."""

import msgspec
import pytest

from models.assess import assess
from models.assess.signed import given_for_now
from models.job import Correction, Mount, Note, RunoutSurvey, Signature
from sample_data.load import compressor

JOB = compressor()
STEP = JOB.plan.steps[4].key
MINE = [one for one in JOB.entries if (one.place.step, one.place.attempt) == (STEP, 1)]
SIGNED = [one for one in MINE if isinstance(one, Signature)]
LATER = "2027-01-01T08:00:00-05:00"


def judged(*more, change=None):
    entries = [change(one) if change else one for one in JOB.entries]
    job = msgspec.structs.replace(JOB, entries=(*entries, *more))
    return assess(job)


def test_signatures_stand_while_nothing_follows_them():
    stand, earlier = given_for_now(MINE)
    assert [one.id for one in stand] == [one.id for one in SIGNED]
    assert len(stand) >= 2
    assert earlier == ()


def test_a_note_or_a_second_signature_touches_nothing():
    note = next(one for one in JOB.entries if isinstance(one, Note))
    note = msgspec.structs.replace(note, id="later", place=MINE[0].place, entered_at=LATER)
    assert given_for_now([*MINE, note, SIGNED[-1]])[1] == ()


def test_an_entry_corrected_later_opens_the_point_again():
    mount = next(one for one in MINE if isinstance(one, Mount))
    amended = msgspec.structs.replace(
        mount, id="amended", supersedes=mount.id, reason="clock position misread"
    )
    before = judged().attempt(STEP, 1)
    after = judged(amended).attempt(STEP, 1)
    assert before.verdict_of("points-signed").value == "within"
    assert after.signatures == ()
    assert [one.id for one in after.signatures_before] == [one.id for one in SIGNED]
    progress = next(one for one in judged(amended).progress.attempts if one.step == STEP)
    assert not progress.performed


@pytest.mark.parametrize(
    ("at", "stands"),
    [("2027-01-01T08:00:00-05:00", False), ("2026-01-01T08:00:00-05:00", True)],
    ids=["corrected after", "corrected before"],
)
def test_a_reading_corrected_after_the_signature_opens_it_again(at, stands):
    def change(entry):
        if entry.place != MINE[0].place or not isinstance(entry, RunoutSurvey):
            return entry
        made = Correction(
            where=("K5", "0"), was="0.0009", now="0.0001", reason="misread", by="AT", at=at
        )
        return msgspec.structs.replace(entry, corrections=(made,))

    attempt = judged(change=change).attempt(STEP, 1)
    assert bool(attempt.signatures) is stands
    assert bool(attempt.signatures_before) is not stands
