"""Growth with temperature."""

from collections.abc import Callable, Sequence

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st
from numpy.polynomial import Polynomial as Series

from models.engineering.errors import OutOfRangeError
from models.engineering.expansion import (
    area_weighted_mean_temperature,
    coefficient_from_other_base,
    diameter_at,
    mean_of_instantaneous,
)
from tests.published.heating import (
    OTHER_BASES,
    POLYNOMIALS,
    TABLE_EXPANSIONS,
    UNEVEN_DISCS,
    OtherBase,
    Polynomial,
    TableExpansion,
    UnevenDisc,
)
from tests.published.printed import printed
from tests.second_paths.warm_disc import bore_growth

INCH = 0.0254
PER_FAHRENHEIT = 1.8

temperature = st.floats(-100.0, 500.0)


def celsius(fahrenheit: float) -> float:
    return (fahrenheit - 32.0) / 1.8


def steel(temperature: float) -> float:
    return 11.5e-6 + 5e-9 * temperature


def fahrenheit_table(table: Sequence[tuple[float, float]]) -> Callable[[float], float]:
    at = [celsius(fahrenheit) for fahrenheit, _ in table]
    values = [value * PER_FAHRENHEIT for _, value in table]
    return lambda temperature: float(np.interp(temperature, at, values))


@pytest.mark.parametrize("row", TABLE_EXPANSIONS, ids=lambda row: row.case)
def test_growth_of_a_hundred_feet_agrees_with_its_table(row: TableExpansion) -> None:
    table = fahrenheit_table(
        [(70.0, 6.4e-6), (row.temperature_fahrenheit, row.coefficient_per_degree_fahrenheit)]
    )

    def from_20(temperature: float) -> float:
        return coefficient_from_other_base(
            temperature=temperature, expansion_from_table_base=table, table_base=celsius(70.0)
        )

    length = 1200.0 * INCH
    hot = diameter_at(
        diameter=length, temperature=celsius(row.temperature_fahrenheit), expansion=from_20
    )
    warm = diameter_at(diameter=length, temperature=celsius(70.0), expansion=from_20)
    assert hot - warm == printed(row.growth_inches, INCH), row.source


@pytest.mark.parametrize("row", OTHER_BASES, ids=lambda row: row.case)
def test_growth_from_another_base_agrees_with_its_source(row: OtherBase) -> None:
    base, to = celsius(row.from_fahrenheit), celsius(row.to_fahrenheit)
    coefficient = coefficient_from_other_base(
        temperature=to,
        expansion_from_table_base=fahrenheit_table(row.table_fahrenheit),
        table_base=celsius(row.table_base_fahrenheit),
        base=base,
    )
    assert coefficient * (to - base) == printed(row.growth), row.source


@pytest.mark.parametrize("row", POLYNOMIALS, ids=lambda row: row.case)
def test_growth_from_a_polynomial_agrees_with_its_source(row: Polynomial) -> None:
    mean = mean_of_instantaneous(
        instantaneous=lambda kelvin: float(Series(row.coefficients)(kelvin)),
        temperature=row.to_temperature,
        base=row.from_temperature,
    )
    assert mean * (row.to_temperature - row.from_temperature) == printed(row.growth), row.source


@pytest.mark.parametrize("row", UNEVEN_DISCS, ids=lambda row: row.case)
def test_mean_over_the_area_agrees_with_its_source(row: UnevenDisc) -> None:
    mean = area_weighted_mean_temperature(
        radii=[row.bore_radius, row.rim_radius], temperatures=[row.bore_rise, row.rim_rise]
    )
    assert mean == printed(row.mean_rise), row.source


def test_a_narrow_ring_takes_the_plain_mean_of_its_two_temperatures() -> None:
    mean = area_weighted_mean_temperature(radii=[1.0, 1.0 + 1e-9], temperatures=[100.0, 300.0])
    assert mean == pytest.approx(200.0, abs=1e-6)


def test_a_part_at_20_degrees_has_its_own_diameter_without_asking_the_table() -> None:
    def empty(temperature: float) -> float:
        raise AssertionError(temperature)

    assert diameter_at(diameter=0.1, temperature=20.0, expansion=empty) == 0.1


def test_the_mean_over_a_short_span_is_the_coefficient_there() -> None:
    mean = mean_of_instantaneous(instantaneous=steel, temperature=300.0, base=299.999)
    assert mean == pytest.approx(steel(300.0), rel=1e-6)


@pytest.mark.parametrize(
    "rises", [[300.0, 100.0, 100.0], [100.0, 300.0, 50.0], [0.0, 0.0, 200.0]], ids=str
)
@pytest.mark.parametrize("poisson", [0.28, 0.33])
def test_a_free_bore_grows_with_the_mean_over_the_area(rises: list[float], poisson: float) -> None:
    radii = [0.060, 0.110, 0.250]
    grown = bore_growth(radii=radii, rises=rises, coefficient=12e-6, poisson=poisson)
    mean = area_weighted_mean_temperature(radii=radii, temperatures=rises)
    assert 12e-6 * mean * radii[0] == pytest.approx(grown, rel=1e-4)


@given(diameter=st.floats(0.01, 2.0), factor=st.floats(0.1, 10.0), temperature=temperature)
def test_growth_is_proportional_to_the_diameter(
    diameter: float, factor: float, temperature: float
) -> None:
    one = diameter_at(diameter=diameter, temperature=temperature, expansion=steel)
    other = diameter_at(diameter=factor * diameter, temperature=temperature, expansion=steel)
    assert other == pytest.approx(factor * one)


@given(table_base=st.floats(-20.0, 30.0), temperature=st.floats(60.0, 500.0))
def test_a_coefficient_taken_to_another_base_and_back_is_the_same(
    table_base: float, temperature: float
) -> None:
    def from_20(at: float) -> float:
        if at == 20.0:
            return 0.0
        return coefficient_from_other_base(
            temperature=at, expansion_from_table_base=steel, table_base=table_base
        )

    back = coefficient_from_other_base(
        temperature=temperature, expansion_from_table_base=from_20, table_base=20.0, base=table_base
    )
    assert back == pytest.approx(steel(temperature), rel=1e-9)


@given(
    temperatures=st.lists(st.floats(0.0, 400.0), min_size=2, max_size=6),
    shift=st.floats(-100.0, 100.0),
)
def test_a_uniformly_warmer_disc_is_warmer_by_as_much(
    temperatures: list[float], shift: float
) -> None:
    radii = [0.05 + 0.03 * index for index in range(len(temperatures))]
    mean = area_weighted_mean_temperature(radii=radii, temperatures=temperatures)
    warmer = area_weighted_mean_temperature(
        radii=radii, temperatures=[value + shift for value in temperatures]
    )
    assert warmer == pytest.approx(mean + shift, abs=1e-9)
    assert min(temperatures) - 1e-9 <= mean <= max(temperatures) + 1e-9


@given(low=temperature, middle=temperature, high=temperature)
def test_growth_over_two_stretches_adds_up(low: float, middle: float, high: float) -> None:
    def growth(start: float, end: float) -> float:
        mean = mean_of_instantaneous(instantaneous=steel, temperature=end, base=start)
        return mean * (end - start)

    assert growth(low, middle) + growth(middle, high) == pytest.approx(growth(low, high), abs=1e-12)


@pytest.mark.parametrize("diameter", [0.0, -0.1, float("nan")])
def test_a_diameter_that_is_none_is_refused_by_name(diameter: float) -> None:
    with pytest.raises(OutOfRangeError, match="diameter"):
        diameter_at(diameter=diameter, temperature=100.0, expansion=steel)


def test_a_mean_over_no_span_is_refused_by_name() -> None:
    with pytest.raises(OutOfRangeError, match="temperature"):
        coefficient_from_other_base(
            temperature=20.0, expansion_from_table_base=steel, table_base=0.0
        )


@pytest.mark.parametrize(
    ("radii", "temperatures", "name"),
    [
        ([0.1], [20.0], "radii"),
        ([0.2, 0.1], [20.0, 20.0], "radii"),
        ([-0.1, 0.1], [20.0, 20.0], "radii"),
        ([0.1, float("nan")], [20.0, 20.0], "radii"),
        ([0.1, 0.2], [20.0], "temperatures"),
    ],
)
def test_a_profile_that_is_none_is_refused_by_name(
    radii: list[float], temperatures: list[float], name: str
) -> None:
    with pytest.raises(OutOfRangeError, match=name):
        area_weighted_mean_temperature(radii=radii, temperatures=temperatures)
