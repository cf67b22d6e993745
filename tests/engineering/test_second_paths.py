"""Closed forms against solutions that share no formula with them."""

import math

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from models.engineering.air import air_at
from models.engineering.balance import split_between_places
from models.engineering.balance import unbalance_of_bow as seen_by_a_machine
from models.engineering.balance_limits import allocate_between_bearings
from models.engineering.bow_shape import unbalance_of_bow
from models.engineering.datum import datum_uncertainty, journal_datum
from models.engineering.same_state import repeatability
from models.engineering.shaft import (
    STANDARD_GRAVITY,
    AddedMass,
    StepSection,
    journal_loads,
    journal_loads_from_centre_of_gravity,
)
from models.engineering.size_uncertainty import (
    SizeMeasurement,
    interference_uncertainty,
    size_uncertainty,
)
from models.engineering.uncertainty import combined_uncertainty, uncertainty_of_mean
from tests.second_paths.dice import spread_of
from tests.second_paths.equilibrium import along_two_directions, two_supports
from tests.second_paths.still_air import air_of

MICRON = 1e-6


@pytest.mark.parametrize(
    "celsius",
    [-50, -20, 0, 10, 20, 30, 40, 50, 60, 70, 80, 90, 100, 120, 140, 160, 180, 200, 250, 300, 350,
     400, -35, 65, 225],
)  # fmt: skip
def test_the_table_of_air_agrees_with_the_laws_of_its_gas(celsius):
    # Sutherland's conductivity and specific heat depart by up to 2 % from tables of the trade.
    air = air_at(temperature=float(celsius))
    conductivity, viscosity, prandtl = air_of(float(celsius))

    assert air.conductivity == pytest.approx(conductivity, rel=0.025)
    assert air.kinematic_viscosity == pytest.approx(viscosity, rel=0.015)
    assert air.prandtl == pytest.approx(prandtl, rel=0.04)


parts = st.lists(
    st.tuples(st.floats(1.0, 500.0), st.floats(-0.5, 3.5), st.complex_numbers(max_magnitude=1e-4)),
    min_size=1,
    max_size=6,
)
planes = st.tuples(st.floats(-1.0, 1.0), st.floats(1.2, 4.0))


@given(parts, planes)
def test_what_a_bow_shows_in_two_planes_balances_forces_and_moments(masses, between):
    weights, places, offsets = zip(*masses, strict=True)
    loads = [weight * offset for weight, offset in zip(weights, offsets, strict=True)]
    first, second = two_supports(loads, places, *between)
    room = 1e-9 * (1.0 + abs(first) + abs(second))

    told = unbalance_of_bow(
        masses=weights, eccentricities=offsets, positions=places, plane_positions=between
    )
    assert told[0] == pytest.approx(first, abs=room)
    assert told[1] == pytest.approx(second, abs=room)
    seen = seen_by_a_machine(
        masses=weights,
        eccentricities=offsets,
        positions=places,
        first_plane=between[0],
        second_plane=between[1],
    )
    assert seen.first == pytest.approx(first, abs=room)
    assert seen.second == pytest.approx(second, abs=room)


@given(st.floats(0.5, 5.0), planes, st.floats(-0.5, 3.5))
def test_the_loads_of_a_mass_balance_it(mass, between, centre):
    first, second = two_supports([mass * STANDARD_GRAVITY], [centre], *between)
    told = journal_loads_from_centre_of_gravity(
        mass=mass, centre_of_gravity=centre, first_journal=between[0], second_journal=between[1]
    )

    assert told.first == pytest.approx(first.real, rel=1e-9, abs=1e-9)
    assert told.second == pytest.approx(second.real, rel=1e-9, abs=1e-9)


def test_a_stepped_shaft_weighs_what_its_slices_weigh():
    sections = [
        StepSection(start=0.1, end=0.4, outer_diameter=0.08, inner_diameter=0.0, density=7850.0,
                    modulus=207e9),
        StepSection(start=0.4, end=1.3, outer_diameter=0.12, inner_diameter=0.03, density=7850.0,
                    modulus=207e9),
        StepSection(start=1.3, end=1.5, outer_diameter=0.07, inner_diameter=0.0, density=7800.0,
                    modulus=207e9),
    ]  # fmt: skip
    added = [AddedMass(position=0.7, mass=40.0), AddedMass(position=1.45, mass=6.0)]
    slices = 3000
    loads, places = [], []
    for one in sections:
        width = (one.end - one.start) / slices
        for number in range(slices):
            places.append(one.start + (number + 0.5) * width)
            ring = math.pi / 4.0 * (one.outer_diameter**2 - one.inner_diameter**2)
            loads.append(ring * width * one.density)
    loads += [one.mass for one in added]
    places += [one.position for one in added]
    first, second = two_supports(loads, places, 0.2, 1.4)
    told = journal_loads(
        sections=sections, added_masses=added, first_journal=0.2, second_journal=1.4
    )

    assert told.mass == pytest.approx(sum(loads), rel=1e-9)
    assert told.first == pytest.approx(first.real * STANDARD_GRAVITY, rel=1e-9)
    assert told.second == pytest.approx(second.real * STANDARD_GRAVITY, rel=1e-9)


@given(planes, st.floats(0.35, 0.65))
def test_the_planes_share_what_is_allowed_as_their_reactions_share_the_weight(between, share):
    centre = between[0] + share * (between[1] - between[0])
    first, second = two_supports([1.0], [centre], *between)
    told = allocate_between_bearings(
        permissible=1.0,
        centre_of_gravity=centre,
        first_plane=between[0],
        second_plane=between[1],
    )

    assert told.first == pytest.approx(first.real, rel=1e-9)
    assert told.second == pytest.approx(second.real, rel=1e-9)


@given(st.floats(0.1, 50.0), st.floats(0.0, 6.28), st.floats(0.2, 2.8), st.floats(0.05, 0.95))
def test_two_places_make_the_vector_that_is_asked_for(size, start, gap, between):
    angle = start + between * gap
    vector = size * complex(math.cos(angle), math.sin(angle))
    first, second = along_two_directions(vector, start, start + gap)
    told = split_between_places(unbalance=vector, first_angle=start, second_angle=start + gap)

    assert told.first == pytest.approx(first, rel=1e-7, abs=1e-9)
    assert told.second == pytest.approx(second, rel=1e-7, abs=1e-9)


def at_20(diameter, part, part_rate, gauge, gauge_rate):
    """Give a diameter at 20 °C, step by step: what the gauge's length is, then the part's."""
    length = diameter + diameter * gauge_rate * (gauge - 20.0)
    return length - length * part_rate * (part - 20.0) / (1.0 + part_rate * (part - 20.0))


HUB = SizeMeasurement(
    diameter=0.150,
    part_temperature=27.0,
    part_expansion=11.0e-6,
    gauge_temperature=23.0,
    gauge_expansion=11.5e-6,
    instrument_uncertainty=1.5 * MICRON,
    repeatability=0.8 * MICRON,
    part_temperature_uncertainty=0.6,
    gauge_temperature_uncertainty=0.4,
    part_expansion_uncertainty=0.5e-6,
    gauge_expansion_uncertainty=0.3e-6,
)
SHAFT = SizeMeasurement(
    diameter=0.1502,
    part_temperature=22.0,
    part_expansion=12.0e-6,
    gauge_temperature=21.0,
    gauge_expansion=11.5e-6,
    instrument_uncertainty=1.0 * MICRON,
    repeatability=0.5 * MICRON,
    part_temperature_uncertainty=0.3,
    gauge_temperature_uncertainty=0.3,
    part_expansion_uncertainty=0.6e-6,
    gauge_expansion_uncertainty=0.2e-6,
)


def drawn(one):
    means = [one.diameter, 0.0, one.part_temperature, one.part_expansion, one.gauge_temperature,
             one.gauge_expansion]  # fmt: skip
    spreads = [one.instrument_uncertainty, one.repeatability, one.part_temperature_uncertainty,
               one.part_expansion_uncertainty, one.gauge_temperature_uncertainty,
               one.gauge_expansion_uncertainty]  # fmt: skip
    return means, spreads


def size_of(read, again, part, rate, gauge, gauge_rate):
    return at_20(read + again, part, rate, gauge, gauge_rate)


@pytest.mark.parametrize("one", [HUB, SHAFT], ids=["hub", "shaft"])
def test_a_size_spreads_as_drawing_all_its_inputs_says(one):
    means, spreads = drawn(one)

    assert size_uncertainty(measurement=one) == pytest.approx(
        spread_of(size_of, means=means, spreads=spreads), rel=0.01
    )


@pytest.mark.parametrize(("instrument", "expansion"), [(0.0, 0.0), (1.0, 0.0), (0.6, 0.9)])
def test_an_interference_spreads_as_drawing_both_sizes_says(instrument, expansion):
    seat, seat_spreads = drawn(SHAFT)
    bore, bore_spreads = drawn(HUB)

    def difference(*row):
        return size_of(*row[:6]) - size_of(*row[6:])

    found = spread_of(
        difference,
        means=[*seat, *bore],
        spreads=[*seat_spreads, *bore_spreads],
        # What both sizes share: the instrument's error, and the steel's coefficient.
        correlated=[(0, 6, instrument), (3, 9, expansion)],
    )
    told = interference_uncertainty(
        seat=SHAFT,
        bore=HUB,
        instrument_correlation=instrument,
        expansion_correlation=expansion,
    )
    assert told == pytest.approx(found, rel=0.01)


def test_independent_shares_spread_as_drawing_their_sum_says():
    spreads = [3.0, 4.0, 1.0, 0.5]
    found = spread_of(lambda *row: sum(row), means=[0.0] * 4, spreads=spreads)

    assert combined_uncertainty(components=spreads) == pytest.approx(found, rel=0.01)


def test_offsets_in_the_journal_axis_spread_as_drawing_all_stations_says():
    places, spreads = [0.0, 0.4, 0.9, 1.6, 2.0], [1.0, 2.0, 1.5, 0.8, 1.2]
    told = datum_uncertainty(
        positions=places, uncertainties=spreads, first_journal=1, second_journal=3
    )
    for station in range(len(places)):
        found = spread_of(
            lambda *row, station=station: journal_datum_of(places, row)[station],
            means=[0.0] * 5,
            spreads=spreads,
        )
        assert told[station] == pytest.approx(found, rel=0.01, abs=1e-9)


def journal_datum_of(places, rows):
    """Take the line through the second and fourth station away, found as a fit of two points."""
    rows = np.array(rows)
    line = np.polynomial.polynomial.polyfit([places[1], places[3]], rows[[1, 3]], 1)
    return rows - np.polynomial.polynomial.polyvander(places, 1) @ line


def test_the_journal_axis_is_the_line_through_its_two_journals():
    places = [0.0, 0.4, 0.9, 1.6, 2.0]
    offsets = np.array([3 + 1j, -2 + 4j, 5 - 3j, 1 + 1j, -4 + 2j])
    told = journal_datum(positions=places, vectors=offsets, first_journal=1, second_journal=3)

    assert told == pytest.approx(journal_datum_of(places, offsets))


def test_the_mean_of_few_readings_spreads_as_the_means_of_many_rounds_do():
    random = np.random.default_rng(5)
    rounds = random.normal(10.0, 2.0, (40_000, 6))
    squares = [uncertainty_of_mean(readings=row) ** 2 for row in rounds[:4000]]

    assert math.sqrt(np.mean(squares)) == pytest.approx(float(rounds.mean(axis=1).std()), rel=0.02)


def test_a_stand_repeats_as_well_as_the_scatter_it_was_given():
    random = np.random.default_rng(6)
    true = random.normal(0.0, 30.0, 20_000) + 1j * random.normal(0.0, 30.0, 20_000)

    def read():
        return true + random.normal(0.0, 1.7, true.size) + 1j * random.normal(0.0, 1.7, true.size)

    told = repeatability(first_vectors=read(), second_vectors=read())
    assert told.vector_uncertainty == pytest.approx(1.7, rel=0.02)
