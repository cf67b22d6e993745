"""Stepped beams by transfer matrices: the field equations carried along the shaft exactly.

The state is deflection, slope, bending moment, shear force and a constant one; each stretch is the
matrix exponential of its equations, each support an unknown jump of the shear force.
"""

from dataclasses import dataclass, field
from functools import cached_property

import numpy as np
from scipy.integrate import quad
from scipy.optimize import brentq

FALL = 9.80665


@dataclass(frozen=True)
class Stretch:
    start: float
    end: float
    outer_diameter: float
    inner_diameter: float
    modulus: float
    density: float

    def ring(self, power):
        edges = (self.inner_diameter / 2.0, self.outer_diameter / 2.0)
        return quad(lambda radius: radius**power, *edges, epsabs=0.0)[0]

    @cached_property
    def stiffness(self):
        return self.modulus * np.pi * self.ring(3)

    @cached_property
    def mass(self):
        return self.density * 2.0 * np.pi * self.ring(1)


@dataclass(frozen=True)
class Disc:
    position: float
    mass: float
    inertia: float = 0.0


@dataclass(frozen=True)
class Beam:
    stretches: list[Stretch]
    supports: tuple[float, float]
    discs: list[Disc] = field(default_factory=list)


def _exponential(matrix):
    """Power series, added up until a term no longer counts; short for a stretch of a slow beam."""
    total = term = np.eye(len(matrix))
    for order in range(1, 60):
        term = term @ matrix / order
        total = total + term
        if (np.abs(term) <= 1e-18 * np.abs(total)).all():
            return total
    raise AssertionError("the series of a stretch does not settle")


def _carried(beam, frequency, fall, stop):
    """Columns: how each of w₀, θ₀, R₁, R₂ and the load shows in the state at `stop`."""
    state = np.zeros((5, 5))
    state[0, 0] = state[1, 1] = state[4, 4] = 1.0
    events = {stretch.end for stretch in beam.stretches} | set(beam.supports) | {stop}
    events |= {disc.position for disc in beam.discs}
    here = beam.stretches[0].start
    at_stop = {}
    for place in sorted(events | {here}):
        if place > here:
            middle = (here + place) / 2.0
            stretch = next(s for s in beam.stretches if s.start <= middle <= s.end)
            field_matrix = np.zeros((5, 5))
            field_matrix[0, 1] = 1.0
            field_matrix[1, 2] = 1.0 / stretch.stiffness
            field_matrix[2, 3] = 1.0
            field_matrix[3, 0] = stretch.mass * frequency**2
            field_matrix[3, 4] = stretch.mass * fall
            state = _exponential(field_matrix * (place - here)) @ state
            here = place
        at_stop[place] = state[0].copy()
        for disc in beam.discs:
            if disc.position == place:
                moment = disc.inertia * frequency**2 * state[1]
                state[3] = state[3] + disc.mass * frequency**2 * state[0]
                state[3, 4] += disc.mass * fall
                state[2] = state[2] - moment
        for number, support in enumerate(beam.supports):
            if support == place:
                state[3, 2 + number] += 1.0
        if place == stop:
            break
    return at_stop, state


def _conditions(beam, frequency, fall):
    at, end = _carried(beam, frequency, fall, beam.stretches[-1].end)
    return np.vstack([at[beam.supports[0]], at[beam.supports[1]], end[2], end[3]])


def deflection_at(beam, place):
    rows = _conditions(beam, 0.0, FALL)
    unknown = np.linalg.solve(rows[:, :4], -rows[:, 4])
    at, _ = _carried(beam, 0.0, FALL, place)
    return float(at[place][:4] @ unknown + at[place][4])


def first_natural_frequency(beam, *, below):
    """Lowest root of the boundary determinant under `below`, by a scan and then by bracketing."""

    scale = np.abs(_conditions(beam, 0.0, 0.0)[:, :4]).max(axis=1, keepdims=True)

    def determinant(frequency):
        rows = _conditions(beam, frequency, 0.0)[:, :4]
        return float(np.linalg.det(rows / scale))

    grid = np.linspace(0.0, below, 60)
    values = [determinant(frequency) for frequency in grid]
    for index in range(1, grid.size):
        if values[index - 1] * values[index] < 0.0:
            return float(brentq(determinant, grid[index - 1], grid[index], xtol=1e-9, rtol=1e-12))
    raise AssertionError("no natural frequency in the range searched")
