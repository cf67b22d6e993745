"""How an attempt ended, at the head of its spread."""

from collections.abc import Sequence

from reportlab.platypus import Flowable

from models.assess import Attempt
from models.job import Job, Step
from models.rules.rule import Finding, Verdict
from models.units import unit_set
from reports.job_pictures import verdict_kind
from reports.parts import title, verdict_line

__all__ = ["ending", "heading", "limit_words"]


def heading(number: int, step: Step, pair: Sequence[Attempt]) -> Flowable:
    """Give the heading of a spread."""
    more = "" if len(pair) == 1 else f"attempts {pair[0].number} and {pair[-1].number}"
    return title(f"Step {number}  {step.title}", more)


def ending(job: Job, attempt: Attempt) -> Flowable:
    """Give how an attempt ended, in one line with its worst change."""
    worst = _worst_change(attempt)
    outcome = attempt.settled.outcome if attempt.settled else "open"
    which = f"Attempt {attempt.number}: {outcome}"
    units = unit_set(job.plan.rotor.units)
    if worst is None:
        sentence = "Its runout has not been judged."
        if not attempt.step.survey_due:
            sentence = "No survey is due after this step."
    else:
        sentence = worst.message
    changes = [one for one in attempt.changes if one.tir is not None and not one.is_journal]
    if worst is not None and worst.verdict is Verdict.WITHIN and changes:
        most = max(changes, key=lambda one: one.tir or 0.0)
        sentence = (
            f"The greatest change is {units.both(most.tir or 0.0, 'runout')} TIR at {most.key}, "
            f"limit {limit_words(attempt.step)}."
        )
    verdict = worst.verdict if worst else attempt.home()
    return verdict_line(verdict_kind(verdict), which, sentence)


def limit_words(step: Step) -> str:
    """Write the change limit of a step."""
    return step.change_limit.value.written if step.change_limit else "not set"


def _worst_change(attempt: Attempt) -> Finding | None:
    found = attempt.of("runout-changed")
    return max(
        found,
        key=lambda one: (one.verdict.severity, float(one.inputs.get("change_tir") or 0.0)),
        default=None,
    )
