"""One reading of a station that is watched while the rotor cools."""

from typing import ClassVar

from models.job.entries import Entry
from models.units import Angle, Length

__all__ = ["StationWatched"]


class StationWatched(Entry, frozen=True, kw_only=True, tag="station watched"):
    """What an indicator left at one station shows at one mark; its moment is `done_at`.

    Readings of one station and mark make a series that tells where a cooling shaft will end. It
    advises; a survey is what counts.
    """

    station: str
    value: Length
    angle: Angle | None = None
    instrument: str | None = None

    title: ClassVar[str] = "Station watched"
