"""The traveler's last pages: the finished rotor, what stands against it, cautions, raw readings."""

from collections.abc import Iterator, Sequence

from reportlab.platypus import Flowable, PageBreak

from models.assess import Assessment
from models.job import Handling, Job, Note, RunoutSurvey, SizeSurvey
from models.rules.rule import Verdict
from models.units import unit_set
from reports.front_pages import shown_time
from reports.job_pictures import verdict_kind
from reports.page import NowAt
from reports.parts import (
    Cell,
    Signed,
    bold,
    cautions,
    head,
    note,
    shape,
    signatures,
    struck,
    table,
    text,
    title,
    words,
)
from reports.record_pages import record_pages

__all__ = ["closing", "raw_readings"]

_CAUTIONS = (
    "Hot parts burn and set fire: gloves, face shield, nothing that burns or evaporates nearby.",
    "Parts and rotor hang: rated gear, nobody under or beside the load, one person signals.",
    "Hydraulic pressure can throw a hub: keep a nut on, stand clear along the shaft.",
    "Solvents burn and harm the breath: air the place, keep them away from the furnace.",
    "A turning rotor catches: guards on, no loose clothing, hands away from supports.",
    "The shop's own rules, local codes and licensed practice go before anything printed here.",
)


def closing(view: Assessment) -> Iterator[Flowable]:
    """Close with the whole rotor, what stands against it, and who signs for it."""
    job = view.job
    yield PageBreak()
    yield NowAt("The whole rotor", "drift, final runout, open points")
    yield title("The whole rotor")
    waiting = [
        step.title
        for step in job.plan.steps
        if not any(
            one.settled is not None and one.settled.outcome != "removed"
            for one in view.attempts_at(step.key)
        )
    ]
    if waiting:
        yield text(
            bold("This rotor is unfinished. ")
            + words(f"Not yet settled: {', '.join(waiting)}. Next: {view.next.words}")
        )
    yield from _drift(view)
    yield from _final(view)
    yield from _at_speed(view)
    yield from _open_points(view)
    yield from record_pages(view)
    yield from _notes(job, view)
    yield head("Cautions")
    yield cautions(_CAUTIONS)
    yield head("Signed for the whole build", "accepting the rotor is a named person's act")
    yield signatures([Signed("performed"), Signed("inspected"), Signed("for the customer")])


def _drift(view: Assessment) -> Iterator[Flowable]:
    last = next((one for one in reversed(view.attempts) if one.drift), None)
    if last is None:
        return
    units = unit_set(view.job.plan.rotor.units)
    yield head(
        "Drift over all mounts",
        f"change against the bare shaft after {last.step.title}, {units.unit('runout')} TIR",
    )
    judged = {one.subject.station: one for one in last.of("runout-drifted")}
    rows: list[list[Cell]] = []
    for one in last.drift:
        if one.is_journal or one.tir is None:
            continue
        finding = judged.get(one.key)
        rows.append(
            [
                bold(one.key),
                words(view.job.plan.station(one.key).name),
                units.bare(one.tir, "runout"),
                f"{one.clock_angle_degrees or 0.0:.0f}°",
                units.bare(one.expanded_uncertainty or 0.0, "runout"),
                shape(verdict_kind(finding.verdict if finding else None)),
            ]
        )
    limit = view.job.plan.drift_limit
    yield table(["station", "", "drift", "towards", "±", ""], rows, [16, 70, 22, 18, 20, 26],
                align="llrrrc")  # fmt: skip
    yield note(
        words(f"Limit {limit.value.written}, {limit.origin.words}." if limit else
              "The plan sets no drift limit: not judged.")
    )  # fmt: skip


def _final(view: Assessment) -> Iterator[Flowable]:
    found = [one.finding for one in view.findings if one.finding.rule.id == "final-runout"]
    if not found:
        return
    yield head("Final runout", "each station against its final limit")
    rows: list[list[Cell]] = [
        [shape(verdict_kind(one.verdict)), bold(one.subject.station or ""), words(one.message),
         words(one.limit_origin or "")]
        for one in found
    ]  # fmt: skip
    yield table(["", "station", "", "from"], rows, [6, 14, 100, 52])


def _at_speed(view: Assessment) -> Iterator[Flowable]:
    """Set what was asked of the finished rotor beyond runout: speed, probe tracks, magnetism."""
    wanted = ("vibration-within", "probe-track-within", "magnetism-within")
    found = [one.finding for one in view.findings if one.finding.rule.id in wanted]
    if not found:
        return
    asked = view.job.plan.acceptance
    yield head("At speed, and before it leaves", asked.origin.words if asked else "")
    yield table(
        ["", "judged"],
        [[shape(verdict_kind(one.verdict)), words(one.message)] for one in found],
        [6, 168],
        align="cl",
    )


def _open_points(view: Assessment) -> Iterator[Flowable]:
    not_within = [one for one in view.findings if one.finding.verdict is not Verdict.WITHIN]
    yield head("What stands against it", "every finding that is not within, and what answered it")
    if not not_within:
        yield text("Nothing. Every rule that applies is within its limits.")
        return
    rows: list[list[Cell]] = []
    for one in not_within:
        subject = one.finding.subject
        step = ""
        if subject.step:
            step = f"{view.job.plan.step_number(subject.step)}"
            step += f", attempt {subject.attempt}" if subject.attempt else ""
        rows.append(
            [
                shape(verdict_kind(one.finding.verdict)),
                words(step),
                words(one.finding.message),
                words(one.answered_by or "open"),
            ]
        )
    yield table(["", "step", "finding", "answered by"], rows, [6, 22, 90, 54])


def _notes(job: Job, view: Assessment) -> Iterator[Flowable]:
    found = [one for one in job.entries if isinstance(one, Note | Handling)]
    if not found:
        return
    del view
    yield head("Notes and handling")
    yield table(
        ["when", "who", "what"],
        [
            [
                words(shown_time(one.done_at)),
                words(_who(job, one.by)),
                words(one.words if isinstance(one, Note) else f"{one.what}. {one.words}"),
            ]
            for one in found
        ],
        [34, 32, 106],
    )


def _who(job: Job, key: str) -> str:
    return next((one.name for one in job.people if one.key == key), key)


def raw_readings(view: Assessment) -> Iterator[Flowable]:
    """Give every reading as typed, so that all can be worked out again without the tool."""
    job = view.job
    yield PageBreak()
    yield NowAt("Readings as typed", "the record itself")
    yield title("Readings as typed", "struck ones stand beside what replaced them")
    for entry in job.entries:
        if isinstance(entry, SizeSurvey):
            yield from _raw_sizes(job, entry)
        elif isinstance(entry, RunoutSurvey):
            yield from _raw_runout(job, entry)


def _where(job: Job, step: str | None, attempt: int | None) -> str:
    if step is None:
        return "bare shaft"
    return f"step {job.plan.step_number(step)}, attempt {attempt}"


def _raw_runout(job: Job, entry: RunoutSurvey) -> Iterator[Flowable]:
    yield head(
        f"Runout, {entry.purpose}, {_where(job, entry.place.step, entry.place.attempt)}",
        f"{entry.unit}; {entry.instrument}; {shown_time(entry.done_at)}; "
        f"{_who(job, entry.read_by or entry.by)}",
    )
    marks = [f"{angle.typed}°" for angle in entry.angles]
    rows: list[list[Cell]] = []
    for one in entry.stations:
        typed = list(one.typed) + [None] * (len(marks) - len(one.typed))
        cells = [_typed(entry, one.station, str(index), value) for index, value in enumerate(typed)]
        again = _typed(entry, one.station, "again", one.again) if one.again else ""
        rows.append([bold(one.station), *cells, again])
    per = 150.0 / (len(marks) + 1)
    yield table(["", *marks, "again"], rows, [14, *([per] * (len(marks) + 1))],
                align="l" + "r" * (len(marks) + 1))  # fmt: skip


def _typed(entry: RunoutSurvey, station: str, mark: str, value: str | None) -> str:
    old = [one.was for one in entry.corrections if one.where == (station, mark)]
    now = "–" if value is None else value.replace("-", "−")
    return "".join(f"{struck(one)} " for one in old) + words(now)


def _raw_sizes(job: Job, entry: SizeSurvey) -> Iterator[Flowable]:
    part = entry.part_temperature.written if entry.part_temperature else "not taken"
    yield head(
        f"Sizes, {entry.feature} {entry.item}, land {entry.land}, "
        f"{_where(job, entry.place.step, entry.place.attempt)}",
        f"{entry.unit}; {entry.instrument}; part {part}; {shown_time(entry.done_at)}",
    )
    marks = [f"{angle.typed}°" for angle in entry.angles]
    rows: list[list[Cell]] = []
    for index, position in enumerate(entry.positions):
        values: Sequence[str | None] = entry.typed[index] if index < len(entry.typed) else ()
        cells: list[Cell] = []
        for column in range(len(marks)):
            value = values[column] if column < len(values) else None
            old = [one.was for one in entry.corrections if one.where == (str(index), str(column))]
            cells.append(
                "".join(f"{struck(one)} " for one in old) + words("–" if value is None else value)
            )
        rows.append([words(position.written), *cells])
    yield table(["at", *marks], rows, [28, *([24] * len(marks))], align="l" + "r" * len(marks))
