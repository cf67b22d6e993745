"""Rule, judgement, verdict and finding: what a judgement is made of."""

import inspect
from collections.abc import Callable, Mapping
from dataclasses import dataclass, field, fields
from enum import Enum
from functools import cache
from typing import Any

__all__ = ["Finding", "Judgement", "Rule", "Subject", "Value", "Verdict", "known", "words_for"]

Value = float | int | str | bool | None


class Verdict(Enum):
    """What a rule says. Only `WITHIN` lets work go on; the order of severity is `severity`."""

    WITHIN = "within"
    NOT_JUDGED = "not judged"
    CANNOT_TELL = "cannot tell"
    OUTSIDE = "outside"

    @property
    def severity(self) -> int:
        """Rank for finding the worst of several; a missing input is worse than being within."""
        return list(Verdict).index(self)

    @property
    def phrase(self) -> str:
        """The word a person reads."""
        return {
            Verdict.WITHIN: "Within limits",
            Verdict.NOT_JUDGED: "Not judged yet",
            Verdict.CANNOT_TELL: "Look again",
            Verdict.OUTSIDE: "Stop",
        }[self]

    @classmethod
    def worst(cls, verdicts: "list[Verdict] | tuple[Verdict, ...]") -> "Verdict":
        """Find the worst verdict; nothing judged at all is not judged."""
        return max(verdicts, key=lambda verdict: verdict.severity, default=cls.NOT_JUDGED)


@dataclass(frozen=True)
class Judgement:
    """What a judge returns: verdict, one sentence for people, and what it worked out."""

    verdict: Verdict
    message: str
    computed: Mapping[str, float] = field(default_factory=dict)
    phrase: str | None = None


@dataclass(frozen=True)
class Subject:
    """What a finding is about."""

    step: str | None = None
    attempt: int | None = None
    item: str | None = None
    land: str | None = None
    feature: str | None = None
    station: str | None = None
    entry: str | None = None

    @property
    def words(self) -> str:
        """The subject in one phrase, widest first."""
        parts = (
            f"step {self.step}" if self.step else "",
            f"attempt {self.attempt}" if self.attempt else "",
            self.item or "",
            f"land {self.land}" if self.land else "",
            self.feature or "",
            f"station {self.station}" if self.station else "",
        )
        return ", ".join(part for part in parts if part)


@dataclass(frozen=True)
class Rule:
    """One checkable statement; its inputs are the parameters of its judge.

    `edition` grows when the statement or its judge changes, since stored verdicts name it.
    """

    id: str
    statement: str
    source: str
    facts: type[Any]
    judge: Callable[..., Judgement]
    edition: int = 1

    @property
    def inputs(self) -> tuple[str, ...]:
        """Names of the facts this rule needs."""
        return _parameters(self.judge)[0]

    @property
    def may_lack(self) -> frozenset[str]:
        """Names of facts that may be missing: their parameter has None as its default."""
        return _parameters(self.judge)[1]

    def apply(self, facts: Any, subject: Subject) -> "Finding":  # noqa: ANN401  (any facts class)
        """Judge the facts; a missing input is not judged, never within."""
        used = {name: getattr(facts, name) for name in self.inputs}
        missing = [
            name for name, value in used.items() if value is None and name not in self.may_lack
        ]
        kept = {name: _plain(value) for name, value in used.items() if name != "units"}
        if missing:
            words = ", ".join(dict.fromkeys(words_for(self.facts, name) for name in missing))
            judgement = Judgement(Verdict.NOT_JUDGED, f"Not judged yet: {words} missing.")
        else:
            judgement = self.judge(**used)
        return Finding(
            rule=self,
            verdict=judgement.verdict,
            message=judgement.message,
            phrase=judgement.phrase or judgement.verdict.phrase,
            inputs=kept,
            computed=dict(judgement.computed),
            subject=subject,
            limit_origin=getattr(facts, "limit_origin", None),
        )


@cache
def _parameters(judge: Callable[..., Judgement]) -> tuple[tuple[str, ...], frozenset[str]]:
    """Read a judge's parameters and those that may be missing; its source does not change."""
    parameters = inspect.signature(judge).parameters
    lacking = frozenset(one.name for one in parameters.values() if one.default is None)
    return tuple(parameters), lacking


@dataclass(frozen=True)
class Finding:
    """A rule applied: its verdict with everything the verdict rests on."""

    rule: Rule
    verdict: Verdict
    message: str
    phrase: str
    inputs: Mapping[str, Value]
    computed: Mapping[str, float]
    subject: Subject
    limit_origin: str | None = None


def known(words: str, unit: str = "-") -> Any:  # noqa: ANN401  (a dataclass field of any type)
    """Describe a fact: its words for people and its SI unit; None until it is recorded."""
    return field(default=None, metadata={"words": words, "unit": unit})


def words_for(facts: type[Any], name: str) -> str:
    """Say a fact in words."""
    for one in fields(facts):
        if one.name == name:
            return str(one.metadata.get("words", name.replace("_", " ")))
    raise LookupError(f"{facts.__name__} has no fact named {name}")


def _plain(value: object) -> Value:
    """Keep what can be stored and read again by anybody."""
    if value is None or isinstance(value, bool | int | float | str):
        return value
    if isinstance(value, tuple | frozenset):
        return ", ".join(str(one) for one in value)
    return str(value)
