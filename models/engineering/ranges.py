"""The demands on a number that many formulas share; each is refused under its own name."""

import math

from models.engineering.errors import OutOfRangeError

__all__ = ["demand_finite", "demand_not_negative", "demand_positive"]


def demand_positive(name: str, value: float) -> None:
    """Refuse a number that is not greater than zero and finite.

    Parameters
    ----------
    name : str
        Name of the input as its caller knows it, [-]
    value : float
        The number, in whatever unit it has, [-]

    Raises
    ------
    OutOfRangeError
        If the number is zero, negative, infinite or no number.

    Examples
    --------
    >>> demand_positive("span", 1.8)

    References
    ----------
    Definition.
    """
    if not (math.isfinite(value) and value > 0.0):
        raise OutOfRangeError(name, value, "be greater than zero and finite")


def demand_not_negative(name: str, value: float) -> None:
    """Refuse a number that is negative or not finite.

    Parameters
    ----------
    name : str
        Name of the input as its caller knows it, [-]
    value : float
        The number, in whatever unit it has, [-]

    Raises
    ------
    OutOfRangeError
        If the number is negative, infinite or no number.

    Examples
    --------
    >>> demand_not_negative("bore_diameter", 0.0)

    References
    ----------
    Definition.
    """
    if not (math.isfinite(value) and value >= 0.0):
        raise OutOfRangeError(name, value, "be zero or greater and finite")


def demand_finite(name: str, value: complex) -> None:
    """Refuse a number or a vector that is infinite or no number.

    Parameters
    ----------
    name : str
        Name of the input as its caller knows it, [-]
    value : complex
        The number or the vector, in whatever unit it has, [-]

    Raises
    ------
    OutOfRangeError
        If a part of it is infinite or no number.

    Examples
    --------
    >>> demand_finite("unbalance", 3e-6 + 4e-6j)

    References
    ----------
    Definition.
    """
    number = complex(value)
    if not (math.isfinite(number.real) and math.isfinite(number.imag)):
        raise OutOfRangeError(name, value, "be finite")
