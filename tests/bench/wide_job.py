"""Wide jobs to measure with: one survey of many stations, and a stack of many parts; all invented.

Both grow from the demo's compressor: its first impeller's attempt, with every entry of it, is laid
out again for each part and attempt, with readings that scatter by a step or two of the indicator.
"""

import math

import msgspec
import numpy as np

from models.job import (
    AnyEntry,
    AttemptOpened,
    Job,
    Place,
    Removal,
    RunoutSurvey,
    Settled,
    StationReadings,
    Step,
)
from models.units import Angle, Length
from sample_data.load import compressor

__all__ = ["forty_parts", "forty_stations"]

FIRST = "impeller-1"


def forty_stations(stations: int, marks: int) -> Job:
    """Lay out one attempt whose two surveys have so many stations and marks."""
    job, random = compressor(), np.random.default_rng(7)
    plan = job.plan
    journals = (plan.first_journal, plan.second_journal)
    first, second = (plan.station(key).position.si for key in journals)
    between = tuple(
        msgspec.structs.replace(
            plan.station(journals[0]),
            key=f"S{number}",
            name=f"shaft {number}",
            kind="shaft",
            position=Length.from_si(first + (second - first) * number / (stations - 1), "in", 3),
        )
        for number in range(1, stations - 1)
    )
    angles = tuple(Angle.read(f"{360.0 * mark / marks:g}", "°") for mark in range(marks))
    plan = msgspec.structs.replace(
        plan,
        stations=(plan.station(journals[0]), *between, plan.station(journals[1])),
        runout=msgspec.structs.replace(plan.runout, marks=angles),
    )
    step = plan.steps[0]
    entries: list[AnyEntry] = []
    keys = tuple(one.key for one in plan.stations)
    for entry in job.entries:
        if isinstance(entry, RunoutSurvey):
            if entry.purpose == "bare shaft" or entry.place == _place(step.key, 1):
                entries.append(_read_anew(entry, keys, angles, random))
        elif entry.place == _place(step.key, 1):
            entries.append(entry)
    return msgspec.structs.replace(job, plans=(plan,), entries=tuple(entries), verdicts=())


def forty_parts(parts: int, attempts: int) -> Job:
    """Lay out a stack of so many parts with so many attempts each; all but the last came off."""
    job, random = compressor(), np.random.default_rng(11)
    plan = job.plan
    model = plan.steps[0]
    stations = tuple(
        msgspec.structs.replace(one, reached_from=None, covered_by=None) for one in plan.stations
    )
    steps = tuple(_step(model, number) for number in range(1, parts + 1))
    plan = msgspec.structs.replace(plan, steps=steps, stations=stations)
    old = _place(model.key, 1)
    mine = [one for one in job.entries if one.place == old]
    keys = tuple(one.key for one in stations)
    bare = next(
        one for one in job.entries if isinstance(one, RunoutSurvey) and one.purpose == "bare shaft"
    )
    entries: list[AnyEntry] = [_read_anew(bare, keys, bare.angles, random)]
    for step in steps:
        for attempt in range(1, attempts + 1):
            place = _place(step.key, attempt)
            for entry in mine:
                moved = _moved(entry, place, f"{step.key}/{attempt}/{entry.id}")
                if isinstance(moved, RunoutSurvey):
                    moved = _read_anew(moved, keys, moved.angles, random)
                if isinstance(moved, AttemptOpened):
                    moved = msgspec.structs.replace(moved, baseline=bare.id, components=())
                if isinstance(moved, Settled) and attempt < attempts:
                    entries.append(_removal(moved, place))
                    moved = msgspec.structs.replace(moved, outcome="removed")
                entries.append(moved)
    return msgspec.structs.replace(job, plans=(plan,), entries=tuple(entries), verdicts=())


def _place(step: str, attempt: int) -> Place:
    return Place(kind="attempt", step=step, attempt=attempt)


def _step(model: Step, number: int) -> Step:
    items = tuple(msgspec.structs.replace(one, key=f"part-{number}") for one in model.items)
    return msgspec.structs.replace(model, key=f"step-{number}", title=f"Part {number}", items=items)


def _moved(entry: AnyEntry, place: Place, key: str) -> AnyEntry:
    changes: dict[str, object] = {"place": place, "id": key}
    if entry.supersedes is not None:
        changes["supersedes"] = f"{key.rsplit('/', 1)[0]}/{entry.supersedes}"
    if getattr(entry, "item", None) is not None:
        changes["item"] = f"part-{(place.step or '').rsplit('-', 1)[1]}"
    return msgspec.structs.replace(entry, **changes)


def _removal(settled: Settled, place: Place) -> Removal:
    return Removal(
        id=f"{settled.id}/off",
        place=place,
        by=settled.by,
        done_at=settled.done_at,
        entered_at=settled.entered_at,
        plan=settled.plan,
        item=f"part-{(place.step or '').rsplit('-', 1)[1]}",
        method="heated and drawn off",
    )


def _read_anew(
    survey: RunoutSurvey,
    keys: tuple[str, ...],
    angles: tuple[Angle, ...],
    random: np.random.Generator,
) -> RunoutSurvey:
    turns = np.array([math.radians(angle.si) for angle in angles])
    stations = []
    for key in keys:
        size, phase = random.uniform(1.0, 6.0), random.uniform(0.0, 6.28)
        steps = np.rint(size * np.cos(turns - phase) + random.normal(0.0, 0.3, len(turns)))
        typed = tuple(f"{step * 1e-4:.4f}" for step in steps)
        stations.append(StationReadings(station=key, typed=typed, again=typed[0]))
    return msgspec.structs.replace(
        survey, angles=angles, stations=tuple(stations), corrections=(), kept=()
    )
