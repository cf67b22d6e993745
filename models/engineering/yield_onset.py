"""The pressure at which a fit begins to yield, by the modified criterion of greatest shear."""

import math

from models.engineering.errors import OutOfRangeError
from models.engineering.ranges import demand_not_negative, demand_positive

__all__ = ["hub_pressure_at_yield", "shaft_pressure_at_yield"]


def hub_pressure_at_yield(
    *, yield_strength: float, interface_diameter: float, hub_outer_diameter: float
) -> float:
    r"""Find the pressure at which the bore of a hub begins to yield.

    .. math:: p = \frac{R_e}{\sqrt 3}\left(1 - \frac{d^2}{D^2}\right)

    Parameters
    ----------
    yield_strength : float
        Yield strength of the hub, :math:`R_e`, [Pa]
    interface_diameter : float
        Diameter of the joint, :math:`d`, [m]
    hub_outer_diameter : float
        Outer diameter of the hub, :math:`D`, [m]

    Returns
    -------
    pressure : float
        Contact pressure at which yielding begins, [Pa]

    Raises
    ------
    OutOfRangeError
        If the strength is not positive or the diameters do not nest.

    Notes
    -----
    The shear at which it yields is that of distortion energy, R/√3, so this limit lies 2/√3 above
    the one of greatest shear, and never below the one of distortion energy.

    Examples
    --------
    A hub twice as wide as its bore, 0.75 · 520/√3 MPa:

    >>> round(hub_pressure_at_yield(
    ...     yield_strength=520e6, interface_diameter=0.1, hub_outer_diameter=0.2) / 1e6, 2)
    225.17

    References
    ----------
    .. [1] DIN 7190, Interference fits, modified hypothesis of shear stress; from memory.
    """
    demand_positive("yield_strength", yield_strength)
    demand_positive("interface_diameter", interface_diameter)
    if not interface_diameter < hub_outer_diameter:
        raise OutOfRangeError("hub_outer_diameter", hub_outer_diameter, "exceed interface_diameter")
    return yield_strength / math.sqrt(3.0) * (1.0 - (interface_diameter / hub_outer_diameter) ** 2)


def shaft_pressure_at_yield(
    *, yield_strength: float, interface_diameter: float, shaft_bore_diameter: float
) -> float:
    r"""Find the pressure at which a shaft under a hub begins to yield.

    .. math::

        p = \frac{R_e}{\sqrt 3}\left(1 - \frac{b^2}{d^2}\right) \text{ (hollow)} \qquad
        p = \frac{2 R_e}{\sqrt 3} \text{ (solid)}

    Parameters
    ----------
    yield_strength : float
        Yield strength of the shaft, :math:`R_e`, [Pa]
    interface_diameter : float
        Diameter of the joint, :math:`d`, [m]
    shaft_bore_diameter : float
        Bore of a hollow shaft, :math:`b`; 0 for a solid one, [m]

    Returns
    -------
    pressure : float
        Contact pressure at which yielding begins, [Pa]

    Raises
    ------
    OutOfRangeError
        If the strength is not positive or the diameters do not nest.

    Notes
    -----
    A solid shaft bears twice what one with a pin-hole does, as for `shaft_stresses`.

    Examples
    --------
    >>> round(shaft_pressure_at_yield(
    ...     yield_strength=520e6, interface_diameter=0.1, shaft_bore_diameter=0.0) / 1e6, 1)
    600.4

    References
    ----------
    .. [1] DIN 7190, Interference fits, modified hypothesis of shear stress; from memory.
    """
    demand_positive("yield_strength", yield_strength)
    demand_positive("interface_diameter", interface_diameter)
    demand_not_negative("shaft_bore_diameter", shaft_bore_diameter)
    if not shaft_bore_diameter < interface_diameter:
        raise OutOfRangeError("interface_diameter", interface_diameter, "exceed the shaft's bore")
    if shaft_bore_diameter == 0.0:
        return 2.0 * yield_strength / math.sqrt(3.0)
    ratio = shaft_bore_diameter / interface_diameter
    return yield_strength / math.sqrt(3.0) * (1.0 - ratio**2)
