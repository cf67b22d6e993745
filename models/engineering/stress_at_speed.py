"""Stress in hub and shaft while they turn: what the pressure left makes, and what rotation adds."""

from dataclasses import dataclass

from models.engineering.disc_growth import annulus_bore_stress
from models.engineering.fit_stress import (
    SurfaceStress,
    hub_stresses,
    shaft_stresses,
    surface_stress,
)
from models.engineering.ranges import demand_not_negative, demand_positive

__all__ = ["ShaftAtSpeed", "hub_bore_stress_at_speed", "shaft_stress_at_speed"]


@dataclass(frozen=True)
class ShaftAtSpeed:
    """Stress in a turning shaft at its two extremes."""

    seat: SurfaceStress
    """Under the hub."""
    inside: SurfaceStress
    """At the bore of a hollow shaft, on the axis of a solid one."""

    @property
    def von_mises(self) -> float:
        """The greater of the two equivalent stresses, [Pa]."""
        return max(self.seat.von_mises, self.inside.von_mises)


def hub_bore_stress_at_speed(
    *,
    pressure: float,
    interface_diameter: float,
    hub_outer_diameter: float,
    spinning_outer_diameter: float,
    poisson: float,
    density: float,
    speed: float,
) -> SurfaceStress:
    r"""Find the stress at the bore of a turning hub.

    The stress of `hub_stresses` under the pressure left, and the hoop stress of
    `annulus_bore_stress`; rotation adds no radial stress at a bore:

    .. math:: \sigma_\theta = p\,\frac{D^2 + d^2}{D^2 - d^2}
        + \frac{\rho \omega^2}{16}\,[(3 + \nu) D_s^2 + (1 - \nu) d^2] \qquad \sigma_r = -p

    Parameters
    ----------
    pressure : float
        Contact pressure left at the speed, :math:`p`, [Pa]
    interface_diameter : float
        Diameter of the bore, :math:`d`, [m]
    hub_outer_diameter : float
        Outer diameter of the hub that grips, :math:`D`, [m]
    spinning_outer_diameter : float
        Outer diameter of the uniform disc that pulls at the bore, :math:`D_s`, [m]
    poisson : float
        Poisson's ratio, :math:`\nu`, [-]
    density : float
        Density, :math:`\rho`, [kg/m³]
    speed : float
        Speed of rotation, :math:`\omega`, [rad/s]

    Returns
    -------
    stress : SurfaceStress
        Stress at the bore, [Pa]

    Raises
    ------
    OutOfRangeError
        If the pressure or the speed is negative or the diameters do not nest.

    Notes
    -----
    A uniform-disc estimate. One material on a solid shaft of it, both uniform: what rotation adds
    is more than what the pressure loses, so that the stress at the bore grows with speed.

    Examples
    --------
    At rest it is the stress of the pressure alone, 90 MPa · 5/3:

    >>> hub_bore_stress_at_speed(
    ...     pressure=90e6, interface_diameter=0.1, hub_outer_diameter=0.2,
    ...     spinning_outer_diameter=0.2, poisson=0.3, density=7850.0, speed=0.0).hoop
    150000000.0

    References
    ----------
    .. [1] As for `hub_stresses` and `annulus_bore_stress`; superposition of elastic states.
    """
    pressed = hub_stresses(
        pressure=pressure,
        interface_diameter=interface_diameter,
        hub_outer_diameter=hub_outer_diameter,
    )
    spun = annulus_bore_stress(
        bore_diameter=interface_diameter,
        outer_diameter=spinning_outer_diameter,
        poisson=poisson,
        density=density,
        speed=speed,
    )
    return surface_stress(hoop=pressed.bore.hoop + spun, radial=pressed.bore.radial)


def shaft_stress_at_speed(
    *,
    pressure: float,
    interface_diameter: float,
    shaft_bore_diameter: float,
    poisson: float,
    density: float,
    speed: float,
) -> ShaftAtSpeed:
    r"""Find the stress in a turning shaft under the pressure left on its seat.

    To the stress of `shaft_stresses` rotation adds, at the seat and inside:

    .. math::

        \text{seat: } \frac{\rho \omega^2}{16}\,[(1 - \nu) d^2 + (3 + \nu) b^2] \qquad
        \text{bore: } \frac{\rho \omega^2}{16}\,[(3 + \nu) d^2 + (1 - \nu) b^2] \qquad
        \text{axis: } \frac{\rho \omega^2}{32}\,(3 + \nu) d^2

    around the shaft, on the axis of a solid one across it too.

    Parameters
    ----------
    pressure : float
        Contact pressure left at the speed, [Pa]
    interface_diameter : float
        Diameter of the seat, :math:`d`, [m]
    shaft_bore_diameter : float
        Bore of a hollow shaft, :math:`b`; 0 for a solid one, [m]
    poisson : float
        Poisson's ratio, :math:`\nu`, [-]
    density : float
        Density, :math:`\rho`, [kg/m³]
    speed : float
        Speed of rotation, :math:`\omega`, [rad/s]

    Returns
    -------
    stress : ShaftAtSpeed
        Stress at the seat and inside, [Pa]

    Raises
    ------
    OutOfRangeError
        If the pressure or the speed is negative, the density not positive, or the diameters do not
        nest.

    Notes
    -----
    Plane stress, elastic. Rotation pulls where the fit pushes, so a shaft is relieved by it.

    Examples
    --------
    At rest a solid shaft is pushed alike everywhere:

    >>> stress = shaft_stress_at_speed(
    ...     pressure=90e6, interface_diameter=0.1, shaft_bore_diameter=0.0, poisson=0.3,
    ...     density=7850.0, speed=0.0)
    >>> stress.seat.hoop, stress.inside.hoop
    (-90000000.0, -90000000.0)

    References
    ----------
    .. [1] S. P. Timoshenko, J. N. Goodier, Theory of Elasticity, 3rd ed., section 32, from memory;
       superposition of elastic states.
    """
    demand_positive("density", density)
    demand_not_negative("speed", speed)
    still = shaft_stresses(
        pressure=pressure,
        interface_diameter=interface_diameter,
        shaft_bore_diameter=shaft_bore_diameter,
    )
    force = density * speed**2 / 16.0
    joint2, bore2 = interface_diameter**2, shaft_bore_diameter**2
    at_seat = force * ((1.0 - poisson) * joint2 + (3.0 + poisson) * bore2)
    seat = surface_stress(hoop=still.seat.hoop + at_seat, radial=still.seat.radial)
    if still.bore is None:
        axis = force / 2.0 * (3.0 + poisson) * joint2 - pressure
        return ShaftAtSpeed(seat=seat, inside=surface_stress(hoop=axis, radial=axis))
    at_bore = force * ((3.0 + poisson) * joint2 + (1.0 - poisson) * bore2)
    return ShaftAtSpeed(
        seat=seat, inside=surface_stress(hoop=still.bore.hoop + at_bore, radial=0.0)
    )
