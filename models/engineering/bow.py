"""Where a mount has bent the shaft: one kink, and two where the data bear them."""

import math
from collections.abc import Sequence
from dataclasses import dataclass
from typing import NamedTuple

import numpy as np
import numpy.typing as npt

from models.engineering.bow_shape import is_blind, kink_shape
from models.engineering.errors import OutOfRangeError

__all__ = [
    "KinkFit",
    "NearestSeat",
    "TwoKinkFit",
    "fit_one_kink",
    "fit_two_kinks",
    "is_blind",
    "kink_shape",
    "nearest_seat",
]

FloatArray = npt.NDArray[np.float64]
ComplexArray = npt.NDArray[np.complex128]

_GRID = 401
_PAIR_GRID = 161

# A second kink, put wherever it helps most, lowers the squares of pure noise by more than this once
# in about a hundred times: measured by tests/bench/kink_rates.py.
_NEEDED_BY_A_SECOND = 12.0


@dataclass(frozen=True)
class KinkFit:
    """One place at which a change bends the shaft.

    Attributes
    ----------
    position : float
        Axial position of the kink, [m]
    position_uncertainty : float
        Half of the interval below, about one standard uncertainty, [m]
    position_interval : tuple of float
        Where else the kink may sit without fitting worse than noise does, [m]
    bend_angle : float
        Angle between the two straight lengths, never negative, [rad]
    clock_angle : float
        Clock angle towards which the shaft bulges between its journals, from 0 to 2π, [rad]
    bulge : float
        Offset of the kink from the journal axis, 0 on an overhang, [m]
    share_explained : float
        Share of the squared change, beyond a straight line, that the kink explains, [-]
    residual_rms : float
        Root mean square of what is left over the stations, [m]
    misfit_ratio : float
        What is left in units of its uncertainty: about 1 where one kink is the whole story, [-]
    improvement : float
        By how much the kink lowers the weighted squares below those of a straight line, in units of
        the scatter; below about 12 a kink is not proven, [-]
    blind : bool
        Whether the kink was put into a stretch that no indicator reaches, [-]
    """

    position: float
    position_uncertainty: float
    position_interval: tuple[float, float]
    bend_angle: float
    clock_angle: float
    bulge: float
    share_explained: float
    residual_rms: float
    misfit_ratio: float
    improvement: float
    blind: bool


@dataclass(frozen=True)
class TwoKinkFit:
    """The best two places, and whether the data ask for a second one.

    Attributes
    ----------
    accepted : bool
        Whether the second kink lowers the weighted squares by more than chance does, [-]
    positions : tuple of float
        Axial positions of both kinks, in order, [m]
    bend_angles : tuple of float
        Their angles, never negative, [rad]
    clock_angles : tuple of float
        Clock angles towards which each bulges, from 0 to 2π, [rad]
    share_explained : float
        Share of the squared change, beyond a straight line, that both explain, [-]
    residual_rms : float
        Root mean square of what is left over the stations, [m]
    misfit_ratio : float
        What is left in units of its uncertainty, [-]
    improvement : float
        Weighted squares of one kink less those of two, in units of the scatter, [-]
    needed : float
        Improvement that is needed for the second kink to be accepted, [-]
    one : KinkFit
        The best single kink, which stands where two are not accepted, [-]
    """

    accepted: bool
    positions: tuple[float, float]
    bend_angles: tuple[float, float]
    clock_angles: tuple[float, float]
    share_explained: float
    residual_rms: float
    misfit_ratio: float
    improvement: float
    needed: float
    one: KinkFit


class NearestSeat(NamedTuple):
    """The seat nearest to a kink, and all that it may sit at.

    Attributes
    ----------
    seat : int
        Which seat is nearest, counted from 0, [-]
    distance : float
        From the kink to the seat's nearer edge, 0 within it, [m]
    in_reach : tuple of int
        All seats that the kink's interval touches, [-]
    """

    seat: int
    distance: float
    in_reach: tuple[int, ...]


class _Weighed(NamedTuple):
    """Stations in order, weighed, with every straight line already taken out."""

    places: FloatArray
    weights: FloatArray
    line: FloatArray
    left: ComplexArray
    squares: float

    def bends(self, kinks: FloatArray) -> FloatArray:
        bends = -self.weights * np.maximum(self.places - kinks[:, None], 0.0)
        return np.asarray(bends - (bends @ self.line) @ self.line.T, dtype=np.float64)


def fit_one_kink(
    *,
    positions: npt.ArrayLike,
    changes: npt.ArrayLike,
    uncertainties: npt.ArrayLike,
    first_journal_position: float,
    second_journal_position: float,
    candidates: npt.ArrayLike | None = None,
    blind_stretches: Sequence[tuple[float, float]] = (),
) -> KinkFit:
    r"""Place, angle and direction of the one bend that best explains a change.

    .. math:: \min_{z_0,\,\kappa,\,a,\,b} \sum_k
        \frac{|\Delta_k - a - b z_k + \kappa \langle z_k - z_0 \rangle|^2}{u_k^2}

    Parameters
    ----------
    positions : array_like
        Axial positions of the stations, journals included, in any order, [m]
    changes : array_like
        Complex change at each, as `change_at_stations` gives it, NaN where unknown, [m]
    uncertainties : array_like
        Standard uncertainty of either component of after less before at each station, without the
        journals' share (`reading_uncertainties` of `change_at_stations`), [m]
    first_journal_position : float
        Axial position of one journal, [m]
    second_journal_position : float
        Axial position of the other, further along, [m]
    candidates : array_like, optional
        Only places to consider; without them the whole reach is searched, [m]
    blind_stretches : sequence of tuple
        Start and end of each stretch that no indicator reaches, [m]

    Returns
    -------
    kink : KinkFit
        Best place, angle and direction, and how well each is known, [m]

    Raises
    ------
    OutOfRangeError
        If fewer than four places have a change, an uncertainty is not positive, or the journals are
        not in order.

    Notes
    -----
    The line a + b z is left free, so that an error at a journal, which tilts every station's change
    together, does not pose as a kink. A bend between the last two stations at either end moves one
    station alone and cannot be placed within that stretch: it is put at its inner station, and the
    interval covers the stretch. The interval widens with the misfit where that exceeds 1.

    Examples
    --------
    40 µrad in the middle of 2 m: 20 µm there, 10 µm half-way.

    >>> kink = fit_one_kink(
    ...     positions=[0.0, 0.5, 1.0, 1.5, 2.0], changes=[0, 10e-6, 20e-6, 10e-6, 0],
    ...     uncertainties=[1e-6] * 5, first_journal_position=0.0, second_journal_position=2.0)
    >>> round(kink.position, 4), round(kink.bend_angle * 1e6, 4), round(kink.bulge * 1e6, 4)
    (1.0, 40.0, 20.0)

    References
    ----------
    .. [1] By hand: least squares of two lines that meet; no publication.
    """
    data = _weighed(positions, changes, uncertainties, minimum=4)
    kink, squares = _best_place(data, candidates)
    bend = data.bends(np.array([kink]))[0]
    angle = complex(bend @ data.left / (bend @ bend)) if bend @ bend > 0.0 else 0j
    freedom = max(2 * data.places.size - 7, 1)
    scale = max(1.0, squares / freedom)
    low, high = _interval(data, kink, squares + scale)
    shape = kink_shape(
        positions=[kink],
        kink_position=kink,
        first_journal=first_journal_position,
        second_journal=second_journal_position,
    )
    return KinkFit(
        position=kink,
        position_uncertainty=(high - low) / 2.0,
        position_interval=(low, high),
        bend_angle=abs(angle),
        clock_angle=float(np.angle(angle) % (2.0 * math.pi)),
        bulge=abs(angle) * float(shape[0]),
        share_explained=_share(data.squares, squares),
        residual_rms=_residual_rms(data, bend * angle),
        misfit_ratio=math.sqrt(squares / freedom),
        improvement=(data.squares - squares) / scale,
        blind=is_blind(position=kink, stretches=blind_stretches),
    )


def fit_two_kinks(
    *,
    positions: npt.ArrayLike,
    changes: npt.ArrayLike,
    uncertainties: npt.ArrayLike,
    first_journal_position: float,
    second_journal_position: float,
    blind_stretches: Sequence[tuple[float, float]] = (),
) -> TwoKinkFit:
    r"""Best two bends of a change, accepted only where the data ask for the second.

    .. math:: \frac{S_1 - S_2}{\max(1,\ S_2/\nu_2)} > 12, \qquad \nu_2 = 2n - 10

    Parameters
    ----------
    positions : array_like
        Axial positions of the stations, journals included, in any order, [m]
    changes : array_like
        Complex change at each, NaN where unknown, [m]
    uncertainties : array_like
        Standard uncertainty of either component of after less before at each station, [m]
    first_journal_position : float
        Axial position of one journal, [m]
    second_journal_position : float
        Axial position of the other, further along, [m]
    blind_stretches : sequence of tuple
        Start and end of each stretch that no indicator reaches, [m]

    Returns
    -------
    kinks : TwoKinkFit
        Both places, and the single one that stands where two are not accepted, [m]

    Raises
    ------
    OutOfRangeError
        If fewer than six places have a change, an uncertainty is not positive, or the journals are
        not in order.

    Notes
    -----
    S are the weighted squares of the best one and the best two kinks. Each of the three straight
    lengths keeps two stations at least, for one alone would let the bends run away. The demand is
    what pure noise beats about once in a hundred surveys, measured, not an F-test from a table: the
    places are searched for, and no table allows for that.

    Examples
    --------
    A trapezium is not one bend:

    >>> kinks = fit_two_kinks(
    ...     positions=[0.0, 0.3, 0.6, 0.9, 1.2, 1.5, 1.8], uncertainties=[0.2e-6] * 7,
    ...     changes=[0, 10e-6, 20e-6, 20e-6, 20e-6, 10e-6, 0],
    ...     first_journal_position=0.0, second_journal_position=1.8)
    >>> kinks.accepted, [round(place, 2) for place in kinks.positions]
    (True, [0.6, 1.2])

    References
    ----------
    .. [1] By hand: least squares of three lines that meet; no publication.
    """
    data = _weighed(positions, changes, uncertainties, minimum=6)
    one = fit_one_kink(
        positions=positions,
        changes=changes,
        uncertainties=uncertainties,
        first_journal_position=first_journal_position,
        second_journal_position=second_journal_position,
        blind_stretches=blind_stretches,
    )
    pair, squares = _best_pair(data)
    bends = data.bends(np.array(pair))
    angles = np.linalg.lstsq(bends.T.astype(np.complex128), data.left, rcond=None)[0]
    freedom = 2 * data.places.size - 10
    one_squares = one.misfit_ratio**2 * (freedom + 3)
    improvement = max(one_squares - squares, 0.0) / max(1.0, squares / freedom)
    turns = np.angle(angles) % (2.0 * math.pi)
    return TwoKinkFit(
        accepted=improvement > _NEEDED_BY_A_SECOND,
        positions=pair,
        bend_angles=(float(abs(angles[0])), float(abs(angles[1]))),
        clock_angles=(float(turns[0]), float(turns[1])),
        share_explained=_share(data.squares, squares),
        residual_rms=_residual_rms(data, angles @ bends),
        misfit_ratio=math.sqrt(squares / freedom),
        improvement=improvement,
        needed=_NEEDED_BY_A_SECOND,
        one=one,
    )


def nearest_seat(
    *,
    position: float,
    position_interval: tuple[float, float],
    seats: Sequence[tuple[float, float]],
) -> NearestSeat:
    r"""Seat nearest to a kink, and every seat that the kink may sit at.

    .. math:: d_i = \max(a_i - z,\ z - b_i,\ 0)

    Parameters
    ----------
    position : float
        Axial position of the kink, [m]
    position_interval : tuple of float
        Where else it may sit, low and high, [m]
    seats : sequence of tuple
        Start and end of each seat, in either order, [m]

    Returns
    -------
    nearest : NearestSeat
        Which seat, how far, and which others are in reach, [m]

    Raises
    ------
    OutOfRangeError
        If there is no seat.

    Examples
    --------
    >>> nearest_seat(
    ...     position=0.5, position_interval=(0.25, 0.75), seats=[(0.0, 0.3), (0.45, 0.6)])
    NearestSeat(seat=1, distance=0.0, in_reach=(0, 1))

    References
    ----------
    .. [1] Definition; no publication.
    """
    if not seats:
        raise OutOfRangeError("seats", len(seats), "be one or more")
    distances = [max(min(seat) - position, position - max(seat), 0.0) for seat in seats]
    low, high = min(position_interval), max(position_interval)
    return NearestSeat(
        seat=distances.index(min(distances)),
        distance=min(distances),
        in_reach=tuple(
            index for index, seat in enumerate(seats) if min(seat) <= high and max(seat) >= low
        ),
    )


def _weighed(
    positions: npt.ArrayLike, changes: npt.ArrayLike, uncertainties: npt.ArrayLike, minimum: int
) -> _Weighed:
    places = np.asarray(positions, dtype=np.float64)
    moved = np.asarray(changes, dtype=np.complex128)
    spreads = np.asarray(uncertainties, dtype=np.float64)
    if not places.shape == moved.shape == spreads.shape:
        raise OutOfRangeError("changes", moved.size, "be as many as positions and uncertainties")
    known = np.isfinite(moved) & np.isfinite(spreads)
    if (spreads[known] <= 0.0).any():
        raise OutOfRangeError("uncertainties", float(spreads[known].min()), "be more than 0")
    count = np.unique(places[known]).size
    if count < minimum:
        raise OutOfRangeError("positions", count, f"be {minimum} or more with a change")
    order = np.argsort(places[known], kind="stable")
    places, moved, weights = places[known][order], moved[known][order], 1.0 / spreads[known][order]
    line = np.linalg.qr(np.column_stack([weights, weights * places]))[0]
    weighed = weights * moved
    left = weighed - line @ (line.T @ weighed)
    return _Weighed(places, weights, line, left, float(np.sum(np.abs(left) ** 2)))


def _squares(data: _Weighed, kinks: FloatArray) -> FloatArray:
    bends = data.bends(kinks)
    sizes = np.einsum("ij,ij->i", bends, bends)
    # A kink outside the stations is a straight line, whose bend is rounding and no more.
    floor = 1e-18 * float(np.sum((data.weights * np.ptp(data.places)) ** 2))
    gains = np.abs(bends @ data.left) ** 2 / np.where(sizes > floor, sizes, np.inf)
    return np.asarray(np.maximum(data.squares - gains, 0.0), dtype=np.float64)


def _best_place(data: _Weighed, candidates: npt.ArrayLike | None) -> tuple[float, float]:
    if candidates is not None:
        grid = np.atleast_1d(np.asarray(candidates, dtype=np.float64))
        if grid.size < 1:
            raise OutOfRangeError("candidates", grid.size, "be one place or more")
        squares = _squares(data, grid)
        best = int(np.argmin(squares))
        return float(grid[best]), float(squares[best])
    distinct = np.unique(data.places)
    low, high = distinct[1], distinct[-2]
    step = (high - low) / (_GRID - 1)
    grid = np.linspace(low, high, _GRID)
    for _ in range(2):
        squares = _squares(data, grid)
        best = int(np.argmin(squares))
        grid = np.clip(grid[best] + np.linspace(-step, step, _GRID), low, high)
        step = 2.0 * step / (_GRID - 1)
    squares = _squares(data, grid)
    best = int(np.argmin(squares))
    return float(grid[best]), float(squares[best])


def _interval(data: _Weighed, kink: float, ceiling: float) -> tuple[float, float]:
    inside = np.linspace(data.places[0], data.places[-1], 2 * _GRID + 1)[1:-1]
    fitting = inside[_squares(data, inside) <= ceiling]
    return float(min(fitting, default=kink)), float(max(fitting, default=kink))


def _best_pair(data: _Weighed) -> tuple[tuple[float, float], float]:
    distinct = np.unique(data.places)
    low, high = float(distinct[1]), float(distinct[-2])
    step = (high - low) / (_PAIR_GRID - 1)
    first = second = np.linspace(low, high, _PAIR_GRID)
    for _ in range(3):
        squares = _pair_squares(data, first, second, distinct)
        row, column = np.unravel_index(int(np.argmin(squares)), squares.shape)
        pair, best = (float(first[row]), float(second[column])), float(squares[row, column])
        around = np.linspace(-step, step, 41)
        first = np.clip(pair[0] + around, low, high)
        second = np.clip(pair[1] + around, low, high)
        step /= 20.0
    return pair, best


def _pair_squares(
    data: _Weighed, first: FloatArray, second: FloatArray, distinct: FloatArray
) -> FloatArray:
    one, two = data.bends(first), data.bends(second)
    own_one, own_two = np.sum(one**2, axis=1)[:, None], np.sum(two**2, axis=1)[None, :]
    shared = one @ two.T
    pull_one, pull_two = (one @ data.left)[:, None], (two @ data.left)[None, :]
    size = own_one * own_two - shared**2
    gains = (
        own_two * np.abs(pull_one) ** 2
        - 2.0 * shared * (pull_one * pull_two.conj()).real
        + own_one * np.abs(pull_two) ** 2
    )
    up_to_first = np.searchsorted(distinct, first, side="left")[:, None]
    up_to_second = np.searchsorted(distinct, second, side="right")[None, :]
    allowed = (up_to_second - up_to_first >= 2) & (size > 1e-12 * own_one * own_two)
    squares = data.squares - gains / np.where(allowed, size, 1.0)
    return np.where(allowed, np.maximum(squares, 0.0), np.inf)


def _share(all_squares: float, left: float) -> float:
    return 1.0 - left / all_squares if all_squares > 0.0 else 0.0


def _residual_rms(data: _Weighed, explained: ComplexArray) -> float:
    residuals = (data.left - explained) / data.weights
    return math.sqrt(float(np.mean(np.abs(residuals) ** 2)))
