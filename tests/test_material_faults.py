"""A job file's copies of a shop's own materials: taken, or refused by the place of the fault."""

import msgspec
import pytest

import sample_data
from models import jobfile
from models.jobfile.faults import JobFileError
from models.units import Density, Pressure, Ratio
from tests.record.a_job import FORGING

TWICE = (FORGING.expansions[0], FORGING.expansions[0])


def job_with(*own):
    job = sample_data.pump()
    plan = msgspec.structs.replace(job.plan, materials=own)
    return msgspec.structs.replace(job, plans=(*job.plans[:-1], plan))


def test_a_job_file_carries_the_materials_its_plan_rests_on():
    job = job_with(FORGING)

    assert jobfile.loads(jobfile.dumps(job)).plan.materials == (FORGING,)


@pytest.mark.parametrize(("change", "place", "expected"), [
    ({"name": " "}, "materials[0].name", "words"),
    ({"source": ""}, "materials[0].source", "words"),
    ({"poisson": Ratio.read("0.5")}, "materials[0].poisson", "less than 0.5"),
    ({"density": Density.read("0 kg/m³")}, "materials[0].density", "more than 0"),
    ({"yield_strength": Pressure.read("-3 MPa")}, "materials[0].yield_strength", "more than 0"),
    ({"moduli": ()}, "materials[0].moduli", "a value at one temperature"),
    ({"expansions": TWICE}, "materials[0].expansions[1].temperature", "no earlier row"),
])  # fmt: skip
def test_a_fault_is_named_by_its_place(change, place, expected):
    job = job_with(msgspec.structs.replace(FORGING, **change))

    with pytest.raises(JobFileError, match=expected) as refused:
        jobfile.loads(jobfile.dumps(job))

    assert refused.value.place.endswith(place)


def test_a_name_stands_once():
    with pytest.raises(JobFileError) as refused:
        jobfile.loads(jobfile.dumps(job_with(FORGING, FORGING)))

    assert refused.value.place.endswith("materials[1].name")
