"""Residual unbalance from a trial weight carried round the rotor."""

import cmath
import math

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from models.engineering.errors import OutOfRangeError
from models.engineering.residual import (
    classical_residual,
    false_pass_possible,
    residual_from_amplitudes,
    residual_from_vectors,
    root_by_plain_reading,
)
from tests.published import balance as published
from tests.second_paths.balancing import peak_of_one_turn

residuals = st.floats(1e-6, 1e-3)
phases = st.floats(0.0, 2.0 * math.pi)


def places(count: int) -> np.ndarray:
    return 2.0 * np.pi * np.arange(count) / count


def stepped_round(residual: complex, trial: float, count: int = 6, sensitivity: float = 5e4):
    """Readings of a machine without phase, each by stepping the rotor through one turn."""
    return [
        peak_of_one_turn([residual, cmath.rect(trial, float(place))], sensitivity)
        for place in places(count)
    ]


@pytest.mark.parametrize("row", published.ROUNDS, ids=lambda row: row.case)
def test_both_forms_of_the_check_agree_with_their_source(row: published.RoundRow) -> None:
    check = residual_from_amplitudes(
        trial_unbalance=row.trial, angles=places(row.places), amplitudes=row.readings
    )
    assert check.classical == row.classical, row.source
    assert check.smaller == row.fitted, row.source
    assert math.degrees(check.angle) == row.fitted_degrees, row.source


@pytest.mark.parametrize("count", [6, 12])
@pytest.mark.parametrize("truth", [cmath.rect(2e-4, 0.3), cmath.rect(6e-4, 4.0)])
def test_the_fit_finds_the_truth_of_a_rotor_stepped_through_its_turns(
    truth: complex, count: int
) -> None:
    trial = 8e-4
    check = residual_from_amplitudes(
        trial_unbalance=trial, angles=places(count), amplitudes=stepped_round(truth, trial, count)
    )
    assert check.smaller == pytest.approx(abs(truth), rel=1e-5)
    assert check.angle == pytest.approx(cmath.phase(truth) % (2.0 * math.pi), abs=1e-5)
    assert check.smaller_sensitivity == pytest.approx(5e4, rel=1e-5)
    assert check.scatter < 1e-5 * trial * 5e4


def test_a_residual_above_the_trial_is_the_larger_answer_and_the_classical_form_passes_it() -> None:
    truth, trial, permissible = cmath.rect(30e-6, 2.0), 20e-6, 15e-6
    readings = stepped_round(truth, trial, 12)
    check = residual_from_amplitudes(trial_unbalance=trial, angles=places(12), amplitudes=readings)
    # By hand: T²/R = 400/30 g·mm is what the classical form makes of it.
    assert check.classical == pytest.approx(400e-6 / 30.0, rel=0.04)
    assert check.classical < permissible < abs(truth)
    assert check.smaller == pytest.approx(400e-6 / 30.0, rel=1e-5)
    assert check.larger == pytest.approx(30e-6, rel=1e-5)
    assert check.larger_sensitivity == pytest.approx(5e4, rel=1e-5)
    assert false_pass_possible(check=check, permissible=permissible)


@given(residual=residuals, phase=phases, trial=residuals)
def test_one_of_the_two_answers_is_always_true(residual: float, phase: float, trial: float) -> None:
    vectors = cmath.rect(residual, phase) + trial * np.exp(1j * places(6))
    check = residual_from_amplitudes(
        trial_unbalance=trial, angles=places(6), amplitudes=np.abs(vectors)
    )
    assert check.smaller <= trial * (1.0 + 1e-12)
    assert check.larger >= trial * (1.0 - 1e-12)
    assert check.smaller * check.larger == pytest.approx(trial**2)
    if abs(residual / trial - 1.0) > 0.01:
        true = check.smaller if residual < trial else check.larger
        assert true == pytest.approx(residual, rel=1e-3)


@given(residual=residuals, phase=phases, trial=residuals)
def test_the_reading_without_the_weight_chooses_the_true_answer(
    residual: float, phase: float, trial: float
) -> None:
    vectors = cmath.rect(residual, phase) + trial * np.exp(1j * places(6))
    check = residual_from_amplitudes(
        trial_unbalance=trial, angles=places(6), amplitudes=np.abs(vectors)
    )
    choice = root_by_plain_reading(check=check, plain_reading=residual)
    assert choice.residual == pytest.approx(residual, rel=1e-3)
    if abs(residual / trial - 1.0) > 0.01:
        assert choice.above_trial == (residual > trial)


@given(residual=residuals, phase=phases, trial=residuals, gain=st.floats(0.1, 1e5), lag=phases)
def test_readings_with_phase_leave_one_answer(
    residual: float, phase: float, trial: float, gain: float, lag: float
) -> None:
    truth = cmath.rect(residual, phase)
    readings = cmath.rect(gain, lag) * (truth + trial * np.exp(1j * places(6)))
    for against, seen in ((False, readings), (True, np.conj(readings))):
        check = residual_from_vectors(trial_unbalance=trial, angles=places(6), readings=seen)
        assert check.residual == pytest.approx(truth, rel=1e-6, abs=1e-9 * trial)
        assert check.sensitivity == pytest.approx(cmath.rect(gain, lag), rel=1e-6)
        assert check.phase_runs_against_places is against


def test_phase_catches_the_false_pass() -> None:
    truth, trial = cmath.rect(30e-6, 2.0), 20e-6
    check = residual_from_vectors(
        trial_unbalance=trial, angles=places(12),
        readings=4e3 * (truth + trial * np.exp(1j * places(12))),
    )  # fmt: skip
    assert check.classical < 15e-6 < abs(check.residual)


def test_unevenly_spaced_and_missing_places_are_enough() -> None:
    truth, trial = cmath.rect(3e-4, 5.0), 5e-4
    angles = np.radians([0.0, 30.0, 75.0, 200.0, 310.0])
    amplitudes = np.abs(truth + trial * np.exp(1j * angles))
    check = residual_from_amplitudes(trial_unbalance=trial, angles=angles, amplitudes=amplitudes)
    assert check.smaller == pytest.approx(3e-4)
    assert check.angle == pytest.approx(5.0)


def test_no_residual_reads_alike_everywhere() -> None:
    check = residual_from_amplitudes(trial_unbalance=1e-3, angles=places(6), amplitudes=[2.0] * 6)
    assert check.smaller == pytest.approx(0.0, abs=1e-15)
    assert check.classical == 0.0
    assert check.larger > 1e6 * check.trial_unbalance


def test_a_residual_equal_to_the_trial_has_one_answer() -> None:
    check = residual_from_amplitudes(
        trial_unbalance=1e-3, angles=places(6),
        amplitudes=np.abs(1.0 + np.exp(1j * places(6))),
    )  # fmt: skip
    assert check.smaller == pytest.approx(1e-3, rel=1e-6)
    assert check.larger == pytest.approx(1e-3, rel=1e-6)


@given(turn=phases)
def test_turning_the_reference_mark_turns_the_residual_with_it(turn: float) -> None:
    readings = np.abs(cmath.rect(3e-4, 1.0) + 5e-4 * np.exp(1j * places(6)))
    check = residual_from_amplitudes(
        trial_unbalance=5e-4, angles=places(6) + turn, amplitudes=readings
    )
    assert check.smaller == pytest.approx(3e-4)
    assert cmath.exp(1j * check.angle) == pytest.approx(cmath.exp(1j * (1.0 + turn)))


def test_four_readings_leave_one_degree_of_freedom_to_the_scatter() -> None:
    # By hand: ± 0.1 about 1 in turn fits no circle; √(4 · 0.1² / 1) = 0.2.
    check = residual_from_amplitudes(
        trial_unbalance=1.0, angles=places(4), amplitudes=[1.1, 0.9, 1.1, 0.9]
    )
    assert check.scatter == published.printed("0.2")


def test_scatter_tells_a_noisy_round_from_a_clean_one() -> None:
    noise = np.random.default_rng(3).normal(0.0, 0.02, 400)
    angles = places(400)
    clean = np.abs(cmath.rect(0.5, 1.0) + np.exp(1j * angles))
    by_size = residual_from_amplitudes(trial_unbalance=1.0, angles=angles, amplitudes=clean + noise)
    assert by_size.scatter == pytest.approx(0.02, rel=0.1)
    with_phase = residual_from_vectors(
        trial_unbalance=1.0, angles=angles,
        readings=cmath.rect(0.5, 1.0) + np.exp(1j * angles) + noise,
    )  # fmt: skip
    # Noise along one axis of two spreads over both.
    assert with_phase.scatter == pytest.approx(0.02 / math.sqrt(2.0), rel=0.1)


@given(factor=st.floats(1e-3, 1e3))
def test_the_unit_of_the_readings_does_not_matter(factor: float) -> None:
    readings = np.array([11.79, 13.00, 11.79, 8.89, 7.00, 8.89])
    one, other = (
        residual_from_amplitudes(trial_unbalance=20.0, angles=places(6), amplitudes=rows)
        for rows in (readings, factor * readings)
    )
    assert other.smaller == pytest.approx(one.smaller)
    assert other.classical == pytest.approx(one.classical)


SOUND = {"trial_unbalance": 1.0, "angles": places(4), "amplitudes": [1.0, 2.0, 2.0, 1.0]}
CHECK = residual_from_amplitudes(**SOUND)


@pytest.mark.parametrize(
    ("name", "call"),
    [
        ("trial_unbalance", lambda: residual_from_amplitudes(**{**SOUND, "trial_unbalance": 0.0})),
        ("angles", lambda: residual_from_amplitudes(
            **{**SOUND, "angles": places(3), "amplitudes": [1.0, 2.0, 1.0]})),
        ("angles", lambda: residual_from_amplitudes(
            **{**SOUND, "angles": [0.0, math.pi, 2.0 * math.pi, 3.0 * math.pi]})),
        ("angles", lambda: residual_from_amplitudes(
            **{**SOUND, "angles": [0.0, 1.0, 2.0, math.nan]})),
        ("amplitudes", lambda: residual_from_amplitudes(**{**SOUND, "amplitudes": [1.0] * 5})),
        ("amplitudes", lambda: residual_from_amplitudes(
            **{**SOUND, "amplitudes": [1.0, -1.0, 1.0, 1.0]})),
        ("amplitudes", lambda: classical_residual(trial_unbalance=1.0, amplitudes=[0.0, 0.0])),
        ("amplitudes", lambda: classical_residual(trial_unbalance=1.0, amplitudes=[])),
        ("readings", lambda: residual_from_vectors(
            trial_unbalance=1.0, angles=places(4), readings=[1.0] * 3)),
        ("readings", lambda: residual_from_vectors(
            trial_unbalance=1.0, angles=places(4), readings=[1.0, 1.0, 1.0, math.inf])),
        ("readings", lambda: residual_from_vectors(
            trial_unbalance=1.0, angles=places(4), readings=[1.0 + 1.0j] * 4)),
        ("angles", lambda: residual_from_vectors(
            trial_unbalance=1.0, angles=[0.0, math.pi, 0.0, math.pi], readings=[2, 1, 2, 1])),
        ("plain_reading", lambda: root_by_plain_reading(check=CHECK, plain_reading=-1.0)),
        ("permissible", lambda: false_pass_possible(check=CHECK, permissible=0.0)),
    ],
    ids=lambda value: value if isinstance(value, str) else "",
)  # fmt: skip
def test_a_round_that_says_nothing_is_refused_by_name(name: str, call) -> None:
    with pytest.raises(OutOfRangeError) as refusal:
        call()
    assert refusal.value.name == name
