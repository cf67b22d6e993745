"""What a measured value proves about its limits, given how well it is known."""

import enum
import math
from collections.abc import Sequence
from statistics import stdev

from models.engineering.errors import OutOfRangeError
from models.engineering.ranges import demand_finite, demand_not_negative, demand_positive

__all__ = [
    "COVERAGE_FACTOR",
    "Decision",
    "combined_uncertainty",
    "conformance_probability",
    "decide",
    "uncertainty_of_mean",
]

COVERAGE_FACTOR = 2.0
"""Expanded uncertainty over standard uncertainty, for about 95 % (common practice)."""


class Decision(enum.Enum):
    """What a value with its uncertainty proves."""

    PROVES_WITHIN = "proves within"
    PROVES_OUTSIDE = "proves outside"
    CANNOT_TELL = "cannot tell"


def combined_uncertainty(*, components: Sequence[float]) -> float:
    r"""Combine independent standard uncertainties of one quantity.

    .. math:: u = \sqrt{\sum_i u_i^2}

    Parameters
    ----------
    components : sequence of float
        Standard uncertainties, all in the unit of the quantity, :math:`u_i`, [-]

    Returns
    -------
    uncertainty : float
        Standard uncertainty of the quantity, in the same unit, [-]

    Raises
    ------
    OutOfRangeError
        If one is negative or not finite.

    Examples
    --------
    >>> combined_uncertainty(components=[3e-6, 4e-6])
    5e-06

    References
    ----------
    .. [1] JCGM 100:2008, 5.1.2, from memory.
    """
    for component in components:
        demand_not_negative("components", component)
    return math.hypot(*components)


def uncertainty_of_mean(*, readings: Sequence[float]) -> float:
    r"""Estimate the standard uncertainty of the mean of repeated readings.

    .. math:: u = \frac{s}{\sqrt{n}} \qquad s^2 = \frac{\sum_i (x_i - \bar x)^2}{n - 1}

    Parameters
    ----------
    readings : sequence of float
        Readings of one thing under one set of conditions, :math:`x_i`, [-]

    Returns
    -------
    uncertainty : float
        Standard uncertainty of their mean, in the same unit, [-]

    Raises
    ------
    OutOfRangeError
        If there are fewer than two readings or one is not finite.

    Notes
    -----
    From very few readings the estimate itself is poor: with three, off by half is usual.

    Examples
    --------
    Deviations of −1, 0 and 1 µm: s = 1 µm, over √3:

    >>> round(uncertainty_of_mean(readings=[9e-6, 10e-6, 11e-6]) * 1e6, 4)
    0.5774

    References
    ----------
    .. [1] JCGM 100:2008, 4.2.3, from memory.
    """
    if len(readings) < 2:
        raise OutOfRangeError("readings", len(readings), "be two or more")
    for reading in readings:
        demand_finite("readings", reading)
    return stdev(readings) / math.sqrt(len(readings))


def conformance_probability(
    *, value: float, standard_uncertainty: float, least: float, greatest: float
) -> float:
    r"""Probability that the true value lies within its limits.

    With a normal distribution about the measured value :math:`y`:

    .. math::

        p_c = \Phi\left(\frac{T_U - y}{u}\right) - \Phi\left(\frac{T_L - y}{u}\right)

    Parameters
    ----------
    value : float
        Measured value, :math:`y`, [-]
    standard_uncertainty : float
        Its standard uncertainty, :math:`u`, in the same unit, [-]
    least : float
        Lower limit, :math:`T_L`; −inf for none, [-]
    greatest : float
        Upper limit, :math:`T_U`; inf for none, [-]

    Returns
    -------
    probability : float
        Probability of conformance, 0 to 1, [-]

    Raises
    ------
    OutOfRangeError
        If the uncertainty is not positive, the value not finite, or the limits are in wrong order.

    Notes
    -----
    Says what is known from this measurement alone, not what a shop's history would add.

    Examples
    --------
    On a single limit, an even chance:

    >>> conformance_probability(
    ...     value=150e-6, standard_uncertainty=3e-6, least=150e-6, greatest=math.inf)
    0.5

    References
    ----------
    .. [1] JCGM 106:2012, Evaluation of measurement data: the role of measurement uncertainty in
       conformity assessment, 7.2 and 7.3, from memory.
    """
    demand_finite("value", value)
    demand_positive("standard_uncertainty", standard_uncertainty)
    _demand_order(least, greatest)
    # In the lower tail, where a hopeless value's small probability is not lost beside one.
    below, above = (least - value) / standard_uncertainty, (greatest - value) / standard_uncertainty
    if below > 0.0:
        below, above = -above, -below
    return _below(above) - _below(below)


def decide(
    *,
    value: float,
    expanded_uncertainty: float,
    least: float,
    greatest: float,
    resolution: float,
) -> Decision:
    r"""Decide what a measured value proves about its limits.

    Within is proved where the whole interval :math:`y \pm U` lies within the limits, outside where
    all of it lies beyond one; between, the value cannot tell:

    .. math::

        T_L + U \le y \le T_U - U \;\text{: within} \qquad
        y < T_L - U \;\text{or}\; y > T_U + U \;\text{: outside}

    Parameters
    ----------
    value : float
        Measured value, :math:`y`, [-]
    expanded_uncertainty : float
        Its expanded uncertainty, :math:`U`, in the same unit; 0 for simple acceptance, [-]
    least : float
        Lower limit, :math:`T_L`; −inf for none, [-]
    greatest : float
        Upper limit, :math:`T_U`; inf for none, [-]
    resolution : float
        Smallest difference that the record tells apart, in the same unit, [-]

    Returns
    -------
    decision : Decision
        What is proved, [-]

    Raises
    ------
    OutOfRangeError
        If the uncertainty is negative, the resolution not positive, the value not finite, or the
        limits are in wrong order.

    Notes
    -----
    A value on the limit of its zone, at the given resolution, belongs to the zone nearer to the
    middle. With an expanded uncertainty of more than half the tolerance nothing proves within. The
    guard is the expanded uncertainty itself (ISO 14253-1:1998 and 2013); the edition of 2017 asks
    for 95 % probability instead, a guard of 1.65 standard uncertainties.

    Examples
    --------
    >>> limits = {"least": 150e-6, "greatest": 215e-6, "resolution": 1e-8}
    >>> decide(value=160e-6, expanded_uncertainty=7e-6, **limits).value
    'proves within'
    >>> decide(value=155e-6, expanded_uncertainty=7e-6, **limits).value
    'cannot tell'
    >>> decide(value=140e-6, expanded_uncertainty=7e-6, **limits).value
    'proves outside'

    References
    ----------
    .. [1] ISO 14253-1, Decision rules for proving conformity or nonconformity with specifications,
       from memory.
    """
    demand_finite("value", value)
    demand_not_negative("expanded_uncertainty", expanded_uncertainty)
    demand_positive("resolution", resolution)
    _demand_order(least, greatest)

    def reaches(larger: float, smaller: float) -> bool:
        return math.isinf(larger - smaller) or round((larger - smaller) / resolution) >= 0

    guard = expanded_uncertainty
    if reaches(value, least + guard) and reaches(greatest - guard, value):
        return Decision.PROVES_WITHIN
    if not reaches(value, least - guard) or not reaches(greatest + guard, value):
        return Decision.PROVES_OUTSIDE
    return Decision.CANNOT_TELL


def _below(deviations: float) -> float:
    return 0.5 * math.erfc(-deviations / math.sqrt(2.0))


def _demand_order(least: float, greatest: float) -> None:
    if not least <= greatest or least == math.inf or greatest == -math.inf:
        raise OutOfRangeError("least", least, f"not exceed greatest, {greatest!r}")
