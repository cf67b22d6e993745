from dataclasses import replace

import pytest
from hypothesis import given
from hypothesis import strategies as st
from uncertainties import correlated_values, ufloat

from models.engineering.errors import OutOfRangeError
from models.engineering.size_uncertainty import (
    SizeMeasurement,
    interference_uncertainty,
    size_uncertainty,
)
from tests.published.printed import printed

EXACT = SizeMeasurement(
    diameter=0.150,
    part_temperature=20.0,
    part_expansion=11.5e-6,
    gauge_temperature=20.0,
    gauge_expansion=11.5e-6,
    instrument_uncertainty=0.0,
    repeatability=0.0,
    part_temperature_uncertainty=0.0,
    gauge_temperature_uncertainty=0.0,
    part_expansion_uncertainty=0.0,
    gauge_expansion_uncertainty=0.0,
)

measurements = st.builds(
    SizeMeasurement,
    diameter=st.floats(0.05, 0.5),
    part_temperature=st.floats(5.0, 40.0),
    part_expansion=st.floats(8e-6, 25e-6),
    gauge_temperature=st.floats(5.0, 40.0),
    gauge_expansion=st.floats(8e-6, 25e-6),
    instrument_uncertainty=st.floats(1e-7, 1e-5),
    repeatability=st.floats(1e-7, 1e-5),
    part_temperature_uncertainty=st.floats(0.05, 3.0),
    gauge_temperature_uncertainty=st.floats(0.05, 3.0),
    part_expansion_uncertainty=st.floats(1e-8, 1e-6),
    gauge_expansion_uncertainty=st.floats(1e-8, 1e-6),
)


@pytest.mark.parametrize(
    ("change", "text"),
    [
        # By hand: 150 mm times 11.5e-6 1/K times 1 K.
        ({"part_temperature_uncertainty": 1.0}, "1.725"),
        ({"gauge_temperature_uncertainty": 1.0}, "1.725"),
        # By hand: 150 mm times 10 K times 0.92e-6 1/K (8 % of 11.5), over 1.000115.
        ({"part_temperature": 30.0, "part_expansion_uncertainty": 0.92e-6}, "1.380"),
        ({"gauge_temperature": 30.0, "gauge_expansion_uncertainty": 0.92e-6}, "1.380"),
        # At 20 °C a coefficient does not matter.
        ({"part_expansion_uncertainty": 0.92e-6}, "0.000"),
        ({"instrument_uncertainty": 2.5e-6}, "2.500"),
        ({"repeatability": 1.5e-6}, "1.500"),
    ],
)
def test_each_source_of_doubt_counts_as_by_hand(change, text):
    assert size_uncertainty(measurement=replace(EXACT, **change)) == printed(text, 1e-6)


def test_independent_instruments_add_as_squares():
    # Fit example: seat known to 2 µm and bore to 3 µm; by hand √13.
    seat = replace(EXACT, instrument_uncertainty=2e-6)
    bore = replace(EXACT, instrument_uncertainty=3e-6)
    assert interference_uncertainty(seat=seat, bore=bore) == printed("3.61", 1e-6)


def at_20_by_library(measurement, read, coefficient):
    reading = read + ufloat(0.0, measurement.repeatability)
    part = ufloat(measurement.part_temperature, measurement.part_temperature_uncertainty)
    gauge = ufloat(measurement.gauge_temperature, measurement.gauge_temperature_uncertainty)
    gauge_alpha = ufloat(measurement.gauge_expansion, measurement.gauge_expansion_uncertainty)
    return reading * (1 + gauge_alpha * (gauge - 20)) / (1 + coefficient * (part - 20))


def correlated(values, deviations, correlation):
    first, second = deviations
    shared = correlation * first * second
    return correlated_values(values, [[first**2, shared], [shared, second**2]])


@given(measurements, measurements, st.floats(-0.99, 0.99), st.floats(-0.99, 0.99))
def test_a_general_library_propagates_the_same_uncertainty(
    seat, bore, instrument_correlation, expansion_correlation
):
    reads = correlated(
        [seat.diameter, bore.diameter],
        [seat.instrument_uncertainty, bore.instrument_uncertainty],
        instrument_correlation,
    )
    # Scaled, because the library's eigenvalues lose variances of 1e-14 beside nothing.
    scaled = correlated(
        [seat.part_expansion * 1e6, bore.part_expansion * 1e6],
        [seat.part_expansion_uncertainty * 1e6, bore.part_expansion_uncertainty * 1e6],
        expansion_correlation,
    )
    sizes = [
        at_20_by_library(measurement, read, coefficient * 1e-6)
        for measurement, read, coefficient in zip((seat, bore), reads, scaled, strict=True)
    ]
    found = interference_uncertainty(
        seat=seat,
        bore=bore,
        instrument_correlation=instrument_correlation,
        expansion_correlation=expansion_correlation,
    )
    assert found == pytest.approx((sizes[0] - sizes[1]).std_dev, rel=1e-6)
    assert size_uncertainty(measurement=seat) == pytest.approx(sizes[0].std_dev, rel=1e-6)


@given(measurements, measurements, st.floats(-1.0, 1.0))
def test_more_in_common_never_makes_the_difference_worse_known(seat, bore, correlation):
    less = interference_uncertainty(seat=seat, bore=bore, instrument_correlation=correlation)
    more = interference_uncertainty(seat=seat, bore=bore, instrument_correlation=1.0)
    assert more <= less * (1 + 1e-12)


@given(measurements)
def test_one_measurement_wholly_in_common_with_itself_leaves_only_what_is_its_own(measurement):
    bare = replace(
        measurement,
        repeatability=0.0,
        part_temperature_uncertainty=0.0,
        gauge_temperature_uncertainty=0.0,
        gauge_expansion_uncertainty=0.0,
    )
    left = interference_uncertainty(
        seat=bare, bore=bare, instrument_correlation=1.0, expansion_correlation=1.0
    )
    assert left == 0.0


@pytest.mark.parametrize("name", ["instrument_correlation", "expansion_correlation"])
def test_a_correlation_beyond_one_is_refused_by_name(name):
    with pytest.raises(OutOfRangeError, match=name):
        interference_uncertainty(seat=EXACT, bore=EXACT, **{name: 1.1})


@pytest.mark.parametrize(
    "name", ["instrument_uncertainty", "repeatability", "part_temperature_uncertainty"]
)
def test_a_negative_uncertainty_is_refused_by_name(name):
    with pytest.raises(OutOfRangeError, match=name):
        size_uncertainty(measurement=replace(EXACT, **{name: -1e-6}))
