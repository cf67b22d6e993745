"""What the program makes of the invented jobs, held against the truth behind them."""

import math

import pytest

import sample_data
from models.assess import assess
from models.rules.rule import Verdict
from sample_data import compressor_plan
from sample_data.truth import COMPRESSOR
from tests.sample_data.independent import bulge


@pytest.fixture(scope="module")
def compressor():
    return assess(sample_data.compressor())


@pytest.fixture(scope="module")
def pump():
    return assess(sample_data.pump())


def attempt(assessment, step, number):
    return next(one for one in assessment.attempts if (one.step.key, one.number) == (step, number))


def test_the_next_act_on_the_compressor_is_to_begin_its_fourth_impeller(compressor):
    assert (compressor.next.step, compressor.next.attempt) == (compressor_plan.NEXT, 1)
    assert compressor.next.act.value == "open an attempt"


def test_only_the_mount_that_bent_the_shaft_is_outside(compressor):
    outside = [
        (one.step.key, one.number) for one in compressor.attempts if one.worst is Verdict.OUTSIDE
    ]

    assert outside == [("impeller-2", 1)]


def test_the_bend_is_found_where_it_really_sits(compressor):
    found = attempt(compressor, "impeller-2", 1).kink
    true = COMPRESSOR.mount("impeller-2", 1).kink
    largest = abs(bulge(true, COMPRESSOR.first_journal, COMPRESSOR.second_journal, true.position))

    # Readings of 0.0001 in at stations some four inches apart: a good inch, and a tenth in size.
    assert found.position == pytest.approx(true.position, abs=0.06)
    assert found.bulge == pytest.approx(largest, rel=0.12)
    assert math.degrees(found.clock_angle) == pytest.approx(true.clock_degrees, abs=6)


def test_the_finished_pump_has_nothing_open_and_nothing_outside(pump):
    assert pump.next.act.value == "nothing"
    assert {one.worst for one in pump.attempts} == {Verdict.WITHIN}
