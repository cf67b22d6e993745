"""The traveler's rotor on its journals: what is said, and which seats are listed."""

import msgspec
import pytest

import sample_data
from models.assess import assess
from models.job import PressureLimit
from models.units import Pressure
from reports.rotor_page import _worst_of_each_stretch, on_its_journals
from tests.assess.invented import ORIGIN


def texts(job):
    found = []
    for one in on_its_journals(assess(job)):
        found.append(getattr(one, "text", "") or str(getattr(one, "_cellvalues", "")))
    return " ".join(found)


@pytest.mark.parametrize("job", [sample_data.compressor(), sample_data.pump()],
                         ids=lambda job: job.number)  # fmt: skip
def test_every_sentence_of_the_shaft_stands_on_the_page(job):
    said = texts(job)

    for sentence in assess(job).shaft.sentences:
        assert sentence.split(",")[0] in said
    assert "For a balance at speed speaks" in said


def test_each_stretch_has_its_most_sheared_seat():
    view = assess(sample_data.compressor())
    listed = _worst_of_each_stretch(view)

    assert [round(one.torque) for one in listed] == sorted({round(one.torque) for one in listed})
    for one in listed:
        alike = [two for two in view.shaft.shears if abs(two.torque - one.torque) < 1e-3]
        assert one.shear == max(two.shear for two in alike)


def test_a_limit_says_where_it_comes_from_and_what_the_owner_says_is_listed():
    job = sample_data.compressor()
    limit = PressureLimit(value=Pressure.read("30 MPa"), origin=ORIGIN)
    plan = msgspec.structs.replace(
        job.plan,
        shaft=msgspec.structs.replace(job.plan.shaft, shear_limit=limit),
        rotor=msgspec.structs.replace(job.plan.rotor, balance_reasons=("spare",)),
    )

    said = texts(msgspec.structs.replace(job, plans=(plan,)))

    assert ORIGIN.words in said
    assert "it is a spare" in said
