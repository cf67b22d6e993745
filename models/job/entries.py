"""Entries of a job: what was done, measured and found, in the order it was recorded.

An entry is never changed. A correction names what it replaces, with a reason, and both stay:
single readings keep what was struck in `corrections`, whole entries name theirs in `supersedes`.
Instants are ISO 8601 with the local offset. Numbers stand as typed, with their unit.
"""

from typing import ClassVar, Literal

from models.job.base import Frozen
from models.job.plan import Disposition, Role
from models.units import Angle, Length, Temperature

__all__ = [
    "AttemptOpened",
    "AxialMeasured",
    "Check",
    "Confirmation",
    "Cooling",
    "Correction",
    "Decision",
    "Entry",
    "GaugeTry",
    "Handling",
    "Heating",
    "Hot",
    "Mount",
    "Note",
    "Place",
    "Question",
    "Removal",
    "RunoutReading",
    "RunoutSurvey",
    "SetUp",
    "Settled",
    "Signature",
    "SizeReading",
    "SizeSurvey",
    "StationReadings",
    "SurveyPurpose",
    "Warmth",
]

PlaceKind = Literal["as received", "teardown", "bare shaft", "shaft repair", "attempt", "final"]
SurveyPurpose = Literal["bare shaft", "before", "after", "again", "bare seat", "final"]


class Place(Frozen, frozen=True, kw_only=True):
    """Where in the visit an entry belongs."""

    kind: PlaceKind
    step: str | None = None
    attempt: int | None = None


class Entry(Frozen, frozen=True, kw_only=True, tag_field="entry"):
    """What every entry says: where it belongs, who, when, under which plan."""

    id: str
    place: Place
    by: str
    done_at: str
    entered_at: str
    plan: str
    written_by: str | None = None
    supersedes: str | None = None
    reason: str | None = None
    # Why it was taken although the order did not allow it; such an entry opens a finding.
    out_of_order: str | None = None

    title: ClassVar[str] = "Entry"


class Correction(Frozen, frozen=True, kw_only=True):
    """A single reading that was typed and later replaced; the new value stands in its place."""

    where: tuple[str, ...]
    was: str
    now: str
    reason: str
    by: str
    at: str


class AttemptOpened(Entry, frozen=True, kw_only=True, tag="attempt"):
    """An attempt at a step begins; it names the survey it will be judged against."""

    baseline: str | None = None
    components: tuple[tuple[str, str], ...] = ()

    title: ClassVar[str] = "Attempt opened"


class SizeSurvey(Entry, frozen=True, kw_only=True, tag="sizes"):
    """Diameters of a bore or a seat over one land: axial positions × clock angles."""

    item: str
    land: str
    feature: Literal["bore", "seat"]
    instrument: str
    unit: str
    positions: tuple[Length, ...]
    angles: tuple[Angle, ...]
    typed: tuple[tuple[str | None, ...], ...]
    part_temperature: Temperature | None = None
    gauge_temperature: Temperature | None = None
    closed_at: str | None = None
    corrections: tuple[Correction, ...] = ()
    kept: tuple["Question", ...] = ()

    title: ClassVar[str] = "Sizes"


class Check(Frozen, frozen=True, kw_only=True):
    """One thing confirmed, or found otherwise."""

    what: str
    answer: Literal["yes", "no", "does not apply"]
    note: str = ""


class Confirmation(Entry, frozen=True, kw_only=True, tag="confirmation"):
    """What was looked at before the furnace, or again before the door."""

    item: str
    moment: Literal["before the furnace", "before the door"]
    serial: str
    checks: tuple[Check, ...]

    title: ClassVar[str] = "Confirmed"


class Hot(Frozen, frozen=True, kw_only=True):
    """A temperature of the hot part, where and when."""

    where: Literal["bore", "web", "rim"]
    temperature: Temperature
    at: str
    land: str | None = None
    angle: Angle | None = None


class GaugeTry(Frozen, frozen=True, kw_only=True):
    """A hot-bore gauge offered to the bore."""

    land: str
    size: Length
    passed: bool
    at: str


class Heating(Entry, frozen=True, kw_only=True, tag="heating"):
    """How the part was heated and what was measured on it."""

    item: str
    method: str
    set_point: Temperature | None = None
    shaft_temperature: Temperature | None = None
    instrument: str | None = None
    temperatures: tuple[Hot, ...] = ()
    gauge: tuple[GaugeTry, ...] = ()
    corrections: tuple[Correction, ...] = ()

    title: ClassVar[str] = "Heated"


class Mount(Entry, frozen=True, kw_only=True, tag="mount"):
    """The part went on, or stopped short."""

    item: str
    outcome: Literal["seated", "stopped short"]
    door_opened_at: str | None = None
    seated_at: str | None = None
    shoulder: Literal["felt all round", "gap", "not judged"] = "not judged"
    clock_position: Angle | None = None

    title: ClassVar[str] = "Mounted"


class AxialMeasured(Entry, frozen=True, kw_only=True, tag="axial"):
    """Where the part came to rest, hot or cold."""

    item: str
    state: Literal["hot", "cold"]
    value: Length
    instrument: str | None = None

    title: ClassVar[str] = "Axial position"


class Warmth(Frozen, frozen=True, kw_only=True):
    """A temperature around or along the rotor."""

    position: Length
    angle: Angle
    temperature: Temperature


class Cooling(Entry, frozen=True, kw_only=True, tag="cooling"):
    """Temperatures around and along the rotor at one moment, and of its surroundings."""

    surroundings: Temperature | None = None
    instrument: str | None = None
    temperatures: tuple[Warmth, ...] = ()
    corrections: tuple[Correction, ...] = ()

    title: ClassVar[str] = "Cooling"


class SetUp(Frozen, frozen=True, kw_only=True):
    """How the rotor lay and was read; a change is judged only between surveys of one set-up."""

    attitude: Literal["vertical", "horizontal"]
    supports: str
    supported_at: tuple[str, ...] = ()
    end_stop: str = ""
    indicators: tuple[str, ...] = ()
    rest_time: str = ""
    turns_before_reading: int = 0
    tip: str = ""
    lever_angle: Angle | None = None
    base: str = ""

    def differences(self, other: "SetUp") -> tuple[str, ...]:
        """Name what differs in a way that keeps two surveys from being compared."""
        return tuple(
            word
            for word, here, there in (
                ("attitude", self.attitude, other.attitude),
                ("supports", self.supports, other.supports),
                ("supported at", self.supported_at, other.supported_at),
                ("end stop", self.end_stop, other.end_stop),
                ("base", self.base, other.base),
            )
            if here != there
        )


class StationReadings(Frozen, frozen=True, kw_only=True):
    """Readings of one station, mark by mark as typed; None where there was none or no surface."""

    station: str
    typed: tuple[str | None, ...] = ()
    again: str | None = None
    seconds: tuple[int | None, ...] = ()
    swept_total: str | None = None
    # Without readings at marks: a total alone, or with the angle of its high spot.
    total: str | None = None
    high_spot: Angle | None = None


class Question(Frozen, frozen=True, kw_only=True):
    """A reading that was questioned and how that was answered."""

    where: tuple[str, ...]
    question: str
    answer: str
    by: str
    at: str


class RunoutSurvey(Entry, frozen=True, kw_only=True, tag="runout"):
    """The runout of every station in reach, in one set-up."""

    purpose: SurveyPurpose
    set_up: SetUp
    unit: str
    angles: tuple[Angle, ...]
    stations: tuple[StationReadings, ...]
    instrument: str
    read_by: str | None = None
    counted: Literal["as planned", "the other way"] = "as planned"
    closed_at: str | None = None
    corrections: tuple[Correction, ...] = ()
    kept: tuple[Question, ...] = ()

    title: ClassVar[str] = "Runout survey"

    @property
    def is_closed(self) -> bool:
        """Whether the survey has been closed and may be judged as a whole."""
        return self.closed_at is not None

    def readings(self, station: str) -> StationReadings | None:
        """Find the readings of a station."""
        return next((one for one in self.stations if one.station == station), None)


class Removal(Entry, frozen=True, kw_only=True, tag="removal"):
    """A part came off again."""

    item: str
    method: str
    found: str = ""
    temperature: Temperature | None = None

    title: ClassVar[str] = "Removed"


class Settled(Entry, frozen=True, kw_only=True, tag="settled"):
    """How an attempt ended."""

    outcome: Literal["within limits", "removed", "conceded"]
    survey: str | None = None

    title: ClassVar[str] = "Settled"


class Handling(Entry, frozen=True, kw_only=True, tag="handling"):
    """A lift, a lay-down, a turn-over, a trial fit or a planned removal: no remount."""

    what: Literal["lift", "lay-down", "turn-over", "trial fit", "planned removal", "overnight"]
    words: str = ""

    title: ClassVar[str] = "Handled"


class Note(Entry, frozen=True, kw_only=True, tag="note"):
    """Something seen and worth keeping."""

    words: str

    title: ClassVar[str] = "Note"


class Decision(Entry, frozen=True, kw_only=True, tag="decision"):
    """What was decided about a finding or a doubt, by whom and why."""

    about: str
    disposition: Disposition
    words: str
    # By what right; the finding's number; the customer's agreement where the plan asks for it.
    authority: str | None = None
    finding: int | None = None
    agreed_by: str | None = None
    agreed_how: str | None = None

    title: ClassVar[str] = "Decided"


class Signature(Entry, frozen=True, kw_only=True, tag="signature"):
    """A person's name under part of the record, in a role and with a meaning."""

    role: Role
    meaning: Literal["performed", "inspected", "witnessed", "decided", "issued"]
    covers: str

    title: ClassVar[str] = "Signed"


class RunoutReading(Frozen, frozen=True, kw_only=True):
    """One reading of a runout survey: at a mark, at the first mark again, or a station's total.

    `typed` is None where there is no surface to read at this mark.
    """

    station: str
    mark: int | Literal["again", "swept total", "total", "high spot"]
    typed: str | None


class SizeReading(Frozen, frozen=True, kw_only=True):
    """One diameter of a size survey, at an axial position and a clock angle (both by index)."""

    position: int
    angle: int
    typed: str | None
