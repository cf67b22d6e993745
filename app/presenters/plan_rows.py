"""The rows of the Plan desk, each from the plan as it was issued."""

from __future__ import annotations

from collections import defaultdict
from collections.abc import Iterator
from dataclasses import dataclass

from models.assess.land_limits import limits_of
from models.job import Item, Land, LengthLimit, Plan, Station, Step

__all__ = ["MethodRow", "StationRow", "StepRow", "method_rows", "station_row", "step_rows"]


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


def step_rows(plan: Plan, number: int, step: Step) -> Iterator[StepRow]:
    """List the lands of a step, with limits and where each limit comes from."""
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
    least, greatest = limits_of(land)
    name = f"{land.fit_by_name}\n" if land.least_interference is None else ""
    return f"{name}{least.value.written} to\n{greatest.value.written}"


def _origins(step: Step, item: Item, land: Land | None) -> str:
    """Name each document once, with the limits that come from it."""
    limits: list[tuple[str, str]] = []
    if land is not None:
        limits += [("fit", limit.origin.words) for limit in limits_of(land)]
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


def station_row(plan: Plan, station: Station) -> StationRow:
    """Say where a station is and when it can be read."""
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


def method_rows(plan: Plan) -> Iterator[MethodRow]:
    """Say how the shaft is surveyed and judged."""
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
