"""What speaks for balancing a rotor at its speed, and what such a run usually reaches.

Reasons for a person to weigh; none of them orders a run.
"""

from dataclasses import dataclass

from models.engineering.acceptance import SourcedLimit
from models.engineering.ranges import demand_not_negative, demand_positive

__all__ = [
    "STATED_REASONS",
    "USUAL_FORCE_SHARE_AT_SPEED",
    "USUAL_SHAFT_VIBRATION_AT_SPEED",
    "Reason",
    "reasons_for_high_speed_balance",
]

USUAL_SHAFT_VIBRATION_AT_SPEED = SourcedLimit(
    value=12.7e-6,
    unit="m",
    source="less than 0.5 mil at the shaft: H. P. Bloch, M. P. Singh, Steam Turbines: Design, "
    "Applications, and Rerating, 2nd edition, 4.7.1, p. 93",
)
"""Shaft vibration that a balance at speed usually gets below, [m]."""

USUAL_FORCE_SHARE_AT_SPEED = SourcedLimit(
    value=0.1,
    unit="-",
    source="pedestal velocity equivalent to less than 10 % of the static load at maximum "
    "continuous speed: H. P. Bloch, M. P. Singh, Steam Turbines: Design, Applications, and "
    "Rerating, 2nd edition, 4.7.1, p. 93",
)
"""Force over static load that a balance at speed usually gets below, [-]."""


@dataclass(frozen=True)
class Reason:
    """One thing that may speak for a balance at speed, with what it was judged by."""

    statement: str
    """What speaks for it, in words"""
    value: float | None
    """What this rotor has; None where nothing is known, [-]"""
    threshold: float
    """Above which it speaks for it, [-]"""
    source: str
    """Where the threshold comes from"""

    @property
    def speaks(self) -> bool | None:
        """Whether it speaks for a balance at speed; None where nothing is known."""
        return None if self.value is None else self.value > self.threshold


STATED_REASONS = {
    "sensitive": "its owner calls it sensitive: it has shaken before, or others of its kind have",
    "spare": "it is a spare, which lies for years and must run at once when it is needed",
    "will not run in its casing first": "it will not run in its casing before it is delivered",
}
"""What an owner may state that speaks for a balance at speed: common practice, from memory."""


def reasons_for_high_speed_balance(
    *,
    maximum_continuous_speed: float,
    first_critical_speed: float | None,
    span_over_diameter: float | None,
    bow_over_permissible: float | None,
) -> tuple[Reason, ...]:
    r"""List what speaks for balancing a rotor at its speed, whether it applies or not.

    .. math:: \frac{\omega}{\omega_1} > 0.7 \qquad \frac{L}{D} > 12 \qquad \frac{U_b}{U} > 1

    Parameters
    ----------
    maximum_continuous_speed : float
        Maximum continuous speed, :math:`\omega`, [rad/s]
    first_critical_speed : float or None
        First critical speed on rigid bearings, :math:`\omega_1`; None if unknown, [rad/s]
    span_over_diameter : float or None
        Bearing span over largest body diameter, :math:`L/D`; None if unknown, [-]
    bow_over_permissible : float or None
        Unbalance of the bow, :math:`U_b`, over the permissible residual, :math:`U`, in the plane
        where the ratio is greatest; None if unknown, [-]

    Returns
    -------
    reasons : tuple of Reason
        All three, in the order above, [-]

    Raises
    ------
    OutOfRangeError
        If a number that is given is not positive, or a bow is negative.

    Notes
    -----
    A balance at low speed sees only the sums at two journals; a flexible rotor can still be
    unbalanced along its length. A first critical speed on rigid bearings lies above the real one.

    Examples
    --------
    >>> reasons = reasons_for_high_speed_balance(
    ...     maximum_continuous_speed=900.0, first_critical_speed=400.0,
    ...     span_over_diameter=10.0, bow_over_permissible=None)
    >>> [reason.speaks for reason in reasons]
    [True, False, None]

    References
    ----------
    H. P. Bloch, M. P. Singh, Steam Turbines: Design, Applications, and Rerating, 2nd edition,
    p. 92, for what low speed cannot see; the thresholds are common practice, from memory.
    """
    demand_positive("maximum_continuous_speed", maximum_continuous_speed)
    for name, known in (
        ("first_critical_speed", first_critical_speed),
        ("span_over_diameter", span_over_diameter),
    ):
        if known is not None:
            demand_positive(name, known)
    if bow_over_permissible is not None:
        demand_not_negative("bow_over_permissible", bow_over_permissible)
    ratio = (
        None if first_critical_speed is None else maximum_continuous_speed / first_critical_speed
    )
    return (
        Reason(
            statement="it runs near or above its first critical speed",
            value=ratio,
            threshold=0.7,
            source="common practice, from memory: below it a rotor usually counts as rigid",
        ),
        Reason(
            statement="its bearing span is long for its diameter",
            value=span_over_diameter,
            threshold=12.0,
            source="common practice, from memory",
        ),
        Reason(
            statement="its bow alone brings more unbalance than may remain, so that corrections at "
            "low speed hide a bend",
            value=bow_over_permissible,
            threshold=1.0,
            source="by definition; H. P. Bloch, M. P. Singh, Steam Turbines, 2nd edition, p. 92",
        ),
    )
