"""Bodies of one temperature."""

import math
from collections.abc import Callable

import pytest
from hypothesis import given
from hypothesis import strategies as st

from models.engineering.errors import OutOfRangeError
from models.engineering.lumped_body import biot_number, time_constant, time_to_cool
from tests.published.cooling import (
    BALLS,
    INTO_SPACE,
    POWER_LAWS,
    SHAFTS,
    Ball,
    IntoSpace,
    PowerLaw,
    Shaft,
)
from tests.published.printed import printed
from tests.second_paths.hot_ring import time_until_mean


def bisected(seconds: Callable[[float], float], wanted: float, low: float, high: float) -> float:
    for _ in range(60):
        middle = (low + high) / 2.0
        low, high = (middle, high) if seconds(middle) > wanted else (low, middle)
    return (low + high) / 2.0


@pytest.mark.parametrize("row", BALLS, ids=lambda row: row.case)
def test_an_annealed_ball_cools_as_its_source_says(row: Ball) -> None:
    biot = biot_number(
        heat_transfer_coefficient=75.0, volume=row.length, area=1.0, conductivity=54.0
    )
    assert biot == printed(row.biot), row.source
    seconds = time_to_cool(
        start_temperature=900.0,
        end_temperature=100.0,
        heat_capacity=lambda temperature: 7833.0 * 465.0 * row.length,
        heat_loss=lambda temperature: 75.0 * (temperature - 35.0),
    )
    assert seconds == printed(row.seconds), row.source


@pytest.mark.parametrize("row", POWER_LAWS, ids=lambda row: row.case)
def test_free_convection_leaves_what_its_source_says(row: PowerLaw) -> None:
    def seconds(share: float) -> float:
        return time_to_cool(
            start_temperature=120.0,
            end_temperature=20.0 + 100.0 * share,
            heat_capacity=lambda temperature: 1000.0,
            heat_loss=lambda temperature: (temperature - 20.0) ** (1.0 + row.power),
        )

    first_time_constant = 1000.0 * 100.0 / 100.0 ** (1.0 + row.power)
    share = bisected(seconds, 2.0 * first_time_constant, 0.01, 1.0)
    assert share == printed(row.share_left), row.source


@pytest.mark.parametrize("row", INTO_SPACE, ids=lambda row: row.case)
def test_convection_and_radiation_to_absolute_zero_agree_with_their_source(row: IntoSpace) -> None:
    def seconds(kelvin: float) -> float:
        return time_to_cool(
            start_temperature=row.start_kelvin,
            end_temperature=kelvin,
            heat_capacity=lambda kelvin: row.capacity_per_area,
            heat_loss=lambda kelvin: (
                row.coefficient * kelvin + row.emissivity * 5.670374e-8 * kelvin**4
            ),
        )

    assert bisected(seconds, row.seconds, 50.0, row.start_kelvin) == (printed(row.end_kelvin)), (
        row.source
    )


@pytest.mark.parametrize("row", SHAFTS, ids=lambda row: row.case)
def test_time_constant_of_a_shaft_agrees_with_its_source(row: Shaft) -> None:
    constant = time_constant(
        density=7850.0,
        specific_heat=470.0,
        diameter=row.diameter,
        heat_transfer_coefficient=10.0,
    )
    assert constant == printed(row.time_constant_hours, 3600.0), row.source


def test_a_capacity_that_rises_with_temperature_counts_as_its_mean() -> None:
    seconds = time_to_cool(
        start_temperature=300.0,
        end_temperature=100.0,
        heat_capacity=lambda temperature: 400.0 + 0.5 * temperature,
        heat_loss=lambda temperature: 10.0,
    )
    assert seconds == pytest.approx(200.0 * 500.0 / 10.0, rel=1e-12)


def test_a_part_in_good_metal_cools_as_one_body() -> None:
    ring = {"bore_radius": 0.05, "rim_radius": 0.125, "length": 0.04}
    area = math.pi * (2.0 * 0.125**2 + 2.0 * 0.125 * 0.04)
    volume = math.pi * (0.125**2 - 0.05**2) * 0.04
    assert (
        biot_number(heat_transfer_coefficient=20.0, volume=volume, area=area, conductivity=40.0)
        < 0.1
    )
    along_the_radius = time_until_mean(
        **ring,
        density=7850.0,
        specific_heat=520.0,
        conductivity=40.0,
        start=250.0,
        end_mean=172.5,
        flux_outside=lambda temperature: 20.0 * (temperature - 20.0),
    )
    as_one = time_to_cool(
        start_temperature=250.0,
        end_temperature=172.5,
        heat_capacity=lambda temperature: 7850.0 * 520.0 * volume,
        heat_loss=lambda temperature: 20.0 * area * (temperature - 20.0),
    )
    assert as_one == pytest.approx(along_the_radius, rel=0.01)


@given(start=st.floats(100.0, 400.0), middle=st.floats(0.1, 0.9), end=st.floats(30.0, 90.0))
def test_two_stretches_of_cooling_take_as_long_as_the_whole(
    start: float, middle: float, end: float
) -> None:
    between = end + middle * (start - end)

    def seconds(high: float, low: float) -> float:
        return time_to_cool(
            start_temperature=high,
            end_temperature=low,
            heat_capacity=lambda temperature: 1000.0,
            heat_loss=lambda temperature: (temperature - 20.0) ** 1.25,
        )

    assert seconds(start, between) + seconds(between, end) == pytest.approx(
        seconds(start, end), rel=1e-6
    )


@given(factor=st.floats(0.1, 10.0), diameter=st.floats(0.02, 1.0))
def test_the_time_constant_grows_with_the_diameter_and_falls_with_the_coefficient(
    factor: float, diameter: float
) -> None:
    def constant(size: float, coefficient: float) -> float:
        return time_constant(
            density=7850.0,
            specific_heat=470.0,
            diameter=size,
            heat_transfer_coefficient=coefficient,
        )

    assert constant(factor * diameter, factor * 10.0) == pytest.approx(constant(diameter, 10.0))


def test_a_body_that_is_cool_enough_needs_no_time_and_one_in_a_warm_room_never_gets_there() -> None:
    def seconds(end: float) -> float:
        return time_to_cool(
            start_temperature=100.0,
            end_temperature=end,
            heat_capacity=lambda temperature: 1000.0,
            heat_loss=lambda temperature: temperature - 20.0,
        )

    assert seconds(100.0) == 0.0
    assert seconds(20.0) == math.inf


@pytest.mark.parametrize("name", ["area", "conductivity"])
def test_a_biot_number_of_nothing_is_refused_by_name(name: str) -> None:
    with pytest.raises(OutOfRangeError, match=name):
        biot_number(
            **({"area": 1.0, "conductivity": 40.0} | {name: 0.0}),
            heat_transfer_coefficient=10.0,
            volume=1.0,
        )


@pytest.mark.parametrize(
    "name", ["density", "specific_heat", "diameter", "heat_transfer_coefficient"]
)
def test_a_time_constant_of_nothing_is_refused_by_name(name: str) -> None:
    usual = {
        "density": 7850.0,
        "specific_heat": 470.0,
        "diameter": 0.1,
        "heat_transfer_coefficient": 10.0,
    }
    with pytest.raises(OutOfRangeError, match=name):
        time_constant(**(usual | {name: 0.0}))
