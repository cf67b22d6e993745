"""Pressure from the growth of a hub's outside, against rings of finite elements."""

import pytest
from hypothesis import given
from hypothesis import strategies as st

from models.engineering.errors import OutOfRangeError
from models.engineering.hub_growth import pressure_from_outer_growth
from tests.published.printed import printed
from tests.second_paths.ring import Ring, press_together

GOOD = {"growth": 60e-6, "interface_diameter": 0.1, "hub_outer_diameter": 0.2, "modulus": 200e9}


@pytest.mark.parametrize(("diameter", "outer", "pressure"), [
    # Contact pressures of hydraulic fits: 100/160 and 150/250 mm at two in a thousand, by hand from
    # p = E·e/2·(1 − d²/D²) with E = 207 GPa: 126.14 and 132.48 MPa.
    (0.100, 0.160, "126.14"), (0.150, 0.250, "132.48"),
])  # fmt: skip
def test_the_growth_of_a_pressed_ring_tells_its_pressure(diameter, outer, pressure):
    solved = press_together(
        shaft=Ring(0.0, diameter / 2.0, 207e9, 0.29, elements=120),
        hub=Ring(diameter / 2.0, outer / 2.0, 207e9, 0.29, elements=120),
        radial_interference=0.001 * diameter,
    )
    # The outside bears hoop stress alone, so its strain is that over the modulus.
    growth = outer * solved.hub_outside_hoop / 207e9

    found = pressure_from_outer_growth(
        growth=growth, interface_diameter=diameter, hub_outer_diameter=outer, modulus=207e9
    )

    assert found == printed(pressure, 1e6)
    assert found == pytest.approx(solved.pressure, rel=2e-4)


@given(st.floats(0.0, 1e-3), st.floats(0.1, 10.0))
def test_pressure_is_proportional_to_growth_and_the_same_at_any_scale(growth, scale):
    once = pressure_from_outer_growth(**GOOD | {"growth": growth})
    scaled = pressure_from_outer_growth(
        growth=growth * scale,
        interface_diameter=0.1 * scale,
        hub_outer_diameter=0.2 * scale,
        modulus=200e9,
    )
    assert scaled == pytest.approx(once)
    assert pressure_from_outer_growth(**GOOD | {"growth": 2.0 * growth}) == pytest.approx(2 * once)


@pytest.mark.parametrize("change", [
    {"growth": -1e-6}, {"interface_diameter": 0.0}, {"hub_outer_diameter": 0.1}, {"modulus": 0.0},
])  # fmt: skip
def test_numbers_that_cannot_be_are_refused(change):
    with pytest.raises(OutOfRangeError):
        pressure_from_outer_growth(**GOOD | change)
