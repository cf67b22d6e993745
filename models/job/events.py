"""Entries of what happens beside the mounting: points, work outside, tightening, things seen."""

from typing import ClassVar, Literal

from models.job.entries import Entry
from models.job.plan import PointKind, Role
from models.units import Angle, Length, Pressure, Torque

__all__ = [
    "Attachment",
    "OutsideOperation",
    "PointEvent",
    "Tightening",
    "VisualFinding",
]


class PointEvent(Entry, frozen=True, kw_only=True, tag="point"):
    """What happened at a hold, witness or review point of a step, apart from its signature.

    `who` is the party invited, present, absent or waiving, as printed; `at` the instant when it was
    invited, came, was waited for or gave its waiver; `how` by which letter, call or visit.
    """

    point_kind: PointKind
    point_role: Role
    what: str
    event: Literal["invited", "came", "did not come", "waived"]
    who: str
    at: str
    how: str = ""
    words: str = ""

    title: ClassVar[str] = "Point"


class OutsideOperation(Entry, frozen=True, kw_only=True, tag="outside"):
    """Work done elsewhere: sent off, and later back with its certificate.

    What comes back is an entry of its own that names the one that was sent in `sent_as`. Days are
    ISO 8601 dates.
    """

    what: str
    subject: str
    works: str
    sent_on: str
    back_on: str | None = None
    sent_as: str | None = None
    certificate: str = ""
    result: Literal["awaited", "accepted", "not accepted"] = "awaited"
    words: str = ""

    title: ClassVar[str] = "Work outside"


class Tightening(Entry, frozen=True, kw_only=True, tag="tightening"):
    """A nut or screws made tight and locked."""

    item: str
    method: Literal["torque", "torque and angle", "hydraulic tension", "elongation", "by hand"]
    torque: Torque | None = None
    angle: Angle | None = None
    pressure: Pressure | None = None
    elongation: Length | None = None
    instrument: str | None = None
    order: str = ""
    locked_by: str = ""
    words: str = ""

    title: ClassVar[str] = "Tightened"


class VisualFinding(Entry, frozen=True, kw_only=True, tag="visual"):
    """Something seen on a part: where, in words, and whether it conforms."""

    subject: str
    seen_at: str
    words: str
    weight: Literal["remark", "look again", "does not conform"] = "remark"

    title: ClassVar[str] = "Seen"


class Attachment(Entry, frozen=True, kw_only=True, tag="attachment"):
    """A picture or document: it lies beside the record under its digest, SHA-256 in hexadecimal.

    `about` names the entry, the component's serial or the finding's number that it belongs to.
    """

    name: str
    media_type: str
    size_bytes: int
    file_digest: str
    about: str = ""
    words: str = ""

    title: ClassVar[str] = "Attached"
