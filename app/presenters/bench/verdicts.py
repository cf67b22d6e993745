"""The one large verdict of the bench, in words a person acts on."""

from collections.abc import Mapping, Sequence

from app.presenters.bench.cold import second_survey_words
from app.presenters.bench.reading import SoFar
from app.presenters.bench.state import BenchVerdict
from app.presenters.reasons import handbook_words
from models.assess import Attempt, LandFit
from models.assess.attempts import fit_facts
from models.assess.attempts.view import DRAW_UP_RULES, STRENGTH_RULES
from models.job import Job
from models.rules import rule
from models.rules.progress import Act, NextAct
from models.rules.rule import Finding, Subject, Verdict, words_for
from models.units import UnitSet, unit_set

__all__ = ["final_verdict", "reasons_of", "verdict_at", "verdict_of_sizes", "verdict_so_far"]

_CAUSES = (
    "the usual causes: cooled on one side first, touched before it was home, a key too high, dirt "
    "or a burr at the shoulder"
)
_RULES_OF: dict[Act, tuple[str, ...]] = {
    Act.CONFIRM_FURNACE: ("interference-within", "target-below-highest", *STRENGTH_RULES),
    Act.DECIDE_FIT: (
        "sizes-plausible",
        "seat-larger-than-bore",
        "interference-within",
        *STRENGTH_RULES,
    ),
    Act.HEAT: ("target-below-highest", "bore-open", "heated-through", "not-overheated"),
    Act.CONFIRM_DOOR: ("bore-open", "heated-through", "not-overheated"),
    Act.MOUNT: ("bore-open", "heated-through"),
    Act.COMPLETE_MOUNT: ("part-seated",),
    Act.DRAW_UP: DRAW_UP_RULES,
    Act.COOL: ("may-be-read",),
    Act.MEASURE_AXIAL: ("axial-position-right", "may-be-read"),
    Act.SURVEY: ("may-be-read",),
}


def reasons_of(findings: Sequence[Finding]) -> tuple[str, ...]:
    """Open verdicts to their statement, inputs, what was worked out, source and limit's origin."""
    lines: list[str] = []
    for finding in findings:
        lines += [finding.message, finding.rule.statement]
        lines += [
            f"{words_for(finding.rule.facts, name)} = {_plain(value)}"
            for name, value in finding.inputs.items()
            if value is not None
        ]
        lines += [
            f"{name.replace('_', ' ')} = {value:.6g}" for name, value in finding.computed.items()
        ]
        lines.append(f"Source: {finding.rule.source}")
        lines.append(handbook_words(finding.rule))
        if finding.limit_origin:
            lines.append(f"The limit comes from {finding.limit_origin}")
        lines.append("")
    return tuple(lines)


def _rules(worst: Finding, findings: Sequence[Finding]) -> tuple[str, ...]:
    return tuple(dict.fromkeys((worst.rule.id, *(one.rule.id for one in findings))))


def _plain(value: object) -> str:
    return f"{value:.6g}" if isinstance(value, float) else str(value)


def _worst(findings: Sequence[Finding]) -> Finding | None:
    return max(findings, key=lambda one: one.verdict.severity, default=None)


def verdict_at(act: NextAct, attempt: Attempt | None) -> BenchVerdict:
    """Say what stands at this act, before anything is read."""
    if attempt is None:
        return BenchVerdict(None, "Not judged yet", (act.words,))
    findings = [
        finding
        for rule_id in _RULES_OF.get(act.act, ())
        for finding in attempt.of(rule_id, act.item if act.item else None)
    ]
    worst = _worst(findings)
    if worst is None:
        return BenchVerdict(None, "Not judged yet", (act.words,))
    rest = [one for one in findings if one is not worst and one.verdict is not Verdict.NOT_JUDGED]
    return BenchVerdict(
        worst.verdict,
        worst.phrase,
        (worst.message, *(one.message for one in rest[:1]), *_meaning(act, attempt)),
        reasons=reasons_of(findings),
        rules=_rules(worst, findings),
    )


def _meaning(act: NextAct, attempt: Attempt) -> tuple[str, ...]:
    """Say in one sentence what a measured fit does, where the fit is what is looked at."""
    if act.act not in (Act.CONFIRM_FURNACE, Act.DECIDE_FIT):
        return ()
    view = next((one for one in attempt.items if one.item.key == act.item), None)
    return (view.strength.means,) if view is not None and view.strength is not None else ()


def verdict_so_far(so_far: SoFar, due: int, units: UnitSet) -> BenchVerdict:
    """Say what a survey says while it grows."""
    read = f"so far {len(so_far.stations_read)} of {due} stations"
    findings: Mapping[str, Finding] = so_far.findings
    worst = max(
        findings.values(),
        key=lambda one: (one.verdict.severity, float(one.inputs.get("change_tir") or 0.0)),
        default=None,
    )
    if worst is None:
        return BenchVerdict(
            None,
            "Not judged yet",
            ("Both journals first: they carry the datum.",)
            if so_far.survey is None or so_far.survey.in_axis is None
            else (),
            so_far=read,
        )
    return BenchVerdict(
        worst.verdict,
        worst.phrase if worst.verdict is not Verdict.OUTSIDE else "Stop",
        (worst.message,),
        so_far=read,
        reasons=reasons_of([worst]),
        rules=(worst.rule.id,),
    )


def verdict_of_sizes(job: Job, fit: LandFit, feature: str) -> BenchVerdict:
    """Say what the sizes say while they are taken: the feature so far, then the fit as it grows."""
    units = unit_set(job.plan.rotor.units)
    mine = fit.seat if feature == "seat" else fit.bore
    if mine is None:
        return BenchVerdict(None, "Not judged yet", (f"Nothing of the {feature} is read yet.",))
    read = mine.as_read
    so_far = (
        f"The {feature} so far: {units.bare(read.least, 'diameter')} to "
        f"{units.show(read.greatest, 'diameter')}, mean {units.show(read.mean, 'diameter')}."
    )
    if fit.interference is None:
        return BenchVerdict(None, "Not judged yet", (so_far,), so_far=f"{read.count} read")
    facts = fit_facts(job, fit)
    found = [
        rule(name).apply(facts, Subject(land=fit.land.key))
        for name in ("seat-larger-than-bore", "interference-within")
    ]
    worst = max(found, key=lambda one: one.verdict.severity)
    return BenchVerdict(
        worst.verdict,
        worst.phrase,
        (worst.message, so_far),
        so_far=f"{read.count} read",
        reasons=reasons_of(found),
        rules=_rules(worst, found),
    )


def final_verdict(attempt: Attempt, units: UnitSet) -> BenchVerdict:
    """Say how a mount ended: within limits, or remount required and where the bend sits."""
    if any(view.mount is not None and view.mount.outcome == "stopped short"
           for view in attempt.items):  # fmt: skip
        findings = attempt.of("part-seated")
        return BenchVerdict(
            Verdict.OUTSIDE,
            "Stopped short",
            tuple(one.message for one in findings if one.verdict is Verdict.OUTSIDE),
            reasons=reasons_of(findings),
            rules=("part-seated",),
            is_final=True,
        )
    findings = attempt.of("runout-changed") + attempt.of("set-up-same") + attempt.of("survey-whole")
    findings += attempt.of("circle-closed")
    worst = max(
        findings,
        key=lambda one: (one.verdict.severity, float(one.inputs.get("change_tir") or 0.0)),
        default=None,
    )
    if worst is None:
        return BenchVerdict(None, "Not judged yet", is_final=True)
    facts: list[tuple[str, str]] = []
    changes = [one for one in attempt.changes if one.tir is not None and not one.is_journal]
    if changes:
        greatest = max(changes, key=lambda one: one.tir or 0.0)
        facts.append(
            (
                "greatest change",
                f"{greatest.key}, {units.both(greatest.tir or 0.0, 'runout')} TIR at "
                f"{greatest.clock_angle_degrees or 0.0:.0f}°, ± "
                f"{units.show(greatest.expanded_uncertainty or 0.0, 'runout')}",
            )
        )
    if worst.verdict is Verdict.OUTSIDE and attempt.kink is not None:
        facts.append(("the bend sits", _bend(attempt, units)))
        facts.append(("look for", _CAUSES))
    waiting = second_survey_words(attempt.plan, attempt)
    if waiting is not None:
        facts.append(("a second survey proves it cold", waiting))
    return BenchVerdict(
        worst.verdict,
        worst.phrase,
        (worst.message,),
        facts=tuple(facts),
        reasons=reasons_of([one for one in findings if one.verdict is worst.verdict]),
        rules=_rules(worst, findings),
        is_final=True,
    )


def _bend(attempt: Attempt, units: UnitSet) -> str:
    kink = attempt.kink
    if kink is None:
        return "not told by these stations"
    where = units.show(kink.position, "position")
    item = next(
        (
            view.item.name
            for view in attempt.items
            if view.item.outline.start.si <= kink.position <= view.item.outline.end.si
        ),
        None,
    )
    place = f"under {item}" if item else "not under the part just mounted"
    spread = units.show(kink.position_uncertainty, "position")
    return f"{where} ± {spread} from the datum face, {place}"
