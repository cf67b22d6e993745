"""Balance: runs, corrections, trial-weight rounds and weighed journals of a job."""

from typing import ClassVar, Literal

from models.job.base import Frozen
from models.job.entries import Entry
from models.units import Angle, Mass, Speed, Unbalance

__all__ = [
    "BalanceCorrection",
    "BalanceRun",
    "JournalsWeighed",
    "PlaneReading",
    "TrialReading",
    "TrialRound",
]


class PlaneReading(Frozen, frozen=True, kw_only=True):
    """Unbalance read in one plane."""

    plane: str
    amount: Unbalance
    angle: Angle


class BalanceRun(Entry, frozen=True, kw_only=True, tag="balance run"):
    """The rotor ran in the balancing machine: speed, and what was read in each plane."""

    purpose: Literal["as found", "after correction", "verification"]
    speed: Speed
    instrument: str
    readings: tuple[PlaneReading, ...]

    title: ClassVar[str] = "Balance run"


class BalanceCorrection(Entry, frozen=True, kw_only=True, tag="balance correction"):
    """Something was taken off or put on to balance the rotor."""

    plane: str
    angle: Angle
    amount: Unbalance
    how: Literal["ground", "drilled", "weight added"]
    # The part it was made on; one elsewhere than on the part just added is allowed by somebody.
    item: str | None = None
    allowed_by: str | None = None

    title: ClassVar[str] = "Balance corrected"


class TrialReading(Frozen, frozen=True, kw_only=True):
    """What the machine showed with the trial weight at one angle, in its own unit."""

    angle: Angle
    reading: str


class TrialRound(Entry, frozen=True, kw_only=True, tag="trial round"):
    """A trial weight went round one plane, to show what unbalance is left."""

    plane: str
    trial: Unbalance
    instrument: str
    readings: tuple[TrialReading, ...]
    # Read without the trial weight: tells which of two answers is true.
    plain: str | None = None

    title: ClassVar[str] = "Trial-weight round"


class JournalsWeighed(Entry, frozen=True, kw_only=True, tag="journals weighed"):
    """The rotor lay on scales: what each journal carries."""

    first: Mass
    second: Mass
    instrument: str

    title: ClassVar[str] = "Journals weighed"
