"""How hot a bore must be."""

from collections.abc import Callable, Sequence

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from models.engineering.errors import OutOfRangeError
from models.engineering.expansion import diameter_at, mean_of_instantaneous
from models.engineering.heating import gauge_diameter, opening, target_temperature
from tests.published.heating import NEEDED, RISES, NeededTemperature, RiseAboveShaft
from tests.published.printed import printed
from tests.second_paths.growth import temperature_when_clear

FAHRENHEIT_DEGREE = 5.0 / 9.0

interference = st.floats(0.0, 300e-6)
shaft_temperature = st.floats(5.0, 60.0)
spread = st.floats(0.0, 0.1)


def steel(temperature: float) -> float:
    return 11.5e-6 + 5e-9 * temperature


def constant(value: float) -> Callable[[float], float]:
    return lambda temperature: value


def tabulated(table: Sequence[tuple[float, float]]) -> Callable[[float], float]:
    at = [temperature for temperature, _ in table]
    values = [value * 1e-6 for _, value in table]
    return lambda temperature: float(np.interp(temperature, at, values))


def target(**changed: object) -> float:
    usual: dict[str, object] = {
        "greatest_interference": 200e-6,
        "clearance": 100e-6,
        "diameter": 0.150,
        "shaft_temperature": 20.0,
        "part_expansion": steel,
        "shaft_expansion": steel,
    }
    return target_temperature(**(usual | changed))  # type: ignore[arg-type]


@pytest.mark.parametrize("row", RISES, ids=lambda row: row.case)
def test_rise_above_the_shaft_agrees_with_its_source(row: RiseAboveShaft) -> None:
    needed = target(
        greatest_interference=row.interference_ratio * 0.1016,
        clearance=row.clearance_ratio * 0.1016,
        diameter=0.1016,
        part_expansion=constant(row.expansion_per_degree_fahrenheit * 1.8),
        shaft_expansion=constant(row.expansion_per_degree_fahrenheit * 1.8),
    )
    assert needed - 20.0 == printed(row.rise_fahrenheit, FAHRENHEIT_DEGREE), row.source


@pytest.mark.parametrize("row", NEEDED, ids=lambda row: row.case)
def test_needed_temperature_agrees_with_its_source(row: NeededTemperature) -> None:
    needed = target(
        greatest_interference=row.ratio * 0.150,
        clearance=0.0,
        part_expansion=tabulated(row.table),
    )
    assert needed == printed(row.temperature), row.source


def test_a_slip_fit_needs_no_heat() -> None:
    assert target(greatest_interference=-150e-6) == 20.0


def test_no_interference_and_no_clearance_needs_only_the_temperature_of_the_shaft() -> None:
    assert target(greatest_interference=0.0, clearance=0.0, shaft_temperature=45.0) == (
        pytest.approx(45.0, abs=1e-9)
    )


def test_the_coefficient_is_taken_low_by_the_spread() -> None:
    by_hand = 20.0 + 0.002 / (0.92 * 12e-6)
    assert target(
        part_expansion=constant(12e-6), expansion_spread=0.08, diameter=0.150, clearance=100e-6
    ) == pytest.approx(by_hand, abs=1e-9)


@pytest.mark.parametrize("shaft_temperature", [40.0, 0.0])
def test_the_growth_of_the_shaft_is_taken_to_its_adverse_side(shaft_temperature: float) -> None:
    # Seat of 150.2 mm at 12e-6: 36.048 µm warm or cold by 20 K, and 8 % of it on top.
    shaft = 36.048e-6 if shaft_temperature > 20.0 else -36.048e-6
    by_hand = 20.0 + (300e-6 + shaft + 0.08 * 36.048e-6) / (0.92 * 12e-6 * 0.150)
    assert target(
        part_expansion=constant(12e-6),
        shaft_expansion=constant(12e-6),
        shaft_temperature=shaft_temperature,
        expansion_spread=0.08,
    ) == pytest.approx(by_hand, abs=1e-6)


def test_a_shaft_of_another_metal_counts_with_its_own_coefficient() -> None:
    needed = target(
        greatest_interference=0.0,
        clearance=0.0,
        part_expansion=constant(11e-6),
        shaft_expansion=constant(16.5e-6),
        shaft_temperature=40.0,
    )
    assert needed == pytest.approx(50.0, abs=1e-9)


@pytest.mark.parametrize("clearance", [50e-6, 150e-6])
def test_the_bore_warmed_degree_by_degree_clears_at_the_same_temperature(clearance: float) -> None:
    def instantaneous(temperature: float) -> float:
        kelvin = temperature + 273.15
        return 7.3633e-6 + 1.8723e-8 * kelvin - 9.8382e-12 * kelvin**2

    def mean(temperature: float) -> float:
        return mean_of_instantaneous(instantaneous=instantaneous, temperature=temperature)

    seat_now = 0.150225 * (1.0 + 15.0 * 12e-6)
    expected = temperature_when_clear(
        bore_at_20=0.150, seat_now=seat_now, clearance=clearance, instantaneous=instantaneous
    )
    needed = target(
        greatest_interference=225e-6,
        clearance=clearance,
        shaft_temperature=35.0,
        part_expansion=mean,
        shaft_expansion=constant(12e-6),
    )
    assert needed == pytest.approx(expected, abs=1e-6)


@given(interference=interference, clearance=interference, shaft_temperature=shaft_temperature)
def test_a_bore_at_its_target_opens_by_the_clearance(
    interference: float, clearance: float, shaft_temperature: float
) -> None:
    needed = target(
        greatest_interference=interference,
        clearance=clearance,
        shaft_temperature=shaft_temperature,
    )
    opened = opening(
        bore_diameter=0.150,
        seat_diameter=0.150 + interference,
        mean_bore_temperature=needed,
        shaft_temperature=shaft_temperature,
        part_expansion=steel,
        shaft_expansion=steel,
    )
    assert opened >= clearance - 1e-12
    assert needed == 20.0 or opened == pytest.approx(clearance, abs=1e-12)


@given(spread=spread, shaft_temperature=shaft_temperature)
def test_doubt_about_the_coefficients_never_lowers_the_target(
    spread: float, shaft_temperature: float
) -> None:
    sure = target(shaft_temperature=shaft_temperature)
    doubtful = target(shaft_temperature=shaft_temperature, expansion_spread=spread)
    assert doubtful >= sure - 1e-9


@given(shaft_temperature=shaft_temperature, warmer=st.floats(0.1, 50.0))
def test_a_warmer_shaft_asks_for_a_hotter_bore(shaft_temperature: float, warmer: float) -> None:
    cool = target(shaft_temperature=shaft_temperature)
    assert target(shaft_temperature=shaft_temperature + warmer) > cool


@given(shaft_temperature=shaft_temperature, clearance=interference)
def test_the_gauge_is_larger_than_the_seat_by_the_clearance(
    shaft_temperature: float, clearance: float
) -> None:
    gauge = gauge_diameter(
        seat_diameter=0.150,
        shaft_temperature=shaft_temperature,
        shaft_expansion=steel,
        clearance=clearance,
    )
    seat = diameter_at(diameter=0.150, temperature=shaft_temperature, expansion=steel)
    assert gauge - seat == pytest.approx(clearance, abs=1e-15)


def test_an_interference_that_no_permitted_heat_opens_is_refused_by_name() -> None:
    with pytest.raises(OutOfRangeError, match=r"greatest_interference.* 300 °C") as refusal:
        target(greatest_interference=0.002, search_limit=300.0)
    assert refusal.value.name == "greatest_interference"


def test_a_material_is_only_asked_for_temperatures_that_are_needed() -> None:
    def ends_at_250(temperature: float) -> float:
        if temperature > 250.0:
            raise OutOfRangeError("temperature", temperature, "be at most 250 °C")
        return 12e-6

    assert target(part_expansion=ends_at_250) == pytest.approx(20.0 + 0.002 / 12e-6)


def test_a_search_limit_that_is_no_round_number_is_reached_and_not_passed() -> None:
    asked: list[float] = []

    def watched(temperature: float) -> float:
        asked.append(temperature)
        return 12e-6

    with pytest.raises(OutOfRangeError):
        target(greatest_interference=0.01, part_expansion=watched, search_limit=123.4)
    assert max(asked) == 123.4


@pytest.mark.parametrize(
    ("changed", "name"),
    [
        ({"clearance": -1e-6}, "clearance"),
        ({"diameter": 0.0}, "diameter"),
        ({"expansion_spread": 1.0}, "expansion_spread"),
        ({"expansion_spread": -0.01}, "expansion_spread"),
        ({"greatest_interference": -0.2}, "greatest_interference"),
        ({"greatest_interference": float("nan")}, "greatest_interference"),
    ],
    ids=lambda value: str(value),
)
def test_an_input_out_of_range_is_refused_by_name(changed: dict[str, float], name: str) -> None:
    with pytest.raises(OutOfRangeError, match=name):
        target(**changed)


@pytest.mark.parametrize("name", ["bore_diameter", "seat_diameter"])
def test_an_opening_without_a_diameter_is_refused_by_name(name: str) -> None:
    sizes = {"bore_diameter": 0.1, "seat_diameter": 0.1} | {name: 0.0}
    with pytest.raises(OutOfRangeError, match=name):
        opening(
            **sizes,
            mean_bore_temperature=200.0,
            shaft_temperature=20.0,
            part_expansion=steel,
            shaft_expansion=steel,
        )


@pytest.mark.parametrize(
    ("seat", "clearance", "name"), [(0.0, 0.0, "seat_diameter"), (0.1, -1e-6, "clearance")]
)
def test_a_gauge_out_of_range_is_refused_by_name(seat: float, clearance: float, name: str) -> None:
    with pytest.raises(OutOfRangeError, match=name):
        gauge_diameter(
            seat_diameter=seat, shaft_temperature=20.0, shaft_expansion=steel, clearance=clearance
        )
