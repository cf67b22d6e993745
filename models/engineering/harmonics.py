"""The readings of one turn split into offset and form, for one station or for a whole survey."""

import math
from dataclasses import dataclass
from functools import lru_cache
from typing import NamedTuple

import numpy as np
import numpy.typing as npt

from models.engineering.errors import OutOfRangeError

__all__ = ["HarmonicFit", "SurveyFit", "fit_harmonics", "fit_survey", "largest_sampling_loss"]

FloatArray = npt.NDArray[np.float64]
ComplexArray = npt.NDArray[np.complex128]

_SAME_ANGLE = 1e-6
_FINEST_REGULAR_CIRCLE = 72


@dataclass(frozen=True, eq=False)
class HarmonicFit:
    """What one turn of readings says about a station.

    Attributes
    ----------
    mean : float
        Mean reading, [m]
    eccentricity : complex
        Offset of the surface's centre, e·exp(jθ) towards the high spot; its total is 2·|e|, [m]
    second : complex
        Two-lobed part a + jb of a·cos 2θ + b·sin 2θ; its lobe lies at half its argument; NaN where
        it was not fitted, [m]
    residuals : numpy.ndarray
        Reading less everything fitted, shape (n,), NaN where there was no reading, [m]
    out_of_roundness : float
        Greatest less least reading once mean and offset are taken away, [m]
    sampled_tir : float
        Greatest less least reading as taken, [m]
    vector_uncertainty : float
        Standard uncertainty of either component of the offset; NaN where nothing tells it, [m]
    count : int
        Readings used, [-]
    highest_fitted : int
        Highest harmonic fitted, which may be lower than asked for, [-]
    degrees_of_freedom : int
        Readings used less quantities fitted, [-]
    aliased_harmonics : tuple of int
        Forms that these marks cannot tell from an offset, [-]
    """

    mean: float
    eccentricity: complex
    second: complex
    residuals: FloatArray
    out_of_roundness: float
    sampled_tir: float
    vector_uncertainty: float
    count: int
    highest_fitted: int
    degrees_of_freedom: int
    aliased_harmonics: tuple[int, ...]


@dataclass(frozen=True, eq=False)
class SurveyFit:
    """The same as `HarmonicFit` for every station of a survey, an array each.

    Attributes
    ----------
    means : numpy.ndarray
        Mean readings, [m]
    eccentricities : numpy.ndarray
        Offsets, complex; NaN at a station with too few readings, [m]
    seconds : numpy.ndarray
        Two-lobed parts, complex, [m]
    residuals : numpy.ndarray
        Reading less everything fitted, shape (stations, marks), [m]
    out_of_roundness : numpy.ndarray
        Greatest less least reading once mean and offset are taken away, [m]
    sampled_tir : numpy.ndarray
        Greatest less least reading as taken, [m]
    vector_uncertainties : numpy.ndarray
        Standard uncertainty of either component of each offset, [m]
    counts : numpy.ndarray
        Readings used at each station, [-]
    pooled_scatter : float
        Standard deviation of one reading from all stations together; NaN where nothing is left over
        to tell it, [m]
    """

    means: FloatArray
    eccentricities: ComplexArray
    seconds: ComplexArray
    residuals: FloatArray
    out_of_roundness: FloatArray
    sampled_tir: FloatArray
    vector_uncertainties: FloatArray
    counts: npt.NDArray[np.int64]
    pooled_scatter: float


class _Plan(NamedTuple):
    """All that depends on the angles alone."""

    design: FloatArray
    solver: FloatArray
    highest: int
    spread_gain: float
    aliased: tuple[int, ...]


def fit_harmonics(
    *,
    angles: npt.ArrayLike,
    readings: npt.ArrayLike,
    highest: int = 2,
    instrument_uncertainty: float = 0.0,
    indexing_uncertainty: float = 0.0,
) -> HarmonicFit:
    r"""Offset, ovality and form of one station from the readings of one turn, by least squares.

    .. math::

        r(\theta) = \bar r + \sum_{k=1}^{h} a_k \cos k\theta + b_k \sin k\theta ,
        \qquad e = a_1 + j\,b_1

    Parameters
    ----------
    angles : array_like
        Clock angles of the marks, counted as the plan counts, not necessarily evenly spaced, [rad]
    readings : array_like
        Indicator readings, positive towards the indicator, NaN where one is missing, [m]
    highest : int
        Highest harmonic wanted, [-]
    instrument_uncertainty : float
        Standard uncertainty of one reading from the instrument, [m]
    indexing_uncertainty : float
        Standard uncertainty of the angle of the whole set of marks, [rad]

    Returns
    -------
    fit : HarmonicFit
        Offset, form, and how well they are known, [m]

    Raises
    ------
    OutOfRangeError
        If fewer than three different angles have a reading, or no harmonic is asked for.

    Notes
    -----
    `highest` is lowered until one reading more than unknowns remains (never below 1), and the
    result says to what. The scatter of one reading is that of the residuals, but never less than
    the instrument's; with nothing left over and no instrument given it is unknown, NaN. A slip of
    all marks together moves the vector sideways by e times the angle; that is added in full to
    either component, the greater of the two effects. With n evenly spaced marks a form of n - 1 or
    n + 1 lobes reads as an offset.

    Examples
    --------
    Four marks, 10 µm towards the first and nothing across:

    >>> from math import pi
    >>> fit = fit_harmonics(angles=[0, pi / 2, pi, 3 * pi / 2], readings=[10e-6, 0, -10e-6, 0])
    >>> round(abs(fit.eccentricity) * 1e6, 6), fit.highest_fitted, fit.aliased_harmonics
    (10.0, 1, (3, 5))

    References
    ----------
    .. [1] NIST/SEMATECH e-Handbook of Statistical Methods, 2.3.4.4, roundness by least squares.
    .. [2] JCGM 100:2008, Guide to the expression of uncertainty in measurement, from memory.
    """
    angle_row = _checked_angles(angles)
    reading_row = np.asarray(readings, dtype=np.float64)
    if reading_row.shape != angle_row.shape:
        raise OutOfRangeError("readings", reading_row.size, "be as many as the angles")
    present = ~np.isnan(reading_row)
    used = reading_row[present]
    plan = _plan(tuple(angle_row[present].tolist()), highest)
    solution = plan.solver @ used
    residuals = np.full(angle_row.shape, np.nan)
    residuals[present] = left = used - plan.design @ solution
    round_part = used - plan.design[:, :3] @ solution[:3]
    freedom = used.size - solution.size
    eccentricity = complex(solution[1], solution[2])
    variance = float(left @ left) / freedom if freedom else math.nan
    return HarmonicFit(
        mean=float(solution[0]),
        eccentricity=eccentricity,
        second=complex(solution[3], solution[4]) if plan.highest > 1 else complex("nan"),
        residuals=residuals,
        out_of_roundness=float(round_part.max() - round_part.min()),
        sampled_tir=float(used.max() - used.min()),
        vector_uncertainty=math.sqrt(
            _variance_of_a_reading(variance, instrument_uncertainty) * plan.spread_gain
            + (abs(eccentricity) * indexing_uncertainty) ** 2
        ),
        count=used.size,
        highest_fitted=plan.highest,
        degrees_of_freedom=freedom,
        aliased_harmonics=plan.aliased,
    )


def fit_survey(
    *,
    angles: npt.ArrayLike,
    readings: npt.ArrayLike,
    highest: int = 2,
    instrument_uncertainty: float = 0.0,
    indexing_uncertainty: float = 0.0,
) -> SurveyFit:
    r"""Offset and form of every station of a survey read at the same marks.

    Station by station what `fit_harmonics` gives, computed together:

    .. math:: r_s(\theta) = \bar r_s + \sum_k a_{sk} \cos k\theta + b_{sk} \sin k\theta

    Parameters
    ----------
    angles : array_like
        Clock angles of the marks, shape (marks,), [rad]
    readings : array_like
        Indicator readings, shape (stations, marks), NaN where one is missing, [m]
    highest : int
        Highest harmonic wanted, [-]
    instrument_uncertainty : float
        Standard uncertainty of one reading from the instrument, [m]
    indexing_uncertainty : float
        Standard uncertainty of the angle of the whole set of marks, [rad]

    Returns
    -------
    fit : SurveyFit
        Offsets, forms, and how well they are known, [m]

    Raises
    ------
    OutOfRangeError
        If the readings do not have one column for each angle.

    Notes
    -----
    A station with fewer than three different angles read is NaN throughout instead of refused, so
    that one unread station does not hide the others.

    Examples
    --------
    Two stations, 10 µm towards the first mark and 20 µm towards the second:

    >>> from math import pi
    >>> fit = fit_survey(
    ...     angles=[0, pi / 2, pi, 3 * pi / 2],
    ...     readings=[[10e-6, 0, -10e-6, 0], [0, 20e-6, 0, -20e-6]])
    >>> [round(float(abs(vector)) * 1e6, 6) for vector in fit.eccentricities]
    [10.0, 20.0]

    References
    ----------
    .. [1] NIST/SEMATECH e-Handbook of Statistical Methods, 2.3.4.4, roundness by least squares.
    """
    angle_row = _checked_angles(angles)
    table = np.asarray(readings, dtype=np.float64)
    if table.ndim != 2 or table.shape[1] != angle_row.size:
        raise OutOfRangeError("readings", table.shape, "have one column for each angle")
    stations = table.shape[0]
    present = ~np.isnan(table)
    numbers = np.full((6, stations), np.nan)
    seconds = np.full(stations, complex("nan"))
    residuals = np.full(table.shape, np.nan)
    left_over, freedom_in_all = 0.0, 0
    for pattern in np.unique(present, axis=0):
        rows = np.flatnonzero((present == pattern).all(axis=1))
        used_angles = tuple(angle_row[pattern].tolist())
        if _distinct(used_angles) < 3:
            continue
        plan = _plan(used_angles, highest)
        used = table[np.ix_(rows, pattern)]
        solution = used @ plan.solver.T
        left = used - solution @ plan.design.T
        residuals[np.ix_(rows, pattern)] = left
        freedom = used.shape[1] - solution.shape[1]
        squares = np.einsum("ij,ij->i", left, left)
        left_over, freedom_in_all = (
            left_over + float(squares.sum()),
            freedom_in_all + (freedom * rows.size),
        )
        variances = squares / freedom if freedom else np.full(rows.size, np.nan)
        of_a_reading = np.array(
            [_variance_of_a_reading(float(one), instrument_uncertainty) for one in variances]
        )
        sizes = np.hypot(solution[:, 1], solution[:, 2])
        numbers[:3, rows] = solution[:, :3].T
        numbers[3, rows] = np.ptp(used - solution[:, :3] @ plan.design[:, :3].T, axis=1)
        numbers[4, rows] = np.ptp(used, axis=1)
        numbers[5, rows] = np.sqrt(
            of_a_reading * plan.spread_gain + (sizes * indexing_uncertainty) ** 2
        )
        if plan.highest > 1:
            seconds[rows] = solution[:, 3] + 1j * solution[:, 4]
    return SurveyFit(
        means=numbers[0],
        eccentricities=numbers[1] + 1j * numbers[2],
        seconds=seconds,
        residuals=residuals,
        out_of_roundness=numbers[3],
        sampled_tir=numbers[4],
        vector_uncertainties=numbers[5],
        counts=present.sum(axis=1).astype(np.int64),
        pooled_scatter=math.sqrt(left_over / freedom_in_all) if freedom_in_all else math.nan,
    )


def largest_sampling_loss(*, count: int) -> float:
    r"""Share of a pure offset's total that evenly spaced marks can miss.

    .. math:: 1 - \cos(\pi / n) \text{ for even } n, \quad
        \tfrac12 (1 - \cos(\pi / n)) \text{ for odd } n

    Parameters
    ----------
    count : int
        Number of evenly spaced marks, [-]

    Returns
    -------
    loss : float
        Greatest share by which the sampled total is too small, [-]

    Raises
    ------
    OutOfRangeError
        If there are fewer than three marks.

    Notes
    -----
    An odd number of marks that misses the high spot by most meets the low spot, hence the half.

    Examples
    --------
    Six marks, the high spot half-way between two: cos 30° of it is seen.

    >>> round(largest_sampling_loss(count=6), 3)
    0.134

    References
    ----------
    .. [1] By hand from r = e cos θ; no publication.
    """
    if count < 3:
        raise OutOfRangeError("count", count, "be 3 or more")
    loss = 1.0 - math.cos(math.pi / count)
    return loss if count % 2 == 0 else loss / 2.0


def _checked_angles(angles: npt.ArrayLike) -> FloatArray:
    angle_row = np.asarray(angles, dtype=np.float64)
    if angle_row.ndim != 1 or not np.isfinite(angle_row).all():
        raise OutOfRangeError("angles", angles, "be a row of finite angles")
    return angle_row


def _variance_of_a_reading(variance: float, instrument_uncertainty: float) -> float:
    # Few residuals can be small by luck; a reading is never better than its instrument.
    floor = instrument_uncertainty**2
    if math.isnan(variance):
        return floor if floor > 0.0 else math.nan
    return max(variance, floor)


def _distinct(angles: tuple[float, ...]) -> int:
    return len(_places_on_circle(angles))


def _places_on_circle(angles: tuple[float, ...]) -> list[float]:
    places: list[float] = []
    for angle in sorted(angle % (2 * math.pi) for angle in angles):
        if not places or angle - places[-1] > _SAME_ANGLE:
            places.append(angle)
    if len(places) > 1 and places[0] + 2 * math.pi - places[-1] <= _SAME_ANGLE:
        places.pop()
    return places


@lru_cache(maxsize=512)
def _plan(angles: tuple[float, ...], highest: int) -> _Plan:
    if highest < 1:
        raise OutOfRangeError("highest", highest, "be 1 or more")
    places = _places_on_circle(angles)
    if len(places) < 3:
        raise OutOfRangeError(
            "angles", len(places), "be at least three different ones with a reading"
        )
    fitted = max(1, min(highest, (len(places) - 2) // 2))
    row = np.array(angles)
    columns = [np.ones_like(row)]
    for order in range(1, fitted + 1):
        columns += [np.cos(order * row), np.sin(order * row)]
    design = np.column_stack(columns)
    solver = np.linalg.pinv(design)
    of_the_vector = (solver @ solver.T)[1:3, 1:3]
    return _Plan(
        design=design,
        solver=solver,
        highest=fitted,
        spread_gain=float(np.linalg.eigvalsh(of_the_vector)[-1]),
        aliased=_aliases(places),
    )


def _aliases(places: list[float]) -> tuple[int, ...]:
    # Marks missing from a regular circle leave the same two forms unseen as the whole circle.
    offsets = (np.array(places) - places[0]) / (2 * math.pi)
    for whole in range(len(places), _FINEST_REGULAR_CIRCLE + 1):
        steps = offsets * whole
        if np.abs(steps - np.round(steps)).max() < _SAME_ANGLE * whole:
            return (whole - 1, whole + 1)
    return ()
