"""A hub on a taper through the whole line: plan, draw-up, fit, verdicts, what comes next."""

import msgspec
import pytest

import sample_data
from app.presenters.bench.forms.drawing_up import draw_up_form
from app.presenters.bench.forms.form import Bench
from models import jobfile
from models.assess import assess
from models.job import (
    Advance,
    AttemptOpened,
    DrawUp,
    DurationLimit,
    LengthLimit,
    Mount,
    Place,
    PressureLimit,
    RatioLimit,
    TaperFit,
)
from models.rules.progress import Act
from models.rules.rule import Verdict
from models.units import Angle, Duration, Length, Pressure, Ratio
from tests.assess.invented import ORIGIN
from tests.published.printed import printed

AT = Place(kind="attempt", step="hub", attempt=1)


def length(text):
    return LengthLimit(value=Length.read(text), origin=ORIGIN)


TAPER = TaperFit(
    taper=Ratio.read("0.05"),  # 1 in 20
    least_advance=length("4 mm"),
    greatest_advance=length("4.4 mm"),
    greatest_dilation=PressureLimit(value=Pressure.read("160 MPa"), origin=ORIGIN),
    least_contact=RatioLimit(value=Ratio.read("85 %"), origin=ORIGIN),
    least_hold=DurationLimit(value=Duration.read("30 min"), origin=ORIGIN),
)


def job_with(*entries):
    """Give the pump's last step a keyless hub 100/160 mm on a taper, and these entries in it."""
    job = sample_data.pump()
    steps = []
    for step in job.plan.steps:
        if step.key != job.plan.steps[-1].key:
            steps.append(step)
            continue
        item = next(one for one in step.items if one.key == "hub")
        land = msgspec.structs.replace(
            item.lands[0],
            nominal_diameter=Length.read("100 mm"),
            hub_outer_diameter=Length.read("160 mm"),
            least_interference=length("180 µm"),
            greatest_interference=length("220 µm"),
            growth=None,
        )
        hub = msgspec.structs.replace(
            item, kind="hydraulic", keyed=False, lands=(land,), taper=TAPER, axial=None,
            yield_strength=Pressure.read("600 MPa"), carried_torque_share=None,
        )  # fmt: skip
        steps.append(
            msgspec.structs.replace(step, key="hub", items=(hub,), points=(), survey_due=False)
        )
    plan = msgspec.structs.replace(job.plan, steps=tuple(steps))
    kept = [one for one in job.entries
            if one.place.step != job.plan.steps[-1].key and one.place.kind != "final"]  # fmt: skip
    return msgspec.structs.replace(
        job, plans=(*job.plans[:-1], plan), entries=(*kept, *entries), verdicts=(),
        key_signatures=(),
    )  # fmt: skip


def common(key, minute, at=AT):
    job = sample_data.pump()
    moment = f"2027-03-01T10:{minute:02d}:00+01:00"
    by = next(one.key for one in job.people if one.role == "technician")
    return {"id": key, "place": at, "by": by, "done_at": moment, "entered_at": moment,
            "plan": job.plan.revision}  # fmt: skip


OPENED = AttemptOpened(**common("a", 0))


def drawn(key="d", minute=5, up=(4.1, 4.2), **more):
    facts = {
        "advances": tuple(
            Advance(
                angle=Angle.read(f"{90 * index}°"),
                zero=Length.read("12 mm"),
                drawn_up=Length.read(f"{12 - one:.3f} mm"),
            )
            for index, one in enumerate(up)
        ),
        "contact": Ratio.read("88 %"),
        "dilation_pressure": Pressure.read("130 MPa"),
        "hold": Duration.read("30 min"),
        "instrument": instrument(),
    }
    return DrawUp(**common(key, minute), item="hub", **facts | more)


def instrument():
    return next(one.tag for one in sample_data.pump().instruments if one.uncertainty)


MOUNT = Mount(**common("m", 6), item="hub", outcome="seated")


def hub_of(job):
    attempt = assess(job).attempt("hub", 1)
    return attempt, attempt.items[0]


def test_a_taper_asks_for_its_draw_up_and_for_no_sizes():
    view = assess(job_with(OPENED))

    assert (view.next.act, view.next.item) == (Act.DRAW_UP, "hub")
    # 180/0.05 and 220/0.05 µm, by hand.
    assert view.attempt("hub", 1).items[0].drawn_up.wanted == (
        printed("3.600", 1e-3), printed("4.400", 1e-3),
    )  # fmt: skip


def test_the_advance_makes_the_fit_that_everything_rests_on():
    _, hub = hub_of(job_with(OPENED, drawn(), MOUNT))
    fit = hub.fits[0].interference

    # 1 in 20: 4.1 and 4.2 mm make 205 and 210 µm.
    assert (fit.least, fit.greatest) == (printed("205.00", 1e-6), printed("210.00", 1e-6))
    # p = E·e/2·(1 − d²/D²) with the table's own moduli: between 120 and 140 MPa, 126.14 at E = 207.
    assert 120e6 < hub.strength.lands[0].greatest_pressure < 140e6
    assert hub.drawn_up.spread == printed("0.100", 1e-3)


def test_uncertainty_of_the_fit_is_that_of_two_readings_by_the_taper():
    job = job_with(OPENED, drawn(), MOUNT)
    _, hub = hub_of(job)
    unsure = job.instrument(instrument()).uncertainty.si

    assert hub.fits[0].expanded_uncertainty == pytest.approx(0.05 * 2.0**0.5 * unsure)


def test_a_hub_drawn_up_as_planned_is_home_and_settles():
    attempt, hub = hub_of(job_with(OPENED, drawn(), MOUNT))

    found = {one.rule.id: one.verdict for one in attempt.findings}

    judged = ("advance-within", "interference-within", "taper-contact", "dilation-allowed",
              "piston-held")  # fmt: skip
    assert {found[key] for key in judged} == {Verdict.WITHIN}
    assert "part-seated" not in found
    assert attempt.home("hub") is Verdict.WITHIN
    assert assess(job_with(OPENED, drawn(), MOUNT)).next.act is Act.SETTLE
    assert hub.drawn_up.pressure_at_yield == pytest.approx(600e6 / ((3 + (10 / 16) ** 4) ** 0.5
                                                           / (1 - (10 / 16) ** 2)))  # fmt: skip


@pytest.mark.parametrize(("more", "rule_id"), [
    ({"up": (3.5, 3.6)}, "advance-within"),
    ({"up": (4.5, 4.6)}, "interference-within"),
    ({"contact": Ratio.read("60 %")}, "taper-contact"),
    ({"dilation_pressure": Pressure.read("170 MPa")}, "dilation-allowed"),
])  # fmt: skip
def test_a_draw_up_outside_its_limits_is_drawn_up_again_not_settled(more, rule_id):
    job = job_with(OPENED, drawn(**more), MOUNT)
    attempt, _ = hub_of(job)

    assert attempt.verdict_of(rule_id) is Verdict.OUTSIDE
    assert assess(job).next.act is Act.DRAW_UP


def test_the_latest_draw_up_counts_and_the_first_stays():
    job = job_with(OPENED, drawn(up=(3.5, 3.6)), MOUNT, drawn("e", 9))

    assert assess(job).next.act is Act.SETTLE
    assert [one.id for one in job.entries if isinstance(one, DrawUp)] == ["d", "e"]


@pytest.mark.parametrize(("growth", "verdict"), [
    # 210 µm on 100/160 grow the outside by 2·p·d²·D/(E·(D² − d²)) = 131 µm where p = 132.4 MPa,
    # whatever E is: Δ·d/D of one material on a solid shaft, by hand 210·100/160 = 131.25.
    ("128 µm", Verdict.WITHIN), ("140 µm", Verdict.OUTSIDE), ("80 µm", Verdict.CANNOT_TELL),
])  # fmt: skip
def test_growth_of_the_outside_tells_the_seating_loss(growth, verdict):
    job = job_with(OPENED, drawn(up=(4.2, 4.2), hub_growth=Length.read(growth)), MOUNT)
    attempt, hub = hub_of(job)

    assert attempt.verdict_of("seating-loss-usual") is verdict
    # What is missing on the growth is missing on the fit by D/d = 1.6.
    missing = 131.25 - float(growth.split()[0])
    assert hub.drawn_up.seating_loss == pytest.approx(1.6e-6 * missing, abs=0.5e-6)


def test_the_bench_says_what_to_reach_and_takes_what_was_read():
    view = assess(job_with(OPENED))
    bench = Bench(view, OPENED.by, lambda: "2027-03-01T10:30:00+01:00")
    form = draw_up_form(bench, view.next, view.attempt("hub", 1).items[0])
    lines = " ".join(form.task.lines)

    assert "up by 4 mm to 4.4 mm" in lines
    assert "no more than 160 MPa is allowed" in lines
    assert any("nobody on the axis" in one for one in form.task.cautions)

    texts = {one.key: one.value for one in form.task.fields}
    texts |= {f"zero {angle}": "12.00" for angle in (0, 90, 180, 270)}
    texts |= {f"up {angle}": "7.85" for angle in (0, 90, 180, 270)}
    texts |= {"contact": "88", "dilation": "130", "hold": "30", "growth": "120"}
    made = form.make(form.answers(texts, bench.units)).entries

    assert [type(one) for one in made] == [DrawUp, Mount]
    assert made[0].advances[3].drawn_up.written == "7.85 mm"
    assert (made[0].contact.written, made[0].hold.written) == ("88 %", "30 min")


def test_a_job_file_carries_taper_and_draw_up():
    job = job_with(OPENED, drawn(), MOUNT)

    assert jobfile.loads(jobfile.dumps(job)) == job
