"""What a job must hold true in itself, whoever wrote it: names are known, lists fit, order holds.

Nothing here judges the work; a bad fit is a fine job file. It is a fault when a part of the job
cannot be understood: a station nobody planned, twelve marks with eleven readings.
"""

import datetime
import itertools
from collections.abc import Callable, Collection, Iterable, Iterator, Sequence
from typing import ClassVar

from models.job import (
    AnyEntry,
    AttemptOpened,
    BalanceCorrection,
    BalanceRun,
    Cooling,
    Correction,
    DrawUp,
    Heating,
    Item,
    Job,
    Land,
    Mount,
    Plan,
    Question,
    RunoutSurvey,
    Settled,
    Shaft,
    SizeSurvey,
    StationWatched,
    Step,
    TrialRound,
)
from models.jobfile.event_checks import event_faults, standing_faults
from models.jobfile.faults import MISSING, Fault, Words
from models.jobfile.fit_checks import interference_faults
from models.jobfile.material_checks import material_faults
from models.units import Angle, Length, Quantity, UnreadableNumberError

__all__ = ["faults"]

_LONGEST_LIST = 12


def faults(job: Job) -> Iterator[Fault]:
    """Find what does not hold true in a job, in the order in which a file is read."""
    yield from _instant("opened_at", job.opened_at)
    yield from _once("people", "key", (one.key for one in job.people))
    yield from _once("instruments", "tag", (one.tag for one in job.instruments))
    yield from _calibrations(job)
    yield from _once("components", "serial", (one.serial for one in job.components))
    items = dict.fromkeys(item.key for plan in job.plans for item in _items(plan))
    for index, component in enumerate(job.components):
        yield from _known(f"components[{index}].item", component.item, items, "item")
    yield from _once("plans", "revision", (plan.revision for plan in job.plans))
    for index, plan in enumerate(job.plans):
        yield from _plan(f"plans[{index}]", plan)
    yield from _once("entries", "id", (entry.id for entry in job.entries))
    for index, entry in enumerate(job.entries):
        yield from _EntryChecks(job, index, entry).faults()
    yield from standing_faults(job)
    yield from _once("verdicts", "id", (verdict.id for verdict in job.verdicts))
    steps = dict.fromkeys(step.key for plan in job.plans for step in plan.steps)
    for index, verdict in enumerate(job.verdicts):
        yield from _known(f"verdicts[{index}].step", verdict.step, steps, "step")


def _items(plan: Plan) -> tuple[Item, ...]:
    return tuple(item for step in plan.steps for item in step.items)


def _once(place: str, name: str, keys: Iterable[str]) -> Iterator[Fault]:
    seen: set[str] = set()
    for index, key in enumerate(keys):
        if key in seen:
            yield Fault(f"{place}[{index}].{name}", key, "a name that no earlier one has")
        seen.add(key)


def _known(place: str, name: str | None, known: Collection[str], what: str) -> Iterator[Fault]:
    if name is not None and name not in known:
        listed = ", ".join(f"“{one}”" for one in itertools.islice(known, _LONGEST_LIST))
        yield Fault(place, name, f"a known {what}" + (f": {listed}" if listed else "; none is"))


def _instant(place: str, written: str | None) -> Iterator[Fault]:
    if written is None:
        return
    expected = "an instant with its offset, such as 2026-10-05T07:30:00-05:00"
    try:
        instant = datetime.datetime.fromisoformat(written)
    except ValueError:
        yield Fault(place, written, expected)
        return
    if instant.tzinfo is None:
        yield Fault(place, written, expected)


def _calibrations(job: Job) -> Iterator[Fault]:
    for index, instrument in enumerate(job.instruments):
        if instrument.calibration is not None:
            for name in ("done_on", "due_on"):
                written = getattr(instrument.calibration, name)
                try:
                    datetime.date.fromisoformat(written)
                except ValueError:
                    place = f"instruments[{index}].calibration.{name}"
                    yield Fault(place, written, "a date such as 2026-10-05")


def _ascending(place: str, low: tuple[str, Length], high: tuple[str, Length]) -> Iterator[Fault]:
    (low_name, low_value), (high_name, high_value) = low, high
    if low_value.whole >= high_value.whole:
        yield Fault(
            f"{place}.{high_name}", high_value.written, f"more than {low_name} {low_value.written}"
        )


def _clock(place: str, angles: Sequence[Angle], *, required: bool = True) -> Iterator[Fault]:
    if required and not angles:
        yield Fault(place, Words("an empty list"), "at least one angle")
    for index, angle in enumerate(angles):
        yield from _round_the_clock(f"{place}[{index}]", angle)
    for index, (before, after) in enumerate(itertools.pairwise(angles), start=1):
        if after.whole <= before.whole:
            yield Fault(f"{place}[{index}]", after.written, f"more than {before.written}")


def _plain_number(place: str, text: str) -> Iterator[Fault]:
    """Ask for a number that is not negative, as a machine shows it."""
    try:
        good = float(text) >= 0.0
    except ValueError:
        good = False
    if not good:
        yield Fault(place, text, "a number of 0 or more, as the machine shows it")


def _round_the_clock(place: str, angle: Angle | None) -> Iterator[Fault]:
    if angle is not None and not 0 <= angle.si < 360:
        yield Fault(place, angle.written, "an angle from 0 to less than 360 degrees")


def _plan(place: str, plan: Plan) -> Iterator[Fault]:
    yield from _instant(f"{place}.issued_at", plan.issued_at)
    yield from _shaft(f"{place}.shaft", plan.shaft)
    yield from _once(f"{place}.stations", "key", (station.key for station in plan.stations))
    yield from _once(f"{place}.steps", "key", (step.key for step in plan.steps))
    yield from _journals(place, plan)
    steps = {step.key: number for number, step in enumerate(plan.steps)}
    for index, station in enumerate(plan.stations):
        here = f"{place}.stations[{index}]"
        yield from _known(f"{here}.reached_from", station.reached_from, steps, "step")
        yield from _known(f"{here}.covered_by", station.covered_by, steps, "step")
        first, last = steps.get(station.reached_from or ""), steps.get(station.covered_by or "")
        if first is not None and last is not None and last <= first:
            later = f"a step after “{station.reached_from}”, from which it is reached"
            yield Fault(f"{here}.covered_by", station.covered_by, later)
    seen: set[str] = set()
    for index, step in enumerate(plan.steps):
        yield from _step(f"{place}.steps[{index}]", step, seen)
    yield from _clock(f"{place}.runout.marks", plan.runout.marks)
    yield from _once(f"{place}.materials", "name", (own.name for own in plan.materials))
    for index, own in enumerate(plan.materials):
        yield from material_faults(f"{place}.materials[{index}]", own)


def _journals(place: str, plan: Plan) -> Iterator[Fault]:
    journals = [station.key for station in plan.stations if station.kind == "journal"]
    for name in ("first_journal", "second_journal"):
        yield from _known(
            f"{place}.{name}", getattr(plan, name), journals, "station of kind journal"
        )
    if plan.first_journal == plan.second_journal:
        other = "another journal than the first"
        yield Fault(f"{place}.second_journal", plan.second_journal, other)


def _shaft(place: str, shaft: Shaft) -> Iterator[Fault]:
    if not shaft.steps:
        yield Fault(f"{place}.steps", Words("an empty list"), "at least one step of the shaft")
    for index, step in enumerate(shaft.steps):
        here = f"{place}.steps[{index}]"
        yield from _ascending(here, ("start", step.start), ("end", step.end))
        yield from _positive(f"{here}.diameter", step.diameter)
    for index, (before, after) in enumerate(itertools.pairwise(shaft.steps), start=1):
        if after.start.whole != before.end.whole:
            expected = f"{before.end.written}, where the step before it ends"
            yield Fault(f"{place}.steps[{index}].start", after.start.written, expected)


def _positive(place: str, quantity: Quantity) -> Iterator[Fault]:
    if quantity.whole <= 0:
        yield Fault(place, quantity.written, "more than 0")


def _step(place: str, step: Step, seen: set[str]) -> Iterator[Fault]:
    for index, item in enumerate(step.items):
        here = f"{place}.items[{index}]"
        if item.key in seen:
            yield Fault(f"{here}.key", item.key, "a name that no earlier one has")
        seen.add(item.key)
        outline = item.outline
        yield from _ascending(f"{here}.outline", ("start", outline.start), ("end", outline.end))
        yield from _positive(f"{here}.outline.bore", outline.bore)
        yield from _ascending(f"{here}.outline", ("bore", outline.bore), ("outer", outline.outer))
        yield from _once(f"{here}.lands", "key", (land.key for land in item.lands))
        for number, land in enumerate(item.lands):
            yield from _land(f"{here}.lands[{number}]", land)


def _land(place: str, land: Land) -> Iterator[Fault]:
    yield from _ascending(place, ("start", land.start), ("end", land.end))
    yield from _positive(f"{place}.nominal_diameter", land.nominal_diameter)
    yield from _ascending(
        place,
        ("nominal_diameter", land.nominal_diameter),
        ("hub_outer_diameter", land.hub_outer_diameter),
    )
    yield from interference_faults(place, land)
    if land.growth is not None:
        yield from _positive(f"{place}.growth.value", land.growth.value)
        yield from _positive(f"{place}.growth.speed", land.growth.speed)


class _EntryChecks:
    """Checks of one entry against the job that holds it."""

    def __init__(self, job: Job, index: int, entry: AnyEntry) -> None:
        self.job = job
        self.entry = entry
        self.place = f"entries[{index}]"
        self.earlier = {one.id: one for one in job.entries[:index]}
        self.people = tuple(person.key for person in job.people)
        self.plan = next((plan for plan in job.plans if plan.revision == entry.plan), None)

    def faults(self) -> Iterator[Fault]:
        entry, place = self.entry, self.place
        revisions = [plan.revision for plan in self.job.plans]
        yield from _known(f"{place}.plan", entry.plan, revisions, "plan revision")
        yield from _known(f"{place}.by", entry.by, self.people, "person")
        yield from _known(f"{place}.written_by", entry.written_by, self.people, "person")
        yield from _instant(f"{place}.done_at", entry.done_at)
        yield from _instant(f"{place}.entered_at", entry.entered_at)
        yield from _known(f"{place}.supersedes", entry.supersedes, self.earlier, "earlier entry")
        yield from self._stays_in_the_visit()
        yield from self._names()
        for kind, check in self._OWN.items():
            if isinstance(entry, kind):
                yield from check(self, entry)
        yield from event_faults(place, entry)
        yield from self._corrections(getattr(entry, "corrections", ()), "corrections")
        yield from self._corrections(getattr(entry, "kept", ()), "kept")

    def _stays_in_the_visit(self) -> Iterator[Fault]:
        where = self.entry.place
        steps = [step.key for step in self.plan.steps] if self.plan else []
        yield from _known(f"{self.place}.place.step", where.step, steps, "step")
        if where.kind == "attempt":
            if where.step is None:
                yield Fault(f"{self.place}.place.step", MISSING, "the step of the attempt")
            if where.attempt is None or where.attempt < 1:
                found = MISSING if where.attempt is None else where.attempt
                yield Fault(f"{self.place}.place.attempt", found, "the attempt, counted from 1")

    def _names(self) -> Iterator[Fault]:
        """Check the names that several kinds of entry carry under one word."""
        instruments = [one.tag for one in self.job.instruments]
        tag = getattr(self.entry, "instrument", None)
        yield from _known(f"{self.place}.instrument", tag, instruments, "instrument")
        named = getattr(self.entry, "item", None)
        yield from _known(f"{self.place}.item", named, self._item_keys(), "item")
        yield from _instant(f"{self.place}.closed_at", getattr(self.entry, "closed_at", None))

    def _item_keys(self) -> list[str]:
        return [item.key for item in _items(self.plan)] if self.plan else []

    def _lands(self, item: str) -> list[str]:
        items = _items(self.plan) if self.plan else ()
        return [land.key for one in items if one.key == item for land in one.lands]

    def _corrections(self, notes: Sequence[Correction | Question], name: str) -> Iterator[Fault]:
        for index, note in enumerate(notes):
            here = f"{self.place}.{name}[{index}]"
            yield from _known(f"{here}.by", note.by, self.people, "person")
            yield from _instant(f"{here}.at", note.at)

    def _attempt(self, entry: AttemptOpened) -> Iterator[Fault]:
        yield from self._names_survey("baseline", entry.baseline)
        serials = [component.serial for component in self.job.components]
        for index, (item, serial) in enumerate(entry.components):
            here = f"{self.place}.components[{index}]"
            yield from _known(f"{here}[0]", item, self._item_keys(), "item")
            yield from _known(f"{here}[1]", serial, serials, "component")

    def _settled(self, entry: Settled) -> Iterator[Fault]:
        yield from self._names_survey("survey", entry.survey)

    def _names_survey(self, name: str, survey: str | None) -> Iterator[Fault]:
        surveys = [key for key, one in self.earlier.items() if isinstance(one, RunoutSurvey)]
        yield from _known(f"{self.place}.{name}", survey, surveys, "earlier runout survey")

    def _sizes(self, entry: SizeSurvey) -> Iterator[Fault]:
        place = self.place
        yield from _known(f"{place}.land", entry.land, self._lands(entry.item), "land of the item")
        yield from self._unit(entry.unit)
        yield from _clock(f"{place}.angles", entry.angles)
        if len(entry.typed) != len(entry.positions):
            found = Words(f"a list of {len(entry.typed)}")
            expected = f"{len(entry.positions)} rows, one for each position"
            yield Fault(f"{place}.typed", found, expected)
        for index, row in enumerate(entry.typed):
            yield from self._row(f"{place}.typed[{index}]", row, entry.angles, entry.unit)

    def _unit(self, unit: str) -> Iterator[Fault]:
        if Length.find_unit(unit) is None:
            expected = f"a unit of length: {', '.join(Length.symbols())}"
            yield Fault(f"{self.place}.unit", unit, expected)

    def _row(
        self, place: str, row: Sequence[str | None], angles: Sequence[Angle], unit: str
    ) -> Iterator[Fault]:
        if len(row) != len(angles):
            expected = f"{len(angles)} readings, one for each angle"
            yield Fault(place, Words(f"a list of {len(row)}"), expected)
        for index, typed in enumerate(row):
            yield from _reading(f"{place}[{index}]", typed, unit)

    def _runout(self, entry: RunoutSurvey) -> Iterator[Fault]:
        yield from self._unit(entry.unit)
        yield from _clock(f"{self.place}.angles", entry.angles, required=False)
        yield from _known(f"{self.place}.read_by", entry.read_by, self.people, "person")
        keys = [one.station for one in entry.stations]
        yield from _once(f"{self.place}.stations", "station", keys)
        known = [station.key for station in self.plan.stations] if self.plan else []
        for index, one in enumerate(entry.stations):
            here = f"{self.place}.stations[{index}]"
            yield from _known(f"{here}.station", one.station, known, "station")
            if len(one.typed) > len(entry.angles):
                expected = f"{len(entry.angles)} readings at most, one for each angle"
                yield Fault(f"{here}.typed", Words(f"a list of {len(one.typed)}"), expected)
            for mark, typed in enumerate(one.typed):
                yield from _reading(f"{here}.typed[{mark}]", typed, entry.unit)
            if len(one.seconds) > len(one.typed):
                expected = f"{len(one.typed)} times at most, one for each reading"
                yield Fault(f"{here}.seconds", Words(f"a list of {len(one.seconds)}"), expected)
            for name in ("again", "swept_total", "total"):
                yield from _reading(f"{here}.{name}", getattr(one, name), entry.unit)
            yield from _round_the_clock(f"{here}.high_spot", one.high_spot)

    def _heating(self, entry: Heating) -> Iterator[Fault]:
        lands = self._lands(entry.item)
        for index, hot in enumerate(entry.temperatures):
            here = f"{self.place}.temperatures[{index}]"
            yield from _instant(f"{here}.at", hot.at)
            yield from _known(f"{here}.land", hot.land, lands, "land of the item")
            yield from _round_the_clock(f"{here}.angle", hot.angle)
        for index, gauge in enumerate(entry.gauge):
            here = f"{self.place}.gauge[{index}]"
            yield from _known(f"{here}.land", gauge.land, lands, "land of the item")
            yield from _instant(f"{here}.at", gauge.at)

    def _mount(self, entry: Mount) -> Iterator[Fault]:
        yield from _instant(f"{self.place}.door_opened_at", entry.door_opened_at)
        yield from _instant(f"{self.place}.seated_at", entry.seated_at)
        yield from _round_the_clock(f"{self.place}.clock_position", entry.clock_position)

    def _cooling(self, entry: Cooling) -> Iterator[Fault]:
        for index, warmth in enumerate(entry.temperatures):
            yield from _round_the_clock(f"{self.place}.temperatures[{index}].angle", warmth.angle)

    def _drawn_up(self, entry: DrawUp) -> Iterator[Fault]:
        if not entry.advances:
            found = Words("an empty list")
            yield Fault(
                f"{self.place}.advances", found, "a stand-off at one clock position or more"
            )
        for index, one in enumerate(entry.advances):
            yield from _round_the_clock(f"{self.place}.advances[{index}].angle", one.angle)

    def _watched(self, entry: StationWatched) -> Iterator[Fault]:
        known = [station.key for station in self.plan.stations] if self.plan else []
        yield from _known(f"{self.place}.station", entry.station, known, "station")
        yield from _round_the_clock(f"{self.place}.angle", entry.angle)

    def _planes(self, *keys: tuple[str, str]) -> Iterator[Fault]:
        asked = self.plan.balance if self.plan else None
        known = [] if asked is None else [asked.first_plane.key, asked.second_plane.key]
        for place, key in keys:
            yield from _known(place, key, known, "correction plane")

    def _balance_run(self, entry: BalanceRun) -> Iterator[Fault]:
        for index, one in enumerate(entry.readings):
            yield from self._planes((f"{self.place}.readings[{index}].plane", one.plane))
            yield from _round_the_clock(f"{self.place}.readings[{index}].angle", one.angle)

    def _balance_correction(self, entry: BalanceCorrection) -> Iterator[Fault]:
        yield from self._planes((f"{self.place}.plane", entry.plane))
        yield from _round_the_clock(f"{self.place}.angle", entry.angle)

    def _trial_round(self, entry: TrialRound) -> Iterator[Fault]:
        yield from self._planes((f"{self.place}.plane", entry.plane))
        for index, one in enumerate(entry.readings):
            place = f"{self.place}.readings[{index}]"
            yield from _round_the_clock(f"{place}.angle", one.angle)
            yield from _plain_number(f"{place}.reading", one.reading)
        if entry.plain is not None:
            yield from _plain_number(f"{self.place}.plain", entry.plain)

    _OWN: ClassVar[dict[type, Callable[..., Iterator[Fault]]]] = {
        AttemptOpened: _attempt,
        SizeSurvey: _sizes,
        RunoutSurvey: _runout,
        Heating: _heating,
        Mount: _mount,
        Cooling: _cooling,
        Settled: _settled,
        DrawUp: _drawn_up,
        BalanceRun: _balance_run,
        BalanceCorrection: _balance_correction,
        TrialRound: _trial_round,
        StationWatched: _watched,
    }


def _reading(place: str, typed: str | None, unit: str) -> Iterator[Fault]:
    if typed is None or Length.find_unit(unit) is None:
        return
    try:
        Length.read(typed, unit)
    except UnreadableNumberError as problem:
        yield Fault(place, typed, str(problem).rpartition("”: ")[2])
