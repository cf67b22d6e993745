"""Waiting for cold: the interval that proves, the forecast that advises, the bench that says so."""

import math
from dataclasses import replace
from datetime import datetime, timedelta

import msgspec
import pytest

import sample_data
from app.presenters.bench.cold import decay_picture, second_survey_words, soak_lines
from app.presenters.bench.forms.cooling import cooling_form
from app.presenters.bench.forms.form import Bench
from models.assess import assess
from models.assess.soak import forecast_of, soak_of, time_constant_of
from models.job import Cooling, Place, StationWatched
from models.rules.progress import Act, NextAct, Stage
from models.rules.rule import Verdict
from models.units import Length, UnreadableNumberError
from tests.published.printed import printed

BEGAN = datetime.fromisoformat("2027-03-01T10:00:00+01:00")


def plan_with(**cooling):
    plan = sample_data.pump().plan
    return msgspec.structs.replace(plan, cooling=msgspec.structs.replace(plan.cooling, **cooling))


def watched(*micrometres, every=3600.0, station="S3"):
    plan = sample_data.pump().plan
    return [
        StationWatched(
            id=f"w{index}",
            place=Place(kind="attempt", step=plan.steps[0].key, attempt=1),
            by="X",
            done_at=(BEGAN + timedelta(seconds=every * index)).isoformat(),
            entered_at=BEGAN.isoformat(),
            plan=plan.revision,
            station=station,
            value=Length.from_si(one * 1e-6, "µm", 3),
        )
        for index, one in enumerate(micrometres)
    ]


def decaying(end, above, constant, count=6, every=3600.0):
    return [end + above * math.exp(-every * index / constant) for index in range(count)]


@pytest.mark.parametrize(("diameter", "hours"), [
    # ρ·c·D/4h with ρ·c of steel about 3.7 MJ/(m³·K): 2.6, 3.8, 5.1 h at 100, 150, 200 mm in still
    # air of 10 W/(m²·K), by hand; within a twelfth, for the table's steel has its own ρ·c.
    ("100 mm", 2.6), ("150 mm", 3.8), ("200 mm", 5.1),
])  # fmt: skip
def test_without_a_time_constant_in_the_plan_one_is_estimated(diameter, hours):
    plan = plan_with(time_constant_hours=None)
    step = msgspec.structs.replace(plan.shaft.steps[0], diameter=Length.read(diameter))
    plan = msgspec.structs.replace(
        plan, shaft=msgspec.structs.replace(plan.shaft, steps=(step,), material="42crmo4")
    )

    found, source = time_constant_of(plan)

    assert found / 3600.0 == pytest.approx(hours, rel=1.0 / 12.0)
    assert source.startswith("estimated")


def test_the_plans_time_constant_goes_before_an_estimate():
    found, source = time_constant_of(plan_with(time_constant_hours=5.0))

    assert found == 18000.0
    assert source == sample_data.pump().plan.cooling.origin.words


def test_the_interval_that_proves_scales_with_the_rotor():
    # Agreement as large as what may still come: ln 2 of a time constant.
    five, two = (soak_of(plan_with(time_constant_hours=hours), ()) for hours in (5.0, 2.0))

    assert five.least_interval / 3600.0 == printed("3.466")
    assert five.least_interval / two.least_interval == pytest.approx(2.5)


def test_nothing_is_said_of_waiting_where_nothing_is_known():
    plan = plan_with(time_constant_hours=None)
    plan = msgspec.structs.replace(
        plan, shaft=msgspec.structs.replace(plan.shaft, material="no such steel")
    )

    assert soak_of(plan, ()).least_interval is None
    assert time_constant_of(plan)[0] is None


def test_a_watched_station_tells_where_and_when_it_ends():
    plan = plan_with(agreement=Length.read("1 µm"))
    # 8 µm above 5, halving every hour; within 1 µm after three hours.
    readings = watched(*decaying(5.0, 8.0, 3600.0 / math.log(2.0)))

    (found,) = forecast_of(plan, readings)

    assert found.found.final.real == pytest.approx(5e-6, abs=0.01e-6)
    assert found.settles_at == "2027-03-01T13:00+01:00"
    assert "accepts nothing" in found.sentence


def test_three_readings_use_the_rotors_own_time_constant_and_two_say_what_is_lacking():
    plan = plan_with(time_constant_hours=2.0, agreement=Length.read("1 µm"))
    three = watched(*decaying(5.0, 8.0, 7200.0, count=3))

    (with_own,) = forecast_of(plan, three)
    (too_few,) = forecast_of(plan, three[:2])

    assert with_own.found.final.real == pytest.approx(5e-6, abs=0.01e-6)
    assert too_few.found is None
    assert "2 readings" in too_few.sentence


def test_each_station_has_a_forecast_of_its_own():
    both = [*watched(9.0, 8.0), *watched(3.0, 2.0, station="S4")]

    assert [one.station for one in forecast_of(sample_data.pump().plan, both)] == ["S3", "S4"]


def test_the_demos_night_between_two_surveys_proves_its_first_mount_cold():
    view = assess(sample_data.compressor())
    found = [one.finding for one in view.findings if one.finding.rule.id == "second-survey-proves"]

    assert [one.verdict for one in found] == [Verdict.WITHIN]
    assert found[0].inputs["interval"] > 12 * 3600.0


def test_two_surveys_half_an_hour_apart_prove_nothing():
    job = sample_data.compressor()
    surveys = [one for one in job.entries if getattr(one, "purpose", "") in ("after", "again")
               and one.place.step == "impeller-1"]  # fmt: skip
    second = surveys[-1]
    soon = datetime.fromisoformat(surveys[-2].closed_at) + timedelta(minutes=30)
    moved = msgspec.structs.replace(second, closed_at=soon.isoformat())
    entries = tuple(moved if one is second else one for one in job.entries)

    view = assess(msgspec.structs.replace(job, entries=entries))
    (found,) = [one.finding for one in view.findings
                if one.finding.rule.id == "second-survey-proves"]  # fmt: skip

    assert found.verdict is Verdict.CANNOT_TELL
    assert "Read again" in found.message


@pytest.fixture
def cool():
    job = sample_data.compressor()
    view = assess(job)
    attempt = next(one for one in view.attempts if one.step.key == "spacer-1")
    act = NextAct(stage=Stage.COOL, act=Act.COOL, words="", step="spacer-1", attempt=1)
    bench = Bench(view, job.people[0].key, lambda: "2027-03-01T10:00:00-06:00")
    return bench, act, attempt


def test_the_bench_says_when_a_second_survey_may_be_taken_and_why(cool):
    bench, _, attempt = cool

    lines = " ".join(soak_lines(bench.job.plan, attempt))

    # 4 h · ln 2 = 2.8 h.
    assert "a second survey proves it, 2.8 h or more after the first" in lines
    assert "at a time constant of 4.0 h two that agree" in lines
    words = second_survey_words(bench.job.plan, attempt)
    closed = datetime.fromisoformat(attempt.judged.entry.closed_at)
    assert words.startswith(f"from {closed + timedelta(hours=4.0 * math.log(2.0)):%H:%M}")


def test_a_watched_reading_is_taken_alone_or_with_the_temperatures(cool):
    bench, act, attempt = cool
    form = cooling_form(bench, act, attempt)
    texts = {one.key: one.value for one in form.task.fields}

    alone = form.make(form.answers(texts | {"shown": "0.0012"}, bench.units)).entries
    warm = {one.key: "70" for one in form.task.fields if one.use == "temperature"}
    both = form.make(form.answers(texts | warm | {"shown": "0.0012"}, bench.units)).entries

    assert [type(one) for one in alone] == [StationWatched]
    assert (alone[0].value.written, alone[0].station) == ("0.0012 in", texts["watched"])
    assert [type(one) for one in both] == [StationWatched, Cooling]
    with pytest.raises(UnreadableNumberError):
        form.make(form.answers(texts, bench.units))


def test_the_small_picture_holds_every_reading_and_ends_in_its_band(cool):
    bench, _, attempt = cool
    readings = tuple(watched(*decaying(5.0, 8.0, 5000.0)))
    picture = decay_picture(bench.job.plan, replace(attempt, entries=readings))

    assert len(picture.hours) == len(picture.values) == 6
    assert picture.unit == "0.0001 in"
    # 5 µm are 1.97 ten-thousandths of an inch.
    assert picture.final == pytest.approx(1.97, abs=0.02)
    assert picture.curve[-1][1] == pytest.approx(picture.final, abs=0.3)
    assert decay_picture(bench.job.plan, attempt) is None
