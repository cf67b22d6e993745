"""Waiting until a shaft is cold enough to be read, and what is left when it is not."""

import math
from collections.abc import Sequence

import numpy as np
from numpy.typing import NDArray

from models.engineering.errors import OutOfRangeError

__all__ = [
    "bow_profile",
    "remainder_to_cold",
    "repeat_interval",
    "thermal_bow",
    "time_to_readable",
]


def time_to_readable(
    *, temperature_difference: float, remainder: float, time_constant: float
) -> float:
    r"""Time until a cooling shaft is within a given difference of the room.

    .. math:: t = \tau \ln (\Delta T / \Delta T_r)

    Parameters
    ----------
    temperature_difference : float
        Shaft less room at the start, :math:`\Delta T`, [K]
    remainder : float
        Difference at which it may be read, :math:`\Delta T_r`, [K]
    time_constant : float
        Time constant of the shaft, :math:`\tau`, [s]

    Returns
    -------
    float
        Waiting time; 0 where the difference is already that small, [s]

    Raises
    ------
    OutOfRangeError
        If remainder or time constant is not positive.

    Notes
    -----
    Advice on when to try: temperatures permit a reading, they never prove it.

    Examples
    --------
    From 100 K to 2 K at a time constant of 3.8 h, τ · ln 50 = 3.9 τ:

    >>> time_to_readable(
    ...     temperature_difference=100.0, remainder=2.0, time_constant=3.8 * 3600.0) / 3600.0
    15.

    References
    ----------
    Exponential decay of a lumped body.
    """
    _refuse_unless_positive("remainder", remainder)
    _refuse_unless_positive("time_constant", time_constant)
    if abs(temperature_difference) <= remainder:
        return 0.0
    return time_constant * math.log(abs(temperature_difference) / remainder)


def thermal_bow(
    *, expansion: float, temperature_difference_across: float, span: float, diameter: float
) -> float:
    r"""Bow at mid-span of a shaft that is warmer on one side.

    .. math:: y = \frac{\alpha \, \Delta T \, L^2}{8 D}

    Parameters
    ----------
    expansion : float
        Coefficient of expansion, :math:`\alpha`, [1/K]
    temperature_difference_across : float
        Difference from one side to the opposite, :math:`\Delta T`, [K]
    span : float
        Distance between the supports, :math:`L`, [m]
    diameter : float
        Diameter, :math:`D`, [m]

    Returns
    -------
    float
        Bow towards the warm side; the indicator's total is twice as much, [m]

    Raises
    ------
    OutOfRangeError
        If span or diameter is not positive.

    Notes
    -----
    A plain shaft free to bend, the difference spread evenly across it and the same all along. One
    kelvin on 150 mm and 2 m is 80 µm on the indicator.

    Examples
    --------
    12e-6 · 1 · 4 / 1.2:

    >>> thermal_bow(expansion=12e-6, temperature_difference_across=1.0, span=2.0, diameter=0.150)
    4.0e-05

    References
    ----------
    S. P. Timoshenko, Strength of Materials, curvature α ΔT / D of a beam heated on one side; from
    memory.
    """
    _refuse_unless_positive("span", span)
    _refuse_unless_positive("diameter", diameter)
    return expansion * temperature_difference_across * span**2 / (8.0 * diameter)


def bow_profile(
    *,
    positions: Sequence[float],
    first_journal: float,
    second_journal: float,
    expansion: float,
    temperature_difference_across: float,
    diameter: float,
) -> NDArray[np.float64]:
    r"""Bow along a shaft that is warmer on one side, seen from its two journals.

    .. math:: y(z) = \frac{\alpha \, \Delta T}{2 D} (z - z_1)(z_2 - z)

    Parameters
    ----------
    positions : Sequence[float]
        Axial positions :math:`z`, shape (n,), [m]
    first_journal : float
        Axial position of one journal, :math:`z_1`, [m]
    second_journal : float
        Axial position of the other, :math:`z_2`, [m]
    expansion : float
        Coefficient of expansion, :math:`\alpha`, [1/K]
    temperature_difference_across : float
        Difference from one side to the opposite, :math:`\Delta T`, [K]
    diameter : float
        Diameter, :math:`D`, [m]

    Returns
    -------
    NDArray[np.float64]
        Offset towards the warm side, negative at the overhangs, shape (n,), [m]

    Raises
    ------
    OutOfRangeError
        If the journals coincide or the diameter is not positive.

    Notes
    -----
    As `thermal_bow`, which is its value half-way between the journals.

    Examples
    --------
    At a journal, half-way, and 0.5 m beyond the other journal:

    >>> bow_profile(positions=[0.0, 1.0, 2.5], first_journal=0.0, second_journal=2.0,
    ...             expansion=12e-6, temperature_difference_across=1.0, diameter=0.150) * 1e6
    array([  0.,  40., -50.])

    References
    ----------
    As `thermal_bow`.
    """
    if first_journal == second_journal:
        raise OutOfRangeError("second_journal", second_journal, "differ from the first")
    _refuse_unless_positive("diameter", diameter)
    along = np.asarray(positions, dtype=float)
    curvature = expansion * temperature_difference_across / diameter
    return curvature / 2.0 * (along - first_journal) * (second_journal - along)


def remainder_to_cold(*, difference: float, interval: float, time_constant: float) -> float:
    r"""Change still to come when two surveys some time apart differ by so much.

    A decay that loses :math:`d` in :math:`\Delta t` still has to lose, from the second survey on,

    .. math:: r = \frac{d}{e^{\Delta t / \tau} - 1}

    Parameters
    ----------
    difference : float
        Difference of the two surveys, or what they may hide, :math:`d`, [m]
    interval : float
        Time between them, :math:`\Delta t`, [s]
    time_constant : float
        Time constant of the shaft, :math:`\tau`, [s]

    Returns
    -------
    float
        Change still to come after the second survey, [m]

    Raises
    ------
    OutOfRangeError
        If the difference is negative, or interval or time constant is not positive.

    Notes
    -----
    Half an hour proves nothing on a thick shaft: at a time constant of 5 h it is a tenth of it, in
    which a decay loses only 1 part in 10, so that what is left is ten times what was seen.

    Examples
    --------
    Two surveys half an hour apart agree within 2 µm, at 5 h: 2/(e^0.1 − 1) is 19 µm.

    >>> remainder_to_cold(difference=2e-6, interval=1800.0, time_constant=18000.0)
    1.9e-05

    References
    ----------
    Exponential decay of a lumped body.
    """
    if not difference >= 0.0:
        raise OutOfRangeError("difference", difference, "not be negative")
    _refuse_unless_positive("interval", interval)
    _refuse_unless_positive("time_constant", time_constant)
    return difference / math.expm1(min(interval / time_constant, 700.0))


def repeat_interval(*, tolerance: float, remainder: float, time_constant: float) -> float:
    r"""Time between two surveys whose agreement proves that little is left to come.

    .. math:: \Delta t = \tau \ln (1 + d / r)

    Parameters
    ----------
    tolerance : float
        Difference within which the surveys count as agreeing, repeatability included,
        :math:`d`, [m]
    remainder : float
        Change still to come that does no harm, :math:`r`, [m]
    time_constant : float
        Time constant of the shaft, :math:`\tau`, [s]

    Returns
    -------
    float
        Least time between the two surveys, [s]

    Raises
    ------
    OutOfRangeError
        If tolerance, remainder or time constant is not positive.

    Notes
    -----
    With the remainder as large as the tolerance it is 0.69 of a time constant: it scales with the
    shaft, not with the clock on the wall.

    Examples
    --------
    Agreeing within 2 µm is to prove 2 µm, at 5 h, ln 2 · 5 h:

    >>> repeat_interval(tolerance=2e-6, remainder=2e-6, time_constant=18000.0) / 3600.0
    3.47

    References
    ----------
    `remainder_to_cold`, solved for the interval.
    """
    _refuse_unless_positive("tolerance", tolerance)
    _refuse_unless_positive("remainder", remainder)
    _refuse_unless_positive("time_constant", time_constant)
    return time_constant * math.log1p(tolerance / remainder)


def _refuse_unless_positive(name: str, value: float) -> None:
    if not value > 0.0:
        raise OutOfRangeError(name, value, "be positive")
