"""Where and when a cooling shaft will end, from a few readings of one station."""

import math
from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from models.engineering.errors import OutOfRangeError

__all__ = ["ColdForecast", "cold_forecast"]

_GRID = 400
_REFINEMENTS = 60


@dataclass(frozen=True, kw_only=True)
class ColdForecast:
    """What a decay fitted to a few readings says of the cold state; advice, never acceptance."""

    final: complex
    """Value when cold; the imaginary part is 0 for plain values [m]."""
    final_uncertainty: float
    """Standard uncertainty of the value when cold, of each component of a vector [m]."""
    amplitude: complex
    """Value less final value at the first reading's time [m]."""
    time_constant: float
    """Time constant, fitted or as given [s]."""
    time_constant_low: float
    """Shortest time constant that fits as well within one standard deviation [s]."""
    time_constant_high: float
    """Longest time constant that fits as well within one standard deviation [s]."""
    settled_at: float
    """Time, on the readings' clock, from which the value is within the tolerance of final [s]."""
    residual: float
    """Standard deviation of the readings about the fit, of each component [m]."""


def cold_forecast(
    *,
    times: Sequence[float],
    values: Sequence[float] | Sequence[complex] | NDArray[np.complex128] | NDArray[np.float64],
    tolerance: float,
    reading_uncertainty: float,
    time_constant: float | None = None,
) -> ColdForecast:
    r"""Fit a decay to a few readings of one station and say where and when it will end.

    .. math:: v(t) = v_\infty + A \, e^{-(t - t_1)/\tau}

    For each time constant the best :math:`v_\infty` and :math:`A` follow by linear least squares,
    so that only :math:`\tau` is searched. Its doubt goes into the final value: how far
    :math:`v_\infty` moves over the time constants that fit within one standard deviation is added
    to the uncertainty at the best one.

    Parameters
    ----------
    times : Sequence[float]
        Times of the readings, rising, shape (n,), [s]
    values : Sequence[float] | Sequence[complex] | NDArray[np.complex128] | NDArray[np.float64]
        Readings, plain or as vectors e·exp(jθ), shape (n,), [m]
    tolerance : float
        Distance from the final value that counts as settled, [m]
    reading_uncertainty : float
        Standard uncertainty of one reading, of each component of a vector, [m]
    time_constant : float | None, optional
        Time constant where it is known, else it is fitted, [s]

    Returns
    -------
    ColdForecast
        Final value with its uncertainty [m], time constant [s], when settled [s]

    Raises
    ------
    OutOfRangeError
        If there are fewer than three readings, or four where the time constant is fitted too; the
        times do not rise; the values are not as many; tolerance, uncertainty or time constant is
        not positive; or the readings bend too little to show a time constant.

    Notes
    -----
    One exponential is what remains after the quick equalisation across the fit; readings taken in
    its first minutes do not belong in. The readings' own scatter counts where it exceeds the
    uncertainty stated. A fit of a decay that has hardly begun is refused rather than guessed.

    Examples
    --------
    8 µm above the final 5 µm, halving every hour: 13, 9, 7 and 6 µm.

    >>> forecast = cold_forecast(
    ...     times=[0.0, 3600.0, 7200.0, 10800.0], values=[13e-6, 9e-6, 7e-6, 6e-6],
    ...     tolerance=1e-6, reading_uncertainty=0.1e-6)
    >>> round(forecast.final.real * 1e6, 3), round(forecast.settled_at / 3600.0, 3)
    (5.0, 3.0)

    References
    ----------
    G. H. Golub, V. Pereyra, separable least squares; from memory. JCGM 100 for the uncertainty of
    a linear fit; from memory.
    """
    clock, readings = _checked(times, values, tolerance, reading_uncertainty, time_constant)
    since = clock - clock[0]
    parts = 2 if np.iscomplexobj(values) else 1
    fitted = parts * 2 + (time_constant is None)
    grid = np.geomspace(float(np.min(np.diff(since))) / 5.0, 30.0 * float(since[-1]), _GRID)
    best = time_constant or _best_time_constant(since, readings, grid)
    final, amplitude, squares, spread = _linear_fit(since, readings, best)
    residual = math.sqrt(squares / (parts * since.size - fitted))
    sigma = max(residual, reading_uncertainty)
    low = high = best
    if time_constant is None:
        most = squares + sigma**2
        low = _as_good_until(since, readings, best, grid[grid < best][::-1], most)
        high = _as_good_until(since, readings, best, grid[grid > best], most)
    wander = max(abs(_linear_fit(since, readings, edge)[0] - final) for edge in (low, high))
    height = abs(amplitude)
    waiting = best * math.log(height / tolerance) if height > tolerance else 0.0
    return ColdForecast(
        final=final,
        final_uncertainty=math.hypot(sigma * spread, wander),
        amplitude=amplitude,
        time_constant=best,
        time_constant_low=low,
        time_constant_high=high,
        settled_at=float(clock[0]) + waiting,
        residual=residual,
    )


def _checked(
    times: Sequence[float],
    values: Sequence[float] | Sequence[complex] | NDArray[np.complex128] | NDArray[np.float64],
    tolerance: float,
    reading_uncertainty: float,
    time_constant: float | None,
) -> tuple[NDArray[np.float64], NDArray[np.complex128]]:
    clock = np.asarray(times, dtype=float)
    readings = np.asarray(values, dtype=complex)
    needed = 4 if time_constant is None else 3
    if clock.ndim != 1 or clock.size < needed:
        raise OutOfRangeError("times", times, f"hold at least {needed} readings")
    if not bool(np.all(np.diff(clock) > 0.0)):
        raise OutOfRangeError("times", times, "rise from reading to reading")
    if readings.shape != clock.shape:
        raise OutOfRangeError("values", values, "be as many as the times")
    if not bool(np.all(np.isfinite(readings))):
        raise OutOfRangeError("values", values, "all be numbers")
    positive = {"tolerance": tolerance, "reading_uncertainty": reading_uncertainty}
    if time_constant is not None:
        positive["time_constant"] = time_constant
    for name, value in positive.items():
        if not value > 0.0:
            raise OutOfRangeError(name, value, "be positive")
    return clock, readings


def _linear_fit(
    since: NDArray[np.float64], readings: NDArray[np.complex128], time_constant: float
) -> tuple[complex, complex, float, float]:
    decay = np.exp(-since / time_constant)
    centred = decay - decay.mean()
    weight = float(centred @ centred)
    slope = complex(centred @ readings) / weight if weight > 0.0 else 0.0 + 0.0j
    final = complex(readings.mean() - slope * decay.mean())
    errors = readings - final - slope * decay
    squares = float(np.sum(np.abs(errors) ** 2))
    spread = math.sqrt(1.0 / since.size + float(decay.mean()) ** 2 / weight) if weight else math.inf
    return final, slope, squares, spread


def _best_time_constant(
    since: NDArray[np.float64], readings: NDArray[np.complex128], grid: NDArray[np.float64]
) -> float:
    squares = [_linear_fit(since, readings, float(value))[2] for value in grid]
    best = int(np.argmin(squares))
    if best in (0, grid.size - 1):
        raise _bends_too_little(since)
    low, high = math.log(grid[best - 1]), math.log(grid[best + 1])
    golden = (math.sqrt(5.0) - 1.0) / 2.0
    for _ in range(_REFINEMENTS):
        left, right = high - golden * (high - low), low + golden * (high - low)
        at_left = _linear_fit(since, readings, math.exp(left))[2]
        at_right = _linear_fit(since, readings, math.exp(right))[2]
        low, high = (low, right) if at_left < at_right else (left, high)
    return math.exp((low + high) / 2.0)


def _as_good_until(
    since: NDArray[np.float64],
    readings: NDArray[np.complex128],
    best: float,
    outwards: NDArray[np.float64],
    most_squares: float,
) -> float:
    inside = best
    for outside in outwards:
        if _linear_fit(since, readings, float(outside))[2] > most_squares:
            break
        inside = float(outside)
    else:
        raise _bends_too_little(since)
    edge = float(outside)
    for _ in range(_REFINEMENTS):
        middle = math.sqrt(inside * edge)
        if _linear_fit(since, readings, middle)[2] > most_squares:
            edge = middle
        else:
            inside = middle
    return inside


def _bends_too_little(since: NDArray[np.float64]) -> OutOfRangeError:
    return OutOfRangeError(
        "times",
        float(since[-1]),
        "span enough of the decay, or the time constant be given: these readings show none",
    )
