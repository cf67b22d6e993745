"""How hot a bore must be to clear its seat."""

from models.engineering.errors import OutOfRangeError
from models.engineering.expansion import REFERENCE_TEMPERATURE, MeanExpansion, diameter_at

__all__ = ["gauge_diameter", "opening", "target_temperature"]

_SEARCH_STEP = 10.0


def opening(
    *,
    bore_diameter: float,
    seat_diameter: float,
    mean_bore_temperature: float,
    shaft_temperature: float,
    part_expansion: MeanExpansion,
    shaft_expansion: MeanExpansion,
) -> float:
    r"""Diametral clearance between a bore and its seat, each at its own temperature.

    .. math:: c = D_b [1 + \bar\alpha_p (T_b - 20)] - D_s [1 + \bar\alpha_s (T_s - 20)]

    Parameters
    ----------
    bore_diameter : float
        Bore at 20 °C, :math:`D_b`, [m]
    seat_diameter : float
        Seat at 20 °C, :math:`D_s`, [m]
    mean_bore_temperature : float
        Temperature of the part, or the mean over its area where it is uneven, :math:`T_b`, [°C]
    shaft_temperature : float
        Temperature of the shaft at the seat, :math:`T_s`, [°C]
    part_expansion : MeanExpansion
        Mean coefficient of the part from 20 °C to a temperature, :math:`\bar\alpha_p`, [1/K]
    shaft_expansion : MeanExpansion
        Mean coefficient of the shaft from 20 °C to a temperature, :math:`\bar\alpha_s`, [1/K]

    Returns
    -------
    float
        Clearance on diameter; negative where the parts still interfere, [m]

    Raises
    ------
    OutOfRangeError
        If a diameter is not positive.

    Notes
    -----
    The part is free and the seat solid, both round. A bore that is hotter than its disc opens less
    than its own temperature says: `expansion.area_weighted_mean_temperature` gives the temperature
    to use.

    Examples
    --------
    100 mm with 100 µm interference, part at 220 °C, shaft at 20 °C, 12 µm/(m·K): the bore grows
    240 µm, of which the interference takes 100:

    >>> steel = lambda temperature: 12e-6
    >>> opening(
    ...     bore_diameter=0.1000, seat_diameter=0.1001, mean_bore_temperature=220.0,
    ...     shaft_temperature=20.0, part_expansion=steel, shaft_expansion=steel)
    0.000140

    References
    ----------
    H. P. Bloch, Improving Machinery Reliability, pp. 218-219: growth e/α above shaft temperature.
    """
    bore = _hot("bore_diameter", bore_diameter, mean_bore_temperature, part_expansion)
    seat = _hot("seat_diameter", seat_diameter, shaft_temperature, shaft_expansion)
    return bore - seat


def target_temperature(
    *,
    greatest_interference: float,
    clearance: float,
    diameter: float,
    shaft_temperature: float,
    part_expansion: MeanExpansion,
    shaft_expansion: MeanExpansion,
    expansion_spread: float = 0.0,
    search_limit: float = 450.0,
) -> float:
    r"""Temperature a bore must reach to clear its seat by a given clearance.

    The lowest :math:`T \ge 20` °C at which the bore has grown by the interference, the clearance
    and what the shaft's own temperature adds:

    .. math::

        (1 - s) \, \bar\alpha_p(T) \, (T - 20) \, d \ge \Delta + c
          + (d + \Delta) [\bar\alpha_s (T_s - 20) + s |\bar\alpha_s (T_s - 20)|]

    Parameters
    ----------
    greatest_interference : float
        Greatest measured interference on diameter at 20 °C, :math:`\Delta`, [m]
    clearance : float
        Clearance on diameter wanted for the mount, :math:`c`, [m]
    diameter : float
        Bore at 20 °C, :math:`d`, [m]
    shaft_temperature : float
        Temperature of the shaft at the seat, :math:`T_s`, [°C]
    part_expansion : MeanExpansion
        Mean coefficient of the part from 20 °C to a temperature, :math:`\bar\alpha_p`, [1/K]
    shaft_expansion : MeanExpansion
        Mean coefficient of the shaft from 20 °C to a temperature, :math:`\bar\alpha_s`, [1/K]
    expansion_spread : float, optional
        Relative doubt of the coefficients, each taken to its adverse side, :math:`s`, [-]
    search_limit : float, optional
        Temperature beyond which no solution is looked for, [°C]

    Returns
    -------
    float
        Temperature the whole part, or its mean over the area, must reach; 20 where the bore clears
        its seat unheated, [°C]

    Raises
    ------
    OutOfRangeError
        If no temperature up to the search limit opens the bore, the diameter is not positive, the
        clearance is negative, or the spread is not between 0 and 1.

    Notes
    -----
    Solved step by step because the coefficient rises with temperature. The search limit is no
    permission: `heat_limits.highest_temperature` says how hot the part may be. Published
    coefficients of one steel differ by ± 8 %, hence the spread.

    Examples
    --------
    4 in with 0.0015 in/in interference and 0.0005 in/in clearance, 6.3e-6 per °F: 317 °F, which is
    176 K, above a shaft at 20 °C:

    >>> steel = lambda temperature: 6.3e-6 * 1.8
    >>> target_temperature(
    ...     greatest_interference=0.0015 * 0.1016, clearance=0.0005 * 0.1016, diameter=0.1016,
    ...     shaft_temperature=20.0, part_expansion=steel, shaft_expansion=steel)
    196.4

    References
    ----------
    H. P. Bloch, Improving Machinery Reliability, eq. 3-12 and pp. 218-219.
    """
    if not clearance >= 0.0:
        raise OutOfRangeError("clearance", clearance, "not be negative")
    if not 0.0 <= expansion_spread < 1.0:
        raise OutOfRangeError("expansion_spread", expansion_spread, "lie between 0 and 1")
    if not diameter > 0.0:
        raise OutOfRangeError("diameter", diameter, "be positive")
    seat = diameter + greatest_interference
    shaft_growth = (
        _hot("diameter + greatest_interference", seat, shaft_temperature, shaft_expansion) - seat
    )
    needed = greatest_interference + clearance + shaft_growth
    needed += expansion_spread * abs(shaft_growth)

    def missing(temperature: float) -> float:
        growth = part_expansion(temperature) * (temperature - REFERENCE_TEMPERATURE) * diameter
        return needed - (1.0 - expansion_spread) * growth

    if needed <= 0.0:
        return REFERENCE_TEMPERATURE
    # The search climbs, and so asks a material only for temperatures that are needed: its table
    # may end below the search limit.
    low = high = REFERENCE_TEMPERATURE
    while high < search_limit:
        low, high = high, min(high + _SEARCH_STEP, search_limit)
        if missing(high) <= 0.0:
            break
    else:
        raise OutOfRangeError(
            "greatest_interference",
            greatest_interference,
            f"be opened by heating to no more than {search_limit:g} °C",
        )
    for _ in range(60):
        middle = (low + high) / 2.0
        low, high = (middle, high) if missing(middle) > 0.0 else (low, middle)
    return high


def gauge_diameter(
    *,
    seat_diameter: float,
    shaft_temperature: float,
    shaft_expansion: MeanExpansion,
    clearance: float,
) -> float:
    r"""Size of the gauge that a hot bore must let through before the part may go on.

    .. math:: D_g = D_s [1 + \bar\alpha_s (T_s - 20)] + c

    Parameters
    ----------
    seat_diameter : float
        Greatest measured diameter of the seat at 20 °C, :math:`D_s`, [m]
    shaft_temperature : float
        Temperature of the shaft at the seat, :math:`T_s`, [°C]
    shaft_expansion : MeanExpansion
        Mean coefficient of the shaft from 20 °C to a temperature, :math:`\bar\alpha_s`, [1/K]
    clearance : float
        Clearance on diameter wanted for the mount, :math:`c`, [m]

    Returns
    -------
    float
        Diameter of the gauge when it is tried, [m]

    Raises
    ------
    OutOfRangeError
        If the seat's diameter is not positive or the clearance is negative.

    Notes
    -----
    A gauge that warms in the bore grows and passes less easily, so it errs on the safe side.

    Examples
    --------
    A seat of 100.1 mm at 20 °C and a clearance of 0.1 mm:

    >>> gauge_diameter(
    ...     seat_diameter=0.1001, shaft_temperature=20.0,
    ...     shaft_expansion=lambda temperature: 12e-6, clearance=0.0001)
    0.1002

    References
    ----------
    Common practice.
    """
    if not clearance >= 0.0:
        raise OutOfRangeError("clearance", clearance, "not be negative")
    return _hot("seat_diameter", seat_diameter, shaft_temperature, shaft_expansion) + clearance


def _hot(name: str, diameter: float, temperature: float, expansion: MeanExpansion) -> float:
    if not diameter > 0.0:
        raise OutOfRangeError(name, diameter, "be positive")
    return diameter_at(diameter=diameter, temperature=temperature, expansion=expansion)
