"""How many mistakes the patterns find, and how many clean surveys they question.

`python -m tests.bench.blunder_rates [surveys]` simulates rotors of 8 to 14 stations read at 8 to 12
marks with a noise of 1 µm and an indicator of 1 or 2.54 µm, before and after a mount that bends the
shaft by anything from nothing to a good deal, laid anew in between; makes each mistake in turn, and
prints the share questioned at all and the share given its right name.
"""

import math
import sys
from typing import NamedTuple

import numpy as np

from models.engineering.blunders import (
    Mistake,
    TwoSurveys,
    copied_survey,
    decimal_slip,
    likeliest_mistake,
    swapped_bore_and_seat,
    taken_hot,
    twice_or_half,
    unclosed_circle,
    unit_slip,
    wild_reading,
)
from models.engineering.bow_shape import kink_shape
from models.engineering.survey_fit import fit_survey

__all__ = ["MADE", "Shares", "clean_share", "main", "shares_of"]

MICRON = 1e-6
SCATTER = 1.0 * MICRON


class Case(NamedTuple):
    positions: np.ndarray
    marks: np.ndarray
    earlier: np.ndarray
    present: np.ndarray
    closing: np.ndarray
    resolution: float


class Shares(NamedTuple):
    questioned: float
    named: float


class Rotor:
    """Offsets and forms of a rotor's stations, as an indicator sees them."""

    def __init__(self, source):
        self.source = source
        count = int(source.integers(8, 15))
        self.positions = np.sort(source.uniform(0.0, 2.0, size=count))
        self.offsets = self.plane(count) * 4 * MICRON + self.bow(15 * MICRON)
        self.seconds = self.plane(count) * 1.0 * MICRON
        self.thirds = self.plane(count) * 0.4 * MICRON
        self.resolution = float(source.choice([1.0, 2.54])) * MICRON
        self.marks = np.arange(count_of_marks := int(source.integers(8, 13))) * (
            2 * math.pi / count_of_marks
        )

    def plane(self, *shape):
        return self.source.normal(size=shape) + 1j * self.source.normal(size=shape)

    def bow(self, size):
        places = self.positions
        shape = kink_shape(
            positions=places,
            kink_position=float(self.source.uniform(places[1], places[-2])),
            first_journal=float(places[0]),
            second_journal=float(places[-1]),
        )
        return complex(self.plane()) * size * shape / np.abs(shape).max()

    def read(self, marks):
        lie = complex(self.plane()) * 3 * MICRON
        lie = lie + complex(self.plane()) * 3 * MICRON * self.positions
        dial = self.source.uniform(-50, 50, size=self.positions.size) * MICRON
        readings = dial[:, None] + sum(
            np.real(part[:, None] * np.exp(-1j * order * marks[None, :]))
            for order, part in ((1, self.offsets + lie), (2, self.seconds), (3, self.thirds))
        )
        readings = readings + self.source.normal(size=readings.shape) * SCATTER
        return np.round(readings / self.resolution) * self.resolution


def case_of(source, *, turn=0.0):
    rotor = Rotor(source)
    earlier = rotor.read(rotor.marks)
    for chance in (0.7, 0.2):
        # Some mounts leave the shaft alone, most bend it once, some twice.
        if source.uniform() < chance:
            rotor.offsets = rotor.offsets + rotor.bow(source.uniform(0, 20) * MICRON)
    # The tip never comes back to quite the same place along the shaft.
    rotor.seconds = rotor.seconds + rotor.plane(rotor.positions.size) * 0.2 * MICRON
    whole = rotor.read(np.append(rotor.marks, 2 * math.pi) - turn)
    return Case(
        rotor.positions, rotor.marks, earlier, whole[:, :-1], whole[:, -1], rotor.resolution
    )


def texts(table, resolution):
    return [f"{reading / resolution:.0f}" for reading in table.ravel()]


def questions(case):
    """Every suspicion that a survey raises, over all that can be asked of it."""
    found = []
    earlier = fit_survey(angles=case.marks, readings=case.earlier)
    present = fit_survey(angles=case.marks, readings=case.present)
    one = math.sqrt(SCATTER**2 + case.resolution**2 / 12) * math.sqrt(2 / case.marks.size)
    surveys = TwoSurveys(
        positions=case.positions,
        earlier=earlier.eccentricities,
        present=present.eccentricities,
        uncertainties=np.full(case.positions.size, one),
        earlier_seconds=earlier.seconds,
        present_seconds=present.seconds,
    )
    found.append(likeliest_mistake(surveys=surveys, marks=case.marks.size))
    scatters = {"scatter": SCATTER, "resolution": case.resolution}
    for row, last in zip(case.present, case.closing, strict=True):
        found.append(wild_reading(angles=case.marks, readings=row, **scatters))
        found.append(
            unclosed_circle(
                first=float(row[0]), last=float(last), tir=float(np.ptp(row)), **scatters
            )
        )
    found.append(
        copied_survey(
            typed=texts(case.present, case.resolution),
            earlier=texts(case.earlier, case.resolution),
            **scatters,
        )
    )
    return [suspicion for suspicion in found if suspicion is not None]


def fit_questions(source, mistake):
    """Sizes, totals and temperatures of one mount, with one of them wrong, or all right."""
    seat = source.uniform(0.08, 0.25)
    interference = source.uniform(0.8e-3, 1.6e-3) * seat
    limits = {"least_interference": 0.8e-3 * seat, "greatest_interference": 1.6e-3 * seat}
    bore = seat - interference
    tir = source.uniform(10, 60) * MICRON
    typed_tir = tir + source.normal() * MICRON
    part = 21.0 + source.normal() * 0.4
    typed = seat
    if mistake is Mistake.WRONG_UNIT:
        typed = seat / 25.4
    if mistake is Mistake.SLIPPED_DECIMAL:
        typed = seat * 10
    if mistake is Mistake.TWICE_OR_HALF:
        typed_tir = typed_tir / 2
    if mistake is Mistake.SWAPPED_BORE_AND_SEAT:
        typed, bore = bore, seat
    if mistake is Mistake.TAKEN_HOT:
        part += source.uniform(3, 30)
    nominal = round(seat, 3)
    found = [
        unit_slip(value=typed, expected=nominal),
        decimal_slip(value=typed, expected=nominal),
        twice_or_half(value=typed_tir, expected=tir, tolerance=0.15),
        swapped_bore_and_seat(bore=bore, seat=typed, **limits),
        taken_hot(part_temperature=part, shaft_temperature=21.0, allowed_difference=2.0),
    ]
    return [suspicion for suspicion in found if suspicion is not None]


def scaled(factor):
    def make(source, case):
        return case._replace(present=case.present * factor, closing=case.closing * factor)

    return make


def mirrored(source, case):
    order = -np.arange(case.marks.size) % case.marks.size
    present = case.present[:, order]
    return case._replace(present=present, closing=case.closing)


def turned(source, case):
    return case_of(source, turn=source.uniform(math.radians(20), math.radians(340)))


def skipped(source, case):
    present, closing = case.present.copy(), case.closing.copy()
    station = int(source.integers(case.positions.size))
    present[station] = np.roll(present[station], int(source.choice([-1, 1])))
    closing[station] = present[station, 0]
    return case._replace(present=present, closing=closing)


def swapped(source, case):
    order = np.arange(case.positions.size)
    station = int(source.integers(case.positions.size - 1))
    order[[station, station + 1]] = station + 1, station
    return case._replace(present=case.present[order], closing=case.closing[order])


def copied(source, case):
    return case._replace(present=case.earlier, closing=case.earlier[:, 0])


def wild(source, case):
    present = case.present.copy()
    station = int(source.integers(case.positions.size))
    mark = int(source.integers(1, case.marks.size))
    present[station, mark] += source.choice([-1, 1]) * source.uniform(10, 60) * MICRON
    return case._replace(present=present)


def unclosed(source, case):
    closing = case.closing.copy()
    station = int(source.integers(case.positions.size))
    closing[station] += source.choice([-1, 1]) * source.uniform(8, 40) * MICRON
    return case._replace(closing=closing)


MADE = {
    "25.4 times": (Mistake.WRONG_UNIT, scaled(25.4)),
    "1/25.4": (Mistake.WRONG_UNIT, scaled(1 / 25.4)),
    "10 times": (Mistake.SLIPPED_DECIMAL, scaled(10.0)),
    "twice": (Mistake.TWICE_OR_HALF, scaled(2.0)),
    "sign flipped": (Mistake.FLIPPED_SIGN, scaled(-1.0)),
    "angles mirrored": (Mistake.MIRRORED_ANGLES, mirrored),
    "mark turned by 20° to 340°": (Mistake.TURNED_MARK, turned),
    "one station read a mark off": (Mistake.SKIPPED_MARK, skipped),
    "neighbours swapped": (Mistake.SWAPPED_STATIONS, swapped),
    "whole survey copied": (Mistake.COPIED, copied),
    "one reading wild by 10 to 60 µm": (Mistake.WILD_READING, wild),
    "circle not closed by 8 to 40 µm": (Mistake.CIRCLE_NOT_CLOSED, unclosed),
}

ABOUT_A_FIT = (
    Mistake.WRONG_UNIT,
    Mistake.SLIPPED_DECIMAL,
    Mistake.TWICE_OR_HALF,
    Mistake.SWAPPED_BORE_AND_SEAT,
    Mistake.TAKEN_HOT,
)


def clean_share(*, surveys, seed):
    """Share of clean surveys that are questioned, and how often by which mistake."""
    source = np.random.default_rng(seed)
    questioned, names = 0, {}
    for _ in range(surveys):
        found = questions(case_of(source)) + fit_questions(source, None)
        questioned += bool(found)
        for suspicion in found:
            names[suspicion.mistake] = names.get(suspicion.mistake, 0) + 1
    return questioned / surveys, names


def shares_of(name, *, surveys, seed):
    mistake, make = MADE[name]
    source = np.random.default_rng(seed)
    found = [questions(make(source, case_of(source))) for _ in range(surveys)]
    return _shares(found, mistake)


def shares_of_a_fit(mistake, *, surveys, seed):
    source = np.random.default_rng(seed)
    return _shares([fit_questions(source, mistake) for _ in range(surveys)], mistake)


def _shares(found, mistake):
    count = len(found)
    return Shares(
        sum(bool(suspicions) for suspicions in found) / count,
        sum(any(one.mistake is mistake for one in suspicions) for suspicions in found) / count,
    )


def main(surveys):
    write = sys.stdout.write
    share, names = clean_share(surveys=surveys, seed=21)
    write(f"clean surveys questioned: {share:.2%} of {surveys}  {names}\n")
    write(f"{'mistake made':38}{'questioned':>12}{'right name':>12}\n")
    for name in MADE:
        shares = shares_of(name, surveys=surveys, seed=22)
        write(f"{name:38}{shares.questioned:12.1%}{shares.named:12.1%}\n")
    for mistake in ABOUT_A_FIT:
        shares = shares_of_a_fit(mistake, surveys=surveys, seed=23)
        write(f"{'one figure: ' + mistake:38}{shares.questioned:12.1%}{shares.named:12.1%}\n")


if __name__ == "__main__":
    main(int(sys.argv[1]) if len(sys.argv) > 1 else 2000)
