"""Comparison with a number as its source prints it."""

from decimal import Decimal
from typing import Any

import pytest

__all__ = ["printed"]


def printed(text: str, si_per_unit: float = 1.0) -> Any:
    """Accept every value that rounds to the digits printed in the source.

    Nobody chooses a tolerance: it is half of the last printed digit. ``"2100"`` is meant
    to the unit; what a source rounds to hundreds is typed ``"2.1e3"``.

    Parameters
    ----------
    text : str
        The number as printed, ``"12.6"`` or ``"2.1e3"``, in the source's unit.
    si_per_unit : float
        SI value of one of the source's units, 1 if it prints SI.

    Returns
    -------
    comparison : object
        Equal to every float within half of the last printed digit.

    Examples
    --------
    >>> 12.649e6 == printed("12.6", 1e6)
    True
    >>> 12.651e6 == printed("12.6", 1e6)
    False
    >>> 2140.0 == printed("2.1e3")
    True
    """
    number = Decimal(text)
    half_a_digit = Decimal(1).scaleb(int(number.as_tuple().exponent)) / 2
    return pytest.approx(float(number) * si_per_unit, abs=float(half_a_digit) * si_per_unit, rel=0)
