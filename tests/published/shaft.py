"""Numbers for shafts as their sources print them: shear, loads, slenderness, first critical."""

import math
from typing import Any, NamedTuple

from tests.published.printed import printed

INCH = 0.0254
PSI = 6894.757293168361
POUND = 0.45359237
STANDARD_FALL = 9.80665
REVOLUTIONS_PER_MINUTE = 2.0 * math.pi / 60.0
POUND_INCH = POUND * STANDARD_FALL * INCH
MILLIMETRE = 1e-3
KILONEWTON = 1e3
NO_MASS = 1e-6


class ShearRow(NamedTuple):
    case: str
    source: str
    torque: float
    outer_diameter: float
    inner_diameter: float
    stress: Any


class TorqueRow(NamedTuple):
    """The source starts from the stress and prints the torque that makes it."""

    case: str
    source: str
    stress: float
    outer_diameter: float
    torque: Any


class LoadRow(NamedTuple):
    case: str
    source: str
    mass: float
    centre_of_gravity: float
    first_journal: float
    second_journal: float
    first: Any
    second: Any


class FlexibilityRow(NamedTuple):
    case: str
    source: str
    bearing_span: float
    shaft_diameter: float
    factor: Any


class BeamRow(NamedTuple):
    """Sections as start, end, outer, inner diameter, modulus, density; masses as position, mass."""

    case: str
    source: str
    sections: list[tuple[float, float, float, float, float, float]]
    masses: list[tuple[float, float]]
    first_bearing: float
    second_bearing: float
    number: Any


SHEAR = [
    ShearRow(
        "40 kW at 900 r/min",
        "T. Philpot, MecMovies, 6.17: 424.413 N·m on 30.660 mm at 75 MPa",
        424.413, 30.660e-3, 0.0, printed("75.00", 1e6),
    ),
    ShearRow(
        "1000 hp at 60 r/min on 8 in",
        "computed; inputs from a textbook problem page that prints no answer",
        1_050_423 * POUND_INCH, 8 * INCH, 0.0, printed("10449", PSI),
    ),
    ShearRow(
        "10 000 hp at 10 000 r/min on 4 in",
        "computed from 63 025 in·lb",
        63_025 * POUND_INCH, 4 * INCH, 0.0, printed("5015", PSI),
    ),
    ShearRow(
        "50 kW at 95 r/min",
        "computed: 5025.9 N·m on 77.50 mm at 55 MPa; inputs from a textbook problem page",
        5025.9, 77.50e-3, 0.0, printed("55.0", 1e6),
    ),
    ShearRow(
        "bore of half the diameter",
        "by hand: 16/(1 − 1/16) = 17.0667 kPa for π N·m on 0.1 m",
        math.pi, 0.1, 0.05, printed("17.0667", 1e3),
    ),
]  # fmt: skip

TORQUE = [
    TorqueRow(
        "8000 psi on 1.306 in",
        "an engineering class site, torsional shear stress in a section of a shaft: 3500 lb·in",
        8000 * PSI, 1.306 * INCH, printed("3.50e3", POUND_INCH),
    ),
]  # fmt: skip

JOURNAL_LOADS = [
    LoadRow(
        "3600 kg, 1500 mm and 900 mm",
        "by hand: 1350 kg and 2250 kg",
        3600.0, 1.5, 0.0, 2.4, printed("13.24", KILONEWTON), printed("22.06", KILONEWTON),
    ),
    LoadRow(
        "overhung 200 mm beyond a span of 1000 mm",
        "by hand: +600 kg and −100 kg",
        500.0, -0.2, 0.0, 1.0,
        printed("600", STANDARD_FALL), printed("-100", STANDARD_FALL),
    ),
]  # fmt: skip

FLEXIBILITY = [
    FlexibilityRow(
        "1800 mm and 90 mm", "computed from the definition L⁴/D²",
        1.8, 0.09, printed("1.296e9", MILLIMETRE**2),
    ),
    FlexibilityRow(
        "2000 mm and 80 mm", "computed from the definition L⁴/D²",
        2.0, 0.08, printed("2.50e9", MILLIMETRE**2),
    ),
]  # fmt: skip

_UGURAL_END = (64 * 0.3e-6 / math.pi) ** 0.25
_UGURAL_MIDDLE = (64 * 0.6e-6 / math.pi) ** 0.25
_UGURAL = [
    (0.0, 0.25, _UGURAL_END, 0.0, 200e9, NO_MASS),
    (0.25, 0.75, _UGURAL_MIDDLE, 0.0, 200e9, NO_MASS),
    (0.75, 1.0, _UGURAL_END, 0.0, 200e9, NO_MASS),
]

DEFLECTION = [
    BeamRow(
        "stepped shaft, 400 N amid 1 m",
        "A. Ugural, Mechanical Design, example 9.6: 3WL³/(256EI); number by hand",
        _UGURAL, [(0.5, 400.0 / STANDARD_FALL)], 0.0, 1.0, printed("7.8125e-5"),
    ),
]  # fmt: skip

CRITICAL_SPEED = [
    BeamRow(
        "uniform steel shaft of 1 in and 100 in",
        "an article that quotes Machinery's Handbook: 4 768 668·d/L² r/min, to the three digits "
        "that do not depend on its unstated modulus and weight",
        [(0.0, 100 * INCH, INCH, 0.0, 30e6 * PSI, 0.2828 * POUND / INCH**3)], [],
        0.0, 100 * INCH, printed("477", REVOLUTIONS_PER_MINUTE),
    ),
    BeamRow(
        "the same to seven digits",
        "computed: 4 768 432·d/L² with 30e6 psi and 0.2828 lb/in³",
        [(0.0, 100 * INCH, INCH, 0.0, 30e6 * PSI, 0.2828 * POUND / INCH**3)], [],
        0.0, 100 * INCH, printed("476.843", REVOLUTIONS_PER_MINUTE),
    ),
    BeamRow(
        "uniform shaft of 0.1 m and 1 m",
        "computed: (π/L)²·√(EI/(ρA))",
        [(0.0, 1.0, 0.1, 0.0, 206.8e9, 7850.0)], [], 0.0, 1.0,
        printed("12093", REVOLUTIONS_PER_MINUTE),
    ),
    BeamRow(
        "10 kg amid 500 mm of 30 mm",
        "computed; inputs from an examination problem page",
        [(0.0, 0.5, 0.03, 0.0, 2.1e11, NO_MASS)], [(0.25, 10.0)], 0.0, 0.5,
        printed("90.12", 2.0 * math.pi),
    ),
    BeamRow(
        "the same as the examiner rounds it",
        "from memory: 90 Hz",
        [(0.0, 0.5, 0.03, 0.0, 2.1e11, NO_MASS)], [(0.25, 10.0)], 0.0, 0.5,
        printed("90", 2.0 * math.pi),
    ),
    BeamRow(
        "stepped shaft, 400 N amid 1 m",
        "computed with 9.81 m/s²; inputs from A. Ugural, Mechanical Design, example 9.6",
        _UGURAL, [(0.5, 400.0 / 9.81)], 0.0, 1.0, printed("3384", REVOLUTIONS_PER_MINUTE),
    ),
]  # fmt: skip
