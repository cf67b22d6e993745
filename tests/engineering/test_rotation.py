import math
from dataclasses import replace

import pytest
from hypothesis import assume, given
from hypothesis import strategies as st
from scipy import optimize

from models.engineering import disc_growth
from models.engineering.disc_growth import (
    annulus_bore_growth,
    annulus_bore_stress,
    shaft_surface_growth,
)
from models.engineering.errors import OutOfRangeError
from models.engineering.fits import contact_pressure
from models.engineering.rotation import (
    Joint,
    growth_at_speed,
    interference_at_speed,
    pressure_at_speed,
    release_speed,
    release_speed_from_growth,
)
from tests.published.printed import printed
from tests.published.rotation import GROWTHS, RPM, TIP_SPEEDS
from tests.second_paths.ring import Ring, press_together

STEEL = Joint(
    interference=0.225e-3,
    interface_diameter=0.150,
    hub_outer_diameter=0.500,
    shaft_bore_diameter=0.0,
    hub_modulus=205e9,
    shaft_modulus=205e9,
    hub_poisson=0.3,
    shaft_poisson=0.3,
    hub_density=7850.0,
    shaft_density=7850.0,
)
HOLLOW = replace(STEEL, shaft_bore_diameter=0.080)
TITANIUM_ON_STEEL = replace(
    HOLLOW, hub_modulus=114e9, hub_poisson=0.33, hub_density=4430.0, hub_outer_diameter=0.400
)
ALUMINIUM_ON_STEEL = replace(
    STEEL, hub_modulus=70e9, hub_poisson=0.33, hub_density=2700.0, interference=0.3e-3
)
JOINTS = [STEEL, HOLLOW, TITANIUM_ON_STEEL, ALUMINIUM_ON_STEEL]

one_material = st.builds(
    lambda diameter, width, ratio, modulus, poisson, density: Joint(
        interference=ratio * diameter,
        interface_diameter=diameter,
        hub_outer_diameter=diameter * width,
        shaft_bore_diameter=0.0,
        hub_modulus=modulus,
        shaft_modulus=modulus,
        hub_poisson=poisson,
        shaft_poisson=poisson,
        hub_density=density,
        shaft_density=density,
    ),
    diameter=st.floats(0.05, 0.4),
    width=st.floats(1.1, 5.0),
    ratio=st.floats(1e-4, 3e-3),
    modulus=st.floats(60e9, 220e9),
    poisson=st.floats(0.0, 0.4),
    density=st.floats(2000.0, 9000.0),
)


def solved_by_elements(joint, speed, elements=60):
    radius = joint.interface_diameter / 2.0
    return press_together(
        shaft=Ring(
            joint.shaft_bore_diameter / 2.0,
            radius,
            joint.shaft_modulus,
            joint.shaft_poisson,
            joint.shaft_density,
            elements=elements,
        ),
        hub=Ring(
            radius,
            joint.hub_outer_diameter / 2.0,
            joint.hub_modulus,
            joint.hub_poisson,
            joint.hub_density,
            elements=elements,
        ),
        radial_interference=joint.interference / 2.0,
        speed=speed,
    )


@pytest.mark.parametrize("row", GROWTHS, ids=lambda row: row.case)
def test_growth_and_stress_are_those_printed(row):
    found = getattr(disc_growth, row.quantity)(**row.inputs)
    assert found == printed(row.printed, row.si_per_unit), row.source


@pytest.mark.parametrize("row", TIP_SPEEDS, ids=lambda row: row.case)
@pytest.mark.parametrize("width", [1.5, 3.0, 6.0])
def test_the_rim_s_speed_at_release_depends_on_the_ratio_alone(row, width):
    joint = replace(STEEL, interference=row.ratio * 0.150, hub_outer_diameter=width * 0.150)
    rim = release_speed(joint=joint) * joint.hub_outer_diameter / 2.0
    assert rim == printed(row.printed), row.source


def test_the_posted_disc_has_its_hoop_stress_at_rest():
    # Posted problem with answers: no pressure at 6900 rpm, then 109.2 MPa of hoop stress at rest,
    # which is the pressure at rest times (25 + 1)/(25 - 1). Density from memory.
    disc = replace(
        STEEL,
        interface_diameter=0.1,
        hub_modulus=200e9,
        shaft_modulus=200e9,
        hub_density=7800.0,
        shaft_density=7800.0,
    )
    loss = disc.interference - interference_at_speed(joint=disc, speed=6900.0 * RPM)
    at_rest = pressure_at_speed(joint=replace(disc, interference=loss), speed=0.0)
    assert at_rest * 26.0 / 24.0 == printed("109.2", 1e6)


@pytest.mark.parametrize("joint", JOINTS)
@pytest.mark.parametrize("share", [0.0, 0.5, 0.9])
def test_rings_of_finite_elements_keep_the_same_pressure_at_speed(joint, share):
    speed = share * release_speed(joint=joint)
    solved = solved_by_elements(joint, speed)
    at_rest = pressure_at_speed(joint=joint, speed=0.0)
    found = pressure_at_speed(joint=joint, speed=speed)
    assert found == pytest.approx(solved.pressure, abs=1e-6 * at_rest)


@pytest.mark.parametrize("joint", JOINTS)
def test_rings_of_finite_elements_let_go_at_the_same_speed(joint):
    def pressure(speed):
        return solved_by_elements(joint, speed, elements=15).pressure

    opened = optimize.brentq(pressure, 100.0, 5000.0, xtol=1e-2)
    assert release_speed(joint=joint) == pytest.approx(opened, rel=5e-5)


@pytest.mark.parametrize("shaft_bore", [0.0, 0.040, 0.120])
def test_rings_of_finite_elements_grow_and_strain_alike(shaft_bore):
    # At the release speed hub and shaft turn as if each were alone.
    joint = replace(STEEL, shaft_bore_diameter=shaft_bore)
    speed = release_speed(joint=joint)
    solved = solved_by_elements(joint, speed)
    common = {"poisson": 0.3, "density": 7850.0, "speed": speed}
    bore = annulus_bore_growth(bore_diameter=0.15, outer_diameter=0.5, modulus=205e9, **common)
    shaft = shaft_surface_growth(
        bore_diameter=shaft_bore, outer_diameter=0.15, modulus=205e9, **common
    )
    assert bore / 2.0 == pytest.approx(solved.hub_outward, rel=1e-5)
    assert shaft / 2.0 == pytest.approx(solved.shaft_outward, rel=1e-4)
    stress = annulus_bore_stress(bore_diameter=0.15, outer_diameter=0.5, **common)
    assert stress == pytest.approx(solved.hub_bore_hoop, rel=1e-3)


@given(one_material)
def test_one_material_has_its_closed_form(joint):
    # For one material and a solid shaft: ω² = 8·p/((3 + ν)·ρ·(D² - d²)/4).
    at_rest = pressure_at_speed(joint=joint, speed=0.0)
    square = joint.hub_outer_diameter**2 - joint.interface_diameter**2
    closed = math.sqrt(
        8.0 * at_rest / ((3.0 + joint.hub_poisson) * joint.hub_density * square / 4.0)
    )
    assert release_speed(joint=joint) == pytest.approx(closed, rel=1e-9)


@given(st.sampled_from(JOINTS), st.floats(0.0, 1.5))
def test_pressure_falls_with_the_square_of_the_speed_to_nothing(joint, share):
    speed = share * release_speed(joint=joint)
    at_rest = pressure_at_speed(joint=joint, speed=0.0)
    expected = max(0.0, at_rest * (1.0 - share**2))
    assert pressure_at_speed(joint=joint, speed=speed) == pytest.approx(
        expected, abs=1e-9 * at_rest
    )


def test_at_rest_nothing_is_lost():
    assert interference_at_speed(joint=STEEL, speed=0.0) == STEEL.interference
    assert pressure_at_speed(joint=STEEL, speed=0.0) == contact_pressure(
        interference=0.225e-3,
        interface_diameter=0.150,
        hub_outer_diameter=0.500,
        shaft_bore_diameter=0.0,
        hub_modulus=205e9,
        shaft_modulus=205e9,
        hub_poisson=0.3,
        shaft_poisson=0.3,
    )


def test_a_light_sleeve_on_a_heavy_hollow_shaft_tightens_and_never_lets_go():
    sleeve = replace(
        STEEL,
        hub_outer_diameter=0.151,
        shaft_bore_diameter=0.140,
        hub_density=1600.0,
    )
    assert release_speed(joint=sleeve) == math.inf
    assert interference_at_speed(joint=sleeve, speed=1000.0) > sleeve.interference


@pytest.mark.parametrize("interference", [0.0, -1e-5])
def test_a_fit_that_does_not_grip_at_rest_has_let_go_already(interference):
    assert release_speed(joint=replace(STEEL, interference=interference)) == 0.0
    assert (
        release_speed_from_growth(interference=interference, growth=1e-4, growth_speed=800.0) == 0.0
    )


@given(st.floats(1e-5, 1e-3), st.floats(1e-6, 1e-3), st.floats(100.0, 2000.0))
def test_the_designer_s_growth_at_its_release_speed_is_the_interference(fit, growth, speed):
    release = release_speed_from_growth(interference=fit, growth=growth, growth_speed=speed)
    lost = growth_at_speed(growth=growth, growth_speed=speed, speed=release)
    assert lost == pytest.approx(fit, rel=1e-9)
    assert growth_at_speed(growth=growth, growth_speed=speed, speed=speed) == growth


@given(one_material, st.floats(100.0, 2000.0))
def test_a_uniform_disc_s_growth_given_as_the_designer_s_releases_alike(joint, speed):
    growth = joint.interference - interference_at_speed(joint=joint, speed=speed)
    assume(growth > 1e-9)
    found = release_speed_from_growth(
        interference=joint.interference, growth=growth, growth_speed=speed
    )
    assert found == pytest.approx(release_speed(joint=joint), rel=1e-6)


GOOD = {
    "bore_diameter": 0.1,
    "outer_diameter": 0.2,
    "modulus": 2e11,
    "poisson": 0.3,
    "density": 7850.0,
    "speed": 1.0,
}


@pytest.mark.parametrize(
    ("field", "value"),
    [
        ("bore_diameter", -0.1),
        ("outer_diameter", 0.1),
        ("outer_diameter", math.nan),
        ("modulus", 0.0),
        ("poisson", 0.51),
        ("density", 0.0),
        ("speed", -1.0),
    ],
)
def test_a_disc_that_cannot_be_is_refused_by_name(field, value):
    for function in (annulus_bore_growth, shaft_surface_growth):
        with pytest.raises(OutOfRangeError, match=field):
            function(**{**GOOD, field: value})
    if field != "modulus":
        inputs = {name: number for name, number in GOOD.items() if name != "modulus"}
        with pytest.raises(OutOfRangeError, match=field):
            annulus_bore_stress(**{**inputs, field: value})


def test_a_ring_without_a_bore_is_refused():
    with pytest.raises(OutOfRangeError, match="bore_diameter"):
        annulus_bore_growth(**{**GOOD, "bore_diameter": 0.0})


@pytest.mark.parametrize(
    ("field", "value"),
    [
        ("interference", math.nan),
        ("interface_diameter", 0.6),
        ("shaft_bore_diameter", 0.150),
    ],
)
def test_a_joint_that_cannot_be_is_refused_at_speed(field, value):
    joint = replace(STEEL, **{field: value})
    with pytest.raises(OutOfRangeError):
        release_speed(joint=joint)
    with pytest.raises(OutOfRangeError):
        interference_at_speed(joint=joint, speed=100.0)


@pytest.mark.parametrize("speed", [-1.0, math.nan])
def test_a_speed_that_cannot_be_is_refused_by_name(speed):
    with pytest.raises(OutOfRangeError, match="speed"):
        pressure_at_speed(joint=STEEL, speed=speed)
    with pytest.raises(OutOfRangeError, match="speed"):
        growth_at_speed(growth=1e-4, growth_speed=100.0, speed=speed)
    with pytest.raises(OutOfRangeError, match="growth_speed"):
        release_speed_from_growth(interference=1e-4, growth=1e-4, growth_speed=speed)
    with pytest.raises(OutOfRangeError, match="growth"):
        release_speed_from_growth(interference=1e-4, growth=0.0, growth_speed=100.0)
