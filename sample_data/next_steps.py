"""What happens at the bench next, on the compressor: its fourth impeller, twice.

Made from the truth, as the job file itself is: plain data, each value as a person types it, so
that it can be typed through the program; and beside it what each mount really changed.
"""

import json
from dataclasses import dataclass
from typing import Any

from models import jobfile
from sample_data.compressor_plan import NEXT
from sample_data.geometry import change_in_journal_axis
from sample_data.make import compressor_job, compressor_story
from sample_data.story import Story

__all__ = ["AttemptAhead", "Told", "next_attempts"]

Told = dict[str, Any]
"""An entry as plain data, in the words of the job file; numbers are text as typed."""


@dataclass(frozen=True)
class AttemptAhead:
    """One attempt ahead: what is measured and done, in order, and what is really so.

    `entries` holds every entry of the attempt in order, signatures and settling among them; the
    rest picks from it. `true_changes` gives, per station that is in reach, the change of its
    eccentricity in the axis through both journals, in m, as a complex number.
    """

    step: str
    number: int
    entries: tuple[Told, ...]
    seat: Told
    bore: Told
    confirmations: tuple[Told, ...]
    heating: Told
    mount: Told
    axial: tuple[Told, ...]
    cooling: tuple[Told, ...]
    after: Told
    removal: Told | None
    bare_seat: Told | None
    note: Told | None
    true_changes: dict[str, complex]
    true_kink_position: float


def next_attempts() -> tuple[AttemptAhead, ...]:
    """Tell both attempts at the next step, from the state in which the job file stands."""
    story = compressor_story()
    told = len(story.entries)
    story.step(NEXT)
    ahead: list[Told] = json.loads(jobfile.dumps(compressor_job(story)))["entries"][told:]
    numbers = sorted({entry["place"]["attempt"] for entry in ahead})
    return tuple(
        _attempt(story, number, [entry for entry in ahead if entry["place"]["attempt"] == number])
        for number in numbers
    )


def _attempt(story: Story, number: int, entries: list[Told]) -> AttemptAhead:
    def every(kind: str, **which: str) -> tuple[Told, ...]:
        return tuple(
            entry for entry in entries if entry.items() >= {"entry": kind, **which}.items()
        )

    def one(kind: str, **which: str) -> Told | None:
        return next(iter(every(kind, **which)), None)

    kink = story.truth.mount(NEXT, number).kink
    return AttemptAhead(
        step=NEXT,
        number=number,
        entries=tuple(entries),
        seat=every("sizes", feature="seat")[0],
        bore=every("sizes", feature="bore")[0],
        confirmations=every("confirmation"),
        heating=every("heating")[0],
        mount=every("mount")[0],
        axial=every("axial"),
        cooling=every("cooling"),
        after=every("runout", purpose="after")[0],
        removal=one("removal"),
        bare_seat=one("runout", purpose="bare seat"),
        note=one("note"),
        true_changes={
            station.key: change_in_journal_axis(story.truth, [kink], station.position.si)
            for station in story.plan.stations_in_reach(NEXT)
        },
        true_kink_position=kink.position,
    )
