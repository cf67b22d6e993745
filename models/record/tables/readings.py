"""Readings: as typed, with their unit, and as whole numbers of a small unit."""

from sqlalchemy import CheckConstraint
from sqlalchemy.orm import Mapped
from sqlalchemy.schema import SchemaItem

from models.record.tables.base import Base, Reading

__all__ = ["GaugeTry", "RunoutReading", "SizeReading", "TemperatureReading"]


class RunoutReading(Reading, Base):
    """One reading of a runout survey; `typed` is NULL where there is no surface to read."""

    __tablename__ = "runout_reading"

    station: Mapped[str]
    # mark, again (the first mark once more), swept total, total, high spot.
    what: Mapped[str]
    mark_index: Mapped[int | None]
    typed: Mapped[str | None]
    unit: Mapped[str | None]
    value_nm: Mapped[int | None]
    value_mdeg: Mapped[int | None]
    seconds_into_survey: Mapped[int | None]

    @classmethod
    def more(cls) -> tuple[SchemaItem, ...]:
        """Give an index to marks only, and one value to a typed number."""
        return (
            CheckConstraint("(what = 'mark') = (mark_index IS NOT NULL)", name="mark_has_index"),
            CheckConstraint(
                "(typed IS NULL) = (value_nm IS NULL AND value_mdeg IS NULL)",
                name="typed_has_value",
            ),
        )


class SizeReading(Reading, Base):
    """One diameter; `typed` is NULL where there is no surface to read."""

    __tablename__ = "size_reading"

    position_index: Mapped[int]
    angle_index: Mapped[int]
    typed: Mapped[str | None]
    unit: Mapped[str | None]
    value_nm: Mapped[int | None]

    @classmethod
    def more(cls) -> tuple[SchemaItem, ...]:
        """Demand a value for a typed number."""
        return (CheckConstraint("(typed IS NULL) = (value_nm IS NULL)", name="typed_has_value"),)


class TemperatureReading(Reading, Base):
    """A temperature of the hot part (`where_on_part`), or around and along the rotor."""

    __tablename__ = "temperature_reading"

    temperature_typed: Mapped[str]
    temperature_unit: Mapped[str]
    temperature_mk: Mapped[int]
    where_on_part: Mapped[str | None]
    land: Mapped[str | None]
    angle_typed: Mapped[str | None]
    angle_unit: Mapped[str | None]
    angle_mdeg: Mapped[int | None]
    position_typed: Mapped[str | None]
    position_unit: Mapped[str | None]
    position_nm: Mapped[int | None]

    @classmethod
    def more(cls) -> tuple[SchemaItem, ...]:
        """Place it on the hot part or along the rotor, not both."""
        return (
            CheckConstraint(
                "(where_on_part IS NULL) <> (position_nm IS NULL)", name="one_kind_of_place"
            ),
        )


class GaugeTry(Reading, Base):
    """A hot-bore gauge offered to the bore."""

    __tablename__ = "gauge_try"

    land: Mapped[str]
    size_typed: Mapped[str]
    size_unit: Mapped[str]
    size_nm: Mapped[int]
    passed: Mapped[int]

    @classmethod
    def more(cls) -> tuple[SchemaItem, ...]:
        """Let it pass or not."""
        return (CheckConstraint("passed IN (0, 1)", name="passed_yes_no"),)
