"""What stands over a job: numbered findings, and instruments found out after they had been used."""

from typing import Literal

from models.job.base import Frozen

__all__ = ["AgreedWaiver", "InstrumentEvent", "NumberedFinding"]


class NumberedFinding(Frozen, frozen=True, kw_only=True):
    """A finding that somebody must decide; its number is given once and never again.

    `about` is the name by which a decision refers to it: that of a rule's finding, or the id of
    the entry in which a person told what was seen.
    """

    number: int
    about: str
    words: str
    opened_at: str
    entry: str | None = None
    step: str | None = None
    attempt: int | None = None


class InstrumentEvent(Frozen, frozen=True, kw_only=True):
    """An instrument was found out: from the day after `last_good_on` its readings are in doubt."""

    id: str
    tag: str
    event: Literal["found out"] = "found out"
    last_good_on: str
    found_on: str
    words: str
    by: str


class AgreedWaiver(Frozen, frozen=True, kw_only=True):
    """What the plan lets go for want of people, who agreed to it and why; it is printed."""

    what: Literal["whoever performed may inspect"]
    agreed_by: str
    agreed_on: str
    reason: str
