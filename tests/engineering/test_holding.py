import math

import pytest
from hypothesis import given
from hypothesis import strategies as st

from models.engineering.errors import OutOfRangeError
from models.engineering.holding import (
    FRICTIONS,
    combined_holding_factor,
    cumulated_torque,
    holding_force,
    holding_torque,
    torque_from_power,
)
from tests.published.holding import FORCES, TORQUES, TORQUES_FROM_POWER
from tests.published.printed import printed

joints = st.fixed_dictionaries(
    {
        "pressure": st.floats(0.0, 300e6),
        "interface_diameter": st.floats(0.02, 0.5),
        "contact_length": st.floats(0.01, 0.5),
        "friction": st.floats(0.0, 0.4),
    }
)


@pytest.mark.parametrize("row", FORCES, ids=lambda row: row.case)
def test_the_holding_force_is_the_one_printed(row):
    assert holding_force(**row.inputs) == printed(row.printed, row.si_per_unit), row.source


@pytest.mark.parametrize("row", TORQUES, ids=lambda row: row.case)
def test_the_holding_torque_is_the_one_printed(row):
    assert holding_torque(**row.inputs) == printed(row.printed, row.si_per_unit), row.source


@pytest.mark.parametrize("row", TORQUES_FROM_POWER, ids=lambda row: row.case)
def test_the_torque_of_a_power_is_the_one_printed(row):
    found = torque_from_power(power=row.power, speed=row.speed)
    assert found == printed(row.printed, row.si_per_unit), row.source


@given(joints)
def test_friction_summed_over_patches_of_the_seat_holds_the_same(inputs):
    # Second path: forces on 360 small patches, and their moments about the axis.
    patches = 360
    radius = inputs["interface_diameter"] / 2.0
    area = 2.0 * math.pi * radius / patches * inputs["contact_length"]
    shear = inputs["friction"] * inputs["pressure"] * area
    moment = sum(
        math.cos(at) * shear * radius * math.cos(at) + math.sin(at) * shear * radius * math.sin(at)
        for at in (2.0 * math.pi * patch / patches for patch in range(patches))
    )
    assert holding_force(**inputs) == pytest.approx(patches * shear, rel=1e-9)
    assert holding_torque(**inputs) == pytest.approx(moment, rel=1e-9)


@given(joints, st.floats(1.0, 1e6), st.floats(1.0, 1e6))
def test_torque_and_thrust_together_leave_less_than_either_alone(inputs, torque, thrust):
    force, diameter = holding_force(**inputs), inputs["interface_diameter"]

    def factor(torque, thrust):
        return combined_holding_factor(
            holding_force=force, torque=torque, thrust=thrust, interface_diameter=diameter
        )

    both, alone = factor(torque, thrust), factor(torque, 0.0)
    assert both <= min(alone, factor(0.0, thrust)) * (1.0 + 1e-12)
    assert alone == pytest.approx(holding_torque(**inputs) / torque, rel=1e-9)
    assert factor(-torque, -thrust) == both


def test_nothing_to_hold_is_held_without_end():
    assert (
        combined_holding_factor(holding_force=10.0, torque=0.0, thrust=0.0, interface_diameter=0.1)
        == math.inf
    )


@given(st.lists(st.floats(-1e5, 1e5), min_size=1, max_size=12))
def test_the_coupling_carries_the_sum_of_all_parts(torques):
    carried = cumulated_torque(torques=torques)
    assert carried[-1] == pytest.approx(math.fsum(torques), abs=1e-6)
    steps = [after - before for before, after in zip((0.0, *carried), carried, strict=False)]
    assert steps == pytest.approx(torques, abs=1e-6)


def test_without_parts_no_torque_is_carried():
    assert cumulated_torque(torques=[]) == ()


def test_frictions_are_listed_lowest_first_with_their_source():
    coefficients = [friction.coefficient for friction in FRICTIONS]
    assert coefficients == sorted(coefficients)
    assert all(friction.source and friction.condition for friction in FRICTIONS)
    # DIN 7190, from memory: heated hub on steel, not degreased and degreased.
    heated = [entry.coefficient for entry in FRICTIONS if "heated" in entry.condition]
    assert heated == [printed("0.14"), printed("0.20")]


GOOD_JOINT = FORCES[0].inputs


@pytest.mark.parametrize(
    ("field", "value"),
    [
        ("pressure", -1.0),
        ("interface_diameter", 0.0),
        ("contact_length", 0.0),
        ("friction", -0.1),
        ("friction", math.nan),
    ],
)
def test_a_holding_joint_that_cannot_be_is_refused_by_name(field, value):
    for function in (holding_force, holding_torque):
        with pytest.raises(OutOfRangeError, match=field):
            function(**{**GOOD_JOINT, field: value})


@pytest.mark.parametrize(
    ("field", "value"),
    [
        ("holding_force", -1.0),
        ("torque", math.nan),
        ("thrust", math.inf),
        ("interface_diameter", 0.0),
    ],
)
def test_a_load_that_cannot_be_is_refused_by_name(field, value):
    good = {"holding_force": 1.0, "torque": 1.0, "thrust": 1.0, "interface_diameter": 1.0}
    with pytest.raises(OutOfRangeError, match=field):
        combined_holding_factor(**{**good, field: value})


def test_power_at_standstill_makes_no_torque_and_is_refused():
    with pytest.raises(OutOfRangeError, match="speed"):
        torque_from_power(power=1.0, speed=0.0)
    with pytest.raises(OutOfRangeError, match="power"):
        torque_from_power(power=math.nan, speed=1.0)
    with pytest.raises(OutOfRangeError, match="torques"):
        cumulated_torque(torques=[1.0, math.nan])
