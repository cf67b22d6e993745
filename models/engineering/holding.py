"""What a shrunk fit holds by friction, and what it has to hold."""

import itertools
import math
from collections.abc import Sequence
from dataclasses import dataclass

from models.engineering.ranges import demand_finite, demand_not_negative, demand_positive

__all__ = [
    "FRICTIONS",
    "Friction",
    "combined_holding_factor",
    "cumulated_torque",
    "holding_force",
    "holding_torque",
    "torque_from_power",
]


@dataclass(frozen=True)
class Friction:
    """A coefficient of friction with what it holds for and where it was found."""

    condition: str
    """How the joint was made and how clean it was."""
    coefficient: float
    """Coefficient of friction against slip [-]."""
    source: str
    """Where the number was found."""


_DIN = "DIN 7190, from memory"

FRICTIONS: tuple[Friction, ...] = (
    Friction("steel on grey iron, mounted with oil", 0.10, _DIN),
    Friction("steel on steel, mounted with oil pressure", 0.12, _DIN),
    Friction("steel on steel, hub heated, not degreased", 0.14, _DIN),
    Friction("steel on grey iron, degreased", 0.16, _DIN),
    Friction("steel on steel, mounted with oil pressure, degreased, glycerine", 0.18, _DIN),
    Friction("steel on steel, hub heated to 300 °C at most, degreased", 0.20, _DIN),
)
"""Coefficients of friction for shrunk fits, lowest first."""


def holding_force(
    *, pressure: float, interface_diameter: float, contact_length: float, friction: float
) -> float:
    r"""Tell the axial force that friction in a fit can hold.

    .. math:: F = \mu\,\pi d L\,p

    Parameters
    ----------
    pressure : float
        Mean contact pressure, :math:`p`, [Pa]
    interface_diameter : float
        Diameter of the joint, :math:`d`, [m]
    contact_length : float
        Length over which the parts touch, :math:`L`, [m]
    friction : float
        Coefficient of friction, :math:`\mu`, [-]

    Returns
    -------
    force : float
        Axial force at the point of slipping, [N]

    Raises
    ------
    OutOfRangeError
        If a number is negative, or diameter or length is zero.

    Notes
    -----
    For pulling a part off, take a high coefficient; for holding it, a low one. Both are uncertain
    by half and more.

    Examples
    --------
    100 MPa on a seat of 100 mm by 100 mm with 0.1: 0.1 · π · 0.01 m² · 100 MPa.

    >>> round(holding_force(
    ...     pressure=100e6, interface_diameter=0.1, contact_length=0.1, friction=0.1))
    314159

    References
    ----------
    .. [1] R. G. Budynas, J. K. Nisbett, Shigley's Mechanical Engineering Design, 9th ed., section
       7-8.
    """
    demand_not_negative("pressure", pressure)
    demand_positive("interface_diameter", interface_diameter)
    demand_positive("contact_length", contact_length)
    demand_not_negative("friction", friction)
    return friction * math.pi * interface_diameter * contact_length * pressure


def holding_torque(
    *, pressure: float, interface_diameter: float, contact_length: float, friction: float
) -> float:
    r"""Tell the torque that friction in a fit can hold.

    .. math:: T = \frac{\mu\,\pi d^2 L\,p}{2}

    Parameters
    ----------
    pressure : float
        Mean contact pressure, :math:`p`, [Pa]
    interface_diameter : float
        Diameter of the joint, :math:`d`, [m]
    contact_length : float
        Length over which the parts touch, :math:`L`, [m]
    friction : float
        Coefficient of friction, :math:`\mu`, [-]

    Returns
    -------
    torque : float
        Torque at the point of slipping, [N·m]

    Raises
    ------
    OutOfRangeError
        If a number is negative, or diameter or length is zero.

    Notes
    -----
    Friction is no safety factor for a keyed part: the key carries first.

    Examples
    --------
    A force of 314159 N at a radius of 50 mm:

    >>> round(holding_torque(
    ...     pressure=100e6, interface_diameter=0.1, contact_length=0.1, friction=0.1))
    15708

    References
    ----------
    .. [1] R. G. Budynas, J. K. Nisbett, Shigley's Mechanical Engineering Design, 9th ed., equation
       7-49, number from memory.
    """
    force = holding_force(
        pressure=pressure,
        interface_diameter=interface_diameter,
        contact_length=contact_length,
        friction=friction,
    )
    return force * interface_diameter / 2.0


def combined_holding_factor(
    *, holding_force: float, torque: float, thrust: float, interface_diameter: float
) -> float:
    r"""Compare what friction can hold with torque and thrust together.

    Friction has one strength and turns against the resultant of both:

    .. math:: S = \frac{F_\mu}{\sqrt{F^2 + (2T/d)^2}}

    Parameters
    ----------
    holding_force : float
        Force at the point of slipping, :math:`F_\mu`, [N]
    torque : float
        Torque that the part must carry, :math:`T`, [N·m]
    thrust : float
        Axial force on the part, :math:`F`, [N]
    interface_diameter : float
        Diameter of the joint, :math:`d`, [m]

    Returns
    -------
    factor : float
        Safety factor against slip; infinite where there is nothing to hold, [-]

    Raises
    ------
    OutOfRangeError
        If the holding force is negative, the diameter not positive or a load not finite.

    Examples
    --------
    5 N at hand against 3 N of thrust and 4 N at the circumference:

    >>> combined_holding_factor(
    ...     holding_force=5.0, torque=2.0, thrust=3.0, interface_diameter=1.0)
    1.0

    References
    ----------
    Vector sum of forces at the surface; by hand.
    """
    demand_not_negative("holding_force", holding_force)
    demand_positive("interface_diameter", interface_diameter)
    demand_finite("torque", torque)
    demand_finite("thrust", thrust)
    demand = math.hypot(thrust, 2.0 * torque / interface_diameter)
    return holding_force / demand if demand > 0.0 else math.inf


def torque_from_power(*, power: float, speed: float) -> float:
    r"""Tell the torque that carries a power at a speed.

    .. math:: T = \frac{P}{\omega}

    Parameters
    ----------
    power : float
        Power, negative where the part gives instead of taking, :math:`P`, [W]
    speed : float
        Speed of rotation, :math:`\omega`, [rad/s]

    Returns
    -------
    torque : float
        Torque, [N·m]

    Raises
    ------
    OutOfRangeError
        If the speed is not positive or the power not finite.

    Examples
    --------
    >>> torque_from_power(power=1.0e6, speed=1000.0)
    1000.0

    References
    ----------
    Definition of power.
    """
    demand_finite("power", power)
    demand_positive("speed", speed)
    return power / speed


def cumulated_torque(*, torques: Sequence[float]) -> tuple[float, ...]:
    r"""Add the torques of the parts from the free end towards the coupling.

    .. math:: T_k^{shaft} = \sum_{i \le k} T_i

    Parameters
    ----------
    torques : sequence of float
        Torque of each part, in order from the free end to the coupling, :math:`T_i`, [N·m]

    Returns
    -------
    carried : tuple of float
        Torque in the shaft on the coupling side of each part, [N·m]

    Raises
    ------
    OutOfRangeError
        If one is not finite.

    Examples
    --------
    Three wheels of 100 N·m; the coupling hub, last, carries what they all need:

    >>> cumulated_torque(torques=[100.0, 100.0, 100.0, 0.0])
    (100.0, 200.0, 300.0, 300.0)

    References
    ----------
    Balance of moments; by hand.
    """
    for torque in torques:
        demand_finite("torques", torque)
    return tuple(itertools.accumulate(torques))
