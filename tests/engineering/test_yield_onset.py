"""Onset of yield by the modified criterion of greatest shear, against the two others."""

import math

import pytest
from hypothesis import given
from hypothesis import strategies as st

from models.engineering.errors import OutOfRangeError
from models.engineering.fit_stress import hub_stresses, shaft_stresses
from models.engineering.yield_onset import hub_pressure_at_yield, shaft_pressure_at_yield
from tests.published.printed import printed

strengths, diameters = st.floats(100e6, 1500e6), st.floats(0.02, 0.5)


@pytest.mark.parametrize(("ratio", "text"), [(0.5, "0.43301"), (0.6, "0.36950"), (0.8, "0.20785")])
def test_a_hub_yields_where_the_standard_s_form_says(ratio, text):
    # DIN 7190, from memory: (1 − q²)/√3 of the yield strength, by hand.
    found = hub_pressure_at_yield(
        yield_strength=1.0, interface_diameter=ratio, hub_outer_diameter=1.0
    )
    assert found == printed(text)


@pytest.mark.parametrize(("bore", "text"), [(0.0, "1.15470"), (0.5, "0.43301"), (0.9, "0.10970")])
def test_a_shaft_yields_where_the_standard_s_form_says(bore, text):
    # DIN 7190, from memory: 2/√3 solid, (1 − q²)/√3 hollow, by hand.
    found = shaft_pressure_at_yield(
        yield_strength=1.0, interface_diameter=1.0, shaft_bore_diameter=bore
    )
    assert found == printed(text)


@given(strengths, diameters, st.floats(1.01, 20.0))
def test_a_hub_s_limit_is_two_over_root_three_of_greatest_shear(strength, bore, width):
    pressure = hub_pressure_at_yield(
        yield_strength=strength, interface_diameter=bore, hub_outer_diameter=bore * width
    )
    stress = hub_stresses(
        pressure=pressure, interface_diameter=bore, hub_outer_diameter=bore * width
    ).bore

    assert stress.tresca == pytest.approx(2.0 / math.sqrt(3.0) * strength)
    assert stress.von_mises >= strength * (1.0 - 1e-12)


@given(strengths, diameters, st.floats(0.0, 0.95))
def test_a_shaft_s_limit_is_two_over_root_three_of_greatest_shear(strength, seat, share):
    pressure = shaft_pressure_at_yield(
        yield_strength=strength, interface_diameter=seat, shaft_bore_diameter=seat * share
    )
    stress = shaft_stresses(
        pressure=pressure, interface_diameter=seat, shaft_bore_diameter=seat * share
    )

    assert (stress.bore or stress.seat).tresca == pytest.approx(2.0 / math.sqrt(3.0) * strength)


@pytest.mark.parametrize(("function", "facts"), [
    (hub_pressure_at_yield, {"yield_strength": 0.0}),
    (hub_pressure_at_yield, {"hub_outer_diameter": 0.1}),
    (hub_pressure_at_yield, {"interface_diameter": 0.0}),
    (shaft_pressure_at_yield, {"yield_strength": -1.0}),
    (shaft_pressure_at_yield, {"shaft_bore_diameter": 0.1}),
    (shaft_pressure_at_yield, {"shaft_bore_diameter": -0.1}),
])  # fmt: skip
def test_numbers_that_cannot_be_are_refused(function, facts):
    other = "hub_outer_diameter" if function is hub_pressure_at_yield else "shaft_bore_diameter"
    good = {"yield_strength": 500e6, "interface_diameter": 0.1,
            other: 0.2 if function is hub_pressure_at_yield else 0.0}  # fmt: skip
    function(**good)
    with pytest.raises(OutOfRangeError):
        function(**good | facts)
