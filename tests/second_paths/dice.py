"""The spread of a result by drawing its inputs a great many times, correlated where they are."""

from collections.abc import Callable, Sequence
from typing import Any

import numpy as np
import numpy.typing as npt

__all__ = ["spread_of"]


def spread_of(
    work: Callable[..., Any],
    *,
    means: Sequence[float],
    spreads: Sequence[float],
    correlated: Sequence[tuple[int, int, float]] = (),
    draws: int = 200_000,
) -> float:
    """Give the standard deviation of what `work` makes of rows of drawn inputs."""
    size = np.asarray(spreads, dtype=np.float64)
    covariance: npt.NDArray[np.float64] = np.diag(size**2)
    for one, other, share in correlated:
        covariance[one, other] = covariance[other, one] = share * size[one] * size[other]
    random = np.random.default_rng(7)
    drawn = random.multivariate_normal(np.zeros(size.size), covariance, draws, method="eigh")
    return float(np.std(work(*(drawn + np.asarray(means, dtype=np.float64)).T)))
