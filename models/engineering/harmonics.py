"""The readings of one turn split into offset and form."""

import math
from dataclasses import dataclass

import numpy as np
import numpy.typing as npt

from models.engineering.circle import Circle
from models.engineering.errors import OutOfRangeError

__all__ = ["HarmonicFit", "fit_harmonics", "largest_sampling_loss"]

FloatArray = npt.NDArray[np.float64]


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
    angle_row = Circle.checked(angles)
    reading_row = np.asarray(readings, dtype=np.float64)
    if reading_row.shape != angle_row.shape:
        raise OutOfRangeError("readings", reading_row.size, "be as many as the angles")
    present = ~np.isnan(reading_row)
    used = reading_row[present]
    circle = Circle.of(tuple(angle_row[present].tolist()), highest)
    solution = circle.solver @ used
    residuals = np.full(angle_row.shape, np.nan)
    residuals[present] = left = used - circle.design @ solution
    round_part = used - circle.design[:, :3] @ solution[:3]
    freedom = used.size - solution.size
    eccentricity = complex(solution[1], solution[2])
    variance = float(left @ left) / freedom if freedom else math.nan
    return HarmonicFit(
        mean=float(solution[0]),
        eccentricity=eccentricity,
        second=complex(solution[3], solution[4]) if circle.highest > 1 else complex("nan"),
        residuals=residuals,
        out_of_roundness=float(round_part.max() - round_part.min()),
        sampled_tir=float(used.max() - used.min()),
        vector_uncertainty=math.sqrt(
            circle.vector_variance(variance, instrument_uncertainty)
            + (abs(eccentricity) * indexing_uncertainty) ** 2
        ),
        count=used.size,
        highest_fitted=circle.highest,
        degrees_of_freedom=freedom,
        aliased_harmonics=circle.aliased,
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
