"""A total swept without stopping beside the readings at the marks, on surfaces made by hand."""

import math

import msgspec
import pytest

from app.worked_out import worked_out
from models.assess import assess
from models.assess.runout import read_survey
from models.assess.swept import swept_views
from models.job import StationReadings
from models.units import Angle, Length
from sample_data.load import pump

JOB = pump()
FINAL = next(one for one in JOB.entries if getattr(one, "purpose", None) == "final")
KEY = FINAL.stations[0].station
UNIT = Length.read("1", FINAL.unit).si
MICRON = 1e-6


def surface(turn, *, offset=20.0, oval=0.0, lobes=0, height=0.0):
    """Reading over a surface at an angle [µm]."""
    return (
        offset * math.cos(turn - 0.3) + oval * math.cos(2 * turn) + height * math.cos(lobes * turn)
    )


def made(swept=None, *, lever=None, **form):
    """A job with one station of its final survey read over such a surface, and swept all round."""
    every = [surface(math.radians(step / 4), **form) for step in range(1440)]
    total = max(every) - min(every) if swept is None else swept
    slope = 1.0 if lever is None else math.cos(math.radians(lever))
    typed = tuple(
        f"{surface(math.radians(mark.si), **form) * MICRON / UNIT / slope:.9f}"
        for mark in FINAL.angles
    )
    readings = StationReadings(
        station=KEY, typed=typed, again=typed[0],
        swept_total=f"{total * MICRON / UNIT / slope:.9f}",
    )  # fmt: skip
    set_up = FINAL.set_up
    if lever is not None:
        set_up = msgspec.structs.replace(set_up, lever_angle=Angle.read(f"{lever}", "°"))
    survey = msgspec.structs.replace(
        FINAL, stations=(readings, *FINAL.stations[1:]), corrections=(), set_up=set_up
    )
    entries = tuple(survey if one is FINAL else one for one in JOB.entries)
    return msgspec.structs.replace(JOB, entries=entries, verdicts=()), survey


def view(*arguments, **form):
    job, survey = made(*arguments, **form)
    (found,) = swept_views(job, [read_survey(job, survey)])
    return found


@pytest.mark.parametrize(
    ("form", "outcome"),
    [
        ({}, "agrees"),
        ({"oval": 8.0}, "agrees"),
        ({"lever": 40.0}, "agrees"),
        # Six lobes with every crest and hollow at a mark: read in full.
        ({"lobes": 6, "height": 10.0}, "agrees"),
        # Twelve lobes look like a mean to twelve marks, thirteen like an offset.
        ({"lobes": 12, "height": 10.0}, "form between marks"),
        ({"offset": 2.0, "lobes": 24, "height": 10.0}, "form between marks"),
        ({"swept": 30.0}, "swept is short"),
        ({"swept": 40.0 - 1.0}, "agrees"),
        ({"swept": 60.0}, "form between marks"),
    ],
)
def test_the_two_totals_are_told_apart(form, outcome):
    assert view(**form).outcome == outcome


def test_the_marks_of_an_offset_reach_its_whole_total_between_them_too():
    # A pure offset of 20 µm swings 40 µm; no mark stands at its high spot.
    found = view()
    assert found.reach == pytest.approx(40 * MICRON, abs=0.01 * MICRON)
    assert found.at_marks < found.reach


def test_it_names_the_lobes_that_read_as_an_offset():
    found = view(lobes=12, height=10.0)
    assert {len(FINAL.angles) - 1, len(FINAL.angles) + 1} & set(found.aliased)
    assert all(str(one) in found.sentence for one in found.aliased)


def test_a_total_without_marks_is_not_compared():
    alone = StationReadings(station=KEY, total="0.02", swept_total="0.02")
    survey = msgspec.structs.replace(FINAL, stations=(alone,), corrections=())
    assert swept_views(JOB, [read_survey(JOB, survey)]) == ()


def test_the_check_gives_it_in_words():
    job, _ = made(60.0)
    (told,) = worked_out(assess(job))["swept_totals"]
    assert told["station"] == KEY
    assert told["swept_tir [m]"] == pytest.approx(60 * MICRON)
    assert "form between the marks" in told["in words"]
