"""A change at the stations of a rotor, made ready for fitting bends to it."""

import math
from typing import NamedTuple

import numpy as np
import numpy.typing as npt

from models.engineering.errors import OutOfRangeError

__all__ = ["WeighedStations"]

FloatArray = npt.NDArray[np.float64]
ComplexArray = npt.NDArray[np.complex128]


class WeighedStations(NamedTuple):
    """Stations in order, weighed, with every straight line already taken out.

    Attributes
    ----------
    places : numpy.ndarray
        Axial positions in order, [m]
    weights : numpy.ndarray
        One over the standard uncertainty of each, [1/m]
    line : numpy.ndarray
        Two columns that span every straight line, weighed, [-]
    left : numpy.ndarray
        Weighed change with its best line taken out, [-]
    squares : float
        Sum of its squares, [-]
    """

    places: FloatArray
    weights: FloatArray
    line: FloatArray
    left: ComplexArray
    squares: float

    def bends(self, kinks: FloatArray) -> FloatArray:
        """Weighed shapes of a bend of one radian at each place, lines taken out."""
        bends = -self.weights * np.maximum(self.places - kinks[:, None], 0.0)
        return np.asarray(bends - (bends @ self.line) @ self.line.T, dtype=np.float64)

    @staticmethod
    def of(
        positions: npt.ArrayLike, changes: npt.ArrayLike, uncertainties: npt.ArrayLike, minimum: int
    ) -> "WeighedStations":
        """Stations that have a change, refused where they are too few."""
        places = np.asarray(positions, dtype=np.float64)
        moved = np.asarray(changes, dtype=np.complex128)
        spreads = np.asarray(uncertainties, dtype=np.float64)
        if not places.shape == moved.shape == spreads.shape:
            raise OutOfRangeError(
                "changes", moved.size, "be as many as positions and uncertainties"
            )
        known = np.isfinite(moved) & np.isfinite(spreads)
        if (spreads[known] <= 0.0).any():
            raise OutOfRangeError("uncertainties", float(spreads[known].min()), "be more than 0")
        count = np.unique(places[known]).size
        if count < minimum:
            raise OutOfRangeError("positions", count, f"be {minimum} or more with a change")
        order = np.argsort(places[known], kind="stable")
        places, moved, weights = (
            places[known][order],
            moved[known][order],
            1.0 / spreads[known][order],
        )
        line = np.linalg.qr(np.column_stack([weights, weights * places]))[0]
        weighed = weights * moved
        left = weighed - line @ (line.T @ weighed)
        return WeighedStations(places, weights, line, left, float(np.sum(np.abs(left) ** 2)))

    def squares_with(self, kinks: FloatArray) -> FloatArray:
        """Squares that one bend at each place leaves."""
        bends = self.bends(kinks)
        sizes = np.einsum("ij,ij->i", bends, bends)
        # A kink outside the stations is a straight line, whose bend is rounding and no more.
        floor = 1e-18 * float(np.sum((self.weights * np.ptp(self.places)) ** 2))
        gains = np.abs(bends @ self.left) ** 2 / np.where(sizes > floor, sizes, np.inf)
        return np.asarray(np.maximum(self.squares - gains, 0.0), dtype=np.float64)

    def share_explained(self, left: float) -> float:
        """Share of the squares that is gone where so much is left."""
        return 1.0 - left / self.squares if self.squares > 0.0 else 0.0

    def residual_rms(self, explained: ComplexArray) -> float:
        """Root mean square over the stations of what is not explained."""
        residuals = (self.left - explained) / self.weights
        return math.sqrt(float(np.mean(np.abs(residuals) ** 2)))
