"""Final acceptance beyond runout and balance: what the plan asks, the high-speed run, magnetism."""

from typing import ClassVar, Literal

from models.job.base import Frozen
from models.job.entries import Entry
from models.units import FieldStrength, Length, Speed

__all__ = ["FieldReading", "HighSpeedRun", "Magnetism", "VibrationReading"]


class VibrationReading(Frozen, frozen=True, kw_only=True):
    """Vibration at one probe, unfiltered, peak to peak."""

    place: str
    amplitude: Length


class HighSpeedRun(Entry, frozen=True, kw_only=True, tag="high-speed run"):
    """The rotor ran at speed: in a vacuum chamber, on a test bed or in its machine."""

    where_run: Literal["vacuum chamber", "test bed", "in its machine"]
    speed: Speed
    instrument: str
    readings: tuple[VibrationReading, ...]

    title: ClassVar[str] = "High-speed run"


class FieldReading(Frozen, frozen=True, kw_only=True):
    """Residual magnetism at one place, in free air, in either sense."""

    place: str
    value: FieldStrength


class Magnetism(Entry, frozen=True, kw_only=True, tag="magnetism"):
    """Residual magnetism, read after magnetic-particle work and before the rotor leaves."""

    instrument: str
    readings: tuple[FieldReading, ...]

    title: ClassVar[str] = "Magnetism"
