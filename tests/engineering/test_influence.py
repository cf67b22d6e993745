"""Influence coefficients of one and two planes."""

import cmath
import math

import numpy as np
import pytest
from hypothesis import assume, given
from hypothesis import strategies as st

from models.engineering.balance import TwoPlanes, clock_angle
from models.engineering.errors import OutOfRangeError
from models.engineering.influence import (
    TwoPlaneInfluence,
    influence_coefficient,
    reading_after_correction,
    single_plane_correction,
    trial_effect,
    two_plane_correction,
    two_plane_influence,
)
from tests.published import balance as published
from tests.second_paths.balancing import Machine

PLANES = (0.35, 1.35)
vectors = st.complex_numbers(min_magnitude=1e-3, max_magnitude=1e3)


def machine(seed: int) -> Machine:
    generator = np.random.default_rng(seed)
    places = generator.uniform(0.2, 1.6, 8)
    sizes = generator.normal(0.0, 2e-4, 8) + 1j * generator.normal(0.0, 2e-4, 8)
    return Machine(
        mass=350.0, inertia=70.0, centre=0.85, pedestals=(0.1, 1.7), stiffness=(3e7, 5e7),
        damping=3e-4, speed=120.0,
        particles=list(zip(places.tolist(), sizes.tolist(), strict=True)),
    )  # fmt: skip


@pytest.mark.parametrize("row", published.ONE_PLANE, ids=lambda row: row.case)
def test_a_one_plane_correction_agrees_with_its_source(row: published.OnePlaneRow) -> None:
    influence = influence_coefficient(before=row.before, with_trial=row.with_trial, trial=row.trial)
    correction = single_plane_correction(reading=row.before, influence=influence)
    assert abs(correction) == row.size, row.source
    assert math.degrees(clock_angle(vector=correction)) == row.degrees, row.source


@pytest.mark.parametrize("seed", range(6))
def test_a_random_rotor_comes_to_rest_with_the_corrections_of_two_planes(seed: int) -> None:
    rotor = machine(seed)
    first_trial, second_trial = cmath.rect(8e-4, 0.4), cmath.rect(6e-4, 3.9)
    before = TwoPlanes(*rotor.readings())
    influence = two_plane_influence(
        before=before,
        with_first_trial=TwoPlanes(*rotor.readings((PLANES[0], first_trial))),
        with_second_trial=TwoPlanes(*rotor.readings((PLANES[1], second_trial))),
        first_trial=first_trial,
        second_trial=second_trial,
    )
    corrections = two_plane_correction(readings=before, influence=influence)
    left = rotor.readings((PLANES[0], corrections.first), (PLANES[1], corrections.second))
    assert max(abs(reading) for reading in left) < 1e-9 * abs(before.first)


def test_readings_can_be_foreseen_for_corrections_that_were_rounded() -> None:
    rotor = machine(11)
    trial = 5e-4
    before = TwoPlanes(*rotor.readings())
    influence = two_plane_influence(
        before=before,
        with_first_trial=TwoPlanes(*rotor.readings((PLANES[0], trial))),
        with_second_trial=TwoPlanes(*rotor.readings((PLANES[1], trial))),
        first_trial=trial,
        second_trial=trial,
    )
    made = TwoPlanes(3e-4 - 1e-4j, 2e-4j)
    foreseen = reading_after_correction(readings=before, influence=influence, corrections=made)
    read = rotor.readings((PLANES[0], made.first), (PLANES[1], made.second))
    assert [foreseen.first, foreseen.second] == pytest.approx(read, rel=1e-9)


def test_a_static_correction_in_one_plane_stills_one_pedestal() -> None:
    rotor = machine(5)
    before = rotor.readings()[0]
    trial = cmath.rect(5e-4, 2.2)
    influence = influence_coefficient(
        before=before, with_trial=rotor.readings((PLANES[0], trial))[0], trial=trial
    )
    correction = single_plane_correction(reading=before, influence=influence)
    assert abs(rotor.readings((PLANES[0], correction))[0]) < 1e-9 * abs(before)


def test_planes_that_do_not_hear_each_other_are_two_single_planes() -> None:
    influence = TwoPlaneInfluence(2.0 + 1.0j, 0.0, 0.0, -1.5j)
    readings = TwoPlanes(3.0, 4.0j)
    both = two_plane_correction(readings=readings, influence=influence)
    assert both.first == pytest.approx(
        single_plane_correction(reading=readings.first, influence=2.0 + 1.0j)
    )
    assert both.second == pytest.approx(
        single_plane_correction(reading=readings.second, influence=-1.5j)
    )


@given(before=vectors, with_trial=vectors, trial=vectors, turn=st.floats(0.0, 6.28))
def test_turning_the_phase_of_all_readings_leaves_the_correction(
    before: complex, with_trial: complex, trial: complex, turn: float
) -> None:
    assume(abs(with_trial - before) > 1e-6 * abs(before))

    def correction(by: complex) -> complex:
        influence = influence_coefficient(
            before=by * before, with_trial=by * with_trial, trial=trial
        )
        return single_plane_correction(reading=by * before, influence=influence)

    assert correction(cmath.exp(1j * turn)) == pytest.approx(correction(1.0), rel=1e-6)


@given(true=vectors, unbalance=vectors, trial=vectors)
def test_the_correction_is_the_unbalance_reversed_whatever_the_trial(
    true: complex, unbalance: complex, trial: complex
) -> None:
    before = true * unbalance
    with_trial = true * (unbalance + trial)
    assume(abs(trial) > 1e-6 * abs(unbalance))
    influence = influence_coefficient(before=before, with_trial=with_trial, trial=trial)
    correction = single_plane_correction(reading=before, influence=influence)
    assert correction == pytest.approx(-unbalance, rel=1e-6)


def test_the_effect_of_a_trial_is_told_in_amplitude_and_phase() -> None:
    effect = trial_effect(before=cmath.rect(4.0, 3.0), with_trial=cmath.rect(5.2, -3.0))
    assert effect.amplitude_change == pytest.approx(0.3)
    assert effect.phase_change == pytest.approx(2.0 * math.pi - 6.0)


@given(before=vectors, change=st.floats(0.0, 10.0), phase=st.floats(-3.1, 3.1))
def test_the_effect_can_be_undone(before: complex, change: float, phase: float) -> None:
    effect = trial_effect(before=before, with_trial=before * cmath.rect(change, phase))
    again = before * (1.0 + effect.amplitude_change) * cmath.exp(1j * effect.phase_change)
    assert again == pytest.approx(before * cmath.rect(change, phase), rel=1e-9, abs=1e-9)


def test_condition_is_one_for_planes_that_do_not_hear_each_other() -> None:
    assert TwoPlaneInfluence(3.0, 0.0, 0.0, 3.0j).condition == pytest.approx(1.0)
    assert TwoPlaneInfluence(3.0, 2.9, 2.9, 3.0).condition > 50.0


REST = TwoPlanes(1.0, 1.0)


@pytest.mark.parametrize(
    ("name", "call"),
    [
        ("trial", lambda: influence_coefficient(before=1.0, with_trial=2.0, trial=0.0)),
        ("before", lambda: influence_coefficient(
            before=complex(math.nan, 0.0), with_trial=2.0, trial=1.0)),
        ("with_trial", lambda: trial_effect(before=1.0, with_trial=complex(math.inf, 0.0))),
        ("before", lambda: trial_effect(before=0.0, with_trial=1.0)),
        ("influence", lambda: single_plane_correction(reading=1.0, influence=0.0)),
        ("trial", lambda: two_plane_influence(
            before=REST, with_first_trial=REST, with_second_trial=REST,
            first_trial=1.0, second_trial=0.0)),
        ("influence", lambda: two_plane_correction(
            readings=REST, influence=TwoPlaneInfluence(1.0, 2.0, 2.0, 4.0))),
        ("influence", lambda: two_plane_correction(
            readings=REST, influence=TwoPlaneInfluence(math.nan, 2.0, 2.0, 4.0))),
        ("readings", lambda: two_plane_correction(
            readings=TwoPlanes(math.inf, 0.0), influence=TwoPlaneInfluence(1.0, 0.0, 0.0, 1.0))),
        ("corrections", lambda: reading_after_correction(
            readings=REST, influence=TwoPlaneInfluence(1.0, 0.0, 0.0, 1.0),
            corrections=TwoPlanes(math.nan, 0.0))),
    ],
    ids=lambda value: value if isinstance(value, str) else "",
)  # fmt: skip
def test_a_weight_without_effect_is_refused_by_name(name: str, call) -> None:
    with pytest.raises(OutOfRangeError) as refusal:
        call()
    assert refusal.value.name == name
