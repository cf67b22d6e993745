"""A hot ring whose temperature varies along its radius, in finite volumes, followed in time."""

from collections.abc import Callable

import numpy as np
from scipy.integrate import solve_ivp

__all__ = ["time_until_mean"]


def time_until_mean(
    *,
    bore_radius: float,
    rim_radius: float,
    length: float,
    density: float,
    specific_heat: float,
    conductivity: float,
    start: float,
    end_mean: float,
    flux_outside: Callable[[float], float],
    heat_at_bore: Callable[[float, float], float] | None = None,
    cells: int = 60,
) -> float:
    """Seconds until the mean over the area has fallen; flux [W/m²] leaves rim and both faces.

    Without `heat_at_bore` the openings of the bore lose the same flux at the bore's temperature;
    with it the bore loses what it says [W], from its surface and the mean temperature.
    """
    edges = np.linspace(bore_radius, rim_radius, cells + 1)
    middles = (edges[:-1] + edges[1:]) / 2.0
    areas = np.pi * (edges[1:] ** 2 - edges[:-1] ** 2)
    capacities = density * specific_heat * areas * length
    bridges = 2.0 * np.pi * edges[1:-1] * length * conductivity / np.diff(middles)
    opening = 2.0 * np.pi * bore_radius**2
    rim = 2.0 * np.pi * rim_radius * length

    def mean(temperatures: np.ndarray) -> float:
        return float(temperatures @ areas / areas.sum())

    def change(time: float, temperatures: np.ndarray) -> np.ndarray:
        heat = np.array([-2.0 * flux_outside(value) for value in temperatures]) * areas
        across = bridges * np.diff(temperatures)
        heat[:-1] += across
        heat[1:] -= across
        heat[-1] -= rim * flux_outside(float(temperatures[-1]))
        if heat_at_bore is None:
            heat[0] -= opening * flux_outside(float(temperatures[0]))
        else:
            heat[0] -= heat_at_bore(float(temperatures[0]), mean(temperatures))
        return heat / capacities

    def reached(time: float, temperatures: np.ndarray) -> float:
        return mean(temperatures) - end_mean

    reached.terminal = True  # type: ignore[attr-defined]
    answer = solve_ivp(
        change, (0.0, 1e6), np.full(cells, start), method="BDF", events=reached, rtol=1e-7
    )
    return float(answer.t_events[0][0])
