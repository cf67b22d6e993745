"""The plan in force, as tables and a drawing, with what its calculations still lack in words."""

from __future__ import annotations

from collections import defaultdict
from collections.abc import Iterator, Mapping
from dataclasses import dataclass, replace

from PySide6.QtCore import QObject, Signal

from app.presenters.shop import ShopPresenter
from app.presenters.wording import day_and_time
from models.engineering.materials import MATERIALS
from models.job import Item, Land, LengthLimit, Plan, Station, Step
from reports import job_pictures
from reports.sheet.pictures import RotorPicture

__all__ = ["LackRow", "MethodRow", "PlanPresenter", "StationRow", "StepRow", "lacks_of"]

_MOST_NAMED = 3


@dataclass(frozen=True, kw_only=True)
class StepRow:
    """One land of one item of a step; an item without lands has one row."""

    step: str
    number: str
    part: str
    land: str
    interference: str
    heat: str
    axial: str
    change: str
    signs: str
    origins: str


@dataclass(frozen=True, kw_only=True)
class StationRow:
    """One station."""

    key: str
    name: str
    kind: str
    position: str
    reach: str
    limit: str


@dataclass(frozen=True, kw_only=True)
class MethodRow:
    """One thing agreed for the whole job."""

    what: str
    words: str


@dataclass(frozen=True, kw_only=True)
class LackRow:
    """Something the plan leaves out, and what is not judged for it."""

    missing: str
    where: str
    so: str


class PlanPresenter(QObject):
    """Reads the plan of the job on the desks; changes nothing."""

    changed = Signal()
    """Another plan is to be shown."""

    def __init__(self, shop: ShopPresenter, parent: QObject | None = None) -> None:
        super().__init__(parent)
        self._shop = shop
        shop.job_changed.connect(self.changed)

    @property
    def plan(self) -> Plan | None:
        """The plan in force, None while no job lies on the desks."""
        return self._shop.job.plan if self._shop.job is not None else None

    @property
    def empty_words(self) -> str:
        """What to say where there is no plan to show."""
        if self._shop.job_number:
            return f"working: job {self._shop.job_number} is being read"
        return "No job lies on the desks. Choose one at the Jobs desk."

    @property
    def heading(self) -> str:
        """Rotor and revision."""
        plan = self.plan
        if plan is None:
            return ""
        invented = " (invented)" if plan.rotor.invented else ""
        return f"{plan.rotor.serial}{invented}, plan {plan.revision}"

    @property
    def standing(self) -> str:
        """Who wrote and issued it, when and why."""
        job, plan = self._shop.job, self.plan
        if job is None or plan is None:
            return ""
        names = {one.key: one.name for one in job.people}
        words = (
            f"Written by {names.get(plan.written_by, plan.written_by)}, issued by "
            f"{names.get(plan.issued_by, plan.issued_by)} {day_and_time(plan.issued_at)}: "
            f"{plan.reason.rstrip('.')}."
        )
        if plan.approved_by:
            words += f" Approved by {names.get(plan.approved_by, plan.approved_by)}."
        return words

    def picture(self, step: str | None) -> RotorPicture | None:
        """Draw the whole rotor with the parts numbered by step and every station.

        Parameters
        ----------
        step : str or None
            The step whose parts stand out; none stands out for None.

        Returns
        -------
        RotorPicture or None
            None while there is no plan.
        """
        view = self._shop.view
        if view is None:
            return None
        drawn = job_pictures.rotor_picture(view, step=step, numbers=True, every_station=True)
        # Every part is drawn as it will be; the row that is looked at says which one is meant.
        whole = job_pictures.rotor_picture(view, step=None, numbers=True, every_station=True)
        meant = {part.key for part in drawn.parts if part.state.value == "current"}
        parts = tuple(
            next(one for one in drawn.parts if one.key == part.key) if part.key in meant else part
            for part in whole.parts
        )
        return replace(whole, parts=parts)

    @property
    def steps(self) -> tuple[StepRow, ...]:
        """The stacking steps with lands, limits and where each limit comes from."""
        plan = self.plan
        if plan is None:
            return ()
        return tuple(
            row
            for number, step in enumerate(plan.steps, start=1)
            for row in _step_rows(plan, number, step)
        )

    @property
    def stations(self) -> tuple[StationRow, ...]:
        """The stations in order along the rotor, with reach and final limit."""
        plan = self.plan
        if plan is None:
            return ()
        ordered = sorted(plan.stations, key=lambda one: one.position.whole)
        return tuple(_station_row(plan, one) for one in ordered)

    @property
    def method(self) -> tuple[MethodRow, ...]:
        """How the shaft is surveyed, when it counts as cold, and who takes part."""
        job, plan = self._shop.job, self.plan
        if job is None or plan is None:
            return ()
        people = tuple(
            MethodRow(
                what=one.role, words=", ".join(part for part in (one.name, one.employer) if part)
            )
            for one in job.people
        )
        return (*_method_rows(plan), *people)

    @property
    def lacks(self) -> tuple[LackRow, ...]:
        """What the plan leaves out."""
        return lacks_of(self.plan) if self.plan is not None else ()


def _step_rows(plan: Plan, number: int, step: Step) -> Iterator[StepRow]:
    for item in step.items:
        for land in item.lands or (None,):
            of_item = land in (None, *item.lands[:1])
            of_step = of_item and item is step.items[0]
            cap, place, change = item.highest_temperature, item.axial, step.change_limit
            yield StepRow(
                step=step.key,
                number=str(number) if of_step else "",
                part=f"{item.name}\n{item.kind}, from the {_end(plan, item)}" if of_item else "",
                land=_land_words(land),
                interference=_fit_words(land),
                heat=f"at most {cap.value.written}" if cap is not None and of_item else "",
                axial=f"{place.target.written}\n± {place.tolerance.written}"
                if place is not None and of_item
                else "",
                change=f"{change.value.written} TIR"
                if change is not None and step.survey_due and of_step
                else "",
                signs=_point_words(step) if of_step else "",
                origins=_origins(step, item, land),
            )


def _end(plan: Plan, item: Item) -> str:
    first = item.from_end == "first end"
    return plan.rotor.first_end if first else plan.rotor.second_end


def _point_words(step: Step) -> str:
    return "\n".join(f"{one.kind}: {one.role}, {one.what}" for one in step.points)


def _land_words(land: Land | None) -> str:
    if land is None:
        return ""
    extent = f"from {land.start.written} to {land.end.written}"
    return f"{land.key}: Ø {land.nominal_diameter.written}\n{extent}"


def _fit_words(land: Land | None) -> str:
    if land is None:
        return ""
    least, greatest = land.least_interference, land.greatest_interference
    return f"{least.value.written} to\n{greatest.value.written}"


def _origins(step: Step, item: Item, land: Land | None) -> str:
    """Name each document once, with the limits that come from it."""
    limits: list[tuple[str, str]] = []
    if land is not None:
        limits += [("fit", land.least_interference.origin.words)]
        limits += [("fit", land.greatest_interference.origin.words)]
    if item.highest_temperature is not None:
        limits += [("heat", item.highest_temperature.origin.words)]
    if item.axial is not None:
        limits += [("position", item.axial.origin.words)]
    if step.change_limit is not None and step.survey_due:
        limits += [("change", step.change_limit.origin.words)]
    by_origin: dict[str, list[str]] = defaultdict(list)
    for what, origin in dict.fromkeys(limits):
        by_origin[origin].append(what)
    return "\n".join(f"{', '.join(what)}: {origin}" for origin, what in by_origin.items())


def _limit_words(limit: LengthLimit | None) -> str:
    return f"{limit.value.written} TIR\n{limit.origin.words}" if limit is not None else ""


def _station_row(plan: Plan, station: Station) -> StationRow:
    since = "from the bare shaft"
    if station.reached_from is not None:
        since = f"from step {plan.step_number(station.reached_from)}"
    until = "to the end"
    if station.covered_by is not None:
        until = f"until step {plan.step_number(station.covered_by)} goes on"
    return StationRow(
        key=station.key,
        name=station.name,
        kind=station.kind,
        position=station.position.written,
        reach=f"{since} {until}",
        limit=_limit_words(station.final_limit),
    )


def _method_rows(plan: Plan) -> Iterator[MethodRow]:
    rotor, way, cold = plan.rotor, plan.runout, plan.cooling
    marks = ", ".join(one.written for one in way.marks)
    yield MethodRow(what="marks", words=f"{marks}; {way.order}")
    yield MethodRow(
        what="counted",
        words=f"from {rotor.reference_mark}, against the rotation ({rotor.rotation}), seen from "
        f"the {rotor.seen_from}",
    )
    held = f", held at {', '.join(way.supported_at)}" if way.supported_at else ""
    stop = f", end stop: {way.end_stop}" if way.end_stop else ""
    yield MethodRow(what="set-up", words=f"{way.attitude}, on {way.supports}{held}{stop}")
    if way.close_circle:
        allowed = f"; it may miss by {way.closure_limit.written}" if way.closure_limit else ""
        yield MethodRow(what="circle", words=f"the first mark is read again at the end{allowed}")
    yield MethodRow(
        what="cold",
        words=f"side to side within {cold.side_to_side.written}, above the surroundings within "
        f"{cold.above_surroundings.written}; {cold.origin.words}",
    )
    decided = {
        "proved": "within its limit even with the uncertainty added",
        "simple": "as read, without the uncertainty",
    }
    yield MethodRow(
        what="decision rule", words=f"{plan.decision_rule}: {decided[plan.decision_rule]}"
    )
    for what, limit in (
        ("drift since the bare shaft", plan.drift_limit),
        ("bare shaft", plan.bare_shaft_limit),
    ):
        if limit is not None:
            yield MethodRow(what=what, words=_limit_words(limit).replace("\n", ", "))


def lacks_of(plan: Plan) -> tuple[LackRow, ...]:
    """Say what a plan leaves out, and what is not judged for it.

    Parameters
    ----------
    plan : Plan
        The plan.

    Returns
    -------
    tuple of LackRow
        Each thing once, with every place where it is missing.
    """
    places: dict[tuple[str, str], dict[int, str]] = defaultdict(dict)
    for missing, so in _lacks_of_rotor(plan):
        places[missing, so][0] = "the whole rotor"
    for number, step in enumerate(plan.steps, start=1):
        for missing, so in _lacks_of_step(step):
            places[missing, so][number] = step.title
        for item in step.items:
            title = step.title if len(step.items) == 1 else item.name
            for missing, so in _lacks_of_item(plan, item):
                places[missing, so][number] = title
    return tuple(
        LackRow(missing=missing, where=_places_words(where), so=so)
        for (missing, so), where in places.items()
    )


def _places_words(where: Mapping[int, str]) -> str:
    """Name each step where they are few; their numbers alone, in runs, where they are many."""
    if len(where) <= _MOST_NAMED:
        return "; ".join(f"step {at}, {title}" if at else title for at, title in where.items())
    runs: list[list[int]] = []
    for number in sorted(where):
        if runs and number == runs[-1][-1] + 1:
            runs[-1].append(number)
        else:
            runs.append([number])
    parts = [str(one[0]) if len(one) == 1 else f"{one[0]} to {one[-1]}" for one in runs]
    return f"steps {', '.join(parts)}"


def _lacks_of_rotor(plan: Plan) -> Iterator[tuple[str, str]]:
    rotor = plan.rotor
    if plan.shaft.material not in MATERIALS:
        yield (
            f"material of the shaft (“{plan.shaft.material}” is unknown)",
            "fit and heat not judged",
        )
    if plan.shaft.yield_strength is None:
        yield "yield strength of the shaft", "stress in the seats not judged"
    if rotor.trip_speed is None:
        yield "trip speed", "grip at speed not judged"
    if rotor.power is None or rotor.maximum_continuous_speed is None:
        yield "power and running speed", "torque that friction has to carry not judged"
    if plan.drift_limit is None:
        yield "limit of drift since the bare shaft", "what small changes add up to not judged"
    if plan.runout.reading_uncertainty is None and plan.decision_rule == "proved":
        yield (
            "uncertainty of a reading",
            "taken from the instrument's certificate where there is one",
        )


def _lacks_of_step(step: Step) -> Iterator[tuple[str, str]]:
    if step.survey_due and step.change_limit is None:
        yield "limit of change", "what the mount moved not judged"


def _lacks_of_item(plan: Plan, item: Item) -> Iterator[tuple[str, str]]:
    if item.axial is None:
        yield "axial position", "where the part rests not judged"
    if not item.lands:
        return
    if item.material is None or item.material not in MATERIALS:
        yield "material", "fit, heat and strength not judged"
    if item.kind == "hot" and item.mounting_clearance is None:
        yield "clearance while mounting", "heat target not worked out"
    if item.kind == "hot" and item.highest_temperature is None:
        yield "highest temperature", "heat not judged"
    if item.yield_strength is None:
        yield "yield strength", "stress shown, not judged"
    if any(land.growth is None for land in item.lands):
        yield "growth with speed from its designer", "grip at speed estimated, not judged"
    if item.carried_torque_share is None and not item.keyed:
        yield "share of the torque", "holding by friction not judged"
    roughness = (item.roughness, plan.shaft.roughness, plan.smoothing_factor)
    if any(part is None for part in roughness):
        yield "roughness of both surfaces, or their smoothing", "smoothing not counted"
