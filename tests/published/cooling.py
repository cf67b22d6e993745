"""Printed numbers on the cooling of hot parts and of shafts."""

from typing import NamedTuple

CENGEL_PIPE = "Y. A. Çengel, hot-water pipe example, read in a secondary source"
INCROPERA = "F. P. Incropera, D. P. DeWitt, example 9.4, from memory"
CENGEL_BALL = "Y. A. Çengel, annealing of carbon-steel balls, answers from memory"
BEJAN = "A. Bejan, A. D. Kraus, Heat Transfer Handbook"
NOT_PUBLISHED = "computed apart; no publication claimed"


class Pipe(NamedTuple):
    """Warm horizontal cylinder in still air, with the air's properties as the source gives them."""

    case: str
    source: str
    diameter: float
    difference: float
    film_kelvin: float
    conductivity: float
    viscosity: float
    prandtl: float
    rayleigh: str
    nusselt: str
    heat_per_metre: str


PIPES = [
    Pipe("80 mm at 70 °C", CENGEL_PIPE + ": 443 W from 6 m", 0.08, 50.0, 318.0,
         0.02699, 1.749e-5, 0.7241, "1.869e6", "17.40", "73.8"),
    Pipe("100 mm at 165 °C",
         f"by hand with the data of {INCROPERA}, which prints 5.073e6, 23.3 and 325 W/m",
         0.1, 142.0, 367.0, 0.0313, 22.8e-6, 22.8 / 32.8, "5.07e6", "23.1", "322"),
]  # fmt: skip


class Face(NamedTuple):
    """Warm vertical plate in still air, Rayleigh and Prandtl number as the source gives them."""

    case: str
    source: str
    rayleigh: float
    prandtl: float
    nusselt: str


FACES = [
    Face(
        "2 ft at 130 °F", "Y. A. Çengel, solution of problem 9-19E, read", 5.503e8, 0.7256, "102.6"
    ),
    Face("0.6 m at 90 °C", "Y. A. Çengel, example 9-2, from memory", 7.656e8, 0.7202, "113.4"),
]


class Radiation(NamedTuple):
    """Radiation of a metre of pipe; temperatures in kelvin, as the source rounds them."""

    case: str
    source: str
    diameter: float
    surface: float
    room: float
    emissivity: float
    heat_per_metre: str


RADIATIONS = [Radiation("100 mm at 438 K", INCROPERA, 0.1, 438.0, 296.0, 0.85, "441")]


class AirRow(NamedTuple):
    """Air as another table has it."""

    case: str
    source: str
    kelvin: float
    conductivity: float
    dynamic_viscosity: float
    density: float


_SECOND_TABLE = "neutrium.net, properties of air at 1 atm, read"

AIR_ROWS = [
    AirRow("300 K", _SECOND_TABLE, 300.0, 0.0261, 1.85e-5, 1.177),
    AirRow("400 K", _SECOND_TABLE, 400.0, 0.0331, 2.29e-5, 0.883),
    AirRow("500 K", _SECOND_TABLE, 500.0, 0.0395, 2.68e-5, 0.706),
    AirRow("550 K", _SECOND_TABLE, 550.0, 0.0426, 2.86e-5, 0.642),
    AirRow("600 K", _SECOND_TABLE, 600.0, 0.0456, 3.03e-5, 0.589),
]


class Ball(NamedTuple):
    """Steel ball of 8 mm cooling from 900 to 100 °C in air of 35 °C."""

    case: str
    source: str
    length: float
    biot: str
    seconds: str


BALLS = [
    Ball("length as the book rounds it, 1.3 mm", CENGEL_BALL, 0.0013, "0.0018", "163"),
    Ball(
        "length as it is, d/6", f"by hand; {CENGEL_BALL} rounds it", 0.008 / 6, "0.00185", "167.6"
    ),
]


class PowerLaw(NamedTuple):
    """Share of the excess left after two first time constants, coefficient as ΔT to a power."""

    case: str
    source: str
    power: float
    share_left: str


POWER_LAWS = [
    PowerLaw("one quarter", f"{BEJAN}, eq. 3.286, by hand (1 + 2/4)^-4", 0.25, "0.197531"),
    PowerLaw("one third", f"{BEJAN}, eq. 3.286, by hand (1 + 2/3)^-3", 1.0 / 3.0, "0.216000"),
    PowerLaw("none", "by hand, e^-2", 0.0, "0.135335"),
]


class IntoSpace(NamedTuple):
    """Convection and radiation together to surroundings at absolute zero."""

    case: str
    source: str
    start_kelvin: float
    coefficient: float
    emissivity: float
    capacity_per_area: float
    seconds: float
    end_kelvin: str


INTO_SPACE = [
    IntoSpace("20 mm of steel, an hour",
              f"{BEJAN}, eq. 3.284, root {NOT_PUBLISHED}",
              673.15, 15.0, 0.8, 7850.0 * 480.0 * 0.02, 3600.0, "269.540"),
]  # fmt: skip


class Shaft(NamedTuple):
    """Steel shaft in still air: time constant, and time from 100 K to 2 K above the room."""

    case: str
    source: str
    diameter: float
    time_constant_hours: str
    waiting_hours: str


_SHAFT = f"ρ c D/(4 h) with 7850 · 470 and h = 10; {NOT_PUBLISHED}"

SHAFTS = [
    Shaft("80 mm", _SHAFT, 0.080, "2.0", "8"),
    Shaft("100 mm", _SHAFT, 0.100, "2.6", "10"),
    Shaft("150 mm", _SHAFT, 0.150, "3.8", "15"),
    Shaft("200 mm", _SHAFT, 0.200, "5.1", "20"),
    Shaft("300 mm", _SHAFT, 0.300, "7.7", "30"),
]


class Bow(NamedTuple):
    """Indicator total of a shaft that is 1 K warmer on one side."""

    case: str
    source: str
    diameter: float
    span: float
    total_micrometres: str


_BOW = "by hand, 12e-6 · L²/(4 D)"

BOWS = [
    Bow("100 mm on 1.5 m", _BOW, 0.100, 1.5, "67.5"),
    Bow("150 mm on 2 m", _BOW, 0.150, 2.0, "80"),
    Bow("200 mm on 3 m", _BOW, 0.200, 3.0, "135"),
]


class Remainder(NamedTuple):
    """What two surveys leave: difference in µm, interval and time constant in hours."""

    case: str
    source: str
    difference: float
    interval: float
    time_constant: float
    remainder: str


REMAINDERS = [
    Remainder("half an hour at 5 h", "by hand, 2/(e^0.1 − 1)", 2.0, 0.5, 5.0, "19"),
    Remainder("one time constant", "by hand, 2/(e − 1)", 2.0, 5.0, 5.0, "1.164"),
    Remainder("halved between the two", "by hand, 2/(2 − 1)", 2.0, 3.465736, 5.0, "2.000"),
]


class HangingPart(NamedTuple):
    """Steel part in still air losing 77.5 K: bore, outer diameter, length in mm; start in °C."""

    case: str
    source: str
    bore: float
    outer: float
    length: float
    start: float
    mass: str


_PART = f"{NOT_PUBLISHED}; mass by hand with 7850 kg/m³"

HANGING_PARTS = [
    HangingPart("sleeve", _PART, 120, 150, 100, 200, "5.0"),
    HangingPart("thrust collar", _PART, 100, 250, 40, 250, "12.9"),
    HangingPart("coupling hub", _PART, 100, 160, 120, 250, "11.5"),
    HangingPart("large coupling hub", _PART, 150, 250, 150, 300, "37"),
    HangingPart("impeller", _PART, 130, 500, 60, 300, "86"),
    HangingPart("balance drum", _PART, 160, 320, 200, 300, "95"),
    HangingPart("wheel", _PART, 200, 750, 90, 350, "290"),
]
