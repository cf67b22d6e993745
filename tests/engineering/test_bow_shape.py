import math

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from models.engineering.bow_shape import (
    is_blind,
    kink_shape,
    side_to_side_bow,
    unbalance_of_bow,
)
from models.engineering.errors import OutOfRangeError
from tests.published.printed import printed
from tests.published.runout import KINKS, WARM_SIDES
from tests.second_paths.bent_shaft import centreline

MICRON = 1e-6
STATIONS = np.arange(9) * 0.2


def test_the_shape_of_a_bend_agrees_with_hand_work():
    row = KINKS[0]
    shape = kink_shape(positions=STATIONS, kink_position=0.9, first_journal=0.0, second_journal=1.6)
    # The source counts the bulge the other way round.
    assert -60 * MICRON * shape == pytest.approx(np.array(row.offsets) * MICRON, abs=1e-15)


@pytest.mark.parametrize("kink", [0.05, 0.4, 0.9, 1.3, 1.75])
def test_the_shape_of_a_bend_agrees_with_adding_up_slopes(kink):
    def curvature(places):
        inside = np.where(np.abs(places - kink) < 0.5e-3, 1.0, 0.0)
        return -inside / (np.count_nonzero(inside) * (places[1] - places[0]))

    places, offsets = centreline(
        curvature=curvature, first_journal=0.2, second_journal=1.6, start=-0.1, end=2.0
    )
    here = slice(None, None, 2000)
    shape = kink_shape(
        positions=places[here], kink_position=kink, first_journal=0.2, second_journal=1.6
    )
    assert shape == pytest.approx(offsets[here], abs=5e-4)


@given(kink=st.floats(-0.5, 2.5))
def test_a_bend_anywhere_leaves_the_journals_where_they_are(kink):
    shape = kink_shape(
        positions=[0.3, 1.5], kink_position=kink, first_journal=0.3, second_journal=1.5
    )
    assert shape == pytest.approx([0.0, 0.0], abs=1e-12)


def test_a_bend_on_an_overhang_moves_the_overhang_alone():
    shape = kink_shape(
        positions=[0.0, 0.5, 1.0, 1.2, 1.5],
        kink_position=1.2,
        first_journal=0.0,
        second_journal=1.0,
    )
    assert shape == pytest.approx([0.0, 0.0, 0.0, 0.0, -0.3])


def test_journals_in_the_wrong_order_are_refused_by_name():
    with pytest.raises(OutOfRangeError, match="second_journal"):
        kink_shape(positions=[0.5], kink_position=0.5, first_journal=1.0, second_journal=1.0)


@pytest.mark.parametrize(
    ("position", "blind"), [(0.39, False), (0.4, True), (0.45, True), (0.5, True), (0.51, False)]
)
def test_a_covered_stretch_is_blind_up_to_its_edges(position, blind):
    assert is_blind(position=position, stretches=[(0.5, 0.4)]) is blind


def test_nothing_covered_is_nowhere_blind():
    assert not is_blind(position=0.0, stretches=[])


@pytest.mark.parametrize("row", WARM_SIDES, ids=lambda row: f"{row.span} m")
def test_the_bow_of_a_warm_side_agrees_with_its_source(row):
    bow = side_to_side_bow(
        temperature_difference=row.difference,
        span=row.span,
        diameter=row.diameter,
        expansion=11.5e-6,
    )
    assert bow == printed(row.bow, MICRON), row.source
    assert 2 * bow == printed(row.total, MICRON), row.source


def test_the_bow_of_a_warm_side_agrees_with_adding_up_its_curvature():
    _, offsets = centreline(
        curvature=lambda places: np.full(places.shape, -11e-6 * 1.5 / 0.18),
        first_journal=0.0,
        second_journal=1.9,
        start=0.0,
        end=1.9,
    )
    bow = side_to_side_bow(temperature_difference=1.5, span=1.9, diameter=0.18, expansion=11e-6)
    assert bow == pytest.approx(offsets.max(), rel=1e-4)


def test_a_shaft_of_one_temperature_is_straight():
    bow = side_to_side_bow(temperature_difference=0.0, span=1.0, diameter=0.1, expansion=1e-5)
    assert bow == 0.0


@pytest.mark.parametrize("name", ["span", "diameter"])
def test_a_shaft_without_size_is_refused_by_name(name):
    shaft = {"temperature_difference": 1.0, "span": 1.0, "diameter": 1.0, "expansion": 1e-5}
    with pytest.raises(OutOfRangeError, match=name):
        side_to_side_bow(**(shaft | {name: 0.0}))


def test_the_unbalance_of_an_offset_part_agrees_with_the_book():
    # Bloch & Geitner, Machinery Component Maintenance and Repair, page 282: 20 lb, total .001 in.
    first, second = unbalance_of_bow(
        masses=[20 * 0.45359237],
        eccentricities=[0.0005 * 0.0254],
        positions=[0.3],
        plane_positions=(0.0, 1.0),
    )
    assert (first + second).real == printed("4.54", 1e-3 * 0.0254)


@given(seed=st.integers(0, 10_000))
def test_the_planes_carry_the_whole_and_its_moment_and_mass_order_is_nothing(seed):
    source = np.random.default_rng(seed)
    masses, places = source.uniform(1, 50, size=5), source.uniform(-0.2, 2.2, size=5)
    offsets = source.normal(size=5) + 1j * source.normal(size=5)
    planes = (0.4, 1.7)
    first, second = unbalance_of_bow(
        masses=masses, eccentricities=offsets, positions=places, plane_positions=planes
    )
    whole = np.sum(masses * offsets)
    moment = np.sum(masses * offsets * places)
    assert first + second == pytest.approx(whole)
    assert first * planes[0] + second * planes[1] == pytest.approx(moment)


def test_a_mass_in_a_plane_belongs_to_that_plane_alone():
    first, second = unbalance_of_bow(
        masses=[2.0], eccentricities=[3j], positions=[0.5], plane_positions=(0.5, 1.0)
    )
    assert (first, second) == (6j, 0)


@pytest.mark.parametrize(
    ("name", "change"),
    [
        ("plane_positions", {"plane_positions": (0.5, 0.5)}),
        ("masses", {"masses": [-1.0]}),
        ("positions", {"positions": [0.1, 0.2]}),
    ],
)
def test_masses_that_cannot_be_resolved_are_refused_by_name(name, change):
    inputs = {
        "masses": [1.0],
        "eccentricities": [1.0],
        "positions": [0.5],
        "plane_positions": (0.0, 1.0),
    }
    with pytest.raises(OutOfRangeError, match=name):
        unbalance_of_bow(**(inputs | change))
    assert math.isfinite(abs(unbalance_of_bow(**inputs)[0]))
