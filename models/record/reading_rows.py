"""Readings as rows of their tables, and back."""

from models.job import GaugeTry, Hot, RunoutReading, SizeReading, Warmth
from models.record import tables
from models.record.flat import Cell, Row, columns_of, quantity_from, struct_from
from models.record.places import AnyReading
from models.record.tables import Base
from models.units import Angle, Length

__all__ = [
    "READING_TABLES",
    "TABLE_OF",
    "high_spot_of",
    "reading_from",
    "reading_row",
    "table_of_reading",
]

READING_TABLES: tuple[type[Base], ...] = (
    tables.RunoutReading,
    tables.SizeReading,
    tables.TemperatureReading,
    tables.GaugeTry,
)
TABLE_OF: dict[type, type[Base]] = {
    RunoutReading: tables.RunoutReading,
    SizeReading: tables.SizeReading,
    Hot: tables.TemperatureReading,
    Warmth: tables.TemperatureReading,
    GaugeTry: tables.GaugeTry,
}
_NO_HOT: dict[str, Cell] = {"where_on_part": None, "land": None}
_NO_POSITION: dict[str, Cell] = {
    "position_typed": None,
    "position_unit": None,
    "position_nm": None,
}


def table_of_reading(reading: AnyReading) -> type[Base]:
    """Find the table that takes a reading."""
    return TABLE_OF[type(reading)]


def reading_row(reading: AnyReading, *, unit: str | None) -> dict[str, Cell]:
    """Lay a reading flat; bare numbers are in the unit of their survey.

    Raises
    ------
    UnreadableNumberError
        If what was typed is no length, or no angle for a high spot.
    """
    if isinstance(reading, RunoutReading):
        return _runout(reading, unit)
    if isinstance(reading, SizeReading):
        return {
            "position_index": reading.position,
            "angle_index": reading.angle,
            **_length(reading.typed, unit),
        }
    if isinstance(reading, Hot):
        return {**columns_of(reading, leave=("at",)), **_NO_POSITION}
    if isinstance(reading, Warmth):
        return {**columns_of(reading), **_NO_HOT}
    return columns_of(reading, leave=("at",))


def _length(typed: str | None, unit: str | None) -> dict[str, Cell]:
    if typed is None:
        return {"typed": None, "unit": None, "value_nm": None}
    read = Length.read(typed, unit)
    return {"typed": typed, "unit": read.unit, "value_nm": read.whole}


def _runout(reading: RunoutReading, unit: str | None) -> dict[str, Cell]:
    at_mark = isinstance(reading.mark, int)
    row: dict[str, Cell] = {
        "station": reading.station,
        "what": "mark" if at_mark else str(reading.mark),
        "mark_index": reading.mark if isinstance(reading.mark, int) else None,
        "value_mdeg": None,
        **_length(None, None),
    }
    if reading.mark == "high spot" and reading.typed is not None:
        angle = Angle.read(reading.typed, "°")
        return {**row, "typed": angle.typed, "unit": angle.unit, "value_mdeg": angle.whole}
    return {**row, **_length(reading.typed, unit)}


def reading_from(kind: type[Base], row: Row) -> AnyReading:
    """Take a reading up from its row."""
    if kind is tables.RunoutReading:
        mark = row["mark_index"] if row["what"] == "mark" else row["what"]
        return RunoutReading(station=row["station"], mark=mark, typed=row["typed"])
    if kind is tables.SizeReading:
        return SizeReading(
            position=row["position_index"], angle=row["angle_index"], typed=row["typed"]
        )
    if kind is tables.GaugeTry:
        return struct_from(GaugeTry, row, given={"at": row["taken_at"]})
    if row["where_on_part"] is None:
        return struct_from(Warmth, row)
    return struct_from(Hot, row, given={"at": row["taken_at"]})


def high_spot_of(row: Row) -> Angle | None:
    """Take the angle of a high spot up from its row."""
    named = {"value_typed": row["typed"], "value_unit": row["unit"], **row}
    return quantity_from(Angle, "value", named)
