import math

import pytest
from hypothesis import assume, given
from hypothesis import strategies as st

from models.engineering.errors import OutOfRangeError
from models.engineering.fits import (
    SMOOTHING_FACTORS,
    contact_pressure,
    fit_at_temperature,
    smoothing_loss,
)
from tests.published.fits import PRESSURES, joint
from tests.published.printed import printed
from tests.second_paths.ring import Ring, press_together

joints = st.fixed_dictionaries(
    {
        "interference": st.floats(1e-6, 5e-4),
        "interface_diameter": st.floats(0.05, 0.4),
        "hub_modulus": st.floats(60e9, 220e9),
        "shaft_modulus": st.floats(60e9, 220e9),
        "hub_poisson": st.floats(0.0, 0.45),
        "shaft_poisson": st.floats(0.0, 0.45),
    }
).flatmap(
    lambda rest: st.builds(
        lambda hub, shaft: {
            **rest,
            "hub_outer_diameter": rest["interface_diameter"] * hub,
            "shaft_bore_diameter": rest["interface_diameter"] * shaft,
        },
        hub=st.floats(1.05, 5.0),
        shaft=st.sampled_from([0.0, 0.1, 0.3, 0.6, 0.9]),
    )
)


@pytest.mark.parametrize("row", PRESSURES, ids=lambda row: row.case)
def test_the_pressure_is_the_one_printed(row):
    assert contact_pressure(**row.joint) == printed(row.printed, row.si_per_unit), row.source


CAST_IRON_DISC = joint(0.064754, 100.0, 250.0, bore=50.0, hub=(70e9, 0.25), shaft=(210e9, 0.3))
ALUMINIUM_DISC = joint(0.2, 500.0, 800.0, hub=(70e9, 0.34), shaft=(208e9, 0.33))


@pytest.mark.parametrize(
    "inputs",
    [
        CAST_IRON_DISC,
        ALUMINIUM_DISC,
        joint(0.225, 150.0, 250.0),
        *[joint(0.225, 150.0, 250.0, bore=bore) for bore in (30.0, 50.0, 75.0, 100.0, 140.0)],
        joint(0.05, 100.0, 102.0),
        joint(0.15, 120.0, 150.0, hub=(114e9, 0.33), shaft=(205e9, 0.29)),
    ],
    ids=lambda inputs: "-".join(
        f"{1e3 * inputs[name]:.0f}"
        for name in ("shaft_bore_diameter", "interface_diameter", "hub_outer_diameter")
    ),
)
def test_rings_of_finite_elements_press_alike(inputs):
    solved = press_together(
        shaft=Ring(
            inputs["shaft_bore_diameter"] / 2.0,
            inputs["interface_diameter"] / 2.0,
            inputs["shaft_modulus"],
            inputs["shaft_poisson"],
        ),
        hub=Ring(
            inputs["interface_diameter"] / 2.0,
            inputs["hub_outer_diameter"] / 2.0,
            inputs["hub_modulus"],
            inputs["hub_poisson"],
        ),
        radial_interference=inputs["interference"] / 2.0,
    )
    assert contact_pressure(**inputs) == pytest.approx(solved.pressure, rel=1e-6)


@given(joints)
def test_one_material_makes_poisson_s_ratio_drop_out(inputs):
    alike = {
        **inputs,
        "shaft_modulus": inputs["hub_modulus"],
        "shaft_poisson": inputs["hub_poisson"],
    }
    other = {**alike, "hub_poisson": 0.0, "shaft_poisson": 0.0}
    assert contact_pressure(**alike) == pytest.approx(contact_pressure(**other), rel=1e-9)
    # Shigley's closed form for one material, in its own arrangement.
    d, outer, bore = (
        alike[name] for name in ("interface_diameter", "hub_outer_diameter", "shaft_bore_diameter")
    )
    closed = (
        alike["hub_modulus"]
        * alike["interference"]
        / (2.0 * d**3)
        * ((outer**2 - d**2) * (d**2 - bore**2) / (outer**2 - bore**2))
    )
    assert contact_pressure(**alike) == pytest.approx(closed, rel=1e-9)


@given(joints, st.floats(0.1, 10.0))
def test_pressure_is_proportional_to_interference_and_blind_to_scale(inputs, factor):
    pressure = contact_pressure(**inputs)
    more = {**inputs, "interference": factor * inputs["interference"]}
    assert contact_pressure(**more) == pytest.approx(factor * pressure, rel=1e-9)
    lengths = ("interference", "interface_diameter", "hub_outer_diameter", "shaft_bore_diameter")
    scaled = {**inputs, **{name: factor * inputs[name] for name in lengths}}
    assert contact_pressure(**scaled) == pytest.approx(pressure, rel=1e-9)


@given(joints)
def test_a_hollow_shaft_and_a_thin_hub_grip_less(inputs):
    assume(inputs["shaft_bore_diameter"] > 0.0)
    solid = {**inputs, "shaft_bore_diameter": 0.0}
    thick = {**inputs, "hub_outer_diameter": 1.5 * inputs["hub_outer_diameter"]}
    pressure = contact_pressure(**inputs)
    assert pressure < contact_pressure(**solid)
    assert pressure < contact_pressure(**thick)


def test_a_thin_ring_on_a_rigid_shaft_is_a_hoop():
    # By hand: a hoop of thickness t under strain e presses with E·e·t/R, to the order t/R.
    inputs = joint(0.1, 100.0, 100.1, hub=(207e9, 0.3), shaft=(207e18, 0.3))
    assert contact_pressure(**inputs) == pytest.approx(207e9 * 1e-3 * 0.05 / 50.0, rel=2e-3)


@pytest.mark.parametrize(
    ("field", "value"),
    [
        ("interface_diameter", 0.0),
        ("interface_diameter", math.nan),
        ("shaft_bore_diameter", -0.01),
        ("hub_outer_diameter", 0.1),
        ("hub_outer_diameter", math.inf),
        ("interference", math.nan),
        ("hub_modulus", 0.0),
        ("shaft_modulus", -1.0),
        ("hub_poisson", 0.6),
        ("shaft_poisson", -0.1),
    ],
)
def test_a_joint_that_cannot_be_is_refused_by_name(field, value):
    with pytest.raises(OutOfRangeError, match=field):
        contact_pressure(**{**joint(0.1, 100.0, 160.0), field: value})


def test_a_bore_larger_than_the_joint_is_refused():
    with pytest.raises(OutOfRangeError, match="shaft_bore_diameter"):
        contact_pressure(**joint(0.1, 100.0, 160.0, bore=100.0))


@pytest.mark.parametrize(
    ("edition", "ra", "loss"),
    # By hand: Rz is six times Ra, both surfaces alike.
    [("2001", 0.4, "3.84"), ("2001", 0.8, "7.68"), ("2001", 1.6, "15.36"), ("2017", 1.6, "7.68")],
)
def test_smoothing_takes_the_share_of_its_edition(edition, ra, loss):
    factor = next(value for name, value in SMOOTHING_FACTORS.items() if edition in name)
    found = smoothing_loss(
        factor=factor, bore_roughness=6.0 * ra * 1e-6, seat_roughness=6.0 * ra * 1e-6
    )
    assert found == printed(loss, 1e-6)


@given(st.floats(0.0, 1.0), st.floats(0.0, 1e-4), st.floats(0.0, 1e-4))
def test_it_does_not_matter_which_surface_is_the_rougher(factor, one, other):
    assert smoothing_loss(
        factor=factor, bore_roughness=one, seat_roughness=other
    ) == smoothing_loss(factor=factor, bore_roughness=other, seat_roughness=one)


@pytest.mark.parametrize("field", ["factor", "bore_roughness", "seat_roughness"])
def test_a_negative_roughness_is_refused_by_name(field):
    good = {"factor": 0.8, "bore_roughness": 5e-6, "seat_roughness": 5e-6}
    with pytest.raises(OutOfRangeError, match=field):
        smoothing_loss(**{**good, field: -1e-6})


@pytest.mark.parametrize(
    ("ratio", "kelvin"), [(0.0005, "41"), (0.001, "81"), (0.0015, "122"), (0.002, "163")]
)
def test_a_hub_loses_its_fit_at_the_temperature_difference_by_hand(ratio, kelvin):
    # By hand: e over 12.3e-6 1/K.
    def left(hub_temperature):
        return fit_at_temperature(
            interference=ratio * 0.15,
            interface_diameter=0.15,
            shaft_temperature=20.0,
            shaft_expansion=12.3e-6,
            hub_temperature=hub_temperature,
            hub_expansion=12.3e-6,
        )

    assert left(20.0) / (left(20.0) - left(21.0)) == printed(kelvin)


@pytest.mark.parametrize(
    ("sleeve", "shaft", "kelvin", "change"),
    # By hand: difference of the mean coefficients times the rise; negative where the fit loosens.
    [
        (24.3e-6, 12.7e-6, 180.0, "-0.00209"),
        (16.5e-6, 12.7e-6, 180.0, "-0.00068"),
        (10.9e-6, 12.7e-6, 180.0, "0.00032"),
        # Alloy 718 and titanium on 4340, and aluminium 6061 on steel over 100 K.
        (13.5e-6, 12.7e-6, 180.0, "-0.00014"),
        (8.9e-6, 12.7e-6, 180.0, "0.00068"),
        (23.6e-6, 12.3e-6, 100.0, "-0.00113"),
    ],
)
def test_a_warm_rotor_of_two_metals_loosens_or_tightens(sleeve, shaft, kelvin, change):
    left = fit_at_temperature(
        interference=0.001,
        interface_diameter=1.0,
        shaft_temperature=20.0 + kelvin,
        shaft_expansion=shaft,
        hub_temperature=20.0 + kelvin,
        hub_expansion=sleeve,
    )
    assert left - 0.001 == printed(change)


@given(st.floats(-1e-3, 1e-3), st.floats(0.01, 1.0), st.floats(-40.0, 400.0), st.floats(5e-6, 3e-5))
def test_one_metal_at_one_temperature_keeps_its_fit(interference, diameter, temperature, expansion):
    left = fit_at_temperature(
        interference=interference,
        interface_diameter=diameter,
        shaft_temperature=temperature,
        shaft_expansion=expansion,
        hub_temperature=temperature,
        hub_expansion=expansion,
    )
    assert left == pytest.approx(interference, abs=1e-15)


def test_rings_of_finite_elements_tell_the_same_of_a_hub_warm_at_its_bore():
    # Second path: 300 K at the bore falling straight to 100 K at the rim; the pressure is that of
    # the area-weighted mean rise, 182.05 K by hand.
    alpha, low, high = 12e-6, 0.075, 0.25

    def strain(radius):
        return alpha * (300.0 - 200.0 * (radius - low) / (high - low))

    solved = press_together(
        shaft=Ring(0.0, low, 207e9, 0.3),
        hub=Ring(low, high, 207e9, 0.3, free_strain=strain),
        radial_interference=0.3e-3,
    )
    left = fit_at_temperature(
        interference=0.6e-3,
        interface_diameter=2.0 * low,
        shaft_temperature=20.0,
        shaft_expansion=alpha,
        hub_temperature=20.0 + 182.0513,
        hub_expansion=alpha,
    )
    pressure = contact_pressure(**{**joint(0.0, 150.0, 500.0), "interference": left})
    assert pressure == pytest.approx(solved.pressure, rel=1e-5)


@pytest.mark.parametrize(
    "field", ["interference", "interface_diameter", "shaft_temperature", "hub_expansion"]
)
def test_a_warm_fit_that_cannot_be_is_refused_by_name(field):
    good = {
        "interference": 1e-4,
        "interface_diameter": 0.1,
        "shaft_temperature": 20.0,
        "shaft_expansion": 12e-6,
        "hub_temperature": 20.0,
        "hub_expansion": 12e-6,
    }
    with pytest.raises(OutOfRangeError, match=field):
        fit_at_temperature(**{**good, field: math.nan})
