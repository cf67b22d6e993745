"""A hub was pushed up its taper on oil: contact, stand-offs, pressures."""

from typing import ClassVar

from models.job.base import Frozen
from models.job.entries import Entry
from models.units import Angle, Duration, Length, Pressure, Ratio, Torque

__all__ = ["Advance", "DrawUp"]


class Advance(Frozen, frozen=True, kw_only=True):
    """The stand-off of a hub at one clock position, dry at zero and drawn up."""

    angle: Angle
    zero: Length
    drawn_up: Length


class DrawUp(Entry, frozen=True, kw_only=True, tag="draw-up"):
    """A hub was drawn up its taper: contact, stand-offs, pressures, hold and tightening."""

    item: str
    advances: tuple[Advance, ...]
    # Share of the bore that the blue touched.
    contact: Ratio | None = None
    contact_note: str = ""
    dilation_pressure: Pressure | None = None
    axial_pressure: Pressure | None = None
    # How long the axial piston was kept after the dilation was released and the oil drained.
    hold: Duration | None = None
    # Growth of the hub's outer diameter, where it was measured: it tells the interference.
    hub_growth: Length | None = None
    nut_torque: Torque | None = None
    instrument: str | None = None

    title: ClassVar[str] = "Drawn up"
