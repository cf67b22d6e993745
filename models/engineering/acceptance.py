"""Limits of final acceptance that some published text gives, each for the machines it was made for.

A limit here is an offer with its origin; the one that binds stands in the plan.
"""

import math
from dataclasses import dataclass

from models.engineering.ranges import demand_positive

__all__ = [
    "COMPRESSOR_TRIP_EXTENSION",
    "RESIDUAL_MAGNETISM_LIMIT",
    "THRUST_COLLAR_FACE_RUNOUT_LIMIT",
    "PumpRunoutLimits",
    "SourcedLimit",
    "compressor_probe_runout_limit",
    "compressor_trip_vibration_limit",
    "compressor_vibration_limit",
    "pedestal_velocity_limit",
    "pump_runout_limits",
    "pump_runout_subtraction_limit",
    "pump_trip_vibration_limit",
    "steam_turbine_vibration_limit",
]

_REVOLUTION_PER_MINUTE = 2.0 * math.pi / 60.0
_MIL = 25.4e-6


@dataclass(frozen=True)
class SourcedLimit:
    """A limit with its unit and where it comes from."""

    value: float
    """The limit, in `unit`"""
    unit: str
    """SI unit of the value"""
    source: str
    """Where it comes from, and whether anybody opened it"""


RESIDUAL_MAGNETISM_LIMIT = SourcedLimit(
    value=2.0e-4,
    unit="T",
    source="within ± 2 gauss after magnetic-particle work: API RP 687, from memory and as reported "
    "by secondary texts",
)
"""Largest residual flux density in either sense, read in free air, [T]."""

THRUST_COLLAR_FACE_RUNOUT_LIMIT = SourcedLimit(
    value=12.7e-6,
    unit="m",
    source="0.0005 in total on either face, mounted: API 617 and 612, from memory",
)
"""Largest total reading on a mounted thrust collar's face, [m]."""

COMPRESSOR_TRIP_EXTENSION = SourcedLimit(
    value=12.7e-6,
    unit="m",
    source="0.5 mil peak to peak above the limit at maximum continuous speed: API 617, from memory",
)
"""What a compressor's vibration limit grows by between maximum continuous and trip speed, [m]."""


@dataclass(frozen=True)
class PumpRunoutLimits:
    """Largest total readings of a pump's shaft and assembled rotor."""

    shaft: float
    """Bare shaft, [m]"""
    rotor_with_clearance_fits: float
    """Hubs and sleeves fitted with clearance, [m]"""
    rotor_with_interference_fits: float
    """Hubs and sleeves fitted with interference, [m]"""
    flexible: bool
    """Whether the shaft counts as flexible"""
    source: str
    """Where the limits come from"""


_PUMP_SOURCE = (
    "API 610, 11th edition, table 9: clearance columns as two pump makers' manuals print them, "
    "interference column and the sense of the dividing value from memory"
)
_FLEXIBLE_ABOVE = 1.9e9 * 1e-6
_FLEXIBLE_PUMP = PumpRunoutLimits(
    shaft=40e-6,
    rotor_with_clearance_fits=90e-6,
    rotor_with_interference_fits=60e-6,
    flexible=True,
    source=_PUMP_SOURCE,
)
_STIFF_PUMP = PumpRunoutLimits(
    shaft=25e-6,
    rotor_with_clearance_fits=75e-6,
    rotor_with_interference_fits=50e-6,
    flexible=False,
    source=_PUMP_SOURCE,
)


def _root_of_twelve_thousand(maximum_continuous_speed: float) -> float:
    demand_positive("maximum_continuous_speed", maximum_continuous_speed)
    return _MIL * math.sqrt(12_000.0 * _REVOLUTION_PER_MINUTE / maximum_continuous_speed)


def steam_turbine_vibration_limit(*, maximum_continuous_speed: float) -> float:
    r"""Vibration limit of a steam turbine's shaft on test, unfiltered, peak to peak.

    .. math:: A = \min\left(25.4\,\sqrt{12\,000/N},\ 50\right)\ \text{µm}, \quad N\ \text{in r/min}

    Parameters
    ----------
    maximum_continuous_speed : float
        Maximum continuous speed, :math:`N`, [rad/s]

    Returns
    -------
    amplitude : float
        Limit, peak to peak; whichever is **less**, [m]

    Raises
    ------
    OutOfRangeError
        If the speed is not positive.

    Notes
    -----
    The compressor's text has the same root and half the cap.

    Examples
    --------
    At 4 · 12 000 r/min the root is ½:

    >>> from math import pi
    >>> steam_turbine_vibration_limit(maximum_continuous_speed=48_000 * 2 * pi / 60) * 1e6
    12.7

    References
    ----------
    H. P. Bloch, M. P. Singh, Steam Turbines: Design, Applications, and Rerating, 2nd edition, 4.8,
    p. 94.
    """
    return min(_root_of_twelve_thousand(maximum_continuous_speed), 50e-6)


def compressor_vibration_limit(*, maximum_continuous_speed: float) -> float:
    r"""Vibration limit of a compressor's shaft on test, unfiltered, peak to peak.

    .. math::

        A = \min\left(25.4\,\sqrt{12\,000/N},\ 25.4\right)\ \text{µm}, \quad N\ \text{in r/min}

    Parameters
    ----------
    maximum_continuous_speed : float
        Maximum continuous speed, :math:`N`, [rad/s]

    Returns
    -------
    amplitude : float
        Limit, peak to peak; whichever is **less**, [m]

    Raises
    ------
    OutOfRangeError
        If the speed is not positive.

    Notes
    -----
    The cap means that the root counts above 12 000 r/min only.

    Examples
    --------
    >>> from math import pi
    >>> compressor_vibration_limit(maximum_continuous_speed=8000 * 2 * pi / 60) * 1e6
    25.4

    References
    ----------
    API 617, 7th edition, 2.6.8, from memory.
    """
    return min(_root_of_twelve_thousand(maximum_continuous_speed), _MIL)


def pump_trip_vibration_limit(*, limit_at_maximum_continuous: float) -> float:
    r"""Vibration limit of a pump between maximum continuous and trip speed.

    .. math:: A_\text{trip} = 1.5\, A

    Parameters
    ----------
    limit_at_maximum_continuous : float
        Limit at maximum continuous speed, :math:`A`, [m]

    Returns
    -------
    amplitude : float
        Limit up to trip speed, in the same sense, [m]

    Raises
    ------
    OutOfRangeError
        If the limit is not positive.

    Examples
    --------
    >>> pump_trip_vibration_limit(limit_at_maximum_continuous=40e-6) * 1e6
    60.0

    References
    ----------
    API 610, 6.9.4.7.
    """
    demand_positive("limit_at_maximum_continuous", limit_at_maximum_continuous)
    return 1.5 * limit_at_maximum_continuous


def compressor_trip_vibration_limit(*, limit_at_maximum_continuous: float) -> float:
    r"""Vibration limit of a compressor between maximum continuous and trip speed.

    .. math:: A_\text{trip} = A + 12.7\ \text{µm}

    Parameters
    ----------
    limit_at_maximum_continuous : float
        Limit at maximum continuous speed, peak to peak, :math:`A`, [m]

    Returns
    -------
    amplitude : float
        Limit up to trip speed, peak to peak, [m]

    Raises
    ------
    OutOfRangeError
        If the limit is not positive.

    Examples
    --------
    >>> compressor_trip_vibration_limit(limit_at_maximum_continuous=25.4e-6) * 1e6
    38.1

    References
    ----------
    API 617, from memory.
    """
    demand_positive("limit_at_maximum_continuous", limit_at_maximum_continuous)
    return limit_at_maximum_continuous + COMPRESSOR_TRIP_EXTENSION.value


def compressor_probe_runout_limit(*, vibration_limit: float) -> float:
    r"""Largest electrical and mechanical runout of a compressor's probe track.

    .. math:: r = \max\left(0.25\, A,\ 6\ \text{µm}\right)

    Parameters
    ----------
    vibration_limit : float
        Vibration limit, peak to peak, :math:`A`, [m]

    Returns
    -------
    runout : float
        Limit, peak to peak; whichever is **greater**, [m]

    Raises
    ------
    OutOfRangeError
        If the vibration limit is not positive.

    Notes
    -----
    A limit of what the track may show, not of what may be subtracted; the pump's text says less.

    Examples
    --------
    >>> compressor_probe_runout_limit(vibration_limit=20e-6) * 1e6
    6.0

    References
    ----------
    API 617 and 612, from memory.
    """
    demand_positive("vibration_limit", vibration_limit)
    return max(0.25 * vibration_limit, 6e-6)


def pump_runout_subtraction_limit(*, vibration_limit: float) -> float:
    r"""Largest runout that may be subtracted, as a vector, from a pump's vibration.

    .. math:: r = \min\left(0.25\, A,\ 6.5\ \text{µm}\right)

    Parameters
    ----------
    vibration_limit : float
        Vibration limit, peak to peak, :math:`A`, [m]

    Returns
    -------
    runout : float
        Limit, peak to peak; whichever is **less**, [m]

    Raises
    ------
    OutOfRangeError
        If the vibration limit is not positive.

    Examples
    --------
    >>> pump_runout_subtraction_limit(vibration_limit=20e-6) * 1e6
    5.0

    References
    ----------
    API 610, 6.9.4.9.
    """
    demand_positive("vibration_limit", vibration_limit)
    return min(0.25 * vibration_limit, 6.5e-6)


def pedestal_velocity_limit(*, maximum_continuous_speed: float) -> float:
    r"""Vibration velocity of a pedestal that a balance at speed may leave, root mean square.

    .. math::

        v = \begin{cases}
            2.5\ \text{mm/s} & N \le 3000\ \text{r/min} \\
            \max(7400/N,\ 1)\ \text{mm/s} & N > 3000\ \text{r/min}
        \end{cases}

    Parameters
    ----------
    maximum_continuous_speed : float
        Maximum continuous speed, :math:`N`, [rad/s]

    Returns
    -------
    velocity : float
        Limit, root mean square; above 3000 r/min whichever is **greater**, [m/s]

    Raises
    ------
    OutOfRangeError
        If the speed is not positive.

    Notes
    -----
    The two ranges differ by 1 % where they meet, 2.47 against 2.5 mm/s.

    Examples
    --------
    >>> from math import pi
    >>> pedestal_velocity_limit(maximum_continuous_speed=3700 * 2 * pi / 60) * 1e3
    2.0

    References
    ----------
    API 617, 7th edition, and API 612, from memory.
    """
    demand_positive("maximum_continuous_speed", maximum_continuous_speed)
    revolutions = maximum_continuous_speed / _REVOLUTION_PER_MINUTE
    # A speed of 3000 r/min comes back from radians a rounding above itself.
    if revolutions <= 3000.0 * (1.0 + 1e-9):
        return 2.5e-3
    return max(7400.0 / revolutions, 1.0) * 1e-3


def pump_runout_limits(*, flexibility_factor: float) -> PumpRunoutLimits:
    r"""Runout limits of a pump's shaft and rotor by the flexibility of the shaft.

    .. math:: F = L^4 / D^2, \qquad \text{flexible if}\ F > 1.9\cdot10^9\ \text{mm}^2

    Parameters
    ----------
    flexibility_factor : float
        Flexibility factor, see `shaft.flexibility_factor`, :math:`F`, [m²]

    Returns
    -------
    limits : PumpRunoutLimits
        Largest total readings with their origin, [m]

    Raises
    ------
    OutOfRangeError
        If the factor is not positive.

    Notes
    -----
    Two manuals of one maker print the same condition above opposite limits. The stiffer shaft has
    the closer ones here, from memory.

    Examples
    --------
    >>> limits = pump_runout_limits(flexibility_factor=1296.0)
    >>> limits.shaft * 1e6, limits.rotor_with_interference_fits * 1e6
    (25.0, 50.0)

    References
    ----------
    API 610, 11th edition, table 9, from memory and as two pump makers' manuals print it.
    """
    demand_positive("flexibility_factor", flexibility_factor)
    return _FLEXIBLE_PUMP if flexibility_factor > _FLEXIBLE_ABOVE else _STIFF_PUMP
