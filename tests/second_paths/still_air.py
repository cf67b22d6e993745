"""Dry air at one atmosphere from Sutherland's laws and the ideal gas, without any table."""

__all__ = ["air_of"]


def air_of(celsius: float) -> tuple[float, float, float]:
    """Give conductivity [W/(m·K)], kinematic viscosity [m²/s] and Prandtl number.

    Constants of the U.S. Standard Atmosphere, 1976, from memory; specific heat as the quadratic
    through 1005, 1013 and 1047 J/(kg·K) at 0, 120 and 380 °C, round values of teaching tables.
    """
    kelvin = celsius + 273.15
    viscosity = 1.458e-6 * kelvin**1.5 / (kelvin + 110.4)
    conductivity = 2.64638e-3 * kelvin**1.5 / (kelvin + 245.4 * 10.0 ** (-12.0 / kelvin))
    density = 101325.0 / (287.053 * kelvin)
    heat = 1005.0
    heat += (1013.0 - 1005.0) / 120.0 * celsius
    heat += (
        ((1047.0 - 1005.0) / 380.0 - (1013.0 - 1005.0) / 120.0)
        / 260.0
        * celsius
        * (celsius - 120.0)
    )
    return conductivity, viscosity / density, viscosity * heat / conductivity
