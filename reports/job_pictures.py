"""From a worked-out job to the plain facts that drawings are drawn from; screen and paper alike."""

import cmath
import math
from collections.abc import Collection, Mapping, Sequence

from models.assess import Assessment, Attempt, LandFit, StationChange, StationRunout, SurveyRunout
from models.assess.land_limits import limits_of
from models.job import Item, Job, Step
from models.rules.rule import Finding, Verdict
from models.units import Length, UnitSet, unit_set
from reports.sheet.pictures import (
    ChangeMark,
    Curve,
    DialPicture,
    DialReading,
    Facing,
    LengthUnit,
    PartKind,
    PartOutline,
    PartState,
    PlaneCurve,
    RangeBar,
    RangePicture,
    RotorPicture,
    ShaftStep,
    StationMark,
    StationState,
    Turning,
    VerdictKind,
)

__all__ = [
    "bare_figure",
    "change_marks",
    "counted_words",
    "curve",
    "dial_picture",
    "findings_by_station",
    "fit_picture",
    "rotor_picture",
    "verdict_kind",
]

_KINDS = {
    Verdict.WITHIN: VerdictKind.WITHIN,
    Verdict.CANNOT_TELL: VerdictKind.LOOK,
    Verdict.OUTSIDE: VerdictKind.STOP,
    Verdict.NOT_JUDGED: VerdictKind.NOT_JUDGED,
}


def verdict_kind(verdict: Verdict | None) -> VerdictKind:
    """Give the shape of a verdict."""
    return VerdictKind.NOT_JUDGED if verdict is None else _KINDS[verdict]


def rotor_picture(
    view: Assessment,
    *,
    step: str | None,
    attempt: int = 1,
    lifted_gap: float = 0.0,
    label: str = "",
    active: str | None = None,
    read: Collection[str] | None = None,
    numbers: bool = False,
    every_station: bool = False,
    bare: bool = False,
) -> RotorPicture:
    """Draw the rotor as it stands at a step: on before it, in hand at it, to come after it.

    `read` names the stations read so far in the survey shown, None for a survey that is done.
    Without a step everything is drawn as it is on; `bare` draws the shaft before the first mount.
    """
    plan = view.job.plan
    shift = min(one.start.si for one in plan.shaft.steps)
    number_of = {one.key: number for number, one in enumerate(plan.steps, start=1)}
    now = number_of[step] if step is not None else len(plan.steps) + 1
    now = 0 if bare else now
    bore = plan.shaft.bore.si if plan.shaft.bore else 0.0
    parts = [
        _outline(
            item,
            shift=shift,
            state=_state(number_of[one.key], now),
            lifted_gap=lifted_gap if number_of[one.key] == now else 0.0,
            attempt=attempt if number_of[one.key] == now else 1,
            label=label if number_of[one.key] == now and item is one.items[0] else "",
            number=str(number_of[one.key]) if numbers and item is one.items[0] else "",
        )
        for one in plan.steps
        for item in one.items
    ]
    last = None if bare else step or plan.steps[-1].key
    reach = {one.key for one in plan.stations_in_reach(last)}
    journals = (plan.first_journal, plan.second_journal)
    stations = tuple(
        StationMark(
            key=one.key,
            position=one.position.si - shift,
            is_journal=one.key in journals,
            state=_station_state(one.key, active, read),
            tells=f"{one.key}, {one.name}",
        )
        for one in sorted(plan.stations, key=lambda station: station.position.whole)
        if every_station or one.key in reach
    )
    return RotorPicture(
        name=f"{plan.rotor.serial}, {plan.rotor.name}",
        steps=tuple(
            ShaftStep(
                start=one.start.si - shift,
                end=one.end.si - shift,
                diameter=one.diameter.si,
                bore=bore,
            )
            for one in plan.shaft.steps
        ),
        parts=tuple(parts),
        stations=stations,
        drive_end_name=plan.rotor.first_end,
        far_end_name="",
        length_unit=LengthUnit.INCH if plan.rotor.units == "inch" else LengthUnit.MILLIMETRE,
    )


def _state(number: int, now: int) -> PartState:
    if number == now:
        return PartState.CURRENT
    return PartState.ON if number < now else PartState.TO_COME


def _station_state(key: str, active: str | None, read: Collection[str] | None) -> StationState:
    if key == active:
        return StationState.ACTIVE
    return StationState.READ if read is None or key in read else StationState.TO_COME


def _outline(
    item: Item,
    *,
    shift: float,
    state: PartState,
    lifted_gap: float,
    attempt: int,
    label: str,
    number: str,
) -> PartOutline:
    shape = item.outline
    kind = PartKind.SLEEVE if shape.kind == "spacer" else PartKind(shape.kind)
    return PartOutline(
        key=item.key,
        name=item.name,
        kind=kind,
        start=shape.start.si - shift,
        end=shape.end.si - shift,
        bore_diameter=shape.bore.si,
        outer_diameter=shape.outer.si,
        hub_diameter=shape.hub.si if shape.hub else None,
        facing=Facing.DRIVE_END if shape.facing == "first end" else Facing.FAR_END,
        state=state,
        lifted_gap=lifted_gap,
        attempt=attempt,
        label=label,
        number=number,
    )


def curve(
    job: Job,
    survey: SurveyRunout,
    which: Curve,
    *,
    name: str = "",
    active: str | None = None,
) -> PlaneCurve:
    """Give the centreline of a survey, in the journal axis; gaps where nothing is known."""
    shift = min(one.start.si for one in job.plan.shaft.steps)
    stations = sorted(survey.stations, key=lambda one: one.position)
    keys = [one.key for one in stations]
    return PlaneCurve(
        which=which,
        positions=tuple(one.position - shift for one in stations),
        vectors=tuple(survey.corrected(key) for key in keys),
        name=name,
        active=keys.index(active) if active in keys else None,
    )


def bare_figure(units: UnitSet, value: float) -> str:
    """Write a runout as a whole number of the indicator's last digit: 0.0001 in, or 1 µm."""
    step = 2.54e-6 if units.name == "inch" else 1e-6
    return f"{value / step:.0f}"


def change_marks(
    view: Assessment,
    step: Step,
    changes: Sequence[StationChange],
    findings: Mapping[str, Finding],
    *,
    active: str | None = None,
    to_come: Sequence[str] = (),
) -> tuple[ChangeMark, ...]:
    """Give one circle a station: its change against the limit, and the figure under it."""
    job = view.job
    units = unit_set(job.plan.rotor.units)
    shift = min(one.start.si for one in job.plan.shaft.steps)
    limit = step.change_limit.value.si if step.change_limit else None
    marks = []
    for change in changes:
        finding = findings.get(change.key)
        vector = None
        if change.change is not None and not change.is_journal:
            vector = 2.0 * change.change
        text = "datum" if change.is_journal else ""
        if vector is not None and change.tir is not None:
            text = bare_figure(units, change.tir)
            if change.key == active and change.expanded_uncertainty is not None:
                text += f" ± {bare_figure(units, change.expanded_uncertainty)}"
        marks.append(
            ChangeMark(
                key=change.key,
                position=change.position - shift,
                change_tir=vector,
                limit_tir=limit,
                text=text,
                verdict=verdict_kind(finding.verdict if finding else None),
                state=StationState.ACTIVE if change.key == active else StationState.READ,
                is_datum=change.is_journal,
                tells=finding.message if finding else "",
            )
        )
    known = {one.key for one in changes}
    journals = (job.plan.first_journal, job.plan.second_journal)
    marks += [
        ChangeMark(
            key=key,
            position=job.plan.station(key).position.si - shift,
            change_tir=None,
            limit_tir=limit,
            state=StationState.ACTIVE if key == active else StationState.TO_COME,
            is_datum=key in journals,
        )
        for key in to_come
        if key not in known
    ]
    return tuple(sorted(marks, key=lambda one: one.position))


def counted_words(job: Job) -> str:
    """Say how marks are counted, as every survey, plot and page must."""
    rotor = job.plan.rotor
    turns, counted = ("↻", "↺") if rotor.rotation == "clockwise" else ("↺", "↻")
    return f"rotor turns {turns}, marks counted {counted}"


def dial_picture(
    job: Job,
    station: StationRunout,
    *,
    before: complex | None = None,
    after_datum: complex | None = None,
    limit: float | None = None,
    active_angle: float | None = None,
    open_mark: int | None = None,
    verdict: Verdict | None = None,
    caption: tuple[str, ...] | None = None,
) -> DialPicture:
    """Give the readings of one station round the clock.

    The fitted circle is drawn where the readings put it. `before` is the offset before the mount
    in the journal axis; it is moved by what separates this survey's own axis from that one, so that
    both circles stand in one frame.
    """
    rotor = job.plan.rotor
    counted = Turning.COUNTERCLOCKWISE if rotor.rotation == "clockwise" else Turning.CLOCKWISE
    readings = tuple(
        DialReading(angle=float(angle), value=float(value), is_open=index == open_mark)
        for index, (angle, value) in enumerate(zip(station.angles, station.readings, strict=True))
        if not math.isnan(value)
    )
    fit = station.fit
    mean = fit.mean if fit else _mean([one.value for one in readings])
    own = station.vector if station.has_vector else None
    if before is not None and own is not None and after_datum is not None:
        before = before + own - after_datum
    return DialPicture(
        key=station.key,
        readings=readings,
        mean=mean,
        eccentricity=own,
        before=before,
        limit_tir=limit,
        active_angle=active_angle,
        counted=counted,
        caption=caption
        if caption is not None
        else (f"from the {rotor.seen_from}", counted_words(job)),
        verdict=verdict_kind(verdict),
        tells=_dial_sentence(job, station, own),
    )


def _mean(values: Sequence[float]) -> float:
    return sum(values) / len(values) if values else 0.0


def _dial_sentence(job: Job, station: StationRunout, vector: complex | None) -> str:
    if vector is None:
        return f"{station.key}: too few readings for a high spot yet."
    units = unit_set(job.plan.rotor.units)
    angle = math.degrees(cmath.phase(vector)) % 360.0
    return (
        f"{station.key} runs out {units.both(station.total, 'runout')} in all; its high spot "
        f"lies at {angle:.0f}°."
    )


def fit_picture(
    job: Job, rows: Sequence[tuple[str, LandFit, Finding | None]]
) -> RangePicture | None:
    """Give measured interferences against their limits, a bar each; None where none is known."""
    units = unit_set(job.plan.rotor.units)
    unit = "in" if units.name == "inch" else "µm"
    known = [row for row in rows if row[1].interference is not None]
    if not known:
        return None
    land = known[0][1].land
    bars = []
    for name, fit, finding in known:
        assert fit.interference is not None
        bars.append(
            RangeBar(
                name=name,
                least=Length.in_unit(fit.interference.least, unit),
                mean=Length.in_unit(fit.interference.mean, unit),
                greatest=Length.in_unit(fit.interference.greatest, unit),
                uncertainty=Length.in_unit(fit.expanded_uncertainty or 0.0, unit),
                text=units.show(fit.interference.mean, "fit"),
                verdict=verdict_kind(finding.verdict if finding else None),
                tells=finding.message if finding else "",
            )
        )
    least, greatest = limits_of(land)
    return RangePicture(
        bars=tuple(bars),
        lower=Length.in_unit(least.value.si, unit),
        upper=Length.in_unit(greatest.value.si, unit),
        # The origin stands in words beside the figure: a drawing's name has no room at a limit.
        lower_text=f"least {least.value.written}",
        upper_text=f"greatest {greatest.value.written}",
        unit=unit,
    )


def findings_by_station(attempt: Attempt, rule_id: str = "runout-changed") -> dict[str, Finding]:
    """Index an attempt's findings of one rule by station."""
    return {
        one.subject.station: one for one in attempt.of(rule_id) if one.subject.station is not None
    }
