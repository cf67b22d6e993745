"""One act of every kind, each on a record that stands just before it.

A new kind of act needs a case here: what the record holds before (a function that fills it through
the program's own writer), and the act, with an `act_id` that a retry gives again.
"""

from collections.abc import Callable, Iterator
from contextlib import contextmanager
from dataclasses import dataclass
from functools import cache, partial
from pathlib import Path
from tempfile import TemporaryDirectory

import msgspec

from models import jobfile
from models.acts import Acts
from models.acts.backups import back_up, restore
from models.acts.carrying import with_chain
from models.job import (
    AnyEntry,
    GaugeTry,
    Hot,
    Job,
    Place,
    Question,
    RunoutReading,
    RunoutSurvey,
    SizeReading,
    SizeSurvey,
    Warmth,
)
from models.record.store import Store
from models.record.verify import verify
from models.units import Angle
from tests.record.a_job import ANGLES, FORGING, NUMBER, a_job, a_survey, at, celsius, common, mm
from tests.record.survival.key_cases import key_cases
from tests.record.survival.thing_cases import thing_cases

__all__ = ["CASES", "Case", "verified"]

ID = "the act under test"


def _job() -> Job:
    """Give the invented job without the station that its plan does not know."""
    job = a_job()
    known = {station.key for station in job.plan.stations}
    entries = [
        msgspec.structs.replace(
            entry, stations=tuple(one for one in entry.stations if one.station in known)
        )
        if isinstance(entry, RunoutSurvey)
        else entry
        for entry in job.entries
    ]
    return msgspec.structs.replace(job, entries=tuple(entries))


_JOB = _job()


@dataclass(frozen=True)
class Case:
    """What the record holds before, and the act; the act of a retry is the very same call."""

    fill: Callable[[Store], None]
    act: Callable[[Store], object]

    def before(self, folder: Path) -> None:
        """Make the record as it stands just before, out of an empty one."""
        with Store.open(folder) as store:
            self.fill(store)

    @contextmanager
    def opened(self, folder: Path) -> Iterator[Callable[[], object]]:
        """Open the record and hand out the act, which may be done again and again."""
        with Store.open(folder) as store:
            yield partial(self.act, store)

    def repeat(self, folder: Path) -> list[str]:
        """Open the record as after a restart, do the act twice, and say what does not verify."""
        with Store.open(folder) as store:
            troubles = verified(store)
            self.act(store)
            self.act(store)
            return troubles + verified(store)


def verified(store: Store) -> list[str]:
    """Say what does not verify."""
    with store.reading() as session:
        return [trouble.words for trouble in verify(session).troubles]


def _nothing(store: Store) -> None:
    """Leave a new record as it is."""


def _job_with(entries: tuple[AnyEntry, ...], store: Store) -> None:
    job = msgspec.structs.replace(_JOB, entries=entries, verdicts=())
    Acts(store).bring_in(job, by="tom", act_id="brought")


def _entry_cases() -> Iterator[tuple[str, Case]]:
    """Record the first entry of each kind of the invented job, on all that came before it."""
    seen: set[type] = set()
    for number, entry in enumerate(_JOB.entries):
        if type(entry) in seen:
            continue
        seen.add(type(entry))
        # What already happened is always taken, so a case needs no whole story before it.
        told = msgspec.structs.replace(entry, out_of_order="told afterwards")
        yield (
            f"record {type(entry).__name__}",
            Case(partial(_job_with, _JOB.entries[:number]), partial(_record, told)),
        )


def _record(entry: AnyEntry, store: Store) -> object:
    return Acts(store).record(NUMBER, entry, act_id=ID)


def _with_open_entries(store: Store) -> None:
    """Bring the whole job in, and open a survey of each kind that still takes readings."""
    _job_with(_JOB.entries, store)
    acts = Acts(store)
    final = Place(kind="final")
    survey = a_survey("open", final, 199, purpose="final", out_of_order="told afterwards")
    acts.record(NUMBER, survey)
    sizes = SizeSurvey(
        **common("open sizes", final, 199),
        item="w1",
        land="front",
        feature="bore",
        instrument="BG-2",
        unit="mm",
        positions=(mm("310"),),
        angles=ANGLES[:2],
        typed=((None, None),),
        out_of_order="told afterwards",
    )
    acts.record(NUMBER, sizes)
    reading = RunoutReading(station="middle", mark=0, typed="7")
    acts.add_reading(NUMBER, "open", reading, by="tom", act_id="first reading")


_READINGS = {
    "RunoutReading": ("open", RunoutReading(station="middle", mark=1, typed="3")),
    "RunoutReading corrected": ("after one", RunoutReading(station="middle", mark=0, typed="9")),
    "SizeReading": ("open sizes", SizeReading(position=0, angle=1, typed="119.9")),
    "SizeReading corrected": ("bore", SizeReading(position=0, angle=0, typed="119.9")),
    "Hot": ("heat", Hot(where="web", temperature=celsius("260"), at=at(51))),
    "Hot corrected": (
        "heat",
        Hot(where="rim", temperature=celsius("260"), at=at(51), angle=Angle.read("90°")),
    ),
    "Warmth": ("cool", Warmth(position=mm("40"), angle=ANGLES[0], temperature=celsius("20"))),
    "Warmth corrected": (
        "cool",
        Warmth(position=mm("450"), angle=ANGLES[0], temperature=celsius("20")),
    ),
    "GaugeTry": ("heat", GaugeTry(land="front", size=mm("120.35"), passed=True, at=at(52))),
    "GaugeTry corrected": (
        "heat",
        GaugeTry(land="front", size=mm("120.30"), passed=True, at=at(52)),
    ),
}


def _add_reading(kind: str, store: Store) -> object:
    entry_id, reading = _READINGS[kind]
    reason = "misread" if kind.endswith("corrected") else None
    return Acts(store).add_reading(NUMBER, entry_id, reading, by="tom", act_id=ID, reason=reason)


def _answer(store: Store) -> object:
    said = Question(where=("middle", "0"), question="7?", answer="yes", by="tom", at=at(201))
    return Acts(store).answer(NUMBER, "open", said, act_id=ID)


def _close_survey(store: Store) -> object:
    return Acts(store).close_survey(NUMBER, "open", by="tom", act_id=ID)


def _bring_in(store: Store) -> None:
    job = msgspec.structs.replace(_JOB, entries=_JOB.entries[:3])
    Acts(store).bring_in(job, by="tom", act_id=ID)


def _keep_material(store: Store) -> object:
    return Acts(store).keep_material(FORGING, person=_JOB.people[2], act_id=ID)


def _back_up(store: Store) -> object:
    return back_up(store, act_id=ID)


def _backed_up(store: Store) -> None:
    """Back up, and record one more reading, which a restoring leaves behind."""
    _with_open_entries(store)
    back_up(store, act_id="backed up")
    _add_reading("RunoutReading", store)


def _restore(store: Store) -> object:
    folder = store.path.parent
    (backup,) = folder.glob("backups/*")
    return restore(backup, folder, act_id="restored")


@cache
def _file_with_chain() -> bytes:
    with TemporaryDirectory() as folder, Store.open(Path(folder)) as store:
        _job_with(_JOB.entries[:3], store)
        job, chain = with_chain(store, NUMBER)
        return jobfile.dumps(job, chain)


def _take_in(store: Store) -> object:
    return Acts(store).take_in(_file_with_chain(), by="tom", act_id=ID)


CASES: dict[str, Case] = {
    "take_in": Case(_nothing, _take_in),
    "bring_in": Case(_nothing, _bring_in),
    **dict(_entry_cases()),
    **{
        f"add_reading {kind}": Case(_with_open_entries, partial(_add_reading, kind))
        for kind in _READINGS
    },
    "answer": Case(_with_open_entries, _answer),
    "back_up": Case(_with_open_entries, _back_up),
    "restore": Case(_backed_up, _restore),
    **{name: Case(*case) for name, case in thing_cases(_JOB).items()},
    "keep_material": Case(_nothing, _keep_material),
    "close_survey": Case(_with_open_entries, _close_survey),
    **{name: Case(*case) for name, case in key_cases(_JOB).items()},
}
