"""Influence coefficients: what a weight does to a reading, and the weights that undo one.

Angles of weights and of readings may have different zeros and senses, if each keeps to its own.
"""

import cmath
from dataclasses import dataclass

import numpy as np
import numpy.typing as npt

from models.engineering.balance import TwoPlanes
from models.engineering.errors import OutOfRangeError
from models.engineering.ranges import demand_finite

__all__ = [
    "TrialEffect",
    "TwoPlaneInfluence",
    "influence_coefficient",
    "reading_after_correction",
    "single_plane_correction",
    "trial_effect",
    "two_plane_correction",
    "two_plane_influence",
]

_WORST_CONDITION = 1e8


@dataclass(frozen=True)
class TrialEffect:
    """How much a trial weight moved a reading."""

    amplitude_change: float
    """Change of the amplitude over the amplitude before, with its sign, [-]"""
    phase_change: float
    """Change of the phase, from −π to π, [rad]"""


@dataclass(frozen=True)
class TwoPlaneInfluence:
    """What one kg·m in either plane adds to either reading, [1/(kg·m)]."""

    first_reading_by_first_plane: complex
    """At the first reading, by the first plane, [1/(kg·m)]"""
    first_reading_by_second_plane: complex
    """At the first reading, by the second plane, [1/(kg·m)]"""
    second_reading_by_first_plane: complex
    """At the second reading, by the first plane, [1/(kg·m)]"""
    second_reading_by_second_plane: complex
    """At the second reading, by the second plane, [1/(kg·m)]"""

    @property
    def matrix(self) -> npt.NDArray[np.complex128]:
        """The four as a matrix: one row a reading, one column a plane."""
        return np.array(
            [
                [self.first_reading_by_first_plane, self.first_reading_by_second_plane],
                [self.second_reading_by_first_plane, self.second_reading_by_second_plane],
            ]
        )

    @property
    def condition(self) -> float:
        """How much an error of the readings grows in the corrections; 1 is best, [-]."""
        return float(np.linalg.cond(self.matrix))


def _demand_some(name: str, vector: complex) -> None:
    demand_finite(name, vector)
    if vector == 0:
        raise OutOfRangeError(name, vector, "differ from zero")


def influence_coefficient(*, before: complex, with_trial: complex, trial: complex) -> complex:
    r"""Change of a reading that one unit of unbalance makes, from one trial run.

    .. math:: \alpha = \frac{V_1 - V_0}{W}

    Parameters
    ----------
    before : complex
        Reading without the trial weight, in any unit, :math:`V_0`, [-]
    with_trial : complex
        Reading with it, in the same unit, :math:`V_1`, [-]
    trial : complex
        Trial unbalance with its clock angle, :math:`W`, [kg·m]

    Returns
    -------
    influence : complex
        Influence coefficient, [1/(kg·m)]

    Raises
    ------
    OutOfRangeError
        If the trial unbalance is zero or a vector is not finite.

    Examples
    --------
    >>> influence_coefficient(before=1.0, with_trial=1.0 + 2.0j, trial=0.5)
    4j

    References
    ----------
    A vector approach to single plane balancing, a public tutorial article.
    """
    demand_finite("before", before)
    demand_finite("with_trial", with_trial)
    _demand_some("trial", trial)
    return (complex(with_trial) - complex(before)) / complex(trial)


def trial_effect(*, before: complex, with_trial: complex) -> TrialEffect:
    r"""Tell how much a trial weight moved a reading, in amplitude and in phase.

    .. math:: \frac{|V_1| - |V_0|}{|V_0|} \qquad \arg\frac{V_1}{V_0}

    Parameters
    ----------
    before : complex
        Reading without the trial weight, in any unit, :math:`V_0`, [-]
    with_trial : complex
        Reading with it, in the same unit, :math:`V_1`, [-]

    Returns
    -------
    effect : TrialEffect
        Both changes, [-]

    Raises
    ------
    OutOfRangeError
        If the reading before is zero or a vector is not finite.

    Notes
    -----
    A rule of thumb wants 30 % of amplitude or 30° of phase, so that the difference is not made of
    errors.

    Examples
    --------
    >>> effect = trial_effect(before=4.0, with_trial=5.0j)
    >>> effect.amplitude_change, effect.phase_change
    (0.25, 1.5708)

    References
    ----------
    A vector approach to single plane balancing, a public tutorial article, for the rule of thumb.
    """
    _demand_some("before", before)
    demand_finite("with_trial", with_trial)
    ratio = complex(with_trial) / complex(before)
    return TrialEffect(amplitude_change=abs(ratio) - 1.0, phase_change=cmath.phase(ratio))


def single_plane_correction(*, reading: complex, influence: complex) -> complex:
    r"""Unbalance to add in one plane that takes a reading to zero.

    .. math:: C = -V_0 / \alpha

    Parameters
    ----------
    reading : complex
        Reading without the trial weight, which is taken off again, :math:`V_0`, [-]
    influence : complex
        Influence coefficient of the plane, :math:`\alpha`, [1/(kg·m)]

    Returns
    -------
    correction : complex
        Unbalance to add, with its clock angle, [kg·m]

    Raises
    ------
    OutOfRangeError
        If the influence is zero or a vector is not finite.

    Examples
    --------
    >>> abs(single_plane_correction(reading=2.0j, influence=4.0))
    0.5

    References
    ----------
    A vector approach to single plane balancing, a public tutorial article.
    """
    demand_finite("reading", reading)
    _demand_some("influence", influence)
    return -complex(reading) / complex(influence)


def two_plane_influence(
    *,
    before: TwoPlanes,
    with_first_trial: TwoPlanes,
    with_second_trial: TwoPlanes,
    first_trial: complex,
    second_trial: complex,
) -> TwoPlaneInfluence:
    r"""Influence coefficients of two planes from one trial run in each.

    .. math:: \alpha_{ik} = \frac{V_i^{(k)} - V_i}{W_k}

    Parameters
    ----------
    before : TwoPlanes
        Readings without a trial weight, in any unit, :math:`V_i`, [-]
    with_first_trial : TwoPlanes
        Readings with the trial weight in the first plane alone, :math:`V_i^{(1)}`, [-]
    with_second_trial : TwoPlanes
        Readings with the trial weight in the second plane alone, :math:`V_i^{(2)}`, [-]
    first_trial : complex
        Trial unbalance in the first plane, :math:`W_1`, [kg·m]
    second_trial : complex
        Trial unbalance in the second plane, :math:`W_2`, [kg·m]

    Returns
    -------
    influence : TwoPlaneInfluence
        The four coefficients, [1/(kg·m)]

    Raises
    ------
    OutOfRangeError
        If a trial unbalance is zero or a vector is not finite.

    Examples
    --------
    >>> influence = two_plane_influence(
    ...     before=TwoPlanes(1.0, 0.0), with_first_trial=TwoPlanes(3.0, 1.0),
    ...     with_second_trial=TwoPlanes(1.0, 2.0j), first_trial=1.0, second_trial=1.0)
    >>> influence.first_reading_by_first_plane, influence.second_reading_by_second_plane
    ((2+0j), 2j)

    References
    ----------
    Any text on rotor balancing, from memory.
    """
    first = [
        influence_coefficient(before=left, with_trial=right, trial=first_trial)
        for left, right in (
            (before.first, with_first_trial.first),
            (before.second, with_first_trial.second),
        )
    ]
    second = [
        influence_coefficient(before=left, with_trial=right, trial=second_trial)
        for left, right in (
            (before.first, with_second_trial.first),
            (before.second, with_second_trial.second),
        )
    ]
    return TwoPlaneInfluence(
        first_reading_by_first_plane=first[0],
        first_reading_by_second_plane=second[0],
        second_reading_by_first_plane=first[1],
        second_reading_by_second_plane=second[1],
    )


def two_plane_correction(*, readings: TwoPlanes, influence: TwoPlaneInfluence) -> TwoPlanes:
    r"""Unbalances to add in two planes that take two readings to zero.

    .. math:: \mathbf C = -\mathbf H^{-1} \mathbf V

    Parameters
    ----------
    readings : TwoPlanes
        Readings without trial weights, :math:`\mathbf V`, [-]
    influence : TwoPlaneInfluence
        Influence coefficients, :math:`\mathbf H`, [1/(kg·m)]

    Returns
    -------
    corrections : TwoPlanes
        Unbalance to add in each plane, with its clock angle, [kg·m]

    Raises
    ------
    OutOfRangeError
        If both planes do the same to both readings, or a vector is not finite.

    Examples
    --------
    >>> influence = TwoPlaneInfluence(2.0, 0.0, 0.0, 4.0)
    >>> corrections = two_plane_correction(readings=TwoPlanes(2.0, 2.0), influence=influence)
    >>> abs(corrections.first), abs(corrections.second)
    (1.0, 0.5)

    References
    ----------
    Any text on rotor balancing, from memory.
    """
    demand_finite("readings", readings.first)
    demand_finite("readings", readings.second)
    matrix = influence.matrix
    if not np.isfinite(matrix).all():
        raise OutOfRangeError("influence", matrix.tolist(), "be finite throughout")
    condition = influence.condition
    if not condition < _WORST_CONDITION:
        raise OutOfRangeError("influence", condition, "tell the two planes apart")
    solution = np.linalg.solve(matrix, -np.array([readings.first, readings.second]))
    return TwoPlanes(first=complex(solution[0]), second=complex(solution[1]))


def reading_after_correction(
    *, readings: TwoPlanes, influence: TwoPlaneInfluence, corrections: TwoPlanes
) -> TwoPlanes:
    r"""Foresee the readings with the corrections that were really made.

    .. math:: \mathbf V + \mathbf H \mathbf C

    Parameters
    ----------
    readings : TwoPlanes
        Readings without them, :math:`\mathbf V`, [-]
    influence : TwoPlaneInfluence
        Influence coefficients, :math:`\mathbf H`, [1/(kg·m)]
    corrections : TwoPlanes
        Unbalance added in each plane, :math:`\mathbf C`, [kg·m]

    Returns
    -------
    readings : TwoPlanes
        Readings to expect, in the unit of the first, [-]

    Raises
    ------
    OutOfRangeError
        If a vector is not finite.

    Examples
    --------
    >>> expected = reading_after_correction(
    ...     readings=TwoPlanes(2.0, 2.0), influence=TwoPlaneInfluence(2.0, 0.0, 0.0, 4.0),
    ...     corrections=TwoPlanes(-1.0, -0.25))
    >>> abs(expected.first), abs(expected.second)
    (0.0, 1.0)

    References
    ----------
    Superposition, by definition.
    """
    for name, planes in (("readings", readings), ("corrections", corrections)):
        demand_finite(name, planes.first)
        demand_finite(name, planes.second)
    added = influence.matrix @ np.array([corrections.first, corrections.second])
    return TwoPlanes(
        first=complex(readings.first + added[0]), second=complex(readings.second + added[1])
    )
