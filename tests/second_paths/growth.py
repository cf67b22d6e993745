"""A bore warmed degree by degree until it clears its seat."""

from collections.abc import Callable

import numpy as np
from scipy.integrate import solve_ivp

__all__ = ["temperature_when_clear"]


def temperature_when_clear(
    *,
    bore_at_20: float,
    seat_now: float,
    clearance: float,
    instantaneous: Callable[[float], float],
) -> float:
    """Integrate the bore's growth over temperature; stop when the gap is there."""

    def growth_rate(temperature: float, bore: np.ndarray) -> list[float]:
        return [bore_at_20 * instantaneous(temperature)]

    def gap(temperature: float, bore: np.ndarray) -> float:
        return float(bore[0]) - seat_now - clearance

    gap.terminal = True  # type: ignore[attr-defined]
    answer = solve_ivp(
        growth_rate, (20.0, 900.0), [bore_at_20], events=gap, rtol=1e-11, atol=1e-15, max_step=5.0
    )
    return float(answer.t_events[0][0])
