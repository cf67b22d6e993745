"""Stress in a hub and a shaft under the pressure of their fit, and its margin against yield."""

import math
from dataclasses import dataclass

from models.engineering.errors import OutOfRangeError
from models.engineering.ranges import demand_finite, demand_not_negative, demand_positive

__all__ = [
    "HubStresses",
    "ShaftStresses",
    "SurfaceStress",
    "hub_stresses",
    "shaft_stresses",
    "surface_stress",
    "yield_margin",
]


@dataclass(frozen=True)
class SurfaceStress:
    """Stress at a cylindrical surface, none along the axis; tension is positive."""

    hoop: float
    """Around the surface [Pa]."""
    radial: float
    """Across the surface [Pa]."""
    von_mises: float
    """Equivalent stress of distortion energy [Pa]."""
    tresca: float
    """Equivalent stress of greatest shear, twice the shear [Pa]."""


@dataclass(frozen=True)
class HubStresses:
    """Stress in a hub at its two surfaces."""

    bore: SurfaceStress
    """At the bore, where a hub yields first."""
    outside: SurfaceStress
    """At the outer diameter."""


@dataclass(frozen=True)
class ShaftStresses:
    """Stress in a shaft at its two surfaces."""

    seat: SurfaceStress
    """Under the hub; throughout, in a solid shaft."""
    bore: SurfaceStress | None
    """At the bore of a hollow shaft, where it yields first; None in a solid one."""


def surface_stress(*, hoop: float, radial: float) -> SurfaceStress:
    r"""Add the two equivalent stresses to hoop and radial stress.

    With no stress along the axis:

    .. math::

        \sigma_v = \sqrt{\sigma_\theta^2 + \sigma_r^2 - \sigma_\theta \sigma_r} \qquad
        \sigma_t = \max(|\sigma_\theta - \sigma_r|, |\sigma_\theta|, |\sigma_r|)

    Parameters
    ----------
    hoop : float
        Hoop stress, :math:`\sigma_\theta`, [Pa]
    radial : float
        Radial stress, :math:`\sigma_r`, [Pa]

    Returns
    -------
    stress : SurfaceStress
        All four, [Pa]

    Raises
    ------
    OutOfRangeError
        If one is not finite.

    Examples
    --------
    Equal pressure from all sides in the plane still shears across the axis:

    >>> stress = surface_stress(hoop=-100e6, radial=-100e6)
    >>> stress.von_mises, stress.tresca
    (100000000.0, 100000000.0)

    References
    ----------
    .. [1] R. G. Budynas, J. K. Nisbett, Shigley's Mechanical Engineering Design, 9th ed., sections
       5-4 and 5-5, from memory.
    """
    demand_finite("hoop", hoop)
    demand_finite("radial", radial)
    return SurfaceStress(
        hoop=hoop,
        radial=radial,
        von_mises=math.sqrt(hoop**2 + radial**2 - hoop * radial),
        tresca=max(abs(hoop - radial), abs(hoop), abs(radial)),
    )


def hub_stresses(
    *, pressure: float, interface_diameter: float, hub_outer_diameter: float
) -> HubStresses:
    r"""Find the stress in a hub that a pressure in its bore makes.

    .. math::

        \sigma_{\theta,bore} = p\,\frac{D^2 + d^2}{D^2 - d^2} \qquad \sigma_{r,bore} = -p \qquad
        \sigma_{\theta,outside} = \frac{2 p d^2}{D^2 - d^2}

    Parameters
    ----------
    pressure : float
        Pressure in the bore, :math:`p`, [Pa]
    interface_diameter : float
        Diameter of the bore, :math:`d`, [m]
    hub_outer_diameter : float
        Outer diameter of the hub, :math:`D`, [m]

    Returns
    -------
    stresses : HubStresses
        Stress at bore and outside, [Pa]

    Raises
    ------
    OutOfRangeError
        If the pressure is negative or the diameters do not nest.

    Notes
    -----
    Plane stress and elastic; no keyway, no holes.

    Examples
    --------
    A hub twice as wide as its bore, (4 + 1)/(4 − 1) = 5/3:

    >>> hub_stresses(pressure=90e6, interface_diameter=0.1, hub_outer_diameter=0.2).bore.hoop
    150000000.0

    References
    ----------
    .. [1] R. G. Budynas, J. K. Nisbett, Shigley's Mechanical Engineering Design, 9th ed., section
       7-8.
    """
    demand_not_negative("pressure", pressure)
    demand_positive("interface_diameter", interface_diameter)
    demand_finite("hub_outer_diameter", hub_outer_diameter)
    if not interface_diameter < hub_outer_diameter:
        raise OutOfRangeError("hub_outer_diameter", hub_outer_diameter, "exceed interface_diameter")
    joint2, outer2 = interface_diameter**2, hub_outer_diameter**2
    return HubStresses(
        bore=surface_stress(
            hoop=pressure * (outer2 + joint2) / (outer2 - joint2), radial=-pressure
        ),
        outside=surface_stress(hoop=2.0 * pressure * joint2 / (outer2 - joint2), radial=0.0),
    )


def shaft_stresses(
    *, pressure: float, interface_diameter: float, shaft_bore_diameter: float
) -> ShaftStresses:
    r"""Find the stress in a shaft that a pressure on its seat makes.

    .. math::

        \sigma_{\theta,seat} = -p\,\frac{d^2 + b^2}{d^2 - b^2} \qquad \sigma_{r,seat} = -p \qquad
        \sigma_{\theta,bore} = -\frac{2 p d^2}{d^2 - b^2}

    Parameters
    ----------
    pressure : float
        Pressure on the seat, :math:`p`, [Pa]
    interface_diameter : float
        Diameter of the seat, :math:`d`, [m]
    shaft_bore_diameter : float
        Bore of a hollow shaft, :math:`b`; 0 for a solid one, [m]

    Returns
    -------
    stresses : ShaftStresses
        Stress at the seat, and at the bore if there is one, [Pa]

    Raises
    ------
    OutOfRangeError
        If the pressure is negative or the diameters do not nest.

    Notes
    -----
    Plane stress and elastic. A solid shaft has the same stress throughout. Even a pin-hole on the
    axis doubles it there, which these limits show: 2p at a vanishing bore against p with none.

    Examples
    --------
    >>> solid = shaft_stresses(
    ...     pressure=90e6, interface_diameter=0.1, shaft_bore_diameter=0.0)
    >>> solid.seat.hoop, solid.bore
    (-90000000.0, None)

    References
    ----------
    .. [1] R. G. Budynas, J. K. Nisbett, Shigley's Mechanical Engineering Design, 9th ed., section
       7-8.
    """
    demand_not_negative("pressure", pressure)
    demand_not_negative("shaft_bore_diameter", shaft_bore_diameter)
    demand_finite("interface_diameter", interface_diameter)
    if not shaft_bore_diameter < interface_diameter:
        raise OutOfRangeError(
            "interface_diameter", interface_diameter, "exceed shaft_bore_diameter"
        )
    joint2, bore2 = interface_diameter**2, shaft_bore_diameter**2
    seat = surface_stress(hoop=-pressure * (joint2 + bore2) / (joint2 - bore2), radial=-pressure)
    if shaft_bore_diameter == 0.0:
        return ShaftStresses(seat=seat, bore=None)
    bore = surface_stress(hoop=-2.0 * pressure * joint2 / (joint2 - bore2), radial=0.0)
    return ShaftStresses(seat=seat, bore=bore)


def yield_margin(*, equivalent_stress: float, yield_strength: float) -> float:
    r"""Tell how many times the stress could grow before the part yields.

    .. math:: S = \frac{R_e}{\sigma}

    Parameters
    ----------
    equivalent_stress : float
        Equivalent stress, von Mises or Tresca, :math:`\sigma`, [Pa]
    yield_strength : float
        Yield strength of the part, :math:`R_e`, [Pa]

    Returns
    -------
    margin : float
        Ratio; below 1 the part yields, infinite without stress, [-]

    Raises
    ------
    OutOfRangeError
        If the stress is negative or the strength not positive.

    Notes
    -----
    A hub works well with about 80 % of yield at its bore (a margin of 1.25); thick ones, with d/D
    of 0.4 and less, tolerate full yield there (Bloch, Improving Machinery Reliability, p. 217).

    Examples
    --------
    >>> yield_margin(equivalent_stress=400e6, yield_strength=500e6)
    1.25

    References
    ----------
    Definition.
    """
    demand_not_negative("equivalent_stress", equivalent_stress)
    demand_positive("yield_strength", yield_strength)
    return yield_strength / equivalent_stress if equivalent_stress > 0.0 else math.inf
