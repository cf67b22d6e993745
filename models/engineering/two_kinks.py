"""A second bend, where the data ask for one."""

import math
from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np
import numpy.typing as npt

from models.engineering.one_kink import KinkFit, fit_one_kink
from models.engineering.weighed_stations import WeighedStations

__all__ = ["TwoKinkFit", "fit_two_kinks"]

FloatArray = npt.NDArray[np.float64]

_PAIR_GRID = 161

# A second kink, put wherever it helps most, lowers the squares of pure noise by more than this once
# in about a hundred times: measured by tests/bench/kink_rates.py.
_NEEDED_BY_A_SECOND = 12.0


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
    data = WeighedStations.of(positions, changes, uncertainties, minimum=6)
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
        share_explained=data.share_explained(squares),
        residual_rms=data.residual_rms(angles @ bends),
        misfit_ratio=math.sqrt(squares / freedom),
        improvement=improvement,
        needed=_NEEDED_BY_A_SECOND,
        one=one,
    )


def _best_pair(data: WeighedStations) -> tuple[tuple[float, float], float]:
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
    data: WeighedStations, first: FloatArray, second: FloatArray, distinct: FloatArray
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
