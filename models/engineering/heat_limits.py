"""How hot a part may be, how it is proved, and how cold a shaft may be made."""

from dataclasses import dataclass

from models.engineering.errors import OutOfRangeError
from models.engineering.expansion import REFERENCE_TEMPERATURE, MeanExpansion, diameter_at

__all__ = ["ThermometerSpan", "chilled_diameter", "highest_temperature", "thermometer_span"]


@dataclass(frozen=True, kw_only=True)
class ThermometerSpan:
    """Readings of one thermometer that prove a bore hot enough and not too hot."""

    least_reading: float
    """Lowest reading that proves the bore has reached its target [°C]."""
    greatest_reading: float
    """Highest reading that proves the part has not passed its limit [°C]."""
    width: float
    """Greatest less least; negative where no reading proves both [K]."""


def highest_temperature(
    *,
    plan_limit: float | None,
    tempering_temperature: float | None,
    tempering_margin: float,
) -> float | None:
    """Temperature a part must not pass: the plan's, else the tempering one less a margin.

    Formula: the plan's limit where it gives one, else tempering temperature − margin.

    Parameters
    ----------
    plan_limit : float | None
        Limit that the plan gives, None where it gives none, [°C]
    tempering_temperature : float | None
        Last tempering temperature of the part, None where it is not known, [°C]
    tempering_margin : float
        What to stay below the tempering temperature, [K]

    Returns
    -------
    float | None
        Highest temperature allowed; None where neither source is known, which is *not judged*, [°C]

    Raises
    ------
    OutOfRangeError
        If the margin is negative.

    Notes
    -----
    Nothing may be derived for coated, hard-faced, brazed, plated or aluminium parts or ones that
    hold elastomers: give no tempering temperature for them, and only the plan's limit counts.

    Examples
    --------
    Tempered at 550 °C, 50 K kept below it:

    >>> highest_temperature(plan_limit=None, tempering_temperature=550.0, tempering_margin=50.0)
    500.0
    >>> highest_temperature(plan_limit=315.0, tempering_temperature=550.0, tempering_margin=50.0)
    315.0

    References
    ----------
    Data sheets of 42CrMo4 put stress relief 50 °C below the tempering temperature.
    """
    if not tempering_margin >= 0.0:
        raise OutOfRangeError("tempering_margin", tempering_margin, "not be negative")
    if plan_limit is not None:
        return plan_limit
    if tempering_temperature is not None:
        return tempering_temperature - tempering_margin
    return None


def thermometer_span(
    *, target: float, highest: float, thermometer_uncertainty: float
) -> ThermometerSpan:
    """Span of readings that prove a bore both hot enough and not too hot.

    Formula: least = target + U, greatest = highest allowed − U, with U the thermometer's expanded
    uncertainty.

    Parameters
    ----------
    target : float
        Temperature the bore must reach, [°C]
    highest : float
        Temperature the part must not pass, [°C]
    thermometer_uncertainty : float
        Expanded uncertainty of one reading, [K]

    Returns
    -------
    ThermometerSpan
        Least and greatest reading [°C] and the width between them [K]

    Raises
    ------
    OutOfRangeError
        If the uncertainty is negative.

    Notes
    -----
    A negative width is a finding, not an error: the needed temperature lies too close to the
    allowed one, or above it, for this thermometer to prove both.

    Examples
    --------
    200 °C needed, 300 °C allowed, read to ± 5 K:

    >>> thermometer_span(target=200.0, highest=300.0, thermometer_uncertainty=5.0)
    ThermometerSpan(least_reading=205.0, greatest_reading=295.0, width=90.0)

    References
    ----------
    ISO 14253-1, the uncertainty counts against whoever has to prove; from memory.
    """
    if not thermometer_uncertainty >= 0.0:
        raise OutOfRangeError("thermometer_uncertainty", thermometer_uncertainty, "not be negative")
    least = target + thermometer_uncertainty
    greatest = highest - thermometer_uncertainty
    return ThermometerSpan(least_reading=least, greatest_reading=greatest, width=greatest - least)


def chilled_diameter(
    *,
    diameter: float,
    temperature: float,
    expansion: MeanExpansion,
    lowest_temperature: float,
    bare_shaft: bool,
    procedure_released: bool,
) -> float:
    r"""Diameter of a bare shaft's seat that is chilled under a released procedure.

    .. math:: D(T) = D_{20} [1 + \bar\alpha(T) (T - 20)], \quad T \le 20

    Parameters
    ----------
    diameter : float
        Seat at 20 °C, :math:`D_{20}`, [m]
    temperature : float
        Temperature of the chilled seat, :math:`T`, [°C]
    expansion : MeanExpansion
        Mean coefficient from 20 °C to a temperature, below 20 °C too, [1/K]
    lowest_temperature : float
        Temperature below which the procedure does not go, [°C]
    bare_shaft : bool
        Whether no part is on the shaft yet, [-]
    procedure_released : bool
        Whether a procedure for chilling is released for this shaft, [-]

    Returns
    -------
    float
        Diameter of the chilled seat, [m]

    Raises
    ------
    OutOfRangeError
        If the shaft carries parts, no procedure is released, or the temperature lies above 20 °C or
        below the lowest.

    Notes
    -----
    The conditions are inputs so that nobody gets a figure without them: fits already made loosen,
    frost settles on the seat, steel turns brittle, and the cooling medium displaces oxygen. A
    coefficient that holds at room temperature promises too much contraction.

    Examples
    --------
    A seat of 100 mm at −80 °C with 11 µm/(m·K) shrinks by 110 µm:

    >>> chilled_diameter(
    ...     diameter=0.100, temperature=-80.0, expansion=lambda temperature: 11e-6,
    ...     lowest_temperature=-80.0, bare_shaft=True, procedure_released=True)
    0.09989

    References
    ----------
    A. Kaw, University of South Florida, bascule-bridge trunnion that jammed because one coefficient
    was used down to the cold bath.
    """
    if not bare_shaft:
        raise OutOfRangeError("bare_shaft", bare_shaft, "be true: fits already made would loosen")
    if not procedure_released:
        raise OutOfRangeError("procedure_released", procedure_released, "be true for chilling")
    if not lowest_temperature <= temperature <= REFERENCE_TEMPERATURE:
        raise OutOfRangeError(
            "temperature", temperature, f"lie between {lowest_temperature:g} and 20 °C"
        )
    return diameter_at(diameter=diameter, temperature=temperature, expansion=expansion)
