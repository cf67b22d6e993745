import msgspec
import pytest

import sample_data
from models.assess import lacks
from models.job import Growth
from models.units import Pressure, Ratio
from tests.assess.invented import ORIGIN, mm, rpm

PUMP = sample_data.pump()


def without(**fields):
    """Give the pump's job with other fields in its plan."""
    return msgspec.structs.replace(
        PUMP, plans=(*PUMP.plans[:-1], msgspec.structs.replace(PUMP.plan, **fields))
    )


def with_item(**fields):
    """Give the pump's job with other fields in the one item of its first step."""
    step = PUMP.plan.steps[0]
    item = msgspec.structs.replace(step.items[0], **fields)
    return without(steps=(msgspec.structs.replace(step, items=(item,)), *PUMP.plan.steps[1:]))


def rotor(**fields):
    return without(rotor=msgspec.structs.replace(PUMP.plan.rotor, **fields))


def shaft(**fields):
    return without(shaft=msgspec.structs.replace(PUMP.plan.shaft, **fields))


SAID = [
    (rotor(maximum_continuous_speed=None), "Rotor: no maximum continuous speed"),
    (rotor(trip_speed=None), "Rotor: no trip speed"),
    (rotor(power=None), "Rotor: no power"),
    (shaft(material="putty"), "Shaft: its material “putty” is not in the table"),
    (without(smoothing_factor=0.8), "its edition is not named"),
    (without(drift_limit=None), "Drift limit: none"),
    (with_item(mass=None), "Step 1, Stage 1, Impeller of stage 1: no mass, so it is estimated"),
    (with_item(material=None), "Step 1, Stage 1, Impeller of stage 1: no material"),
    (with_item(material=None, mass=None), "no mass, so it is left out"),
    (with_item(lands=()), "Stage 1, Impeller of stage 1: no land"),
    (with_item(friction=None), "Impeller of stage 1: no coefficient of friction"),
    (with_item(mounting_clearance=None), "Impeller of stage 1: no mounting clearance"),
    (with_item(highest_temperature=None), "Impeller of stage 1: no highest temperature"),
    (with_item(axial=None), "Impeller of stage 1: no axial place"),
    (with_item(keyed=False, carried_torque_share=None), "stage 1: no share of the torque"),
]


@pytest.mark.parametrize(("job", "words"), SAID, ids=[words for _, words in SAID])
def test_what_a_plan_leaves_out_is_named_with_its_place(job, words):
    assert [one for one in lacks(PUMP) if words in one] == []
    assert len([one for one in lacks(job) if words in one]) == 1


def test_what_is_given_is_no_longer_named():
    step = PUMP.plan.steps[0]
    (land,) = step.items[0].lands
    grown = msgspec.structs.replace(
        land, growth=Growth(value=mm(0.01), speed=rpm(3000.0), origin=ORIGIN)
    )
    job = with_item(yield_strength=Pressure.read("600 MPa"), lands=(grown,))

    before = [one for one in lacks(PUMP) if "Impeller of stage 1:" in one]

    assert [one.split(": ")[1].split(",")[0] for one in before] == [
        "no yield strength",
        "no growth by its designer",
    ]
    assert [one for one in lacks(job) if "Impeller of stage 1:" in one] == []


def test_a_sleeve_between_wheels_is_asked_for_no_torque():
    job = with_item(keyed=False, carried_torque_share=Ratio.read("0.1"))

    assert not any("share of the torque" in one for one in lacks(job))
    assert not any("Sleeve" in one and "torque" in one for one in lacks(job))


def test_every_lack_is_a_whole_sentence_of_its_own():
    found = lacks(PUMP)

    assert len(set(found)) == len(found)
    assert all(one[0].isupper() and one.endswith(".") for one in found)
