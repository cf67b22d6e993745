"""Shape of a shaft bent by a warm side, from an arc and from integrating its curvature."""

import math

import numpy as np
from scipy.integrate import solve_bvp

__all__ = ["arc_height", "deflection"]


def arc_height(*, chord: float, radius: float) -> float:
    """Height of a circular arc over its chord."""
    return radius * (1.0 - math.cos(math.asin(chord / (2.0 * radius))))


def deflection(*, at: list[float], supports: tuple[float, float], curvature: float) -> np.ndarray:
    """Shape that bends by the curvature everywhere and rests on two supports between its ends."""
    low, high = min(*at, supports[0]), max(*at, supports[1])

    def bending(along: np.ndarray, state: np.ndarray) -> np.ndarray:
        return np.vstack([state[1], np.full_like(along, -curvature)])

    def free(left: np.ndarray, right: np.ndarray) -> np.ndarray:
        return np.array([left[0], right[0]])

    grid = np.linspace(low, high, 201)
    shape = solve_bvp(bending, free, grid, np.zeros((2, grid.size)), tol=1e-12).sol
    first, second = (shape(place)[0] for place in supports)
    slope = (second - first) / (supports[1] - supports[0])
    return np.array([shape(place)[0] - first - slope * (place - supports[0]) for place in at])
