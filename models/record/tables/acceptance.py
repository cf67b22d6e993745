"""Entries of final acceptance: high-speed runs and residual magnetism."""

from sqlalchemy.orm import Mapped

from models.record.tables.base import Base, Detail, Part

__all__ = ["FieldReading", "HighSpeedRun", "Magnetism", "VibrationReading"]


class HighSpeedRun(Detail, Base):
    """The rotor ran at speed; readings stand in `vibration_reading`."""

    __tablename__ = "high_speed_run"

    where_run: Mapped[str]
    speed_typed: Mapped[str]
    speed_unit: Mapped[str]
    # Thousandths of a turn per minute.
    speed_mrpm: Mapped[int]
    instrument: Mapped[str]


class VibrationReading(Part, Base):
    """Vibration at one probe, peak to peak."""

    __tablename__ = "vibration_reading"

    place: Mapped[str]
    amplitude_typed: Mapped[str]
    amplitude_unit: Mapped[str]
    amplitude_nm: Mapped[int]


class Magnetism(Detail, Base):
    """Residual magnetism; readings stand in `field_reading`."""

    __tablename__ = "magnetism"

    instrument: Mapped[str]


class FieldReading(Part, Base):
    """Residual magnetism at one place."""

    __tablename__ = "field_reading"

    place: Mapped[str]
    value_typed: Mapped[str]
    value_unit: Mapped[str]
    value_nt: Mapped[int]
