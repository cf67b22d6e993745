"""Unbalance as a vector: force, bow, stages, corrections, splitting."""

import cmath
import math

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from models.engineering.balance import (
    TwoPlanes,
    centrifugal_force,
    clock_angle,
    mass_to_add,
    mass_to_remove,
    split_between_places,
    stage_contribution,
    unbalance_of_bow,
    unbalance_of_offset,
)
from models.engineering.errors import OutOfRangeError
from tests.published import balance as published
from tests.second_paths.balancing import Machine, force_by_acceleration

unbalances = st.complex_numbers(min_magnitude=1e-7, max_magnitude=1e-1)
angles = st.floats(0.0, 2.0 * math.pi)


@pytest.mark.parametrize("row", published.FORCES, ids=lambda row: row.case)
def test_centrifugal_force_agrees_with_its_source(row: published.ForceRow) -> None:
    force = centrifugal_force(
        unbalance=row.unbalance, speed=row.revolutions * published.REVOLUTIONS_PER_MINUTE
    )
    assert force == row.force, row.source


@given(mass=st.floats(1e-4, 10.0), radius=st.floats(1e-3, 1.0), speed=st.floats(1.0, 5000.0))
def test_centrifugal_force_is_mass_times_the_acceleration_of_its_path(
    mass: float, radius: float, speed: float
) -> None:
    force = centrifugal_force(unbalance=mass * radius, speed=speed)
    assert force == pytest.approx(force_by_acceleration(mass, radius, speed), rel=1e-6)


@given(unbalance=unbalances, turn=angles)
def test_the_force_does_not_depend_on_the_clock_angle_and_rests_with_the_rotor(
    unbalance: complex, turn: float
) -> None:
    turned = centrifugal_force(unbalance=unbalance * cmath.exp(1j * turn), speed=300.0)
    assert turned == pytest.approx(centrifugal_force(unbalance=unbalance, speed=300.0))
    assert centrifugal_force(unbalance=unbalance, speed=0.0) == 0.0


@pytest.mark.parametrize("row", published.OFFSETS, ids=lambda row: row.case)
def test_unbalance_of_an_offset_agrees_with_its_source(row: published.OffsetRow) -> None:
    unbalance = unbalance_of_offset(mass=row.mass, eccentricity=row.eccentricity)
    assert abs(unbalance) == row.unbalance, row.source


def test_an_offset_keeps_its_clock_angle() -> None:
    unbalance = unbalance_of_offset(mass=3.0, eccentricity=cmath.rect(1e-5, 1.25))
    assert cmath.phase(unbalance) == pytest.approx(1.25)


def machine(particles) -> Machine:
    return Machine(
        mass=400.0, inertia=90.0, centre=0.9, pedestals=(0.1, 1.7), stiffness=(4e7, 6e7),
        damping=2e-4, speed=80.0, particles=particles,
    )  # fmt: skip


def test_a_bowed_rotor_shakes_a_balancing_machine_as_its_two_unbalances_do() -> None:
    generator = np.random.default_rng(20)
    masses = generator.uniform(5.0, 60.0, 9)
    positions = np.linspace(-0.1, 1.9, 9)
    offsets = generator.normal(0.0, 1e-5, 9) + 1j * generator.normal(0.0, 1e-5, 9)
    seen = unbalance_of_bow(
        masses=masses, eccentricities=offsets, positions=positions,
        first_plane=0.3, second_plane=1.4,
    )  # fmt: skip
    particles = [
        (float(place), complex(mass * offset))
        for mass, offset, place in zip(masses, offsets, positions, strict=True)
    ]
    bowed = machine(particles).readings()
    resolved = machine([(0.3, seen.first), (1.4, seen.second)]).readings()
    assert resolved == pytest.approx(bowed, rel=1e-9)


def test_a_mass_in_a_plane_belongs_to_that_plane_alone() -> None:
    seen = unbalance_of_bow(
        masses=[12.0], eccentricities=[2e-6j], positions=[1.4], first_plane=0.3, second_plane=1.4
    )
    assert seen.first == pytest.approx(0.0, abs=1e-20)
    assert seen.second == pytest.approx(24e-6j)


def test_an_overhung_mass_shows_opposite_in_the_far_plane() -> None:
    seen = unbalance_of_bow(
        masses=[10.0], eccentricities=[1e-5], positions=[1.5], first_plane=0.0, second_plane=1.0
    )
    assert seen.first == pytest.approx(-5e-5)
    assert seen.second == pytest.approx(15e-5)


@given(shift=unbalances, order=st.permutations(range(5)))
def test_the_order_of_summing_does_not_matter(shift: complex, order: list[int]) -> None:
    masses = np.array([3.0, 5.0, 8.0, 2.0, 7.0])
    offsets = shift * np.array([1.0, 1j, -1.0, 0.5, 2j])
    places = np.array([0.1, 0.4, 0.6, 0.9, 1.2])

    def seen(index):
        return unbalance_of_bow(
            masses=masses[index], eccentricities=offsets[index], positions=places[index],
            first_plane=0.0, second_plane=1.0,
        )  # fmt: skip

    one, other = seen(np.arange(5)), seen(np.array(order))
    assert other.first == pytest.approx(one.first, rel=1e-9)
    assert other.second == pytest.approx(one.second, rel=1e-9)
    assert one.first + one.second == pytest.approx(complex(np.sum(masses * offsets)), rel=1e-9)


@given(before=unbalances, brought=unbalances)
def test_what_a_part_brings_is_found_whatever_was_there(before: complex, brought: complex) -> None:
    found = stage_contribution(
        before=TwoPlanes(before, 2.0 * before),
        after=TwoPlanes(before + brought, 2.0 * before - brought),
    )
    assert found.first == pytest.approx(brought, rel=1e-6, abs=1e-15)
    assert found.second == pytest.approx(-brought, rel=1e-6, abs=1e-15)


def test_a_stage_is_what_the_machine_sees_of_the_new_part_alone() -> None:
    old = [(0.5, 3e-4 + 1e-4j), (1.2, -2e-4j)]
    new = [(0.8, 1e-4j), (1.0, 5e-5)]

    def seen(particles):
        return unbalance_of_bow(
            masses=np.ones(len(particles)),
            eccentricities=[unbalance for _, unbalance in particles],
            positions=[place for place, _ in particles],
            first_plane=0.1,
            second_plane=1.7,
        )

    brought = stage_contribution(before=seen(old), after=seen(old + new))
    alone = machine(new).readings()
    assert machine([(0.1, brought.first), (1.7, brought.second)]).readings() == pytest.approx(
        alone, rel=1e-9
    )


def test_equal_sizes_before_and_after_can_hide_what_a_part_brought() -> None:
    brought = stage_contribution(
        before=TwoPlanes(cmath.rect(1e-4, 0.0), 0.0),
        after=TwoPlanes(cmath.rect(1e-4, math.pi), 0.0),
    )
    assert abs(brought.first) == pytest.approx(2e-4)


@given(unbalance=unbalances, radius=st.floats(0.01, 1.0))
def test_the_mass_added_and_the_unbalance_cancel(unbalance: complex, radius: float) -> None:
    added = mass_to_add(unbalance=unbalance, radius=radius)
    left = unbalance + added.mass * cmath.rect(radius, added.angle)
    assert abs(left) <= 1e-12 * abs(unbalance)
    assert 0.0 <= added.angle < 2.0 * math.pi


@given(unbalance=unbalances, radius=st.floats(0.01, 1.0))
def test_the_mass_removed_takes_the_unbalance_with_it(unbalance: complex, radius: float) -> None:
    removed = mass_to_remove(unbalance=unbalance, radius=radius)
    left = unbalance - removed.mass * cmath.rect(radius, removed.angle)
    assert abs(left) <= 1e-12 * abs(unbalance)


def test_mass_is_added_opposite_to_where_it_would_be_removed() -> None:
    # By hand: 720.08 g·mm, one oz·in, at 90° and a radius of 72 mm is 10.0 g.
    added = mass_to_add(unbalance=720.08e-6j, radius=0.072)
    removed = mass_to_remove(unbalance=720.08e-6j, radius=0.072)
    assert added.mass == removed.mass == pytest.approx(10.0e-3, abs=0.05e-3)
    assert removed.angle == pytest.approx(math.pi / 2.0)
    assert added.angle == pytest.approx(3.0 * math.pi / 2.0)


@pytest.mark.parametrize("row", published.SPLITS, ids=lambda row: row.case)
def test_splitting_agrees_with_its_source(row: published.SplitRow) -> None:
    split = split_between_places(
        unbalance=row.vector,
        first_angle=row.first_degrees * published.DEGREE,
        second_angle=row.second_degrees * published.DEGREE,
    )
    assert split.first == row.first, row.source
    assert split.second == row.second, row.source


@given(
    size=st.floats(1e-6, 1e-1), first=angles, gap=st.floats(0.05, 3.0), share=st.floats(0.0, 1.0)
)
def test_the_two_parts_of_a_split_make_the_vector_and_weigh_no_less(
    size: float, first: float, gap: float, share: float
) -> None:
    vector = cmath.rect(size, first + share * gap)
    for here, there in ((first, first + gap), (first + gap, first)):
        split = split_between_places(unbalance=vector, first_angle=here, second_angle=there)
        made = cmath.rect(split.first, here) + cmath.rect(split.second, there)
        assert abs(made - vector) <= 1e-7 * size
        assert split.first + split.second >= size * (1.0 - 1e-9)


def test_splitting_agrees_with_a_linear_solution() -> None:
    first, second = 0.4, 1.9
    vector = cmath.rect(2e-4, 1.1)
    base = np.array([[math.cos(first), math.cos(second)], [math.sin(first), math.sin(second)]])
    solution = np.linalg.solve(base, [vector.real, vector.imag])
    split = split_between_places(unbalance=vector, first_angle=first, second_angle=second)
    assert [split.first, split.second] == pytest.approx(solution)


def test_a_place_that_is_right_takes_the_whole() -> None:
    split = split_between_places(unbalance=cmath.rect(1e-4, 0.7), first_angle=0.7, second_angle=1.5)
    assert split.first == pytest.approx(1e-4)
    assert split.second == pytest.approx(0.0, abs=1e-18)


@given(vector=st.complex_numbers(max_magnitude=1e3))
def test_a_clock_angle_lies_within_one_turn(vector: complex) -> None:
    assert 0.0 <= clock_angle(vector=vector) < 2.0 * math.pi
    assert abs(cmath.rect(abs(vector), clock_angle(vector=vector)) - vector) <= 1e-12 * abs(vector)


def test_no_vector_has_the_angle_of_the_mark_whatever_the_sign_of_its_zeros() -> None:
    assert clock_angle(vector=complex(-0.0, -0.0)) == 0.0
    assert clock_angle(vector=complex(1.0, -1e-320)) == 0.0


@pytest.mark.parametrize(
    ("name", "call"),
    [
        ("speed", lambda: centrifugal_force(unbalance=1.0, speed=-1.0)),
        ("unbalance", lambda: centrifugal_force(unbalance=complex(math.nan, 0), speed=1.0)),
        ("mass", lambda: unbalance_of_offset(mass=-1.0, eccentricity=1.0)),
        ("eccentricities", lambda: unbalance_of_bow(
            masses=[1.0], eccentricities=[1.0, 2.0], positions=[0.0],
            first_plane=0.0, second_plane=1.0)),
        ("positions", lambda: unbalance_of_bow(
            masses=[1.0], eccentricities=[1.0], positions=[0.0, 1.0],
            first_plane=0.0, second_plane=1.0)),
        ("masses", lambda: unbalance_of_bow(
            masses=[math.inf], eccentricities=[1.0], positions=[0.0],
            first_plane=0.0, second_plane=1.0)),
        ("second_plane", lambda: unbalance_of_bow(
            masses=[1.0], eccentricities=[1.0], positions=[0.0],
            first_plane=1.0, second_plane=1.0)),
        ("after", lambda: stage_contribution(
            before=TwoPlanes(0.0, 0.0), after=TwoPlanes(0.0, complex(0, math.inf)))),
        ("radius", lambda: mass_to_add(unbalance=1.0, radius=0.0)),
        ("radius", lambda: mass_to_remove(unbalance=1.0, radius=-1.0)),
        ("second_angle", lambda: split_between_places(
            unbalance=1.0, first_angle=0.0, second_angle=math.pi)),
        ("unbalance", lambda: split_between_places(
            unbalance=-1.0, first_angle=-0.5, second_angle=0.5)),
        ("vector", lambda: clock_angle(vector=complex(math.inf, 0.0))),
    ],
    ids=lambda value: value if isinstance(value, str) else "",
)  # fmt: skip
def test_what_is_no_unbalance_is_refused_by_name(name: str, call) -> None:
    with pytest.raises(OutOfRangeError) as refusal:
        call()
    assert refusal.value.name == name
