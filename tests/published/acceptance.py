"""Limits of final acceptance as their sources print them."""

import math
from typing import Any, NamedTuple

from tests.published.printed import printed

REVOLUTIONS_PER_MINUTE = 2.0 * math.pi / 60.0
MICROMETRE = 1e-6
MILLIMETRE_PER_SECOND = 1e-3


class SpeedRow(NamedTuple):
    """Root without a cap, both capped limits and what follows for the compressor's probe track."""

    case: str
    source: str
    revolutions: float
    turbine: Any
    compressor: Any
    probe_track: Any


class AmountRow(NamedTuple):
    case: str
    source: str
    given: float
    limit: Any


_TABLE = (
    "computed from 25.4·√(12 000/N) µm; turbine cap of 50 µm: H. P. Bloch, M. P. Singh, Steam "
    "Turbines, 2nd edition, p. 94; compressor cap and probe track from memory: API 617"
)


def _row(revolutions: float, turbine: str, compressor: str, probe_track: str) -> SpeedRow:
    return SpeedRow(
        f"{revolutions:.0f} r/min", _TABLE, revolutions,
        printed(turbine, MICROMETRE), printed(compressor, MICROMETRE),
        printed(probe_track, MICROMETRE),
    )  # fmt: skip


VIBRATION = [
    _row(3000, "50.0", "25.4", "6.35"),
    _row(3600, "46.37", "25.4", "6.35"),
    _row(5000, "39.35", "25.4", "6.35"),
    _row(6000, "35.92", "25.4", "6.35"),
    _row(8000, "31.11", "25.4", "6.35"),
    _row(10_000, "27.82", "25.4", "6.35"),
    _row(12_000, "25.40", "25.40", "6.35"),
    _row(15_000, "22.72", "22.72", "6.00"),
    _row(20_000, "19.67", "19.67", "6.00"),
]

PUMP_SUBTRACTION = [
    AmountRow("a quarter counts", "API 610, 6.9.4.9: 25 % or 6.5 µm, whichever is less",
              20e-6, printed("5.0", MICROMETRE)),
    AmountRow("the cap counts", "API 610, 6.9.4.9: 25 % or 6.5 µm, whichever is less",
              50e-6, printed("6.5", MICROMETRE)),
]  # fmt: skip

PUMP_TRIP = [
    AmountRow("150 %", "API 610, 6.9.4.7", 30e-6, printed("45.0", MICROMETRE)),
]

COMPRESSOR_TRIP = [
    AmountRow("12.7 µm more", "from memory: API 617", 25.4e-6, printed("38.1", MICROMETRE)),
]

PEDESTAL_VELOCITY = [
    AmountRow("up to 3000 r/min", "from memory: API 617, 7th edition, 2.5 mm/s",
              3000, printed("2.5", MILLIMETRE_PER_SECOND)),
    AmountRow("1500 r/min", "from memory: API 617, 7th edition, 2.5 mm/s",
              1500, printed("2.5", MILLIMETRE_PER_SECOND)),
    AmountRow("just above 3000 r/min", "computed: 7400/3000 mm/s",
              3000.01, printed("2.47", MILLIMETRE_PER_SECOND)),
    AmountRow("5000 r/min", "computed: 7400/5000 mm/s",
              5000, printed("1.48", MILLIMETRE_PER_SECOND)),
    AmountRow("7400 r/min", "computed: the floor of 1 mm/s",
              7400, printed("1.0", MILLIMETRE_PER_SECOND)),
    AmountRow("12 000 r/min", "from memory: API 617, 7th edition, 1.0 mm/s",
              12_000, printed("1.0", MILLIMETRE_PER_SECOND)),
]  # fmt: skip


class PumpRow(NamedTuple):
    case: str
    source: str
    bearing_span: float
    shaft_diameter: float
    shaft: Any
    with_clearance: Any
    with_interference: Any


_PUMP = (
    "API 610, 11th edition, table 9: shaft and clearance column from two pump makers' manuals, "
    "interference column and which pair is which from memory"
)
PUMP_RUNOUT = [
    PumpRow("stiff: 1800 mm and 90 mm", _PUMP, 1.8, 0.09,
            printed("25", MICROMETRE), printed("75", MICROMETRE), printed("50", MICROMETRE)),
    PumpRow("flexible: 2000 mm and 80 mm", _PUMP, 2.0, 0.08,
            printed("40", MICROMETRE), printed("90", MICROMETRE), printed("60", MICROMETRE)),
]  # fmt: skip
