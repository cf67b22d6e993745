"""Air, and the heat it takes from warm surfaces."""

import math

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st
from scipy.integrate import quad

from models.engineering.air import (
    Air,
    air_at,
    nusselt_horizontal_cylinder,
    nusselt_vertical_face,
    rayleigh_number,
)
from models.engineering.errors import OutOfRangeError
from models.engineering.surface_heat import (
    cylinder_coefficient,
    face_coefficient,
    gap_coefficient,
    radiation_coefficient,
)
from tests.published.cooling import (
    AIR_ROWS,
    FACES,
    PIPES,
    RADIATIONS,
    AirRow,
    Face,
    Pipe,
    Radiation,
)
from tests.published.printed import printed

surface = st.floats(25.0, 350.0)


@pytest.mark.parametrize("row", PIPES, ids=lambda row: row.case)
def test_rayleigh_and_nusselt_numbers_agree_with_their_source(row: Pipe) -> None:
    air = Air(
        conductivity=row.conductivity,
        kinematic_viscosity=row.viscosity,
        prandtl=row.prandtl,
        expansion=1.0 / row.film_kelvin,
    )
    rayleigh = rayleigh_number(air=air, length=row.diameter, temperature_difference=row.difference)
    assert rayleigh == printed(row.rayleigh), row.source
    nusselt = nusselt_horizontal_cylinder(rayleigh=rayleigh, prandtl=row.prandtl)
    assert nusselt == printed(row.nusselt), row.source
    heat = nusselt * row.conductivity * math.pi * row.difference
    assert heat == printed(row.heat_per_metre), row.source


@pytest.mark.parametrize("row", FACES, ids=lambda row: row.case)
def test_nusselt_number_of_a_face_agrees_with_its_source(row: Face) -> None:
    nusselt = nusselt_vertical_face(rayleigh=row.rayleigh, prandtl=row.prandtl)
    assert nusselt == printed(row.nusselt), row.source


def test_a_pipe_in_tabulated_air_loses_what_its_source_says_of_nearly_the_same_air() -> None:
    # 5.869 W/(m²·K) is printed for air that differs from the table in its last digit.
    coefficient = cylinder_coefficient(
        diameter=0.08, surface_temperature=70.0, air_temperature=20.0
    )
    assert coefficient == pytest.approx(5.869, rel=0.002)


@pytest.mark.parametrize("row", RADIATIONS, ids=lambda row: row.case)
def test_radiation_of_a_pipe_agrees_with_its_source(row: Radiation) -> None:
    coefficient = radiation_coefficient(
        emissivity=row.emissivity,
        surface_temperature=row.surface - 273.15,
        surroundings_temperature=row.room - 273.15,
    )
    heat = coefficient * math.pi * row.diameter * (row.surface - row.room)
    assert heat == printed(row.heat_per_metre), row.source


@pytest.mark.parametrize("row", AIR_ROWS, ids=lambda row: row.case)
def test_air_agrees_with_a_second_table(row: AirRow) -> None:
    # Published tables of air differ among themselves by up to 2 %.
    air = air_at(temperature=row.kelvin - 273.15)
    assert air.conductivity == pytest.approx(row.conductivity, rel=0.02), row.source
    viscosity = row.dynamic_viscosity / row.density
    assert air.kinematic_viscosity == pytest.approx(viscosity, rel=0.02), row.source


@pytest.mark.parametrize("temperature", [100.0, 200.0, 300.0])
@pytest.mark.parametrize("size", [0.1, 0.25, 0.7])
def test_correlations_agree_with_older_ones_of_another_form(
    temperature: float, size: float
) -> None:
    # From memory: laminar vertical plate 0.59 Ra^¼; long cylinder 0.48 Ra^¼ below 1e7 and
    # 0.125 Ra^⅓ above; near the change of
    # flow the forms differ by a quarter.
    air = air_at(temperature=(temperature + 20.0) / 2.0)
    rayleigh = rayleigh_number(air=air, length=size, temperature_difference=temperature - 20.0)
    plate = 0.59 * rayleigh**0.25 if rayleigh < 1e9 else 0.10 * rayleigh ** (1.0 / 3.0)
    cylinder = 0.48 * rayleigh**0.25 if rayleigh < 1e7 else 0.125 * rayleigh ** (1.0 / 3.0)
    face = face_coefficient(height=size, surface_temperature=temperature, air_temperature=20.0)
    around = cylinder_coefficient(
        diameter=size, surface_temperature=temperature, air_temperature=20.0
    )
    assert face == pytest.approx(plate * air.conductivity / size, rel=0.25)
    assert around == pytest.approx(cylinder * air.conductivity / size, rel=0.25)


def test_a_surface_as_warm_as_its_surroundings_radiates_as_the_derivative_says() -> None:
    kelvin = 400.0
    slope = ((kelvin + 0.01) ** 4 - (kelvin - 0.01) ** 4) / 0.02 * 5.670374e-8
    coefficient = radiation_coefficient(
        emissivity=1.0,
        surface_temperature=kelvin - 273.15,
        surroundings_temperature=kelvin - 273.15,
    )
    assert coefficient == pytest.approx(slope, rel=1e-6)


@pytest.mark.parametrize("eccentricity", [0.0, 0.5, 0.9])
def test_an_eccentric_gap_conducts_as_the_turn_round_it_says(eccentricity: float) -> None:
    gap, conductivity = 0.05e-3, 0.03095
    turn, _ = quad(
        lambda angle: conductivity / (gap * (1.0 - eccentricity * math.cos(angle))), 0.0, math.tau
    )
    coefficient = gap_coefficient(
        clearance=2.0 * gap, gap_temperature=100.0, eccentricity=eccentricity
    )
    assert coefficient == pytest.approx(turn / math.tau, rel=1e-8)


def test_a_gap_conducts_twenty_to_forty_times_as_well_as_the_room() -> None:
    # Common practice says 20 to 40 for gaps of 0.05 to 0.1 mm at the temperatures of a mount.
    free = cylinder_coefficient(
        diameter=0.15, surface_temperature=250.0, air_temperature=20.0
    ) + radiation_coefficient(
        emissivity=0.5, surface_temperature=250.0, surroundings_temperature=20.0
    )
    for clearance in (0.1e-3, 0.2e-3):
        through = gap_coefficient(clearance=clearance, gap_temperature=135.0)
        assert 20.0 < through / free < 45.0


@given(temperature=surface, hotter=st.floats(0.1, 40.0))
def test_a_hotter_surface_loses_more(temperature: float, hotter: float) -> None:
    def heat(at: float) -> float:
        around = cylinder_coefficient(diameter=0.2, surface_temperature=at, air_temperature=20.0)
        end = face_coefficient(height=0.2, surface_temperature=at, air_temperature=20.0)
        radiated = radiation_coefficient(
            emissivity=0.5, surface_temperature=at, surroundings_temperature=20.0
        )
        return (around + end + radiated) * (at - 20.0)

    assert heat(temperature + hotter) > heat(temperature)


@given(rayleigh=st.floats(0.0, 1e11), factor=st.floats(1.0, 10.0), prandtl=st.floats(0.69, 0.74))
def test_more_buoyancy_never_carries_less(rayleigh: float, factor: float, prandtl: float) -> None:
    for nusselt in (nusselt_horizontal_cylinder, nusselt_vertical_face):
        little = nusselt(rayleigh=rayleigh, prandtl=prandtl)
        assert nusselt(rayleigh=rayleigh * factor, prandtl=prandtl) >= little


@given(temperature=st.floats(-50.0, 399.0))
def test_air_conducts_better_and_is_thicker_the_warmer_it_is(temperature: float) -> None:
    cool, warm = air_at(temperature=temperature), air_at(temperature=temperature + 1.0)
    assert warm.conductivity > cool.conductivity
    assert warm.kinematic_viscosity > cool.kinematic_viscosity
    assert np.isclose(cool.expansion * (temperature + 273.15), 1.0)


@pytest.mark.parametrize("temperature", [-51.0, 401.0, float("nan")])
def test_air_outside_its_table_is_refused_by_name(temperature: float) -> None:
    with pytest.raises(OutOfRangeError, match="temperature"):
        air_at(temperature=temperature)


@pytest.mark.parametrize("rayleigh", [-1.0, 1e13, float("nan")])
def test_a_rayleigh_number_out_of_range_is_refused_by_name(rayleigh: float) -> None:
    for nusselt in (nusselt_horizontal_cylinder, nusselt_vertical_face):
        with pytest.raises(OutOfRangeError, match="rayleigh"):
            nusselt(rayleigh=rayleigh, prandtl=0.7)


def test_a_length_that_is_none_is_refused_by_name() -> None:
    with pytest.raises(OutOfRangeError, match="length"):
        rayleigh_number(air=air_at(temperature=20.0), length=0.0, temperature_difference=1.0)


@pytest.mark.parametrize(
    ("emissivity", "surface", "room", "name"),
    [
        (-0.1, 100.0, 20.0, "emissivity"),
        (1.1, 100.0, 20.0, "emissivity"),
        (0.5, -300.0, 20.0, "surface_temperature"),
        (0.5, 100.0, -300.0, "surroundings_temperature"),
    ],
)
def test_radiation_out_of_range_is_refused_by_name(
    emissivity: float, surface: float, room: float, name: str
) -> None:
    with pytest.raises(OutOfRangeError, match=name):
        radiation_coefficient(
            emissivity=emissivity, surface_temperature=surface, surroundings_temperature=room
        )


@pytest.mark.parametrize(
    ("clearance", "eccentricity", "name"),
    [(0.0, 0.0, "clearance"), (1e-4, 1.0, "eccentricity"), (1e-4, -0.1, "eccentricity")],
)
def test_a_gap_out_of_range_is_refused_by_name(
    clearance: float, eccentricity: float, name: str
) -> None:
    with pytest.raises(OutOfRangeError, match=name):
        gap_coefficient(clearance=clearance, gap_temperature=100.0, eccentricity=eccentricity)
