"""The finished rotor: limits that follow from its speed and kind, through the job file."""

import math

import msgspec
import pytest

import sample_data
from models import jobfile
from models.assess import assess
from models.job import (
    AcceptancePlan,
    FieldReading,
    HighSpeedRun,
    Magnetism,
    MagnetismLimit,
    Place,
    VibrationReading,
)
from models.rules.rule import Verdict
from models.units import FieldStrength, Length, Speed
from tests.assess.invented import ORIGIN

JOB = sample_data.pump()
HEAD = {"place": Place(kind="final"), "by": "GM", "done_at": "2026-11-20T08:00:00+01:00",
        "entered_at": "2026-11-20T08:00:00+01:00", "plan": JOB.plan.revision,
        "instrument": JOB.instruments[0].tag}  # fmt: skip
FULL = JOB.plan.rotor.maximum_continuous_speed
TURNS = FULL.si * 60.0 / (2.0 * math.pi)


def run(micrometres, speed=FULL):
    reading = VibrationReading(place="P1", amplitude=Length.read(f"{micrometres:g} µm"))
    return HighSpeedRun(id="run", where_run="test bed", speed=speed, readings=(reading,), **HEAD)


def field(gauss):
    reading = FieldReading(place="J1", value=FieldStrength.read(f"{gauss} gauss"))
    return Magnetism(id="field", readings=(reading,), **HEAD)


def job(*entries, machine="compressor", **more):
    limit = MagnetismLimit(value=FieldStrength.read("2 gauss"), origin=ORIGIN)
    asked = AcceptancePlan(machine=machine, origin=ORIGIN, magnetism=limit, **more)
    plan = msgspec.structs.replace(JOB.plan, acceptance=asked)
    made = msgspec.structs.replace(
        JOB, plans=(*JOB.plans[:-1], plan), entries=(*JOB.entries, *entries), verdicts=()
    )
    # Through the file, as from another shop.
    return jobfile.loads(jobfile.dumps(made))


def judged(*entries, **more):
    view = assess(job(*entries, **more))
    wanted = ("vibration-within", "probe-track-within", "magnetism-within")
    return {
        one.finding.rule.id: one.finding for one in view.findings if one.finding.rule.id in wanted
    }


def test_where_the_plan_asks_nothing_nothing_is_said():
    assert not [one for one in assess(JOB).findings if "magnetism" in one.finding.rule.id]


def test_what_is_asked_and_not_read_is_not_judged():
    found = judged(high_speed_run=True)
    assert found["vibration-within"].verdict is Verdict.NOT_JUDGED
    assert found["magnetism-within"].verdict is Verdict.NOT_JUDGED


@pytest.mark.parametrize(
    ("machine", "limit"),
    [
        # 25.4·√(12 000/N) µm, whichever is less beside 25.4 (API 617) and 50 (Bloch and Singh).
        ("compressor", min(25.4, 25.4 * math.sqrt(12000.0 / TURNS))),
        ("steam turbine", min(50.0, 25.4 * math.sqrt(12000.0 / TURNS))),
    ],
)
def test_the_vibration_limit_follows_from_kind_and_speed(machine, limit):
    below = judged(run(math.floor(10 * limit) / 10), machine=machine)["vibration-within"]
    above = judged(run(math.ceil(10 * limit + 1) / 10), machine=machine)["vibration-within"]
    assert below.verdict is Verdict.WITHIN
    assert above.verdict is Verdict.OUTSIDE


def test_a_run_below_full_speed_proves_nothing():
    slow = Speed.from_si(0.9 * FULL.si, "r/min", 0)
    assert judged(run(1.0, slow))["vibration-within"].verdict is Verdict.CANNOT_TELL


@pytest.mark.parametrize(("gauss", "verdict"), [("-1.9", Verdict.WITHIN), ("2.1", Verdict.OUTSIDE)])
def test_magnetism_counts_in_either_sense(gauss, verdict):
    assert judged(field(gauss))["magnetism-within"].verdict is verdict
