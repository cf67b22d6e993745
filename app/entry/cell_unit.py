"""How a field reads what is typed, and what it becomes in the other unit."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass

from models.units import Quantity, UnitSet

__all__ = ["CellUnit", "unit_for"]


@dataclass(frozen=True, slots=True, kw_only=True)
class CellUnit:
    """How a field reads what is typed.

    Attributes
    ----------
    symbol : str
        The unit of a number typed without one.
    read : callable
        Turns the typed text into a quantity, or raises `ValueError` with a sentence.
    other : callable
        Writes a quantity in the other unit, with its symbol.
    """

    symbol: str
    read: Callable[[str], Quantity]
    other: Callable[[Quantity], str]


def unit_for(units: UnitSet, use: str) -> CellUnit:
    """Give the way in which a job writes one use of a quantity.

    Parameters
    ----------
    units : UnitSet
        How the job writes its numbers.
    use : str
        One of the uses a unit set knows, such as `runout`.

    Returns
    -------
    CellUnit
        How a field reads it.

    Examples
    --------
    >>> from models.units import inch_set
    >>> runout = unit_for(inch_set, "runout")
    >>> runout.other(runout.read("-0.0003"))
    '−7.6 µm'
    """

    def read(text: str) -> Quantity:
        return units.read(text, use)

    def other(quantity: Quantity) -> str:
        return units.other(quantity.si, use)

    return CellUnit(symbol=units.unit(use), read=read, other=other)
