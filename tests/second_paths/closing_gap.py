"""A hot bore and its seat followed in time until the gap between them is gone."""

from collections.abc import Callable

import numpy as np
from scipy.integrate import solve_ivp

__all__ = ["seconds_until_touch"]


def seconds_until_touch(
    *,
    hot: float,
    shaft: float,
    capacity: float,
    shaft_capacity: float,
    gap: Callable[[float, float], float],
    heat_across: Callable[[float, float, float], float],
    heat_outside: Callable[[float], float],
    touch: float = 2e-7,
) -> float:
    """Seconds; `gap` [m] and the heats [W] are functions of the two temperatures [°C]."""

    def change(time: float, state: np.ndarray) -> list[float]:
        part, seat = float(state[0]), float(state[1])
        across = heat_across(max(gap(part, seat), touch), part, seat)
        return [-(across + heat_outside(part)) / capacity, across / shaft_capacity]

    def touching(time: float, state: np.ndarray) -> float:
        return gap(float(state[0]), float(state[1])) - touch

    touching.terminal = True  # type: ignore[attr-defined]
    answer = solve_ivp(
        change, (0.0, 1e5), [hot, shaft], method="LSODA", events=touching, rtol=1e-9, atol=1e-9
    )
    return float(answer.t_events[0][0])
