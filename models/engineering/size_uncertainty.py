"""How well a diameter, and the interference of two, is known."""

import math
from dataclasses import dataclass

from models.engineering.errors import OutOfRangeError
from models.engineering.ranges import demand_not_negative
from models.engineering.sizes import REFERENCE_TEMPERATURE, diameter_at_reference

__all__ = ["SizeMeasurement", "interference_uncertainty", "size_uncertainty"]


@dataclass(frozen=True)
class SizeMeasurement:
    """One measured diameter with the standard uncertainty of everything that enters it."""

    diameter: float
    """Diameter as read [m]."""
    part_temperature: float
    """Temperature of the part [°C]."""
    part_expansion: float
    """Mean expansion coefficient of the part from 20 °C [1/K]."""
    gauge_temperature: float
    """Temperature of the instrument [°C]."""
    gauge_expansion: float
    """Mean expansion coefficient of the instrument [1/K]."""
    instrument_uncertainty: float
    """Standard uncertainty of the instrument, setting master included [m]."""
    repeatability: float
    """Standard uncertainty of the mean of the repeated readings [m]."""
    part_temperature_uncertainty: float
    """Standard uncertainty of the part's temperature [K]."""
    gauge_temperature_uncertainty: float
    """Standard uncertainty of the instrument's temperature [K]."""
    part_expansion_uncertainty: float
    """Standard uncertainty of the part's coefficient [1/K]."""
    gauge_expansion_uncertainty: float
    """Standard uncertainty of the instrument's coefficient [1/K]."""


@dataclass(frozen=True)
class _Shares:
    instrument: float
    expansion: float
    rest: float


def size_uncertainty(*, measurement: SizeMeasurement) -> float:
    r"""Combine what makes a diameter at 20 °C doubtful into its standard uncertainty.

    Each input's standard uncertainty times its sensitivity, added as squares:

    .. math::

        u^2(D_{20}) = \sum_i \left(\frac{\partial D_{20}}{\partial x_i}\right)^2 u^2(x_i)

    Parameters
    ----------
    measurement : SizeMeasurement
        The diameter as read and what is known of it, [m]

    Returns
    -------
    uncertainty : float
        Standard uncertainty at 20 °C (k = 1), [m]

    Raises
    ------
    OutOfRangeError
        If an uncertainty is negative or the diameter cannot be brought to 20 °C.

    Notes
    -----
    First order: a coefficient's uncertainty counts by how far the part is from 20 °C, and not at
    all at 20 °C.

    Examples
    --------
    3 µm from the instrument and 4 µm from repeating it, all else exact, make 5 µm:

    >>> at_20 = SizeMeasurement(
    ...     diameter=0.150, part_temperature=20.0, part_expansion=11.5e-6, gauge_temperature=20.0,
    ...     gauge_expansion=11.5e-6, instrument_uncertainty=3e-6, repeatability=4e-6,
    ...     part_temperature_uncertainty=0.0, gauge_temperature_uncertainty=0.0,
    ...     part_expansion_uncertainty=0.0, gauge_expansion_uncertainty=0.0)
    >>> size_uncertainty(measurement=at_20)
    5e-06

    References
    ----------
    .. [1] JCGM 100:2008, Guide to the expression of uncertainty in measurement, 5.1.2, from memory.
    """
    shares = _shares(measurement)
    return math.hypot(shares.instrument, shares.expansion, shares.rest)


def interference_uncertainty(
    *,
    seat: SizeMeasurement,
    bore: SizeMeasurement,
    instrument_correlation: float = 0.0,
    expansion_correlation: float = 0.0,
) -> float:
    r"""Combine what makes an interference doubtful into its standard uncertainty.

    What both diameters have in common cancels in their difference:

    .. math::

        u^2(\Delta) = u_s^2 + u_b^2 - 2 r_i\,u_{i,s} u_{i,b} - 2 r_\alpha\,u_{\alpha,s} u_{\alpha,b}

    Parameters
    ----------
    seat : SizeMeasurement
        The seat's diameter as read and what is known of it, [m]
    bore : SizeMeasurement
        The bore's diameter as read and what is known of it, [m]
    instrument_correlation : float
        Correlation of the instruments' errors, :math:`r_i`: 0 for two instruments calibrated
        independently, towards 1 where the bore gauge is set with the micrometer that measures the
        seat, [-]
    expansion_correlation : float
        Correlation of the parts' coefficients, :math:`r_\alpha`: towards 1 for two parts of one
        steel, [-]

    Returns
    -------
    uncertainty : float
        Standard uncertainty (k = 1), [m]

    Raises
    ------
    OutOfRangeError
        If a correlation lies outside −1 to 1, or a measurement is refused by `size_uncertainty`.

    Notes
    -----
    The difference of the two temperatures matters most: 1 K between hub and shaft of 150 mm is
    1.7 µm. Temperatures are taken as independent, also when one thermometer read both; that errs to
    the safe side.

    Examples
    --------
    Seat and bore known to 3 µm and 4 µm independently: 5 µm; with errors wholly in common, 1 µm.

    >>> seat = SizeMeasurement(
    ...     diameter=0.150, part_temperature=20.0, part_expansion=11.5e-6, gauge_temperature=20.0,
    ...     gauge_expansion=11.5e-6, instrument_uncertainty=3e-6, repeatability=0.0,
    ...     part_temperature_uncertainty=0.0, gauge_temperature_uncertainty=0.0,
    ...     part_expansion_uncertainty=0.0, gauge_expansion_uncertainty=0.0)
    >>> from dataclasses import replace
    >>> bore = replace(seat, instrument_uncertainty=4e-6)
    >>> interference_uncertainty(seat=seat, bore=bore)
    5e-06
    >>> interference_uncertainty(seat=seat, bore=bore, instrument_correlation=1.0)
    1e-06

    References
    ----------
    .. [1] JCGM 100:2008, Guide to the expression of uncertainty in measurement, 5.1.2 and 5.2.2,
       from memory.
    """
    for name, correlation in (
        ("instrument_correlation", instrument_correlation),
        ("expansion_correlation", expansion_correlation),
    ):
        if not -1.0 <= correlation <= 1.0:
            raise OutOfRangeError(name, correlation, "lie between -1 and 1")
    of_seat, of_bore = _shares(seat), _shares(bore)
    variance = (
        _difference_variance(of_seat.instrument, of_bore.instrument, instrument_correlation)
        + _difference_variance(of_seat.expansion, of_bore.expansion, expansion_correlation)
        + of_seat.rest**2
        + of_bore.rest**2
    )
    return math.sqrt(variance)


def _difference_variance(first: float, second: float, correlation: float) -> float:
    # Written so that rounding never makes it negative, as first² + second² − 2 r … can become.
    return (first - second) ** 2 + 2.0 * (1.0 - correlation) * first * second


def _shares(measurement: SizeMeasurement) -> _Shares:
    for name in (
        "instrument_uncertainty",
        "repeatability",
        "part_temperature_uncertainty",
        "gauge_temperature_uncertainty",
        "part_expansion_uncertainty",
        "gauge_expansion_uncertainty",
    ):
        demand_not_negative(name, getattr(measurement, name))
    at_reference = diameter_at_reference(
        diameter=measurement.diameter,
        part_temperature=measurement.part_temperature,
        part_expansion=measurement.part_expansion,
        gauge_temperature=measurement.gauge_temperature,
        gauge_expansion=measurement.gauge_expansion,
    )
    scale = at_reference / measurement.diameter
    part_rise = measurement.part_temperature - REFERENCE_TEMPERATURE
    gauge_rise = measurement.gauge_temperature - REFERENCE_TEMPERATURE
    per_part = at_reference / (1.0 + measurement.part_expansion * part_rise)
    per_gauge = at_reference / (1.0 + measurement.gauge_expansion * gauge_rise)
    return _Shares(
        instrument=scale * measurement.instrument_uncertainty,
        # Signed, because parts on opposite sides of 20 °C feel one coefficient opposite ways.
        expansion=per_part * part_rise * measurement.part_expansion_uncertainty,
        rest=math.hypot(
            scale * measurement.repeatability,
            per_part * measurement.part_expansion * measurement.part_temperature_uncertainty,
            per_gauge * measurement.gauge_expansion * measurement.gauge_temperature_uncertainty,
            per_gauge * gauge_rise * measurement.gauge_expansion_uncertainty,
        ),
    )
