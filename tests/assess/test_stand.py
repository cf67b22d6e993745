import math

import msgspec
import pytest

import sample_data
from models.assess import assess, live_entries
from models.assess.stand import untouched_pairs
from models.job import Handling, RunoutSurvey
from tests.assess.invented import mm
from tests.sample_data.independent import in_journal_axis, vectors

JOB = sample_data.compressor()
ENTRIES = live_entries(JOB)
BEFORE = next(one for one in ENTRIES if isinstance(one, RunoutSurvey) and one.purpose == "before")
NIGHT = next(one for one in ENTRIES if isinstance(one, Handling))


def changed(entry, **fields):
    """Give the entries with one of them changed."""
    return tuple(msgspec.structs.replace(one, **fields) if one is entry else one for one in ENTRIES)


def test_a_night_on_the_blocks_leaves_a_pair():
    ((earlier, later),) = untouched_pairs(ENTRIES)

    assert later is BEFORE
    assert earlier.purpose == "after"
    assert earlier.place.step == "impeller-3"


@pytest.mark.parametrize("what", ["lift", "lay-down", "turn-over", "trial fit", "planned removal"])
def test_a_rotor_that_was_handled_gives_no_pair(what):
    assert untouched_pairs(changed(NIGHT, what=what)) == ()


def test_another_set_up_or_an_open_survey_gives_no_pair():
    other = msgspec.structs.replace(BEFORE.set_up, supports="rollers")

    assert untouched_pairs(changed(BEFORE, set_up=other)) == ()
    assert untouched_pairs(changed(BEFORE, closed_at=None)) == ()


def test_a_survey_after_a_mount_is_no_pair_with_the_one_before_it():
    after = changed(BEFORE, purpose="after")

    assert untouched_pairs(after) == ()


def test_the_stand_repeats_what_an_independent_reduction_finds():
    ((earlier, later),) = untouched_pairs(ENTRIES)
    old, new = (in_journal_axis(JOB.plan, vectors(one)) for one in (earlier, later))
    inner = [key for key in new if key in old and key not in ("J1", "J2")]
    squares = sum(abs(new[key] - old[key]) ** 2 for key in inner)

    found = assess(JOB).stand

    assert found.found.pairs == len(inner)
    # u = √(Σ|d|²/4n); a change as a total, k = 2, is 2·2·√2 of it.
    assert found.found.vector_uncertainty == pytest.approx(
        math.sqrt(squares / (4 * len(inner))), rel=1e-3
    )
    assert found.found.visible_change_tir == pytest.approx(
        4 * math.sqrt(2) * math.sqrt(squares / (4 * len(inner))), rel=1e-3
    )
    assert not found.is_too_coarse
    assert "finer than the plan's finest limit of 0.0010 in" in found.sentence


def test_a_limit_finer_than_the_stand_sees_is_told_to_the_planner():
    tight = msgspec.structs.replace(JOB.plan.drift_limit, value=mm(0.001))
    plan = msgspec.structs.replace(JOB.plan, drift_limit=tight)

    found = assess(msgspec.structs.replace(JOB, plans=(*JOB.plans[:-1], plan))).stand

    assert found.finest_limit == pytest.approx(1e-6)
    assert found.is_too_coarse
    assert found.sentence.endswith("tell the planner.")


def test_a_job_without_an_untouched_pair_tells_nothing_of_its_stand():
    assert assess(sample_data.pump()).stand is None
