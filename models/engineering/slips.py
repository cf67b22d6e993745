"""Slips of one figure: its unit, its decimal, a half taken for a whole, two figures exchanged."""

from models.engineering.errors import OutOfRangeError
from models.engineering.suspicion import Mistake, Suspicion

__all__ = [
    "decimal_slip",
    "swapped_bore_and_seat",
    "taken_hot",
    "twice_or_half",
    "unit_slip",
]


def unit_slip(*, value: float, expected: float, tolerance: float = 0.05) -> Suspicion | None:
    r"""Suspect an inch typed for a millimetre, or the other way round.

    .. math:: \left|\frac{v}{f\,v_0} - 1\right| \le \epsilon, \qquad f = 25.4,\ 1/25.4

    Parameters
    ----------
    value : float
        What was typed, [m]
    expected : float
        What the drawing, the plan or the neighbours lead one to expect, [m]
    tolerance : float
        How far from exactly 25.4 times still counts, as a share, [-]

    Returns
    -------
    suspicion : Suspicion or None
        With the value meant; None where the ratio is another, [m]

    Raises
    ------
    OutOfRangeError
        If the expected value is 0, or the tolerance is not between 0 and 1.

    Examples
    --------
    >>> suspicion = unit_slip(value=101.6, expected=4.0)
    >>> suspicion.mistake.value, suspicion.meant
    ('wrong unit', 4.0)
    >>> unit_slip(value=4.1, expected=4.0) is None
    True

    References
    ----------
    .. [1] Definition of the inch, 25.4 mm exactly; the tolerance is common practice.
    """
    return _factor_slip(Mistake.WRONG_UNIT, (25.4, 1 / 25.4), value, expected, tolerance)


def decimal_slip(*, value: float, expected: float, tolerance: float = 0.05) -> Suspicion | None:
    r"""Suspect a decimal point one or two places off.

    .. math:: \left|\frac{v}{f\,v_0} - 1\right| \le \epsilon, \qquad
        f = 10,\ 100,\ \tfrac1{10},\ \tfrac1{100}

    Parameters
    ----------
    value : float
        What was typed, [m]
    expected : float
        What the drawing, the plan or the neighbours lead one to expect, [m]
    tolerance : float
        How far from exactly ten times still counts, as a share, [-]

    Returns
    -------
    suspicion : Suspicion or None
        With the value meant; None where the ratio is another, [m]

    Raises
    ------
    OutOfRangeError
        If the expected value is 0, or the tolerance is not between 0 and 1.

    Examples
    --------
    >>> decimal_slip(value=0.125, expected=0.0125).meant
    0.0125

    References
    ----------
    .. [1] Definition; the tolerance is common practice.
    """
    return _factor_slip(
        Mistake.SLIPPED_DECIMAL, (10.0, 100.0, 0.1, 0.01), value, expected, tolerance
    )


def twice_or_half(*, value: float, expected: float, tolerance: float = 0.05) -> Suspicion | None:
    r"""Suspect a total typed for an offset, a diameter for a radius, or the other way round.

    .. math:: \left|\frac{v}{f\,v_0} - 1\right| \le \epsilon, \qquad f = 2,\ \tfrac12

    Parameters
    ----------
    value : float
        What was typed, [m]
    expected : float
        What the readings of the turn, or the drawing, lead one to expect, [m]
    tolerance : float
        How far from exactly twice still counts, as a share, [-]

    Returns
    -------
    suspicion : Suspicion or None
        With the value meant; None where the ratio is another, [m]

    Raises
    ------
    OutOfRangeError
        If the expected value is 0, or the tolerance is not between 0 and 1.

    Notes
    -----
    A runout may double in truth: ask this where the expected value is that of the same turn, such
    as the total against the readings it was taken from.

    Examples
    --------
    >>> twice_or_half(value=40e-6, expected=20e-6).factor
    2.0

    References
    ----------
    .. [1] Definition: a total is twice the offset; the tolerance is common practice.
    """
    return _factor_slip(Mistake.TWICE_OR_HALF, (2.0, 0.5), value, expected, tolerance)


def swapped_bore_and_seat(
    *, bore: float, seat: float, least_interference: float, greatest_interference: float
) -> Suspicion | None:
    r"""Suspect that the bore was typed as the seat and the seat as the bore.

    .. math:: s - b < 0, \qquad i_{min} - m \le b - s \le i_{max} + m, \qquad
        m = i_{max} - i_{min}

    Parameters
    ----------
    bore : float
        Bore as typed, [m]
    seat : float
        Seat as typed, [m]
    least_interference : float
        Least interference that the plan wants, more than 0, [m]
    greatest_interference : float
        Greatest interference that the plan wants, [m]

    Returns
    -------
    suspicion : Suspicion or None
        With the interference meant; None where the two interfere, or not even exchanged would, [m]

    Raises
    ------
    OutOfRangeError
        If the plan's limits are not positive and in order.

    Examples
    --------
    A seat typed 0.1 mm smaller than the bore where 0.08 to 0.12 mm of interference is wanted:

    >>> suspicion = swapped_bore_and_seat(
    ...     bore=100.1e-3, seat=100.0e-3, least_interference=0.08e-3, greatest_interference=0.12e-3)
    >>> round(suspicion.meant * 1e3, 6)
    0.1

    References
    ----------
    .. [1] Definition of interference, seat less bore; the margin is common practice.
    """
    if not 0.0 < least_interference <= greatest_interference:
        raise OutOfRangeError(
            "least_interference", least_interference, "be more than 0 and not above the greatest"
        )
    exchanged = bore - seat
    margin = greatest_interference - least_interference
    if not least_interference - margin <= exchanged <= greatest_interference + margin:
        return None
    if exchanged <= 0.0:
        return None
    middle = (least_interference + greatest_interference) / 2.0
    # Exchanged, the fit lies near the middle of what is wanted; as typed, far on the other side.
    away = max(abs(exchanged - middle), margin / 2.0, middle / 100.0)
    return Suspicion(
        Mistake.SWAPPED_BORE_AND_SEAT, evidence=(exchanged + middle) / away, meant=exchanged
    )


def taken_hot(
    *, part_temperature: float, shaft_temperature: float, allowed_difference: float
) -> Suspicion | None:
    r"""Suspect a survey that was read before part and shaft had one temperature.

    .. math:: |T_{part} - T_{shaft}| > \Delta T_{allowed}

    Parameters
    ----------
    part_temperature : float
        Temperature of the part just mounted, [°C]
    shaft_temperature : float
        Temperature of the shaft away from it, [°C]
    allowed_difference : float
        Difference up to which the plan allows reading, [K]

    Returns
    -------
    suspicion : Suspicion or None
        With the difference over the allowed one as evidence, [-]

    Raises
    ------
    OutOfRangeError
        If the allowed difference is not positive.

    Notes
    -----
    Equal temperatures permit reading and prove nothing: the proof is a second survey that agrees.

    Examples
    --------
    >>> taken_hot(part_temperature=27.0, shaft_temperature=21.0, allowed_difference=2.0).evidence
    3.0

    References
    ----------
    .. [1] Common practice; no publication.
    """
    if not allowed_difference > 0.0:
        raise OutOfRangeError("allowed_difference", allowed_difference, "be more than 0")
    ratio = abs(part_temperature - shaft_temperature) / allowed_difference
    return Suspicion(Mistake.TAKEN_HOT, evidence=ratio) if ratio > 1.0 else None


def _factor_slip(
    mistake: Mistake, factors: tuple[float, ...], value: float, expected: float, tolerance: float
) -> Suspicion | None:
    if expected == 0.0:
        raise OutOfRangeError("expected", expected, "differ from 0")
    if not 0.0 < tolerance < 1.0:
        raise OutOfRangeError("tolerance", tolerance, "lie between 0 and 1")
    for factor in factors:
        away = abs(value / (factor * expected) - 1.0)
        if away <= tolerance:
            plain = abs(value / expected - 1.0)
            return Suspicion(
                mistake, evidence=plain / max(away, 1e-3), meant=value / factor, factor=factor
            )
    return None
