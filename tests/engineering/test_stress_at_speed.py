"""Stress of a turning fit: printed values, rings of finite elements, limits."""

import math

import pytest
from hypothesis import assume, given
from hypothesis import strategies as st

from models.engineering.disc_growth import annulus_bore_stress
from models.engineering.errors import OutOfRangeError
from models.engineering.fit_stress import shaft_stresses
from models.engineering.rotation import pressure_at_speed, release_speed
from models.engineering.stress_at_speed import hub_bore_stress_at_speed, shaft_stress_at_speed
from tests.engineering.test_rotation import JOINTS, solved_by_elements
from tests.published.printed import printed
from tests.published.rotation import GROWTHS

POSTED = next(row for row in GROWTHS if row.quantity == "annulus_bore_stress")


def hub(joint, turning, **more):
    facts = {
        "pressure": pressure_at_speed(joint=joint, speed=turning),
        "interface_diameter": joint.interface_diameter,
        "hub_outer_diameter": joint.hub_outer_diameter,
        "spinning_outer_diameter": joint.hub_outer_diameter,
        "poisson": joint.hub_poisson,
        "density": joint.hub_density,
        "speed": turning,
    }
    return hub_bore_stress_at_speed(**(facts | more))


def shaft(joint, turning, **more):
    facts = {
        "pressure": pressure_at_speed(joint=joint, speed=turning),
        "interface_diameter": joint.interface_diameter,
        "shaft_bore_diameter": joint.shaft_bore_diameter,
        "poisson": joint.shaft_poisson,
        "density": joint.shaft_density,
        "speed": turning,
    }
    return shaft_stress_at_speed(**(facts | more))


def test_a_disc_that_has_just_let_go_carries_the_printed_hoop_stress():
    inputs = POSTED.inputs
    found = hub_bore_stress_at_speed(
        pressure=0.0,
        interface_diameter=inputs["bore_diameter"],
        hub_outer_diameter=inputs["outer_diameter"],
        spinning_outer_diameter=inputs["outer_diameter"],
        poisson=inputs["poisson"],
        density=inputs["density"],
        speed=inputs["speed"],
    )

    assert found.hoop == printed(POSTED.printed, POSTED.si_per_unit), POSTED.source
    assert found.von_mises == found.hoop


@pytest.mark.parametrize("joint", JOINTS)
@pytest.mark.parametrize("share", [0.0, 0.5, 0.9])
def test_turning_rings_of_finite_elements_carry_the_same(joint, share):
    speed = share * release_speed(joint=joint)
    solved = solved_by_elements(joint, speed, elements=120)

    of_hub, of_shaft = hub(joint, speed), shaft(joint, speed)

    scale = abs(solved.hub_bore_hoop)
    assert of_hub.hoop == pytest.approx(solved.hub_bore_hoop, abs=2e-4 * scale)
    assert of_hub.radial == pytest.approx(solved.hub_bore_radial, abs=2e-3 * scale)
    assert of_shaft.seat.hoop == pytest.approx(solved.shaft_seat_hoop, abs=2e-4 * scale)
    assert of_shaft.inside.hoop == pytest.approx(solved.shaft_bore_hoop, abs=2e-4 * scale)


@pytest.mark.parametrize("bore", [0.0, 0.06])
def test_at_rest_the_shaft_is_stressed_as_a_still_one(bore):
    facts = {"pressure": 90e6, "interface_diameter": 0.1, "shaft_bore_diameter": bore}
    still = shaft_stresses(**facts)

    found = shaft_stress_at_speed(**facts, poisson=0.3, density=7850.0, speed=0.0)

    assert found.seat == still.seat
    assert found.inside.hoop == (still.bore or still.seat).hoop


def test_the_axis_of_a_solid_shaft_has_half_the_stress_of_a_pin_hole():
    # Timoshenko and Goodier, from memory: a small hole doubles the stress of a turning disc.
    facts = {"pressure": 0.0, "interface_diameter": 0.2, "poisson": 0.3, "density": 7850.0,
             "speed": 900.0}  # fmt: skip
    solid = shaft_stress_at_speed(**facts, shaft_bore_diameter=0.0)
    hole = shaft_stress_at_speed(**facts, shaft_bore_diameter=1e-9)

    assert hole.inside.hoop == pytest.approx(2.0 * solid.inside.hoop)


@given(st.floats(0.0, 2000.0), st.floats(0.05, 0.4), st.floats(1.05, 5.0), st.floats(0.0, 0.45))
def test_rotation_never_relieves_a_hub_of_one_material_on_a_solid_shaft(speed, bore, width, nu):
    pressed, density = 300e6, 7850.0
    loss = (3.0 + nu) * density * speed**2 * bore**2 * (width**2 - 1.0) / 32.0
    outer = bore * width
    facts = {"interface_diameter": bore, "hub_outer_diameter": outer,
             "spinning_outer_diameter": outer, "poisson": nu, "density": density}  # fmt: skip
    still = hub_bore_stress_at_speed(**facts, pressure=pressed, speed=0.0)
    assume(loss < pressed)
    turning = hub_bore_stress_at_speed(**facts, pressure=pressed - loss, speed=speed)

    assert turning.hoop >= still.hoop - 1.0


def test_a_wider_disc_pulls_at_the_bore_by_its_own_width():
    hub_alone = annulus_bore_stress(
        bore_diameter=0.15, outer_diameter=0.25, poisson=0.3, density=7850.0, speed=800.0
    )
    whole = annulus_bore_stress(
        bore_diameter=0.15, outer_diameter=0.5, poisson=0.3, density=7850.0, speed=800.0
    )
    facts = {"pressure": 50e6, "interface_diameter": 0.15, "hub_outer_diameter": 0.25,
             "poisson": 0.3, "density": 7850.0, "speed": 800.0}  # fmt: skip

    wide = hub_bore_stress_at_speed(**facts, spinning_outer_diameter=0.5)
    narrow = hub_bore_stress_at_speed(**facts, spinning_outer_diameter=0.25)

    assert wide.hoop - narrow.hoop == pytest.approx(whole - hub_alone)


@pytest.mark.parametrize("change", [
    {"pressure": -1.0}, {"speed": -1.0}, {"density": 0.0}, {"shaft_bore_diameter": 0.15},
    {"interface_diameter": math.nan},
])  # fmt: skip
def test_numbers_that_cannot_be_are_refused(change):
    with pytest.raises(OutOfRangeError):
        shaft(JOINTS[0], 100.0, **change)
