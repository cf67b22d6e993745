"""Still air at one atmosphere, and how strongly it rises along a warm surface."""

from dataclasses import dataclass

import numpy as np

from models.engineering.errors import OutOfRangeError

__all__ = [
    "ABSOLUTE_ZERO",
    "Air",
    "air_at",
    "nusselt_horizontal_cylinder",
    "nusselt_vertical_face",
    "rayleigh_number",
]

ABSOLUTE_ZERO = -273.15
"""Zero of the absolute scale [°C]."""

_GRAVITY = 9.80665

# Y. A. Çengel, Heat and Mass Transfer, table A-15, air at 1 atm: temperature [°C], conductivity
# [W/(m·K)], kinematic viscosity [1e-5 m²/s], Prandtl number. Read as reproduced up to 160 °C; the
# rows above are from memory and agree with a second table that was read (see the tests).
_TABLE = np.array(
    [
        (-50.0, 0.01979, 0.9319, 0.7440),
        (-20.0, 0.02211, 1.169, 0.7408),
        (0.0, 0.02364, 1.338, 0.7362),
        (10.0, 0.02439, 1.426, 0.7336),
        (20.0, 0.02514, 1.516, 0.7309),
        (30.0, 0.02588, 1.608, 0.7282),
        (40.0, 0.02662, 1.702, 0.7255),
        (50.0, 0.02735, 1.798, 0.7228),
        (60.0, 0.02808, 1.896, 0.7202),
        (70.0, 0.02881, 1.995, 0.7177),
        (80.0, 0.02953, 2.097, 0.7154),
        (90.0, 0.03024, 2.201, 0.7132),
        (100.0, 0.03095, 2.306, 0.7111),
        (120.0, 0.03235, 2.522, 0.7073),
        (140.0, 0.03374, 2.745, 0.7041),
        (160.0, 0.03511, 2.975, 0.7014),
        (180.0, 0.03646, 3.212, 0.6992),
        (200.0, 0.03779, 3.455, 0.6974),
        (250.0, 0.04104, 4.091, 0.6946),
        (300.0, 0.04418, 4.765, 0.6935),
        (350.0, 0.04721, 5.475, 0.6937),
        (400.0, 0.05015, 6.219, 0.6948),
    ]
)


@dataclass(frozen=True, kw_only=True)
class Air:
    """Properties of dry air at one atmosphere."""

    conductivity: float
    """Thermal conductivity [W/(m·K)]."""
    kinematic_viscosity: float
    """Kinematic viscosity [m²/s]."""
    prandtl: float
    """Prandtl number [-]."""
    expansion: float
    """Volume expansion coefficient of an ideal gas, one over the absolute temperature [1/K]."""


def air_at(*, temperature: float) -> Air:
    r"""Properties of dry air, on straight lines between the rows of a published table.

    .. math:: \beta = 1 / (T + 273.15)

    Parameters
    ----------
    temperature : float
        Temperature of the air, at a warm surface the mean of surface and room, [°C]

    Returns
    -------
    Air
        Conductivity [W/(m·K)], viscosity [m²/s], Prandtl number [-], expansion [1/K]

    Raises
    ------
    OutOfRangeError
        If the temperature lies outside −50 to 400 °C.

    Notes
    -----
    Moisture and height above the sea are left out; at 1500 m free convection is weaker by a tenth.

    Examples
    --------
    A row of the table:

    >>> air_at(temperature=100.0).conductivity
    0.03095

    References
    ----------
    Y. A. Çengel, Heat and Mass Transfer, table A-15, air at 1 atm, as reproduced up to 160 °C;
    above it from memory.
    """
    if not _TABLE[0, 0] <= temperature <= _TABLE[-1, 0]:
        raise OutOfRangeError("temperature", temperature, "lie between -50 and 400 °C")
    conductivity, viscosity, prandtl = (
        float(np.interp(temperature, _TABLE[:, 0], _TABLE[:, column])) for column in (1, 2, 3)
    )
    return Air(
        conductivity=conductivity,
        kinematic_viscosity=viscosity * 1e-5,
        prandtl=prandtl,
        expansion=1.0 / (temperature - ABSOLUTE_ZERO),
    )


def rayleigh_number(*, air: Air, length: float, temperature_difference: float) -> float:
    r"""Rayleigh number of a warm surface in still air.

    .. math:: \mathrm{Ra} = g \, \beta \, |\Delta T| \, L^3 \, \mathrm{Pr} / \nu^2

    Parameters
    ----------
    air : Air
        Air at the mean of surface and room, [-]
    length : float
        Diameter of a horizontal cylinder or height of a face, :math:`L`, [m]
    temperature_difference : float
        Surface less room, :math:`\Delta T`, [K]

    Returns
    -------
    float
        Rayleigh number, [-]

    Raises
    ------
    OutOfRangeError
        If the length is not positive.

    Examples
    --------
    Round figures, 10 · 0.003 · 100 · 0.001 · 0.7 / (2e-5)²:

    >>> round_air = Air(conductivity=0.03, kinematic_viscosity=2e-5, prandtl=0.7, expansion=0.003)
    >>> rayleigh_number(air=round_air, length=0.1, temperature_difference=100.0) * 10 / 9.80665
    5250000.

    References
    ----------
    Y. A. Çengel, Heat and Mass Transfer, natural convection; from memory.
    """
    if not length > 0.0:
        raise OutOfRangeError("length", length, "be positive")
    buoyancy = _GRAVITY * air.expansion * abs(temperature_difference)
    return buoyancy * length**3 * air.prandtl / air.kinematic_viscosity**2


def nusselt_horizontal_cylinder(*, rayleigh: float, prandtl: float) -> float:
    r"""Mean Nusselt number of a long horizontal cylinder in still air.

    .. math::

        \mathrm{Nu} = \left\{ 0.60 + \frac{0.387 \, \mathrm{Ra}^{1/6}}
          {[1 + (0.559/\mathrm{Pr})^{9/16}]^{8/27}} \right\}^2

    Parameters
    ----------
    rayleigh : float
        Rayleigh number on the diameter, [-]
    prandtl : float
        Prandtl number, [-]

    Returns
    -------
    float
        Nusselt number on the diameter, [-]

    Raises
    ------
    OutOfRangeError
        If the Rayleigh number is negative or above 1e12.

    Examples
    --------
    Without buoyancy only 0.60² remains:

    >>> nusselt_horizontal_cylinder(rayleigh=0.0, prandtl=0.7)
    0.36

    References
    ----------
    S. W. Churchill, H. H. S. Chu, 1975, correlation for the horizontal cylinder, as given in
    teaching material.
    """
    return _nusselt(rayleigh, prandtl, 0.60, 0.559)


def nusselt_vertical_face(*, rayleigh: float, prandtl: float) -> float:
    r"""Mean Nusselt number of a vertical face in still air.

    .. math::

        \mathrm{Nu} = \left\{ 0.825 + \frac{0.387 \, \mathrm{Ra}^{1/6}}
          {[1 + (0.492/\mathrm{Pr})^{9/16}]^{8/27}} \right\}^2

    Parameters
    ----------
    rayleigh : float
        Rayleigh number on the height, [-]
    prandtl : float
        Prandtl number, [-]

    Returns
    -------
    float
        Nusselt number on the height, [-]

    Raises
    ------
    OutOfRangeError
        If the Rayleigh number is negative or above 1e12.

    Notes
    -----
    A round face is taken as one of the height of its diameter, which counts its heat a little low;
    the range of emissivity and draught covers more than that.

    Examples
    --------
    Without buoyancy only 0.825² remains:

    >>> nusselt_vertical_face(rayleigh=0.0, prandtl=0.7)
    0.680625

    References
    ----------
    S. W. Churchill, H. H. S. Chu, 1975, correlation for the vertical plate, as given in teaching
    material (Çengel, eq. 9-21).
    """
    return _nusselt(rayleigh, prandtl, 0.825, 0.492)


def _nusselt(rayleigh: float, prandtl: float, still: float, prandtl_weight: float) -> float:
    if not 0.0 <= rayleigh <= 1e12:
        raise OutOfRangeError("rayleigh", rayleigh, "lie between 0 and 1e12")
    spread = (1.0 + (prandtl_weight / prandtl) ** (9.0 / 16.0)) ** (8.0 / 27.0)
    return float((still + 0.387 * rayleigh ** (1.0 / 6.0) / spread) ** 2)
