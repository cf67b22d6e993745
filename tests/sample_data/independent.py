"""A small reduction of surveys that shares nothing with the program or with what made the data."""

import cmath
import math

import numpy as np

INCH = 0.0254
PER_UNIT = {"in": INCH, "mm": 1e-3, "µm": 1e-6}


def number(written):
    """Read "4.0005 in" as metres."""
    value, unit = written.split()
    return float(value) * PER_UNIT[unit]


def vectors(survey):
    """Fit offset and oval to each station's readings; the offset as a complex number in metres."""
    turn = np.radians([float(angle.typed) for angle in survey.angles])
    basis = np.column_stack(
        [np.ones_like(turn), np.cos(turn), np.sin(turn), np.cos(2 * turn), np.sin(2 * turn)]
    )
    found = {}
    for one in survey.stations:
        readings = np.array([float(text) for text in one.typed]) * PER_UNIT[survey.unit]
        (_, cosine, sine, _, _), *_ = np.linalg.lstsq(basis, readings, rcond=None)
        found[one.station] = complex(cosine, sine)
    return found


def total(survey, station):
    readings = [float(text) for text in survey.readings(station).typed]
    return (max(readings) - min(readings)) * PER_UNIT[survey.unit]


def in_journal_axis(plan, found):
    """Take the line through both journals off every station's vector."""
    place = {station.key: number(station.position.written) for station in plan.stations}
    first, second = plan.first_journal, plan.second_journal
    slope = (found[second] - found[first]) / (place[second] - place[first])
    return {
        key: vector - found[first] - slope * (place[key] - place[first])
        for key, vector in found.items()
    }


def changes(plan, before, after):
    """Difference of two surveys at the stations that both have, in the journal axis."""
    old, new = (in_journal_axis(plan, vectors(survey)) for survey in (before, after))
    return {key: new[key] - old[key] for key in new if key in old}


def bulge(kink, first, second, position):
    """Offset of a bent shaft from the axis through its journals, by similar triangles."""
    span = second - first
    low, high = sorted((position, kink.position))
    size = kink.angle * (low - first) * (second - high) / span
    return cmath.rect(1.0, math.radians(kink.clock_degrees)) * size


def doubt(truth, marks):
    """Standard deviation of each part of a vector: reading and rounding, over so many marks."""
    dial = truth.instruments
    reading = math.hypot(dial.dial, dial.dial_resolution / math.sqrt(12))
    return reading * math.sqrt(2 / marks)
