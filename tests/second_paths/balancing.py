"""A rigid rotor made of particles, on two springs: what a balancing machine would read of it."""

from dataclasses import dataclass, field

import numpy as np


@dataclass(frozen=True)
class Machine:
    """A rotor of given mass and inertia on two sprung pedestals, shaken by its particles."""

    mass: float
    inertia: float
    centre: float
    pedestals: tuple[float, float]
    stiffness: tuple[float, float]
    damping: float
    speed: float
    particles: list[tuple[float, complex]] = field(default_factory=list)

    def readings(self, *extra):
        """Displacement vectors at the two pedestals; particles are (position, mass·offset)."""
        turn = 1j * self.speed
        force = moment = 0.0
        for place, unbalance in [*self.particles, *extra]:
            force += self.speed**2 * unbalance
            moment += self.speed**2 * unbalance * (place - self.centre)
        dynamic = np.array(
            [[self.mass * turn**2, 0.0], [0.0, self.inertia * turn**2]], dtype=complex
        )
        for place, spring in zip(self.pedestals, self.stiffness, strict=True):
            arm = place - self.centre
            holding = spring * (1.0 + turn * self.damping)
            dynamic += holding * np.array([[1.0, arm], [arm, arm**2]])
        shift, tilt = np.linalg.solve(dynamic, np.array([force, moment]))
        return [complex(shift + tilt * (place - self.centre)) for place in self.pedestals]


def peak_of_one_turn(unbalances, sensitivity, steps=7200):
    """Largest sum of turning particles seen from one side, by stepping through a turn."""
    turns = 2.0 * np.pi * np.arange(steps) / steps
    seen = np.zeros(steps)
    for unbalance in unbalances:
        seen += unbalance.real * np.cos(turns) - unbalance.imag * np.sin(turns)
    return float(sensitivity * seen.max())


def force_by_acceleration(mass, radius, speed):
    """Mass times the acceleration of a point on a circle, by differences of its path."""
    step = 1e-4 / speed
    before, now, after = (radius * np.exp(1j * speed * moment) for moment in (-step, 0.0, step))
    return mass * abs(after - 2.0 * now + before) / step**2
