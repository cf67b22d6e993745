import cmath
import math

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from models.engineering.bow import fit_one_kink, fit_two_kinks, kink_shape, nearest_seat
from models.engineering.errors import OutOfRangeError
from models.engineering.runout import change_at_stations
from tests.bench.kink_rates import chance_improvements
from tests.published.printed import printed
from tests.published.runout import KINKS, at
from tests.second_paths.bent_shaft import kink_by_trial

MICRON = 1e-6
STATIONS = np.arange(9) * 0.2
ENDS = {"first_journal_position": 0.0, "second_journal_position": 1.6}
SPREADS = np.full(9, 0.2 * MICRON)


def bent(*kinks, positions=STATIONS):
    """Offsets from the journal axis of a shaft with bends (place, complex angle)."""
    return sum(
        angle
        * kink_shape(
            positions=positions, kink_position=place, first_journal=0.0, second_journal=1.6
        )
        for place, angle in kinks
    )


def noise(source, *shape):
    return (source.normal(size=shape) + 1j * source.normal(size=shape)) * 0.2 * MICRON


@pytest.mark.parametrize("row", KINKS, ids=lambda row: row.case)
def test_the_size_of_a_bend_at_a_known_place_agrees_with_its_source(row):
    offsets = -np.array(row.offsets)
    shape = bent((0.9, 1e-6)) * 1e6
    size = shape @ offsets / (shape @ shape)
    assert size == printed(row.bend_microradians), row.source
    assert np.sum((offsets - size * shape) ** 2) == printed(row.squares), row.source


@pytest.mark.parametrize("row", KINKS, ids=lambda row: row.case)
def test_the_place_of_a_bend_agrees_with_its_source_within_its_uncertainty(row):
    # The source holds both ends fast; with the line left free the place may move a little.
    kink = fit_one_kink(
        positions=STATIONS,
        changes=np.array(row.offsets) * MICRON,
        uncertainties=SPREADS,
        **ENDS,
    )
    assert abs(kink.position - float(row.position)) <= kink.position_uncertainty + 0.005
    assert kink.clock_angle == pytest.approx(math.pi)


def test_a_bend_without_noise_is_found_whole():
    kink = fit_one_kink(
        positions=STATIONS, changes=bent((0.9, at(60e-6, 130))), uncertainties=SPREADS, **ENDS
    )
    assert kink.position == pytest.approx(0.9, abs=1e-4)
    assert kink.bend_angle == pytest.approx(60e-6, rel=1e-3)
    assert math.degrees(kink.clock_angle) == pytest.approx(130)
    # By hand: 60 µrad · 0.9 · 0.7 / 1.6.
    assert kink.bulge == pytest.approx(23.625 * MICRON, rel=1e-3)
    assert kink.share_explained == pytest.approx(1.0, abs=1e-6)
    assert kink.residual_rms < 0.01 * MICRON


@pytest.mark.parametrize("seed", range(6))
def test_the_place_agrees_with_trying_every_place_on_two_joined_lines(seed):
    source = np.random.default_rng(seed)
    positions = np.sort(source.uniform(0.0, 1.6, size=10))
    spreads = source.uniform(0.2, 0.6, size=10) * MICRON
    changes = bent((source.uniform(0.4, 1.2), at(40e-6, 77)), positions=positions)
    changes = changes + noise(source, 10) * spreads / (0.2 * MICRON)
    kink = fit_one_kink(positions=positions, changes=changes, uncertainties=spreads, **ENDS)
    _, place, bend = kink_by_trial(positions=positions, changes=changes, spreads=spreads)
    assert kink.position == pytest.approx(place, abs=0.0006)
    assert kink.bend_angle == pytest.approx(abs(bend), rel=2e-3)
    assert kink.clock_angle == pytest.approx(cmath.phase(bend) % (2 * math.pi), abs=2e-3)


def test_the_interval_holds_the_truth_about_as_often_as_one_standard_uncertainty_does():
    source = np.random.default_rng(7)
    held = 0
    for _ in range(400):
        place = source.uniform(0.4, 1.2)
        kink = fit_one_kink(
            positions=STATIONS,
            changes=bent((place, 15e-6j)) + noise(source, 9),
            uncertainties=SPREADS,
            **ENDS,
        )
        held += kink.position_interval[0] - 0.002 <= place <= kink.position_interval[1] + 0.002
    assert 0.6 < held / 400 < 0.85


@given(
    turn=st.floats(-math.pi, math.pi),
    shift=st.complex_numbers(max_magnitude=1e-4),
    tilt=st.complex_numbers(max_magnitude=1e-4),
)
def test_turning_or_laying_the_rotor_otherwise_moves_no_bend(turn, shift, tilt):
    changes = bent((0.7, 30e-6)) + noise(np.random.default_rng(8), 9)
    plain = fit_one_kink(positions=STATIONS, changes=changes, uncertainties=SPREADS, **ENDS)
    other = fit_one_kink(
        positions=STATIONS,
        changes=(changes + shift + tilt * STATIONS) * cmath.exp(1j * turn),
        uncertainties=SPREADS,
        **ENDS,
    )
    assert other.position == pytest.approx(plain.position, abs=1e-4)
    assert other.bend_angle == pytest.approx(plain.bend_angle, rel=1e-3)
    assert cmath.exp(1j * (other.clock_angle - plain.clock_angle - turn)) == pytest.approx(1)


@pytest.mark.parametrize("place", [1.6, 1.75])
def test_a_bend_on_an_overhang_is_found_there(place):
    positions = np.append(STATIONS, [1.8, 2.0, 2.2])
    changes = bent((place, 50e-6), positions=positions)
    kink = fit_one_kink(
        positions=positions, changes=changes, uncertainties=[0.2 * MICRON] * 12, **ENDS
    )
    assert kink.position == pytest.approx(place, abs=1e-3)
    assert kink.bulge == pytest.approx(0.0, abs=1e-8)


def test_a_bend_that_moves_the_last_station_alone_may_sit_anywhere_in_the_last_stretch():
    positions = np.append(STATIONS, [1.9])
    changes = bent((1.7, 50e-6), positions=positions)
    kink = fit_one_kink(
        positions=positions, changes=changes, uncertainties=[0.2 * MICRON] * 10, **ENDS
    )
    assert kink.position == pytest.approx(1.6)
    assert kink.position_interval[1] > 1.85


def test_only_the_places_offered_are_considered():
    kink = fit_one_kink(
        positions=STATIONS,
        changes=bent((0.9, 60e-6)),
        uncertainties=SPREADS,
        candidates=[0.5, 0.8, 1.3],
        **ENDS,
    )
    assert kink.position == 0.8


@pytest.mark.parametrize(("stretch", "blind"), [((0.85, 1.1), True), ((1.0, 1.1), False)])
def test_a_bend_under_a_part_is_marked_blind(stretch, blind):
    kink = fit_one_kink(
        positions=STATIONS,
        changes=bent((0.9, 60e-6)),
        uncertainties=SPREADS,
        blind_stretches=[stretch],
        **ENDS,
    )
    assert kink.blind is blind


def test_stations_in_another_order_or_missing_change_nothing():
    changes = bent((0.9, 60e-6)) + noise(np.random.default_rng(9), 9)
    plain = fit_one_kink(positions=STATIONS, changes=changes, uncertainties=SPREADS, **ENDS)
    turned = fit_one_kink(
        positions=np.append(STATIONS[::-1], 0.5),
        changes=np.append(changes[::-1], np.nan),
        uncertainties=np.append(SPREADS, np.nan),
        **ENDS,
    )
    assert turned.position == pytest.approx(plain.position)
    assert turned.bend_angle == pytest.approx(plain.bend_angle)


def test_a_change_of_surveys_goes_straight_into_the_fit():
    source = np.random.default_rng(10)
    before = noise(source, 9) * 50
    spreads = np.full(9, 0.2 * MICRON / math.sqrt(2))
    change = change_at_stations(
        positions=STATIONS,
        before_vectors=before,
        after_vectors=before + bent((0.9, 60e-6)) + 7e-6 + 3e-6j * STATIONS,
        before_uncertainties=spreads,
        after_uncertainties=spreads,
        first_journal=0,
        second_journal=8,
    )
    kink = fit_one_kink(
        positions=STATIONS,
        changes=change.changes,
        uncertainties=change.reading_uncertainties,
        **ENDS,
    )
    assert kink.position == pytest.approx(0.9, abs=1e-3)
    assert kink.bend_angle == pytest.approx(60e-6, rel=1e-3)


def test_a_shaft_that_did_not_bend_explains_nothing():
    kink = fit_one_kink(positions=STATIONS, changes=np.zeros(9), uncertainties=SPREADS, **ENDS)
    assert kink.bend_angle == 0.0
    assert kink.share_explained == 0.0
    assert kink.improvement == 0.0


def test_two_bends_apart_are_told_apart():
    source = np.random.default_rng(11)
    changes = bent((0.4, 60e-6), (1.2, 40e-6j)) + noise(source, 9)
    kinks = fit_two_kinks(positions=STATIONS, changes=changes, uncertainties=SPREADS, **ENDS)
    assert kinks.accepted
    assert kinks.positions == pytest.approx((0.4, 1.2), abs=0.03)
    assert kinks.bend_angles == pytest.approx((60e-6, 40e-6), rel=0.1)
    assert kinks.clock_angles[1] == pytest.approx(math.pi / 2, abs=0.1)
    assert kinks.misfit_ratio < 2 < kinks.one.misfit_ratio


def test_one_bend_is_not_made_into_two():
    changes = bent((0.9, 60e-6)) + noise(np.random.default_rng(12), 9)
    kinks = fit_two_kinks(positions=STATIONS, changes=changes, uncertainties=SPREADS, **ENDS)
    assert not kinks.accepted
    assert kinks.one.position == pytest.approx(0.9, abs=0.03)


def test_noise_alone_is_rarely_a_bend_and_one_bend_rarely_two():
    first, _ = chance_improvements(surveys=300, seed=1)
    _, second = chance_improvements(surveys=300, seed=2, bend=60e-6)
    assert np.mean(first > 12.0) <= 0.02
    assert np.mean(second > 12.0) <= 0.02


@pytest.mark.parametrize(
    ("fit", "count"), [(fit_one_kink, 3), (fit_two_kinks, 5)], ids=["one kink", "two kinks"]
)
def test_too_few_stations_for_a_bend_are_refused_by_name(fit, count):
    with pytest.raises(OutOfRangeError, match="positions"):
        fit(
            positions=STATIONS[:count],
            changes=np.zeros(count),
            uncertainties=SPREADS[:count],
            **ENDS,
        )


@pytest.mark.parametrize(
    ("name", "wrong"),
    [
        ("uncertainties", {"uncertainties": np.zeros(9)}),
        ("changes", {"changes": np.zeros(8)}),
        ("candidates", {"candidates": []}),
        ("second_journal", {"second_journal_position": 0.0}),
    ],
)
def test_a_fit_that_cannot_be_made_is_refused_by_name(name, wrong):
    inputs = {"positions": STATIONS, "changes": np.zeros(9), "uncertainties": SPREADS, **ENDS}
    with pytest.raises(OutOfRangeError, match=name):
        fit_one_kink(**(inputs | wrong))


def test_the_nearest_seat_may_lie_beside_the_bend():
    seats = [(0.1, 0.3), (0.6, 0.5), (0.9, 1.0)]
    found = nearest_seat(position=0.7, position_interval=(0.65, 0.92), seats=seats)
    assert found.seat == 1
    assert found.distance == pytest.approx(0.1)
    assert found.in_reach == (2,)


def test_no_seat_is_refused_by_name():
    with pytest.raises(OutOfRangeError, match="seats"):
        nearest_seat(position=0.7, position_interval=(0.6, 0.8), seats=[])
