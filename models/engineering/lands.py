"""A part that grips on several lands side by side."""

from collections.abc import Sequence
from dataclasses import dataclass

from models.engineering.errors import OutOfRangeError
from models.engineering.fits import contact_pressure
from models.engineering.holding import holding_force, holding_torque
from models.engineering.ranges import demand_positive

__all__ = ["Land", "LandsHolding", "several_lands"]


@dataclass(frozen=True)
class Land:
    """One stretch of a joint, over which hub and shaft have one shape."""

    interference: float
    """Interference on diameter [m]."""
    interface_diameter: float
    """Nominal diameter of the joint [m]."""
    contact_length: float
    """Length over which the parts touch [m]."""
    hub_outer_diameter: float
    """Outer diameter of the hub over this land [m]."""
    shaft_bore_diameter: float = 0.0
    """Bore of a hollow shaft under this land; 0 for a solid one [m]."""


@dataclass(frozen=True)
class LandsHolding:
    """What several lands do together."""

    pressures: tuple[float, ...]
    """Pressure at each land, in the order given [Pa]."""
    torque: float
    """Torque that all hold together [N·m]."""
    force: float
    """Axial force that all hold together [N]."""


def several_lands(
    *,
    lands: Sequence[Land],
    hub_modulus: float,
    shaft_modulus: float,
    hub_poisson: float,
    shaft_poisson: float,
    friction: float,
) -> LandsHolding:
    r"""Find the pressure at each land of a part, and what they hold together.

    Each land as a ring of its own, not helped by its neighbours:

    .. math::

        F = \sum_i \mu\,\pi d_i L_i\,p_i \qquad T = \sum_i \frac{\mu\,\pi d_i^2 L_i\,p_i}{2}

    Parameters
    ----------
    lands : sequence of Land
        The lands, in any order, [m]
    hub_modulus : float
        Young's modulus of the hub, [Pa]
    shaft_modulus : float
        Young's modulus of the shaft, [Pa]
    hub_poisson : float
        Poisson's ratio of the hub, [-]
    shaft_poisson : float
        Poisson's ratio of the shaft, [-]
    friction : float
        Coefficient of friction, :math:`\mu`, [-]

    Returns
    -------
    holding : LandsHolding
        Pressure at each land, and torque and force of all, [Pa]

    Raises
    ------
    OutOfRangeError
        If there is no land, or one is refused by `contact_pressure` or `holding_force`.

    Notes
    -----
    In truth a wide web stiffens the thin land beside it, so the pressure changes gradually and the
    land near the web grips more than its own diameter tells. A land with clearance holds nothing
    and takes nothing from the others.

    Examples
    --------
    One land cut into two halves holds what the whole one does, E e/2 · (1 − ¼) = 75 MPa:

    >>> half = Land(interference=100e-6, interface_diameter=0.1, contact_length=0.05,
    ...             hub_outer_diameter=0.2)
    >>> both = several_lands(
    ...     lands=[half, half], hub_modulus=200e9, shaft_modulus=200e9, hub_poisson=0.3,
    ...     shaft_poisson=0.3, friction=0.1)
    >>> both.pressures
    (75000000.0, 75000000.0)
    >>> round(both.force)
    235619

    References
    ----------
    .. [1] As for `contact_pressure` and `holding_force`; the division into rings is common
       practice.
    """
    if not lands:
        raise OutOfRangeError("lands", lands, "hold one or more")
    demand_positive("friction", friction)
    pressures = tuple(
        contact_pressure(
            interference=land.interference,
            interface_diameter=land.interface_diameter,
            hub_outer_diameter=land.hub_outer_diameter,
            shaft_bore_diameter=land.shaft_bore_diameter,
            hub_modulus=hub_modulus,
            shaft_modulus=shaft_modulus,
            hub_poisson=hub_poisson,
            shaft_poisson=shaft_poisson,
        )
        for land in lands
    )
    torque = force = 0.0
    for land, pressure in zip(lands, pressures, strict=True):
        force += holding_force(
            pressure=pressure,
            interface_diameter=land.interface_diameter,
            contact_length=land.contact_length,
            friction=friction,
        )
        torque += holding_torque(
            pressure=pressure,
            interface_diameter=land.interface_diameter,
            contact_length=land.contact_length,
            friction=friction,
        )
    return LandsHolding(pressures=pressures, torque=torque, force=force)
