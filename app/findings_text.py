"""Findings in words and as plain data, for the command line."""

from collections import Counter
from typing import Any

from app.worked_out import worked_out
from models.assess import Assessment, Standing
from models.rules.rule import Verdict

__all__ = ["as_data", "as_text", "summary"]

_ORDER = (Verdict.OUTSIDE, Verdict.CANNOT_TELL, Verdict.NOT_JUDGED, Verdict.WITHIN)
_COUNTED = {
    Verdict.OUTSIDE: "outside",
    Verdict.CANNOT_TELL: "in doubt",
    Verdict.NOT_JUDGED: "not judged",
    Verdict.WITHIN: "within limits",
}


def as_data(view: Assessment) -> dict[str, Any]:
    """Give findings and calculations as plain data, in SI, temperatures in °C."""
    job = view.job
    return {
        "job": job.number,
        "rotor": job.plan.rotor.serial,
        "plan": job.plan.revision,
        "verdict": view.verdict.value,
        "next": view.next.words,
        "findings": [_one(standing) for standing in view.findings],
        "worked_out": worked_out(view),
    }


def _one(standing: Standing) -> dict[str, Any]:
    finding = standing.finding
    subject = finding.subject
    named = {
        "step": subject.step,
        "attempt": subject.attempt,
        "item": subject.item,
        "land": subject.land,
        "feature": subject.feature,
        "station": subject.station,
        "entry": subject.entry,
    }
    return {
        "rule": finding.rule.id,
        "edition": finding.rule.edition,
        **{key: value for key, value in named.items() if value is not None},
        "verdict": finding.verdict.value,
        "message": finding.message,
        "inputs": dict(finding.inputs),
        "computed": dict(finding.computed),
        "limit_origin": finding.limit_origin,
        "answered_by": standing.answered_by,
    }


def summary(view: Assessment) -> list[str]:
    """Say in two lines which job this is and how many findings of each kind it has."""
    job = view.job
    invented = " (invented)" if job.plan.rotor.invented else ""
    counts = Counter(one.finding.verdict for one in view.findings if one.answered_by is None)
    answered = sum(1 for one in view.findings if one.answered_by is not None)
    kinds = ", ".join(
        f"{counts[verdict]} {_COUNTED[verdict]}" for verdict in _ORDER if counts[verdict]
    )
    tail = f", {answered} answered by a removal or a decision." if answered else "."
    return [
        f"Rotor {job.plan.rotor.serial}{invented}, job {job.number}, plan {job.plan.revision}: "
        f"{view.verdict.phrase.lower()}.",
        f"  {len(view.findings)} findings: {kinds}{tail}",
    ]


def as_text(view: Assessment) -> str:
    """Say what was found: what needs a person first, then a line for every step."""
    lines = [*summary(view), ""]
    for number, step in enumerate(view.job.plan.steps, start=1):
        attempts = view.attempts_at(step.key)
        if not attempts:
            continue
        lines.append(f"Step {number}, {step.title}")
        for attempt in attempts:
            outcome = attempt.settled.outcome if attempt.settled else "open"
            lines.append(f"  attempt {attempt.number}: {outcome}")
            about = (attempt.step.key, attempt.number)
            mine = [
                one
                for one in view.findings
                if (one.finding.subject.step, one.finding.subject.attempt) == about
            ]
            lines += _standing_lines(mine)
    rest = [one for one in view.findings if one.finding.subject.step is None]
    lines += ["", "The whole rotor", *_standing_lines(rest), "", f"Next: {view.next.words}"]
    return "\n".join(lines)


def _standing_lines(standings: list[Standing]) -> list[str]:
    shown = [one for one in standings if one.finding.verdict is not Verdict.WITHIN]
    shown.sort(key=lambda one: _ORDER.index(one.finding.verdict))
    return [
        f"    {one.finding.phrase} [{one.finding.rule.id}] {one.finding.message}"
        + (f" Answered: {one.answered_by}." if one.answered_by else "")
        for one in shown
    ]
