"""Which seat a bend belongs to."""

from collections.abc import Sequence
from typing import NamedTuple

from models.engineering.errors import OutOfRangeError

__all__ = ["NearestSeat", "nearest_seat"]


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
