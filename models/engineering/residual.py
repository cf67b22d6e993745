"""What unbalance a rotor still has, by a trial weight carried round it while it is on the machine.

The classical sum of the largest and smallest reading stands beside the fit to all of them.
"""

import cmath
import math
from dataclasses import dataclass

import numpy as np
import numpy.typing as npt

from models.engineering.balance import clock_angle
from models.engineering.errors import OutOfRangeError
from models.engineering.ranges import demand_not_negative, demand_positive

__all__ = [
    "AmplitudeCheck",
    "RootChoice",
    "VectorCheck",
    "classical_residual",
    "false_pass_possible",
    "residual_from_amplitudes",
    "residual_from_vectors",
    "root_by_plain_reading",
]

_FEWEST_PLACES = 4


@dataclass(frozen=True)
class AmplitudeCheck:
    """What readings without phase say: two answers, of which one is true."""

    trial_unbalance: float
    """Trial weight times its radius, [kg·m]"""
    angle: float
    """Clock angle of the residual, the same for both answers, from 0 to less than 2π, [rad]"""
    smaller: float
    """Residual if it is not above the trial unbalance, [kg·m]"""
    larger: float
    """Residual if it is above the trial unbalance; infinite where the other is zero, [kg·m]"""
    smaller_sensitivity: float
    """Reading that one kg·m makes, if the smaller answer is true, [1/(kg·m)]"""
    larger_sensitivity: float
    """Reading that one kg·m makes, if the larger answer is true, [1/(kg·m)]"""
    scatter: float
    """Root mean square of readings less fit, over the degrees of freedom, in units of reading"""
    classical: float
    """Residual by (max − min)/(max + min) of the same readings, [kg·m]"""


@dataclass(frozen=True)
class VectorCheck:
    """What readings with phase say: one answer."""

    residual: complex
    """Residual unbalance, [kg·m]"""
    sensitivity: complex
    """Reading that one kg·m makes, with its phase, [1/(kg·m)]"""
    scatter: float
    """Root mean square of vectors less fit, over the degrees of freedom, in units of reading"""
    phase_runs_against_places: bool
    """Whether the machine counts its phase the other way round than the places are counted"""
    classical: float
    """Residual by (max − min)/(max + min) of the sizes of the same readings, [kg·m]"""


@dataclass(frozen=True)
class RootChoice:
    """Which of two answers a reading without the trial weight supports."""

    residual: float
    """The answer whose prediction lies nearer to the reading, [kg·m]"""
    above_trial: bool
    """Whether it is the larger one"""
    predicted_by_smaller: float
    """Reading without the trial weight if the smaller answer is true, in units of reading"""
    predicted_by_larger: float
    """Reading without the trial weight if the larger answer is true, in units of reading"""


def _places(
    angles: npt.ArrayLike, readings_name: str, readings_shape: tuple[int, ...]
) -> npt.NDArray[np.float64]:
    places = np.asarray(angles, dtype=np.float64)
    if places.ndim != 1 or places.size < _FEWEST_PLACES:
        raise OutOfRangeError("angles", places.shape, f"be a row of at least {_FEWEST_PLACES}")
    if not np.isfinite(places).all():
        raise OutOfRangeError("angles", places.tolist(), "be finite throughout")
    if readings_shape != places.shape:
        raise OutOfRangeError(readings_name, readings_shape, f"have the shape {places.shape}")
    if np.linalg.matrix_rank(_round(places), tol=1e-9) < 3:
        raise OutOfRangeError("angles", places.tolist(), "hold at least three different places")
    return places


def _round(places: npt.NDArray[np.float64]) -> npt.NDArray[np.float64]:
    return np.column_stack([np.ones_like(places), np.cos(places), np.sin(places)])


def classical_residual(*, trial_unbalance: float, amplitudes: npt.ArrayLike) -> float:
    r"""Residual unbalance from the largest and the smallest reading of a trial-weight round.

    .. math:: R = T\, \frac{A_\max - A_\min}{A_\max + A_\min}

    Parameters
    ----------
    trial_unbalance : float
        Trial weight times its radius, :math:`T`, [kg·m]
    amplitudes : array_like
        Readings with the trial weight at each place, shape (n,), in any one unit, :math:`A`, [-]

    Returns
    -------
    residual : float
        Residual unbalance, never above the trial unbalance, [kg·m]

    Raises
    ------
    OutOfRangeError
        If the trial unbalance is not positive, a reading is negative, or all are zero.

    Notes
    -----
    Six places that miss the largest and the smallest can make it 15 % low. A true residual above
    the trial unbalance comes out below it, as T²/R: a false pass.

    Examples
    --------
    Readings from 7 to 13 with 20 of trial: 20·6/20.

    >>> classical_residual(trial_unbalance=20e-6, amplitudes=[13.0, 11.0, 8.0, 7.0]) * 1e6
    6.0

    References
    ----------
    API 617:2002, chapter 1, annex B, as far as B.4.2.1. Energy-Tech magazine, article 18389.
    """
    demand_positive("trial_unbalance", trial_unbalance)
    readings = np.asarray(amplitudes, dtype=np.float64)
    if readings.size == 0 or not np.isfinite(readings).all() or (readings < 0.0).any():
        raise OutOfRangeError("amplitudes", readings.tolist(), "be finite and not negative")
    largest, smallest = float(readings.max()), float(readings.min())
    if largest == 0.0:
        raise OutOfRangeError("amplitudes", readings.tolist(), "not all be zero")
    return trial_unbalance * (largest - smallest) / (largest + smallest)


def residual_from_amplitudes(
    *, trial_unbalance: float, angles: npt.ArrayLike, amplitudes: npt.ArrayLike
) -> AmplitudeCheck:
    r"""Residual unbalance by least squares from readings without phase, both answers of it.

    A reading is :math:`A = k\,|R + T e^{j\theta}|`, so that its square is linear in

    .. math::

        A^2 = c_0 + c_1 \cos\theta + c_2 \sin\theta, \qquad
        q = \frac{\sqrt{c_1^2 + c_2^2}}{c_0} = \frac{2 R T}{R^2 + T^2}

    which R/T and T/R satisfy alike: :math:`R/T = q/(1 + \sqrt{1 - q^2})` or its reciprocal, both at
    the angle of :math:`c_1 + j c_2`.

    Parameters
    ----------
    trial_unbalance : float
        Trial weight times its radius, :math:`T`, [kg·m]
    angles : array_like
        Clock angles of the trial weight, shape (n,), at least four, :math:`\theta`, [rad]
    amplitudes : array_like
        Reading at each, shape (n,), in any one unit, :math:`A`, [-]

    Returns
    -------
    check : AmplitudeCheck
        Both answers, sensitivities, scatter and the classical answer, [kg·m]

    Raises
    ------
    OutOfRangeError
        If there are fewer than four places or fewer than three different ones, shapes differ, a
        reading is negative, or all are zero.

    Notes
    -----
    Places need not be evenly spaced and some may be missing or repeated. The smaller answer is the
    residual only if something shows that the larger is not: readings with phase
    (`residual_from_vectors`) or one without the trial weight (`root_by_plain_reading`).

    Examples
    --------
    Residual 3 at 0°, trial 4, one unit of reading per unit of unbalance: 7, 5, 1, 5.

    >>> from math import pi
    >>> check = residual_from_amplitudes(
    ...     trial_unbalance=4.0, angles=[0.0, pi / 2, pi, 3 * pi / 2],
    ...     amplitudes=[7.0, 5.0, 1.0, 5.0])
    >>> check.smaller, check.larger, check.classical
    (3.000, 5.333, 3.000)

    References
    ----------
    Least squares on the cosine rule, by hand. API 617:2002, chapter 1, annex B, for the round.
    """
    readings = np.asarray(amplitudes, dtype=np.float64)
    places = _places(angles, "amplitudes", readings.shape)
    classical = classical_residual(trial_unbalance=trial_unbalance, amplitudes=readings)
    solution = np.linalg.lstsq(_round(places), readings**2, rcond=None)[0]
    level, swing = float(solution[0]), complex(solution[1], solution[2])
    if level <= 0.0:
        raise OutOfRangeError("amplitudes", readings.tolist(), "lie near a circle")
    # Scatter can push the ratio just above 1, where residual and trial unbalance are equal.
    ratio = min(1.0, abs(swing) / level)
    relative = ratio / (1.0 + math.sqrt(1.0 - ratio**2))
    smaller = trial_unbalance * relative
    smaller_sensitivity = math.sqrt(level / (smaller**2 + trial_unbalance**2))
    vectors = smaller * np.exp(1j * cmath.phase(swing)) + trial_unbalance * np.exp(1j * places)
    missed = readings - smaller_sensitivity * np.abs(vectors)
    return AmplitudeCheck(
        trial_unbalance=trial_unbalance,
        angle=clock_angle(vector=swing),
        smaller=smaller,
        larger=trial_unbalance / relative if relative > 0.0 else math.inf,
        smaller_sensitivity=smaller_sensitivity,
        larger_sensitivity=smaller_sensitivity * relative,
        scatter=math.sqrt(float(missed @ missed) / (places.size - 3)),
        classical=classical,
    )


def residual_from_vectors(
    *, trial_unbalance: float, angles: npt.ArrayLike, readings: npt.ArrayLike
) -> VectorCheck:
    r"""Residual unbalance by least squares from readings with phase.

    .. math:: A_i = k\,(R + T e^{j\theta_i}), \qquad k\ \text{and}\ kR\ \text{complex}

    Parameters
    ----------
    trial_unbalance : float
        Trial weight times its radius, :math:`T`, [kg·m]
    angles : array_like
        Clock angles of the trial weight, shape (n,), at least four, :math:`\theta`, [rad]
    readings : array_like
        Reading at each as a complex number, shape (n,), in any one unit, :math:`A`, [-]

    Returns
    -------
    check : VectorCheck
        Residual, sensitivity, scatter and the classical answer, [kg·m]

    Raises
    ------
    OutOfRangeError
        If there are fewer than four places or fewer than three different ones, shapes differ, a
        reading is not finite, or the readings do not answer to the weight.

    Notes
    -----
    Phase settles what amplitudes leave open, also a residual above the trial unbalance. A machine
    may count phase against the clock angle: both senses are fitted, and the one with less scatter
    is taken and named.

    Examples
    --------
    Residual 6 at 90°, trial 2 at 0°, 90°, 180°, 270°, one unit of reading per unit of unbalance:

    >>> from math import pi
    >>> check = residual_from_vectors(
    ...     trial_unbalance=2.0, angles=[0.0, pi / 2, pi, 3 * pi / 2],
    ...     readings=[6j + 2, 6j + 2j, 6j - 2, 6j - 2j])
    >>> abs(check.residual), check.classical
    (6.000, 0.667)

    References
    ----------
    Least squares, by hand.
    """
    demand_positive("trial_unbalance", trial_unbalance)
    measured = np.asarray(readings, dtype=np.complex128)
    places = _places(angles, "readings", measured.shape)
    if not np.isfinite(measured).all():
        raise OutOfRangeError("readings", measured.tolist(), "be finite throughout")
    base = np.column_stack([np.ones_like(places), trial_unbalance * np.exp(1j * places)])
    fits = []
    for against, vectors in ((False, measured), (True, np.conj(measured))):
        solution = np.linalg.lstsq(base, vectors, rcond=None)[0]
        missed = float(np.sum(np.abs(vectors - base @ solution) ** 2))
        fits.append((missed, against, complex(solution[0]), complex(solution[1])))
    missed, against, plain, sensitivity = min(fits, key=lambda fit: fit[0])
    if abs(sensitivity) * trial_unbalance <= 1e-12 * float(np.abs(measured).max()):
        raise OutOfRangeError("readings", measured.tolist(), "change with the trial weight")
    return VectorCheck(
        residual=plain / sensitivity,
        sensitivity=sensitivity,
        scatter=math.sqrt(missed / (2 * places.size - 4)),
        phase_runs_against_places=against,
        classical=classical_residual(trial_unbalance=trial_unbalance, amplitudes=np.abs(measured)),
    )


def root_by_plain_reading(*, check: AmplitudeCheck, plain_reading: float) -> RootChoice:
    r"""Choose between the two answers by the reading taken without the trial weight.

    .. math:: A_0 = k R \text{ if the smaller is true,} \quad A_0 = k T \text{ if the larger}

    with k the sensitivity of the smaller; the nearer of the two is chosen.

    Parameters
    ----------
    check : AmplitudeCheck
        Both answers, [kg·m]
    plain_reading : float
        Reading without the trial weight, in the unit of the others, [-]

    Returns
    -------
    choice : RootChoice
        The answer that the reading supports, and what each would have read, [kg·m]

    Raises
    ------
    OutOfRangeError
        If the reading is negative or not finite.

    Notes
    -----
    The farther residual and trial unbalance are apart, the surer the choice; where they are nearly
    equal, so are the two answers.

    Examples
    --------
    Residual 16/3 and trial 4 read 7, 5, 1, 5 as a residual of 3 does; the rotor alone reads 4:

    >>> from math import pi
    >>> check = residual_from_amplitudes(
    ...     trial_unbalance=4.0, angles=[0.0, pi / 2, pi, 3 * pi / 2],
    ...     amplitudes=[7.0, 5.0, 1.0, 5.0])
    >>> choice = root_by_plain_reading(check=check, plain_reading=4.0)
    >>> choice.residual, choice.above_trial
    (5.333, True)

    References
    ----------
    Follows from the cosine rule, by hand; no publication is claimed.
    """
    demand_not_negative("plain_reading", plain_reading)
    by_smaller = check.smaller_sensitivity * check.smaller
    by_larger = check.smaller_sensitivity * check.trial_unbalance
    above = abs(plain_reading - by_larger) < abs(plain_reading - by_smaller)
    return RootChoice(
        residual=check.larger if above else check.smaller,
        above_trial=above,
        predicted_by_smaller=by_smaller,
        predicted_by_larger=by_larger,
    )


def false_pass_possible(*, check: AmplitudeCheck, permissible: float) -> bool:
    r"""Tell whether the two answers lie on either side of the limit.

    .. math:: R_\text{smaller} \le U \ \text{and}\ R_\text{larger} > U

    Parameters
    ----------
    check : AmplitudeCheck
        Both answers, [kg·m]
    permissible : float
        Permissible residual unbalance, :math:`U`, [kg·m]

    Returns
    -------
    possible : bool
        Whether the smaller answer passes and the larger does not, [-]

    Raises
    ------
    OutOfRangeError
        If the permissible residual is not positive.

    Notes
    -----
    With the usual trial unbalance of one to two times the limit it is true of every pass: without
    phase, or a reading without the weight, a pass is never proven.

    Examples
    --------
    >>> from math import pi
    >>> check = residual_from_amplitudes(
    ...     trial_unbalance=4.0, angles=[0.0, pi / 2, pi, 3 * pi / 2],
    ...     amplitudes=[7.0, 5.0, 1.0, 5.0])
    >>> [false_pass_possible(check=check, permissible=limit) for limit in (2.0, 4.0, 6.0)]
    [False, True, False]

    References
    ----------
    By definition.
    """
    demand_positive("permissible", permissible)
    return check.smaller <= permissible < check.larger
