"""Displacement of an unevenly warm annular disc by finite elements along its radius."""

import numpy as np

__all__ = ["bore_growth"]


def bore_growth(
    *,
    radii: list[float],
    rises: list[float],
    coefficient: float,
    poisson: float,
    elements: int = 600,
) -> float:
    """Radial growth of the bore [m] from the least strain energy of a free disc, plane stress."""
    nodes = np.linspace(radii[0], radii[-1], elements + 1)
    stiffness = np.zeros((elements + 1, elements + 1))
    load = np.zeros(elements + 1)
    elasticity = np.array([[1.0, poisson], [poisson, 1.0]]) / (1.0 - poisson**2)
    for index in range(elements):
        left, right = nodes[index], nodes[index + 1]
        length = right - left
        for point in (-(3.0**-0.5), 3.0**-0.5):
            share = (1.0 + point) / 2.0
            radius = left + share * length
            strain = np.array(
                [[-1.0 / length, 1.0 / length], [(1.0 - share) / radius, share / radius]]
            )
            warm = coefficient * float(np.interp(radius, radii, rises)) * np.ones(2)
            weight = radius * length / 2.0
            pair = slice(index, index + 2)
            stiffness[pair, pair] += weight * strain.T @ elasticity @ strain
            load[pair] += weight * strain.T @ elasticity @ warm
    return float(np.linalg.solve(stiffness, load)[0])
