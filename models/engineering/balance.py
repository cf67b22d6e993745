"""Unbalance as a vector: its force, where it comes from, and what takes it away.

A vector is complex, size times exp(jθ), in the rotor's own clock angle.
"""

import cmath
import math
from dataclasses import dataclass

import numpy as np
import numpy.typing as npt

from models.engineering.errors import OutOfRangeError
from models.engineering.ranges import demand_finite, demand_not_negative, demand_positive

__all__ = [
    "CorrectionMass",
    "SplitUnbalance",
    "TwoPlanes",
    "centrifugal_force",
    "clock_angle",
    "mass_to_add",
    "mass_to_remove",
    "split_between_places",
    "stage_contribution",
    "unbalance_of_bow",
    "unbalance_of_offset",
]

_SMALLEST_SINE = 1e-9


@dataclass(frozen=True)
class TwoPlanes:
    """One vector in each of two planes: unbalances, corrections or readings."""

    first: complex
    """Vector in the first plane, [kg·m] where it is an unbalance"""
    second: complex
    """Vector in the second plane, [kg·m] where it is an unbalance"""


@dataclass(frozen=True)
class CorrectionMass:
    """How much, and at which clock angle."""

    mass: float
    """Mass, [kg]"""
    angle: float
    """Clock angle, from 0 to less than 2π, [rad]"""


@dataclass(frozen=True)
class SplitUnbalance:
    """One vector made by two at the places that are free."""

    first: float
    """Size at the first place, [kg·m]"""
    second: float
    """Size at the second place, [kg·m]"""


def centrifugal_force(*, unbalance: complex, speed: float) -> float:
    r"""Size of the force that an unbalance exerts on a turning rotor.

    .. math:: F = |U|\, \omega^2

    Parameters
    ----------
    unbalance : complex
        Unbalance, :math:`U`, [kg·m]
    speed : float
        Speed, :math:`\omega`, [rad/s]

    Returns
    -------
    force : float
        Force, turning with the rotor, [N]

    Raises
    ------
    OutOfRangeError
        If an input is not finite, or the speed is negative.

    Examples
    --------
    1000 g·mm at 300 rad/s: 0.001·90 000.

    >>> centrifugal_force(unbalance=1e-3j, speed=300.0)
    90.0

    References
    ----------
    Mechanics, by definition.
    """
    demand_finite("unbalance", unbalance)
    demand_not_negative("speed", speed)
    return abs(unbalance) * speed**2


def unbalance_of_offset(*, mass: float, eccentricity: complex) -> complex:
    r"""Unbalance of a mass whose centre runs beside the axis.

    .. math:: U = m\, e

    Parameters
    ----------
    mass : float
        Mass, :math:`m`, [kg]
    eccentricity : complex
        Offset of its centre of gravity, half the total reading of a pure offset, :math:`e`, [m]

    Returns
    -------
    unbalance : complex
        Unbalance, [kg·m]

    Raises
    ------
    OutOfRangeError
        If the mass is negative or an input is not finite.

    Examples
    --------
    800 kg at 25 µm, a total reading of 50 µm: 20 000 g·mm.

    >>> abs(unbalance_of_offset(mass=800.0, eccentricity=25e-6)) * 1e6
    20000.0

    References
    ----------
    H. P. Bloch, F. K. Geitner, Machinery Component Maintenance and Repair, chapter 6, p. 282.
    """
    demand_not_negative("mass", mass)
    demand_finite("eccentricity", eccentricity)
    return mass * complex(eccentricity)


def unbalance_of_bow(
    *,
    masses: npt.ArrayLike,
    eccentricities: npt.ArrayLike,
    positions: npt.ArrayLike,
    first_plane: float,
    second_plane: float,
) -> TwoPlanes:
    r"""Unbalance that a bowed rotor shows in two planes, as a balancing machine would see it.

    .. math::

        U_1 = \sum m_k e_k \frac{z_2 - z_k}{z_2 - z_1} \qquad
        U_2 = \sum m_k e_k \frac{z_k - z_1}{z_2 - z_1}

    Parameters
    ----------
    masses : array_like
        Masses along the rotor, shape (n,), :math:`m_k`, [kg]
    eccentricities : array_like
        Offset of each from the journal axis, complex, shape (n,), :math:`e_k`, [m]
    positions : array_like
        Axial position of each, shape (n,), :math:`z_k`, [m]
    first_plane : float
        Axial position of one plane, :math:`z_1`, [m]
    second_plane : float
        Axial position of the other, beyond the first, :math:`z_2`, [m]

    Returns
    -------
    unbalance : TwoPlanes
        Unbalance in each plane, [kg·m]

    Raises
    ------
    OutOfRangeError
        If the three arrays differ in shape, a number is not finite, or the second plane does not
        lie beyond the first.

    Notes
    -----
    True while the rotor keeps its bow. Corrections in two planes take away what is seen here and
    leave the bow: at a speed that bends the rotor the two are not the same.

    Examples
    --------
    100 kg at 10 µm amid two planes: 500 g·mm in each.

    >>> seen = unbalance_of_bow(masses=[100.0], eccentricities=[10e-6], positions=[0.5],
    ...                         first_plane=0.0, second_plane=1.0)
    >>> abs(seen.first) * 1e6, abs(seen.second) * 1e6
    (500.0, 500.0)

    References
    ----------
    Statics, by hand.
    """
    heavy = np.asarray(masses, dtype=np.float64)
    offsets = np.asarray(eccentricities, dtype=np.complex128)
    places = np.asarray(positions, dtype=np.float64)
    if offsets.shape != heavy.shape:
        raise OutOfRangeError("eccentricities", offsets.shape, f"have the shape {heavy.shape}")
    if places.shape != heavy.shape:
        raise OutOfRangeError("positions", places.shape, f"have the shape {heavy.shape}")
    for name, numbers in (("masses", heavy), ("eccentricities", offsets), ("positions", places)):
        if not np.isfinite(numbers).all():
            raise OutOfRangeError(name, numbers.tolist(), "be finite throughout")
    demand_finite("first_plane", first_plane)
    demand_finite("second_plane", second_plane)
    if not second_plane > first_plane:
        raise OutOfRangeError("second_plane", second_plane, "lie beyond first_plane")
    share = (places - first_plane) / (second_plane - first_plane)
    unbalances = heavy * offsets
    return TwoPlanes(
        first=complex(np.sum(unbalances * (1.0 - share))),
        second=complex(np.sum(unbalances * share)),
    )


def stage_contribution(*, before: TwoPlanes, after: TwoPlanes) -> TwoPlanes:
    r"""Unbalance that the part just mounted brought.

    .. math:: \Delta U = U_\text{after} - U_\text{before}

    Parameters
    ----------
    before : TwoPlanes
        Unbalance as the last stage left it, [kg·m]
    after : TwoPlanes
        Unbalance with the part on, before anything is corrected, [kg·m]

    Returns
    -------
    contribution : TwoPlanes
        What the part brought in each plane, [kg·m]

    Raises
    ------
    OutOfRangeError
        If a vector is not finite.

    Notes
    -----
    Both must be read with one reference mark and in the same two planes. A bend of the shaft made
    by the mount is in it too: the runout change tells the two apart.

    Examples
    --------
    Equal sizes a quarter turn apart hide 1.41 times their size:

    >>> brought = stage_contribution(before=TwoPlanes(1e-4, 0.0), after=TwoPlanes(1e-4j, 0.0))
    >>> abs(brought.first) * 1e4
    1.414

    References
    ----------
    Vector difference, by definition.
    """
    for name, planes in (("before", before), ("after", after)):
        demand_finite(name, planes.first)
        demand_finite(name, planes.second)
    return TwoPlanes(first=after.first - before.first, second=after.second - before.second)


def clock_angle(*, vector: complex) -> float:
    r"""Clock angle of a vector, counted from the reference mark.

    .. math:: \theta = \arg v \bmod 2\pi

    Parameters
    ----------
    vector : complex
        Vector in the plane of rotation, of any unit, [-]

    Returns
    -------
    angle : float
        Angle from 0 to less than 2π, 0 for no vector, [rad]

    Raises
    ------
    OutOfRangeError
        If the vector is not finite.

    Examples
    --------
    >>> clock_angle(vector=-1.0), clock_angle(vector=-1j)
    (3.14159, 4.71239)

    References
    ----------
    Definition.
    """
    demand_finite("vector", vector)
    # Adding zero clears the sign of a zero, which would turn the phase of −0 by half a turn.
    angle = cmath.phase(complex(vector) + 0.0) % (2.0 * math.pi)
    # The remainder of a tiny negative phase comes out as 2π itself.
    return 0.0 if angle >= 2.0 * math.pi else angle


def mass_to_add(*, unbalance: complex, radius: float) -> CorrectionMass:
    r"""Mass that takes an unbalance away when it is added opposite to it.

    .. math:: m = |U| / r \qquad \theta = \arg U + \pi

    Parameters
    ----------
    unbalance : complex
        Unbalance to take away, :math:`U`, [kg·m]
    radius : float
        Radius at which the mass is added, :math:`r`, [m]

    Returns
    -------
    correction : CorrectionMass
        Mass and its clock angle, [kg, rad]

    Raises
    ------
    OutOfRangeError
        If the radius is not positive or the unbalance is not finite.

    Examples
    --------
    500 g·mm at 0° and a radius of 100 mm: 5 g at half a turn.

    >>> correction = mass_to_add(unbalance=500e-6, radius=0.1)
    >>> correction.mass * 1e3, correction.angle
    (5.0, 3.14159)

    References
    ----------
    Mechanics, by definition.
    """
    demand_finite("unbalance", unbalance)
    demand_positive("radius", radius)
    return CorrectionMass(
        mass=abs(unbalance) / radius, angle=clock_angle(vector=-complex(unbalance))
    )


def mass_to_remove(*, unbalance: complex, radius: float) -> CorrectionMass:
    r"""Mass that takes an unbalance away when it is ground or drilled off where it sits.

    .. math:: m = |U| / r \qquad \theta = \arg U

    Parameters
    ----------
    unbalance : complex
        Unbalance to take away, :math:`U`, [kg·m]
    radius : float
        Radius of the centre of gravity of what is taken off, :math:`r`, [m]

    Returns
    -------
    correction : CorrectionMass
        Mass and its clock angle, [kg, rad]

    Raises
    ------
    OutOfRangeError
        If the radius is not positive or the unbalance is not finite.

    Examples
    --------
    >>> correction = mass_to_remove(unbalance=500e-6, radius=0.1)
    >>> correction.mass * 1e3, correction.angle
    (5.0, 0.0)

    References
    ----------
    Mechanics, by definition.
    """
    demand_finite("unbalance", unbalance)
    demand_positive("radius", radius)
    return CorrectionMass(
        mass=abs(unbalance) / radius, angle=clock_angle(vector=complex(unbalance))
    )


def split_between_places(
    *, unbalance: complex, first_angle: float, second_angle: float
) -> SplitUnbalance:
    r"""Make one vector of unbalance from two at the places that are free.

    .. math::

        U_1 = U \frac{\sin(\theta_2 - \theta)}{\sin(\theta_2 - \theta_1)} \qquad
        U_2 = U \frac{\sin(\theta - \theta_1)}{\sin(\theta_2 - \theta_1)}

    Parameters
    ----------
    unbalance : complex
        Vector to be made, of size U at θ, [kg·m]
    first_angle : float
        Clock angle of the first free place, :math:`\theta_1`, [rad]
    second_angle : float
        Clock angle of the second, :math:`\theta_2`, [rad]

    Returns
    -------
    split : SplitUnbalance
        Size at each place, never negative; each is divided by its own radius, [kg·m]

    Raises
    ------
    OutOfRangeError
        If the places are the same or half a turn apart, or the vector does not point between them.

    Examples
    --------
    From 45° onto 0° and 90°: cos 45° at each.

    >>> from math import pi, sqrt
    >>> split = split_between_places(unbalance=1e-4 * (1 + 1j) / sqrt(2),
    ...                              first_angle=0.0, second_angle=pi / 2)
    >>> split.first * 1e4, split.second * 1e4
    (0.7071, 0.7071)

    References
    ----------
    Law of sines, by hand.
    """
    demand_finite("unbalance", unbalance)
    demand_finite("first_angle", first_angle)
    demand_finite("second_angle", second_angle)
    sine = math.sin(second_angle - first_angle)
    if abs(sine) < _SMALLEST_SINE:
        raise OutOfRangeError(
            "second_angle", second_angle, "differ from first_angle by other than half turns"
        )
    size, angle = cmath.polar(complex(unbalance))
    first = size * math.sin(second_angle - angle) / sine
    second = size * math.sin(angle - first_angle) / sine
    if min(first, second) < -_SMALLEST_SINE * size:
        raise OutOfRangeError("unbalance", unbalance, "point between the two places")
    return SplitUnbalance(first=max(first, 0.0), second=max(second, 0.0))
