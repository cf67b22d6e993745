"""Mistakes that show when a survey is laid beside the one before it.

A mount can move the stations only as a bent shaft moves, and leaves the form of every station as it
was. A survey that breaks either, and would not if it had been read or typed in one particular wrong
way, was probably read or typed that way.
"""

import math
from collections.abc import Sequence
from dataclasses import dataclass, replace
from functools import cached_property
from typing import NamedTuple

import numpy as np
import numpy.typing as npt

from models.engineering.errors import OutOfRangeError
from models.engineering.suspicion import Mistake, Suspicion

__all__ = [
    "TwoSurveys",
    "flipped_sign",
    "likeliest_mistake",
    "mirrored_angles",
    "skipped_mark",
    "slipped_survey",
    "swapped_stations",
    "turned_mark",
]

FloatArray = npt.NDArray[np.float64]
ComplexArray = npt.NDArray[np.complex128]

_PLACES = 301
_TURNS = 360
_SIGMAS = 5.0
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


class _Field(NamedTuple):
    """How the rotor may lie and bend: two lines, and bends with the lines taken out."""

    known: npt.NDArray[np.bool_]
    both: npt.NDArray[np.bool_]
    weights: FloatArray
    line: FloatArray
    bends: FloatArray


class _Reading(NamedTuple):
    """One way of reading the survey, and the mistake it would put right."""

    present: ComplexArray
    seconds: ComplexArray
    blank: Suspicion


@dataclass(frozen=True, eq=False)
class TwoSurveys:
    """A survey beside the one before it, at the stations both have.

    Attributes
    ----------
    positions : numpy.ndarray
        Axial positions of the stations, four at least, [m]
    earlier : numpy.ndarray
        Complex offsets of the earlier survey, [m]
    present : numpy.ndarray
        Complex offsets of the present one, [m]
    uncertainties : numpy.ndarray
        Standard uncertainty of either component of one survey's offset, [m]
    earlier_seconds : numpy.ndarray
        Two-lobed parts of the earlier survey, as `fit_survey` gives them, [m]
    present_seconds : numpy.ndarray
        Two-lobed parts of the present one, [m]
    """

    positions: FloatArray
    earlier: ComplexArray
    present: ComplexArray
    uncertainties: FloatArray
    earlier_seconds: ComplexArray
    present_seconds: ComplexArray

    def __post_init__(self) -> None:
        shape = np.shape(self.positions)
        for name in ("earlier", "present", "uncertainties", "earlier_seconds", "present_seconds"):
            if np.shape(getattr(self, name)) != shape:
                raise OutOfRangeError(name, np.shape(getattr(self, name)), "fit the positions")
        if shape[0] < 4:
            raise OutOfRangeError("positions", shape[0], "be four or more")
        if not (np.asarray(self.uncertainties) > 0.0).all():
            raise OutOfRangeError("uncertainties", self.uncertainties, "be more than 0 everywhere")

    @cached_property
    def field(self) -> _Field:
        """How this rotor may lie and bend without any mistake."""
        return _field(self)

    @cached_property
    def unexplained(self) -> float:
        """Weighted squares that no lie and no bend explains, as the survey stands, [-]."""
        return float(_squares(self, self.present[None, :], self.present_seconds[None, :])[0])

    @cached_property
    def allowed(self) -> float:
        """Weighted squares up to which noise is explanation enough, [-]."""
        # Two components at each station, less four of the rotor's lie and three of a bend.
        freedom = max(2 * int(self.field.known.sum()) - 7, 1) + 2 * int(self.field.both.sum())
        return freedom + _SIGMAS * math.sqrt(2.0 * freedom)


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
    turn = _best_turn(surveys)
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
    structure = float(_squares(surveys, nothing, nothing)[0]) / 3.0
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
    left = _squares(
        surveys,
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


def _field(surveys: TwoSurveys) -> _Field:
    known = np.isfinite(surveys.present) & np.isfinite(surveys.earlier)
    places = surveys.positions[known]
    weights = 1.0 / (math.sqrt(2.0) * surveys.uncertainties[known])
    line = np.linalg.qr(np.column_stack([weights, weights * places]))[0]
    kinks = np.linspace(places.min(), places.max(), _PLACES + 2)[1:-1, None]
    bends = weights * np.maximum(places - kinks, 0.0)
    bends = bends - (bends @ line) @ line.T
    sizes = np.sqrt(np.sum(bends**2, axis=1))
    usable = sizes > 1e-9 * float(sizes.max(initial=0.0))
    both = np.isfinite(surveys.present_seconds) & np.isfinite(surveys.earlier_seconds)
    return _Field(known, both, weights, line, bends[usable] / sizes[usable, None])


def _squares(surveys: TwoSurveys, present: ComplexArray, seconds: ComplexArray) -> FloatArray:
    """Weighted squares that no lie and no bend explains, for each row of readings."""
    field = surveys.field
    moved = field.weights * (present - surveys.earlier)[:, field.known]
    moved = moved - (moved @ field.line) @ field.line.T
    along = np.abs(moved @ field.bends.T) ** 2
    least = np.sum(np.abs(moved) ** 2, axis=1) - along.max(axis=1, initial=0.0)
    form = (seconds - surveys.earlier_seconds)[:, field.both]
    spread = math.sqrt(2.0) * surveys.uncertainties[field.both]
    return np.asarray(
        np.maximum(least, 0.0) + np.sum(np.abs(form / spread) ** 2, axis=1), dtype=np.float64
    )


def _best_turn(surveys: TwoSurveys) -> float:
    field = surveys.field
    before = field.weights * surveys.earlier[field.known]
    after = field.weights * surveys.present[field.known]
    before, after = (row - field.line @ (field.line.T @ row) for row in (before, after))
    turns = np.linspace(0.0, 2.0 * math.pi, _TURNS, endpoint=False)
    back = np.exp(-1j * turns)
    left = -2.0 * np.real(np.vdot(before, after) * back)
    # What lies along a bend is free to differ, so it is taken off the squares again.
    along_before, along_after = field.bends @ before, field.bends @ after
    free = np.abs(along_after[:, None] * back - along_before[:, None]) ** 2
    left = left - free.max(axis=0, initial=0.0)
    spread = 1.0 / (2.0 * surveys.uncertainties[field.both] ** 2)
    earlier, present = surveys.earlier_seconds[field.both], surveys.present_seconds[field.both]
    left = left - 2.0 * np.real(np.sum(spread * earlier.conj() * present) * back**2)
    return float(turns[int(np.argmin(left))])
