"""From the truth to what instruments show: the shaft's shape, the dial's and the micrometer's way.

Independent of the program: nothing here is shared with what the program makes of the readings.
"""

import cmath
import math
import random
from collections.abc import Sequence
from dataclasses import dataclass

from sample_data.truth import Diameter, Kink, Truth, Warm

__all__ = [
    "Chance",
    "Lie",
    "bent",
    "change_in_journal_axis",
    "dial_readings",
    "diameter_at",
    "eccentricity",
    "own_bow",
    "warm_kink",
]

# Mean coefficient of the shaft's steel near room temperature, for the bend that a warm side makes.
_SHAFT_EXPANSION = 12.0e-6


class Chance:
    """Chance that is the same on every machine and under every release of every library."""

    def __init__(self, *parts: object) -> None:
        self._source = random.Random("/".join(str(part) for part in parts))

    def normal(self, deviation: float) -> float:
        """Draw from a bell of this standard deviation."""
        # Twelve even draws have a variance of one; unlike gauss() their sum is promised to stay.
        return deviation * (sum(self._source.random() for _ in range(12)) - 6.0)

    def vector(self, deviation: float) -> complex:
        """Draw a vector whose two parts each have this standard deviation."""
        return complex(self.normal(deviation), self.normal(deviation))


@dataclass(frozen=True)
class Lie:
    """The straight line, off the axis of turning, along which the rotor lies in one survey."""

    at_first_journal: complex
    at_second_journal: complex


def _toward(size: float, clock_degrees: float) -> complex:
    return cmath.rect(size, math.radians(clock_degrees))


def _along(truth: Truth, position: float) -> float:
    return (position - truth.first_journal) / (truth.second_journal - truth.first_journal)


def own_bow(truth: Truth, position: float) -> complex:
    """Give the bare shaft's centreline off the journal axis."""
    height = math.sin(math.pi * _along(truth, position))
    return _toward(truth.bow.size, truth.bow.clock_degrees) * height


def bent(kink: Kink, position: float) -> complex:
    """Give what a kink adds: nothing before it, a straight length at its angle beyond."""
    # The shaft bulges away from the side to which its free end turns.
    return -_toward(kink.angle, kink.clock_degrees) * max(0.0, position - kink.position)


def warm_kink(truth: Truth, warm: Warm, position: float, shaft_diameter: float) -> Kink:
    """Give the bend of a shaft of which a short stretch is warmer on one side."""
    angle = _SHAFT_EXPANSION * warm.side_to_side * warm.length / shaft_diameter
    return Kink(position=position, angle=angle, clock_degrees=warm.clock_degrees)


def eccentricity(
    truth: Truth, station: str, position: float, kinks: Sequence[Kink], lie: Lie
) -> complex:
    """Give where the middle of a station's surface lies when the rotor is turned."""
    along = _along(truth, position)
    surface = truth.surface(station)
    # The rotor lies on its journals, so a bend moves everything but them; only how it lies is
    # different each time.
    return (
        lie.at_first_journal
        + along * (lie.at_second_journal - lie.at_first_journal)
        + own_bow(truth, position)
        + change_in_journal_axis(truth, kinks, position)
        + _toward(surface.offset, surface.clock_degrees)
    )


def change_in_journal_axis(truth: Truth, kinks: Sequence[Kink], position: float) -> complex:
    """Give what kinks change at a position, seen from the line through both journals."""
    along = _along(truth, position)

    def moved(place: float) -> complex:
        return sum((bent(kink, place) for kink in kinks), start=0j)

    line = moved(truth.first_journal) * (1 - along) + moved(truth.second_journal) * along
    return moved(position) - line


def dial_readings(
    truth: Truth,
    station: str,
    middle: complex,
    marks_degrees: Sequence[float],
    chance: Chance,
    *,
    zeroed: bool,
) -> tuple[list[float], float]:
    """Read a dial at every mark and at the first once more; positive towards the dial's body."""
    surface = truth.surface(station)

    def read(degrees: float) -> float:
        turn = math.radians(degrees)
        oval_turn = math.radians(degrees - surface.oval_clock_degrees)
        offset = (middle * cmath.exp(-1j * turn)).real
        oval = surface.oval * math.cos(2 * oval_turn)
        return offset + oval + chance.normal(truth.instruments.dial)

    shown = [read(degrees) for degrees in marks_degrees]
    again = read(marks_degrees[0])
    # A dial that nobody sets to zero at the first mark stands where the last station left it.
    start = shown[0] if zeroed else shown[0] + chance.normal(20e-6)
    return [one - start for one in shown], again - start


def diameter_at(size: Diameter, feature: str, along: float, degrees: float) -> float:
    """Give a true diameter at 20 °C; `along` runs from −½ to ½ over the land."""
    mean = size.seat if feature == "seat" else size.bore
    turn = math.radians(degrees - size.oval_clock_degrees)
    # An oval of so much out-of-roundness: the diameter swings by half of it either way.
    return mean + size.taper * along + size.oval / 2 * math.cos(2 * turn)
