"""How much unbalance may remain: by the load on a journal, by the whole rotor, or by a grade."""

import math
from dataclasses import dataclass

from models.engineering.errors import OutOfRangeError
from models.engineering.ranges import demand_finite, demand_not_negative, demand_positive
from models.engineering.shaft import STANDARD_GRAVITY

__all__ = [
    "PermissibleResidual",
    "PlaneShares",
    "allocate_between_bearings",
    "permissible_residual",
    "permissible_residual_naval",
    "permissible_residual_of_grade",
    "permissible_residual_very_high_speed",
]

_REVOLUTION_PER_MINUTE = 2.0 * math.pi / 60.0
# 4 oz·in per lb times r/min, as a product of eccentricity and speed; exact, because the ounce is a
# sixteenth of the pound and the inch 25.4 mm.
_FOUR_OUNCE_INCHES_PER_POUND = 4.0 / 16.0 * 0.0254
_JOURNAL_RULE_VELOCITY = _FOUR_OUNCE_INCHES_PER_POUND * _REVOLUTION_PER_MINUTE
_LEAST_ECCENTRICITY = 0.254e-6
_NAVAL_SLOW_ECCENTRICITY = 0.177 / 16.0 * 0.0254
_NAVAL_SLOW_SPEED = 150.0 * _REVOLUTION_PER_MINUTE
_NAVAL_FAST_SPEED = 1000.0 * _REVOLUTION_PER_MINUTE
_LARGEST_SHARE = 0.7


@dataclass(frozen=True)
class PermissibleResidual:
    """A permissible residual unbalance with the load it was taken from."""

    unbalance: float
    """Permissible residual unbalance in the plane of the journal, [kg·m]"""
    load_used: float
    """Load that entered the formula, [N]"""
    floor_applied: bool
    """Whether the journal carries less than the least load, so that the least was used"""
    journal_lifts: bool
    """Whether the journal's load is negative, so that its size without sign was used"""


@dataclass(frozen=True)
class PlaneShares:
    """A permissible unbalance of the whole rotor, shared between two planes."""

    first: float
    """Share of the first plane, [kg·m]"""
    second: float
    """Share of the second plane, [kg·m]"""
    limited: bool
    """Whether the centre of gravity is so far off that a share was limited to 0.7 and 0.3"""


def _load_that_counts(journal_load: float, least_journal_load: float) -> tuple[float, bool]:
    demand_finite("journal_load", journal_load)
    demand_not_negative("least_journal_load", least_journal_load)
    size = abs(journal_load)
    return max(size, least_journal_load), size < least_journal_load


def permissible_residual(
    *, journal_load: float, least_journal_load: float, maximum_continuous_speed: float
) -> PermissibleResidual:
    r"""Permissible residual unbalance of a journal's plane by the rule 4 W/N.

    In ounce-inches, pounds and r/min it is 4 W/N; in g·mm, kg and r/min 6350 W/N; in SI

    .. math:: U = 6.35\cdot10^{-3}\, \frac{2\pi}{60}\, \frac{\max(|F|, F_0)}{g\, \omega}

    Parameters
    ----------
    journal_load : float
        Load at rest on **that** journal, negative where it lifts, :math:`F`, [N]
    least_journal_load : float
        Load below which the journal's own is no longer used, chosen by the plan, :math:`F_0`, [N]
    maximum_continuous_speed : float
        Maximum continuous speed, :math:`\omega`, [rad/s]

    Returns
    -------
    permissible : PermissibleResidual
        Permissible residual unbalance and whether the load was floored, [kg·m]

    Raises
    ------
    OutOfRangeError
        If the speed is not positive, the least load is negative, or the load is not finite.

    Notes
    -----
    It stands for an eccentricity times speed of 0.665 mm/s at every speed. Weigh the journals: a
    journal of an overhung rotor may carry next to nothing, and the rule then allows next to
    nothing; no source gives the least load, so it has no default. The pound with kilograms in its
    place, 4 W/N with W in kg, is a known slip that gives 2.2 times too little.

    Examples
    --------
    400 kg on the journal at 8000 r/min: 6350·400/8000 = 317.5 g·mm.

    >>> from math import pi
    >>> permissible = permissible_residual(
    ...     journal_load=400 * 9.80665, least_journal_load=0.0,
    ...     maximum_continuous_speed=8000 * 2 * pi / 60)
    >>> permissible.unbalance * 1e6
    317.5

    References
    ----------
    H. P. Bloch, M. P. Singh, Steam Turbines: Design, Applications, and Rerating, 2nd edition, 4.8,
    p. 94. API 617:2002, chapter 1, annex B.3.2, for the weighing of the journals.
    """
    demand_positive("maximum_continuous_speed", maximum_continuous_speed)
    load, floored = _load_that_counts(journal_load, least_journal_load)
    eccentricity = _JOURNAL_RULE_VELOCITY / maximum_continuous_speed
    return PermissibleResidual(
        unbalance=eccentricity * load / STANDARD_GRAVITY,
        load_used=load,
        floor_applied=floored,
        journal_lifts=journal_load < 0.0,
    )


def permissible_residual_very_high_speed(
    *, journal_load: float, least_journal_load: float, maximum_continuous_speed: float
) -> PermissibleResidual:
    r"""Permissible residual unbalance by 4 W/N with the floor for very high speeds.

    Below 25 000 r/min as `permissible_residual`; at and above it the eccentricity stays at
    0.254 µm, because less cannot be shown:

    .. math:: U = 0.254\cdot10^{-6}\, \frac{\max(|F|, F_0)}{g}

    Parameters
    ----------
    journal_load : float
        Load at rest on **that** journal, negative where it lifts, :math:`F`, [N]
    least_journal_load : float
        Load below which the journal's own is no longer used, chosen by the plan, :math:`F_0`, [N]
    maximum_continuous_speed : float
        Maximum continuous speed, [rad/s]

    Returns
    -------
    permissible : PermissibleResidual
        Permissible residual unbalance and whether the load was floored, [kg·m]

    Raises
    ------
    OutOfRangeError
        If the speed is not positive, the least load is negative, or the load is not finite.

    Notes
    -----
    Both forms meet exactly at 25 000 r/min.

    Examples
    --------
    10 kg on the journal at 40 000 r/min: 0.254·10 = 2.54 g·mm.

    >>> from math import pi
    >>> permissible = permissible_residual_very_high_speed(
    ...     journal_load=10 * 9.80665, least_journal_load=0.0,
    ...     maximum_continuous_speed=40_000 * 2 * pi / 60)
    >>> permissible.unbalance * 1e6
    2.54

    References
    ----------
    API 617, 7th edition, chapter 1, from memory.
    """
    at_speed = permissible_residual(
        journal_load=journal_load,
        least_journal_load=least_journal_load,
        maximum_continuous_speed=maximum_continuous_speed,
    )
    floor = _LEAST_ECCENTRICITY * at_speed.load_used / STANDARD_GRAVITY
    return PermissibleResidual(
        unbalance=max(at_speed.unbalance, floor),
        load_used=at_speed.load_used,
        floor_applied=at_speed.floor_applied,
        journal_lifts=at_speed.journal_lifts,
    )


def permissible_residual_naval(*, rotor_mass: float, maximum_continuous_speed: float) -> float:
    r"""Permissible residual unbalance per plane by the naval rule, from the **whole** rotor.

    Formula: U = 4 W/N above 1000 r/min, 4000 W/N² from there down to 150, and 0.177 W at 150 and
    below, in ounce-inches, pounds and r/min.

    Parameters
    ----------
    rotor_mass : float
        Mass of the whole rotor, :math:`W`, [kg]
    maximum_continuous_speed : float
        Maximum continuous speed, :math:`N`, [rad/s]

    Returns
    -------
    unbalance : float
        Permissible residual unbalance in each plane, [kg·m]

    Raises
    ------
    OutOfRangeError
        If the mass or the speed is not positive.

    Notes
    -----
    Not to be mixed with the journal's rule, which has the same 4 W/N and another W. Just above
    150 r/min the formula gives 0.1778 W; the source rounds the slow range to 0.177.

    Examples
    --------
    1000 lb at 500 r/min: 4000·1000/500² = 16 oz·in.

    >>> from math import pi
    >>> unbalance = permissible_residual_naval(
    ...     rotor_mass=453.59237, maximum_continuous_speed=500 * 2 * pi / 60)
    >>> unbalance / (0.45359237 / 16 * 0.0254)
    16.00

    References
    ----------
    MIL-STD-167-1 as two secondary tables give it, one of them Energy-Tech magazine, article 18389.
    """
    demand_positive("rotor_mass", rotor_mass)
    demand_positive("maximum_continuous_speed", maximum_continuous_speed)
    if maximum_continuous_speed <= _NAVAL_SLOW_SPEED:
        return rotor_mass * _NAVAL_SLOW_ECCENTRICITY
    fast = rotor_mass * _JOURNAL_RULE_VELOCITY / maximum_continuous_speed
    if maximum_continuous_speed > _NAVAL_FAST_SPEED:
        return fast
    return fast * _NAVAL_FAST_SPEED / maximum_continuous_speed


def permissible_residual_of_grade(
    *, rotor_mass: float, grade: float, maximum_continuous_speed: float
) -> float:
    r"""Permissible residual unbalance of a whole rotor by its balance quality grade.

    .. math:: U = m\, \frac{G}{\omega}

    Parameters
    ----------
    rotor_mass : float
        Mass of the rotor, :math:`m`, [kg]
    grade : float
        Eccentricity times speed that the grade is named after, 0.0025 for G 2.5, [m/s]
    maximum_continuous_speed : float
        Maximum continuous speed, :math:`\omega`, [rad/s]

    Returns
    -------
    unbalance : float
        Permissible residual unbalance of the whole rotor, to be shared between planes, [kg·m]

    Raises
    ------
    OutOfRangeError
        If the mass, the grade or the speed is not positive.

    Notes
    -----
    Usual grades: G 2.5 for turbines and compressors, G 6.3 for pumps and fans (Energy-Tech).

    Examples
    --------
    100 kg, G 2.5 at 250 rad/s: 100·0.0025/250 = 1000 g·mm.

    >>> permissible_residual_of_grade(
    ...     rotor_mass=100.0, grade=0.0025, maximum_continuous_speed=250.0) * 1e6
    1000.0

    References
    ----------
    ISO 21940-11, from memory. Energy-Tech magazine, article 18389, p. 3, for the grades.
    """
    demand_positive("rotor_mass", rotor_mass)
    demand_positive("grade", grade)
    demand_positive("maximum_continuous_speed", maximum_continuous_speed)
    return rotor_mass * grade / maximum_continuous_speed


def allocate_between_bearings(
    *,
    permissible: float,
    centre_of_gravity: float,
    first_plane: float,
    second_plane: float,
) -> PlaneShares:
    r"""Share a rotor's permissible unbalance between two planes at its bearings.

    .. math::

        U_1 = U \frac{z_2 - z_c}{z_2 - z_1} \qquad U_2 = U \frac{z_c - z_1}{z_2 - z_1}

    neither above 0.7 U nor below 0.3 U.

    Parameters
    ----------
    permissible : float
        Permissible residual unbalance of the whole rotor, :math:`U`, [kg·m]
    centre_of_gravity : float
        Axial position of the centre of gravity, :math:`z_c`, [m]
    first_plane : float
        Axial position of one bearing, :math:`z_1`, [m]
    second_plane : float
        Axial position of the other, beyond the first, :math:`z_2`, [m]

    Returns
    -------
    shares : PlaneShares
        Permissible residual unbalance in each plane, [kg·m]

    Raises
    ------
    OutOfRangeError
        If the permissible is not positive, or the centre of gravity is not between the planes:
        overhung rotors have rules of their own.

    Notes
    -----
    Older texts give one half to each of two arbitrary planes.

    Examples
    --------
    >>> shares = allocate_between_bearings(
    ...     permissible=10e-3, centre_of_gravity=1.5, first_plane=0.0, second_plane=2.5)
    >>> shares.first * 1e3, shares.second * 1e3
    (4.0, 6.0)

    References
    ----------
    ISO 21940-11, from memory.
    """
    demand_positive("permissible", permissible)
    demand_finite("first_plane", first_plane)
    demand_finite("second_plane", second_plane)
    if not second_plane > first_plane:
        raise OutOfRangeError("second_plane", second_plane, "lie beyond first_plane")
    if not first_plane <= centre_of_gravity <= second_plane:
        raise OutOfRangeError("centre_of_gravity", centre_of_gravity, "lie between the planes")
    whole = (second_plane - centre_of_gravity) / (second_plane - first_plane)
    share = min(max(whole, 1.0 - _LARGEST_SHARE), _LARGEST_SHARE)
    return PlaneShares(
        first=permissible * share,
        second=permissible * (1.0 - share),
        limited=share != whole,
    )
