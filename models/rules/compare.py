"""Comparison with a limit, at the record's resolution and with the uncertainty in view.

Half of all values that lie exactly on a limit fall on the wrong side of it as bare floats, so a
difference is taken in whole steps of a stated resolution. With a decision rule of *proved*
conformity (ISO 14253-1) the expanded uncertainty counts against whoever must prove; with *simple*
acceptance it does not.
"""

from models.rules.rule import Verdict

__all__ = [
    "FORCE_STEP",
    "LENGTH_STEP",
    "PRESSURE_STEP",
    "TEMPERATURE_STEP",
    "TORQUE_STEP",
    "at_least",
    "at_most",
    "between",
    "steps",
]

# The record stores whole nanometres and thousandths of a kelvin; ten of each absorb the arithmetic.
LENGTH_STEP = 10e-9
TEMPERATURE_STEP = 10e-3
# Coarse enough to absorb the arithmetic of a formula, far finer than anything that is known.
PRESSURE_STEP = 1e3
TORQUE_STEP = 10e-3
FORCE_STEP = 10e-3


def steps(difference: float, resolution: float) -> int:
    """Count a difference in whole steps of the resolution, to the nearest."""
    return round(difference / resolution)


def at_most(
    value: float,
    limit: float,
    *,
    resolution: float,
    expanded_uncertainty: float = 0.0,
    proved: bool = True,
) -> Verdict:
    """Judge whether a value stays at or below a limit."""
    room = steps(limit - value, resolution)
    guard = steps(expanded_uncertainty, resolution) if proved else 0
    if room >= guard:
        return Verdict.WITHIN
    if room < -guard:
        return Verdict.OUTSIDE
    return Verdict.CANNOT_TELL


def at_least(
    value: float,
    limit: float,
    *,
    resolution: float,
    expanded_uncertainty: float = 0.0,
    proved: bool = True,
) -> Verdict:
    """Judge whether a value reaches a limit."""
    return at_most(
        -value,
        -limit,
        resolution=resolution,
        expanded_uncertainty=expanded_uncertainty,
        proved=proved,
    )


def between(
    least: float,
    greatest: float,
    *,
    least_allowed: float,
    greatest_allowed: float,
    resolution: float,
    expanded_uncertainty: float = 0.0,
    proved: bool = True,
) -> Verdict:
    """Judge whether a range lies between two limits."""
    return Verdict.worst(
        [
            at_least(
                least,
                least_allowed,
                resolution=resolution,
                expanded_uncertainty=expanded_uncertainty,
                proved=proved,
            ),
            at_most(
                greatest,
                greatest_allowed,
                resolution=resolution,
                expanded_uncertainty=expanded_uncertainty,
                proved=proved,
            ),
        ]
    )
