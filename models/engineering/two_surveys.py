"""A survey beside the one before it, and what no bend of the rotor explains between them."""

import math
from dataclasses import dataclass
from functools import cached_property
from typing import NamedTuple

import numpy as np
import numpy.typing as npt

from models.engineering.errors import OutOfRangeError

__all__ = ["Field", "TwoSurveys"]

FloatArray = npt.NDArray[np.float64]
ComplexArray = npt.NDArray[np.complex128]

_PLACES = 301
_TURNS = 360
_SIGMAS = 5.0


class Field(NamedTuple):
    """How the rotor may lie and bend: two lines, and bends with the lines taken out.

    Attributes
    ----------
    known : numpy.ndarray
        Stations whose offset both surveys have, [-]
    both : numpy.ndarray
        Stations whose two-lobed part both surveys have, [-]
    weights : numpy.ndarray
        One over the standard uncertainty of a difference at the known stations, [1/m]
    line : numpy.ndarray
        Two columns that span every lie of the rotor, weighed, [-]
    bends : numpy.ndarray
        Bends at many places, weighed, of length 1, a row each, [-]
    """

    known: npt.NDArray[np.bool_]
    both: npt.NDArray[np.bool_]
    weights: FloatArray
    line: FloatArray
    bends: FloatArray


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
    def field(self) -> Field:
        """How this rotor may lie and bend without any mistake."""
        return _field(self)

    @cached_property
    def unexplained(self) -> float:
        """Weighted squares that no lie and no bend explains, as the survey stands, [-]."""
        return float(self.squares(self.present[None, :], self.present_seconds[None, :])[0])

    @cached_property
    def allowed(self) -> float:
        """Weighted squares up to which noise is explanation enough, [-]."""
        # Two components at each station, less four of the rotor's lie and three of a bend.
        freedom = max(2 * int(self.field.known.sum()) - 7, 1) + 2 * int(self.field.both.sum())
        return freedom + _SIGMAS * math.sqrt(2.0 * freedom)

    def squares(self, present: ComplexArray, seconds: ComplexArray) -> FloatArray:
        """Weighted squares that no lie and no bend explains, for each row of readings."""
        field = self.field
        moved = field.weights * (present - self.earlier)[:, field.known]
        moved = moved - (moved @ field.line) @ field.line.T
        along = np.abs(moved @ field.bends.T) ** 2
        least = np.sum(np.abs(moved) ** 2, axis=1) - along.max(axis=1, initial=0.0)
        form = (seconds - self.earlier_seconds)[:, field.both]
        spread = math.sqrt(2.0) * self.uncertainties[field.both]
        return np.asarray(
            np.maximum(least, 0.0) + np.sum(np.abs(form / spread) ** 2, axis=1), dtype=np.float64
        )

    def best_turn(self) -> float:
        """Turn of the whole present survey against the earlier that leaves least."""
        field = self.field
        before = field.weights * self.earlier[field.known]
        after = field.weights * self.present[field.known]
        before, after = (row - field.line @ (field.line.T @ row) for row in (before, after))
        turns = np.linspace(0.0, 2.0 * math.pi, _TURNS, endpoint=False)
        back = np.exp(-1j * turns)
        left = -2.0 * np.real(np.vdot(before, after) * back)
        # What lies along a bend is free to differ, so it is taken off the squares again.
        along_before, along_after = field.bends @ before, field.bends @ after
        free = np.abs(along_after[:, None] * back - along_before[:, None]) ** 2
        left = left - free.max(axis=0, initial=0.0)
        spread = 1.0 / (2.0 * self.uncertainties[field.both] ** 2)
        earlier, present = self.earlier_seconds[field.both], self.present_seconds[field.both]
        left = left - 2.0 * np.real(np.sum(spread * earlier.conj() * present) * back**2)
        return float(turns[int(np.argmin(left))])


def _field(surveys: TwoSurveys) -> Field:
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
    return Field(known, both, weights, line, bends[usable] / sizes[usable, None])
