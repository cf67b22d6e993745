"""Numbers of balancing as their sources print them."""

import cmath
import math
from typing import Any, NamedTuple

from tests.published.printed import printed

POUND = 0.45359237
OUNCE = POUND / 16.0
INCH = 0.0254
STANDARD_FALL = 9.80665
OUNCE_INCH = OUNCE * INCH
GRAM = 1e-3
GRAM_INCH = GRAM * INCH
GRAM_MILLIMETRE = 1e-6
MILLIMETRE_PER_SECOND = 1e-3
POUND_FORCE = POUND * STANDARD_FALL
REVOLUTIONS_PER_MINUTE = 2.0 * math.pi / 60.0
DEGREE = math.pi / 180.0


def polar(size: float, degrees: float) -> complex:
    return cmath.rect(size, degrees * DEGREE)


class LimitRow(NamedTuple):
    """Weight is the mass on the journal, or the rotor's, in kg; speed in r/min."""

    case: str
    source: str
    mass: float
    revolutions: float
    unbalance: Any


class GradeRow(NamedTuple):
    case: str
    source: str
    mass: float
    grade: float
    revolutions: float
    unbalance: Any


class AllocationRow(NamedTuple):
    case: str
    source: str
    permissible: float
    centre_of_gravity: float
    span: float
    first: Any
    second: Any


class ForceRow(NamedTuple):
    case: str
    source: str
    unbalance: float
    revolutions: float
    force: Any


class OffsetRow(NamedTuple):
    case: str
    source: str
    mass: float
    eccentricity: float
    unbalance: Any


class RoundRow(NamedTuple):
    case: str
    source: str
    trial: float
    places: int
    readings: list[float]
    classical: Any
    fitted: Any
    fitted_degrees: Any


class SplitRow(NamedTuple):
    case: str
    source: str
    vector: complex
    first_degrees: float
    second_degrees: float
    first: Any
    second: Any


class OnePlaneRow(NamedTuple):
    case: str
    source: str
    before: complex
    with_trial: complex
    trial: complex
    size: Any
    degrees: Any


JOURNAL_RULE = [
    LimitRow(
        "500 lb on the journal at 15 000 r/min",
        "Energy-Tech magazine, article 18389, p. 4",
        500 * POUND, 15_000, printed("0.13", OUNCE_INCH),
    ),
    LimitRow(
        "1170 lb at 10 000 r/min in oz·in",
        "computed; journal weight from API 617:2002, chapter 1, annex B.3.2, speed assumed",
        1170 * POUND, 10_000, printed("0.468", OUNCE_INCH),
    ),
    LimitRow(
        "1170 lb at 10 000 r/min in g·mm",
        "computed; journal weight from API 617:2002, chapter 1, annex B.3.2, speed assumed",
        530.7, 10_000, printed("337.0", GRAM_MILLIMETRE),
    ),
    LimitRow(
        "1260 lb at 10 000 r/min in oz·in",
        "computed; journal weight from API 617:2002, chapter 1, annex B.3.2, speed assumed",
        1260 * POUND, 10_000, printed("0.504", OUNCE_INCH),
    ),
    LimitRow(
        "1260 lb at 10 000 r/min in g·mm",
        "computed; journal weight from API 617:2002, chapter 1, annex B.3.2, speed assumed",
        571.5, 10_000, printed("362.9", GRAM_MILLIMETRE),
    ),
    LimitRow(
        "400 kg at 8000 r/min", "by hand: 6350·400/8000",
        400.0, 8000, printed("317.5", GRAM_MILLIMETRE),
    ),
]  # fmt: skip

VERY_HIGH_SPEED = [
    LimitRow(
        "below 25 000 r/min", "from memory: 6350 W/N; by hand 6350·10/20 000",
        10.0, 20_000, printed("3.175", GRAM_MILLIMETRE),
    ),
    LimitRow(
        "at 25 000 r/min", "from memory: 0.254 W",
        10.0, 25_000, printed("2.54", GRAM_MILLIMETRE),
    ),
    LimitRow(
        "above 25 000 r/min", "from memory: 0.254 W",
        10.0, 60_000, printed("2.54", GRAM_MILLIMETRE),
    ),
]  # fmt: skip

_NAVAL_CHART = "a published comparison chart of balance limits, 1000 lb, naval rule"
NAVAL = [
    LimitRow("1000 lb at 15 000 r/min", "Energy-Tech magazine, article 18389, p. 4",
             1000 * POUND, 15_000, printed("0.27", OUNCE_INCH)),
    LimitRow("1000 lb at 150 r/min", _NAVAL_CHART,
             1000 * POUND, 150, printed("177", OUNCE_INCH)),
    LimitRow("1000 lb at 500 r/min", _NAVAL_CHART,
             1000 * POUND, 500, printed("16", OUNCE_INCH)),
    LimitRow("1000 lb at 3000 r/min", _NAVAL_CHART,
             1000 * POUND, 3000, printed("1.33", OUNCE_INCH)),
    LimitRow("1000 lb at 7000 r/min", _NAVAL_CHART,
             1000 * POUND, 7000, printed("0.57", OUNCE_INCH)),
]  # fmt: skip

_GRADE_CHART = "a published comparison chart of balance limits, 1000 lb, G 6.3, half per plane"
GRADES = [
    GradeRow("half of 1000 lb at 150 r/min", _GRADE_CHART,
             500 * POUND, 6.3e-3, 150, printed("126", OUNCE_INCH)),
    GradeRow("half of 1000 lb at 500 r/min", _GRADE_CHART,
             500 * POUND, 6.3e-3, 500, printed("38", OUNCE_INCH)),
    GradeRow("half of 1000 lb at 1000 r/min", _GRADE_CHART,
             500 * POUND, 6.3e-3, 1000, printed("19", OUNCE_INCH)),
    GradeRow("half of 1000 lb at 2000 r/min", _GRADE_CHART,
             500 * POUND, 6.3e-3, 2000, printed("9.5", OUNCE_INCH)),
    GradeRow("turbine of 3600 kg, G 2.5", "computed: 9549·2.5/3000·3600",
             3600.0, 2.5e-3, 3000, printed("28648", GRAM_MILLIMETRE)),
]  # fmt: skip

ALLOCATIONS = [
    AllocationRow(
        "turbine of 3600 kg with 8 µm",
        "from memory: ISO 1940-1:2003, annex, 28 800 into 10 800 and 18 000 g·mm",
        28_800 * GRAM_MILLIMETRE, 1.5, 2.4,
        printed("10800", GRAM_MILLIMETRE), printed("18000", GRAM_MILLIMETRE),
    ),
    AllocationRow(
        "the same, not rounded to 8 µm", "computed: 28 647.9·0.375 and ·0.625",
        28_647.9 * GRAM_MILLIMETRE, 1.5, 2.4,
        printed("10743", GRAM_MILLIMETRE), printed("17905", GRAM_MILLIMETRE),
    ),
    AllocationRow(
        "centre of gravity nearly over the second bearing",
        "from memory: ISO 21940-11, 0.3 and 0.7",
        1000 * GRAM_MILLIMETRE, 0.9, 1.0,
        printed("300", GRAM_MILLIMETRE), printed("700", GRAM_MILLIMETRE),
    ),
    AllocationRow(
        "centre of gravity over the first bearing", "from memory: ISO 21940-11, 0.7 and 0.3",
        1000 * GRAM_MILLIMETRE, 0.0, 1.0,
        printed("700", GRAM_MILLIMETRE), printed("300", GRAM_MILLIMETRE),
    ),
]  # fmt: skip

FORCES = [
    ForceRow("naval limit at 150 r/min", _NAVAL_CHART,
             177 * OUNCE_INCH, 150, printed("7", POUND_FORCE)),
    ForceRow("naval limit at 500 r/min", _NAVAL_CHART,
             16 * OUNCE_INCH, 500, printed("7", POUND_FORCE)),
    ForceRow("naval limit at 3000 r/min", _NAVAL_CHART,
             1.33 * OUNCE_INCH, 3000, printed("21", POUND_FORCE)),
    ForceRow("one oz·in at 1000 r/min", "computed",
             OUNCE_INCH, 1000, printed("1.7752", POUND_FORCE)),
    ForceRow("a tenth of 1000 lb at 3000 r/min",
             "computed: 56 331·W/N² oz·in; a published chart prints 56 347",
             56_331 * 1000 / 3000**2 * OUNCE_INCH, 3000, printed("100.00", POUND_FORCE)),
]  # fmt: skip

OFFSETS = [
    OffsetRow(
        "20 lb on an arbor with 0.001 in total",
        "H. P. Bloch, F. K. Geitner, Machinery Component Maintenance and Repair, ch. 6, p. 282; "
        "number by hand: 9072·0.0005",
        20 * POUND, 0.0005 * INCH, printed("4.54", GRAM_INCH),
    ),
    OffsetRow(
        "50 lb at 0.001 in",
        "by hand: 800·0.001; J. Mancuso on couplings prints 8, a lost decimal",
        50 * POUND, 0.001 * INCH, printed("0.8", OUNCE_INCH),
    ),
    OffsetRow(
        "4 oz at 2 in", "J. Mancuso, the manufacturer's world of coupling potential unbalance",
        4 * OUNCE, 2 * INCH, printed("8", OUNCE_INCH),
    ),
    OffsetRow(
        "800 kg with a total reading of 50 µm", "by hand: 800 000·0.025",
        800.0, 25e-6, printed("20000", GRAM_MILLIMETRE),
    ),
]  # fmt: skip

ROUNDS = [
    RoundRow(
        "residual 6 at 60°, on a place", "computed from 0.5·|R + T|, readings rounded",
        20.0, 6, [11.79, 13.00, 11.79, 8.89, 7.00, 8.89],
        printed("6.00"), printed("5.998"), printed("60.0"),
    ),
    RoundRow(
        "residual 6 at 90°, between places", "computed from 0.5·|R + T|, readings rounded",
        20.0, 6, [10.44, 12.69, 12.69, 10.44, 7.55, 7.55],
        printed("5.08"), printed("6.007"), printed("90.0"),
    ),
]  # fmt: skip

SPLITS = [
    SplitRow("10 at 37° onto 30° and 60°", "computed by the law of sines",
             polar(10.0, 37.0), 30.0, 60.0, printed("7.8146"), printed("2.4374")),
]  # fmt: skip

ONE_PLANE = [
    OnePlaneRow(
        "7 mil at 160°, 5 at 70° with 100 g",
        "computed; inputs of a public tutorial article, a vector approach to single plane "
        "balancing, whose hand graph prints 77.77 g, 4.4 % off, and a shift of 35°",
        polar(7.0, 160.0), polar(5.0, 70.0), 100.0, printed("81.37"), printed("324.46"),
    ),
    OnePlaneRow(
        "4 mil at 45°, 8 at 145° with 4 oz at 20° the other way",
        "computed; inputs from memory: S. Rao, Mechanical Vibrations, a problem",
        polar(4.0, 45.0), polar(8.0, 145.0), polar(4.0, -20.0), printed("1.6762"), printed("35.63"),
    ),
    OnePlaneRow(
        "0.2 mm at 40°, 0.5 mm at 150° with 0.2 kg at 65° the other way",
        "computed; inputs of an examination problem on a homework page",
        polar(0.2, 40.0), polar(0.5, 150.0), polar(0.2, -65.0),
        printed("0.0668"), printed("346.70"),
    ),
]  # fmt: skip
