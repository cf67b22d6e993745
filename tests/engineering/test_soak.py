"""Waiting until a shaft may be read."""

import math

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from models.engineering.errors import OutOfRangeError
from models.engineering.lumped_body import time_constant
from models.engineering.soak import (
    bow_profile,
    remainder_to_cold,
    repeat_interval,
    thermal_bow,
    time_to_readable,
)
from tests.published.cooling import BOWS, REMAINDERS, SHAFTS, Bow, Remainder, Shaft
from tests.published.printed import printed
from tests.second_paths.warm_side import arc_height, deflection

HOUR = 3600.0
MICROMETRE = 1e-6

hours = st.floats(0.5, 20.0)


@pytest.mark.parametrize("row", SHAFTS, ids=lambda row: row.case)
def test_waiting_time_agrees_with_its_source(row: Shaft) -> None:
    constant = time_constant(
        density=7850.0,
        specific_heat=470.0,
        diameter=row.diameter,
        heat_transfer_coefficient=10.0,
    )
    waiting = time_to_readable(temperature_difference=100.0, remainder=2.0, time_constant=constant)
    assert waiting == printed(row.waiting_hours, HOUR), row.source


@pytest.mark.parametrize("row", BOWS, ids=lambda row: row.case)
def test_thermal_bow_agrees_with_its_source(row: Bow) -> None:
    bow = thermal_bow(
        expansion=12e-6, temperature_difference_across=1.0, span=row.span, diameter=row.diameter
    )
    assert 2.0 * bow == printed(row.total_micrometres, MICROMETRE), row.source


@pytest.mark.parametrize("row", REMAINDERS, ids=lambda row: row.case)
def test_remainder_agrees_with_its_source(row: Remainder) -> None:
    left = remainder_to_cold(
        difference=row.difference * MICROMETRE,
        interval=row.interval * HOUR,
        time_constant=row.time_constant * HOUR,
    )
    assert left == printed(row.remainder, MICROMETRE), row.source


def test_the_bow_is_the_height_of_an_arc() -> None:
    # A side longer by α ΔT bends the shaft to a radius of D/(α ΔT).
    bow = thermal_bow(expansion=12e-6, temperature_difference_across=2.0, span=2.5, diameter=0.18)
    assert bow == pytest.approx(arc_height(chord=2.5, radius=0.18 / 24e-6), rel=1e-6)


def test_the_bow_along_the_shaft_is_its_curvature_integrated() -> None:
    at = [-0.4, 0.0, 0.3, 1.1, 1.9, 2.0, 2.6]
    profile = bow_profile(
        positions=at,
        first_journal=0.1,
        second_journal=2.0,
        expansion=12e-6,
        temperature_difference_across=1.5,
        diameter=0.15,
    )
    integrated = deflection(at=at, supports=(0.1, 2.0), curvature=12e-6 * 1.5 / 0.15)
    assert profile == pytest.approx(integrated, abs=1e-10)


def test_two_surveys_of_a_decay_leave_what_the_decay_leaves() -> None:
    # Second path: follow the decay to its end in small steps, without its closed form.
    value, step, record = 50.0, 1e-4, {}
    for index in range(200_001):
        record[index] = value
        value -= value * step
    first, second = record[20_000], record[30_000]
    left = remainder_to_cold(difference=first - second, interval=1.0, time_constant=1.0)
    assert left == pytest.approx(second, rel=1e-3)


def test_a_shaft_that_is_cold_enough_may_be_read_at_once() -> None:
    assert time_to_readable(temperature_difference=-1.5, remainder=2.0, time_constant=HOUR) == 0.0


def test_surveys_far_apart_leave_nothing() -> None:
    assert remainder_to_cold(difference=1e-3, interval=1e9, time_constant=1.0) < 1e-300


@given(tolerance=st.floats(0.1, 20.0), remainder=st.floats(0.1, 20.0), constant=hours)
def test_agreement_after_the_repeat_interval_proves_the_remainder(
    tolerance: float, remainder: float, constant: float
) -> None:
    interval = repeat_interval(tolerance=tolerance, remainder=remainder, time_constant=constant)
    left = remainder_to_cold(difference=tolerance, interval=interval, time_constant=constant)
    assert left == pytest.approx(remainder)


@given(constant=hours, factor=st.floats(1.1, 5.0))
def test_the_repeat_interval_scales_with_the_time_constant(constant: float, factor: float) -> None:
    one = repeat_interval(tolerance=2e-6, remainder=2e-6, time_constant=constant)
    other = repeat_interval(tolerance=2e-6, remainder=2e-6, time_constant=factor * constant)
    assert one == pytest.approx(math.log(2.0) * constant)
    assert other == pytest.approx(factor * one)


@given(difference=st.floats(-5.0, 5.0), span=st.floats(0.5, 5.0), diameter=st.floats(0.05, 0.5))
def test_the_profile_is_the_bow_at_mid_span_and_nothing_at_the_journals(
    difference: float, span: float, diameter: float
) -> None:
    profile = bow_profile(
        positions=[0.3, 0.3 + span / 2.0, 0.3 + span],
        first_journal=0.3,
        second_journal=0.3 + span,
        expansion=12e-6,
        temperature_difference_across=difference,
        diameter=diameter,
    )
    bow = thermal_bow(
        expansion=12e-6, temperature_difference_across=difference, span=span, diameter=diameter
    )
    assert profile == pytest.approx(np.array([0.0, bow, 0.0]), abs=1e-15)


@given(difference=st.floats(3.0, 300.0), constant=hours)
def test_the_wait_ends_when_the_decay_is_down_to_the_remainder(
    difference: float, constant: float
) -> None:
    waiting = time_to_readable(
        temperature_difference=difference, remainder=2.0, time_constant=constant
    )
    assert difference * math.exp(-waiting / constant) == pytest.approx(2.0)


@pytest.mark.parametrize("name", ["remainder", "time_constant"])
def test_a_wait_out_of_range_is_refused_by_name(name: str) -> None:
    usual = {"temperature_difference": 100.0, "remainder": 2.0, "time_constant": HOUR}
    with pytest.raises(OutOfRangeError, match=name):
        time_to_readable(**(usual | {name: 0.0}))


@pytest.mark.parametrize("name", ["span", "diameter"])
def test_a_bow_out_of_range_is_refused_by_name(name: str) -> None:
    usual = {
        "expansion": 12e-6,
        "temperature_difference_across": 1.0,
        "span": 2.0,
        "diameter": 0.15,
    }
    with pytest.raises(OutOfRangeError, match=name):
        thermal_bow(**(usual | {name: 0.0}))


@pytest.mark.parametrize(("name", "value"), [("second_journal", 0.0), ("diameter", -0.1)])
def test_a_profile_out_of_range_is_refused_by_name(name: str, value: float) -> None:
    usual = {
        "first_journal": 0.0,
        "second_journal": 2.0,
        "expansion": 12e-6,
        "temperature_difference_across": 1.0,
        "diameter": 0.15,
    }
    with pytest.raises(OutOfRangeError, match=name):
        bow_profile(positions=[1.0], **(usual | {name: value}))


@pytest.mark.parametrize(
    ("name", "value"), [("difference", -1.0), ("interval", 0.0), ("time_constant", float("nan"))]
)
def test_a_remainder_out_of_range_is_refused_by_name(name: str, value: float) -> None:
    usual = {"difference": 1.0, "interval": 1.0, "time_constant": 1.0}
    with pytest.raises(OutOfRangeError, match=name):
        remainder_to_cold(**(usual | {name: value}))


@pytest.mark.parametrize("name", ["tolerance", "remainder", "time_constant"])
def test_a_repeat_interval_out_of_range_is_refused_by_name(name: str) -> None:
    usual = {"tolerance": 1.0, "remainder": 1.0, "time_constant": 1.0}
    with pytest.raises(OutOfRangeError, match=name):
        repeat_interval(**(usual | {name: 0.0}))
