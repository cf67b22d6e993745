"""The traveler's first pages: cover, what was built by whom, conventions, limits, instruments."""

import cmath
import math
from collections.abc import Iterator, Sequence
from dataclasses import replace

from reportlab.platypus import Flowable, PageBreak

from models.assess import Assessment, Attempt
from models.assess.land_limits import limits_of
from models.job import Item, Job, Plan, Signature
from models.rules.rule import Verdict
from models.units import unit_set
from reports.draw import SheetFlowable
from reports.job_pictures import counted_words, curve, rotor_picture, verdict_kind
from reports.page import NowAt
from reports.parts import (
    Cell,
    bold,
    facts,
    gap,
    head,
    note,
    shape,
    table,
    text,
    title,
    verdict_line,
    words,
)
from reports.sheet.along import PAPER_LAYOUT, along_the_rotor
from reports.sheet.pictures import Curve

__all__ = [
    "bare_shaft",
    "conventions",
    "cover",
    "instruments_and_people",
    "limits",
    "shown_time",
    "shown_total",
]

_ROTOR_ONLY = replace(
    PAPER_LAYOUT,
    height=62.0,
    rotor=(0.0, 56.0),
    names=(57.0, 60.5),
    planes=(61.0, 61.5),
    change_top=62.0,
    change_height=0.5,
)
_WITH_PLANES = replace(PAPER_LAYOUT, height=89.0, change_top=89.0, change_height=0.5)


def shown_time(iso: str | None) -> str:
    """Write an instant with its offset, to the minute."""
    if not iso:
        return ""
    offset = iso[19:] if len(iso) > 19 else ""
    return f"{iso[:10]} {iso[11:16]} {offset.replace('-', '−')}".strip()


def shown_total(vector: complex | None, units_name: str) -> tuple[str, str]:
    """Write twice a vector as a total and its clock angle."""
    if vector is None:
        return "–", ""
    units = unit_set(units_name)
    angle = math.degrees(cmath.phase(vector)) % 360.0
    return units.bare(2.0 * abs(vector), "runout"), f"{angle:.0f}°"


def cover(view: Assessment) -> Iterator[Flowable]:
    """Begin with which rotor it is, whose, under which plan, and how it stands."""
    job = view.job
    plan = job.plan
    rotor = plan.rotor
    yield NowAt("Cover", "how the rotor was built")
    yield title(f"{rotor.serial}  {rotor.name}", "traveler of build and runout")
    if rotor.invented:
        yield text(bold("Invented: ") + "this rotor, its people and its readings do not exist.")
    yield gap(1.0)
    picture = rotor_picture(view, step=_standing_step(view), numbers=True, every_station=True)
    yield SheetFlowable(along_the_rotor(picture=picture, layout=_ROTOR_ONLY))
    yield note("Upper half in section, lower half from outside; numbers are steps of the stack.")
    yield gap(1.5)
    yield facts(
        [
            ("customer", words(job.customer or "not stated")),
            ("plant, machine", words(", ".join(filter(None, (rotor.plant, rotor.machine_tag))))),
            ("service", words(rotor.service or "not stated")),
            ("speeds", words(_speeds(job))),
            ("shop, job", words(f"{job.shop or 'not stated'}, job {job.number}")),
            (
                "plan",
                "<br/>".join(words(_revision(job, one)) for one in job.plans),
            ),
        ]
    )
    yield head("How it stands")
    yield from _standing(view)
    yield PageBreak()
    yield NowAt("What was built", "by whom")
    yield head("What was built, and by whom", "attempts count from 1; earlier ones stand in full")
    yield _steps(view)


def _revision(job: Job, plan: Plan) -> str:
    approved = f", approved by {_name(job, plan.approved_by)}" if plan.approved_by else ""
    return (
        f"{plan.revision}: {plan.reason}; written by {_name(job, plan.written_by)}, issued by "
        f"{_name(job, plan.issued_by)} {shown_time(plan.issued_at)}{approved}"
    )


def _standing_step(view: Assessment) -> str | None:
    return view.progress.current


def _name(job: Job, key: str) -> str:
    return next((one.name for one in job.people if one.key == key), key)


def _speeds(job: Job) -> str:
    rotor = job.plan.rotor
    units = unit_set(rotor.units)
    found = []
    if rotor.maximum_continuous_speed:
        speed = units.show(rotor.maximum_continuous_speed.si, "speed")
        found.append(f"maximum continuous {speed}")
    if rotor.trip_speed:
        found.append(f"trip {units.show(rotor.trip_speed.si, 'speed')}")
    if rotor.power:
        found.append(units.both(rotor.power.si, "power"))
    return ", ".join(found) or "not stated"


def _standing(view: Assessment) -> Iterator[Flowable]:
    open_ones = [
        one.finding
        for one in view.findings
        if one.answered_by is None and one.finding.verdict is not Verdict.WITHIN
    ]
    done = sum(1 for one in view.job.plan.steps if _outcome(view, one.key) is not None)
    of = len(view.job.plan.steps)
    if not open_ones:
        yield verdict_line(
            verdict_kind(Verdict.WITHIN),
            "Within limits",
            f"All {of} steps are settled and nothing stands against acceptance. The tool judges; "
            "accepting the rotor is a named person's act.",
        )
        return
    unfinished = done < of
    worst = max(open_ones, key=lambda one: one.verdict.severity)
    phrase = "Unfinished" if unfinished and worst.verdict is Verdict.NOT_JUDGED else worst.phrase
    yield verdict_line(
        verdict_kind(worst.verdict),
        phrase,
        f"{done} of {of} steps are settled. Next: {view.next.words}"
        if unfinished
        else worst.message,
    )
    others = [one for one in open_ones if one.rule.id != "every-step-settled"]
    for one in others[:6]:
        yield text(words(f"{one.phrase}: {one.message}"))
    if len(others) > 6:
        yield text(f"{len(others) - 6} more stand under “What stands against it”.")


def _outcome(view: Assessment, step: str) -> Attempt | None:
    settled = [
        one
        for one in view.attempts_at(step)
        if one.settled is not None and one.settled.outcome != "removed"
    ]
    return settled[-1] if settled else None


def _steps(view: Assessment) -> Flowable:
    job = view.job
    rows: list[list[Cell]] = []
    for number, step in enumerate(job.plan.steps, start=1):
        attempts = view.attempts_at(step.key)
        last = attempts[-1] if attempts else None
        signed = last.signatures if last else ()
        outcome = "not yet mounted"
        if last is not None:
            outcome = last.settled.outcome if last.settled else "open"
        verdict = None
        if last is not None:
            verdict = last.verdict_of("runout-changed") or last.home()
        rows.append(
            [
                str(number),
                words(step.title),
                words(", ".join(_serials(job, step.items))),
                str(len(attempts)) if attempts else "–",
                shape(verdict_kind(verdict)),
                words(outcome),
                words(_signer(job, signed, "performed")),
                words(_signer(job, signed, "inspected")),
                words(shown_time(last.settled.done_at)[:16] if last and last.settled else ""),
            ]
        )
    return table(
        ["step", "part", "serial", "attempts", "", "outcome", "performed", "inspected", "settled"],
        rows,
        [6, 31, 22, 12, 5, 20, 25, 25, 22],
        align="rllcclll" + "l",
    )


def _serials(job: Job, items: Sequence[Item]) -> list[str]:
    return [one.serial for item in items for one in job.components if one.item == item.key]


def _signer(job: Job, signed: Sequence[Signature], meaning: str) -> str:
    return ", ".join(_name(job, one.by) for one in signed if one.meaning == meaning)


def conventions(view: Assessment) -> Iterator[Flowable]:
    """Say how everything in this document is counted, signed and decided."""
    plan = view.job.plan
    rotor = plan.rotor
    method = plan.runout
    proved = plan.decision_rule == "proved"
    yield head("Conventions", "they hold on every page")
    yield facts(
        [
            (
                "places",
                words(
                    f"Axial positions count from {rotor.datum_face}; the {rotor.first_end} is "
                    "drawn at the left."
                ),
            ),
            (
                "angles",
                words(
                    f"Clock angles in degrees from the reference mark ({rotor.reference_mark}), "
                    f"counted against the rotation, seen from the {rotor.seen_from}: "
                    f"{counted_words(view.job)}."
                ),
            ),
            (
                "readings",
                "Positive when the surface moves towards the indicator. TIR is the total indicator "
                "reading, greatest less least; a pure offset e shows as TIR = 2e.",
            ),
            (
                "change of a mount",
                "The difference of two eccentricity vectors, after less before, in the axis "
                "through both journals, given as TIR (twice its length) with its clock angle. "
                "Beside it stands the plain change of the total, which can be nothing while the "
                "high spot has turned.",
            ),
            (
                "decision",
                "Proved: the uncertainty counts against whoever must prove (ISO 14253-1)."
                if proved
                else "Simple acceptance, as the plan says: the value itself is compared with its "
                "limit.",
            ),
            ("uncertainty", "± is expanded, k = 2, about 95 %."),
            ("sizes", "Diameters at 20 °C (ISO 1); interference is diametral, seat less bore."),
            (
                "set-up",
                words(
                    f"{method.attitude.capitalize()}, {method.supports}"
                    + (f", at {', '.join(method.supported_at)}" if method.supported_at else "")
                    + f"; {len(method.marks)} marks, {method.order}."
                ),
            ),
            (
                "verdicts",
                "Open ring: within limits. Half-filled square on its corner: look again. Filled "
                "square: stop. Dashed ring: not judged, something is missing.",
            ),
        ]
    )


def limits(view: Assessment) -> Iterator[Flowable]:
    """Give every limit with where it comes from."""
    plan = view.job.plan
    yield head("Limits and where they come from", "a limit without an origin is not used")
    rows: list[list[Cell]] = []
    for number, step in enumerate(plan.steps, start=1):
        if step.change_limit:
            rows.append(
                [
                    f"{number}",
                    "change of runout, any station, TIR",
                    words(step.change_limit.value.written),
                    words(step.change_limit.origin.words),
                ]
            )
        for item in step.items:
            for land in item.lands:
                least, greatest = limits_of(land)
                rows.append(
                    [
                        f"{number}",
                        words(f"interference, {item.name}, land {land.key}"),
                        words(f"{least.value.typed} to {greatest.value.written}"),
                        words(least.origin.words),
                    ]
                )
            if item.highest_temperature:
                rows.append(
                    [
                        f"{number}",
                        words(f"highest temperature, {item.name}"),
                        words(item.highest_temperature.value.written),
                        words(item.highest_temperature.origin.words),
                    ]
                )
            if item.axial:
                rows.append(
                    [
                        f"{number}",
                        words(f"axial position, {item.name}"),
                        words(f"{item.axial.target.written} ± {item.axial.tolerance.written}"),
                        words(item.axial.origin.words),
                    ]
                )
    for name, limit in (
        ("drift from the bare shaft, TIR", plan.drift_limit),
        ("bare shaft, TIR", plan.bare_shaft_limit),
    ):
        if limit:
            rows.append(["", name, words(limit.value.written), words(limit.origin.words)])
    rows += [
        [
            "",
            words(f"final runout, {station.key} {station.name}"),
            words(station.final_limit.value.written),
            words(station.final_limit.origin.words),
        ]
        for station in plan.stations
        if station.final_limit
    ]
    cooling = plan.cooling
    rows.append(
        [
            "",
            "may be read: side to side, above the room",
            words(f"{cooling.side_to_side.written}, {cooling.above_surroundings.written}"),
            words(cooling.origin.words),
        ]
    )
    yield table(["step", "what", "limit", "from"], rows, [7, 62, 38, 65], align="rlll")


def instruments_and_people(view: Assessment) -> Iterator[Flowable]:
    """Say who took part, and what was measured with."""
    job = view.job
    yield head("People")
    yield table(
        ["initials", "name", "role", "for"],
        [
            [words(one.initials), words(one.name), one.role, words(one.employer or job.shop)]
            for one in job.people
        ],
        [12, 40, 25, 60],
    )
    yield head("Instruments", "as they stood when they were used; uncertainty with k = 2")
    yield table(
        ["tag", "kind", "resolution", "uncertainty", "calibrated", "due", "certificate"],
        [
            [
                words(one.tag),
                words(one.kind),
                words(one.resolution.written if one.resolution else "–"),
                words(one.uncertainty.written if one.uncertainty else "–"),
                words(one.calibration.done_on if one.calibration else "–"),
                words(one.calibration.due_on if one.calibration else "–"),
                words(one.calibration.certificate if one.calibration else "–"),
            ]
            for one in job.instruments
        ],
        [14, 36, 22, 22, 20, 20, 38],
    )


def bare_shaft(view: Assessment) -> Iterator[Flowable]:
    """Show the bare shaft, which every later survey is compared with."""
    survey = view.bare_shaft
    yield NowAt("Bare shaft", "before the first mount")
    yield title("The bare shaft", "every drift is counted from here")
    if survey is None:
        yield text("The bare shaft has not been surveyed yet.")
        return
    picture = rotor_picture(view, step=None, bare=True)
    yield SheetFlowable(
        along_the_rotor(
            picture=picture,
            curves=[curve(view.job, survey, Curve.AFTER)],
            layout=_WITH_PLANES,
        )
    )
    entry = survey.entry
    yield note(
        words(
            f"Read {shown_time(entry.done_at)} with {entry.instrument}, by "
            f"{_name(view.job, entry.read_by or entry.by)}; {entry.set_up.supports}."
        )
    )
    units = view.job.plan.rotor.units
    rows: list[list[Cell]] = []
    for one in survey.stations:
        total, angle = shown_total(survey.corrected(one.key), units)
        own = unit_set(units)
        fit = one.fit
        rows.append(
            [
                bold(one.key),
                words(view.job.plan.station(one.key).name),
                own.bare(one.position, "position"),
                own.bare(one.total, "runout") if one.is_read else "–",
                total,
                angle,
                own.bare(fit.out_of_roundness, "runout") if fit else "–",
            ]
        )
    unit = unit_set(units)
    yield gap(2)
    yield table(
        [
            "station",
            "",
            f"at, {unit.unit('position')}",
            f"total read, {unit.unit('runout')}",
            f"TIR in the journal axis, {unit.unit('runout')}",
            "high spot",
            f"out of round, {unit.unit('runout')}",
        ],
        rows,
        [13, 50, 22, 24, 32, 16, 24],
        align="llrrrrr",
    )
