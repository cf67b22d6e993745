"""Growth of metal with temperature, from mean coefficients counted from 20 °C."""

from collections.abc import Callable, Sequence

import numpy as np

from models.engineering.errors import OutOfRangeError

__all__ = [
    "REFERENCE_TEMPERATURE",
    "MeanExpansion",
    "area_weighted_mean_temperature",
    "coefficient_from_other_base",
    "diameter_at",
    "mean_of_instantaneous",
]

REFERENCE_TEMPERATURE = 20.0
"""Temperature at which lengths are stated, ISO 1 [°C]."""

MeanExpansion = Callable[[float], float]
"""Temperature [°C] to the mean coefficient of expansion between 20 °C and it [1/K]."""

# Eight points integrate polynomials of the fifteenth degree exactly; coefficients are published as
# cubics at most.
_NODES, _WEIGHTS = np.polynomial.legendre.leggauss(8)


def diameter_at(*, diameter: float, temperature: float, expansion: MeanExpansion) -> float:
    r"""Diameter of a part that is at one temperature throughout.

    .. math:: D(T) = D_{20} \, [1 + \bar\alpha(T) \, (T - 20)]

    Parameters
    ----------
    diameter : float
        Diameter at 20 °C, [m]
    temperature : float
        Temperature of the part, [°C]
    expansion : MeanExpansion
        Mean coefficient from 20 °C to a temperature, [1/K]

    Returns
    -------
    float
        Diameter at that temperature, [m]

    Raises
    ------
    OutOfRangeError
        If the diameter is not positive.

    Notes
    -----
    At 20 °C the coefficient is not asked for: a table that begins above it serves all the same.

    Examples
    --------
    A steel bore of 100 mm at 120 °C, 12 µm per metre and kelvin:

    >>> diameter_at(diameter=0.100, temperature=120.0, expansion=lambda temperature: 12e-6)
    0.10012

    References
    ----------
    ISO 1, standard reference temperature, 20 °C; from memory.
    """
    if not diameter > 0.0:
        raise OutOfRangeError("diameter", diameter, "be positive")
    if temperature == REFERENCE_TEMPERATURE:
        return diameter
    return diameter * (1.0 + expansion(temperature) * (temperature - REFERENCE_TEMPERATURE))


def coefficient_from_other_base(
    *,
    temperature: float,
    expansion_from_table_base: MeanExpansion,
    table_base: float,
    base: float = REFERENCE_TEMPERATURE,
) -> float:
    r"""Mean coefficient from one base temperature out of a table that counts from another.

    The growth from the new base is the growth from the table's base to the temperature, less that
    to the new base; divided by the temperature difference it is the mean coefficient wanted:

    .. math:: \bar\alpha_n(T) = \frac{\bar\alpha_b(T) (T - b) - \bar\alpha_b(n) (n - b)}{T - n}

    Parameters
    ----------
    temperature : float
        Temperature to which the coefficient runs, :math:`T`, [°C]
    expansion_from_table_base : MeanExpansion
        Mean coefficient from the table's base to a temperature, :math:`\bar\alpha_b`, [1/K]
    table_base : float
        Temperature from which the table counts, :math:`b`, [°C]
    base : float, optional
        Temperature from which the result counts, :math:`n`, [°C]

    Returns
    -------
    float
        Mean coefficient from the base to the temperature, [1/K]

    Raises
    ------
    OutOfRangeError
        If the temperature is the base itself, where no mean exists.

    Notes
    -----
    Both growths are per unit of the length at the table's base; the length at the new base differs
    from it by about 1 part in 10 000 for 10 K, far below the spread of published coefficients.

    Examples
    --------
    A coefficient of 10 from 0 °C to 20 °C and 12 from 0 °C to 120 °C: the growth from 20 °C to
    120 °C is 1440 − 200 = 1240 µm/m over 100 K:

    >>> coefficient_from_other_base(
    ...     temperature=120.0, table_base=0.0,
    ...     expansion_from_table_base=lambda at: 10e-6 if at < 100.0 else 12e-6)
    1.24e-05

    References
    ----------
    ASME B31.3, Table C, mean coefficients from 70 °F, in a posted worked example of the expansion
    from 50 °F to 350 °F (the standard itself was not read).
    """
    if temperature == base:
        raise OutOfRangeError("temperature", temperature, "differ from the base")
    to_temperature = expansion_from_table_base(temperature) * (temperature - table_base)
    to_base = 0.0 if base == table_base else expansion_from_table_base(base) * (base - table_base)
    return (to_temperature - to_base) / (temperature - base)


def mean_of_instantaneous(
    *,
    instantaneous: Callable[[float], float],
    temperature: float,
    base: float = REFERENCE_TEMPERATURE,
) -> float:
    r"""Mean coefficient between two temperatures from a coefficient that holds at each one.

    .. math:: \bar\alpha = \frac{1}{T - b} \int_b^T \alpha \, \mathrm{d}T

    Parameters
    ----------
    instantaneous : Callable[[float], float]
        Coefficient that holds at a temperature, [1/K]
    temperature : float
        Temperature to which the mean runs, :math:`T`, [°C]
    base : float, optional
        Temperature from which the mean counts, :math:`b`, [°C]

    Returns
    -------
    float
        Mean coefficient between the two; the coefficient itself where they are one, [1/K]

    Notes
    -----
    Gauss-Legendre quadrature with eight points: exact for the polynomials in which such
    coefficients are published, not for a table with kinks.

    Examples
    --------
    A coefficient that rises from 12 at 20 °C to 14 at 220 °C in a straight line:

    >>> mean_of_instantaneous(
    ...     instantaneous=lambda at: 12e-6 + (at - 20.0) * 1e-8, temperature=220.0)
    1.3e-05

    References
    ----------
    Any text on numerical integration, Gauss-Legendre quadrature; from memory.
    """
    half = (temperature - base) / 2.0
    middle = (temperature + base) / 2.0
    values = [instantaneous(float(middle + half * node)) for node in _NODES]
    return float(np.dot(_WEIGHTS, values)) / 2.0


def area_weighted_mean_temperature(
    *, radii: Sequence[float], temperatures: Sequence[float]
) -> float:
    r"""Temperature at which a free disc's bore has grown as much as it has.

    The bore of a free annular disc grows by :math:`\bar\alpha \, d \, (\bar T - 20)` whatever the
    radial profile, with the mean taken over the area of the disc:

    .. math:: \bar T = \frac{2}{b^2 - a^2} \int_a^b T \, r \, \mathrm{d}r

    Parameters
    ----------
    radii : Sequence[float]
        Radii at which the temperature is known, from bore to rim, shape (n,), [m]
    temperatures : Sequence[float]
        Temperatures at these radii, straight lines between them, shape (n,), [°C]

    Returns
    -------
    float
        Mean temperature over the area, [°C]

    Raises
    ------
    OutOfRangeError
        If there are fewer than two radii, they do not rise, the first is negative, or the
        temperatures are not as many.

    Notes
    -----
    Holds for a disc of one thickness, free at bore and rim, with one coefficient throughout. A hot
    bore in a cool disc opens far less than its own temperature says; so the bore is gauged.

    Examples
    --------
    A bore of 75 mm radius 300 K warm, a rim of 250 mm radius 100 K warm:

    >>> area_weighted_mean_temperature(radii=[0.075, 0.250], temperatures=[300.0, 100.0])
    182.05

    References
    ----------
    S. P. Timoshenko, J. N. Goodier, Theory of Elasticity, thermal stress in a circular disc; from
    memory, and checked against a radial solution in the tests.
    """
    radius = np.asarray(radii, dtype=float)
    temperature = np.asarray(temperatures, dtype=float)
    if radius.ndim != 1 or radius.size < 2:
        raise OutOfRangeError("radii", radii, "hold at least two radii")
    if not (radius[0] >= 0.0 and bool(np.all(np.diff(radius) > 0.0))):
        raise OutOfRangeError("radii", radii, "rise from bore to rim, none negative")
    if temperature.shape != radius.shape:
        raise OutOfRangeError("temperatures", temperatures, "be as many as the radii")
    inner, outer = radius[:-1], radius[1:]
    moments = temperature[:-1] * (2.0 * inner + outer) + temperature[1:] * (inner + 2.0 * outer)
    integral = float(np.sum((outer - inner) * moments)) / 6.0
    return 2.0 * integral / float(radius[-1] ** 2 - radius[0] ** 2)
