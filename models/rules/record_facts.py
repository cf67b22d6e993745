"""Plain facts about the record itself: instruments, points, things seen, work outside, lateness."""

from dataclasses import dataclass

from models.rules.rule import known
from models.units import UnitSet, metric_set

__all__ = [
    "CompleteFacts",
    "ComponentFacts",
    "DecisionFacts",
    "FoundOutFacts",
    "LateFacts",
    "OutsideFacts",
    "ResolutionFacts",
    "SeenFacts",
]


@dataclass(frozen=True, kw_only=True)
class FoundOutFacts:
    """A reading made with an instrument that was found out later."""

    units: UnitSet = metric_set
    tag: str | None = known("the instrument")
    reading: str | None = known("the reading")
    used_on: str | None = known("the day it was used")
    last_good_on: str | None = known("the last day it was known to be good")


@dataclass(frozen=True, kw_only=True)
class ResolutionFacts:
    """What the indicator resolves, against the least limit of change in the plan."""

    units: UnitSet = metric_set
    resolution: float | None = known("the resolution of the indicator", "m")
    least_limit: float | None = known("the least limit of change", "m")
    limit_origin: str | None = known("the limit's origin")


@dataclass(frozen=True, kw_only=True)
class LateFacts:
    """When a thing was done and when it was entered."""

    units: UnitSet = metric_set
    entry: str | None = known("the entry")
    hours_between: float | None = known("the time from the deed to the entry", "h")
    hours_allowed: float | None = known("the time within which a deed is entered", "h")
    reason: str | None = known("why it was entered late")
    limit_origin: str | None = known("the limit's origin")


@dataclass(frozen=True, kw_only=True)
class OutsideFacts:
    """Work sent elsewhere."""

    units: UnitSet = metric_set
    what: str | None = known("the work outside")
    works: str | None = known("where it was done")
    back_on: str | None = known("the day it came back")
    certificate: str | None = known("its certificate")
    result: str | None = known("whether it was accepted")


@dataclass(frozen=True, kw_only=True)
class SeenFacts:
    """Something that a person saw."""

    units: UnitSet = metric_set
    subject: str | None = known("the part")
    words: str | None = known("what was seen")
    weight: str | None = known("whether it conforms")


@dataclass(frozen=True, kw_only=True)
class ComponentFacts:
    """A component that stands in for another."""

    units: UnitSet = metric_set
    serial: str | None = known("the component's serial")
    substitute_for: str | None = known("the component it stands in for")
    approved_by: str | None = known("who approved it")


@dataclass(frozen=True, kw_only=True)
class DecisionFacts:
    """A decision, and by what right it was taken."""

    units: UnitSet = metric_set
    disposition: str | None = known("the disposition")
    role: str | None = known("the role of who decided")
    needs_customer: bool | None = known("whether the plan asks for the customer's agreement")
    agreed_by: str | None = known("who agreed for the customer")


@dataclass(frozen=True, kw_only=True)
class CompleteFacts:
    """What a finished build still lacks on paper."""

    units: UnitSet = metric_set
    findings_open: tuple[str, ...] | None = known("the findings that nobody has decided")
    signatures_missing: tuple[str, ...] | None = known("the signatures of every step")
    outside_open: tuple[str, ...] | None = known("the work that is still outside")
    waived: tuple[str, ...] | None = known("what was waived")
