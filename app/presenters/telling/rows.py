"""The rows of what was told beside the mounting, and of numbered findings and old verdicts."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass

from app.presenters.wording import day_and_time, in_words
from models.assess import Assessment, finding_key
from models.assess.decided import covered_by
from models.assess.rejudged import rejudged
from models.job import (
    AnyEntry,
    Job,
    NumberedFinding,
)
from reports.told_words import TOLD, told_words

__all__ = [
    "NumberedRow",
    "OldVerdictRow",
    "ToldRow",
    "numbered_rows",
    "old_verdict_rows",
    "told_rows",
]


@dataclass(frozen=True, kw_only=True)
class ToldRow:
    """An entry beside the mounting."""

    entry: AnyEntry
    kind: str
    where: str
    words: str
    by: str
    at: str


@dataclass(frozen=True, kw_only=True)
class NumberedRow:
    """A finding with its number, and how it stands."""

    number: int
    about: str
    words: str
    opened: str
    stands: str


@dataclass(frozen=True, kw_only=True)
class OldVerdictRow:
    """A stored verdict beside what today's rule says of the same inputs."""

    rule: str
    where: str
    was: str
    now: str
    because: str


def told_rows(job: Job) -> Iterator[ToldRow]:
    """List what was told beside the mounting, the latest first."""
    names = {one.key: one.name for one in job.people}
    for one in reversed(job.entries):
        if isinstance(one, TOLD):
            yield ToldRow(
                entry=one,
                kind=one.title,
                where=_where(job, one),
                words=told_words(one),
                by=names.get(one.by, one.by),
                at=day_and_time(one.done_at),
            )


def _where(job: Job, entry: AnyEntry) -> str:
    place = entry.place
    if place.step is None:
        return place.kind
    number = job.plan.step_number(place.step)
    return f"step {number}, {job.plan.step(place.step).title}"


def numbered_rows(view: Assessment) -> Iterator[NumberedRow]:
    """List the numbered findings, the last one first."""
    for one in reversed(view.job.numbered_findings):
        yield NumberedRow(
            number=one.number,
            about=one.about,
            words=in_words(view.job, one.words),
            opened=day_and_time(one.opened_at),
            stands=_stands(view, one),
        )


def _stands(view: Assessment, one: NumberedFinding) -> str:
    mine = [two for two in view.findings if covered_by(one, finding_key(two.finding))]
    still = [two for two in mine if two.answered_by is None and two.finding.verdict.severity > 1]
    if still:
        return "open"
    said = [two.answered_by for two in mine if two.answered_by is not None]
    return said[-1] if said else "no longer found"


def old_verdict_rows(view: Assessment) -> Iterator[OldVerdictRow]:
    """List the stored verdicts that today's rules would give otherwise."""
    for one in rejudged(view.job):
        stored = one.stored
        where = "the job"
        if stored.step is not None and stored.attempt is not None:
            number = view.job.plan.step_number(stored.step)
            where = f"step {number}, attempt {stored.attempt}"
        edition = "" if one.edition is None else f" (edition {one.edition})"
        yield OldVerdictRow(
            rule=stored.rule,
            where=where,
            was=f"{stored.verdict} (edition {stored.edition}), {day_and_time(stored.judged_at)}",
            now=f"{one.verdict or 'cannot be judged again'}{edition}",
            because=in_words(view.job, one.message),
        )
