"""What a set of marks around a circle can tell, worked out once for each set."""

import math
from functools import lru_cache
from typing import NamedTuple

import numpy as np
import numpy.typing as npt

from models.engineering.errors import OutOfRangeError

__all__ = ["Circle"]

FloatArray = npt.NDArray[np.float64]

_SAME_ANGLE = 1e-6
_FINEST_REGULAR_CIRCLE = 72


class Circle(NamedTuple):
    """All of a least-squares fit that depends on the marks alone.

    Attributes
    ----------
    design : numpy.ndarray
        Mean, cosine and sine columns, one row for each reading, [-]
    solver : numpy.ndarray
        Readings to mean and harmonics, [-]
    highest : int
        Highest harmonic that these marks allow, up to the one wanted, [-]
    spread_gain : float
        Variance of the worse-known component of the offset for a reading's variance of 1, [-]
    aliased : tuple of int
        Forms that these marks cannot tell from an offset, [-]
    """

    design: FloatArray
    solver: FloatArray
    highest: int
    spread_gain: float
    aliased: tuple[int, ...]

    @staticmethod
    def of(angles: tuple[float, ...], highest: int) -> "Circle":
        """Work a set of marks out for the highest harmonic wanted, or take it from memory."""
        return _circle(angles, highest)

    @staticmethod
    def checked(angles: npt.ArrayLike) -> FloatArray:
        """Angles as a row, refused unless each is a number."""
        return _checked_angles(angles)

    @staticmethod
    def distinct(angles: tuple[float, ...]) -> int:
        """How many different marks there are."""
        return len(_places_on_circle(angles))

    def vector_variance(self, reading_variance: float, instrument_uncertainty: float) -> float:
        """Variance of the worse-known component of the offset; NaN where nothing tells it."""
        # Few residuals can be small by luck; a reading is never better than its instrument.
        floor = instrument_uncertainty**2
        if math.isnan(reading_variance):
            return self.spread_gain * floor if floor > 0.0 else math.nan
        return self.spread_gain * max(reading_variance, floor)


def _checked_angles(angles: npt.ArrayLike) -> FloatArray:
    angle_row = np.asarray(angles, dtype=np.float64)
    if angle_row.ndim != 1 or not np.isfinite(angle_row).all():
        raise OutOfRangeError("angles", angles, "be a row of finite angles")
    return angle_row


def _places_on_circle(angles: tuple[float, ...]) -> list[float]:
    places: list[float] = []
    for angle in sorted(angle % (2 * math.pi) for angle in angles):
        if not places or angle - places[-1] > _SAME_ANGLE:
            places.append(angle)
    if len(places) > 1 and places[0] + 2 * math.pi - places[-1] <= _SAME_ANGLE:
        places.pop()
    return places


@lru_cache(maxsize=512)
def _circle(angles: tuple[float, ...], highest: int) -> Circle:
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
    return Circle(
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
