"""A part's heat: what may be derived, the mean over its area, chilling, the doubt of the sizes."""

import msgspec
import pytest

import sample_data
from app.presenters.bench.forms.form import Bench
from app.presenters.bench.forms.heating import heat_form
from models.assess import assess
from models.assess.chilling import chilled
from models.assess.heat import item_heat, target_with
from models.assess.heat_limits import highest_of
from models.engineering.materials import MATERIALS
from models.job import Chilling, Heating, Hot, Place, TemperatureLimit
from models.rules.progress import Act, NextAct, Stage
from models.rules.rule import Verdict
from models.units import Temperature
from tests.assess.invented import ORIGIN
from tests.published.printed import printed


def celsius(value):
    return Temperature.read(f"{value} °C")


def limit(value):
    return TemperatureLimit(value=celsius(value), origin=ORIGIN)


def job_with(**item):
    """Give the compressor's first wheel other words in its plan."""
    job = sample_data.compressor()
    first = job.plan.steps[0]
    changed = msgspec.structs.replace(first.items[0], **item)
    steps = (msgspec.structs.replace(first, items=(changed,)), *job.plan.steps[1:])
    plan = msgspec.structs.replace(job.plan, steps=steps)
    return msgspec.structs.replace(job, plans=(*job.plans[:-1], plan))


def of(job):
    return job.plan, job.plan.steps[0].items[0]


def heat_of(job):
    return assess(job).attempts[0].items[0].heat


@pytest.mark.parametrize(("words", "highest"), [
    ({}, 315.6),  # the plan's own 600 °F
    ({"highest_temperature": None}, None),
    ({"highest_temperature": None, "tempered_at": limit(580)}, 530.0),
    ({"highest_temperature": None, "tempered_at": limit(580), "surface": "coated"}, None),
    ({"highest_temperature": None, "tempered_at": limit(580), "surface": "hard-faced"}, None),
    ({"highest_temperature": None, "tempered_at": limit(580), "surface": "brazed"}, None),
    ({"highest_temperature": None, "tempered_at": limit(580), "surface": "plated"}, None),
    ({"highest_temperature": None, "tempered_at": limit(580), "holds_elastomers": True}, None),
    ({"highest_temperature": None, "tempered_at": limit(580), "material": "6061-t6"}, None),
    ({"highest_temperature": None, "tempered_at": limit(580), "material": "no steel"}, None),
    ({"tempered_at": limit(300)}, 315.6),  # the plan goes first
])  # fmt: skip
def test_a_cap_is_the_plans_or_fifty_below_the_temper_where_it_may_be(words, highest):
    found, origin = highest_of(*of(job_with(**words)))

    assert found == (None if highest is None else pytest.approx(highest, abs=0.05))
    assert (origin is None) == (highest is None)


def test_the_light_metal_is_in_the_table():
    assert MATERIALS["6061-t6"].density < 4000.0 < MATERIALS["ti-6al-4v"].density


def heated(*readings):
    job = job_with()
    plan, item = of(job)
    heating = Heating(
        id="h", place=Place(kind="attempt", step=plan.steps[0].key, attempt=1), by="X",
        done_at="2027-03-01T10:00:00-06:00", entered_at="2027-03-01T10:00:00-06:00",
        plan=plan.revision, item=item.key, method="oven", shaft_temperature=celsius(20),
        temperatures=tuple(
            Hot(where=where, temperature=celsius(value), at="2027-03-01T10:00:00-06:00")
            for where, value in readings
        ),
    )  # fmt: skip
    fits = assess(job).attempts[0].items[0].fits
    return item, item_heat(job, item, fits, [heating])


def test_the_mean_counts_every_ring_by_its_area():
    item, heat = heated(("bore", 320.0), ("rim", 120.0))
    inner, outer = item.outline.bore.si / 2.0, item.outline.outer.si / 2.0
    # Second path: thin rings, a straight line from bore to rim.
    rings = 20000
    radii = [inner + (outer - inner) * (n + 0.5) / rings for n in range(rings)]
    mean = sum(r * (320.0 - 200.0 * (r - inner) / (outer - inner)) for r in radii) / sum(radii)

    assert heat.mean_temperature == pytest.approx(mean, abs=1e-3)
    assert heat.mean_temperature < 220.0


@pytest.mark.parametrize("readings", [(("bore", 320.0),), (("rim", 300.0),), ()])
def test_without_bore_and_rim_there_is_no_mean(readings):
    assert heated(*readings)[1].mean_temperature is None


def test_a_web_reading_is_counted_between_bore_and_rim():
    cool = heated(("bore", 320.0), ("web", 150.0), ("rim", 120.0))[1].mean_temperature
    warm = heated(("bore", 320.0), ("web", 310.0), ("rim", 120.0))[1].mean_temperature

    assert cool < warm


def test_the_doubt_of_the_sizes_is_told_in_kelvin():
    job = job_with()
    heat = heat_of(job)
    (fit,) = heat.fits
    # ΔT ≈ U/(α·d·0.92): the margin for the steel takes 8 % of the coefficient.
    by_hand = fit.expanded_uncertainty / (0.92 * 11.0e-6 * fit.land.nominal_diameter.si)

    assert heat.target_uncertainty == pytest.approx(by_hand, rel=0.08)
    plain = target_with(job.plan, heat.item, heat.fits, heat.shaft_temperature, spread=0.0)
    assert heat.plain_target == plain


COLD = Chilling(lowest=celsius(-40), procedure=ORIGIN)


def test_a_bare_shaft_is_chilled_under_its_procedure_and_the_target_falls():
    job = job_with(chilling=COLD)
    plan, item = of(job)
    heat = heat_of(job)

    found = chilled(plan, item, heat)

    # The seat shrinks by about α·60 K of its diameter: between 10.5 and 12.5 µm/(m·K) for 4340.
    diameter = heat.fits[0].land.nominal_diameter.si
    assert 10.5e-6 * 60.0 * diameter < found.shrinks < 12.5e-6 * 60.0 * diameter
    assert found.target < heat.target - 40.0
    assert found.problem == ""


def test_a_shaft_that_carries_parts_or_goes_below_the_tables_is_not_chilled():
    job = job_with()
    second = job.plan.steps[1].items[0]
    late = msgspec.structs.replace(second, chilling=COLD)
    heat = assess(job).attempts[1].items[0].heat

    on_parts = chilled(job.plan, late, heat)
    deep = job_with(chilling=Chilling(lowest=celsius(-80), procedure=ORIGIN))
    too_cold = chilled(*of(deep), heat_of(deep))

    assert (on_parts.shrinks, on_parts.target) == (None, None)
    assert "fits already made would loosen" in on_parts.problem
    assert too_cold.shrinks is None
    assert too_cold.problem
    assert chilled(*of(job), heat_of(job)) is None


def test_the_bench_says_it_with_its_cautions():
    job = job_with(chilling=COLD, highest_temperature=None, tempered_at=limit(580))
    view = assess(job)
    bench = Bench(view, job.people[0].key, lambda: "2027-03-01T10:00:00-06:00")
    act = NextAct(stage=Stage.HEAT, act=Act.HEAT, words="", step=job.plan.steps[0].key, attempt=1)

    lines = " ".join(heat_form(bench, act, view.attempts[0].items[0]).task.lines)

    assert "Chilled to" in lines
    assert "Frost on the seat" in lines
    assert "oxygen" in lines
    assert "50 K below the temper" in lines
    assert "the sizes leave ±" in lines


def test_a_derived_cap_is_judged_and_says_where_it_comes_from():
    job = job_with(highest_temperature=None, tempered_at=limit(200))
    found = assess(job).attempts[0].of("target-below-highest")

    assert found[0].verdict is Verdict.OUTSIDE
    assert found[0].inputs["highest_temperature"] == printed("150.0")
    assert found[0].limit_origin == f"50 K below the temper; {ORIGIN.words}"


def test_a_cool_disc_leaves_less_time_than_its_hot_bore_promises():
    even = heated(("bore", 240.0), ("rim", 240.0))[1].window
    cool = heated(("bore", 240.0), ("rim", 140.0))[1].window

    assert cool.clearance_now < even.clearance_now
    assert cool.in_air_least < even.in_air_least
    assert cool.over_seat_least < even.over_seat_least
    # As if all of it were as warm as its mean.
    mean = heated(("bore", 240.0), ("rim", 140.0))[1].mean_temperature
    alone = heated(("bore", round(mean, 3)))[1].window
    assert cool.over_seat_greatest == pytest.approx(alone.over_seat_greatest, rel=1e-3)
