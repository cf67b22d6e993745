"""Mistakes within one turn, and a survey typed off an earlier one."""

import math
from collections.abc import Sequence

import numpy as np
import numpy.typing as npt

from models.engineering.circle import Circle
from models.engineering.errors import OutOfRangeError
from models.engineering.suspicion import Mistake, Suspicion

__all__ = ["copied_survey", "unclosed_circle", "wild_reading"]

_LEAST_CLOSURE = 2e-6
_SHARE_OF_TOTAL = 0.05
_SIGMAS = 5.0
_LEAST_READINGS = 6
_LEAST_RUN = 8
_CHANCE_OF_A_RUN = 1e-3


def wild_reading(
    *, angles: npt.ArrayLike, readings: npt.ArrayLike, scatter: float, resolution: float
) -> Suspicion | None:
    r"""Suspect the one reading that does not belong to the turn of all the others.

    Each reading in turn is foretold from the others by mean, offset and ovality; the one that lies
    furthest off in units of what that forecast can be wrong by is questioned:

    .. math:: \frac{|r_i - \hat r_{(i)}|}{\sigma_r / \sqrt{1 - h_i}} > 5, \qquad
        \sigma_r^2 = \max(\sigma^2, \tilde s^2) + \frac{q^2}{12}

    Parameters
    ----------
    angles : array_like
        Clock angles of the marks, [rad]
    readings : array_like
        Readings, NaN where missing, [m]
    scatter : float
        Standard deviation of one reading on this stand or in this survey, :math:`\sigma`, [m]
    resolution : float
        Step of the indicator, :math:`q`, [m]

    Returns
    -------
    suspicion : Suspicion or None
        Which mark, how far off in units of the limit, and the value meant, [m]

    Raises
    ------
    OutOfRangeError
        If scatter or resolution is not positive, or fewer than three angles have a reading.

    Notes
    -----
    :math:`\tilde s` is the scatter of the other readings by their median residual, so that a lobed
    surface is not questioned everywhere. Six readings at least are needed; fewer give None. The
    value meant is the reading with its sign, decimal or unit put right where that fits, and else
    the forecast. A flaw of the surface shows the same every time: give the difference of two
    surveys to leave it out.

    Examples
    --------
    >>> from math import cos, pi
    >>> marks = [k * pi / 4 for k in range(8)]
    >>> readings = [20e-6 * cos(mark) for mark in marks]
    >>> readings[4] = 20e-6
    >>> found = wild_reading(angles=marks, readings=readings, scatter=1e-6, resolution=1e-6)
    >>> found.mark, round(found.meant * 1e6, 6)
    (4, -20.0)

    References
    ----------
    .. [1] By hand: least squares with one reading left out; no publication.
    """
    for name, size in (("scatter", scatter), ("resolution", resolution)):
        if not size > 0.0:
            raise OutOfRangeError(name, size, "be more than 0")
    marks = Circle.checked(angles)
    row = np.asarray(readings, dtype=np.float64)
    there = np.flatnonzero(~np.isnan(row))
    used, places = row[there], tuple(marks[there].tolist())
    # The fit without a reading needs the same harmonics, and one with a mark less allows fewer.
    highest = 2 if Circle.distinct(places) > _LEAST_READINGS else 1
    circle = Circle.of(places, highest)
    if used.size < _LEAST_READINGS:
        return None
    # With the hat matrix H = D S, leaving reading i out changes the other residuals by
    # h_ij e_i / (1 - h_i) and foretells it e_i / (1 - h_i) off: no fit is made anew.
    hat = circle.design @ circle.solver
    room = np.maximum(1.0 - hat.diagonal(), 1e-9)
    plain = used - hat @ used
    off = plain / room
    residuals = np.abs(plain + hat * off[:, np.newaxis])
    count = used.size - 1
    others = residuals[~np.eye(used.size, dtype=bool)].reshape(used.size, count)
    freedom = max(count - circle.design.shape[1], 1)
    seen = np.median(others, axis=1) * math.sqrt(count / freedom) / 0.6745
    doubt = np.sqrt(np.maximum(scatter, seen) ** 2 + resolution**2 / 12.0)
    ratios = np.abs(off) * np.sqrt(room) / (_SIGMAS * doubt)
    worst = int(np.argmax(ratios))
    ratio, one = float(ratios[worst]), float(doubt[worst])
    mark, forecast = int(there[worst]), float(used[worst] - off[worst])
    if ratio <= 1.0:
        return None
    return Suspicion(
        Mistake.WILD_READING,
        evidence=ratio,
        mark=mark,
        meant=_meant(float(row[mark]), forecast, 3.0 * one),
    )


def unclosed_circle(
    *, first: float, last: float, tir: float, scatter: float, resolution: float
) -> Suspicion | None:
    r"""Suspect a turn whose first mark reads otherwise after a full turn.

    .. math:: |r_{last} - r_{first}| > \max\left(2\,\text{µm},\ 0.05\,T,\
        5\sqrt{2}\sqrt{\sigma^2 + q^2/12}\right)

    Parameters
    ----------
    first : float
        Reading at the first mark, [m]
    last : float
        Reading at the same mark after a full turn, [m]
    tir : float
        Total of the turn, [m]
    scatter : float
        Standard deviation of one reading on this stand, [m]
    resolution : float
        Step of the indicator, [m]

    Returns
    -------
    suspicion : Suspicion or None
        With the error over what is allowed as evidence, [-]

    Raises
    ------
    OutOfRangeError
        If scatter or resolution is not positive, or the total is negative.

    Notes
    -----
    Without the third bound a stand that repeats within 1 µm would be asked at one station in six.

    Examples
    --------
    >>> found = unclosed_circle(first=0.0, last=8e-6, tir=80e-6, scatter=0.5e-6, resolution=1e-6)
    >>> round(found.evidence, 6)
    2.0

    References
    ----------
    .. [1] US Bureau of Reclamation, FIST 4-1A: the indicator returns to its start; the bounds are
       common practice.
    """
    for name, size in (("scatter", scatter), ("resolution", resolution)):
        if not size > 0.0:
            raise OutOfRangeError(name, size, "be more than 0")
    if tir < 0.0:
        raise OutOfRangeError("tir", tir, "be 0 or more")
    by_chance = _SIGMAS * math.sqrt(2.0 * (scatter**2 + resolution**2 / 12.0))
    allowed = max(_LEAST_CLOSURE, _SHARE_OF_TOTAL * tir, by_chance)
    ratio = abs(last - first) / allowed
    return Suspicion(Mistake.CIRCLE_NOT_CLOSED, evidence=ratio) if ratio > 1.0 else None


def copied_survey(
    *, typed: Sequence[str], earlier: Sequence[str], scatter: float, resolution: float
) -> Suspicion | None:
    r"""Suspect readings that were typed off an earlier survey.

    A run of k equal readings among n is questioned where chance gives one too rarely:

    .. math:: n\,p^k < 0.001, \quad k \ge 8, \qquad
        p = \mathrm{E}\max(0,\ 1 - |d|/q), \quad d \sim N(0,\ 2\sigma^2)

    Parameters
    ----------
    typed : sequence of str
        Readings as typed, in the order of station and mark, [-]
    earlier : sequence of str
        Those of the earlier survey at the same stations and marks, [-]
    scatter : float
        Standard deviation of one reading on this stand, :math:`\sigma`, [m]
    resolution : float
        Step of the indicator, :math:`q`, [m]

    Returns
    -------
    suspicion : Suspicion or None
        With the mark at which the longest equal run begins, counted through all stations, [-]

    Raises
    ------
    OutOfRangeError
        If the surveys differ in length, or scatter or resolution is not positive.

    Notes
    -----
    A coarse indicator on a good stand repeats itself: with steps of 2.54 µm and a scatter of 1 µm
    more than half of all readings come again by honest chance, and eight in a row prove nothing.

    Examples
    --------
    >>> row = ["1.0", "2.5", "4.0", "3.5", "1.0", "-2.0", "-3.5", "-1.0", "0.5", "2.0"]
    >>> copied_survey(typed=row, earlier=row, scatter=1e-6, resolution=0.5e-6).evidence > 1
    True

    References
    ----------
    .. [1] By hand: chance that two readings round to one step; no publication.
    """
    if len(typed) != len(earlier):
        raise OutOfRangeError("earlier", len(earlier), "be as many as typed")
    for name, size in (("scatter", scatter), ("resolution", resolution)):
        if not size > 0.0:
            raise OutOfRangeError(name, size, "be more than 0")
    longest, start, run = 0, 0, 0
    for place, (now, before) in enumerate(zip(typed, earlier, strict=True)):
        run = run + 1 if now.strip() and now.strip() == before.strip() else 0
        if run > longest:
            longest, start = run, place - run + 1
    if longest < _LEAST_RUN:
        return None
    # Logarithms, for the chance of a whole survey is far below the least float.
    chance = math.log(len(typed)) + longest * math.log(_chance_of_equality(scatter, resolution))
    ratio = chance / math.log(_CHANCE_OF_A_RUN)
    if ratio <= 1.0:
        return None
    return Suspicion(Mistake.COPIED, evidence=ratio, mark=start)


def _meant(reading: float, forecast: float, near: float) -> float:
    fitting = [
        value
        for value in (-reading, reading / 10, reading * 10, reading / 25.4, reading * 25.4)
        # Near nothing every small value fits, and none is evidence.
        if abs(value - forecast) <= near <= abs(value) / 2.0
    ]
    return min(fitting, key=lambda value: abs(value - forecast), default=forecast)


def _chance_of_equality(scatter: float, resolution: float) -> float:
    # E max(0, 1 - |d|/q) for a normal d of spread s has a closed form.
    spread = math.sqrt(2.0) * scatter
    reach = resolution / spread
    inside = math.erf(reach / math.sqrt(2.0))
    mean_size = math.sqrt(2.0 / math.pi) * (1.0 - math.exp(-(reach**2) / 2.0)) / reach
    return min(max(inside - mean_size, 1e-12), 1.0 - 1e-12)
