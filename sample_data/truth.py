"""What is really so about the two invented rotors; every reading in the job files follows from it.

All in SI (m, rad, °C, K), clock angles in degrees from the reference mark. None of it appears in a
job file: the files hold what people with real instruments would have read off these shafts.
"""

from dataclasses import dataclass

__all__ = [
    "COMPRESSOR",
    "PUMP",
    "Bow",
    "Diameter",
    "Instruments",
    "Kink",
    "Mounted",
    "Oven",
    "Slip",
    "Surface",
    "Truth",
    "Warm",
]

INCH = 0.0254
MICROMETRE = 1e-6
FAHRENHEIT_350 = 350 * 5 / 9 - 160 / 9
FAHRENHEIT_400 = 400 * 5 / 9 - 160 / 9


@dataclass(frozen=True)
class Bow:
    """The bare shaft's own bow: half a sine wave from journal to journal."""

    size: float
    clock_degrees: float


@dataclass(frozen=True)
class Surface:
    """How the surface at a station lies on the shaft's axis: off centre, and oval."""

    station: str
    offset: float
    clock_degrees: float
    oval: float
    oval_clock_degrees: float


@dataclass(frozen=True)
class Kink:
    """A sharp bend at one place, named by the side to which the shaft then bulges."""

    position: float
    angle: float
    clock_degrees: float


@dataclass(frozen=True)
class Warm:
    """One side of a stretch of the rotor is warmer than the other by so many kelvin."""

    side_to_side: float
    clock_degrees: float
    length: float
    above_surroundings: float


@dataclass(frozen=True)
class Mounted:
    """What one attempt did to the shaft, and how warm it was at a survey read too early."""

    step: str
    attempt: int
    kink: Kink
    read_warm: Warm | None = None


@dataclass(frozen=True)
class Diameter:
    """A seat or a bore at 20 °C: mean, taper from end to end, and out-of-roundness."""

    item: str
    land: str
    seat: float
    bore: float
    taper: float
    oval: float
    oval_clock_degrees: float


@dataclass(frozen=True)
class Oven:
    """How a part's mean temperature stands to the oven's set point, and what the shop sets."""

    item: str
    usual_set_point: float
    lag: float


@dataclass(frozen=True)
class Slip:
    """A slipped decimal in a survey, corrected by the reader: where, and at which mark."""

    step: str
    station: str
    mark: int


@dataclass(frozen=True)
class Instruments:
    """Standard deviations of what the readers and their instruments add, and the resolutions."""

    dial: float
    dial_resolution: float
    size: float
    size_resolution: float
    temperature: float
    # How far the rotor lies off its supports' line from survey to survey.
    lie: float


@dataclass(frozen=True)
class Truth:
    """All that is so about one rotor."""

    seed: str
    first_journal: float
    second_journal: float
    expansion_factor: float
    bow: Bow
    surfaces: tuple[Surface, ...]
    mounted: tuple[Mounted, ...]
    diameters: tuple[Diameter, ...]
    ovens: tuple[Oven, ...]
    slips: tuple[Slip, ...]
    instruments: Instruments

    def surface(self, station: str) -> Surface:
        """Find the surface of a station."""
        return next(one for one in self.surfaces if one.station == station)

    def mount(self, step: str, attempt: int) -> Mounted:
        """Find what an attempt did."""
        return next(one for one in self.mounted if (one.step, one.attempt) == (step, attempt))

    def diameters_of(self, item: str) -> tuple[Diameter, ...]:
        """List the fits of an item, land by land."""
        return tuple(one for one in self.diameters if one.item == item)

    def oven(self, item: str) -> Oven:
        """Find how an item was heated."""
        return next(one for one in self.ovens if one.item == item)


def _inches(
    item: str, seat: float, interference: float, *, oval: float = 0.0001, clock: float = 30.0
) -> Diameter:
    return Diameter(
        item=item,
        land="1",
        seat=seat * INCH,
        bore=(seat - interference) * INCH,
        taper=0.0001 * INCH,
        oval=oval * INCH,
        oval_clock_degrees=clock,
    )


def _kink_inches(position: float, angle: float, clock: float) -> Kink:
    return Kink(position=position * INCH, angle=angle, clock_degrees=clock)


COMPRESSOR = Truth(
    seed="compressor",
    first_journal=10.0 * INCH,
    second_journal=74.0 * INCH,
    expansion_factor=0.95,
    bow=Bow(size=3.2 * MICROMETRE, clock_degrees=72.0),
    surfaces=(
        Surface("J1", 0.0, 0.0, 0.6 * MICROMETRE, 40.0),
        Surface("P1", 1.3 * MICROMETRE, 211.0, 0.5 * MICROMETRE, 10.0),
        Surface("B1", 2.2 * MICROMETRE, 35.0, 0.9 * MICROMETRE, 75.0),
        Surface("K3", 2.0 * MICROMETRE, 118.0, 0.7 * MICROMETRE, 20.0),
        Surface("K5", 1.6 * MICROMETRE, 164.0, 0.8 * MICROMETRE, 155.0),
        Surface("K7", 2.4 * MICROMETRE, 95.0, 0.6 * MICROMETRE, 80.0),
        Surface("K9", 1.2 * MICROMETRE, 17.0, 0.9 * MICROMETRE, 130.0),
        Surface("K10", 1.9 * MICROMETRE, 322.0, 0.5 * MICROMETRE, 65.0),
        Surface("B2", 1.5 * MICROMETRE, 260.0, 0.7 * MICROMETRE, 100.0),
        Surface("J2", 0.0, 0.0, 0.7 * MICROMETRE, 120.0),
        Surface("P2", 1.1 * MICROMETRE, 48.0, 0.4 * MICROMETRE, 170.0),
        Surface("E1", 9.0 * MICROMETRE, 80.0, 0.3 * MICROMETRE, 15.0),
        Surface("E2", 6.5 * MICROMETRE, 195.0, 1.0 * MICROMETRE, 45.0),
        Surface("E3", 7.8 * MICROMETRE, 301.0, 0.9 * MICROMETRE, 90.0),
    ),
    mounted=(
        Mounted(
            "impeller-1",
            1,
            _kink_inches(23.75, 6.0e-6, 140.0),
            read_warm=Warm(
                side_to_side=2.6, clock_degrees=250.0, length=0.36, above_surroundings=6.0
            ),
        ),
        Mounted("spacer-1", 1, _kink_inches(27.5, 3.5e-6, 20.0)),
        # Turns the high spot at E1 by about 90 degrees and leaves its total as it was.
        Mounted("impeller-2", 1, _kink_inches(31.25, 58.5e-6, 215.5)),
        Mounted("impeller-2", 2, _kink_inches(31.25, 7.0e-6, 284.0)),
        Mounted("spacer-2", 1, _kink_inches(35.0, 4.0e-6, 95.0)),
        Mounted("impeller-3", 1, _kink_inches(38.75, 8.0e-6, 332.0)),
        Mounted("spacer-3", 1, _kink_inches(42.5, 3.0e-6, 180.0)),
        Mounted("impeller-4", 1, _kink_inches(46.25, 47.0e-6, 163.0)),
        Mounted("impeller-4", 2, _kink_inches(46.25, 6.5e-6, 58.0)),
    ),
    diameters=(
        _inches("impeller-1", 5.9900, 0.0070),
        _inches("spacer-1", 5.9850, 0.0063, clock=75.0),
        _inches("impeller-2", 5.9800, 0.0071, clock=110.0),
        _inches("spacer-2", 5.9750, 0.0062, clock=10.0),
        # Tighter than its sisters, within the limits all the same.
        _inches("impeller-3", 5.9700, 0.0086, clock=50.0),
        _inches("spacer-3", 5.9650, 0.0064, clock=20.0),
        _inches("impeller-4", 5.9600, 0.0072, clock=95.0),
    ),
    ovens=(
        Oven("impeller-1", usual_set_point=FAHRENHEIT_400, lag=2.0),
        Oven("spacer-1", usual_set_point=FAHRENHEIT_350, lag=1.5),
        Oven("impeller-2", usual_set_point=FAHRENHEIT_400, lag=2.0),
        Oven("spacer-2", usual_set_point=FAHRENHEIT_350, lag=1.5),
        Oven("impeller-3", usual_set_point=FAHRENHEIT_400, lag=2.0),
        Oven("spacer-3", usual_set_point=FAHRENHEIT_350, lag=1.5),
        Oven("impeller-4", usual_set_point=FAHRENHEIT_400, lag=2.0),
    ),
    slips=(Slip("spacer-2", "K7", 5),),
    instruments=Instruments(
        dial=0.7 * MICROMETRE,
        dial_resolution=0.0001 * INCH,
        size=0.9 * MICROMETRE,
        size_resolution=0.0001 * INCH,
        temperature=0.05,
        lie=1.5 * MICROMETRE,
    ),
)


def _fit(item: str, seat: float, interference: float, clock: float, land: str) -> Diameter:
    return Diameter(
        item=item,
        land=land,
        seat=seat * 1e-3,
        bore=(seat - interference) * 1e-3,
        taper=2.0 * MICROMETRE,
        oval=1.5 * MICROMETRE,
        oval_clock_degrees=clock,
    )


_IMPELLER_SEATS = (80.40, 80.35, 80.30, 80.25, 80.20, 80.15, 80.10, 80.05)
_IMPELLER_FITS = (0.054, 0.057, 0.052, 0.055, 0.058, 0.053, 0.056, 0.054)
_IMPELLER_BENDS = (
    (4.0e-6, 10.0),
    (5.0e-6, 130.0),
    (3.5e-6, 255.0),
    (6.0e-6, 48.0),
    (4.5e-6, 301.0),
    (5.5e-6, 190.0),
    (3.0e-6, 77.0),
    (4.0e-6, 222.0),
)


def _kink_mm(position: float, angle: float, clock: float) -> Kink:
    return Kink(position=position * 1e-3, angle=angle, clock_degrees=clock)


PUMP = Truth(
    seed="pump",
    first_journal=0.180,
    second_journal=1.700,
    expansion_factor=0.99,
    bow=Bow(size=5.0 * MICROMETRE, clock_degrees=215.0),
    surfaces=(
        Surface("J1", 0.0, 0.0, 0.5 * MICROMETRE, 70.0),
        Surface("P1", 1.0 * MICROMETRE, 100.0, 0.4 * MICROMETRE, 5.0),
        Surface("B1", 2.1 * MICROMETRE, 290.0, 0.8 * MICROMETRE, 150.0),
        Surface("K2", 1.8 * MICROMETRE, 45.0, 0.6 * MICROMETRE, 25.0),
        Surface("K4", 1.4 * MICROMETRE, 333.0, 0.9 * MICROMETRE, 110.0),
        Surface("K6", 2.3 * MICROMETRE, 150.0, 0.5 * MICROMETRE, 60.0),
        Surface("K8", 1.7 * MICROMETRE, 208.0, 0.7 * MICROMETRE, 95.0),
        Surface("K9", 1.5 * MICROMETRE, 81.0, 0.6 * MICROMETRE, 140.0),
        Surface("B2", 1.9 * MICROMETRE, 12.0, 0.8 * MICROMETRE, 35.0),
        Surface("J2", 0.0, 0.0, 0.6 * MICROMETRE, 165.0),
        Surface("P2", 0.9 * MICROMETRE, 240.0, 0.4 * MICROMETRE, 85.0),
        Surface("R1", 8.0 * MICROMETRE, 65.0, 1.2 * MICROMETRE, 20.0),
        Surface("R4", 9.5 * MICROMETRE, 180.0, 1.0 * MICROMETRE, 125.0),
        Surface("R7", 7.0 * MICROMETRE, 310.0, 1.4 * MICROMETRE, 55.0),
        Surface("D1", 6.0 * MICROMETRE, 25.0, 0.9 * MICROMETRE, 10.0),
        Surface("H1", 5.0 * MICROMETRE, 130.0, 0.8 * MICROMETRE, 75.0),
    ),
    mounted=(
        *(
            Mounted(f"impeller-{number}", 1, _kink_mm(340.0 + 110.0 * number, angle, clock))
            for number, (angle, clock) in enumerate(_IMPELLER_BENDS, start=1)
        ),
        Mounted("drum", 1, _kink_mm(1335.0, 5.0e-6, 160.0)),
        Mounted("end-sleeves", 1, _kink_mm(290.0, 0.5e-6, 0.0)),
        Mounted("thrust-collar", 1, _kink_mm(1775.0, 2.0e-6, 270.0)),
        Mounted("hub", 1, _kink_mm(60.0, 2.0e-6, 33.0)),
        Mounted("nut", 1, _kink_mm(1812.0, 1.0e-6, 110.0)),
    ),
    diameters=(
        *(
            _fit(f"impeller-{number}", seat, interference, 20.0 * number, "1")
            for number, (seat, interference) in enumerate(
                zip(_IMPELLER_SEATS, _IMPELLER_FITS, strict=True), start=1
            )
        ),
        _fit("drum", 80.00, 0.055, 15.0, "inner"),
        _fit("drum", 79.90, 0.053, 70.0, "outer"),
        _fit("thrust-collar", 65.00, 0.036, 120.0, "1"),
        _fit("hub", 60.00, 0.046, 45.0, "1"),
    ),
    ovens=(
        *(Oven(f"impeller-{number}", usual_set_point=190.0, lag=2.0) for number in range(1, 9)),
        Oven("drum", usual_set_point=190.0, lag=2.5),
        Oven("thrust-collar", usual_set_point=170.0, lag=1.5),
        Oven("hub", usual_set_point=190.0, lag=2.0),
    ),
    slips=(Slip("impeller-5", "K6", 8),),
    instruments=Instruments(
        dial=0.5 * MICROMETRE,
        dial_resolution=1.0 * MICROMETRE,
        size=0.8 * MICROMETRE,
        size_resolution=1.0 * MICROMETRE,
        temperature=0.05,
        lie=3.0 * MICROMETRE,
    ),
)
