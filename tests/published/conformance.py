"""Published probabilities of conformance, as printed in their sources."""

import math
from typing import NamedTuple

__all__ = ["PROBABILITIES", "ProbabilityRow"]


class ProbabilityRow(NamedTuple):
    """A value with limits and the probability that it conforms."""

    case: str
    source: str
    inputs: dict[str, float]
    printed: str


def _fit(value: float) -> dict[str, float]:
    # Seat known to 2 µm and bore to 3 µm; limits of 150 and 215 µm; all in µm.
    uncertainty = math.sqrt(13.0)
    return {
        "value": value,
        "standard_uncertainty": uncertainty,
        "least": 150.0,
        "greatest": 215.0,
    }


def _guarded(units: float) -> dict[str, float]:
    return {
        "value": 10.0 - units,
        "standard_uncertainty": 1.0,
        "least": -math.inf,
        "greatest": 10.0,
    }


_NORMAL = "table of the normal distribution, from memory"

PROBABILITIES = [
    ProbabilityRow(
        "breakdown voltage",
        "JCGM 106:2012, 7.3.3 example 1, numbers from memory",
        {
            "value": -5.47,
            "standard_uncertainty": 0.05,
            "least": -math.inf,
            "greatest": -5.40,
        },
        "0.92",
    ),
    ProbabilityRow(
        "fit 5 µm inside its limit", "normal table: (155-150)/3.606", _fit(155.0), "0.917"
    ),
    ProbabilityRow("fit 10 µm inside its limit", "normal table: 10/3.606", _fit(160.0), "0.9972"),
    ProbabilityRow(
        "fit at its lower 95 % acceptance",
        "normal table: 1.645·3.606 = 5.931",
        _fit(155.931),
        "0.9500",
    ),
    ProbabilityRow(
        "fit at its upper 95 % acceptance",
        "normal table: 1.645·3.606 = 5.931",
        _fit(209.069),
        "0.9500",
    ),
    ProbabilityRow("no guard", _NORMAL, _guarded(0.0), "0.500"),
    ProbabilityRow("guard of 1 u", _NORMAL, _guarded(1.0), "0.841"),
    ProbabilityRow("guard of 1.645 u", _NORMAL, _guarded(1.645), "0.950"),
    ProbabilityRow("guard of 2 u", _NORMAL, _guarded(2.0), "0.977"),
]
