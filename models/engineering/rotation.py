"""A shrunk fit at speed: what rotation takes from it, and the speed at which it opens.

Hub and shaft are taken as uniform discs. A real impeller's blades, cover and taper change the
growth of its bore, so the designer's figure goes before these; `growth_at_speed` carries it to
another speed and `release_speed_from_growth` to the speed of release.
"""

import math
from dataclasses import dataclass

from models.engineering.disc_growth import annulus_bore_growth, shaft_surface_growth
from models.engineering.fits import contact_pressure, demand_nesting
from models.engineering.ranges import demand_finite, demand_not_negative, demand_positive

__all__ = [
    "Joint",
    "growth_at_speed",
    "interference_at_speed",
    "pressure_at_speed",
    "release_speed",
    "release_speed_from_growth",
]


@dataclass(frozen=True)
class Joint:
    """A hub on a shaft, with all that decides how they grow."""

    interference: float
    """Interference on diameter at rest, at the temperatures of interest [m]."""
    interface_diameter: float
    """Nominal diameter of the joint [m]."""
    hub_outer_diameter: float
    """Outer diameter of the hub, taken as a uniform disc [m]."""
    shaft_bore_diameter: float
    """Bore of a hollow shaft; 0 for a solid one [m]."""
    hub_modulus: float
    """Young's modulus of the hub [Pa]."""
    shaft_modulus: float
    """Young's modulus of the shaft [Pa]."""
    hub_poisson: float
    """Poisson's ratio of the hub [-]."""
    shaft_poisson: float
    """Poisson's ratio of the shaft [-]."""
    hub_density: float
    """Density of the hub [kg/m³]."""
    shaft_density: float
    """Density of the shaft [kg/m³]."""


def interference_at_speed(*, joint: Joint, speed: float) -> float:
    r"""Find the interference that free hub and free shaft would have at a speed.

    .. math:: \Delta_\omega = \Delta - \Delta d_{bore} + \Delta d_{shaft}

    Parameters
    ----------
    joint : Joint
        Hub and shaft, [m]
    speed : float
        Speed of rotation, :math:`\omega`, [rad/s]

    Returns
    -------
    interference : float
        Interference left on diameter, negative where the fit has opened, [m]

    Raises
    ------
    OutOfRangeError
        If the diameters do not nest or a number cannot be what it is called.

    Notes
    -----
    A uniform-disc estimate. What matters is the maximum continuous speed and the trip speed.

    Examples
    --------
    Steel disc of 500 mm on 150 mm at 8000 rpm: the bore grows by 212 µm, the shaft by 4 µm, and of
    225 µm only 17 µm are left:

    >>> joint = Joint(
    ...     interference=225e-6, interface_diameter=0.150, hub_outer_diameter=0.500,
    ...     shaft_bore_diameter=0.0, hub_modulus=205e9, shaft_modulus=205e9, hub_poisson=0.3,
    ...     shaft_poisson=0.3, hub_density=7850.0, shaft_density=7850.0)
    >>> round(1e6 * interference_at_speed(joint=joint, speed=8000 * math.pi / 30))
    17

    References
    ----------
    .. [1] As for `annulus_bore_growth` and `shaft_surface_growth`.
    """
    demand_finite("interference", joint.interference)
    demand_not_negative("speed", speed)
    return joint.interference - _loss_per_speed_squared(joint) * speed**2


def pressure_at_speed(*, joint: Joint, speed: float) -> float:
    r"""Find the contact pressure left at a speed.

    The pressure of `contact_pressure` under the interference left:

    .. math:: p(\omega) = p(\Delta_\omega)

    Parameters
    ----------
    joint : Joint
        Hub and shaft, [m]
    speed : float
        Speed of rotation, :math:`\omega`, [rad/s]

    Returns
    -------
    pressure : float
        Mean contact pressure; 0 where the fit has opened, [Pa]

    Raises
    ------
    OutOfRangeError
        If the diameters do not nest or a number cannot be what it is called.

    Notes
    -----
    Falls with the square of the speed: at 70.7 % of the release speed half of it is left. A
    uniform-disc estimate.

    Examples
    --------
    At rest it is the pressure of the fit, E e/2 · (1 − ¼):

    >>> joint = Joint(
    ...     interference=100e-6, interface_diameter=0.100, hub_outer_diameter=0.200,
    ...     shaft_bore_diameter=0.0, hub_modulus=200e9, shaft_modulus=200e9, hub_poisson=0.3,
    ...     shaft_poisson=0.3, hub_density=7850.0, shaft_density=7850.0)
    >>> pressure_at_speed(joint=joint, speed=0.0)
    75000000.0

    References
    ----------
    .. [1] As for `contact_pressure` and `annulus_bore_growth`; superposition of elastic states.
    """
    return contact_pressure(
        interference=interference_at_speed(joint=joint, speed=speed),
        interface_diameter=joint.interface_diameter,
        hub_outer_diameter=joint.hub_outer_diameter,
        shaft_bore_diameter=joint.shaft_bore_diameter,
        hub_modulus=joint.hub_modulus,
        shaft_modulus=joint.shaft_modulus,
        hub_poisson=joint.hub_poisson,
        shaft_poisson=joint.shaft_poisson,
    )


def release_speed(*, joint: Joint) -> float:
    r"""Find the speed at which a fit opens, both parts taken as uniform discs.

    With :math:`\lambda` the interference lost per speed squared:

    .. math:: \omega_r = \sqrt{\Delta / \lambda}

    Parameters
    ----------
    joint : Joint
        Hub and shaft, [m]

    Returns
    -------
    speed : float
        Release speed; 0 for a fit that does not grip at rest, infinite for one that tightens with
        speed, [rad/s]

    Raises
    ------
    OutOfRangeError
        If the diameters do not nest or a number cannot be what it is called.

    Notes
    -----
    For one material and a solid shaft the tip speed at release depends on the relative interference
    alone, √(4 E e/((3 + ν) ρ)): 178 m/s for steel at one in a thousand, whatever the disc. An
    estimate, not judged.

    Examples
    --------
    >>> joint = Joint(
    ...     interference=150e-6, interface_diameter=0.150, hub_outer_diameter=0.500,
    ...     shaft_bore_diameter=0.0, hub_modulus=205e9, shaft_modulus=205e9, hub_poisson=0.3,
    ...     shaft_poisson=0.3, hub_density=7850.0, shaft_density=7850.0)
    >>> round(release_speed(joint=joint) * 0.250)
    178

    References
    ----------
    .. [1] As for `annulus_bore_growth` and `shaft_surface_growth`.
    """
    demand_finite("interference", joint.interference)
    loss = _loss_per_speed_squared(joint)
    if joint.interference <= 0.0:
        return 0.0
    return math.sqrt(joint.interference / loss) if loss > 0.0 else math.inf


def growth_at_speed(*, growth: float, growth_speed: float, speed: float) -> float:
    r"""Carry the designer's growth figure from its speed to another.

    .. math:: g(\omega) = g_0\,(\omega / \omega_0)^2

    Parameters
    ----------
    growth : float
        Interference lost on diameter by rotation, as the designer gives it, :math:`g_0`, [m]
    growth_speed : float
        Speed for which it is given, :math:`\omega_0`, [rad/s]
    speed : float
        Speed asked for, :math:`\omega`, [rad/s]

    Returns
    -------
    growth : float
        Interference lost on diameter at that speed, [m]

    Raises
    ------
    OutOfRangeError
        If the growth is not finite, its speed not positive or the speed negative.

    Notes
    -----
    Holds while the part stays elastic and its own growth does not change its shape. An impeller's
    eye and back grow differently: each land takes its own figure.

    Examples
    --------
    >>> growth_at_speed(growth=100e-6, growth_speed=1000.0, speed=2000.0)
    0.0004

    References
    ----------
    Centrifugal load goes with the square of the speed; by hand.
    """
    demand_finite("growth", growth)
    demand_positive("growth_speed", growth_speed)
    demand_not_negative("speed", speed)
    return growth * (speed / growth_speed) ** 2


def release_speed_from_growth(*, interference: float, growth: float, growth_speed: float) -> float:
    r"""Find the speed at which a fit opens, from the designer's growth figure.

    .. math:: \omega_r = \omega_0 \sqrt{\Delta / g_0}

    Parameters
    ----------
    interference : float
        Interference on diameter at rest, :math:`\Delta`, [m]
    growth : float
        Interference lost on diameter at the designer's speed, :math:`g_0`, [m]
    growth_speed : float
        That speed, :math:`\omega_0`, [rad/s]

    Returns
    -------
    speed : float
        Release speed; 0 for a fit that does not grip at rest, [rad/s]

    Raises
    ------
    OutOfRangeError
        If growth or its speed is not positive, or the interference not finite.

    Notes
    -----
    As for `growth_at_speed`.

    Examples
    --------
    Four times the growth at twice the speed:

    >>> release_speed_from_growth(interference=400e-6, growth=100e-6, growth_speed=1000.0)
    2000.0

    References
    ----------
    Centrifugal load goes with the square of the speed; by hand.
    """
    demand_finite("interference", interference)
    demand_positive("growth", growth)
    demand_positive("growth_speed", growth_speed)
    return growth_speed * math.sqrt(max(interference, 0.0) / growth)


def _loss_per_speed_squared(joint: Joint) -> float:
    demand_nesting(
        shaft_bore_diameter=joint.shaft_bore_diameter,
        interface_diameter=joint.interface_diameter,
        hub_outer_diameter=joint.hub_outer_diameter,
    )
    bore = annulus_bore_growth(
        bore_diameter=joint.interface_diameter,
        outer_diameter=joint.hub_outer_diameter,
        modulus=joint.hub_modulus,
        poisson=joint.hub_poisson,
        density=joint.hub_density,
        speed=1.0,
    )
    shaft = shaft_surface_growth(
        outer_diameter=joint.interface_diameter,
        bore_diameter=joint.shaft_bore_diameter,
        modulus=joint.shaft_modulus,
        poisson=joint.shaft_poisson,
        density=joint.shaft_density,
        speed=1.0,
    )
    return bore - shaft
