"""Limits of final acceptance."""

import math

import pint
import pytest
from hypothesis import given
from hypothesis import strategies as st

from models.engineering.acceptance import (
    COMPRESSOR_TRIP_EXTENSION,
    RESIDUAL_MAGNETISM_LIMIT,
    THRUST_COLLAR_FACE_RUNOUT_LIMIT,
    compressor_probe_runout_limit,
    compressor_trip_vibration_limit,
    compressor_vibration_limit,
    pedestal_velocity_limit,
    pump_runout_limits,
    pump_runout_subtraction_limit,
    pump_trip_vibration_limit,
    steam_turbine_vibration_limit,
)
from models.engineering.errors import OutOfRangeError
from models.engineering.shaft import flexibility_factor
from tests.published import acceptance as published
from tests.published.printed import printed

UNIT = published.REVOLUTIONS_PER_MINUTE
BY_SPEED = [steam_turbine_vibration_limit, compressor_vibration_limit, pedestal_velocity_limit]
speeds = st.floats(50.0, 10_000.0)
amplitudes = st.floats(1e-6, 2e-4)


@pytest.mark.parametrize("row", published.VIBRATION, ids=lambda row: row.case)
def test_vibration_and_probe_track_limits_agree_with_their_table(row: published.SpeedRow) -> None:
    speed = row.revolutions * UNIT
    compressor = compressor_vibration_limit(maximum_continuous_speed=speed)
    assert steam_turbine_vibration_limit(maximum_continuous_speed=speed) == row.turbine, row.source
    assert compressor == row.compressor, row.source
    assert compressor_probe_runout_limit(vibration_limit=compressor) == row.probe_track, row.source


@pytest.mark.parametrize("row", published.PUMP_SUBTRACTION, ids=lambda row: row.case)
def test_what_a_pump_may_subtract_agrees_with_its_source(row: published.AmountRow) -> None:
    assert pump_runout_subtraction_limit(vibration_limit=row.given) == row.limit, row.source


@pytest.mark.parametrize("row", published.PUMP_TRIP, ids=lambda row: row.case)
def test_a_pump_at_trip_speed_agrees_with_its_source(row: published.AmountRow) -> None:
    limit = pump_trip_vibration_limit(limit_at_maximum_continuous=row.given)
    assert limit == row.limit, row.source


@pytest.mark.parametrize("row", published.COMPRESSOR_TRIP, ids=lambda row: row.case)
def test_a_compressor_at_trip_speed_agrees_with_its_source(row: published.AmountRow) -> None:
    limit = compressor_trip_vibration_limit(limit_at_maximum_continuous=row.given)
    assert limit == row.limit, row.source


@pytest.mark.parametrize("row", published.PEDESTAL_VELOCITY, ids=lambda row: row.case)
def test_pedestal_velocity_agrees_with_its_source(row: published.AmountRow) -> None:
    limit = pedestal_velocity_limit(maximum_continuous_speed=row.given * UNIT)
    assert limit == row.limit, row.source


@pytest.mark.parametrize("row", published.PUMP_RUNOUT, ids=lambda row: row.case)
def test_runout_of_a_pump_agrees_with_its_source(row: published.PumpRow) -> None:
    limits = pump_runout_limits(
        flexibility_factor=flexibility_factor(
            bearing_span=row.bearing_span, shaft_diameter=row.shaft_diameter
        )
    )
    assert limits.shaft == row.shaft, row.source
    assert limits.rotor_with_clearance_fits == row.with_clearance, row.source
    assert limits.rotor_with_interference_fits == row.with_interference, row.source


def test_a_shaft_on_the_dividing_value_counts_as_stiff() -> None:
    assert not pump_runout_limits(flexibility_factor=1900.0).flexible
    assert pump_runout_limits(flexibility_factor=1900.1).flexible


def test_the_dividing_value_is_the_one_in_inches_to_its_digits() -> None:
    # By hand: 3.0e6 in² · 645.16 = 1.935e9 mm².
    square_inches = pint.get_application_registry().Quantity(3.0e6, "inch ** 2")
    assert square_inches.to("meter ** 2").magnitude == printed("1.9e9", 1e-6)


@given(speed=speeds)
def test_the_limit_squared_times_speed_is_one_number_where_no_cap_counts(speed: float) -> None:
    limit = steam_turbine_vibration_limit(maximum_continuous_speed=speed)
    mil_squared = (limit / 25.4e-6) ** 2
    if limit < 50e-6:
        assert mil_squared * speed / UNIT == pytest.approx(12_000.0)
    else:
        assert mil_squared * speed / UNIT <= 12_000.0 * (1.0 + 1e-9)


@given(slow=speeds, factor=st.floats(1.0, 20.0))
def test_more_speed_never_permits_more_vibration(slow: float, factor: float) -> None:
    for limit in BY_SPEED:
        fast_one = limit(maximum_continuous_speed=slow * factor)
        assert fast_one <= limit(maximum_continuous_speed=slow) * (1.0 + 1e-12)


@given(speed=speeds)
def test_a_compressor_is_never_allowed_more_than_a_turbine(speed: float) -> None:
    compressor = compressor_vibration_limit(maximum_continuous_speed=speed)
    assert compressor <= steam_turbine_vibration_limit(maximum_continuous_speed=speed)


@given(amplitude=amplitudes)
def test_greater_of_two_and_less_of_two_enclose_a_quarter(amplitude: float) -> None:
    greater = compressor_probe_runout_limit(vibration_limit=amplitude)
    less = pump_runout_subtraction_limit(vibration_limit=amplitude)
    assert less <= 0.25 * amplitude <= greater
    assert greater >= 6e-6
    assert less <= 6.5e-6


@given(amplitude=amplitudes)
def test_up_to_trip_speed_more_is_allowed_than_at_continuous_speed(amplitude: float) -> None:
    for extended in (pump_trip_vibration_limit, compressor_trip_vibration_limit):
        assert extended(limit_at_maximum_continuous=amplitude) > amplitude


def test_the_compressor_and_pump_extensions_meet_at_one_mil() -> None:
    # By hand: half of 25.4 µm is 12.7 µm.
    pump = pump_trip_vibration_limit(limit_at_maximum_continuous=25.4e-6)
    compressor = compressor_trip_vibration_limit(limit_at_maximum_continuous=25.4e-6)
    assert pump == pytest.approx(compressor)


@pytest.mark.parametrize(
    ("limit", "written", "unit"),
    [
        (RESIDUAL_MAGNETISM_LIMIT, 2.0, "gauss"),
        (THRUST_COLLAR_FACE_RUNOUT_LIMIT, 0.0005, "inch"),
        (COMPRESSOR_TRIP_EXTENSION, 0.0005, "inch"),
    ],
    ids=["magnetism", "thrust collar", "trip"],
)
def test_a_single_limit_is_what_its_source_writes(limit, written: float, unit: str) -> None:
    quantity = pint.get_application_registry().Quantity(written, unit)
    # The gauss belongs to another system of units than the tesla.
    in_si = quantity.to(limit.unit, "Gaussian")
    assert limit.value == pytest.approx(in_si.magnitude)
    assert "from memory" in limit.source


@pytest.mark.parametrize("wrong", [0.0, -1.0, math.nan, math.inf])
@pytest.mark.parametrize(
    ("limit", "name"),
    [
        (steam_turbine_vibration_limit, "maximum_continuous_speed"),
        (compressor_vibration_limit, "maximum_continuous_speed"),
        (pedestal_velocity_limit, "maximum_continuous_speed"),
        (pump_trip_vibration_limit, "limit_at_maximum_continuous"),
        (compressor_trip_vibration_limit, "limit_at_maximum_continuous"),
        (compressor_probe_runout_limit, "vibration_limit"),
        (pump_runout_subtraction_limit, "vibration_limit"),
        (pump_runout_limits, "flexibility_factor"),
    ],
)
def test_a_limit_of_nothing_is_refused_by_name(limit, name: str, wrong: float) -> None:
    with pytest.raises(OutOfRangeError) as refusal:
        limit(**{name: wrong})
    assert refusal.value.name == name
