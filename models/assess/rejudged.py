"""Stored verdicts beside what today's rules say of the same inputs; the stored ones stay."""

import dataclasses
import typing
from collections.abc import Iterable
from dataclasses import dataclass
from typing import Any

from models.job import Job, StoredVerdict
from models.rules import ALL_RULES
from models.rules.rule import Rule, Subject
from models.units import unit_set

__all__ = ["Rejudged", "rejudged"]

_SEPARATOR = ", "


@dataclass(frozen=True)
class Rejudged:
    """A stored verdict, and what today's rule says instead; empty where it cannot say."""

    stored: StoredVerdict
    verdict: str
    message: str
    edition: int | None


def rejudged(job: Job) -> Iterable[Rejudged]:
    """List the stored verdicts that today's rules would give otherwise, in their order.

    A rule that is no longer known, or that asks for a fact which was not stored then, is listed
    with the reason: it cannot be judged again from what was kept.

    Parameters
    ----------
    job : Job
        The job with its stored verdicts.
    """
    known = {one.id: one for one in ALL_RULES}
    units = unit_set(job.plan.rotor.units)
    for stored in job.verdicts:
        rule = known.get(stored.rule)
        if rule is None:
            words = f"No rule is called “{stored.rule}” any more."
            yield Rejudged(stored, "", words, None)
            continue
        lacks = [
            name
            for name in rule.inputs
            if name != "units" and name not in stored.inputs and name not in rule.may_lack
        ]
        if lacks:
            words = f"Today's rule asks for {_SEPARATOR.join(lacks)}, which was not stored."
            yield Rejudged(stored, "", words, rule.edition)
            continue
        finding = rule.apply(_facts(rule, stored, units), Subject())
        if finding.verdict.value != stored.verdict:
            yield Rejudged(stored, finding.verdict.value, finding.message, rule.edition)


def _facts(rule: Rule, stored: StoredVerdict, units: Any) -> Any:  # noqa: ANN401
    lists, names = _lists(rule.facts), {one.name for one in dataclasses.fields(rule.facts)}
    given = {
        name: _listed(value) if name in lists else value
        for name, value in stored.inputs.items()
        if name in names
    }
    # Facts whose message shows no quantity need no units.
    return rule.facts(**({"units": units} if "units" in names else {}), **given)


def _listed(value: object) -> tuple[str, ...] | None:
    # Lists are stored as their words; how many there were matters less than whether any.
    if value is None:
        return None
    return tuple(one for one in str(value).split(_SEPARATOR) if one)


def _lists(facts: type[Any]) -> frozenset[str]:
    hints = typing.get_type_hints(facts)
    return frozenset(
        name
        for name, hint in hints.items()
        if any(typing.get_origin(part) in (tuple, frozenset) for part in typing.get_args(hint))
    )
