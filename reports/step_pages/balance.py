"""Balance after a step: runs, what may remain, what the part brought, corrections, trial rounds."""

import math
from cmath import phase
from collections.abc import Iterator, Sequence

from reportlab.platypus import Flowable

from models.assess import Attempt, BalanceView
from models.job import BalanceCorrection, BalanceRun, Job
from models.units import unit_set
from reports.job_pictures import verdict_kind
from reports.parts import Cell, head, note, shape, table, text, words

__all__ = ["balance"]


def balance(job: Job, pair: Sequence[Attempt]) -> Iterator[Flowable]:
    """Give the balance of each attempt that has one."""
    for attempt in pair:
        view = attempt.balance
        if view is None or not (view.runs or view.corrections or view.rounds):
            continue
        units = unit_set(job.plan.rotor.units)
        yield head(
            f"Balance, attempt {attempt.number}", f"{units.unit('unbalance')} at clock angle"
        )
        yield _runs(view)
        yield _planes(job, attempt, view)
        for one in view.corrections:
            yield text(words(_correction(job, one)))
        for found in attempt.of("trial-round-agrees"):
            yield text(words(found.message))
        loads = "weighed" if view.weighed is not None else "calculated: they cannot close a balance"
        asked = job.plan.balance
        yield note(
            words(
                f"Limit {_limit(job)}, {asked.origin.words if asked else ''}; journal loads "
                f"{loads}. Brought: the vector between the run before this step and its first run."
            )
        )


def _runs(view: BalanceView) -> Flowable:
    asked = view.plan.balance
    planes = () if asked is None else (asked.first_plane, asked.second_plane)
    rows: list[list[Cell]] = []
    for one in view.runs:
        row: list[Cell] = [words(one.purpose), words(one.speed.written), words(one.done_at[:16])]
        for plane in planes:
            row.append(words(_reading(one, plane.key)))
        rows.append(row)
    return table(
        ["run", "speed", "when", *(plane.name for plane in planes)], rows,
        [34, 26, 36, 38, 38][: 3 + len(planes)], align="lllrr"[: 3 + len(planes)],
    )  # fmt: skip


def _reading(run: BalanceRun, plane: str) -> str:
    found = next((one for one in run.readings if one.plane == plane), None)
    return "–" if found is None else f"{found.amount.typed} at {found.angle.typed}°"


def _planes(job: Job, attempt: Attempt, view: BalanceView) -> Flowable:
    units = unit_set(job.plan.rotor.units)
    judged = {one.subject.feature: one for one in attempt.of("residual-within")}
    rows: list[list[Cell]] = []
    for one in view.planes:
        finding = judged.get(f"plane {one.plane.key}")
        rows.append(
            [
                words(one.plane.name),
                words(_vector(one.brought, job)),
                words(_vector(one.residual, job)),
                words("–" if one.permissible is None else units.show(one.permissible, "unbalance")),
                shape(verdict_kind(finding.verdict if finding else None)),
            ]
        )
    return table(
        ["plane", "brought by the step", "left", "may remain", ""], rows, [44, 46, 40, 34, 8],
        align="lrrrc",
    )  # fmt: skip


def _vector(vector: complex | None, job: Job) -> str:
    if vector is None:
        return "–"
    units = unit_set(job.plan.rotor.units)
    return f"{units.bare(abs(vector), 'unbalance')} at {math.degrees(phase(vector)) % 360.0:.0f}°"


def _correction(job: Job, one: BalanceCorrection) -> str:
    on = next(
        (item.name for step in job.plan.steps for item in step.items if item.key == one.item), ""
    )
    allowed = f", allowed by {one.allowed_by}" if one.allowed_by else ""
    where = f" on {on}" if on else ""
    return (
        f"{one.how.capitalize()} in plane {one.plane}{where}: {one.amount.written} at "
        f"{one.angle.typed}°{allowed}."
    )


def _limit(job: Job) -> str:
    asked = job.plan.balance
    if asked is None:
        return "none"
    return "4 W/N" if asked.limit == "4 W/N" else f"grade G {asked.grade or 0.0:g}"
