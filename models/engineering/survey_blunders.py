"""Mistakes that show when a survey is laid beside the one before it.

A mount can move the stations only as a bent shaft moves, and leaves the form of every station as it
was. A survey that breaks either, and would not if it had been read or typed in one particular wrong
way, was probably read or typed that way.
"""

import math
from collections.abc import Sequence
from dataclasses import replace
from typing import NamedTuple

import numpy as np
import numpy.typing as npt

from models.engineering.errors import OutOfRangeError
from models.engineering.suspicion import Mistake, Suspicion
from models.engineering.two_surveys import TwoSurveys

__all__ = [
    "flipped_sign",
    "likeliest_mistake",
    "mirrored_angles",
    "skipped_mark",
    "slipped_survey",
    "swapped_stations",
    "turned_mark",
]

ComplexArray = npt.NDArray[np.complex128]

_LEAST_TURN = math.radians(4.0)
_LEAST_GAIN = 25.0
_LEAST_RATIO_OF_A_TURN = 2.5
_LEAST_RATIO_OF_A_STATION = 1.5
_WHOLE_SHARE = 0.05
_FACTORS = (
    (25.4, Mistake.WRONG_UNIT),
    (1 / 25.4, Mistake.WRONG_UNIT),
    (10.0, Mistake.SLIPPED_DECIMAL),
    (0.1, Mistake.SLIPPED_DECIMAL),
    (2.0, Mistake.TWICE_OR_HALF),
    (0.5, Mistake.TWICE_OR_HALF),
)


class _Reading(NamedTuple):
    """One way of reading the survey, and the mistake it would put right."""

    present: ComplexArray
    seconds: ComplexArray
    blank: Suspicion


def likeliest_mistake(*, surveys: TwoSurveys, marks: int) -> Suspicion | None:
    r"""Mistake that best explains a survey that no bend explains; None where a bend does.

    .. math:: \text{greatest } E = S_{plain} / S_{mistake}

    Parameters
    ----------
    surveys : TwoSurveys
        The survey and the one before it, [m]
    marks : int
        Marks of one turn, [-]

    Returns
    -------
    suspicion : Suspicion or None
        The mistake that leaves least unexplained, [-]

    Raises
    ------
    OutOfRangeError
        If there are fewer than three marks.

    Notes
    -----
    S is the weighted square of what no bend and no other lie of the rotor explains. A mistake is
    named only where it lowers S by 25 at least, which chance hardly ever does, and where what is
    then left is no more than noise leaves, within five standard deviations, or for a mistake of the
    whole survey no more than a twentieth.

    Examples
    --------
    See `flipped_sign`.

    >>> import numpy as np
    >>> row = np.array([3 + 1j, -2 + 4j, 5 - 3j, -4 - 2j, 1 + 5j]) * 1e-6
    >>> likeliest_mistake(marks=12, surveys=TwoSurveys(
    ...     positions=np.arange(5.0), earlier=row, present=row, uncertainties=np.full(5, 1e-7),
    ...     earlier_seconds=row, present_seconds=row)) is None
    True

    References
    ----------
    .. [1] By hand: least squares; no publication.
    """
    return _most_evident(
        [
            flipped_sign(surveys=surveys),
            mirrored_angles(surveys=surveys),
            turned_mark(surveys=surveys),
            slipped_survey(surveys=surveys),
            skipped_mark(surveys=surveys, marks=marks),
            swapped_stations(surveys=surveys),
        ]
    )


def flipped_sign(*, surveys: TwoSurveys) -> Suspicion | None:
    r"""Suspect an indicator that counted the other way through a whole survey.

    .. math:: v \to -v, \qquad s \to -s

    Parameters
    ----------
    surveys : TwoSurveys
        The survey and the one before it, [m]

    Returns
    -------
    suspicion : Suspicion or None
        With the squares left as they stand over those left with the sign put right, [-]

    Notes
    -----
    A rotor turned by half a turn has the same offsets but keeps its ovality's sign; that is how the
    two are told apart, where the ovality is large enough.

    Examples
    --------
    >>> import numpy as np
    >>> row = np.array([3 + 1j, -2 + 4j, 5 - 3j, -4 - 2j, 1 + 5j]) * 1e-6
    >>> flipped_sign(surveys=TwoSurveys(
    ...     positions=np.arange(5.0), earlier=row, present=-row, uncertainties=np.full(5, 1e-7),
    ...     earlier_seconds=row, present_seconds=-row)).mistake.value
    'sign flipped'

    References
    ----------
    .. [1] By hand; no publication.
    """
    blank = Suspicion(Mistake.FLIPPED_SIGN, 0.0)
    readings = [_Reading(-surveys.present, -surveys.present_seconds, blank)]
    return _likeliest(surveys, readings, share=_WHOLE_SHARE)


def mirrored_angles(*, surveys: TwoSurveys) -> Suspicion | None:
    r"""Suspect marks counted the other way round, or from the other end of the rotor.

    .. math:: v \to \bar v, \qquad s \to \bar s

    Parameters
    ----------
    surveys : TwoSurveys
        The survey and the one before it, [m]

    Returns
    -------
    suspicion : Suspicion or None
        With the squares left as they stand over those left with the angles put right, [-]

    Examples
    --------
    >>> import numpy as np
    >>> row = np.array([3 + 1j, -2 + 4j, 5 - 3j, -4 - 2j, 1 + 5j]) * 1e-6
    >>> mirrored_angles(surveys=TwoSurveys(
    ...     positions=np.arange(5.0), earlier=row, present=row.conj(),
    ...     uncertainties=np.full(5, 1e-7), earlier_seconds=row,
    ...     present_seconds=row.conj())).mistake.value
    'angles counted the other way'

    References
    ----------
    .. [1] By hand; no publication.
    """
    blank = Suspicion(Mistake.MIRRORED_ANGLES, 0.0)
    readings = [_Reading(surveys.present.conj(), surveys.present_seconds.conj(), blank)]
    return _likeliest(surveys, readings, share=_WHOLE_SHARE)


def turned_mark(*, surveys: TwoSurveys) -> Suspicion | None:
    r"""Suspect that the reference mark of a whole survey stands at another angle.

    .. math:: v \to v\,e^{-j\psi}, \qquad s \to s\,e^{-2j\psi}

    Parameters
    ----------
    surveys : TwoSurveys
        The survey and the one before it, [m]

    Returns
    -------
    suspicion : Suspicion or None
        With the turn ψ that must be taken back, and the squares with over without it, [rad]

    Notes
    -----
    The turn is found to half a degree, or better.

    Examples
    --------
    >>> import numpy as np
    >>> row = np.array([3 + 1j, -2 + 4j, 5 - 3j, -4 - 2j, 1 + 5j]) * 1e-6
    >>> found = turned_mark(surveys=TwoSurveys(
    ...     positions=np.arange(5.0), earlier=row, present=1j * row,
    ...     uncertainties=np.full(5, 1e-7), earlier_seconds=row, present_seconds=-row))
    >>> round(found.turn, 3)
    1.571

    References
    ----------
    .. [1] By hand; no publication.
    """
    if surveys.unexplained <= surveys.allowed:
        return None
    turn = surveys.best_turn()
    if abs((turn + math.pi) % (2.0 * math.pi) - math.pi) < _LEAST_TURN:
        return None
    back = np.exp(-1j * turn)
    blank = Suspicion(Mistake.TURNED_MARK, 0.0, turn=turn)
    readings = [_Reading(surveys.present * back, surveys.present_seconds * back**2, blank)]
    # A free angle always helps a little, most of all beside a bend that is no single kink.
    return _likeliest(surveys, readings, share=_WHOLE_SHARE, least_ratio=_LEAST_RATIO_OF_A_TURN)


def slipped_survey(*, surveys: TwoSurveys) -> Suspicion | None:
    r"""Suspect one unit, decimal or total-for-offset slip through a whole survey.

    .. math:: v \to v/f, \qquad s \to s/f, \qquad f = 25.4,\ 10,\ 2\ \text{or their inverse}

    Parameters
    ----------
    surveys : TwoSurveys
        The survey and the one before it, [m]

    Returns
    -------
    suspicion : Suspicion or None
        With the factor f, and the squares left as they stand over those left without it, [-]

    Examples
    --------
    >>> import numpy as np
    >>> row = np.array([3 + 1j, -2 + 4j, 5 - 3j, -4 - 2j, 1 + 5j]) * 1e-6
    >>> slipped_survey(surveys=TwoSurveys(
    ...     positions=np.arange(5.0), earlier=row, present=25.4 * row,
    ...     uncertainties=np.full(5, 1e-7), earlier_seconds=row,
    ...     present_seconds=25.4 * row)).factor
    25.4

    References
    ----------
    .. [1] By hand; no publication.
    """
    nothing = np.zeros((1, surveys.positions.size), dtype=np.complex128)
    # The earlier survey must have features of its own for the scaled one to agree with.
    structure = float(surveys.squares(nothing, nothing)[0]) / 3.0
    found = []
    for factor, mistake in _FACTORS:
        present = surveys.present / factor
        # A survey divided down to nothing agrees with anything that is small.
        if _size(present) < 0.5 * _size(surveys.earlier):
            continue
        blank = Suspicion(mistake, 0.0, factor=factor)
        noise = math.sqrt((1.0 + 1.0 / factor**2) / 2.0)
        reading = _Reading(present, surveys.present_seconds / factor, blank)
        one = _likeliest(surveys, [reading], noise=noise, share=_WHOLE_SHARE)
        if one is not None and surveys.unexplained <= structure * one.evidence:
            found.append(one)
    return _most_evident(found)


def skipped_mark(*, surveys: TwoSurveys, marks: int) -> Suspicion | None:
    r"""Suspect that one station was read one mark too early or too late.

    .. math:: v_k \to v_k\,e^{\mp 2\pi j/n}, \qquad s_k \to s_k\,e^{\mp 4\pi j/n}

    Parameters
    ----------
    surveys : TwoSurveys
        The survey and the one before it, [m]
    marks : int
        Marks of one turn, :math:`n`, [-]

    Returns
    -------
    suspicion : Suspicion or None
        With the station, and the turn that must be taken back there, [rad]

    Raises
    ------
    OutOfRangeError
        If there are fewer than three marks.

    Notes
    -----
    Found only where the station has an offset or an ovality to turn.

    Examples
    --------
    >>> import numpy as np
    >>> row = np.array([3 + 1j, -2 + 4j, 5 - 3j, -4 - 2j, 1 + 5j, 2 - 6j]) * 1e-6
    >>> turned = row.copy()
    >>> turned[2] = turned[2] * 1j
    >>> seconds = row.copy()
    >>> seconds[2] = -seconds[2]
    >>> skipped_mark(marks=4, surveys=TwoSurveys(
    ...     positions=np.arange(6.0), earlier=row, present=turned,
    ...     uncertainties=np.full(6, 1e-7), earlier_seconds=row, present_seconds=seconds)).station
    2

    References
    ----------
    .. [1] By hand; no publication.
    """
    if marks < 3:
        raise OutOfRangeError("marks", marks, "be 3 or more")
    readings = []
    for station in range(surveys.positions.size):
        for turn in (2.0 * math.pi / marks, -2.0 * math.pi / marks):
            present, seconds = surveys.present.copy(), surveys.present_seconds.copy()
            present[station] *= np.exp(-1j * turn)
            seconds[station] *= np.exp(-2j * turn)
            blank = Suspicion(Mistake.SKIPPED_MARK, 0.0, station=station, turn=turn)
            readings.append(_Reading(present, seconds, blank))
    return _likeliest(surveys, readings, least_ratio=_LEAST_RATIO_OF_A_STATION)


def swapped_stations(*, surveys: TwoSurveys) -> Suspicion | None:
    r"""Suspect that two neighbouring stations were read or typed in each other's place.

    .. math:: v_k \leftrightarrow v_{k+1}, \qquad s_k \leftrightarrow s_{k+1}

    Parameters
    ----------
    surveys : TwoSurveys
        The survey and the one before it, [m]

    Returns
    -------
    suspicion : Suspicion or None
        With the first of the two stations, in the order given, [-]

    Examples
    --------
    >>> import numpy as np
    >>> row = np.array([3 + 1j, -2 + 4j, 5 - 3j, -4 - 2j, 1 + 5j, 2 - 6j]) * 1e-6
    >>> typed = row[[0, 2, 1, 3, 4, 5]]
    >>> swapped_stations(surveys=TwoSurveys(
    ...     positions=np.arange(6.0), earlier=row, present=typed,
    ...     uncertainties=np.full(6, 1e-7), earlier_seconds=row, present_seconds=typed)).station
    1

    References
    ----------
    .. [1] By hand; no publication.
    """
    readings = []
    for station in range(surveys.positions.size - 1):
        if not surveys.field.known[[station, station + 1]].all():
            continue
        order = np.arange(surveys.positions.size)
        order[[station, station + 1]] = station + 1, station
        blank = Suspicion(Mistake.SWAPPED_STATIONS, 0.0, station=station)
        readings.append(_Reading(surveys.present[order], surveys.present_seconds[order], blank))
    return _likeliest(surveys, readings, least_ratio=_LEAST_RATIO_OF_A_STATION)


def _likeliest(
    surveys: TwoSurveys,
    readings: Sequence[_Reading],
    *,
    noise: float = 1.0,
    share: float = 0.0,
    least_ratio: float = 0.0,
) -> Suspicion | None:
    """Of several ways of reading a survey, the one that leaves least, if that is little enough."""
    if not readings:
        return None
    left = surveys.squares(
        np.array([reading.present for reading in readings]),
        np.array([reading.seconds for reading in readings]),
    )
    best = int(np.argmin(left))
    least = float(left[best]) / noise**2
    plain = surveys.unexplained
    if least > max(surveys.allowed, share * plain) or plain - least < _LEAST_GAIN:
        return None
    if plain < least_ratio * least:
        return None
    return replace(readings[best].blank, evidence=plain / max(least, 1.0))


def _most_evident(found: Sequence[Suspicion | None]) -> Suspicion | None:
    return max(
        (one for one in found if one is not None), key=lambda one: one.evidence, default=None
    )


def _size(vectors: ComplexArray) -> float:
    return float(np.nanmedian(np.abs(vectors)))
