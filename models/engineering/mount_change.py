"""What moved between two surveys of one rotor, station by station, in its own journal axis."""

import math
from collections.abc import Sequence
from dataclasses import dataclass
from typing import NamedTuple

import numpy as np
import numpy.typing as npt

from models.engineering.datum import datum_uncertainty, journal_datum
from models.engineering.errors import OutOfRangeError

__all__ = [
    "ChangeBounds",
    "ChangeOfMount",
    "change_at_stations",
    "change_bounds",
    "drift",
    "vector_change",
]

FloatArray = npt.NDArray[np.float64]
ComplexArray = npt.NDArray[np.complex128]


class ChangeBounds(NamedTuple):
    """Least and greatest change that two totals without angles allow.

    Attributes
    ----------
    least : float
        Change if both high spots lie at one angle, [m]
    greatest : float
        Change if they lie opposite each other, [m]
    """

    least: float
    greatest: float


@dataclass(frozen=True, eq=False)
class ChangeOfMount:
    """Change at every station, measured from the journal axis.

    Attributes
    ----------
    changes : numpy.ndarray
        Complex change of offset, 0 at the journals, NaN where either survey lacks the station, [m]
    tir : numpy.ndarray
        Change as a total, 2·|change|, [m]
    angles : numpy.ndarray
        Clock angle towards which the centre moved, from 0 to less than 2π, [rad]
    tir_uncertainties : numpy.ndarray
        Standard uncertainty of that total, [m]
    plain_tir_changes : numpy.ndarray
        Total after less total before, both as read, without angles or axis, [m]
    reading_uncertainties : numpy.ndarray
        Standard uncertainty of either component of after less before, before the journal axis is
        taken away; independent from station to station, as a fit of the bow needs it, [m]
    """

    changes: ComplexArray
    tir: FloatArray
    angles: FloatArray
    tir_uncertainties: FloatArray
    plain_tir_changes: FloatArray
    reading_uncertainties: FloatArray


def vector_change(*, before: complex, after: complex) -> complex:
    r"""Change of one offset, as a vector.

    .. math:: \Delta = v_{after} - v_{before}

    Parameters
    ----------
    before : complex
        Offset before the mount, [m]
    after : complex
        Offset after the mount, [m]

    Returns
    -------
    change : complex
        Vector from the first to the second; as a total it counts 2·|change|, [m]

    Examples
    --------
    The same 10 µm a quarter turn further on: 28 µm as a total, though both totals are 20 µm.

    >>> change = vector_change(before=10e-6, after=10e-6j)
    >>> round(2 * abs(change) * 1e6, 1)
    28.3

    References
    ----------
    .. [1] By hand: difference of two vectors; no publication.
    """
    return after - before


def change_bounds(*, tir_before: float, tir_after: float) -> ChangeBounds:
    r"""Least and greatest change that two totals allow when their angles are not known.

    .. math:: |T_a - T_b| \le 2|\Delta| \le T_a + T_b

    Parameters
    ----------
    tir_before : float
        Total before the mount, [m]
    tir_after : float
        Total after the mount, [m]

    Returns
    -------
    bounds : ChangeBounds
        Between what the change as a total lies, [m]

    Raises
    ------
    OutOfRangeError
        If a total is negative.

    Notes
    -----
    Holds for totals of a pure offset; out-of-roundness widens what the readings can mean.

    Examples
    --------
    20 µm before and 24 µm after can hide anything from 4 µm to 44 µm:

    >>> bounds = change_bounds(tir_before=20e-6, tir_after=24e-6)
    >>> round(bounds.least * 1e6, 6), round(bounds.greatest * 1e6, 6)
    (4.0, 44.0)

    References
    ----------
    .. [1] By hand: triangle inequality; no publication.
    """
    for name, total in (("tir_before", tir_before), ("tir_after", tir_after)):
        if total < 0.0:
            raise OutOfRangeError(name, total, "be 0 or more")
    return ChangeBounds(abs(tir_after - tir_before), tir_after + tir_before)


def change_at_stations(
    *,
    positions: npt.ArrayLike,
    before_vectors: npt.ArrayLike,
    after_vectors: npt.ArrayLike,
    before_uncertainties: npt.ArrayLike,
    after_uncertainties: npt.ArrayLike,
    first_journal: int,
    second_journal: int,
) -> ChangeOfMount:
    r"""Change of a mount at every station, as a vector in the journal axis and as a total.

    .. math:: \Delta_k = c_k^{after} - c_k^{before}, \qquad u(2|\Delta_k|) = 2\,u(\Delta_k)

    Parameters
    ----------
    positions : array_like
        Axial positions of the stations, [m]
    before_vectors : array_like
        Complex offsets before, as read, NaN where not read, [m]
    after_vectors : array_like
        Complex offsets after, as read, NaN where not read, [m]
    before_uncertainties : array_like
        Standard uncertainty of either component of each offset before, [m]
    after_uncertainties : array_like
        Standard uncertainty of either component of each offset after, [m]
    first_journal : int
        Which station is one journal, counted from 0, [-]
    second_journal : int
        Which station is the other, counted from 0, [-]

    Returns
    -------
    change : ChangeOfMount
        Vector, total, angle and uncertainty at each station, [m]

    Raises
    ------
    OutOfRangeError
        If the rows differ in length, or the journals are not two of the stations.

    Notes
    -----
    The uncertainty is that along the change. Where the true change is smaller than its uncertainty
    the total found is too large on average, never too small: noise has a length too.

    Examples
    --------
    A middle station whose high spot went half round: 10 µm before, 12 µm opposite after.

    >>> change = change_at_stations(
    ...     positions=[0.0, 0.5, 1.0], before_vectors=[0, 10e-6, 0], after_vectors=[0, -12e-6, 0],
    ...     before_uncertainties=[0, 1e-6, 0], after_uncertainties=[0, 1e-6, 0],
    ...     first_journal=0, second_journal=2)
    >>> [round(float(row[1]) * 1e6, 2) for row in (
    ...     change.tir, change.plain_tir_changes, change.tir_uncertainties)]
    [44.0, 4.0, 2.83]

    References
    ----------
    .. [1] JCGM 100:2008, Guide to the expression of uncertainty in measurement, from memory.
    """
    before = np.asarray(before_vectors, dtype=np.complex128)
    after = np.asarray(after_vectors, dtype=np.complex128)
    if before.shape != after.shape:
        raise OutOfRangeError("after_vectors", after.shape, "be as many as before_vectors")
    spreads = np.hypot(
        np.asarray(before_uncertainties, dtype=np.float64),
        np.asarray(after_uncertainties, dtype=np.float64),
    )
    changes = journal_datum(
        positions=positions,
        vectors=after - before,
        first_journal=first_journal,
        second_journal=second_journal,
    )
    in_the_axis = datum_uncertainty(
        positions=positions,
        uncertainties=spreads,
        first_journal=first_journal,
        second_journal=second_journal,
    )
    return ChangeOfMount(
        changes=changes,
        tir=2.0 * np.abs(changes),
        angles=np.angle(changes) % (2.0 * math.pi),
        tir_uncertainties=2.0 * in_the_axis,
        plain_tir_changes=2.0 * (np.abs(after) - np.abs(before)),
        reading_uncertainties=spreads,
    )


def drift(
    *,
    positions: npt.ArrayLike,
    surveys: Sequence[npt.ArrayLike],
    uncertainties: Sequence[npt.ArrayLike],
    first_journal: int,
    second_journal: int,
) -> tuple[ChangeOfMount, ...]:
    r"""Change of each survey against the first, so that small changes cannot add up unseen.

    .. math:: \Delta_{ik} = c_{ik} - c_{0k}

    Parameters
    ----------
    positions : array_like
        Axial positions of the stations, [m]
    surveys : sequence of array_like
        Complex offsets as read: the bare shaft first, then one survey for each accepted mount, [m]
    uncertainties : sequence of array_like
        Standard uncertainty of either component, for each of the surveys, [m]
    first_journal : int
        Which station is one journal, counted from 0, [-]
    second_journal : int
        Which station is the other, counted from 0, [-]

    Returns
    -------
    changes : tuple of ChangeOfMount
        One for each survey after the first, [m]

    Raises
    ------
    OutOfRangeError
        If there is no survey of the bare shaft, or uncertainties are missing.

    Examples
    --------
    Two mounts that move the middle by 3 µm each way the same: 6 µm and 12 µm as totals.

    >>> moved = drift(
    ...     positions=[0.0, 0.5, 1.0], surveys=[[0, 0, 0], [0, 3e-6, 0], [0, 6e-6, 0]],
    ...     uncertainties=[[0, 0, 0]] * 3, first_journal=0, second_journal=2)
    >>> [round(float(change.tir[1]) * 1e6, 6) for change in moved]
    [6.0, 12.0]

    References
    ----------
    .. [1] By hand: difference of vectors; no publication.
    """
    if len(surveys) < 1:
        raise OutOfRangeError("surveys", len(surveys), "begin with the bare shaft")
    if len(uncertainties) != len(surveys):
        raise OutOfRangeError("uncertainties", len(uncertainties), "be one row for each survey")
    return tuple(
        change_at_stations(
            positions=positions,
            before_vectors=surveys[0],
            after_vectors=survey,
            before_uncertainties=uncertainties[0],
            after_uncertainties=spreads,
            first_journal=first_journal,
            second_journal=second_journal,
        )
        for survey, spreads in zip(surveys[1:], uncertainties[1:], strict=True)
    )
