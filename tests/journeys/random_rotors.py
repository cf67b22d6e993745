"""Random rotors of known truth: a shaft read bare, one part mounted, the shaft read again.

Imports nothing that works a survey out: readings are made from an offset circle, an ovality, the
lie of the rotor on its supports, one kink, noise and the indicator's step.
"""

import cmath
import math
from dataclasses import dataclass

import msgspec
import numpy as np

from models import jobfile
from models.assess import Assessment, assess
from models.job import (
    AttemptOpened,
    Job,
    Place,
    RunoutSurvey,
    SetUp,
    StationReadings,
)
from models.units import Length
from sample_data.load import compressor

__all__ = ["Rotor", "judged", "make"]

STEP_IN_METRES = 2.54e-6
NOISE = 0.6e-6
START = "2026-11-02T08:00:00-05:00"


@dataclass(frozen=True)
class Rotor:
    """A job with two surveys, and what the mount truly changed at each station [m]."""

    job: Job
    truth: dict[str, complex]


def _kink(position: float, at: float, first: float, second: float) -> float:
    """Offset of a shaft bent by one radian at one place, in the axis through both journals."""
    bent = max(0.0, position - at)
    line = max(0.0, second - at) * (position - first) / (second - first)
    start = max(0.0, first - at)
    return bent - start - (line - start * (position - first) / (second - first))


def make(seed: int) -> Rotor:
    """Make one random rotor."""
    random = np.random.default_rng(seed)
    base = _with_honest_uncertainty(compressor())
    plan = base.plan
    step = plan.steps[0]
    reach = plan.stations_in_reach(step.key)
    bare_reach = plan.stations_in_reach(None)
    first = plan.station(plan.first_journal).position.si
    second = plan.station(plan.second_journal).position.si
    own = {one.key: _vector(random, 15e-6) for one in plan.stations}
    for journal in (plan.first_journal, plan.second_journal):
        own[journal] = 0j
    oval = {one.key: _vector(random, 2e-6) for one in plan.stations}
    at = random.uniform(first, second)
    bend = _vector(random, 60e-6)
    # A change is told in the axis through both journals, and so is the truth.
    change = {one.key: bend * _kink(one.position.si, at, first, second) for one in plan.stations}

    def survey(name: str, purpose: str, place: Place, with_change: bool) -> RunoutSurvey:
        lie = (_vector(random, 20e-6), _vector(random, 20e-6))
        stations = []
        for one in reach if with_change else bare_reach:
            along = (one.position.si - first) / (second - first)
            offset = own[one.key] + lie[0] * (1.0 - along) + lie[1] * along
            if with_change:
                offset += change[one.key]
            typed = _readings(random, plan.runout.marks, offset, oval[one.key])
            stations.append(StationReadings(station=one.key, typed=typed[:-1], again=typed[-1]))
        return RunoutSurvey(
            id=name,
            place=place,
            by="AT",
            done_at=START,
            entered_at=START,
            plan=plan.revision,
            purpose=purpose,
            set_up=SetUp(attitude="horizontal", supports="lined V-blocks"),
            unit="in",
            angles=plan.runout.marks,
            stations=tuple(stations),
            instrument=base.instruments[0].tag,
            closed_at=START,
        )

    here = Place(kind="attempt", step=step.key, attempt=1)
    opened = AttemptOpened(
        id="opened",
        place=here,
        by="AT",
        done_at=START,
        entered_at=START,
        plan=plan.revision,
        baseline="bare",
    )
    entries = (
        survey("bare", "bare shaft", Place(kind="bare shaft"), with_change=False),
        opened,
        survey("after", "after", here, with_change=True),
    )
    return Rotor(msgspec.structs.replace(base, entries=entries, verdicts=()), change)


def judged(rotor: Rotor) -> Assessment:
    """Send the job through a job file, as from another shop, and judge it."""
    return assess(jobfile.loads(jobfile.dumps(rotor.job)))


def _with_honest_uncertainty(job: Job) -> Job:
    """State what these readings really have: their noise and their step, and marks hit exactly."""
    method = msgspec.structs.replace(
        job.plan.runout,
        reading_uncertainty=Length.from_si(
            math.hypot(NOISE, STEP_IN_METRES / math.sqrt(12.0)), "µm", 3
        ),
        mark_uncertainty=None,
    )
    plan = msgspec.structs.replace(job.plan, runout=method)
    return msgspec.structs.replace(job, plans=(*job.plans[:-1], plan))


def _vector(random: np.random.Generator, size: float) -> complex:
    return complex(*random.normal(0.0, size, 2))


def _readings(
    random: np.random.Generator, marks: tuple, offset: complex, oval: complex
) -> tuple[str, ...]:
    angles = [math.radians(mark.si) for mark in marks]
    angles.append(angles[0])
    surface = [
        abs(offset) * math.cos(angle - cmath.phase(offset))
        + abs(oval) * math.cos(2.0 * angle - cmath.phase(oval))
        + random.normal(0.0, NOISE)
        for angle in angles
    ]
    # A technician sets the indicator to nothing at the first mark.
    steps = [round((value - surface[0]) / STEP_IN_METRES) for value in surface]
    return tuple(f"{step * 1e-4:.4f}" for step in steps)
