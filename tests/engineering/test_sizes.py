import math

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from models.engineering.errors import OutOfRangeError
from models.engineering.sizes import (
    diameter_at_reference,
    interference,
    summarise_sizes,
)
from tests.published.printed import printed
from tests.published.sizes import READINGS_AWAY_FROM_20

MICRO = 1e-6
NAN = math.nan


@pytest.mark.parametrize("row", READINGS_AWAY_FROM_20, ids=lambda row: row.case)
def test_a_diameter_read_away_from_20_degrees_is_the_one_printed(row):
    assert diameter_at_reference(**row.inputs) == printed(row.printed_mm, 1e-3), row.source


@pytest.mark.parametrize(
    ("diameter", "error"),
    [(0.05, "0.575"), (0.10, "1.150"), (0.15, "1.725"), (0.20, "2.300"), (0.30, "3.450")],
)
def test_one_kelvin_falsifies_a_steel_diameter_as_by_hand(diameter, error):
    # By hand: diameter times 11.5e-6 1/K times 1 K.
    found = diameter - diameter_at_reference(
        diameter=diameter,
        part_temperature=21.0,
        part_expansion=11.5e-6,
        gauge_temperature=20.0,
        gauge_expansion=11.5e-6,
    )
    assert found == printed(error, MICRO)


@given(
    st.floats(0.01, 1.0),
    st.floats(-20.0, 60.0),
    st.floats(8e-6, 25e-6),
    st.floats(0.0, 40.0),
    st.floats(8e-6, 25e-6),
)
def test_a_part_of_known_size_is_recovered_from_what_a_gauge_would_read(
    true, part_at, part_alpha, gauge_at, gauge_alpha
):
    # Second path: grow the part, and count how many of the gauge's own grown units it spans.
    grown_part = true + true * part_alpha * (part_at - 20.0)
    grown_unit = 1.0 + gauge_alpha * (gauge_at - 20.0)
    found = diameter_at_reference(
        diameter=grown_part / grown_unit,
        part_temperature=part_at,
        part_expansion=part_alpha,
        gauge_temperature=gauge_at,
        gauge_expansion=gauge_alpha,
    )
    assert found == pytest.approx(true, rel=1e-12)


@pytest.mark.parametrize(
    ("change", "field"),
    [
        ({"diameter": 0.0}, "diameter"),
        ({"part_expansion": 11.5}, "part_expansion"),
        ({"gauge_expansion": math.nan}, "gauge_expansion"),
    ],
)
def test_a_reading_that_cannot_be_is_refused_by_name(change, field):
    with pytest.raises(OutOfRangeError, match=field):
        diameter_at_reference(**{**READINGS_AWAY_FROM_20[0].inputs, **change})


def test_a_survey_by_hand_is_summed_up():
    # Three positions, three angles; micrometres over 150 mm; by hand.
    over = [[10.0, 14.0, 12.0], [20.0, NAN, 24.0], [30.0, 30.0, 36.0]]
    found = summarise_sizes(
        diameters=np.array(over) * MICRO + 0.150, axial_positions=[0.0, 0.05, 0.10]
    )
    assert [mean - 0.150 for mean in found.position_means] == [
        printed("12", MICRO),
        printed("22", MICRO),
        printed("32", MICRO),
    ]
    assert list(found.out_of_roundness) == [printed(text, MICRO) for text in ("4.0", "4.0", "6.0")]
    assert found.greatest_out_of_roundness == printed("6.00", MICRO)
    assert found.taper_slope == printed("200.00", MICRO)
    assert found.taper_end_to_end == printed("20.00", MICRO)
    assert found.bulge == printed("0.00", MICRO)
    assert found.mean - 0.150 == printed("22.00", MICRO)
    assert found.least - 0.150 == printed("10.00", MICRO)
    assert found.greatest - 0.150 == printed("36.00", MICRO)
    assert found.count == 8


def test_a_barrel_bulges_and_a_bell_mouth_does_the_opposite():
    barrel = summarise_sizes(
        diameters=[[0.100000], [0.100008], [0.100002]], axial_positions=[0.0, 0.05, 0.10]
    )
    assert barrel.bulge == printed("7.0", MICRO)
    bell = summarise_sizes(
        diameters=[[0.100008], [0.100000], [0.100002]], axial_positions=[0.0, 0.05, 0.10]
    )
    assert bell.bulge == printed("-5.0", MICRO)


def test_what_one_reading_cannot_tell_is_not_told():
    found = summarise_sizes(diameters=[[0.15, NAN], [NAN, NAN]], axial_positions=[0.0, 0.1])
    assert found.count == 1
    assert found.mean == found.least == found.greatest == 0.15
    unknown = (
        found.position_means[1],
        *found.out_of_roundness,
        found.greatest_out_of_roundness,
        found.taper_slope,
        found.taper_end_to_end,
        found.bulge,
    )
    assert all(math.isnan(value) for value in unknown)


surveys = st.integers(2, 5).flatmap(
    lambda positions: st.lists(
        st.lists(st.floats(0.099, 0.101), min_size=4, max_size=4),
        min_size=positions,
        max_size=positions,
    )
)


@given(surveys, st.permutations([0.0, 0.02, 0.05, 0.07, 0.10]))
def test_the_order_of_writing_down_does_not_matter(survey, places):
    places = places[: len(survey)]
    order = np.argsort(places)
    written = summarise_sizes(diameters=survey, axial_positions=places)
    sorted_rows = summarise_sizes(
        diameters=np.array(survey)[order], axial_positions=np.array(places)[order]
    )
    assert written == sorted_rows


@given(surveys)
def test_the_slope_is_that_of_the_library_s_straight_line(survey):
    places = np.linspace(0.0, 0.1, len(survey))
    found = summarise_sizes(diameters=survey, axial_positions=places)
    line = np.polynomial.Polynomial.fit(places, np.mean(survey, axis=1), 1).convert()
    slope = line.coef[1] if line.coef.size > 1 else 0.0
    assert found.taper_slope == pytest.approx(slope, abs=1e-12)


@pytest.mark.parametrize(
    ("diameters", "positions", "field"),
    [
        ([0.1, 0.1], [0.0, 0.1], "diameters"),
        ([[0.1], [0.1]], [0.0], "diameters"),
        ([[0.1], [0.1]], [0.0, 0.0], "axial_positions"),
        ([[0.1], [0.1]], [0.0, NAN], "axial_positions"),
        ([[NAN], [NAN]], [0.0, 0.1], "diameters"),
        ([[0.1], [-0.1]], [0.0, 0.1], "diameters"),
        ([[0.1], [math.inf]], [0.0, 0.1], "diameters"),
    ],
)
def test_a_survey_that_cannot_be_is_refused_by_name(diameters, positions, field):
    with pytest.raises(OutOfRangeError, match=field):
        summarise_sizes(diameters=diameters, axial_positions=positions)


def test_the_interference_of_two_limit_sizes_is_the_one_printed():
    # Shigley solutions, prob. 3-64: 40H7/s6, shaft 40.043 to 40.059, bore 40.000 to 40.025 mm;
    # printed on radius, 0.0295 and 0.009 mm.
    seat = summarise_sizes(diameters=[[0.040043, 0.040059]], axial_positions=[0.0])
    bore = summarise_sizes(diameters=[[0.040000, 0.040025]], axial_positions=[0.0])
    found = interference(seat=seat, bore=bore, nominal_diameter=0.040)
    assert found.greatest == printed("0.0295", 2e-3)
    assert found.least == printed("0.009", 2e-3)
    assert found.mean == printed("38.5", MICRO)
    assert found.ratio == printed("0.0009625")


@given(surveys, surveys)
def test_the_mean_lies_between_least_and_greatest(one, other):
    def summed(survey):
        return summarise_sizes(diameters=survey, axial_positions=range(len(survey)))

    found = interference(seat=summed(one), bore=summed(other), nominal_diameter=0.1)
    swapped = interference(seat=summed(other), bore=summed(one), nominal_diameter=0.1)
    assert found.least - 1e-15 <= found.mean <= found.greatest + 1e-15
    assert found.greatest == pytest.approx(-swapped.least, abs=1e-15)


def test_a_nominal_diameter_of_nothing_is_refused():
    seat = summarise_sizes(diameters=[[0.1]], axial_positions=[0.0])
    with pytest.raises(OutOfRangeError, match="nominal_diameter"):
        interference(seat=seat, bore=seat, nominal_diameter=0.0)
