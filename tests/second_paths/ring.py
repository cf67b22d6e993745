"""Rings as radial finite elements: pressed together, spun, or warmed unevenly.

Plane stress, symmetric about the axis, per radian and per unit thickness. Elements are quadratic;
nothing is taken from a closed form but Hooke's law and the balance of virtual work.
"""

from collections.abc import Callable
from dataclasses import dataclass

import numpy as np
from scipy import sparse
from scipy.sparse.linalg import spsolve

__all__ = ["Assembly", "Ring", "press_together"]

_POINTS = np.array([-np.sqrt(0.6), 0.0, np.sqrt(0.6)])
_WEIGHTS = np.array([5.0, 8.0, 5.0]) / 9.0


@dataclass(frozen=True)
class Ring:
    """One ring, or a solid disc where the inner radius is zero."""

    inner_radius: float
    outer_radius: float
    modulus: float
    poisson: float
    density: float = 0.0
    free_strain: Callable[[float], float] = lambda radius: 0.0
    """Thermal strain at a radius."""
    elements: int = 60

    def radii(self):
        """Return the radii of the nodes, two intervals to an element."""
        if self.inner_radius == 0.0:
            return np.linspace(0.0, self.outer_radius, 2 * self.elements + 1)
        ends = np.geomspace(self.inner_radius, self.outer_radius, self.elements + 1)
        nodes = np.empty(2 * self.elements + 1)
        nodes[::2] = ends
        nodes[1::2] = (ends[1:] + ends[:-1]) / 2.0
        return nodes

    def elasticity(self):
        """Return stress over strain, radial and hoop, in plane stress."""
        factor = self.modulus / (1.0 - self.poisson**2)
        return factor * np.array([[1.0, self.poisson], [self.poisson, 1.0]])


@dataclass(frozen=True)
class Assembly:
    """What the solution says of a hub on a shaft, radial displacements and stresses."""

    pressure: float
    shaft_outward: float
    """Displacement of the shaft's surface."""
    hub_outward: float
    """Displacement of the hub's bore."""
    shaft_bore_hoop: float
    shaft_seat_hoop: float
    shaft_seat_radial: float
    hub_bore_hoop: float
    hub_bore_radial: float
    hub_outside_hoop: float


def _shapes(at):
    value = np.array([at * (at - 1.0) / 2.0, 1.0 - at**2, at * (at + 1.0) / 2.0])
    slope = np.array([at - 0.5, -2.0 * at, at + 0.5])
    return value, slope


def _stiffness_and_load(ring, speed):
    nodes = ring.radii()
    size = nodes.size
    stiffness = sparse.lil_matrix((size, size))
    load = np.zeros(size)
    elasticity = ring.elasticity()
    for first in range(0, size - 2, 2):
        places = nodes[first : first + 3]
        for at, weight in zip(_POINTS, _WEIGHTS, strict=True):
            value, slope = _shapes(at)
            radius = value @ places
            stretch = slope @ places
            strain = np.array([slope / stretch, value / radius])
            volume = weight * stretch * radius
            stiffness[first : first + 3, first : first + 3] += (
                strain.T @ elasticity @ strain * volume
            )
            free = ring.free_strain(radius) * np.ones(2)
            load[first : first + 3] += strain.T @ elasticity @ free * volume
            load[first : first + 3] += value * ring.density * speed**2 * radius * volume
    return stiffness.tocsr(), load


def _stress(ring, displacement, outside):
    """Return radial and hoop stress at the inner or outer surface."""
    nodes = ring.radii()
    chosen = slice(-3, None) if outside else slice(0, 3)
    value, slope = _shapes(1.0 if outside else -1.0)
    places = nodes[chosen]
    radial = (slope @ displacement[chosen]) / (slope @ places)
    radius = value @ places
    hoop = radial if radius == 0.0 else (value @ displacement[chosen]) / radius
    free = ring.free_strain(radius)
    return ring.elasticity() @ np.array([radial - free, hoop - free])


def press_together(*, shaft, hub, radial_interference, speed=0.0):
    """Solve for a hub on a shaft whose radii overlap, at a speed in rad/s.

    One multiplier keeps the surfaces together; it is the line load between them.
    """
    shaft_matrix, shaft_load = _stiffness_and_load(shaft, speed)
    hub_matrix, hub_load = _stiffness_and_load(hub, speed)
    count, total = shaft_load.size, shaft_load.size + hub_load.size
    scale = shaft.modulus
    tie = sparse.lil_matrix((1, total))
    tie[0, count - 1], tie[0, count] = -scale, scale
    matrix = sparse.bmat([[sparse.block_diag([shaft_matrix, hub_matrix]), tie.T], [tie, None]])
    right = np.concatenate([shaft_load, hub_load, [scale * radial_interference]])
    solved = spsolve(sparse.csc_matrix(matrix), right)
    of_shaft, of_hub = solved[:count], solved[count:total]
    seat, bore = _stress(shaft, of_shaft, True), _stress(hub, of_hub, False)
    return Assembly(
        pressure=-solved[-1] * scale / hub.inner_radius,
        shaft_outward=of_shaft[-1],
        hub_outward=of_hub[0],
        shaft_bore_hoop=_stress(shaft, of_shaft, False)[1],
        shaft_seat_hoop=seat[1],
        shaft_seat_radial=seat[0],
        hub_bore_hoop=bore[1],
        hub_bore_radial=bore[0],
        hub_outside_hoop=_stress(hub, of_hub, True)[1],
    )
