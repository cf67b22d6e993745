"""The shape a bent shaft takes between its journals, what bends it, and what it unbalances."""

from collections.abc import Iterable

import numpy as np
import numpy.typing as npt

from models.engineering.errors import OutOfRangeError

__all__ = ["is_blind", "kink_shape", "side_to_side_bow", "unbalance_of_bow"]

FloatArray = npt.NDArray[np.float64]


def kink_shape(
    *,
    positions: npt.ArrayLike,
    kink_position: float,
    first_journal: float,
    second_journal: float,
) -> FloatArray:
    r"""Offset from the journal axis, for each radian of bend, of a shaft bent at one place.

    .. math:: h(z) = \ell(z) - \langle z - z_0 \rangle, \qquad
        \langle x \rangle = \max(x, 0)

    with ℓ the line through the two journals' own values of ⟨z − z₀⟩.

    Parameters
    ----------
    positions : array_like
        Axial positions wanted, also beyond the journals, [m]
    kink_position : float
        Where the shaft is bent, :math:`z_0`, also beyond the journals, [m]
    first_journal : float
        Axial position of one journal, [m]
    second_journal : float
        Axial position of the other, further along, [m]

    Returns
    -------
    shape : numpy.ndarray
        Offset for one radian: positive between the journals, negative on overhangs, [m/rad]

    Raises
    ------
    OutOfRangeError
        If the second journal does not lie beyond the first.

    Examples
    --------
    Bent in the middle of 2 m: half a metre for each radian there, a quarter half-way to it.

    >>> shape = kink_shape(
    ...     positions=[0.5, 1.0], kink_position=1.0, first_journal=0.0, second_journal=2.0)
    >>> [round(float(value), 6) for value in shape]
    [0.25, 0.5]

    References
    ----------
    .. [1] By hand: two straight lines that meet at the bend; no publication.
    """
    span = second_journal - first_journal
    if not span > 0.0:
        raise OutOfRangeError("second_journal", second_journal, "lie beyond first_journal")
    places = np.asarray(positions, dtype=np.float64)
    at_first = max(first_journal - kink_position, 0.0)
    at_second = max(second_journal - kink_position, 0.0)
    line = at_first + (at_second - at_first) * (places - first_journal) / span
    return np.asarray(line - np.maximum(places - kink_position, 0.0), dtype=np.float64)


def is_blind(*, position: float, stretches: Iterable[tuple[float, float]]) -> bool:
    r"""Whether a position lies in a stretch of shaft that no indicator can reach.

    .. math:: \exists\,i:\ a_i \le z \le b_i

    Parameters
    ----------
    position : float
        Axial position, [m]
    stretches : iterable of tuple
        Start and end of each covered stretch, in either order, [m]

    Returns
    -------
    blind : bool
        True inside a stretch or at its edge, [-]

    Examples
    --------
    >>> is_blind(position=0.45, stretches=[(0.1, 0.2), (0.4, 0.5)])
    True

    References
    ----------
    .. [1] Definition; no publication.
    """
    return any(min(edges) <= position <= max(edges) for edges in stretches)


def side_to_side_bow(
    *, temperature_difference: float, span: float, diameter: float, expansion: float
) -> float:
    r"""Bow of a shaft that is warmer on one side than on the other.

    .. math:: \delta = \frac{\alpha\,\Delta T\,L^2}{8 D}

    Parameters
    ----------
    temperature_difference : float
        Difference across the diameter, :math:`\Delta T`, [K]
    span : float
        Length between the journals, :math:`L`, [m]
    diameter : float
        Diameter of the shaft, :math:`D`, [m]
    expansion : float
        Coefficient of expansion, :math:`\alpha`, [1/K]

    Returns
    -------
    bow : float
        Offset of the middle towards the warm side; an indicator shows twice as much, [m]

    Raises
    ------
    OutOfRangeError
        If the diameter or the span is not positive.

    Notes
    -----
    For a difference that is alike along the whole span and even across the diameter.

    Examples
    --------
    1 K across 200 mm on 2 m, with 10 µm for each metre and kelvin: 10·4/(8·0.2) µm.

    >>> round(side_to_side_bow(
    ...     temperature_difference=1.0, span=2.0, diameter=0.2, expansion=10e-6) * 1e6, 6)
    25.0

    References
    ----------
    .. [1] By hand: curvature αΔT/D over a span; no publication.
    """
    for name, length in (("span", span), ("diameter", diameter)):
        if not length > 0.0:
            raise OutOfRangeError(name, length, "be more than 0")
    return expansion * temperature_difference * span**2 / (8.0 * diameter)


def unbalance_of_bow(
    *,
    masses: npt.ArrayLike,
    eccentricities: npt.ArrayLike,
    positions: npt.ArrayLike,
    plane_positions: tuple[float, float],
) -> tuple[complex, complex]:
    r"""Unbalance of masses that a bow carries off the axis, resolved into two planes.

    .. math:: U_1 = \sum_k m_k e_k \frac{z_2 - z_k}{z_2 - z_1}, \qquad
        U_2 = \sum_k m_k e_k \frac{z_k - z_1}{z_2 - z_1}

    Parameters
    ----------
    masses : array_like
        Mass of each part or length of shaft, [kg]
    eccentricities : array_like
        Complex offset of each from the journal axis, [m]
    positions : array_like
        Axial position of each mass, [m]
    plane_positions : tuple of float
        Axial positions of the two correction planes, [m]

    Returns
    -------
    unbalances : tuple of complex
        Unbalance in the first and in the second plane, [kg·m]

    Raises
    ------
    OutOfRangeError
        If the planes coincide, a mass is negative, or the rows differ in length.

    Notes
    -----
    Counts the bow alone: each part's own unbalance comes on top.

    Examples
    --------
    800 kg in the middle, 25 µm off: 10 000 g·mm in either plane.

    >>> first, second = unbalance_of_bow(
    ...     masses=[800.0], eccentricities=[25e-6], positions=[0.5], plane_positions=(0.0, 1.0))
    >>> round(first.real * 1e6), round(second.real * 1e6)
    (10000, 10000)

    References
    ----------
    .. [1] H. P. Bloch, F. K. Geitner, Machinery Component Maintenance and Repair, page 282:
       unbalance as weight times offset.
    """
    mass_row = np.asarray(masses, dtype=np.float64)
    offsets = np.asarray(eccentricities, dtype=np.complex128)
    places = np.asarray(positions, dtype=np.float64)
    first, second = plane_positions
    if not first != second:
        raise OutOfRangeError("plane_positions", plane_positions, "be two different places")
    if not mass_row.shape == offsets.shape == places.shape:
        raise OutOfRangeError("positions", places.shape, "be as many as masses and eccentricities")
    if (mass_row < 0.0).any():
        raise OutOfRangeError("masses", float(mass_row.min()), "be 0 or more")
    moments = mass_row * offsets
    to_second = (places - first) / (second - first)
    return complex(np.sum(moments * (1.0 - to_second))), complex(np.sum(moments * to_second))
