"""Offset and form of every station of a survey, computed together."""

import math
from dataclasses import dataclass

import numpy as np
import numpy.typing as npt

from models.engineering.circle import Circle
from models.engineering.errors import OutOfRangeError

__all__ = ["SurveyFit", "fit_survey"]

FloatArray = npt.NDArray[np.float64]
ComplexArray = npt.NDArray[np.complex128]


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
    angle_row = Circle.checked(angles)
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
        if Circle.distinct(used_angles) < 3:
            continue
        circle = Circle.of(used_angles, highest)
        used = table[np.ix_(rows, pattern)]
        solution = used @ circle.solver.T
        left = used - solution @ circle.design.T
        residuals[np.ix_(rows, pattern)] = left
        freedom = used.shape[1] - solution.shape[1]
        squares = np.einsum("ij,ij->i", left, left)
        left_over += float(squares.sum())
        freedom_in_all += freedom * rows.size
        variances = squares / freedom if freedom else np.full(rows.size, np.nan)
        of_the_vector = np.array(
            [circle.vector_variance(float(one), instrument_uncertainty) for one in variances]
        )
        sizes = np.hypot(solution[:, 1], solution[:, 2])
        numbers[:3, rows] = solution[:, :3].T
        numbers[3, rows] = np.ptp(used - solution[:, :3] @ circle.design[:, :3].T, axis=1)
        numbers[4, rows] = np.ptp(used, axis=1)
        numbers[5, rows] = np.sqrt(of_the_vector + (sizes * indexing_uncertainty) ** 2)
        if circle.highest > 1:
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
