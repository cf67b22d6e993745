"""One attempt at a stacking step: its entries sorted, worked out and judged."""

from collections.abc import Iterable, Sequence
from dataclasses import dataclass, replace
from functools import cached_property, lru_cache

import msgspec

from models.assess.bend import Bend, bend_of
from models.assess.heat import Heat, heat_facts, item_heat
from models.assess.questions import open_questions
from models.assess.runout import (
    StationChange,
    SurveyRunout,
    compare_surveys,
    read_survey,
    where_the_bend_sits,
)
from models.assess.sizes import LandFit, expansion_of, land_fit
from models.assess.strength import FitStrength
from models.assess.strength_findings import strength_findings
from models.assess.strength_work import fit_strength
from models.engineering.bow import KinkFit
from models.engineering.bow_shape import side_to_side_bow
from models.job import (
    AnyEntry,
    AttemptOpened,
    AxialMeasured,
    Confirmation,
    Cooling,
    Decision,
    Heating,
    Item,
    Job,
    Mount,
    Plan,
    Removal,
    RunoutSurvey,
    Settled,
    Signature,
    SizeSurvey,
    Step,
)
from models.rules import rule
from models.rules.facts import (
    ClosureFacts,
    CoolFacts,
    FitFacts,
    InstrumentFacts,
    MountFacts,
    OrderFacts,
    PeopleFacts,
    SizeFacts,
    StationFacts,
    SurveyFacts,
)
from models.rules.rule import Finding, Subject, Verdict
from models.units import unit_set

__all__ = [
    "Attempt",
    "ItemView",
    "assess_attempt",
    "closure_allowed",
    "finding_key",
    "fit_facts",
    "station_facts",
]

# Where the plan sets no closure limit: common practice, as 2 µm or 5 % of the total.
_CLOSURE_FLOOR = 2e-6
_CLOSURE_SHARE = 0.05


@dataclass(frozen=True, eq=False)
class ItemView:
    """One item of a step in one attempt."""

    item: Item
    serial: str | None
    fits: tuple[LandFit, ...]
    strength: FitStrength | None
    heat: Heat | None
    mount: Mount | None
    axial: tuple[AxialMeasured, ...]
    removal: Removal | None
    confirmations: tuple[Confirmation, ...]

    @property
    def axial_cold(self) -> AxialMeasured | None:
        """The last axial position measured cold."""
        cold = [one for one in self.axial if one.state == "cold"]
        return cold[-1] if cold else None


@dataclass(frozen=True, eq=False)
class Attempt:
    """One attempt, with all that is known of it and every finding."""

    plan: Plan
    step: Step
    number: int
    opened: AttemptOpened
    entries: tuple[AnyEntry, ...]
    items: tuple[ItemView, ...]
    coolings: tuple[Cooling, ...]
    baseline: SurveyRunout | None
    surveys: tuple[SurveyRunout, ...]
    judged: SurveyRunout | None
    changes: tuple[StationChange, ...]
    kink: KinkFit | None
    seat_survey: SurveyRunout | None
    drift: tuple[StationChange, ...]
    settled: Settled | None
    signatures: tuple[Signature, ...]
    decisions: tuple[Decision, ...]
    findings: tuple[Finding, ...]

    @cached_property
    def bend(self) -> Bend:
        """What its surveys tell about the bow, worked out when asked for: no rule needs it."""
        return bend_of(
            self.plan,
            self.step.key,
            kink=self.kink,
            changes=self.changes,
            judged=self.judged,
            drift=self.drift,
        )

    @property
    def worst(self) -> Verdict:
        """The worst verdict of all findings of the attempt."""
        return Verdict.worst([finding.verdict for finding in self.findings])

    def of(self, rule_id: str, item: str | None = None) -> tuple[Finding, ...]:
        """Select the findings of one rule, of one item if named."""
        return tuple(
            finding
            for finding in self.findings
            if finding.rule.id == rule_id and item in (None, finding.subject.item)
        )

    def verdict_of(self, *rule_ids: str, item: str | None = None) -> Verdict | None:
        """Find the worst verdict of some rules, counting decisions; None where none was judged."""
        found = [finding for rule_id in rule_ids for finding in self.of(rule_id, item)]
        if not found:
            return None
        return Verdict.worst([self.counted(finding) for finding in found])

    def counted(self, finding: Finding) -> Verdict:
        """Give the verdict as it counts for going on: a person's decision settles a doubt."""
        about = finding_key(finding)
        decided = [one for one in self.decisions if one.about == about]
        if decided and decided[-1].disposition in (
            "accept reading",
            "use as is under concession",
        ):
            return Verdict.WITHIN
        return finding.verdict


def finding_key(finding: Finding) -> str:
    """Name a finding so that a decision can refer to it."""
    words = finding.subject.words
    return f"{finding.rule.id}: {words}" if words else finding.rule.id


def assess_attempt(
    job: Job,
    opened: AttemptOpened,
    entries: Sequence[AnyEntry],
    earlier_sizes: Sequence[SizeSurvey],
    baseline: RunoutSurvey | None,
    bare_shaft: RunoutSurvey | None,
) -> Attempt:
    """Sort, work out and judge one attempt.

    An attempt that was worked out before from the same facts is not worked out again: all of it is
    frozen, so that a new entry costs its own attempt only.
    """
    ground = msgspec.structs.replace(job, entries=(), verdicts=(), head=None)
    return _assess_attempt(
        ground, opened, tuple(entries), tuple(earlier_sizes), baseline, bare_shaft
    )


@lru_cache(maxsize=1024)
def _assess_attempt(
    job: Job,
    opened: AttemptOpened,
    entries: tuple[AnyEntry, ...],
    earlier_sizes: tuple[SizeSurvey, ...],
    named_baseline: RunoutSurvey | None,
    bare_shaft: RunoutSurvey | None,
) -> Attempt:
    step = job.plan.step(opened.place.step or "")
    mine = tuple(read_survey(job, one) for one in entries if isinstance(one, RunoutSurvey))
    fresh = [one for one in mine if one.entry.purpose == "before" and one.entry.is_closed]
    baseline = read_survey(job, named_baseline) if named_baseline else None
    baseline = fresh[-1] if fresh else baseline
    closing = [
        one for one in mine if one.entry.purpose in ("after", "again") and one.entry.is_closed
    ]
    judged = closing[-1] if closing else None
    seat = [one for one in mine if one.entry.purpose == "bare seat" and one.entry.is_closed]
    changes = compare_surveys(job, baseline, judged) if baseline and judged else ()
    bare = read_survey(job, bare_shaft) if bare_shaft else None
    settled = [one for one in entries if isinstance(one, Settled)]
    attempt = Attempt(
        plan=job.plan,
        step=step,
        number=opened.place.attempt or 1,
        opened=opened,
        entries=entries,
        items=tuple(_item_view(job, item, opened, entries, earlier_sizes) for item in step.items),
        coolings=tuple(one for one in entries if isinstance(one, Cooling)),
        baseline=baseline,
        surveys=mine,
        judged=judged,
        changes=changes,
        kink=where_the_bend_sits(job, changes),
        seat_survey=seat[-1] if seat else None,
        drift=compare_surveys(job, bare, judged) if bare and judged else (),
        settled=settled[-1] if settled else None,
        signatures=tuple(one for one in entries if isinstance(one, Signature)),
        decisions=tuple(one for one in entries if isinstance(one, Decision)),
        findings=(),
    )
    return replace(attempt, findings=tuple(_findings(job, attempt)))


def _item_view(
    job: Job,
    item: Item,
    opened: AttemptOpened,
    entries: Sequence[AnyEntry],
    earlier_sizes: Sequence[SizeSurvey],
) -> ItemView:
    own = [one for one in entries if isinstance(one, SizeSurvey)]
    # Sizes taken before the first attempt serve it; once the part has been on, new ones are due.
    sizes = [*earlier_sizes, *own] if opened.place.attempt == 1 else own
    fits = tuple(land_fit(job, item, land, sizes) for land in item.lands)
    heatings = [one for one in entries if isinstance(one, Heating)]
    mounts = [one for one in entries if isinstance(one, Mount) and one.item == item.key]
    removals = [one for one in entries if isinstance(one, Removal) and one.item == item.key]
    serials = dict(opened.components)
    held = [one.serial for one in job.components if one.item == item.key]
    return ItemView(
        item=item,
        serial=serials.get(item.key, held[-1] if held else None),
        fits=fits,
        strength=fit_strength(job.plan, item, fits),
        heat=item_heat(job, item, fits, heatings) if item.kind == "hot" else None,
        mount=mounts[-1] if mounts else None,
        axial=tuple(
            one for one in entries if isinstance(one, AxialMeasured) and one.item == item.key
        ),
        removal=removals[-1] if removals else None,
        confirmations=tuple(
            one for one in entries if isinstance(one, Confirmation) and one.item == item.key
        ),
    )


def _findings(job: Job, attempt: Attempt) -> Iterable[Finding]:
    for view in attempt.items:
        yield from _size_findings(job, attempt, view)
        about = _subject(attempt, item=view.item.key)
        yield from strength_findings(job.plan, view.item, view.strength, about)
        yield from _heat_findings(job, attempt, view)
        yield from _mount_findings(job, attempt, view)
    if _cooling_matters(attempt):
        subject = Subject(step=attempt.step.key, attempt=attempt.number)
        yield rule("may-be-read").apply(_cool_facts(job, attempt), subject)
    yield from _runout_findings(job, attempt)
    yield from _people_findings(job, attempt)


def _subject(attempt: Attempt, **more: str | None) -> Subject:
    return Subject(step=attempt.step.key, attempt=attempt.number, **more)


def _size_findings(job: Job, attempt: Attempt, view: ItemView) -> Iterable[Finding]:
    units = unit_set(job.plan.rotor.units)
    for fit in view.fits:
        subject = _subject(attempt, item=view.item.key, land=fit.land.key)
        for feature, sizes in (("seat", fit.seat), ("bore", fit.bore)):
            if sizes is None:
                continue
            entry = sizes.entry
            facts = SizeFacts(
                units=units,
                feature=feature,
                mean_diameter=sizes.as_read.mean,
                least_diameter=sizes.as_read.least,
                greatest_diameter=sizes.as_read.greatest,
                nominal_diameter=fit.land.nominal_diameter.si,
                part_temperature=entry.part_temperature.si if entry.part_temperature else None,
            )
            about = replace(subject, feature=feature, entry=entry.id)
            yield rule("sizes-plausible").apply(facts, about)
            yield rule("part-temperature-known").apply(facts, about)
            yield _instrument_finding(job, entry.instrument, entry.done_at, about)
        facts_of_fit = fit_facts(job, fit)
        yield rule("seat-larger-than-bore").apply(facts_of_fit, subject)
        yield rule("interference-within").apply(facts_of_fit, subject)


def fit_facts(job: Job, fit: LandFit) -> FitFacts:
    """State how bore and seat of a land fit, for the rules."""
    proved = job.plan.decision_rule == "proved"
    found = fit.interference
    return FitFacts(
        units=unit_set(job.plan.rotor.units),
        least_interference=found.least if found else None,
        mean_interference=found.mean if found else None,
        greatest_interference=found.greatest if found else None,
        # Simple acceptance needs no uncertainty; proving does.
        expanded_uncertainty=fit.expanded_uncertainty if proved else 0.0,
        least_allowed=fit.land.least_interference.value.si,
        greatest_allowed=fit.land.greatest_interference.value.si,
        proved=proved,
        limit_origin=fit.land.least_interference.origin.words,
    )


def _heat_findings(job: Job, attempt: Attempt, view: ItemView) -> Iterable[Finding]:
    if view.heat is None:
        return
    facts = heat_facts(job, view.heat, view.serial, view.confirmations)
    subject = _subject(attempt, item=view.item.key)
    for rule_id in (
        "confirmed-before-furnace",
        "target-below-highest",
        "not-overheated",
        "bore-open",
        "heated-through",
        "confirmed-before-door",
    ):
        # A single temperature or a gauge alone has no spread to judge.
        if rule_id == "heated-through" and facts.spread is None:
            continue
        if rule_id == "not-overheated" and facts.hottest_part is None:
            continue
        yield rule(rule_id).apply(facts, subject)
    heating = view.heat.heating
    if heating is not None and heating.instrument is not None:
        about = replace(subject, entry=heating.id)
        yield _instrument_finding(job, heating.instrument, heating.done_at, about)


def _mount_findings(job: Job, attempt: Attempt, view: ItemView) -> Iterable[Finding]:
    axial = view.item.axial
    facts = MountFacts(
        units=unit_set(job.plan.rotor.units),
        outcome=view.mount.outcome if view.mount else None,
        shoulder=view.mount.shoulder if view.mount else None,
        axial_position=view.axial_cold.value.si if view.axial_cold else None,
        axial_target=axial.target.si if axial else None,
        axial_tolerance=axial.tolerance.si if axial else None,
        limit_origin=axial.origin.words if axial else None,
    )
    subject = _subject(attempt, item=view.item.key)
    yield rule("part-seated").apply(facts, subject)
    if axial is not None:
        yield rule("axial-position-right").apply(facts, subject)


def _cooling_matters(attempt: Attempt) -> bool:
    return any(view.item.kind == "hot" for view in attempt.items)


def _cool_facts(job: Job, attempt: Attempt) -> CoolFacts:
    """State how warm the rotor last was, from the temperatures taken before the survey judged."""
    limits = job.plan.cooling
    cooling = _cooling_before(attempt)
    across = above = None
    if cooling is not None and cooling.temperatures:
        by_place: dict[int, list[float]] = {}
        for one in cooling.temperatures:
            by_place.setdefault(one.position.whole, []).append(one.temperature.si)
        opposite = [max(place) - min(place) for place in by_place.values() if len(place) > 1]
        across = max(opposite, default=None)
        if cooling.surroundings is not None:
            warmest = max(one.temperature.si for one in cooling.temperatures)
            above = warmest - cooling.surroundings.si
    return CoolFacts(
        units=unit_set(job.plan.rotor.units),
        side_to_side=across,
        above_surroundings=above,
        side_to_side_allowed=limits.side_to_side.si,
        above_surroundings_allowed=limits.above_surroundings.si,
        bow_per_kelvin=_bow_per_kelvin(job),
        limit_origin=limits.origin.words,
    )


def _cooling_before(attempt: Attempt) -> Cooling | None:
    if attempt.judged is None:
        return attempt.coolings[-1] if attempt.coolings else None
    ids = [one.id for one in attempt.entries]
    survey = ids.index(attempt.judged.entry.id)
    before = [one for one in attempt.coolings if ids.index(one.id) < survey]
    return before[-1] if before else None


def _bow_per_kelvin(job: Job) -> float | None:
    """Work out the mid-span bow per kelvin across, from the thinnest stretch between journals."""
    expansion = expansion_of(job.plan.shaft.material)
    if expansion is None:
        return None
    first = job.plan.station(job.plan.first_journal).position.si
    second = job.plan.station(job.plan.second_journal).position.si
    low, high = min(first, second), max(first, second)
    # The mean diameter by length stands for the shaft: the bow is a caution here, not a limit.
    lengths = [
        (min(step.end.si, high) - max(step.start.si, low), step.diameter.si)
        for step in job.plan.shaft.steps
        if step.end.si > low and step.start.si < high
    ]
    total = sum(length for length, _ in lengths)
    if total <= 0.0:
        return None
    return side_to_side_bow(
        temperature_difference=1.0,
        span=high - low,
        diameter=sum(length * diameter for length, diameter in lengths) / total,
        expansion=expansion(20.0),
    )


def _runout_findings(job: Job, attempt: Attempt) -> Iterable[Finding]:
    due = attempt.step.survey_due
    if attempt.judged is None:
        if due:
            yield rule("survey-whole").apply(
                SurveyFacts(units=unit_set(job.plan.rotor.units)), _subject(attempt)
            )
    else:
        yield from survey_findings(job, attempt, attempt.judged, attempt.baseline)
        for change in attempt.changes:
            if not change.is_journal:
                yield rule("runout-changed").apply(
                    station_facts(job, attempt.step, change),
                    _subject(attempt, station=change.key, entry=attempt.judged.entry.id),
                )
        yield from _drift_findings(job, attempt)
    if attempt.seat_survey is not None and attempt.baseline is not None:
        back = compare_surveys(job, attempt.baseline, attempt.seat_survey)
        for change in back:
            if not change.is_journal:
                yield rule("seat-came-back").apply(
                    station_facts(job, attempt.step, change),
                    _subject(attempt, station=change.key, entry=attempt.seat_survey.entry.id),
                )


def survey_findings(
    job: Job, attempt: Attempt, survey: SurveyRunout, baseline: SurveyRunout | None
) -> Iterable[Finding]:
    """Judge a survey as a whole: complete, in the same set-up, circles closed."""
    units = unit_set(job.plan.rotor.units)
    entry = survey.entry
    subject = _subject(attempt, entry=entry.id)
    differences = None if baseline is None else entry.set_up.differences(baseline.entry.set_up)
    facts = SurveyFacts(
        units=units,
        closed=entry.is_closed,
        stations_due=tuple(station.key for station in job.plan.stations_in_reach(attempt.step.key)),
        stations_read=tuple(one.key for one in survey.stations if one.is_read),
        set_up_differences=differences,
        open_questions=tuple(
            one.place for one in open_questions(job, entry, baseline.entry if baseline else None)
        ),
    )
    yield rule("survey-whole").apply(facts, subject)
    yield rule("set-up-same").apply(facts, subject)
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
    yield _instrument_finding(job, entry.instrument, entry.done_at, subject)


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
                facts, _subject(attempt, station=change.key, entry=attempt.judged.entry.id)
            )


def _people_findings(job: Job, attempt: Attempt) -> Iterable[Finding]:
    inspected = {one.by for one in attempt.signatures if one.meaning == "inspected"}
    performed = {
        one.by
        for one in attempt.entries
        if isinstance(one, Mount | Heating | SizeSurvey | Removal | RunoutSurvey)
    }
    facts = PeopleFacts(
        performers=tuple(sorted(job.person(key).name for key in performed)),
        inspectors=tuple(sorted(job.person(key).name for key in inspected)),
        points_due=tuple(_point_words(point.role, point.what) for point in attempt.step.points),
        points_open=points_open(attempt.step, attempt.signatures),
    )
    yield rule("performer-not-inspector").apply(facts, _subject(attempt))
    if attempt.settled is not None and attempt.settled.outcome != "removed":
        yield rule("points-signed").apply(facts, _subject(attempt))
    for entry in attempt.entries:
        if entry.out_of_order is not None:
            yield rule("in-order").apply(
                OrderFacts(entry=entry.title, out_of_order=entry.out_of_order),
                _subject(attempt, entry=entry.id),
            )


def points_open(step: Step, signatures: Sequence[Signature]) -> tuple[str, ...]:
    """Name the hold points of a step whose signature is still missing."""
    meanings = {"inspector": "inspected", "witness": "witnessed", "engineer": "decided"}
    given = {(one.role, one.meaning) for one in signatures}
    return tuple(
        _point_words(point.role, point.what)
        for point in step.points
        if point.kind == "hold" and (point.role, meanings.get(point.role, "performed")) not in given
    )


def _point_words(role: str, what: str) -> str:
    return f"{role} to sign: {what}"


def _instrument_finding(job: Job, tag: str, done_at: str, subject: Subject) -> Finding:
    instrument = job.instrument(tag)
    calibration = instrument.calibration if instrument else None
    facts = InstrumentFacts(
        tag=tag,
        used_on=done_at[:10],
        due_on=calibration.due_on if calibration else None,
    )
    return rule("instrument-in-calibration").apply(facts, subject)
