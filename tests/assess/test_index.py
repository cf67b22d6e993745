"""A part mounted at 0° and again at 180°: what turned with it, and what stayed with the seat."""

import cmath
import math

import msgspec
import pytest

from models.assess import assess
from models.job import AttemptOpened, Mount, Place, RunoutSurvey, SetUp, StationReadings
from models.units import Angle
from sample_data.load import compressor
from tests.journeys.random_rotors import START

BASE = compressor()
PLAN = BASE.plan
STEP = PLAN.steps[0]
ITEM = STEP.items[0].key
MICRON = 1e-6


def kink(position, at):
    """Offset at a place of a shaft bent by 1 at `at`, in the axis through both journals."""
    first = PLAN.station(PLAN.first_journal).position.si
    second = PLAN.station(PLAN.second_journal).position.si
    bent = max(0.0, position - at)
    return bent - max(0.0, second - at) * (position - first) / (second - first)


def survey(name, purpose, place, bend):
    stations = []
    for one in PLAN.stations_in_reach(STEP.key if purpose == "after" else None):
        vector = bend * kink(one.position.si, 0.8)
        typed = tuple(
            f"{(vector * cmath.exp(-1j * math.radians(mark.si))).real / 25.4e-6 * 1e-3:.7f}"
            for mark in PLAN.runout.marks
        )
        stations.append(StationReadings(station=one.key, typed=typed, again=typed[0]))
    return RunoutSurvey(
        id=name, place=place, by="AT", done_at=START, entered_at=START, plan=PLAN.revision,
        purpose=purpose, set_up=SetUp(attitude="horizontal", supports="lined V-blocks"),
        unit="in", angles=PLAN.runout.marks, stations=tuple(stations),
        instrument=BASE.instruments[0].tag, closed_at=START,
    )  # fmt: skip


def attempt(number, bend, clock):
    place = Place(kind="attempt", step=STEP.key, attempt=number)
    head = {"place": place, "by": "AT", "done_at": START, "entered_at": START,
            "plan": PLAN.revision}  # fmt: skip
    position = None if clock is None else Angle.read(f"{clock}", "°")
    return (
        AttemptOpened(id=f"open {number}", baseline="bare", **head),
        Mount(id=f"mount {number}", item=ITEM, outcome="seated", clock_position=position, **head),
        survey(f"after {number}", "after", place, bend),
    )


def views(part, seat, clocks=(0, 180)):
    bare = survey("bare", "bare shaft", Place(kind="bare shaft"), 0j)
    entries = (
        bare,
        *attempt(1, seat + part, clocks[0]),
        *attempt(2, seat - part, clocks[1]),
    )
    return assess(msgspec.structs.replace(BASE, entries=entries, verdicts=())).index_tests


PART, SEAT = 60 * MICRON * cmath.exp(0.7j), 25 * MICRON * cmath.exp(-1.1j)


def test_each_share_comes_back_as_it_was_made():
    (found,) = views(PART, SEAT)
    shape = kink(PLAN.station(found.station).position.si, 0.8)
    assert found.shares.part == pytest.approx(PART * shape, abs=0.02 * MICRON)
    assert found.shares.seat == pytest.approx(SEAT * shape, abs=0.02 * MICRON)


@pytest.mark.parametrize(
    ("part", "seat", "said"),
    [
        (PART, 0.2 * SEAT, "look at the part"),
        (0.1 * PART, SEAT, "look at the seat"),
        (0.5 * PART, SEAT, "turned on by"),
    ],
)
def test_it_says_where_to_look(part, seat, said):
    (found,) = views(part, seat)
    assert said in found.sentence


def test_the_turn_it_advises_leaves_least():
    """Every other turn of the part leaves more: searched here, degree by degree."""
    (found,) = views(0.5 * PART, SEAT)
    left = {
        turn: abs(found.shares.seat + found.shares.part * cmath.exp(1j * math.radians(turn)))
        for turn in range(360)
    }
    best = min(left, key=left.__getitem__)
    assert abs((best - found.best_turn + 180.0) % 360.0 - 180.0) <= 1.0
    assert 2.0 * left[best] == pytest.approx(found.least_change, rel=0.02)


@pytest.mark.parametrize("clocks", [(0, 90), (None, 180), (0, 0)])
def test_other_positions_are_no_index_test(clocks):
    assert views(PART, SEAT, clocks) == ()
