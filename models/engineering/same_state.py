"""Two surveys of a rotor that should say the same, or differ in one known way."""

import math
from dataclasses import dataclass

import numpy as np
import numpy.typing as npt

from models.engineering.errors import OutOfRangeError

__all__ = [
    "Agreement",
    "CommonTurn",
    "IndexTest",
    "Repeatability",
    "cold_agreement",
    "common_turn",
    "index_test",
    "repeatability",
    "still_to_come",
]

FloatArray = npt.NDArray[np.float64]
ComplexArray = npt.NDArray[np.complex128]


@dataclass(frozen=True, eq=False)
class CommonTurn:
    """The one angle by which a second survey looks turned against the first.

    Attributes
    ----------
    angle : float
        Turn that explains most, positive the way the angles count, from -π to π, [rad]
    angle_uncertainty : float
        Standard uncertainty of that angle, [rad]
    remaining : numpy.ndarray
        Complex difference left at each station once the first survey is turned, [m]
    remaining_ratio : float
        Root mean square of what is left in units of its uncertainty: about 1 where the turn
        explains everything, [-]
    plain_ratio : float
        The same without a turn, [-]
    share_explained : float
        Share of the squared difference that the turn takes away, [-]
    """

    angle: float
    angle_uncertainty: float
    remaining: ComplexArray
    remaining_ratio: float
    plain_ratio: float
    share_explained: float


@dataclass(frozen=True)
class IndexTest:
    """What of a change belongs to the part and what to the seat.

    Attributes
    ----------
    part : complex
        Half of the difference, turning with the part; as mounted at zero, [m]
    seat : complex
        Half of the sum, staying with the shaft, [m]
    """

    part: complex
    seat: complex


@dataclass(frozen=True)
class Repeatability:
    """How well a stand repeats itself.

    Attributes
    ----------
    vector_uncertainty : float
        Standard uncertainty of either component of one survey's offset, [m]
    visible_change_tir : float
        Expanded uncertainty (k = 2) of a change as a total between two surveys; a limit finer than
        this cannot be judged here, [m]
    relative_uncertainty : float
        Standard uncertainty of both figures as a share of them, [-]
    pairs : int
        Pairs of offsets used, [-]
    """

    vector_uncertainty: float
    visible_change_tir: float
    relative_uncertainty: float
    pairs: int


@dataclass(frozen=True)
class Agreement:
    """How far two surveys of an untouched rotor lie apart.

    Attributes
    ----------
    greatest_tir : float
        Greatest change as a total, 2·|difference|, [m]
    station : int
        Where it is, counted from 0, [-]
    root_mean_square_tir : float
        Root mean square of the changes as totals, [m]
    """

    greatest_tir: float
    station: int
    root_mean_square_tir: float


def common_turn(
    *, before_vectors: npt.ArrayLike, after_vectors: npt.ArrayLike, uncertainties: npt.ArrayLike
) -> CommonTurn:
    r"""Turn of all stations together that best explains a second survey, and what it leaves.

    .. math:: \psi = \arg \sum_k w_k\,\bar v_k^{before}\,v_k^{after}, \qquad w_k = 1/u_k^2

    Parameters
    ----------
    before_vectors : array_like
        Complex offsets before at stations nobody touched, [m]
    after_vectors : array_like
        Complex offsets after at the same stations, [m]
    uncertainties : array_like
        Standard uncertainty of either component of after less before, [m]

    Returns
    -------
    turn : CommonTurn
        The angle, and how much of the difference it explains, [rad]

    Raises
    ------
    OutOfRangeError
        If fewer than two stations have both offsets, or an uncertainty is not positive.

    Notes
    -----
    Turn offsets as read, not offsets from the journal axis of two different set-ups, unless both
    were read on the same supports. Stations with NaN are left out, NaN in what remains.

    Examples
    --------
    Two stations, both a quarter turn further on:

    >>> turn = common_turn(
    ...     before_vectors=[10e-6, 4e-6j], after_vectors=[10e-6j, -4e-6],
    ...     uncertainties=[1e-6, 1e-6])
    >>> round(turn.angle, 4), round(turn.share_explained, 4)
    (1.5708, 1.0)

    References
    ----------
    .. [1] By hand: least squares in one angle; no publication.
    """
    before, after = _pairs(before_vectors, after_vectors)
    spreads = np.broadcast_to(np.asarray(uncertainties, dtype=np.float64), before.shape)
    known = np.isfinite(before) & np.isfinite(after)
    if np.count_nonzero(known) < 2:
        raise OutOfRangeError("after_vectors", int(np.count_nonzero(known)), "be two or more")
    if not (spreads[known] > 0.0).all():
        raise OutOfRangeError("uncertainties", uncertainties, "be more than 0 at every station")
    weights = 1.0 / spreads[known] ** 2
    angle = float(np.angle(np.sum(weights * before[known].conj() * after[known])))
    remaining = after - before * np.exp(1j * angle)
    numbers = 2 * np.count_nonzero(known)
    left = float(np.sum(weights * np.abs(remaining[known]) ** 2))
    plain = float(np.sum(weights * np.abs((after - before)[known]) ** 2))
    leverage = float(np.sum(weights * np.abs(before[known]) ** 2))
    return CommonTurn(
        angle=angle,
        angle_uncertainty=1.0 / math.sqrt(leverage) if leverage > 0.0 else math.inf,
        remaining=np.asarray(remaining, dtype=np.complex128),
        remaining_ratio=math.sqrt(left / (numbers - 1)),
        plain_ratio=math.sqrt(plain / numbers),
        share_explained=1.0 - left / plain if plain > 0.0 else 0.0,
    )


def index_test(*, change_at_zero: complex, change_at_half_turn: complex) -> IndexTest:
    r"""Parts of a change that turn with the component and that stay with the seat.

    .. math:: p = \tfrac12(\Delta_0 - \Delta_{180}), \qquad s = \tfrac12(\Delta_0 + \Delta_{180})

    Parameters
    ----------
    change_at_zero : complex
        Change with the part mounted at its first clock position, [m]
    change_at_half_turn : complex
        Change with the same part mounted half a turn further on, [m]

    Returns
    -------
    shares : IndexTest
        The part's share as mounted first, and the seat's, [m]

    Notes
    -----
    Supposes that both mounts were otherwise alike; the uncertainty of either share is that of one
    change divided by √2. The same holds for unbalance and for the runout of the part itself.

    Examples
    --------
    30 µm as it first went on, 10 µm the other way after the half turn: 20 µm turn with the part.

    >>> shares = index_test(change_at_zero=30e-6, change_at_half_turn=-10e-6)
    >>> round(shares.part.real * 1e6, 6), round(shares.seat.real * 1e6, 6)
    (20.0, 10.0)

    References
    ----------
    .. [1] ISO 21940-14, balance errors, index test of a mounted part, from memory.
    """
    return IndexTest(
        part=(change_at_zero - change_at_half_turn) / 2.0,
        seat=(change_at_zero + change_at_half_turn) / 2.0,
    )


def repeatability(*, first_vectors: npt.ArrayLike, second_vectors: npt.ArrayLike) -> Repeatability:
    r"""Repeatability of a stand from pairs of surveys between which nothing was touched.

    .. math:: u = \sqrt{\frac{1}{4n}\sum_k |v_k^{second} - v_k^{first}|^2}

    Parameters
    ----------
    first_vectors : array_like
        Complex offsets of the earlier surveys, any shape, [m]
    second_vectors : array_like
        Complex offsets of the later ones, the same shape, [m]

    Returns
    -------
    repeatability : Repeatability
        Uncertainty of one offset, and the change that can be seen, [m]

    Raises
    ------
    OutOfRangeError
        If there is no pair.

    Notes
    -----
    Give offsets from the journal axis without the journals, which are 0 by definition, or offsets
    as read with them; NaN is left out.

    Examples
    --------
    One pair that differs by 2 µm: 2/√4, and as a change 2·2·√2 of that.

    >>> found = repeatability(first_vectors=[3e-6], second_vectors=[5e-6])
    >>> round(found.vector_uncertainty * 1e6, 3), round(found.visible_change_tir * 1e6, 3)
    (1.0, 5.657)

    References
    ----------
    .. [1] JCGM 100:2008, Guide to the expression of uncertainty in measurement, from memory.
    """
    before, after = _pairs(first_vectors, second_vectors)
    differences = (after - before)[np.isfinite(before) & np.isfinite(after)]
    count = differences.size
    if count < 1:
        raise OutOfRangeError("second_vectors", count, "make at least one pair")
    uncertainty = math.sqrt(float(np.sum(np.abs(differences) ** 2)) / (4.0 * count))
    return Repeatability(
        vector_uncertainty=uncertainty,
        visible_change_tir=2.0 * 2.0 * math.sqrt(2.0) * uncertainty,
        relative_uncertainty=1.0 / math.sqrt(2.0 * 2.0 * count),
        pairs=count,
    )


def cold_agreement(*, first_vectors: npt.ArrayLike, second_vectors: npt.ArrayLike) -> Agreement:
    r"""How far two surveys of a cooling rotor lie apart.

    .. math:: T = 2 \max_k |v_k^{second} - v_k^{first}|

    Parameters
    ----------
    first_vectors : array_like
        Complex offsets from the journal axis at the first survey, [m]
    second_vectors : array_like
        Complex offsets from the journal axis at the second, [m]

    Returns
    -------
    agreement : Agreement
        Greatest and typical difference as totals, [m]

    Raises
    ------
    OutOfRangeError
        If no station has both offsets.

    Notes
    -----
    Agreement alone proves nothing on a thick shaft: see `still_to_come`.

    Examples
    --------
    >>> agreement = cold_agreement(first_vectors=[0, 4e-6], second_vectors=[0, 5e-6])
    >>> round(agreement.greatest_tir * 1e6, 6), agreement.station
    (2.0, 1)

    References
    ----------
    .. [1] By hand: greatest difference of vectors; no publication.
    """
    before, after = _pairs(first_vectors, second_vectors)
    totals = 2.0 * np.abs(after - before)
    known = np.isfinite(totals)
    if not known.any():
        raise OutOfRangeError("second_vectors", 0, "share a station with first_vectors")
    return Agreement(
        greatest_tir=float(totals[known].max()),
        station=int(np.argmax(np.where(known, totals, -1.0))),
        root_mean_square_tir=math.sqrt(float(np.mean(totals[known] ** 2))),
    )


def still_to_come(*, difference: float, elapsed: float, time_constant: float) -> float:
    r"""How far a cooling rotor may still be from cold when two readings differ by so much.

    .. math:: \frac{d}{e^{t/\tau} - 1}

    Parameters
    ----------
    difference : float
        Size of the difference of the two readings, :math:`d`, [m]
    elapsed : float
        Time between them, :math:`t`, [s]
    time_constant : float
        Time constant of the cooling, :math:`\tau`, [s]

    Returns
    -------
    remainder : float
        Change from the second reading to cold, if it decays with that time constant, [m]

    Raises
    ------
    OutOfRangeError
        If the difference is negative, or a time is not positive.

    Examples
    --------
    2 µm in the time in which half of it goes: as much again is still to come.

    >>> from math import log
    >>> round(still_to_come(difference=2e-6, elapsed=log(2), time_constant=1.0) * 1e6, 6)
    2.0

    References
    ----------
    .. [1] By hand from an exponential decay; no publication.
    """
    if difference < 0.0:
        raise OutOfRangeError("difference", difference, "be 0 or more")
    for name, time in (("elapsed", elapsed), ("time_constant", time_constant)):
        if not time > 0.0:
            raise OutOfRangeError(name, time, "be more than 0")
    return difference / math.expm1(elapsed / time_constant)


def _pairs(first: npt.ArrayLike, second: npt.ArrayLike) -> tuple[ComplexArray, ComplexArray]:
    before = np.asarray(first, dtype=np.complex128)
    after = np.asarray(second, dtype=np.complex128)
    if before.shape != after.shape:
        raise OutOfRangeError("second survey", after.shape, "have the stations of the first")
    return before, after
