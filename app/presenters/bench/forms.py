"""The bench's forms: the few fields an act needs, and the entries that their answers make."""

from collections.abc import Callable, Mapping, Sequence
from dataclasses import dataclass, replace
from typing import Any, Literal

import msgspec

from app.presenters.bench.cautions import cautions_for
from app.presenters.bench.state import Field, FormTask
from app.presenters.bench.walk import stations_due
from models.acts import Reading, new_id
from models.assess import Assessment, Attempt, ItemView, land_gauge
from models.job import (
    AnyEntry,
    AxialMeasured,
    Check,
    Confirmation,
    Cooling,
    GaugeTry,
    Heating,
    Hot,
    Item,
    Job,
    Land,
    Mount,
    Note,
    Place,
    Removal,
    RunoutSurvey,
    SetUp,
    SizeSurvey,
    StationReadings,
    SurveyPurpose,
    Warmth,
)
from models.rules.progress import Act, NextAct
from models.units import Angle, Length, Temperature, UnitSet, UnreadableNumberError, unit_set
from reports.job_pictures import fit_picture

__all__ = ["Answers", "Bench", "Form", "Made", "form_for", "note_form", "survey_form"]

_YES_NO = (("yes", "Yes"), ("no", "No"), ("does not apply", "Does not apply"))
_CHECKS = (
    ("facing", "Facing the right way"),
    ("match mark", "Match mark found"),
    ("key", "Key and keyway"),
    ("stop", "Stop in place"),
    ("neighbours", "Neighbouring parts free"),
    ("hook", "Hook, slings, reach"),
)
# Where sizes are taken over a land, and how far from its ends (common practice).
_FROM_END = 5e-3
_SHORT_LAND = 0.05


@dataclass(frozen=True)
class Bench:
    """What every form starts from: the job as judged, who acts, and when."""

    view: Assessment
    person: str
    now: Callable[[], str]

    @property
    def job(self) -> Job:
        """The job at the bench."""
        return self.view.job

    @property
    def units(self) -> UnitSet:
        """The job's own unit set."""
        return unit_set(self.job.plan.rotor.units)

    def place(self, act: NextAct) -> Place:
        """Say where an entry of this act belongs."""
        if act.act is Act.SURVEY_BARE_SHAFT:
            return Place(kind="bare shaft")
        return Place(kind="attempt", step=act.step, attempt=act.attempt)

    def instruments(self, *words: str) -> tuple[tuple[str, str], ...]:
        """Offer the instruments of the first kind that the shop has; all if it has none of them."""
        for word in words:
            found = [one for one in self.job.instruments if word in one.kind]
            if found:
                return tuple((one.tag, f"{one.tag}, {one.kind}") for one in found)
        return tuple((one.tag, f"{one.tag}, {one.kind}") for one in self.job.instruments)


@dataclass(frozen=True)
class Made:
    """What a form's answers make: whole entries, and readings of an entry that is open."""

    entries: tuple[AnyEntry, ...] = ()
    readings: tuple[tuple[str, Reading], ...] = ()


@dataclass(frozen=True)
class Answers:
    """A form's answers as text, read by kind; what cannot be read names its field."""

    fields: Mapping[str, Field]
    texts: Mapping[str, str]
    units: UnitSet

    def word(self, key: str) -> str:
        """Give a choice or words; refuse an empty one that is needed."""
        text = self.texts.get(key, "").strip()
        if not text and self.fields[key].needed:
            raise UnreadableNumberError("", f"{self.fields[key].label} is still empty")
        return text

    def temperature(self, key: str) -> Temperature | None:
        """Give a temperature; None where the field may stay empty and does."""
        text = self.word(key)
        if not text:
            return None
        return Temperature.read(text, self.units.unit("temperature"))

    def length(self, key: str, use: str) -> Length:
        """Give a length."""
        return Length.read(self.word(key), self.units.unit(use))


@dataclass(frozen=True)
class Form:
    """A form and what its answers make."""

    task: FormTask
    make: Callable[[Answers], Made]

    def answers(self, texts: Mapping[str, str], units: UnitSet) -> Answers:
        """Hold answers against the form's fields."""
        return Answers({one.key: one for one in self.task.fields}, texts, units)


def form_for(bench: Bench, act: NextAct, attempt: Attempt | None) -> Form | None:
    """Give the form of an act; None where the act has none."""
    if attempt is None:
        return None
    item = next((one for one in attempt.items if one.item.key == act.item), None)
    on_item: dict[Act, Callable[[Bench, NextAct, ItemView], Form]] = {
        Act.MEASURE: _sizes_form,
        Act.CONFIRM_FURNACE: _confirmation_form,
        Act.CONFIRM_DOOR: _confirmation_form,
        Act.HEAT: _heat_form,
        Act.COMPLETE_MOUNT: _mount_form,
        Act.MEASURE_AXIAL: _axial_form,
        Act.REMOVE: _removal_form,
    }
    if act.act is Act.COOL:
        return _cooling_form(bench, act, attempt)
    maker = on_item.get(act.act)
    return maker(bench, act, item) if maker is not None and item is not None else None


def _head(bench: Bench) -> dict[str, Any]:
    at = bench.now()
    return {
        "id": new_id(),
        "by": bench.person,
        "done_at": at,
        "entered_at": at,
        "plan": bench.job.plan.revision,
    }


def _temperature_field(bench: Bench, key: str, label: str, **more: object) -> Field:
    one = Field(key, label, unit=bench.units.unit("temperature"), use="temperature")
    return replace(one, **more)  # type: ignore[arg-type]  # keywords of Field, by name


def _choice(key: str, label: str, choices: Sequence[tuple[str, str]], value: str = "") -> Field:
    return Field(key, label, choices=tuple(choices), value=value)


def _sizes_form(bench: Bench, act: NextAct, view: ItemView) -> Form:
    land = next(one for one in view.item.lands if one.key == act.land)
    feature: Literal["bore", "seat"] = "seat" if act.feature == "seat" else "bore"
    words = "outside micrometer" if feature == "seat" else "bore gauge"
    offered = bench.instruments(*(("outside",) if feature == "seat" else ("bore", "inside")))
    part = "shaft" if feature == "seat" else view.item.name
    task = FormTask(
        heading=f"Measure the {feature}",
        lines=(
            f"{view.item.name}, land {land.key}, nominal {land.nominal_diameter.written}",
            f"Let {part} and {words} lie side by side until both are equally warm.",
        ),
        fields=(
            _choice("instrument", "Instrument", offered, offered[0][0] if offered else ""),
            _temperature_field(bench, "part", f"Temperature of the {part}"),
            _temperature_field(bench, "gauge", "Temperature of the instrument"),
        ),
        take="Begin the readings",
    )

    def make(answers: Answers) -> Made:
        positions, angles = _size_places(bench, land)
        return Made(
            (
                SizeSurvey(
                    **_head(bench),
                    place=bench.place(act),
                    item=view.item.key,
                    land=land.key,
                    feature=feature,
                    instrument=answers.word("instrument"),
                    unit=bench.units.unit("diameter"),
                    positions=positions,
                    angles=angles,
                    typed=(),
                    part_temperature=answers.temperature("part"),
                    gauge_temperature=answers.temperature("gauge"),
                ),
            )
        )

    return Form(task, make)


def _size_places(bench: Bench, land: Land) -> tuple[tuple[Length, ...], tuple[Angle, ...]]:
    """Three axial positions, two on a short land, each in the directions this job measures in."""
    start, end = land.start.si, land.end.si
    away = min(_FROM_END, (end - start) / 4.0)
    places = [start + away, end - away]
    if end - start >= _SHORT_LAND:
        places.insert(1, (start + end) / 2.0)
    unit = bench.units.unit("position")
    decimals = 3 if unit == "in" else 1
    return (
        tuple(Length.from_si(place, unit, decimals) for place in places),
        _size_angles(bench),
    )


def _size_angles(bench: Bench) -> tuple[Angle, ...]:
    """Measure in the directions of the last size survey, else in two at right angles."""
    earlier = [one for one in bench.job.entries if isinstance(one, SizeSurvey)]
    if earlier:
        return earlier[-1].angles
    # Two directions are the least that shows an oval (common practice).
    return (Angle.read("0", "°"), Angle.read("90", "°"))


def _confirmation_form(bench: Bench, act: NextAct, view: ItemView) -> Form:
    before = act.act is Act.CONFIRM_FURNACE
    heat = view.heat
    lines = [f"{view.item.name} belongs on this seat with serial {view.serial or 'unknown'}."]
    if before and heat is not None and heat.target is not None:
        lines.append(
            f"It opens at {bench.units.both(heat.target, 'temperature')}; read the serial on the "
            "part itself."
        )
    task = FormTask(
        heading="Before the furnace" if before else "Before the door opens",
        lines=tuple(lines),
        fields=(
            Field("serial", "Serial read on the part"),
            *(_choice(key, label, _YES_NO) for key, label in _CHECKS),
        ),
        take="Confirm",
        cautions=cautions_for(act.act),
    )

    def make(answers: Answers) -> Made:
        return Made(
            (
                Confirmation(
                    **_head(bench),
                    place=bench.place(act),
                    item=view.item.key,
                    moment="before the furnace" if before else "before the door",
                    serial=answers.word("serial"),
                    checks=tuple(
                        Check(what=key, answer=_answer(answers.word(key))) for key, _ in _CHECKS
                    ),
                ),
            )
        )

    return Form(task, make)


def _answer(word: str) -> Literal["yes", "no", "does not apply"]:
    if word == "yes":
        return "yes"
    return "no" if word == "no" else "does not apply"


def _heat_form(bench: Bench, act: NextAct, view: ItemView) -> Form:
    heat = view.heat
    if heat is None or heat.heating is None:
        return _heating_begins(bench, act, view)
    return _heat_measured(bench, act, view, heat.heating)


def _heat_lines(bench: Bench, view: ItemView) -> tuple[str, ...]:
    heat = view.heat
    if heat is None:
        return ()
    units = bench.units
    lines = []
    if heat.target is not None and heat.plain_target is not None:
        lines.append(
            f"The coldest place of the bore must reach {units.both(heat.target, 'temperature')} "
            f"({units.show(heat.plain_target, 'temperature')} without the margin for its steel)."
        )
    if heat.highest is not None:
        lines.append(f"No place may pass {units.both(heat.highest, 'temperature')}.")
    if heat.gauge_sizes:
        sizes = ", ".join(
            f"land {land} {units.show(size, 'diameter')}" for land, size in heat.gauge_sizes
        )
        lines.append(f"Hot-bore gauge: {sizes}.")
    return tuple(lines)


def _heating_begins(bench: Bench, act: NextAct, view: ItemView) -> Form:
    thermometers = bench.instruments("thermometer")
    methods = (
        ("circulating oven", "Oven"),
        ("induction", "Induction"),
        ("oil bath", "Oil bath"),
        ("gas ring", "Gas ring"),
    )
    task = FormTask(
        heading=f"Heat {view.item.name}",
        lines=_heat_lines(bench, view),
        fields=(
            _choice("method", "Heated in", methods, "circulating oven"),
            _temperature_field(bench, "set_point", "Set point", needed=False),
            _temperature_field(bench, "shaft", "Temperature of the shaft at the seat"),
            _choice("instrument", "Thermometer", thermometers, thermometers[0][0]),
        ),
        take="Heating begins",
        cautions=cautions_for(act.act),
        ranges=fit_picture(bench.job, [(f"land {fit.land.key}", fit, None) for fit in view.fits]),
    )

    def make(answers: Answers) -> Made:
        return Made(
            (
                Heating(
                    **_head(bench),
                    place=bench.place(act),
                    item=view.item.key,
                    method=answers.word("method"),
                    set_point=answers.temperature("set_point"),
                    shaft_temperature=answers.temperature("shaft"),
                    instrument=answers.word("instrument"),
                ),
            )
        )

    return Form(task, make)


def _heat_measured(bench: Bench, act: NextAct, view: ItemView, heating: Heating) -> Form:
    lands = [land.key for land in view.item.lands]
    tried = (("not tried", "Not tried"), ("entered", "Entered"), ("refused", "Did not enter"))
    fields = [
        _temperature_field(bench, f"bore {land}", f"Bore at land {land}", needed=False)
        for land in lands
    ]
    fields += [
        _temperature_field(bench, "web", "Web", needed=False),
        _temperature_field(bench, "rim", "Rim", needed=False),
    ]
    fields += [
        _choice(f"gauge {land}", f"Gauge at land {land}", tried, "not tried") for land in lands
    ]
    task = FormTask(
        heading=f"{view.item.name}, hot",
        lines=_heat_lines(bench, view),
        fields=tuple(fields),
        take="Take these",
        cautions=cautions_for(act.act),
    )

    def make(answers: Answers) -> Made:
        at = bench.now()
        readings: list[tuple[str, Reading]] = []
        for land in lands:
            value = answers.temperature(f"bore {land}")
            if value is not None:
                hot = Hot(where="bore", land=land, temperature=value, at=at)
                readings.append((heating.id, hot))
        web, rim = answers.temperature("web"), answers.temperature("rim")
        if web is not None:
            readings.append((heating.id, Hot(where="web", temperature=web, at=at)))
        if rim is not None:
            readings.append((heating.id, Hot(where="rim", temperature=rim, at=at)))
        readings += [
            (heating.id, one) for land in lands if (one := _gauge_try(answers, view, land, at))
        ]
        if not readings:
            raise UnreadableNumberError("", "nothing has been measured yet")
        return Made(readings=tuple(readings))

    def _gauge_try(answers: Answers, item: ItemView, land: str, at: str) -> GaugeTry | None:
        word = answers.word(f"gauge {land}")
        size = land_gauge(item.heat, land) if item.heat is not None else None
        if word == "not tried" or size is None:
            return None
        unit = bench.units.unit("diameter")
        # One step more than the drawing's digits, rounded up: a gauge must never be too small.
        step = 1e-4 * 0.0254 if unit == "in" else 1e-6
        decimals = 4 if unit == "in" else 3
        careful = Length.from_si(size + step / 2.0, unit, decimals)
        return GaugeTry(land=land, size=careful, passed=word == "entered", at=at)

    return Form(task, make)


def _mount_form(bench: Bench, act: NextAct, view: ItemView) -> Form:
    mount = view.mount
    task = FormTask(
        heading=f"How {view.item.name} came to rest",
        lines=("Entered after the act; the moment it was seated is on record already.",),
        fields=(
            _choice(
                "shoulder",
                "Shoulder",
                (("felt all round", "Felt all round"), ("gap", "A gap")),
            ),
        ),
        take="Take it",
        cautions=cautions_for(Act.MOUNT),
    )

    def make(answers: Answers) -> Made:
        if mount is None:
            raise UnreadableNumberError("", "the part has not gone on")
        return Made(
            (
                Mount(
                    **_head(bench),
                    place=bench.place(act),
                    item=view.item.key,
                    outcome=mount.outcome,
                    door_opened_at=mount.door_opened_at,
                    seated_at=mount.seated_at,
                    shoulder="gap" if answers.word("shoulder") == "gap" else "felt all round",
                    supersedes=mount.id,
                    reason="shoulder felt after the act",
                ),
            )
        )

    return Form(task, make)


def _axial_form(bench: Bench, act: NextAct, view: ItemView) -> Form:
    place = view.item.axial
    lines: tuple[str, ...] = ()
    if place is not None:
        lines = (
            f"From {place.measured_from}: {place.target.written}, ± {place.tolerance.written}.",
        )
    instruments = bench.instruments("depth", "caliper", "micrometer")
    task = FormTask(
        heading=f"Where {view.item.name} rests, cold",
        lines=lines,
        fields=(
            Field("value", "Axial position", unit=bench.units.unit("position"), use="position"),
            _choice("instrument", "Instrument", instruments, instruments[0][0]),
        ),
        take="Take it",
    )

    def make(answers: Answers) -> Made:
        return Made(
            (
                AxialMeasured(
                    **_head(bench),
                    place=bench.place(act),
                    item=view.item.key,
                    state="cold",
                    value=answers.length("value", "position"),
                    instrument=answers.word("instrument"),
                ),
            )
        )

    return Form(task, make)


def _cooling_form(bench: Bench, act: NextAct, attempt: Attempt) -> Form:
    places = _warm_places(bench, attempt)
    thermometers = bench.instruments("thermometer")
    limits = bench.job.plan.cooling
    task = FormTask(
        heading="Is it cold?",
        lines=(
            f"Side to side within {limits.side_to_side.written}, no more than "
            f"{limits.above_surroundings.written} above the room.",
            "Temperatures permit reading; a second survey that agrees is what proves it.",
        ),
        fields=(
            _temperature_field(bench, "room", "Room"),
            *(_temperature_field(bench, key, label) for key, label, _, _ in places),
            _choice("instrument", "Thermometer", thermometers, thermometers[0][0]),
        ),
        take="Take these",
        cautions=cautions_for(act.act),
    )

    def make(answers: Answers) -> Made:
        taken = []
        for key, _, position, angle in places:
            value = answers.temperature(key)
            if value is not None:
                taken.append(Warmth(position=position, angle=angle, temperature=value))
        return Made(
            (
                Cooling(
                    **_head(bench),
                    place=bench.place(act),
                    surroundings=answers.temperature("room"),
                    instrument=answers.word("instrument"),
                    temperatures=tuple(taken),
                ),
            )
        )

    return Form(task, make)


def _warm_places(bench: Bench, attempt: Attempt) -> list[tuple[str, str, Length, Angle]]:
    """Both sides of both journals, and all round the shaft beside the part just mounted."""
    plan = bench.job.plan
    item: Item = attempt.items[0].item
    around = ("0", "90", "180", "270")
    places = [
        (f"part {angle}", f"Beside {item.name}, {angle}°", item.outline.end, Angle.read(angle, "°"))
        for angle in around
    ]
    places += [
        (
            f"{key} {angle}",
            f"Journal {key}, {angle}°",
            plan.station(key).position,
            Angle.read(angle, "°"),
        )
        for key in (plan.first_journal, plan.second_journal)
        for angle in ("0", "180")
    ]
    return places


def _removal_form(bench: Bench, act: NextAct, view: ItemView) -> Form:
    methods = (
        ("heated and drawn off", "Heated, drawn off"),
        ("drawn off cold", "Drawn off cold"),
        ("hydraulic", "Hydraulic"),
    )
    task = FormTask(
        heading=f"Take {view.item.name} off",
        lines=(
            "Heat from the rim inwards, before the hub grows warm; draw straight, stand clear.",
        ),
        fields=(
            _choice("method", "How it came off", methods, "heated and drawn off"),
            _temperature_field(bench, "temperature", "Hottest place", needed=False),
            Field("found", "What bore and seat look like", needed=False),
        ),
        take="It is off",
        cautions=cautions_for(act.act),
    )

    def make(answers: Answers) -> Made:
        return Made(
            (
                Removal(
                    **_head(bench),
                    place=bench.place(act),
                    item=view.item.key,
                    method=answers.word("method"),
                    temperature=answers.temperature("temperature"),
                    found=answers.word("found"),
                ),
            )
        )

    return Form(task, make)


def survey_form(bench: Bench, act: NextAct) -> Form:
    """Give the form that opens a runout survey in the plan's set-up."""
    method = bench.job.plan.runout
    purpose: SurveyPurpose = _purpose(act)
    usual = _usual_set_up(bench, act)
    indicators = bench.instruments("indicator")
    people = tuple((one.key, one.name) for one in bench.job.people if one.role == "technician")
    at = ", ".join(usual.supported_at)
    task = FormTask(
        heading={"bare shaft": "Bare shaft", "bare seat": "Bare seat", "again": "Read again"}.get(
            purpose, "Runout after the mount"
        ),
        lines=(
            f"{method.attitude.capitalize()}, {method.supports}"
            + (f" at {at}" if at else "")
            + ".",
            f"{len(method.marks)} marks, {method.order}; journals first."
            + (f" Rest {method.rest_time}." if method.rest_time else ""),
        ),
        fields=(
            _choice("instrument", "Indicator", indicators, indicators[0][0]),
            _choice("read_by", "Read by", people, bench.person),
            _choice(
                "set_up",
                "Set-up",
                (("the same", "The same"), ("otherwise", "Otherwise")),
                "the same",
            ),
            Field("supports", "If otherwise, how it lies", needed=False),
        ),
        take="Begin the readings",
        cautions=cautions_for(act.act),
    )

    def make(answers: Answers) -> Made:
        other = answers.word("set_up") == "otherwise"
        supports = answers.word("supports")
        if other and not supports:
            raise UnreadableNumberError("", "say how the rotor lies")
        due = stations_due(bench.job.plan, bench.place(act), purpose)
        instrument = answers.word("instrument")
        head = _head(bench)
        head["by"] = answers.word("read_by")
        return Made(
            (
                RunoutSurvey(
                    **head,
                    place=bench.place(act),
                    written_by=bench.person,
                    read_by=answers.word("read_by"),
                    purpose=purpose,
                    set_up=msgspec.structs.replace(
                        usual,
                        supports=supports if other else usual.supports,
                        indicators=(instrument,),
                    ),
                    unit=bench.units.unit("runout"),
                    angles=method.marks,
                    stations=tuple(StationReadings(station=one.key) for one in due),
                    instrument=instrument,
                ),
            )
        )

    return Form(task, make)


def _usual_set_up(bench: Bench, act: NextAct) -> SetUp:
    """Take the set-up of the survey this one is compared with, else the plan's."""
    method = bench.job.plan.runout
    attempt = bench.view.attempt(act.step or "", act.attempt or 0)
    earlier = attempt.baseline if attempt is not None else bench.view.last_accepted_survey
    if earlier is not None:
        return earlier.entry.set_up
    return SetUp(
        attitude=method.attitude,
        supports=method.supports,
        supported_at=method.supported_at,
        end_stop=method.end_stop,
        rest_time=method.rest_time,
        turns_before_reading=method.turns_before_reading,
    )


def _purpose(act: NextAct) -> SurveyPurpose:
    if act.act is Act.SURVEY_BARE_SHAFT:
        return "bare shaft"
    if act.act is Act.SURVEY_SEAT:
        return "bare seat"
    return "again" if act.purpose == "again" else "after"


def note_form(bench: Bench, act: NextAct) -> Form:
    """Give the form of a note, which may be taken at any time."""
    task = FormTask(
        heading="Note",
        lines=("Something seen and worth keeping; it stands in the traveler.",),
        fields=(Field("words", "What you saw"),),
        take="Keep it",
    )

    def make(answers: Answers) -> Made:
        place = bench.place(act) if act.step else Place(kind="bare shaft")
        return Made((Note(**_head(bench), place=place, words=answers.word("words")),))

    return Form(task, make)
