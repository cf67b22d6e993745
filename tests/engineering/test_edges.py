"""What stands exactly on an edge of a formula's range, and just beyond it."""

import math

import pytest
from scipy import integrate

from models.engineering.air import nusselt_horizontal_cylinder, nusselt_vertical_face
from models.engineering.balance import split_between_places
from models.engineering.balance_limits import (
    allocate_between_bearings,
    permissible_residual,
)
from models.engineering.bow_shape import unbalance_of_bow
from models.engineering.circle import Circle
from models.engineering.cooling import HotPart, cooling_in_air, heat_loss_in_air, time_in_air
from models.engineering.datum import journal_datum
from models.engineering.errors import OutOfRangeError

COLLAR = HotPart(
    bore_diameter=0.100,
    outer_diameter=0.250,
    length=0.040,
    density=7850.0,
    specific_heat=520.0,
    conductivity=40.0,
)


def test_a_journal_at_its_least_load_needs_no_floor_and_an_unloaded_one_does_not_lift():
    at_least = permissible_residual(
        journal_load=50.0, least_journal_load=50.0, maximum_continuous_speed=800.0
    )
    unloaded = permissible_residual(
        journal_load=0.0, least_journal_load=50.0, maximum_continuous_speed=800.0
    )
    assert not at_least.floor_applied
    assert unloaded.floor_applied
    assert not unloaded.journal_lifts
    assert at_least.unbalance == pytest.approx(unloaded.unbalance)


@pytest.mark.parametrize(("centre", "first"), [(1.0, 0.7), (4.0, 0.3)])
def test_a_centre_of_gravity_over_a_plane_still_shares(centre, first):
    shares = allocate_between_bearings(
        permissible=1.0, centre_of_gravity=centre, first_plane=1.0, second_plane=4.0
    )
    assert shares.first == pytest.approx(first)
    assert shares.limited


def test_two_planes_at_one_place_share_nothing():
    with pytest.raises(OutOfRangeError, match="second_plane"):
        allocate_between_bearings(
            permissible=1.0, centre_of_gravity=1.0, first_plane=1.0, second_plane=1.0
        )


def test_a_part_without_mass_shows_nothing_and_a_light_negative_one_is_refused():
    def seen(mass):
        return unbalance_of_bow(
            masses=[mass], eccentricities=[1e-5], positions=[0.4], plane_positions=(0.0, 1.0)
        )

    assert seen(0.0) == (0j, 0j)
    with pytest.raises(OutOfRangeError, match="masses"):
        seen(-0.5)


def test_a_vector_at_one_of_the_places_needs_that_one_only():
    told = split_between_places(unbalance=3.0 + 0j, first_angle=0.0, second_angle=1.0)

    assert told.first == pytest.approx(3.0)
    assert told.second == 0.0


@pytest.mark.parametrize("angle", [-0.01, 1.01])
def test_a_vector_just_outside_its_two_places_is_refused(angle):
    vector = 3.0 * complex(math.cos(angle), math.sin(angle))
    with pytest.raises(OutOfRangeError, match="unbalance"):
        split_between_places(unbalance=vector, first_angle=0.0, second_angle=1.0)


@pytest.mark.parametrize("number", [nusselt_horizontal_cylinder, nusselt_vertical_face])
def test_the_greatest_rayleigh_number_is_still_taken(number):
    assert number(rayleigh=1e12, prandtl=0.7) > 100.0
    assert number(rayleigh=0.0, prandtl=0.7) == pytest.approx({
        nusselt_horizontal_cylinder: 0.6**2, nusselt_vertical_face: 0.825**2}[number])  # fmt: skip
    with pytest.raises(OutOfRangeError, match="rayleigh"):
        number(rayleigh=1.05e12, prandtl=0.7)


def test_a_ring_without_thickness_is_no_part():
    with pytest.raises(OutOfRangeError, match="outer_diameter"):
        HotPart(bore_diameter=0.1, outer_diameter=0.1, length=0.1, density=7850.0,
                specific_heat=520.0, conductivity=40.0)  # fmt: skip


def cooled(start, times):
    return cooling_in_air(
        part=COLLAR, start_temperature=start, times=times, air_temperature=20.0, emissivity=0.5,
        draught=1.5,
    )  # fmt: skip


@pytest.mark.parametrize("start", [250.0, -10.0, 20.5])
def test_a_part_comes_to_the_room_as_an_adaptive_integration_of_its_loss_says(start):
    # Second path for the steps in time; the loss itself is tested on its own.
    def rate(_time, state):
        loss = heat_loss_in_air(part=COLLAR, temperature=float(state[0]), air_temperature=20.0,
                                emissivity=0.5, draught=1.5)  # fmt: skip
        return [-loss / COLLAR.heat_capacity]

    times = [0.0, 300.0, 300.0, 5000.0, 40_000.0]
    solved = integrate.solve_ivp(
        rate, (0.0, times[-1]), [start], t_eval=[0.0, 300.0, 5000.0, 40_000.0], rtol=1e-10,
        atol=1e-10,
    ).y[0]  # fmt: skip
    expected = [solved[0], solved[1], solved[1], solved[2], solved[3]]
    assert cooled(start, times) == pytest.approx(expected, abs=1e-4)


@pytest.mark.parametrize("times", [[-0.5, 1.0], [0.0, 5.0, 4.5]])
def test_times_that_go_back_are_refused(times):
    with pytest.raises(OutOfRangeError, match="times"):
        cooled(200.0, times)


def lasting(conductivity):
    part = HotPart(bore_diameter=0.100, outer_diameter=0.250, length=0.040, density=7850.0,
                   specific_heat=520.0, conductivity=conductivity)  # fmt: skip
    return time_in_air(
        part=part, start_temperature=220.0, end_temperature=120.0, air_temperature=20.0
    )


def test_the_way_out_of_the_metal_adds_the_time_its_resistance_takes():
    # By hand: C·R·ln(200/100) with R = (V/A)/(3·k·A), since the same heat passes both in line.
    area = COLLAR.outer_area + COLLAR.face_area
    resistance = COLLAR.volume / area / (3.0 * 2.0 * area)
    added = COLLAR.heat_capacity * resistance * math.log(2.0)

    assert lasting(2.0).greatest - lasting(1e9).greatest == pytest.approx(added, rel=1e-4)


def test_the_range_is_that_of_bright_to_rusty_steel_and_still_to_moving_air():
    # Machined bright 0.2, rusty 0.9; forced air takes up to four times as much: common practice.
    told = time_in_air(part=COLLAR, start_temperature=220.0, end_temperature=120.0,
                       air_temperature=20.0, least_emissivity=0.2, greatest_emissivity=0.9,
                       greatest_draught=4.0)  # fmt: skip
    usual = lasting(40.0)

    assert (usual.least, usual.greatest) == (told.least, told.greatest)


def test_positions_that_are_no_row_are_refused():
    with pytest.raises(OutOfRangeError, match="positions"):
        journal_datum(
            positions=[[0.0, 1.0, 2.0]], vectors=[0j, 1j, 0j], first_journal=0, second_journal=2
        )


@pytest.mark.parametrize("angles", [[[0.0, 1.0], [2.0, 3.0]], [0.0, math.nan, 2.0]])
def test_angles_that_are_no_row_of_numbers_are_refused(angles):
    with pytest.raises(OutOfRangeError, match="angles"):
        Circle.checked(angles)


@pytest.mark.parametrize(
    ("angles", "distinct"),
    [
        ([0.0, 2.0 * math.pi], 1),
        ([0.0, 1.0, 2.0 * math.pi - 1e-7], 2),
        ([0.0, 1.0, 2.0 * math.pi - 0.01], 3),
        ([0.5, 0.5 + 1e-7, 0.6], 2),
        ([3.0, 1.0, 3.0, 1.0], 2),
        ([0.3], 1),
    ],
)
def test_marks_that_meet_again_after_a_turn_count_once(angles, distinct):
    assert Circle.distinct(tuple(angles)) == distinct
