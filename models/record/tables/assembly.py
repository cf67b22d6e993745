"""Entries of an assembly beyond the first form: a hub drawn up, a station watched."""

from sqlalchemy.orm import Mapped

from models.record.tables.base import Base, Detail, Part

__all__ = ["DrawUp", "DrawUpAdvance", "StationWatched"]


class DrawUp(Detail, Base):
    """A hub was pushed up its taper on oil; its stand-offs stand in `draw_up_advance`."""

    __tablename__ = "draw_up"

    item: Mapped[str]
    contact_typed: Mapped[str | None]
    contact_unit: Mapped[str | None]
    contact_ppm: Mapped[int | None]
    contact_note: Mapped[str]
    dilation_pressure_typed: Mapped[str | None]
    dilation_pressure_unit: Mapped[str | None]
    dilation_pressure_pa: Mapped[int | None]
    axial_pressure_typed: Mapped[str | None]
    axial_pressure_unit: Mapped[str | None]
    axial_pressure_pa: Mapped[int | None]
    hold_typed: Mapped[str | None]
    hold_unit: Mapped[str | None]
    hold_ms: Mapped[int | None]
    hub_growth_typed: Mapped[str | None]
    hub_growth_unit: Mapped[str | None]
    hub_growth_nm: Mapped[int | None]
    # Thousandths of a newton-metre.
    nut_torque_typed: Mapped[str | None]
    nut_torque_unit: Mapped[str | None]
    nut_torque_mnm: Mapped[int | None]
    instrument: Mapped[str | None]


class DrawUpAdvance(Part, Base):
    """Stand-off of a hub at one clock position, dry at zero and drawn up."""

    __tablename__ = "draw_up_advance"

    angle_typed: Mapped[str]
    angle_unit: Mapped[str]
    angle_mdeg: Mapped[int]
    zero_typed: Mapped[str]
    zero_unit: Mapped[str]
    zero_nm: Mapped[int]
    drawn_up_typed: Mapped[str]
    drawn_up_unit: Mapped[str]
    drawn_up_nm: Mapped[int]


class StationWatched(Detail, Base):
    """What an indicator left at one station shows while the rotor cools."""

    __tablename__ = "station_watched"

    station: Mapped[str]
    value_typed: Mapped[str]
    value_unit: Mapped[str]
    value_nm: Mapped[int]
    angle_typed: Mapped[str | None]
    angle_unit: Mapped[str | None]
    angle_mdeg: Mapped[int | None]
    instrument: Mapped[str | None]
