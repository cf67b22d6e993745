import math

import pytest
from hypothesis import given
from hypothesis import strategies as st

from models.engineering.errors import OutOfRangeError
from models.engineering.fit_stress import (
    hub_stresses,
    shaft_stresses,
    surface_stress,
    yield_margin,
)
from models.engineering.fits import contact_pressure
from tests.published.fits import EQUIVALENT_STRESSES, HOOP_STRESSES, YIELD_RATIOS, joint
from tests.published.printed import printed
from tests.second_paths.ring import Ring, press_together

pressures = st.floats(1.0, 1e9)
ratios = st.floats(1.02, 8.0)


def hub(row):
    # Only the ratio of the diameters counts.
    return hub_stresses(
        pressure=row.pressure, interface_diameter=row.inner, hub_outer_diameter=row.outer
    )


@pytest.mark.parametrize("row", HOOP_STRESSES, ids=lambda row: row.case)
def test_the_hoop_stress_at_the_bore_is_the_one_printed(row):
    assert hub(row).bore.hoop == printed(row.printed, row.si_per_unit), row.source


@pytest.mark.parametrize("row", EQUIVALENT_STRESSES, ids=lambda row: row.case)
def test_the_von_mises_stress_at_the_bore_is_the_one_by_hand(row):
    assert hub(row).bore.von_mises == printed(row.printed, row.si_per_unit), row.source


def test_the_tresca_stress_at_the_bore_is_the_one_by_hand():
    # By hand: 2p/(1 - q²) for 22 500 psi and a hub twice as wide as its bore.
    found = hub_stresses(pressure=22500.0, interface_diameter=1.0, hub_outer_diameter=2.0)
    assert found.bore.tresca == printed("60000")


def test_a_hollow_shaft_is_stressed_most_at_its_bore():
    # By hand: -2·21.724·100²/(100² - 50²), the shaft of the cast-iron disc.
    found = shaft_stresses(pressure=21.724e6, interface_diameter=0.1, shaft_bore_diameter=0.05)
    assert found.bore.hoop == printed("-57.931", 1e6)
    assert found.bore.tresca == found.bore.von_mises == -found.bore.hoop
    assert found.bore.tresca > found.seat.tresca


@pytest.mark.parametrize("row", YIELD_RATIOS, ids=lambda row: row.case)
def test_the_bore_yields_at_the_interference_by_hand(row):
    pressure = contact_pressure(**joint(0.1, 100.0, 100.0 / row.diameter_ratio))
    bore = hub_stresses(
        pressure=pressure, interface_diameter=row.diameter_ratio, hub_outer_diameter=1.0
    ).bore
    by_von_mises = yield_margin(equivalent_stress=bore.von_mises, yield_strength=690e6)
    by_tresca = yield_margin(equivalent_stress=bore.tresca, yield_strength=690e6)
    assert 0.001 * by_von_mises == printed(row.von_mises), row.source
    assert 0.001 * by_tresca == printed(row.tresca), row.source


@pytest.mark.parametrize(("bore", "outer"), [(0.0, 250.0), (50.0, 250.0), (120.0, 180.0)])
def test_rings_of_finite_elements_are_stressed_alike(bore, outer):
    inputs = joint(0.2, 150.0, outer, bore=bore, hub=(114e9, 0.33), shaft=(205e9, 0.29))
    solved = press_together(
        shaft=Ring(bore / 2e3, 0.075, 205e9, 0.29, elements=200),
        hub=Ring(0.075, outer / 2e3, 114e9, 0.33, elements=200),
        radial_interference=0.1e-3,
    )
    pressure = contact_pressure(**inputs)
    of_hub = hub_stresses(
        pressure=pressure, interface_diameter=0.150, hub_outer_diameter=outer / 1e3
    )
    of_shaft = shaft_stresses(
        pressure=pressure, interface_diameter=0.150, shaft_bore_diameter=bore / 1e3
    )
    assert of_hub.bore.hoop == pytest.approx(solved.hub_bore_hoop, rel=1e-4)
    assert of_hub.bore.radial == pytest.approx(solved.hub_bore_radial, rel=1e-4)
    assert of_hub.outside.hoop == pytest.approx(solved.hub_outside_hoop, rel=1e-4)
    assert of_shaft.seat.hoop == pytest.approx(solved.shaft_seat_hoop, rel=1e-4)
    assert of_shaft.seat.radial == pytest.approx(solved.shaft_seat_radial, rel=1e-4)
    inside = of_shaft.bore or of_shaft.seat
    assert inside.hoop == pytest.approx(solved.shaft_bore_hoop, rel=1e-4)


@given(pressures, ratios)
def test_hoop_and_radial_stress_have_one_sum_throughout_a_ring(pressure, ratio):
    # Lamé: hoop plus radial stress does not change with the radius.
    of_hub = hub_stresses(pressure=pressure, interface_diameter=1.0, hub_outer_diameter=ratio)
    sums = [surface.hoop + surface.radial for surface in (of_hub.bore, of_hub.outside)]
    assert sums[0] == pytest.approx(sums[1], rel=1e-9, abs=1e-6 * pressure)
    of_shaft = shaft_stresses(pressure=pressure, interface_diameter=ratio, shaft_bore_diameter=1.0)
    sums = [surface.hoop + surface.radial for surface in (of_shaft.seat, of_shaft.bore)]
    assert sums[0] == pytest.approx(sums[1], rel=1e-9, abs=1e-6 * pressure)


@given(pressures, ratios)
def test_hoop_stress_across_the_wall_balances_the_pressure(pressure, ratio):
    # Cut in half, the hub's two walls carry p·d; integrate Lamé's field through the end values.
    of_hub = hub_stresses(pressure=pressure, interface_diameter=1.0, hub_outer_diameter=ratio)
    mean = (of_hub.bore.hoop + of_hub.bore.radial) / 2.0
    swing = (of_hub.bore.hoop - of_hub.bore.radial) / 2.0
    wall = mean * (ratio - 1.0) / 2.0 + swing * (1.0 - 1.0 / ratio) / 2.0
    assert 2.0 * wall == pytest.approx(pressure, rel=1e-9, abs=1e-6)


@given(st.floats(-1e9, 1e9), st.floats(-1e9, 1e9))
def test_tresca_lies_between_von_mises_and_its_1_155_fold(hoop, radial):
    stress = surface_stress(hoop=hoop, radial=radial)
    assert stress.von_mises <= stress.tresca * (1 + 1e-12)
    assert stress.tresca <= stress.von_mises * 2.0 / math.sqrt(3.0) * (1 + 1e-9) + 1e-6


def test_a_solid_shaft_has_one_stress_and_a_pin_hole_doubles_it():
    solid = shaft_stresses(pressure=1e8, interface_diameter=0.1, shaft_bore_diameter=0.0)
    pin_hole = shaft_stresses(pressure=1e8, interface_diameter=0.1, shaft_bore_diameter=1e-6)
    assert solid.bore is None
    assert solid.seat.hoop == solid.seat.radial == -1e8
    assert pin_hole.bore.hoop == printed("-2.0000", 1e8)


def test_without_stress_the_margin_has_no_end():
    assert yield_margin(equivalent_stress=0.0, yield_strength=500e6) == math.inf


@pytest.mark.parametrize(
    ("function", "inputs", "field"),
    [
        (hub_stresses, {"pressure": -1.0}, "pressure"),
        (hub_stresses, {"hub_outer_diameter": 0.1}, "hub_outer_diameter"),
        (hub_stresses, {"interface_diameter": 0.0}, "interface_diameter"),
        (shaft_stresses, {"pressure": math.nan}, "pressure"),
        (shaft_stresses, {"shaft_bore_diameter": 0.1}, "shaft_bore_diameter"),
        (shaft_stresses, {"shaft_bore_diameter": -0.1}, "shaft_bore_diameter"),
        (yield_margin, {"equivalent_stress": -1.0}, "equivalent_stress"),
        (yield_margin, {"yield_strength": 0.0}, "yield_strength"),
        (surface_stress, {"hoop": math.nan}, "hoop"),
        (surface_stress, {"radial": math.inf}, "radial"),
    ],
)
def test_what_cannot_be_is_refused_by_name(function, inputs, field):
    good = {
        hub_stresses: {"pressure": 1.0, "interface_diameter": 0.1, "hub_outer_diameter": 0.2},
        shaft_stresses: {"pressure": 1.0, "interface_diameter": 0.1, "shaft_bore_diameter": 0.0},
        yield_margin: {"equivalent_stress": 1.0, "yield_strength": 1.0},
        surface_stress: {"hoop": 1.0, "radial": 1.0},
    }[function]
    with pytest.raises(OutOfRangeError, match=field):
        function(**{**good, **inputs})
