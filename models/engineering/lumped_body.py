"""Cooling of a body that has one temperature throughout, and when it may be taken as one."""

import math
from collections.abc import Callable
from itertools import pairwise

import numpy as np

from models.engineering.errors import OutOfRangeError

__all__ = ["biot_number", "time_constant", "time_to_cool"]

_NODES, _WEIGHTS = np.polynomial.legendre.leggauss(12)


def biot_number(
    *, heat_transfer_coefficient: float, volume: float, area: float, conductivity: float
) -> float:
    r"""Resistance inside a body against the one at its surface.

    .. math:: \mathrm{Bi} = h \, (V / A) / k

    Parameters
    ----------
    heat_transfer_coefficient : float
        Mean coefficient at the surface, :math:`h`, [W/(m²·K)]
    volume : float
        Volume of the body, :math:`V`, [m³]
    area : float
        Surface that loses heat, :math:`A`, [m²]
    conductivity : float
        Thermal conductivity of the body, :math:`k`, [W/(m·K)]

    Returns
    -------
    float
        Biot number; below 0.1 the body cools as one, [-]

    Raises
    ------
    OutOfRangeError
        If area or conductivity is not positive.

    Examples
    --------
    A ball of 8 mm, V/A = d/6, in moving air:

    >>> biot_number(
    ...     heat_transfer_coefficient=75.0, volume=0.008 / 6, area=1.0, conductivity=54.0)
    0.00185

    References
    ----------
    Y. A. Çengel, Heat and Mass Transfer, annealing of carbon-steel balls.
    """
    if not area > 0.0:
        raise OutOfRangeError("area", area, "be positive")
    if not conductivity > 0.0:
        raise OutOfRangeError("conductivity", conductivity, "be positive")
    return heat_transfer_coefficient * volume / area / conductivity


def time_constant(
    *,
    density: float,
    specific_heat: float,
    diameter: float,
    heat_transfer_coefficient: float,
) -> float:
    r"""Time in which a long round bar loses 63 % of its excess temperature.

    .. math:: \tau = \frac{\rho \, c \, D}{4 h}

    Parameters
    ----------
    density : float
        Density, :math:`\rho`, [kg/m³]
    specific_heat : float
        Specific heat, :math:`c`, [J/(kg·K)]
    diameter : float
        Diameter, :math:`D`, [m]
    heat_transfer_coefficient : float
        Convection and radiation together, :math:`h`, [W/(m²·K)]

    Returns
    -------
    float
        Time constant, [s]

    Raises
    ------
    OutOfRangeError
        If an input is not positive.

    Notes
    -----
    Still air and radiation together take about 10 W/(m²·K), a fan 25 to 40.

    Examples
    --------
    A shaft of 150 mm in still air, 3.8 hours:

    >>> time_constant(
    ...     density=7850.0, specific_heat=470.0, diameter=0.150, heat_transfer_coefficient=10.0
    ... ) / 3600.0
    3.84

    References
    ----------
    Any text on heat transfer, lumped body; volume over surface of a long cylinder is D/4.
    """
    inputs = {
        "density": density,
        "specific_heat": specific_heat,
        "diameter": diameter,
        "heat_transfer_coefficient": heat_transfer_coefficient,
    }
    for name, value in inputs.items():
        if not value > 0.0:
            raise OutOfRangeError(name, value, "be positive")
    return density * specific_heat * diameter / (4.0 * heat_transfer_coefficient)


def time_to_cool(
    *,
    start_temperature: float,
    end_temperature: float,
    heat_capacity: Callable[[float], float],
    heat_loss: Callable[[float], float],
) -> float:
    r"""Time in which a body of one temperature cools from one value to another.

    .. math:: t = \int_{T_e}^{T_s} \frac{C(T)}{q(T)} \, \mathrm{d}T

    Parameters
    ----------
    start_temperature : float
        Temperature at the start, :math:`T_s`, [°C]
    end_temperature : float
        Temperature at the end, :math:`T_e`, [°C]
    heat_capacity : Callable[[float], float]
        Heat capacity of the body at a temperature, :math:`C`, [J/K]
    heat_loss : Callable[[float], float]
        Heat that leaves the body at a temperature, :math:`q`, [W]

    Returns
    -------
    float
        Duration; 0 where the end is not below the start, infinite where the heat stops leaving
        before the end is reached, [s]

    Notes
    -----
    The temperature is the variable of integration, so a loss that depends on it in any smooth way
    costs no small steps in time.

    Examples
    --------
    10 kJ/K losing 100 W throughout, 50 K:

    >>> time_to_cool(
    ...     start_temperature=200.0, end_temperature=150.0,
    ...     heat_capacity=lambda temperature: 10e3, heat_loss=lambda temperature: 100.0)
    5000.

    References
    ----------
    Energy balance of a lumped body.
    """
    if end_temperature >= start_temperature:
        return 0.0
    if heat_loss(end_temperature) <= 0.0:
        return math.inf
    span = start_temperature - end_temperature
    # Narrower towards the end, where a body close to the room loses least and so lingers.
    edges = np.linspace(0.0, 1.0, 9) ** 2 * span + end_temperature
    total = 0.0
    for low, high in pairwise(edges):
        half, middle = (high - low) / 2.0, (high + low) / 2.0
        at = [float(middle + half * node) for node in _NODES]
        rates = [heat_capacity(value) / heat_loss(value) for value in at]
        total += float(half * np.dot(_WEIGHTS, rates))
    return total
