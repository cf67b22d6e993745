"""Two unknowns that balance given vectors: sums and moments as a set of equations, solved whole."""

from collections.abc import Sequence

import numpy as np

__all__ = ["along_two_directions", "two_supports"]


def two_supports(
    loads: Sequence[complex], places: Sequence[float], first: float, second: float
) -> tuple[complex, complex]:
    """Find what acts at two places in the stead of many loads: equal sum, equal moment."""
    balance = np.array([[1.0, 1.0], [first, second]])
    asked = [sum(loads), sum(load * place for load, place in zip(loads, places, strict=True))]
    found = np.linalg.solve(balance, np.array(asked, dtype=complex))
    return complex(found[0]), complex(found[1])


def along_two_directions(vector: complex, first: float, second: float) -> tuple[float, float]:
    """Find how much of each of two directions, as angles, makes a vector."""
    directions = np.array([[np.cos(first), np.cos(second)], [np.sin(first), np.sin(second)]])
    found = np.linalg.solve(directions, np.array([vector.real, vector.imag]))
    return float(found[0]), float(found[1])
