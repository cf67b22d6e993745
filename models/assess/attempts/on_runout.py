"""Findings on the runout surveys of an attempt."""

from collections.abc import Iterable, Sequence
from dataclasses import replace

from models.assess.attempts.on_people import instrument_finding
from models.assess.attempts.view import Attempt, attempt_subject
from models.assess.questions import Asked, all_questions, unanswered
from models.assess.runout import StationChange, SurveyRunout, compare_surveys
from models.job import Job, RunoutSurvey, Step
from models.rules import rule
from models.rules.blunders import SURVEY_BLUNDERS, BlunderFacts
from models.rules.facts import ClosureFacts, StationFacts, SurveyFacts
from models.rules.rule import Finding, Subject
from models.units import unit_set

__all__ = ["closure_allowed", "runout_findings", "station_facts", "survey_findings"]

# Where the plan sets no closure limit: common practice, as 2 µm or 5 % of the total.
_CLOSURE_FLOOR = 2e-6
_CLOSURE_SHARE = 0.05


def runout_findings(job: Job, attempt: Attempt) -> Iterable[Finding]:
    """Judge the surveys of an attempt and what changed between them."""
    due = attempt.step.survey_due
    if attempt.judged is None:
        if due:
            yield rule("survey-whole").apply(
                SurveyFacts(units=unit_set(job.plan.rotor.units)), attempt_subject(attempt)
            )
    else:
        yield from survey_findings(job, attempt, attempt.judged, attempt.baseline)
        for change in attempt.changes:
            if not change.is_journal:
                yield rule("runout-changed").apply(
                    station_facts(job, attempt.step, change),
                    attempt_subject(attempt, station=change.key, entry=attempt.judged.entry.id),
                )
        yield from _drift_findings(job, attempt)
    if attempt.seat_survey is not None and attempt.baseline is not None:
        back = compare_surveys(job, attempt.baseline, attempt.seat_survey)
        for change in back:
            if not change.is_journal:
                yield rule("seat-came-back").apply(
                    station_facts(job, attempt.step, change),
                    attempt_subject(
                        attempt, station=change.key, entry=attempt.seat_survey.entry.id
                    ),
                )


def survey_findings(
    job: Job, attempt: Attempt, survey: SurveyRunout, baseline: SurveyRunout | None
) -> Iterable[Finding]:
    """Judge a survey as a whole: complete, in the same set-up, circles closed."""
    units = unit_set(job.plan.rotor.units)
    entry = survey.entry
    subject = attempt_subject(attempt, entry=entry.id)
    differences = None if baseline is None else entry.set_up.differences(baseline.entry.set_up)
    asked = all_questions(job, entry, baseline.entry if baseline else None)
    still_open = unanswered(entry, asked)
    facts = SurveyFacts(
        units=units,
        closed=entry.is_closed,
        stations_due=tuple(station.key for station in job.plan.stations_in_reach(attempt.step.key)),
        stations_read=tuple(one.key for one in survey.stations if one.is_read),
        set_up_differences=differences,
        open_questions=tuple(one.place for one in still_open),
    )
    yield rule("survey-whole").apply(facts, subject)
    yield rule("set-up-same").apply(facts, subject)
    if any(one.fit is not None for one in survey.stations):
        yield from _blunder_findings(entry, asked, still_open, subject)
    if job.plan.runout.close_circle:
        for one in survey.stations:
            if one.fit is None:
                continue
            yield rule("circle-closed").apply(
                ClosureFacts(
                    units=units,
                    station=one.key,
                    closure=one.closure,
                    closure_allowed=closure_allowed(job, one.total),
                ),
                replace(subject, station=one.key),
            )
    yield instrument_finding(job, entry.instrument, entry.done_at, subject)


def _blunder_findings(
    entry: RunoutSurvey, asked: Sequence[Asked], still_open: Sequence[Asked], subject: Subject
) -> Iterable[Finding]:
    """Judge each kind of mistake that a survey's readings could show."""
    answers = {(tuple(one.where), one.question): one.answer for one in entry.kept}
    for one in SURVEY_BLUNDERS:
        mine = [question for question in asked if question.rule == one.id]
        facts = BlunderFacts(
            suspected=tuple(q.sentence for q in mine if q in still_open),
            answered=tuple(
                answers[q.where, q.sentence] for q in mine if (q.where, q.sentence) in answers
            ),
        )
        yield one.apply(facts, subject)


def closure_allowed(job: Job, total: float) -> float:
    """Give the gap allowed at the first mark read again: the plan's, else common practice."""
    planned = job.plan.runout.closure_limit
    if planned is not None:
        return planned.si
    return max(_CLOSURE_FLOOR, _CLOSURE_SHARE * total)


def station_facts(job: Job, step: Step, change: StationChange) -> StationFacts:
    """State the change of one station for the rules."""
    limit = step.change_limit
    return _change_facts(
        job,
        change,
        limit.value.si if limit else None,
        limit.origin.words if limit else None,
    )


def _change_facts(
    job: Job, change: StationChange, limit: float | None, origin: str | None
) -> StationFacts:
    bounds = change.bounds
    return StationFacts(
        units=unit_set(job.plan.rotor.units),
        station=change.key,
        change_tir=change.tir,
        clock_angle=change.clock_angle_degrees,
        expanded_uncertainty=change.expanded_uncertainty,
        plain_change=change.plain_change,
        least_change=bounds.least if bounds else None,
        greatest_change=bounds.greatest if bounds else None,
        limit=limit,
        proved=job.plan.decision_rule == "proved",
        limit_origin=origin,
    )


def _drift_findings(job: Job, attempt: Attempt) -> Iterable[Finding]:
    limit = job.plan.drift_limit
    if limit is None or attempt.judged is None:
        return
    for change in attempt.drift:
        if not change.is_journal:
            facts = _change_facts(job, change, limit.value.si, limit.origin.words)
            yield rule("runout-drifted").apply(
                facts, attempt_subject(attempt, station=change.key, entry=attempt.judged.entry.id)
            )
