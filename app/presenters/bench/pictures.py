"""What the bench draws: the rotor as it stands, its centreline, and the change at each station."""

import math
from dataclasses import dataclass

from app.presenters.bench.reading import Reading, SoFar
from app.presenters.bench.state import Drop
from models.assess import Assessment, Attempt, ItemView
from models.engineering.drop_window import DropWindow
from models.job import RunoutSurvey
from models.rules.progress import Act, NextAct
from models.units import unit_set
from reports.job_pictures import (
    change_marks,
    curve,
    findings_by_station,
    rotor_picture,
)
from reports.sheet.pictures import ChangeMark, Curve, GapPicture, PlaneCurve, RotorPicture

__all__ = ["Shown", "drop_of", "show_rotor"]

# A part that is not on hangs by its mounting clearance; where the plan gives none, by this much.
_LIFT = 50e-6

# One to six minutes over the seat, in seconds: common practice, and seconds once metal touches.
_LONGEST_KNOWN = 360.0


@dataclass(frozen=True)
class Shown:
    """The upper half of the bench."""

    rotor: RotorPicture
    curves: tuple[PlaneCurve, ...]
    changes: tuple[ChangeMark, ...]
    caption: tuple[str, ...]
    counted: str


def show_rotor(
    view: Assessment,
    act: NextAct,
    attempt: Attempt | None,
    reading: Reading | None,
    so_far: SoFar,
) -> Shown:
    """Draw what is on, what is in hand, and what the survey says."""
    plan = view.job.plan
    step = act.step
    first = plan.steps[0].key
    runout = reading is not None and isinstance(reading.survey, RunoutSurvey)
    active = reading.active if reading is not None else None
    station = active.station if active is not None and runout else None
    rotor = rotor_picture(
        view,
        step=step if step is not None else (None if act.act is Act.NOTHING else first),
        attempt=act.attempt or 1,
        lifted_gap=_gap(attempt),
        label=_label(act, attempt),
        active=station,
        read=so_far.stations_read if runout else None,
    )
    units = unit_set(plan.rotor.units)
    unit = "0.0001 in" if units.name == "inch" else "µm"
    return Shown(
        rotor=rotor,
        curves=_curves(view, attempt, so_far, station),
        changes=_changes(view, attempt, reading, so_far, station),
        caption=("change", f"{unit} TIR"),
        counted="counterclockwise" if plan.rotor.rotation == "clockwise" else "clockwise",
    )


def _is_on(attempt: Attempt | None) -> bool:
    return attempt is not None and any(
        one.mount is not None and one.mount.outcome == "seated" and one.removal is None
        for one in attempt.items
    )


def _gap(attempt: Attempt | None) -> float:
    """Give the radial gap by which the part in hand hangs above its seat; 0 once it is on."""
    if attempt is None or _is_on(attempt):
        return 0.0 if attempt is not None else _LIFT
    clearance = attempt.items[0].item.mounting_clearance
    return clearance.value.si / 2.0 if clearance is not None else _LIFT


def _label(act: NextAct, attempt: Attempt | None) -> str:
    if attempt is None:
        return ""
    on = "on, " if _is_on(attempt) else ""
    return f"{attempt.items[0].item.name}, {on}attempt {act.attempt}"


def _curves(
    view: Assessment, attempt: Attempt | None, so_far: SoFar, station: str | None
) -> tuple[PlaneCurve, ...]:
    curves = []
    before = attempt.baseline if attempt is not None else view.last_accepted_survey
    if before is not None:
        curves.append(curve(view.job, before, Curve.BEFORE))
    after = so_far.survey if so_far.survey is not None else (attempt.judged if attempt else None)
    if after is not None and after.in_axis is not None:
        curves.append(curve(view.job, after, Curve.AFTER, active=station))
    return tuple(curves)


def _changes(
    view: Assessment,
    attempt: Attempt | None,
    reading: Reading | None,
    so_far: SoFar,
    station: str | None,
) -> tuple[ChangeMark, ...]:
    if attempt is None:
        return ()
    if reading is not None and isinstance(reading.survey, RunoutSurvey):
        due = [one.station for one in reading.survey.stations]
        return change_marks(
            view, attempt.step, so_far.changes, so_far.findings, active=station, to_come=due
        )
    due = [one.key for one in view.job.plan.stations_in_reach(attempt.step.key)]
    return change_marks(
        view, attempt.step, attempt.changes, findings_by_station(attempt), to_come=due
    )


def drop_of(view: ItemView) -> Drop | None:
    """Give the drop window of a hot item from its coldest measured bore, as cautious ranges."""
    heat = view.heat
    window = heat.window if heat is not None else None
    if heat is None or window is None:
        return None
    words = (
        "Ranges, never promises, from the coldest bore measured: the hot-bore gauge decides, and "
        "eyes belong on the load."
    )
    if not window.lumped_holds:
        words += " The part is thick: its bore may cool faster than this view says."
    radial = window.clearance_now / 2.0
    gap = GapPicture(gap=radial, opening_gap=radial, least_gap=radial) if radial > 0 else None
    return Drop(
        in_air=(window.in_air_least, _bounded(window.in_air_greatest)),
        over_seat=(window.over_seat_least, _hoped(window)),
        gap=gap,
        words=words,
    )


def _hoped(window: DropWindow) -> float:
    """Hold the hopeful end over the seat to what sleeves, collars and hubs are known to take.

    It rests on a shaft that stays cold, which is too much to hope for under a thick disc.
    """
    return max(window.over_seat_least, min(_bounded(window.over_seat_greatest), _LONGEST_KNOWN))


def _bounded(seconds: float) -> float:
    """Hold a time that never ends to an hour, the longest anybody waits with a hot part."""
    return min(seconds, 3600.0) if not math.isnan(seconds) else 0.0
