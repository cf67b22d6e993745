"""Limits by the name of a fit: as their tables print them, with the standard as their origin."""

import msgspec
import pytest

import sample_data
from models import jobfile
from models.assess import assess
from models.assess.land_limits import limits_of
from models.jobfile import JobFileError
from models.units import Length
from tests.assess.invented import a_land


def named(name, diameter, **more):
    land = a_land(100.0, 160.0)
    return msgspec.structs.replace(
        land,
        nominal_diameter=Length.read(diameter),
        fit_by_name=name,
        **{"least_interference": None, "greatest_interference": None, **more},
    )


# ISO 286-2 by way of Machine Drawing, table 15.3; ANSI B4.1 by way of Machinery's Handbook.
@pytest.mark.parametrize(("name", "diameter", "least", "greatest"), [
    ("H7/s6", "150 mm", "60 µm", "125 µm"),
    ("H7/u6", "150 mm", "150 µm", "215 µm"),
    ("H7/s6", "120 mm", "44 µm", "101 µm"),
    ("H7/s6", "120.001 mm", "52 µm", "117 µm"),
    ("H7/u6", "280.5 mm", "298 µm", "382 µm"),
    ("FN2", "3.5 in", "0.0014 in", "0.0037 in"),
    ("fn5", "6 in", "0.0095 in", "0.0136 in"),
])  # fmt: skip
def test_a_name_stands_for_the_printed_limits(name, diameter, least, greatest):
    found = limits_of(named(name, diameter))

    assert (found.least.value.written, found.greatest.value.written) == (least, greatest)
    assert found.least.origin.document.startswith(("ISO 286-2", "ANSI B4.1-1967"))
    assert found.least.origin.note


def test_figures_of_the_plan_go_before_a_name():
    land = a_land(100.0, 160.0, fit_by_name="H7/s6")

    assert limits_of(land) == (land.least_interference, land.greatest_interference)


def test_a_job_whose_fit_has_a_name_is_judged_by_the_table(monkeypatch):
    job = sample_data.pump()
    figures = [limits_of(land) for land in lands_of(job)]
    by_name = with_lands(job, lambda land: named("H7/s6", land.nominal_diameter.written))

    found = judged(by_name)

    assert found
    assert all(one.limit_origin.startswith("ISO 286-2, H7/s6 at") for one in found)
    assert {one.inputs["least_allowed"] for one in found} != {one.least.value.si for one in figures}


def lands_of(job):
    return [land for step in job.plan.steps for item in step.items for land in item.lands]


def judged(job):
    return [one.finding for one in assess(job).findings
            if one.finding.rule.id == "interference-within"]  # fmt: skip


def with_lands(job, change):
    def on(land):
        new = change(land)
        return msgspec.structs.replace(
            land,
            fit_by_name=new.fit_by_name,
            least_interference=new.least_interference,
            greatest_interference=new.greatest_interference,
        )

    steps = tuple(
        msgspec.structs.replace(step, items=tuple(
            msgspec.structs.replace(item, lands=tuple(on(land) for land in item.lands))
            for item in step.items))
        for step in job.plan.steps
    )  # fmt: skip
    plan = msgspec.structs.replace(job.plan, steps=steps)
    return msgspec.structs.replace(job, plans=(*job.plans[:-1], plan))


def test_a_job_file_carries_a_name_without_figures():
    job = with_lands(sample_data.pump(), lambda land: named("H7/s6", "100 mm"))

    assert lands_of(jobfile.loads(jobfile.dumps(job))) == lands_of(job)


@pytest.mark.parametrize(("land", "place", "words"), [
    (named("H7/z9", "100 mm"), "fit_by_name", "a fit that the tables know"),
    (named("tight", "100 mm"), "fit_by_name", "such as H7/s6, or one of FN1"),
    (named("s6/H7", "100 mm"), "fit_by_name", "begin with H"),
    (named("", "100 mm"), "least_interference", "a fit by its name in fit_by_name"),
    (named("H7/s6", "100 mm", least_interference=a_land(9, 10).least_interference),
     "greatest_interference", "both figures, or the fit's name alone"),
])  # fmt: skip
def test_a_name_that_says_nothing_is_refused_with_the_way_out(land, place, words):
    job = with_lands(sample_data.pump(), lambda _: land)

    with pytest.raises(JobFileError, match=words) as refused:
        jobfile.loads(jobfile.dumps(job))

    assert refused.value.place.endswith(f"lands[0].{place}")
