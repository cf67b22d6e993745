"""Tapers and advances; exact arithmetic, by hand."""

from typing import NamedTuple

__all__ = ["ADVANCES", "AdvanceRow"]


class AdvanceRow(NamedTuple):
    """A taper, and the advance in inches for two interferences."""

    case: str
    source: str
    taper: float
    per_thousandth: str
    """For 0.001 in."""
    for_eight: str
    """For 0.008 in: two in a thousand on 4 in."""


_BY_HAND = "by hand: interference over taper"

ADVANCES = [
    AdvanceRow("half an inch per foot", _BY_HAND, 0.5 / 12.0, "0.0240", "0.192"),
    AdvanceRow("three quarters of an inch per foot", _BY_HAND, 0.75 / 12.0, "0.0160", "0.128"),
    AdvanceRow("one in twenty", _BY_HAND, 0.05, "0.0200", "0.160"),
    AdvanceRow("one degree per side", _BY_HAND, 0.034910, "0.02865", "0.229"),
    AdvanceRow("one and a half inch per foot", _BY_HAND, 0.125, "0.0080", "0.064"),
]
