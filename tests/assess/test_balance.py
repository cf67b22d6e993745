"""Balance through the whole line: the plan asks, the bench offers, runs are judged, work goes on.

The rotor's true unbalance is a few masses off the axis at known places; what a machine reads in two
planes follows from forces and moments by a linear system solved here, not from the program.
"""

import cmath
import math

import msgspec
import numpy as np
import pytest

import sample_data
from app.presenters.bench.forms.balancing import balance_form
from app.presenters.bench.forms.form import Bench
from models import jobfile
from models.assess import assess
from models.assess.balance import permissible
from models.job import (
    BalancePlan,
    BalanceRun,
    CorrectionPlane,
    JournalsWeighed,
    Place,
    PlaneReading,
    Settled,
    Signature,
    TrialReading,
    TrialRound,
)
from models.rules.progress import Act, Stage
from models.rules.rule import Verdict
from models.units import Angle, Length, Mass, Speed, Unbalance
from tests.assess.invented import ORIGIN

JOB = sample_data.pump()
LAST = JOB.plan.steps[-1].key
AT = Place(kind="attempt", step=LAST, attempt=1)
HEAD = {"by": "GM", "done_at": "2026-11-20T08:00:00+01:00",
        "entered_at": "2026-11-20T08:00:00+01:00", "plan": JOB.plan.revision}  # fmt: skip


def plane(key, position):
    return CorrectionPlane(
        key=key, name=f"plane {key}", position=Length.from_si(position, "mm", 1),
        radius=Length.read("120 mm"),
    )  # fmt: skip


def journals():
    plan = JOB.plan
    return [plan.station(key).position.si for key in (plan.first_journal, plan.second_journal)]


def asked(**more):
    first, second = journals()
    span = second - first
    facts = {
        "first_plane": plane("A", first + 0.1 * span),
        "second_plane": plane("B", second - 0.1 * span),
        "limit": "4 W/N", "origin": ORIGIN, "after_steps": (LAST,),
    }  # fmt: skip
    return BalancePlan(**(facts | more))


def job(*entries, **more):
    plan = msgspec.structs.replace(JOB.plan, balance=asked(**more))
    kept = [
        one for one in JOB.entries if not (one.place == AT and isinstance(one, Settled | Signature))
    ]
    made = msgspec.structs.replace(
        JOB, plans=(*JOB.plans[:-1], plan), entries=(*kept, *entries), verdicts=()
    )
    # Through the file, as from another shop.
    return jobfile.loads(jobfile.dumps(made))


def run(key, first, second, place=AT):
    def reading(name, vector):
        return PlaneReading(
            plane=name,
            amount=Unbalance.from_si(abs(vector), "g·mm", 3),
            angle=Angle.read(f"{math.degrees(cmath.phase(vector)) % 360.0:.3f}", "°"),
        )

    return BalanceRun(
        id=key, place=place, **HEAD, purpose="as found", speed=Speed.read("600 r/min"),
        instrument=JOB.instruments[0].tag, readings=(reading("A", first), reading("B", second)),
    )  # fmt: skip


def weighed(first="60 kg", second="55 kg"):
    return JournalsWeighed(
        id="scales", place=AT, **HEAD, first=Mass.read(first), second=Mass.read(second),
        instrument=JOB.instruments[0].tag,
    )  # fmt: skip


def read_by_a_machine(unbalances):
    """Two vectors that make the same force and moment as (position, vector) of each."""
    places = [asked().first_plane.position.si, asked().second_plane.position.si]
    left = np.array([[1.0, 1.0], places], dtype=complex)
    right = np.array([sum(u for _, u in unbalances), sum(z * u for z, u in unbalances)])
    return np.linalg.solve(left, right)


def found(view, rule_id):
    return [one for one in view.attempt(LAST, 1).findings if one.rule.id == rule_id]


def test_where_the_plan_asks_for_none_nothing_is_said():
    plain = assess(JOB)
    assert plain.attempt(LAST, 1).balance is None
    assert not [one for one in plain.findings if one.finding.rule.id == "balance-done"]


def test_work_waits_for_the_run_and_then_for_the_scales():
    waiting = assess(job())
    assert (waiting.next.stage, waiting.next.act) == (Stage.BALANCE, Act.BALANCE)
    assert found(waiting, "balance-done")[0].verdict is Verdict.NOT_JUDGED

    read = assess(job(run("one", 20e-6 + 0j, 10e-6j)))
    assert [one.verdict for one in found(read, "residual-within")] == [Verdict.CANNOT_TELL] * 2
    assert read.next.act is Act.BALANCE

    closed = assess(job(weighed(), run("one", 20e-6 + 0j, 10e-6j)))
    assert [one.verdict for one in found(closed, "residual-within")] == [Verdict.WITHIN] * 2
    assert closed.next.act is Act.SETTLE


def test_what_may_remain_is_four_w_over_n_of_each_journals_own_load():
    speed = JOB.plan.rotor.maximum_continuous_speed
    turns = speed.si * 60.0 / (2.0 * math.pi)
    first, second = permissible(job(weighed()).plan, weighed())
    # 4 W/N in ounce-inches, pounds and r/min, with 1 lb = 0.45359237 kg, 1 oz·in = 720.07789 g·mm.
    for kilograms, limit in ((60.0, first), (55.0, second)):
        expected = 4.0 * (kilograms / 0.45359237) / turns * 720.07788737e-6
        assert limit == pytest.approx(expected, rel=2e-3)


def test_a_grade_is_shared_from_the_centre_of_gravity():
    """ISO 21940-11: the plane nearer the centre of gravity may keep more."""
    first, second = permissible(job(limit="grade", grade=2.5).plan, weighed("70 kg", "45 kg"))
    speed = JOB.plan.rotor.maximum_continuous_speed.si
    assert first + second == pytest.approx(115.0 * 2.5e-3 / speed, rel=1e-4)
    assert first > second


def test_the_unbalance_that_a_part_brought_is_the_vector_between_two_runs():
    first, second = journals()
    own = [(first + 0.2, 30e-6 * cmath.exp(0.4j)), (second - 0.2, 25e-6 * cmath.exp(-2.0j))]
    wheel = (0.5 * (first + second), 60e-6 * cmath.exp(1.3j))
    before, after = read_by_a_machine(own), read_by_a_machine([*own, wheel])
    bare = run("bare", *before, place=Place(kind="bare shaft"))
    entries = list(JOB.entries)
    opened = next(index for index, one in enumerate(entries) if one.place == AT)
    made = job(weighed(), run("one", *after))
    kept = list(made.entries)
    made = msgspec.structs.replace(made, entries=(*kept[:opened], bare, *kept[opened:]))
    left = assess(made).attempt(LAST, 1).balance.planes
    expected = read_by_a_machine([wheel])
    for one, truth in zip(left, expected, strict=True):
        assert abs(one.brought - truth) < 1e-8
        assert one.mass_at_radius == pytest.approx(abs(one.residual) / 0.120)


def test_a_residual_above_the_trial_weight_is_not_passed():
    """Readings |R + T| for R = 3 T: the classical sum says T/3 (API 617 annex B, its weakness)."""
    limit = permissible(job(weighed()).plan, weighed())[0]
    trial = 1.5 * limit
    angles = [60.0 * number for number in range(6)]
    shown = [abs(3.0 * trial + trial * cmath.exp(1j * math.radians(one))) for one in angles]

    def turn(**more):
        return TrialRound(
            id="round", place=AT, **HEAD, plane="A", trial=Unbalance.from_si(trial, "g·mm", 3),
            instrument=JOB.instruments[0].tag,
            readings=tuple(
                TrialReading(angle=Angle.read(f"{one:g}", "°"), reading=f"{1e6 * value:.4f}")
                for one, value in zip(angles, shown, strict=True)
            ),
            **more,
        )  # fmt: skip

    base = (weighed(), run("one", 1e-6 + 0j, 1e-6 + 0j))
    unsure = found(assess(job(*base, turn())), "trial-round-agrees")[0]
    told = found(assess(job(*base, turn(plain=f"{3e6 * trial:.4f}"))), "trial-round-agrees")[0]
    assert unsure.verdict is Verdict.CANNOT_TELL
    assert "Read once without the trial weight" in unsure.message
    assert told.verdict is Verdict.OUTSIDE


def test_the_bench_takes_a_run_with_its_scales_and_goes_on():
    view = assess(job())
    bench = Bench(view, "GM", lambda: "2026-11-20T09:00:00+01:00")
    form = balance_form(bench, view.next, view.attempt(LAST, 1))
    assert form is not None
    assert any("may remain (4 W/N" in line for line in form.task.lines)
    made = form.make(
        form.answers(
            {
                "instrument": JOB.instruments[0].tag,
                "speed": "600",
                "first": "60",
                "second": "55",
                "amount A": "40",
                "angle A": "15",
                "amount B": "35",
                "angle B": "190",
            },
            bench.units,
        )
    )
    assert [type(one).__name__ for one in made.entries] == ["JournalsWeighed", "BalanceRun"]
    after = assess(job(*made.entries))
    assert after.attempt(LAST, 1).balance.planes[0].residual == pytest.approx(
        cmath.rect(40e-6, math.radians(15.0))
    )
    assert after.next.act in (Act.SETTLE, Act.BALANCE)


def test_a_strange_plane_or_reading_in_a_file_is_named():
    strange = msgspec.structs.replace(
        run("one", 1e-6 + 0j, 1e-6 + 0j),
        readings=(PlaneReading(plane="C", amount=Unbalance.read("1 g·mm"),
                               angle=Angle.read("0 °")),),
    )  # fmt: skip
    with pytest.raises(jobfile.JobFileError, match="known correction plane: “A”, “B”"):
        job(strange)
