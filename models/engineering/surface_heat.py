"""Heat that leaves a warm surface by air, by radiation and through a thin gap."""

import numpy as np

from models.engineering.air import (
    ABSOLUTE_ZERO,
    air_at,
    nusselt_horizontal_cylinder,
    nusselt_vertical_face,
    rayleigh_number,
)
from models.engineering.errors import OutOfRangeError

__all__ = [
    "cylinder_coefficient",
    "face_coefficient",
    "gap_coefficient",
    "radiation_coefficient",
]

_STEFAN_BOLTZMANN = 5.670374419e-8


def cylinder_coefficient(
    *, diameter: float, surface_temperature: float, air_temperature: float
) -> float:
    r"""Heat transfer coefficient of a horizontal cylinder in still air.

    .. math:: h = \mathrm{Nu}(\mathrm{Ra}, \mathrm{Pr}) \, k / D

    Parameters
    ----------
    diameter : float
        Outer diameter, :math:`D`, [m]
    surface_temperature : float
        Temperature of the surface, [°C]
    air_temperature : float
        Temperature of the room, [°C]

    Returns
    -------
    float
        Mean coefficient over the circumference, without radiation, [W/(m²·K)]

    Raises
    ------
    OutOfRangeError
        If the diameter is not positive or the air lies outside −50 to 400 °C.

    Notes
    -----
    Air at the mean of the two temperatures.

    Examples
    --------
    A pipe of 80 mm at 70 °C in a room of 20 °C:

    >>> cylinder_coefficient(diameter=0.08, surface_temperature=70.0, air_temperature=20.0)
    5.9

    References
    ----------
    Y. A. Çengel, Heat and Mass Transfer, hot-water pipe example, read in a secondary source.
    """
    air = air_at(temperature=(surface_temperature + air_temperature) / 2.0)
    rayleigh = rayleigh_number(
        air=air, length=diameter, temperature_difference=surface_temperature - air_temperature
    )
    nusselt = nusselt_horizontal_cylinder(rayleigh=rayleigh, prandtl=air.prandtl)
    return nusselt * air.conductivity / diameter


def face_coefficient(*, height: float, surface_temperature: float, air_temperature: float) -> float:
    r"""Heat transfer coefficient of a vertical face in still air.

    .. math:: h = \mathrm{Nu}(\mathrm{Ra}, \mathrm{Pr}) \, k / L

    Parameters
    ----------
    height : float
        Height of the face, of a round one its diameter, :math:`L`, [m]
    surface_temperature : float
        Temperature of the surface, [°C]
    air_temperature : float
        Temperature of the room, [°C]

    Returns
    -------
    float
        Mean coefficient over the face, without radiation, [W/(m²·K)]

    Raises
    ------
    OutOfRangeError
        If the height is not positive or the air lies outside −50 to 400 °C.

    Notes
    -----
    Air at the mean of the two temperatures.

    Examples
    --------
    A face of 80 mm at 70 °C in a room of 20 °C loses about 7 W/(m²·K):

    >>> face_coefficient(height=0.08, surface_temperature=70.0, air_temperature=20.0)
    7.

    References
    ----------
    As `nusselt_vertical_face`; simplified forms for air give 1.4 (ΔT/L)^¼, here 7.
    """
    air = air_at(temperature=(surface_temperature + air_temperature) / 2.0)
    rayleigh = rayleigh_number(
        air=air, length=height, temperature_difference=surface_temperature - air_temperature
    )
    nusselt = nusselt_vertical_face(rayleigh=rayleigh, prandtl=air.prandtl)
    return nusselt * air.conductivity / height


def radiation_coefficient(
    *, emissivity: float, surface_temperature: float, surroundings_temperature: float
) -> float:
    r"""Radiation of a grey surface to its surroundings as a heat transfer coefficient.

    .. math:: h_r = \varepsilon \sigma (T + T_a)(T^2 + T_a^2)

    Parameters
    ----------
    emissivity : float
        Emissivity of the surface, :math:`\varepsilon`, [-]
    surface_temperature : float
        Temperature of the surface, :math:`T`, [°C]
    surroundings_temperature : float
        Temperature of the surroundings, :math:`T_a`, [°C]

    Returns
    -------
    float
        Coefficient on the temperature difference, [W/(m²·K)]

    Raises
    ------
    OutOfRangeError
        If the emissivity lies outside 0 to 1 or a temperature below absolute zero.

    Notes
    -----
    Temperatures enter the formula in kelvin. From memory: bright machined steel 0.2 to 0.35, blued
    in the furnace 0.6 to 0.8, rusty or scaled 0.8 to 0.9.

    Examples
    --------
    A black surface at 0 °C in surroundings of 0 °C, 4 σ T³ with T = 273.15 K:

    >>> radiation_coefficient(
    ...     emissivity=1.0, surface_temperature=0.0, surroundings_temperature=0.0)
    4.622

    References
    ----------
    Law of Stefan and Boltzmann, linearised; CODATA value of the constant, from memory.
    """
    if not 0.0 <= emissivity <= 1.0:
        raise OutOfRangeError("emissivity", emissivity, "lie between 0 and 1")
    surface = surface_temperature - ABSOLUTE_ZERO
    around = surroundings_temperature - ABSOLUTE_ZERO
    if not surface >= 0.0:
        raise OutOfRangeError("surface_temperature", surface_temperature, "be above -273.15 °C")
    if not around >= 0.0:
        raise OutOfRangeError(
            "surroundings_temperature", surroundings_temperature, "be above -273.15 °C"
        )
    return emissivity * _STEFAN_BOLTZMANN * (surface + around) * (surface**2 + around**2)


def gap_coefficient(
    *, clearance: float, gap_temperature: float, eccentricity: float = 0.0
) -> float:
    r"""Conduction through the thin ring of air between a bore and its seat.

    .. math:: h = \frac{2 k}{c \sqrt{1 - \epsilon^2}}

    Parameters
    ----------
    clearance : float
        Clearance on diameter, :math:`c`, [m]
    gap_temperature : float
        Mean temperature of bore and seat, [°C]
    eccentricity : float, optional
        Offset of the two axes over the radial clearance, :math:`\epsilon`; 1 touches, [-]

    Returns
    -------
    float
        Mean coefficient around the bore, [W/(m²·K)]

    Raises
    ------
    OutOfRangeError
        If the clearance is not positive, the eccentricity is negative or not below 1, or the air
        lies outside −50 to 400 °C.

    Notes
    -----
    The mean of k/gap around a narrow eccentric ring. Touching metal passes ten times as much and is
    not part of it.

    Examples
    --------
    0.1 mm of radial gap at 100 °C, 0.03095/1e-4:

    >>> gap_coefficient(clearance=0.2e-3, gap_temperature=100.0)
    309.5

    References
    ----------
    Fourier's law over a narrow gap; the integral of 1/(1 − ε cos θ) over a turn is 2π/√(1 − ε²).
    """
    if not clearance > 0.0:
        raise OutOfRangeError("clearance", clearance, "be positive")
    if not 0.0 <= eccentricity < 1.0:
        raise OutOfRangeError("eccentricity", eccentricity, "lie between 0 and 1")
    conductivity = air_at(temperature=gap_temperature).conductivity
    return float(2.0 * conductivity / (clearance * np.sqrt(1.0 - eccentricity**2)))
