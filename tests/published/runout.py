"""Numbers for runout that do not come from this program, each with where it does come from."""

import math
from typing import NamedTuple

__all__ = [
    "BLOCKS",
    "CHANGES",
    "DATUM",
    "FACES",
    "KINKS",
    "LOSSES",
    "SLIPS",
    "TURNS",
    "WARM_SIDES",
    "WORKSHEET",
    "WORKSHEET_SOURCE",
    "at",
]

OWN = "computed independently, no publication"
EXACT_SUM = "by hand: 20·cos(θ−40°) + 5·cos 2(θ−10°) + 2·cos 3(θ−25°), rounded to a tenth"


def at(size: float, degrees: float) -> complex:
    return complex(size * math.cos(math.radians(degrees)), size * math.sin(math.radians(degrees)))


class Turn(NamedTuple):
    case: str
    source: str
    readings: tuple[float, ...]
    offset: str
    offset_degrees: str
    second: str | None
    second_lobe_degrees: str | None
    total: str
    out_of_roundness: str | None


TURNS = [
    Turn(
        "two and three lobes, eight marks",
        f"{OWN}; readings {EXACT_SUM}",
        (20.5, 22.6, 6.2, -1.7, -11.1, -19.2, -15.6, -1.7),
        "19.965", "40.02", "4.998", "9.9", "41.8", "11.85",
    ),
    Turn(
        "two and three lobes, twelve marks",
        f"{OWN}; readings {EXACT_SUM}",
        (20.5, 25.5, 17.4, 6.2, 0.2, -4.0, -11.1, -17.8, -19.1, -15.6, -7.8, 5.8),
        "19.984", "40.01", "4.999", "10.0", "44.6", "12.47",
    ),
    Turn(
        "four marks take three lobes for offset",
        f"{OWN}; readings {EXACT_SUM}",
        (20.5, 6.2, -11.1, -15.6),
        "19.195", "34.6", None, None, "36.1", None,
    ),
    Turn(
        "tenths of a thousandth of an inch, eight marks",
        OWN,
        (0, 8, 12, 10, 2, -7, -12, -9),
        "12.071", "95.74", "0.500", None, "24", "1.22",
    ),
]  # fmt: skip


class Loss(NamedTuple):
    source: str
    count: int
    percent: str


LOSSES = [
    Loss("by hand: 1 − cos 45°", 4, "29.3"),
    Loss("by hand: 1 − cos 30°", 6, "13.4"),
    Loss("by hand: 1 − cos 22.5°", 8, "7.6"),
    Loss("by hand: 1 − cos 15°", 12, "3.4"),
    Loss("by hand: 1 − cos 11.25°", 16, "1.9"),
    Loss("by hand: 1 − cos 7.5°", 24, "0.9"),
]


class Corrected(NamedTuple):
    source: str
    position: float
    measured: complex
    line: str
    line_degrees: str
    corrected: str
    corrected_degrees: str
    raw_total: str
    corrected_total: str


# Journals: 6 µm at 30° at 0 mm, and 4 µm at 250° at 1800 mm.
DATUM = [
    Corrected(OWN, 0.300, at(12, 75), "4.510", "24.55", "9.769", "95.85", "24.00", "19.54"),
    Corrected(OWN, 0.900, at(22, 95), "1.951", "348.79", "22.622", "99.75", "44.00", "45.24"),
    Corrected(OWN, 2.100, at(9, 200), "5.471", "243.25", "6.262", "163.23", "18.00", "12.52"),
]


class Change(NamedTuple):
    case: str
    source: str
    before: complex
    after: complex
    plain: str
    vector: str


CHANGES = [
    Change("a quarter turn", "by hand: 2·10·√2", at(10, 0), at(10, 90), "0", "28.3"),
    Change("half a turn", "by hand: 2·(10 + 12)", at(10, 0), at(12, 180), "4", "44"),
    Change("the same way", "by hand: 2·(14 − 10)", at(10, 0), at(14, 0), "8", "8"),
]


class Kink(NamedTuple):
    case: str
    source: str
    offsets: tuple[float, ...]
    position: str
    bend_microradians: str
    squares: str


# Stations every 200 mm from 0 to 1600 mm, journals at the ends; 60 µrad at 900 mm.
KINKS = [
    Kink(
        "without noise",
        "by hand: κ·z·(L−z₀)/L and κ·z₀·(L−z)/L",
        (0, -5.25, -10.5, -15.75, -21.0, -20.25, -13.5, -6.75, 0),
        "0.900", "60.0", "0",
    ),
    Kink(
        "with noise",
        OWN,
        (0.2, -4.85, -10.3, -16.45, -20.5, -20.05, -13.8, -6.45, 0.2),
        "0.90", "59.77", "1.218",
    ),
]  # fmt: skip


class Face(NamedTuple):
    case: str
    source: str
    tir: float
    diameter: float
    microradians: str


FACES = [
    Face("0.0005 in on 8 in", "by hand: total over diameter", 0.0005 * 0.0254, 8 * 0.0254, "62.5"),
    Face("10 µm on 200 mm", "by hand: total over diameter", 10e-6, 0.2, "50"),
]


class Slip(NamedTuple):
    source: str
    total: float
    degrees: float
    change: str


SLIPS = [
    Slip("by hand: 2·40·sin 2.5°", 40.0, 5.0, "3.5"),
    Slip("by hand: 2·40·sin 15°, one mark of twelve", 40.0, 30.0, "21"),
]


class Block(NamedTuple):
    """Factors for 1, 2, 3 … 10 lobes."""

    source: str
    included_degrees: float
    factors: tuple[str, ...]


_OWN_BLOCK = "computed independently; the row for 90° agrees with BS 3730-3 from memory"

BLOCKS = [
    Block(_OWN_BLOCK, 60.0, ("0", "0", "3", "0", "0", "3", "0", "0", "3", "0")),
    Block(
        _OWN_BLOCK, 90.0,
        ("0", "1.00", "2.00", "-0.41", "2.00", "1.00", "0", "2.41", "0", "1.00"),
    ),
    Block(
        _OWN_BLOCK, 108.0,
        ("0", "1.38", "1.38", "0", "2.24", "0", "1.38", "1.38", "0", "2.24"),
    ),
    Block(
        _OWN_BLOCK, 120.0,
        ("0", "1.58", "1.00", "0.42", "2.00", "-0.15", "2.00", "0.42", "1.00", "1.58"),
    ),
]  # fmt: skip


class WarmSide(NamedTuple):
    source: str
    span: float
    diameter: float
    difference: float
    bow: str
    total: str


# Expansion 11.5e-6 per kelvin.
WARM_SIDES = [
    WarmSide("by hand: αΔT·L²/(8D)", 2.000, 0.200, 1.0, "28.75", "57.5"),
    WarmSide("by hand: αΔT·L²/(8D)", 1.500, 0.150, 1.0, "21.6", "43"),
    WarmSide("by hand: αΔT·L²/(8D)", 2.500, 0.250, 2.0, "71.9", "144"),
]


class Row(NamedTuple):
    """Totals at four points of one bearing, and half their differences as the sheet prints them."""

    north: float
    south: float
    east: float
    west: float
    north_south_half: str
    east_west_half: str


WORKSHEET_SOURCE = (
    "US Bureau of Reclamation, FIST 2-1, Alignment of vertical shaft hydrounits, page 22, figure 16"
)

# One row for each quarter turn of the shaft; inches. The halves are printed without sign, with the
# side the shaft leans to beside them.
WORKSHEET = [
    Row(0.3470, 0.3590, 0.3540, 0.3525, ".0060", ".00075"),
    Row(0.3460, 0.3605, 0.3490, 0.3575, ".00725", ".00425"),
    Row(0.3510, 0.3550, 0.3480, 0.3585, ".0020", ".00525"),
    Row(0.3520, 0.3540, 0.3530, 0.3535, ".0010", ".00025"),
]
