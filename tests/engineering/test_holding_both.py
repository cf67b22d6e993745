"""Torque and thrust together: by hand, by a search over slipping motions, limits."""

import math

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from models.engineering.errors import OutOfRangeError
from models.engineering.holding import combined_holding_factor
from models.engineering.holding_both import force_demanded
from models.engineering.roughness import peak_to_valley
from tests.published.printed import printed

loads = st.floats(0.0, 1e5)


def test_thrust_and_torque_add_as_sides_of_a_right_angle():
    # 3-4-5: 3 N along, 0.4 N·m at a radius of 0.1 m across.
    assert force_demanded(torque=0.4, thrust=-3.0, holding_torque=1.0, holding_force=10.0) == (
        pytest.approx(5.0)
    )


@given(loads, loads, st.floats(0.02, 0.5), st.floats(1.0, 1e6))
def test_one_land_has_the_factor_of_the_single_joint(torque, thrust, diameter, held):
    demanded = force_demanded(
        torque=torque, thrust=thrust, holding_torque=held * diameter / 2.0, holding_force=held
    )
    factor = combined_holding_factor(
        holding_force=held, torque=torque, thrust=thrust, interface_diameter=diameter
    )
    if demanded:
        assert held / demanded == pytest.approx(factor)


@given(st.lists(st.tuples(st.floats(10.0, 1e4), st.floats(0.02, 0.3)), min_size=1, max_size=4),
       st.floats(0.05, 1.5))  # fmt: skip
def test_lands_hold_no_less_than_the_demand_that_just_slips(lands, direction):
    # Second path: over all slipping motions (axial v, turning w) the power that friction takes must
    # exceed what the loads give; the least ratio is the true factor of safety.
    held = sum(force for force, _ in lands)
    turned = sum(force * radius for force, radius in lands)
    thrust, torque = held * math.cos(direction), turned * math.sin(direction)
    demanded = force_demanded(
        torque=torque, thrust=thrust, holding_torque=turned, holding_force=held
    )
    angles = np.linspace(0.0, math.pi / 2.0, 4001)
    scale = held / turned
    along, around = np.cos(angles), np.sin(angles) * scale
    taken = sum(force * np.hypot(along, around * radius) for force, radius in lands)
    true_factor = float(np.min(taken / (thrust * along + torque * around)))

    assert held / demanded <= true_factor * (1.0 + 1e-6)


def test_what_cannot_be_is_refused():
    with pytest.raises(OutOfRangeError):
        force_demanded(torque=1.0, thrust=0.0, holding_torque=0.0, holding_force=0.0)
    with pytest.raises(OutOfRangeError):
        force_demanded(torque=math.nan, thrust=0.0, holding_torque=1.0, holding_force=1.0)
    with pytest.raises(OutOfRangeError):
        force_demanded(torque=0.0, thrust=1.0, holding_torque=1.0, holding_force=-1.0)
    assert force_demanded(torque=0.0, thrust=7.0, holding_torque=0.0, holding_force=0.0) == 7.0


def test_an_average_of_eight_tenths_is_a_height_of_four_point_eight():
    # Rz ≈ 6·Ra, DIN 7190 from memory.
    assert peak_to_valley(average_roughness=0.8e-6) == printed("4.8", 1e-6)
    with pytest.raises(OutOfRangeError):
        peak_to_valley(average_roughness=-1e-9)
