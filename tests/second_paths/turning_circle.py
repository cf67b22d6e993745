"""A round or lobed surface turned about a wrong centre under an indicator, point by point.

Shares nothing with the program: the surface is a polygon of many points, turned bodily, and the
indicator is the ray on which the outermost crossing is looked for.
"""

import math

import numpy as np

__all__ = ["dial_readings", "discrete_spectrum"]


def dial_readings(*, radius, offset, marks, lobes=None, points=20_000):
    """Where the outline of a disc, offset from its axis of rotation, meets the indicator's ray."""
    around = np.linspace(0.0, 2.0 * math.pi, points, endpoint=False)
    shape = np.full(points, radius)
    for count, size, angle in lobes or ():
        shape = shape + size * np.cos(count * (around - angle))
    outline_x = shape * np.cos(around) + offset.real
    outline_y = shape * np.sin(around) + offset.imag
    readings = []
    for mark in marks:
        # Turning the disc back by the mark's angle brings the mark under the ray along +x.
        x = outline_x * math.cos(mark) + outline_y * math.sin(mark)
        y = outline_y * math.cos(mark) - outline_x * math.sin(mark)
        crossing = np.flatnonzero((y <= 0.0) & (np.roll(y, -1) > 0.0) & (x > 0.0))
        here = int(crossing[0])
        after = (here + 1) % points
        share = -y[here] / (y[after] - y[here])
        readings.append(x[here] + share * (x[after] - x[here]) - radius)
    return np.array(readings)


def discrete_spectrum(readings):
    """Amplitudes a + jb of each harmonic of evenly spaced readings, by a fast Fourier transform."""
    return 2.0 * np.conj(np.fft.rfft(readings)) / len(readings)
