import cmath
import math

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from models.engineering.errors import OutOfRangeError
from models.engineering.runout import (
    cold_agreement,
    common_turn,
    index_test,
    repeatability,
    still_to_come,
)
from tests.published.printed import printed

MICRON = 1e-6


def noise(source, *shape):
    return source.normal(size=shape) + 1j * source.normal(size=shape)


@given(turn=st.floats(-3.1, 3.1), seed=st.integers(0, 10_000))
def test_a_turn_of_all_stations_is_found_and_leaves_nothing(turn, seed):
    before = noise(np.random.default_rng(seed), 6)
    found = common_turn(
        before_vectors=before, after_vectors=before * cmath.exp(1j * turn), uncertainties=[0.1] * 6
    )
    assert found.angle == pytest.approx(turn, abs=1e-9)
    assert abs(found.remaining).max() < 1e-9


def test_the_turn_agrees_with_a_search_over_all_angles():
    source = np.random.default_rng(1)
    before, spreads = noise(source, 7) * 10, source.uniform(0.5, 2.0, size=7)
    after = before * cmath.exp(0.4j) + noise(source, 7) * spreads
    trials = np.linspace(-math.pi, math.pi, 200_001)
    squares = np.zeros_like(trials)
    for first, second, spread in zip(before, after, spreads, strict=True):
        squares += np.abs(second - first * np.exp(1j * trials)) ** 2 / spread**2
    found = common_turn(before_vectors=before, after_vectors=after, uncertainties=spreads)
    assert found.angle == pytest.approx(trials[np.argmin(squares)], abs=1e-4)


def test_the_uncertainty_of_the_turn_is_its_scatter_and_the_rest_counts_about_one():
    source = np.random.default_rng(2)
    before = noise(source, 8) * 10
    found = [
        common_turn(
            before_vectors=before,
            after_vectors=before * cmath.exp(0.3j) + noise(source, 8),
            uncertainties=np.ones(8),
        )
        for _ in range(3000)
    ]
    assert found[0].angle_uncertainty == pytest.approx(
        np.std([one.angle for one in found]), rel=0.05
    )
    assert np.mean([one.remaining_ratio**2 for one in found]) == pytest.approx(1.0, rel=0.05)


def test_a_bend_is_not_explained_by_a_turn():
    found = common_turn(
        before_vectors=[5, 5j, -5, 5],
        after_vectors=[5, 10 + 5j, -5 - 10j, 5],
        uncertainties=[1] * 4,
    )
    assert found.share_explained < 0.1
    assert found.remaining_ratio > 5


def test_surveys_that_agree_need_no_turn():
    found = common_turn(before_vectors=[1, 2j], after_vectors=[1, 2j], uncertainties=[1, 1])
    assert found.angle == 0.0
    assert found.share_explained == 0.0


def test_a_station_not_read_twice_is_left_out_of_the_turn():
    found = common_turn(
        before_vectors=[1, np.nan, 2], after_vectors=[1j, 5, 2j], uncertainties=[1, 1, 1]
    )
    assert found.angle == pytest.approx(math.pi / 2)
    assert np.isnan(found.remaining).tolist() == [False, True, False]


@pytest.mark.parametrize(
    ("name", "surveys"),
    [
        ("after_vectors", {"before_vectors": [1, 2], "after_vectors": [1, np.nan]}),
        ("second survey", {"before_vectors": [1, 2], "after_vectors": [1]}),
    ],
)
def test_too_little_for_a_turn_is_refused_by_name(name, surveys):
    with pytest.raises(OutOfRangeError, match=name):
        common_turn(uncertainties=1.0, **surveys)


def test_a_turn_without_uncertainty_is_refused_by_name():
    with pytest.raises(OutOfRangeError, match="uncertainties"):
        common_turn(before_vectors=[1, 2], after_vectors=[1, 2], uncertainties=[1, 0])


numbers = st.complex_numbers(max_magnitude=1e3)


@given(part=numbers, seat=numbers)
def test_what_turns_with_the_part_and_what_stays_are_told_apart(part, seat):
    shares = index_test(change_at_zero=seat + part, change_at_half_turn=seat - part)
    assert shares.part == pytest.approx(part, abs=1e-9)
    assert shares.seat == pytest.approx(seat, abs=1e-9)


def test_a_change_that_stays_when_the_part_is_turned_is_the_seats_alone():
    shares = index_test(change_at_zero=12j, change_at_half_turn=12j)
    assert (shares.part, shares.seat) == (0, 12j)


def test_the_repeatability_found_is_the_one_put_in():
    source = np.random.default_rng(3)
    first, second = noise(source, 2000) * 0.7, noise(source, 2000) * 0.7
    found = repeatability(first_vectors=first, second_vectors=second)
    assert found.vector_uncertainty == pytest.approx(0.7, rel=0.05)
    assert found.pairs == 2000


def test_the_visible_change_covers_about_nineteen_of_twenty_components_of_no_change():
    source = np.random.default_rng(4)
    first, second = noise(source, 20_000), noise(source, 20_000)
    visible = repeatability(first_vectors=first, second_vectors=second).visible_change_tir
    along_one_direction = 2 * np.abs((second - first).real)
    assert np.mean(along_one_direction < visible) == pytest.approx(0.9545, abs=0.01)


def test_the_repeatability_says_how_well_it_is_known():
    source = np.random.default_rng(5)
    found = [
        repeatability(first_vectors=noise(source, 10), second_vectors=noise(source, 10))
        for _ in range(3000)
    ]
    scatter = np.std([one.vector_uncertainty for one in found])
    assert found[0].relative_uncertainty == pytest.approx(scatter, rel=0.07)


def test_repeatability_without_a_pair_is_refused_by_name():
    with pytest.raises(OutOfRangeError, match="second_vectors"):
        repeatability(first_vectors=[np.nan], second_vectors=[1.0])


def test_agreement_names_the_station_that_differs_most():
    agreement = cold_agreement(first_vectors=[0, 3, np.nan, 4j], second_vectors=[0, 4, 2, 1j])
    # By hand: totals 0, 2 and 6; root of (0 + 4 + 36)/3 is 3.65.
    assert agreement.greatest_tir == 6.0
    assert agreement.station == 3
    assert agreement.root_mean_square_tir == printed("3.65")


def test_agreement_without_a_common_station_is_refused_by_name():
    with pytest.raises(OutOfRangeError, match="second_vectors"):
        cold_agreement(first_vectors=[np.nan, 1], second_vectors=[1, np.nan])


def test_two_microns_in_half_an_hour_can_be_nineteen_from_cold():
    # By hand: 2 / (exp(0.5 / 5) − 1) = 19.0.
    remainder = still_to_come(difference=2 * MICRON, elapsed=0.5 * 3600, time_constant=5 * 3600)
    assert remainder == printed("19.0", MICRON)


@given(elapsed=st.floats(0.01, 10.0), start=st.floats(1.0, 100.0))
def test_what_is_still_to_come_is_what_a_decay_has_left(elapsed, start):
    first, second = start * math.exp(-1.0), start * math.exp(-1.0 - elapsed)
    remainder = still_to_come(difference=first - second, elapsed=elapsed, time_constant=1.0)
    assert remainder == pytest.approx(second)


@pytest.mark.parametrize("name", ["difference", "elapsed", "time_constant"])
def test_a_decay_that_cannot_be_is_refused_by_name(name):
    values = {"difference": 1.0, "elapsed": 1.0, "time_constant": 1.0} | {name: -1.0}
    with pytest.raises(OutOfRangeError, match=name):
        still_to_come(**values)
