"""A whole job, worked out and judged: attempts, findings, and how far the build is."""

from collections.abc import Iterable, Mapping, Sequence
from dataclasses import dataclass
from functools import cached_property

from models.assess.acceptance import acceptance_findings
from models.assess.attempts import (
    Attempt,
    assess_attempt,
    finding_key,
)
from models.assess.balance import balance_verdict
from models.assess.completeness import complete_facts
from models.assess.decided import decision_about, decisions_of
from models.assess.index import IndexView, index_views
from models.assess.plan_findings import plan_findings
from models.assess.points import point_events, waits_for
from models.assess.record_findings import record_findings
from models.assess.runout import SurveyRunout, read_survey
from models.assess.shaft import ShaftView, shaft_view
from models.assess.stand import StandRepeatability, stand_repeatability
from models.engineering.high_speed import (
    STATED_REASONS,
    Reason,
    reasons_for_high_speed_balance,
)
from models.job import (
    AnyEntry,
    AttemptOpened,
    BalanceRun,
    Job,
    JournalsWeighed,
    RunoutSurvey,
    SizeSurvey,
)
from models.rules import rule
from models.rules.facts import FinalFacts, ProgressFacts, StandFacts
from models.rules.progress import (
    AttemptProgress,
    BuildProgress,
    ItemProgress,
    NextAct,
    next_act,
)
from models.rules.rule import Finding, Subject, Verdict
from models.units import unit_set

__all__ = ["Assessment", "Standing", "assess", "live_entries"]


@dataclass(frozen=True)
class Standing:
    """A finding and, where a removal or a person's decision has answered it, by what."""

    finding: Finding
    answered_by: str | None = None


@dataclass(frozen=True, eq=False)
class Assessment:
    """Everything that is worked out from a job."""

    job: Job
    bare_shaft: SurveyRunout | None
    surveys: dict[str, SurveyRunout]
    attempts: tuple[Attempt, ...]
    findings: tuple[Standing, ...]
    progress: BuildProgress
    next: NextAct

    def attempts_at(self, step: str) -> tuple[Attempt, ...]:
        """Select the attempts at a step."""
        return tuple(one for one in self.attempts if one.step.key == step)

    def attempt(self, step: str, number: int) -> Attempt | None:
        """Find one attempt."""
        return next((one for one in self.attempts_at(step) if one.number == number), None)

    @cached_property
    def shaft(self) -> ShaftView:
        """The finished rotor on its journals, worked out when it is asked for: no rule needs it."""
        return shaft_view(self.job.plan)

    @cached_property
    def stand(self) -> StandRepeatability | None:
        """What the stand repeats, from surveys between which nothing was touched."""
        return stand_repeatability(self.job.plan, live_entries(self.job), self.surveys)

    @cached_property
    def index_tests(self) -> tuple[IndexView, ...]:
        """What parts mounted half a turn apart say of part and seat."""
        return index_views(self.attempts)

    @cached_property
    def reasons_for_speed(self) -> tuple[Reason, ...]:
        """What speaks for a balance at speed; none without a maximum continuous speed."""
        speed = self.job.plan.rotor.maximum_continuous_speed
        if speed is None or speed.si <= 0.0:
            return ()
        stands = [
            one
            for one in self.attempts
            if one.judged is not None and (one.settled is None or one.settled.outcome != "removed")
        ]
        bow = stands[-1].bend.of_rotor if stands else None
        critical = self.shaft.critical
        stated = tuple(
            Reason(statement=STATED_REASONS[one], value=1.0, threshold=0.0, source="the plan")
            for one in self.job.plan.rotor.balance_reasons
        )
        return stated + reasons_for_high_speed_balance(
            maximum_continuous_speed=speed.si,
            first_critical_speed=critical.speed if critical else None,
            span_over_diameter=self.shaft.span_over_diameter,
            bow_over_permissible=bow.ratio if bow else None,
        )

    @property
    def verdict(self) -> Verdict:
        """The worst verdict that nothing has answered."""
        return Verdict.worst(
            [one.finding.verdict for one in self.findings if one.answered_by is None]
        )

    @property
    def last_accepted_survey(self) -> SurveyRunout | None:
        """The survey the next attempt is judged against."""
        for attempt in reversed(self.attempts):
            stands = attempt.settled is not None and attempt.settled.outcome != "removed"
            if stands and attempt.judged is not None:
                return attempt.judged
        return self.bare_shaft


def live_entries(job: Job) -> tuple[AnyEntry, ...]:
    """List the entries that no later entry replaces."""
    replaced = {one.supersedes for one in job.entries if one.supersedes is not None}
    return tuple(one for one in job.entries if one.id not in replaced)


def assess(job: Job) -> Assessment:
    """Work out and judge a whole job."""
    entries = live_entries(job)
    surveys = {one.id: read_survey(job, one) for one in entries if isinstance(one, RunoutSurvey)}
    bare = [
        surveys[one.id]
        for one in entries
        if isinstance(one, RunoutSurvey) and one.purpose == "bare shaft" and one.is_closed
    ]
    bare_shaft = bare[-1] if bare else None
    attempts = tuple(_attempts(job, entries, bare_shaft.entry if bare_shaft else None))
    of_job = (
        *plan_findings(job.plan),
        *_stand_findings(job, entries, surveys),
        *record_findings(job, entries),
        *_final_findings(job, attempts, entries),
    )
    standing = tuple(_standing(job, entries, attempts, of_job))
    findings = (*standing, *_completeness(job, entries, attempts, standing))
    progress = _progress(job, entries, attempts, bare_shaft)
    return Assessment(
        job=job,
        bare_shaft=bare_shaft,
        surveys=surveys,
        attempts=attempts,
        findings=findings,
        progress=progress,
        next=next_act(progress),
    )


def _attempts(
    job: Job,
    entries: Sequence[AnyEntry],
    bare_shaft: RunoutSurvey | None,
) -> Iterable[Attempt]:
    opened = [one for one in entries if isinstance(one, AttemptOpened)]
    surveys = {one.id: one for one in entries if isinstance(one, RunoutSurvey)}
    earlier = [
        one for one in entries if isinstance(one, SizeSurvey) and one.place.kind != "attempt"
    ]
    for one in opened:
        mine = [entry for entry in entries if entry.place == one.place]
        baseline = surveys.get(one.baseline or "")
        until = entries.index(one)
        balanced = [
            entry for entry in entries[:until] if isinstance(entry, BalanceRun | JournalsWeighed)
        ]
        events = point_events(entries, one.place.step or "")
        yield assess_attempt(job, one, mine, earlier, baseline, bare_shaft, balanced, events)


def _standing(
    job: Job,
    entries: Sequence[AnyEntry],
    attempts: Sequence[Attempt],
    of_job: Iterable[Finding],
) -> Iterable[Standing]:
    decisions = decisions_of(entries)

    def answer(finding: Finding, attempt: Attempt | None) -> str | None:
        if finding.verdict is Verdict.WITHIN:
            return None
        key = finding_key(finding)
        decided = decision_about(job, decisions, key, finding.subject.entry)
        if decided is not None:
            return f"{decided.disposition}: {decided.words}"
        return None if attempt is None else _came_off(attempt, finding)

    for attempt in attempts:
        for finding in attempt.findings:
            yield Standing(finding, answer(finding, attempt))
    for finding in of_job:
        yield Standing(finding, answer(finding, None))


def _came_off(attempt: Attempt, finding: Finding) -> str | None:
    came_off = attempt.settled is not None and attempt.settled.outcome == "removed"
    # What the shaft kept is not answered by the part's coming off.
    if came_off and finding.rule.id != "seat-came-back":
        return f"attempt {attempt.number} came off"
    return None


def _stand_findings(
    job: Job, entries: Sequence[AnyEntry], surveys: Mapping[str, SurveyRunout]
) -> Iterable[Finding]:
    """Compare the plan's finest limit with what the stand can see, once it has shown that."""
    found = stand_repeatability(job.plan, entries, surveys)
    if found is not None and found.finest_limit is not None:
        facts = StandFacts(
            units=unit_set(job.plan.rotor.units),
            visible_change=found.found.visible_change_tir,
            finest_limit=found.finest_limit,
        )
        yield rule("stand-sees-limit").apply(facts, Subject())


def _completeness(
    job: Job,
    entries: Sequence[AnyEntry],
    attempts: Sequence[Attempt],
    standing: Sequence[Standing],
) -> Iterable[Standing]:
    """Say what a finished build lacks on paper; before its last step is settled, nothing."""
    settled = {one.step.key for one in attempts if one.settled and one.settled.outcome != "removed"}
    if settled != {step.key for step in job.plan.steps}:
        return
    still_open = [
        finding_key(one.finding)
        for one in standing
        if one.answered_by is None and one.finding.verdict in (Verdict.OUTSIDE, Verdict.CANNOT_TELL)
    ]
    facts = complete_facts(job, entries, attempts, still_open)
    yield Standing(rule("record-complete").apply(facts, Subject()))


def _final_findings(
    job: Job, attempts: Sequence[Attempt], entries: Sequence[AnyEntry]
) -> Iterable[Finding]:
    settled = {
        one.step.key
        for one in attempts
        if one.settled is not None and one.settled.outcome != "removed"
    }
    waiting = tuple(step.title for step in job.plan.steps if step.key not in settled)
    yield rule("every-step-settled").apply(
        ProgressFacts(steps_due=len(job.plan.steps), steps_waiting=waiting), Subject()
    )
    if waiting:
        return
    last = next((one.judged for one in reversed(attempts) if one.judged is not None), None)
    yield from acceptance_findings(job.plan, entries, last)
    for station in job.plan.stations_in_reach(job.plan.steps[-1].key):
        if station.final_limit is None:
            continue
        read = last.station(station.key) if last is not None else None
        vector = last.corrected(station.key) if last is not None else None
        journal = station.key in (job.plan.first_journal, job.plan.second_journal)
        tir = None
        if read is not None and read.is_read and (journal or vector is None):
            tir = read.fit.out_of_roundness if read.fit is not None else read.total
        elif vector is not None:
            tir = 2.0 * abs(vector)
        uncertain = None
        if last is not None and last.in_axis_uncertainty is not None and vector is not None:
            index = [one.key for one in last.stations].index(station.key)
            uncertain = 4.0 * float(last.in_axis_uncertainty[index])
        yield rule("final-runout").apply(
            FinalFacts(
                units=unit_set(job.plan.rotor.units),
                station=station.key,
                tir=tir,
                expanded_uncertainty=uncertain,
                limit=station.final_limit.value.si,
                proved=job.plan.decision_rule == "proved",
                limit_origin=station.final_limit.origin.words,
            ),
            Subject(station=station.key),
        )


def _progress(
    job: Job,
    entries: Sequence[AnyEntry],
    attempts: Sequence[Attempt],
    bare_shaft: SurveyRunout | None,
) -> BuildProgress:
    open_bare = [
        one.id
        for one in entries
        if isinstance(one, RunoutSurvey) and one.purpose == "bare shaft" and not one.is_closed
    ]
    engineers = {one.key for one in job.people if one.role == "engineer"}
    decided = frozenset(
        (one.step.key, one.number)
        for one in attempts
        if any(decision.by in engineers for decision in one.decisions)
    )
    return BuildProgress(
        steps=tuple((step.key, step.title) for step in job.plan.steps),
        attempts=tuple(_attempt_progress(job, one) for one in attempts),
        bare_shaft_surveyed=bare_shaft is not None,
        bare_shaft_survey_open=open_bare[-1] if open_bare else None,
        engineer_decided=decided,
    )


def _attempt_progress(job: Job, attempt: Attempt) -> AttemptProgress:
    open_surveys = [one.entry for one in attempt.surveys if not one.entry.is_closed]
    verdict: Verdict | None = None
    if not attempt.step.survey_due:
        verdict = _without_survey(attempt)
    elif attempt.judged is not None:
        # A drift is looked at, not remounted: the mount just made did not cause it.
        verdict = Verdict.worst(
            [
                attempt.verdict_of("survey-whole", "set-up-same", "circle-closed")
                or Verdict.NOT_JUDGED,
                attempt.verdict_of("runout-changed") or Verdict.NOT_JUDGED,
                attempt.home() or Verdict.NOT_JUDGED,
            ]
        )
    hot = any(view.item.kind == "hot" for view in attempt.items)
    return AttemptProgress(
        step=attempt.step.key,
        number=attempt.number,
        name=f"step {job.plan.step_number(attempt.step.key)}, {attempt.step.title}",
        items=tuple(_item_progress(attempt, index) for index in range(len(attempt.items))),
        survey_due=attempt.step.survey_due,
        balance=_balance_now(attempt),
        cooling=_cooling_now(attempt) if hot and attempt.step.survey_due else None,
        open_survey=open_surveys[-1].id if open_surveys else None,
        open_purpose=open_surveys[-1].purpose if open_surveys else None,
        verdict=verdict,
        seat_survey_closed=attempt.seat_survey is not None,
        outcome=attempt.settled.outcome if attempt.settled else None,
        performed=any(one.meaning == "performed" for one in attempt.signatures),
        points_open=waits_for(attempt.points),
    )


def _balance_now(attempt: Attempt) -> Verdict | None:
    asked = attempt.plan.balance
    if asked is None or attempt.step.key not in asked.after_steps:
        return None
    return balance_verdict(attempt.findings)


def _cooling_now(attempt: Attempt) -> Verdict:
    return attempt.verdict_of("may-be-read") or Verdict.NOT_JUDGED


def _item_progress(attempt: Attempt, index: int) -> ItemProgress:
    view = attempt.items[index]
    key = view.item.key
    on_taper = view.drawn_up is not None
    due = (
        ()
        if on_taper
        else tuple(
            (fit.land.key, feature)
            for fit in view.fits
            for feature, sizes in (("seat", fit.seat), ("bore", fit.bore))
            if sizes is None or sizes.entry.closed_at is None
        )
    )
    return ItemProgress(
        key=key,
        name=view.item.name,
        is_hot=view.item.kind == "hot",
        sizes_due=due,
        fit=None
        if on_taper
        else attempt.verdict_of(
            "sizes-plausible",
            "part-temperature-known",
            "seat-larger-than-bore",
            "interference-within",
            item=key,
        ),
        furnace=attempt.verdict_of("confirmed-before-furnace", item=key),
        target=attempt.verdict_of("target-below-highest", item=key),
        opening=attempt.verdict_of("bore-open", "heated-through", "not-overheated", item=key),
        door=attempt.verdict_of("confirmed-before-door", item=key),
        mounted=view.mount.outcome if view.mount else None,
        seated=attempt.home(key) if view.mount else None,
        is_on_taper=on_taper,
        axial_due=view.item.axial is not None and view.axial_cold is None,
        removed=view.removal is not None,
    )


def _without_survey(attempt: Attempt) -> Verdict | None:
    """Judge a step that no survey is due after: by how its parts came to rest."""
    found = [attempt.home(), attempt.verdict_of("axial-position-right")]
    known = [one for one in found if one is not None]
    return Verdict.worst(known) if known else None
