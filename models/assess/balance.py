"""Balance of a step or of the whole rotor: what is left, what may remain, what a part brought."""

import cmath
import math
from collections.abc import Iterable, Sequence
from dataclasses import dataclass, replace
from functools import cached_property

from models.assess.shaft import ShaftView, shaft_view
from models.engineering.balance import TwoPlanes, mass_to_add, stage_contribution
from models.engineering.balance_limits import (
    allocate_between_bearings,
    permissible_residual,
    permissible_residual_of_grade,
)
from models.engineering.errors import OutOfRangeError
from models.engineering.residual import residual_from_amplitudes, root_by_plain_reading
from models.job import (
    AnyEntry,
    BalanceCorrection,
    BalancePlan,
    BalanceRun,
    CorrectionPlane,
    Job,
    JournalsWeighed,
    Plan,
    TrialRound,
)
from models.rules import rule
from models.rules.balance import BalanceFacts, CorrectionFacts, DueFacts, TrialFacts
from models.rules.rule import Finding, Subject, Verdict
from models.units import unit_set

__all__ = ["BalanceView", "PlaneLeft", "balance_findings", "balance_verdict", "balance_view"]

_GRAVITY = 9.80665
# Least load that counts at a journal: the plan sets none, and a journal that lifts is told.
_LEAST_LOAD = 0.0


@dataclass(frozen=True)
class PlaneLeft:
    """What the last run left in one plane."""

    plane: CorrectionPlane
    residual: complex | None
    permissible: float | None
    brought: complex | None

    @property
    def mass_at_radius(self) -> float | None:
        """Mass that corrects it at the plane's radius [kg]."""
        if self.residual is None:
            return None
        return mass_to_add(unbalance=self.residual, radius=self.plane.radius.si).mass


@dataclass(frozen=True, eq=False)
class BalanceView:
    """Balance at one place of the job: its runs, corrections and rounds, and what they leave."""

    plan: Plan
    runs: tuple[BalanceRun, ...]
    corrections: tuple[BalanceCorrection, ...]
    rounds: tuple[TrialRound, ...]
    before: BalanceRun | None
    weighed: JournalsWeighed | None

    @cached_property
    def planes(self) -> tuple[PlaneLeft, ...]:
        """What is left in each plane, what may remain, and what the step's parts brought."""
        asked = self.plan.balance
        if asked is None:
            return ()
        last = self.runs[-1] if self.runs else None
        brought: tuple[complex | None, complex | None] = (None, None)
        if self.before is not None and self.runs:
            pair = stage_contribution(
                before=_both(asked, self.before), after=_both(asked, self.runs[0])
            )
            brought = (pair.first, pair.second)
        allowed = permissible(self.plan, self.weighed)
        return tuple(
            PlaneLeft(plane, None if last is None else _read(last, plane.key), limit, came)
            for plane, limit, came in zip(
                (asked.first_plane, asked.second_plane), allowed, brought, strict=True
            )
        )


def balance_view(
    job: Job, entries: Sequence[AnyEntry], before: Sequence[AnyEntry]
) -> BalanceView | None:
    """Sort the balance entries of a place; None where the plan asks for no balance at all."""
    if job.plan.balance is None:
        return None
    earlier = [one for one in before if isinstance(one, BalanceRun)]
    scales = [one for one in (*before, *entries) if isinstance(one, JournalsWeighed)]
    return BalanceView(
        plan=job.plan,
        runs=tuple(one for one in entries if isinstance(one, BalanceRun)),
        corrections=tuple(one for one in entries if isinstance(one, BalanceCorrection)),
        rounds=tuple(one for one in entries if isinstance(one, TrialRound)),
        before=earlier[-1] if earlier else None,
        weighed=scales[-1] if scales else None,
    )


def permissible(plan: Plan, weighed: JournalsWeighed | None) -> tuple[float | None, float | None]:
    """Work out what may remain in each plane [kg·m]; None where an input is missing."""
    asked, speed = plan.balance, plan.rotor.maximum_continuous_speed
    loads = _loads(shaft_view(plan), weighed)
    if asked is None or speed is None or speed.si <= 0.0 or loads is None:
        return (None, None)
    if asked.limit == "4 W/N":
        first, second = (
            permissible_residual(
                journal_load=load,
                least_journal_load=_LEAST_LOAD,
                maximum_continuous_speed=speed.si,
            ).unbalance
            for load in loads
        )
        return (first, second)
    if asked.grade is None:
        return (None, None)
    whole = permissible_residual_of_grade(
        rotor_mass=sum(loads) / _GRAVITY,
        grade=asked.grade * 1e-3,
        maximum_continuous_speed=speed.si,
    )
    journals = [plan.station(key).position.si for key in (plan.first_journal, plan.second_journal)]
    centre = (loads[0] * journals[0] + loads[1] * journals[1]) / sum(loads)
    try:
        shares = allocate_between_bearings(
            permissible=whole,
            centre_of_gravity=centre,
            first_plane=asked.first_plane.position.si,
            second_plane=asked.second_plane.position.si,
        )
    except OutOfRangeError:
        return (None, None)
    return (shares.first, shares.second)


def balance_findings(
    view: BalanceView, *, where: str, due: bool, new_parts: Sequence[str], subject: Subject
) -> Iterable[Finding]:
    """Judge balance at one place."""
    asked = view.plan.balance
    if asked is None or not (due or view.runs or view.corrections or view.rounds):
        return
    if due:
        yield rule("balance-done").apply(DueFacts(where=where, runs=len(view.runs)), subject)
    units = unit_set(view.plan.rotor.units)
    limits = {one.plane.key: one.permissible for one in view.planes}
    if view.runs:
        for one in view.planes:
            yield rule("residual-within").apply(
                BalanceFacts(
                    units=units,
                    plane=one.plane.name,
                    residual=None if one.residual is None else abs(one.residual),
                    permissible=one.permissible,
                    loads_weighed=view.weighed is not None,
                    limit_origin=asked.origin.words,
                ),
                _at(subject, one.plane.key, view.runs[-1].id),
            )
    for turn in view.rounds:
        yield rule("trial-round-agrees").apply(
            _trial_facts(view, turn, limits.get(turn.plane)), _at(subject, turn.plane, turn.id)
        )
    for made in view.corrections:
        if made.item is not None:
            yield rule("correction-on-new-part").apply(
                CorrectionFacts(
                    part=made.item, new_parts=tuple(new_parts), allowed_by=made.allowed_by
                ),
                _at(subject, made.plane, made.id),
            )


def balance_verdict(findings: Iterable[Finding]) -> Verdict:
    """Give the worst of what is said of balance."""
    mine = [
        one.verdict
        for one in findings
        if one.rule.id in ("balance-done", "residual-within", "trial-round-agrees")
    ]
    return Verdict.worst(mine)


def _trial_facts(view: BalanceView, turn: TrialRound, limit: float | None) -> TrialFacts:
    asked = view.plan.balance
    plane = asked.plane(turn.plane) if asked is not None else None
    facts = TrialFacts(
        units=unit_set(view.plan.rotor.units),
        plane=plane.name if plane else turn.plane,
        permissible=limit,
        limit_origin=asked.origin.words if asked else None,
    )
    try:
        check = residual_from_amplitudes(
            trial_unbalance=turn.trial.si,
            angles=[math.radians(one.angle.si) for one in turn.readings],
            amplitudes=[float(one.reading) for one in turn.readings],
        )
        which = None
        if turn.plain is not None:
            choice = root_by_plain_reading(check=check, plain_reading=float(turn.plain))
            which = "larger" if choice.above_trial else "smaller"
    except (OutOfRangeError, ValueError):
        return facts
    return TrialFacts(
        units=facts.units,
        plane=facts.plane,
        smaller=check.smaller,
        larger=check.larger,
        permissible=limit,
        which=which,
        limit_origin=facts.limit_origin,
    )


def _loads(shaft: ShaftView, weighed: JournalsWeighed | None) -> tuple[float, float] | None:
    if weighed is not None:
        return (weighed.first.si * _GRAVITY, weighed.second.si * _GRAVITY)
    first, second = shaft.load_at_first_journal, shaft.load_at_second_journal
    return None if first is None or second is None else (first, second)


def _read(run: BalanceRun, plane: str) -> complex | None:
    found = next((one for one in run.readings if one.plane == plane), None)
    if found is None:
        return None
    return cmath.rect(found.amount.si, math.radians(found.angle.si))


def _both(asked: BalancePlan, run: BalanceRun) -> TwoPlanes:
    first, second = (
        _read(run, plane.key) or 0j for plane in (asked.first_plane, asked.second_plane)
    )
    return TwoPlanes(first, second)


def _at(subject: Subject, plane: str, entry: str) -> Subject:
    return replace(subject, feature=f"plane {plane}", entry=entry)
