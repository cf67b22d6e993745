"""Where a cooling shaft will end."""

import cmath

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from scipy.optimize import curve_fit

from models.engineering.cold_forecast import ColdForecast, cold_forecast
from models.engineering.errors import OutOfRangeError

HOUR = 3600.0
MICROMETRE = 1e-6

# By hand: each reading is 5 µm plus 16 µm halved once an hour.
HALVING_TIMES = [0.0, HOUR, 2.0 * HOUR, 3.0 * HOUR, 4.0 * HOUR]
HALVING = [21e-6, 13e-6, 9e-6, 7e-6, 6e-6]

direction = st.floats(0.0, 6.28)


def forecast(**changed: object) -> ColdForecast:
    usual: dict[str, object] = {
        "times": HALVING_TIMES,
        "values": HALVING,
        "tolerance": 1e-6,
        "reading_uncertainty": 0.01e-6,
    }
    return cold_forecast(**(usual | changed))  # type: ignore[arg-type]


def test_readings_that_halve_every_hour_end_where_they_head_by_hand() -> None:
    found = forecast()
    assert found.final == pytest.approx(5e-6, abs=1e-10)
    assert found.amplitude == pytest.approx(16e-6, abs=1e-10)
    assert found.time_constant == pytest.approx(HOUR / np.log(2.0), rel=1e-5)
    assert found.settled_at == pytest.approx(4.0 * HOUR, rel=1e-4)
    assert found.time_constant_low < found.time_constant < found.time_constant_high
    assert 0.0 < found.final_uncertainty < 0.1e-6


def test_a_clock_that_started_earlier_moves_only_the_time_it_settles() -> None:
    later = forecast(times=[value + 7.0 * HOUR for value in HALVING_TIMES])
    assert later.final == pytest.approx(forecast().final, abs=1e-12)
    assert later.settled_at == pytest.approx(11.0 * HOUR, rel=1e-4)


def test_a_known_time_constant_makes_three_readings_do() -> None:
    found = forecast(times=HALVING_TIMES[:3], values=HALVING[:3], time_constant=HOUR / np.log(2.0))
    assert found.final == pytest.approx(5e-6, abs=1e-12)
    assert found.time_constant_low == found.time_constant == found.time_constant_high


def test_a_shaft_already_cold_is_settled_from_its_first_reading_on() -> None:
    found = forecast(values=[5e-6, 5.1e-6, 4.9e-6, 5e-6, 5e-6], time_constant=HOUR)
    assert found.settled_at == 0.0
    assert found.final == pytest.approx(5e-6, abs=0.2e-6)


def test_a_vector_ends_at_its_own_place_and_angle() -> None:
    final, heading = 4e-6 * cmath.exp(1j), 20e-6 * cmath.exp(2.5j)
    values = [final + heading * 0.5**count for count in range(5)]
    found = forecast(values=values)
    assert abs(found.final - final) < 1e-10
    assert abs(found.amplitude - heading) < 1e-10


@pytest.mark.parametrize("seed", range(6))
def test_the_fit_is_that_of_a_library(seed: int) -> None:
    random = np.random.default_rng(seed)
    times = np.linspace(0.0, 6.0, 10)
    values = 5.0 + 30.0 * np.exp(-times / 2.0) + random.normal(0.0, 0.5, times.size)
    best, covariance = curve_fit(
        lambda time, final, height, constant: final + height * np.exp(-time / constant),
        times,
        values,
        p0=(5.0, 30.0, 2.0),
        sigma=np.full(times.size, 0.5),
        absolute_sigma=True,
    )
    found = forecast(times=times, values=values, tolerance=1.0, reading_uncertainty=0.5)
    assert found.final.real == pytest.approx(best[0], abs=1e-3)
    assert found.time_constant == pytest.approx(best[2], rel=1e-3)
    # The wander of the time constant is counted at its worst side and so never below the library's,
    # unless the readings scatter more than stated, which it counts too.
    assert (
        0.95 * np.sqrt(covariance[0, 0]) < found.final_uncertainty < 3.0 * np.sqrt(covariance[0, 0])
    )


def test_twice_the_stated_uncertainty_holds_the_truth_nearly_always() -> None:
    random = np.random.default_rng(20)
    times = np.linspace(0.0, 3.0, 8)
    truth = 5.0 - 3.0j
    held, scatter = 0, 0.0
    for _ in range(100):
        noise = random.normal(0.0, 0.3, 8) + 1j * random.normal(0.0, 0.3, 8)
        values = truth + (20.0 + 10.0j) * np.exp(-times / 1.2) + noise
        found = forecast(times=times, values=values, tolerance=1.0, reading_uncertainty=0.3)
        scatter += found.residual**2 / 100.0
        off = found.final - truth
        held += max(abs(off.real), abs(off.imag)) <= 2.0 * found.final_uncertainty
    assert held >= 90
    assert scatter == pytest.approx(0.3**2, rel=0.1)


@given(
    final=st.floats(0.0, 50.0),
    final_angle=direction,
    height=st.floats(5.0, 100.0),
    height_angle=direction,
    constant=st.floats(0.5, 4.0),
)
def test_any_clean_decay_is_found_again(
    final: float, final_angle: float, height: float, height_angle: float, constant: float
) -> None:
    end, heading = cmath.rect(final, final_angle), cmath.rect(height, height_angle)
    times = np.linspace(0.0, 5.0, 8)
    values = end + heading * np.exp(-times / constant)
    found = forecast(times=times, values=values, tolerance=0.5, reading_uncertainty=0.001)
    assert abs(found.final - end) < 1e-4 * height
    assert found.time_constant == pytest.approx(constant, rel=1e-4)
    assert abs(heading) * np.exp(-found.settled_at / constant) == pytest.approx(0.5, rel=1e-2)


@settings(max_examples=25)
@given(turn=direction)
def test_turning_the_reference_mark_turns_the_forecast(turn: float) -> None:
    values = np.array(HALVING) + 1j * np.array(HALVING[::-1]) / 50.0
    plain, turned = forecast(values=values), forecast(values=values * cmath.exp(1j * turn))
    assert abs(turned.final - plain.final * cmath.exp(1j * turn)) < 1e-10
    assert turned.final_uncertainty == pytest.approx(plain.final_uncertainty, rel=1e-3)


def test_scatter_beyond_the_stated_uncertainty_counts() -> None:
    scattered = [21e-6, 13.4e-6, 8.6e-6, 7.4e-6, 5.7e-6]
    assert forecast(values=scattered).final_uncertainty > 10.0 * forecast().final_uncertainty


@pytest.mark.parametrize(
    "values",
    [[21e-6, 20e-6, 19e-6, 18e-6, 17e-6], [5e-6, 5e-6, 5e-6, 5e-6, 5e-6]],
    ids=["a straight line", "nothing moves"],
)
def test_readings_that_show_no_decay_are_refused_rather_than_guessed(values: list[float]) -> None:
    with pytest.raises(OutOfRangeError, match=r"times.*span enough"):
        forecast(values=values)


@pytest.mark.parametrize(
    ("changed", "name"),
    [
        ({"times": HALVING_TIMES[:3], "values": HALVING[:3]}, "times"),
        ({"times": HALVING_TIMES[:2], "values": HALVING[:2], "time_constant": HOUR}, "times"),
        ({"times": HALVING_TIMES[::-1]}, "times"),
        ({"values": HALVING[:4]}, "values"),
        ({"values": [*HALVING[:4], float("nan")]}, "values"),
        ({"tolerance": 0.0}, "tolerance"),
        ({"reading_uncertainty": 0.0}, "reading_uncertainty"),
        ({"time_constant": -1.0}, "time_constant"),
        ({"time_constant": 0.0}, "time_constant"),
    ],
    ids=lambda value: str(value)[:40],
)
def test_an_input_out_of_range_is_refused_by_name(changed: dict[str, object], name: str) -> None:
    with pytest.raises(OutOfRangeError, match=name):
        forecast(**changed)
