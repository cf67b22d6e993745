"""A part shrunk onto a shaft, at rest: interference left and the pressure it makes."""

from collections.abc import Mapping
from types import MappingProxyType

from models.engineering.errors import OutOfRangeError
from models.engineering.ranges import demand_finite, demand_not_negative, demand_positive

__all__ = [
    "SMOOTHING_FACTORS",
    "contact_pressure",
    "demand_nesting",
    "fit_at_temperature",
    "smoothing_loss",
]

SMOOTHING_FACTORS: Mapping[str, float] = MappingProxyType(
    {
        "DIN 7190, 1988 and 2001 (from memory)": 0.8,
        "DIN 7190-1, 2017 (from memory, second-hand)": 0.4,
    }
)
"""Share of both roughnesses that is lost on diameter, by edition; neither was read."""


def contact_pressure(
    *,
    interference: float,
    interface_diameter: float,
    hub_outer_diameter: float,
    shaft_bore_diameter: float,
    hub_modulus: float,
    shaft_modulus: float,
    hub_poisson: float,
    shaft_poisson: float,
) -> float:
    r"""Find the pressure between a hub and a shaft joined by interference.

    The hub is pushed outward and the shaft inward until their surfaces meet; each is a thick-walled
    cylinder after Lamé:

    .. math::

        p = \frac{\Delta}{d}\left[
            \frac{1}{E_h}\left(\frac{D^2 + d^2}{D^2 - d^2} + \nu_h\right)
          + \frac{1}{E_s}\left(\frac{d^2 + b^2}{d^2 - b^2} - \nu_s\right)
        \right]^{-1}

    Parameters
    ----------
    interference : float
        Interference on diameter, at the temperatures and the speed of interest,
        :math:`\Delta`, [m]
    interface_diameter : float
        Nominal diameter of the joint, :math:`d`, [m]
    hub_outer_diameter : float
        Outer diameter of the hub, :math:`D`, [m]
    shaft_bore_diameter : float
        Bore of a hollow shaft, :math:`b`; 0 for a solid one, [m]
    hub_modulus : float
        Young's modulus of the hub, :math:`E_h`, [Pa]
    shaft_modulus : float
        Young's modulus of the shaft, :math:`E_s`, [Pa]
    hub_poisson : float
        Poisson's ratio of the hub, :math:`\nu_h`, [-]
    shaft_poisson : float
        Poisson's ratio of the shaft, :math:`\nu_s`, [-]

    Returns
    -------
    pressure : float
        Mean contact pressure; 0 where the parts do not interfere, [Pa]

    Raises
    ------
    OutOfRangeError
        If the diameters do not nest (bore, joint, outer), a modulus is not positive or a Poisson's
        ratio lies outside 0 to 0.5.

    Notes
    -----
    Holds for plane stress, both parts elastic and of equal length. Does not look at yielding, or at
    the higher pressure near the ends of a hub shorter than its shaft. Some sources take the
    interference on radius, half of this one: the commonest slip, a factor of two.

    Examples
    --------
    Steel hub of 100 mm on a solid steel shaft of 50 mm, 50 µm on diameter. For one material the
    bracket collapses, and E Δ / (2 d) · (1 − d²/D²) remains, which can be done by hand:

    >>> contact_pressure(
    ...     interference=50e-6, interface_diameter=0.050,
    ...     hub_outer_diameter=0.100, shaft_bore_diameter=0.0,
    ...     hub_modulus=207e9, shaft_modulus=207e9,
    ...     hub_poisson=0.292, shaft_poisson=0.292)
    77625000.0

    References
    ----------
    .. [1] R. G. Budynas, J. K. Nisbett, Shigley's Mechanical Engineering Design, 9th ed., section
       7-8, equations 7-39 to 7-47.
    .. [2] T. H. Brown, Marks' Calculations for Machine Design, 2005, equations 3.11 to 3.15, in
       radii.
    """
    demand_finite("interference", interference)
    demand_nesting(
        shaft_bore_diameter=shaft_bore_diameter,
        interface_diameter=interface_diameter,
        hub_outer_diameter=hub_outer_diameter,
    )
    demand_positive("hub_modulus", hub_modulus)
    demand_positive("shaft_modulus", shaft_modulus)
    for name, poisson in (("hub_poisson", hub_poisson), ("shaft_poisson", shaft_poisson)):
        if not 0.0 <= poisson <= 0.5:
            raise OutOfRangeError(name, poisson, "lie between 0 and 0.5")
    if interference <= 0.0:
        return 0.0
    joint2 = interface_diameter**2
    outer2 = hub_outer_diameter**2
    bore2 = shaft_bore_diameter**2
    hub_compliance = ((outer2 + joint2) / (outer2 - joint2) + hub_poisson) / hub_modulus
    shaft_compliance = ((joint2 + bore2) / (joint2 - bore2) - shaft_poisson) / shaft_modulus
    return interference / interface_diameter / (hub_compliance + shaft_compliance)


def demand_nesting(
    *, shaft_bore_diameter: float, interface_diameter: float, hub_outer_diameter: float
) -> None:
    """Refuse diameters of which one does not lie inside the next.

    Formula: 0 ≤ shaft bore < joint < outside of the hub.

    Parameters
    ----------
    shaft_bore_diameter : float
        Bore of a hollow shaft; 0 for a solid one, [m]
    interface_diameter : float
        Nominal diameter of the joint, [m]
    hub_outer_diameter : float
        Outer diameter of the hub, [m]

    Raises
    ------
    OutOfRangeError
        If they do not nest.

    Examples
    --------
    >>> demand_nesting(
    ...     shaft_bore_diameter=0.0, interface_diameter=0.150, hub_outer_diameter=0.250)

    References
    ----------
    Definition.
    """
    demand_not_negative("shaft_bore_diameter", shaft_bore_diameter)
    if not shaft_bore_diameter < interface_diameter:
        raise OutOfRangeError(
            "interface_diameter", interface_diameter, "exceed shaft_bore_diameter"
        )
    demand_finite("hub_outer_diameter", hub_outer_diameter)
    if not interface_diameter < hub_outer_diameter:
        raise OutOfRangeError("hub_outer_diameter", hub_outer_diameter, "exceed interface_diameter")


def smoothing_loss(*, factor: float, bore_roughness: float, seat_roughness: float) -> float:
    r"""Tell how much interference goes into smoothing the two surfaces.

    .. math:: \Delta_{loss} = k\,(R_{z,bore} + R_{z,seat})

    Parameters
    ----------
    factor : float
        Share lost, :math:`k`, one of `SMOOTHING_FACTORS` or a shop's own, [-]
    bore_roughness : float
        Mean peak-to-valley height Rz of the bore, about six times Ra, [m]
    seat_roughness : float
        The same of the seat, [m]

    Returns
    -------
    loss : float
        Interference lost, on diameter, [m]

    Raises
    ------
    OutOfRangeError
        If one of them is negative.

    Notes
    -----
    The editions of the standard differ by a factor of two, so the edition is shown with the number.
    Some authors lose less in a shrunk fit than in a pressed one.

    Examples
    --------
    Both surfaces of Rz 4.8 µm (Ra 0.8 µm): 0.8 · 9.6 = 7.68 µm.

    >>> round(smoothing_loss(factor=0.8, bore_roughness=4.8e-6, seat_roughness=4.8e-6) * 1e6, 6)
    7.68

    References
    ----------
    .. [1] DIN 7190, Interference fits, from memory.
    """
    demand_not_negative("factor", factor)
    demand_not_negative("bore_roughness", bore_roughness)
    demand_not_negative("seat_roughness", seat_roughness)
    return factor * (bore_roughness + seat_roughness)


def fit_at_temperature(
    *,
    interference: float,
    interface_diameter: float,
    shaft_temperature: float,
    shaft_expansion: float,
    hub_temperature: float,
    hub_expansion: float,
) -> float:
    r"""Tell the interference that is there when hub and shaft are warm.

    .. math::

        \Delta_T = \Delta_{20} + d\,[\alpha_s (T_s - 20) - \alpha_h (T_h - 20)]

    Parameters
    ----------
    interference : float
        Interference on diameter at 20 °C, :math:`\Delta_{20}`, [m]
    interface_diameter : float
        Nominal diameter of the joint, :math:`d`, [m]
    shaft_temperature : float
        Temperature of the shaft under the hub, :math:`T_s`, [°C]
    shaft_expansion : float
        Mean expansion coefficient of the shaft from 20 °C, :math:`\alpha_s`, [1/K]
    hub_temperature : float
        Area-weighted mean temperature of the hub, :math:`T_h`, [°C]
    hub_expansion : float
        Mean expansion coefficient of the hub from 20 °C, :math:`\alpha_h`, [1/K]

    Returns
    -------
    interference : float
        Interference on diameter, negative where there is clearance, [m]

    Raises
    ------
    OutOfRangeError
        If the diameter is not positive or another number is not finite.

    Notes
    -----
    The bore of a free hub grows with its mean temperature over the area, not with the temperature
    of the bore.

    Examples
    --------
    100 mm, 100 µm, the hub 81.3 K hotter than its shaft of the same steel: nothing is left.

    >>> left = fit_at_temperature(
    ...     interference=100e-6, interface_diameter=0.100, shaft_temperature=20.0,
    ...     shaft_expansion=12.3e-6, hub_temperature=101.3, hub_expansion=12.3e-6)
    >>> round(left * 1e6, 3)
    0.001

    References
    ----------
    Definition of the mean coefficient; by hand.
    """
    demand_positive("interface_diameter", interface_diameter)
    for name, number in (
        ("interference", interference),
        ("shaft_temperature", shaft_temperature),
        ("shaft_expansion", shaft_expansion),
        ("hub_temperature", hub_temperature),
        ("hub_expansion", hub_expansion),
    ):
        demand_finite(name, number)
    shaft_growth = shaft_expansion * (shaft_temperature - 20.0)
    hub_growth = hub_expansion * (hub_temperature - 20.0)
    return interference + interface_diameter * (shaft_growth - hub_growth)
