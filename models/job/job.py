"""A whole job, frozen: what the record's reader and the reader of job files both return."""

from typing import Literal

from models.job.acceptance import HighSpeedRun, Magnetism
from models.job.balance import BalanceCorrection, BalanceRun, JournalsWeighed, TrialRound
from models.job.base import Frozen
from models.job.cooling_watch import StationWatched
from models.job.draw_up import DrawUp
from models.job.entries import (
    AttemptOpened,
    AxialMeasured,
    Confirmation,
    Cooling,
    Decision,
    Handling,
    Heating,
    Mount,
    Note,
    Removal,
    RunoutSurvey,
    Settled,
    Signature,
    SizeSurvey,
)
from models.job.events import (
    Attachment,
    OutsideOperation,
    PointEvent,
    Tightening,
    VisualFinding,
)
from models.job.plan import Plan, Role
from models.job.standing import InstrumentEvent, NumberedFinding
from models.units import Expansion, Length

__all__ = [
    "AnyEntry",
    "Calibration",
    "Component",
    "Head",
    "Instrument",
    "Job",
    "KeySignature",
    "Person",
    "StoredVerdict",
]

AnyEntry = (
    Attachment
    | AttemptOpened
    | AxialMeasured
    | Confirmation
    | Cooling
    | Decision
    | DrawUp
    | Handling
    | Heating
    | Mount
    | Note
    | OutsideOperation
    | PointEvent
    | Removal
    | RunoutSurvey
    | Settled
    | Signature
    | SizeSurvey
    | StationWatched
    | Tightening
    | VisualFinding
    | BalanceCorrection
    | BalanceRun
    | JournalsWeighed
    | TrialRound
    | HighSpeedRun
    | Magnetism
)


class Person(Frozen, frozen=True, kw_only=True):
    """Somebody who acts in the job; never deleted, only retired."""

    key: str
    name: str
    initials: str
    role: Role
    employer: str = ""


class Calibration(Frozen, frozen=True, kw_only=True):
    """A calibration as it stood when the instrument was used."""

    done_on: str
    due_on: str
    certificate: str = ""
    result: str = "within its limits"


class Instrument(Frozen, frozen=True, kw_only=True):
    """A measuring instrument with a copy of the facts that its readings rest on."""

    tag: str
    kind: str
    resolution: Length | None = None
    # Expanded uncertainty with k = 2, as certificates state it.
    uncertainty: Length | None = None
    expansion: Expansion | None = None
    range: str = ""
    calibration: Calibration | None = None


class Component(Frozen, frozen=True, kw_only=True):
    """A physical part with a serial, which holds a position of the stack."""

    serial: str
    name: str
    item: str
    drawing: str = ""
    revision: str = ""
    certificate: str = ""
    balance: str = ""
    key_convention: str = ""
    # The serial that it stands in for, and who approved that.
    substitute_for: str | None = None
    approved_by: str | None = None


class StoredVerdict(Frozen, frozen=True, kw_only=True):
    """A verdict as given at the moment it mattered; a later rule does not rewrite it."""

    id: str
    subject: str
    rule: str
    edition: int
    verdict: Literal["within", "outside", "cannot tell", "not judged"]
    message: str
    inputs: dict[str, float | str | bool | None]
    judged_at: str
    step: str | None = None
    attempt: int | None = None


class KeySignature(Frozen, frozen=True, kw_only=True):
    """The value behind a signature entry: whoever has the job can check it without the shop.

    `text` is what was signed: canonical JSON that names person, role, meaning, what is covered and
    the head of the chain then. `value` is the signature of the certificate's key over it, in
    base64; certificate and authority are PEM.
    """

    entry: str
    text: str
    value: str
    certificate: str
    authority: str


class Head(Frozen, frozen=True, kw_only=True):
    """The last link of the job's chain at the moment the job was read from a record."""

    sequence: int
    digest: str


class Job(Frozen, frozen=True, kw_only=True):
    """A whole job: plan revisions, people, instruments, components, entries, verdicts."""

    form: Literal["thirdjournal job"] = "thirdjournal job"
    edition: int = 1
    number: str
    customer: str = ""
    shop: str = ""
    opened_at: str
    people: tuple[Person, ...]
    instruments: tuple[Instrument, ...]
    components: tuple[Component, ...]
    plans: tuple[Plan, ...]
    entries: tuple[AnyEntry, ...] = ()
    verdicts: tuple[StoredVerdict, ...] = ()
    key_signatures: tuple[KeySignature, ...] = ()
    numbered_findings: tuple[NumberedFinding, ...] = ()
    instrument_events: tuple[InstrumentEvent, ...] = ()
    head: Head | None = None

    @property
    def plan(self) -> Plan:
        """The plan revision in force."""
        return self.plans[-1]

    def person(self, key: str) -> Person:
        """Find a person by key."""
        return next(person for person in self.people if person.key == key)

    def instrument(self, tag: str) -> Instrument | None:
        """Find an instrument by tag."""
        return next((one for one in self.instruments if one.tag == tag), None)
